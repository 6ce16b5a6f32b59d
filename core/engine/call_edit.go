package engine

import (
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// EditRequest changes fields of a document by what a person typed. Without
// edits it returns the rows to show.
type EditRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	// Drafts are typed texts that could not be read, by field; they are kept
	// until they can be.
	Drafts map[string]string `json:"drafts"`
	// Units are the unit symbols chosen for show, by field.
	Units map[string]string `json:"units"`
	Edits []diaphragm.Edit  `json:"edits"`
	// System is the one that fields without a chosen unit are shown in; empty
	// for SI.
	System quantity.System `json:"system"`
	// Materials of the team, offered before the catalogue.
	Materials []sheet.Material `json:"materials,omitempty"`
}

// EditResult is the changed document and all that a form needs to show it.
type EditResult struct {
	Document diaphragm.Diaphragm `json:"document"`
	Drafts   map[string]string   `json:"drafts"`
	Units    map[string]string   `json:"units"`
	Rows     []diaphragm.Row     `json:"rows"`
	// Derived quantities stand in the same table without a box.
	Derived  []DerivedRow `json:"derived"`
	Problems []Problem    `json:"problems"`
	// Cautions to show beside the figures that cause them.
	Cautions []string `json:"cautions"`
}

// DerivedRow is one computed quantity, formatted for show.
type DerivedRow struct {
	ID     string              `json:"id"`
	Group  diaphragm.GroupName `json:"group"`
	Symbol string              `json:"symbol"`
	Name   string              `json:"name"`
	// Value in SI units; Text and Unit as shown.
	Value float64 `json:"value"`
	Text  string  `json:"text"`
	Unit  string  `json:"unit"`
}

package engine

import (
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
)

// Version of the engine. Figures that are handed over carry it; it changes
// whenever a figure may.
const Version = "1.0.0"

// About says what this engine is.
type About struct {
	Version string `json:"version"`
	// Schema is the version of the document it writes.
	Schema int        `json:"schema"`
	Calls  []CallLine `json:"calls"`
}

// CallLine is one call by name.
type CallLine struct {
	Name    string `json:"name"`
	Summary string `json:"summary"`
}

// DemoResult is the demonstration diaphragm, whose data are invented.
type DemoResult struct {
	Document diaphragm.Diaphragm `json:"document"`
}

// ReadRequest reads typed quantities.
type ReadRequest struct {
	Items []ReadItem `json:"items"`
}

// ReadItem is one typed text: "5 mm" for a length.
type ReadItem struct {
	Field string `json:"field"`
	// Name as it stands in a sentence: "height".
	Name      string             `json:"name"`
	Text      string             `json:"text"`
	Dimension quantity.Dimension `json:"dimension"`
	// Unit that a bare number is in, by symbol.
	Unit string `json:"unit"`
	// Low and High bound the value in SI units; both 0 for no bound.
	Low  float64 `json:"low"`
	High float64 `json:"high"`
}

// ReadResult holds one reading for each item, in order.
type ReadResult struct {
	Readings []ReadOut `json:"readings"`
}

// ReadOut is a typed text as it was understood.
type ReadOut struct {
	Field string `json:"field"`
	// Value in SI units; 0 where there is a problem.
	Value float64 `json:"value"`
	// Unit symbol it was read in, and the number in that unit, formatted.
	Unit string `json:"unit"`
	Text string `json:"text"`
	// Echo says how the text was read where that is not obvious.
	Echo string `json:"echo"`
	// Problem is the sentence to show; empty where it was read.
	Problem string `json:"problem"`
}

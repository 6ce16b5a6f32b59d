package engine

import (
	"reflect"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// The calls of the store. Their types are declared here, so that the contract
// is generated from one place; the store itself lives in wasm/ because it
// needs the browser.

// NoRequest is the request of a call that takes nothing.
type NoRequest struct{}

// Done is the result of a call that returns nothing.
type Done struct{}

// RecordInfo is one line of the list of diaphragms.
type RecordInfo struct {
	ID       string `json:"id"`
	Name     string `json:"name"`
	Place    string `json:"place"`
	Revision int    `json:"revision"`
	// Unkept is true when the working copy differs from the last revision.
	Unkept bool `json:"unkept"`
	// Changed is the time of the last change, RFC 3339.
	Changed string `json:"changed"`
	Taps    int    `json:"taps"`
	// Deleted is the time of deletion, RFC 3339; empty for a live record.
	Deleted string `json:"deleted"`
}

// RecordList is every diaphragm kept on this device.
type RecordList struct {
	Records []RecordInfo `json:"records"`
}

// RecordRef names a diaphragm.
type RecordRef struct {
	ID string `json:"id"`
}

// CreateRequest makes a new diaphragm: the demonstration, an empty one, or a
// copy of a given document (a hand-over that is kept).
type CreateRequest struct {
	From CreateFrom `json:"from"`
	Name string     `json:"name"`
	// Document is used with CreateDocument only.
	Document *diaphragm.Diaphragm `json:"document,omitempty"`
	// Limits that an empty one starts with.
	Limits *diaphragm.Limits `json:"limits,omitempty"`
}

// CreateFrom says what a new diaphragm starts from.
type CreateFrom string

// The starts.
const (
	CreateDemo     CreateFrom = "demo"
	CreateBlank    CreateFrom = "blank"
	CreateDocument CreateFrom = "document"
)

// CreateFroms lists every start.
func CreateFroms() []CreateFrom { return []CreateFrom{CreateDemo, CreateBlank, CreateDocument} }

// OpenedRecord is a diaphragm opened for work.
type OpenedRecord struct {
	// Document is the working copy, or the last revision where there is none.
	Document diaphragm.Diaphragm `json:"document"`
	Drafts   map[string]string   `json:"drafts"`
	Units    map[string]string   `json:"units"`
	// Desk holds what pages remember of their controls, by page, as JSON text.
	Desk map[string]string `json:"desk"`
	// Stamp counts the writes; a save with an older stamp is refused.
	Stamp     int            `json:"stamp"`
	Unkept    bool           `json:"unkept"`
	Revisions []RevisionInfo `json:"revisions"`
}

// RevisionInfo is one kept revision.
type RevisionInfo struct {
	Number int    `json:"number"`
	Kept   string `json:"kept"`
	Note   string `json:"note"`
}

// SaveRequest writes the working copy.
type SaveRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	Drafts   map[string]string   `json:"drafts"`
	Units    map[string]string   `json:"units"`
	Desk     map[string]string   `json:"desk"`
	// Stamp that the writer last saw.
	Stamp int `json:"stamp"`
}

// Saved acknowledges a completed transaction.
type Saved struct {
	Stamp  int  `json:"stamp"`
	Unkept bool `json:"unkept"`
}

// KeepRequest makes a numbered revision of the working copy.
type KeepRequest struct {
	ID    string `json:"id"`
	Stamp int    `json:"stamp"`
	Note  string `json:"note"`
}

// RevisionRequest reads one kept revision.
type RevisionRequest struct {
	ID     string `json:"id"`
	Number int    `json:"number"`
}

// RevisionResult is one kept revision.
type RevisionResult struct {
	Document diaphragm.Diaphragm `json:"document"`
	Info     RevisionInfo        `json:"info"`
}

// RenameRequest renames a diaphragm.
type RenameRequest struct {
	ID   string `json:"id"`
	Name string `json:"name"`
}

// TapPutRequest keeps a tap session with its recording.
type TapPutRequest struct {
	Session   diaphragm.TapSession `json:"session"`
	Recording Blob                 `json:"recording"`
}

// TapRef names a tap session.
type TapRef struct {
	ID string `json:"id"`
}

// TapList is the tap sessions of one diaphragm, newest first.
type TapList struct {
	Sessions []diaphragm.TapSession `json:"sessions"`
}

// TapRecording is the recording of a session.
type TapRecording struct {
	Session   diaphragm.TapSession `json:"session"`
	Recording Blob                 `json:"recording"`
}

// ArchiveFile is the one file that holds everything.
type ArchiveFile struct {
	Name string `json:"name"`
	File Blob   `json:"file"`
}

// ImportRequest reads an archive or a hand-over file.
type ImportRequest struct {
	File Blob `json:"file"`
}

// ImportResult says what an import did.
type ImportResult struct {
	Added int `json:"added"`
	Same  int `json:"same"`
	Taps  int `json:"taps"`
	// Copied counts diaphragms that were here already with other content and
	// came in as copies.
	Copied int      `json:"copied"`
	IDs    []string `json:"ids"`
	Notes  []string `json:"notes"`
}

// Settings are the choices of this browser.
type Settings struct {
	// Chosen is true where somebody has made choices in this browser.
	Chosen bool `json:"chosen"`
	// LinkAddress is the address that hand-over links start with; empty for
	// the address of the page.
	LinkAddress string `json:"linkAddress"`
	// Units is the system that fields are first shown in.
	Units quantity.System `json:"units"`
	// By is the name put into new tap sessions.
	By string `json:"by"`
}

// OwnMaterials are the sheet materials that were added in this browser.
type OwnMaterials struct {
	Materials []sheet.Material `json:"materials"`
}

// StoreCalls lists the calls that the store answers.
func StoreCalls() []CallInfo {
	return []CallInfo{
		storeCall[NoRequest, RecordList]("records.list", "Lists the diaphragms on this device, deleted ones last."),
		storeCall[CreateRequest, OpenedRecord]("records.create", "Makes a diaphragm and opens it."),
		storeCall[RecordRef, OpenedRecord]("records.open", "Opens a diaphragm for work."),
		storeCall[SaveRequest, Saved]("records.save", "Writes the working copy; refused where another tab has written since."),
		storeCall[KeepRequest, OpenedRecord]("records.keep", "Keeps the working copy as a numbered revision."),
		storeCall[RevisionRequest, RevisionResult]("records.revision", "Reads one kept revision."),
		storeCall[RecordRef, OpenedRecord]("records.duplicate", "Copies a diaphragm under a new id."),
		storeCall[RenameRequest, Done]("records.rename", "Renames a diaphragm."),
		storeCall[RecordRef, Done]("records.delete", "Moves a diaphragm and its taps out of the list."),
		storeCall[RecordRef, Done]("records.restore", "Brings a deleted diaphragm back."),
		storeCall[RecordRef, Done]("records.erase", "Erases a deleted diaphragm, its revisions, taps and recordings."),
		storeCall[TapPutRequest, TapRef]("taps.put", "Keeps a tap session and its recording."),
		storeCall[RecordRef, TapList]("taps.list", "Lists the tap sessions of a diaphragm."),
		storeCall[TapRef, TapRecording]("taps.recording", "Reads a tap session with its recording."),
		storeCall[TapRef, TapRecording]("taps.delete", "Deletes a tap session and returns it, so that it can be put back."),
		storeCall[NoRequest, ArchiveFile]("archive.export", "Writes everything into one file."),
		storeCall[ImportRequest, ImportResult]("archive.import", "Reads a file of everything, or a hand-over file; overwrites nothing."),
		storeCall[NoRequest, OwnMaterials]("materials.list", "Lists the sheet materials that were added in this browser."),
		storeCall[OwnMaterials, Done]("materials.put", "Writes the list of added sheet materials."),
		storeCall[NoRequest, Settings]("settings.get", "Reads the settings."),
		storeCall[Settings, Done]("settings.put", "Writes the settings."),
	}
}

func storeCall[Request, Result any](name, summary string) CallInfo {
	return CallInfo{Name: name, Summary: summary, Request: reflect.TypeFor[Request](), Result: reflect.TypeFor[Result]()}
}

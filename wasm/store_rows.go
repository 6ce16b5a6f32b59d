//go:build js && wasm

package main

import (
	"encoding/json"
	"errors"
	"maps"
	"syscall/js"

	"github.com/hack-pad/go-indexeddb/idb"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

// recordRow is a diaphragm as it stands in inRecords. Documents are stored as
// their JSON, so that one written by an older version is migrated when it is
// read.
type recordRow struct {
	Document json.RawMessage   `json:"document"`
	Drafts   map[string]string `json:"drafts"`
	Units    map[string]string `json:"units"`
	Desk     map[string]string `json:"desk"`
	// Stamp counts the writes of the working copy, from 1.
	Stamp   int    `json:"stamp"`
	Unkept  bool   `json:"unkept"`
	Changed string `json:"changed"`
	// Deleted is the time of deletion; empty for a live record.
	Deleted string `json:"deleted"`
	// Source says what an imported copy was made from (entrySource), so that
	// importing the same file again makes no second copy.
	Source string `json:"source,omitempty"`
}

// revisionRow is one kept revision in inRevisions.
type revisionRow struct {
	Document json.RawMessage     `json:"document"`
	Info     engine.RevisionInfo `json:"info"`
}

// record is a recordRow with its document read.
type record struct {
	recordRow
	doc diaphragm.Diaphragm
}

// setDocument puts a document into a record. It refuses one that could not be
// read again.
func (r *record) setDocument(doc diaphragm.Diaphragm) error {
	text, err := documentText(doc)
	if err != nil {
		return err
	}
	r.doc, r.Document = doc, text
	return nil
}

func documentText(doc diaphragm.Diaphragm) (json.RawMessage, error) {
	if doc.Avoid.Lines == nil {
		doc.Avoid.Lines = []diaphragm.Line{}
	}
	text, err := json.Marshal(doc)
	if err != nil {
		return nil, err
	}
	_, err = diaphragm.ReadDocument(text)
	return text, err
}

// readRecord reads a record whether it is deleted or not.
func (t *txn) readRecord(id string) (*record, error) {
	value, err := t.get(inRecords, id)
	if err != nil {
		return nil, err
	}
	r, err := recordOf(value)
	if errors.Is(err, errAbsent) {
		return nil, engine.Fail("id", codeNotFound, "There is no such diaphragm in this browser. It may have been erased here, or it was made in another browser or on another device; ask for its file or link.")
	}
	return r, err
}

// liveRecord reads a record that is not deleted.
func (t *txn) liveRecord(id string) (*record, error) {
	r, err := t.readRecord(id)
	if err == nil && r.Deleted != "" {
		return nil, engine.Fail("id", codeDeleted, quoted(r.doc.Name)+" has been deleted. Bring it back on the page Records to go on with it.")
	}
	return r, err
}

func recordOf(value js.Value) (*record, error) {
	r := &record{}
	if err := fromText(value, &r.recordRow); err != nil {
		return nil, err
	}
	var err error
	r.doc, err = diaphragm.ReadDocument(r.Document)
	return r, err
}

func (t *txn) writeRecord(r *record) error { return t.putJSON(inRecords, r.doc.ID, r.recordRow) }

func revisionKey(id string, number int) any { return []any{id, number} }

// revisionsOf is the range of all revisions of a diaphragm: an array is
// greater than every number.
func revisionsOf(id string) (*idb.KeyRange, error) {
	return idb.NewKeyRangeBound(js.ValueOf([]any{id}), js.ValueOf([]any{id, []any{}}), false, false)
}

// revisionRows reads the revisions of a diaphragm, oldest first.
func (t *txn) revisionRows(id string) ([]revisionRow, error) {
	within, err := revisionsOf(id)
	if err != nil {
		return nil, err
	}
	entries, err := t.all(inRevisions, within)
	if err != nil {
		return nil, err
	}
	rows := make([]revisionRow, len(entries))
	for i, e := range entries {
		if err := fromText(e.value, &rows[i]); err != nil {
			return nil, err
		}
	}
	return rows, nil
}

// opened is what a page gets of a record.
func (t *txn) opened(r *record) (*engine.OpenedRecord, error) {
	rows, err := t.revisionRows(r.doc.ID)
	if err != nil {
		return nil, err
	}
	infos := make([]engine.RevisionInfo, len(rows))
	for i, row := range rows {
		infos[i] = row.Info
	}
	return &engine.OpenedRecord{
		Document: r.doc, Drafts: r.Drafts, Units: r.Units, Desk: r.Desk,
		Stamp: r.Stamp, Unkept: r.Unkept, Revisions: infos,
	}, nil
}

// differs reports whether the working copy differs from the last revision, or
// none has been kept.
func (t *txn) differs(doc diaphragm.Diaphragm) (bool, error) {
	if doc.Revision == 0 {
		return true, nil
	}
	var row revisionRow
	err := t.getJSON(inRevisions, revisionKey(doc.ID, doc.Revision), &row)
	if errors.Is(err, errAbsent) {
		return true, nil
	}
	if err != nil {
		return false, err
	}
	kept, err := diaphragm.ReadDocument(row.Document)
	if err != nil {
		return false, err
	}
	return !diaphragm.SameContent(kept, doc), nil
}

// copyOf copies a map, an empty one for nil.
func copyOf(m map[string]string) map[string]string {
	if m == nil {
		return map[string]string{}
	}
	return maps.Clone(m)
}

// quoted is a name in a sentence.
func quoted(name string) string {
	if name == "" {
		return "This diaphragm"
	}
	return "\"" + name + "\""
}

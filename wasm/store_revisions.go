//go:build js && wasm

package main

import (
	"errors"
	"slices"
	"strconv"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

func (s *store) keep(request *engine.KeepRequest) (*engine.OpenedRecord, error) {
	var opened *engine.OpenedRecord
	err := s.base.write([]string{inRecords, inRevisions}, func(t *txn) error {
		r, err := t.liveRecord(request.ID)
		if err != nil {
			return err
		}
		if err := checkKeep(r, request.Stamp); err != nil {
			return err
		}
		doc := r.doc
		doc.Revision++
		if err := r.setDocument(doc); err != nil {
			return err
		}
		now := s.stampTime()
		row := revisionRow{Document: r.Document, Info: engine.RevisionInfo{Number: doc.Revision, Kept: now, Note: strings.TrimSpace(request.Note)}}
		if err := t.putJSON(inRevisions, revisionKey(doc.ID, doc.Revision), row); err != nil {
			return err
		}
		r.Unkept = false
		r.Stamp++
		r.Changed = now
		if err := t.writeRecord(r); err != nil {
			return err
		}
		opened, err = t.opened(r)
		return err
	})
	return opened, err
}

// checkKeep refuses to keep what is not the person's last word: older than
// another tab's, the same as the last revision, or with texts that could not
// be read, behind which older values stand.
func checkKeep(r *record, seen int) error {
	if err := checkStamp(r, seen); err != nil {
		return err
	}
	if !r.Unkept {
		return engine.Fail("", codeUnchanged, "Nothing has changed since revision "+strconv.Itoa(r.doc.Revision)+", so there is nothing to keep.")
	}
	fields := make([]string, 0, len(r.Drafts))
	for field := range r.Drafts {
		fields = append(fields, field)
	}
	slices.Sort(fields)
	refused := &engine.Error{}
	for _, field := range fields {
		refused.Problems = append(refused.Problems, engine.Problem{
			Field: field, Code: codeUnread, Offset: -1,
			Message: "A revision cannot be kept while a field holds \"" + r.Drafts[field] + "\", which could not be read; correct it first.",
		})
	}
	if len(refused.Problems) > 0 {
		return refused
	}
	return nil
}

func (s *store) revision(request *engine.RevisionRequest) (*engine.RevisionResult, error) {
	var result *engine.RevisionResult
	err := s.base.read([]string{inRevisions}, func(t *txn) error {
		var row revisionRow
		err := t.getJSON(inRevisions, revisionKey(request.ID, request.Number), &row)
		if errors.Is(err, errAbsent) {
			return engine.Fail("number", codeNotFound, "There is no revision "+strconv.Itoa(request.Number)+" of this diaphragm in this browser.")
		}
		if err != nil {
			return err
		}
		doc, err := diaphragm.ReadDocument(row.Document)
		result = &engine.RevisionResult{Document: doc, Info: row.Info}
		return err
	})
	return result, err
}

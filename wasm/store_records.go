//go:build js && wasm

package main

import (
	"cmp"
	"slices"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

func (s *store) list(*engine.NoRequest) (*engine.RecordList, error) {
	var list []engine.RecordInfo
	err := s.base.read([]string{inRecords, inTaps}, func(t *txn) error {
		list = nil
		entries, err := t.all(inRecords, nil)
		if err != nil {
			return err
		}
		for _, e := range entries {
			r, err := recordOf(e.value)
			if err != nil {
				return err
			}
			taps, err := t.countIndexed(inTaps, byDiaphragm, r.doc.ID)
			if err != nil {
				return err
			}
			list = append(list, engine.RecordInfo{
				ID: r.doc.ID, Name: r.doc.Name, Place: r.doc.Place, Revision: r.doc.Revision,
				Unkept: r.Unkept, Changed: r.Changed, Taps: taps, Deleted: r.Deleted,
			})
		}
		return nil
	})
	slices.SortFunc(list, compareInfos)
	return &engine.RecordList{Records: list}, err
}

// compareInfos puts live records before deleted ones and the latest first.
func compareInfos(a, b engine.RecordInfo) int {
	switch {
	case a.Deleted == "" && b.Deleted != "":
		return -1
	case a.Deleted != "" && b.Deleted == "":
		return 1
	}
	return cmp.Or(cmp.Compare(b.Deleted, a.Deleted), cmp.Compare(b.Changed, a.Changed), cmp.Compare(b.ID, a.ID))
}

func (s *store) create(request *engine.CreateRequest) (*engine.OpenedRecord, error) {
	var doc diaphragm.Diaphragm
	switch request.From {
	case engine.CreateDemo:
		doc = diaphragm.Demo("", "")
	case engine.CreateBlank:
		var limits diaphragm.Limits
		if request.Limits != nil {
			limits = *request.Limits
		}
		doc = limits.Start("", "")
	case engine.CreateDocument:
		if request.Document == nil {
			return nil, engine.Fail("document", engine.CodeRequest, "The request gives no document to make the diaphragm from.")
		}
		doc = *request.Document
	default:
		return nil, engine.Fail("from", engine.CodeRequest, "A diaphragm is made from \"demo\", \"blank\" or \"document\".")
	}
	if name := strings.TrimSpace(request.Name); name != "" {
		doc.Name = name
	}
	return s.add(doc, recordRow{})
}

// add stores a document as a new diaphragm; row gives what belongs to its
// working copy.
func (s *store) add(doc diaphragm.Diaphragm, row recordRow) (*engine.OpenedRecord, error) {
	id, err := s.newID()
	if err != nil {
		return nil, err
	}
	now := s.stampTime()
	doc.ID, doc.Created, doc.Revision = id, now, 0
	r := &record{recordRow: recordRow{
		Drafts: copyOf(row.Drafts), Units: copyOf(row.Units), Desk: copyOf(row.Desk),
		Stamp: 1, Unkept: true, Changed: now,
	}}
	if err := r.setDocument(doc); err != nil {
		return nil, err
	}
	var opened *engine.OpenedRecord
	err = s.base.write([]string{inRecords, inRevisions}, func(t *txn) error {
		if err := t.writeRecord(r); err != nil {
			return err
		}
		opened, err = t.opened(r)
		return err
	})
	return opened, err
}

func (s *store) open(request *engine.RecordRef) (*engine.OpenedRecord, error) {
	var opened *engine.OpenedRecord
	err := s.base.read([]string{inRecords, inRevisions}, func(t *txn) error {
		r, err := t.liveRecord(request.ID)
		if err != nil {
			return err
		}
		opened, err = t.opened(r)
		return err
	})
	return opened, err
}

func (s *store) save(request *engine.SaveRequest) (*engine.Saved, error) {
	var saved *engine.Saved
	err := s.base.write([]string{inRecords, inRevisions}, func(t *txn) error {
		r, err := t.liveRecord(request.Document.ID)
		if err != nil {
			return err
		}
		if err := checkStamp(r, request.Stamp); err != nil {
			return err
		}
		// Who made a document and how many revisions it has is the store's to
		// say.
		doc := request.Document
		doc.Created, doc.Revision = r.doc.Created, r.doc.Revision
		if err := r.setDocument(doc); err != nil {
			return err
		}
		if r.Unkept, err = t.differs(doc); err != nil {
			return err
		}
		r.Drafts, r.Units, r.Desk = copyOf(request.Drafts), copyOf(request.Units), copyOf(request.Desk)
		r.Stamp++
		r.Changed = s.stampTime()
		saved = &engine.Saved{Stamp: r.Stamp, Unkept: r.Unkept}
		return t.writeRecord(r)
	})
	return saved, err
}

// checkStamp refuses a writer who has not seen the last write.
func checkStamp(r *record, seen int) error {
	if seen == r.Stamp {
		return nil
	}
	return engine.Fail("stamp", codeConflict, "Another tab has changed this diaphragm since; nothing was overwritten. Take over what the other tab wrote, or keep yours as a copy.")
}

func (s *store) duplicate(request *engine.RecordRef) (*engine.OpenedRecord, error) {
	var source *record
	err := s.base.read([]string{inRecords}, func(t *txn) (err error) {
		source, err = t.liveRecord(request.ID)
		return err
	})
	if err != nil {
		return nil, err
	}
	doc := source.doc
	doc.Name = strings.TrimSpace(doc.Name + " (copy)")
	return s.add(doc, source.recordRow)
}

func (s *store) rename(request *engine.RenameRequest) (*engine.Done, error) {
	name := strings.TrimSpace(request.Name)
	if name == "" {
		return nil, engine.Fail("name", engine.CodeRequest, "The name is empty; give the diaphragm a name.")
	}
	err := s.base.write([]string{inRecords, inRevisions}, func(t *txn) error {
		r, err := t.liveRecord(request.ID)
		if err != nil {
			return err
		}
		doc := r.doc
		doc.Name = name
		if err := r.setDocument(doc); err != nil {
			return err
		}
		delete(r.Drafts, "name")
		if r.Unkept, err = t.differs(doc); err != nil {
			return err
		}
		r.Stamp++
		r.Changed = s.stampTime()
		return t.writeRecord(r)
	})
	return &engine.Done{}, err
}

// delete and restore leave the stamp alone, so that a tab that has the
// diaphragm open can go on after the deletion is undone.

func (s *store) delete(request *engine.RecordRef) (*engine.Done, error) {
	return s.setDeleted(request.ID, s.stampTime())
}

func (s *store) restore(request *engine.RecordRef) (*engine.Done, error) {
	return s.setDeleted(request.ID, "")
}

func (s *store) setDeleted(id, when string) (*engine.Done, error) {
	err := s.base.write([]string{inRecords}, func(t *txn) error {
		r, err := t.readRecord(id)
		if err != nil {
			return err
		}
		if (r.Deleted != "") == (when != "") {
			return nil // it is as wanted already
		}
		r.Deleted = when
		return t.writeRecord(r)
	})
	return &engine.Done{}, err
}

func (s *store) erase(request *engine.RecordRef) (*engine.Done, error) {
	err := s.base.write([]string{inRecords, inRevisions, inTaps, inRecordings}, func(t *txn) error {
		r, err := t.readRecord(request.ID)
		if err != nil {
			return err
		}
		if r.Deleted == "" {
			return engine.Fail("id", engine.CodeRequest, "Only a deleted diaphragm can be erased; delete "+quoted(r.doc.Name)+" first.")
		}
		rows, err := t.revisionRows(request.ID)
		if err != nil {
			return err
		}
		for _, row := range rows {
			if err := t.remove(inRevisions, revisionKey(request.ID, row.Info.Number)); err != nil {
				return err
			}
		}
		taps, err := t.indexed(inTaps, byDiaphragm, request.ID)
		if err != nil {
			return err
		}
		for _, tap := range taps {
			for _, name := range []string{inTaps, inRecordings} {
				if err := t.remove(name, tap.key); err != nil {
					return err
				}
			}
		}
		return t.remove(inRecords, request.ID)
	})
	return &engine.Done{}, err
}

//go:build js && wasm

package main

import (
	"encoding/hex"
	"encoding/json"
	"hash/fnv"
	"slices"
	"strconv"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

var everything = []string{inRecords, inRevisions, inTaps, inRecordings, inSettings}

func (s *store) export(*engine.NoRequest) (*engine.ArchiveFile, error) {
	var archive diaphragm.Archive
	var recordings map[string][]byte
	err := s.base.read(everything, func(t *txn) error {
		archive = diaphragm.Archive{Written: s.stampTime(), Engine: engine.Version}
		recordings = map[string][]byte{}
		entries, err := t.all(inRecords, nil)
		if err != nil {
			return err
		}
		for _, e := range entries {
			r, err := recordOf(e.value)
			if err != nil {
				return err
			}
			entry, err := t.archiveEntry(r)
			if err != nil {
				return err
			}
			for _, tap := range entry.Taps {
				if recordings[tap.ID], err = t.readRecording(tap.ID); err != nil {
					return err
				}
			}
			archive.Entries = append(archive.Entries, *entry)
		}
		settings, _, err := t.readSettings()
		archive.Settings = diaphragm.ArchiveSettings{LinkAddress: settings.LinkAddress, Units: string(settings.Units), By: settings.By}
		if err == nil {
			archive.Settings.Materials, err = t.readMaterials()
		}
		return err
	})
	if err != nil {
		return nil, err
	}
	data, err := diaphragm.EncodeArchive(archive, func(id string) ([]byte, error) { return recordings[id], nil })
	if err != nil {
		return nil, err
	}
	return &engine.ArchiveFile{Name: "hoopsheet-" + diaphragm.FormatTime(s.now().Unix())[:len("2006-01-02")] + ".zip", File: engine.Blob{Bytes: data}}, nil
}

// archiveEntry is a record with its revisions and taps.
func (t *txn) archiveEntry(r *record) (*diaphragm.ArchiveEntry, error) {
	entry := &diaphragm.ArchiveEntry{
		Document: r.doc, Drafts: r.Drafts, Units: r.Units, Desk: r.Desk,
		Unkept: r.Unkept, Changed: r.Changed, Deleted: r.Deleted,
	}
	rows, err := t.revisionRows(r.doc.ID)
	if err != nil {
		return nil, err
	}
	for _, row := range rows {
		doc, err := diaphragm.ReadDocument(row.Document)
		if err != nil {
			return nil, err
		}
		entry.Revisions = append(entry.Revisions, diaphragm.ArchiveRevision{
			Number: row.Info.Number, Kept: row.Info.Kept, Note: row.Info.Note, Document: doc,
		})
	}
	entry.Taps, err = t.tapsOf(r.doc.ID)
	return entry, err
}

func (s *store) importFile(request *engine.ImportRequest) (*engine.ImportResult, error) {
	data := request.File.Bytes
	switch diaphragm.KindOfFile(data) {
	case diaphragm.FileArchive:
		archive, recordings, err := diaphragm.DecodeArchive(data)
		if err != nil {
			return nil, err
		}
		return s.importArchive(archive, recordings)
	case diaphragm.FileParcel:
		parcel, err := diaphragm.DecodeParcel(data)
		if err != nil {
			return nil, err
		}
		return s.importParcel(parcel)
	}
	return nil, engine.Fail("file", engine.CodeRequest, "This is neither a file of everything nor a hand-over file of this tool. Nothing was imported.")
}

// importParcel takes in a handed-over specification under an id of its own, as
// "keep a copy" does.
func (s *store) importParcel(parcel diaphragm.Parcel) (*engine.ImportResult, error) {
	opened, err := s.add(parcel.Document, recordRow{})
	if err != nil {
		return nil, err
	}
	return &engine.ImportResult{
		Added: 1, IDs: []string{opened.Document.ID},
		Notes: []string{quoted(parcel.Document.Name) + " came in from a hand-over: its specification, without the sender's revisions, taps and figures."},
	}, nil
}

// importArchive takes in everything or, on any error, nothing.
func (s *store) importArchive(archive diaphragm.Archive, recordings map[string][]byte) (*engine.ImportResult, error) {
	var in *intake
	err := s.base.write(everything, func(t *txn) error {
		in = &intake{t: t, store: s, recordings: recordings}
		if err := in.readSources(); err != nil {
			return err
		}
		for _, entry := range archive.Entries {
			if err := in.take(entry); err != nil {
				return err
			}
		}
		return in.takeSettings(archive.Settings)
	})
	if err != nil {
		return nil, err
	}
	return &in.result, nil
}

// intake is one import under way.
type intake struct {
	t          *txn
	store      *store
	recordings map[string][]byte
	// sources leads from what earlier copies were made from to their ids.
	sources map[string]string
	result  engine.ImportResult
}

func (in *intake) note(text string) { in.result.Notes = append(in.result.Notes, text) }

func (in *intake) readSources() error {
	entries, err := in.t.all(inRecords, nil)
	if err != nil {
		return err
	}
	in.sources = map[string]string{}
	for _, e := range entries {
		r, err := recordOf(e.value)
		if err != nil {
			return err
		}
		if r.Source != "" {
			in.sources[r.Source] = r.doc.ID
		}
	}
	return nil
}

// take brings in one diaphragm: as it is where its id is free, its taps only
// where the same is here, and as a copy where something else has its id.
func (in *intake) take(entry diaphragm.ArchiveEntry) error {
	value, err := in.t.get(inRecords, entry.Document.ID)
	if err != nil {
		return err
	}
	if value.IsUndefined() {
		if err := in.addEntry(entry, ""); err != nil {
			return err
		}
		in.result.Added++
		return in.takeTaps(entry, entry.Document.ID)
	}
	here, err := recordOf(value)
	if err != nil {
		return err
	}
	own, err := in.t.archiveEntry(here)
	if err != nil {
		return err
	}
	source, err := entrySource(entry)
	if err != nil {
		return err
	}
	ownSource, err := entrySource(*own)
	if err != nil {
		return err
	}
	if source == ownSource {
		return in.same(entry, here)
	}
	if id, known := in.sources[source]; known {
		earlier, err := in.t.readRecord(id)
		if err != nil {
			return err
		}
		return in.same(entry, earlier)
	}
	return in.copy(entry, source)
}

// same notes that a diaphragm is here already, and takes taps it lacks.
func (in *intake) same(entry diaphragm.ArchiveEntry, here *record) error {
	in.result.Same++
	if here.Deleted != "" {
		in.note(quoted(here.doc.Name) + " is here already, among the deleted ones; bring it back on the page Records.")
	}
	return in.takeTaps(entry, here.doc.ID)
}

// copy brings in a diaphragm under a new id, since another version has its own.
func (in *intake) copy(entry diaphragm.ArchiveEntry, source string) error {
	id, err := in.store.newID()
	if err != nil {
		return err
	}
	old := entry.Document.Name
	entry.Document.ID = id
	entry.Document.Name = strings.TrimSpace(old + " (imported)")
	entry.Revisions = slices.Clone(entry.Revisions)
	for i := range entry.Revisions {
		entry.Revisions[i].Document.ID = id
	}
	// The name now differs from that of the last revision.
	entry.Unkept = true
	if err := in.addEntry(entry, source); err != nil {
		return err
	}
	in.sources[source] = id
	in.result.Copied++
	in.note(quoted(old) + " was here already with other content, which was left as it is; it came in as " + quoted(entry.Document.Name) + ".")
	return in.takeTaps(entry, id)
}

// addEntry writes a record with its revisions under the id of its document.
func (in *intake) addEntry(entry diaphragm.ArchiveEntry, source string) error {
	r := &record{recordRow: recordRow{
		Drafts: copyOf(entry.Drafts), Units: copyOf(entry.Units), Desk: copyOf(entry.Desk),
		Stamp: 1, Unkept: entry.Unkept, Changed: entry.Changed, Deleted: entry.Deleted, Source: source,
	}}
	// The next revision kept must not overwrite one that came in.
	for _, revision := range entry.Revisions {
		entry.Document.Revision = max(entry.Document.Revision, revision.Number)
	}
	if err := r.setDocument(entry.Document); err != nil {
		return err
	}
	for _, revision := range entry.Revisions {
		text, err := documentText(revision.Document)
		if err != nil {
			return err
		}
		row := revisionRow{Document: text, Info: engine.RevisionInfo{Number: revision.Number, Kept: revision.Kept, Note: revision.Note}}
		if err := in.t.putJSON(inRevisions, revisionKey(r.doc.ID, revision.Number), row); err != nil {
			return err
		}
	}
	if problems := diaphragm.Validate(entry.Document); len(problems) > 0 {
		in.note(quoted(entry.Document.Name) + " is unfinished: " + problems[0].Message)
	}
	in.result.IDs = append(in.result.IDs, r.doc.ID)
	return in.t.writeRecord(r)
}

// takeTaps brings in the taps that the diaphragm lacks. One whose id is taken
// by something else comes in under a new id.
func (in *intake) takeTaps(entry diaphragm.ArchiveEntry, id string) error {
	here, err := in.t.tapsOf(id)
	if err != nil {
		return err
	}
	for _, tap := range entry.Taps {
		data := in.recordings[tap.ID]
		tap.Diaphragm = id
		if slices.ContainsFunc(here, func(own diaphragm.TapSession) bool { return sameTap(own, tap) }) {
			continue
		}
		value, err := in.t.get(inTaps, tap.ID)
		if err != nil {
			return err
		}
		if !value.IsUndefined() {
			if tap.ID, err = in.store.newID(); err != nil {
				return err
			}
		}
		if len(data) > 0 {
			if err := in.t.put(inRecordings, tap.ID, arrayOf(data)); err != nil {
				return err
			}
		}
		if err := in.t.writeTap(tap); err != nil {
			return err
		}
		in.result.Taps++
	}
	return nil
}

// takeMaterials adds the materials that are sound and not here yet.
func (in *intake) takeMaterials(from []sheet.Material) error {
	own, err := in.t.readMaterials()
	if err != nil {
		return err
	}
	before := len(own)
	for _, m := range from {
		if len(own) < mostMaterials && diaphragm.MaterialFault(m, own) == "" {
			own = append(own, m)
		}
	}
	if len(own) == before {
		return nil
	}
	return in.t.putJSON(inSettings, materialsKey, engine.OwnMaterials{Materials: own})
}

// takeSettings brings in settings where none have been made, and materials.
func (in *intake) takeSettings(from diaphragm.ArchiveSettings) error {
	if err := in.takeMaterials(from.Materials); err != nil {
		return err
	}
	_, made, err := in.t.readSettings()
	if err != nil || made {
		return err
	}
	settings := engine.Settings{LinkAddress: from.LinkAddress, Units: quantity.System(from.Units), By: from.By}
	if settings == firstSettings || !slices.Contains(quantity.Systems(), settings.Units) {
		return nil
	}
	settings.Chosen = true
	return in.t.putJSON(inSettings, settingsKey, settings)
}

// sameTap reports whether two sessions hold the same, whatever their ids.
func sameTap(a, b diaphragm.TapSession) bool {
	peaks := slices.Equal(a.Peaks, b.Peaks)
	a.ID, a.Peaks = b.ID, nil
	b.Peaks = nil
	textA, errA := json.Marshal(a)
	textB, errB := json.Marshal(b)
	return peaks && errA == nil && errB == nil && string(textA) == string(textB)
}

// entrySource identifies the specification of an entry: id, working copy and
// revisions, without taps, times and what the pages remember.
func entrySource(entry diaphragm.ArchiveEntry) (string, error) {
	hash := fnv.New128a()
	add := func(doc diaphragm.Diaphragm, label string) error {
		text, err := documentText(doc)
		hash.Write([]byte(label))
		hash.Write(text)
		return err
	}
	if err := add(entry.Document, "working copy"); err != nil {
		return "", err
	}
	for _, revision := range entry.Revisions {
		if err := add(revision.Document, "revision "+strconv.Itoa(revision.Number)); err != nil {
			return "", err
		}
	}
	return entry.Document.ID + " " + hex.EncodeToString(hash.Sum(nil)), nil
}

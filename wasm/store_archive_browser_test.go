//go:build js && wasm && browser

package main

import (
	"reflect"
	"slices"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
	"hoopsheet/core/sheet"
)

// filledStore has a kept and changed diaphragm with two taps, one with a
// recording, an unfinished one, and a deleted one.
func filledStore(t *testing.T) (s *store, id string) {
	t.Helper()
	s = freshStore(t)
	o := createDemo(t, s, "Kept")
	id = o.Document.ID
	o = ask[engine.OpenedRecord](t, s, "records.keep", engine.KeepRequest{ID: id, Stamp: o.Stamp, Note: "first"})
	change := saveOf(o)
	change.Document.Tension.Nominal *= 1.5
	change.Drafts = map[string]string{"sheet.thickness": "?"}
	change.Units = map[string]string{"ring.radius": "ft"}
	change.Desk = map[string]string{"tap": "{}"}
	ask[engine.Saved](t, s, "records.save", change)
	for _, recording := range []string{"RIFF one", ""} {
		name := ""
		if recording != "" {
			name = "one.wav"
		}
		ask[engine.TapRef](t, s, "taps.put", engine.TapPutRequest{
			Session: diaphragm.TapSession{
				Diaphragm: id, Taken: "2026-03-01T10:00:00Z", RecordingName: name, Notes: recording,
				Peaks: []diaphragm.ChosenPeak{{Frequency: 30, Uncertainty: 0.1, M: 1, N: 1}},
			},
			Recording: engine.Blob{Bytes: []byte(recording)},
		})
	}
	unfinished := ask[engine.OpenedRecord](t, s, "records.create", engine.CreateRequest{From: engine.CreateBlank, Name: "Unfinished"})
	unfinished.Document.Sheet.Thickness = 0
	ask[engine.Saved](t, s, "records.save", saveOf(unfinished))
	deleted := createDemo(t, s, "Deleted")
	ask[engine.Done](t, s, "records.delete", ref(deleted.Document.ID))
	ask[engine.Done](t, s, "settings.put", engine.Settings{Units: "inch-pound", By: "R. Field"})
	ask[engine.Done](t, s, "materials.put", engine.OwnMaterials{Materials: []sheet.Material{ownCloth()}})
	return s, id
}

func exported(t *testing.T, s *store) []byte {
	t.Helper()
	file := ask[engine.ArchiveFile](t, s, "archive.export", struct{}{})
	if !strings.HasPrefix(file.Name, "hoopsheet-2026-03-01") || len(file.File.Bytes) == 0 {
		t.Fatalf("the file is %q with %d bytes", file.Name, len(file.File.Bytes))
	}
	return file.File.Bytes
}

func imported(t *testing.T, s *store, file []byte) engine.ImportResult {
	t.Helper()
	return ask[engine.ImportResult](t, s, "archive.import", map[string]any{"file": "blob:0"}, file)
}

func counts(r engine.ImportResult) [4]int { return [4]int{r.Added, r.Same, r.Taps, r.Copied} }

// content is all that a store says of a diaphragm, but for stamps.
func content(t *testing.T, s *store, id string) (engine.OpenedRecord, []engine.TapRecording) {
	t.Helper()
	o := ask[engine.OpenedRecord](t, s, "records.open", ref(id))
	o.Stamp = 0
	var taps []engine.TapRecording
	for _, session := range ask[engine.TapList](t, s, "taps.list", ref(id)).Sessions {
		taps = append(taps, ask[engine.TapRecording](t, s, "taps.recording", engine.TapRef{ID: session.ID}))
	}
	return o, taps
}

func TestExportImportElsewhere(t *testing.T) {
	from, id := filledStore(t)
	file := exported(t, from)
	to := newStore("test other "+t.Name(), clock(), random{})
	deleteDatabase(t, to.base.name)
	result := imported(t, to, file)
	if counts(result) != [4]int{3, 0, 2, 0} || len(result.IDs) != 3 {
		t.Errorf("imported %+v", result)
	}
	if !slices.ContainsFunc(result.Notes, func(note string) bool { return strings.Contains(note, `"Unfinished" is unfinished: `) }) {
		t.Errorf("nothing is said of the unfinished diaphragm: %q", result.Notes)
	}
	wantRecord, wantTaps := content(t, from, id)
	gotRecord, gotTaps := content(t, to, id)
	if !reflect.DeepEqual(gotRecord, wantRecord) {
		t.Errorf("the record came over as\n%+v, want\n%+v", gotRecord, wantRecord)
	}
	if !reflect.DeepEqual(gotTaps, wantTaps) {
		t.Errorf("the taps came over as\n%+v, want\n%+v", gotTaps, wantTaps)
	}
	wantList := ask[engine.RecordList](t, from, "records.list", struct{}{})
	gotList := ask[engine.RecordList](t, to, "records.list", struct{}{})
	if !reflect.DeepEqual(gotList, wantList) {
		t.Errorf("the list came over as\n%+v, want\n%+v", gotList, wantList)
	}
	if got := ask[engine.Settings](t, to, "settings.get", struct{}{}); !got.Chosen || got.By != "R. Field" || got.Units != "inch-pound" {
		t.Errorf("the settings came over as %+v", got)
	}
	if got := ask[engine.OwnMaterials](t, to, "materials.list", struct{}{}); !reflect.DeepEqual(got.Materials, []sheet.Material{ownCloth()}) {
		t.Errorf("the materials came over as %+v", got)
	}

	// The same file again changes nothing.
	if again := imported(t, to, file); counts(again) != [4]int{0, 3, 0, 0} {
		t.Errorf("imported again: %+v", again)
	}
	if same, _ := content(t, to, id); !reflect.DeepEqual(same, wantRecord) {
		t.Error("importing the same file again changed the record")
	}
}

func TestImportOverwritesNothing(t *testing.T) {
	s, id := filledStore(t)
	file := exported(t, s)
	o := ask[engine.OpenedRecord](t, s, "records.open", ref(id))
	change := saveOf(o)
	change.Document.Name = "Kept, and gone on with"
	ask[engine.Saved](t, s, "records.save", change)
	ask[engine.Done](t, s, "settings.put", engine.Settings{Units: "si", By: "B. Desk"})
	before, tapsBefore := content(t, s, id)

	result := imported(t, s, file)
	if counts(result) != [4]int{0, 2, 2, 1} {
		t.Fatalf("imported %+v", result)
	}
	after, tapsAfter := content(t, s, id)
	if !reflect.DeepEqual(before, after) || !reflect.DeepEqual(tapsBefore, tapsAfter) {
		t.Errorf("the import changed\n%+v to\n%+v", before, after)
	}
	if got := ask[engine.Settings](t, s, "settings.get", struct{}{}); got.By != "B. Desk" {
		t.Errorf("the import changed the settings to %+v", got)
	}
	copied, copiedTaps := content(t, s, result.IDs[0])
	if copied.Document.Name != "Kept (imported)" || copied.Document.Revision != 1 || len(copied.Revisions) != 1 || !copied.Unkept {
		t.Errorf("the copy is %+v", copied)
	}
	if len(copiedTaps) != 2 || copiedTaps[0].Session.ID == tapsBefore[0].Session.ID {
		t.Errorf("the taps of the copy are %+v", copiedTaps)
	}
	for i, tap := range copiedTaps {
		// Both lists are newest first; ids are new, so compare by notes.
		want := tapsBefore[i]
		if tap.Session.Notes != want.Session.Notes {
			want = tapsBefore[1-i]
		}
		if string(tap.Recording.Bytes) != string(want.Recording.Bytes) || tap.Session.Diaphragm != result.IDs[0] {
			t.Errorf("tap of the copy %+v, want %+v", tap, want)
		}
	}
	// The copy can be kept on: its next revision does not overwrite the one
	// that came in.
	o = ask[engine.OpenedRecord](t, s, "records.open", ref(result.IDs[0]))
	change = saveOf(o)
	change.Drafts = nil
	ask[engine.Saved](t, s, "records.save", change)
	kept := ask[engine.OpenedRecord](t, s, "records.keep", engine.KeepRequest{ID: result.IDs[0], Stamp: change.Stamp + 1})
	if len(kept.Revisions) != 2 || kept.Revisions[0].Note != "first" {
		t.Errorf("after keeping: %+v", kept.Revisions)
	}

	// The same file a second time makes no second copy.
	if again := imported(t, s, file); counts(again) != [4]int{0, 3, 0, 0} {
		t.Errorf("imported again: %+v", again)
	}
}

// The technician goes on tapping what the desk has already.
func TestImportAddsTaps(t *testing.T) {
	desk, id := filledStore(t)
	site := newStore("test other "+t.Name(), clock(), random{})
	deleteDatabase(t, site.base.name)
	imported(t, site, exported(t, desk))
	ask[engine.TapRef](t, site, "taps.put", engine.TapPutRequest{Session: diaphragm.TapSession{Diaphragm: id, Notes: "third"}})
	if result := imported(t, desk, exported(t, site)); counts(result) != [4]int{0, 3, 1, 0} {
		t.Errorf("imported %+v", result)
	}
	if _, taps := content(t, desk, id); len(taps) != 3 {
		t.Errorf("%d taps after the import", len(taps))
	}
}

func TestImportOfHandOver(t *testing.T) {
	s := freshStore(t)
	doc := diaphragm.Demo("01ARZ3NDEKTSV4RRFFQ69G5FAV", "2026-01-01T00:00:00Z")
	doc.Name, doc.Revision = "Sent", 4
	file, err := diaphragm.EncodeParcel(diaphragm.Parcel{Document: doc, Sent: "2026-02-01T00:00:00Z", Engine: engine.Version})
	if err != nil {
		t.Fatal(err)
	}
	result := imported(t, s, file)
	o, _ := content(t, s, result.IDs[0])
	if counts(result) != [4]int{1, 0, 0, 0} || o.Document.Name != "Sent" || o.Document.Revision != 0 || o.Document.ID == doc.ID {
		t.Errorf("imported %+v as %+v", result, o.Document)
	}
}

// What cannot be read is refused whole, in a sentence, and changes nothing.
func TestBadImports(t *testing.T) {
	s, id := filledStore(t)
	file := exported(t, s)
	before, _ := content(t, s, id)
	for name, bad := range map[string][]byte{
		"empty":      {},
		"text":       []byte("hello"),
		"other JSON": []byte(`{"format":"something"}`),
		"cut short":  file[:len(file)/2],
	} {
		_, err := tell[engine.ImportResult](s, "archive.import", map[string]any{"file": "blob:0"}, bad)
		if err == nil || code(err) == "" || code(err) == engine.CodeInternal {
			t.Errorf("%s: %v", name, err)
		}
	}
	if after, _ := content(t, s, id); !reflect.DeepEqual(before, after) {
		t.Error("a refused import changed a record")
	}
	if list := ask[engine.RecordList](t, s, "records.list", struct{}{}); len(list.Records) != 3 {
		t.Errorf("%d records after refused imports", len(list.Records))
	}
}

// ownCloth is an invented material.
func ownCloth() sheet.Material {
	return sheet.Material{ID: "own cloth", Name: "Cloth", Density: 1200, E: 1e9, Nu: 0.3, CTE: 20e-6, AllowableStress: 2e7, Source: "invented"}
}

// TestMaterials: the list is kept as a whole; what cannot be offered is refused in a sentence, and changes nothing.
func TestMaterials(t *testing.T) {
	s := freshStore(t)
	if got := ask[engine.OwnMaterials](t, s, "materials.list", struct{}{}); len(got.Materials) != 0 {
		t.Errorf("first materials %+v", got)
	}
	cloth := ownCloth()
	ask[engine.Done](t, s, "materials.put", engine.OwnMaterials{Materials: []sheet.Material{cloth}})
	bad := cloth
	bad.ID, bad.Nu = "another", 0.7
	for _, list := range [][]sheet.Material{{cloth, cloth}, {cloth, bad}, {{ID: "nameless"}}} {
		refused(t, s, engine.CodeRequest, "materials.put", engine.OwnMaterials{Materials: list})
	}
	if got := ask[engine.OwnMaterials](t, s, "materials.list", struct{}{}); len(got.Materials) != 1 || got.Materials[0] != cloth {
		t.Errorf("materials %+v", got)
	}
}

//go:build js && wasm && browser

package main

// Tests of the store against a real IndexedDB. They run in a browser:
// site/tests/store-go.test.mjs. Every test has a database of its own.

import (
	"context"
	"encoding/json"
	"errors"
	"strconv"
	"syscall/js"
	"testing"
	"time"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

// testTime is what the clock of the tests starts from; it moves on by a second
// a reading, so that the order of times is that of events.
var testTime = time.Date(2026, 3, 1, 8, 0, 0, 0, time.UTC)

func clock() func() time.Time {
	now := testTime
	return func() time.Time {
		now = now.Add(time.Second)
		return now
	}
}

// freshStore is a store with an empty database named after the test.
func freshStore(t *testing.T) *store {
	t.Helper()
	name := "test " + t.Name()
	deleteDatabase(t, name)
	return newStore(name, clock(), random{})
}

func deleteDatabase(t *testing.T, name string) {
	t.Helper()
	await(t, js.Global().Get("indexedDB").Call("deleteDatabase", name), "success")
}

// await waits for an event of a request.
func await(t *testing.T, request js.Value, event string) {
	t.Helper()
	done := make(chan struct{})
	listener := js.FuncOf(func(js.Value, []js.Value) any { close(done); return nil })
	request.Call("addEventListener", event, listener, map[string]any{"once": true})
	select {
	case <-done:
		listener.Release()
	case <-time.After(20 * time.Second):
		t.Fatalf("no %s event came", event)
	}
}

// ask sends a call through the door, as a page does, and fails the test if it
// is refused.
func ask[Result any](t *testing.T, s *store, name string, request any, blobs ...[]byte) Result {
	t.Helper()
	result, err := tell[Result](s, name, request, blobs...)
	if err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	return result
}

// refused sends a call that must be refused with the code.
func refused(t *testing.T, s *store, code engine.Code, name string, request any, blobs ...[]byte) engine.Problem {
	t.Helper()
	_, err := tell[struct{}](s, name, request, blobs...)
	var own *engine.Error
	if !errors.As(err, &own) {
		t.Fatalf("%s was not refused, or without a sentence: %v", name, err)
	}
	if own.Problems[0].Code != code {
		t.Fatalf("%s was refused with %q (%s), not %q", name, own.Problems[0].Code, own.Problems[0].Message, code)
	}
	return own.Problems[0]
}

func tell[Result any](s *store, name string, request any, blobs ...[]byte) (Result, error) {
	var result Result
	data, err := json.Marshal(request)
	if err != nil {
		return result, err
	}
	response, arrays, err := s.answer(context.Background(), name, data, blobs)
	if err != nil {
		return result, err
	}
	for _, array := range arrays {
		// Put files back as the page's side does; only these are at one level.
		var members map[string]json.RawMessage
		if err := json.Unmarshal(response, &members); err != nil {
			return result, err
		}
		if members[array.Path[0]], err = json.Marshal(array.Bytes); err != nil {
			return result, err
		}
		if response, err = json.Marshal(members); err != nil {
			return result, err
		}
	}
	err = json.Unmarshal(response, &result)
	return result, err
}

func ref(id string) engine.RecordRef { return engine.RecordRef{ID: id} }

func createDemo(t *testing.T, s *store, name string) engine.OpenedRecord {
	t.Helper()
	return ask[engine.OpenedRecord](t, s, "records.create", engine.CreateRequest{From: engine.CreateDemo, Name: name})
}

func saveOf(o engine.OpenedRecord) engine.SaveRequest {
	return engine.SaveRequest{Document: o.Document, Drafts: o.Drafts, Units: o.Units, Desk: o.Desk, Stamp: o.Stamp}
}

func TestCreateSaveOpen(t *testing.T) {
	s := freshStore(t)
	created := createDemo(t, s, "East port")
	if !diaphragm.ValidID(created.Document.ID) || created.Document.Name != "East port" || created.Stamp != 1 || !created.Unkept {
		t.Fatalf("created %+v", created)
	}
	request := saveOf(created)
	request.Document.Tension.Nominal = 321
	request.Document.Created, request.Document.Revision = "1999-01-01T00:00:00Z", 7 // not the page's to say
	request.Drafts = map[string]string{"sheet.thickness": "thin"}
	request.Units = map[string]string{"ring.radius": "in"}
	request.Desk = map[string]string{"modes": `{"count":12}`}
	saved := ask[engine.Saved](t, s, "records.save", request)
	if saved.Stamp != 2 || !saved.Unkept {
		t.Errorf("saved %+v", saved)
	}

	// A second connection sees what the first has acknowledged.
	other := newStore(s.base.name, clock(), random{})
	opened := ask[engine.OpenedRecord](t, other, "records.open", ref(created.Document.ID))
	want := request.Document
	want.Created, want.Revision = created.Document.Created, 0
	if !diaphragm.SameContent(opened.Document, want) || opened.Document.Revision != 0 || opened.Document.Created != want.Created {
		t.Errorf("opened %+v, want %+v", opened.Document, want)
	}
	if opened.Stamp != 2 || opened.Drafts["sheet.thickness"] != "thin" || opened.Units["ring.radius"] != "in" || opened.Desk["modes"] != `{"count":12}` {
		t.Errorf("opened %+v", opened)
	}
	refused(t, s, codeNotFound, "records.open", ref("01ARZ3NDEKTSV4RRFFQ69G5FAV"))
	refused(t, s, engine.CodeUnknownCall, "records.everything", struct{}{})
}

func TestOlderStampIsRefused(t *testing.T) {
	first := freshStore(t)
	second := newStore(first.base.name, clock(), random{})
	created := createDemo(t, first, "")
	inSecond := ask[engine.OpenedRecord](t, second, "records.open", ref(created.Document.ID))

	request := saveOf(created)
	request.Document.Name = "from the first tab"
	ask[engine.Saved](t, first, "records.save", request)

	late := saveOf(inSecond)
	late.Document.Name = "from the second tab"
	refused(t, second, codeConflict, "records.save", late)
	refused(t, second, codeConflict, "records.keep", engine.KeepRequest{ID: created.Document.ID, Stamp: inSecond.Stamp})
	now := ask[engine.OpenedRecord](t, second, "records.open", ref(created.Document.ID))
	if now.Document.Name != "from the first tab" || now.Stamp != 2 {
		t.Errorf("the refused save left %q, stamp %d", now.Document.Name, now.Stamp)
	}
	late.Stamp = now.Stamp
	ask[engine.Saved](t, second, "records.save", late)
}

// Of many saves with one stamp sent at once over two connections exactly one
// is carried out.
func TestConcurrentSavesKeepOne(t *testing.T) {
	first := freshStore(t)
	second := newStore(first.base.name, clock(), random{})
	created := createDemo(t, first, "")
	const each = 5
	results := make(chan error)
	for _, s := range []*store{first, second} {
		for i := range each {
			request := saveOf(created)
			request.Document.Notes = strconv.Itoa(i)
			go func() {
				_, err := tell[engine.Saved](s, "records.save", request)
				results <- err
			}()
		}
	}
	done := 0
	for range 2 * each {
		err := <-results
		var own *engine.Error
		switch {
		case err == nil:
			done++
		case !errors.As(err, &own) || own.Problems[0].Code != codeConflict:
			t.Errorf("a save failed with %v", err)
		}
	}
	if done != 1 {
		t.Errorf("%d saves with one stamp were carried out", done)
	}
}

func TestKeepRevisions(t *testing.T) {
	s := freshStore(t)
	o := createDemo(t, s, "")
	id := o.Document.ID
	first := ask[engine.OpenedRecord](t, s, "records.keep", engine.KeepRequest{ID: id, Stamp: o.Stamp, Note: " as ordered "})
	if first.Document.Revision != 1 || first.Unkept || len(first.Revisions) != 1 || first.Revisions[0].Note != "as ordered" {
		t.Fatalf("kept %+v", first)
	}
	refused(t, s, codeUnchanged, "records.keep", engine.KeepRequest{ID: id, Stamp: first.Stamp})

	// The working copy differs, is put back, and differs again.
	change := saveOf(first)
	change.Document.Tension.Nominal *= 2
	if saved := ask[engine.Saved](t, s, "records.save", change); !saved.Unkept {
		t.Error("a changed working copy counts as kept")
	}
	change.Stamp++
	change.Document.Tension.Nominal /= 2
	if saved := ask[engine.Saved](t, s, "records.save", change); saved.Unkept {
		t.Error("a working copy that was put back counts as changed")
	}
	change.Stamp++
	change.Document.Tension.Nominal *= 2
	change.Drafts = map[string]string{"ring.radius": "about two"}
	ask[engine.Saved](t, s, "records.save", change)
	change.Stamp++
	if p := refused(t, s, codeUnread, "records.keep", engine.KeepRequest{ID: id, Stamp: change.Stamp}); p.Field != "ring.radius" {
		t.Errorf("the unread text is named at %q", p.Field)
	}
	change.Drafts = nil
	ask[engine.Saved](t, s, "records.save", change)
	second := ask[engine.OpenedRecord](t, s, "records.keep", engine.KeepRequest{ID: id, Stamp: change.Stamp + 1})
	if second.Document.Revision != 2 || len(second.Revisions) != 2 || second.Revisions[1].Number != 2 {
		t.Fatalf("kept %+v", second)
	}

	old := ask[engine.RevisionResult](t, s, "records.revision", engine.RevisionRequest{ID: id, Number: 1})
	if old.Document.Tension.Nominal*2 != second.Document.Tension.Nominal || old.Info.Note != "as ordered" {
		t.Errorf("revision 1 is %+v", old)
	}
	refused(t, s, codeNotFound, "records.revision", engine.RevisionRequest{ID: id, Number: 3})
}

func TestDuplicateRenameDeleteErase(t *testing.T) {
	s := freshStore(t)
	o := createDemo(t, s, "North window")
	id := o.Document.ID
	o = ask[engine.OpenedRecord](t, s, "records.keep", engine.KeepRequest{ID: id, Stamp: o.Stamp})
	tap := ask[engine.TapRef](t, s, "taps.put", engine.TapPutRequest{
		Session: diaphragm.TapSession{Diaphragm: id, RecordingName: "tap.wav"}, Recording: engine.Blob{Bytes: []byte("RIFF")}})

	twin := ask[engine.OpenedRecord](t, s, "records.duplicate", ref(id))
	if twin.Document.ID == id || twin.Document.Name != "North window (copy)" || twin.Document.Revision != 0 || !twin.Unkept || len(twin.Revisions) != 0 {
		t.Fatalf("duplicate %+v", twin)
	}
	refused(t, s, engine.CodeRequest, "records.rename", engine.RenameRequest{ID: twin.Document.ID, Name: "  "})
	ask[engine.Done](t, s, "records.rename", engine.RenameRequest{ID: twin.Document.ID, Name: "South window"})
	refused(t, s, codeConflict, "records.save", saveOf(twin)) // it was renamed since

	refused(t, s, engine.CodeRequest, "records.erase", ref(id)) // it is not deleted
	ask[engine.Done](t, s, "records.delete", ref(id))
	refused(t, s, codeDeleted, "records.open", ref(id))
	refused(t, s, codeDeleted, "records.save", saveOf(o))
	list := ask[engine.RecordList](t, s, "records.list", struct{}{}).Records
	if len(list) != 2 || list[0].Name != "South window" || list[1].ID != id || list[1].Deleted == "" || list[1].Taps != 1 {
		t.Fatalf("list %+v", list)
	}
	ask[engine.Done](t, s, "records.restore", ref(id))
	ask[engine.Saved](t, s, "records.save", saveOf(o)) // an open tab goes on
	list = ask[engine.RecordList](t, s, "records.list", struct{}{}).Records
	if len(list) != 2 || list[0].ID != id || list[0].Deleted != "" {
		t.Fatalf("after restoring: %+v", list)
	}

	ask[engine.Done](t, s, "records.delete", ref(id))
	ask[engine.Done](t, s, "records.erase", ref(id))
	refused(t, s, codeNotFound, "records.open", ref(id))
	refused(t, s, codeNotFound, "records.revision", engine.RevisionRequest{ID: id, Number: 1})
	refused(t, s, codeNotFound, "taps.recording", tap)
	err := s.base.read([]string{inRecordings, inRevisions}, func(x *txn) error {
		for _, name := range []string{inRecordings, inRevisions} {
			left, err := x.all(name, nil)
			if err != nil || len(left) != 0 {
				t.Errorf("%d values are left in %s (%v)", len(left), name, err)
			}
		}
		return nil
	})
	if err != nil {
		t.Error(err)
	}
}

func TestTaps(t *testing.T) {
	s := freshStore(t)
	id := createDemo(t, s, "").Document.ID
	wav := make([]byte, 300_000)
	for i := range wav {
		wav[i] = byte(i * 7)
	}
	session := diaphragm.TapSession{
		Diaphragm: id, By: "R. Field", Taken: "2026-03-01T09:00:00Z", RecordingName: "north.wav", Tension: 212.5, Verdict: "pass",
		Peaks: []diaphragm.ChosenPeak{{Frequency: 41.25, Uncertainty: 0.01, M: 0, N: 1}},
	}
	request := func(session diaphragm.TapSession) map[string]any {
		return map[string]any{"session": session, "recording": "blob:0"}
	}
	tap := ask[engine.TapRef](t, s, "taps.put", request(session), wav)
	session.ID = tap.ID
	later := session
	later.ID, later.Taken, later.RecordingName = "", "2026-03-02T09:00:00Z", ""
	ask[engine.TapRef](t, s, "taps.put", engine.TapPutRequest{Session: later})

	list := ask[engine.TapList](t, s, "taps.list", ref(id)).Sessions
	if len(list) != 2 || list[0].Taken != later.Taken || list[1].ID != tap.ID || list[1].Peaks[0] != session.Peaks[0] {
		t.Fatalf("list %+v", list)
	}
	whole := ask[engine.TapRecording](t, s, "taps.recording", tap)
	if string(whole.Recording.Bytes) != string(wav) || whole.Session.Tension != 212.5 {
		t.Errorf("the recording came back with %d bytes of %d", len(whole.Recording.Bytes), len(wav))
	}

	// Notes are changed without sending the recording again.
	session.Notes = "windy"
	ask[engine.TapRef](t, s, "taps.put", engine.TapPutRequest{Session: session})
	whole = ask[engine.TapRecording](t, s, "taps.recording", tap)
	if whole.Session.Notes != "windy" || len(whole.Recording.Bytes) != len(wav) {
		t.Errorf("after changing notes: %q with %d bytes", whole.Session.Notes, len(whole.Recording.Bytes))
	}

	gone := ask[engine.TapRecording](t, s, "taps.delete", tap)
	refused(t, s, codeNotFound, "taps.recording", tap)
	ask[engine.TapRef](t, s, "taps.put", request(gone.Session), gone.Recording.Bytes) // undo
	whole = ask[engine.TapRecording](t, s, "taps.recording", tap)
	if string(whole.Recording.Bytes) != string(wav) {
		t.Error("the deletion of a tap could not be undone")
	}
	session.Diaphragm, session.ID = "01ARZ3NDEKTSV4RRFFQ69G5FAV", ""
	refused(t, s, codeNotFound, "taps.put", engine.TapPutRequest{Session: session})
}

func TestSettings(t *testing.T) {
	s := freshStore(t)
	settings := ask[engine.Settings](t, s, "settings.get", struct{}{})
	if settings != firstSettings {
		t.Errorf("first settings %+v", settings)
	}
	refused(t, s, engine.CodeRequest, "settings.put", engine.Settings{Units: "furlong"})
	settings.By, settings.Units, settings.LinkAddress = "R. Field", "inch-pound", " https://example.org/tool/handover.html "
	ask[engine.Done](t, s, "settings.put", settings)
	settings.Chosen, settings.LinkAddress = true, "https://example.org/tool/handover.html"
	if got := ask[engine.Settings](t, s, "settings.get", struct{}{}); got != settings {
		t.Errorf("settings %+v, want %+v", got, settings)
	}
}

// A document that could not be read again is not stored.
func TestUnreadableIsNotSaved(t *testing.T) {
	s := freshStore(t)
	o := createDemo(t, s, "")
	request := saveOf(o)
	request.Document.Notes = string(make([]byte, 1<<20))
	if _, err := tell[engine.Saved](s, "records.save", request); err == nil {
		t.Error("a document too large to read again was saved")
	}
	request = saveOf(o)
	request.Document.Faces.Upper.Kind = "sideways"
	if _, err := tell[engine.Saved](s, "records.save", request); err == nil {
		t.Error("a document of an unknown form was saved")
	}
	ask[engine.Saved](t, s, "records.save", saveOf(o)) // the stamp has not moved
}

//go:build js && wasm

package main

// Tests that need no IndexedDB; they run under Node as well.

import (
	"slices"
	"testing"
	"time"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

// The store answers exactly the calls that the contract lists, with exactly
// their types.
func TestHandlersAreTheContract(t *testing.T) {
	s := newStore("unused", time.Now, random{})
	for _, call := range engine.StoreCalls() {
		h, known := s.handlers[call.Name]
		if !known {
			t.Errorf("%s is not answered", call.Name)
			continue
		}
		if h.request != call.Request || h.result != call.Result {
			t.Errorf("%s takes %v and gives %v; the contract says %v and %v", call.Name, h.request, h.result, call.Request, call.Result)
		}
	}
	if len(s.handlers) != len(engine.StoreCalls()) {
		t.Errorf("%d calls are answered, %d are in the contract", len(s.handlers), len(engine.StoreCalls()))
	}
}

func TestListOrder(t *testing.T) {
	want := []engine.RecordInfo{
		{ID: "2", Changed: "2026-01-03"},
		{ID: "4", Changed: "2026-01-01"},
		{ID: "1", Changed: "2026-01-01"},
		{ID: "5", Changed: "2026-01-01", Deleted: "2026-01-06"},
		{ID: "3", Changed: "2026-01-05", Deleted: "2026-01-05"},
	}
	for i := range want {
		for j := range want {
			got := compareInfos(want[i], want[j])
			if (i < j) != (got < 0) || (i == j) != (got == 0) {
				t.Errorf("compareInfos(%v, %v) = %d", want[i], want[j], got)
			}
		}
	}
}

func TestSameTap(t *testing.T) {
	tap := diaphragm.TapSession{ID: "a", Notes: "n", Peaks: []diaphragm.ChosenPeak{{Frequency: 1, M: 2, N: 1}}}
	other := tap
	other.ID = "b"
	if !sameTap(tap, other) {
		t.Error("taps that differ by id only are not the same")
	}
	other.Peaks = nil
	if sameTap(tap, other) {
		t.Error("taps with other peaks are the same")
	}
	other = tap
	other.Notes = ""
	if sameTap(tap, other) {
		t.Error("taps with other notes are the same")
	}
	if len(tap.Peaks) != 1 {
		t.Error("comparing changed a tap")
	}
}

func TestEntrySource(t *testing.T) {
	entry := diaphragm.ArchiveEntry{Document: diaphragm.Demo("A", "")}
	entry.Revisions = []diaphragm.ArchiveRevision{{Number: 1, Document: entry.Document}}
	source := func(change func(*diaphragm.ArchiveEntry)) string {
		e := entry
		e.Revisions = slices.Clone(entry.Revisions)
		change(&e)
		text, err := entrySource(e)
		if err != nil {
			t.Fatal(err)
		}
		return text
	}
	same := source(func(*diaphragm.ArchiveEntry) {})
	for what, change := range map[string]func(*diaphragm.ArchiveEntry){
		"taps": func(e *diaphragm.ArchiveEntry) { e.Taps = []diaphragm.TapSession{{ID: "t"}} },
		"desk": func(e *diaphragm.ArchiveEntry) { e.Desk = map[string]string{"modes": "{}"} },
	} {
		if source(change) != same {
			t.Errorf("%s change what an entry is", what)
		}
	}
	for what, change := range map[string]func(*diaphragm.ArchiveEntry){
		"id":            func(e *diaphragm.ArchiveEntry) { e.Document.ID = "B" },
		"working copy":  func(e *diaphragm.ArchiveEntry) { e.Document.Tension.Nominal++ },
		"revision":      func(e *diaphragm.ArchiveEntry) { e.Revisions[0].Document.Notes = "x" },
		"its number":    func(e *diaphragm.ArchiveEntry) { e.Revisions[0].Number = 2 },
		"its existence": func(e *diaphragm.ArchiveEntry) { e.Revisions = nil },
	} {
		if source(change) == same {
			t.Errorf("another %s is not noticed", what)
		}
	}
}

func TestFloatBytes(t *testing.T) {
	// 1 is 0x3f800000, -2 is 0xc0000000 (IEEE 754 binary32).
	got := floatBytes([]float32{1, -2})
	if want := []byte{0, 0, 0x80, 0x3f, 0, 0, 0, 0xc0}; !slices.Equal(got, want) {
		t.Errorf("floatBytes gives % x, want % x", got, want)
	}
	if floatBytes(nil) != nil {
		t.Error("no values have bytes")
	}
}

func TestRandom(t *testing.T) {
	a, b := make([]byte, 16), make([]byte, 16)
	for _, p := range [][]byte{a, b} {
		if n, err := (random{}).Read(p); n != len(p) || err != nil {
			t.Fatalf("read %d bytes, %v", n, err)
		}
	}
	if slices.Equal(a, b) {
		t.Error("two readings are the same") // by chance once in 3e38
	}
}

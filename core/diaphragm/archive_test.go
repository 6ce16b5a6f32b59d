package diaphragm

import (
	"archive/zip"
	"bytes"
	"errors"
	"math"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
)

const archivesDir = "../../testdata/archives"

// fullArchive holds a diaphragm with revisions, taps and unfinished edits, and
// an unfinished one that Validate would refuse. All of it is invented.
func fullArchive() (Archive, map[string][]byte) {
	first, second := fullDocument(), fullDocument()
	first.Revision, second.Revision = 1, 2
	first.Name = "Film port 7"
	blank := Diaphragm{Schema: Schema, ID: "01JZ7Q4M8WQ0T3X5B2N6V9C1EE", Name: "New",
		Faces: Faces{Upper: Face{Kind: FaceOpen}, Lower: Face{Kind: FaceOpen}}, Avoid: Avoid{Lines: []Line{}}}
	a := Archive{
		Written: "2026-03-07T10:00:00Z", Engine: "1.0.0",
		Settings: ArchiveSettings{LinkAddress: "https://example.org/manual/", Units: "inch-pound", By: "Inspector"},
		Entries: []ArchiveEntry{{
			Document: fullDocument(), Drafts: map[string]string{"sheet.thickness": "23 u"}, Units: map[string]string{"ring.radius": "in"},
			Desk: map[string]string{"modes": `{"sort":"frequency"}`}, Unkept: true, Changed: "2026-03-06T12:00:00Z",
			Revisions: []ArchiveRevision{
				{Number: 1, Kept: "2026-03-02T09:00:00Z", Note: "as ordered", Document: first},
				{Number: 2, Kept: "2026-03-05T09:00:00Z", Note: "after the second round", Document: second},
			},
			Taps: []TapSession{
				{ID: "tap-1", Diaphragm: first.ID, Revision: 2, Taken: "2026-03-05T13:02:11+01:00", By: "Inspector", AirTemperature: 293.4,
					Peaks: []ChosenPeak{{Frequency: 12.34, Uncertainty: 0.05, M: 0, N: 1}}, Tension: 207.1, StandardUncertainty: 3.2, Verdict: "pass",
					Engine: "1.0.0", RecordingName: "port7.wav"},
				{ID: "tap-2", Diaphragm: first.ID, Peaks: []ChosenPeak{}},
			},
		}, {
			Document: blank, Drafts: map[string]string{}, Units: map[string]string{}, Desk: map[string]string{}, Unkept: true,
			Deleted: "2026-03-06T12:30:00Z", Revisions: []ArchiveRevision{}, Taps: []TapSession{},
		}},
	}
	sound := make([]byte, 600)
	for i := range sound {
		sound[i] = byte(i * i >> 3)
	}
	return a, map[string][]byte{"tap-1": append([]byte("RIFF"), sound...)}
}

func encodeArchive(t testing.TB, a Archive, recordings map[string][]byte) []byte {
	t.Helper()
	data, err := EncodeArchive(a, func(id string) ([]byte, error) { return recordings[id], nil })
	if err != nil {
		t.Fatal(err)
	}
	return data
}

func TestArchiveRoundTrip(t *testing.T) {
	a, recordings := fullArchive()
	data := encodeArchive(t, a, recordings)
	got, sounds, err := DecodeArchive(data)
	if err != nil {
		t.Fatal(err)
	}
	if !reflect.DeepEqual(sounds, recordings) {
		t.Error("the recordings came back changed")
	}
	want := a
	want.Format, want.Version, want.Recordings = archiveFormat, archiveVersion, []string{"tap-1"}
	if !reflect.DeepEqual(got, want) {
		t.Errorf("got %+v\nwant %+v", got, want)
	}
	if again := encodeArchive(t, got, sounds); !bytes.Equal(again, data) {
		t.Error("writing the archive again gives other bytes")
	}
	if KindOfFile(data) != FileArchive {
		t.Errorf("taken for %q", KindOfFile(data))
	}
}

func TestArchiveOfNothing(t *testing.T) {
	got, sounds, err := DecodeArchive(encodeArchive(t, Archive{}, nil))
	if err != nil || got.Entries == nil || len(got.Entries) != 0 || len(sounds) != 0 {
		t.Errorf("got %+v, %v (%v)", got, sounds, err)
	}
}

// TestGoldenArchive reads an archive that was written in the past.
func TestGoldenArchive(t *testing.T) {
	if *update {
		writeArchiveSeeds(t)
	}
	data, err := os.ReadFile(filepath.Join(archivesDir, "whole-1.zip"))
	if err != nil {
		t.Fatal(err)
	}
	got, sounds, err := DecodeArchive(data)
	if err != nil {
		t.Fatal(err)
	}
	want, recordings := fullArchive()
	if !reflect.DeepEqual(got.Entries, want.Entries) || !reflect.DeepEqual(sounds, recordings) || !reflect.DeepEqual(got.Settings, want.Settings) {
		t.Errorf("got %+v\nwant %+v", got, want)
	}
}

func TestArchiveCutAnywhere(t *testing.T) {
	data := encodeArchive(t, fullArchiveOnly(), nil)
	for k := range data {
		a, sounds, err := DecodeArchive(data[:k])
		if codeOf(err) == "" || a.Entries != nil || sounds != nil {
			t.Fatalf("cut after %d of %d bytes: %v", k, len(data), err)
		}
		if k > 4 && codeOf(err) != CodeCutShort {
			t.Fatalf("cut after %d of %d bytes: %q %v", k, len(data), codeOf(err), err)
		}
	}
}

func fullArchiveOnly() Archive {
	a, _ := fullArchive()
	return a
}

// TestArchiveAlteredAnywhere flips one bit of every byte. Where the archive is
// still accepted, nothing that it holds may have changed.
func TestArchiveAlteredAnywhere(t *testing.T) {
	a, recordings := fullArchive()
	data := encodeArchive(t, a, recordings)
	want, _, err := DecodeArchive(data)
	if err != nil {
		t.Fatal(err)
	}
	for k := range data {
		altered := bytes.Clone(data)
		altered[k] ^= 1 << (k % 8)
		got, sounds, err := DecodeArchive(altered)
		if err != nil {
			if codeOf(err) == "" {
				t.Fatalf("byte %d: no sentence: %v", k, err)
			}
			continue
		}
		if !reflect.DeepEqual(got, want) || !reflect.DeepEqual(sounds, recordings) {
			t.Fatalf("byte %d altered, and accepted with other content", k)
		}
	}
}

func TestDecodeArchiveRefuses(t *testing.T) {
	index := func(text string) []byte { return zipOf(member{archiveIndex, []byte(text)}) }
	const head = `{"format":"hoopsheet archive","version":1,`
	const blank = `{"schema":1,"id":"A","faces":{"upper":{"kind":"open"},"lower":{"kind":"open"}}}`
	for _, row := range []struct {
		name  string
		data  []byte
		code  Code
		words string
	}{
		{"empty", nil, CodeUnreadable, "not an archive"},
		{"a hand-over", []byte(`{"format":"hoopsheet hand-over"}`), CodeUnreadable, "not an archive"},
		{"other zip", zipOf(member{"word/document.xml", []byte("<x/>")}), CodeUnreadable, "holds no hoopsheet.json"},
		{"other JSON", index(`{"format":"x"}`), CodeUnreadable, "not an archive"},
		{"newer archive", index(`{"format":"hoopsheet archive","version":2,"members":[]}`), CodeNewer, "newer version"},
		{"no version", index(`{"format":"hoopsheet archive"}`), CodeUnreadable, "which version"},
		{"newer document", index(head + `"entries":[{"document":{"schema":2}}]}`), CodeNewer, "document version 2"},
		{"newer revision", index(head + `"entries":[{"document":` + blank + `,"revisions":[{"number":1,"document":{"schema":3}}]}]}`), CodeNewer, "document version 3"},
		{"unknown member", index(head + `"photos":[]}`), CodeUnreadable, `"photos"`},
		{"wrong type", index(head + `"entries":{}}`), CodeUnreadable, "a list belongs there"},
		{"no document", index(head + `"entries":[{}]}`), CodeCutShort, "document"},
		{"bad id", index(head + `"entries":[{"document":` + strings.Replace(blank, `"A"`, `"../../x"`, 1) + `}]}`), CodeUnreadable, "no proper id"},
		{"one id twice", index(head + `"entries":[{"document":` + blank + `},{"document":` + blank + `}]}`), CodeUnreadable, "two diaphragms have one id"},
		{"revision 0", index(head + `"entries":[{"document":` + blank + `,"revisions":[{"document":` + blank + `}]}]}`), CodeUnreadable, "not in order"},
		{"foreign revision", index(head + `"entries":[{"document":` + blank + `,"revisions":[{"number":1,"document":` +
			strings.Replace(blank, `"A"`, `"B"`, 1) + `}]}]}`), CodeUnreadable, "revision belongs to another"},
		{"foreign tap", index(head + `"entries":[{"document":` + blank + `,"taps":[{"id":"t","diaphragm":"B"}]}]}`), CodeUnreadable, "tap session belongs to another"},
		{"missing recording", index(head + `"entries":[],"recordings":["t"]}`), CodeUnreadable, "incomplete"},
		{"cut JSON", index(head), CodeCutShort, "ends in the middle"},
		{"two of one name", zipOf(member{archiveIndex, []byte(head + `"entries":[]}`)}, member{archiveIndex, []byte("{}")}), CodeUnreadable, "two files of one name"},
		{"index bomb", index(head + strings.Repeat(" ", mostIndexBytes)), CodeTooLarge, "unfolds to more than is allowed"},
	} {
		a, sounds, err := DecodeArchive(row.data)
		if codeOf(err) != row.code || !strings.Contains(err.Error(), row.words) {
			t.Errorf("%s: %q %v; want %q with %q", row.name, codeOf(err), err, row.code, row.words)
		}
		if a.Entries != nil || sounds != nil {
			t.Errorf("%s: half of it was returned", row.name)
		}
	}
}

// TestArchiveIgnoresStrayFiles: unpacking and packing again on some systems
// adds files of their own.
func TestArchiveIgnoresStrayFiles(t *testing.T) {
	data := zipOf(member{"__MACOSX/._x", []byte("x")}, member{archiveIndex, []byte(`{"format":"hoopsheet archive","version":1}`)})
	if _, _, err := DecodeArchive(data); err != nil {
		t.Error(err)
	}
}

func TestEncodeArchiveRefuses(t *testing.T) {
	none := func(string) ([]byte, error) { return nil, nil }
	a := fullArchiveOnly()
	a.Entries[0].Document.Ring.Radius = math.NaN()
	if _, err := EncodeArchive(a, none); err == nil || !strings.Contains(err.Error(), "not a finite number") {
		t.Errorf("NaN: %v", err)
	}
	a = fullArchiveOnly()
	a.Entries[1].Document.Notes = strings.Repeat("x", mostDocumentBytes)
	if _, err := EncodeArchive(a, none); codeOf(err) != CodeTooLarge || !strings.Contains(err.Error(), "Shorten its notes") {
		t.Errorf("long notes: %v", err)
	}
	a = fullArchiveOnly()
	a.Entries[0].Taps[1].ID = "tap-1"
	if _, err := EncodeArchive(a, none); err == nil {
		t.Error("two taps of one id were written")
	}
	gone := errors.New("The recording cannot be read.")
	if _, err := EncodeArchive(fullArchiveOnly(), func(string) ([]byte, error) { return nil, gone }); !errors.Is(err, gone) {
		t.Errorf("a failed reading: %v", err)
	}
}

type member struct {
	name string
	data []byte
}

func zipOf(members ...member) []byte {
	var out bytes.Buffer
	file := zip.NewWriter(&out)
	for _, m := range members {
		w, err := file.Create(m.name)
		if err == nil {
			_, err = w.Write(m.data)
		}
		if err != nil {
			panic(err)
		}
	}
	if err := file.Close(); err != nil {
		panic(err)
	}
	return out.Bytes()
}

func writeArchiveSeeds(t *testing.T) {
	a, recordings := fullArchive()
	whole := encodeArchive(t, a, recordings)
	altered := bytes.Clone(whole)
	altered[300] ^= 4
	for name, data := range map[string][]byte{
		"whole-1.zip": whole, "cut-short.zip": whole[:len(whole)*2/3], "altered.zip": altered, "empty-1.zip": encodeArchive(t, Archive{}, nil),
		"newer.zip":     zipOf(member{archiveIndex, []byte(`{"format":"hoopsheet archive","version":2}`)}),
		"other-zip.zip": zipOf(member{"word/document.xml", []byte("<x/>")}),
		"bomb.zip":      zipOf(member{archiveIndex, bytes.Repeat([]byte(" "), 256<<10)}),
	} {
		writeSeed(t, filepath.Join(archivesDir, name), data)
	}
}

// FuzzDecodeArchive: whatever arrives, there is no panic, and either a
// sentence and nothing else, or an archive that can be written again and reads
// the same.
func FuzzDecodeArchive(f *testing.F) {
	addSeeds(f, archivesDir)
	f.Fuzz(func(t *testing.T, data []byte) {
		a, recordings, err := DecodeArchive(data)
		if err != nil {
			if codeOf(err) == "" || err.Error() == "" {
				t.Errorf("no sentence: %v", err)
			}
			if a.Entries != nil || recordings != nil {
				t.Error("half of it was returned")
			}
			return
		}
		again, sounds, err := DecodeArchive(encodeArchive(t, a, recordings))
		if err != nil || !reflect.DeepEqual(again.Entries, a.Entries) || len(sounds) != len(recordings) {
			t.Errorf("written again, it reads %+v (%v), not %+v", again, err, a)
		}
	})
}

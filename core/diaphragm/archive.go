package diaphragm

import (
	"encoding/json"
	"sort"
	"strconv"

	"hoopsheet/core/sheet"
)

// Archive is everything that one browser keeps, for one file. The file is a
// zip that holds hoopsheet.json, which is this structure, and
// recordings/<tap id>.wav.
type Archive struct {
	// Format and Version name the form of the file; EncodeArchive sets them.
	Format  string `json:"format"`
	Version int    `json:"version"`
	// Written is the time of writing, RFC 3339; Engine the version that wrote.
	Written string         `json:"written"`
	Engine  string         `json:"engine"`
	Entries []ArchiveEntry `json:"entries"`
	// Recordings are the ids of the taps whose recordings the file holds;
	// EncodeArchive fills them in.
	Recordings []string        `json:"recordings"`
	Settings   ArchiveSettings `json:"settings"`
}

// ArchiveEntry is one diaphragm with all that belongs to it.
type ArchiveEntry struct {
	// Document is the working copy, or the last revision where there is none.
	Document Diaphragm `json:"document"`
	// Drafts, Units and Desk belong to the working copy.
	Drafts map[string]string `json:"drafts"`
	Units  map[string]string `json:"units"`
	Desk   map[string]string `json:"desk"`
	// Unkept is true when the working copy differs from the last revision.
	Unkept bool `json:"unkept"`
	// Changed and Deleted are RFC 3339; Deleted is empty for a live diaphragm.
	Changed   string            `json:"changed"`
	Deleted   string            `json:"deleted"`
	Revisions []ArchiveRevision `json:"revisions"`
	Taps      []TapSession      `json:"taps"`
}

// ArchiveRevision is one kept revision.
type ArchiveRevision struct {
	Number   int       `json:"number"`
	Kept     string    `json:"kept"`
	Note     string    `json:"note"`
	Document Diaphragm `json:"document"`
}

// ArchiveSettings are the choices of the browser that wrote the file.
type ArchiveSettings struct {
	LinkAddress string `json:"linkAddress"`
	Units       string `json:"units"`
	By          string `json:"by"`
	// Materials are the sheet materials that were added in that browser.
	Materials []sheet.Material `json:"materials,omitempty"`
}

const (
	archiveFormat  = "hoopsheet archive"
	archiveVersion = 1
	archiveIndex   = "hoopsheet.json"
)

// Limits of an archive.
const (
	mostArchiveBytes   = 512 << 20 // the file, and all that it unfolds to
	mostIndexBytes     = 64 << 20
	mostRecordingBytes = 64 << 20
	mostArchiveFiles   = 20000
)

func recordingName(tapID string) string { return "recordings/" + tapID + ".wav" }

// EncodeArchive writes everything into one file. recordings gives the WAV file
// of a tap session, or nil where none is kept; it is asked for every session.
// The bytes are the same for the same content. The error is a *Refusal, or
// what recordings returned.
func EncodeArchive(a Archive, recordings func(tapID string) ([]byte, error)) ([]byte, error) {
	a.Format, a.Version, a.Recordings = archiveFormat, archiveVersion, []string{}
	if err := checkEntries(a.Entries, "The archive cannot be made"); err != nil {
		return nil, err
	}
	a.Entries = entriesWithoutNil(a.Entries)
	var file zipWriter
	total := 0
	for _, entry := range a.Entries {
		for _, tap := range entry.Taps {
			data, err := recordings(tap.ID)
			if err != nil {
				return nil, err
			}
			if len(data) == 0 {
				continue
			}
			if total += len(data); len(data) > mostRecordingBytes || total > mostArchiveBytes {
				return nil, refuse("archive", CodeTooLarge, "The archive cannot be made: the recording of a tap on "+shorten(entry.Document.Name, "a diaphragm")+
					" makes it larger than one file can carry (64 MiB for a recording, 512 MiB in all). Delete recordings that are not needed.")
			}
			// Stored, not deflated: sampled sound hardly shrinks.
			if err := file.add(recordingName(tap.ID), data, false); err != nil {
				return nil, err
			}
			a.Recordings = append(a.Recordings, tap.ID)
		}
	}
	for _, entry := range a.Entries {
		if line, err := encodeLine(entry.Document); err == nil && len(line) > mostDocumentBytes {
			return nil, refuse("archive", CodeTooLarge, "The archive cannot be made: the texts of "+shorten(entry.Document.Name, "a diaphragm")+
				" are longer than can be read back. Shorten its notes.")
		}
	}
	index, err := encodeLine(a)
	if err != nil {
		return nil, refuse("archive", CodeUnreadable, "The archive cannot be made: a value of a diaphragm or a tap is not a finite number.")
	}
	if len(index) > mostIndexBytes {
		return nil, refuse("archive", CodeTooLarge, "The archive cannot be made: more than 64 MiB of diaphragms do not fit into one file.")
	}
	if len(a.Recordings) >= mostArchiveFiles {
		return nil, refuse("archive", CodeTooLarge, "The archive cannot be made: more than "+strconv.Itoa(mostArchiveFiles-1)+" recordings do not fit into one file.")
	}
	if err := file.add(archiveIndex, index, true); err != nil {
		return nil, err
	}
	return file.close(), nil
}

// DecodeArchive reads the file of everything: the archive and its recordings
// by tap id. It returns all or nothing. Documents are brought to the present
// schema; unfinished ones are accepted. The error is a *Refusal.
func DecodeArchive(data []byte) (Archive, map[string][]byte, error) {
	fail := func(code Code, message string) (Archive, map[string][]byte, error) {
		return Archive{}, nil, refuse("archive", code, message)
	}
	if len(data) > mostArchiveBytes {
		return fail(CodeTooLarge, "The file is larger than 512 MiB; no archive is.")
	}
	contents, err := zipContents(data)
	if err != nil {
		if KindOfFile(data) == FileArchive {
			return fail(CodeCutShort, "The archive is cut short or damaged: its table of contents, which stands at the end, cannot be read. Copy the file again. Nothing was imported.")
		}
		return fail(CodeUnreadable, "This is not an archive of Hoopsheet. Nothing was imported.")
	}
	if len(contents) > mostArchiveFiles {
		return fail(CodeTooLarge, "The archive holds more than "+strconv.Itoa(mostArchiveFiles)+" files. Nothing was imported.")
	}
	members := map[string]zipMember{}
	for _, member := range contents {
		if _, twice := members[member.name]; twice {
			return fail(CodeUnreadable, "The archive holds two files of one name, "+shorten(member.name, "none")+". Nothing was imported.")
		}
		members[member.name] = member
	}
	if _, found := members[archiveIndex]; !found {
		return fail(CodeUnreadable, "This zip file holds no "+archiveIndex+", so it is not an archive of Hoopsheet. Nothing was imported.")
	}
	index, err := readMember(data, members[archiveIndex], mostIndexBytes)
	if err != nil {
		return Archive{}, nil, err
	}
	a, err := decodeIndex(index)
	if err != nil {
		return Archive{}, nil, err
	}
	taps := map[string]bool{}
	for _, entry := range a.Entries {
		for _, tap := range entry.Taps {
			taps[tap.ID] = true
		}
	}
	recordings := map[string][]byte{}
	total := len(index)
	for _, id := range a.Recordings {
		member, found := members[recordingName(id)]
		if !found || !taps[id] || recordings[id] != nil {
			return fail(CodeUnreadable, "The archive is incomplete: the recording of tap "+shorten(id, "without a name")+" is missing. Nothing was imported.")
		}
		recording, err := readMember(data, member, min(mostRecordingBytes, mostArchiveBytes-total))
		if err != nil {
			return Archive{}, nil, err
		}
		total += len(recording)
		recordings[id] = recording
	}
	return a, recordings, nil
}

// readMember unfolds one file of the zip.
func readMember(data []byte, member zipMember, most int) ([]byte, error) {
	if member.size > most {
		return nil, refuse("archive", CodeTooLarge, "The file "+shorten(member.name, "")+" in the archive unfolds to more than is allowed. Nothing was imported.")
	}
	content, err := member.read(data)
	if err != nil {
		return nil, refuse("archive", CodeAltered, "The archive is damaged: the file "+shorten(member.name, "")+" in it cannot be read. Copy the file again. Nothing was imported.")
	}
	return content, nil
}

// The forms in which hoopsheet.json is read: the outer Document, as it was
// written, stands before that of the embedded structure, so that it can be
// migrated.
type (
	writtenArchive struct {
		Archive
		Entries []writtenEntry `json:"entries"`
	}
	writtenEntry struct {
		ArchiveEntry
		Document  json.RawMessage   `json:"document"`
		Revisions []writtenRevision `json:"revisions"`
	}
	writtenRevision struct {
		ArchiveRevision
		Document json.RawMessage `json:"document"`
	}
)

// decodeIndex reads hoopsheet.json.
func decodeIndex(data []byte) (Archive, error) {
	const what = "The list of diaphragms in the archive"
	var head struct {
		Format  string `json:"format"`
		Version int    `json:"version"`
	}
	if err := json.Unmarshal(data, &head); err != nil {
		return Archive{}, refuseJSON(err, "archive", what)
	}
	switch {
	case head.Format != archiveFormat:
		return Archive{}, refuse("archive", CodeUnreadable, "This zip file is not an archive of Hoopsheet. Nothing was imported.")
	case head.Version > archiveVersion:
		return Archive{}, refuse("archive", CodeNewer, "The archive was written by a newer version of Hoopsheet (archive version "+strconv.Itoa(head.Version)+
			"; this one reads up to "+strconv.Itoa(archiveVersion)+"). Reload the page while online and import it again. Nothing was imported.")
	case head.Version < 1:
		return Archive{}, refuse("archive", CodeUnreadable, "The archive does not say which version it is written in. Nothing was imported.")
	}
	var written writtenArchive
	if err := readStrictly(data, &written, "archive", what); err != nil {
		return Archive{}, err
	}
	a := written.Archive
	a.Entries = make([]ArchiveEntry, len(written.Entries))
	for i, we := range written.Entries {
		entry := we.ArchiveEntry
		var err error
		if entry.Document, err = ReadDocument(we.Document); err != nil {
			return Archive{}, err
		}
		entry.Revisions = make([]ArchiveRevision, len(we.Revisions))
		for j, wr := range we.Revisions {
			revision := wr.ArchiveRevision
			if revision.Document, err = ReadDocument(wr.Document); err != nil {
				return Archive{}, err
			}
			entry.Revisions[j] = revision
		}
		a.Entries[i] = entry
	}
	if err := checkEntries(a.Entries, "The archive cannot be read"); err != nil {
		return Archive{}, err
	}
	a.Entries = entriesWithoutNil(a.Entries)
	if a.Recordings == nil {
		a.Recordings = []string{}
	}
	return a, nil
}

// checkEntries checks that ids are proper and unique and that everything
// belongs where it stands.
func checkEntries(entries []ArchiveEntry, opening string) error {
	fail := func(entry ArchiveEntry, message string) error {
		return refuse("archive", CodeUnreadable, opening+": "+message+" (diaphragm "+shorten(entry.Document.Name, "without a name")+").")
	}
	documents, taps := map[string]bool{}, map[string]bool{}
	for _, entry := range entries {
		id := entry.Document.ID
		if !soundID(id) {
			return fail(entry, "a diaphragm has no proper id")
		}
		if documents[id] {
			return fail(entry, "two diaphragms have one id")
		}
		documents[id] = true
		numbers := map[int]bool{}
		for _, revision := range entry.Revisions {
			if revision.Number < 1 || numbers[revision.Number] {
				return fail(entry, "the numbers of its revisions are not in order")
			}
			numbers[revision.Number] = true
			if revision.Document.ID != id {
				return fail(entry, "a revision belongs to another diaphragm")
			}
		}
		for _, tap := range entry.Taps {
			if !soundID(tap.ID) || taps[tap.ID] {
				return fail(entry, "a tap session has no id of its own")
			}
			taps[tap.ID] = true
			if tap.Diaphragm != id {
				return fail(entry, "a tap session belongs to another diaphragm")
			}
		}
	}
	return nil
}

// entriesWithoutNil returns the entries with empty lists and maps in place of
// nil ones, and the revisions in the order of their numbers.
func entriesWithoutNil(entries []ArchiveEntry) []ArchiveEntry {
	out := make([]ArchiveEntry, len(entries))
	for i, entry := range entries {
		entry.Document = withoutNil(Parcel{Document: entry.Document}).Document
		for _, m := range []*map[string]string{&entry.Drafts, &entry.Units, &entry.Desk} {
			if *m == nil {
				*m = map[string]string{}
			}
		}
		entry.Revisions = append([]ArchiveRevision{}, entry.Revisions...)
		sort.Slice(entry.Revisions, func(a, b int) bool { return entry.Revisions[a].Number < entry.Revisions[b].Number })
		for j := range entry.Revisions {
			entry.Revisions[j].Document = withoutNil(Parcel{Document: entry.Revisions[j].Document}).Document
		}
		entry.Taps = append([]TapSession{}, entry.Taps...)
		for j := range entry.Taps {
			if entry.Taps[j].Peaks == nil {
				entry.Taps[j].Peaks = []ChosenPeak{}
			}
		}
		out[i] = entry
	}
	return out
}

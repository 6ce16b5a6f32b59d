package diaphragm

import (
	"slices"
	"strconv"
	"strings"
)

// list is one of the document's lists, to which entries are added and from
// which they are removed. The fields of an entry hold its number:
// "avoid.lines.0.frequency".
type list struct {
	// path of the list, "avoid.lines".
	path string
	// most entries that it may have.
	most int
	// one and many name an entry and the entries in a sentence.
	one, many string
	// typed is the member that the text of an added entry is for.
	typed string
	// count gives the number of entries, add appends a sound one, and remove
	// deletes one.
	count  func(*Diaphragm) int
	add    func(*Diaphragm)
	remove func(d *Diaphragm, index int)
	// fields of one entry; their accessors hold for documents that have it.
	fields func(index int) []Field
}

// lists holds every list in page order.
var lists = []list{
	entries(list{
		path: "tension.harmonics", most: MostHarmonics, one: "harmonic of the tension", many: "harmonics of the tension",
		typed: "order", fields: harmonicFields,
	}, func(d *Diaphragm) *[]Harmonic { return &d.Tension.Harmonics }, newHarmonic),
	entries(list{
		path: "attached.patches", most: MostPatches, one: "patch", many: "patches", typed: "mass", fields: patchFields,
	}, func(d *Diaphragm) *[]Patch { return &d.Attached.Patches }, newPatch),
	entries(list{
		path: "attached.strips", most: MostStrips, one: "strip", many: "strips", typed: "mass", fields: stripFields,
	}, func(d *Diaphragm) *[]Strip { return &d.Attached.Strips }, newStrip),
	entries(list{
		path: "avoid.lines", most: MostLines, one: "line to keep clear of", many: "lines to keep clear of",
		typed: "frequency", fields: lineFields,
	}, func(d *Diaphragm) *[]Line { return &d.Avoid.Lines }, newLine),
}

// entries completes a list with what works on the slice of its entries.
func entries[T any](l list, slice func(*Diaphragm) *[]T, begin func(*Diaphragm) T) list {
	l.count = func(d *Diaphragm) int { return len(*slice(d)) }
	l.add = func(d *Diaphragm) { *slice(d) = append(*slice(d), begin(d)) }
	l.remove = func(d *Diaphragm, index int) { *slice(d) = slices.Delete(*slice(d), index, index+1) }
	return l
}

// listByPath finds the list that is, or holds, what the path names.
func listByPath(path string) (list, bool) {
	for _, l := range lists {
		if rest, within := strings.CutPrefix(path, l.path); within && (rest == "" || rest[0] == '.') {
			return l, true
		}
	}
	return list{}, false
}

// entryOf parts "avoid.lines.3.frequency" into the list, 3 and "frequency". It
// is false for what names no entry that the list may have.
func entryOf(path string) (l list, index int, member string, ok bool) {
	l, ok = listByPath(path)
	if !ok {
		return list{}, 0, "", false
	}
	digits, member, _ := strings.Cut(strings.TrimPrefix(path[len(l.path):], "."), ".")
	index, err := strconv.Atoi(digits)
	if err != nil || index < 0 || index >= l.most || strconv.Itoa(index) != digits {
		return l, 0, "", false
	}
	return l, index, member, true
}

// at is the path of an entry or, where a member is given, of its field.
func (l list) at(index int, member string) string { return entryPath(l.path, index, member) }

func entryPath(path string, index int, member string) string {
	path += "." + strconv.Itoa(index)
	if member != "" {
		path += "." + member
	}
	return path
}

func (l list) tooMany(count int) Problem {
	return Problem{Field: l.path, Code: CodeTooMany, Offset: -1, Message: "There are " + strconv.Itoa(count) + " " + l.many +
		"; at most " + strconv.Itoa(l.most) + " are allowed."}
}

// tooLongLists gives the problem of each list with too many entries.
func tooLongLists(doc Diaphragm) []Problem {
	var problems []Problem
	for _, l := range lists {
		if count := l.count(&doc); count > l.most {
			problems = append(problems, l.tooMany(count))
		}
	}
	return problems
}

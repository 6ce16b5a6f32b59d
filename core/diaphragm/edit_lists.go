package diaphragm

import (
	"strconv"
	"strings"
)

// addEntry appends an entry to a list. The text of the edit may be its first
// figure ("171 Hz" for a line to keep clear of); without one it begins with an
// ordinary figure, to be replaced.
func (e *editor) addEntry(edit Edit) {
	l, known := listByPath(edit.Field)
	if !known || l.path != edit.Field {
		var paths []string
		for _, l := range lists {
			paths = append(paths, `"`+l.path+`"`)
		}
		last := len(paths) - 1
		e.fail(edit.Field, CodeAction, "Nothing can be added to "+clip(edit.Field)+", only to "+strings.Join(paths[:last], ", ")+" or "+paths[last]+".")
		return
	}
	count := l.count(&e.doc)
	if count >= l.most {
		e.problems = append(e.problems, l.tooMany(count+1))
		return
	}
	l.add(&e.doc)
	if edit.Text != "" {
		f, _ := e.field(l.at(count, l.typed))
		e.set(f, edit.Text)
	}
}

// removeEntry deletes an entry of a list, and moves the drafts and units of
// those behind it along with them.
func (e *editor) removeEntry(edit Edit) {
	l, index, member, ok := entryOf(edit.Field)
	if l.path == "" {
		e.fail(edit.Field, CodeAction, clip(edit.Field)+" cannot be removed; it is no entry of a list.")
		return
	}
	if count := l.count(&e.doc); !ok || member != "" || index >= count {
		e.fail(edit.Field, CodeUnknownField, "There is no "+l.one+" named "+clip(edit.Field)+"; there are "+
			strconv.Itoa(count)+", counted from \""+l.at(0, "")+"\".")
		return
	}
	l.remove(&e.doc, index)
	e.drafts = l.closeGap(e.drafts, index)
	e.units = l.closeGap(e.units, index)
}

// closeGap renames what belongs to the entries behind a removed one.
func (l list) closeGap(byField map[string]string, removed int) map[string]string {
	moved := map[string]string{}
	for path, text := range byField {
		of, i, member, isEntry := entryOf(path)
		switch {
		case !isEntry || of.path != l.path || i < removed:
			moved[path] = text
		case i > removed:
			moved[l.at(i-1, member)] = text
		}
	}
	return moved
}

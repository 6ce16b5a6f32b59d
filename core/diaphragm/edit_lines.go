package diaphragm

import "strconv"

// addLine appends a line to keep clear of. The text of the edit may be its
// frequency ("171 Hz"); without one it begins at 100 Hz, to be replaced.
func (e *editor) addLine(edit Edit) {
	if edit.Field != linesPath {
		e.fail(edit.Field, CodeAction, "Nothing can be added to "+clip(edit.Field)+"; lines to keep clear of are added to \""+linesPath+"\".")
		return
	}
	count := len(e.doc.Avoid.Lines)
	if count >= MostLines {
		e.problems = append(e.problems, tooManyLines(count+1))
		return
	}
	e.doc.Avoid.Lines = append(e.doc.Avoid.Lines, Line{Name: "line " + strconv.Itoa(count+1), Frequency: 100, HalfWidth: 0.05})
	if edit.Text != "" {
		f, _ := e.field(linePath(count, "frequency"))
		e.set(f, edit.Text)
	}
}

// removeLine deletes a line, and moves the drafts and units of those behind it
// along with them.
func (e *editor) removeLine(edit Edit) {
	index, member, ok := splitLinePath(edit.Field)
	if !ok || member != "" || index >= len(e.doc.Avoid.Lines) {
		e.fail(edit.Field, CodeUnknownField, "There is no line to keep clear of named "+clip(edit.Field)+"; there are "+
			strconv.Itoa(len(e.doc.Avoid.Lines))+", counted from \""+linePath(0, "")+"\".")
		return
	}
	e.doc.Avoid.Lines = append(e.doc.Avoid.Lines[:index], e.doc.Avoid.Lines[index+1:]...)
	e.drafts = closeGap(e.drafts, index)
	e.units = closeGap(e.units, index)
}

// closeGap renames the entries of lines behind a removed one.
func closeGap(byField map[string]string, removed int) map[string]string {
	moved := map[string]string{}
	for path, text := range byField {
		i, member, isLine := splitLinePath(path)
		switch {
		case !isLine || i < removed:
			moved[path] = text
		case i > removed:
			moved[linePath(i-1, member)] = text
		}
	}
	return moved
}

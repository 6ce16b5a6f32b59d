package diaphragm

import (
	"strings"

	"hoopsheet/core/quantity"
)

// Rows builds the rows of the form in page order. Where edits are given, those
// just made, the rows of quantities say how an unusual text was read. A field
// with a draft shows the draft and what is wrong with it.
//
// A field that applies only with another one, such as the depth of a cavity,
// has a row only there.
func Rows(doc Diaphragm, drafts, units map[string]string, system quantity.System, edits ...Edit) []Row {
	e := newEditor(doc, drafts, units, system)
	wrong := map[string]string{}
	for _, p := range validate(e.doc, e.units, e.system) {
		wrong[p.Field] = strings.TrimPrefix(wrong[p.Field]+" "+p.Message, " ")
	}
	rows := []Row{}
	for _, f := range FieldsOf(e.doc) {
		if f.shown != nil && !f.shown(&e.doc, e.drafts) {
			continue
		}
		row := e.row(f)
		if text, drafted := e.drafts[f.Path]; drafted {
			row.Text = text
			if _, _, p := e.attempt(f, text); p != nil {
				row.Problem = p.Message
			}
		} else {
			row.Problem = wrong[f.Path]
			row.Echo = e.echo(f, edits)
		}
		rows = append(rows, row)
	}
	return rows
}

// row is the field's row without draft, problem and echo.
func (e *editor) row(f Field) Row {
	unit := f.unit(e.units, e.system)
	row := Row{
		Field: f.Path, Group: f.Group, Symbol: f.Symbol, Name: f.Name, Help: f.Help, Kind: f.Kind,
		Text: f.write(&e.doc, unit), Units: []string{}, Choices: []Choice{},
		Optional: f.Optional && !f.neededWhereShown,
	}
	row.Choices = append(row.Choices, f.Choices...)
	if f.Kind == KindQuantity {
		row.Unit = unit.Symbol
		row.Units = append(row.Units, f.Units...)
		if !contains(f.Units, unit.Symbol) {
			row.Units = append(row.Units, unit.Symbol)
		}
	}
	return row
}

// echo says how the last of the edits that set the field was read.
func (e *editor) echo(f Field, edits []Edit) string {
	if f.Kind != KindQuantity && f.Kind != KindCount {
		return ""
	}
	for i := len(edits) - 1; i >= 0; i-- {
		if edits[i].Field == f.Path && edits[i].Action == ActionSet {
			doc := cloned(e.doc)
			reading, _ := f.read(&doc, edits[i].Text, f.unit(e.units, e.system))
			return reading.Echo
		}
	}
	return ""
}

func contains(list []string, wanted string) bool {
	for _, s := range list {
		if s == wanted {
			return true
		}
	}
	return false
}

package diaphragm

import (
	"maps"

	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// Apply performs edits on a document and returns the changed document, drafts
// and units, and everything that is wrong now. Its arguments stay as they are.
//
// Drafts are typed texts that could not be taken over, by field: the document
// keeps the last sound value, and nothing typed is lost. A draft goes when a
// later edit of its field is sound, or when a change elsewhere makes it sound
// (a cavity once its depth is typed, 40 °C as the lowest temperature once the
// highest is above it). Units are the symbols chosen for show, by field.
//
// The problems are those of edits that cannot be done at all, of the drafts,
// and of the document itself.
func Apply(doc Diaphragm, drafts, units map[string]string, edits []Edit, system quantity.System) (Diaphragm, map[string]string, map[string]string, []Problem) {
	e := newEditor(doc, drafts, units, system)
	for _, edit := range edits {
		e.perform(edit)
		e.retryDrafts()
	}
	e.doc = normal(e.doc)
	return e.doc, e.drafts, e.units, e.allProblems()
}

// editor holds the state between the edits of one Apply.
type editor struct {
	doc      Diaphragm
	drafts   map[string]string
	units    map[string]string
	system   quantity.System
	problems []Problem
}

func newEditor(doc Diaphragm, drafts, units map[string]string, system quantity.System) *editor {
	e := &editor{doc: cloned(doc), drafts: map[string]string{}, units: map[string]string{}, system: system}
	maps.Copy(e.drafts, drafts)
	maps.Copy(e.units, units)
	known := map[string]bool{}
	for _, f := range FieldsOf(doc) {
		known[f.Path] = true
	}
	unknown := func(path, _ string) bool { return !known[path] }
	maps.DeleteFunc(e.drafts, unknown)
	maps.DeleteFunc(e.units, unknown)
	return e
}

func (e *editor) fail(field string, code Code, message string) {
	e.problems = append(e.problems, Problem{Field: field, Code: code, Message: message, Offset: -1})
}

func (e *editor) perform(edit Edit) {
	switch edit.Action {
	case ActionAdd:
		e.addEntry(edit)
		return
	case ActionRemove:
		e.removeEntry(edit)
		return
	}
	f, ok := e.field(edit.Field)
	if !ok {
		e.fail(edit.Field, CodeUnknownField, "There is no field named "+clip(edit.Field)+" in this diaphragm.")
		return
	}
	switch edit.Action {
	case ActionSet:
		e.set(f, edit.Text)
	case ActionUnit:
		e.chooseUnit(f, edit.Text)
	case ActionAdopt:
		e.adopt(f, edit.Text)
	default:
		e.fail(edit.Field, CodeAction, "There is no action named "+clip(string(edit.Action))+"; an edit can set, unit, add, remove or adopt.")
	}
}

// field finds a field that the document has.
func (e *editor) field(path string) (Field, bool) {
	if l, i, _, isEntry := entryOf(path); isEntry && i >= l.count(&e.doc) {
		return Field{}, false
	}
	return FieldByPath(path)
}

// set takes a text over, or keeps it as a draft.
func (e *editor) set(f Field, text string) {
	changed, reading, p := e.attempt(f, text)
	if p != nil {
		e.drafts[f.Path] = text
		return
	}
	e.doc = changed
	delete(e.drafts, f.Path)
	if reading.Typed {
		e.units[f.Path] = reading.Unit.Symbol
	}
}

// attempt makes the document in which the field holds the text. The reading is
// that of a quantity or count.
func (e *editor) attempt(f Field, text string) (changed Diaphragm, reading quantity.Reading, p *Problem) {
	doc := cloned(e.doc)
	unit := f.unit(e.units, e.system)
	// A quantity whose text is set to what it shows keeps the digits that are
	// not shown.
	if f.Kind != KindQuantity || text == "" || text != f.write(&doc, unit) {
		if reading, p = f.read(&doc, text, unit); p != nil {
			return e.doc, reading, p
		}
	}
	if reading.Typed {
		unit = reading.Unit
	}
	if p := f.check(&doc, unit); p != nil {
		return e.doc, reading, p
	}
	coupleFaces(f, &doc)
	for _, c := range conflicts(doc, e.units, e.system) {
		if c.concerns(f.Path) {
			problem := c.problem(f.Path)
			return e.doc, reading, &problem
		}
	}
	return doc, reading, nil
}

// coupleFaces keeps open on both faces or on neither after one was set, and
// one fluid where both are open.
func coupleFaces(f Field, doc *Diaphragm) {
	edited, other := &doc.Faces.Upper, &doc.Faces.Lower
	switch f.Path {
	case "faces.upper.kind", "faces.upper.fluid":
	case "faces.lower.kind", "faces.lower.fluid":
		edited, other = other, edited
	default:
		return
	}
	switch {
	case edited.Kind == FaceOpen:
		other.Kind, other.Fluid = FaceOpen, edited.Fluid
	case other.Kind == FaceOpen:
		other.Kind = FaceBaffled
	}
}

// retryDrafts takes over the drafts that have become sound, until none does.
func (e *editor) retryDrafts() {
	for progress := true; progress && len(e.drafts) > 0; {
		progress = false
		for _, f := range FieldsOf(e.doc) {
			text, drafted := e.drafts[f.Path]
			if !drafted {
				continue
			}
			e.set(f, text)
			if _, still := e.drafts[f.Path]; !still {
				progress = true
			}
		}
	}
}

func (e *editor) chooseUnit(f Field, symbol string) {
	if f.Kind != KindQuantity {
		e.fail(f.Path, CodeAction, f.capital()+" has no unit to choose.")
		return
	}
	unit, ok := quantity.Find(f.Dimension, symbol)
	if !ok {
		// Let package quantity say what is wrong with the unit.
		_, err := f.asked(f.SI).Parse("1 " + symbol)
		message := f.capital() + " needs the name of a unit."
		if err != nil {
			message = err.Error()
		}
		e.fail(f.Path, CodeUnit, message)
		return
	}
	e.units[f.Path] = unit.Symbol
}

func (e *editor) adopt(f Field, id string) {
	if f.Kind != KindMaterial {
		e.fail(f.Path, CodeAction, f.capital()+" cannot adopt a material; only the field \"sheet.material\" can.")
		return
	}
	material, ok := sheet.MaterialByID(id)
	if !ok {
		e.fail(f.Path, CodeChoice, "There is no material "+clip(id)+" in the list; type a name and its properties instead.")
		return
	}
	adopt(&e.doc.Sheet, material)
	for _, member := range []string{"material", "density", "e", "nu", "cte", "allowableStress"} {
		delete(e.drafts, "sheet."+member)
	}
}

// allProblems lists those of edits, then of drafts, then of the document.
func (e *editor) allProblems() []Problem {
	list := append([]Problem{}, e.problems...)
	for _, f := range FieldsOf(e.doc) {
		if text, drafted := e.drafts[f.Path]; drafted {
			if _, _, p := e.attempt(f, text); p != nil {
				list = append(list, *p)
			}
		}
	}
	for _, p := range validate(e.doc, e.units, e.system) {
		if _, drafted := e.drafts[p.Field]; !drafted {
			list = append(list, p)
		}
	}
	return list
}

package diaphragm

import (
	"strconv"
	"strings"

	"hoopsheet/core/quantity"
)

// Field describes one editable field of the document: what it is called, how
// it is typed, and what is allowed.
type Field struct {
	// Path is the dotted name, "sheet.thickness". Fields of a line to keep
	// clear of hold its number: "avoid.lines.0.frequency".
	Path   string
	Group  GroupName
	Symbol string
	// Name as it stands in a sentence: "sheet thickness".
	Name string
	// Help is one or two plain sentences.
	Help string
	Kind FieldKind
	// Dimension of a quantity; SI and InchPound are the symbols of the units it
	// is first shown in, Units those that are offered.
	Dimension     quantity.Dimension
	SI, InchPound string
	Units         []string
	// Low and High bound a quantity, in SI units, or a count; Reason says why,
	// as the end of a sentence that begins "because".
	Low, High float64
	Reason    string
	// Most is the largest number of characters of a text.
	Most int
	// Optional fields may be empty; the document then holds zero or "".
	Optional bool
	// Choices of a choice field, and the catalogue of a material field.
	Choices []Choice

	number func(*Diaphragm) *float64
	count  func(*Diaphragm) *int
	text   func(*Diaphragm) *string
	// shown is nil for fields that are always shown.
	shown func(doc *Diaphragm, drafts map[string]string) bool
}

// Fields lists every editable field in page order, with the fields of one line
// to keep clear of, whose number is 0. FieldsOf lists those of a document.
func Fields() []Field { return fieldList(1) }

// FieldsOf lists the editable fields of a document in page order: those of
// Fields, with the fields of each of its lines to keep clear of.
func FieldsOf(doc Diaphragm) []Field { return fieldList(min(len(doc.Avoid.Lines), MostLines)) }

// FieldByPath finds a field by its dotted name. Fields of lines are found up
// to MostLines, whether or not a document has them.
func FieldByPath(path string) (Field, bool) {
	if i, _, ok := splitLinePath(path); ok {
		for _, f := range lineFields(i) {
			if f.Path == path {
				return f, true
			}
		}
		return Field{}, false
	}
	for _, f := range fieldList(0) {
		if f.Path == path {
			return f, true
		}
	}
	return Field{}, false
}

func fieldList(lines int) []Field {
	list := make([]Field, 0, 32+3*lines)
	list = append(list, identityFields()...)
	list = append(list, ringFields()...)
	list = append(list, sheetFields()...)
	list = append(list, tensionFields()...)
	list = append(list, faceFields()...)
	list = append(list, surroundingsFields()...)
	list = append(list, avoidFields()...)
	for i := range lines {
		list = append(list, lineFields(i)...)
	}
	return append(list, dampingFields()...)
}

const linesPath = "avoid.lines"

// splitLinePath parts "avoid.lines.3.frequency" into 3 and "frequency".
func splitLinePath(path string) (index int, member string, ok bool) {
	rest, ok := strings.CutPrefix(path, linesPath+".")
	if !ok {
		return 0, "", false
	}
	digits, member, _ := strings.Cut(rest, ".")
	index, err := strconv.Atoi(digits)
	if err != nil || index < 0 || index >= MostLines || strconv.Itoa(index) != digits {
		return 0, "", false
	}
	return index, member, true
}

func linePath(index int, member string) string {
	path := linesPath + "." + strconv.Itoa(index)
	if member != "" {
		path += "." + member
	}
	return path
}

// unit is the unit in which the field is shown: the one chosen, or that of the
// system.
func (f Field) unit(units map[string]string, system quantity.System) quantity.Unit {
	if symbol, chosen := units[f.Path]; chosen {
		if unit, ok := quantity.Find(f.Dimension, symbol); ok {
			return unit
		}
	}
	symbol := f.SI
	if system == quantity.InchPound {
		symbol = f.InchPound
	}
	unit, _ := quantity.Find(f.Dimension, symbol)
	return unit
}

// asked is the field as package quantity is to read it.
func (f Field) asked(unit string) quantity.Asked {
	return quantity.Asked{Name: f.Name, Dimension: f.Dimension, Unit: unit, Offered: f.Units}
}

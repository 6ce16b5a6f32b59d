package diaphragm

import "hoopsheet/core/quantity"

// Field describes one editable field of the document: what it is called, how
// it is typed, and what is allowed.
type Field struct {
	// Path is the dotted name, "sheet.thickness". Fields of an entry of a list
	// hold its number: "avoid.lines.0.frequency".
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
	// Default is the choice that the document need not spell out: "" and false
	// mean it. Empty where every choice is spelt out.
	Default string

	number func(*Diaphragm) *float64
	count  func(*Diaphragm) *int
	text   func(*Diaphragm) *string
	// flag is for a choice between two: the first means false.
	flag func(*Diaphragm) *bool
	// shown is nil for fields that are always shown.
	shown func(doc *Diaphragm, drafts map[string]string) bool
	// neededWhereShown marks an optional field that is needed where it is shown.
	neededWhereShown bool
}

// Fields lists every editable field in page order, with the fields of one
// entry of each list, whose number is 0. FieldsOf lists those of a document.
func Fields() []Field { return fieldList(func(list) int { return 1 }) }

// FieldsOf lists the editable fields of a document in page order: those of
// Fields, with the fields of each of its entries of lists.
func FieldsOf(doc Diaphragm) []Field {
	return fieldList(func(l list) int { return min(l.count(&doc), l.most) })
}

// FieldByPath finds a field by its dotted name. Fields of entries are found up
// to the largest number that the list may have, whether or not a document has
// them.
func FieldByPath(path string) (Field, bool) {
	l, index, _, isEntry := entryOf(path)
	fields := []Field(nil)
	switch {
	case isEntry:
		fields = l.fields(index)
	case l.path == "":
		fields = fieldList(func(list) int { return 0 })
	}
	for _, f := range fields {
		if f.Path == path {
			return f, true
		}
	}
	return Field{}, false
}

// fieldList gives all fields, with as many entries of each list as are told.
func fieldList(count func(list) int) []Field {
	all := make([]Field, 0, 96)
	entries := func(path string) {
		l, _ := listByPath(path)
		for i := range count(l) {
			all = append(all, l.fields(i)...)
		}
	}
	all = append(all, identityFields()...)
	all = append(all, ringFields()...)
	all = append(all, sheetFields()...)
	all = append(all, tensionFields()...)
	all = append(all, evennessFields()...)
	entries("tension.harmonics")
	entries("attached.patches")
	entries("attached.strips")
	all = append(all, faceFields()...)
	all = append(all, surroundingsFields()...)
	all = append(all, avoidFields()...)
	entries("avoid.lines")
	return append(all, dampingFields()...)
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

package diaphragm

import "hoopsheet/core/quantity"

// SpecificationLine is one specified field, written for reading.
type SpecificationLine struct {
	Group  GroupName
	Symbol string
	Name   string
	Text   string
	Unit   string
}

// SpecificationLines writes every field for reading, in page order. What is
// optional and not stated is left out, and so is what does not apply, such as
// the depth of what is no cavity.
func SpecificationLines(doc Diaphragm, units map[string]string, system quantity.System) []SpecificationLine {
	lines := []SpecificationLine{}
	for _, f := range FieldsOf(doc) {
		if f.shown != nil && !f.shown(&doc, nil) {
			continue
		}
		unit := quantity.Unit{}
		if f.Kind == KindQuantity {
			unit = f.unit(units, system)
		}
		text := f.write(&doc, unit)
		if text == "" && f.Optional || text == f.Default && text != "" {
			continue
		}
		for _, c := range f.Choices {
			if f.Kind == KindChoice && c.Value == text {
				text = c.Name
			}
		}
		lines = append(lines, SpecificationLine{Group: f.Group, Symbol: f.Symbol, Name: f.Name, Text: text, Unit: unit.Symbol})
	}
	return lines
}

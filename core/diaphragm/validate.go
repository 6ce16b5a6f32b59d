package diaphragm

import (
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"hoopsheet/core/quantity"
)

// The kinds of problem of fields and edits, beside those of package quantity.
const (
	// CodeEmpty: a field that needs a value has none.
	CodeEmpty = Code(quantity.CodeEmpty)
	// CodeBounds: a value outside the field's bounds, or not finite.
	CodeBounds Code = "bounds"
	// CodeConflict: a value that does not go together with another field.
	CodeConflict Code = "conflict"
	// CodeTooLong: a text with too many characters.
	CodeTooLong = Code(quantity.CodeTooLong)
	// CodeText: a text with characters that cannot be shown.
	CodeText Code = "text"
	// CodeWhole: a count that is no whole number.
	CodeWhole Code = "whole"
	// CodeChoice: not one of the choices.
	CodeChoice Code = "choice"
	// CodeTooMany: more entries of a list than are allowed.
	CodeTooMany Code = "too-many"
	// CodeUnit: no unit of the field's dimension.
	CodeUnit = Code(quantity.CodeUnit)
	// CodeUnknownField: an edit names a field that does not exist.
	CodeUnknownField Code = "unknown-field"
	// CodeAction: an edit does what cannot be done with its field.
	CodeAction Code = "action"
	// CodeSchema: the document's version is not the one of this program.
	CodeSchema Code = "schema"
)

// Codes lists every kind of problem that fields, edits and documents have,
// those of package quantity included.
func Codes() []Code {
	list := []Code{
		CodeBounds, CodeConflict, CodeText, CodeWhole, CodeChoice, CodeTooMany, CodeUnknownField, CodeAction, CodeSchema,
		CodeCutShort, CodeAltered, CodeNewer, CodeUnreadable, CodeTooLarge,
	}
	for _, code := range quantity.Codes() {
		list = append(list, Code(code))
	}
	return list
}

// Validate lists what is wrong with a whole document that did not come through
// Apply: one from a script, a link or a file. It is empty for a sound one.
// Messages name values in the units of SI fields.
func Validate(doc Diaphragm) []Problem { return validate(doc, nil, quantity.SI) }

func validate(doc Diaphragm, units map[string]string, system quantity.System) []Problem {
	problems := identityProblems(doc)
	problems = append(problems, tooLongLists(doc)...)
	for _, f := range FieldsOf(doc) {
		if p := f.check(&doc, f.unit(units, system)); p != nil {
			problems = append(problems, *p)
		}
	}
	for _, c := range conflicts(doc, units, system) {
		problems = append(problems, c.problem(c.fields[0]))
	}
	return problems
}

// identityProblems checks what is not typed in a form: schema, id, time of
// creation, revision. A document of a script may have neither id nor time.
func identityProblems(doc Diaphragm) []Problem {
	var problems []Problem
	add := func(field string, code Code, message string) {
		problems = append(problems, Problem{Field: field, Code: code, Message: message, Offset: -1})
	}
	if doc.Schema != Schema {
		add("schema", CodeSchema, "The document's schema is "+strconv.Itoa(doc.Schema)+"; this version works with schema "+strconv.Itoa(Schema)+".")
	}
	if doc.ID != "" && !soundID(doc.ID) {
		add("id", CodeText, "The document's id must be 1 to 64 letters, digits, - or _.")
	}
	if doc.Created != "" && !ValidTime(doc.Created) {
		add("created", CodeText, "The time of creation must be written like 2031-05-17T09:30:00Z.")
	}
	if doc.Revision < 0 || doc.Revision > 1e9 {
		add("revision", CodeBounds, "The revision is "+strconv.Itoa(doc.Revision)+"; it must be a number from 0 to 1000000000.")
	}
	return problems
}

// check tests the field's value within doc by itself.
func (f Field) check(doc *Diaphragm, unit quantity.Unit) *Problem {
	switch f.Kind {
	case KindQuantity:
		return f.checkQuantity(*f.number(doc), unit)
	case KindCount:
		return f.checkCount(*f.count(doc))
	case KindChoice:
		if f.flag != nil {
			return nil // a flag can only be one of its two choices
		}
		return f.checkChoice(*f.text(doc))
	}
	return f.checkText(*f.text(doc))
}

func (f Field) checkQuantity(value float64, unit quantity.Unit) *Problem {
	if value >= f.Low && value <= f.High || f.Optional && value == 0 {
		return nil
	}
	return f.problem(CodeBounds, f.capital()+" is "+withUnit(show(value, unit), unit)+"; it must lie from "+
		withUnit(inside(f.Low, unit, +1), unit)+" to "+withUnit(inside(f.High, unit, -1), unit)+", because "+f.Reason+".")
}

func (f Field) checkCount(value int) *Problem {
	if value >= int(f.Low) && value <= int(f.High) || f.Optional && value == 0 {
		return nil
	}
	return f.problem(CodeBounds, f.capital()+" is "+strconv.Itoa(value)+"; it must lie from "+strconv.Itoa(int(f.Low))+" to "+
		strconv.Itoa(int(f.High))+", because "+f.Reason+".")
}

func (f Field) checkChoice(value string) *Problem {
	if value == "" && f.Default != "" {
		return nil
	}
	var names []string
	for _, c := range f.Choices {
		if c.Value == value {
			return nil
		}
		names = append(names, c.Value)
	}
	last := len(names) - 1
	return f.problem(CodeChoice, f.capital()+" cannot be "+clip(value)+"; choose "+strings.Join(names[:last], ", ")+" or "+names[last]+".")
}

func (f Field) checkText(value string) *Problem {
	if !f.Optional && strings.TrimSpace(value) == "" {
		return f.problem(CodeEmpty, f.capital()+" is empty; type at least one letter.")
	}
	if count := utf8.RuneCountInString(value); count > f.Most {
		p := f.problem(CodeTooLong, f.capital()+" has "+strconv.Itoa(count)+" characters; at most "+strconv.Itoa(f.Most)+" are kept.")
		p.Offset = utf16Length(value, f.Most)
		return p
	}
	for i, r := range value {
		lineBreak := f.Kind == KindLongText && (r == '\n' || r == '\t')
		if unicode.IsControl(r) && !lineBreak || r == utf8.RuneError || reordering(r) {
			p := f.problem(CodeText, f.capital()+" holds a character that cannot be shown; delete it.")
			p.Offset = utf16Length(value[:i], len(value))
			return p
		}
	}
	return nil
}

// reordering is true for the characters that make the text behind them be
// shown in another order than it is written: in a hand-over they could make
// figures read differently.
func reordering(r rune) bool {
	return r >= '\u202a' && r <= '\u202e' || r >= '\u2066' && r <= '\u2069'
}

// utf16Length counts the UTF-16 units of the first most runes of text.
func utf16Length(text string, most int) int {
	units := 0
	for _, r := range text {
		if most == 0 {
			break
		}
		most--
		units++
		if r > 0xffff {
			units++
		}
	}
	return units
}

func (f Field) problem(code Code, message string) *Problem {
	return &Problem{Field: f.Path, Code: code, Message: message, Offset: -1}
}

// capital is the field's name at the start of a sentence.
func (f Field) capital() string { return strings.ToUpper(f.Name[:1]) + f.Name[1:] }

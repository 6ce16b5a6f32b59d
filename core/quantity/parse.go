package quantity

import (
	"strings"
	"unicode/utf8"
)

// MostCharacters is the length of the longest text that is read.
const MostCharacters = 64

// Reading is a typed quantity as it was understood.
type Reading struct {
	// SI is the value in SI units.
	SI float64
	// Number is the value in Unit.
	Number float64
	// Unit is the unit that was typed, or the one that a bare number is in.
	Unit Unit
	// Typed is true where the unit was part of the text.
	Typed bool
	// Echo says how the text was read where that is not obvious: "1,5" is read
	// as 1.5. It is empty otherwise.
	Echo string
}

// Asked is the quantity that a text is to be read as.
type Asked struct {
	// Name as it stands in a sentence, "ring radius"; the dimension's own words
	// where it is empty.
	Name      string
	Dimension Dimension
	// Unit is the symbol of the unit that a bare number is in; the first one
	// offered under SI where it is no unit of the dimension.
	Unit string
	// Offered are the symbols named where a unit is refused; the dimension's
	// own where there are none.
	Offered []string
}

// Parse reads a text such as "23 um" as a quantity of the dimension; a bare
// number is in the unit with the given symbol. The error is always an *Error.
func Parse(text string, d Dimension, unit string) (Reading, error) {
	return Asked{Dimension: d, Unit: unit}.Parse(text)
}

// Parse reads a text as the quantity asked for. The error is always an *Error.
//
// A number may have a sign, a decimal point or comma, groups of three digits,
// an exponent ("1e-3", "1×10⁻³") or be a fraction ("3/4", "1 3/4"); the unit
// follows with or without a space. "1,500" is refused, because it may be 1.5
// or 1500; "1.500" is 1.5. Values are within 2 ulp of the typed decimal times
// the exact factor of the unit (see TestEveryUnitRoundTrips).
func (a Asked) Parse(text string) (Reading, error) {
	if a.Dimension.Words() == "" {
		return Reading{}, &Error{Code: CodeDimension, Message: "There is no dimension named " + quote(string(a.Dimension)) + "."}
	}
	if a.Name == "" {
		a.Name = a.Dimension.Words()
	}
	if len(a.Offered) == 0 {
		a.Offered = Offered(a.Dimension, SI)
	}
	if utf8.RuneCountInString(text) > MostCharacters {
		return Reading{}, &Error{Code: CodeTooLong, Offset: utf16Offset([]rune(text), MostCharacters),
			Message: sentence(a.Name, " is typed in more than 64 characters; type "+a.wanted()+".")}
	}
	runes := []rune(text)
	start := skipSpace(runes, 0)
	end := len(runes)
	for end > start && isSpace(runes[end-1]) {
		end--
	}
	if start == end {
		return Reading{}, &Error{Code: CodeEmpty, Message: sentence(a.Name, " is empty; type "+a.wanted()+".")}
	}
	body := runes[start:end]
	n, bad := scanNumber(body)
	if bad != nil {
		return Reading{}, a.numberError(body, bad, utf16Offset(runes, start+bad.at))
	}
	unitAt := skipSpace(body, n.end)
	unit, typed, message := a.unit(string(body[unitAt:]))
	if message != "" {
		return Reading{}, &Error{Code: CodeUnit, Message: message, Offset: utf16Offset(runes, start+unitAt)}
	}
	reading := Reading{SI: unit.ToSI(n.value) + 0, Number: n.value, Unit: unit, Typed: typed}
	if a.Dimension == Temperature && reading.SI < 0 {
		return Reading{}, &Error{Code: CodeRange, Offset: utf16Offset(runes, start),
			Message: sentence(a.Name, " "+quote(string(body))+" lies below absolute zero (-273.15 °C, -459.67 °F).")}
	}
	if !n.obvious {
		reading.Echo = quote(string(body[:n.end])) + " is read as " + n.plain
	}
	return reading, nil
}

// unit reads the text behind the number; the message is empty where that went
// well.
func (a Asked) unit(text string) (unit Unit, typed bool, message string) {
	if text == "" {
		if unit, ok := Find(a.Dimension, a.Unit); ok {
			return unit, false, ""
		}
		unit, _ = Find(a.Dimension, Offered(a.Dimension, SI)[0])
		return unit, false, ""
	}
	wanted := key(text)
	if wanted != "" {
		if unit, ok := find(a.Dimension, wanted); ok {
			return unit, true, ""
		}
	}
	takes := sentence("", a.Name+" takes "+a.units()+".")
	for _, d := range Dimensions() {
		if unit, ok := find(d, wanted); ok && wanted != "" {
			return Unit{}, false, unit.Symbol + " is a unit of " + d.Words() + "; " + takes
		}
	}
	for _, u := range units(a.Dimension) {
		if strings.EqualFold(key(u.Symbol), wanted) {
			return Unit{}, false, quote(text) + " is not a unit; was " + u.Symbol + " meant? " + sentence(a.Name, strings.TrimPrefix(takes, a.Name))
		}
	}
	return Unit{}, false, quote(text) + " is not a unit known here; " + takes
}

func (a Asked) numberError(body []rune, bad *trouble, offset int) *Error {
	typed := quote(string(body))
	message := ""
	switch bad.code {
	case CodeAmbiguous:
		message = sentence(a.Name, " "+typed+" can mean "+bad.choices[0]+" or "+bad.choices[1]+"; type "+bad.choices[0]+" or "+bad.choices[1]+", whichever is meant.")
	case CodeRange:
		message = sentence(a.Name, " "+typed+" is too large or too small a number to compute with.")
	default:
		message = sentence(a.Name, " must be "+a.wanted()+"; "+typed+" cannot be read as one.")
	}
	return &Error{Code: bad.code, Message: message, Offset: offset}
}

// wanted says what can be typed: "a number with a unit, such as 1.5 mm".
func (a Asked) wanted() string {
	unit, ok := Find(a.Dimension, a.Unit)
	if !ok {
		unit, _ = Find(a.Dimension, a.Offered[0])
	}
	if unit.Symbol == "" {
		return "a number"
	}
	return "a number with a unit, such as 1.5 " + unit.Symbol
}

// units lists the offered symbols: "m, mm, µm, in or mil".
func (a Asked) units() string {
	var list []string
	for _, symbol := range a.Offered {
		if symbol == "" {
			symbol = "no unit"
		}
		list = append(list, symbol)
	}
	if len(list) == 1 {
		return list[0]
	}
	return strings.Join(list[:len(list)-1], ", ") + " or " + list[len(list)-1]
}

// sentence joins a name and what is said of it, with a capital in front.
func sentence(name, rest string) string {
	text := name + rest
	if name == "" || text == "" || text[0] < 'a' || text[0] > 'z' {
		return text
	}
	return string(text[0]-'a'+'A') + text[1:]
}

func quote(s string) string {
	s = strings.ToValidUTF8(s, "\ufffd")
	runes := []rune(s)
	if len(runes) > MostCharacters {
		s = string(runes[:MostCharacters]) + "..."
	}
	return "\"" + s + "\""
}

package diaphragm

import (
	"errors"
	"math"
	"strconv"
	"strings"

	"hoopsheet/core/quantity"
)

// read puts a typed text into the field of doc. A bare number is in the unit.
// Bounds are not tested. The reading is that of a quantity or count.
func (f Field) read(doc *Diaphragm, text string, unit quantity.Unit) (quantity.Reading, *Problem) {
	empty := strings.TrimSpace(text) == ""
	switch f.Kind {
	case KindQuantity:
		if empty && f.Optional {
			*f.number(doc) = 0
			return quantity.Reading{}, nil
		}
		reading, err := f.asked(unit.Symbol).Parse(text)
		if err != nil {
			return reading, f.unread(err)
		}
		*f.number(doc) = reading.SI
		return reading, nil
	case KindCount:
		if empty && f.Optional {
			*f.count(doc) = 0
			return quantity.Reading{}, nil
		}
		reading, err := quantity.Asked{Name: f.Name, Dimension: quantity.Ratio, Offered: []string{""}}.Parse(text)
		if err != nil {
			return reading, f.unread(err)
		}
		if reading.SI != math.Trunc(reading.SI) || math.Abs(reading.SI) > math.MaxInt32 {
			return reading, f.problem(CodeWhole, f.capital()+" must be a whole number from "+strconv.Itoa(int(f.Low))+" to "+strconv.Itoa(int(f.High))+
				"; "+clip(text)+" is none.")
		}
		*f.count(doc) = int(reading.SI)
		// A count has no unit to be shown in.
		reading.Typed = false
		return reading, nil
	case KindLongText:
		text = strings.ReplaceAll(text, "\r\n", "\n")
	case KindChoice:
		for _, c := range f.Choices {
			if text == c.Name {
				text = c.Value
			}
		}
		if text == "" && f.Default != "" {
			return quantity.Reading{}, f.problem(CodeEmpty, f.capital()+" is empty; choose one of the list.")
		}
		if f.flag != nil {
			if p := f.checkChoice(text); p != nil {
				return quantity.Reading{}, p
			}
			*f.flag(doc) = text == f.Choices[1].Value
			return quantity.Reading{}, nil
		}
		if text == f.Default {
			text = "" // it need not be spelt out
		}
	default:
		text = strings.TrimSpace(text)
	}
	*f.text(doc) = text
	return quantity.Reading{}, nil
}

// unread turns an error of package quantity into a problem of the field.
func (f Field) unread(err error) *Problem {
	var unread *quantity.Error
	if !errors.As(err, &unread) {
		return f.problem(CodeText, err.Error())
	}
	p := f.problem(Code(unread.Code), unread.Message)
	p.Offset = unread.Offset
	return p
}

// write gives the field of doc as a text: a quantity as a number in the unit,
// and an optional one that is not stated as nothing.
func (f Field) write(doc *Diaphragm, unit quantity.Unit) string {
	switch f.Kind {
	case KindQuantity:
		value := *f.number(doc)
		if f.Optional && value == 0 {
			return ""
		}
		return show(value, unit)
	case KindCount:
		count := *f.count(doc)
		if f.Optional && count == 0 {
			return ""
		}
		return strconv.Itoa(count)
	case KindChoice:
		if f.flag != nil && *f.flag(doc) {
			return f.Choices[1].Value
		} else if f.flag != nil {
			return f.Choices[0].Value
		}
		if *f.text(doc) == "" {
			return f.Default
		}
	}
	return *f.text(doc)
}

// Digits of a value in a form. What was typed comes back to the last digit:
// twelve digits are compared, and a value that needs no more than nine of them
// is one that was typed. Others come from a change of unit and are shown with
// six, enough for any specification; the document keeps all.
const (
	digitsCompared = 12
	digitsTyped    = 9
	digitsShown    = 6
)

func show(si float64, unit quantity.Unit) string {
	text := quantity.Format(si, unit.Symbol, digitsCompared)
	if significant(text) <= digitsTyped {
		return text
	}
	return quantity.Format(si, unit.Symbol, digitsShown)
}

// significant counts the digits of a number from the first to the last that is
// not zero.
func significant(text string) int {
	mantissa, _, _ := strings.Cut(text, "e")
	digits := strings.Trim(strings.Replace(strings.TrimLeft(mantissa, "-"), ".", "", 1), "0")
	return len(digits)
}

// inside writes a bound in a unit, rounded to the inner side of it: direction
// is +1 for a lower bound and -1 for an upper one.
func inside(bound float64, unit quantity.Unit, direction float64) string {
	x := unit.FromSI(bound)
	text := quantity.FormatNumber(x, digitsShown)
	if rounded, err := strconv.ParseFloat(text, 64); err == nil && x != 0 {
		if (unit.ToSI(rounded)-bound)*direction < 0 {
			step := math.Pow(10, math.Floor(math.Log10(math.Abs(x)))-digitsShown+1)
			text = quantity.FormatNumber(rounded+direction*step, digitsShown)
		}
	}
	return text
}

func withUnit(number string, unit quantity.Unit) string {
	if unit.Symbol == "" {
		return number
	}
	return number + " " + unit.Symbol
}

// clip quotes a text that came from outside, shortened.
func clip(text string) string { return shorten(text, "nothing") }

package quantity

// Code is the kind of an Error, for programs.
type Code string

// The codes of errors.
const (
	// CodeEmpty: nothing was typed.
	CodeEmpty Code = "empty"
	// CodeNumber: the text does not begin with a number that can be read.
	CodeNumber Code = "number"
	// CodeAmbiguous: the number can be read in two ways.
	CodeAmbiguous Code = "ambiguous"
	// CodeUnit: the unit is not known, or is one of another dimension.
	CodeUnit Code = "unit"
	// CodeTooLong: the text is longer than any quantity.
	CodeTooLong Code = "too-long"
	// CodeRange: the number is too large or too small to compute with, or
	// lies below absolute zero.
	CodeRange Code = "range"
	// CodeDimension: the dimension asked for does not exist.
	CodeDimension Code = "dimension"
)

// Codes lists every code of this package.
func Codes() []Code {
	return []Code{CodeEmpty, CodeNumber, CodeAmbiguous, CodeUnit, CodeTooLong, CodeRange, CodeDimension}
}

// Error says why a text was not read.
type Error struct {
	Code Code
	// Message is a sentence that names the quantity, what is wrong and what is
	// allowed.
	Message string
	// Offset is the place of the first offending character, counted in UTF-16
	// units from the start of the text, as browsers count.
	Offset int
}

// Error returns the sentence.
func (e *Error) Error() string { return e.Message }

// utf16Offset counts the UTF-16 units of the first n runes of text.
func utf16Offset(text []rune, n int) int {
	units := 0
	for _, r := range text[:n] {
		units++
		if r > 0xffff {
			units++
		}
	}
	return units
}

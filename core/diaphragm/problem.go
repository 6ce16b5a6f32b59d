package diaphragm

// Problem is one thing wrong with an input, with the place where a person
// should read about it.
type Problem struct {
	// Field is the dotted name of the field, such as "sheet.thickness".
	Field string `json:"field"`
	Code  Code   `json:"code"`
	// Message is a sentence that names the field, what is wrong and what is
	// allowed.
	Message string `json:"message"`
	// Offset is the place of the first offending character of a typed text,
	// counted in UTF-16 units as the browser does; -1 where there is none.
	Offset int `json:"offset"`
}

// Code is the kind of a problem, for programs.
type Code string

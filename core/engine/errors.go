package engine

import (
	"errors"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/spectrum"
)

// Problem is one thing wrong with an input: the field, a code for programs and
// a sentence for people.
type Problem = diaphragm.Problem

// Code is the kind of a problem.
type Code = diaphragm.Code

// Codes that the door itself gives; those of fields are in package diaphragm.
const (
	CodeUnknownCall Code = "unknown-call"
	CodeRequest     Code = "request"
	CodeInternal    Code = "internal"
)

// Codes lists the codes that the door itself gives.
func Codes() []Code { return []Code{CodeUnknownCall, CodeRequest, CodeInternal, CodeRange} }

// Error is what a refused call returns: one or more problems.
type Error struct {
	Problems []Problem `json:"problems"`
}

// Error joins the sentences of all problems.
func (e *Error) Error() string {
	var text strings.Builder
	for i, p := range e.Problems {
		if i > 0 {
			text.WriteByte(' ')
		}
		text.WriteString(p.Message)
	}
	return text.String()
}

// Fail makes an Error with a single problem.
func Fail(field string, code Code, message string) *Error {
	return &Error{Problems: []Problem{{Field: field, Code: code, Message: message, Offset: -1}}}
}

// asError words an error of a lower package for the reader: the problems it
// already has, or one at the given field.
func asError(err error, field string) error {
	var own *Error
	var refusal *diaphragm.Refusal
	var recording *spectrum.Error
	switch {
	case errors.As(err, &own):
		return own
	case errors.As(err, &refusal):
		return &Error{Problems: refusal.Problems}
	case errors.As(err, &recording):
		return Fail(recording.Field, Code(recording.Code), recording.Message)
	}
	return Fail(field, CodeRequest, err.Error())
}

// refuse makes an Error of problems, or nil when there are none.
func refuse(problems []Problem) error {
	if len(problems) == 0 {
		return nil
	}
	return &Error{Problems: problems}
}

func quote(s string) string {
	const most = 60
	if len(s) > most {
		s = strings.ToValidUTF8(s[:most], "") + "..."
	}
	return "\"" + s + "\""
}

package diaphragm

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"strconv"
	"strings"
	"unicode"
)

// Refusal is why a document, a link or a file was not read or not written. It
// holds at least one problem; Error is the text to show.
type Refusal struct {
	Problems []Problem
}

// The kinds of refusal.
const (
	// CodeCutShort: the end is missing.
	CodeCutShort Code = "cut-short"
	// CodeAltered: the checksum does not fit the content.
	CodeAltered Code = "altered"
	// CodeNewer: written by a newer version of this program.
	CodeNewer Code = "newer"
	// CodeUnreadable: not what it should be, or not in the form that it
	// should have.
	CodeUnreadable Code = "unreadable"
	// CodeTooLarge: beyond a size that no honest file has.
	CodeTooLarge Code = "too-large"
)

// Error joins the sentences of all problems.
func (r *Refusal) Error() string {
	var text strings.Builder
	for i, p := range r.Problems {
		if i > 0 {
			text.WriteByte(' ')
		}
		text.WriteString(p.Message)
	}
	return text.String()
}

func refuse(field string, code Code, message string) *Refusal {
	return &Refusal{Problems: []Problem{{Field: field, Code: code, Message: message, Offset: -1}}}
}

// readStrictly decodes one JSON value into target. Members that target does
// not have are refused, so that nothing is lost silently. The field is the one
// that the refusal names, and what is its name in a sentence, "The link".
func readStrictly(data []byte, target any, field, what string) error {
	decoder := json.NewDecoder(bytes.NewReader(data))
	decoder.DisallowUnknownFields()
	if err := decoder.Decode(target); err != nil {
		return refuseJSON(err, field, what)
	}
	if _, err := decoder.Token(); err != io.EOF {
		return refuse(field, CodeUnreadable, what+" holds something after its end. Ask for it again.")
	}
	return nil
}

// refuseJSON turns an error of package encoding/json into a sentence.
func refuseJSON(err error, field, what string) error {
	var refusal *Refusal
	var syntax *json.SyntaxError
	var wrongType *json.UnmarshalTypeError
	switch {
	case errors.As(err, &refusal):
		return refusal
	case errors.Is(err, io.EOF), errors.Is(err, io.ErrUnexpectedEOF),
		errors.As(err, &syntax) && syntax.Error() == "unexpected end of JSON input":
		return refuse(field, CodeCutShort, what+" ends in the middle. Ask for it again.")
	case errors.As(err, &syntax):
		return refuse(field, CodeUnreadable, what+" cannot be read: at character "+strconv.FormatInt(syntax.Offset, 10)+
			" its text is not in the form expected. It may be cut short or altered; ask for it again.")
	case errors.As(err, &wrongType):
		return refuse(field, CodeUnreadable, what+" cannot be read: "+shorten(wrongType.Field, "its content")+" holds "+
			article(wrongType.Value)+", and "+goName(wrongType.Type.Kind().String())+" belongs there.")
	}
	if name, ok := strings.CutPrefix(err.Error(), "json: unknown field "); ok {
		return refuse(field, CodeUnreadable, what+" holds "+shorten(strings.Trim(name, `"`), "a member")+
			", which this version does not know. It may come from a newer version; reload the page, or ask how it was made.")
	}
	return refuse(field, CodeUnreadable, what+" cannot be read.")
}

// shorten quotes a name that came from outside, without what cannot be shown,
// or gives the other words where it is empty.
func shorten(name, otherwise string) string {
	name = strings.Map(func(r rune) rune {
		if unicode.IsGraphic(r) {
			return r
		}
		return -1
	}, name)
	if name == "" {
		return otherwise
	}
	const most = 60
	if len(name) > most {
		name = strings.ToValidUTF8(name[:most], "") + "..."
	}
	return `"` + name + `"`
}

// article names a kind of JSON value, as package encoding/json describes it,
// in a sentence.
func article(value string) string {
	kind, rest, _ := strings.Cut(value, " ")
	switch kind {
	case "string":
		return "a text"
	case "number":
		if rest != "" {
			return "the number " + shorten(rest, "")
		}
		return "a number"
	case "bool":
		return "yes or no"
	case "array":
		return "a list"
	case "object":
		return "a group of members"
	}
	return "something else"
}

// goName names the kind of value that belongs in a place.
func goName(kind string) string {
	switch kind {
	case "float64":
		return "a number"
	case "int":
		return "a whole number"
	case "string":
		return "a text"
	case "bool":
		return "yes or no"
	case "slice":
		return "a list"
	}
	return "a group of members"
}

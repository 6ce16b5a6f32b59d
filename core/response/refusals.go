package response

import (
	"strconv"
	"strings"

	"hoopsheet/core/diaphragm"
)

// say fills the # marks of a sentence, one after another: numbers to four
// digits, whole numbers and words as they are.
func say(text string, parts ...any) string {
	var out strings.Builder
	for _, p := range parts {
		before, after, _ := strings.Cut(text, "#")
		out.WriteString(before)
		switch v := p.(type) {
		case string:
			out.WriteString(v)
		case int:
			out.WriteString(strconv.Itoa(v))
		case float64:
			out.WriteString(short(v))
		}
		text = after
	}
	out.WriteString(text)
	return out.String()
}

// refusals gathers problems of fields whose names begin alike.
type refusals struct {
	prefix string
	list   []diaphragm.Problem
}

// add takes a problem; at is the place in a text, -1 without one.
//
//go:noinline
func (r *refusals) add(field string, code diaphragm.Code, at int, message string) {
	r.list = append(r.list, diaphragm.Problem{Field: r.prefix + field, Code: code, Message: message, Offset: at})
}

//go:noinline
func (r *refusals) bounds(field, message string) { r.add(field, diaphragm.CodeBounds, -1, message) }

// within holds a value, of which the unit begins with a blank, between bounds.
func (r *refusals) within(field, name, unit string, value, least, most float64) {
	if !(value >= least && value <= most) {
		r.bounds(field, say("# is ##; it must be from # to ##.", name, value, unit, least, most, unit))
	}
}

// choice refuses a word that is not among those that may be chosen, which join
// writes.
func (r *refusals) choice(field, what, word string, all []string) bool {
	for _, w := range all {
		if w == word {
			return true
		}
	}
	r.add(field, diaphragm.CodeChoice, -1, say("There is no # named #; the #s are #.", what, quoted(word), what, strings.Join(all, ", ")))
	return false
}

// refusal is a single problem.
//
//go:noinline
func refusal(field string, code diaphragm.Code, at int, message string) []diaphragm.Problem {
	return []diaphragm.Problem{{Field: field, Code: code, Message: message, Offset: at}}
}

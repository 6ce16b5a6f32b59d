package main

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"github.com/google/jsonschema-go/jsonschema"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
	"hoopsheet/core/quantity"
)

// Page writes the list of calls, of their types and of the codes of problems
// as Markdown, for the page on scripting.
func Page(c *Contract) string {
	var out strings.Builder
	fmt.Fprintf(&out, "## The calls\n\n")
	writeEntries(&out, c, c.Calls)
	fmt.Fprintf(&out, "## The calls of the store\n\nThey answer in the browser only, where the records are.\n\n")
	writeEntries(&out, c, c.Store)
	fmt.Fprintf(&out, "## Their types\n\n")
	top := map[string]bool{}
	for _, e := range slices.Concat(c.Calls, c.Store) {
		top[e.Request], top[e.Result] = true, true
	}
	for _, name := range slices.Sorted(maps.Keys(c.Defs)) {
		if !top[name] {
			fmt.Fprintf(&out, "### %s\n\n", name)
			writeType(&out, c.Defs[name])
		}
	}
	fmt.Fprintf(&out, "## The codes of problems\n\nA refused call answers with problems, each with a field, a code and a sentence. "+
		"The sentences are for people and may change; the codes are for programs.\n\n")
	for _, code := range problemCodes() {
		fmt.Fprintf(&out, "- `%s`\n", code)
	}
	return out.String()
}

func writeEntries(out *strings.Builder, c *Contract, entries []Entry) {
	for _, e := range entries {
		fmt.Fprintf(out, "### `%s`\n\n%s\n\n", e.Name, e.Summary)
		fmt.Fprintf(out, "Request %s:\n\n", e.Request)
		writeType(out, c.Defs[e.Request])
		fmt.Fprintf(out, "Result %s:\n\n", e.Result)
		writeType(out, c.Defs[e.Result])
	}
}

func writeType(out *strings.Builder, s *jsonschema.Schema) {
	if len(s.Properties) == 0 {
		text := s.Description
		if len(s.Enum) > 0 {
			text += " One of " + words(s.Enum) + "."
		}
		if text == "" {
			text = "No members."
		}
		fmt.Fprintf(out, "%s\n\n", cell(text))
		return
	}
	fmt.Fprintf(out, "| member | type | meaning |\n| --- | --- | --- |\n")
	for _, name := range order(s) {
		p := s.Properties[name]
		optional := ""
		if !slices.Contains(s.Required, name) {
			optional = ", optional"
		}
		fmt.Fprintf(out, "| `%s` | %s%s | %s |\n", name, typeName(p), optional, cell(p.Description))
	}
	fmt.Fprintln(out)
}

func order(s *jsonschema.Schema) []string {
	if len(s.PropertyOrder) == len(s.Properties) {
		return s.PropertyOrder
	}
	return slices.Sorted(maps.Keys(s.Properties))
}

func typeName(s *jsonschema.Schema) string {
	switch {
	case s.Ref != "":
		return strings.TrimPrefix(s.Ref, "#/$defs/")
	case s.Type == "array":
		return "list of " + typeName(s.Items)
	case s.AdditionalProperties != nil && s.Type == "object":
		return "map to " + typeName(s.AdditionalProperties)
	case len(s.Enum) > 0:
		return words(s.Enum)
	}
	return s.Type
}

func words(values []any) string {
	texts := make([]string, len(values))
	for i, v := range values {
		texts[i] = fmt.Sprintf("`%v`", v)
	}
	return strings.Join(texts, ", ")
}

// cell makes a text fit for a cell of a Markdown table.
func cell(text string) string {
	return strings.NewReplacer("|", "\\|", "<", "&lt;", "*", "\\*", "_", "\\_").Replace(text)
}

func problemCodes() []string {
	var codes []string
	for _, c := range slices.Concat(engine.Codes(), diaphragm.Codes()) {
		codes = append(codes, string(c))
	}
	for _, c := range quantity.Codes() {
		codes = append(codes, string(c))
	}
	slices.Sort(codes)
	return slices.Compact(codes)
}

package response

import (
	"math"
	"strconv"
	"strings"
	"unicode/utf16"

	"hoopsheet/core/diaphragm"
)

// textTable is a table of numbers read from lines of text.
type textTable struct {
	// header holds the words of a first line that are not numbers.
	header []string
	rows   [][3]float64
	// offsets of the lines in the text, in UTF-16 units, and their numbers from 1.
	offsets, lines []int
}

// readTable reads lines of the given number of numbers, from least to most of
// them, parted by commas,
// semicolons, tabs or blanks. A decimal comma is read where commas do not part.
// Empty lines and those that begin with # are passed over.
func readTable(text, field string, columns, least, most int) (*textTable, []diaphragm.Problem) {
	t := &textTable{}
	offset := 0
	for number, line := range strings.Split(text, "\n") {
		at := offset
		offset += len(utf16.Encode([]rune(line))) + 1
		line = strings.TrimSpace(strings.TrimPrefix(line, "\ufeff"))
		if line == "" || line[0] == '#' {
			continue
		}
		parts := cells(line)
		var row [3]float64
		bad := ""
		if len(parts) < columns {
			bad = say("has # numbers; it needs #", len(parts), columns)
		}
		for i := 0; i < columns && bad == ""; i++ {
			value, err := strconv.ParseFloat(parts[i], 64)
			if err != nil || math.IsNaN(value) || math.IsInf(value, 0) {
				bad = say("has # where a number is needed", quoted(parts[i]))
			}
			row[i] = value
		}
		if bad != "" {
			if len(t.rows) == 0 && t.header == nil && strings.ContainsAny(line, "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ") {
				t.header = parts
				continue
			}
			return nil, refusal(field, diaphragm.CodeUnreadable, at, say("Line # of the table #.", number+1, bad))
		}
		t.rows = append(t.rows, row)
		t.offsets, t.lines = append(t.offsets, at), append(t.lines, number+1)
	}
	if n := len(t.rows); n < least || n > most {
		return nil, refusal(field, diaphragm.CodeBounds, -1, say("The table has # lines of numbers; from # to # are read.", n, least, most))
	}
	return t, nil
}

// cells parts a line.
func cells(line string) []string {
	mark := ""
	for _, m := range []string{";", "\t", ","} {
		if strings.Contains(line, m) {
			mark = m
			break
		}
	}
	var parts []string
	if mark == "" {
		parts = strings.Fields(line)
	} else {
		parts = strings.Split(line, mark)
	}
	for i, p := range parts {
		p = strings.Trim(strings.TrimSpace(p), "\"")
		if mark != "," {
			p = strings.Replace(p, ",", ".", 1)
		}
		parts[i] = p
	}
	return parts
}

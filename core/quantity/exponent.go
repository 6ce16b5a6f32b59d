package quantity

import (
	"strconv"
	"strings"
)

// scanExponent reads "e-3", "E5", "×10⁻³", "x10^-3" or "·10^5" at index at and
// returns it as "e-3". ok is false where an exponent begins but is not whole.
func scanExponent(text []rune, at int) (exponent string, end int, obvious, ok bool) {
	if at < len(text) && (text[at] == 'e' || text[at] == 'E') {
		digits, negative := scanSign(text, at+1)
		end := scanDigits(text, digits)
		if end == digits {
			// An e that begins a unit or a word is none.
			return "", at, true, digits == at+1
		}
		return joinExponent(string(text[digits:end]), negative, end, true)
	}
	next := skipSpace(text, at)
	if next >= len(text) || !strings.ContainsRune("×x·⋅*", text[next]) {
		return "", at, true, true
	}
	next = skipSpace(text, next+1)
	if next+2 >= len(text) || text[next] != '1' || text[next+1] != '0' {
		return "", at, true, true
	}
	next += 2
	if text[next] == '^' {
		digits, negative := scanSign(text, next+1)
		end := scanDigits(text, digits)
		if end == digits {
			return "", at, true, false
		}
		return joinExponent(string(text[digits:end]), negative, end, false)
	}
	negative := text[next] == '⁻'
	if negative {
		next++
	}
	raised := ""
	for next < len(text) {
		digit := strings.IndexRune(superscripts, text[next])
		if digit < 0 {
			break
		}
		raised += strconv.Itoa(superscriptDigit(text[next]))
		next++
	}
	if raised == "" {
		return "", at, true, false
	}
	return joinExponent(raised, negative, next, false)
}

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹"

func superscriptDigit(r rune) int {
	for i, s := range []rune(superscripts) {
		if s == r {
			return i
		}
	}
	return 0
}

func joinExponent(digits string, negative bool, end int, obvious bool) (string, int, bool, bool) {
	digits = strings.TrimLeft(digits, "0")
	if digits == "" {
		return "", end, obvious, true
	}
	if negative {
		digits = "-" + digits
	}
	return "e" + digits, end, obvious, true
}

func skipSpace(text []rune, at int) int {
	for at < len(text) && isSpace(text[at]) {
		at++
	}
	return at
}

package quantity

import (
	"math"
	"strconv"
	"strings"
)

// number is a number at the start of a text.
type number struct {
	value float64
	// plain is the number as this package writes it, digits and a point.
	plain string
	// obvious is false where a person may have meant something else.
	obvious bool
	// end is the index of the first rune behind the number.
	end int
}

// trouble is a number that cannot be read: the kind, the index of the rune
// where it shows, and for an ambiguous number its two readings.
type trouble struct {
	code    Code
	at      int
	choices [2]string
}

// scanNumber reads the number at the start of text: sign, digits with a point
// or comma and groups of three, or a fraction, then an exponent.
func scanNumber(text []rune) (number, *trouble) {
	at, negative := scanSign(text, 0)
	if n, bad, ok := scanFraction(text, at); ok || bad != nil {
		if bad == nil && negative {
			n.value, n.plain = -n.value, "-"+n.plain
		}
		return n, bad
	}
	mantissa, end := scanMantissa(text, at)
	digits, obvious, bad := resolveSeparators(mantissa, at)
	if bad != nil {
		if negative && bad.code == CodeAmbiguous {
			bad.choices = [2]string{"-" + bad.choices[0], "-" + bad.choices[1]}
		}
		return number{}, bad
	}
	exponent, expEnd, expObvious, ok := scanExponent(text, end)
	if !ok {
		return number{}, &trouble{code: CodeNumber, at: end}
	}
	plain := digits + exponent
	if negative {
		plain = "-" + plain
	}
	value, err := strconv.ParseFloat(plain, 64)
	size := math.Abs(value)
	// Outside these limits a change of unit could overflow or lose digits.
	if err != nil || size > largest || size < smallest && strings.Trim(digits, "0.") != "" {
		return number{}, &trouble{code: CodeRange, at: at}
	}
	return number{value: value + 0, plain: plain, obvious: obvious && expObvious, end: expEnd}, nil
}

// The numbers that are computed with, besides zero.
const (
	smallest = 1e-100
	largest  = 1e100
)

func scanSign(text []rune, at int) (next int, negative bool) {
	if at < len(text) {
		switch text[at] {
		case '+':
			return at + 1, false
		case '-', '\u2212', '\u2010', '\u2011', '\u2013': // minus, hyphens, en dash
			return at + 1, true
		}
	}
	return at, false
}

func isDigit(r rune) bool { return r >= '0' && r <= '9' }

func scanDigits(text []rune, at int) (end int) {
	for at < len(text) && isDigit(text[at]) {
		at++
	}
	return at
}

// scanMantissa takes digits, points, commas, and spaces that stand before a
// group of exactly three digits, or, behind a point, before at most three.
func scanMantissa(text []rune, start int) (mantissa []rune, end int) {
	at := start
	separated := false
	for at < len(text) {
		r := text[at]
		switch {
		case isDigit(r):
			at++
			continue
		case r == '.' || r == ',':
			separated = true
			at++
			continue
		case isSpace(r) && at > start && isDigit(text[at-1]):
			group := scanDigits(text, at+1) - (at + 1)
			last := at+1+group == len(text) || text[at+1+group] != '/'
			if last && (group == 3 || separated && group > 0 && group < 3) {
				at++
				continue
			}
		}
		break
	}
	return text[start:at], at
}

// resolveSeparators decides what the points, commas and spaces of a mantissa
// mean and returns it with plain digits and at most one point. start is the
// place of the mantissa in the text, for errors.
func resolveSeparators(mantissa []rune, start int) (digits string, obvious bool, bad *trouble) {
	points, commas, spaces, digitCount := 0, 0, 0, 0
	for _, r := range mantissa {
		switch {
		case r == '.':
			points++
		case r == ',':
			commas++
		case isDigit(r):
			digitCount++
		default:
			spaces++
		}
	}
	if digitCount == 0 {
		return "", false, &trouble{code: CodeNumber, at: start}
	}
	decimal := rune(0)
	switch {
	case points == 1 && commas == 0:
		decimal = '.'
	case commas == 1 && points == 0:
		if spaces == 0 && couldBeThousands(mantissa) {
			whole, rest, _ := strings.Cut(string(mantissa), ",")
			return "", false, &trouble{code: CodeAmbiguous, at: start + len(whole), choices: [2]string{
				whole + "." + strings.TrimRight(rest, "0") + zeroIfEmpty(rest), whole + rest,
			}}
		}
		decimal = ','
	case points > 0 && commas > 0:
		// The separator that comes last and once is the decimal one.
		decimal = lastSeparator(mantissa)
		if decimal == '.' && points > 1 || decimal == ',' && commas > 1 {
			return "", false, &trouble{code: CodeNumber, at: start}
		}
	}
	// Now every other separator must part groups of three.
	var out strings.Builder
	group, grouped, kinds := 0, rune(0), 0
	behind := false
	for i, r := range mantissa {
		switch {
		case isDigit(r):
			group++
			out.WriteRune(r)
		case r == decimal && !behind:
			if grouped != 0 && group != 3 {
				return "", false, &trouble{code: CodeNumber, at: start + i}
			}
			if out.Len() == 0 {
				out.WriteByte('0')
			}
			out.WriteByte('.')
			behind, group, grouped = true, 0, 0
		default:
			if isSpace(r) {
				r = ' '
			}
			wrong := behind && r != ' ' || grouped != 0 && r != grouped ||
				(grouped != 0 || behind) && group != 3 || !behind && (group == 0 || group > 3)
			if wrong {
				return "", false, &trouble{code: CodeNumber, at: start + i}
			}
			group, grouped = 0, r
			kinds++
		}
	}
	if grouped != 0 && (!behind && group != 3 || group == 0) {
		return "", false, &trouble{code: CodeNumber, at: start + len(mantissa) - 1}
	}
	digits = strings.TrimSuffix(out.String(), ".")
	return digits, decimal != ',' && kinds == 0, nil
}

// couldBeThousands is true for one comma with one to three digits before it,
// not beginning with zero, and just three behind it: "1,500".
func couldBeThousands(mantissa []rune) bool {
	for i, r := range mantissa {
		if r == ',' {
			return i >= 1 && i <= 3 && mantissa[0] != '0' && len(mantissa)-i-1 == 3
		}
	}
	return false
}

func zeroIfEmpty(rest string) string {
	if strings.Trim(rest, "0") == "" {
		return "0"
	}
	return ""
}

func lastSeparator(mantissa []rune) rune {
	for i := len(mantissa) - 1; i >= 0; i-- {
		if mantissa[i] == '.' || mantissa[i] == ',' {
			return mantissa[i]
		}
	}
	return 0
}

package quantity

import (
	"math"
	"strconv"
	"strings"
)

// Format writes an SI value as a number in the unit with the given symbol, to
// at most the given number of significant digits (1 to 17) and without zeros
// that say nothing: 2.3e-5 m in "µm" is "23".
//
// Numbers from 1e-5 to below 1e10 are written with plain digits, others as
// "1.7e-6". What is not finite is written as a dash. The text without its unit
// is read back by Parse to the value rounded to those digits. A symbol that no
// dimension has is a mistake of the program and panics; test symbols that come
// from outside with Find.
func Format(si float64, symbol string, digits int) string {
	unit, ok := bySymbol(symbol)
	if !ok {
		panic("quantity: no unit has the symbol " + strconv.Quote(symbol))
	}
	return FormatNumber(unit.FromSI(si), digits)
}

// FormatNumber writes a plain number as Format does.
func FormatNumber(x float64, digits int) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "–"
	}
	if x == 0 {
		return "0"
	}
	digits = min(max(digits, 1), 17)
	scientific := strconv.FormatFloat(x, 'e', digits-1, 64)
	mantissa, power, _ := strings.Cut(scientific, "e")
	if strings.ContainsRune(mantissa, '.') {
		mantissa = strings.TrimRight(strings.TrimRight(mantissa, "0"), ".")
	}
	exponent, _ := strconv.Atoi(power)
	if exponent < -5 || exponent >= 10 {
		return mantissa + "e" + strconv.Itoa(exponent)
	}
	return shiftPoint(mantissa, exponent)
}

// shiftPoint writes mantissa x 10^exponent with plain digits.
func shiftPoint(mantissa string, exponent int) string {
	sign := ""
	if mantissa[0] == '-' {
		sign, mantissa = "-", mantissa[1:]
	}
	digits := strings.Replace(mantissa, ".", "", 1)
	switch {
	case exponent < 0:
		return sign + "0." + strings.Repeat("0", -exponent-1) + digits
	case exponent >= len(digits)-1:
		return sign + digits + strings.Repeat("0", exponent-len(digits)+1)
	}
	return sign + digits[:exponent+1] + "." + digits[exponent+1:]
}

// FormatWithUnit writes number and unit with a no-break space between them,
// for sentences: "23 µm". The degree sign of angles follows without a space.
func FormatWithUnit(si float64, symbol string, digits int) string {
	number := Format(si, symbol, digits)
	switch symbol {
	case "":
		return number
	case "°":
		return number + symbol
	}
	return number + "\u00a0" + symbol
}

package quantity

// Unit is one unit of measurement. The zero Unit is that of plain numbers.
//
// Its relation to SI is kept as the quotient of two numbers that float64 holds
// exactly,
//
//	SI = (x mul + add) / div,
//
// so that "23 µm" gives the float64 nearest to 23e-6 and a quantity that is
// typed, kept and shown again comes back as it was typed.
type Unit struct {
	// Symbol as it is shown: "µm", "kg/m²", "lbf/in", "°C".
	Symbol string
	// mul, div and add are whole numbers below 2^53 (but for the pi of the
	// degree); mul and div are 0 only in the zero Unit, where they stand for 1.
	mul, div, add float64
	// also lists other spellings that are read, in the form that key gives.
	also []string
}

// ToSI converts a number in unit u to SI. Two or three roundings: the relative
// error is at most 2^-52 of the larger of the result and the offset of u's
// zero from the SI zero (see TestEveryUnitRoundTrips).
func (u Unit) ToSI(x float64) float64 {
	if u.div == 0 {
		return x
	}
	if u.mul == 1 && u.add == 0 {
		return x / u.div
	}
	// The explicit conversion keeps the compiler from fusing the two steps, so
	// that all platforms agree.
	return (float64(x*u.mul) + u.add) / u.div
}

// FromSI converts an SI value to a number in unit u, with errors as in ToSI.
// The zero of the unit comes out as 0 exactly.
func (u Unit) FromSI(si float64) float64 {
	if u.div == 0 {
		return si
	}
	return (si - u.add/u.div) * u.div / u.mul
}

// Find looks a unit up by its symbol or another spelling of it ("um", "kg/m2")
// within one dimension.
func Find(d Dimension, symbol string) (Unit, bool) {
	for _, u := range units(d) {
		if u.Symbol == symbol {
			return u, true
		}
	}
	return find(d, key(symbol))
}

func find(d Dimension, wanted string) (Unit, bool) {
	for _, u := range units(d) {
		if key(u.Symbol) == wanted {
			return u, true
		}
		for _, other := range u.also {
			if other == wanted {
				return u, true
			}
		}
	}
	return Unit{}, false
}

// bySymbol looks a unit up by its symbol in all dimensions. A symbol means the
// same in every dimension that has it (see TestASymbolMeansOneUnit).
func bySymbol(symbol string) (Unit, bool) {
	for _, d := range Dimensions() {
		for _, u := range units(d) {
			if u.Symbol == symbol {
				return u, true
			}
		}
	}
	return Unit{}, false
}

// key brings a unit to the form in which units are compared: one micro sign,
// plain digits for raised ones, no spaces, signs of multiplication or carets.
func key(text string) string {
	folded := make([]rune, 0, len(text))
	for _, r := range text {
		switch r {
		case '\u03bc': // Greek mu for the micro sign
			r = 'µ'
		case '\u00ba', '\u02da': // ordinal indicator and ring for the degree sign
			r = '°'
		case '\u2103':
			folded = append(folded, '°')
			r = 'C'
		case '\u2109':
			folded = append(folded, '°')
			r = 'F'
		case '\u212a': // kelvin sign
			r = 'K'
		case '\u2215', '\u2044': // division and fraction slash
			r = '/'
		case '¹', '₁':
			r = '1'
		case '²', '₂':
			r = '2'
		case '³', '₃':
			r = '3'
		case '⁻', '\u2212':
			r = '-'
		case '^', '·', '⋅', '*', '(', ')':
			continue
		}
		if isSpace(r) {
			continue
		}
		folded = append(folded, r)
	}
	return string(folded)
}

// isSpace is true for the spaces that people and their programs put between
// digits and before units: blank, tab, no-break, figure, thin and narrow
// no-break space.
func isSpace(r rune) bool {
	switch r {
	case ' ', '\t', '\u00a0', '\u2007', '\u2009', '\u202f', '\u200a', '\u2006':
		return true
	}
	return false
}

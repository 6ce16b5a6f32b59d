package bessel

// Compensated ("double-double") building blocks. A number is held as hi + lo,
// lo being what hi lost to rounding. Explicit float64 conversions keep the
// compiler from fusing a product into a following sum, which the Go
// specification otherwise allows and which would break the error terms.

// twoSum returns s = fl(a+b) and e with s + e = a + b exactly.
func twoSum(a, b float64) (s, e float64) {
	s = a + b
	t := s - a
	return s, (a - (s - t)) + (b - t)
}

// fastTwoSum is twoSum for |a| >= |b|.
func fastTwoSum(a, b float64) (s, e float64) {
	s = a + b
	return s, b - (s - a)
}

// mulDD returns the product of two compensated numbers.
func mulDD(ah, al, bh, bl float64) (h, l float64) {
	h, l = twoProd(ah, bh)
	return fastTwoSum(h, l+(float64(ah*bl)+float64(al*bh)))
}

// addDD returns the sum of two compensated numbers.
func addDD(ah, al, bh, bl float64) (h, l float64) {
	h, l = twoSum(ah, bh)
	return fastTwoSum(h, l+(al+bl))
}

// extreme is a bound within which products and quotients of compensated
// numbers neither overflow nor lose their low parts, on every platform.
const extreme = 0x1p900

// isExtreme tells whether x > 0 or 1/x is beyond it. What then remains of a
// function is its leading term, for which plain arithmetic does.
func isExtreme(x float64) bool {
	return x > extreme || x < 1/extreme
}

// invDD returns 1/x as a compensated number.
func invDD(x float64) (h, l float64) {
	h = 1 / x
	if isExtreme(x) {
		return h, 0
	}
	p, e := twoProd(h, x)
	return h, ((1 - p) - e) * h
}

// divDD returns the quotient of two compensated numbers.
func divDD(ah, al, bh, bl float64) (h, l float64) {
	h = ah / bh
	p, e := twoProd(h, bh)
	return h, (((ah - p) - e) + (al - h*bl)) / bh
}

// lessDD returns q a - b.
func lessDD(qh, ql, ah, al, bh, bl float64) (h, l float64) {
	h, l = mulDD(qh, ql, ah, al)
	return addDD(h, l, -bh, -bl)
}

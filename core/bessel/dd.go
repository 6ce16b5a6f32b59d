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

// invDD returns 1/x as a compensated number.
func invDD(x float64) (h, l float64) {
	h = 1 / x
	p, e := twoProd(h, x)
	return h, ((1 - p) - e) * h
}

// divDD returns the quotient of two compensated numbers.
func divDD(ah, al, bh, bl float64) (h, l float64) {
	h = ah / bh
	p, e := twoProd(h, bh)
	return h, (((ah - p) - e) + (al - h*bl)) / bh
}

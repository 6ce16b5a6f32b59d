package bessel

import "math"

// useSeries tells whether the power series of J_nu or Y_nu cancels little
// enough: its first term is then at most 1/2 in modulus and the sum at least
// 0.6.
func useSeries(nu, x float64) bool {
	return x*x <= 2*(nu+1)
}

// jSeries returns J_nu(x) where useSeries holds, DLMF 10.2.2.
func jSeries(nu, x float64) (h, l float64) {
	h, l, k := prefix(nu, x)
	s, e := seriesSum(nu, x)
	h, l = mulDD(h, l, s, e)
	return ldexpDD(h, l, k)
}

// jSeriesPair returns J_nu(x) and J_{nu+1}(x) where useSeries holds.
func jSeriesPair(nu, x float64) (ah, al, bh, bl float64) {
	h, l, k := prefix(nu, x)
	s, e := seriesSum(nu, x)
	ah, al = mulDD(h, l, s, e)
	ah, al = ldexpDD(ah, al, k)
	// The second prefix from the first: nu + 1 is rounded, and as a power of
	// a small x that would show.
	s, e = twoSum(nu, 1)
	bh, bl = divDD(0.5*x, 0, s, e)
	h, l = mulDD(h, l, bh, bl)
	s, e = seriesSum(nu+1, x)
	bh, bl = mulDD(h, l, s, e)
	bh, bl = ldexpDD(bh, bl, k)
	return ah, al, bh, bl
}

// ldexpDD returns (h + l) 2^k.
func ldexpDD(h, l float64, k int) (float64, float64) {
	if k < -960 { // l would be rounded as a subnormal
		return math.Ldexp(h+l, k), 0
	}
	return math.Ldexp(h, k), math.Ldexp(l, k)
}

// seriesSum returns the sum over k of (-x^2/4)^k / (k! (nu+1)_k). The first two
// terms are formed with their rounding errors; the rest are below 1/8.
func seriesSum(nu, x float64) (h, l float64) {
	q, qe := twoProd(0.5*x, 0.5*x)
	n1 := nu + 1
	t1 := -q / n1
	p, pe := twoProd(t1, n1)
	t1e := ((-q - p) - pe - qe - t1*(nu-(n1-1))) / n1
	t := t1 * (-q / (2 * (nu + 2)))
	rest := t
	for k := 3.0; ; k++ {
		t *= -q / (k * (nu + k))
		rest += t
		if t < 0x1p-58 && t > -0x1p-58 {
			break
		}
	}
	s, e := twoSum(1, t1)
	return fastTwoSum(s, e+t1e+rest)
}

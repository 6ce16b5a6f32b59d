package bessel

import "math"

// hankelMin is the smallest argument at which Hankel's expansion is used. Its
// terms fall like k!/(2x)^k, so the smallest is about exp(-2x): 2e-22 at 25,
// and twenty terms reach 2^-56.
const hankelMin = 25

// hankelTerms bounds the number of pairs of terms; at hankelMin ten suffice.
const hankelTerms = 24

// hankel returns J_nu(x) and Y_nu(x) as compensated numbers for x >= hankelMin
// and 0 <= nu < 2 (or nu^2 << x), with an absolute error of about 2^-55 of the
// envelope sqrt(2/(pi x)).
func hankel(nu, x float64) (jh, jl, yh, yl float64) {
	// DLMF 10.17.3-4. P - 1 and Q are small against 1, so the leading
	// cos(chi), sin(chi) and the factor in front are the only parts that
	// need more than double precision.
	p, q := hankelPQ(nu, x)
	ch, cl, sh, sl := phase(nu, x)
	ah, al := hankelFactor(x)

	jh, jl = mulDD(ah, al, ch, cl+(p*ch-q*sh))
	yh, yl = mulDD(ah, al, sh, sl+(p*sh+q*ch))
	return jh, jl, yh, yl
}

// hankelPQ returns P - 1 and Q of Hankel's expansion.
func hankelPQ(nu, x float64) (p, q float64) {
	mu := 4 * nu * nu
	r := 0.125 / x
	// a_k/x^k = product over j of (mu - (2j-1)^2) / (8 j x)
	t := (mu - 1) * r
	q = t
	for k := 2.0; k < 2*hankelTerms; k += 2 {
		o := 2*k - 1
		t *= -(mu - o*o) * r / k
		p += t
		o += 2
		t *= (mu - o*o) * r / (k + 1)
		q += t
		if math.Abs(t) < 0x1p-57 {
			break
		}
	}
	return p, q
}

// hankelFactor returns sqrt(2/(pi x)) as a compensated number.
func hankelFactor(x float64) (h, l float64) {
	const twoOverPiH, twoOverPiL = 0x1.45f306dc9c883p-1, -0x1.6b01ec5417056p-55
	// 2/(pi x) = vh + vl, then one Newton step on the square root.
	vh := twoOverPiH / x
	p, e := twoProd(vh, x)
	vl := (((twoOverPiH - p) - e) + twoOverPiL) / x
	h = math.Sqrt(vh)
	p, e = twoProd(h, h)
	return h, (((vh - p) - e) + vl) / (2 * h)
}

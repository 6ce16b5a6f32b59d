package bessel

import "math"

// hankelMin is the smallest argument at which Hankel's expansion is used. Its
// terms fall like k!/(2x)^k, so the smallest is about exp(-2x): 2e-22 at 25,
// and twenty terms reach 2^-56.
const hankelMin = 25

// hankelTerms bounds the number of pairs of terms; at hankelMin ten suffice.
const hankelTerms = 24

// hankelJ returns J_mu(x) and J_{mu+1}(x) as compensated numbers for
// x >= hankelMin and 0 <= mu < 1, with an absolute error of about 2^-55 of the
// envelope sqrt(2/(pi x)).
func hankelJ(mu, x float64) (ah, al, bh, bl float64) {
	// DLMF 10.17.3-4. P - 1 and Q are small against 1, so the leading
	// cos(chi), sin(chi) and the factor in front are the only parts that
	// need more than double precision.
	ch, cl, sh, sl := phase(mu, x)
	fh, fl := hankelFactor(x)
	p, q := hankelPQ(mu, x)
	ah, al = mulDD(fh, fl, ch, cl+(p*ch-q*sh))
	// chi of order mu + 1 is a quarter turn behind.
	p, q = hankelPQ(mu+1, x)
	bh, bl = mulDD(fh, fl, sh, sl+(p*sh+q*ch))
	return ah, al, bh, bl
}

// hankelY returns Y_mu(x) and Y_{mu+1}(x), otherwise as hankelJ.
func hankelY(mu, x float64) (ah, al, bh, bl float64) {
	ch, cl, sh, sl := phase(mu, x)
	fh, fl := hankelFactor(x)
	p, q := hankelPQ(mu, x)
	ah, al = mulDD(fh, fl, sh, sl+(p*sh+q*ch))
	p, q = hankelPQ(mu+1, x)
	bh, bl = mulDD(fh, fl, -ch, (q*sh-p*ch)-cl)
	return ah, al, bh, bl
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
	if x > extreme {
		return math.Sqrt(twoOverPiH / x), 0
	}
	// 2/(pi x) = vh + vl, then one Newton step on the square root.
	vh := twoOverPiH / x
	p, e := twoProd(vh, x)
	vl := (((twoOverPiH - p) - e) + twoOverPiL) / x
	h = math.Sqrt(vh)
	p, e = twoProd(h, h)
	return h, (((vh - p) - e) + vl) / (2 * h)
}

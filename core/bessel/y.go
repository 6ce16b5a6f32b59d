package bessel

import "math"

// Y returns the Bessel function of the second kind of real order nu >= 0,
//
//	Y_nu(x) = (J_nu(x) cos(nu pi) - J_{-nu}(x)) / sin(nu pi),
//
// the limit being taken for integer nu. It is real for x > 0 only: for x < 0,
// nu < 0 or NaN in either argument the result is NaN. Y(nu, 0) is -Inf, and so
// are values beyond the range of float64; Y(nu, +Inf) is 0.
//
// Accuracy: 8 ulp of max(|Y|, sqrt(J^2 + Y^2) where x >= nu) for nu <= 1000 and
// x <= 1e6; see TestAccuracy in package accuracy.
func Y(nu, x float64) float64 {
	switch {
	case !validOrder(nu) || !(x >= 0):
		return math.NaN()
	case x == 0:
		return math.Inf(-1)
	case math.IsInf(x, 1):
		return 0
	}
	h, l, _, _ := yPair(nu, x)
	return unscale(h, l)
}

// YPrime returns the derivative of Y_nu at x,
//
//	Y'_nu(x) = (nu/x) Y_nu(x) - Y_{nu+1}(x),
//
// with the domain of Y. YPrime(nu, 0) is +Inf.
func YPrime(nu, x float64) float64 {
	switch {
	case !validOrder(nu) || !(x >= 0):
		return math.NaN()
	case x == 0:
		return math.Inf(1)
	case math.IsInf(x, 1):
		return 0
	}
	ah, al, bh, bl := yPair(nu, x)
	switch {
	case x > extreme || nu == 0:
		return unscale(-bh, -bl)
	case x < 1/extreme:
		t := nu / x * ah
		if math.IsInf(t, 0) {
			return math.Inf(1)
		}
		return unscale(t-bh, 0)
	}
	ch, cl := divDD(nu, 0, x, 0)
	h, l := lessDD(ch, cl, ah, al, bh, bl)
	if math.IsNaN(h) { // both terms overflowed; Y_{nu+1} is the larger
		return math.Inf(1)
	}
	return unscale(h, l)
}

// growScale is taken out of growing recurrences, so that they neither overflow
// before their result does nor lose the low parts to underflow.
const growScale = 900

// growLimit is the size of a scaled number from which on it certainly is out of
// range, though products with it are not.
const growLimit = 0x1p900

// unscale returns (h + l) 2^growScale.
func unscale(h, l float64) float64 {
	return math.Ldexp(h+l, growScale)
}

// yPair returns 2^-growScale times Y_nu(x) and Y_{nu+1}(x), for nu >= 0 and
// finite x > 0. Beyond the range they are -Inf.
func yPair(nu, x float64) (ah, al, bh, bl float64) {
	whole := math.Floor(nu)
	mu, n := nu-whole, int(whole)
	ah, al, bh, bl = yStart(mu, x)
	if x < steedMin && mu > 0.5 {
		mu, n = mu-1, n+1
	}
	const s = 1.0 / (1 << 450) / (1 << 450)
	ah, al, bh, bl = up(mu, n, x, s*ah, s*al, s*bh, s*bl)
	if !(math.Abs(ah) < growLimit) {
		ah, al = math.Inf(-1), 0
	}
	if !(math.Abs(bh) < growLimit) {
		bh, bl = math.Inf(-1), 0
	}
	return ah, al, bh, bl
}

// yStart returns Y_mu and Y_{mu+1} for 0 <= mu < 1; if x < steedMin and
// mu > 1/2, Y_{mu-1} and Y_mu.
func yStart(mu, x float64) (ah, al, bh, bl float64) {
	if x >= hankelMin {
		return hankelY(mu, x)
	}
	if x < steedMin {
		if mu > 0.5 {
			mu--
		}
		ah, bh, bl = yTemmePair(mu, x)
		return ah, 0, bh, bl
	}
	// Y = (p J - J')/q and Y' = q J + p Y, from H'/H = p + iq.
	jh, jl, kh, kl := jPair(mu, x)
	ch, cl := divDD(mu, 0, x, 0)
	th, tl := mulDD(ch, cl, jh, jl)
	dh, dl := addDD(th, tl, -kh, -kl)
	p1, q1 := steedPQ(mu, x)
	ph, pl := divDD(-0.5, 0, x, 0)
	ph, pl = addDD(ph, pl, p1, 0)
	qh, ql := fastTwoSum(1, q1)
	th, tl = mulDD(ph, pl, jh, jl)
	th, tl = addDD(th, tl, -dh, -dl)
	ah, al = divDD(th, tl, qh, ql)
	// Y_{mu+1} = (mu/x) Y - Y'
	ch, cl = addDD(ch, cl, -ph, -pl)
	ch, cl = mulDD(ch, cl, ah, al)
	th, tl = mulDD(qh, ql, jh, jl)
	bh, bl = addDD(ch, cl, -th, -tl)
	return ah, al, bh, bl
}

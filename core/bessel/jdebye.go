package bessel

import "math"

// jDebye returns J_nu(x) for the order nu + low, from decayOrder(x) on and for
// nu >= debyeMin; xi = nu acosh(nu/x) - s is above 41 then, and the first term
// left out, 1.5e10/(3 xi)^13, below 2e-17.
func jDebye(nu, low, x float64) (h, l float64) {
	ph, pl := twoSum(nu, -x)
	qh, ql := twoSum(nu, x)
	ph, pl = mulDD(ph, pl, qh, ql)
	sh := math.Sqrt(ph)
	p, e := twoProd(sh, sh)
	sl := ((ph - p) - e + pl) / (2 * sh)

	t := nu / sh
	v, ds := phaseTail(phaseCoefficientsJ[:], sh, -t*t, -1)
	// x B' = s + ds x^2/s, since ds/dx = -x/s
	bh, bl := fastTwoSum(sh, sl+ds*x*(x/sh))
	fh, fl := rootDD(bh, bl)

	eh, el := logRatio(nu, x, sh, sl)
	eh, el = mulDD(eh, el, nu, low)
	eh, el = addDD(sh, sl, -eh, -el)
	// low moves the exponent by -low ln((nu + s)/x), which is in the product
	// above, and the factor 1/sqrt(s) by -low nu/(2 s^2).
	eh, el = addDD(eh, el, -v, -0.5*low*t/sh)
	if eh < -1500 {
		return 0, 0
	}
	h, l, k := expDD(eh, el)
	h, l = mulDD(h, l, 0.5*fh, 0.5*fl)
	return ldexpDD(h, l, k)
}

// jDebyeDown returns J_nu and J_{nu+1}, nu = mu + n > x, from two orders of
// jDebye at or above nu by the recurrence downwards.
func jDebyeDown(mu float64, n int, x float64) (ah, al, bh, bl float64) {
	top := max(n, decayOrder(x)+1)
	h, l := twoSum(float64(top), mu)
	ah, al = jDebye(h, l, x)
	h, l = twoSum(float64(top+1), mu)
	bh, bl = jDebye(h, l, x)
	ih, il := invDD(x)
	for k := top; k > n; k-- {
		h, l = twoSum(float64(k), mu)
		h, l = step(h, l, ih, il, ah, al, bh, bl)
		ah, al, bh, bl = h, l, ah, al
	}
	return ah, al, bh, bl
}

// debyeDownMin is the argument from which jDebyeDown is the shorter way for
// orders between x and decayOrder(x).
const debyeDownMin = 60

// useDebyeDown tells whether jDebyeDown serves.
func useDebyeDown(nu, x float64) bool {
	return nu > x && nu >= debyeMin && (x >= debyeDownMin || nu > float64(decayOrder(x)))
}

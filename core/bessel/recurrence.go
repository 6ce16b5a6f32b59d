package bessel

import "math"

// The three-term recurrence C_{mu-1} + C_{mu+1} = (2 mu/x) C_mu, which J and Y
// both obey, in compensated arithmetic: the main value runs through ordinary
// operations, and beside it runs the exact sum of what they lost. After n
// steps the pair is good to about n 2^-100 where the recurrence is stable;
// plain doubles would give 4 ulp in the median and 65 at worst for n = 200.

// step is one recurrence step: it returns (2 mu/x) b - a, where mu = mh + ml
// and 1/x = ih + il.
func step(mh, ml, ih, il, bh, bl, ah, al float64) (h, l float64) {
	t := 2 * mh
	ch, ce := twoProd(t, ih)
	ce += t*il + 2*ml*ih
	p, pe := twoProd(ch, bh)
	h = p - ah
	v := h - p
	l = (p - (h - v)) - (ah + v)
	l += pe + (ch*bl + ce*bh) - al
	return h, l
}

// up takes (C_mu, C_{mu+1}) to (C_{mu+n}, C_{mu+n+1}), 0 <= mu < 1.
// Stable for J and Y while mu + n <= x, and for Y always.
func up(mu float64, n int, x, ah, al, bh, bl float64) (float64, float64, float64, float64) {
	ih, il := invDD(x)
	for k := 1; k <= n; k++ {
		mh, ml := fastTwoSum(float64(k), mu)
		h, l := step(mh, ml, ih, il, bh, bl, ah, al)
		ah, al, bh, bl = bh, bl, h, l
	}
	return ah, al, bh, bl
}

// decayOrder returns an order n above which J_n(x) is below exp(-41) of the
// envelope: starting a backward recurrence with zero there costs less than
// 2^-59 everywhere below x, and in sums over all orders.
func decayOrder(x float64) int {
	// With Debye's exponent xi(n) = n acosh(n/x) - sqrt(n^2 - x^2), the
	// condition xi >= 41 is n >= x + (9/8 * 41^2 * x)^(1/3) near x; the
	// constants leave room for all x from 0 (see TestDecayOrder).
	return int(x+12.5*math.Cbrt(x)) + 8
}

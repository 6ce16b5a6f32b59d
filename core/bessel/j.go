package bessel

import "math"

// J returns the Bessel function of the first kind of real order nu >= 0,
//
//	J_nu(x) = (x/2)^nu sum over k of (-x^2/4)^k / (k! Gamma(nu+k+1)).
//
// For negative x it is real only for integer nu, where J_n(-x) = (-1)^n J_n(x);
// otherwise, and for nu < 0, nu > MaxOrder or NaN in either argument, the
// result is NaN. J(nu, 0) is 1 for nu = 0 and 0 above; J(nu, +-Inf) is 0. What
// is below the range of float64 is rounded to a subnormal number or 0.
//
// Accuracy: 2 ulp of max(|J|, sqrt(J^2 + Y^2) where x >= nu) for nu <= 1000 and
// x <= 1e6; see TestAccuracy in package accuracy.
func J(nu, x float64) float64 {
	switch {
	case !validOrder(nu) || math.IsNaN(x):
		return math.NaN()
	case x < 0:
		if nu != math.Floor(nu) {
			return math.NaN()
		}
		if math.Mod(nu, 2) == 1 {
			return -J(nu, -x)
		}
		return J(nu, -x)
	case x == 0:
		if nu == 0 {
			return 1
		}
		return 0
	case math.IsInf(x, 1):
		return 0
	}
	if useSeries(nu, x) {
		h, l := jSeries(nu, x)
		return h + l
	}
	if nu >= debyeMin && nu > float64(decayOrder(x)) {
		h, l := jDebye(nu, 0, x)
		return h + l
	}
	h, l, _, _ := jPair(nu, x)
	return h + l
}

// JInt returns J_n(x) for integer n, also negative: J_{-n}(x) = (-1)^n J_n(x).
// Domain, limits and accuracy are those of J.
func JInt(n int, x float64) float64 {
	if n < 0 {
		if n&1 == 1 || n&1 == -1 {
			return -J(float64(-n), x)
		}
		return J(float64(-n), x)
	}
	return J(float64(n), x)
}

// JPrime returns the derivative of J_nu at x,
//
//	J'_nu(x) = (nu/x) J_nu(x) - J_{nu+1}(x).
//
// The domain is that of J; J'_nu(0) is 1/2 for nu = 1, +Inf for 0 < nu < 1 and
// 0 otherwise.
func JPrime(nu, x float64) float64 {
	switch {
	case !validOrder(nu) || math.IsNaN(x):
		return math.NaN()
	case x < 0:
		if nu != math.Floor(nu) {
			return math.NaN()
		}
		if math.Mod(nu, 2) == 1 {
			return JPrime(nu, -x)
		}
		return -JPrime(nu, -x)
	case x == 0:
		switch {
		case nu == 1:
			return 0.5
		case nu > 0 && nu < 1:
			return math.Inf(1)
		}
		return 0
	case math.IsInf(x, 1):
		return 0
	}
	_, d := jAndDerivative(nu, x)
	return d
}

// JAndPrime returns J_nu(x) and J'_nu(x) from one evaluation, with the domain
// and limits of J and JPrime.
func JAndPrime(nu, x float64) (j, d float64) {
	if !validOrder(nu) || !(x > 0) || math.IsInf(x, 1) {
		return J(nu, x), JPrime(nu, x)
	}
	return jAndDerivative(nu, x)
}

// MaxOrder is the largest order accepted. The time for one value may grow in
// proportion to the order; accuracy is tested to 1000.
const MaxOrder = 1e6

func validOrder(nu float64) bool {
	return nu >= 0 && nu <= MaxOrder
}

// jAndDerivative returns J_nu(x) and J'_nu(x) for nu >= 0 and finite x > 0.
func jAndDerivative(nu, x float64) (j, d float64) {
	ah, al, bh, bl := jPair(nu, x)
	switch {
	case x > extreme:
		return ah + al, -bh
	case x < 1/extreme && nu > 0:
		// (nu/x) (x/2)^nu / Gamma(nu+1), where J may have underflowed
		h, l, k := prefix(nu, x)
		return ah + al, math.Ldexp((h+l)*(nu/(x*0x1p200)), k+200)
	case nu == 0:
		return ah + al, -(bh + bl)
	}
	qh, ql := divDD(nu, 0, x, 0)
	h, l := lessDD(qh, ql, ah, al, bh, bl)
	return ah + al, h + l
}

// jPair returns J_nu(x) and J_{nu+1}(x) as compensated numbers for finite
// nu >= 0 and x > 0. It is the dispatcher of the branch map
// in doc.go.
func jPair(nu, x float64) (ah, al, bh, bl float64) {
	whole := math.Floor(nu)
	mu, n := nu-whole, int(whole)
	switch {
	case useSeries(nu, x):
		return jSeriesPair(nu, x)
	case x >= hankelMin && nu <= x:
		ah, al, bh, bl = hankelJ(mu, x)
		return up(mu, n, x, ah, al, bh, bl)
	case useDebyeDown(nu, x):
		return jDebyeDown(mu, n, x)
	case mu == 0:
		return intBackward(n, x)
	case x >= hankelMin:
		return realDown(mu, n, x)
	}
	return realBackward(mu, n, x)
}

package bessel

import "math"

// I returns the modified Bessel function of the first kind of real order
// nu >= 0,
//
//	I_nu(x) = (x/2)^nu sum over k of (x^2/4)^k / (k! Gamma(nu+k+1)).
//
// For negative x it is real only for integer nu, where I_n(-x) = (-1)^n I_n(x);
// otherwise, and for nu < 0 or NaN in either argument, the result is NaN.
// I(nu, 0) is 1 for nu = 0 and 0 above; it overflows to +Inf, near x = 713 for
// small orders; see IScaled.
//
// Accuracy: that of IScaled, 8 ulp.
func I(nu, x float64) float64 {
	return iSigned(nu, x, 0)
}

// IScaled returns exp(-|x|) I_nu(x), which does not overflow. IScaled(nu, Inf)
// is 0. Accurate to 8 ulp for nu <= 1000, see TestAccuracy in package accuracy.
func IScaled(nu, x float64) float64 {
	return iSigned(nu, x, 1)
}

// IPrime returns the derivative of I_nu at x, from RatioI. IPrime(nu, 0) is
// 1/2 for nu = 1, +Inf for 0 < nu < 1 and 0 otherwise.
func IPrime(nu, x float64) float64 {
	switch {
	case x == 0 && nu == 1:
		return 0.5
	case x == 0 && nu > 0 && nu < 1:
		return math.Inf(1)
	case x == 0 && validOrder(nu):
		return 0
	}
	v := I(nu, x)
	if v == 0 { // nothing to multiply: the derivative underflows too
		return 0
	}
	return v * RatioI(nu, x)
}

// RatioI returns I'_nu(x)/I_nu(x), the logarithmic derivative, where I_nu
// itself may overflow or underflow.
//
// Domain nu >= 0; the ratio is odd in x where x may be negative (integer nu).
// RatioI(0, 0) is 0, RatioI(nu, 0) is +Inf for nu > 0, RatioI(nu, +Inf) is 1.
// Accurate to 8 ulp for nu <= 1000 and x <= 1e8, see TestAccuracy in package
// accuracy.
func RatioI(nu, x float64) float64 {
	switch {
	case !validOrder(nu) || math.IsNaN(x) || x < 0 && nu != math.Floor(nu):
		return math.NaN()
	case x < 0:
		return -RatioI(nu, -x)
	case x == 0:
		if nu == 0 {
			return 0
		}
		return math.Inf(1)
	case math.IsInf(x, 1):
		return 1
	case x < 1/extreme:
		return nu/x + x/2
	case useDebye(nu, x):
		return ratioDebye(nu, x, 1)
	}
	// nu/x + I_{nu+1}/I_nu, both positive.
	sh, sl := iSum(nu, 0, x)
	dh, dl := twoSum(nu, 1)
	th, tl := iSum(dh, dl, x)
	sh, sl = divDD(th, tl, sh, sl)
	dh, dl = divDD(0.5*x, 0, dh, dl)
	sh, sl = mulDD(sh, sl, dh, dl)
	dh, dl = divDD(nu, 0, x, 0)
	sh, sl = addDD(sh, sl, dh, dl)
	return sh + sl
}

func iSigned(nu, x, shift float64) float64 {
	switch {
	case !validOrder(nu) || math.IsNaN(x) || x < 0 && nu != math.Floor(nu):
		return math.NaN()
	case x < 0:
		v := iSigned(nu, -x, shift)
		if math.Mod(nu, 2) == 1 {
			return -v
		}
		return v
	case x == 0:
		if nu == 0 {
			return 1
		}
		return 0
	case math.IsInf(x, 1):
		if shift == 1 {
			return 0
		}
		return x
	case useDebye(nu, x):
		return iDebye(nu, x, shift)
	}
	// DLMF 10.25.2; all terms are positive.
	h, l, k := prefix(nu, x)
	sh, sl := iSum(nu, 0, x)
	h, l = mulDD(h, l, sh, sl)
	sh, sl, j := expDD(-shift*x, 0)
	h, l = mulDD(h, l, sh, sl)
	return math.Ldexp(h+l, k+j)
}

// useDebye tells whether s = sqrt(x^2 + nu^2) is at least debyeMin.
func useDebye(nu, x float64) bool {
	return x >= debyeMin || nu >= debyeMin || x*x+nu*nu >= debyeMin*debyeMin
}

// iSum returns the sum over k of (x^2/4)^k / (k! (nu+1)_k) for x < debyeMin and
// the order nu + low.
func iSum(nu, low, x float64) (h, l float64) {
	// Carried with its rounding errors, and so are the terms as long as they
	// grow: there are up to sixty of them.
	qh, ql := twoProd(0.5*x, 0.5*x)
	th, tl := 1.0, 0.0
	sh, sl := 1.0, 0.0
	for k := 1.0; k < 500; k++ {
		dh, dl := twoSum(nu, k)
		dh, dl = mulDD(dh, dl+low, k, 0)
		dh, dl = divDD(qh, ql, dh, dl)
		th, tl = mulDD(th, tl, dh, dl)
		h, l := fastTwoSum(sh, th)
		if th > sh {
			h, l = fastTwoSum(th, sh)
		}
		sh, sl = h, sl+(l+tl)
		if th < 0x1p-56*sh {
			break
		}
	}
	return fastTwoSum(sh, sl)
}

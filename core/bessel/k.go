package bessel

import "math"

// K returns the modified Bessel function of the second kind of real order
// nu >= 0,
//
//	K_nu(x) = (pi/2) (I_{-nu}(x) - I_nu(x)) / sin(nu pi),
//
// the limit being taken for integer nu. It is real for x > 0 only: for x < 0,
// nu < 0 or NaN in either argument the result is NaN. K(nu, 0) is +Inf, and so
// are values beyond the range of float64; K(nu, +Inf) is 0.
//
// Accuracy: that of KScaled, 8 ulp.
func K(nu, x float64) float64 {
	return kShifted(nu, x, 0)
}

// KScaled returns exp(x) K_nu(x), which does not underflow. KScaled(nu, +Inf)
// is 0. Accurate to 8 ulp for nu <= 1000, see TestAccuracy in package accuracy.
func KScaled(nu, x float64) float64 {
	return kShifted(nu, x, 1)
}

// KPrime returns the derivative of K_nu at x, from RatioK; it is -Inf at 0.
func KPrime(nu, x float64) float64 {
	v := K(nu, x)
	if v == 0 {
		return 0
	}
	return v * RatioK(nu, x)
}

// RatioK returns K'_nu(x)/K_nu(x), which is negative, where K_nu itself may
// overflow or underflow.
//
// Domain nu >= 0, x >= 0; RatioK(nu, 0) is -Inf, RatioK(nu, +Inf) is -1.
// Accurate to 8 ulp for nu <= 1000 and x <= 1e8, see TestAccuracy in package
// accuracy.
func RatioK(nu, x float64) float64 {
	switch {
	case !validOrder(nu) || !(x >= 0):
		return math.NaN()
	case x == 0:
		return math.Inf(-1)
	case math.IsInf(x, 1):
		return -1
	case useDebye(nu, x):
		return -ratioDebye(nu, x, -1)
	}
	// K'/K = nu/x - K_{nu+1}/K_nu; the difference is at least a third of its
	// terms, and both are compensated.
	ah, al, bh, bl := kPair(nu, x)
	switch {
	case !(bh < growLimit):
		// So small an x that K_{nu-1} is nothing in K' = -(nu/x) K - K_{nu-1}.
		return -nu / x
	case x < 1/extreme:
		return nu/x - bh/ah
	}
	bh, bl = divDD(bh, bl, ah, al)
	ch, cl := divDD(nu, 0, x, 0)
	ch, cl = addDD(ch, cl, -bh, -bl)
	return ch + cl
}

func kShifted(nu, x, shift float64) float64 {
	switch {
	case !validOrder(nu) || !(x >= 0):
		return math.NaN()
	case x == 0:
		return math.Inf(1)
	case math.IsInf(x, 1):
		return 0
	case useDebye(nu, x):
		return kDebye(nu, x, shift)
	}
	ah, al, _, _ := kPair(nu, x)
	if math.IsInf(ah, 1) {
		return ah
	}
	// kPair has the factor exp(x) already above steedMin.
	if x >= steedMin {
		shift--
	}
	h, l, k := expDD(shift*x, 0)
	h, l = mulDD(h, l, ah, al)
	return math.Ldexp(h+l, k+growScale)
}

// kPair returns K_nu and K_{nu+1} up to a common factor: 2^-growScale below
// steedMin, exp(x) 2^-growScale from there on. nu >= 0, x > 0, both below
// debyeMin. Values beyond the range are +Inf.
func kPair(nu, x float64) (ah, al, bh, bl float64) {
	n := math.Floor(nu)
	mu := nu - n
	if mu > 0.5 {
		mu, n = mu-1, n+1
	}
	if x < steedMin {
		ah, bh, bl = kTemmePair(mu, x)
	} else {
		ah, bh = kSteed(mu, x)
	}
	const s = 1.0 / (1 << 450) / (1 << 450)
	ah, bh, bl = s*ah, s*bh, s*bl
	ih, il := invDD(x)
	for k := 1; k <= int(n); k++ {
		mh, ml := fastTwoSum(float64(k), mu)
		h, l := step(mh, ml, ih, il, bh, bl, -ah, -al)
		ah, al, bh, bl = bh, bl, h, l
	}
	if !(ah < growLimit) {
		ah, al = math.Inf(1), 0
	}
	if !(bh < growLimit) {
		bh, bl = math.Inf(1), 0
	}
	return ah, al, bh, bl
}

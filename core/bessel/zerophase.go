package bessel

import "math"

// Zeros by their phase. From Debye's expansions (DLMF 10.19.6-7) J_nu and
// J'_nu vanish where, with s = sqrt(x^2 - nu^2) and t = (nu/s)^2,
//
//	s - nu acos(nu/x) + sum over odd k of a_k(t)/s^k = (n - 1/4) pi or (n - 3/4) pi,
//
// a_k being polynomials of degree k in t. They follow from the polynomials U_k
// (for J) and V_k (for J') of DLMF 10.41: a_k is the imaginary part of minus
// the k-th coefficient of ln(1 + U_1(p)/nu + U_2(p)/nu^2 + ...) at
// p = i nu/s. The form holds for every order, nu = 0 included, and needs no
// value of a Bessel function.

// phaseMinJ and phaseMinJPrime are the smallest numbers of a zero for which
// the first term left out, a_13, moves it by less than 0.1 ulp, whatever the
// order (the worst is at large orders, where the terms depend on n alone).
const (
	phaseMinJ      = 11
	phaseMinJPrime = 11
)

// phaseCoefficients holds a_1, a_3, ... a_11, constant term first: rational
// numbers from the recurrences of DLMF 10.41.9-10 in exact arithmetic, rounded
// once. 336 bytes each.
var phaseCoefficientsJ = [6][]float64{
	{-0.125, -0.20833333333333334},
	{0.06510416666666667, 0.8296875, 1.7265625, 0.9592013888888888},
	{-0.2095703125, -6.982282366071429, -40.542751736111114, -87.693359375, -80.8837890625, -26.961263020833332},
	{1.6380658830915178, 103.97592163085938, 1160.8294372558594, 5140.211273193359, 11304.659503173829, 13184.767364501953, 7824.899444580078, 1863.07129632859},
	{-23.475127749972874, -2427.2885336442428, -44069.78581237793, -323875.5657704671, -1240124.8821487427, -2752869.211418152, -3683609.1391855874, -2935198.3014678955, -1284393.7849998474, -237850.70092589766},
	{535.640519510616, 82046.56579866775, 2197624.750671816, 24011994.284158945, 139535179.1724906, 487422412.2709402, 1088470361.2907014, 1594676024.676859, 1528592829.647338, 924445055.3424871, 320384038.82623315, 48543036.1857929},
}

var phaseCoefficientsJPrime = [6][]float64{
	{0.375, 0.2916666666666667},
	{-0.1640625, -1.3578125, -2.4609375, -1.2699652777777777},
	{0.3708984375, 10.045061383928571, 53.761935763888886, 110.861328125, 99.0185546875, 32.244205729166666},
	{-2.3693978445870534, -135.83804321289062, -1442.1983947753906, -6183.104644775391, -13290.156414794921, -15235.510467529297, -8920.664520263672, -2100.9361673990884},
	{30.624011993408203, 2990.353724046187, 52496.80567932129, 376938.05200703937, 1418618.1670761108, 3107230.1288223267, 4113432.6882273355, 3248958.3720550537, 1411246.5066719055, 259707.8842164499},
	{-659.185221823779, -97364.55734929672, -2546003.369584608, -27334402.14248252, -156711943.46210337, -541570815.2316576, -1198811501.4835029, -1743509972.5369587, -1660907665.1903753, -999114979.174681, -344658214.2317903, -52008453.28136689},
}

// phaseTerms returns how many a_k matter for the n-th zero: those left out
// move it by less than 0.04 ulp.
func phaseTerms(n int) int {
	switch {
	case n >= 200:
		return 2
	case n >= 50:
		return 3
	case n >= 25:
		return 4
	case n >= 16:
		return 5
	}
	return 6
}

// phaseTail returns the sum over odd k of sign^((k-1)/2) a_k(t)/s^k and its
// derivative in s, t being proportional to s^-2. The sign is 1 for J and -1 for
// the functions of imaginary argument.
func phaseTail(a [][]float64, s, t, sign float64) (sum, slope float64) {
	r := 1 / s
	r2 := sign * r * r
	for i := len(a) - 1; i >= 0; i-- {
		c := a[i]
		k := float64(2*i + 1 + 2*(len(c)-1))
		var p, q float64
		for j := len(c) - 1; j >= 0; j-- {
			p = p*t + c[j]
			q = q*t + k*c[j]
			k -= 2
		}
		sum = sum*r2 + p
		slope = slope*r2 + q
	}
	return sum * r, -slope * r * r
}

// zeroByPhase solves for the zero number n with phase (n - off) pi, n at least
// phaseMin, from a start. The zero is x + low, x its nearest double.
func zeroByPhase(a [][]float64, nu float64, n int, off, x float64) (zero, low float64) {
	// Everything that is as large as x is compensated: the target, s, and
	// nu acos(nu/x) unless it is far smaller.
	th, tl := mulDD(float64(n)-off, 0, 2*halfPiH, 2*halfPiL)
	for range 10 {
		uh, ul := twoSum(x, -nu)
		vh, vl := twoSum(x, nu)
		uh, ul = mulDD(uh, ul, vh, vl)
		sh := math.Sqrt(uh)
		p, e := twoProd(sh, sh)
		sl := ((uh - p) - e + ul) / (2 * sh)

		t := nu / sh
		sum, ds := phaseTail(a, sh, t*t, 1)
		slope := sh/x + ds*x/sh
		ph, pl := arcTerm(nu, sh, sl)
		rest := (th - sh + ph) + (tl - sl + pl) - sum
		h := rest / slope
		// Second order: the slope is nearly s/x, with derivative nu^2/(x^2 s).
		h -= h * h * t * t / (2 * x)
		x, low = twoSum(x, h)
		// What is left is of third order in h/s.
		if math.Abs(h) < 1e-6*sh {
			break
		}
	}
	return x, low
}

// arcTerm returns nu acos(nu/x) = nu atan(s/nu).
func arcTerm(nu, sh, sl float64) (h, l float64) {
	if nu == 0 {
		return 0, 0
	}
	if sh <= nu {
		h, l = divDD(sh, sl, nu, 0)
		h, l = atanDD(h, l)
		return mulDD(nu, 0, h, l)
	}
	// pi/2 - atan(nu/s)
	if sh > 8*nu {
		h, l = math.Atan(nu/sh), 0
	} else {
		h, l = divDD(nu, 0, sh, sl)
		h, l = atanDD(h, l)
	}
	h, l = addDD(halfPiH, halfPiL, -h, -l)
	return mulDD(nu, 0, h, l)
}

// atanDD returns the arc tangent of qh + ql in [0, 1], to about 2^-56.
func atanDD(qh, ql float64) (h, l float64) {
	h = math.Atan(qh)
	// tan(d) = (q cos h - sin h) / (cos h + q sin h) for the missing d.
	ch, cl, sh, sl := sinCosSmall(h, 0)
	ph, pl := mulDD(qh, ql, ch, cl)
	return h, ((ph - sh) + (pl - sl)) / (ch + qh*sh)
}

// phaseSlope returns the derivative of the phase at x + low.
func phaseSlope(a [][]float64, nu, x, low float64) float64 {
	s := math.Sqrt((x - nu + low) * (x + nu))
	t := nu / s
	_, ds := phaseTail(a, s, t*t, 1)
	return s/x + ds*x/s
}

// jSlopeByPhase returns J'_nu at its n-th zero x + low, n >= phaseMinJ.
func jSlopeByPhase(nu float64, n int, x, low float64) float64 {
	// J = M cos(theta) with M^2 theta' = 2/(pi x), DLMF 10.18.8.
	slope := phaseSlope(phaseCoefficientsJ[:phaseTerms(n)], nu, x, low)
	return alternate(n, -math.Sqrt(slope/(0.5*math.Pi*x)))
}

// jAtPrimeByPhase returns J_nu at the n-th zero x + low of J'_nu, n >= phaseMinJPrime.
func jAtPrimeByPhase(nu float64, n int, x, low float64) float64 {
	// J' = N cos(phi) with N^2 phi' = 2 (x^2 - nu^2)/(pi x^3), DLMF 10.18.9.
	slope := phaseSlope(phaseCoefficientsJPrime[:phaseTerms(n)], nu, x, low)
	return alternate(n, math.Sqrt(slope*x/(0.5*math.Pi*(x-nu+low)*(x+nu))))
}

// alternate returns v for odd n and -v for even n.
func alternate(n int, v float64) float64 {
	if n&1 == 0 {
		return -v
	}
	return v
}

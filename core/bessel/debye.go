package bessel

import "math"

// Debye's expansions below the turning point and for the modified functions,
// in one form. With s = sqrt(x^2 + nu^2) they read
//
//	I_nu(x) = exp(B)/sqrt(2 pi x B'),   K_nu(x) = exp(-B) sqrt(pi/(2 x B')),
//	I'_nu(x) = exp(C) s/sqrt(2 pi x^3 C'),
//
// and with s = sqrt(nu^2 - x^2), nu well above x,
//
//	J_nu(x) = exp(B)/sqrt(2 pi x B').
//
// B and C are s - nu ln((nu + s)/x) plus sums of odd powers of 1/s: the sums of
// zerophase.go for imaginary argument (DLMF 10.41.3-6 and 10.19.3, put in
// exponential form; B' and C' then follow from the Wronskian). They serve I and
// K for every nu >= 0, since s alone has to be large; for J, s^3/nu^2 has to be.

// debyeMin is the smallest s at which the first term left out, a_13/s^13, is
// below 2^-56: a_13 is at most 2e4 for 0 <= (nu/s)^2 <= 1.
const debyeMin = 40

// debyeRoot returns s = sqrt(x^2 + nu^2) as a compensated number.
func debyeRoot(nu, x float64) (h, l float64) {
	if x > 0x1p100 { // nu^2/x is nothing
		return x, 0
	}
	ph, pl := twoProd(x, x)
	qh, ql := twoProd(nu, nu)
	ph, pl = addDD(ph, pl, qh, ql)
	h = math.Sqrt(ph)
	p, e := twoProd(h, h)
	return h, ((ph - p) - e + pl) / (2 * h)
}

// debyeSum returns B - nu eta and x B', or with the other table C - nu eta and
// x C', each as a compensated number as far as it needs to be.
func debyeSum(a [][]float64, nu, sh, sl float64) (sum, bh, bl float64) {
	t := nu / sh
	v, ds := phaseTail(a, sh, -t*t, -1)
	// x d/dx: eta gives s, the sum -v gives -ds x^2/s; x^2 = s^2 - nu^2.
	bh, bl = fastTwoSum(sh, sl-ds*((sh-nu)*(sh+nu)/sh))
	return -v, bh, bl
}

// debyeExp returns nu eta + sum - shift x as a compensated number, shift being
// 0 or 1.
func debyeExp(nu, x, sh, sl, sum, shift float64) (h, l float64) {
	h, l = addDD(sh, sl, -shift*x, 0)
	if nu > 0 && x <= 0x1p100 {
		uh, ul := logRatio(nu, x, sh, sl)
		uh, ul = mulDD(uh, ul, nu, 0)
		h, l = addDD(h, l, -uh, -ul)
	}
	return addDD(h, l, sum, 0)
}

// logRatio returns ln((nu + s)/x).
func logRatio(nu, x, sh, sl float64) (h, l float64) {
	sh, sl = addDD(sh, sl, nu, 0)
	sh, sl = logDD(sh, sl)
	h, l = logDD(x, 0)
	return addDD(sh, sl, -h, -l)
}

// iDebye returns exp(-shift x) I_nu(x) for s >= debyeMin.
func iDebye(nu, x, shift float64) float64 {
	sh, sl := debyeRoot(nu, x)
	sum, bh, bl := debyeSum(phaseCoefficientsJ[:], nu, sh, sl)
	eh, el := debyeExp(nu, x, sh, sl, sum, shift)
	fh, fl := rootDD(bh, bl) // sqrt(2/(pi x B'))
	return timesExp(0.5*fh, 0.5*fl, eh, el)
}

// kDebye returns exp(shift x) K_nu(x) for s >= debyeMin.
func kDebye(nu, x, shift float64) float64 {
	sh, sl := debyeRoot(nu, x)
	sum, bh, bl := debyeSum(phaseCoefficientsJ[:], nu, sh, sl)
	eh, el := debyeExp(nu, x, sh, sl, sum, shift)
	fh, fl := rootDD(bh, bl)
	fh, fl = mulDD(fh, fl, halfPiH, halfPiL)
	return timesExp(fh, fl, -eh, -el)
}

// rootDD returns sqrt(2/(pi v)) for v = vh + vl.
func rootDD(vh, vl float64) (h, l float64) {
	h, l = hankelFactor(vh)
	return h, l - 0.5*h*(vl/vh)
}

// timesExp returns f exp(e), with a single rounding also where it underflows.
func timesExp(fh, fl, eh, el float64) float64 {
	switch {
	case eh > 1500:
		return math.Inf(1)
	case eh < -1500:
		return 0
	}
	h, l, k := expDD(eh, el)
	h, l = mulDD(h, l, fh, fl)
	return math.Ldexp(h+l, k)
}

// ratioDebye returns I'_nu/I_nu (sign = 1) or -K'_nu/K_nu (sign = -1) at x, for
// s >= debyeMin.
func ratioDebye(nu, x, sign float64) float64 {
	sh, sl := debyeRoot(nu, x)
	b, bh, bl := debyeSum(phaseCoefficientsJ[:], nu, sh, sl)
	c, ch, cl := debyeSum(phaseCoefficientsJPrime[:], nu, sh, sl)
	// (s/x) sqrt(B'/C') exp(+-(C - B)), with B', C' and the exponent all
	// within s^-1 of their leading terms.
	ratio := math.Sqrt((bh + bl) / (ch + cl))
	return sh / x * (ratio * math.Exp(sign*(c-b)))
}

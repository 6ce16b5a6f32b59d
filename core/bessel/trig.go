package bessel

import "math"

// pi/2 in three parts: the first two have 25 significant bits, so that their
// product with an integer below 2^28 is exact; the third carries the rest.
// pi/4 and pi/2 as compensated numbers besides.
const (
	halfPi1 = 0x1.921fb5p+0
	halfPi2 = 0x1.110b46p-26
	halfPi3 = 0x1.1a62633145c07p-54

	halfPiH = 0x1.921fb54442d18p+0
	halfPiL = 0x1.1a62633145c07p-54

	// phaseLimit is the largest argument whose phase is reduced in
	// compensated arithmetic; it keeps the quadrant number below 2^28.
	phaseLimit = 1 << 28
)

// phase returns cos and sin, each as a compensated number, of
//
//	chi = x - (nu/2 + 1/4) pi,   0 <= nu < 1,
//
// with an absolute error of about 2^-55; from phaseLimit on, of 2^-52.
func phase(nu, x float64) (ch, cl, sh, sl float64) {
	if x >= phaseLimit {
		ch, sh = farPhase(nu, x)
		return ch, 0, sh, 0
	}
	k := math.Round(x*(1/halfPiH) - nu - 0.5)
	// x - (k + nu + 1/2) pi/2
	r, e := twoSum(x-float64(k*halfPi1), -float64(k*halfPi2))
	e -= float64(k * halfPi3)
	f, fe := twoSum(nu, 0.5)
	p, pe := twoProd(f, halfPiH)
	h, l := twoSum(r, -p)
	l += (e - pe) - (float64(f*halfPiL) + fe*halfPiH)
	h, l = fastTwoSum(h, l)
	ch, cl, sh, sl = sinCosSmall(h, l)
	switch int64(k) & 3 {
	case 1:
		return -sh, -sl, ch, cl
	case 2:
		return -ch, -cl, -sh, -sl
	case 3:
		return sh, sl, -ch, -cl
	}
	return ch, cl, sh, sl
}

// farPhase returns cos and sin of x - (nu/2 + 1/4) pi in plain arithmetic.
func farPhase(nu, x float64) (c, s float64) {
	sx, cx := math.Sincos(x)
	sp, cp := math.Sincos((nu/2 + 0.25) * math.Pi)
	return cx*cp + sx*sp, sx*cp - cx*sp
}

// sinCosSmall returns cos and sin of h + l for |h| <= pi/4 + 2^-20, each as a
// compensated number good to about 2^-56 absolutely.
func sinCosSmall(h, l float64) (ch, cl, sh, sl float64) {
	// Minimax coefficients of fdlibm's __kernel_sin and __kernel_cos
	// (Sun Microsystems 1993). Only the leading terms need the extra bits:
	// the quadratic one of the cosine, the linear one of the sine.
	const (
		s1 = -1.66666666666666324348e-01
		s2 = 8.33333333332248946124e-03
		s3 = -1.98412698298579493134e-04
		s4 = 2.75573137070700676789e-06
		s5 = -2.50507602534068634195e-08
		s6 = 1.58969099521155010221e-10

		c1 = 4.16666666666666019037e-02
		c2 = -1.38888888888741095749e-03
		c3 = 2.48015872894767294178e-05
		c4 = -2.75573143513906633035e-07
		c5 = 2.08757232129817482790e-09
		c6 = -1.13596475577881948265e-11
	)
	z, ze := twoProd(h, h)
	hz := 0.5 * z
	ch = 1 - hz
	cl = ((1 - ch) - hz) + (z*z*(c1+z*(c2+z*(c3+z*(c4+z*(c5+z*c6))))) - 0.5*ze - h*l)
	ch, cl = fastTwoSum(ch, cl)
	sl = l*(1-hz) + h*z*(s1+z*(s2+z*(s3+z*(s4+z*(s5+z*s6)))))
	sh, sl = fastTwoSum(h, sl)
	return ch, cl, sh, sl
}

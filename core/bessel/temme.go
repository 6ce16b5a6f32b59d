package bessel

import "math"

// reciprocalGamma holds the Taylor coefficients of 1/Gamma(1+z) at 0 (A&S
// 6.1.34 shifted by one; here to double precision from mpmath): those left out
// are below 1e-19 for |z| <= 1/2. 160 bytes.
var reciprocalGamma = [...]float64{
	1, 0.5772156649015329, -0.6558780715202539, -0.04200263503409524,
	0.16653861138229148, -0.04219773455554433, -0.009621971527876973,
	0.0072189432466631, -0.0011651675918590652, -0.00021524167411495098,
	0.0001280502823881162, -2.013485478078824e-05, -1.2504934821426706e-06,
	1.133027231981696e-06, -2.056338416977607e-07, 6.116095104481416e-09,
	5.002007644469223e-09, -1.18127457048702e-09, 1.0434267116911005e-10,
	7.782263439905071e-12,
}

// Euler's constant in two parts.
const eulerH, eulerL = 0x1.2788cfc6fb619p-1, -0x1.6cb90701fbfabp-58

// temmeGamma returns h1 and h2, both small, such that for |mu| <= 1/2
//
//	(1/Gamma(1-mu) - 1/Gamma(1+mu))/(2 mu) = h1 - gamma,
//	(1/Gamma(1-mu) + 1/Gamma(1+mu))/2      = h2 + 1.
func temmeGamma(mu float64) (h1, h2 float64) {
	z := mu * mu
	for k := len(reciprocalGamma) - 2; k >= 2; k -= 2 {
		h2 = (h2 + reciprocalGamma[k]) * z
		h1 = (h1 - reciprocalGamma[k+1]) * z
	}
	return h1, h2
}

// temmeStart returns what the series for Y and K have in common, for
// |mu| <= 1/2: with sigma = mu ln(2/x) and g1, g2 the left sides in temmeGamma
//
//	f = (pi mu/sin pi mu) (g1 cosh sigma + g2 (sinh sigma/sigma) ln(2/x)),
//	p = (2/x)^mu Gamma(1+mu),  q = (x/2)^mu Gamma(1-mu).
func temmeStart(mu, x float64) (f, p, q float64) {
	// Temme, J. Comput. Phys. 19 (1975) 324, eq. 3.
	h1, h2 := temmeGamma(mu)
	g1, g2 := h1-eulerH, h2+1
	lh, ll := logHalfDD(x)
	lh, ll = -lh, -ll
	sh, sl := mulDD(lh, ll, mu, 0)
	up := scaleExp(expDD(sh, sl))
	down := scaleExp(expDD(-sh, -sl))
	if math.Abs(sh) < restMax {
		// The leading parts ln(2/x) - gamma cancel towards x = 1; the rest is
		// small.
		c1, s1 := hyperbolicRest(sh)
		bh, bl := addDD(lh, ll, -eulerH, -eulerL)
		f = bh + (bl + h1 + g1*c1 + lh*(h2+s1+h2*s1))
	} else {
		f = 0.5 * (g1*(up+down) + g2*(up-down)/mu)
	}
	if mu != 0 {
		f *= math.Pi * mu / math.Sin(math.Pi*mu)
	}
	return f, up / (g2 - mu*g1), down / (g2 + mu*g1)
}

// restMax is the range of hyperbolicRest.
const restMax = 2

// hyperbolicRest returns cosh(s) - 1 and sinh(s)/s - 1 for |s| <= restMax.
func hyperbolicRest(s float64) (c, h float64) {
	// Taylor's series; the first terms left out are below 2^-60 of the sum.
	z := s * s
	for k := 24.0; k >= 2; k -= 2 {
		c = (1 + c) * z / (k * (k - 1))
		h = (1 + h) * z / (k * (k + 1))
	}
	return c, h
}

func scaleExp(h, l float64, k int) float64 {
	return math.Ldexp(h+l, k)
}

// yTemme returns Y_mu(x) for 0 < x < 1.5 and |mu| <= 1/2.
func yTemme(mu, x float64) float64 {
	f, p, q := temmeStart(mu, x)
	f *= 2 / math.Pi
	p /= math.Pi
	q /= math.Pi
	// r = (2/mu) sin^2(pi mu/2)
	h := math.Sin(0.5 * math.Pi * mu)
	r := 0.0
	if mu != 0 {
		r = 2 * h * h / mu
	}
	c, d := 1.0, -0.25*x*x
	first, rest := f+r*q, 0.0
	for k := 1.0; k < 100; k++ {
		f = (k*f + p + q) / ((k - mu) * (k + mu))
		p /= k - mu
		q /= k + mu
		c *= d / k
		g := c * (f + r*q)
		rest += g
		if math.Abs(g) < 0x1p-57*math.Abs(rest) {
			break
		}
	}
	return -(first + rest)
}

// yTemmePair returns Y_mu(x) and Y_{mu+1}(x) for 0 < x < steedMin and
// |mu| <= 1/2.
func yTemmePair(mu, x float64) (y0, y1h, y1l float64) {
	y0 = yTemme(mu, x)
	// Y_{mu+1} = (J_{mu+1} Y_mu - 2/(pi x))/J_mu, DLMF 10.5.2: for small x the
	// second term is by far the larger, and it is exact.
	jh, jl, kh, kl := jSeriesPair(mu, x)
	const twoOverPiH, twoOverPiL = 1 / halfPiH, -0x1.6b01ec5417056p-55
	ph, pl := mulDD(kh, kl, y0, 0)
	if isExtreme(x) {
		return y0, (ph - twoOverPiH/x) / jh, 0
	}
	qh, ql := divDD(twoOverPiH, twoOverPiL, x, 0)
	ph, pl = addDD(ph, pl, -qh, -ql)
	y1h, y1l = divDD(ph, pl, jh, jl)
	return y0, y1h, y1l
}

// kTemme returns K_mu(x) for 0 < x < 1.5 and |mu| <= 1/2.
func kTemme(mu, x float64) float64 {
	f, p, q := temmeStart(mu, x)
	p *= 0.5
	q *= 0.5
	c, d := 1.0, 0.25*x*x
	first, rest := f, 0.0
	for k := 1.0; k < 100; k++ {
		f = (k*f + p + q) / ((k - mu) * (k + mu))
		p /= k - mu
		q /= k + mu
		c *= d / k
		rest += c * f
		if c*f < 0x1p-57*rest {
			break
		}
	}
	return first + rest
}

// kTemmePair returns K_mu(x) and K_{mu+1}(x) for 0 < x < steedMin and
// |mu| <= 1/2.
func kTemmePair(mu, x float64) (k0, k1h, k1l float64) {
	k0 = kTemme(mu, x)
	// K_{mu+1} = (1/x - I_{mu+1} K_mu)/I_mu, DLMF 10.28.2, with
	// I_mu = prefix iSum(mu) and I_{mu+1} = prefix (x/2)/(mu+1) iSum(mu+1).
	h, l, k := prefix(mu, x)
	h, l = math.Ldexp(h, k), math.Ldexp(l, k)
	sh, sl := iSum(mu, 0, x)
	ih, il := mulDD(h, l, sh, sl)
	if isExtreme(x) {
		return k0, 1 / x / ih, 0
	}
	nh, nl := twoSum(mu, 1)
	sh, sl = iSum(nh, nl, x)
	sh, sl = mulDD(sh, sl, h, l)
	nh, nl = divDD(0.5*x, 0, nh, nl)
	sh, sl = mulDD(sh, sl, nh, nl)
	sh, sl = mulDD(sh, sl, k0, 0)
	nh, nl = invDD(x)
	sh, sl = addDD(nh, nl, -sh, -sl)
	k1h, k1l = divDD(sh, sl, ih, il)
	return k0, k1h, k1l
}

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

// temmeGamma returns, for |mu| <= 1/2,
//
//	g1 = (1/Gamma(1-mu) - 1/Gamma(1+mu))/(2 mu),
//	g2 = (1/Gamma(1-mu) + 1/Gamma(1+mu))/2.
func temmeGamma(mu float64) (g1, g2 float64) {
	z := mu * mu
	for k := len(reciprocalGamma) - 2; k >= 0; k -= 2 {
		g2 = g2*z + reciprocalGamma[k]
		g1 = g1*z - reciprocalGamma[k+1]
	}
	return g1, g2
}

// temmeStart returns what the series for Y and K have in common, for 0 < x < steedMin
// and |mu| <= 1/2:
//
//	f = (pi mu/sin pi mu) (g1 cosh sigma + g2 (sinh sigma/sigma) ln(2/x)),
//	p = (2/x)^mu Gamma(1+mu),  q = (x/2)^mu Gamma(1-mu),  sigma = mu ln(2/x).
func temmeStart(mu, x float64) (f, p, q float64) {
	// Temme, J. Comput. Phys. 19 (1975) 324, eq. 3.
	g1, g2 := temmeGamma(mu)
	lh, ll := logHalfDD(x)
	lh, ll = -lh, -ll
	sh, sl := mulDD(lh, ll, mu, 0)
	up := scaleExp(expDD(sh, sl))
	down := scaleExp(expDD(-sh, -sl))
	fact, sinhc := 1.0, 1.0
	if mu != 0 {
		fact = math.Pi * mu / math.Sin(math.Pi*mu)
		sinhc = math.Sinh(sh) / sh
		if math.Abs(sh) > 1 {
			sinhc = 0.5 * (up - down) / sh
		}
	}
	f = fact * (g1*0.5*(up+down) + g2*sinhc*lh)
	return f, up / (g2 - mu*g1), down / (g2 + mu*g1)
}

func scaleExp(h, l float64, k int) float64 {
	return math.Ldexp(h+l, k)
}

// yTemme returns Y_mu(x) and Y_{mu+1}(x) for 0 < x < steedMin and |mu| <= 1/2.
func yTemme(mu, x float64) (y0, y1 float64) {
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
	y0, y1 = f+r*q, p
	for k := 1.0; k < 100; k++ {
		f = (k*f + p + q) / ((k - mu) * (k + mu))
		p /= k - mu
		q /= k + mu
		c *= d / k
		g := c * (f + r*q)
		y0 += g
		y1 += c*p - k*g
		if math.Abs(g) < 0x1p-57*math.Abs(y0) && math.Abs(k*g) < 0x1p-57*math.Abs(y1) {
			break
		}
	}
	return -y0, -y1 * 2 / x
}

// kTemme returns K_mu(x) and K_{mu+1}(x) for 0 < x < steedMin and |mu| <= 1/2.
func kTemme(mu, x float64) (k0, k1 float64) {
	f, p, q := temmeStart(mu, x)
	p *= 0.5
	q *= 0.5
	c, d := 1.0, 0.25*x*x
	k0, k1 = f, p
	for k := 1.0; k < 100; k++ {
		f = (k*f + p + q) / ((k - mu) * (k + mu))
		p /= k - mu
		q /= k + mu
		c *= d / k
		k0 += c * f
		k1 += c * (p - k*f)
		if c*f < 0x1p-57*k0 && math.Abs(c*(p-k*f)) < 0x1p-57*k1 {
			break
		}
	}
	return k0, k1 * 2 / x
}

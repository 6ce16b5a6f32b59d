package bessel

import "math"

// taylorDegree is the degree of the local expansion in which a zero is
// sought. From a start that is off by e the result is off by about e^9 in
// units of the local wavelength.
const taylorDegree = 8

// besselTaylor returns the Taylor coefficients at x of the solution of Bessel's
// equation,
//
//	x^2 y'' + x y' + (x^2 - nu^2) y = 0,
//
// with y(x) = y0 and y'(x) = y1.
func besselTaylor(nu, x, y0, y1 float64) (c [taylorDegree + 1]float64) {
	c[0], c[1] = y0, y1
	d := (x - nu) * (x + nu)
	inv := 1 / (x * x)
	for k := 0; k+2 <= taylorDegree; k++ {
		f := float64(k)
		s := x*(f+1)*(2*f+1)*c[k+1] + (f*f+d)*c[k]
		if k >= 1 {
			s += 2 * x * c[k-1]
		}
		if k >= 2 {
			s += c[k-2]
		}
		c[k+2] = -s * inv / ((f + 1) * (f + 2))
	}
	return c
}

// refineZeroJ takes a start near a zero of J_nu to the zero and returns it
// with J'_nu there.
func refineZeroJ(nu, x float64) (zero, deriv float64) {
	for range 20 {
		y, d := jAndDerivative(nu, x)
		c := besselTaylor(nu, x, y, d)
		h := -y / d
		for range 3 {
			p, q := c[taylorDegree], 0.0
			for k := taylorDegree - 1; k >= 0; k-- {
				q = q*h + p
				p = p*h + c[k]
			}
			deriv = q
			h -= p / q
		}
		x += h
		if math.Abs(h) < zeroStep*math.Cbrt(x) {
			break
		}
	}
	return x, deriv
}

// refineZeroJPrime takes a start near a zero of J'_nu to the zero and returns
// it with J_nu there.
func refineZeroJPrime(nu, x float64) (zero, value float64) {
	for range 20 {
		y, d := jAndDerivative(nu, x)
		c := besselTaylor(nu, x, y, d)
		h := -d / (2 * c[2])
		for range 3 {
			v, p, q := c[taylorDegree], 0.0, 0.0
			for k := taylorDegree - 1; k >= 0; k-- {
				q = q*h + p
				p = p*h + v
				v = v*h + c[k]
			}
			value = v
			h -= p / (2 * q)
		}
		x += h
		if math.Abs(h) < zeroStep*math.Min(x, math.Cbrt(x)) {
			break
		}
	}
	return x, value
}

// zeroStep is the correction, in units of the scale x^(1/3) on which J varies
// at its turning point, below which the expansion leaves nothing to repeat:
// 0.01^8 is 1e-16 and the coefficients of degree 8 add a factor 1/8!.
const zeroStep = 0.01

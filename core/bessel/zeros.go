package bessel

import "math"

// ZeroJ returns the n-th positive zero j_{nu,n} of J_nu, for nu >= 0 and
// n >= 1; NaN outside. The zero of J_nu at x = 0 is not counted.
func ZeroJ(nu float64, n int) float64 {
	if !(nu >= 0) || math.IsInf(nu, 1) || n < 1 {
		return math.NaN()
	}
	x, _ := refineZeroJ(nu, startZeroJ(nu, n))
	return x
}

// ZerosJ fills dst with the first len(dst) positive zeros of J_nu, in order,
// and returns it.
func ZerosJ(dst []float64, nu float64) []float64 {
	for k := range dst {
		dst[k] = ZeroJ(nu, k+1)
	}
	return dst
}

// ZerosJAndDerivative fills zeros with the first positive zeros of J_nu and
// deriv, of the same length, with J'_nu = -J_{nu+1} at them, which the search
// for the zero has at hand. It panics if the lengths differ.
func ZerosJAndDerivative(zeros, deriv []float64, nu float64) {
	if len(zeros) != len(deriv) {
		panic(lengthMismatch)
	}
	for k := range zeros {
		if !(nu >= 0) || math.IsInf(nu, 1) {
			zeros[k], deriv[k] = math.NaN(), math.NaN()
			continue
		}
		zeros[k], deriv[k] = refineZeroJ(nu, startZeroJ(nu, k+1))
	}
}

// ZeroJPrime returns the n-th positive zero j'_{nu,n} of J'_nu, for nu >= 0
// and n >= 1; NaN outside.
//
// For nu = 0 the first positive zero is j_{1,1} = 3.83170597...; Abramowitz &
// Stegun and DLMF count x = 0 as the first one there, so their j'_{0,n+1} is
// ZeroJPrime(0, n). For nu > 0 the conventions agree.
func ZeroJPrime(nu float64, n int) float64 {
	if !(nu >= 0) || math.IsInf(nu, 1) || n < 1 {
		return math.NaN()
	}
	if nu == 0 {
		return ZeroJ(1, n)
	}
	x, _ := refineZeroJPrime(nu, startZeroJPrime(nu, n))
	return x
}

// ZerosJPrime fills dst with the first len(dst) positive zeros of J'_nu, in
// order, and returns it.
func ZerosJPrime(dst []float64, nu float64) []float64 {
	for k := range dst {
		dst[k] = ZeroJPrime(nu, k+1)
	}
	return dst
}

// ZerosJPrimeAndValue fills zeros with the first positive zeros of J'_nu and
// value, of the same length, with J_nu at them. It panics if the lengths
// differ.
func ZerosJPrimeAndValue(zeros, value []float64, nu float64) {
	if len(zeros) != len(value) {
		panic(lengthMismatch)
	}
	for k := range zeros {
		switch {
		case !(nu >= 0) || math.IsInf(nu, 1):
			zeros[k], value[k] = math.NaN(), math.NaN()
		case nu == 0:
			var d float64
			zeros[k], d = refineZeroJ(1, startZeroJ(1, k+1))
			// J_0 = J'_1 + J_1/x, and J_1 is zero.
			value[k] = d
		default:
			zeros[k], value[k] = refineZeroJPrime(nu, startZeroJPrime(nu, k+1))
		}
	}
}

const lengthMismatch = "bessel: slices differ in length"

// taylorDegree is the degree of the local expansion in which a zero is
// sought. From a start that is off by e the result is off by about e^9 in
// units of the local wavelength.
const taylorDegree = 8

// besselTaylor returns the Taylor coefficients at x of the solution of
// x^2 y” + x y' + (x^2 - nu^2) y = 0 with y(x) = y0 and y'(x) = y1.
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

package bessel

import "math"

const lengthMismatch = "bessel: slices differ in length"

// ZeroJ returns the n-th positive zero j_{nu,n} of J_nu, for 0 <= nu <=
// MaxOrder and n >= 1; NaN outside. The zero of J_nu at x = 0 is not counted. Accurate to
// 2 ulp for nu <= 1000 and n <= 1e6, see TestAccuracy in package accuracy.
func ZeroJ(nu float64, n int) float64 {
	if !validOrder(nu) || n < 1 {
		return math.NaN()
	}
	x, _ := zeroJ(nu, n, startZeroJ(nu, n), false)
	return x
}

// ZerosJ fills dst with the first len(dst) positive zeros of J_nu, in order,
// and returns it. Domain and accuracy are those of ZeroJ.
func ZerosJ(dst []float64, nu float64) []float64 {
	sequence(dst, nil, nu, zeroJ, startZeroJ)
	return dst
}

// ZerosJAndDerivative fills zeros with the first positive zeros of J_nu and
// deriv, of the same length, with J'_nu = -J_{nu+1} at them, which the search
// for the zero has at hand. It panics if the lengths differ.
func ZerosJAndDerivative(zeros, deriv []float64, nu float64) {
	if len(zeros) != len(deriv) {
		panic(lengthMismatch)
	}
	sequence(zeros, deriv, nu, zeroJ, startZeroJ)
}

// ZeroJPrime returns the n-th positive zero j'_{nu,n} of J'_nu, for nu >= 0
// and n >= 1; NaN outside. Accuracy is that of ZeroJ.
//
// For nu = 0 the first positive zero is j_{1,1} = 3.83170597...; Abramowitz &
// Stegun and DLMF count x = 0 as the first one there, so their j'_{0,n+1} is
// ZeroJPrime(0, n). For nu > 0 the conventions agree: the first zero is near
// sqrt(2 nu) for small nu and tends to 0 with it.
func ZeroJPrime(nu float64, n int) float64 {
	if !validOrder(nu) || n < 1 {
		return math.NaN()
	}
	x, _ := zeroJPrime(nu, n, startZeroJPrime(nu, n), false)
	return x
}

// ZerosJPrime fills dst with the first len(dst) positive zeros of J'_nu, in
// order, and returns it. Conventions are those of ZeroJPrime.
func ZerosJPrime(dst []float64, nu float64) []float64 {
	sequence(dst, nil, nu, zeroJPrime, startZeroJPrime)
	return dst
}

// ZerosJPrimeAndValue fills zeros with the first positive zeros of J'_nu and
// value, of the same length, with J_nu at them. It panics if the lengths
// differ.
func ZerosJPrimeAndValue(zeros, value []float64, nu float64) {
	if len(zeros) != len(value) {
		panic(lengthMismatch)
	}
	sequence(zeros, value, nu, zeroJPrime, startZeroJPrime)
}

// sequence fills zeros, and other unless it is nil, by calls of zero(nu, n,
// start, both). Once there are four zeros whose fourth difference has died down,
// they give the start of the next.
func sequence(zeros, other []float64, nu float64,
	zero func(nu float64, n int, start float64, both bool) (x, y float64),
	start func(nu float64, n int) float64) {
	for k := range zeros {
		if !validOrder(nu) {
			zeros[k] = math.NaN()
			if other != nil {
				other[k] = math.NaN()
			}
			continue
		}
		var x float64
		if n := k + 1; n >= extrapolateMin {
			x = 4*(zeros[k-1]+zeros[k-3]) - 6*zeros[k-2] - zeros[k-4]
		} else {
			x = start(nu, n)
		}
		x, y := zero(nu, k+1, x, other != nil)
		zeros[k] = x
		if other != nil {
			other[k] = y
		}
	}
}

// extrapolateMin is the number of the first zero whose start is extrapolated.
// The n-th zero is nu z(n/nu), z smooth but for z - 1 = O((n/nu)^(2/3)), so the
// fourth difference is below 0.1 nu^(1/3) n^(2/3-4) there.
const extrapolateMin = 12

// zeroJ returns j_{nu,n} and, if both is set, J'_nu there, from a start near it.
func zeroJ(nu float64, n int, start float64, both bool) (zero, deriv float64) {
	if n < phaseMinJ {
		return refineZeroJ(nu, start)
	}
	zero, low := zeroByPhase(phaseCoefficientsJ[:phaseTerms(n)], nu, n, 0.25, start)
	if both {
		deriv = jSlopeByPhase(nu, n, zero, low)
	}
	return zero, deriv
}

// zeroJPrime returns the n-th positive zero of J'_nu and, if both is set, J_nu
// there, from a start near it.
func zeroJPrime(nu float64, n int, start float64, both bool) (zero, value float64) {
	if nu == 0 {
		// J_0' = -J_1, and where J_1 vanishes J_0 = J_1'.
		return zeroJ(1, n, start, both)
	}
	if n < phaseMinJPrime {
		return refineZeroJPrime(nu, start)
	}
	zero, low := zeroByPhase(phaseCoefficientsJPrime[:phaseTerms(n)], nu, n, 0.75, start)
	if both {
		value = jAtPrimeByPhase(nu, n, zero, low)
	}
	return zero, value
}

package tap

import "math"

// StudentCDF is the probability that a variable with Student's t distribution
// of nu degrees of freedom is at most t. nu >= 1; nu of 0 or less stands for
// infinitely many, the normal distribution. Absolute accuracy 1e-14.
func StudentCDF(t float64, nu int) float64 {
	if nu <= 0 {
		return 0.5 * math.Erfc(-t/math.Sqrt2)
	}
	if math.IsInf(t, 0) {
		return 0.5 + math.Copysign(0.5, t)
	}
	// Abramowitz & Stegun 26.7.3 and 26.7.4: finite sums for whole nu.
	theta := math.Atan2(t, math.Sqrt(float64(nu)))
	sin, cos := math.Sincos(theta)
	var sum, term float64
	first := 2 // the sums run over even or odd powers of the cosine
	if nu%2 == 0 {
		sum, term = 1, 1
		first = 1
	} else if nu > 1 {
		sum, term = cos, cos
	}
	for k := first; k <= nu-3; k += 2 {
		term *= float64(k) / float64(k+1) * cos * cos
		sum += term
	}
	area := sin * sum
	if nu%2 == 1 {
		area = 2 / math.Pi * (theta + sin*sum)
	}
	return 0.5 + 0.5*area
}

// StudentQuantile is the coverage factor t for which a share p, 0 < p < 1, of
// Student's t distribution with nu degrees of freedom lies between -t and t;
// nu as in StudentCDF. Relative accuracy 1e-10.
func StudentQuantile(p float64, nu int) float64 {
	target := 0.5 + 0.5*p
	low, high := 0.0, 1.0
	for StudentCDF(high, nu) < target && high < 1e8 {
		low, high = high, 2*high
	}
	for high-low > 1e-12*high {
		middle := 0.5 * (low + high)
		if middle == low || middle == high {
			break
		}
		if StudentCDF(middle, nu) < target {
			low = middle
		} else {
			high = middle
		}
	}
	return 0.5 * (low + high)
}

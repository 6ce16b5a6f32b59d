package modes

import "math"

// root returns a root of f between a and b, where f has opposite signs, to the
// resolution of float64. It returns the end with the smaller value where the
// signs are equal.
func root(f func(float64) float64, a, b float64) float64 {
	// R. P. Brent, Algorithms for Minimization without Derivatives (1973),
	// chapter 4: inverse quadratic interpolation or secant, else bisection.
	fa, fb := f(a), f(b)
	if (fa > 0) == (fb > 0) && fa != 0 && fb != 0 {
		if math.Abs(fa) < math.Abs(fb) {
			return a
		}
		return b
	}
	c, fc := a, fa
	step := b - a
	before := step
	for range 200 {
		if (fb > 0) == (fc > 0) {
			c, fc = a, fa
			step = b - a
			before = step
		}
		if math.Abs(fc) < math.Abs(fb) {
			a, b, c = b, c, b
			fa, fb, fc = fb, fc, fb
		}
		tolerance := 0x1p-52 * math.Abs(b)
		half := (c - b) / 2
		if math.Abs(half) <= tolerance || fb == 0 {
			return b
		}
		if math.Abs(before) < tolerance || math.Abs(fa) <= math.Abs(fb) {
			step, before = half, half
		} else {
			var p, q float64
			s := fb / fa
			if a == c {
				p, q = 2*half*s, 1-s
			} else {
				u, v := fa/fc, fb/fc
				p = s * (2*half*u*(u-v) - (b-a)*(v-1))
				q = (u - 1) * (v - 1) * (s - 1)
			}
			if p > 0 {
				q = -q
			} else {
				p = -p
			}
			if 2*p < math.Min(3*half*q-math.Abs(tolerance*q), math.Abs(before*q)) {
				before, step = step, p/q
			} else {
				step, before = half, half
			}
		}
		a, fa = b, fb
		if math.Abs(step) > tolerance {
			b += step
		} else {
			b += math.Copysign(tolerance, half)
		}
		fb = f(b)
	}
	return b
}

package disc

import "math"

// RadialRule fills r and w, of equal length n, with the Gauss rule
//
//	integral_0^1 f(r) (1-r^2)^alpha r dr  ~  sum over i of w[i] f(r[i]),
//
// exact when f is a polynomial in r^2 of degree 2n-1 or less. Radii rise from
// the centre to the rim, neither of which is one of them. alpha = 0 is the rule
// of every Grid; alpha = 1/2 and 1 serve integrals with the rim factor of a
// polynomial family. Nodes are good to about 2e-16, weights to about 1e-13
// of their size (alpha = 0) for n up to 1000; see TestRadialRuleMoments.
//
// It panics unless n >= 1 and -1 < alpha <= 2.
func RadialRule(r, w []float64, alpha float64) {
	n := len(r)
	if len(w) != n {
		panic(errLength)
	}
	if n < 1 || !(alpha > -1 && alpha <= 2) {
		panic(errRule)
	}
	// With t = r^2 this is the Gauss-Jacobi rule of P_n^(0,alpha)(1-2t) on
	// 0 < t < 1; dt = 2 r dr. Nodes by Newton's method from the leading term
	// of their expansion (DLMF 18.16.8), in the variable t, in which the
	// recurrence of differences keeps relative accuracy near the centre.
	// Weights: DLMF 3.5.26 with the derivative from DLMF 18.9.17.
	rule := jacobiRule{n: n, alpha: alpha}
	prev := 0.0
	for i := range r {
		half := math.Pi * (float64(i) + 0.75) / (2*float64(n) + 1 + alpha)
		t := math.Sin(half)
		t *= t
		for range 20 {
			p, dp, _ := rule.at(t)
			step := p / dp
			t -= step
			if math.Abs(step) < 0x1p-40*t*(1-t) {
				break // quadratic: the next step would be below rounding
			}
		}
		if !(t > prev && t < 1) {
			panic("disc: radial rule lost a node") // excluded by TestRadialRuleNodes
		}
		prev = t
		_, _, q := rule.at(t)
		fn, fb := float64(n), float64(n)+alpha
		g := (fn + fb) / (fn * fb * q)
		r[i] = math.Sqrt(t)
		w[i] = 0.5 * t * (1 - t) * g * g
	}
}

// jacobiRule evaluates P_n^(0,alpha)(1-2t).
type jacobiRule struct {
	n     int
	alpha float64
}

// at returns P_n, its derivative in t, and P_{n-1}.
func (j jacobiRule) at(t float64) (p, dp, q float64) {
	b := j.alpha
	q, p = 1, 1-(b+2)*t
	d := p - q
	for k := 2; k <= j.n; k++ {
		n := float64(k)
		c := (n - 1) * (n + b - 1) * (2*n + b) / (n * (n + b) * (2*n + b - 2))
		e := (2*n + b - 1) * (2*n + b) / (n * (n + b))
		d = c*d - e*t*p
		q, p = p, p+d
	}
	n := float64(j.n)
	// (1-x^2)(2n+b) dP/dx = -n [b + (2n+b) x] P + 2n(n+b) P_{n-1},
	// x = 1-2t, 1-x^2 = 4t(1-t), dP/dt = -2 dP/dx.
	s := 2*n + b
	dp = (n*(b+s*(1-2*t))*p - 2*n*(n+b)*q) / (2 * t * (1 - t) * s)
	return p, dp, q
}

package disc

import "math"

// RadialRule fills r and w, of equal length n, with the Gauss rule
//
//	integral_0^1 f(r) (1-r^2)^alpha r dr  ~  sum over i of w[i] f(r[i]),
//
// exact when f is a polynomial in r^2 of degree 2n-1 or less. Radii rise from
// the centre to the rim, neither of which is one of them. alpha = 0 is the rule
// of every Grid; alpha = 1/2 and 1 serve integrals with the rim factor of a
// polynomial family. For n up to 1000 every integral it makes exact is good to
// 4e-15 of the total weight for alpha = 0 and to 2e-14 otherwise; see
// TestRadialRuleMoments.
//
// It panics unless n >= 1 and 0 <= alpha <= 2.
func RadialRule(r, w []float64, alpha float64) {
	n := len(r)
	if len(w) != n {
		panic(errLength)
	}
	if n < 1 || !(alpha >= 0 && alpha <= 2) {
		panic(errRule)
	}
	// With t = r^2 this is the Gauss-Jacobi rule of P_n^(0,alpha)(1-2t) on
	// 0 < t < 1; dt = 2 r dr. Nodes by Newton's method from the leading term
	// of their expansion (DLMF 18.16(ii)), weights from DLMF 3.5(v) and 18.9.17.
	// The inner half is found in the variable t, the outer half in u = 1-t
	// with the exponents exchanged: each keeps its relative accuracy, which the
	// weights need.
	inner, outer := newJacobiRule(n, 0, alpha), newJacobiRule(n, alpha, 0)
	for i := range r {
		half := math.Pi * (float64(i) + 0.75) / (2*float64(n) + 1 + alpha)
		if half <= math.Pi/4 {
			t, weight := inner.node(math.Sin(half))
			r[i], w[i] = math.Sqrt(t), 0.5*weight
		} else {
			u, weight := outer.node(math.Cos(half))
			r[i], w[i] = math.Sqrt(1-u), 0.5*weight
		}
	}
}

// jacobiRule is P_n^(a,b)(1-2t), scaled to 1 at t = 0; scale is the factor
// taken out, the binomial coefficient of n+a over n.
type jacobiRule struct {
	n           int
	a, b, scale float64
}

func newJacobiRule(n int, a, b float64) jacobiRule {
	c := 1.0
	if a != 0 {
		for k := 1; k <= n; k++ {
			c *= (float64(k) + a) / float64(k)
		}
	}
	return jacobiRule{n: n, a: a, b: b, scale: c}
}

// node improves the zero near t = root^2 and returns it with the weight of
// the rule for (1-t)^b t^a dt, or its mirror image.
func (j jacobiRule) node(root float64) (t, w float64) {
	t = root * root
	for range 20 {
		p, dp, _ := j.at(t)
		step := p / dp
		t -= step
		if math.Abs(step) < 0x1p-35*t {
			break // convergence is quadratic: what is left is below rounding
		}
	}
	_, _, q := j.at(t)
	n := float64(j.n)
	g := (2*n + j.a + j.b) / (n * (n + j.b) * j.scale * q)
	return t, t * (1 - t) * g * g
}

// at returns P_n, its derivative in t and P_{n-1} times n/(n+a), all over
// scale. Near t = 0 the values are close to 1, so the recurrence runs on their
// differences, which keeps small zeros relatively accurate.
func (j jacobiRule) at(t float64) (p, dp, q float64) {
	// From DLMF 18.9.1-2, with P_k divided by its value at t = 0.
	a, b := j.a, j.b
	q, p = 1, 1
	var d float64
	for k := 1; k <= j.n; k++ {
		n := float64(k)
		s := 2*n + a + b
		var c float64
		if k > 1 {
			c = (n - 1) * (n + b - 1) * s / ((n + a) * (n + a + b) * (s - 2))
		}
		e := (s - 1) * s / ((n + a) * (n + a + b))
		d = c*d - e*t*p
		q, p = p, p+d
	}
	// (1-x^2) s dP/dx = n [a-b - s x] P + 2 (n+a)(n+b) P_{n-1},
	// x = 1-2t, 1-x^2 = 4t(1-t), dP/dt = -2 dP/dx.
	n := float64(j.n)
	s := 2*n + a + b
	dp = -(n*(a-b-s*(1-2*t))*p + 2*n*(n+b)*q) / (2 * t * (1 - t) * s)
	return p, dp, q
}

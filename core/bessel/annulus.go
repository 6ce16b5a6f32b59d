package bessel

import "math"

// Edge is the condition that a solution C_m(k r) satisfies at one edge of an
// annulus.
type Edge int

const (
	Dirichlet Edge = iota // the value vanishes: a clamped edge
	Neumann               // the slope vanishes: a free edge
)

// ZeroAnnulus returns the n-th positive root x of
//
//	J_m(x) Y_m(q x) - J_m(q x) Y_m(x) = 0,   0 < q < 1, n >= 1,
//
// that is x = k a for an annulus of outer radius a and inner radius q a clamped
// at both edges. NaN outside the domain; m counts by its modulus. Accurate to
// 2 ulp times max(1, q/(1-q)), by which the root amplifies a relative change of
// q, for 0.01 <= q <= 0.99; see TestAccuracy in package accuracy.
func ZeroAnnulus(m int, q float64, n int) float64 {
	return ZeroAnnulusEdges(m, q, n, Dirichlet, Dirichlet)
}

// ZeroAnnulusPrime returns the n-th positive root x of
//
//	J'_m(x) Y'_m(q x) - J'_m(q x) Y'_m(x) = 0,
//
// otherwise as ZeroAnnulus: the annulus free at both edges. The root 0 of
// m = 0, a constant, is not counted.
func ZeroAnnulusPrime(m int, q float64, n int) float64 {
	return ZeroAnnulusEdges(m, q, n, Neumann, Neumann)
}

// ZeroAnnulusEdges returns the n-th positive root for any pair of conditions at
// the outer edge x and the inner edge q x, otherwise as ZeroAnnulus.
func ZeroAnnulusEdges(m int, q float64, n int, outer, inner Edge) float64 {
	if m < 0 {
		m = -m
	}
	if !(q > 0 && q < 1) || n < 1 || !validOrder(float64(m)) {
		return math.NaN()
	}
	// With the phases theta of J + iY and phi of J' + iY', both continuous and
	// starting at -pi/2 and pi/2, the cross product vanishes where the phase
	// at the outer edge is a multiple of pi ahead of that at the inner edge.
	// Which one follows from the limit x = 0: values at both edges start from
	// 0 and rise; slope outside starts pi higher and first falls back, since
	// phi falls up to the turning point (or theta_0 rises as 1/log); slope
	// inside starts pi lower. Slopes at both edges first fall from 0 for
	// m > 0, but rise at once for m = 0.
	turns := n
	if inner == Neumann && (outer == Dirichlet || m > 0) {
		turns = n - 1
	}
	a := annulus{float64(m), q, outer, inner, float64(turns) * math.Pi, turns&1 == 1}
	return a.solve()
}

// annulus is the equation phase(x) - phase(q x) = target.
type annulus struct {
	m, q         float64
	outer, inner Edge
	target       float64 // a multiple of pi
	odd          bool    // an odd one
}

// roughPhase is the leading term of Debye's phase, constant below the turning
// point: within 0.8 of the phase, in either of its kinds.
func roughPhase(m, x float64, e Edge) float64 {
	below, shift := -math.Pi/2, -math.Pi/4
	if e == Neumann {
		below, shift = math.Pi/2, math.Pi/4
	}
	switch {
	case m == 0:
		return x + shift
	case x <= m:
		return below
	}
	return math.Sqrt((x-m)*(x+m)) - m*math.Acos(m/x) + shift
}

func (a *annulus) rough(x float64) float64 {
	return roughPhase(a.m, x, a.outer) - roughPhase(a.m, a.q*x, a.inner) - a.target
}

// solve brackets the root by the rough phase, then takes Newton steps on the
// phase proper, falling back to halving the bracket.
func (a *annulus) solve() float64 {
	// No root lies below m: the Rayleigh quotient of u^2 m^2/r^2 is at least
	// m^2 for r <= 1. The phase difference is below its target there.
	lo := a.m
	hi := a.m + (a.target+2*math.Pi)/(1-a.q) + 1
	for a.rough(hi) < math.Pi { // the rough phase is good to 1.6
		hi *= 2
	}
	x := a.start(lo, hi)
	for range 100 {
		d, slope := a.residual(x)
		if d > 0 {
			hi = x
		} else {
			lo = x
		}
		next := x - d/slope
		if !(next > lo && next < hi) {
			// At the end of the search d is rounding and the step leaves the
			// bracket by next to nothing.
			if math.Abs(next-x) < 1e-14*x {
				return next
			}
			next = 0.5 * (lo + hi)
		}
		if math.Abs(next-x) < 1e-9*x {
			return a.polish(next)
		}
		x = next
	}
	return x
}

// polish takes the last step from a start good to nine digits.
func (a *annulus) polish(x float64) float64 {
	d, slope := a.residual(x)
	return x - d/slope
}

// start finds the root of the rough equation.
func (a *annulus) start(lo, hi float64) float64 {
	for range 60 {
		mid := 0.5 * (lo + hi)
		if a.rough(mid) < 0 {
			lo = mid
		} else {
			hi = mid
		}
		if hi-lo < 1e-4*hi*(1-a.q) {
			break
		}
	}
	return 0.5 * (lo + hi)
}

// residual returns the phase difference less its target, and its derivative.
func (a *annulus) residual(x float64) (d, slope float64) {
	// The inner argument is y + e exactly.
	y, e := twoProd(a.q, x)
	co, so, po := unitPhase(a.m, x, a.outer)
	ci, si, pi := unitPhase(a.m, y, a.inner)
	p, pe := twoProd(so, ci)
	r, re := twoProd(co, si)
	s, c := (p-r)+(pe-re), co*ci+so*si
	if a.odd {
		s, c = -s, -c
	}
	d = math.Atan2(s, c)
	d += 2 * math.Pi * math.Round((a.rough(x)-d)/(2*math.Pi))
	return d - e*pi, po - a.q*pi
}

// unitPhase returns cosine, sine and derivative of the phase of J + iY or of
// J' + iY' at x > 0.
func unitPhase(m, x float64, e Edge) (c, s, slope float64) {
	jh, jl, j1h, j1l := jPair(m, x)
	yh, yl, y1h, y1l := yPair(m, x)
	weight := 1.0
	if e == Neumann {
		qh, ql := divDD(m, 0, x, 0)
		jh, jl = lessDD(qh, ql, jh, jl, j1h, j1l)
		yh, yl = lessDD(qh, ql, yh, yl, y1h, y1l)
		weight = (x - m) * (x + m) / (x * x)
	}
	// Y carries 2^-growScale. Where it leaves the range, so that J is nothing
	// beside it, the phase stands still.
	y := yh + yl
	if math.IsNaN(y) || math.Abs(y) > 0x1p100 {
		if e == Neumann {
			return 0, 1, 0
		}
		return 0, -1, 0
	}
	y = math.Ldexp(y, growScale)
	j := jh + jl
	modulus := math.Hypot(j, y)
	return j / modulus, y / modulus, weight * 2 / (math.Pi * x) / modulus / modulus
}

package response

import (
	"math"
	"testing"
)

func TestFundamentalSolutions(t *testing.T) {
	// Against the sum of the power series of exp(A x), A = [0 1; -1 -2 zeta],
	// whose terms grow to exp(|A| x): for |A| x < 6 the sum errs by less than
	// 400 units of 1e-16.
	for _, zeta := range []float64{0, 1e-9, 0.02, 0.5, 0.999999, 1, 1.000001, 1.5} {
		for _, x := range []float64{0, 1e-6, 0.1, 1, 1.4} {
			c, s := fundamental(1, zeta, x)
			wantC, wantS := exponential(zeta, x)
			if math.Abs(c-wantC) > 4e-14 || math.Abs(s-wantS) > 4e-14 {
				t.Errorf("zeta %v, x %v: %v %v, want %v %v", zeta, x, c, s, wantC, wantS)
			}
		}
	}
}

// exponential returns the first row of exp(A x) by its power series.
func exponential(zeta, x float64) (c, s float64) {
	row := [2]float64{1, 0}
	c = 1
	for k := 1; k < 60; k++ {
		f := x / float64(k)
		row = [2]float64{-row[1] * f, (row[0] - 2*zeta*row[1]) * f}
		c += row[0]
		s += row[1]
	}
	return c, s
}

func TestFundamentalLimits(t *testing.T) {
	// Undamped, critical and heavily overdamped, in closed form.
	for _, x := range []float64{0, 0.3, 5, 40, 1e4} {
		if c, s := fundamental(1, 0, x); c != math.Cos(x) || s != math.Sin(x) {
			t.Errorf("undamped at %v: %v %v", x, c, s)
		}
		c, s := fundamental(1, 1, x)
		decay := math.Exp(-x)
		if math.Abs(c-decay*(1+x)) > 1e-15*(1+x) || math.Abs(s-decay*x) > 1e-15*(1+x) {
			t.Errorf("critical at %v: %v %v", x, c, s)
		}
		// c -> exp(-x/(2 zeta)) up to 1/(2 zeta)^2 for zeta -> infinity.
		const zeta = 1e4
		if c, _ := fundamental(1, zeta, x); math.Abs(c-math.Exp(-x/(2*zeta))) > 1/(2*zeta*2*zeta)*2 {
			t.Errorf("overdamped at %v: %v", x, c)
		}
		// The switch at zeta = 1: the solutions vary with zeta by at most 2x
		// times their size there (d/dzeta of exp(A x)).
		below, sb := fundamental(1, math.Nextafter(1, 0), x)
		above, sa := fundamental(1, math.Nextafter(1, 2), x)
		if math.Abs(below-c) > 1e-14 || math.Abs(above-c) > 1e-14 || math.Abs(sb-s) > 1e-14 || math.Abs(sa-s) > 1e-14 {
			t.Errorf("jump at critical damping, x = %v", x)
		}
	}
	if c, s := fundamental(30, 90, 1e6); c < 0 || s < 0 || c > 1 || s > 1 {
		t.Errorf("long after, overdamped: %v %v", c, s)
	}
}

var (
	someBump  = Shape{Kind: ShapeBump, Peak: 1, Radius: 0.35, Angle: 0.8, Width: 0.4}
	somePatch = Shape{Kind: ShapePatch, Peak: 1, Radius: 0.5, Angle: -2, Width: 0.25}
)

func TestEnergyIsConstant(t *testing.T) {
	mo := series(t, 12, 12, 0, someBump, somePatch)
	u, k := mo.energy(0)
	start := u + k
	for _, at := range []float64{0.01, 0.5, 3, 20, 100} {
		u, k := mo.energy(at)
		if math.Abs(u+k-start) > 1e-12*start {
			t.Errorf("energy at %v is %.16g, at 0 %.16g", at, u+k, start)
		}
	}
	damped := series(t, 12, 12, 0.03, someBump, somePatch)
	before := math.Inf(1)
	for _, at := range []float64{0, 0.01, 0.5, 3, 20} {
		u, k := damped.energy(at)
		if u+k >= before {
			t.Errorf("the energy grows to %v at %v", u+k, at)
		}
		before = u + k
	}
}

func TestStepperAgainstDirect(t *testing.T) {
	// Rounding grows by a unit in the last place a step.
	const steps = 2000
	for _, zeta := range []float64{0, 0.01, 1, 2} {
		a := newStepper(7, zeta, 0.013)
		c, s := 1.0, 0.0
		for range steps {
			c, s = a.next(c, s)
		}
		wantC, wantS := fundamental(7, zeta, steps*0.013)
		if math.Abs(c-wantC) > steps*2.3e-16 || math.Abs(s-wantS) > steps*2.3e-16 {
			t.Errorf("zeta %v: %v %v, want %v %v", zeta, c, s, wantC, wantS)
		}
	}
}

func TestProbeSlopes(t *testing.T) {
	// Central differences over h of the next lower derivative: error h^2/6 of
	// the third derivative of w (omega up to 27, so at most 27^3 w) beside
	// 1e-16/h of rounding times omega^2.
	const h = 1e-5
	mo := series(t, 5, 6, 0.05, someBump, somePatch)
	near := func(what string, at [3]float64, got, want float64) {
		t.Helper()
		if math.Abs(got-want) > 3e-6 {
			t.Errorf("%s at %v: %.10g, differences %.10g", what, at, got, want)
		}
	}
	for _, at := range [][3]float64{{0, 0, 0.3}, {1e-7, 0, 1}, {0.3, -0.4, 0}, {-0.8, 0.1, 2}, {0, 0.9, 5}} {
		p := mo.probe(at[0], at[1], at[2])
		second := [3][3]float64{{p.dd[0], p.dd[1], p.dd[3]}, {p.dd[1], p.dd[2], p.dd[4]}, {p.dd[3], p.dd[4], p.dd[5]}}
		for i := range 3 {
			up, down := at, at
			up[i] += h
			down[i] -= h
			above, below := mo.probe(up[0], up[1], up[2]), mo.probe(down[0], down[1], down[2])
			near("slope", at, p.d[i], (above.w-below.w)/(2*h))
			for k := range 3 {
				near("curvature", at, second[i][k], (above.d[k]-below.d[k])/(2*h))
			}
		}
	}
}

func TestReciprocity(t *testing.T) {
	// The answer at B to a blow at A is that at A to the same blow at B: every
	// mode enters by its product at both places.
	a, b := Point{0.3, 1}, Point{0.62, -2.2}
	blow := func(at Point) Shape {
		return Shape{Kind: ShapePatch, Radius: at.Radius, Angle: at.Angle, Width: 0.1}
	}
	fromA := series(t, 14, 14, 0.01, Shape{Kind: ShapeRest}, blow(a))
	fromB := series(t, 14, 14, 0.01, Shape{Kind: ShapeRest}, blow(b))
	for _, at := range []float64{0.4, 1, 2.7} {
		ab := fromA.probe(b.Radius*math.Cos(b.Angle), b.Radius*math.Sin(b.Angle), at).w
		ba := fromB.probe(a.Radius*math.Cos(a.Angle), a.Radius*math.Sin(a.Angle), at).w
		// 420 terms of at most 1e-2, each to a few units in the last place.
		if math.Abs(ab-ba) > 1e-14 {
			t.Errorf("at %v: %v one way, %v the other", at, ab, ba)
		}
	}
}

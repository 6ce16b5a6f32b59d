package tap

import (
	"math"
	"testing"
)

// TestCurveCubics: a cubic that rises gently comes back as it is, with slopes
// from five knots; a parabola has no estimated error but the least.
func TestCurveCubics(t *testing.T) {
	x := []float64{0, 0.4, 1, 1.3, 2, 2.8, 3}
	f := func(x float64) float64 { return 0.3 + x + 0.05*x*x - 0.01*x*x*x }
	slope := func(x float64) float64 { return 1 + 0.1*x - 0.03*x*x }
	y := make([]float64, len(x))
	for i := range x {
		y[i] = f(x[i])
	}
	k := newCurve(x, y, make([]float64, len(x)))
	for c := 0.0; c <= 3; c += 0.07 {
		got, rise := k.at(placeOf(x, c))
		if math.Abs(got-f(c)) > 1e-14 || math.Abs(rise-slope(c)) > 1e-13 { // rounding of sums of terms of size 3
			t.Errorf("at %g: %.16g, slope %.16g; want %.16g, %.16g", c, got, rise, f(c), slope(c))
		}
		if back := k.inverse(got, beyondKnots); math.Abs(back-c) > 1e-12 {
			t.Errorf("%g comes back as %g", c, back)
		}
	}
	// Beyond the knots, the straight line, and no further than allowed.
	if got, _ := k.at(placeOf(x, 5)); math.Abs(got-(f(3)+2*slope(3))) > 1e-13 {
		t.Errorf("beyond the knots %g", got)
	}
	if got, _ := k.at(placeOf(x, -1)); math.Abs(got-(f(0)-slope(0))) > 1e-13 {
		t.Errorf("before the knots %g", got)
	}
	if got := k.inverse(f(3)+2*slope(3), beyondKnots); math.Abs(got-5) > 1e-12 {
		t.Errorf("back from beyond: %g", got)
	}
	if got := k.inverse(1e6, beyondKnots); got != 3+beyondKnots {
		t.Errorf("back from far beyond: %g", got)
	}
	for i := range y {
		y[i] = 1 + x[i] + 0.01*x[i]*x[i]
	}
	for i, e := range newCurve(x, y, make([]float64, len(x))).e {
		if math.Abs(e-leastDoubt) > 1e-15 {
			t.Errorf("interval %d of a parabola: error estimated as %g", i, e)
		}
	}
}

// TestCurveBends: whatever rises stays rising, with bends and plateaus as where
// a mode of the sheet meets one of a cavity. The estimated error is taken for a
// standard deviation, so that twice it has to cover the worst.
func TestCurveBends(t *testing.T) {
	for name, f := range map[string]func(float64) float64{
		"bend":    func(x float64) float64 { return min(x, 1.37) },
		"plateau": func(x float64) float64 { return min(x, 1.1) + max(0, x-1.9) },
		"rounded": func(x float64) float64 { return x/2 - math.Sqrt((x-1.6)*(x-1.6)+0.01)/2 },
	} {
		x := []float64{0, 0.3, 0.6, 0.9, 1.2, 1.5, 1.8, 2.1, 2.4, 2.7}
		y := make([]float64, len(x))
		for i := range x {
			y[i] = f(x[i])
		}
		k := newCurve(x, y, make([]float64, len(x)))
		last := math.Inf(-1)
		for c := 0.0; c <= 2.7; c += 0.01 {
			p := placeOf(x, c)
			got, slope := k.at(p)
			if got < last-1e-15 || slope < -1e-12 {
				t.Errorf("%s falls at %g", name, c)
			}
			last = got
			if e := math.Abs(got - f(c)); e > 2*k.doubt(p) {
				t.Errorf("%s at %g: off by %g, estimated %g", name, c, e, k.doubt(p))
			}
		}
	}
}

// TestCurveEndsEarly: a mode above the frequencies wanted has fewer knots.
func TestCurveEndsEarly(t *testing.T) {
	x := []float64{0, 1, 2, 3}
	k := newCurve(x[:2], []float64{5, 6.5}, []float64{0, 1e-3})
	for c, want := range map[float64]float64{-1: 3.5, 0.5: 5.75, 1: 6.5, 1.5: 7.25, 2.5: 8.75, 4: 11} {
		if got, slope := k.at(placeOf(x, c)); math.Abs(got-want) > 1e-14 || math.Abs(slope-1.5) > 1e-14 {
			t.Errorf("at %g: %g with slope %g", c, got, slope)
		}
		if got := k.inverse(want, beyondKnots); math.Abs(got-c) > 1e-12 {
			t.Errorf("%g comes back as %g", c, got)
		}
	}
	if got := k.doubt(placeOf(x, 2.5)); got != 1e-3+leastDoubt {
		t.Errorf("error %g: what the values state is kept", got)
	}
}

package response

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

// mixedCase is a sheet in a heavy fluid with uneven tension.
func mixedCase(t *testing.T, epsilon float64, patches ...modes.Patch) (*Case, *Wet) {
	t.Helper()
	sheet := heavy(diaphragm.FaceBaffled, 2)
	still := solved(t, sheet, stillFluid, 12, 8)
	low := solved(t, sheet, stillFluid, 12, 4)
	coupled, err := modes.SolveCoupled(low, modes.Uneven{Field: modes.SlidingHarmonic(2, epsilon, 0.3), Patches: patches})
	if err != nil {
		t.Fatal(err)
	}
	even := NewWet(still, nil, true, 12, 8)
	wet := NewMixed(coupled, even, sheet.Tension)
	return wetCase(sheet, wet, 12, 8, Shape{Kind: ShapeRest}, Shape{Kind: ShapeRest}), even
}

func TestNearlyEvenIsEven(t *testing.T) {
	// A tension uneven by 1e-7 changes frequencies by no more, and so a motion at
	// 10 a/c by 10 times the fastest frequency (below 8) of that; the displacement
	// let go is split by another set of the same span. The modes of coupled
	// diaphragms are computed to some 1e-8.
	c, even := mixedCase(t, 1e-7)
	for _, source := range []Source{
		{Kind: SourceDisplacement, Shape: someBump},
		{Kind: SourceBlow, Momentum: 0.1, Shape: Shape{Kind: ShapeBump, Radius: 0.4, Angle: 2, Width: 0.4}},
		{Kind: SourcePressure, Shape: Shape{Kind: ShapeHalf, Angle: 1, Peak: 1}, Pulse: &Pulse{Kind: PulseTriangle, Duration: 1}},
		{Kind: SourceVelocity, Shape: someBump},
	} {
		c.Sources = []Source{source}
		other := *c
		other.Wet = even
		mixed, plain := started(t, c).moves, started(t, &other).moves
		for _, at := range [][3]float64{{0, 0, 0}, {0.3, 0.3, 1}, {-0.5, 0.6, 4}, {0.1, -0.8, 10}} {
			got, want := mixed.probe(at[0], at[1], at[2]).w, plain.probe(at[0], at[1], at[2]).w
			if math.Abs(got-want) > 2e-5*plain.reach(0) {
				t.Errorf("%s at %v: %v, even %v", source.Kind, at, got, want)
			}
		}
	}
}

func TestMixedModesAreReciprocal(t *testing.T) {
	c, _ := mixedCase(t, 0.2, modes.Patch{Distance: 0.3, Angle: -1, Radius: 0.1, Mass: 0.3})
	seen := func(source, receiver Shape, at float64) float64 {
		c.Sources = []Source{{Kind: SourceImpulse, Shape: source}}
		mo := started(t, c).moves
		coef := make([]float64, mo.basis.Len())
		mo.values(coef, at, 0)
		return contactOf(t, mo.basis, receiver, coef)
	}
	a := Shape{Kind: ShapeBump, Peak: 1, Radius: 0.3, Angle: 1, Width: 0.25}
	b := Shape{Kind: ShapeBump, Peak: 1, Radius: 0.6, Angle: -2.2, Width: 0.25}
	for _, at := range []float64{0.7, 2, 5.5} {
		ab, ba := seen(a, b, at), seen(b, a, at)
		if math.Abs(ab-ba) > 1e-12*(math.Abs(seen(a, a, at))+math.Abs(seen(b, b, at))) {
			t.Errorf("at %v: %v one way, %v the other", at, ab, ba)
		}
	}
	// What is let go is the shape, to what the modes miss: the strain they miss
	// bounds the displacement off the centre as for a cavity (Cauchy and Schwarz),
	// with ln(1/r)/(2 pi) for rotational symmetry about a centre; here a bound of
	// twice that stands for all orders up to 12.
	c.Sources = []Source{{Kind: SourceDisplacement, Shape: Shape{Kind: ShapeBump, Peak: 1, Radius: 0.2, Angle: 1, Width: 0.7}}}
	s := started(t, c)
	if missed := s.list[0].note.Missed; missed > 0.01 {
		t.Errorf("missed %v", missed)
	}
	f := s.list[0].form
	for _, at := range []Point{{0.2, 1}, {0.5, 2}, {0.6, -2}} {
		got := s.moves.probe(at.Radius*math.Cos(at.Angle), at.Radius*math.Sin(at.Angle), 0).w
		if want := f.at(at.Radius, at.Angle); math.Abs(got-want) > 2*math.Sqrt(s.list[0].left) {
			t.Errorf("at %v: starts at %v, shape %v", at, got, want)
		}
	}
	// Energy of modes, and a body on top.
	c.Sources = append(c.Sources, Source{Kind: SourceBody, At: 1, Shape: contact, Mass: 0.2, Speed: 1, Stays: true})
	mo := started(t, c).moves
	for _, from := range []float64{0, 1} {
		u, k := mo.energy(from)
		for _, later := range []float64{0.5, 0.99} {
			if du, dk := mo.energy(from + later); math.Abs(du+dk-u-k) > 1e-10*(u+k) {
				t.Errorf("energy %v, at %v %v", u+k, from+later, du+dk)
			}
		}
	}
	respond(t, c)
}

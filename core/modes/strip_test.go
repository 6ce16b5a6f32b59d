package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

// Against a Ritz solution with functions broken at the edges of the strip
// (testdata/uneven/make.py).
func TestStripReference(t *testing.T) {
	s := drySolution(t, 12, 6)
	for _, row := range readUnevenReference(t).Strip {
		if row.Change > 1e-7 {
			t.Fatalf("the reference is converged to %g only", row.Change)
		}
		c := coupled(t, s, Uneven{Strips: []Strip{{Offset: row.Offset, Angle: 0.4, Width: row.Width, Mass: row.Mass}}})
		for i, want := range row.K[:6] {
			got, e := wave(c.Modes[i]), c.Modes[i].Error/c.Modes[i].Frequency
			d := math.Abs(got/want - 1)
			// Five digits; less for a third of the sheet's weight on a tenth of its
			// width, across which the sixth mode has a fifth of a wave.
			limit := 1e-5
			if row.Mass > 0.5 {
				limit = 2e-4
			}
			if d > limit {
				t.Errorf("%+v mode %d: %.10f, want %.10f: %.1e", row, i, got, want, d)
			}
			if d > e+1e-8 {
				t.Errorf("%+v mode %d: errs by %.1e, estimate %.1e", row, i, d, e)
			}
		}
	}
}

// First order, by the mean of the squared shape over the band.
func TestStripLight(t *testing.T) {
	s := drySolution(t, 4, 3)
	const mass, width, offset = 1e-6, 0.1, 0.3
	mode := coupled(t, s, Uneven{Strips: []Strip{{Offset: offset, Angle: 2, Width: width, Mass: mass}}}).pair(0, 1)[0]
	j := bessel.ZeroJ(0, 1)
	sum, area := 0.0, 0.0
	for i := range 100 {
		x := offset + width*((float64(i)+0.5)/100-0.5)
		half := math.Sqrt(1 - x*x)
		for k := range 400 {
			y := half * (2*(float64(k)+0.5)/400 - 1)
			sum += half * square(bessel.JInt(0, j*math.Hypot(x, y)))
			area += half
		}
	}
	want := -mass / 2 * sum / area / (math.Pi * square(bessel.JInt(1, j)))
	if got := mode.Frequency/mode.Even - 1; math.Abs(got/want-1) > 2e-5 {
		t.Errorf("shift %v, want %v", got, want)
	}
}

// The rule and the polynomials along a strip.
func TestStripPolynomials(t *testing.T) {
	x, w := legendre(30)
	for p := range 59 {
		sum := 0.0
		for i, v := range x {
			sum += w[i] * math.Pow(v, float64(p))
		}
		want := 0.0
		if p%2 == 0 {
			want = 2 / float64(p+1)
		}
		if math.Abs(sum-want) > 1e-14 {
			t.Errorf("power %d: %v, want %v", p, sum, want)
		}
	}
	list := vanishing(12, x)
	for k := range list {
		for l := range list {
			sum := 0.0
			for i := range x {
				sum += w[i] / 2 * list[k][i] * list[l][i]
			}
			want := 0.0
			if k == l {
				want = 1
			}
			if math.Abs(sum-want) > 1e-13 {
				t.Errorf("polynomials %d and %d: %v", k, l, sum)
			}
		}
	}
}

// The mean of the logarithm across a strip against a sum over both places.
func TestStripAcross(t *testing.T) {
	s := &stripLine{width: 0.2}
	x, w := legendre(40)
	for _, u := range []float64{0.05, 0.2, 1} {
		even, odd := 0.0, 0.0
		for i, v := range x {
			for j, z := range x {
				g := -w[i] * w[j] / 4 * math.Log(math.Hypot(u, 0.1*(v-z))) / (2 * math.Pi)
				even += g
				odd += g * linear(1, v) * linear(1, z)
			}
		}
		gotEven, gotOdd := s.across(u)
		// The sum is Gauss's, geometric in u/width; at 0.05 it leaves 1e-9.
		if math.Abs(gotEven-even) > 1e-8 || math.Abs(gotOdd-odd) > 1e-8 {
			t.Errorf("u=%v: %v and %v, want %v and %v", u, gotEven, gotOdd, even, odd)
		}
	}
}

// Figures relative to the frequency do not depend on the units: the same
// diaphragm with another radius, tension and areal density has the same ones.
func TestAttachedInOtherUnits(t *testing.T) {
	const radius, tension, sigma = 0.45, 310, 0.07
	masses := func(a, weight float64) Uneven {
		return Uneven{
			Patches: []Patch{{Distance: 0.4 * a, Angle: 1, Radius: 0.05 * a, Mass: 0.06 * weight}, {Distance: 0.5 * a, Angle: 4, Radius: 0.05 * a, Mass: 0.02 * weight, Rigid: true}},
			Strips:  []Strip{{Offset: 0.3 * a, Angle: 2, Width: 0.05 * a, Mass: 0.1 * weight}},
		}
	}
	one := coupled(t, solve(t, Real{Radius: 1, Tension: 1, ArealDensity: 1}, Request{MaxM: 6, MaxN: 3}), masses(1, 1))
	other := coupled(t, solve(t, Real{Radius: radius, Tension: tension, ArealDensity: sigma}, Request{MaxM: 6, MaxN: 3}), masses(radius, sigma*radius*radius))
	scale := math.Sqrt(tension/sigma) / radius
	for i := range 12 {
		a, b := one.Modes[i], other.Modes[i]
		// Frequencies to rounding of the solution, estimates as far as that reaches
		// them.
		if math.Abs(b.Frequency/a.Frequency/scale-1) > 1e-9 {
			t.Errorf("mode %d: %v, want %v", i, b.Frequency, a.Frequency*scale)
		}
		if x, y := a.Error/a.Frequency, b.Error/b.Frequency; math.Abs(x-y) > 1e-3*x+1e-9 || x > 1e-2 {
			t.Errorf("mode %d: relative errors %v and %v", i, x, y)
		}
	}
}

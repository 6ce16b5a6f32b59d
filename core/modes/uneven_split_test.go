package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

// firstOrderSplit is the split of (m, n) per amplitude by a field, from the
// strain energy of the Bessel shapes, by quadrature: half the difference of the
// two over that under even tension.
func firstOrderSplit(field Field, m, n int) float64 {
	j := bessel.ZeroJ(float64(m), n)
	x, w := legendre(60)
	const turns = 64
	var energy [2]float64
	even := 0.0
	for i, v := range x {
		r := (1 + v) / 2
		u, slope := bessel.JInt(m, j*r), j*bessel.JPrime(float64(m), j*r)
		for k := range turns {
			theta := 2 * math.Pi * float64(k) / turns
			s, c := math.Sincos(float64(m) * theta)
			rr, tt, rt := field.At(r, theta)
			weight := w[i] * r
			for side, trig := range [2][2]float64{{c, -s}, {s, c}} {
				wr, wt := slope*trig[0], float64(m)*u/r*trig[1]
				energy[side] += weight * (rr*wr*wr + tt*wt*wt + 2*rt*wr*wt)
				if side == 0 {
					even += weight * (wr*wr + wt*wt)
				}
			}
		}
	}
	return (energy[0] - energy[1]) / even / 2
}

// Harmonic k splits only m = k/2 to first order.
func TestSplitFirstOrder(t *testing.T) {
	s := drySolution(t, 9, 3)
	const eps = 1e-5
	for k := 2; k <= 6; k++ {
		for name, field := range map[string]Field{
			"sliding": SlidingHarmonic(k, eps, 0),
			"bonded":  BondedHarmonic(k, eps, 0, 0.3),
		} {
			c := coupled(t, s, Uneven{Field: field})
			for m := 1; m <= 4; m++ {
				for n := 1; n <= 3; n++ {
					pair := c.pair(m, n)
					got := pair[0].Split / eps
					if 2*m != k {
						// Second order: eps over gaps no less than 1 % of omega^2.
						if got > 100*eps {
							t.Errorf("%s k=%d: (%d,%d) splits by %g", name, k, m, n, got)
						}
						continue
					}
					want := firstOrderSplit(field, m, n) / eps
					// Second order again, and the quadrature to 1e-10 over eps.
					if math.Abs(got-want) > 1e-4 {
						t.Errorf("%s k=%d: (%d,%d) splits by %v, want %v", name, k, m, n, got, want)
					}
					if name == "sliding" {
						// Independent of n without shear at the rim.
						if f := float64(m); math.Abs(want-(4*f-1)/(2*(4*f*f-1))) > 1e-8 {
							t.Errorf("k=%d: (%d,%d) splits by %v", k, m, n, want)
						}
					}
					// Tension is high along theta = 0: the upper mode moves there.
					if angle := math.Mod(pair[0].NodalAngle+1e-6, math.Pi/float64(m)); angle > 1e-5 {
						t.Errorf("%s k=%d: the lower (%d,%d) has a nodal line at %v", name, k, m, n, angle)
					}
				}
			}
		}
	}
}

// At second order k = 2 splits (2,1) through (0,2), and k = 3 splits only m = 3;
// m = 0 shifts.
func TestSplitSecondOrder(t *testing.T) {
	s := drySolution(t, 9, 3)
	for _, c := range []struct{ k, m int }{{2, 2}, {3, 3}} {
		a := coupled(t, s, Uneven{Field: SlidingHarmonic(c.k, 0.01, 0)})
		b := coupled(t, s, Uneven{Field: SlidingHarmonic(c.k, 0.005, 0)})
		x, y := a.pair(c.m, 1)[0].Split, b.pair(c.m, 1)[0].Split
		if x < 1e-6 || math.Abs(x/y-4) > 0.02 {
			t.Errorf("k=%d: (%d,1) splits by %g and %g", c.k, c.m, x, y)
		}
		x, y = a.pair(0, 2)[0].Frequency/a.pair(0, 2)[0].Even-1, b.pair(0, 2)[0].Frequency/b.pair(0, 2)[0].Even-1
		if x == 0 || math.Abs(x/y-4) > 0.03 {
			t.Errorf("k=%d: (0,2) shifts by %g and %g", c.k, x, y)
		}
	}
	a := coupled(t, s, Uneven{Field: SlidingHarmonic(3, 0.02, 0)})
	for _, m := range []int{1, 2, 4, 5} {
		if x := a.pair(m, 1)[0].Split; x > 1e-12 {
			t.Errorf("k=3: (%d,1) splits by %g", m, x)
		}
	}
	// Second-order perturbation of (2,1) by its closest neighbour (0,2) alone gives
	// the sign: (0,2) lies above and only the cosine couples, which is pushed down.
	if pair := coupled(t, s, Uneven{Field: SlidingHarmonic(2, 0.01, 0)}).pair(2, 1); math.Abs(pair[0].NodalAngle-math.Pi/4) > 1e-6 {
		t.Errorf("k=2: the lower (2,1) has a nodal line at %v", pair[0].NodalAngle)
	}
}

// A turned field gives the same frequencies and turned nodal lines; two fields
// whose mirror lines differ leave none.
func TestUnevenTurned(t *testing.T) {
	s := drySolution(t, 8, 2)
	field := append(SlidingHarmonic(2, 0.2, 0.1), SlidingHarmonic(3, 0.15, 0.4)...)
	turned := append(SlidingHarmonic(2, 0.2, 1.1), SlidingHarmonic(3, 0.15, 1.4)...)
	a, b := coupled(t, s, Uneven{Field: field}), coupled(t, s, Uneven{Field: turned})
	for i, mode := range a.Modes[:12] {
		other := b.Modes[i]
		if math.Abs(other.Frequency/mode.Frequency-1) > 1e-10 {
			t.Errorf("mode %d: %v turned, %v", i, other.Frequency, mode.Frequency)
		}
		if mode.M > 0 {
			turn := math.Pi / float64(mode.M)
			if d := wrap(other.NodalAngle-mode.NodalAngle-1+turn/2, turn) - turn/2; math.Abs(d) > 1e-6 {
				t.Errorf("(%d,%d): nodal line at %v and %v", mode.M, mode.N, mode.NodalAngle, other.NodalAngle)
			}
		}
		// Shapes turn too, up to their sign.
		for _, p := range [][2]float64{{0.3, 0.2}, {0.7, 2}, {0.9, 5}} {
			x, y := mode.At(p[0], p[1]), other.At(p[0], p[1]+1)
			if math.Abs(math.Abs(x)-math.Abs(y)) > 0.02 { // the scale is good to 1 %
				t.Errorf("mode %d at %v: %v and %v", i, p, x, y)
			}
		}
	}
}

// An even change of tension, as a field, must do what a change of T does: the
// frequency to first order, whatever the fluid does.
func TestUnevenEvenChange(t *testing.T) {
	const step = 1e-4
	air := Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343}
	cavity := Face{Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343, Depth: 0.2}
	for name, real := range map[string]Real{
		"vacuum":  {Radius: 0.5, Tension: 300, ArealDensity: 0.05},
		"stiff":   {Radius: 0.5, Tension: 300, ArealDensity: 0.05, Stiffness: 0.05},
		"baffled": {Radius: 0.5, Tension: 300, ArealDensity: 0.05, Upper: air, Lower: air},
		"cavity":  {Radius: 0.5, Tension: 300, ArealDensity: 0.05, Lower: cavity},
	} {
		solve := func(factor float64) *Solution {
			r := real
			r.Tension *= factor
			s, err := Solve(r, Request{MaxM: 3, MaxN: 3, Effects: AllEffects()})
			if err != nil {
				t.Fatal(err)
			}
			return s
		}
		even, up, down := solve(1), solve(1+step), solve(1-step)
		c := coupled(t, even, Uneven{Field: Field{{RR: step, TT: step}}})
		for i, mode := range even.Modes {
			var a, b float64
			for _, m := range up.Modes {
				if m.M == mode.M && m.N == mode.N {
					a = m.Frequency
				}
			}
			for _, m := range down.Modes {
				if m.M == mode.M && m.N == mode.N {
					b = m.Frequency
				}
			}
			want := (a - b) / 2 / mode.Frequency
			got := c.pair(mode.M, mode.N)[0].Frequency/mode.Frequency - 1
			// Second order, step^2 times a few; radiation makes shapes complex, which
			// is left out: the imaginary part squared, 1e-3 here with a baffle (1e-2
			// where a cavity and a loud face meet).
			if math.Abs(got-want) > 3e-3*step {
				t.Errorf("%s mode %d (%d,%d): %v per unit, want %v", name, i, mode.M, mode.N, got/step, want/step)
			}
		}
	}
}

// Without unevenness losses come back; with it they mix and stay between those of
// the even modes.
func TestUnevenDamping(t *testing.T) {
	air := Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343, Viscosity: 1.5e-5}
	s, err := Solve(Real{Radius: 0.5, Tension: 300, ArealDensity: 0.05, Stiffness: 1e-3, LossFactor: 0.02, Remainder: 1e-3, Upper: air, Lower: air},
		Request{MaxM: 6, MaxN: 3, Effects: AllEffects()})
	if err != nil {
		t.Fatal(err)
	}
	same := func(x, y float64) bool { return math.Abs(x-y) <= 1e-9*math.Abs(y) }
	for _, mode := range coupled(t, s, Uneven{}).Modes {
		for _, even := range s.Modes {
			if even.M == mode.M && even.N == mode.N {
				d, e := mode.Damping, even.Damping
				if !same(d.Radiation, e.Radiation) || !same(d.Viscous, e.Viscous) || !same(d.Sheet, e.Sheet) || !same(d.Total, e.Total) || !same(d.RingDown, e.RingDown) {
					t.Errorf("(%d,%d): %+v, even %+v", mode.M, mode.N, d, e)
				}
				if !same(mode.Frequency, even.Frequency) {
					t.Errorf("(%d,%d): %v, even %v", mode.M, mode.N, mode.Frequency, even.Frequency)
				}
			}
		}
	}
	// k = 2 mixes the quiet (2,1) with the loud (0,1) and (0,2): the cosine one
	// radiates more than before, the sine one hardly.
	pair := coupled(t, s, Uneven{Field: SlidingHarmonic(2, 0.2, 0)}).pair(2, 1)
	if pair[0].Damping.Radiation < 1.5*pair[1].Damping.Radiation {
		t.Errorf("radiation of (2,1) is %v and %v", pair[0].Damping.Radiation, pair[1].Damping.Radiation)
	}
}

package response

import (
	"math"
	"testing"
)

// marched is the displacement of the sheet of unit radius and wave speed under an
// even pressure p(t), by central differences in radius and time on n steps of the
// radius; of order h^2. It returns the displacement at the radii of the steps.
func marched(n int, end float64, p func(t float64) float64) []float64 {
	h := 1 / float64(n)
	steps := int(math.Ceil(end / (0.5 * h)))
	dt := end / float64(steps)
	w, before, next := make([]float64, n+1), make([]float64, n+1), make([]float64, n+1)
	for k := range steps {
		t := float64(k) * dt
		for i := range n {
			// At the centre w'' + w'/r is twice w'', and w is even.
			curve := 4 * (w[1] - w[0]) / (h * h)
			if i > 0 {
				r := float64(i) * h
				curve = (w[i+1]-2*w[i]+w[i-1])/(h*h) + (w[i+1]-w[i-1])/(2*h*r)
			}
			change := dt * dt * (curve + p(t))
			if k == 0 {
				next[i] = w[i] + change/2 // at rest
			} else {
				next[i] = 2*w[i] - before[i] + change
			}
		}
		before, w, next = w, next, before
	}
	return w
}

func TestPressureAgainstMarching(t *testing.T) {
	// Two grids tell the error of the finer one: a third of their difference for an
	// order of two; three times that is allowed for what is not yet quadratic. The
	// modes leave out less than the tail of the series 2/(j^3 J_1), times two for the
	// swing: below 4/j^2 at the 60th circle, 1e-4 of it by the alternating signs
	// away from the centre.
	pulse := Pulse{Kind: PulseHalfSine, Duration: 1.3}
	c := struckCase(0, 60, Source{Kind: SourcePressure, At: 0.2, Shape: Shape{Kind: ShapeEven, Peak: 1}, Pulse: &pulse})
	mo := started(t, c).moves
	p := func(t float64) float64 {
		if t < 0.2 || t > 1.5 {
			return 0
		}
		return math.Sin(math.Pi * (t - 0.2) / 1.3)
	}
	for _, end := range []float64{0.9, 1.5, 3.2} {
		coarse, fine := marched(200, end, p), marched(400, end, p)
		for _, k := range []int{20, 80, 140, 180} {
			want := fine[2*k]
			within := math.Abs(fine[2*k]-coarse[k]) + 2e-5
			if got := mo.probe(float64(k)/200, 0, end).w; math.Abs(got-want) > within {
				t.Errorf("t %v, r %v: %v, marched %v, within %v", end, float64(k)/200, got, want, within)
			}
		}
	}
}

func TestShockSpectra(t *testing.T) {
	// The largest displacement of an undamped mode over its static one, against the
	// ratio of the pulse's length to the period, in closed form (Chopra, Dynamics of
	// Structures, chapter 4; Biggs, Introduction to Structural Dynamics, chapter 2;
	// from memory, and each follows from Duhamel's integral after the pulse).
	for _, c := range []struct {
		kind  PulseKind
		ratio float64
		want  float64
	}{
		{PulseRectangle, 0.25, 2 * math.Sin(math.Pi/4)},
		{PulseRectangle, 0.1, 2 * math.Sin(math.Pi/10)},
		{PulseRectangle, 1.7, 2},
		{PulseHalfSine, 0.5, math.Pi / 2},
		{PulseHalfSine, 0.25, 2 * 0.5 * math.Cos(math.Pi/4) / (1 - 0.25)},
		{PulseTriangle, 0.25, 4 * math.Pow(math.Sin(math.Pi*0.25/2), 2) / (math.Pi * 0.25)},
		{PulseTriangle, 0.5, 4 * math.Pow(math.Sin(math.Pi*0.5/2), 2) / (math.Pi * 0.5)},
		{PulseRamp, 2.0, 1},
		{PulseRamp, 0.5, 1 + math.Sin(math.Pi/2)/(math.Pi/2)},
	} {
		omega := 2 * math.Pi * c.ratio // a pulse of length one
		s := alone(omega, 0, (&Pulse{Kind: c.kind, Duration: 1}).pieces(0, 1))
		most := 0.0
		const steps = 20000
		for i := range steps {
			q, _, _ := s.at(0, float64(i)/steps*(1+1/c.ratio))
			most = math.Max(most, q*omega*omega)
		}
		// A top is seen to (omega step)^2/8.
		if math.Abs(most-c.want) > 1e-6 {
			t.Errorf("%s of %v periods: %v, want %v", c.kind, c.ratio, most, c.want)
		}
	}
}

func TestNothingBeforeTheWave(t *testing.T) {
	// On the dry sheet a blow at 0.2 about (0.5, 0) and a pressure on the half
	// x < 0 reach a place no sooner than a wave from their edge does; before, the
	// modes sum to no more than those left out could.
	blow := Source{Kind: SourceBlow, At: 0.2, Momentum: 1, Shape: Shape{Kind: ShapeBump, Radius: 0.5, Width: 0.3}}
	mo := started(t, struckCase(40, 40, blow))
	for _, at := range []Point{{0.3, math.Pi}, {0.6, math.Pi}, {0.9, 2.5}} {
		x, y := at.Radius*math.Cos(at.Angle), at.Radius*math.Sin(at.Angle)
		reach := 0.2 + math.Hypot(x-0.5, y) - 0.3
		for _, share := range []float64{0.3, 0.7, 0.98} {
			if w := mo.moves.probe(x, y, share*reach).w; math.Abs(w) > mo.moves.missedTravel()+1e-12 {
				t.Errorf("%v at %v: %v before the wave, missed travel %v", at, share*reach, w, mo.moves.missedTravel())
			}
		}
		if w := mo.moves.probe(x, y, reach+0.3).w; math.Abs(w) < 100*mo.moves.missedTravel() {
			t.Errorf("%v: %v after the wave", at, w)
		}
	}
}

func TestEnergyBalance(t *testing.T) {
	// The energy falls by what the damping of every mode takes, 4 zeta omega times
	// its kinetic energy a time, and rises by the work of the load: by Gauss's rule
	// on panels of half a turn of the fastest mode, to 1e-10.
	c := struckCase(3, 4, Source{Kind: SourceImpulse, Shape: somePatch},
		Source{Kind: SourcePressure, At: 0.5, Shape: Shape{Kind: ShapeHalf, Peak: 2, Angle: 0.5}, Pulse: &Pulse{Kind: PulseDecay, Duration: 0.7}})
	c.Zeta = 0.03
	mo := started(t, c).moves
	s := mo.stages[0]
	nodes, weights := gaussLegendre(16)
	for _, span := range [][2]float64{{0, 0.5}, {0.5, 3}} {
		panels := int(math.Ceil((span[1] - span[0]) * mo.fastest() / math.Pi))
		length := (span[1] - span[0]) / float64(panels)
		change, scale := 0.0, 0.0
		for p := range panels {
			for n, x := range nodes {
				at := span[0] + length*(float64(p)+x)
				for i := range s.modes {
					k := &s.modes[i]
					q, v, a := s.at(i, at)
					load := a + 2*k.zeta*k.omega*v + k.omega*k.omega*q
					if at > 0.5 && at < 0.51 && math.Abs(load-k.gains[1]*math.Exp(-(at-0.5)/0.7)) > 1e-10*math.Abs(k.omega*v) {
						t.Fatalf("load %v on mode (%d,%d)", load, k.m, k.n)
					}
					power := 2 * k.norm * v * (load - 2*k.zeta*k.omega*v)
					change += length * weights[n] * power
					scale += length * weights[n] * math.Abs(power)
				}
			}
		}
		// At a break the energy after it; the first span ends just before.
		u0, k0 := mo.energy(span[0])
		u1, k1 := mo.energy(math.Nextafter(span[1], 0))
		if left := u1 + k1 - u0 - k0 - change; math.Abs(left) > 1e-10*(u0+k0+scale) {
			t.Errorf("from %v to %v the energy misses its balance by %v of %v", span[0], span[1], left, u0+k0)
		}
	}
}

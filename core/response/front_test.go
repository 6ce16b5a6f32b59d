package response

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// behind integrates J_m(k r) cos m phi over the part of the disc with r cos phi
// below s, by Gauss's rule of 60 points both ways: along the chord, and across
// in the angle psi with the place -cos psi, which removes the roots at the rim.
func behind(m int, k, s float64) float64 {
	nodes, weights := gaussLegendre(60)
	sum, whole := 0.0, math.Acos(-s)
	for i, u := range nodes {
		half, x := math.Sincos(whole * u)
		x = -x
		for l, v := range nodes {
			y := half * (2*v - 1)
			sum += weights[i] * weights[l] * whole * half * 2 * half * bessel.JInt(m, k*math.Hypot(x, y)) * math.Cos(float64(m)*math.Atan2(y, x))
		}
	}
	return sum
}

func TestLoadBehindAFront(t *testing.T) {
	b := basisOf(5, 6)
	g := &given{Source: Source{FrontDirection: 0.6}, scale: 1.5}
	cross := newCrossing(b, g, 0)
	for _, s := range []float64{-0.99, -0.6, 0, 0.3, 0.97, 1} {
		coef := cross.at(s)
		for _, mn := range [][2]int{{0, 1}, {0, 6}, {1, 2}, {2, 1}, {3, 4}, {5, 6}} {
			m, n := mn[0], mn[1]
			want := 1.5 * behind(m, b.Zero(m, n), s) / b.Norm(m, n)
			i := b.Index(m, n, disc.Cos)
			sin, cos := math.Sincos(float64(m) * 0.6)
			// Sums of some tens of terms of size 4/k.
			if math.Abs(coef[i]-want*cos) > 1e-13 || m > 0 && math.Abs(coef[i+1]-want*sin) > 1e-13 {
				t.Errorf("(%d,%d) at %v: %.15g, %.15g; want %.15g times %v, %v", m, n, s, coef[i], coef[i+1], want, cos, sin)
			}
		}
	}
}

func TestFrontAgainstQuadrature(t *testing.T) {
	// Coordinates under a front, slower and faster than the waves, that stays, is
	// followed by another or decays, against Duhamel's integral with the load
	// above. The load is interpolated to 1e-8 of its size on all panels
	// together, and the coordinate errs by no more than that over omega^2 times
	// omega and the time; Duhamel's rule sees the root at the rim, (1+s)^2.5, with
	// an error of 24^-5 of the panel's part.
	const at, direction = 0.3, 0.6
	for _, speed := range []float64{0.4, 5} {
		for _, pulse := range []Pulse{{Kind: PulseStep}, {Kind: PulseRectangle, Duration: 0.5}, {Kind: PulseDecay, Duration: 0.35}} {
			c := struckCase(2, 5, Source{Kind: SourceFront, At: at, Shape: Shape{Peak: 2}, FrontSpeed: speed, FrontDirection: direction, Pulse: &pulse})
			c.Zeta = 0.01
			s := started(t, c)
			mo, b := s.moves, s.projector.basis
			cross := newCrossing(b, &given{Source: Source{FrontDirection: direction}, scale: 2}, 0)
			place := func(u float64) float64 { return math.Max(-1, math.Min(1, (u-at)*speed-1)) }
			for i := range mo.stages[0].modes {
				k := &mo.stages[0].modes[i]
				own := b.Index(k.shape[0].m, k.shape[0].n, k.shape[0].part)
				front := func(u float64) float64 {
					psi, sum := math.Acos(place(u)), 0.0
					for n, v := range cross.terms[own/2] {
						if n == 0 {
							sum += v * (math.Pi - psi)
						} else {
							sum += v * math.Sin(float64(n)*psi)
						}
					}
					return sum * cross.load[own]
				}
				load := front
				switch pulse.Kind {
				case PulseRectangle:
					load = func(u float64) float64 { return front(u) - front(u-pulse.Duration) }
				case PulseDecay:
					nodes, weights := gaussLegendre(24)
					load = func(u float64) float64 {
						sum := front(u)
						begin, end := at, math.Min(u, at+2/speed)
						const panels = 12
						for p := range panels {
							for l, x := range nodes {
								v := begin + math.Max(0, end-begin)*(float64(p)+x)/panels
								sum -= math.Max(0, end-begin) / panels * weights[l] * math.Exp(-(u-v)/pulse.Duration) / pulse.Duration * front(v)
							}
						}
						if u > end {
							sum -= front(end) * -math.Expm1(-(u-end)/pulse.Duration)
						}
						return sum
					}
				}
				size := math.Abs(cross.at(1)[own]) + math.Abs(cross.at(0)[own]) + math.Abs(cross.at(-0.5)[own])
				for _, time := range []float64{at + 0.3/speed, at + 1.7/speed, at + 2.5/speed + 1} {
					if pulse.Kind == PulseDecay && k.n > 1 {
						continue // the double integral takes long
					}
					got, _, _ := mo.stages[0].at(i, time)
					want := duhamel(k.omega, k.zeta, time, load, at, at+0.02/speed, at+0.3/speed, at+1/speed, at+1.7/speed, at+1.98/speed, at+2/speed, at+pulse.Duration, at+pulse.Duration+0.02/speed, at+pulse.Duration+2/speed)
					if within := 2e-8 * size * time / k.omega; math.Abs(got-want) > within {
						t.Errorf("speed %v, %s, mode (%d,%d) at %v: %.12g, want %.12g, within %.2g", speed, pulse.Kind, k.m, k.n, time, got, want, within)
					}
				}
			}
		}
	}
}

func TestFastFrontIsAStep(t *testing.T) {
	// A front much faster than the waves loads all at once: what remains is the
	// time of crossing, 2/speed.
	const speed = 1e5
	front := started(t, struckCase(4, 6, Source{Kind: SourceFront, Shape: Shape{Peak: 1}, FrontSpeed: speed})).moves
	step := started(t, struckCase(4, 6, Source{Kind: SourcePressure, Shape: Shape{Kind: ShapeEven, Peak: 1}})).moves
	for _, at := range []float64{0.5, 2, 5} {
		got, want := front.probe(0.3, 0.2, at).w, step.probe(0.3, 0.2, at).w
		if math.Abs(got-want) > 2/speed*2*step.reach(0)*step.fastest() {
			t.Errorf("at %v: %v, step %v", at, got, want)
		}
	}
}

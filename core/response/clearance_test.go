package response

import (
	"math"
	"testing"
)

func TestClearanceOfABulge(t *testing.T) {
	// A bulge 1 - r^2 let go passes the centre downwards; 1 - r^2 - 2 t^2 is exact
	// there up to t = 1, so a flat surface 0.5 below is met at t = sqrt(3)/2 at the
	// centre, and the motion goes on to -1.214 at 1.179 (computed for this project
	// with 4000 terms). 60 circles leave 2e-4 at the centre: the sum of 8/(j^3 J_1)
	// beyond alternates, and less than its first term, 1.2e-3, at the fold.
	c := struckCase(0, 60, Source{Kind: SourceDisplacement, Shape: Shape{Kind: ShapeBulge, Peak: 1}})
	c.Duration = 1.5
	c.Neighbour = &Neighbour{Below: true, Gap: 0.5}
	got := respond(t, c).Clearance
	if !got.Touches || math.Abs(got.First-math.Sqrt(3)/2) > 1e-3 || got.FirstAt.Radius > 0.05 {
		t.Errorf("%+v", got)
	}
	if math.Abs(got.Least-(0.5-1.214)) > 3e-3 || math.Abs(got.Time-1.179) > 0.03 {
		t.Errorf("%+v", got)
	}
	// Above, the start is the highest: no nearer than the gap less one.
	c.Neighbour = &Neighbour{Gap: 1.25}
	if got := respond(t, c).Clearance; got.Touches || math.Abs(got.Least-0.25) > 1e-3 || got.Time > 1e-3 {
		t.Errorf("%+v", got)
	}
	// And it touches at once where there is no room.
	c.Neighbour.Gap = 0.5
	if got := respond(t, c).Clearance; !got.Touches || got.First != 0 {
		t.Errorf("%+v", got)
	}
	c.Neighbour.Gap, c.Neighbour.Tilt = 0.1, 0.2
	if problems := c.Check(); len(problems) != 1 || problems[0].Field != "neighbour.tilt" {
		t.Errorf("%v", problems)
	}
}

func TestClearanceToATiltedNeighbour(t *testing.T) {
	// Against a dense grid of places and times: nothing on it is nearer than the
	// least gap, nor through before the first contact; and the sheet lies on the
	// surface at that place and time, to the halvings of the time.
	c := struckCase(5, 6, Source{Kind: SourceImpulse, Shape: somePatch}, Source{Kind: SourcePressure, At: 1, Shape: Shape{Kind: ShapeHalf, Peak: 0.3, Angle: 2}, Pulse: &Pulse{Kind: PulseHalfSine, Duration: 1}})
	c.Neighbour = &Neighbour{Below: true, Gap: 0.12, Tilt: 0.1, Direction: 1}
	m := respond(t, c)
	mo := started(t, c).moves
	gap := func(x, y, time float64) float64 {
		return 0.12 + math.Tan(0.1)*(x*math.Cos(1)+y*math.Sin(1)) + mo.probe(x, y, time).w
	}
	place := func(p Point, time float64) float64 {
		return gap(p.Radius*math.Cos(p.Angle), p.Radius*math.Sin(p.Angle), time)
	}
	got := m.Clearance
	if !got.Touches {
		t.Fatalf("no contact: %+v", got)
	}
	if left := place(got.FirstAt, got.First); math.Abs(left) > 1e-9 {
		t.Errorf("gap at first contact: %v", left)
	}
	if left := place(got.At, got.Time); math.Abs(left-got.Least) > 1e-12 {
		t.Errorf("least gap %v, there %v", got.Least, left)
	}
	for i := range 120 {
		time := 6 * float64(i) / 119
		for k := range 14 {
			for l := range 24 {
				sin, cos := math.Sincos(2 * math.Pi * float64(l) / 24)
				r := float64(k) / 14
				if g := gap(r*cos, r*sin, time); g < got.Least-1e-12 || g < -1e-9 && time < got.First {
					t.Fatalf("gap %v at %v, %v; least %v, first %v", g, r, time, got.Least, got.First)
				}
			}
		}
	}
}

func TestVelocityAndAcceleration(t *testing.T) {
	// Against the closed forms at the instants of the history, with a load that
	// acts and one that stays, to the digits of float32.
	c := struckCase(4, 5, Source{Kind: SourceImpulse, At: 0.5, Shape: somePatch},
		Source{Kind: SourcePressure, At: 1, Shape: Shape{Kind: ShapeHalf, Peak: 0.3, Angle: 2}, Pulse: &Pulse{Kind: PulseRamp, Duration: 1}})
	c.Sheet.Tension, c.Zeta = 4, 0.01 // a/c = 1/2 s
	c.Points = []Point{{Radius: 0.4, Angle: 1}, {Radius: 0.8, Angle: -2}}
	m := respond(t, c)
	mo := started(t, c).moves
	for p, point := range c.Points {
		largest := [3]float64{}
		lists := [3][]float32{m.Histories[p], m.Speeds[p], m.Accelerations[p]}
		for d, list := range lists {
			for _, v := range list {
				largest[d] = math.Max(largest[d], math.Abs(float64(v)))
			}
			if largest[d] == 0 {
				t.Fatalf("order %d does not move", d)
			}
		}
		for k := 0; k < len(m.HistoryTimes); k += 37 {
			time := c.Duration * float64(k) / float64(len(m.HistoryTimes)-1) / c.unit()
			s := mo.stage(time)
			values := s.radials(point)
			var want [3]float64
			for i, v := range values {
				q, dq, ddq := s.at(i, time)
				want[0], want[1], want[2] = want[0]+v*q, want[1]+v*dq*2, want[2]+v*ddq*4
			}
			for d, list := range lists {
				if math.Abs(float64(list[k])-want[d]) > 1e-6*largest[d] {
					t.Fatalf("order %d at %v: %v, want %v", d, time, list[k], want[d])
				}
			}
		}
	}
	for n, u := range m.Energies.Potential {
		sum := 0.0
		for _, e := range m.Energies.Orders[n*(c.Orders+1) : (n+1)*(c.Orders+1)] {
			sum += float64(e)
		}
		potential, kinetic := mo.energy(c.Duration * float64(n) / (energySteps - 1) / c.unit())
		if whole := float64(u) + float64(m.Energies.Kinetic[n]); math.Abs(whole-sum) > 1e-6*whole || math.Abs(whole-2*(potential+kinetic)) > 1e-6*whole {
			t.Fatalf("energy %d: %v, orders %v, modes %v", n, whole, sum, 2*(potential+kinetic))
		}
	}
}

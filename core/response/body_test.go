package response

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

// contactOf returns the mean displacement of a contact from coefficients.
func contactOf(t *testing.T, b *disc.Basis, shape Shape, coef []float64) float64 {
	t.Helper()
	f, problems := shape.form(b, "", 1)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	weight := make([]float64, b.Len())
	f.project(b, weight)
	sum := 0.0
	for i, v := range coef {
		m, n, _ := b.At(i)
		sum += v * weight[i] * b.Norm(m, n)
	}
	return sum / contactArea(shape)
}

var contact = Shape{Kind: ShapePatch, Radius: 0.4, Angle: 0.7, Width: 0.15}

func TestBodyRebounds(t *testing.T) {
	// Whatever the modes hold, momentum m V is shared as for two masses m and M:
	// speeds after are in the ratio of the restitution, and at e = 1 the energy
	// m V^2/2 stays. The mass is that of the sheet under the contact, from above,
	// as modes are added: sigma pi b^2.
	const mass, speed = 0.05, -3.0
	before := math.Inf(1)
	for _, n := range []int{6, 12, 24} {
		for _, e := range []float64{0, 0.4, 1} {
			s := started(t, struckCase(n, n, Source{Kind: SourceBody, Shape: contact, Mass: mass, Speed: speed, Restitution: e}))
			g := s.list[0]
			after := speed - g.note.Momentum/mass
			coef := make([]float64, s.moves.basis.Len())
			s.moves.values(coef, 0, 1)
			sheet := contactOf(t, s.moves.basis, contact, coef)
			if math.Abs((sheet-after)-e*speed) > 1e-12*math.Abs(speed) {
				t.Errorf("%d circles, e %v: sheet at %v, body at %v", n, e, sheet, after)
			}
			_, kinetic := s.moves.energy(0)
			if left := mass*speed*speed/2 - mass*after*after/2 - kinetic/2; e == 1 && math.Abs(left) > 1e-12*mass*speed*speed || e < 1 && left <= 0 {
				t.Errorf("%d circles, e %v: energy lost %v", n, e, left)
			}
			if area := math.Pi * contact.Width * contact.Width; e == 0 {
				if got := g.note.EffectiveMass; got < area*(1-1e-12) || got > before {
					t.Errorf("%d circles: effective mass %v, that under the contact %v, with fewer %v", n, got, area, before)
				} else {
					before = got
				}
			}
		}
	}
}

func TestBodyStays(t *testing.T) {
	// A sheet in motion is struck at 0.8 by a body that stays.
	const mass, speed, at = 0.3, 2.0, 0.8
	for _, zeta := range []float64{0, 0.02} {
		c := struckCase(5, 5,
			Source{Kind: SourceDisplacement, Shape: Shape{Kind: ShapeBump, Peak: 0.3, Radius: 0.3, Angle: -1, Width: 0.5}},
			Source{Kind: SourceBody, At: at, Shape: contact, Mass: mass, Speed: speed, Stays: true})
		c.Zeta = zeta
		mo := started(t, c).moves
		if len(mo.stages) != 2 {
			t.Fatalf("%d stages", len(mo.stages))
		}
		b := mo.basis
		get := func(time float64, k int) []float64 {
			coef := make([]float64, b.Len())
			mo.values(coef, time, k)
			return coef
		}
		// The displacement goes on without a jump.
		left, right := get(at-1e-12, 0), get(at, 0)
		for i := range left {
			if math.Abs(left[i]-right[i]) > 1e-10 {
				t.Errorf("zeta %v: coefficient %d jumps from %v to %v", zeta, i, left[i], right[i])
			}
		}
		// The body and the sheet under it move on together, and momentum is
		// handed over: m (V - v) is the work of the blow on every mode.
		was, now := get(at-1e-12, 1), get(at, 1)
		v := contactOf(t, b, contact, now)
		f, _ := contact.form(b, "", 1)
		weight := make([]float64, b.Len())
		f.project(b, weight)
		for i := range now {
			want := mass * (speed - v) * weight[i] / contactArea(contact)
			if math.Abs(now[i]-was[i]-want) > 1e-9 {
				t.Errorf("zeta %v: coefficient %d is struck to %v, want %v", zeta, i, now[i]-was[i], want)
			}
		}
		if zeta > 0 {
			continue
		}
		// Undamped, every Bessel function then moves under its tension and the
		// force that accelerates the body, and the energy of both stays.
		energy := func(time float64) float64 {
			w, dw := get(time, 0), get(time, 1)
			u := contactOf(t, b, contact, dw)
			return (b.Roughness(w, 1) + b.Roughness(dw, 0) + mass*u*u) / 2
		}
		start := energy(at)
		for _, time := range []float64{at, 1.1, 2, 5, 40} {
			w, ddw := get(time, 0), get(time, 2)
			force := -mass * contactOf(t, b, contact, ddw)
			for i := range w {
				m, n, part := b.At(i)
				if m == 0 && part == disc.Sin {
					continue
				}
				j := b.Zero(m, n)
				if left := ddw[i] + j*j*w[i] - force*weight[i]/contactArea(contact); math.Abs(left) > 1e-8 {
					t.Errorf("at %v, function %d: the equation of motion is missed by %v", time, i, left)
				}
			}
			if got := energy(time); math.Abs(got-start) > 1e-10*start {
				t.Errorf("energy at %v: %v, at the start %v", time, got, start)
			}
			if u, k := mo.energy(time); math.Abs((u+k)/2-start) > 1e-10*start {
				t.Errorf("energy of modes at %v: %v, want %v", time, (u+k)/2, start)
			}
		}
	}
}

func TestHeavyBodyOnAPoint(t *testing.T) {
	// A heavy body swings on the sheet as a spring: the static displacement of
	// the contact under a force over it, 1/stiffness, of the same modes. The sheet
	// adds less than its mass, pi/m of it.
	const mass = 1e5
	mo := started(t, struckCase(8, 8, Source{Kind: SourceBody, Shape: contact, Mass: mass, Speed: 1, Stays: true})).moves
	b := basisOf(8, 8)
	f, _ := contact.form(b, "", 1)
	give := make([]float64, b.Len())
	f.project(b, give)
	for i := range give {
		m, n, _ := b.At(i)
		give[i] /= contactArea(contact) * b.Zero(m, n) * b.Zero(m, n)
	}
	want := 1 / (mass * contactOf(t, b, contact, give))
	lowest := math.Inf(1)
	for _, k := range mo.stages[0].modes {
		lowest = math.Min(lowest, k.omega)
	}
	if got := lowest * lowest; math.Abs(got/want-1) > math.Pi/mass {
		t.Errorf("omega^2 %v, spring and mass %v", got, want)
	}
}

func TestBodiesInTurnAndInFluid(t *testing.T) {
	// A second body meets what the first has left: two without mass to speak of
	// change nothing; in a fluid the energy of sheet, fluid and body stays.
	sheet := heavy(diaphragm.FaceBaffled, 3)
	wet := NewWet(solved(t, sheet, stillFluid, 5, 6), nil, false, 5, 6)
	second := contact
	second.Radius, second.Angle = 0.6, -2
	c := wetCase(sheet, wet, 5, 6, Shape{Kind: ShapeRest}, Shape{Kind: ShapeRest})
	c.Sources = []Source{
		{Kind: SourceImpulse, Shape: somePatch},
		{Kind: SourceBody, At: 2, Shape: second, Mass: 0.5, Speed: -1, Stays: true},
		{Kind: SourceBody, At: 1, Shape: contact, Mass: 0.2, Speed: 1, Stays: true},
		{Kind: SourceBody, At: 3, Shape: contact, Mass: 0.1, Speed: 1, Restitution: 1},
	}
	mo := started(t, c).moves
	if len(mo.stages) != 3 {
		t.Fatalf("%d stages", len(mo.stages))
	}
	for _, from := range []float64{0, 1, 2, 3} {
		u, k := mo.energy(from)
		for _, at := range []float64{0.2, 0.9} {
			if du, dk := mo.energy(from + at); math.Abs(du+dk-u-k) > 1e-10*(u+k) {
				t.Errorf("energy at %v: %v, at %v %v", from+at, du+dk, from, u+k)
			}
		}
	}
	for i := range c.Sources[1:] {
		c.Sources[1+i].Mass = 1e-9
	}
	light := started(t, c).moves
	c.Sources = c.Sources[:1]
	none := started(t, c).moves
	for _, at := range []float64{0.5, 1.5, 2.5, 6} {
		if got, want := light.probe(0.3, 0.2, at).w, none.probe(0.3, 0.2, at).w; math.Abs(got-want) > 1e-6*none.reach(0) {
			t.Errorf("light bodies at %v: %v, want %v", at, got, want)
		}
	}
	respond(t, c)
}

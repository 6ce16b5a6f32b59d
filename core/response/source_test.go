package response

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"hoopsheet/core/disc"
)

// duhamel integrates h(t-u) f(u) over 0..t by Gauss's rule on panels of at most
// one radian; on each its 24 points leave less than 1e-16 of a smooth integrand.
func duhamel(omega, zeta, t float64, f func(u float64) float64, corners ...float64) float64 {
	nodes, weights := gaussLegendre(24)
	ends := append([]float64{0, t}, corners...)
	sum := 0.0
	for {
		// The next corner after each, in rising order.
		low, high := math.Inf(1), math.Inf(1)
		for _, e := range ends {
			low = math.Min(low, e)
		}
		for _, e := range ends {
			if e > low {
				high = math.Min(high, e)
			}
		}
		if math.IsInf(high, 1) || low >= t {
			return sum
		}
		high = math.Min(high, t)
		panels := int(math.Ceil((high - low) * omega * (1 + 2*zeta)))
		for p := range panels {
			from, width := low+(high-low)*float64(p)/float64(panels), (high-low)/float64(panels)
			for i, x := range nodes {
				u := from + width*x
				_, s := fundamental(omega, zeta, t-u)
				sum += width * weights[i] * s / omega * f(u)
			}
		}
		for i, e := range ends {
			if e == low {
				ends[i] = math.Inf(1)
			}
		}
	}
}

// alone is a stage of one mode under one load.
func alone(omega, zeta float64, pieces []piece) *stage {
	b := basisOf(0, 1)
	s := &stage{basis: b, modes: []modal{{n: 1, omega: omega, zeta: zeta, norm: 1, film: 1, peak: 1, shape: []block{{n: 1}}}}}
	s.act([]state{{}}, []acting{{pieces: pieces, force: []float64{1}}}, infinity)
	return s
}

func TestPulsesAgainstQuadrature(t *testing.T) {
	// Every pulse, damping and ratio of its duration to the period, against
	// Duhamel's integral by Gauss's rule. Displacement, velocity and acceleration
	// err by some units in the last place of their scale: the static displacement
	// 1/omega^2, or for a short pulse its impulse over omega, times omega^k.
	const table = "0, 0\n0.3, 2\n0.3, -1\n0.7, 1\n1.5, 0.5"
	for _, kind := range PulseKinds() {
		p := Pulse{Kind: kind, Duration: 1, Table: table}
		var f func(u float64) float64
		corners := []float64{1}
		switch kind {
		case PulseStep:
			f = func(float64) float64 { return 1 }
		case PulseRamp:
			f = func(u float64) float64 { return math.Min(u, 1) }
		case PulseHalfSine:
			f = func(u float64) float64 {
				if u > 1 {
					return 0
				}
				return math.Sin(math.Pi * u)
			}
		case PulseTriangle:
			f, corners = func(u float64) float64 { return math.Max(0, 1-math.Abs(2*u-1)) }, []float64{0.5, 1}
		case PulseRectangle:
			f = func(u float64) float64 {
				if u > 1 {
					return 0
				}
				return 1
			}
		case PulseDecay:
			f = func(u float64) float64 { return math.Exp(-u) }
		case PulseTable:
			corners = []float64{0.3, 0.7, 1.5}
			f = func(u float64) float64 {
				switch {
				case u < 0.3:
					return 2 * u / 0.3
				case u < 0.7:
					return -1 + 2*(u-0.3)/0.4
				case u <= 1.5:
					return 1 - 0.5*(u-0.7)/0.8
				}
				return 0
			}
		}
		for _, omega := range []float64{1e-4, 0.03, 0.7, 3, math.Pi, 3.1415, 40} {
			for _, zeta := range []float64{0, 1e-3, 0.2, 0.9999999, 1, 1.02, 1.3, 4} {
				s := alone(omega, zeta, p.pieces(0, 1))
				for _, at := range []float64{1e-3, 0.2, 0.4, 0.9, 1.2, 3} {
					q, dq, ddq := s.at(0, at)
					want := duhamel(omega, zeta, at, f, corners...)
					scale := math.Min(at/omega, 1/(omega*omega)) * 2
					if at < 1/omega {
						scale = at * at
					}
					// The quadrature adds up to 120 x 24 terms of that size.
					if math.Abs(q-want) > 3e-13*scale {
						t.Errorf("%s, omega %v, zeta %v, t %v: %.15g, integral %.15g, scale %.3g", kind, omega, zeta, at, q, want, scale)
					}
					if left := ddq + 2*zeta*omega*dq + omega*omega*q - f(at); math.Abs(left) > 1e-12*(1+omega*omega*scale) {
						t.Errorf("%s, omega %v, zeta %v, t %v: the equation of motion is missed by %v", kind, omega, zeta, at, left)
					}
					// The velocity against the difference of displacements over a step
					// h: its error is h^2/6 of the third derivative, of size f' +
					// omega^2 v, and rounding over h.
					const h = 1e-5
					above, _, _ := s.at(0, at+h)
					below, _, _ := s.at(0, at-h)
					if slope := (above - below) / (2 * h); math.Abs(slope-dq) > h*h*(20+omega*(1+4*zeta)*(1+omega))+1e-15*scale*10/h {
						t.Errorf("%s, omega %v, zeta %v, t %v: velocity %v, slope %v", kind, omega, zeta, at, dq, slope)
					}
				}
			}
		}
	}
}

func TestLatePulseIsTheSame(t *testing.T) {
	// A pulse that begins later, among breaks of another, does the same later: to
	// rounding of the times and of the shifted polynomials.
	for _, kind := range PulseKinds() {
		p := Pulse{Kind: kind, Duration: 0.8, Table: "0,1\n0.5,-2\n2,1"}
		other := Pulse{Kind: PulseTable, Table: "0,0\n0.33,1\n0.91,2\n1.4,0\n2.2,1"}
		b := basisOf(0, 1)
		modes := []modal{{n: 1, omega: 2.7, zeta: 0.05, norm: 1, film: 1, peak: 1, shape: []block{{n: 1}}}}
		both := &stage{basis: b, modes: append([]modal(nil), modes...)}
		both.act([]state{{}}, []acting{{pieces: p.pieces(0.37, 1), force: []float64{3}}, {pieces: other.pieces(0, 1), force: []float64{1}}}, infinity)
		one, two := alone(2.7, 0.05, p.pieces(0, 1)), alone(2.7, 0.05, other.pieces(0, 1))
		for _, at := range []float64{0.4, 0.8, 1.1, 1.9, 5} {
			x, _, _ := one.at(0, at-0.37)
			y, _, _ := two.at(0, at)
			if got, _, _ := both.at(0, at); math.Abs(got-3*x-y) > 1e-14 {
				t.Errorf("%s at %v: %v, want %v", kind, at, got, 3*x+y)
			}
		}
	}
}

// struckCase is a sheet of unit radius, wave speed, tension and density.
func struckCase(orders, circles int, sources ...Source) *Case {
	return &Case{
		Sheet: Sheet{Radius: 1, Tension: 1, ArealDensity: 1}, Orders: orders, Circles: circles, Sources: sources,
		Duration: 6, Frames: 20, Radii: 9, Angles: disc.NextAngles(max(8, 2*orders+2)),
	}
}

func TestDuhamelLimits(t *testing.T) {
	// A pulse of length d and height 1/d is an impulse at its middle: coordinates
	// differ by the second moment d^2/12 (rectangle), times omega^2/2.
	patch := Shape{Kind: ShapePatch, Peak: 1, Radius: 0.3, Angle: 1, Width: 0.3}
	impulse := started(t, struckCase(6, 6, Source{Kind: SourceImpulse, At: 1, Shape: patch})).moves
	for _, d := range []float64{1e-7, 1e-4, 1e-2} {
		short := patch
		short.Peak = 1 / d
		pulse := started(t, struckCase(6, 6, Source{Kind: SourcePressure, At: 1 - d/2, Shape: short, Pulse: &Pulse{Kind: PulseRectangle, Duration: d}})).moves
		omega := impulse.fastest()
		for _, at := range [][3]float64{{0.2, 0.3, 1.5}, {-0.5, 0.1, 3}, {0, 0, 5.7}} {
			got, want := pulse.probe(at[0], at[1], at[2]).w, impulse.probe(at[0], at[1], at[2]).w
			if within := impulse.reach(0) * (omega*omega*d*d/24 + 1e-9*(1e-7/d) + 1e-14); math.Abs(got-want) > within {
				t.Errorf("d %v at %v: %v, impulse %v, within %v", d, at, got, want, within)
			}
		}
	}
	// A ramp of length d leaves the static displacement, here the bulge
	// p (1-r^2)/4 of an even pressure, and rings beside it by no more than
	// 2/(omega d) of each coordinate.
	for _, d := range []float64{100, 1e4} {
		c := struckCase(0, 40, Source{Kind: SourcePressure, Shape: Shape{Kind: ShapeEven, Peak: 1}, Pulse: &Pulse{Kind: PulseRamp, Duration: d}})
		slow := started(t, c).moves
		b := basisOf(0, 40)
		for _, r := range []float64{0, 0.4, 0.9} {
			within := 0.0
			for n := 1; n <= 40; n++ {
				j := b.Zero(0, n)
				within += 2 / (j * math.Abs(b.Slope(0, n))) / (j * j) * 2 / (j * d)
			}
			// Beyond 40 circles: 2/(j^3 J_1) times J_0, below 2/j^3 a term.
			within += 2 / (math.Pi * 2 * b.Zero(0, 40) * b.Zero(0, 40))
			if got, want := slow.probe(r, 0, d+3).w, (1-r*r)/4; math.Abs(got-want) > within {
				t.Errorf("ramp %v at %v: %v, static %v, within %v", d, r, got, want, within)
			}
		}
	}
}

func TestHeldAndLetGo(t *testing.T) {
	// A static pressure held and let go at a time is the bulge let go then, and
	// before it does not move; so is a displacement held.
	for _, at := range []float64{0, 1.3} {
		release := started(t, struckCase(0, 30, Source{Kind: SourceRelease, At: at, Shape: Shape{Kind: ShapeEven, Peak: 4}})).moves
		held := started(t, struckCase(0, 30, Source{Kind: SourceDisplacement, At: at, Shape: Shape{Kind: ShapeBulge, Peak: 1}})).moves
		bulge := series(t, 0, 30, 0, Shape{Kind: ShapeBulge}, Shape{Kind: ShapeRest})
		for _, time := range []float64{0, 0.7, 1.3, 2, 7} {
			for _, r := range []float64{0, 0.3, 0.8} {
				want := bulge.probe(r, 0, math.Max(0, time-at)).w
				for name, mo := range map[string]*motion{"release": release, "displacement": held} {
					if got := mo.probe(r, 0, time).w; math.Abs(got-want) > 1e-13 {
						t.Errorf("%s at %v: r %v, t %v: %v, want %v", name, at, r, time, got, want)
					}
				}
			}
		}
	}
}

func TestEnergyOfSources(t *testing.T) {
	// The work of a pressure p v over the sheet is the rise of the energy: by
	// Gauss's rule on panels of a tenth of the shortest period, to 1e-10 of it.
	c := struckCase(3, 5, Source{Kind: SourcePressure, At: 0.2, Shape: Shape{Kind: ShapeHalf, Peak: 2, Angle: 0.5}, Pulse: &Pulse{Kind: PulseHalfSine, Duration: 1.7}})
	s := started(t, c)
	mo := s.moves
	nodes, weights := gaussLegendre(12)
	g := s.list[0]
	load := make([]float64, mo.basis.Len())
	copy(load, g.coef[:len(load)])
	work := 0.0
	const panels = 60
	for p := range panels {
		for i, x := range nodes {
			at := 0.2 + 1.7*(float64(p)+x)/panels
			speed := make([]float64, mo.basis.Len())
			mo.values(speed, at, 1)
			power := 0.0
			for k, v := range speed {
				m, n, _ := mo.basis.At(k)
				power += v * load[k] * mo.basis.Norm(m, n)
			}
			work += 1.7 / panels * weights[i] * power * math.Sin(math.Pi*(at-0.2)/1.7)
		}
	}
	for _, at := range []float64{1.9, 3, 50} {
		u, k := mo.energy(at)
		if got := (u + k) / 2; math.Abs(got-work) > 1e-10*work {
			t.Errorf("energy at %v: %v, work %v", at, got, work)
		}
	}
}

func TestTableIsRead(t *testing.T) {
	for _, c := range []struct{ text, message string }{
		{"t, p\n0, 1\n1, 2\n", ""},
		{"0;0,5\n1;2,5", ""},
		{"# note\n0 1\n\n1 2", ""},
		{"0,1", "The table has 1 lines of numbers; from 2 to 5000 are read."},
		{"0,1\n1", "Line 2 of the table has 1 numbers; it needs 2."},
		{"0,1\n1,x", "Line 2 of the table has \"x\" where a number is needed."},
		{"0,1\n2,1\n1,1", "The times of the table must rise; 1 s follows 2 s."},
	} {
		p := Pulse{Kind: PulseTable, Table: c.text}
		problems := p.check("pulse.")
		switch {
		case c.message == "" && len(problems) > 0, c.message != "" && (len(problems) != 1 || problems[0].Message != c.message || problems[0].Field != "pulse.table"):
			t.Errorf("%q: %v, want %q", c.text, problems, c.message)
		}
	}
	long := strings.Repeat("0,1\n", 3)
	p := Pulse{Kind: PulseTable, Table: long + "x"}
	if problems := p.check(""); len(problems) != 1 || problems[0].Offset != len(long) {
		t.Errorf("%v, want offset %s", problems, strconv.Itoa(len(long)))
	}
}

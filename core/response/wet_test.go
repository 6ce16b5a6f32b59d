package response

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
	"hoopsheet/core/modes"
)

// face is one with still fluid unless it has a speed of sound.
func face(kind diaphragm.FaceKind, density float64) modes.Face {
	return modes.Face{Kind: kind, Density: density, SoundSpeed: math.Inf(1)}
}

// heavy is a limp sheet of unit radius, tension and areal density between two
// fluids of which rho a/sigma is given.
func heavy(kind diaphragm.FaceKind, ratio float64) modes.Real {
	return modes.Real{Radius: 1, Tension: 1, ArealDensity: 1, Upper: face(kind, ratio), Lower: face(kind, ratio)}
}

var stillFluid = modes.Effects{Stiffness: true, Fluid: true, Cavity: true}

func solved(t *testing.T, real modes.Real, effects modes.Effects, orders, circles int) *modes.Solution {
	t.Helper()
	s, err := modes.Solve(real, modes.Request{MaxM: orders, MaxN: circles, Effects: effects})
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// wetCase is a case of the given diaphragm.
func wetCase(real modes.Real, wet *Wet, orders, circles int, displacement, velocity Shape) *Case {
	return &Case{
		Sheet:        Sheet{Radius: real.Radius, Tension: real.Tension, ArealDensity: real.ArealDensity},
		Displacement: displacement, Velocity: velocity, Wet: wet, Orders: orders, Circles: circles,
		Duration: 10, Frames: 30, Radii: 9, Angles: disc.NextAngles(max(8, 2*orders+2)),
	}
}

func started(t *testing.T, c *Case) *start {
	t.Helper()
	s, problems := c.start()
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	return s
}

// idealAsWet writes the modes of the ideal sheet as wet ones.
func idealAsWet(c *Case) *Wet {
	b := basisOf(c.Orders, c.Circles)
	w := &Wet{}
	for m := 0; m <= c.Orders; m++ {
		var list []WetMode
		for n := 1; n <= c.Circles; n++ {
			j := b.Zero(m, n)
			shape := make([]float64, c.Circles)
			shape[n-1] = 1
			list = append(list, WetMode{N: n, Omega: j / c.unit(), Zeta: c.Zeta, Shape: shape, Strain: j * j * b.Norm(m, n), FilmShare: 1})
		}
		w.Orders = append(w.Orders, list)
	}
	return w
}

func TestIdealModesAsWet(t *testing.T) {
	// Both paths compute the same sums, in another order: each figure is good to
	// some units in the last place of the largest term.
	for _, blow := range []bool{false, true} {
		ideal := benchCase()
		ideal.Frames = 20
		wet := *ideal
		wet.Wet = idealAsWet(ideal)
		if blow {
			wet.Impulse = true
			wet.Velocity.Peak *= wet.Sheet.ArealDensity // p = sigma v
		}
		a, b := respond(t, ideal), respond(t, &wet)
		for i := range a.Values {
			if math.Abs(float64(a.Values[i]-b.Values[i])) > 2e-9*0.02 { // float32 of at most 0.02
				t.Fatalf("blow %v, value %d: %v, ideal %v", blow, i, b.Values[i], a.Values[i])
			}
		}
		for p := range a.Histories {
			for i := range a.Histories[p] {
				if math.Abs(float64(a.Histories[p][i]-b.Histories[p][i])) > 2e-9*0.02 {
					t.Fatalf("blow %v, history %d at %d: %v, ideal %v", blow, p, i, b.Histories[p][i], a.Histories[p][i])
				}
			}
		}
		for name, pair := range map[string][2]float64{
			"period": {a.Period, b.Period}, "ring-down": {a.RingDown, b.RingDown}, "travel": {a.Travel.Displacement, b.Travel.Displacement},
			"missed displacement": {1 + a.MissedDisplacement, 1 + b.MissedDisplacement}, "missed velocity": {1 + a.MissedVelocity, 1 + b.MissedVelocity},
			// The ideal path states the energy of the whole shapes.
			"energy": {a.Energy * (1 - a.MissedEnergy), b.Energy}, "share": {a.Strongest[0].Share, b.Strongest[0].Share * (1 - a.MissedEnergy)},
		} {
			if math.Abs(pair[1]-pair[0]) > 1e-12*math.Abs(pair[0]) {
				t.Errorf("blow %v, %s: %.16g, ideal %.16g", blow, name, pair[1], pair[0])
			}
		}
	}
}

func TestThinFluidIsNone(t *testing.T) {
	// A mass ratio of 1e-7 lowers the frequencies by less than 1e-7 of them: 60 of
	// the fastest mode times 10 a/c of the summed sizes, near one.
	for _, kind := range []diaphragm.FaceKind{diaphragm.FaceBaffled, diaphragm.FaceOpen} {
		sheet := heavy(kind, 1e-7)
		c := wetCase(sheet, newWet(solved(t, sheet, stillFluid, 8, 8), nil, true, 8, 8, 8), 8, 8, someBump, somePatch)
		wet := started(t, c).moves
		c.Wet = nil
		ideal := started(t, c).moves
		for _, at := range [][3]float64{{0, 0, 1}, {0.3, 0.3, 4}, {-0.2, 0.6, 10}} {
			got, want := wet.probe(at[0], at[1], at[2]).w, ideal.probe(at[0], at[1], at[2]).w
			if math.Abs(got-want) > 60*10*1e-7*ideal.reach(0) {
				t.Errorf("%s at %v: %v, ideal %v", kind, at, got, want)
			}
		}
	}
}

func TestWetReturnsTheStart(t *testing.T) {
	// With as many modes as Bessel functions their span is that of the ideal
	// modes, so the sum at t = 0 is the Fourier-Bessel series, to the condition
	// of the modes (near 1) times some units in the last place; the series of a
	// bump is the shape to the sum of the coefficients left out, here 1e-4.
	for _, kind := range []diaphragm.FaceKind{diaphragm.FaceBaffled, diaphragm.FaceOpen} {
		for _, ratio := range []float64{0.1, 10, 100} {
			real := heavy(kind, ratio)
			wet := newWet(solved(t, real, stillFluid, 20, 18), nil, true, 20, 18, 18)
			s := started(t, wetCase(real, wet, 20, 18, someBump, somePatch))
			series := series(t, 20, 18, 0, someBump, somePatch)
			for _, at := range [][2]float64{{0, 0}, {0.3, 0.3}, {-0.2, 0.6}, {0.1, -0.95}} {
				got, want := s.moves.probe(at[0], at[1], 0), series.probe(at[0], at[1], 0)
				if math.Abs(got.w-want.w) > 1e-12 || math.Abs(got.d[2]-want.d[2]) > 1e-10 {
					t.Errorf("%s %v at %v: %v and speed %v, series %v and %v", kind, ratio, at, got.w, got.d[2], want.w, want.d[2])
				}
				if shape := s.displacement.at(math.Hypot(at[0], at[1]), math.Atan2(at[1], at[0])); math.Abs(got.w-shape) > 2e-4 {
					t.Errorf("%s %v at %v: %v, shape %v", kind, ratio, at, got.w, shape)
				}
			}
			u, k := s.moves.energy(0)
			for _, at := range []float64{0.3, 4, 50} {
				if du, dk := s.moves.energy(at); math.Abs(du+dk-u-k) > 1e-12*(u+k) {
					t.Errorf("%s %v: energy at %v is %v, at 0 %v", kind, ratio, at, du+dk, u+k)
				}
			}
		}
	}
}

// windows are real sheets: a stiff one in air, one with water beside it, one
// with a cavity.
func windows() map[string]modes.Real {
	air := modes.Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343, Viscosity: 1.5e-5}
	open := air
	open.Kind = diaphragm.FaceOpen
	shallow := modes.Face{Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343, Depth: 0.05}
	water := modes.Face{Kind: diaphragm.FaceBaffled, Density: 998, SoundSpeed: 1482}
	vacuum := modes.Face{Kind: diaphragm.FaceVacuum}
	return map[string]modes.Real{
		"stiff": {Radius: 0.3, Tension: 100, ArealDensity: 1, Stiffness: 0.5, Poisson: 0.35, Rim: modes.RimSupported, Upper: open, Lower: open},
		"water": {Radius: 0.3, Tension: 2000, ArealDensity: 0.2, Stiffness: 1e-4, Poisson: 0.35, Upper: water, Lower: air},
		// The film moves slowly against the sound in the cavity.
		"cavity":       {Radius: 0.5, Tension: 300, ArealDensity: 2, Upper: vacuum, Lower: shallow},
		"air, cavity":  {Radius: 0.5, Tension: 300, ArealDensity: 0.07, Upper: air, Lower: shallow},
		"vented":       {Radius: 0.5, Tension: 300, ArealDensity: 2, Upper: vacuum, Lower: modes.Face{Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343, Depth: 0.2, Vent: &modes.Vent{Area: 0.01, Length: 0.02}}},
		"air on a gap": {Radius: 0.5, Tension: 300, ArealDensity: 0.07, Upper: air, Lower: modes.Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343, WallDistance: 0.1}},
	}
}

// integral of f over the disc of unit radius times r dr, by Gauss's rule.
func radialIntegral(f func(r float64) float64) float64 {
	nodes, weights := make([]float64, 80), make([]float64, 80)
	disc.RadialRule(nodes, weights, 0)
	sum := 0.0
	for i, r := range nodes {
		sum += weights[i] * f(r)
	}
	return sum
}

func TestBlowMovesModalMass(t *testing.T) {
	// A blow p sets mode i moving at the integral of p phi_i over its modal mass,
	// both of which package modes has in kg and metres. Beyond 20 Bessel functions
	// the coefficients of 1-r^2 are below 3e-4 and those of the shapes below 1e-2,
	// with norms of 0.03: some 1e-7 beside an integral of p |phi_i| near 0.1 and
	// up. A thin edge makes the shape smaller by its width e, its integral by e
	// from p and 2 e from the area.
	for name, window := range windows() {
		solution := solved(t, window, stillFluid, 0, 20)
		c := wetCase(window, NewWet(solution, nil, true, 0, 20), 0, 20, Shape{Kind: ShapeRest}, Shape{Kind: ShapeBulge, Peak: 3})
		c.Impulse = true
		mo := started(t, c).moves
		for i := range solution.Modes {
			mode := &solution.Modes[i]
			if mode.N > 3 {
				continue
			}
			a := window.Radius
			_, inner := mode.Coefficients()
			mass := mode.SheetMass + mode.FluidMass
			work := func(size func(float64) float64) float64 {
				return 2 * math.Pi * a * a * radialIntegral(func(r float64) float64 { return 3 * (1 - r*r) * size(mode.Radial(r)) })
			}
			want := work(func(w float64) float64 { return w }) / mass // m/s
			within := (1e-6 + 3*(1-inner)) * work(math.Abs) / mass
			got := mo.stages[0].modes[mode.N-1].states[0].v / c.unit()
			if math.Abs(got-want) > within {
				t.Errorf("%s (0,%d): %v m/s, want %v", name, mode.N, got, want)
			}
		}
	}
}

func TestHeavyAirSlowsABlow(t *testing.T) {
	// Against vacuum the first mode is slower by the ratio of modal masses, as far
	// as its shape is the same: (0,1) takes 5 % of other Bessel functions.
	for _, ratio := range []float64{0.1, 1, 10} {
		window := heavy(diaphragm.FaceBaffled, ratio)
		solution := solved(t, window, stillFluid, 0, 12)
		c := wetCase(window, NewWet(solution, nil, true, 0, 12), 0, 12, Shape{Kind: ShapeRest}, Shape{Kind: ShapeBulge, Peak: 1})
		c.Impulse = true
		blow := started(t, c).moves.stages[0].modes[0].states[0].v
		c.Impulse = false
		speed := started(t, c).moves.stages[0].modes[0].states[0].v
		first := &solution.Modes[0]
		want := first.SheetMass / (first.SheetMass + first.FluidMass)
		if got := blow / speed; math.Abs(got/want-1) > 0.06 {
			t.Errorf("mass ratio %v: a blow is slower by %v, masses by %v", ratio, got, want)
		}
		// Modal mass by Rayleigh from J_0(j_01 r): the fluid adds 2 rho times the
		// integral of the squared Hankel transform k dk/k over that of the square.
		if ratio == 0.1 {
			j := basisOf(0, 1).Zero(0, 1)
			// Hankel transform of J_0(j r): j J_1(j) J_0(k)/(j^2-k^2), DLMF 10.22.4-5;
			// the integral of its square over k, by the trapezoidal rule on 0..400,
			// falls off like k^-5.
			sum := 0.0
			const h = 0.002
			for i := range 200000 {
				k := (float64(i) + 0.5) * h
				u := besselAround(0, k)[2] / ((j - k) * (j + k))
				sum += h * u * u
			}
			fluid := 2 * ratio * 2 * j * j * sum // over J_1(j)^2/2, the integral of the square
			if got := 1 / (1 + fluid); math.Abs(want/got-1) > 2e-3*ratio/0.1 {
				t.Errorf("mass ratio %v: sheet over whole %v, by Rayleigh %v", ratio, want, got)
			}
		}
	}
}

func TestWetReciprocity(t *testing.T) {
	// The displacement at B after a blow at A is that at A after the same blow at
	// B: every mode enters by its product at both places. Not so a prescribed
	// velocity, for which the fluid does not weigh both alike.
	blow := func(radius, angle float64) Shape {
		return Shape{Kind: ShapeBump, Peak: 1, Radius: radius, Angle: angle, Width: 0.25}
	}
	for name, window := range windows() {
		wet := NewWet(solved(t, window, stillFluid, 10, 10), nil, true, 10, 10)
		seen := func(source, receiver Shape, impulse bool, at float64) float64 {
			c := wetCase(window, wet, 10, 10, Shape{Kind: ShapeRest}, source)
			c.Impulse = impulse
			mo := started(t, c).moves
			// The mean over the receiver's bump, in Bessel functions.
			weight, coef := make([]float64, mo.basis.Len()), make([]float64, mo.basis.Len())
			form, _ := receiver.form(mo.basis, "", 1)
			form.project(mo.basis, weight)
			mo.values(coef, at, 0)
			sum := 0.0
			for i, v := range coef {
				m, n, _ := mo.basis.At(i)
				sum += v * weight[i] * mo.basis.Norm(m, n)
			}
			return sum
		}
		a, b := blow(0.3, 1), blow(0.6, -2.2)
		differ := false
		for _, at := range []float64{0.7, 2, 5.5} {
			ab, ba := seen(a, b, true, at), seen(b, a, true, at)
			scale := math.Abs(seen(a, a, true, at)) + math.Abs(seen(b, b, true, at))
			if math.Abs(ab-ba) > 1e-12*scale {
				t.Errorf("%s at %v: %v one way, %v the other", name, at, ab, ba)
			}
			ab, ba = seen(a, b, false, at), seen(b, a, false, at)
			differ = differ || math.Abs(ab-ba) > 1e-3*math.Abs(ab)
		}
		if !differ && name == "water" {
			t.Errorf("%s: a velocity is as reciprocal as a blow", name)
		}
	}
}

func TestWetTravelAgainstDenseFrames(t *testing.T) {
	// Nothing on a fine grid at closely spaced instants exceeds the travel found;
	// its steps of 1/32 and 0.05 of a time in which the fastest mode, of wave
	// number 27 and angular frequency below 12, turns by 0.6 show a top within
	// (27/32)^2/8 + 0.6^2/8 of its height.
	sheet := heavy(diaphragm.FaceBaffled, 3)
	wet := NewWet(solved(t, sheet, stillFluid, 6, 6), nil, true, 6, 6)
	c := wetCase(sheet, wet, 6, 6, Shape{Kind: ShapeRest}, somePatch)
	c.Impulse = true
	c.Duration, c.Frames, c.Radii, c.Angles = 30, 600, 33, 60
	m := respond(t, c)
	largest := 0.0
	for _, w := range m.Values {
		largest = math.Max(largest, math.Abs(float64(w)))
	}
	if found := math.Abs(m.Travel.Displacement); largest > found*(1+1e-7) || largest < found*0.86 {
		t.Errorf("travel %v, dense frames %v", found, largest)
	}
}

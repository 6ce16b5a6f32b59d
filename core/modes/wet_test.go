package modes

import (
	"math"
	"math/cmplx"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

// wetCase is a diaphragm that several tests go through.
type wetCase struct {
	name string
	real Real
}

func wetCases() []wetCase {
	open := film()
	open.Upper.Kind, open.Lower.Kind = diaphragm.FaceOpen, diaphragm.FaceOpen
	water := film()
	water.Tension, water.ArealDensity = 20000, 1
	water.Upper.Density, water.Upper.SoundSpeed = 998, 1482
	water.Lower = Face{Kind: diaphragm.FaceVacuum}
	baffledHead := kettledrumHead()
	baffledHead.Upper.Kind, baffledHead.Lower.Kind = diaphragm.FaceBaffled, diaphragm.FaceBaffled
	return []wetCase{
		{"film", film()}, {"open film", open}, {"water", water},
		{"open head", kettledrumHead()}, {"baffled head", baffledHead},
	}
}

// refined returns the complex angular frequencies of an order.
func refined(o *wetOrder, count int) []complex128 {
	list := make([]complex128, count)
	for k, mode := range o.solve(count) {
		if o.moving() {
			mode = o.refine(mode)
		}
		list[k] = mode.omega()
	}
	return list
}

func TestShapeCount(t *testing.T) {
	// How many shapes plan.shapes gives, against 16 more: still fluid and sound.
	for _, c := range wetCases() {
		for _, effects := range []Effects{{Fluid: true}, {Fluid: true, Sound: true}} {
			plan := newWetPlan(c.real, effects)
			for _, m := range []int{0, 1, 3, 6, 12} {
				for _, count := range []int{4, 9} {
					got := refined(plan.order(m, count), count)
					want := refined(plan.order(m, count+8), count)
					for k := range count - 1 {
						// The first three radial modes of m <= 6 to eight digits; the
						// others, and all but the very last, to seven.
						tolerance := 1e-7
						if k < 3 && m <= 6 {
							tolerance = 5e-9
						}
						if d := cmplx.Abs(got[k]-want[k]) / cmplx.Abs(want[k]); d > tolerance {
							t.Errorf("%s %+v (%d,%d) of %d: %.2g", c.name, effects, m, k+1, count, d)
						}
					}
				}
			}
		}
	}
}

func TestLiveShapes(t *testing.T) {
	// Sound in the first shapes only, against all of them.
	for _, c := range wetCases() {
		plan := newWetPlan(c.real, Effects{Fluid: true, Sound: true, Stiffness: true})
		for _, m := range []int{0, 1, 6, 12} {
			got := refined(plan.order(m, 9), 8)
			o := plan.order(m, 9)
			o.live = o.strain.n
			for _, f := range o.faces {
				switch f := f.(type) {
				case *baffledFace:
					f.live = f.tables
				case *openFaces:
					f.live = f.tables
				}
			}
			want := refined(o, 8)
			for k := range want {
				if d := cmplx.Abs(got[k]-want[k]) / cmplx.Abs(want[k]); d > 1e-8 {
					t.Errorf("%s (%d,%d): %.2g", c.name, m, k+1, d)
				}
			}
		}
	}
}

func TestReducedBasis(t *testing.T) {
	// Sound in the lowest modes in still fluid, against all unknowns.
	for _, c := range wetCases()[3:4] {
		plan := newWetPlan(c.real, AllEffects())
		for _, m := range []int{0, 1, 6, 12} {
			o := plan.order(m, 9)
			got := refined(o, 8)
			if o.reduced == nil {
				t.Fatalf("%s: the basis is not reduced", c.name)
			}
			full := plan.order(m, 9)
			full.solveStill(8)
			for k := range got {
				want := full.refine(full.still(k)).omega()
				tolerance := 5e-8
				if k < 3 && m <= 6 {
					tolerance = 1e-8
				}
				if d := cmplx.Abs(got[k]-want) / cmplx.Abs(want); d > tolerance {
					t.Errorf("%s (%d,%d): %.2g", c.name, m, k+1, d)
				}
			}
		}
	}
}

func TestThinEdge(t *testing.T) {
	// The clamped edge as a smaller ring, against the resolved edge: the bound
	// that is part of every error, and its order e^2.
	cases := wetCases()[:3]
	cavity := film()
	cavity.Lower = Face{Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343.5, Depth: 0.02}
	cavity.Upper = Face{Kind: diaphragm.FaceVacuum}
	cases = append(cases, wetCase{"cavity", cavity})
	for _, c := range cases {
		for _, e := range []float64{thinEdge, thinEdge / 2} {
			r := c.real
			r.Stiffness = e * e * r.Radius * r.Radius * r.Tension
			resolved := newWetPlan(r, AllEffects())
			resolved.thin, resolved.radius = false, r.Radius
			thin := newWetPlan(r, AllEffects())
			thin.thin, thin.radius = true, r.Radius*(1-e)
			for _, m := range []int{0, 1, 5, 12} {
				got, want := refined(thin.order(m, 8), 8), refined(resolved.order(m, 8), 8)
				for k := range want {
					if d := math.Abs(real(got[k])/real(want[k]) - 1); d > thin.edgeError(bessel.ZeroJ(float64(m), k+1)) {
						t.Errorf("%s e %v (%d,%d): %.2g, bound %.2g", c.name, e, m, k+1, d, thin.edgeError(bessel.ZeroJ(float64(m), k+1)))
					}
				}
			}
		}
	}
}

func TestFluidClampedPlate(t *testing.T) {
	// Added-mass factors of clamped plates, one side in a baffle: Kwak, J. Appl.
	// Mech. 58 (1991) 480-483 has 0.6538 for (0,0); ten digits by mpmath from the
	// closed-form Hankel transform of the exact modes (quadrature cut at k = 280,
	// which costs 1e-9 of the smallest). n counts inner circles there, circles
	// with the rim here.
	for _, c := range []struct {
		m       int
		factors [3]float64
	}{
		{0, [3]float64{0.65380398997, 0.27612850947, 0.16512703237}},
		{1, [3]float64{0.29882789434, 0.16912933794, 0.11590765678}},
		{2, [3]float64{0.20834483534, 0.13143941316, 0.09565194358}},
		{3, [3]float64{0.16322105562, 0.10967451663, 0.08285919989}},
	} {
		const n = 24
		o := &wetOrder{m: c.m, strain: newStrain(c.m, n, 0, 1, 0, RimClamped), tables: tablesOf(c.m, n), sheet: 1}
		o.solveStill(3)
		for k, want := range c.factors {
			q := o.realPart(o.still(k))
			got := bilinear(o.tables.baffledMass(), n, q) / bilinear(o.tables.sheetMass(), n, q)
			if math.Abs(got-want) > 1e-9 {
				t.Errorf("(%d,%d): %.10g, want %.9g", c.m, k, got, want)
			}
		}
	}
	// The trial shape (1-r^2)^2: Lamb, Proc. R. Soc. A 98 (1920) 205-216, 0.6689;
	// 10 Gamma(6) Gamma(1/2)/[Gamma(7/2)^2 Gamma(13/2)] by mpmath.
	e := disc.ClampedEdge
	got := e.Form(0, 0, 0, -1) / e.Form(0, 0, 0, 0)
	if math.Abs(got-0.66893560047910551) > 1e-15 {
		t.Errorf("trial shape %.12g", got)
	}
}

func TestMassRatios(t *testing.T) {
	// From vacuum to a fluid a thousand times heavier: by Rayleigh's principle the
	// frequency lies above that of the exact factor of the dry shape and, as the
	// mass grows, omega^2 rho tends to a limit.
	r := film()
	r.Stiffness = 0
	r.Lower = Face{Kind: diaphragm.FaceVacuum}
	before := math.Inf(1)
	for _, ratio := range []float64{0, 1e-6, 1e-3, 1, 30, 1000} {
		r.Upper.Density = ratio * r.ArealDensity / r.Radius
		mode := modeOf(t, solve(t, r, Request{MaxN: 3, Effects: Effects{Fluid: true}}), 0, 1)
		got := mode.Frequency / mode.Ideal
		rayleigh := 1 / math.Sqrt(1+0.7464351569*ratio)
		if got > before || got > rayleigh*(1+1e-9) || got < 0.98*rayleigh {
			t.Errorf("mass ratio %v: f/f_ideal %.9g, with the dry shape %.9g", ratio, got, rayleigh)
		}
		// To first order in the ratio they are equal.
		if ratio < 0.01 && math.Abs(got-rayleigh) > ratio*ratio+1e-12 {
			t.Errorf("mass ratio %v: f/f_ideal %.12g, first order %.12g", ratio, got, rayleigh)
		}
		before = got
	}
}

func TestLimitsJoin(t *testing.T) {
	// Each effect fades out in the right order.
	base := film()
	base.Stiffness = 0
	f := func(r Real, e Effects, m int) float64 {
		return modeOf(t, solve(t, r, Request{MaxM: m, MaxN: 2, Effects: e}), m, 1).Frequency
	}
	// Slow sound: k0 a -> 0 joins still fluid like k0^2.
	for m := range 3 {
		still := f(base, Effects{Fluid: true}, m)
		r := base
		var gaps [2]float64
		for i, speed := range []float64{3435, 34350} {
			r.Upper.SoundSpeed, r.Lower.SoundSpeed = speed, speed
			gaps[i] = math.Abs(f(r, AllEffects(), m)/still - 1)
		}
		if gaps[0] > 1e-4 || gaps[1] > gaps[0]/80 {
			t.Errorf("(%d,1): sound changes it by %g and, ten times as fast, %g", m, gaps[0], gaps[1])
		}
	}
	// Stiffness: sqrt(D) when clamped, D when supported.
	for _, rim := range Rims() {
		r := base
		r.Rim, r.Poisson = rim, 0.3
		limp := f(r, Effects{Fluid: true}, 1)
		var gains [2]float64
		for i, s := range []float64{1e6, 1e8} {
			r.Stiffness = r.Tension * r.Radius * r.Radius / s
			gains[i] = f(r, Effects{Fluid: true, Stiffness: true}, 1)/limp - 1
		}
		want := 10.0
		if rim == RimSupported {
			want = 100
		}
		if ratio := gains[0] / gains[1]; math.Abs(ratio/want-1) > 0.05 {
			t.Errorf("%s: a hundredth of the stiffness changes the gain by %.4g, want %v", rim, ratio, want)
		}
	}
}

func TestDampingParts(t *testing.T) {
	r := film()
	r.LossFactor, r.Remainder = 0.02, 0.001
	s := solve(t, r, Request{MaxM: 5, MaxN: 3, Effects: AllEffects()})
	for _, mode := range s.Modes {
		d := mode.Damping
		if sum := d.Radiation + d.Viscous + d.Sheet + d.Remainder; math.Abs(sum-d.Total) > 1e-15 {
			t.Errorf("(%d,%d): parts come to %g, total %g", mode.M, mode.N, sum, d.Total)
		}
		if d.Remainder != 0.001 || d.Sheet != 0.01*mode.BendingShare {
			t.Errorf("(%d,%d): remainder %g, sheet %g of share %g", mode.M, mode.N, d.Remainder, d.Sheet, mode.BendingShare)
		}
		// 60 dB are three decades of amplitude.
		if fall := math.Exp(-d.Total * 2 * math.Pi * mode.Frequency * d.RingDown); math.Abs(fall-1e-3) > 1e-12 {
			t.Errorf("(%d,%d): falls to %g in the ring-down time", mode.M, mode.N, fall)
		}
		// Friction exceeds radiation for (m,1) from m = 2 on with this film.
		if mode.N == 1 && mode.M >= 2 && d.Viscous < d.Radiation {
			t.Errorf("(%d,1): viscous %g, radiation %g", mode.M, d.Viscous, d.Radiation)
		}
	}
	// The share of bending is d ln omega^2/d ln D.
	for _, stiffness := range []float64{6e-6, 3e-3} {
		for _, kind := range []diaphragm.FaceKind{diaphragm.FaceVacuum, diaphragm.FaceBaffled} {
			r := film()
			r.Upper.Kind, r.Lower.Kind = kind, kind
			const h = 1e-3
			at := func(d float64) RealMode {
				r.Stiffness = d
				return modeOf(t, solve(t, r, Request{MaxM: 2, MaxN: 2, Effects: Effects{Stiffness: true, Fluid: true}}), 2, 1)
			}
			want := (math.Log(at(stiffness*(1+h)).Frequency) - math.Log(at(stiffness*(1-h)).Frequency)) / h
			if got := at(stiffness).BendingShare; math.Abs(got-want) > 1e-3*want {
				t.Errorf("D = %g, %s: share of bending %.6g, slope %.6g", stiffness, kind, got, want)
			}
		}
	}
	// Radiation of a low mode as a monopole: power rho c0 k0^2 |Q|^2/(4 pi) per
	// side in a baffle, k0 a = 0.08, with the exact wet shape.
	limp := film()
	limp.Stiffness = 0
	mode := modeOf(t, solve(t, limp, Request{MaxN: 1, Effects: AllEffects()}), 0, 1)
	coef, _ := mode.Coefficients()
	volume := 2 * math.Pi * limp.Radius * limp.Radius * coef[0] / 8 // integral r u_0 = 1/8, of the others 0
	omega := 2 * math.Pi * mode.Frequency
	power := 2 * 1.2 * omega * omega * volume * volume / (4 * math.Pi * 343.5) // over |velocity|^2
	want := power / (2 * omega * (mode.SheetMass + mode.FluidMass) / 2)
	if got := mode.Damping.Radiation; math.Abs(got/want-1) > 3*mode.SoundNumber*mode.SoundNumber+1e-3 {
		t.Errorf("(0,1) radiates %.6g, monopole %.6g", got, want)
	}
}

func TestRefusals(t *testing.T) {
	ok := film()
	if _, err := Solve(ok, Request{Effects: AllEffects()}); err != nil {
		t.Fatal(err)
	}
	for name, spoil := range map[string]func(*Real){
		"radius":          func(r *Real) { r.Radius = 0 },
		"tension":         func(r *Real) { r.Tension = -1 },
		"areal density":   func(r *Real) { r.ArealDensity = math.NaN() },
		"stiffness":       func(r *Real) { r.Stiffness = math.Inf(1) },
		"one open face":   func(r *Real) { r.Upper.Kind = diaphragm.FaceOpen },
		"two cavities":    func(r *Real) { r.Upper.Kind, r.Lower.Kind = diaphragm.FaceCavity, diaphragm.FaceCavity },
		"cavity depth":    func(r *Real) { r.Upper.Kind = diaphragm.FaceCavity },
		"sound speed":     func(r *Real) { r.Upper.SoundSpeed = 0 },
		"wall, no baffle": func(r *Real) { r.Upper.Kind, r.Upper.WallDistance = diaphragm.FaceVacuum, 1 },
		"rim":             func(r *Real) { r.Rim = "glued" },
	} {
		r := film()
		spoil(&r)
		if _, err := Solve(r, Request{Effects: AllEffects()}); err == nil && name != "wall, no baffle" {
			t.Errorf("%s: no error", name)
		}
	}
}

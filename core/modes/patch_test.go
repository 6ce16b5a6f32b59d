package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

// centredPatch returns the lowest roots k a of a sheet of unit radius, tension
// and density with a patch in the middle, for m nodal diameters, from the Bessel
// functions of the two regions.
func centredPatch(m int, p Patch, count int) []float64 {
	b := p.Radius
	total := p.Mass + math.Pi*b*b
	order := float64(m)
	equation := func(k float64) float64 {
		// Around the patch: w = J Y(k) - J(k) Y, zero on the rim.
		jr, yr := bessel.JInt(m, k), bessel.Y(order, k)
		w := bessel.JInt(m, k*b)*yr - jr*bessel.Y(order, k*b)
		slope := k * (bessel.JPrime(order, k*b)*yr - jr*bessel.YPrime(order, k*b))
		switch {
		case !p.Rigid:
			inner := k * math.Sqrt(total/(math.Pi*b*b))
			return slope*bessel.JInt(m, inner*b) - w*inner*bessel.JPrime(order, inner*b)
		case m == 0: // the pull along the rim accelerates it
			return 2*math.Pi*b*slope + k*k*total*w
		case m == 1: // the jump of the slope turns it; inertia total b^2/4
			return math.Pi*b*b*(slope-w/b) + k*k*total*b/4*w
		}
		return w
	}
	var roots []float64
	const step = 0.01
	for k := 0.5; len(roots) < count; k += step {
		if equation(k)*equation(k+step) < 0 {
			roots = append(roots, root(equation, k, k+step))
		}
	}
	return roots
}

func TestPatchCentred(t *testing.T) {
	s := drySolution(t, 8, 8)
	for _, c := range []struct {
		patch Patch
		// Five digits of frequency are asked where the edge makes the answer
		// unsmooth. Limp ones reach more; a rigid one pulls along its rim with a jump
		// of the slope.
		bound float64
	}{
		{Patch{Radius: 0.1, Mass: 0.1}, 1e-6},
		{Patch{Radius: 0.3, Mass: 0.3}, 1e-6},
		{Patch{Radius: 0.02, Mass: 0.05}, 1e-5},
		{Patch{Radius: 0.6, Mass: 2}, 1e-6},
		{Patch{Radius: 0.1, Mass: 0.1, Rigid: true}, 1e-5},
		{Patch{Radius: 0.02, Mass: 0.05, Rigid: true}, 1e-5},
		{Patch{Radius: 0.3, Mass: 0.3, Rigid: true}, 3e-5},
	} {
		got := coupled(t, s, Uneven{Patches: []Patch{c.patch}})
		for m := range 4 {
			want := centredPatch(m, c.patch, 2)
			for n := range want {
				// By order and place, whatever the labels are.
				var list []float64
				for _, mode := range got.Modes {
					if mode.M == m && !mode.Upper {
						list = append(list, wave(mode))
					}
				}
				if d := math.Abs(list[n]/want[n] - 1); d > c.bound {
					t.Errorf("%+v (%d,%d): %.10f, want %.10f: %.1e", c.patch, m, n+1, list[n], want[n], d)
				}
			}
		}
	}
}

// Off the centre against an exact multipole solution (testdata/uneven/make.py).
func TestPatchReference(t *testing.T) {
	s := drySolution(t, 12, 6)
	for _, row := range readUnevenReference(t).Patch {
		if row.EvenChange > 1e-8 || row.OddChange > 1e-8 {
			t.Fatalf("the reference is converged to %g, %g only", row.EvenChange, row.OddChange)
		}
		p := Patch{Distance: row.D, Angle: 0.4, Radius: row.B, Mass: row.Mass, Rigid: row.Rigid}
		c := coupled(t, s, Uneven{Patches: []Patch{p}})
		for _, want := range append(append([]float64{}, row.Even[:3]...), row.Odd[:3]...) {
			best := c.Modes[0]
			for _, mode := range c.Modes {
				if math.Abs(wave(mode)-want) < math.Abs(wave(best)-want) {
					best = mode
				}
			}
			d := math.Abs(wave(best)/want - 1)
			// Five digits; four for the small and for the large rigid patch at this
			// number of functions. The own estimate must cover it.
			limit := 1e-5
			if row.Rigid && row.B > 0.1 || row.B < 0.05 {
				limit = 1e-4
			}
			if d > limit {
				t.Errorf("%+v: %.10f, want %.10f: %.1e", p, wave(best), want, d)
			}
			if e := best.Error / best.Frequency; d > e+1e-9 {
				t.Errorf("%+v: %.10f errs by %.1e, estimate %.1e", p, want, d, e)
			}
		}
	}
}

// A light patch shifts by first-order perturbation: -(mass/2) times the mean of
// the squared shape over the patch, shapes of unit modal mass.
func TestPatchLight(t *testing.T) {
	s := drySolution(t, 6, 3)
	const mass = 1e-6
	c := coupled(t, s, Uneven{Patches: []Patch{
		{Distance: 0.4, Angle: 1, Radius: 0.15, Mass: mass},
		{Distance: 0.5, Angle: 3, Radius: 0.1, Mass: 2 * mass},
	}})
	want := 0.0
	j := bessel.ZeroJ(0, 1)
	norm := math.Pi * square(bessel.JInt(1, j))
	for _, p := range []struct{ d, b, m float64 }{{0.4, 0.15, mass}, {0.5, 0.1, 2 * mass}} {
		mean, count := 0.0, 0.0
		for i := range 400 {
			for k := range 200 {
				rho := p.b * math.Sqrt((float64(i)+0.5)/400)
				x, y := p.d+rho*math.Cos(math.Pi*(float64(k)+0.5)/100), rho*math.Sin(math.Pi*(float64(k)+0.5)/100)
				mean += square(bessel.JInt(0, j*math.Hypot(x, y)))
				count++
			}
		}
		want -= p.m / 2 * mean / count / norm
	}
	mode := c.pair(0, 1)[0]
	// Second order in 1e-6, and the midpoint rule in the radius.
	if got := mode.Frequency/mode.Even - 1; math.Abs(got/want-1) > 2e-5 {
		t.Errorf("shift %v, want %v", got, want)
	}
	// A pair splits by the difference of the means, the lower mode having its
	// antinode at the mass: one patch, (1,1).
	c = coupled(t, s, Uneven{Patches: []Patch{{Distance: 0.5, Angle: 0.7, Radius: 0.01, Mass: mass}}})
	one := c.pair(1, 1)
	j = bessel.ZeroJ(1, 1)
	norm = math.Pi / 2 * square(bessel.JInt(2, j))
	split := mass / 2 * square(bessel.JInt(1, j*0.5)) / norm
	// The mean over a patch of radius b differs by about (k b)^2/8 from the middle.
	if got := one[0].Split; math.Abs(got/split-1) > 1e-3 {
		t.Errorf("split %v, want %v", got, split)
	}
	if d := math.Abs(one[1].NodalAngle - 0.7); d > 1e-3 {
		t.Errorf("the upper mode has its nodal line at %v", one[1].NodalAngle)
	}
}

// A limp point mass has no answer: each tenth of the radius takes the frequency
// down further, and the mass a tends to zero admittance.
func TestPatchShrinks(t *testing.T) {
	s := drySolution(t, 4, 3)
	last := math.Inf(1)
	for _, b := range []float64{0.1, 0.01, 0.001, 0.0001} {
		k := wave(coupled(t, s, Uneven{Patches: []Patch{{Radius: b, Mass: 3}}}).Modes[0])
		// Heavy and small: 2 pi/ln(1/b) is the stiffness of the sheet around it,
		// and its own mass adds little: k^2 = 2 pi/(mass ln(1/b)) but for terms of
		// relative order 1/(mass ln 1/b).
		rough := math.Sqrt(2 * math.Pi / (3 * math.Log(1/b)))
		if k > last || k > 1.2*rough || k < 0.7*rough {
			t.Errorf("radius %v: k = %v after %v, about %v", b, k, last, rough)
		}
		last = k
	}
}

// Two halves make a whole; order does not matter; no mass changes nothing.
func TestPatchSeveral(t *testing.T) {
	s := drySolution(t, 8, 3)
	p := Patch{Distance: 0.3, Angle: 2, Radius: 0.1, Mass: 0.2}
	half := p
	half.Mass = 0.1
	q := Patch{Distance: 0.6, Angle: -1, Radius: 0.2, Mass: 0.1}
	one := coupled(t, s, Uneven{Patches: []Patch{p, q}})
	other := coupled(t, s, Uneven{Patches: []Patch{q, p}})
	two := coupled(t, s, Uneven{Patches: []Patch{half, q, half}})
	beside := half
	beside.Distance += 1e-6
	near := coupled(t, s, Uneven{Patches: []Patch{half, q, beside}})
	bare := coupled(t, s, Uneven{Patches: []Patch{{Distance: 0.3, Radius: 0.1}}})
	for i, mode := range one.Modes[:8] {
		if d := math.Abs(other.Modes[i].Frequency/mode.Frequency - 1); d > 1e-9 {
			t.Errorf("mode %d changes by %g with the order", i, d)
		}
		if d := math.Abs(two.Modes[i].Frequency/mode.Frequency - 1); d > 1e-9 {
			t.Errorf("mode %d changes by %g when a patch is halved", i, d)
		}
		// Patches that overlap do without the closed form between them: half of
		// what it adds, which is 4e-4 for these.
		if d := math.Abs(near.Modes[i].Frequency/mode.Frequency - 1); d > 5e-4 {
			t.Errorf("mode %d changes by %g with patches beside each other", i, d)
		}
		if d := math.Abs(bare.Modes[i].Frequency/bare.Modes[i].Even - 1); d > 1e-12 {
			t.Errorf("mode %d moves by %g without mass", i, d)
		}
	}
}

// In heavy fluid a patch matters less than in vacuum by the ratio of the masses
// that move with the mode.
func TestPatchInFluid(t *testing.T) {
	face := Face{Kind: diaphragm.FaceBaffled, Density: 10, SoundSpeed: 340}
	s, err := Solve(Real{Radius: 1, Tension: 1, ArealDensity: 1, Upper: face}, Request{MaxM: 5, MaxN: 3, Effects: Effects{Fluid: true}})
	if err != nil {
		t.Fatal(err)
	}
	patch := Patch{Distance: 0.2, Radius: 0.1, Mass: 1e-5}
	wet := coupled(t, s, Uneven{Patches: []Patch{patch}}).pair(0, 1)[0]
	var even RealMode
	for _, mode := range s.Modes {
		if mode.M == 0 && mode.N == 1 {
			even = mode
		}
	}
	mean, count := 0.0, 0.0
	for i := range 100 {
		for k := range 40 {
			rho, phi := 0.1*math.Sqrt((float64(i)+0.5)/100), 2*math.Pi*float64(k)/40
			mean += square(even.Radial(math.Hypot(0.2+rho*math.Cos(phi), rho*math.Sin(phi))))
			count++
		}
	}
	want := -patch.Mass / 2 * mean / count / (even.SheetMass + even.FluidMass)
	if got := wet.Frequency/wet.Even - 1; math.Abs(got/want-1) > 1e-4 {
		t.Errorf("shift %v, want %v", got, want)
	}
	if d := math.Abs(wet.ModalMass()/(even.SheetMass+even.FluidMass) - 1); d > 0.01 {
		t.Errorf("modal mass %v, want %v", wet.ModalMass(), even.SheetMass+even.FluidMass)
	}
}

// BenchmarkPatches has four patches and a strip on all of m <= 12, n <= 8.
func BenchmarkPatches(b *testing.B) {
	s := drySolution(b, 12, 8)
	u := Uneven{
		Patches: []Patch{
			{Distance: 0.3, Angle: 1, Radius: 0.02, Mass: 0.01, Rigid: true},
			{Distance: 0.5, Angle: 2, Radius: 0.05, Mass: 0.01},
			{Distance: 0.7, Angle: 4, Radius: 0.03, Mass: 0.02},
			{Radius: 0.05, Mass: 0.02},
		},
		Strips: []Strip{{Offset: 0.1, Width: 0.02, Mass: 0.05}},
	}
	u.MaxFrequency = s.Complete
	for b.Loop() {
		b.ReportMetric(float64(len(coupled(b, s, u).Modes)), "modes")
	}
}

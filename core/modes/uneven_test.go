package modes

import (
	"encoding/json"
	"math"
	"os"
	"strings"
	"testing"

	"hoopsheet/core/bessel"
)

// drySolution is a sheet whose angular frequencies are the wave numbers k a.
func drySolution(t testing.TB, maxM, maxN int) *Solution {
	t.Helper()
	s, err := Solve(Real{Radius: 1, Tension: 1, ArealDensity: 1}, Request{MaxM: maxM, MaxN: maxN, Effects: AllEffects()})
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func coupled(t testing.TB, s *Solution, u Uneven) *Coupled {
	t.Helper()
	c, err := SolveCoupled(s, u)
	if err != nil {
		t.Fatal(err)
	}
	return c
}

// wave is k a of a dry sheet of unit radius, tension and density.
func wave(m CoupledMode) float64 { return 2 * math.Pi * m.Frequency }

// pair returns the modes of a label, lower first.
func (c *Coupled) pair(m, n int) []CoupledMode {
	var list []CoupledMode
	for _, mode := range c.Modes {
		if mode.M == m && mode.N == n {
			list = append(list, mode)
		}
	}
	return list
}

// unevenReference is testdata/uneven/reference.json; see make.py there.
type unevenReference struct {
	Tension []struct {
		Parts []struct {
			Kind       string
			K          int
			Eps, Angle float64
		}
		K      []float64
		Change float64
	}
	Strip []struct {
		Offset, Width, Mass float64
		K                   []float64
		Change              float64
	}
	Patch []struct {
		D, B, Mass            float64
		Rigid                 bool
		Even, Odd             []float64
		EvenChange, OddChange float64
	}
}

func readUnevenReference(t *testing.T) unevenReference {
	t.Helper()
	data, err := os.ReadFile("../../testdata/uneven/reference.json")
	if err != nil {
		t.Fatal(err)
	}
	var r unevenReference
	if err := json.Unmarshal(data, &r); err != nil {
		t.Fatal(err)
	}
	if len(r.Tension) != 4 || len(r.Strip) != 4 || len(r.Patch) != 6 {
		t.Fatalf("%d tensions, %d strips, %d patches", len(r.Tension), len(r.Strip), len(r.Patch))
	}
	return r
}

// Without anything uneven the even modes come back.
func TestUnevenNothing(t *testing.T) {
	s := drySolution(t, 4, 3)
	c := coupled(t, s, Uneven{Field: SlidingHarmonic(3, 0, 0.2)})
	if len(c.Modes) != 3+4*3*2 {
		t.Fatalf("%d modes", len(c.Modes))
	}
	for _, mode := range c.Modes {
		// The even solution is good to 1e-11 of its last mode.
		if want := bessel.ZeroJ(float64(mode.M), mode.N); math.Abs(wave(mode)/want-1) > 1e-10 || mode.Split != 0 {
			t.Errorf("(%d,%d): %v, want %v; split %g", mode.M, mode.N, wave(mode), want, mode.Split)
		}
		if mode.Share < 1-1e-12 {
			t.Errorf("(%d,%d) has a share of %v", mode.M, mode.N, mode.Share)
		}
	}
}

// A sheet with tensions T(1+eps), T(1-eps) along x and y is, in stretched
// coordinates, an ellipse with even tension: semi-axes a/sqrt(1+eps) and
// a/sqrt(1-eps), eccentricity e, eps = e^2/(2-e^2). Wave numbers times the long
// semi-axis, by Mathieu functions and by the method of particular solutions
// (Mathieu, J. Math. Pures Appl. 13 (1868) 137-203; digits recomputed, nine or
// more agreeing).
var mathieuEllipse = []struct {
	e float64
	// e01, e11, o11, e21, o21: even and odd about the long axis.
	k [5]float64
}{
	{0.1, [5]float64{2.41088987616, 3.83653893475, 3.84619062509, 5.14833936808, 5.1485698017}},
	{0.2, [5]float64{2.42973297811, 3.85157786301, 3.89108258555, 5.18496344655, 5.18876097461}},
	{0.3, [5]float64{2.46349383716, 3.87860708772, 3.97109428607, 5.24084731627, 5.26062812924}},
	{0.5, [5]float64{2.59677924894, 3.98640797173, 4.28221524646, 5.39234318363, 5.54278076661}},
	{0.6, [5]float64{2.72023532347, 4.08784156224, 4.56458586176, 5.49793157323, 5.80225370691}},
}

// checkEllipse compares a solution with the table; scale makes its frequencies
// wave numbers times the long semi-axis, along is the angle of that.
func checkEllipse(t *testing.T, c *Coupled, e float64, k [5]float64, scale, along float64) {
	t.Helper()
	// Twelve digits are printed.
	check := func(name string, mode CoupledMode, want float64) {
		if got := wave(mode) * scale; math.Abs(got/want-1) > 1e-11 {
			t.Errorf("e=%v %s: %.13g, want %.12g", e, name, got, want)
		}
	}
	check("(0,1)", c.pair(0, 1)[0], k[0])
	one, two := c.pair(1, 1), c.pair(2, 1)
	check("(1,1) lower", one[0], k[1])
	check("(1,1) upper", one[1], k[2])
	check("(2,1) lower", two[0], k[3])
	check("(2,1) upper", two[1], k[4])
	// The lower (1,1) moves like x along the long axis: its nodal line lies
	// across. The odd (2,1) has a nodal line along the axis.
	for _, angle := range []struct {
		mode CoupledMode
		want float64
	}{{one[0], along + math.Pi/2}, {one[1], along}, {two[1], along}} {
		turn := math.Pi / float64(angle.mode.M)
		if d := wrap(angle.mode.NodalAngle-angle.want+turn/2, turn) - turn/2; math.Abs(d) > 1e-9 {
			t.Errorf("e=%v: a nodal line of (%d,1) lies at %v, want %v", e, angle.mode.M, angle.mode.NodalAngle, angle.want)
		}
	}
}

func TestWarpWeftMathieu(t *testing.T) {
	s := drySolution(t, 14, 3)
	for _, c := range mathieuEllipse {
		eps := c.e * c.e / (2 - c.e*c.e)
		// The warp lies along y': the ellipse is long where the tension is low.
		got := coupled(t, s, Uneven{Field: WarpWeft(eps, 0.7)})
		checkEllipse(t, got, c.e, c.k, 1/math.Sqrt(1-eps), 0.7+math.Pi/2)
	}
}

// fieldOf builds a field of the reference.
func fieldOf(kind string, k int, eps, angle float64) Field {
	switch kind {
	case "sliding":
		return SlidingHarmonic(k, eps, angle)
	case "warpweft":
		return WarpWeft(eps, angle)
	case "bonded1":
		return BondedHarmonic(1, eps, angle, 0.3)
	case "weight":
		return OwnWeight(eps, angle, 0.3)
	}
	panic(kind)
}

// Against a Ritz solution in polynomials of x and y with the tension as a
// Cartesian tensor (testdata/uneven/make.py), converged to 1e-10.
func TestUnevenReference(t *testing.T) {
	s := drySolution(t, 12, 3)
	for i, row := range readUnevenReference(t).Tension {
		if row.Change > 1e-9 {
			t.Fatalf("case %d of the reference is converged to %g only", i, row.Change)
		}
		var field Field
		for _, p := range row.Parts {
			field = append(field, fieldOf(p.Kind, p.K, p.Eps, p.Angle)...)
		}
		c := coupled(t, s, Uneven{Field: field})
		for j, want := range row.K[:8] {
			// Up to m = 12 the coupling of high orders leaves 1e-8 of k for these
			// modes: the amplitude eps^j reaches them through j orders of
			// perturbation (TestUnevenConverges). The own estimate must cover it.
			got := wave(c.Modes[j])
			bound := 2*math.Pi*c.Modes[j].Error + 1e-9
			if math.Abs(got-want) > bound || bound > 1e-6 {
				t.Errorf("case %d mode %d: %.12f, want %.12f, bound %g", i, j, got, want, bound)
			}
		}
	}
}

// A larger set of functions changes less than the estimate says.
func TestUnevenConverges(t *testing.T) {
	field := append(SlidingHarmonic(2, 0.2, 0.3), BondedHarmonic(1, 0.1, 0.2, 0.3)...)
	a := coupled(t, drySolution(t, 9, 2), Uneven{Field: field})
	b := coupled(t, drySolution(t, 14, 3), Uneven{Field: field})
	for _, mode := range a.Modes[:12] {
		var other CoupledMode
		for _, m := range b.pair(mode.M, mode.N) {
			if m.Upper == mode.Upper {
				other = m
			}
		}
		if d := math.Abs(mode.Frequency - other.Frequency); d > mode.Error+1e-11 {
			t.Errorf("(%d,%d): change %g, estimate %g", mode.M, mode.N, d, mode.Error)
		}
	}
}

func TestUnevenRefusals(t *testing.T) {
	s := drySolution(t, 3, 2)
	for word, u := range map[string]Uneven{
		"wrinkles": {Field: SlidingHarmonic(2, 1.05, 0)},
		"wrinkle":  {Field: append(WarpWeft(0.6, 0), WarpWeft(0.5, 0.1)...)},
		"harmonic": {Field: Field{{K: 60, Power: 60, RR: 0.1}}},
		"smooth":   {Field: Field{{K: 3, Power: 2, RR: 0.1}}},
		"numbers":  {Field: Field{{K: 2, Power: 2, RR: math.NaN()}}},
		"semi":     {Oval: Oval{Half: 0.5}},
		"inside":   {Patches: []Patch{{Distance: 0.95, Radius: 0.1, Mass: 1}}},
		"point":    {Patches: []Patch{{Radius: 1e-6, Mass: 1}}},
		"radius":   {Patches: []Patch{{Mass: 1}}},
		"overlap":  {Patches: []Patch{{Radius: 0.2, Mass: 1, Rigid: true}, {Distance: 0.1, Radius: 0.1, Mass: 1}}},
		"patch 2":  {Patches: []Patch{{Radius: 0.1}, {Radius: 0.1, Mass: -1}}},
		"cross":    {Strips: []Strip{{Offset: 0.99, Width: 0.1, Mass: 1}}},
		"width":    {Strips: []Strip{{Mass: 1}}},
	} {
		_, err := SolveCoupled(s, u)
		if err == nil || !strings.Contains(err.Error(), word) {
			t.Errorf("%s: error %v", word, err)
		}
	}
	if _, err := SolveCoupled(&Solution{}, Uneven{}); err == nil {
		t.Error("a solution without modes is taken")
	}
}

// BenchmarkUneven400 couples all orders: nothing is symmetric.
func BenchmarkUneven400(b *testing.B) {
	s := drySolution(b, 12, 3)
	field := append(SlidingHarmonic(2, 0.1, 0.2), SlidingHarmonic(3, 0.1, 0.7)...)
	field = append(field, BondedHarmonic(1, 0.1, 0.1, 0.3)...)
	for b.Loop() {
		c := coupled(b, s, Uneven{Field: field})
		b.ReportMetric(float64(c.Unknowns), "unknowns")
	}
}

// BenchmarkUnevenMirror has one harmonic, so blocks fall apart.
func BenchmarkUnevenMirror(b *testing.B) {
	s := drySolution(b, 12, 8)
	for b.Loop() {
		c := coupled(b, s, Uneven{Field: SlidingHarmonic(2, 0.1, 0.2)})
		b.ReportMetric(float64(c.Unknowns), "unknowns")
	}
}

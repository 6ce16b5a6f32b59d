package response

import (
	"encoding/json"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"hoopsheet/core/disc"
)

// published reads one entry of the worked examples.
func published(t *testing.T, name string, value any) {
	t.Helper()
	data, err := os.ReadFile("../../testdata/response/published.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Entries []struct {
			Name  string
			Value json.RawMessage
		}
	}
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	for _, entry := range file.Entries {
		if entry.Name == name {
			if err := json.Unmarshal(entry.Value, value); err != nil {
				t.Fatal(err)
			}
			return
		}
	}
	t.Fatalf("no entry %q", name)
}

// printed is a number as it is printed; within is half a unit of its last
// digit.
func printed(t *testing.T, text string) (value, within float64) {
	t.Helper()
	value, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatal(err)
	}
	_, decimals, _ := strings.Cut(text, ".")
	return value, 0.5001 * math.Pow10(-len(decimals))
}

// coefficients of a shape of unit peak on a basis.
func coefficients(t *testing.T, s Shape, b *disc.Basis) []float64 {
	t.Helper()
	s.Peak = 1
	if problems := s.Check(""); len(problems) > 0 {
		t.Fatal(problems)
	}
	f, problems := s.form(b, "", 1)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	coef := make([]float64, b.Len())
	f.project(b, coef)
	return coef
}

// checkSeries compares the coefficients of m = 0 times factor(j) with a list,
// to its last digit and spare, relative.
func checkSeries(t *testing.T, name string, b *disc.Basis, coef []float64, factor func(j float64) float64, list []string, spare float64) {
	t.Helper()
	if len(list) == 0 {
		t.Fatalf("%s: nothing to compare", name)
	}
	for i, text := range list {
		want, within := printed(t, text)
		got := coef[b.Index(0, i+1, disc.Cos)] * factor(b.Zero(0, i+1))
		if math.Abs(got-want) > within+spare*math.Abs(want) {
			t.Errorf("%s, n = %d: %.14g, printed %s", name, i+1, got, text)
		}
	}
}

func one(float64) float64 { return 1 }

func TestPublishedCoefficients(t *testing.T) {
	b := disc.NewBasis(3, 8)
	var withCoef struct{ Coef []string }
	var list []string

	published(t, "bulge", &withCoef)
	checkSeries(t, "bulge", b, coefficients(t, Shape{Kind: ShapeBulge}, b), one, withCoef.Coef, 0)
	published(t, "one", &list)
	everywhere := Shape{Kind: ShapePatch, Width: 1}
	checkSeries(t, "patch over the whole sheet", b, coefficients(t, everywhere, b), one, list, 0)
	published(t, "velocity-one", &list)
	checkSeries(t, "whole sheet struck", b, coefficients(t, everywhere, b), func(j float64) float64 { return 1 / j }, list, 0)

	var discs map[string][]string
	published(t, "struck-disc", &discs)
	for width, name := range map[float64]string{0.1: "struck disc b=0.1", 0.25: "struck disc b=0.25", 0.5: "struck disc b=0.5"} {
		coef := coefficients(t, Shape{Kind: ShapePatch, Width: width}, b)
		// The list is of the displacement, velocity over j.
		checkSeries(t, name, b, coef, func(j float64) float64 { return 1 / j }, discs[name], 0)
	}
}

func TestPublishedCone(t *testing.T) {
	b := disc.NewBasis(0, 40)
	var cone struct{ Coef []string }
	published(t, "cone", &cone)
	coef := coefficients(t, Shape{Kind: ShapeFormula, Formula: "1 - r"}, b)
	// 1 - r has a kink at the centre, where J_0 is one: what the radial rule
	// makes of the kink, integral of r r dr = 1/3, is what it errs by, times
	// 2/J_1(j)^2. A fifth more for the next term of J_0.
	grid := disc.NewGrid(disc.MinRadii(0, 40)+8, 24)
	kink := -1.0 / 3
	for i, r := range grid.R {
		kink += grid.W[i] * r
	}
	if len(cone.Coef) == 0 {
		t.Fatal("nothing to compare")
	}
	for i, text := range cone.Coef {
		want, _ := printed(t, text)
		slope := b.Slope(0, i+1)
		within := 1.2 * 2 / (slope * slope) * math.Abs(kink)
		if got := coef[b.Index(0, i+1, disc.Cos)]; math.Abs(got-want) > within {
			t.Errorf("n = %d: %.12g, printed %s, within %.1g", i+1, got, text, within)
		}
	}
}

func TestPublishedPoints(t *testing.T) {
	b := disc.NewBasis(3, 8)
	// A blow of unit momentum on a small patch tends to that on a point: the
	// Hankel transform differs by (j b)^2/8, here below 1e-9 (j < 30).
	const width = 3e-6
	area := math.Pi * width * width
	var impulse struct {
		Centre    []string
		OffCentre map[string]string
	}
	published(t, "point-impulse", &impulse)
	checkSeries(t, "blow at the centre", b, coefficients(t, Shape{Kind: ShapePatch, Width: width}, b),
		func(j float64) float64 { return 1 / (area * j) }, impulse.Centre, 1e-9)
	coef := coefficients(t, Shape{Kind: ShapePatch, Radius: 0.5, Width: width}, b)
	if len(impulse.OffCentre) == 0 {
		t.Fatal("nothing to compare off the centre")
	}
	for mode, text := range impulse.OffCentre {
		m, n := int(mode[0]-'0'), int(mode[2]-'0')
		want, _ := printed(t, text)
		got := coef[b.Index(m, n, disc.Cos)] / (area * b.Zero(m, n))
		if math.Abs(got-want) > 1.5e-9*math.Abs(want) {
			t.Errorf("blow off the centre, (%s): %.12g, printed %s", mode, got, text)
		}
	}

	// The static form under a point force goes as 1/(pi j^2 J_1^2); a pull is
	// scaled to one, so quotients are compared.
	var static []string
	published(t, "static-point", &static)
	coef = coefficients(t, Shape{Kind: ShapePoint, Width: width}, b)
	first, _ := printed(t, static[0])
	scale := first / coef[b.Index(0, 1, disc.Cos)]
	for i, text := range static {
		want, _ := printed(t, text)
		if got := scale * coef[b.Index(0, i+1, disc.Cos)]; math.Abs(got-want) > 1.5e-9*want {
			t.Errorf("static point force, n = %d: %.12g, printed %s", i+1, got, text)
		}
	}
}

// series prepares a motion of unit radius and wave speed.
func series(t *testing.T, orders, circles int, zeta float64, displacement, velocity Shape) *motion {
	t.Helper()
	b := basisOf(orders, circles)
	a := make([]float64, b.Len())
	v := make([]float64, b.Len())
	if displacement.Kind != ShapeRest {
		a = coefficients(t, displacement, b)
	}
	if velocity.Kind != ShapeRest {
		v = coefficients(t, velocity, b)
	}
	return newMotion(b, zeta, a, v)
}

func TestPublishedMotionOfBulge(t *testing.T) {
	// The printed values are sums of 400 terms, digits to 10; so are these.
	var values map[string]string
	published(t, "bulge-motion", &values)
	whole := series(t, 0, 400, 0, Shape{Kind: ShapeBulge}, Shape{Kind: ShapeRest})
	if len(values) == 0 {
		t.Fatal("nothing to compare")
	}
	for place, text := range values {
		r, time, _ := strings.Cut(place, ",")
		x, _ := printed(t, r)
		at, _ := printed(t, time)
		want, _ := printed(t, text)
		if got := whole.probe(x, 0, at).w; math.Abs(got-want) > 6e-11 {
			t.Errorf("w(%s) = %.12g, printed %s", place, got, text)
		}
	}
	// 1 - r^2 - 2 t^2 holds until the rim's answer arrives, t < 1 - r. What is
	// missing is at most the sum of the terms left out, 8/(j^3 |J_1|) with
	// j > 400 pi and |J_1(j)| > 0.79/sqrt(j): less than 10.2 j^-2.5 each, summed
	// over a spacing of pi to 6.8/pi (400 pi)^-1.5.
	bound := 6.8 / math.Pi * math.Pow(400*math.Pi, -1.5)
	for _, c := range [][2]float64{{0, 0.3}, {0.2, 0.7}, {0.5, 0.4}, {0.9, 0.05}} {
		r, at := c[0], c[1]
		want := 1 - r*r - 2*at*at
		if got := whole.probe(0, r, at).w; math.Abs(got-want) > bound {
			t.Errorf("w(%v, %v) = %.9g, exact %.9g within %.1g", r, at, got, want, bound)
		}
	}
}

func TestPublishedRayleighSums(t *testing.T) {
	// Parseval in its oldest form: for u = r^m the potential of the load
	// r^m gives sum over n of j_mn^-2 = 1/(4(m+1)) (Watson 15.51); here it
	// holds the zeros that everything else rests on. The tail of a sum to N is
	// below 1/(pi^2 (N - 1/2 + m/2)) because j_mn > (n - 1/4 + m/2 - 1/2) pi.
	const last = 400
	for m := 0; m <= 2; m++ {
		b := disc.NewBasis(m, last)
		var sum float64
		for n := last; n >= 1; n-- {
			z := b.Zero(m, n)
			sum += 1 / (z * z)
		}
		want := 1 / (4 * float64(m+1))
		tail := 1 / (math.Pi * math.Pi * (last - 0.5))
		if sum > want || sum < want-tail {
			t.Errorf("m = %d: %.10g, want %.10g less at most %.2g", m, sum, want, tail)
		}
	}
}

func TestPublishedTravelOfBulge(t *testing.T) {
	// Solved independently with 2000 terms: a released bulge passes the centre
	// at -1.214 of its height at t = 1.179 a/c. With 60 terms what is missing
	// is at most 6.8/pi (60 pi)^-1.5 = 8e-4.
	c := benchCase()
	c.Displacement = Shape{Kind: ShapeBulge, Peak: 0.002}
	c.Velocity = Shape{Kind: ShapeRest}
	c.Zeta, c.Orders, c.Circles = 0, 0, 60
	unit := c.Sheet.Radius / c.Sheet.WaveSpeed()
	c.Duration = 1.5 * unit
	m := respond(t, c)
	if got := m.Travel.Displacement / 0.002; math.Abs(got+1.214) > 8e-4+5e-4 {
		t.Errorf("travel %.5f of the height, want -1.214", got)
	}
	if got := m.Travel.Time / unit; math.Abs(got-1.179) > 0.005 {
		t.Errorf("at %.4f a/c, want 1.179", got)
	}
	if m.Travel.At.Radius > 1e-6 {
		t.Errorf("at r = %g, want the centre", m.Travel.At.Radius)
	}
	// Later it is larger, but never above 1.3575.
	c.Duration = 60 * unit
	if got := math.Abs(respond(t, c).Travel.Displacement) / 0.002; got < 1.25 || got > 1.3575+8e-4 {
		t.Errorf("travel within 60 a/c %.5f of the height, want 1.25 to 1.3575", got)
	}
}

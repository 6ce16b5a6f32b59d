package response

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"
)

// scattered writes a table of f at points spread over the ring of the given
// radius by the golden angle, in mm, with the noise given.
func scattered(n int, radius, noise float64, f func(x, y float64) float64) string {
	random := rand.New(rand.NewPCG(7, 7))
	var text strings.Builder
	text.WriteString("x [mm], y [mm], w [mm]\n")
	for i := range n {
		r, theta := math.Sqrt((float64(i)+0.5)/float64(n)), float64(i)*math.Pi*(3-math.Sqrt(5))
		x, y := r*math.Cos(theta), r*math.Sin(theta)
		fmt.Fprintf(&text, "%.9f, %.9f, %.12f\n", 1e3*radius*x, 1e3*radius*y, 1e3*(f(x, y)+noise*random.NormFloat64()))
	}
	return text.String()
}

func TestMeasuredShapeIsFound(t *testing.T) {
	// A polynomial held at the rim is found to the digits of the table, 1e-15 m,
	// times the condition of the fit (some tens); with noise, to a few times the
	// noise times sqrt(p/n), p = 28 functions.
	shape := func(x, y float64) float64 { return 1e-3 * (1 - x*x - y*y) * (1 + x - 0.5*y*x + y*y*y) }
	for _, c := range []struct{ noise, within float64 }{{0, 1e-12}, {1e-5, 4e-5}} {
		s := Shape{Kind: ShapeMeasured, Peak: 1, Table: scattered(120, 0.4, c.noise, shape), PlaceUnit: "mm", ValueUnit: "mm"}
		b := basisOf(12, 12)
		f, problems := s.form(b, "", 0.4)
		if len(problems) > 0 {
			t.Fatal(problems)
		}
		fit := f.(*sampled).fit
		for _, at := range []Point{{0, 0}, {0.3, 1}, {0.7, -2}, {0.95, 3}, {1, 0}} {
			sin, cos := math.Sincos(at.Angle)
			if got, want := f.at(at.Radius, at.Angle), shape(at.Radius*cos, at.Radius*sin); math.Abs(got-want) > c.within {
				t.Errorf("noise %v at %v: %v, want %v", c.noise, at, got, want)
			}
		}
		if c.noise == 0 && (fit.degree != 4 && fit.degree != 3 || fit.residual > 1e-14) || c.noise > 0 && (fit.residual > 1.2*c.noise || fit.residual < 0.6*c.noise || fit.degree > 6) || len(fit.outliers) > 0 {
			t.Errorf("noise %v: degree %d, residual %v, outliers %v", c.noise, fit.degree, fit.residual, fit.outliers)
		}
	}
}

func TestOutliersAndRim(t *testing.T) {
	shape := func(x, y float64) float64 { return 2e-3 * (1 - x*x - y*y) }
	lines := strings.Split(strings.TrimSpace(scattered(80, 1, 1e-6, shape)), "\n")
	lines[17], lines[40] = "100, -200, 9", "-300, 50, -1"
	c := struckCase(4, 8, Source{Kind: SourceDisplacement, Shape: Shape{Kind: ShapeMeasured, Peak: 1, Table: strings.Join(lines, "\n"), PlaceUnit: "mm", ValueUnit: "mm"}})
	m := respond(t, c)
	note := m.Sources[0]
	if len(note.Outliers) != 2 || note.Outliers[0] != 18 || note.Outliers[1] != 41 {
		t.Errorf("outliers %v", note.Outliers)
	}
	if note.Residual > 1.3e-6 || note.RimMisfit > 5e-6 {
		t.Errorf("residual %v, rim %v", note.Residual, note.RimMisfit)
	}
	if w := m.Values[0]; math.Abs(float64(w)-2e-3) > 2e-5 { // 8 circles leave 1 % of a bulge at the centre
		t.Errorf("centre at %v", w)
	}
	// A zero that is off shows at the rim.
	c.Sources[0].Shape.Table = scattered(80, 1, 1e-6, func(x, y float64) float64 { return shape(x, y) + 2e-4 })
	note = respond(t, c).Sources[0]
	if note.RimMisfit < 0.8e-4 || !strings.Contains(strings.Join(note.Notes, " "), "look at the zero of the measurement") {
		t.Errorf("rim %v, %q", note.RimMisfit, note.Notes)
	}
	// A polar grid.
	var polar strings.Builder
	polar.WriteString("r, theta, w\n")
	for i := range 6 {
		for k := range 12 {
			r, theta := float64(i)/5, 30*float64(k)
			fmt.Fprintf(&polar, "%v, %v, %v\n", r, theta, (1-r*r)*(1+r*math.Cos(theta*math.Pi/180)))
		}
	}
	s := Shape{Kind: ShapeMeasured, Peak: 1, Table: polar.String()}
	f, problems := s.form(basisOf(4, 4), "", 1)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	if got, want := f.at(0.5, 1), 0.75*(1+0.5*math.Cos(1)); math.Abs(got-want) > 1e-9 {
		t.Errorf("polar grid: %v, want %v", got, want)
	}
	for text, part := range map[string]string{
		"0,0,1\n":                                "The table has 1 lines of numbers; from 6 to 4000 are read.",
		strings.Repeat("0.1,0,1\n", 6) + "3,0,1": "Line 7 of the table lies at 3 ring radii",
		"0,0\n1,1\n":                             "Line 1 of the table has 2 numbers; it needs 3.",
	} {
		s.Table = text
		if _, problems := s.form(basisOf(4, 4), "shape.", 1); len(problems) != 1 || !strings.Contains(problems[0].Message, part) || problems[0].Field != "shape.table" {
			t.Errorf("%q: %v", text, problems)
		}
	}
	s.PlaceUnit = "parsec"
	if _, problems := s.form(basisOf(4, 4), "shape.", 1); len(problems) != 1 || problems[0].Field != "shape.placeUnit" {
		t.Errorf("%v", problems)
	}
}

func TestFormulaInMetres(t *testing.T) {
	f, err := Compile("X + 2*Y + 3*rho")
	if err != nil {
		t.Fatal(err)
	}
	f.length = 0.5
	if got, want := f.At(0.8, 1), 0.5*0.8*(math.Cos(1)+2*math.Sin(1)+3); math.Abs(got-want) > 1e-15 {
		t.Errorf("%v, want %v", got, want)
	}
}

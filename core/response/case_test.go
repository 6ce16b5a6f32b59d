package response

import (
	"context"
	"math"
	"slices"
	"strings"
	"testing"
)

func TestCaseIsRefused(t *testing.T) {
	for _, c := range []struct {
		change  func(*Case)
		field   string
		message string
	}{
		{func(c *Case) { c.Displacement.Kind = "dent" }, "displacement.kind",
			"There is no shape named \"dent\"; the shapes are rest, bulge, point, bump, patch, even, half, formula, measured."},
		{func(c *Case) { c.Velocity.Peak = math.NaN() }, "velocity.peak",
			"The peak must lie between -1,000,000 and 1,000,000 m or m/s."},
		{func(c *Case) { c.Displacement.Radius = 1 }, "displacement.radius",
			"The place is at 1 ring radii from the centre; it must be from 0 to below 1."},
		{func(c *Case) { c.Displacement.Width = 0 }, "displacement.width",
			"The width is 0 ring radii; it must be above 0 and at most 1."},
		{func(c *Case) { c.Velocity.Radius, c.Velocity.Width = 0.7, 0.4 }, "velocity.width",
			"The patch reaches over the rim: its place at 0.7 and its width of 0.4 ring radii add up to more than 1."},
		{func(c *Case) { c.Displacement.Angle = math.Inf(1) }, "displacement.angle",
			"The angle of the place must lie between -1000 and 1000 rad."},
		{func(c *Case) { c.Displacement = Shape{Kind: ShapeFormula, Peak: 1, Formula: "1 - rr"} }, "displacement.formula",
			"There is nothing named \"rr\". A formula is written in r, theta, x and y, or rho, X and Y in metres, with pi and e."},
		{func(c *Case) { c.Orders = 61 }, "orders",
			"The largest number of nodal diameters is 61; it must be from 0 to 60."},
		{func(c *Case) { c.Circles = 0 }, "circles",
			"The largest number of nodal circles is 0; it must be from 1 to 60."},
		{func(c *Case) { c.Frames = 1 }, "frames", "The number of frames is 1; it must be from 2 to 2000."},
		{func(c *Case) { c.Frames, c.Radii, c.Angles = 2000, 257, 512 }, "frames",
			"Frames times radii times angles come to 263168000 values; at most 8388608 are computed. Take fewer frames or a coarser grid."},
		{func(c *Case) { c.Radii = 1 }, "radii", "The number of radii of the display grid is 1; it must be from 2 to 257."},
		{func(c *Case) { c.Angles = 32 }, "angles",
			"The number of angles of the display grid is 32; modes with up to 16 nodal diameters need an even number of at least 34, whose half has no prime factor above 5, such as 36."},
		{func(c *Case) { c.Duration = 0 }, "duration",
			"The duration must be above 0 and at most 10000 periods of mode (0, 1), which are 495.7 s."},
		{func(c *Case) { c.Duration = math.NaN() }, "duration", ""},
		{func(c *Case) { c.Zeta = -0.1 }, "damping.ratio", "The damping ratio must be from 0 to 100."},
		{func(c *Case) { c.Points = make([]Point, 9) }, "points",
			"9 points are given; histories are kept of at most 8."},
		{func(c *Case) { c.Points[1].Radius = 1.2 }, "points.1.radius",
			"Point 2 is at 1.2 ring radii from the centre; it must be from 0 to 1."},
	} {
		bad := benchCase()
		c.change(bad)
		problems := bad.Check()
		if len(problems) != 1 {
			t.Errorf("%s: %d problems, want one: %v", c.field, len(problems), problems)
			continue
		}
		p := problems[0]
		if p.Field != c.field || c.message != "" && p.Message != c.message || p.Code == "" {
			t.Errorf("%s: %s\nwant %s: %s", p.Field, p.Message, c.field, c.message)
		}
	}
	if problems := benchCase().Check(); len(problems) != 0 {
		t.Errorf("a sound case is refused: %v", problems)
	}
	// What a kind does not use is not looked at.
	plain := benchCase()
	plain.Displacement = Shape{Kind: ShapeBulge, Peak: 1, Radius: 7, Width: -3, Formula: "("}
	if problems := plain.Check(); len(problems) != 0 {
		t.Errorf("a bulge is refused for what it does not use: %v", problems)
	}
}

func TestFormulaOverTheSheet(t *testing.T) {
	for _, c := range []struct{ formula, message string }{
		{"(1 - r)/r", "At r = 0, theta = 0 the formula has no finite value, as for a division by zero. Where a quotient has a limit at the centre, divide by max(r, 0.000001) in place of r."},
		{"sin(10*r)/r", "At r = 0, theta = 0 the formula has no value, as for 0/0 or the root of a negative number. Where a quotient has a limit at the centre, divide by max(r, 0.000001) in place of r."},
		{"r/sin(theta)", "At r = 0, theta = 0 the formula has no value, as for 0/0 or the root of a negative number. Where a quotient has a limit at the centre, divide by max(r, 0.000001) in place of r."},
		{"sqrt(x)", "At r = 0.01562, theta = 1.702 the formula has no value, as for 0/0 or the root of a negative number."},
		{"1/(r - 0.5)", "At r = 0.5, theta = 0 the formula has no finite value, as for a division by zero."},
		{"exp(300*r)", "At r = 0.7812, theta = 0 the formula is larger than 1e100."},
	} {
		bad := benchCase()
		bad.Velocity = Shape{Kind: ShapeFormula, Peak: 1, Formula: c.formula}
		_, problems, err := Respond(context.Background(), bad, func(float64) {})
		if err != nil || len(problems) != 1 {
			t.Errorf("%s: %v %v", c.formula, problems, err)
			continue
		}
		p := problems[0]
		if p.Field != "velocity.formula" || p.Code != CodeFormula || p.Message != c.message {
			t.Errorf("%s: %s: %s\nwant %s", c.formula, p.Field, p.Message, c.message)
		}
	}
	huge := benchCase()
	huge.Velocity = Shape{Kind: ShapeFormula, Peak: 3, Formula: "1e9*(1 - r)"}
	if _, problems, _ := Respond(context.Background(), huge, func(float64) {}); len(problems) != 1 ||
		problems[0].Message != "The peak times the formula reaches 3e+09; at most 1,000,000 m or m/s are computed." {
		t.Errorf("huge: %v", problems)
	}
	good := benchCase()
	good.Velocity = Shape{Kind: ShapeFormula, Peak: 0.1, Formula: "sin(10*r)/max(r, 0.000001)*(1 - r)"}
	respond(t, good)
}

func TestWarnings(t *testing.T) {
	contains := func(list []string, part string) bool {
		return slices.ContainsFunc(list, func(s string) bool { return strings.Contains(s, part) })
	}
	small := func(c *Case) {
		c.Displacement = Shape{Kind: ShapeBump, Peak: 1e-4, Width: 0.8}
		c.Velocity = Shape{Kind: ShapeRest}
	}
	for _, c := range []struct {
		name    string
		change  func(*Case)
		has     string // part of a warning, "" for none at all
		missed  float64
		exactly bool
	}{
		{"small and smooth", func(*Case) {}, "", 0, false},
		{"stretching", func(c *Case) { c.Displacement = Shape{Kind: ShapeBulge, Peak: 0.03} }, "its tension could rise by up to 13 %", 0, false},
		{"stretching far", func(c *Case) { c.Displacement = Shape{Kind: ShapeBulge, Peak: 0.05} }, "do not use these figures", 0, false},
		{"steep", func(c *Case) { c.Sheet.Stretch = 0; c.Displacement.Peak = 0.15 }, "The sheet reaches a slope of", 0, false},
		{"struck patch", func(c *Case) { c.Velocity = Shape{Kind: ShapePatch, Peak: 0.01, Width: 0.3} }, "The initial velocity has a sharp edge", 0, false},
		{"torn", func(c *Case) { c.Displacement = Shape{Kind: ShapePatch, Peak: 1e-4, Width: 0.3} }, "its energy would have no limit", 1, true},
		{"off the rim", func(c *Case) { c.Displacement = Shape{Kind: ShapeFormula, Peak: 1e-4, Formula: "2 - r"} },
			"The formula of the initial displacement is not zero at the rim, where the sheet is fixed; it reaches 0.5 of its largest value there.", 1, true},
		{"a hidden jump", func(c *Case) { c.Displacement = Shape{Kind: ShapeFormula, Peak: 1e-4, Formula: "step(0.5 - r)"} }, "The initial displacement has a sharp edge", 1, true},
		{"a cut", func(c *Case) {
			c.Displacement = Shape{Kind: ShapeFormula, Peak: 1e-4, Formula: "(1 - r)*r*theta"}
		}, "The initial displacement has a sharp edge", 1, true},
		{"a narrow pad", func(c *Case) { c.Displacement = Shape{Kind: ShapePoint, Peak: 1e-4, Width: 0.002} }, "The chosen modes leave out", 0, false},
		{"few frames", func(c *Case) { c.Frames = 3 }, "the moving picture may mislead", 0, false},
		{"long", func(c *Case) { c.Duration = 60; c.Frames = 2000; c.Radii = 5 }, "the histories show fewer than 8 instants", 0, false},
	} {
		warn := benchCase()
		small(warn)
		c.change(warn)
		m := respond(t, warn)
		if c.has == "" {
			if len(m.Warnings) != 0 {
				t.Errorf("%s: %q", c.name, m.Warnings)
			}
			continue
		}
		if !contains(m.Warnings, c.has) {
			t.Errorf("%s: %q, want %q", c.name, m.Warnings, c.has)
		}
		if c.exactly && m.MissedDisplacement != c.missed {
			t.Errorf("%s: missed %v, want %v", c.name, m.MissedDisplacement, c.missed)
		}
		if math.IsInf(m.Energy, 0) || math.IsNaN(m.Energy) {
			t.Errorf("%s: energy %v", c.name, m.Energy)
		}
	}
}

func TestExtraTension(t *testing.T) {
	// A bulge w0 (1 - r^2) on a radius a has the mean square slope 2 w0^2/a^2,
	// so E h/(1-nu) w0^2/(2 a^2 T) of extra tension.
	c := benchCase()
	c.Displacement, c.Velocity = Shape{Kind: ShapeBulge, Peak: 0.02}, Shape{Kind: ShapeRest}
	m := respond(t, c)
	want := c.Sheet.Stretch * 0.02 * 0.02 / (2 * c.Sheet.Radius * c.Sheet.Radius * c.Sheet.Tension)
	if got := c.extraTension(m.Energy); math.Abs(got-want) > 1e-14*want {
		t.Errorf("extra tension %v, want %v", got, want)
	}
}

package response

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

var localShapes = []Shape{
	{Kind: ShapePatch, Radius: 0, Width: 0.3},
	{Kind: ShapePatch, Radius: 0.55, Angle: 1.1, Width: 0.2},
	{Kind: ShapeBump, Radius: 0.4, Angle: -2, Width: 0.6},
	{Kind: ShapeBump, Radius: 0, Width: 1},
	{Kind: ShapePoint, Radius: 0, Width: 0.05},
	{Kind: ShapePoint, Radius: 0.6, Angle: 3, Width: 0.1},
	{Kind: ShapePoint, Radius: 0.2, Angle: 0.3, Width: 0.8},
	{Kind: ShapePoint, Radius: 0.9, Angle: 4, Width: 0.01},
	{Kind: ShapeBulge},
}

// around integrates fn(r, theta) over the disc in polar coordinates about the
// centre of the shape: panels up to its width and from there to the rim.
func around(s Shape, fn func(r, theta float64) float64) float64 {
	const angles, points, panels = 180, 20, 3
	nodes, weights := gaussLegendre(points)
	width := math.Max(s.Width, 1e-3)
	var sum float64
	for k := range angles {
		sin, cos := math.Sincos(2 * math.Pi * (float64(k) + 0.5) / angles)
		// Distance to the rim along the ray, direction against the radius.
		rim := math.Sqrt(1-s.Radius*s.Radius*sin*sin) - s.Radius*cos
		edges := []float64{0, math.Min(width, rim)}
		for p := 1; p <= panels && rim > width*(1+1e-9); p++ {
			edges = append(edges, width*math.Pow(rim/width, float64(p)/panels))
		}
		for p := 1; p < len(edges); p++ {
			for i, u := range nodes {
				d := edges[p-1] + (edges[p]-edges[p-1])*u
				x, y := s.Radius+d*cos, d*sin
				sum += weights[i] * (edges[p] - edges[p-1]) * d * fn(math.Hypot(x, y), s.Angle+math.Atan2(y, x))
			}
		}
	}
	return sum * 2 * math.Pi / angles
}

func TestProjectionAgainstQuadrature(t *testing.T) {
	// The closed forms (Graf's theorem, Hankel transforms, Green's function)
	// against brute quadrature of the shape times the mode. The rule integrates
	// modes up to j = 23 over panels below one radius to rounding (a wave is
	// seen at 8 angles a turn of it and more, 5 points a length), and the
	// distance to the rim to exp(-180 arcosh(1/0.9)).
	b := disc.NewBasis(5, 5)
	for _, s := range localShapes {
		f, _ := s.form(b, "", 1)
		coef := coefficients(t, s, b)
		for _, mode := range [][2]int{{0, 1}, {0, 5}, {1, 1}, {2, 3}, {5, 5}} {
			m, n := mode[0], mode[1]
			for part, wave := range []func(float64) float64{math.Cos, math.Sin} {
				if m == 0 && part == 1 {
					continue
				}
				want := around(s, func(r, theta float64) float64 {
					return f.at(r, theta) * bessel.JInt(m, b.Zero(m, n)*r) * wave(float64(m)*theta)
				}) / b.Norm(m, n)
				got := coef[b.Index(m, n, disc.Part(part))]
				if math.Abs(got-want) > 2e-12 {
					t.Errorf("%s at %v, (%d,%d) part %d: %.15g, quadrature %.15g", s.Kind, s.Radius, m, n, part, got, want)
				}
			}
		}
	}
}

func TestNormsAgainstQuadrature(t *testing.T) {
	b := disc.NewBasis(2, 2)
	const h = 1e-6
	for _, s := range localShapes {
		f, _ := s.form(b, "", 1)
		n := f.norms()
		square := around(s, func(r, theta float64) float64 { return f.at(r, theta) * f.at(r, theta) })
		if math.Abs(n.square-square) > 1e-12 {
			t.Errorf("%s at %v: square %.14g, quadrature %.14g", s.Kind, s.Radius, n.square, square)
		}
		if s.Kind == ShapePatch {
			if !math.IsInf(n.slope, 1) || !math.IsInf(n.steepest, 1) {
				t.Errorf("a patch jumps, yet slope %v, steepest %v", n.slope, n.steepest)
			}
			continue
		}
		steepest := 0.0
		slope := around(s, func(r, theta float64) float64 {
			out := (f.at(r+h, theta) - f.at(r-h, theta)) / (2 * h)
			across := (f.at(r, theta+h/r) - f.at(r, theta-h/r)) / (2 * h)
			steepest = math.Max(steepest, math.Hypot(out, across))
			return out*out + across*across
		})
		// Differences err by rounding/h = 1e-10 of the slope, and by h^2/6 of
		// the third derivative, at most 1/width^3.
		if math.Abs(n.slope-slope) > 1e-8*n.slope {
			t.Errorf("%s at %v: slope %.12g, quadrature %.12g", s.Kind, s.Radius, n.slope, slope)
		}
		if steepest > n.steepest*(1+1e-8) || steepest < 0.9*n.steepest {
			t.Errorf("%s at %v: steepest %.6g, seen %.6g", s.Kind, s.Radius, n.steepest, steepest)
		}
	}
}

func TestPeaksAreOne(t *testing.T) {
	// No place of a grid shows more than one, and the finest step below the
	// top shows nearly one: the forms are flat there, with curvature at most
	// 6/width^2 (bump), 1/(width^2 ln) (pull).
	b := disc.NewBasis(0, 1)
	for _, s := range localShapes {
		f, _ := s.form(b, "", 1)
		largest := 0.0
		for i := range 401 {
			for k := range 401 {
				// A fine grid about the shape, as wide as it is.
				width := s.Width
				if width == 0 {
					width = 1
				}
				x := s.Radius + width*float64(i-200)/200
				y := width * float64(k-200) / 200
				r := math.Hypot(x, y)
				if r > 1 {
					continue
				}
				largest = math.Max(largest, f.at(r, s.Angle+math.Atan2(y, x)))
			}
		}
		step := 1.0 / 200
		if largest > 1+1e-12 || largest < 1-6*step*step {
			t.Errorf("%s at %v: largest value %.9f", s.Kind, s.Radius, largest)
		}
	}
}

func TestPullVanishesAtRim(t *testing.T) {
	p := newPull(0.7, 1, 0.2)
	for theta := 0.0; theta < 6.3; theta += 0.1 {
		if w := p.at(1, theta); math.Abs(w) > 1e-15 {
			t.Errorf("at the rim, theta %v: %v", theta, w)
		}
	}
}

func TestParseval(t *testing.T) {
	// The modes carry the shape's integrals but for the tail of the series:
	// compared with twice the change from half the band to the whole, which
	// bounds the rest of a series whose terms fall off as n^-2 or faster.
	rest := Shape{Kind: ShapeRest}
	for _, s := range localShapes {
		f, _ := s.form(disc.NewBasis(0, 1), "", 1)
		n := f.norms()
		for _, c := range []struct {
			what  string
			exact float64
			part  func(orders, circles int) float64
		}{
			{"square", n.square, func(orders, circles int) float64 {
				_, k := series(t, orders, circles, 0, rest, s).energy(0)
				return k
			}},
			{"slope", n.slope, func(orders, circles int) float64 {
				u, _ := series(t, orders, circles, 0, s, rest).energy(0)
				return u
			}},
		} {
			if math.IsInf(c.exact, 1) {
				continue
			}
			half, whole := c.part(20, 20), c.part(40, 40)
			if whole > c.exact*(1+1e-13) {
				t.Errorf("%s at %v: the modes carry more %s than there is: %.15g of %.15g", s.Kind, s.Radius, c.what, whole, c.exact)
			}
			if c.exact-whole > 2*(whole-half)+1e-13*c.exact {
				t.Errorf("%s at %v: %s %.12g of %.12g, at half the band %.12g", s.Kind, s.Radius, c.what, whole, c.exact, half)
			}
		}
	}
}

func TestSeriesReturnsShape(t *testing.T) {
	// At t = 0 the sum differs from the shape by the coefficients outside the
	// band, at most by the sum of their sizes. Those of the bump fall off like
	// j^-4.5 and those of the bulge like j^-2.5, so the part of a band of three
	// times the size stands for most of them; twice that part bounds the rest.
	for _, s := range []Shape{someBump, {Kind: ShapeBulge, Peak: 1}} {
		orders := 20
		if s.Kind == ShapeBulge {
			orders = 0
		}
		mo := series(t, orders, 20, 0, s, Shape{Kind: ShapeRest})
		wide := series(t, min(3*orders, 60), 60, 0, s, Shape{Kind: ShapeRest})
		bound := 0.0
		for _, mode := range wide.stages[0].modes {
			if mode.m > orders || mode.n > 20 {
				bound += 2 * mode.size
			}
		}
		f, _ := s.form(mo.basis, "", 1)
		for _, at := range []Point{{0, 0}, {0.35, 0.8}, {0.5, 2}, {0.9, -1}, {0.36, 0.3}} {
			got := mo.probe(at.Radius*math.Cos(at.Angle), at.Radius*math.Sin(at.Angle), 0).w
			if want := f.at(at.Radius, at.Angle); math.Abs(got-want) > bound {
				t.Errorf("%s at %v: %.9g, shape %.9g, bound %.2g", s.Kind, at, got, want, bound)
			}
		}
		if bound > 0.02 {
			t.Errorf("%s: the bound %.2g shows nothing", s.Kind, bound)
		}
	}
}

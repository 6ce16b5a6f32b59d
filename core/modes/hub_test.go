package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

// Roots x = k a of the sheet between two fixed circles: Abramowitz & Stegun
// (1964), Table 9.7 gives (lambda-1) times the inner argument for these ratios;
// digits recomputed with mpmath, 25 digits working.
func TestHubPublished(t *testing.T) {
	for _, c := range []struct {
		m    int
		q    float64
		want []float64
	}{
		{0, 0.8, []float64{15.6980878937, 25.1287696798 / 0.8}},
		{0, 0.5, []float64{2 * 3.1230309195957, 2 * 6.2734357139922, 2 * 9.4182075422516}},
		{1, 0.5, []float64{2 * 3.1965783808106, 2 * 6.3123495103733, 2 * 9.4444649254823}},
		{2, 0.5, []float64{2 * 3.4069214265675, 2 * 6.4277659225961, 2 * 9.5228522699533}},
		{0, 0.2, []float64{3.81595633046, 5 * 1.5571063406472}},
		{0, 0.02, []float64{2.88422484494, 50 * 0.122716109356}},
		{2, 0.1, []float64{10 * 0.51423481029808, 10 * 0.84574058667256}},
	} {
		list := Hub(1, c.q, 4*math.Pi*math.Pi, 1, 60)
		for i, want := range c.want {
			found := false
			for _, mode := range list {
				if mode.M == c.m && mode.N == i+1 {
					found = true
					// a = 1 and sqrt(T/sigma) = 2 pi make the frequency the root.
					// Twelve digits are printed.
					if math.Abs(mode.Frequency/want-1) > 2e-11 || mode.Zero != mode.Frequency {
						t.Errorf("m=%d q=%v n=%d: frequency %.13g, zero %.13g, want %.12g", c.m, c.q, i+1, mode.Frequency, mode.Zero, want)
					}
				}
			}
			if !found && want < list[len(list)-1].Zero {
				t.Errorf("m=%d q=%v n=%d is not in the list", c.m, c.q, i+1)
			}
		}
	}
}

func TestHubOrderAndDomain(t *testing.T) {
	list := Hub(0.7, 0.3, 200, 0.03, 80)
	count := map[[2]int]bool{}
	for i, mode := range list {
		if i > 0 && mode.Frequency < list[i-1].Frequency {
			t.Errorf("mode %d is below the one before", i)
		}
		if circles := NewHubShape(0.3, mode.M, mode.N, 0).CircleRadii(); len(circles) != mode.N-1 {
			t.Errorf("(%d,%d) has %d circles inside", mode.M, mode.N, len(circles))
		}
		count[[2]int{mode.M, mode.N}] = true
	}
	// Whatever lies below the last root is in the list.
	last := list[len(list)-1].Zero
	for m := 0; m < 40; m++ {
		for n := 1; n < 20; n++ {
			if bessel.ZeroAnnulus(m, 0.3, n) < last && !count[[2]int{m, n}] {
				t.Errorf("(%d,%d) is missing", m, n)
			}
		}
	}
	for _, q := range []float64{0, 1, -0.1, math.NaN()} {
		if Hub(1, q, 1, 1, 3) != nil {
			t.Errorf("a hub of %v is taken", q)
		}
	}
}

// The spread of eigenvalues against a second-order difference scheme on the
// radius, extrapolated from three grids: an independent method.
func TestHubFiniteDifferences(t *testing.T) {
	for _, c := range []struct {
		m int
		q float64
	}{{0, 0.1}, {1, 0.1}, {0, 0.4}, {3, 0.4}} {
		want := bessel.ZeroAnnulus(c.m, c.q, 1)
		var coarse [3]float64
		for i, steps := range []int{100, 200, 400} {
			coarse[i] = radialDifferences(c.m, c.q, steps)
		}
		first := [2]float64{(4*coarse[1] - coarse[0]) / 3, (4*coarse[2] - coarse[1]) / 3}
		got := (16*first[1] - first[0]) / 15
		// The scheme errs in even powers of the step; after two eliminations the
		// change of the last is an upper bound of what is left.
		if bound := math.Abs(first[1]-first[0]) + 1e-10; math.Abs(got-want) > bound || bound > 1e-4 {
			t.Errorf("m=%d q=%v: differences give %.10f, root %.10f, bound %g", c.m, c.q, got, want, bound)
		}
	}
}

// radialDifferences returns the lowest k of -(r u')'/r + m^2/r^2 u = k^2 u on q
// to 1 with fixed ends, by central differences and inverse iteration.
func radialDifferences(m int, q float64, steps int) float64 {
	h := (1 - q) / float64(steps)
	n := steps - 1
	diag, off := make([]float64, n), make([]float64, n)
	for i := range n {
		r := q + float64(i+1)*h
		diag[i] = 2/(h*h) + float64(m*m)/(r*r)
		// Scaled by sqrt(r) to be symmetric.
		off[i] = -(r + h/2) / (h * h) / math.Sqrt(r*(r+h))
	}
	v := make([]float64, n)
	for i := range v {
		v[i] = 1
	}
	value := 0.0
	for range 40 {
		d := append([]float64(nil), diag...)
		x := append([]float64(nil), v...)
		for i := 1; i < n; i++ {
			f := off[i-1] / d[i-1]
			d[i] -= f * off[i-1]
			x[i] -= f * x[i-1]
		}
		for i := n - 1; i >= 0; i-- {
			if i < n-1 {
				x[i] -= off[i] * x[i+1]
			}
			x[i] /= d[i]
		}
		value = 1 / dot(v, x) * dot(v, v)
		normalise(x)
		v = x
	}
	return math.Sqrt(value)
}

// A hub that shrinks: (0,n) nears the full sheet like 1/ln(1/q), the others like
// a power of q.
func TestHubShrinks(t *testing.T) {
	for n := 1; n <= 3; n++ {
		j := bessel.ZeroJ(0, n)
		lead := math.Pi / 2 * math.Abs(bessel.Y(0, j)/bessel.J(1, j))
		for _, q := range []float64{1e-10, 1e-20, 1e-40} {
			got := (bessel.ZeroAnnulus(0, q, n) - j) * math.Log(1/q) / lead
			// The next term is relative order 1/ln(1/q), with a factor
			// |ln(j/2) + 0.58| + (lead/2)(slope of Y_0/J_0) below 3.
			if math.Abs(got-1) > 3/math.Log(1/q) {
				t.Errorf("n=%d q=%g: shift is %.4f of the leading term", n, q, got)
			}
		}
	}
	for _, m := range []int{1, 2} {
		j := bessel.ZeroJ(float64(m), 1)
		a := bessel.ZeroAnnulus(m, 1e-2, 1) - j
		b := bessel.ZeroAnnulus(m, 0.5e-2, 1) - j
		if ratio := math.Log2(a / b); math.Abs(ratio-2*float64(m)) > 0.01 {
			t.Errorf("m=%d: shift goes like q^%.3f", m, ratio)
		}
	}
}

func TestHubShape(t *testing.T) {
	for _, c := range []struct {
		q    float64
		m, n int
	}{{0.3, 0, 1}, {0.3, 2, 3}, {0.01, 20, 3}, {0.001, 40, 2}, {0.9, 1, 4}, {1e-6, 0, 5}} {
		s := NewHubShape(c.q, c.m, c.n, 0.4)
		largest := 0.0
		for i := 0; i <= 4000; i++ {
			r := c.q + (1-c.q)*float64(i)/4000
			v := s.At(r, 0.4)
			if math.IsNaN(v) {
				t.Fatalf("q=%v (%d,%d): no value at r=%v", c.q, c.m, c.n, r)
			}
			largest = math.Max(largest, math.Abs(v))
		}
		// The grid misses the extreme by at most (x h/2)^2/2.
		miss := math.Pow(s.Zero*(1-c.q)/8000, 2)/2 + 1e-12
		if largest > 1+1e-12 || largest < 1-miss {
			t.Errorf("q=%v (%d,%d): largest value %v", c.q, c.m, c.n, largest)
		}
		if len(s.CircleRadii()) != c.n-1 {
			t.Errorf("q=%v (%d,%d): %d circles", c.q, c.m, c.n, len(s.CircleRadii()))
		}
		if s.At(c.q, 0) != 0 || s.At(1, 0) != 0 || s.At(c.q/2, 0) != 0 {
			t.Errorf("q=%v (%d,%d): moves at an edge", c.q, c.m, c.n)
		}
		// Zero at both edges by the formula too: x h away, the slope's share.
		for _, r := range []float64{c.q * (1 + 1e-9), 1 - 1e-9} {
			if v := s.At(r, 0.4); math.Abs(v) > 1e-6 {
				t.Errorf("q=%v (%d,%d): %g beside an edge", c.q, c.m, c.n, v)
			}
		}
	}
	// Kirchhoff: the wave equation by differences at one place.
	s := NewHubShape(0.25, 1, 2, 0)
	h, r := 1e-3, 0.6
	laplace := (s.At(r+h, 0)-2*s.At(r, 0)+s.At(r-h, 0))/(h*h) + (s.At(r+h, 0)-s.At(r-h, 0))/(2*h*r) - s.At(r, 0)/(r*r)
	if got, want := laplace, -s.Zero*s.Zero*s.At(r, 0); math.Abs(got-want) > 1e-3*math.Abs(s.Zero*s.Zero) {
		t.Errorf("Laplacian %v, want %v", got, want)
	}
}

// The drawing is the shape at its scale, to the steps of its table.
func TestHubDrawing(t *testing.T) {
	shape, drawing := NewHubShape(0.25, 2, 2, 0.3), DrawHub(0.25, 2, 2, 0.3)
	line := make([]float32, 41)
	drawing.Section(line, 0.3)
	for i, got := range line {
		r := math.Abs(float64(2*i-40) / 40)
		if want := shape.At(r, 0.3); math.Abs(float64(got)-want) > 2e-4 {
			t.Errorf("at %v: %v, want %v", r, got, want)
		}
	}
	a, b := shape.CircleRadii(), drawing.CircleRadii()
	if len(a) != 1 || len(b) != 1 || math.Abs(a[0]-b[0]) > 1e-5 {
		t.Errorf("circles %v, drawn %v", a, b)
	}
}

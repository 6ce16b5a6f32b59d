package disc

import (
	"math"
	"math/rand/v2"
	"testing"

	"hoopsheet/core/bessel"
)

// smoothShapes are zero at the rim. laplacian is nil where it is not square
// integrable.
var smoothShapes = []struct {
	name         string
	f, laplacian func(r, theta float64) float64
}{
	{"bulge 1-r^2", func(r, _ float64) float64 { return (1 - r) * (1 + r) }, func(r, _ float64) float64 { return -4 }},
	{"tilted bulge (1-r^2) exp(2x)", func(r, th float64) float64 {
		return (1 - r) * (1 + r) * math.Exp(2*r*math.Cos(th))
	}, func(r, th float64) float64 {
		x := r * math.Cos(th)
		return math.Exp(2*x) * (4*(1-r)*(1+r) - 4 - 8*x)
	}},
	// Radius 0.35 about (0.4, 0.2), (1-s^2)^3 inside: three times smooth.
	{"bump off the centre", func(r, th float64) float64 {
		s := bumpDistance(r, th)
		if s >= 1 {
			return 0
		}
		return math.Pow(1-s*s, 3)
	}, func(r, th float64) float64 {
		s := bumpDistance(r, th)
		if s >= 1 {
			return 0
		}
		q := 1 - s*s
		return (24*s*s*q - 12*q*q) / (0.35 * 0.35)
	}},
	{"cone 1-r", func(r, _ float64) float64 { return 1 - r }, nil},
}

func bumpDistance(r, th float64) float64 {
	return math.Hypot(r*math.Cos(th)-0.4, r*math.Sin(th)-0.2) / 0.35
}

// testPoints are off every grid: centre, rim, and 300 drawn evenly.
func testPoints() (r, theta []float64) {
	rng := rand.New(rand.NewPCG(4, 4))
	r, theta = []float64{0, 1, 0.9999}, []float64{0, 0, 0}
	for range 300 {
		r = append(r, math.Sqrt(rng.Float64()))
		theta = append(theta, 2*math.Pi*rng.Float64())
	}
	return r, theta
}

func TestErrorOfSmoothShapes(t *testing.T) {
	r, theta := testPoints()
	got := make([]float64, len(r))
	for _, band := range []struct{ M, N int }{{8, 8}, {20, 20}, {30, 12}} {
		// Twice the radii and angles needed, so that aliasing is small.
		b := NewBasis(band.M, band.N)
		tr := NewTransformOf(b, 2*MinRadii(band.M, band.N), NextAngles(4*band.M+4))
		points := NewPoints(b, r, theta)
		coef := make([]float64, b.Len())
		for _, c := range smoothShapes {
			q := tr.AnalyseFunc(coef, c.f)
			points.Synthesise(got, coef)
			off := 0.0
			for i, v := range got {
				off = math.Max(off, math.Abs(v-c.f(r[i], theta[i])))
			}
			if !q.Smooth {
				t.Errorf("%s: M=%d N=%d is called not smooth", c.name, band.M, band.N)
			}
			if off > q.Tail {
				t.Errorf("%s: M=%d N=%d error %.3g above the estimate %.3g", c.name, band.M, band.N, off, q.Tail)
			}
			bound := math.Inf(1)
			if c.laplacian != nil {
				lap := make([]float64, tr.Grid.Len())
				for i, r := range tr.Grid.R {
					for k := 0; k < tr.Grid.NTheta; k++ {
						lap[i*tr.Grid.NTheta+k] = c.laplacian(r, tr.Grid.Theta(k))
					}
				}
				bound = tr.PointwiseBound(coef, math.Sqrt(tr.Grid.Energy(lap)))
				if off > bound {
					t.Errorf("%s: M=%d N=%d error %.3g above the bound %.3g", c.name, band.M, band.N, off, bound)
				}
			}
			t.Logf("%s M=%d N=%d: error %.2e, estimate %.2e, bound %.2e, missed %.2e (orders %.2e)", c.name, band.M, band.N, off, q.Tail, bound, q.Missed, q.MissedOrders)
		}
	}
}

// Missed energy, split by cause: functions just outside the band.
func TestMissedEnergy(t *testing.T) {
	const M, N = 6, 5
	tr := NewTransform(M, N, 60, 48)
	coef := make([]float64, tr.Basis.Len())
	for _, c := range []struct {
		m, n           int
		missed, orders float64
	}{{2, 3, 0.5, 0}, {2, N + 1, 1, 0}, {M + 1, 1, 1, 0.5}, {M + 4, N + 4, 1, 0.5}} {
		// Half the energy in (1, 2), half in (m, n).
		z, w := bessel.ZeroJ(float64(c.m), c.n), bessel.ZeroJ(1, 2)
		s, v := bessel.JInt(c.m+1, z), bessel.JInt(2, w)
		q := tr.AnalyseFunc(coef, func(r, th float64) float64 {
			return bessel.JInt(c.m, z*r)/s*math.Sin(float64(c.m)*th) + bessel.JInt(1, w*r)/v*math.Cos(th)
		})
		missed, orders := 0.5, c.orders
		if c.m <= M && c.n <= N {
			missed = 0
		}
		if math.Abs(q.Missed-missed) > 1e-13 || math.Abs(q.MissedOrders-orders) > 1e-13 {
			t.Errorf("(%d,%d): missed %g by order %g, want %g and %g", c.m, c.n, q.Missed, q.MissedOrders, missed, orders)
		}
		// Each half has the norm pi/2 after division by J_{m+1}.
		if math.Abs(q.Energy-math.Pi) > 1e-13*math.Pi {
			t.Errorf("(%d,%d): energy %g, want pi", c.m, c.n, q.Energy)
		}
	}
	if q := tr.AnalyseFunc(coef, func(r, th float64) float64 { return 0 }); q.Missed != 0 || q.Tail != 0 || !q.Smooth {
		t.Errorf("f = 0: %+v", q)
	}
	if q := tr.AnalyseFunc(coef, func(r, th float64) float64 { return math.NaN() }); q.Smooth {
		t.Errorf("f = NaN is called smooth: %+v", q)
	}
}

// green2 against its own series, at 400 terms and the rest estimated.
func TestGreenSquared(t *testing.T) {
	const N = 400
	b := NewBasis(12, N)
	for _, m := range []int{0, 1, 2, 3, 12} {
		for _, r := range []float64{0, 0.05, 0.3, 0.5, 0.77, 0.95, 1} {
			var sum float64
			for n := 1; n <= N; n++ {
				v := bessel.JInt(m, b.Zero(m, n)*r) / (b.Slope(m, n) * b.Zero(m, n) * b.Zero(m, n))
				sum += 2 * v * v
			}
			// Terms are below 2/(r j^4), or pi/j^3 at the centre; the rest is
			// below 2/(3 pi r x^3) or 1/(2 x^2), x = j_mN.
			x := b.Zero(m, N)
			rest := 1 / (2 * x * x)
			if r > 0 {
				rest = math.Min(rest, 2/(3*math.Pi*r*x*x*x))
			}
			if d := green2(m, r) - sum; d < -1e-15 || d > rest+1e-15 {
				t.Errorf("m=%d r=%g: closed form %.12g, series %.12g, rest up to %.2g", m, r, green2(m, r), sum, rest)
			}
		}
	}
}

func TestTailKernelBetweenRadii(t *testing.T) {
	for _, band := range []struct{ M, N int }{{0, 1}, {0, 8}, {1, 5}, {5, 2}, {10, 10}} {
		tr := NewTransform(band.M, band.N, 0, 0)
		top := tr.tailConstant()
		worst := 0.0
		for i := 0; i <= 1000; i++ {
			r := float64(i) / 1000
			v := tr.tailKernel(r, func(m, n int) float64 { return bessel.JInt(m, tr.Basis.Zero(m, n)*r) })
			worst = math.Max(worst, v)
		}
		rise := worst / (top * top / betweenRadii)
		if rise > 1+(betweenRadii-1)/2 {
			t.Errorf("M=%d N=%d: kernel is %g of its largest value at the radii", band.M, band.N, rise)
		}
		// The bound holds with equality for no function, but a single basis
		// function beyond the band comes close enough to see a wrong constant.
		b := NewBasis(band.M+1, band.N+1)
		for _, c := range [][2]int{{0, band.N + 1}, {band.M + 1, 1}, {band.M, band.N + 1}} {
			m, n := c[0], c[1]
			j := b.Zero(m, n)
			peak := 1.0
			if m > 0 {
				peak = bessel.JInt(m, bessel.ZeroJPrime(float64(m), 1))
			}
			share := peak / (top * j * j * math.Sqrt(b.Norm(m, n)))
			if share > 1 {
				t.Errorf("M=%d N=%d: function (%d,%d) beats the bound by %g", band.M, band.N, m, n, share)
			}
		}
	}
}

package disc

import (
	"math"
	"math/rand/v2"
	"strconv"
	"testing"

	"hoopsheet/core/bessel"
)

// bands are the sizes of the transform tests: single orders, single zeros, N
// not a multiple of the block of four, tall and wide.
var bands = []struct{ M, N int }{{0, 1}, {0, 9}, {1, 1}, {3, 2}, {5, 30}, {24, 24}, {40, 3}, {64, 64}}

func randomCoef(b *Basis, rng *rand.Rand) []float64 {
	c := make([]float64, b.Len())
	for i := range c {
		if m, _, p := b.At(i); m > 0 || p == Cos {
			c[i] = rng.NormFloat64()
		}
	}
	return c
}

func TestRoundTripAndParseval(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 1))
	for _, band := range bands {
		tr := NewTransform(band.M, band.N, 0, 0)
		b := tr.Basis
		c := randomCoef(b, rng)
		f := make([]float64, tr.Grid.Len())
		tr.Synthesise(f, c)
		back := make([]float64, b.Len())
		q := tr.Analyse(back, f)
		worst, at := 0.0, 0
		for i := range c {
			if d := math.Abs(back[i] - c[i]); d > worst {
				worst, at = d, i
			}
		}
		// Stated: 1e-12 for M = N = 64 with coefficients of size 1.
		if worst > 1e-12 {
			m, n, p := b.At(at)
			t.Errorf("M=%d N=%d: coefficient (%d, %d, %d) comes back off by %g", band.M, band.N, m, n, p, worst)
		}
		g := make([]float64, len(f))
		tr.Synthesise(g, back)
		size, off := 0.0, 0.0
		for i := range f {
			size = math.Max(size, math.Abs(f[i]))
			off = math.Max(off, math.Abs(f[i]-g[i]))
		}
		if off > 1e-12*size {
			t.Errorf("M=%d N=%d: samples come back off by %g of %g", band.M, band.N, off, size)
		}
		// Parseval, stated to 1e-13, between samples and coefficients.
		e := b.Energy(c)
		if d := math.Abs(q.Energy-e) / e; d > 1e-13 {
			t.Errorf("M=%d N=%d: energy of samples and coefficients differ by %g", band.M, band.N, d)
		}
		if q.Missed > 1e-13 || q.MissedOrders > 1e-13 {
			t.Errorf("M=%d N=%d: missed %g, by order %g, want none", band.M, band.N, q.Missed, q.MissedOrders)
		}
		t.Logf("M=%d N=%d: nr=%d ntheta=%d worst coefficient %.2g samples %.2g Parseval %.2g missed %.2g", band.M, band.N, len(tr.Grid.R), tr.Grid.NTheta, worst, off/size, math.Abs(q.Energy-e)/e, q.Missed)
	}
}

// Orthogonality of single functions (Abramowitz & Stegun 11.4.5): the analysis
// of each basis function is one coefficient.
func TestAnalysisOfOneFunction(t *testing.T) {
	tr := NewTransform(7, 6, 0, 0)
	b, g := tr.Basis, tr.Grid
	f := make([]float64, g.Len())
	got := make([]float64, b.Len())
	for i := range got {
		m, n, p := b.At(i)
		if b.Index(m, n, p) != i {
			t.Fatalf("Index(At(%d)) = %d", i, b.Index(m, n, p))
		}
		if m == 0 && p == Sin {
			continue
		}
		for j, r := range g.R {
			for k := 0; k < g.NTheta; k++ {
				f[j*g.NTheta+k] = bessel.JInt(m, bessel.ZeroJ(float64(m), n)*r) * angular(m, p, g.Theta(k))
			}
		}
		tr.Analyse(got, f)
		for l, v := range got {
			want := 0.0
			if l == i {
				want = 1
			}
			if math.Abs(v-want) > 1e-13 {
				t.Errorf("analysis of function %d gives %g at %d", i, v, l)
			}
		}
	}
}

func angular(m int, p Part, theta float64) float64 {
	if p == Sin {
		return math.Sin(float64(m) * theta)
	}
	return math.Cos(float64(m) * theta)
}

func TestTransformDoesNotAllocate(t *testing.T) {
	tr := NewTransform(8, 8, 0, 0)
	f := make([]float64, tr.Grid.Len())
	c := make([]float64, tr.Basis.Len())
	c[tr.Basis.Index(1, 2, Sin)] = 1
	fn := func(r, theta float64) float64 { return 1 - r }
	tr.AnalyseFunc(c, fn)
	if n := testing.AllocsPerRun(10, func() { tr.AnalyseFunc(c, fn) }); n != 0 {
		t.Errorf("%g allocations in an analysis of a function, want none", n)
	}
	if n := testing.AllocsPerRun(10, func() { tr.Synthesise(f, c); tr.Analyse(c, f) }); n != 0 {
		t.Errorf("%g allocations in a round trip, want none", n)
	}
}

// BenchmarkDisc256x512 is one analysis and one synthesis on 256 radii and 512
// angles with M = N = 64. testdata/bench/disc_numpy.py times the same sums.
func BenchmarkDisc256x512(b *testing.B) { benchmarkRoundTrip(b, 64, 256, 512) }

// BenchmarkDiscGrowth doubles M = N, radii and angles together: the radial sums
// grow eightfold a step, the Fourier transforms a little over fourfold.
func BenchmarkDiscGrowth(b *testing.B) {
	for _, size := range []int{8, 16, 32, 64, 128} {
		b.Run(strconv.Itoa(size), func(b *testing.B) { benchmarkRoundTrip(b, size, 4*size, 8*size) })
	}
}

func benchmarkRoundTrip(b *testing.B, size, nr, ntheta int) {
	tr := NewTransform(size, size, nr, ntheta)
	f := make([]float64, tr.Grid.Len())
	c := make([]float64, tr.Basis.Len())
	rng := rand.New(rand.NewPCG(5, 5))
	for i := range f {
		f[i] = rng.NormFloat64()
	}
	for b.Loop() {
		tr.Analyse(c, f)
		tr.Synthesise(f, c)
	}
}

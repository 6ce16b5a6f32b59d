package disc

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

// radialSum is the partial sum of order 0 with N terms at the radii.
func radialSum(N int, coef func(j, slope float64) float64, radii []float64) []float64 {
	b := NewBasis(0, N)
	c := make([]float64, b.Len())
	for n := 1; n <= N; n++ {
		c[b.Index(0, n, Cos)] = coef(b.Zero(0, n), b.Slope(0, n))
	}
	out := make([]float64, len(radii))
	NewPoints(b, radii, make([]float64, len(radii))).Synthesise(out, c)
	return out
}

// Gibbs: a partial sum overshoots a jump of height h by
// h ((1/pi) Si(pi) - 1/2) = 0.0894898722360836 h (Wilbraham 1848; DLMF 6.16).
const gibbs = 0.0894898722360836

// f = 1 has coefficients 2/(j J_1(j)). At the rim the series is odd: jump 2.
func TestGibbsAtRim(t *testing.T) {
	for _, N := range []int{50, 200} {
		var radii []float64
		for i := 0; i <= 400; i++ {
			radii = append(radii, 1-3*float64(i)/400/float64(N))
		}
		f := radialSum(N, func(j, s float64) float64 { return 2 / (j * s) }, radii)
		top, at := 0.0, 0.0
		for i, v := range f {
			if v > top {
				top, at = v, 1-radii[i]
			}
		}
		// The law holds for N to infinity; the curvature of the circle and the
		// offset of the zeros change it by order 1/N.
		if d := top - 1 - 2*gibbs; math.Abs(d) > 1/float64(N) {
			t.Errorf("N=%d: overshoot %g, law %g", N, top-1, 2*gibbs)
		}
		// First maximum at pi/(largest wave number, j_0N + pi/2).
		if want := 1 / (float64(N) + 0.25); math.Abs(at-want) > 0.02*want {
			t.Errorf("N=%d: overshoot at %g from the rim, law %g", N, at, want)
		}
		if math.Abs(f[0]) > 1e-12*float64(N) {
			t.Errorf("N=%d: sum at the rim %g, want 0", N, f[0])
		}
	}
	// The analysis says so, and misses energy like 1/N: 2/(pi^2 N).
	for _, N := range []int{20, 80} {
		tr := NewTransform(0, N, 0, 2)
		q := tr.AnalyseFunc(make([]float64, tr.Basis.Len()), func(r, theta float64) float64 { return 1 })
		if q.Smooth || !math.IsInf(q.Tail, 1) {
			t.Errorf("N=%d: f = 1 is called smooth, tail %g", N, q.Tail)
		}
		// sum over n > N of 4/j^2 is 4/(pi j) at j = pi (N + 1/4); the midpoint
		// rule errs by less than 1/N^2 of it.
		want := 4 / (math.Pi * math.Pi * (float64(N) + 0.25))
		if math.Abs(q.Missed-want) > want/float64(N*N) {
			t.Errorf("N=%d: missed energy %g, law %g", N, q.Missed, want)
		}
	}
}

// f = 1 inside r < b, 0 outside: coefficients 2 b J_1(jb)/(j J_1(j)^2).
func TestGibbsInside(t *testing.T) {
	const b = 0.5
	coef := func(j, s float64) float64 { return 2 * b * bessel.JInt(1, j*b) / (j * s * s) }
	for _, N := range []int{60, 240} {
		radii := []float64{b}
		for i := 1; i <= 400; i++ {
			radii = append(radii, b+2*float64(i)/400/float64(N))
		}
		f := radialSum(N, coef, radii)
		low := 0.0
		for _, v := range f {
			low = math.Min(low, v)
		}
		// Corrections of order 1/(b N) as above, and ripples of the other
		// edges (rim, centre) of the same order.
		if math.Abs(low+gibbs) > 1/(b*float64(N)) {
			t.Errorf("N=%d: undershoot %g, law %g", N, low, -gibbs)
		}
		if math.Abs(f[0]-0.5) > 1/(b*float64(N)) {
			t.Errorf("N=%d: on the jump %g, want the mean 0.5", N, f[0])
		}
	}
	// At the centre the error dies out like N^(-1/2): terms alternate in sign
	// with size b pi sqrt(2/(pi j b)), and a partial sum is off by up to half a
	// term over |cos| of half the phase step, pi b/2, plus order N^(-3/2).
	worst := func(from, to int) float64 {
		top := 0.0
		for N := from; N < to; N++ {
			top = math.Max(top, math.Abs(radialSum(N, coef, []float64{0})[0]-1))
		}
		return top
	}
	ratio := worst(30, 34) / worst(120, 124)
	if math.Abs(ratio-2) > 0.1 {
		t.Errorf("error at the centre falls by %g for four times the terms, want 2", ratio)
	}
}

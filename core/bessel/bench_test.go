package bessel

import (
	"math"
	"testing"
)

// The three inputs below are the same as in testdata/bench/bessel_scipy.py.

// BenchmarkZeros10000 finds the zeros of J_m for m = 0..39, n = 1..250.
func BenchmarkZeros10000(b *testing.B) {
	z := make([]float64, 250)
	b.ReportAllocs()
	for b.Loop() {
		for m := range 40 {
			ZerosJ(z, float64(m))
		}
	}
}

// randomPoint is the k-th of a fixed sequence of orders in [0, 60) and
// arguments in [0, 200): fractional parts of multiples of two irrationals.
func randomPoint(k int) (nu, x float64) {
	_, u := math.Modf(float64(k) * 0.6180339887498949)
	_, v := math.Modf(float64(k) * 0.4142135623730951)
	return 60 * u, 200 * v
}

// BenchmarkJRandom evaluates J at 1e6 real orders and arguments; one
// operation is all of them.
func BenchmarkJRandom(b *testing.B) {
	const n = 1_000_000
	nu, x := make([]float64, n), make([]float64, n)
	for k := range n {
		nu[k], x[k] = randomPoint(k + 1)
	}
	b.ReportAllocs()
	for b.Loop() {
		for k := range n {
			sink += J(nu[k], x[k])
		}
	}
}

// BenchmarkJSeq200 fills J_0..J_200 at 1e4 arguments in (0, 200].
func BenchmarkJSeq200(b *testing.B) {
	dst := make([]float64, 201)
	b.ReportAllocs()
	for b.Loop() {
		for k := 1; k <= 10_000; k++ {
			JSeq(dst, 0.02*float64(k))
		}
	}
}

var sink float64

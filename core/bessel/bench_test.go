package bessel

import (
	"math"
	"strconv"
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

// BenchmarkJ times single values, one for each method and growing with the
// order: the time is flat where no recurrence is needed and proportional to the
// number of orders passed elsewhere.
func BenchmarkJ(b *testing.B) {
	for _, c := range []struct {
		name  string
		nu, x float64
	}{
		{"series", 30.3, 5},
		{"whole/x=10", 5, 10},
		{"real/x=10", 5.3, 10},
		{"whole/x=40", 5, 40},
		{"real/x=40", 5.3, 40},
		{"above/whole", 60, 50},
		{"above/real", 60.3, 50},
		{"order=50", 50.3, 2000},
		{"order=100", 100.3, 2000},
		{"order=200", 200.3, 2000},
		{"order=400", 400.3, 2000},
		{"order=800", 800.3, 2000},
		{"above/order=200", 200.3, 180},
		{"above/order=400", 400.3, 360},
		{"above/order=800", 800.3, 720},
	} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				sink += J(c.nu, c.x)
			}
		})
	}
}

// BenchmarkJSeqGrowth doubles the length four times.
func BenchmarkJSeqGrowth(b *testing.B) {
	for n := 50; n <= 800; n *= 2 {
		dst := make([]float64, n)
		b.Run("n="+strconv.Itoa(n), func(b *testing.B) {
			for b.Loop() {
				JSeq(dst, 1000)
			}
		})
	}
}

// BenchmarkZerosGrowth doubles the number of zeros four times. The first ten
// cost more each than the rest, so the time per zero falls.
func BenchmarkZerosGrowth(b *testing.B) {
	for n := 25; n <= 400; n *= 2 {
		dst := make([]float64, n)
		b.Run("n="+strconv.Itoa(n), func(b *testing.B) {
			for b.Loop() {
				ZerosJ(dst, 10)
			}
		})
	}
}

// BenchmarkOthers times one call of each of the other functions.
func BenchmarkOthers(b *testing.B) {
	for _, c := range []struct {
		name string
		f    func() float64
	}{
		{"Y", func() float64 { return Y(7.3, 12) }},
		{"I", func() float64 { return IScaled(7.3, 12) }},
		{"K", func() float64 { return KScaled(7.3, 12) }},
		{"RatioI", func() float64 { return RatioI(7, 60) }},
		{"RatioK", func() float64 { return RatioK(7, 60) }},
		{"ZeroJ", func() float64 { return ZeroJ(7, 3) }},
		{"ZeroJPrime", func() float64 { return ZeroJPrime(7, 30) }},
		{"ZeroAnnulus", func() float64 { return ZeroAnnulus(7, 0.3, 3) }},
	} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				sink += c.f()
			}
		})
	}
}

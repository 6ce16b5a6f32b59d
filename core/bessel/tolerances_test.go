package bessel

import (
	"math"
	"math/rand/v2"
	"runtime"
	"testing"
)

// ulpUnit is the relative size of an ulp at worst (of a power of two).
const ulpUnit = 0x1p-52

// Promises of doc.go in ulp, on which the tolerances of the identities rest.
const (
	promiseJ = 2
	promiseY = 8
	promiseM = 8 // I, K and their ratios
)

// scaleJ is the magnitude in whose ulp errors of J_nu(x) and Y_nu(x) are
// counted: the envelope where they oscillate, else the value.
func scaleJ(nu, x float64) float64 {
	j := math.Abs(J(nu, x))
	if x < nu {
		return j
	}
	return math.Hypot(j, Y(nu, x))
}

func scaleY(nu, x float64) float64 {
	return math.Hypot(J(nu, x), Y(nu, x))
}

// points returns the number of random points for a test: fewer under js/wasm,
// which is three to five times slower.
func points(n int) int {
	if runtime.GOARCH == "wasm" {
		return n / 5
	}
	return n
}

func newRand() *rand.Rand { return rand.New(rand.NewPCG(20261201, 7)) }

// dyadic returns a random multiple of 1/1024 in [lo, hi), so that one may be
// added and taken off without rounding.
func dyadic(r *rand.Rand, lo, hi float64) float64 {
	return math.Floor((lo+r.Float64()*(hi-lo))*1024) / 1024
}

// within reports a failure if got and want differ by more than tol.
func within(t *testing.T, what string, nu, x, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s at nu=%v x=%v: %v and %v differ by %.3g, allowed %.3g", what, nu, x, got, want, got-want, tol)
	}
}

package bessel

import (
	"math"
	"testing"
)

// Abramowitz & Stegun (eds.), Handbook of Mathematical Functions, NBS AMS 55
// (1964), Table 9.5, to the ten digits printed there or more; the digits given
// here were recomputed with mpmath 1.2.1.
var publishedZeros = []struct {
	nu   float64
	n    int
	want float64
}{
	{0, 1, 2.404825557695773}, {0, 5, 14.93091770848779},
	{1, 1, 3.831705970207512}, {2, 3, 11.61984117214906},
	{5, 1, 8.77148381596}, {5, 20, 69.722891161717},
	{7, 1, 11.08637001924508}, {8, 5, 26.26681464117664},
	{20, 1, 25.417140814073}, {100, 1, 108.83616589841},
	{500, 1, 514.85931169049},
}

// publishedPrimeZeros are the positive zeros of J'; the tables count x = 0 as
// the first zero of J0', this package does not.
var publishedPrimeZeros = []struct {
	nu   float64
	n    int
	want float64
}{
	{0, 1, 3.831705970207512}, {0, 4, 13.32369193631422},
	{1, 1, 1.841183781340659}, {1, 2, 5.331442773525033},
	{4, 5, 19.19602880004891}, {5, 1, 6.41561637570024},
	{50, 1, 52.997640387317}, {500, 1, 506.42702510826},
}

// Tolerance: half a unit of the last digit printed, at least 2 ulp.
func checkPublished(t *testing.T, name string, got, want, nu float64, n int) {
	t.Helper()
	if math.Abs(got-want) > 5e-13*want {
		t.Errorf("%s(%v, %d) = %.16g, table has %.16g", name, nu, n, got, want)
	}
}

func TestPublishedZeros(t *testing.T) {
	for _, c := range publishedZeros {
		checkPublished(t, "ZeroJ", ZeroJ(c.nu, c.n), c.want, c.nu, c.n)
	}
	for _, c := range publishedPrimeZeros {
		checkPublished(t, "ZeroJPrime", ZeroJPrime(c.nu, c.n), c.want, c.nu, c.n)
	}
}

// J'_m(j_{m,n}), A&S Table 9.5, to the digits recomputed with mpmath.
func TestPublishedSlopes(t *testing.T) {
	for m, want := range [][]float64{
		{-0.51914749728947, 0.34026480655837, -0.27145229992838, 0.23245983136472, -0.206546433078},
		{-0.40275939570255, 0.30011575252613, -0.24970487705784, 0.21835940724787, -0.19646537146866},
		{-0.33966874277373, 0.2713825894146, -0.23244312885108, 0.20654074939869, -0.1877264150473},
	} {
		zeros, slope := make([]float64, len(want)), make([]float64, len(want))
		ZerosJAndDerivative(zeros, slope, float64(m))
		for n := range want {
			if math.Abs(slope[n]-want[n]) > 5e-15 { // half a unit of the last digit
				t.Errorf("J'(%d) at zero %d is %.15f, table has %.15f", m, n+1, slope[n], want[n])
			}
		}
	}
}

// Large-order expansion of the first zero, DLMF 10.21.40 and A&S 9.5.14, with
// its coefficients recomputed: at nu = 1e4 the first term left out, of order
// nu^(-3), is below 1e-12.
func TestLargeOrderExpansion(t *testing.T) {
	const nu = 1e4
	c := math.Cbrt(nu)
	want := nu + 1.8557570814892*c + 1.0331503036492/c - 0.0039740570689507/nu -
		0.090762742004126/(nu*c*c) + 0.043338515672056/(nu*nu*c)
	checkPublished(t, "ZeroJ", ZeroJ(nu, 1), want, nu, 1)
}

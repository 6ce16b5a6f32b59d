package disc

import (
	"math"

	"hoopsheet/core/bessel"
)

// Grid is a polar grid on the unit disc on which integrals are exact up to a
// band: the radii are a Gauss rule in r^2, the angles are uniform,
// theta_k = 2 pi k / NTheta.
//
// Samples on it are stored circle by circle from the centre outwards:
// sample[i*NTheta+k] = f(R[i], theta_k).
type Grid struct {
	R      []float64 // radii, rising, 0 < R[i] < 1
	W      []float64 // weights: integral of f(r) r dr ~ sum W[i] f(R[i])
	NTheta int
}

// NewGrid builds a grid of nr radii and ntheta angles. It panics unless nr >= 1
// and ntheta is even with no prime factor of ntheta/2 above 5; NextAngles finds
// such a number.
func NewGrid(nr, ntheta int) *Grid {
	if !smoothEven(ntheta) {
		panic(errAngles)
	}
	if nr < 1 {
		panic(errRule)
	}
	g := &Grid{R: make([]float64, nr), W: make([]float64, nr), NTheta: ntheta}
	RadialRule(g.R, g.W, 0)
	return g
}

// Len returns the number of samples, len(R) NTheta.
func (g *Grid) Len() int { return len(g.R) * g.NTheta }

// Theta returns the k-th angle.
func (g *Grid) Theta(k int) float64 {
	return 2 * math.Pi * float64(k) / float64(g.NTheta)
}

// Integral returns the integral of sampled f over the disc, with area element
// r dr dtheta.
func (g *Grid) Integral(samples []float64) float64 {
	return g.integrate(samples, func(x float64) float64 { return x })
}

// Energy returns the integral of f^2 over the disc.
func (g *Grid) Energy(samples []float64) float64 {
	return g.integrate(samples, func(x float64) float64 { return x * x })
}

func (g *Grid) integrate(samples []float64, fn func(float64) float64) float64 {
	if len(samples) != g.Len() {
		panic(errLength)
	}
	var sum float64
	for i, w := range g.W {
		var row float64
		for _, x := range samples[i*g.NTheta : (i+1)*g.NTheta] {
			row += fn(x)
		}
		sum += w * row
	}
	return sum * 2 * math.Pi / float64(g.NTheta)
}

// NextAngles returns the smallest allowed number of angles not below n.
func NextAngles(n int) int {
	n = max(n+n%2, 2)
	for !smoothEven(n) {
		n += 2
	}
	return n
}

// MinAngles returns the smallest allowed number of angles that keeps orders
// 0..M apart, M included: at least 2M+2.
func MinAngles(M int) int { return NextAngles(2*M + 2) }

// MinRadii returns the number of radii for which products of any two basis
// functions of the band are integrated to rounding (2e-16 of the product of
// their sizes).
func MinRadii(M, N int) int {
	if M < 0 || N < 1 {
		panic(errBand)
	}
	return minRadii(bessel.ZeroJ(float64(M), N))
}

// minRadii is MinRadii for a largest wave number kappa. A product of two basis
// functions is, as a function of 2r^2-1, like J_m(kappa r)^2 a series of
// Jacobi polynomials whose coefficients are Bessel functions of argument
// 2 kappa and order twice the degree in r^2; these have dropped below 1e-17
// once the order exceeds the argument x by 8 x^(1/3) (DLMF 10.19.8:
// J_nu(nu - a x^(1/3)) ~ (2/x)^(1/3) Ai(2^(1/3) a), and Ai(10.1) = 1e-10, which
// enters squared, the product being of two such). A rule of n radii is exact
// to degree 2n-1 in r^2. Two radii more cover the first orders and zeros, where
// the asymptotic form is not yet good; TestMinRadiiIsEnough holds the result.
func minRadii(kappa float64) int {
	x := 2 * kappa
	degree := (x + 8*math.Cbrt(x)) / 2
	return int(math.Ceil(degree/2)) + 3
}

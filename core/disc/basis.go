package disc

import (
	"math"

	"hoopsheet/core/bessel"
)

// Part tells the cosine from the sine functions of a basis.
type Part int

const (
	Cos Part = 0 // J_m(j_mn r) cos(m theta)
	Sin Part = 1 // J_m(j_mn r) sin(m theta)
)

// Basis is the band of a Fourier-Bessel series: orders m = 0..M, zeros n =
// 1..N, cosines and sines. It is not changed after NewBasis and may be shared.
//
// Coefficients are stored as one slice of Len() numbers, order by order, in
// each order zero by zero, cosine before sine:
//
//	a_01 0  a_02 0 ... a_0N 0   a_11 b_11  a_12 b_12 ...  a_MN b_MN
//
// The sines of m = 0 are there for regularity: analysis writes 0, synthesis
// ignores them.
type Basis struct {
	M, N  int
	zeros []float64 // j_mn at m N + n-1
	slope []float64 // J_{m+1}(j_mn), same place
}

// NewBasis finds the zeros of the band. It panics unless M >= 0 and N >= 1.
func NewBasis(M, N int) *Basis {
	if M < 0 || N < 1 {
		panic(errBand)
	}
	b := &Basis{
		M:     M,
		N:     N,
		zeros: make([]float64, (M+1)*N),
		slope: make([]float64, (M+1)*N),
	}
	for m := 0; m <= M; m++ {
		z, s := b.zeros[m*N:(m+1)*N], b.slope[m*N:(m+1)*N]
		bessel.ZerosJAndDerivative(z, s, float64(m))
		for i := range s {
			s[i] = -s[i] // J'_m = -J_{m+1} at a zero of J_m
		}
	}
	return b
}

// Len returns the number of coefficients, 2 (M+1) N.
func (b *Basis) Len() int { return 2 * (b.M + 1) * b.N }

// Index returns the place of the coefficient of order m, zero n (from 1) and
// part p. It panics outside the band.
func (b *Basis) Index(m, n int, p Part) int {
	if m < 0 || m > b.M || n < 1 || n > b.N || p < Cos || p > Sin {
		panic(errIndex)
	}
	return 2*(m*b.N+n-1) + int(p)
}

// At is the inverse of Index.
func (b *Basis) At(i int) (m, n int, p Part) {
	if i < 0 || i >= b.Len() {
		panic(errIndex)
	}
	k := i / 2
	return k / b.N, k%b.N + 1, Part(i % 2)
}

// Zero returns j_mn, the n-th positive zero of J_m.
func (b *Basis) Zero(m, n int) float64 { return b.zeros[b.Index(m, n, Cos)/2] }

// Slope returns J_{m+1}(j_mn) = -J'_m(j_mn).
func (b *Basis) Slope(m, n int) float64 { return b.slope[b.Index(m, n, Cos)/2] }

// Norm returns the integral of the square of a basis function over the disc,
//
//	(pi eps_m / 2) J_{m+1}(j_mn)^2,   eps_0 = 2, eps_m = 1 for m >= 1.
func (b *Basis) Norm(m, n int) float64 {
	s := b.Slope(m, n)
	return halfPiEps(m) * s * s
}

func halfPiEps(m int) float64 {
	if m == 0 {
		return math.Pi
	}
	return math.Pi / 2
}

// Energy returns the integral over the disc of the square of the function with
// these coefficients (Parseval). It panics if len(coef) is not Len().
func (b *Basis) Energy(coef []float64) float64 { return b.Roughness(coef, 0) }

// Roughness returns the integral over the disc of f^2 (p = 0), |grad f|^2 (p = 1)
// or (Laplacian f)^2 (p = 2) for the function with these coefficients: the sum
// of j_mn^(2p) Norm(m, n) (a_mn^2 + b_mn^2).
func (b *Basis) Roughness(coef []float64, p int) float64 {
	if len(coef) != b.Len() {
		panic(errLength)
	}
	var sum float64
	for k, z := range b.zeros {
		c, s := coef[2*k], coef[2*k+1]
		if k < b.N {
			s = 0
		}
		v := halfPiEps(k/b.N) * (c*c + s*s) * b.slope[k] * b.slope[k]
		for range p {
			v *= z * z
		}
		sum += v
	}
	return sum
}

package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// dryRoots returns omega a sqrt(sigma/T) (or with T = 0 of sqrt(sigma a^2/D))
// of the lowest count modes by the Ritz method in n shapes.
func dryRoots(m, n, count int, T, d, nu float64, rim Rim) []float64 {
	s := newStrain(m, n, T, d, nu, rim)
	mass := make([]float64, n*n)
	disc.HeldEdge.FillForm(mass, m, n, 0)
	c := make([]float64, s.size*s.size)
	s.congruence(c, mass)
	values := newSymmetric(s.size).largest(c, count, make([]float64, count*s.size))
	roots := make([]float64, count)
	for i, v := range values {
		roots[i] = 1 / math.Sqrt(v)
	}
	return roots
}

func TestStrainIdeal(t *testing.T) {
	// The ideal sheet is the zeros of J_m (Abramowitz & Stegun, Table 9.5 by
	// core/bessel). A mode n has a polynomial of degree 2 x 24 to follow it.
	for m := range 13 {
		zeros := bessel.ZerosJ(make([]float64, 3), float64(m))
		for i, got := range dryRoots(m, 24, 3, 1, 0, 0, RimClamped) {
			// 1/omega^2 errs by a few eps of the largest, that is of (j_m1/j_mn)^-2.
			ratio := zeros[i] / zeros[0]
			if math.Abs(got-zeros[i]) > 1e-14*zeros[i]*ratio*ratio {
				t.Errorf("(%d,%d): %.16g, want %.16g", m, i+1, got, zeros[i])
			}
		}
	}
}

func TestStiffRitz(t *testing.T) {
	// The polynomial Ritz method against the exact equation: they share nothing
	// but the tables of J. s = T a^2/D; T = 1 unless s = 0.
	for _, rim := range Rims() {
		for _, s := range []float64{0, 1, 100, 1e4} {
			for _, m := range []int{0, 1, 2, 5, 12, 20} {
				T, d := 1.0, 1/s
				if s == 0 {
					T, d = 0, 1
				}
				roots := StiffRoots(make([]float64, 5), m, s, 0.3, rim)
				for i, got := range dryRoots(m, 48, 5, T, d, 0.3, rim) {
					want := roots[i] * math.Sqrt(T+d*roots[i]*roots[i])
					// 1/omega^2 keeps eps of the largest; the spread is up to 1e4.
					if math.Abs(got-want) > 1e-11*want {
						t.Errorf("%s s %v (%d,%d): Ritz %.14g, exact %.14g", rim, s, m, i+1, got, want)
					}
				}
			}
		}
	}
}

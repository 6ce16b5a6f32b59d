package bessel

import (
	"math"
	"testing"
)

// Rayleigh's sums over the zeros of J_nu, DLMF 10.21(xiii) and Watson 15.51:
// sum of j^-2 = 1/(4(nu+1)), sum of j^-4 = 1/(16 (nu+1)^2 (nu+2)).
func TestRayleighSums(t *testing.T) {
	const n = 2000
	z := make([]float64, n)
	for _, nu := range []float64{0, 0.25, 1, 2, 5} {
		ZerosJ(z, nu)
		// The tail by McMahon: j = pi w - (mu-1)/(8 pi w) + O(mu^2 w^-3), with
		// w = k + nu/2 - 1/4, k > n, and sums of w^-2 and w^-4 by
		// Euler-Maclaurin. What is left out is of order mu^2/(pi^6 n^5) = 1e-17.
		w := n + 1 + nu/2 - 0.25
		s2 := 1/w + 1/(2*w*w) + 1/(6*w*w*w)
		s4 := 1/(3*w*w*w) + 1/(2*w*w*w*w)
		mu, p := 4*nu*nu, math.Pi*math.Pi
		sum2, sum4 := s2/p+(mu-1)*s4/(4*p*p), s4/(p*p)
		for k := n - 1; k >= 0; k-- {
			q := 1 / (z[k] * z[k])
			sum2 += q
			sum4 += q * q
		}
		// Each zero is good to 2 ulp, its -2nd and -4th power to 4 and 8; the
		// sum from the small end adds a few.
		want := 1 / (4 * (nu + 1))
		within(t, "sum of j^-2", nu, n, sum2, want, 8*ulpUnit*want)
		want = 1 / (16 * (nu + 1) * (nu + 1) * (nu + 2))
		within(t, "sum of j^-4", nu, n, sum4, want, 12*ulpUnit*want)
	}
}

package disc

import (
	"math"
	"testing"
)

var ruleAlphas = []float64{0, 0.5, 1, 2}

// A rule of n radii integrates r^(2k) (1-r^2)^alpha r exactly for k <= 2n-1:
// half the beta function B(k+1, alpha+1), here by its recurrence
// B(k+1, b) = B(k, b) k/(k+b).
func TestRadialRuleMoments(t *testing.T) {
	for _, n := range []int{1, 2, 3, 4, 5, 8, 13, 32, 64, 165, 256, 500, 1000} {
		r, w := make([]float64, n), make([]float64, n)
		for _, alpha := range ruleAlphas {
			RadialRule(r, w, alpha)
			want := 0.5 / (alpha + 1)
			pow := append([]float64(nil), w...)
			worst := 0.0
			for k := 0; k <= 2*n-1; k++ {
				var sum float64
				for i := range pow {
					sum += pow[i]
					pow[i] *= r[i] * r[i]
				}
				worst = math.Max(worst, math.Abs(sum-want))
				want *= float64(k+1) / (float64(k+1) + alpha + 1)
			}
			// Absolute error in units of the whole weight: a radius good to
			// 2^-53 moves r^(2k) by 2k 2^-53 of itself and the running power by
			// as much again, but the moment has fallen to 1/k: 4 units of
			// 2^-53. The weights carry the rounding of n steps of a stable
			// recurrence, about sqrt(n) of random sign each; the sum averages
			// them to a few units. Together below 32 units of 2^-53. For
			// alpha > 0 a product of n factors of two roundings each enters
			// squared: 2 sqrt(2n) units more.
			tol := 0.5 / (alpha + 1) * 32 * 0x1p-53
			if alpha > 0 {
				tol *= 1 + 2*math.Sqrt(2*float64(n))/32
			}
			if worst > tol {
				t.Errorf("n=%d alpha=%g: worst moment off by %.3g, allowed %.3g", n, alpha, worst, tol)
			}
		}
	}
}

// The nodes of the rule of n and n+1 radii interlace, and all lie inside.
func TestRadialRuleNodes(t *testing.T) {
	for _, alpha := range ruleAlphas {
		var before []float64
		for n := 1; n <= 512; n++ {
			if n > 40 && n%128 > 1 {
				continue // pairs such as 256 and 257 from here on
			}
			r, w := make([]float64, n), make([]float64, n)
			RadialRule(r, w, alpha)
			for i := range r {
				if !(r[i] > 0 && r[i] < 1 && w[i] > 0) {
					t.Fatalf("n=%d alpha=%g: node %g weight %g", n, alpha, r[i], w[i])
				}
				if len(before) == n-1 && i < n-1 && !(r[i] < before[i] && before[i] < r[i+1]) {
					t.Fatalf("n=%d alpha=%g: node %d does not interlace", n, alpha, i)
				}
			}
			before = r
		}
	}
}

// Gauss-Legendre nodes and weights of 5 points on (-1, 1): Abramowitz & Stegun,
// Table 25.4, n = 5.
func TestRadialRulePublished(t *testing.T) {
	x := []float64{-0.906179845938664, -0.538469310105683, 0, 0.538469310105683, 0.906179845938664}
	wx := []float64{0.236926885056189, 0.478628670499366, 0.568888888888889, 0.478628670499366, 0.236926885056189}
	r, w := make([]float64, 5), make([]float64, 5)
	RadialRule(r, w, 0)
	for i := range r {
		// Printed to 15 decimals; the comparison adds two roundings.
		if math.Abs(2*r[i]*r[i]-1-x[i]) > 0.5e-15+2*0x1p-52 || math.Abs(4*w[i]-wx[i]) > 0.5e-15+2*0x1p-52 {
			t.Errorf("node %d: x=%.16g w=%.16g, printed %.15g %.15g", i, 2*r[i]*r[i]-1, 4*w[i], x[i], wx[i])
		}
	}
}

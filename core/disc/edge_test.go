package disc

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

// peak returns the largest size of u_j of order m on the disc.
func peak(e Edge, m, j int) float64 {
	u := make([]float64, j+1)
	top := 0.0
	for i := 0; i <= 2000; i++ {
		// Half the points crowd at the rim, half at the centre.
		r := math.Sin(math.Pi / 2 * float64(i) / 2000)
		e.Shapes(u, m, r)
		top = math.Max(top, math.Abs(u[j]))
	}
	return top
}

func TestShapesAccuracy(t *testing.T) {
	ref := loadReference(t)
	tops := map[[3]int]float64{}
	worst := 0.0
	for _, row := range ref.Shapes {
		e, m, j := edgeOf(row[0]), whole(row[1]), whole(row[2])
		r, want := row[3].(float64), row[4].(float64)
		key := [3]int{int(e), m, j}
		if tops[key] == 0 {
			tops[key] = peak(e, m, j)
		}
		u := make([]float64, j+1)
		e.Shapes(u, m, r)
		off := math.Abs(u[j]-want) / tops[key]
		worst = math.Max(worst, off)
		// The radius itself is given, so only the recurrence rounds: j steps
		// whose errors, of a few 2^-53 each, neither grow nor decay where the
		// shape oscillates: 2 j 2^-53 at j = 200 is 4e-14, and their signs vary.
		if tol := (8 + 2*float64(j)) * 0x1p-53; off > tol {
			t.Errorf("family %d m=%d j=%d r=%v: got %g want %g, off by %.2g of the peak, allowed %.2g", e, m, j, r, u[j], want, off, tol)
		}
	}
	t.Logf("worst %.3g of the peak", worst)
}

// At the ends: u_j(0) = c_j for m = 0, 0 for m > 0; u_j(1) = 0; slope of
// HeldEdge at the rim -2 c_j P_j^(m,1)(-1) = -(-1)^j (P_j^(a,1)(-1) = (-1)^j (j+1)).
func TestShapesAtEnds(t *testing.T) {
	u := make([]float64, 201)
	for _, m := range []int{0, 1, 2, 9, 200} {
		for _, e := range []Edge{RootEdge, HeldEdge, ClampedEdge} {
			e.Shapes(u, m, 1)
			for j, v := range u {
				if v != 0 {
					t.Errorf("family %d m=%d u_%d(1) = %g, want 0", e, m, j, v)
				}
			}
			e.Shapes(u, m, 0)
			for j, v := range u {
				want := 0.0
				if m == 0 {
					want = e.norm(j)
				}
				if math.Abs(v-want) > float64(4+2*j)*0x1p-53*want {
					t.Errorf("family %d m=%d u_%d(0) = %g, want %g", e, m, j, v, want)
				}
			}
		}
		const h = 0x1p-30
		HeldEdge.Shapes(u, m, 1-h)
		for j, v := range u {
			want := 1.0
			if j%2 == 1 {
				want = -1
			}
			// Next term of the Taylor series: |u''| h / 2, u'' <= (m+2j+2)^2.
			b := float64(m + 2*j + 2)
			if math.Abs(v/h-want) > b*b*h {
				t.Errorf("m=%d slope of u_%d at the rim %g, want %g", m, j, -v/h, -want)
			}
		}
	}
}

func TestHankelTransformOfShapes(t *testing.T) {
	ref := loadReference(t)
	r, w := make([]float64, 64), make([]float64, 64)
	for _, row := range ref.Hankel {
		e, m, j := edgeOf(row[0]), whole(row[1]), whole(row[2])
		k, want := row[3].(float64), row[4].(float64)
		form := bessel.J(e.Order(m, j), k) / math.Pow(k, e.Nu()+1)
		// Want is a 50-digit quadrature of the shape itself; the formula is a
		// Bessel function (4 ulp of its envelope, taken as 1) and a power.
		if math.Abs(form-want) > 16*0x1p-53/math.Pow(k, e.Nu()+1) {
			t.Errorf("family %d m=%d j=%d k=%g: J_b/k^(nu+1) = %.17g, quadrature %.17g", e, m, j, k, form, want)
		}
		// Our own shapes under our own rule.
		alpha := e.Nu()
		RadialRule(r, w, alpha)
		u := make([]float64, j+1)
		var sum float64
		for i := range r {
			e.Shapes(u, m, r[i])
			sum += w[i] * u[j] / math.Pow((1-r[i])*(1+r[i]), alpha) * bessel.JInt(m, k*r[i])
		}
		if math.Abs(sum-want) > 1e-14 {
			t.Errorf("family %d m=%d j=%d k=%g: rule gives %.17g, want %.17g", e, m, j, k, sum, want)
		}
	}
}

// Orthogonality for all pairs: under the weight (1-r^2)^-nu r dr different
// shapes have product 0.
func TestShapesOrthogonal(t *testing.T) {
	const n = 40
	r, w := make([]float64, 2*n), make([]float64, 2*n)
	u := make([]float64, n)
	for _, e := range []Edge{RootEdge, HeldEdge, ClampedEdge} {
		RadialRule(r, w, e.Nu())
		for _, m := range []int{0, 1, 12, 37} {
			gram := make([]float64, n*n)
			for i := range r {
				e.Shapes(u, m, r[i])
				f := w[i] / math.Pow((1-r[i])*(1+r[i]), 2*e.Nu())
				for a := range u {
					for b := range u {
						gram[a*n+b] += f * u[a] * u[b]
					}
				}
			}
			for a := range u {
				for b := range u {
					scale := math.Sqrt(gram[a*n+a] * gram[b*n+b])
					if a != b && math.Abs(gram[a*n+b]) > 1e-12*scale {
						t.Errorf("family %d m=%d: shapes %d and %d have product %g of their norms", e, m, a, b, gram[a*n+b]/scale)
					}
				}
			}
		}
	}
}

func TestGammaRatioAndPower(t *testing.T) {
	ref := loadReference(t)
	for _, row := range ref.GammaRatio {
		// Below 16 the shift multiplies up to 15 quotients of 1 ulp each.
		tol := 3.0
		if row[0] < 16 {
			tol += 2 * (16 - row[0])
		}
		if d := ulps(gammaRatio(int(row[0])), row[1]); d > tol {
			t.Errorf("gammaRatio(%g) off by %g ulp", row[0], d)
		}
	}
	for _, row := range ref.Power {
		if d := ulps(powInt(row[0], int(row[1])), row[2]); d > 1 {
			t.Errorf("powInt(%g, %g) off by %g ulp", row[0], row[1], d)
		}
	}
	if powInt(0, 0) != 1 || powInt(0, 5) != 0 || powInt(1e-3, 200) != 0 {
		t.Errorf("powInt at 0 or below the smallest number: %g %g %g", powInt(0, 0), powInt(0, 5), powInt(1e-3, 200))
	}
}

func TestShapesDoNotAllocate(t *testing.T) {
	u := make([]float64, 30)
	if n := testing.AllocsPerRun(10, func() { HeldEdge.Shapes(u, 3, 0.4) }); n != 0 {
		t.Errorf("%g allocations, want none", n)
	}
}

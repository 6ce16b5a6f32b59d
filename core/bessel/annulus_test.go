package bessel

import (
	"math"
	"testing"
)

// crossProduct is the function whose roots are sought.
func crossProduct(m int, q, x float64, outer, inner Edge) float64 {
	nu := float64(m)
	f := func(e Edge, x float64) (j, y float64) {
		if e == Neumann {
			return JPrime(nu, x), YPrime(nu, x)
		}
		return J(nu, x), Y(nu, x)
	}
	jo, yo := f(outer, x)
	ji, yi := f(inner, q*x)
	return jo*yi - ji*yo
}

var edgePairs = [][2]Edge{{Dirichlet, Dirichlet}, {Neumann, Neumann}, {Dirichlet, Neumann}, {Neumann, Dirichlet}}

// Between neighbouring roots, on a grid of twenty points to a half wave, the
// cross product changes sign exactly once at each root and nowhere else.
func TestAnnulusCount(t *testing.T) {
	for _, m := range []int{0, 1, 2, 5, 17, 40} {
		for _, q := range []float64{0.05, 0.3, 0.62, 0.9, 0.99} {
			for _, e := range edgePairs {
				step := math.Pi / (1 - q) / 20
				lo := math.Max(float64(m), 1e-3) // no root is below m
				step = math.Min(step, 0.05*math.Max(lo, 1))
				count := 0
				last := crossProduct(m, q, lo, e[0], e[1])
				for x := lo; count < 8; x += step {
					v := crossProduct(m, q, x+step, e[0], e[1])
					if v*last < 0 {
						count++
						z := ZeroAnnulusEdges(m, q, count, e[0], e[1])
						if !(z >= x && z <= x+step) {
							t.Errorf("m=%d q=%v edges %v: root %d = %v, sign change in (%v, %v)", m, q, e, count, z, x, x+step)
						}
					}
					last = v
				}
			}
		}
	}
}

// Far and thin cases: roots rise, are about pi/(1-q) apart and change the sign.
func TestAnnulusRises(t *testing.T) {
	for _, m := range []int{0, 3, 100, 1000} {
		for _, q := range []float64{0.01, 0.5, 0.99} {
			for _, e := range edgePairs {
				last := 0.0
				for n := 1; n <= 40; n++ {
					z := ZeroAnnulusEdges(m, q, n, e[0], e[1])
					if !(z > last && z >= float64(m)) {
						t.Errorf("m=%d q=%v edges %v: root %d = %v after %v", m, q, e, n, z, last)
					}
					// At large n the gap tends to pi/(1-q) from above; for a
					// disc it is at least that of J, pi.
					if n > 1 && z-last < 3.1 {
						t.Errorf("m=%d q=%v edges %v: gap %v before root %d", m, q, e, z-last, n)
					}
					last = z
					h := 4 * ulpUnit * z * math.Max(1, q/(1-q))
					a, b := crossProduct(m, q, z-h, e[0], e[1]), crossProduct(m, q, z+h, e[0], e[1])
					if a*b > 0 {
						t.Errorf("m=%d q=%v edges %v: no sign change at root %d = %v: %v, %v", m, q, e, n, z, a, b)
					}
				}
			}
		}
	}
}

// A hub that shrinks to nothing leaves the zeros of the disc. To first order the
// root moves by J_m(qx)/Y_m(qx), times Y_m/J'_m at x, which is about 1; with the
// leading terms at qx that is pi (qx/2)^(2m) / (m! (m-1)!).
func TestAnnulusTendsToDisc(t *testing.T) {
	const q = 1e-3
	for m := 1; m < 30; m++ {
		nu := float64(m)
		for n := 1; n < 20; n++ {
			a, b := ZeroJ(nu, n), ZeroJPrime(nu, n)
			move := 1.5 * math.Pi * math.Pow(q*a/2, 2*nu) / (math.Gamma(nu+1) * math.Gamma(nu))
			within(t, "clamped rim", nu, float64(n), ZeroAnnulus(m, q, n), a, 4*ulpUnit*a+move)
			// The slope of Y'/J'' at the turning point is steeper for n = 1.
			within(t, "free rim", nu, float64(n), ZeroAnnulusPrime(m, q, n), b, 4*ulpUnit*b+3*move)
		}
	}
}

// Abramowitz & Stegun, Table 9.7: roots of J_m(x) Y_m(lx) - J_m(lx) Y_m(x) in
// units of the inner radius, at the table's arguments 1/l; digits recomputed
// with mpmath.
func TestPublishedCrossProducts(t *testing.T) {
	for _, c := range []struct {
		m    int
		q    float64
		n    int
		want float64
	}{
		{0, 0.8, 1, 12.558470315}, {0, 0.8, 2, 25.1287696798}, {0, 0.6, 1, 4.69706408834},
		{0, 0.4, 2, 4.17729882752}, {0, 0.1, 1, 0.331393871505}, {0, 0.02, 1, 0.0576844968988},
		{1, 0.8, 1, 12.5900415116}, {1, 0.2, 1, 0.847149608885}, {1, 0.02, 2, 0.14061611644},
	} {
		// Half a unit of the last digit given.
		within(t, "inner root", float64(c.m), c.q, c.q*ZeroAnnulus(c.m, c.q, c.n), c.want, 6e-12*c.want)
	}
}

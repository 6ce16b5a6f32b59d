package disc

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

// Radial initial shapes with known coefficients of order 0. Twelve digits
// recomputed with mpmath by quadrature of the inner product.
func TestPublishedSeries(t *testing.T) {
	for _, c := range []struct {
		name string
		f    func(r float64) float64
		want []float64
		kink float64 // slope at the centre, which a polynomial in r^2 lacks
	}{
		// 8/(j^3 J_1(j)): standard textbook example (Asmar; Kreyszig).
		{"1 - r^2", func(r float64) float64 { return (1 - r) * (1 + r) },
			[]float64{1.10802226122, -0.139777505298, 0.0454764706896, -0.0209909018189, 0.0116362429987, -0.00722117560358}, 0},
		// 2/(j J_1(j)): standard.
		{"1", func(r float64) float64 { return 1 },
			[]float64{1.60197469693, -1.06479925842, 0.851399192337, -0.729645239818, 0.648523614291, -0.589542829305}, 0},
		// Cone: pi H_0(j)/(j^2 J_1(j)), H_0 Struve's function.
		{"1 - r", func(r float64) float64 { return 1 - r },
			[]float64{0.784519422344, 0.0686888564941, 0.0531141389406, 0.0173626725072, 0.0169807834991, 0.00781659142941}, 1},
	} {
		tr := NewTransform(0, 6, 100, 2)
		got := make([]float64, tr.Basis.Len())
		tr.AnalyseFunc(got, func(r, _ float64) float64 { return c.f(r) })
		// A kink at the centre is integrated with the error the rule makes in
		// the integral of r^2, 1/3, for J_0 is 1 there; the next term of J_0
		// adds less than a tenth at these n. The norm is J_1^2/2.
		kink := -c.kink / 3
		for i, r := range tr.Grid.R {
			kink += c.kink * tr.Grid.W[i] * r
		}
		for i, want := range c.want {
			s := tr.Basis.Slope(0, i+1)
			tol := 1.1*math.Abs(kink)*2/(s*s) + 6e-12*math.Abs(want)
			if d := math.Abs(got[2*i] - want); d > tol {
				t.Errorf("%s, n=%d: got %.13g want %.12g", c.name, i+1, got[2*i], want)
			}
		}
	}
}

// Graf's addition theorem (DLMF 10.23.7) fills every order and both parts:
//
//	J_0(k |x - x0|) = sum eps_m J_m(k r0) J_m(k r) cos m(theta - theta0),
//
// and the integral of J_m(kr) J_m(jr) r is j J_{m+1}(j) J_m(k) / (j^2 - k^2)
// (DLMF 10.22.4). A sampled analysis must find these coefficients though the
// function is not zero at the rim.
func TestAdditionTheorem(t *testing.T) {
	const k, r0, theta0 = 13.7, 0.43, 0.9
	// The function has orders up to about k r0 + 20 and wave number 13.7; the
	// grid of M = N = 16 resolves its product with the band.
	tr := NewTransform(16, 16, 0, 96)
	b := tr.Basis
	got := make([]float64, b.Len())
	q := tr.AnalyseFunc(got, func(r, theta float64) float64 {
		x, y := r*math.Cos(theta)-r0*math.Cos(theta0), r*math.Sin(theta)-r0*math.Sin(theta0)
		return bessel.JInt(0, k*math.Hypot(x, y))
	})
	for m := 0; m <= b.M; m++ {
		for n := 1; n <= b.N; n++ {
			j := b.Zero(m, n)
			a := 2 * j * bessel.JInt(m, k) / ((j*j - k*k) * b.Slope(m, n)) * bessel.JInt(m, k*r0)
			if m > 0 {
				a *= 2
			}
			s, c := math.Sincos(float64(m) * theta0)
			for p, want := range map[Part]float64{Cos: a * c, Sin: a * s} {
				if p == Sin && m == 0 {
					want = 0
				}
				// Samples of size 1 with 2^-52 of noise, divided by the norm
				// J_{m+1}^2/2 >= 1/(pi j).
				if v := got[b.Index(m, n, p)]; math.Abs(v-want) > 1e-13 {
					t.Errorf("m=%d n=%d part %d: got %.15g want %.15g", m, n, p, v, want)
				}
			}
		}
	}
	if q.Smooth {
		t.Error("a function that is not zero at the rim is called smooth")
	}
}

// Rayleigh's sums over the zeros of a basis (DLMF 10.21(xiii); Watson 15.51):
// sum j^-2 = 1/(4(m+1)), sum j^-4 = 1/(16 (m+1)^2 (m+2)).
func TestRayleighSums(t *testing.T) {
	const N = 400
	b := NewBasis(3, N)
	for m := 0; m <= 3; m++ {
		var s2, s4 float64
		for n := N; n >= 1; n-- {
			z := b.Zero(m, n)
			s2 += 1 / (z * z)
			s4 += 1 / (z * z * z * z)
		}
		// Zeros are pi apart but for m^2/(2 pi n^2): the rest beyond x, half a
		// step past the last zero, is 1/(pi x) and 1/(3 pi x^3), the midpoint
		// rule erring by pi^2/24 f' < 1e-8 and 1e-14.
		x := b.Zero(m, N) + math.Pi/2
		f := float64(m + 1)
		if d := s2 + 1/(math.Pi*x) - 1/(4*f); math.Abs(d) > 1e-8 {
			t.Errorf("m=%d: sum of j^-2 off by %g", m, d)
		}
		if d := s4 + 1/(3*math.Pi*x*x*x) - 1/(16*f*f*(f+1)); math.Abs(d) > 1e-14 {
			t.Errorf("m=%d: sum of j^-4 off by %g", m, d)
		}
	}
}

package disc

import (
	"math"
	"math/rand/v2"
	"testing"

	"hoopsheet/core/bessel"
)

// J_m(kappa r) rebuilt from shapes, at zeros of J_m and away from them.
func TestBesselShapes(t *testing.T) {
	u := make([]float64, 80)
	k := make([]float64, 80)
	for _, m := range []int{0, 1, 5, 30, 100} {
		for _, kappa := range []float64{0, 0.3, 2, bessel.ZeroJ(float64(m), 1), 40, bessel.ZeroJ(float64(m), 5), 90} {
			BesselShapes(k, m, kappa)
			var size float64
			for _, v := range k {
				size += math.Abs(v)
			}
			for _, r := range []float64{0, 0.01, 0.2, 0.5, 0.7, 0.71, 0.9, 0.999, 1} {
				HeldEdge.Shapes(u, m, r)
				got := bessel.JInt(m, kappa) * math.Pow(r, float64(m))
				for j := range u {
					got += k[j] * u[j]
				}
				// Shapes are below 1 and good to 4e-14 of that at worst, more
				// often to 1e-15; their coefficients add up to size.
				if want := bessel.JInt(m, kappa*r); math.Abs(got-want) > 1e-15*(4+size) {
					t.Errorf("m=%d kappa=%g r=%g: got %g want %g", m, kappa, r, got, want)
				}
			}
		}
	}
}

func TestConverterRoundTrip(t *testing.T) {
	b := NewBasis(9, 12)
	rng := rand.New(rand.NewPCG(8, 8))
	for _, m := range []int{0, 1, 4, 9} {
		// Enough shapes for the band: order past j_mN by 8 cube roots of it.
		z := b.Zero(m, b.N)
		shapes := int(z+8*math.Cbrt(z)-float64(m))/2 + 1
		c := NewConverter(b, m, HeldEdge, shapes)
		in := make([]float64, b.N)
		for i := range in {
			in[i] = rng.NormFloat64()
		}
		mid, out := make([]float64, shapes), make([]float64, b.N)
		c.FromBessel(mid, in)
		c.ToBessel(out, mid)
		for i := range in {
			if math.Abs(in[i]-out[i]) > 1e-12 {
				t.Errorf("m=%d n=%d: %g comes back as %g", m, i+1, in[i], out[i])
			}
		}
		if n := testing.AllocsPerRun(5, func() { c.FromBessel(mid, in); c.ToBessel(out, mid) }); n != 0 {
			t.Errorf("%g allocations, want none", n)
		}
	}
}

// u_0 of order 0 is (1-r^2)/2, with coefficients half of 8/(j^3 J_1(j)); its
// first six as printed (12 digits, standard textbook example). For ClampedEdge
// u_0 = (1-r^2)^2/8: coefficients 2 J_3(j)/(j^3 J_1(j)^2).
func TestToBesselPublished(t *testing.T) {
	b := NewBasis(0, 6)
	got := make([]float64, 6)
	NewConverter(b, 0, HeldEdge, 1).ToBessel(got, []float64{2})
	for i, want := range []float64{1.10802226122, -0.139777505298, 0.0454764706896, -0.0209909018189, 0.0116362429987, -0.00722117560358} {
		if math.Abs(got[i]-want) > 0.6e-11*math.Abs(want) {
			t.Errorf("n=%d: got %.13g want %.12g", i+1, got[i], want)
		}
	}
	NewConverter(b, 0, ClampedEdge, 1).ToBessel(got, []float64{1})
	for i := range got {
		j, s := b.Zero(0, i+1), b.Slope(0, i+1)
		if want := 2 * bessel.JInt(3, j) / (j * j * j * s * s); math.Abs(got[i]-want) > 8*0x1p-52*math.Abs(want) {
			t.Errorf("clamped n=%d: got %.16g want %.16g", i+1, got[i], want)
		}
	}
}

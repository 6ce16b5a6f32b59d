package disc

import (
	"math"
	"math/cmplx"
	"testing"

	"hoopsheet/core/bessel"
)

// powers sums a SoundSeries at k0.
func powers(series []float64, k0 complex128) complex128 {
	var sum complex128
	x := complex(1, 0)
	for q, v := range series {
		c := complex(v, 0)
		if q%2 == 1 {
			c = complex(0, v)
		}
		sum += c * x
		x *= k0
	}
	return sum
}

func TestSoundSeriesAgainstQuadrature(t *testing.T) {
	series := make([]float64, 60)
	for _, row := range loadReference(t).Sound {
		e, m, i, j := edgeOf(row[0]), whole(row[1]), whole(row[2]), whole(row[3])
		k0, want := row[4].(float64), complex(row[5].(float64), row[6].(float64))
		e.SoundSeries(series, m, i, j)
		got := powers(series, complex(k0, 0))
		// The quadrature ends at 118 with the mean of the rest: k0^2/(12 pi)
		// 118^-6 or, open, k0^4/(40 pi) 118^-5, of which the oscillation is
		// left. At k0 = 2 the terms of the series exceed the sum by a factor
		// below I_0(4) = 11.3.
		left := k0 * k0 / (12 * math.Pi) * math.Pow(118, -7)
		if e == RootEdge {
			left = k0 * k0 * k0 * k0 / (40 * math.Pi) * math.Pow(118, -6)
		}
		if cmplx.Abs(got-want) > 5*left+16*0x1p-52*cmplx.Abs(want) {
			t.Errorf("family %d m=%d i=%d j=%d k0=%g: got %.15g want %.15g", e, m, i, j, k0, got, want)
		}
	}
}

// Ideal sheet modes with a baffled face and sound: mass factor and radiation
// resistance over rho c, per integral of w^2, at k0 a = 0, .25, .5, 1, 2, 3.
// Rayleigh's and King's integral by quadrature, eight decimals.
func TestRadiationOfSheetModes(t *testing.T) {
	ka := []float64{0, 0.25, 0.5, 1, 2, 3}
	for _, c := range []struct {
		m, n             int
		mass, resistance []float64
	}{
		{0, 1, []float64{0.74643516, 0.73883293, 0.7164362, 0.63274035, 0.37771273, 0.14732413}, []float64{0, 0.02147601, 0.0842661, 0.31216258, 0.92320453, 1.28909762}},
		{1, 1, []float64{0.33013196, 0.33280083, 0.34045209, 0.36603991, 0.40530863, 0.34591729}, []float64{0, 8.818e-05, 0.00138704, 0.02072641, 0.25207454, 0.80665318}},
		{2, 1, []float64{0.22582857, 0.22635147, 0.22797677, 0.23519573, 0.26883106, 0.30965007}, []float64{0, 1.5e-07, 9.68e-06, 0.00058452, 0.02956643, 0.22656046}},
		{0, 2, []float64{0.26164244, 0.25942138, 0.25309731, 0.23251347, 0.20549829, 0.24751135}, []float64{0, 0.00402853, 0.01525563, 0.04875885, 0.07503988, 0.0879073}},
		{3, 1, []float64{0.17470487, 0.17491425, 0.17554972, 0.17821348, 0.19118522, 0.21932741}, []float64{0, 0, 4e-08, 9.11e-06, 0.00190276, 0.03460011}},
	} {
		const n = 20
		shape := make([]float64, n)
		BesselShapes(shape, c.m, bessel.ZeroJ(float64(c.m), c.n))
		mass := make([]float64, n*n)
		HeldEdge.FillForm(mass, c.m, n, 0)
		norm := quadratic(mass, shape)
		total := make([]complex128, len(ka))
		series := make([]float64, 60)
		for i := range n {
			for j := range n {
				HeldEdge.SoundSeries(series, c.m, i, j)
				for l, k := range ka {
					total[l] += powers(series, complex(k, 0)) * complex(shape[i]*shape[j]/norm, 0)
				}
			}
		}
		for l, k := range ka {
			// Half a unit of the eighth decimal, and as much for the table's
			// own quadrature.
			if d := math.Abs(real(total[l]) - c.mass[l]); d > 1e-8 {
				t.Errorf("(%d,%d) ka=%g: mass factor %.9g, want %.8g", c.m, c.n, k, real(total[l]), c.mass[l])
			}
			if d := math.Abs(k*imag(total[l]) - c.resistance[l]); d > 1e-8 {
				t.Errorf("(%d,%d) ka=%g: resistance %.9g, want %.8g", c.m, c.n, k, k*imag(total[l]), c.resistance[l])
			}
		}
	}
}

// The digits lost to cancellation: largest term over the sum. A sum of terms
// each good to a few ulp keeps the rest.
func TestSoundSeriesLoss(t *testing.T) {
	full := make([]float64, 84)
	for _, e := range []Edge{RootEdge, HeldEdge, ClampedEdge} {
		for _, s := range [][3]int{{0, 0, 0}, {0, 3, 3}, {1, 0, 0}, {4, 0, 0}, {0, 0, 3}, {2, 1, 4}} {
			e.SoundSeries(full, s[0], s[1], s[2])
			for _, c := range []struct {
				k0, digits float64
				terms      int
			}{{5, 2, 56}, {8, 4, 84}, {10, 6, 84}} {
				series := full[:c.terms]
				top, last, x := 0.0, 0.0, 1.0
				for _, v := range series {
					last = math.Abs(v * x)
					top = math.Max(top, last)
					x *= c.k0
				}
				sum := cmplx.Abs(powers(series, complex(c.k0, 0)))
				if loss := math.Log10(top / sum); loss > c.digits {
					t.Errorf("family %d %v k0=%g: %.1f digits lost, stated %g", e, s, c.k0, loss, c.digits)
				}
				// The first term left out is smaller than the last one kept.
				if last > 0x1p-52*top {
					t.Errorf("family %d %v k0=%g: too few terms, last %.2g of %.2g", e, s, c.k0, last, top)
				}
			}
		}
	}
}

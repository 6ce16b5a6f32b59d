package modes

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

func newWall(m, n int, d float64) *wallFace {
	f := &wallFace{m: m, cavityFace: cavityFace{modes: tablesOf(m, n).gapModes(), density: 1, reach: 1, depth: d, live: n}}
	f.prepare()
	return f
}

func TestWallFarAway(t *testing.T) {
	// At rest, m > 0, a wall at distance d adds to the half-space the integral of
	// U_i U_j 2/(exp(2kd)-1) dk. With U_0 = k^m/(2^b b!) for small k, b = m+2, the
	// first entry gains 2 zeta(2m+1) (2m)!/((2d)^(2m+1) (2^b b!)^2) at large d.
	zeta := map[int]float64{1: 1.2020569031595942, 2: 1.0369277551433699}
	const n, d = 16, 30.0
	for m, z := range zeta {
		got := newWall(m, n, d).still
		b := m + 2
		lead := 1.0
		for i := 1; i <= b; i++ {
			lead /= 2 * float64(i)
		}
		factorial := math.Gamma(float64(2*m + 1))
		gain := 2 * z * factorial / math.Pow(2*d, float64(2*m+1)) * lead * lead
		for i := range 8 {
			for j := range i + 1 {
				want := disc.HeldEdge.Form(m, i, j, -1)
				if i == 0 {
					want += gain
				}
				// Beyond k = 160 the mean of J_b J_b'/k^5 is made up, 1.2e-10 in all, as if
				// their phases were equal: they differ by (b^2 - b'^2)/(2k), little for the
				// first shapes. The gain errs by 1/d^2 of itself.
				beyond := 2.4e-10
				if i < 3 {
					beyond *= 0.03
				}
				if math.Abs(got[i*n+j]-want) > beyond+10*gain/(d*d) {
					t.Errorf("m %d (%d,%d): %.12g, half-space %.12g", m, i, j, got[i*n+j], want)
				}
			}
		}
	}
}

func TestWallOperator(t *testing.T) {
	// The real-frequency operator against adaptive steps: a principal value
	// taken symmetrically about k0 for what reacts, the residues for what
	// radiates: pi/2 h(k0)/d for the plane wave in the gap and pi/2 h(k_p) 2/d for each
	// wave that fits across it, k_p^2 = k0^2 - (p pi/d)^2.
	for _, c := range []struct {
		m     int
		k0, d float64
	}{{0, 0.7, 0.5}, {0, 2, 1}, {1, 0.7, 0.05}, {1, 3, 0.8}, {0, 3, 1.5}, {2, 4, 2}} {
		const n = 16
		f := newWall(c.m, n, c.d)
		re, im := make([]float64, n*n), make([]float64, n*n)
		f.ref = 0.3
		f.static(re)
		f.dynamic(re, im, complex(c.k0, 0))
		for _, i := range []int{0, 1} {
			h := func(k float64) float64 {
				u := bessel.JInt(c.m+2*i+2, k) / (k * k)
				return u * u
			}
			symbol := func(k float64) float64 {
				s := (k - c.k0) * (k + c.k0)
				if s > 0 {
					x := math.Sqrt(s)
					return 1 / (x * math.Tanh(x*c.d))
				}
				x := math.Sqrt(-s)
				return -1 / (x * math.Tan(x*c.d))
			}
			poles := []float64{c.k0}
			wantIm := math.Pi / 2 * h(c.k0) / c.d
			for p := 1.0; p*math.Pi/c.d < c.k0; p++ {
				k := math.Sqrt(c.k0*c.k0 - p*p*math.Pi*math.Pi/(c.d*c.d))
				poles = append([]float64{k}, poles...)
				wantIm += math.Pi * h(k) / c.d
			}
			// Principal value: fold the integrand about each pole out to half the
			// distance to its neighbours, and Gauss's rule for the rest.
			want := 0.0
			from := 0.0
			for q, k := range poles {
				width := k - from
				if q+1 < len(poles) {
					width = math.Min(width, (poles[q+1]-k)/2)
				}
				plain := func(k float64) float64 { return h(k) * symbol(k) * k }
				if from < k-width {
					want += quad.Fixed(plain, from, k-width, 40, nil, 0)
				}
				want += quad.Fixed(func(x float64) float64 { return plain(k-x) + plain(k+x) }, 0, width, 40, nil, 0)
				from = k + width
			}
			for from < 400 {
				to := from + 2
				want += quad.Fixed(func(k float64) float64 { return h(k) * symbol(k) * k }, from, to, 16, nil, 0)
				from = to
			}
			want += 1 / (4 * math.Pi * math.Pow(from, 4))
			scale := disc.HeldEdge.Form(c.m, i, i, -1)
			if math.Abs(re[i*n+i]-want) > 1e-8*scale {
				t.Errorf("%+v shape %d reacts %.12g, want %.12g", c, i, re[i*n+i], want)
			}
			if math.Abs(im[i*n+i]-wantIm) > 1e-8*scale {
				t.Errorf("%+v shape %d radiates %.12g, want %.12g", c, i, im[i*n+i], wantIm)
			}
		}
	}
}

func TestWallModes(t *testing.T) {
	// A wall nearer by lowers every mode that it does not stop; far away it is a
	// half-space, for m = 0 as well.
	r := film()
	r.Lower = Face{Kind: diaphragm.FaceVacuum}
	free := solve(t, r, Request{MaxM: 3, MaxN: 3, Effects: AllEffects()})
	before := 0.0
	for _, d := range []float64{0.02, 0.1, 0.4, 3} {
		r.Upper.WallDistance = d
		s := solve(t, r, Request{MaxM: 3, MaxN: 3, Effects: AllEffects()})
		f := modeOf(t, s, 2, 1).Frequency
		if f <= before {
			t.Errorf("(2,1) with a wall at %v m: %v Hz, nearer %v Hz", d, f, before)
		}
		before = f
		for _, mode := range s.Modes {
			if mode.Error > 1e-5*mode.Frequency || mode.Damping.Radiation < 0 {
				t.Errorf("(%d,%d) at %v m: error %g of %g Hz, radiation %g", mode.M, mode.N, d, mode.Error, mode.Frequency, mode.Damping.Radiation)
			}
		}
	}
	if want := modeOf(t, free, 2, 1).Frequency; math.Abs(before-want) > 1e-4*want {
		t.Errorf("(2,1) with a wall four radii away %v Hz, half-space %v Hz", before, want)
	}
}

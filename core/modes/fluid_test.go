package modes

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// idealMode returns the coefficients of mode n of the ideal sheet on n shapes.
func idealMode(m, n, shapes int) []float64 {
	s := newStrain(m, shapes, 1, 0, 0, RimClamped)
	o := &wetOrder{m: m, strain: s, tables: tablesOf(m, shapes), sheet: 1}
	o.solveStill(n)
	return o.realPart(o.still(n - 1))
}

// Added-mass factors of the modes of an ideal sheet, per side: added mass over
// rho a times the integral of w^2 over the sheet, still fluid. Baffled: the
// definition of Kwak, J. Sound Vib. 178 (1994) 688-690, 2 j^2 integral
// J_m(k)^2/(j^2-k^2)^2 dk. Without baffle: Copson's solution of the dual
// integral equations, [J_v'(j)^2 + (1-v^2/j^2) J_v(j)^2]/(j J_m'(j)^2), v =
// m + 1/2. Ten digits, computed with mpmath in two ways.
var publishedFactors = []struct {
	m, n          int
	baffled, open float64
}{
	{0, 1, 0.7464351569, 0.4929631608}, {0, 2, 0.2616424396, 0.1967780594}, {0, 3, 0.1521789263, 0.1220314005},
	{1, 1, 0.3301319583, 0.2867947214}, {1, 2, 0.1702543684, 0.1511749832}, {1, 3, 0.1136553187, 0.1025999598},
	{2, 1, 0.2258285739, 0.2079959906}, {2, 2, 0.1341083804, 0.1243901343}, {2, 3, 0.09546369955, 0.08916767804},
	{3, 1, 0.17470487, 0.16493077}, {3, 2, 0.1123847505, 0.1063997448}, {3, 3, 0.08335632949, 0.0792005366},
	{4, 1, 0.1435770744, 0.1373829692}, {4, 2, 0.09742494611, 0.09333918066}, {4, 3, 0.07442575351, 0.07144988394},
	{5, 1, 0.122382149, 0.1180952096}, {5, 2, 0.08633771276, 0.08335885642}, {5, 3, 0.06746486269, 0.06521756232},
}

func TestFluidFactors(t *testing.T) {
	const n = 24
	for _, c := range publishedFactors {
		q := idealMode(c.m, c.n, n)
		tables := tablesOf(c.m, n)
		square := bilinear(tables.sheetMass(), n, q)
		for _, side := range []struct {
			name      string
			got, want float64
		}{
			{"baffled", bilinear(tables.baffledMass(), n, q) / square, c.baffled},
			{"open", bilinear(tables.openMass(), n, q) / square / 2, c.open},
		} {
			// Half a unit of the tenth digit.
			if math.Abs(side.got-side.want) > 6e-10*side.want {
				t.Errorf("(%d,%d) %s: %.12g, want %.10g", c.m, c.n, side.name, side.got, side.want)
			}
		}
	}
}

func TestFluidRigidDisc(t *testing.T) {
	// A rigid disc moving broadside carries 8/3 rho a^3 (Lamb, Hydrodynamics,
	// articles 102 and 108). Its velocity 1 meets only the first pressure shape,
	// with the value of that shape's Hankel transform at k = 0.
	mu := disc.RootEdge.Order(0, 0)
	first := 1 / (math.Pow(2, mu) * math.Gamma(mu+1))
	if got := 2 * math.Pi * 4 * mu * first * first; math.Abs(got-8.0/3) > 1e-15*8 {
		t.Errorf("rigid disc carries %.16g, want 8/3", got)
	}
}

// radiation returns the integral of u(k)^2 k dk/sqrt(k^2 - k0^2), or with up set
// times the root, for real k0 by quadrature: mass and resistance part. u must
// fall off so fast that nothing is left beyond k = last.
func radiation(u func(float64) float64, k0, last float64, up bool) (re, im float64) {
	// Below k0 substitute k^2 = k0^2 - z^2, k dk/sqrt = dz: an entire integrand
	// of exponential type 2, for which 60 Gauss points do up to k0 = 10.
	im = quad.Fixed(func(z float64) float64 {
		k := math.Sqrt((k0 - z) * (k0 + z))
		f := u(k) * u(k)
		if up {
			f *= -z * z
		}
		return f
	}, 0, k0, 60, nil, 0)
	// Above, k^2 = k0^2 + z^2, by Simpson's rule.
	steps := 2 * int(40*last/math.Pi)
	h := math.Sqrt(last*last-k0*k0) / float64(steps)
	for i := range steps + 1 {
		z := h * float64(i)
		k := math.Sqrt(k0*k0 + z*z)
		f := u(k) * u(k)
		if up {
			f *= z * z
		}
		weight := 4 - 2*float64((i+1)%2)
		if i == 0 || i == steps {
			weight = 1
		}
		re += weight * f * h / 3
	}
	return re, im
}

func TestRadiationPiston(t *testing.T) {
	// The quadrature that the next tests lean on, against a piston in a baffle:
	// resistance R1(x) = 1 - 2 J_1(x)/x and reactance X1(x) = 2 H_1(x)/x, x = 2ka
	// (Rayleigh; Kinsler & Frey, appendix; Struve function by mpmath). The
	// impedance over rho c pi a^2 is 2 k0 times the operator on J_1(k)/k.
	for _, c := range []struct{ x, r1, x1 float64 }{
		{0.5, 0.0309261693005, 0.208694976969}, {1, 0.11989882851, 0.396914672404},
		{2, 0.423275192243, 0.646763728284}, {4, 1.03302166401, 0.534863330654},
		{6, 1.09222795271, 0.159391750461}, {10, 0.991305450766, 0.178366498419},
	} {
		k0 := c.x / 2
		const last = 2000
		re, im := radiation(func(k float64) float64 {
			if k == 0 {
				return 0.5
			}
			return bessel.JInt(1, k) / k
		}, k0, last, false)
		// Beyond K: mean of J_1^2 = 1/(pi k), integral of 1/(pi k^3) with an
		// oscillating rest below 1/(pi K^4).
		re += 1 / (2 * math.Pi * last * last)
		if math.Abs(2*k0*im-c.r1) > 1e-11 {
			t.Errorf("x = %v: R1 = %.13g, want %.13g", c.x, 2*k0*im, c.r1)
		}
		if math.Abs(2*k0*re-c.x1) > 2*k0*1e-9 {
			t.Errorf("x = %v: X1 = %.13g, want %.13g", c.x, 2*k0*re, c.x1)
		}
	}
}

// dynamicForm returns q'F(k0)q, static part included, for unit density.
func dynamicForm(f fluidFace, tables *fluidTables, q []float64, k0 complex128) complex128 {
	n := len(q)
	re, im, still := make([]float64, n*n), make([]float64, n*n), make([]float64, n*n)
	f.static(still)
	f.dynamic(re, im, k0)
	sum := complex(0, 0)
	for i := range n {
		for j := range n {
			a, b := max(i, j), min(i, j)
			sum += complex((re[a*n+b]+still[a*n+b])*q[i]*q[j], im[a*n+b]*q[i]*q[j])
		}
	}
	return sum
}

// Mass factor and radiation resistance over rho c of modes of the ideal sheet in
// a baffle at ka = 0.25, 0.5, 1, 2, 3: the integral of Rayleigh and King, by
// SciPy's quad. Eight decimals.
var publishedRadiation = []struct {
	m, n  int
	parts [5][2]float64
}{
	{0, 1, [5][2]float64{{0.73883293, 0.02147601}, {0.7164362, 0.0842661}, {0.63274035, 0.31216258}, {0.37771273, 0.92320453}, {0.14732413, 1.28909762}}},
	{1, 1, [5][2]float64{{0.33280083, 8.818e-05}, {0.34045209, 0.00138704}, {0.36603991, 0.02072641}, {0.40530863, 0.25207454}, {0.34591729, 0.80665318}}},
	{2, 1, [5][2]float64{{0.22635147, 1.5e-07}, {0.22797677, 9.68e-06}, {0.23519573, 0.00058452}, {0.26883106, 0.02956643}, {0.30965007, 0.22656046}}},
	{0, 2, [5][2]float64{{0.25942138, 0.00402853}, {0.25309731, 0.01525563}, {0.23251347, 0.04875885}, {0.20549829, 0.07503988}, {0.24751135, 0.0879073}}},
	{3, 1, [5][2]float64{{0.17491425, 0}, {0.17554972, 4e-08}, {0.17821348, 9.11e-06}, {0.19118522, 0.00190276}, {0.21932741, 0.03460011}}},
}

func TestBaffledRadiation(t *testing.T) {
	const n = 24
	for _, c := range publishedRadiation {
		q := idealMode(c.m, c.n, n)
		tables := tablesOf(c.m, n)
		square := bilinear(tables.sheetMass(), n, q)
		for i, k0 := range []float64{0.25, 0.5, 1, 2, 3} {
			face := &baffledFace{tables: tables, live: tables, density: 1, reach: 1}
			z := dynamicForm(face, tables, q, complex(k0, 0))
			mass, resistance := real(z)/square, k0*imag(z)/square
			// Half a unit of the last printed decimal.
			if math.Abs(mass-c.parts[i][0]) > 6e-9 || math.Abs(resistance-c.parts[i][1]) > 6e-9 {
				t.Errorf("(%d,%d) at ka %v: %.9f %.9f, want %v", c.m, c.n, k0, mass, resistance, c.parts[i])
			}
		}
	}
}

func TestSeriesReach(t *testing.T) {
	// Up to MaxSoundNumber the power series keeps 8 digits of the diagonal of
	// either operator: compared with quadrature, whose cut at k = 900 is made up
	// by the mean of J^2, 1/(pi k).
	const last = 900
	for _, edge := range []disc.Edge{disc.HeldEdge, disc.RootEdge} {
		up := edge == disc.RootEdge
		for _, m := range []int{0, 1, 4, 12} {
			series := tablesOf(m, 24).series(edge, 96)
			n := series.n
			for _, k0 := range []float64{0.3, 1, 3, 6, MaxSoundNumber} {
				re, im := make([]float64, n*n), make([]float64, n*n)
				if !series.at(re, im, n, complex(k0, 0), 1) {
					t.Errorf("m %d, k0 %v: the series is too short", m, k0)
				}
				for _, i := range []int{0, 2} {
					b := edge.Order(m, i)
					u := func(k float64) float64 {
						if k == 0 {
							return 0
						}
						return bessel.J(b, k) * math.Pow(k, -edge.Nu()-1)
					}
					wantRe, wantIm := radiation(u, k0, last, up)
					if up {
						wantRe += 1 / (math.Pi * last)
					} else {
						wantRe += 1 / (4 * math.Pi * math.Pow(last, 4))
					}
					p := -1
					if up {
						p = 1
					}
					still := edge.Form(m, i, i, p)
					scale := still
					tolerance := 1e-8 * scale
					if up {
						// J^2 oscillates about its mean by 1/(2K) of it beyond K.
						tolerance += 1 / (math.Pi * last * last)
					}
					got := re[i*n+i] + still
					if math.Abs(got-wantRe) > tolerance || math.Abs(im[i*n+i]-wantIm) > 1e-8*scale {
						t.Errorf("%s", fmt.Sprintf("edge %v m %d i %d k0 %v: %.12g %.12g, want %.12g %.12g", edge, m, i, k0, got, im[i*n+i], wantRe, wantIm))
					}
				}
			}
		}
	}
}

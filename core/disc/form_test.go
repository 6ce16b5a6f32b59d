package disc

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/mat"

	"hoopsheet/core/bessel"
)

func TestFormsAgainstGammaFunctions(t *testing.T) {
	ref := loadReference(t)
	worst := 0.0
	for _, row := range ref.Forms {
		e, m, i, j, p := edgeOf(row[0]), whole(row[1]), whole(row[2]), whole(row[3]), whole(row[4])
		got := e.Form(m, i, j, p)
		if row[5] == "inf" {
			if !math.IsInf(got, 1) {
				t.Errorf("family %d m=%d i=%d j=%d p=%d: got %g, want +Inf", e, m, i, j, p, got)
			}
			continue
		}
		want := row[5].(float64)
		d := ulps(got, want)
		worst = math.Max(worst, d)
		// Each unit of lambda brings at most five products or quotients, each
		// rounded by half an ulp, which is up to one ulp of the result.
		if tol := 5 * float64(int(2*e.Nu())+1-p+1); d > tol {
			t.Errorf("family %d m=%d i=%d j=%d p=%d: got %.17g want %.17g, %g ulp, allowed %g", e, m, i, j, p, got, want, d, tol)
		}
	}
	t.Logf("worst %g ulp over %d forms", worst, len(ref.Forms))
}

// The rational forms as printed in the plan of the method.
func TestFormsWrittenOut(t *testing.T) {
	for m := 0; m < 60; m++ {
		for j := 0; j < 40; j++ {
			b := HeldEdge.Order(m, j)
			for _, c := range []struct {
				got, want float64
			}{
				{HeldEdge.Form(m, j, j, 2), 1 / (2 * b)},
				{HeldEdge.Form(m, j, j+1, 2), 0},
				{HeldEdge.Form(m, j, j, 0), 1 / (4 * (b - 1) * b * (b + 1))},
				{HeldEdge.Form(m, j, j+1, 0), 1 / (8 * b * (b + 1) * (b + 2))},
				{HeldEdge.Form(m, j, j+2, 0), 0},
				{HeldEdge.Form(m, j, j, -1), 96 / (9 * math.Pi * (4*b*b - 1) * (4*b*b - 9))},
				{RootEdge.Form(m, j, j, 1), 1 / (2 * RootEdge.Order(m, j))},
			} {
				if ulps(c.got, c.want) > 8 {
					t.Errorf("m=%d j=%d: got %.17g want %.17g", m, j, c.got, c.want)
				}
			}
		}
	}
}

func TestMassAgainstQuadrature(t *testing.T) {
	for _, row := range loadReference(t).Mass {
		e, m, i, j := edgeOf(row[0]), whole(row[1]), whole(row[2]), whole(row[3])
		want := row[4].(float64)
		if got := e.Form(m, i, j, 0); math.Abs(got-want) > 1e-15*math.Sqrt(e.Form(m, i, i, 0)*e.Form(m, j, j, 0)) {
			t.Errorf("family %d m=%d i=%d j=%d: form %.17g, quadrature %.17g", e, m, i, j, got, want)
		}
	}
}

func TestCoupling(t *testing.T) {
	for _, row := range loadReference(t).Coupling {
		e, m, j, q := edgeOf(row[0]), whole(row[1]), whole(row[2]), whole(row[3])
		want := row[4].(float64)
		// Two gamma ratios (3 ulp from 16 on, 30 below) and ten factors.
		if d := ulps(e.OpenCoupling(m, j, q), want); d > 80 {
			t.Errorf("family %d m=%d j=%d q=%d: got %.17g want %.17g, %g ulp", e, m, j, q, e.OpenCoupling(m, j, q), want, d)
		}
	}
}

// A rigid disc moving broadside in unbounded fluid has added mass 8/3 rho a^3
// (Lamb, Hydrodynamics, art. 102/108); a rigid piston in a baffle as much on
// each side (Rayleigh; Kinsler & Frey).
func TestRigidDiscAndPiston(t *testing.T) {
	// Open: the pressure difference of unit motion is s_0 alone, its coupling
	// the Hankel transform of s_0 at k = 0, 1/(2^(3/2) Gamma(5/2)).
	c := 1 / (math.Pow(2, 1.5) * math.Gamma(2.5))
	open := 2 * math.Pi * c * c * 4 * RootEdge.Order(0, 0)
	// Baffled: unit motion has Hankel transform J_1(k)/k, so the mass is
	// 2 pi times the integral of J_1^2 / k^2.
	piston := 2 * math.Pi * productMoment(2, 0, 2)
	for _, v := range []float64{open, piston} {
		if math.Abs(v-8.0/3) > 32*0x1p-52 {
			t.Errorf("added mass %.17g, want 8/3", v)
		}
	}
}

// sheetModes solves tension against mass in n shapes of order m and returns the
// frequencies, rising, in units of c/a.
func sheetModes(m, n int) []float64 {
	// With shapes scaled by sqrt(2b) the tension matrix is the identity.
	a := mat.NewSymDense(n, nil)
	for i := range n {
		for j := i; j < n; j++ {
			a.SetSym(i, j, HeldEdge.Form(m, i, j, 0)*2*math.Sqrt(HeldEdge.Order(m, i)*HeldEdge.Order(m, j)))
		}
	}
	var es mat.EigenSym
	if !es.Factorize(a, false) {
		panic("eigenvalues of a symmetric matrix")
	}
	v := es.Values(nil)
	out := make([]float64, n)
	for i := range v {
		out[i] = 1 / math.Sqrt(v[n-1-i])
	}
	return out
}

// The ideal sheet: eigenvalues are the zeros j_mn. Abramowitz & Stegun Table
// 9.5; 16 digits recomputed with mpmath besseljzero at 40 digits.
func TestIdealSheetZeros(t *testing.T) {
	published := [][]float64{
		{2.404825557695773, 5.520078110286311, 8.653727912911012, 11.79153443901428, 14.93091770848779},
		{3.831705970207512, 7.015586669815619, 10.17346813506272, 13.32369193631422, 16.47063005087763},
		{5.135622301840683, 8.417244140399865, 11.61984117214906, 14.79595178235126, 17.95981949498783},
		{6.380161895923984, 9.76102312998167, 13.01520072169843, 16.22346616031877, 19.40941522643501},
		{7.588342434503804, 11.06470948850118, 14.37253667161759, 17.61596604980483, 20.82693295696239},
		{8.771483815959954, 12.33860419746694, 15.70017407971167, 18.98013387517992, 22.21779989656127},
		{9.936109524217685, 13.58929017054122, 17.00381966781601, 20.32078921356651, 23.58608443558139},
		{11.08637001924508, 14.82126872701317, 18.28758283248173, 21.6415410198484, 24.93492788767302},
		{12.22509226400466, 16.03777419088771, 19.55453643099706, 22.94517313187462, 26.26681464117664},
	}
	for m, row := range published {
		got := sheetModes(m, 24)
		for i, want := range row {
			// The eigenvalue solver errs by a few 2^-53 of the largest
			// eigenvalue, 1/j_m1^2, so j_mn by (j_mn/j_m1)^2 of that.
			ratio := want / row[0]
			if d := math.Abs(got[i]-want) / want; d > 8*0x1p-53*ratio*ratio {
				t.Errorf("m=%d n=%d: got %.16g want %.16g, off by %.2g", m, i+1, got[i], want, d)
			}
			if i < 3 && math.Abs(got[i]-want) > 1e-13*want {
				t.Errorf("m=%d n=%d: got %.16g want %.16g, not 13 digits", m, i+1, got[i], want)
			}
		}
	}
}

// Added-mass factors of ideal sheet modes (m, n): Gamma with which the added
// mass is Gamma rho a times the integral of w^2, one side. Baffled: definition
// as Kwak, J. Sound Vib. 178 (1994) 688-690, values recomputed by mpmath closed
// form and by quadrature in the wave number. No baffle, per side: Copson's
// solution in closed form. Ten digits each.
func TestAddedMassFactors(t *testing.T) {
	for _, c := range []struct {
		m, n          int
		baffled, open float64
	}{
		{0, 1, 0.7464351569, 0.4929631608}, {0, 2, 0.2616424396, 0.1967780594}, {0, 3, 0.1521789263, 0.1220314005},
		{1, 1, 0.3301319583, 0.2867947214}, {1, 2, 0.1702543684, 0.1511749832}, {1, 3, 0.1136553187, 0.1025999598},
		{2, 1, 0.2258285739, 0.2079959906}, {2, 2, 0.1341083804, 0.1243901343}, {2, 3, 0.09546369955, 0.08916767804},
		{3, 1, 0.17470487, 0.16493077}, {3, 2, 0.1123847505, 0.1063997448}, {3, 3, 0.08335632949, 0.0792005366},
		{4, 1, 0.1435770744, 0.1373829692}, {4, 2, 0.09742494611, 0.09333918066}, {4, 3, 0.07442575351, 0.07144988394},
		{5, 1, 0.122382149, 0.1180952096}, {5, 2, 0.08633771276, 0.08335885642}, {5, 3, 0.06746486269, 0.06521756232},
	} {
		const n = 24
		shape := make([]float64, n)
		BesselShapes(shape, c.m, bessel.ZeroJ(float64(c.m), c.n))
		mass, fluid, open := make([]float64, n*n), make([]float64, n*n), make([]float64, n*n)
		HeldEdge.FillForm(mass, c.m, n, 0)
		HeldEdge.FillForm(fluid, c.m, n, -1)
		HeldEdge.FillOpenFluid(open, c.m, n)
		w := quadratic(mass, shape)
		// The table has 10 significant digits, at least 9 where it ends in 0.
		const tol = 1e-9
		if got := quadratic(fluid, shape) / w; math.Abs(got-c.baffled) > tol*c.baffled {
			t.Errorf("(%d,%d) baffled: got %.11g want %.10g", c.m, c.n, got, c.baffled)
		}
		if got := quadratic(open, shape) / w / 2; math.Abs(got-c.open) > tol*c.open {
			t.Errorf("(%d,%d) open: got %.11g want %.10g", c.m, c.n, got, c.open)
		}
	}
}

// Lamb's trial shape (1-r^2)^2 for a clamped plate, one side, baffled: factor
// 0.6689 (Lamb, Proc. R. Soc. A 98 (1920) 205-216). Its closed form is
// 640 Gamma(6) Gamma(1/2) / (64 Gamma(7/2)^2 Gamma(13/2))
// = 65536 / (31185 pi):
// 0.668935600479.
func TestLambClampedShape(t *testing.T) {
	got := ClampedEdge.Form(0, 0, 0, -1) / ClampedEdge.Form(0, 0, 0, 0)
	if math.Abs(got-0.6689) > 0.5e-4 {
		t.Errorf("got %.13g, published 0.6689", got)
	}
	if want := 0.668935600479105514; ulps(got, want) > 16 {
		t.Errorf("got %.17g, want %.17g", got, want)
	}
}

func quadratic(a, x []float64) float64 {
	n := len(x)
	var sum float64
	for i := range x {
		for j := range x {
			sum += a[i*n+j] * x[i] * x[j]
		}
	}
	return sum
}

func TestFormDomain(t *testing.T) {
	for _, f := range []func(){
		func() { HeldEdge.Form(0, 0, 0, 3) },
		func() { RootEdge.Form(0, 0, 0, 2) },
		func() { HeldEdge.Form(-1, 0, 0, 0) },
		func() { RootEdge.OpenCoupling(0, 0, 0) },
		func() { Edge(9).Nu() },
		func() { HeldEdge.FillForm(make([]float64, 3), 0, 2, 0) },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Error("no panic outside the domain")
				}
			}()
			f()
		}()
	}
}

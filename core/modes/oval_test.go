package modes

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

// The dry oval sheet is exact: the table of ellipses once more, by the shape of
// the ring.
func TestOvalMathieu(t *testing.T) {
	s := drySolution(t, 14, 3)
	for _, c := range mathieuEllipse {
		b := math.Sqrt(1 - c.e*c.e) // short over long semi-axis
		half := (1 - b) / (1 + b)
		checkEllipse(t, coupled(t, s, Uneven{Oval: Oval{half, 0.3}}), c.e, c.k, 1+half, 0.3)
		// A ring long the other way is the same, turned.
		checkEllipse(t, coupled(t, s, Uneven{Oval: Oval{-half, 0.3 + math.Pi/2}}), c.e, c.k, 1+half, 0.3)
	}
}

// Harmonics of the symbol against elliptic integrals by the arithmetic-geometric
// mean: the mean of 1/s is 1/AGM of the axes (DLMF 19.8.5).
func TestOvalHarmonics(t *testing.T) {
	for _, half := range []float64{0.01, 0.1, 0.3} {
		a, b := 1/(1+half), 1/(1-half)
		for range 10 {
			a, b = (a+b)/2, math.Sqrt(a*b)
		}
		g := Oval{Half: half}.harmonics(-1)
		if math.Abs(g[0]*a-1) > 1e-14 {
			t.Errorf("half %v: mean of 1/s is %v, want %v", half, g[0], 1/a)
		}
		for _, power := range []float64{-1, 1} {
			g := Oval{Half: half}.harmonics(power)
			for _, phi := range []float64{0, 0.4, 1.5} {
				sum := 0.0
				for l, v := range g {
					sum += v * math.Cos(2*float64(l)*phi)
				}
				want := math.Pow(square(math.Cos(phi)/(1+half))+square(math.Sin(phi)/(1-half)), power/2)
				if math.Abs(sum-want) > 1e-13 {
					t.Errorf("half %v power %v: the series gives %v, want %v", half, power, sum, want)
				}
			}
		}
	}
}

// A rigid elliptic disc broadside in unbounded fluid carries
// (4/3) pi rho a b^2/E(e), a >= b (Lamb, Hydrodynamics, art. 373; with a = b
// 8/3 rho a^3). The matrix of open faces has it in its first pressure shape.
func TestOvalRigidDisc(t *testing.T) {
	for _, half := range []float64{0, 0.05, 0.2} {
		long, short := 1+half, 1-half
		// E(e) by quadrature; the integrand is smooth and periodic.
		elliptic := 0.0
		for i := range 64 {
			s := math.Sin(math.Pi * float64(i) / 64)
			elliptic += math.Pi / 2 / 64 * math.Sqrt(1-(1-square(short/long))*s*s)
		}
		want := 4.0 / 3 * math.Pi * long * short * short / elliptic
		// On the disc: constant 1 against sqrt(1-r^2)'s multiple s_0, squared, over
		// the operator; then the factor (1-h^2) left out of all energies.
		n := &node{order: &coupledOrder{m: 0}}
		operator := symbolFactor(Oval{Half: half}.harmonics(1), 0, n, n) / (4 * 1.5)
		var u [1]float64
		coupling := 0.0
		x, w := legendre(40)
		for i, v := range x {
			// r = sin: sqrt(1-r^2) r dr becomes smooth.
			a := math.Pi / 4 * (1 + v)
			disc.RootEdge.Shapes(u[:], 0, math.Sin(a))
			coupling += math.Pi / 4 * w[i] * u[0] * math.Sin(a) * math.Cos(a)
		}
		coupling *= 2 * math.Pi
		got := coupling * coupling / operator * (1 - half*half)
		if math.Abs(got/want-1) > 1e-12 {
			t.Errorf("half %v: %v, want %v", half, got, want)
		}
	}
}

// The mass of fluid on a baffled oval face against quadrature in space: with
// 1/|x-x'| taken along lines,
//
//	(1/2 pi) double integral w w'/|x-x'| = (1/2 pi) integral over psi of
//	(det/|J e|) integral over h of (integral of w along the line)^2.
func TestOvalBaffledQuadrature(t *testing.T) {
	const half = 0.2
	// w = sum of two shapes of orders 1 and 3, cosine: their cross term is new.
	shapes := func(r, theta float64) (one, three float64) {
		var u [1]float64
		disc.HeldEdge.Shapes(u[:], 1, r)
		one = u[0] * math.Cos(theta)
		disc.HeldEdge.Shapes(u[:], 3, r)
		return one, u[0] * math.Cos(3*theta)
	}
	x, wx := legendre(24)
	var want [2]float64 // one with one, one with three
	const turns = 48
	for i := range turns {
		psi := math.Pi * float64(i) / turns
		s, c := math.Sincos(psi)
		stretch := 1 / math.Hypot((1+half)*c, (1-half)*s)
		for j, h := range x {
			length := math.Sqrt(1 - h*h)
			one, three := 0.0, 0.0
			for k, v := range x {
				px, py := length*v*c-h*s, length*v*s+h*c
				a, b := shapes(math.Hypot(px, py), math.Atan2(py, px))
				one += length * wx[k] * a
				three += length * wx[k] * b
			}
			f := math.Pi / turns * stretch * wx[j] / (2 * math.Pi) * (1 - half*half)
			want[0] += f * one * one
			want[1] += f * one * three
		}
	}
	a, b := &node{order: &coupledOrder{m: 1, n: 1}}, &node{order: &coupledOrder{m: 3, n: 1}}
	g := Oval{Half: half}.harmonics(-1)
	got := [2]float64{
		symbolFactor(g, 0, a, a) * crossForm(a.order, a.order)[0],
		symbolFactor(g, 0, a, b) * crossForm(a.order, b.order)[0],
	}
	// Lines: polynomials of degree 5 along and 12 across, times (1-h^2)^odd: exact.
	// Angles: geometric convergence. What stays is rounding.
	for i := range got {
		if math.Abs(got[i]-want[i]) > 1e-12*want[0] {
			t.Errorf("element %d: %v, quadrature %v", i, got[i], want[i])
		}
	}
}

// In fluid: no split but of (1,1) to first order, which exceeds that of the dry
// sheet; nothing changes with Half = 0; second order otherwise.
func TestOvalFluid(t *testing.T) {
	for _, kind := range []diaphragm.FaceKind{diaphragm.FaceBaffled, diaphragm.FaceOpen} {
		face := Face{Kind: kind, Density: 20, SoundSpeed: 340}
		s, err := Solve(Real{Radius: 1, Tension: 1, ArealDensity: 1, Upper: face, Lower: face}, Request{MaxM: 7, MaxN: 2, Effects: Effects{Fluid: true}})
		if err != nil {
			t.Fatal(err)
		}
		a := coupled(t, s, Uneven{Oval: Oval{Half: 0.002, Angle: 0.3}})
		b := coupled(t, s, Uneven{Oval: Oval{Half: 0.001, Angle: 0.3}})
		tiny := coupled(t, s, Uneven{Oval: Oval{Half: 1e-7, Angle: 0.3}})
		for _, mode := range tiny.Modes {
			if d := math.Abs(mode.Frequency/mode.Even - 1); d > 1.1e-7 {
				t.Errorf("%s (%d,%d): moved by %g", kind, mode.M, mode.N, d)
			}
		}
		// Heavy fluid: frequency goes like size^-3/2 instead of size^-1 where the
		// fluid is all the mass, so the split of (1,1), by the length along its
		// motion, lies between 1 and 1.5 of the dry one.
		one := b.pair(1, 1)
		if ratio := one[0].Split / (2 * 0.001); ratio < 0.5*1.05 || ratio > 1 {
			t.Errorf("%s: split of (1,1) is %v of the difference of the axes", kind, ratio)
		}
		if r := a.pair(1, 1)[0].Split / one[0].Split; math.Abs(r-2) > 1e-4 {
			t.Errorf("%s: split of (1,1) grows by %v", kind, r)
		}
		for _, label := range [][2]int{{0, 1}, {2, 1}, {3, 1}} {
			// The mean of a pair is even in Half.
			mean := func(c *Coupled) float64 {
				sum := 0.0
				list := c.pair(label[0], label[1])
				for _, mode := range list {
					sum += (mode.Frequency/mode.Even - 1) / float64(len(list))
				}
				return sum
			}
			// The next term is relative (coupling/gap)^2 = (0.004/0.12)^2, four times:
			// (2,1) and (0,2) are 6 % of frequency apart.
			if r := mean(a) / mean(b); math.Abs(r-4) > 5e-3 {
				t.Errorf("%s (%d,%d): change %g grows by %v", kind, label[0], label[1], mean(b), r)
			}
		}
	}
}

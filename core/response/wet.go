package response

import (
	"math"

	"hoopsheet/core/disc"
)

// Wet gives the modes of the diaphragm as it stands, in place of those of the
// ideal sheet. Its orders are m = 0, 1, ... up to the orders of the case, each
// with its modes, lowest first.
type Wet struct {
	Orders [][]WetMode
	// Mixed lists modes that mix orders, lowest first, in place of Orders. They
	// have Terms Bessel functions in every order.
	Mixed []MixedMode
	Terms int
	// Cavity tells whether there is a cavity behind a face, vented or not.
	Cavity bool
	// CavitySpring is rho c0^2 a^2/(pi L T) of a closed cavity of depth L; 0
	// without one and for a vented one. A slow displacement w(r) m over the unit
	// disc then stores
	//
	//	T/2 [integral of |grad w|^2 + CavitySpring (integral of w)^2].
	CavitySpring float64
	// Words say which modes these are, for the list of assumptions.
	Words []string
}

// WetMode is one mode, or one degenerate pair.
type WetMode struct {
	N int
	// Omega is the angular frequency without damping, rad/s, and Zeta the
	// damping ratio.
	Omega, Zeta float64
	// Shape holds the coefficients of J_m(j_m1 r), J_m(j_m2 r), ...: as many in
	// every mode, and at least as many as the case has circles. The series may
	// go on beyond them.
	Shape []float64
	// Strain is twice the strain energy of the whole shape over the tension, a
	// pure number for a shape of pure numbers: the integral of |grad w|^2 over
	// the disc and what bending and a cavity add. The modal mass of sheet, fluid
	// and cavity is T Strain/Omega^2.
	Strain float64
	// Volume is the integral of the whole shape over the unit disc; it counts
	// for m = 0 with a CavitySpring.
	Volume float64
	// FilmShare is the share of the sheet in the strain energy; 1 without a
	// cavity.
	FilmShare float64
}

// terms returns how many Bessel functions an order of the case takes.
func (c *Case) terms() int {
	if c.Wet == nil {
		return c.Circles
	}
	if c.Wet.Mixed != nil {
		return c.Wet.Terms
	}
	return len(c.Wet.Orders[0][0].Shape)
}

// wetProblem says what is wrong with the modes given; empty if nothing.
func (c *Case) wetProblem() string {
	if c.Wet.Mixed != nil {
		return ""
	}
	if len(c.Wet.Orders) <= c.Orders {
		return "The modes of the diaphragm do not reach as many nodal diameters."
	}
	for _, list := range c.Wet.Orders[:c.Orders+1] {
		if len(list) == 0 {
			return "An order of the diaphragm has no modes."
		}
		for _, mode := range list {
			if len(mode.Shape) != len(c.Wet.Orders[0][0].Shape) || len(mode.Shape) < c.Circles || len(mode.Shape) > MostCircles || !(mode.Strain > 0 && mode.Omega > 0 && mode.FilmShare > 0) {
				return "The modes of the diaphragm are not complete."
			}
		}
	}
	return ""
}

// leftOut returns the integral of |f - g|^2 (p = 0) or |grad (f-g)|^2 (p = 1) for
// an f of which the integral of the square is whole and coefficients are given,
// and a g within the basis.
func leftOut(b *disc.Basis, whole float64, f, g []float64, p int) float64 {
	both := make([]float64, len(f))
	for i := range both {
		both[i] = f[i] - g[i]
	}
	// What f has beyond the basis, and the difference within.
	return math.Max(0, whole-b.Roughness(f, p)) + b.Roughness(both, p)
}

// edgeMass is the largest mass, relative to that of the sheet alone, among the
// last modes of every order and all of the last order.
func (w *Wet) edgeMass(b *disc.Basis, unit float64) float64 {
	most := 1.0
	for m := 0; m <= b.M && w.Orders != nil; m++ {
		list := w.Orders[m]
		if m < b.M {
			list = list[len(list)-1:]
		}
		for _, mode := range list {
			sheet, omega := 0.0, mode.Omega*unit
			for k, p := range mode.Shape {
				sheet += b.Norm(m, k+1) * p * p
			}
			most = math.Max(most, mode.Strain/(omega*omega)/sheet)
		}
	}
	return most
}

// lowest is mode (0,1), of mixed modes the lowest of all.
func (w *Wet) lowest() WetMode {
	if w.Mixed != nil {
		return WetMode{N: 1, Omega: w.Mixed[0].Omega, Zeta: w.Mixed[0].Zeta}
	}
	return w.Orders[0][0]
}

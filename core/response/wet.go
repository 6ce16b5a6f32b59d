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
	return len(c.Wet.Orders[0][0].Shape)
}

// wetProblem says what is wrong with the modes given; empty if nothing.
func (c *Case) wetProblem() string {
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

// wetMotion takes the initial coefficients of a basis to wet modes. The
// velocity is in m per a/c; as an impulse it is the momentum per area over
// sigma instead. unit is a/c in s.
//
// In units of T/2 and lengths of a, the strain of coefficients c is c'Gc with
// G = diag(j^2 norm), apart from bending and cavity; K is the strain with these.
// Wet modes are orthogonal in K, as they are in the mass of sheet and fluid, so
// amplitudes follow from it alone and no fluid operator is needed:
//
//   - Without a cavity, displacements and velocities are split by least squares
//     in G. For modes orthogonal in G that is phi_i'G w0 over phi_i'G phi_i.
//   - With a cavity, G alone does not tell apart modes in which the sheet moves
//     alike. A displacement let go is what a static load held, the pressure of
//     the cavity even: a_i = phi_i'K w0 over phi_i'K phi_i, where phi_i'K w0 is
//     phi_i'G w0 + CavitySpring (integral of phi_i) (integral of w0). With a
//     velocity the fluid moves along as in slow motion, which is the same sum.
//   - An impulse p gives b_i = phi_i'p/m_i with the modal mass
//     m_i = phi_i'K phi_i/omega_i^2 of sheet, fluid and cavity together.
func wetMotion(b *disc.Basis, wet *Wet, displacement, velocity []float64, impulse bool, unit float64) *motion {
	s := &stage{basis: b}
	var begin []state
	for m := 0; m <= b.M; m++ {
		order := newWetOrder(b, m, wet, unit)
		var a, v [2][]float64
		for part := range parts(m) {
			a[part] = order.split(order.take(displacement, disc.Part(part)))
			v[part] = order.take(velocity, disc.Part(part))
			if impulse {
				v[part] = order.struck(v[part])
			} else {
				v[part] = order.split(v[part])
			}
		}
		for i := range order.modes {
			for part := range parts(m) {
				s.modes = append(s.modes, order.modes[i].of(disc.Part(part)))
				begin = append(begin, state{a[part][i], v[part][i]})
			}
		}
	}
	return letGo(s, begin)
}

// wetAccount adds up what wet modes hold of the initial values and what they
// leave out.
func (s *start) wetAccount(c *Case, b *disc.Basis, displacement, velocity []float64) {
	held := make([]float64, b.Len())
	s.keptPotential, s.keptKinetic = s.moves.energy(0)

	// Without a cavity the part left out is orthogonal in G to the part held. A
	// displacement that jumps has strain without bound, all of it left out.
	switch whole := s.potential; {
	case math.IsInf(whole, 1):
	case c.Wet.Cavity:
		volume := 0.0
		for n := 1; n <= b.N; n++ {
			volume += displacement[b.Index(0, n, disc.Cos)] * volumeOf(b, n)
		}
		s.potential += c.Wet.CavitySpring * volume * volume
	default:
		s.moves.values(held, 0, 0)
		s.keptPotential = whole - leftOut(b, whole, displacement, held, 1)
	}

	var left float64
	if c.Impulse {
		left = s.impulseLeft(b, velocity)
	} else {
		// The part of a velocity left out waves faster than the modes held, so the
		// fluid adds no more to its mass than to that of the modes at the edge of
		// the band.
		s.moves.values(held, 0, 1)
		left = leftOut(b, s.kinetic, velocity, held, 0) * c.Wet.edgeMass(b, c.unit())
	}
	s.kinetic = s.keptKinetic + left
}

// impulseLeft estimates the energy of an impulse that the modes leave out, in
// units of T/2.
func (s *start) impulseLeft(b *disc.Basis, impulse []float64) float64 {
	// An impulse sets less than the sheet alone moving, which bounds what lies
	// beyond the basis and what an order can hold. Within an order the energies
	// are taken to go on falling as they did: those of modes (N/4, N/2] and
	// (N/2, N] and the blocks beyond, each twice as long, form a geometric series
	// under a power law. It is at least n^-2: the velocity of a light sheet in a
	// heavy fluid does not vanish at the rim but for a narrow zone.
	left := math.Max(0, s.kinetic-b.Energy(impulse))
	for m := 0; m <= b.M; m++ {
		var whole, held float64
		for n := 1; n <= b.N; n++ {
			i := b.Index(m, n, disc.Cos)
			whole += b.Norm(m, n) * (impulse[i]*impulse[i] + impulse[i+1]*impulse[i+1])
		}
		var blocks [2]float64
		last := 0
		list := s.moves.stages[0].modes
		for i := range list {
			if k := &list[i]; k.m == m {
				last = max(last, k.n)
			}
		}
		for i := range list {
			k := &list[i]
			if k.m != m {
				continue
			}
			energy := k.norm * k.states[0].v * k.states[0].v
			held += energy
			if 2*k.n > last {
				blocks[0] += energy
			} else if 4*k.n > last {
				blocks[1] += energy
			}
		}
		most := math.Max(0, whole-held)
		if last >= 4 && blocks[1] > 0 {
			ratio := math.Min(math.Max(blocks[0]/blocks[1], 0.5), 0.9)
			most = math.Min(most, blocks[0]*ratio/(1-ratio))
		}
		left += most
	}
	return left
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
	for m := 0; m <= b.M; m++ {
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

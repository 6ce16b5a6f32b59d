package response

import (
	"math"

	"hoopsheet/core/disc"
)

// wetOrder holds what the projections of one order need.
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
//     m_i = phi_i'K phi_i/omega_i^2 of sheet, fluid and cavity together. A load
//     acts on the coordinates in the same way.
type wetOrder struct {
	b      *disc.Basis
	m      int
	list   []WetMode
	modes  []modal
	stiff  []float64 // G
	norm   []float64 // of the Bessel functions
	cavity bool
	spring float64
	volume []float64   // integral of each Bessel function over the disc; m = 0 with a spring
	gram   [][]float64 // Cholesky factor of phi_i'G phi_k, lower rows; without a cavity
}

func newWetOrder(b *disc.Basis, m int, wet *Wet, unit float64) *wetOrder {
	list := wet.Orders[m]
	o := &wetOrder{b: b, m: m, list: list, cavity: wet.Cavity,
		modes: make([]modal, len(list)), stiff: make([]float64, b.N), norm: make([]float64, b.N)}
	for n := 1; n <= b.N; n++ {
		j := b.Zero(m, n)
		o.norm[n-1] = b.Norm(m, n)
		o.stiff[n-1] = j * j * b.Norm(m, n)
	}
	if m == 0 && wet.CavitySpring > 0 {
		o.spring = wet.CavitySpring
		o.volume = make([]float64, b.N)
		for n := range o.volume {
			o.volume[n] = volumeOf(b, n+1)
		}
	}
	top := largestBessel(m)
	for i, mode := range list {
		omega := mode.Omega * unit
		o.modes[i] = modal{m: m, n: mode.N, omega: omega, zeta: mode.Zeta, norm: mode.Strain / (omega * omega), film: mode.FilmShare,
			shape: []block{{m: m, n: mode.N, row: mode.Shape}}}
		for _, p := range mode.Shape {
			o.modes[i].peak += top * math.Abs(p)
		}
	}
	if !o.cavity {
		o.factorise()
	}
	return o
}

// volumeOf is the integral of J_0(j_0n r) over the disc.
func volumeOf(b *disc.Basis, n int) float64 {
	return 2 * math.Pi * b.Slope(0, n) / b.Zero(0, n) // DLMF 10.22.1
}

// take reads one order's coefficients of the cosine or sine part.
func (o *wetOrder) take(coef []float64, part disc.Part) []float64 {
	out := make([]float64, o.b.N)
	for n := range out {
		out[n] = coef[o.b.Index(o.m, n+1, part)]
	}
	return out
}

// split gives the amplitudes of a displacement let go, or of a velocity with
// which the fluid moves along.
func (o *wetOrder) split(c []float64) []float64 {
	out := make([]float64, len(o.list))
	loaded := make([]float64, len(c))
	moving := false
	for k, v := range c {
		loaded[k] = o.stiff[k] * v
		moving = moving || v != 0
	}
	if !moving {
		return out
	}
	for i, mode := range o.list {
		out[i] = dotted(mode.Shape, loaded)
	}
	if o.spring > 0 {
		even := o.spring * dotted(o.volume, c)
		for i, mode := range o.list {
			out[i] += even * mode.Volume
		}
	}
	if o.cavity {
		for i, mode := range o.list {
			out[i] /= mode.Strain
		}
		return out
	}
	solveFactored(o.gram, out)
	return out
}

// struck gives the velocities after an impulse, momentum per area over sigma.
func (o *wetOrder) struck(p []float64) []float64 {
	out := make([]float64, len(o.list))
	for k, v := range p {
		p[k] = o.norm[k] * v
	}
	for i, mode := range o.list {
		out[i] = dotted(mode.Shape, p) / o.modes[i].norm
	}
	return out
}

// factorise prepares the matrix of phi_i'G phi_k.
func (o *wetOrder) factorise() {
	o.gram = make([][]float64, len(o.list))
	loaded := make([]float64, o.b.N)
	for i, mode := range o.list {
		row := make([]float64, i+1)
		for k, p := range mode.Shape {
			loaded[k] = o.stiff[k] * p
		}
		for k := range row {
			row[k] = dotted(o.list[k].Shape, loaded)
		}
		factorRow(o.gram, row)
	}
}

// dotted sums a[i] b[i]; b is at least as long as a.
//
//go:noinline
func dotted(a, b []float64) float64 {
	sum := 0.0
	for i, v := range a {
		sum += v * b[i]
	}
	return sum
}

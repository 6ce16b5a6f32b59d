package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// Wet gives the modes of the diaphragm as it stands, in place of those of the
// ideal sheet. Its orders are m = 0, 1, ... up to the orders of the case, each
// with its modes, lowest first.
type Wet struct {
	Orders [][]WetMode
	// CavitySpring is rho c0^2 a^2/(pi L T) of a closed cavity of depth L; 0
	// without one. A slow displacement w(r) m over the unit disc then stores
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
	// Shape holds the coefficients of J_m(j_m1 r), J_m(j_m2 r), ..., as many as
	// the case has circles.
	Shape []float64
	// FilmShare is the share of the sheet in the strain energy; 1 without a
	// cavity.
	FilmShare float64
}

// wetMotion takes the initial coefficients of a basis to wet modes. The
// velocity is in m per a/c; as an impulse it is the momentum per area over
// sigma instead. unit is a/c in s.
//
// In units of T/2 and lengths of a, the strain of coefficients c is c'Gc with
// G = diag(j^2 norm). Wet modes are orthogonal in it (still fluid) or nearly so
// (sound), so amplitudes follow from it alone and no fluid operator is needed:
//
//   - a displacement let go is what a static load holds, a_i = phi_i'K w0 over
//     phi_i'K phi_i, with the cavity's spring in K; without a cavity the
//     least-squares solution in G is taken, which is the same for orthogonal
//     modes and returns w0 for others;
//   - a velocity is split by least squares in G;
//   - an impulse p gives b_i = phi_i'p/m_i with the modal mass
//     m_i = phi_i'K phi_i/omega_i^2 of sheet, fluid and cavity together.
func wetMotion(b *disc.Basis, wet *Wet, displacement, velocity []float64, impulse bool, unit float64) *motion {
	moves := &motion{basis: b}
	var total float64
	for m := 0; m <= b.M && m < len(wet.Orders); m++ {
		list := wet.Orders[m]
		order := newWetOrder(b, m, list, wet.CavitySpring)
		for _, part := range []disc.Part{disc.Cos, disc.Sin} {
			if m == 0 && part == disc.Sin {
				break
			}
			a := order.released(order.take(displacement, part))
			v := order.take(velocity, part)
			if impulse {
				v = order.struck(v, unit)
			} else {
				v = order.split(v)
			}
			for i := range order.modes {
				if part == disc.Cos {
					order.modes[i].a, order.modes[i].va = a[i], v[i]
				} else {
					order.modes[i].b, order.modes[i].vb = a[i], v[i]
				}
			}
		}
		for i := range order.modes {
			mode := &order.modes[i]
			mode.omega = list[i].Omega * unit
			mode.zeta = list[i].Zeta
			mode.norm = order.strain[i] / (mode.omega * mode.omega)
			mode.row = list[i].Shape
			mode.bound(order.largest[i])
			total += mode.size
			moves.modes = append(moves.modes, *mode)
		}
	}
	kept := moves.modes[:0]
	highest := 0
	for _, mode := range moves.modes {
		if mode.size > negligible*total {
			kept = append(kept, mode)
			highest = mode.m
		}
	}
	moves.modes = kept
	if highest < b.M {
		moves.basis = basisOf(highest, b.N)
	}
	return moves
}

// wetOrder holds what the projections of one order need.
type wetOrder struct {
	b       *disc.Basis
	m       int
	list    []WetMode
	modes   []modal
	stiff   []float64 // G
	norm    []float64 // of the Bessel functions
	volume  []float64 // integral of each Bessel function over the disc; m = 0
	spring  float64
	strain  []float64 // phi_i'K phi_i, the cavity's share included
	largest []float64 // a bound of |phi_i|
}

func newWetOrder(b *disc.Basis, m int, list []WetMode, spring float64) *wetOrder {
	o := &wetOrder{b: b, m: m, list: list, spring: spring,
		modes: make([]modal, len(list)), stiff: make([]float64, b.N), norm: make([]float64, b.N), volume: make([]float64, b.N),
		strain: make([]float64, len(list)), largest: make([]float64, len(list))}
	for n := 1; n <= b.N; n++ {
		j := b.Zero(m, n)
		o.norm[n-1] = b.Norm(m, n)
		o.stiff[n-1] = j * j * b.Norm(m, n)
		if m == 0 {
			o.volume[n-1] = 2 * math.Pi * b.Slope(0, n) / j // DLMF 10.22.1
		}
	}
	top := largestBessel(m)
	for i, mode := range list {
		o.modes[i] = modal{index: b.Index(m, min(i+1, b.N), disc.Cos), m: m, n: mode.N}
		film := 0.0
		for k, p := range mode.Shape {
			film += o.stiff[k] * p * p
			o.largest[i] += top * math.Abs(p)
		}
		o.strain[i] = film / mode.FilmShare
	}
	return o
}

func radialAt(b *disc.Basis, m int, shape []float64, r float64) float64 {
	sum := 0.0
	for k, p := range shape {
		sum += p * bessel.JInt(m, b.Zero(m, k+1)*r)
	}
	return sum
}

// take reads one order's coefficients of the cosine or sine part.
func (o *wetOrder) take(coef []float64, part disc.Part) []float64 {
	out := make([]float64, o.b.N)
	for n := range out {
		out[n] = coef[o.b.Index(o.m, n+1, part)]
	}
	return out
}

// released gives the amplitudes of a displacement let go.
func (o *wetOrder) released(c []float64) []float64 {
	if o.spring == 0 {
		return o.split(c)
	}
	out := make([]float64, len(o.list))
	volume := dotted(o.volume, c)
	for i, mode := range o.list {
		load := o.spring * volume * dotted(o.volume, mode.Shape)
		for k, p := range mode.Shape {
			load += o.stiff[k] * p * c[k]
		}
		out[i] = load / o.strain[i]
	}
	return out
}

// struck gives the velocities after an impulse, momentum per area over sigma.
func (o *wetOrder) struck(p []float64, unit float64) []float64 {
	out := make([]float64, len(o.list))
	for i, mode := range o.list {
		sum := 0.0
		for k, s := range mode.Shape {
			sum += o.norm[k] * s * p[k]
		}
		omega := mode.Omega * unit
		out[i] = sum * omega * omega / o.strain[i]
	}
	return out
}

// split solves the least-squares problem of writing c in the modes, in the
// norm of G, by Cholesky's method. Modes of a cavity can have nearly the same
// film shape; a ridge of 1e-10 keeps their amplitudes bounded.
func (o *wetOrder) split(c []float64) []float64 {
	n := len(o.list)
	gram := make([][]float64, n)
	x := make([]float64, n)
	for i := range gram {
		gram[i] = make([]float64, i+1)
		for k := range gram[i] {
			for q, s := range o.stiff {
				gram[i][k] += s * o.list[i].Shape[q] * o.list[k].Shape[q]
			}
		}
		gram[i][i] *= 1 + 1e-10
		for q, s := range o.stiff {
			x[i] += s * o.list[i].Shape[q] * c[q]
		}
	}
	for i := range n {
		for k := 0; k <= i; k++ {
			sum := gram[i][k]
			for q := range k {
				sum -= gram[i][q] * gram[k][q]
			}
			if i == k {
				gram[i][i] = math.Sqrt(math.Max(sum, 1e-300))
			} else {
				gram[i][k] = sum / gram[k][k]
			}
		}
	}
	for i := range n {
		for k := range i {
			x[i] -= gram[i][k] * x[k]
		}
		x[i] /= gram[i][i]
	}
	for i := n - 1; i >= 0; i-- {
		for k := i + 1; k < n; k++ {
			x[i] -= gram[k][i] * x[k]
		}
		x[i] /= gram[i][i]
	}
	return x
}

func dotted(a, b []float64) float64 {
	sum := 0.0
	for i, v := range a {
		sum += v * b[i]
	}
	return sum
}

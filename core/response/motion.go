package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// motion is the free motion of the ideal sheet as a sum of modes. Lengths on
// the sheet are in units of its radius a, times in units of a/c, c the wave
// speed; displacements in m.
type motion struct {
	basis *disc.Basis // of the orders that move
	modes []modal     // those that move, in the order of the basis
}

// modal is one mode (m, n), its cosine and sine part together:
//
//	q” + 2 zeta omega q' + omega^2 q = 0.
type modal struct {
	index int // of the cosine coefficient in the basis
	m, n  int
	omega float64 // equal to the zero j_mn for the ideal sheet
	zeta  float64
	norm  float64 // modal mass: for the ideal sheet the integral of the square of the mode over the unit disc
	// row holds the coefficients of J_m(j_m1 r), ... of a wet mode; nil for the
	// ideal sheet, whose mode is the one at index.
	row []float64
	// film is the share of the sheet in the strain energy of the mode.
	film float64
	// a and b are the initial displacements of the cosine and the sine part,
	// va and vb their initial velocities in m per a/c.
	a, b, va, vb float64
	// swing bounds the amplitude and size the displacement anywhere on the sheet;
	// they decay at least as fast as exp(-decay t).
	swing, size, decay float64
}

// negligible is the size, relative to the sum of all, below which a mode is
// rounding only.
const negligible = 1e-15

// newMotion takes the initial coefficients of a basis to its modes. velocity
// is in m per a/c.
func newMotion(b *disc.Basis, zeta float64, displacement, velocity []float64) *motion {
	var all []modal
	var total float64
	for m := 0; m <= b.M; m++ {
		largest := largestBessel(m)
		for n := 1; n <= b.N; n++ {
			i := b.Index(m, n, disc.Cos)
			mode := modal{
				index: i, m: m, n: n,
				omega: b.Zero(m, n), zeta: zeta, norm: b.Norm(m, n), film: 1,
				a: displacement[i], b: displacement[i+1],
				va: velocity[i], vb: velocity[i+1],
			}
			mode.bound(largest)
			total += mode.size
			all = append(all, mode)
		}
	}
	moves := &motion{basis: b, modes: all}
	moves.keep(total)
	return moves
}

// keep leaves out the modes that do not move, total being the sum of the sizes
// of all, and the orders above the last that does.
func (mo *motion) keep(total float64) {
	kept := mo.modes[:0]
	highest := 0
	for _, mode := range mo.modes {
		if mode.size > negligible*total {
			kept = append(kept, mode)
			highest = mode.m
		}
	}
	mo.modes = kept
	// Coefficients stand order by order, so those of a basis with fewer orders
	// are the first ones of this.
	if highest < mo.basis.M {
		mo.basis = basisOf(highest, mo.basis.N)
	}
}

// largestBessel is the largest value of |J_m|.
func largestBessel(m int) float64 {
	if m == 0 {
		return 1
	}
	// The first extreme is the largest (Watson 15.31).
	value := make([]float64, 1)
	bessel.ZerosJPrimeAndValue(make([]float64, 1), value, float64(m))
	return value[0]
}

// bound sets swing, size and decay; largest bounds the shape.
func (mode *modal) bound(largest float64) {
	// cos m theta and sin m theta parts add like the sides of a right angle.
	start := math.Hypot(mode.a, mode.b)
	if mode.zeta < 0.99 {
		root := math.Sqrt((1 - mode.zeta) * (1 + mode.zeta))
		ahead := math.Hypot(mode.va/mode.omega+mode.zeta*mode.a, mode.vb/mode.omega+mode.zeta*mode.b) / root
		mode.swing = math.Hypot(start, ahead)
		mode.decay = mode.zeta * mode.omega
	} else {
		// Near and above critical damping |C| <= 1 and omega |S| < 1; see
		// fundamental.
		mode.swing = start + math.Hypot(mode.va, mode.vb)/mode.omega
		mode.decay = 0
	}
	mode.size = largest * mode.swing
}

// fundamental returns the two fundamental solutions of one mode at the time t:
// c with value one and slope zero at t = 0, and s omega times that with value
// zero and slope one. Their slopes are c' = -omega s and
// s' = omega (c - 2 zeta s).
//
// It holds for every zeta >= 0, through the critical value without loss.
func fundamental(omega, zeta, t float64) (c, s float64) {
	x := omega * t
	if zeta <= 1 {
		root := math.Sqrt((1 - zeta) * (1 + zeta))
		sin, cos := math.Sincos(root * x)
		decay := 1.0
		if zeta > 0 {
			decay = math.Exp(-zeta * x)
		}
		if root > 0 {
			s = decay * sin / root
		} else {
			s = decay * x
		}
		return decay*cos + zeta*s, s
	}
	// exp(-(zeta -+ root) x) with zeta - root = 1/(zeta + root).
	root := math.Sqrt((zeta - 1) * (zeta + 1))
	slow := math.Exp(-x / (zeta + root))
	// 1 - fast/slow, which does not cancel as root goes to zero.
	gap := -math.Expm1(-2 * root * x)
	s = slow * gap / (2 * root)
	return slow*(1-gap/2) + zeta*s, s
}

// amplitudes writes the coefficients at the time t.
func (mo *motion) amplitudes(coef []float64, t float64) {
	parts := make([]part, len(mo.modes))
	for i := range mo.modes {
		k := &mo.modes[i]
		c, s := fundamental(k.omega, k.zeta, t)
		s /= k.omega
		parts[i] = part{c*k.a + s*k.va, c*k.b + s*k.vb}
	}
	mo.fill(coef, parts)
}

// speeds writes the coefficients of the velocity at the start, m per a/c.
func (mo *motion) speeds(coef []float64) {
	parts := make([]part, len(mo.modes))
	for i := range mo.modes {
		parts[i] = part{mo.modes[i].va, mo.modes[i].vb}
	}
	mo.fill(coef, parts)
}

// part is the cosine and the sine part of a mode.
type part struct{ c, s float64 }

// fill writes the coefficients of the modes times their parts. It does not
// allocate.
func (mo *motion) fill(coef []float64, parts []part) {
	clear(coef)
	// Zero by zero, cosine before sine; wet modes of one order are summed apart.
	var cosines, sines [MostCircles]float64
	for i := 0; i < len(mo.modes); {
		k := &mo.modes[i]
		if k.row == nil {
			coef[k.index], coef[k.index+1] = parts[i].c, parts[i].s
			i++
			continue
		}
		cosine, sine := cosines[:len(k.row)], sines[:len(k.row)]
		clear(cosine)
		clear(sine)
		order := k.m
		for ; i < len(mo.modes) && mo.modes[i].m == order; i++ {
			addTo(cosine, sine, mo.modes[i].row, parts[i])
		}
		dst := coef[mo.basis.Index(order, 1, disc.Cos):]
		for n, c := range cosine {
			dst[2*n], dst[2*n+1] = c, sine[n]
		}
	}
}

// addTo adds the multiples of a row of the same length.
func addTo(cosine, sine, row []float64, by part) {
	sine, row = sine[:len(cosine)], row[:len(cosine)]
	c, s := by.c, by.s
	if s == 0 {
		for n := range cosine {
			cosine[n] += c * row[n]
		}
		return
	}
	for n := range cosine {
		v := row[n]
		cosine[n] += c * v
		sine[n] += s * v
	}
}

// radials returns the radial functions of all modes at radius r.
func (mo *motion) radials(r float64) []float64 {
	out := make([]float64, len(mo.modes))
	var shared []float64 // Bessel functions of one order of wet modes
	order := -1
	for i := range mo.modes {
		k := &mo.modes[i]
		if k.row == nil {
			out[i] = bessel.JInt(k.m, k.omega*r)
			continue
		}
		if k.m != order {
			order = k.m
			shared = shared[:0]
			for n := range k.row {
				shared = append(shared, bessel.JInt(k.m, mo.basis.Zero(k.m, n+1)*r))
			}
		}
		out[i] = dotted(k.row, shared)
	}
	return out
}

// shortest returns the largest wave number of the modes that move: 2 pi over
// it is the shortest wavelength.
func (mo *motion) shortest() float64 {
	var wave float64
	for i := range mo.modes {
		k := &mo.modes[i]
		wave = math.Max(wave, mo.basis.Zero(k.m, min(k.n, mo.basis.N)))
	}
	return wave
}

// energy returns the potential and the kinetic energy at the time t, in units
// of T/2 (J for displacements in m).
func (mo *motion) energy(t float64) (potential, kinetic float64) {
	for i := range mo.modes {
		k := &mo.modes[i]
		c, s := fundamental(k.omega, k.zeta, t)
		q, p := c*k.a+s*k.va/k.omega, c*k.b+s*k.vb/k.omega
		ds := c - 2*k.zeta*s
		dq, dp := ds*k.va-k.omega*s*k.a, ds*k.vb-k.omega*s*k.b
		potential += k.norm * k.omega * k.omega * (q*q + p*p)
		kinetic += k.norm * (dq*dq + dp*dp)
	}
	return potential, kinetic
}

// strain bounds the strain energy of the sheet alone at any time, in units of
// T/2, by the energy at the start and by the sum of what every mode reaches.
func (mo *motion) strain() float64 {
	potential, kinetic := mo.energy(0)
	var reached, order float64
	for i := range mo.modes {
		k := &mo.modes[i]
		// Of one order the roots add (triangle inequality), of several the
		// energies do.
		order += k.swing * k.omega * math.Sqrt(k.norm*k.film)
		if i+1 == len(mo.modes) || mo.modes[i+1].m != k.m {
			reached += order * order
			order = 0
		}
	}
	return math.Min(potential+kinetic, reached)
}

// reach bounds the displacement anywhere on the sheet from the time t on.
func (mo *motion) reach(t float64) float64 {
	var sum float64
	for i := range mo.modes {
		k := &mo.modes[i]
		sum += k.size * math.Exp(-k.decay*t)
	}
	return sum
}

// fastest returns the largest angular frequency that moves; 0 at rest.
func (mo *motion) fastest() float64 {
	var omega float64
	for i := range mo.modes {
		omega = math.Max(omega, mo.modes[i].omega)
	}
	return omega
}

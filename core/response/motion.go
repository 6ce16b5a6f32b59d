package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// motion is the motion of the sheet as a sum of modes. Lengths on the sheet are
// in units of its radius a, times in units of a/c, c the wave speed;
// displacements in m.
//
// Between two breaks every coordinate is an analytic function of time; at one
// its velocity may jump (a blow), the displacement never does.
type motion struct {
	// basis of the coefficients, in every stage.
	basis *disc.Basis
	// stages follow one another; there is one unless a body stays on the sheet.
	stages []*stage
}

// stage is a time in which the modes stay the same.
type stage struct {
	from  float64
	basis *disc.Basis
	modes []modal // those that move: order by order, cosine before sine
	legs  []leg   // the first begins with the stage
	// first marks the modes that are the cosine of a pair, of which the sine
	// follows; made by pair.
	first []bool
}

// modal is one mode and its coordinate q,
//
//	q” + 2 zeta omega q' + omega^2 q = load.
//
// Of a pair the cosine and the sine are two, side by side.
type modal struct {
	m, n  int  // its name
	upper bool // the higher one of a pair that has split
	omega float64
	zeta  float64
	norm  float64 // modal mass over sigma a^2: for the ideal sheet the integral of the square of the mode over the unit disc
	// film is the share of the sheet in the strain energy of the mode.
	film float64
	// shape in the basis: one block, or more if the mode mixes orders.
	shape []block
	// gains by loads: what the coordinate feels of each.
	gains []float64
	// states at the start of every leg.
	states []state
	// peak bounds |shape| on the sheet.
	peak float64
	// swing bounds |q| and size the displacement anywhere on the sheet, at any
	// time; in the last leg, left without load or with a steady one, the part of
	// them beside rest decays at least as fast as exp(-decay t).
	swing, size, decay float64
	// rest and ring are the parts of size in the last leg.
	rest, ring float64
}

// state is the coordinate of a mode and its velocity, m and m per a/c.
type state struct{ q, v float64 }

// block is a part of a shape: the sum of row[k] J_m(j_m,k+1 r), or J_m(j_mn r)
// alone if there is no row, times cos m theta or sin m theta.
type block struct {
	m    int
	part disc.Part
	n    int
	row  []float64
}

// negligible is the size, relative to the sum of all, below which a mode is
// rounding only.
const negligible = 1e-15

// keep leaves out the modes that do not move, and the orders above the last that
// does.
func (mo *motion) keep() {
	highest := 0
	for _, s := range mo.stages {
		var total float64
		for i := range s.modes {
			total += s.modes[i].size
		}
		kept := s.modes[:0]
		for i := range s.modes {
			if mode := s.modes[i]; mode.size > negligible*total {
				kept = append(kept, mode)
				for _, b := range mode.shape {
					highest = max(highest, b.m)
				}
			}
		}
		s.modes, s.first = kept, nil
	}
	// Coefficients stand order by order, so those of a basis with fewer orders
	// are the first ones of this.
	if highest < mo.basis.M {
		mo.basis = basisOf(highest, mo.basis.N)
		for _, s := range mo.stages {
			s.basis = mo.basis
		}
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

// stage returns the stage that holds at the time t.
func (mo *motion) stage(t float64) *stage {
	s := mo.stages[0]
	for _, next := range mo.stages[1:] {
		if next.from <= t {
			s = next
		}
	}
	return s
}

// breaks lists the times after 0 at which a load, a blow or a body begins or
// changes, in rising order.
func (mo *motion) breaks() []float64 {
	var list []float64
	for _, s := range mo.stages {
		for _, l := range s.legs {
			if l.from > 0 && (len(list) == 0 || l.from > list[len(list)-1]) {
				list = append(list, l.from)
			}
		}
	}
	return list
}

// values writes the coefficients of the displacement (k = 0), the velocity (1) or
// the acceleration (2) at the time t.
func (mo *motion) values(coef []float64, t float64, k int) {
	s := mo.stage(t)
	q := make([]float64, len(s.modes))
	for i := range q {
		var d [3]float64
		d[0], d[1], d[2] = s.at(i, t)
		q[i] = d[k]
	}
	s.fill(coef, q)
}

// fill writes the coefficients of the modes times q. It does not allocate.
func (s *stage) fill(coef, q []float64) {
	clear(coef)
	// A pair shares its row, and orders their place: cosine and sine together.
	if len(s.first) != len(s.modes) {
		s.pair()
	}
	for i := 0; i < len(s.modes); i++ {
		k := &s.modes[i]
		if s.first[i] {
			addPair(coef[s.basis.Index(k.shape[0].m, 1, disc.Cos):], k.shape[0].row, q[i], q[i+1])
			i++
			continue
		}
		for n := range k.shape {
			b := &k.shape[n]
			if b.row == nil {
				coef[s.basis.Index(b.m, b.n, b.part)] += q[i]
				continue
			}
			addRow(coef[s.basis.Index(b.m, 1, b.part):], b.row, q[i])
		}
	}
}

// pair finds the pairs.
func (s *stage) pair() {
	s.first = make([]bool, len(s.modes))
	for i := range s.modes[:max(0, len(s.modes)-1)] {
		s.first[i] = s.modes[i].only(disc.Cos) && s.modes[i+1].pairs(&s.modes[i])
	}
}

// only tells whether a mode is one block with a row of this part.
func (k *modal) only(part disc.Part) bool {
	return len(k.shape) == 1 && k.shape[0].part == part && k.shape[0].row != nil
}

// pairs tells whether a mode is the sine to this cosine.
func (k *modal) pairs(cos *modal) bool {
	return k.only(disc.Sin) && k.shape[0].m == cos.shape[0].m && &k.shape[0].row[0] == &cos.shape[0].row[0]
}

func addPair(dst, row []float64, c, s float64) {
	dst = dst[:2*len(row)]
	for n, v := range row {
		dst[2*n] += c * v
		dst[2*n+1] += s * v
	}
}

func addRow(dst, row []float64, by float64) {
	for n, v := range row {
		dst[2*n] += by * v
	}
}

// radials returns the values of all modes at a point.
func (s *stage) radials(at Point) []float64 {
	out := make([]float64, len(s.modes))
	var shared []float64 // Bessel functions of one order
	order := -1
	for i := range s.modes {
		for _, b := range s.modes[i].shape {
			sin, cos := math.Sincos(float64(b.m) * at.Angle)
			if b.part == disc.Sin {
				cos = sin
			}
			if b.row == nil {
				out[i] += cos * bessel.JInt(b.m, s.basis.Zero(b.m, b.n)*at.Radius)
				continue
			}
			if b.m != order {
				order = b.m
				shared = besselRow(s.basis, b.m, at.Radius, shared[:0])
			}
			out[i] += cos * dotted(b.row, shared)
		}
	}
	return out
}

// besselRow appends J_m(j_m1 r), J_m(j_m2 r), ...
func besselRow(b *disc.Basis, m int, r float64, dst []float64) []float64 {
	for n := 1; n <= b.N; n++ {
		dst = append(dst, bessel.JInt(m, b.Zero(m, n)*r))
	}
	return dst
}

// shortest returns the largest wave number of the modes that move: 2 pi over
// it is the shortest wavelength.
func (mo *motion) shortest() float64 {
	var wave float64
	for _, s := range mo.stages {
		for i := range s.modes {
			k := &s.modes[i]
			wave = math.Max(wave, mo.basis.Zero(min(k.m, mo.basis.M), min(k.n, mo.basis.N)))
		}
	}
	return wave
}

// energy returns the potential and the kinetic energy at the time t, in units
// of T/2 (J for displacements in m).
func (mo *motion) energy(t float64) (potential, kinetic float64) {
	s := mo.stage(t)
	for i := range s.modes {
		k := &s.modes[i]
		q, v, _ := s.at(i, t)
		potential += k.norm * k.omega * k.omega * q * q
		kinetic += k.norm * v * v
	}
	return potential, kinetic
}

// free tells whether nothing happens after the start.
func (mo *motion) free() bool {
	return len(mo.stages) == 1 && len(mo.stages[0].legs) == 1 && len(mo.stages[0].legs[0].loads) == 0
}

// strain bounds the strain energy of the sheet alone at any time, in units of
// T/2, by the sum of what every mode reaches and, left to itself, by the energy at
// the start.
func (mo *motion) strain() float64 {
	var reached float64
	for _, s := range mo.stages {
		reached = math.Max(reached, s.strain())
	}
	if mo.free() {
		potential, kinetic := mo.energy(0)
		return math.Min(potential+kinetic, reached)
	}
	return reached
}

func (s *stage) strain() float64 {
	var reached, order float64
	for i := 0; i < len(s.modes); i++ {
		k := &s.modes[i]
		part := k.swing * k.omega * math.Sqrt(k.norm*k.film)
		if i+1 < len(s.modes) && s.modes[i+1].pairs(k) {
			// Cosine and sine are orthogonal.
			i++
			l := &s.modes[i]
			part = math.Hypot(part, l.swing*l.omega*math.Sqrt(l.norm*l.film))
		}
		// Of one order the roots add (triangle inequality), of several the
		// energies do.
		order += part
		if i+1 == len(s.modes) || s.modes[i+1].m != k.m || len(k.shape) > 1 && k.film == 1 {
			reached += order * order
			order = 0
		}
	}
	return reached
}

// reach bounds the displacement anywhere on the sheet from the time t on.
func (mo *motion) reach(t float64) float64 {
	var sum float64
	for i, s := range mo.stages {
		if i+1 < len(mo.stages) && mo.stages[i+1].from <= t {
			continue
		}
		last := s.legs[len(s.legs)-1]
		whole := i+1 < len(mo.stages) || t < last.from || !last.quiet()
		var own float64
		for i := range s.modes {
			k := &s.modes[i]
			if whole {
				own += k.size
			} else {
				own += k.rest + k.ring*math.Exp(-k.decay*(t-last.from))
			}
		}
		sum = math.Max(sum, own)
	}
	return sum
}

// fastest returns the largest angular frequency that moves; 0 at rest.
func (mo *motion) fastest() float64 {
	var omega float64
	for _, s := range mo.stages {
		for i := range s.modes {
			omega = math.Max(omega, s.modes[i].omega)
		}
	}
	return omega
}

// moving counts the modes that move, in the stage with most.
func (mo *motion) moving() int {
	most := 0
	for _, s := range mo.stages {
		most = max(most, len(s.modes))
	}
	return most
}

// parts of the modes of an order: the sines of m = 0 are nothing.
func parts(m int) int { return min(m+1, 2) }

// of returns the mode as the cosine or sine of its pair.
func (k modal) of(part disc.Part) modal {
	b := k.shape[0]
	b.part = part
	k.shape = []block{b}
	return k
}

// letGo is the motion of a stage left to itself.
func letGo(s *stage, begin []state) *motion {
	s.legs = []leg{{from: s.from}}
	s.run(begin, nil, math.Inf(1))
	mo := &motion{basis: s.basis, stages: []*stage{s}}
	mo.keep()
	return mo
}

// idealModes lists the modes of the ideal sheet.
func idealModes(b *disc.Basis, zeta float64) []modal {
	var list []modal
	for m := 0; m <= b.M; m++ {
		top := largestBessel(m)
		for n := 1; n <= b.N; n++ {
			mode := modal{m: m, n: n, omega: b.Zero(m, n), zeta: zeta, norm: b.Norm(m, n), film: 1, peak: top, shape: []block{{m: m, n: n}}}
			for part := range parts(m) {
				list = append(list, mode.of(disc.Part(part)))
			}
		}
	}
	return list
}

// newMotion takes the initial coefficients of a basis to the modes of the ideal
// sheet. velocity is in m per a/c.
func newMotion(b *disc.Basis, zeta float64, displacement, velocity []float64) *motion {
	s := &stage{basis: b, modes: idealModes(b, zeta)}
	begin := make([]state, len(s.modes))
	for i := range begin {
		k := s.modes[i].shape[0]
		at := b.Index(k.m, k.n, k.part)
		begin[i] = state{displacement[at], velocity[at]}
	}
	return letGo(s, begin)
}

// energy of a mode at the start of a leg, in units of T/2.
func (k *modal) energy(l int) float64 {
	q, v := k.omega*k.states[l].q, k.states[l].v
	return k.norm * (q*q + v*v)
}

// same tells whether two modes swing alike, as those of a pair that has not split.
func (k *modal) same(l *modal) bool { return k.omega == l.omega && k.zeta == l.zeta && k.m == l.m }

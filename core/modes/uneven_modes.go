package modes

import (
	"math"
	"slices"

	"hoopsheet/core/disc"
)

// CoupledMode is one mode of a diaphragm whose orders are coupled.
type CoupledMode struct {
	// M and N of the even mode it descends from: the one with the largest share
	// of its energy, each even mode being given away once and a pair twice. A mode
	// mixed too much for that (see Share) takes a label left over, by frequency.
	M, N int
	// Upper marks the higher of a pair.
	Upper bool
	// Frequency, Hz; Error, Hz, is what a smaller set of functions would change.
	Frequency, Error float64
	// Even is the frequency of the even diaphragm, Hz.
	Even float64
	// Split is the difference of the two frequencies of the pair over their mean,
	// or 0 for M = 0.
	Split float64
	// NodalAngle is where its first nodal diameter lies, rad, 0 up to pi/M; 0 for
	// M = 0. Without a split it is arbitrary.
	NodalAngle float64
	// Share of the even pair in its kinetic energy, 0 to 1.
	Share float64
	// Damping, to first order: the losses of the even modes by their shares.
	Damping Damping
	// BeyondSound: the even mode is, so there is no figure for its radiation.
	BeyondSound bool

	shape *coupledShape
}

// coupledShape is a shape as coefficients of disc.HeldEdge shapes.
type coupledShape struct {
	inner    float64     // effective radius over the ring's
	cos, sin [][]float64 // by order
	scale    float64
	mass     float64 // kg, for a largest value of one
}

// rawMode is a solution by its unknowns.
type rawMode struct {
	value  float64   // omega^2
	vector []float64 // over the unknowns of all nodes, unit modal mass
	change float64   // of value, by a smaller set
}

// modes gathers the solutions of all blocks.
func (s *unevenSystem) modes() []rawMode {
	var list []rawMode
	for _, b := range s.blocks {
		for k, v := range b.values {
			vector := zeros(s.unknowns)
			copy(b.of(vector), part(b.vectors, k, b.size))
			list = append(list, rawMode{value: v, vector: vector, change: s.truncation(vector, v, len(b.nodes))})
		}
	}
	return byValue(list)
}

// byValue sorts solutions, lowest first.
func byValue(list []rawMode) []rawMode {
	sorted := make([]rawMode, len(list))
	for k, i := range inOrder(len(list), func(i, j int) bool { return list[i].value < list[j].value }) {
		sorted[k] = list[i]
	}
	return sorted
}

// truncation estimates how much a value would fall with more functions: by the
// strain energy in the last shapes of every order, in the last two orders and, if
// functions were left out, in the last of those kept.
func (s *unevenSystem) truncation(x []float64, value float64, nodes int) float64 {
	// Leaving out a part S changes the value by x_S'(A_SS - value)x_S to leading
	// order; what is missing is taken to be no more than the last two terms.
	if nodes == 1 {
		return 0 // the even solution has its own estimate
	}
	sum := 0.0
	for i, o := range s.orders {
		count := len(o.omega)
		first := count
		switch {
		case o.m > 0 && i >= len(s.orders)-2:
			first = 0
		case len(o.left) > 0:
			first = count - 2
		}
		for k := first; k < count; k++ {
			sum += s.share(x, i, k) * math.Max(0, square(o.omega[k])-value)
		}
		for k, cut := range o.cut {
			sum += s.share(x, i, k) * cut * value
		}
		if first == 0 {
			continue
		}
		for j := o.n - 2; j < o.n; j++ {
			cos, sin := 0.0, 0.0
			for k := range count {
				c, d := s.component(x, i, k)
				cos += c * o.coef[k*o.n+j]
				sin += d * o.coef[k*o.n+j]
			}
			sum += s.tension * circle(o.m) / (2 * disc.HeldEdge.Order(o.m, j)) * (cos*cos + sin*sin)
		}
	}
	return sum
}

// label names the modes and finishes them.
func (s *unevenSystem) label(raw []rawMode, even *Solution) []CoupledMode {
	// A slot is a function of an order, which one mode (m = 0) or two may go on
	// from.
	type slot struct {
		order, n, room int
		modes          []int
	}
	type claim struct {
		mode  int
		slot  *slot
		share float64
	}
	var slots []*slot
	var claims []claim
	for i, o := range s.orders {
		for n := range o.omega {
			p := &slot{order: i, n: n, room: min(2, 1+o.m)}
			slots = append(slots, p)
			for k, r := range raw {
				// Of functions that are not listed only what clearly goes on from one.
				if v := s.share(r.vector, i, n); v > 1e-3 && (n < o.listed || v >= 0.5) {
					claims = append(claims, claim{k, p, v})
				}
			}
		}
	}
	shares := zeros(len(raw)) // above 0 for what has a label
	give := func(k int, p *slot, share float64) {
		p.modes, shares[k] = append(p.modes, k), math.Min(1, math.Max(share, 1e-9))
	}
	for _, i := range inOrder(len(claims), func(i, j int) bool { return claims[i].share > claims[j].share }) {
		if c := &claims[i]; shares[c.mode] == 0 && len(c.slot.modes) < c.slot.room {
			give(c.mode, c.slot, c.share)
		}
	}
	// What is mixed too much for a label of its own takes those left over, by
	// frequency, so that no mode is lost.
	rank := inOrder(len(slots), func(i, j int) bool {
		p, q := slots[i], slots[j]
		return s.orders[p.order].omega[p.n] < s.orders[q.order].omega[q.n]
	})
	next := 0
	for k := range raw {
		for shares[k] == 0 && next < len(rank) {
			p := slots[rank[next]]
			if p.n < s.orders[p.order].listed && len(p.modes) < p.room {
				give(k, p, s.share(raw[k].vector, p.order, p.n))
			} else {
				next++
			}
		}
	}
	labels := make([]*slot, len(raw))
	for _, p := range slots {
		if p.n < s.orders[p.order].listed {
			slices.Sort(p.modes) // raw is in order of frequency
			for _, k := range p.modes {
				labels[k] = p
			}
		}
	}
	list := []CoupledMode{}
	for k, p := range labels {
		if p == nil {
			continue
		}
		mode := s.finish(raw[k], p.order, p.n, even)
		mode.Upper, mode.Share = k != p.modes[0], shares[k]
		if len(p.modes) == 2 {
			a, b := math.Sqrt(raw[p.modes[0]].value), math.Sqrt(raw[p.modes[1]].value)
			mode.Split = 2 * (b - a) / (a + b)
		}
		list = append(list, mode)
	}
	return list
}

// share returns the share of function n of an order, cosine and sine.
func (s *unevenSystem) share(vector []float64, order, n int) float64 {
	c, d := s.component(vector, order, n)
	return c*c + d*d
}

func (s *unevenSystem) component(vector []float64, order, n int) (cos, sin float64) {
	pair := s.pairs[order]
	cos = vector[pair[0].global+n]
	if pair[1] != nil {
		sin = vector[pair[1].global+n]
	}
	return cos, sin
}

// finish makes a mode of a solution that descends from function n of an order.
func (s *unevenSystem) finish(r rawMode, order, n int, even *Solution) CoupledMode {
	o := s.orders[order]
	omega := math.Sqrt(r.value)
	mode := CoupledMode{M: o.m, N: n + 1, Frequency: omega / (2 * math.Pi), Even: o.omega[n] / (2 * math.Pi)}
	mode.Error = mode.Frequency * (r.change/r.value/2 + o.errors[n])
	cos, sin := s.component(r.vector, order, n)
	if o.m > 0 {
		m := float64(o.m)
		// cos, sin make cos m(theta - antinode).
		antinode := s.axis + math.Atan2(sin, cos)/m
		mode.NodalAngle = wrap(antinode+math.Pi/(2*m), math.Pi/m)
	}
	mode.BeyondSound = n < len(o.known) && o.known[n].BeyondSound
	d := &mode.Damping
	for i, p := range s.orders {
		for k, e := range p.damping {
			// A loss of 2 zeta omega per unit mass, by the square of the amplitude.
			weight := s.share(r.vector, i, k) * p.omega[k] / omega
			d.Radiation += weight * e.Radiation
			d.Viscous += weight * e.Viscous
			d.Sheet += weight * e.Sheet
		}
	}
	d.Remainder = even.Real.Remainder
	d.sum(omega)
	mode.shape = s.shapeOf(r, even)
	return mode
}

// shapeOf turns unknowns into coefficients, along the true axes.
func (s *unevenSystem) shapeOf(r rawMode, even *Solution) *coupledShape {
	shape := &coupledShape{inner: even.orders[0].radius / even.Real.Radius, scale: 1}
	for i, o := range s.orders {
		a, b := zeros(o.n), zeros(o.n)
		for k := range o.omega {
			cos, sin := s.component(r.vector, i, k)
			addTo(a, cos, o.row(k))
			addTo(b, sin, o.row(k))
		}
		turnS, turnC := math.Sincos(float64(o.m) * s.axis)
		for j := range a {
			a[j], b[j] = a[j]*turnC-b[j]*turnS, a[j]*turnS+b[j]*turnC
		}
		shape.cos, shape.sin = append(shape.cos, a), append(shape.sin, b)
	}
	return shape
}

// At returns the shape at radius r (0 to 1, of the ring's radius) and angle
// theta (rad). Its largest value over the plan is one, to 1 %. Beside attached
// masses it leaves out the local dent of their static deflection.
func (m *CoupledMode) At(r, theta float64) float64 {
	m.shape.normalise()
	return m.shape.at(r, theta)
}

// ModalMass returns the mass, kg, that moves with the mode, of sheet, fluid and
// what is attached, for the scale of At.
func (m *CoupledMode) ModalMass() float64 {
	m.shape.normalise()
	return m.shape.mass
}

// Coefficients returns the shape at the scale of At as coefficients of
// disc.HeldEdge shapes, by order, of cos m theta and sin m theta, on a disc of
// the returned radius (of the ring's).
func (m *CoupledMode) Coefficients() (cos, sin [][]float64, radius float64) {
	m.shape.normalise()
	for i := range m.shape.cos {
		cos = append(cos, scaled(m.shape.cos[i], m.shape.scale))
		sin = append(sin, scaled(m.shape.sin[i], m.shape.scale))
	}
	return cos, sin, m.shape.inner
}

func scaled(x []float64, f float64) []float64 {
	y := zeros(len(x))
	for i, v := range x {
		y[i] = f * v
	}
	return y
}

func (s *coupledShape) at(r, theta float64) float64 {
	x := r / s.inner
	if x >= 1 {
		return 0
	}
	w := 0.0
	u := zeros(len(s.cos[0]))
	for m := range s.cos {
		u = slices.Grow(u[:0], len(s.cos[m]))[:len(s.cos[m])]
		disc.HeldEdge.Shapes(u, m, x)
		sin, cos := math.Sincos(float64(m) * theta)
		w += dot(u, s.cos[m])*cos + dot(u, s.sin[m])*sin
	}
	return s.scale * w
}

// normalise sets the scale, once.
func (s *coupledShape) normalise() {
	if s.mass > 0 {
		return
	}
	// The plan on a polar grid: radial values by order, then each angle.
	const rings, spokes = 40, 72
	plan := CoupledShape{s.table(rings)}
	largest := 0.0
	for k := range spokes {
		sin, cos := math.Sincos(2 * math.Pi * float64(k) / spokes)
		for i := range rings {
			if v := plan.grid(i, complex(cos, sin)); math.Abs(v) > math.Abs(largest) {
				largest = v
			}
		}
	}
	s.scale = 1 / largest
	s.mass = s.scale * s.scale
}

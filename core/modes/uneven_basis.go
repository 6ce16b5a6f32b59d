package modes

import (
	"math"

	"hoopsheet/core/disc"
)

// coupledOrder is one number of nodal diameters of the even diaphragm, as a set
// of radial functions that are its modes.
type coupledOrder struct {
	m     int
	n     int       // shapes
	omega []float64 // rad/s, of each function, by place within the order
	left  []float64 // of higher ones that are left out of the eigenproblem
	// coef are disc.HeldEdge coefficients, row by function, scaled to a modal
	// mass of 1 kg over the whole disc, for cos m theta and sin m theta alike.
	coef []float64
	// Solved modes come first, the listed ones of them are followed. Of the solved:
	listed  int
	damping []Damping
	errors  []float64 // relative, of frequency
	cut     []float64 // share of strain energy in shapes left out of them

	source *wetOrder
	known  []*RealMode
}

// circle is the integral of cos^2 m theta.
func circle(m int) float64 {
	if m == 0 {
		return 2 * math.Pi
	}
	return math.Pi
}

func (o *coupledOrder) row(i int) []float64 { return part(o.coef, i, o.n) }

// coupledOrders takes the orders of a solution apart; modes up to a frequency, if
// positive, are listed.
func (s *Solution) coupledOrders(highest float64) []*coupledOrder {
	listed := make([][]*RealMode, len(s.orders))
	for i := range s.Modes {
		mode := &s.Modes[i]
		for len(listed[mode.M]) < mode.N {
			listed[mode.M] = append(listed[mode.M], nil)
		}
		listed[mode.M][mode.N-1] = mode
	}
	orders := make([]*coupledOrder, len(s.orders))
	for i, o := range s.orders {
		known := listed[i]
		for k, mode := range known {
			if mode == nil { // left out of the list: take those below it only
				known = known[:k]
				break
			}
		}
		c := newCoupledOrder(o, known)
		for highest > 0 && c.listed > 0 && known[c.listed-1].Frequency > highest {
			c.listed--
		}
		orders[i] = c
	}
	return orders
}

// newCoupledOrder completes the solved modes of an order by its higher modes in
// still fluid, up to all its shapes can express.
func newCoupledOrder(o *wetOrder, known []*RealMode) *coupledOrder {
	c := &coupledOrder{m: o.m, source: o, known: known, listed: len(known)}
	for _, mode := range known {
		c.damping = append(c.damping, mode.Damping)
		c.errors = append(c.errors, mode.Error/mode.Frequency)
	}
	c.fill(o.strain.n)
	return c
}

// shortest is the least number of shapes that the solved modes of an order take.
func (o *coupledOrder) shortest() int {
	if o.source.strain.scale == nil {
		return o.source.strain.n
	}
	return min(o.source.strain.n, len(o.known)+6)
}

// fill sets the functions up in the first n shapes; fewer than there are only for
// a limp sheet.
func (o *coupledOrder) fill(n int) {
	source := o.source
	whole, area := source.strain.size, circle(o.m)
	size := whole
	if n < source.strain.n {
		size = n // a limp sheet: the unknowns are the shapes, scaled
	}
	o.n, o.coef, o.omega, o.cut = n, nil, nil, nil
	last := 0.0
	for _, mode := range o.known {
		last = real(mode.omega)
		// A change of the strain energy moves omega^2 by it over this mass, which
		// has the change of the fluid's mass with frequency in it.
		o.add(mode.coef[:n], mode.SheetMass+mode.FluidMass, last)
		o.cut = append(o.cut, energy(o.m, mode.coef, n)/energy(o.m, mode.coef, 0))
	}
	static := zeros(size * size)
	for i := range size {
		copy(part(static, i, size), source.static[i*whole:])
	}
	vectors := zeros(size * size)
	values := newSymmetric(size).largest(static, size, vectors)
	y, q := zeros(whole), zeros(source.strain.n)
	for k := range size {
		if source.cavity == nil && k < len(o.known) {
			continue
		}
		copy(y, part(vectors, k, size))
		source.strain.shapes(q, y)
		omega := 1 / math.Sqrt(values[k])
		// With a cavity the modes known are not the first of these: what they say
		// already is left out.
		if source.cavity != nil && (omega <= last || !o.beside(q[:n])) {
			continue
		}
		o.add(q[:n], area*values[k], omega)
	}
}

// beside takes from a function what lies, by strain energy, in the span of the
// known modes and keeps its energy; false if that is most of it.
func (o *coupledOrder) beside(q []float64) bool {
	inner := func(a, b []float64) float64 {
		sum := 0.0
		for j, v := range a {
			sum += v * b[j] / (2 * disc.HeldEdge.Order(o.m, j))
		}
		return sum
	}
	whole := inner(q, q)
	var basis [][]float64
	for k := range o.known {
		b := append([]float64(nil), o.row(k)...)
		before := inner(b, b)
		for _, c := range basis {
			addTo(b, -inner(b, c), c)
		}
		if after := inner(b, b); after > 1e-9*before {
			basis = append(basis, scaled(b, 1/math.Sqrt(after)))
		}
	}
	for _, c := range basis {
		addTo(q, -inner(q, c), c)
	}
	left := inner(q, q)
	if left < whole/2 {
		return false
	}
	copy(q, scaled(q, math.Sqrt(whole/left)))
	return true
}

// energy returns the strain energy of unit tension in the shapes from first on.
func energy(m int, coef []float64, first int) float64 {
	sum := 0.0
	for j := first; j < len(coef); j++ {
		sum += coef[j] * coef[j] / (2 * disc.HeldEdge.Order(m, j))
	}
	return sum
}

func (o *coupledOrder) add(q []float64, mass, omega float64) {
	f := 1 / math.Sqrt(mass)
	for _, v := range q {
		o.coef = append(o.coef, f*v)
	}
	o.omega = append(o.omega, omega)
}

// slopesOf fills radial with u_j' and around with m u_j/r for the disc.HeldEdge
// shapes of order m at 0 < r <= 1.
func slopesOf(radial, around []float64, m int, r float64) {
	// By the recurrences of J_m under the Hankel transform of u_j,
	//
	//	u' + m u/r =  r^(m-1) P_(j+1)^(m-1,0)(1-2r^2),
	//	u' - m u/r = -r^(m+1) P_j^(m+1,0)(1-2r^2),
	//
	// Zernike's radial polynomials of one degree, m + 2j + 1.
	n := len(radial)
	outer := zeros(n)
	zernike(outer, m+1, r)
	if m == 0 {
		for j, v := range outer {
			radial[j], around[j] = -v, 0
		}
		return
	}
	inner := zeros(n + 1)
	zernike(inner, m-1, r)
	for j, v := range outer {
		radial[j] = (inner[j+1] - v) / 2
		around[j] = (inner[j+1] + v) / 2
	}
}

// zernike fills dst with r^m P_j^(m,0)(1-2r^2), j = 0, 1, ..; with the sign
// (-1)^j these are Zernike's radial polynomials of degree m + 2j.
func zernike(dst []float64, m int, r float64) {
	// DLMF 18.9.1-2.
	if len(dst) == 0 {
		return
	}
	a, x := float64(m), 1-2*r*r
	before, v := 0.0, math.Pow(r, a)
	dst[0] = v
	for j := 1; j < len(dst); j++ {
		n := float64(j)
		s := 2*n + a
		var next float64
		if j == 1 {
			next = ((a + 2) * x / 2 * v) + a/2*v
		} else {
			next = ((s-1)*(s*(s-2)*x+a*a)*v - 2*(n+a-1)*(n-1)*s*before) / (2 * n * (n + a) * (s - 2))
		}
		before, v = v, next
		dst[j] = v
	}
}

// gradientTable holds the slopes of the functions of one order at the points of
// a radial rule.
type gradientTable struct {
	functions      int
	radial, around []float64 // row by point
}

func (o *coupledOrder) gradients(radii []float64) *gradientTable {
	k := len(o.omega)
	t := &gradientTable{functions: k, radial: zeros(len(radii) * k), around: zeros(len(radii) * k)}
	ur, ut := zeros(o.n), zeros(o.n)
	for g, r := range radii {
		slopesOf(ur, ut, o.m, r)
		for i := range k {
			t.radial[g*k+i] = dot(ur, o.row(i))
			t.around[g*k+i] = dot(ut, o.row(i))
		}
	}
	return t
}

// unevenRule returns a radial rule that is exact for the products of gradients
// of two orders and the given power of r.
func unevenRule(orders []*coupledOrder, power int) (radii, weights []float64) {
	degree := 0 // of a gradient, in r
	for _, o := range orders {
		degree = max(degree, o.m+2*o.n-1)
	}
	points := (2*degree+power)/4 + 1
	radii, weights = zeros(points), zeros(points)
	disc.RadialRule(radii, weights, 0)
	return radii, weights
}

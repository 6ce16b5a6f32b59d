package modes

import (
	"math"
	"slices"
)

// unevenSystem is the eigenproblem of a diaphragm whose orders are coupled by a
// field, in blocks that are not coupled with each other:
//
//	(Omega^2 + E) x = omega^2 x,
//
// Omega the frequencies of the even diaphragm, E the strain energy of the field,
// functions scaled to unit modal mass.
// With an oval ring in fluid there is a mass matrix 1 + M on the right, too.
type unevenSystem struct {
	orders   []*coupledOrder
	axis     float64 // angle of theta = 0, rad
	blocks   []*unevenBlock
	pairs    [][2]*node // cosine and sine of each order
	unknowns int        // of all blocks
	tension  float64    // T, N/m
}

type unevenBlock struct {
	nodes  []*node
	first  int // of its unknowns among all
	size   int
	matrix []float64 // size by size
	mass   []float64 // nil for the unit matrix
	// wanted is how many of the lowest modes are reported from this block.
	wanted  int
	values  []float64 // omega^2, lowest first
	vectors []float64 // row by mode
}

// mirror returns the angle of a line about which the field is even, or 0.
func (f Field) mirror() float64 {
	var first *Part
	for i := range f {
		if p := &f[i]; p.K > 0 && (p.RR != 0 || p.TT != 0 || p.RT != 0) && (first == nil || p.K < first.K) {
			first = p
		}
	}
	if first == nil {
		return 0
	}
	for turn := range 2 * first.K {
		axis := first.Angle + math.Pi*float64(turn)/float64(first.K)
		if !slices.ContainsFunc(f, func(p Part) bool {
			return math.Abs(math.Sin(float64(p.K)*(p.Angle-axis))) > symmetryTolerance
		}) {
			return axis
		}
	}
	return 0
}

// newUnevenSystem sets up the blocks.
func newUnevenSystem(orders []*coupledOrder, uneven Field, oval Oval, even *Solution) *unevenSystem {
	field := append(oval.field(), uneven...)
	s := &unevenSystem{orders: orders, axis: field.mirror(), tension: even.Real.Tension}
	highest := 0
	for _, p := range field {
		highest = max(highest, p.Power)
	}
	radii, weights := unevenRule(orders, highest)
	parts := field.turned(s.axis).harmonicParts(radii, weights, even.Real.Tension)
	fluid := newOvalFluid(oval, s.axis, even)
	var nodes []*node
	for _, o := range orders {
		pair := [2]*node{{order: o}}
		nodes = append(nodes, pair[0])
		if o.m > 0 {
			pair[1] = &node{order: o, sine: true}
			nodes = append(nodes, pair[1])
		}
		s.pairs = append(s.pairs, pair)
	}
	together := groups(nodes, func(a, b *node) bool {
		for _, h := range parts {
			if h.joined(a, b) {
				return true
			}
		}
		return fluid != nil && fluid.joined(a, b)
	})
	trim(orders, together)
	tables := map[*coupledOrder]*gradientTable{}
	for _, o := range orders {
		if len(parts) > 0 {
			tables[o] = o.gradients(radii)
		}
	}
	for _, group := range together {
		b := newUnevenBlock(group, s.unknowns, parts, tables)
		s.unknowns += b.size
		if fluid != nil {
			b.mass = zeros(b.size * b.size)
			for i := range b.size {
				b.mass[i*b.size+i] = 1
			}
			fluid.addMass(b)
		}
		s.blocks = append(s.blocks, b)
	}
	return s
}

// trim makes the sets of functions smaller until no group has more than
// maxUnknowns: of a limp sheet by a lower degree of the polynomials, the same for
// all orders; failing that, by leaving out the functions of highest frequency.
func trim(orders []*coupledOrder, together [][]*node) {
	// largest of the groups for given numbers of functions.
	largest := func(count func(*coupledOrder) int) int {
		most := 0
		for _, group := range together {
			sum := 0
			for _, n := range group {
				sum += count(n.order)
			}
			most = max(most, sum)
		}
		return most
	}
	top := 0
	for _, o := range orders {
		top = max(top, o.m+2*o.n)
	}
	shapes := func(o *coupledOrder, degree int) int {
		return max(o.shortest(), min(o.n, (degree-o.m)/2))
	}
	degree := top
	for degree > 0 && largest(func(o *coupledOrder) int { return shapes(o, degree) }) > maxUnknowns {
		degree--
	}
	if degree == top {
		return
	}
	for _, o := range orders {
		if n := shapes(o, degree); n < o.n {
			o.fill(n)
		}
	}
	limit := math.Inf(1)
	for _, group := range together {
		var all []float64
		for _, n := range group {
			all = append(all, n.order.omega...)
		}
		if len(all) > maxUnknowns {
			slices.Sort(all)
			limit = math.Min(limit, all[maxUnknowns])
		}
	}
	for _, o := range orders {
		keep := len(o.omega)
		for keep > o.listed && o.omega[keep-1] >= limit {
			keep--
		}
		o.omega, o.left = o.omega[:keep], o.omega[keep:]
	}
}

func newUnevenBlock(group []*node, first int, parts []*harmonicPart, tables map[*coupledOrder]*gradientTable) *unevenBlock {
	b := &unevenBlock{nodes: group, first: first}
	for _, n := range group {
		n.at, n.global = b.size, first+b.size
		b.size += len(n.order.omega)
		b.wanted += n.order.listed
	}
	b.matrix = zeros(b.size * b.size)
	for i, p := range group {
		for k, omega := range p.order.omega {
			b.matrix[(p.at+k)*b.size+p.at+k] = omega * omega
		}
		for _, q := range group[:i+1] {
			for _, h := range parts {
				if h.joined(p, q) {
					h.addStrain(b.matrix, b.size, p, q, tables[p.order], tables[q.order])
				}
			}
		}
	}
	mirrored(b.matrix, b.size)
	return b
}

// groups divides nodes into sets that nothing couples.
func groups(nodes []*node, joined func(a, b *node) bool) [][]*node {
	var list [][]*node
	left := slices.Clone(nodes)
	for len(left) > 0 {
		group := []*node{left[0]}
		left = left[1:]
		for i := 0; i < len(group); i++ {
			left = slices.DeleteFunc(left, func(n *node) bool {
				if joined(group[i], n) {
					group = append(group, n)
					return true
				}
				return false
			})
		}
		list = append(list, group)
	}
	return list
}

// solve finds the wanted modes of every block.
func (s *unevenSystem) solve() {
	for _, b := range s.blocks {
		b.solve()
	}
}

// solve finds the lowest modes of the block.
func (b *unevenBlock) solve() {
	n := b.size
	b.vectors = zeros(b.wanted * n)
	if b.mass == nil && b.diagonal() {
		b.values = zeros(b.wanted)
		place := inOrder(n, func(i, j int) bool { return b.matrix[i*n+i] < b.matrix[j*n+j] })
		for k := range b.values {
			b.values[k] = b.matrix[place[k]*n+place[k]]
			b.vectors[k*n+place[k]] = 1
		}
		return
	}
	c := copied(b.matrix)
	var l []float64
	if b.mass != nil {
		// To the ordinary problem by M = LL': Golub & Van Loan, Matrix
		// Computations, 4th ed., algorithm 8.7.1.
		l = copied(b.mass)
		cholesky(l, n)
		congruent(c, l, n)
	}
	// The lowest are wanted, so the matrix is turned over: top - A. That rounds
	// to eps top, so the lowest values are taken anew from the vectors.
	top := 0.0 // Gershgorin's bound
	for i := range n {
		sum := 0.0
		for _, v := range part(c, i, n) {
			sum += math.Abs(v)
		}
		top = math.Max(top, sum)
	}
	for i := range c {
		c[i] = -c[i]
	}
	for i := range n {
		c[i*n+i] += top
	}
	b.values = newSymmetric(n).largest(c, b.wanted, b.vectors)
	for k := range b.values {
		v := part(b.vectors, k, n)
		if l != nil {
			backward(l, n, v)
		}
		b.values[k] = top - b.values[k]
		if b.values[k] > 1e-3*top {
			continue
		}
		b.values[k] = bilinear(b.matrix, n, v)
		if l != nil {
			b.values[k] /= bilinear(b.mass, n, v)
		}
	}
}

func (b *unevenBlock) diagonal() bool {
	for i := range b.size {
		if _, hi := span(part(b.matrix, i, b.size)[:i]); hi > 0 {
			return false
		}
	}
	return true
}

// of returns the block's part of a vector over all unknowns.
func (b *unevenBlock) of(x []float64) []float64 { return x[b.first : b.first+b.size] }

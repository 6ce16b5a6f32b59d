package modes

import (
	"math"

	"hoopsheet/core/disc"
)

// flexibility is the static answer of a system to loads like its functionals.
type flexibility struct {
	count   int
	values  []float64 // functionals of every unknown: count by unknowns
	shapes  []float64 // the static deflections by unknowns: count by unknowns
	matrix  []float64 // functionals of the deflections: count by count
	tail    []float64 // the part of matrix that the unknowns do not express
	load    []bool
	inertia []float64 // of the tail, count by count
}

func (s *unevenSystem) flexibility(list []*attachment, T float64) *flexibility {
	f := &flexibility{}
	for _, a := range list {
		f.count += len(a.list)
		for _, g := range a.list {
			f.load = append(f.load, g.load)
		}
	}
	f.values = zeros(f.count * s.unknowns)
	f.matrix = zeros(f.count * f.count)
	at := 0
	for i, a := range list {
		s.evaluate(f, a, at)
		if a.patch != nil {
			f.add(at, at, a.staticSelf(), len(a.list), 1/T)
		} else {
			f.add(at, at, a.strip.staticSelf(), 2*len(a.strip.along), 1/T)
		}
		before := 0
		for _, b := range list[:i] {
			if a.patch != nil && b.patch != nil && a.patch.gap(*b.patch) > 0 {
				x := a.staticBetween(b)
				f.add(at, before, x, len(b.list), 1/T)
				f.addTurned(before, at, x, len(b.list), 1/T)
			}
			before += len(b.list)
		}
		at += len(a.list)
	}
	// What the functions of the even sheet hold of these is counted anew with the
	// true stiffness, so it must come off; likewise between attachments.
	s.takeOff(f, list, T)
	f.tail = copied(f.matrix)
	f.shapes = s.deflections(f)
	for j := range f.count {
		if !f.load[j] {
			continue
		}
		for i := range f.count {
			v := dot(part(f.values, i, s.unknowns), part(f.shapes, j, s.unknowns))
			f.matrix[i*f.count+j] += v
			if !f.load[i] {
				f.matrix[j*f.count+i] = f.matrix[i*f.count+j]
			}
		}
	}
	return f
}

// weighTail fills in the inertia of the tail.
func (f *flexibility) weighTail(list []*attachment, T, sheet, fluid float64) {
	scale := make([]float64, 0, f.count)
	for _, a := range list {
		energy := zeros(len(a.list))
		for i := range energy {
			at := len(scale) + i
			energy[i] = T * f.tail[at*f.count+at]
		}
		for _, v := range a.inertiaOf(energy, fluid) {
			scale = append(scale, math.Sqrt(v*sheet/T))
		}
	}
	f.inertia = zeros(f.count * f.count)
	for i, x := range scale {
		for j, y := range scale {
			f.inertia[i*f.count+j] = x * y * f.tail[i*f.count+j]
		}
	}
}

func (f *flexibility) add(row, column int, x []float64, n int, factor float64) {
	for i := range len(x) / n {
		for j := range n {
			f.matrix[(row+i)*f.count+column+j] += factor * x[i*n+j]
		}
	}
}

func (f *flexibility) addTurned(row, column int, x []float64, n int, factor float64) {
	for i := range len(x) / n {
		for j := range n {
			f.matrix[(row+j)*f.count+column+i] += factor * x[i*n+j]
		}
	}
}

// evaluate fills in the functionals of the unknowns for one attachment and keeps
// those of the shapes for takeOff.
func (s *unevenSystem) evaluate(f *flexibility, a *attachment, at int) {
	for o, order := range s.orders {
		n := order.n
		both := rowsOf(order, a.r, a.t, a.weights)
		var straight [2][]float64
		if a.strip != nil {
			straight = rowsOf(order, a.strip.r, a.strip.t, a.weights)
			for side := range both {
				straight[side] = combine(a.strip.square, straight[side])
				both[side] = combine(a.strip.mix, both[side])
			}
		}
		for side, rows := range both {
			node := s.pairs[o][side]
			if node == nil {
				continue
			}
			kept, lefts := len(order.omega), len(order.left)
			left := zeros(len(a.list) * lefts)
			for i := range a.list {
				row := part(rows, i, n)
				out := f.values[(at+i)*s.unknowns+node.global:]
				for k := range kept {
					out[k] = dot(row, order.row(k))
				}
				for k := range lefts {
					left[i*lefts+k] = dot(row, order.row(kept+k))
				}
			}
			part := shapePart{order: order, shapes: rows, left: left}
			if a.strip != nil {
				part.shapes = zeros(len(a.list) * n)
				copy(part.shapes, straight[side])
			}
			a.parts = append(a.parts, part)
		}
	}
}

// rowsOf returns functionals of the shapes of an order, times cosine and sine:
// row by functional.
func rowsOf(order *coupledOrder, r, t []float64, weights [][]float64) (both [2][]float64) {
	n := order.n
	u := zeros(len(r) * n)
	cos, sin := zeros(len(r)), zeros(len(r))
	for p := range r {
		disc.HeldEdge.Shapes(part(u, p, n), order.m, math.Min(1, r[p]))
		sin[p], cos[p] = math.Sincos(float64(order.m) * t[p])
	}
	for side, trig := range [2][]float64{cos, sin} {
		both[side] = zeros(len(weights) * n)
		if side == 1 && order.m == 0 {
			continue
		}
		for i, list := range weights {
			row := part(both[side], i, n)
			lo, hi := span(list)
			for p := lo; p < hi; p++ {
				addTo(row, list[p]*trig[p], part(u, p, n))
			}
		}
	}
	return both
}

// combine adds up groups of rows: x holds as many equal groups as each mix has
// weights, and every mix gives one group.
func combine(mixes [][]float64, x []float64) []float64 {
	size := len(x) / len(mixes[0])
	out := zeros(len(mixes) * size)
	for d, mix := range mixes {
		sum := part(out, d, size)
		for i, w := range mix {
			addTo(sum, w, part(x, i, size))
		}
	}
	return out
}

// shapePart holds the functionals of the shapes of one node, where a static
// deflection was put in, and of its functions that are left out.
type shapePart struct {
	order        *coupledOrder
	shapes, left []float64
}

// takeOff subtracts the static deflection of the even limp sheet as far as the
// shapes express it, where the whole was put in, and adds that of the functions
// left out.
func (s *unevenSystem) takeOff(f *flexibility, list []*attachment, T float64) {
	row := 0
	for x, a := range list {
		column := 0
		for y, b := range list[:x+1] {
			whole := a.strip != nil && x == y ||
				a.patch != nil && b.patch != nil && (x == y || a.patch.gap(*b.patch) > 0)
			for k := range a.parts {
				p, q := a.parts[k], b.parts[k]
				o := p.order
				scale := zeros(o.n)
				for j := range scale {
					if whole { // tension 1/(2b) in each shape
						scale[j] = -2 * disc.HeldEdge.Order(o.m, j) / (circle(o.m) * T)
					}
				}
				lefts := len(o.left)
				weighed := zeros(o.n)
				for i, g := range a.list {
					for k, c := range scale {
						weighed[k] = c * p.shapes[i*o.n+k]
					}
					for j, h := range b.list {
						if !g.load && !h.load {
							continue
						}
						v := 0.0
						if whole {
							v = dot(weighed, part(q.shapes, j, o.n))
						}
						for k, omega := range o.left {
							v += p.left[i*lefts+k] * q.left[j*lefts+k] / (omega * omega)
						}
						f.matrix[(row+i)*f.count+column+j] += v
						if x != y {
							f.matrix[(column+j)*f.count+row+i] += v
						}
					}
				}
			}
			column += len(b.list)
		}
		row += len(a.list)
	}
}

// deflections solves for the static shapes.
func (s *unevenSystem) deflections(f *flexibility) []float64 {
	shapes := zeros(f.count * s.unknowns)
	for _, b := range s.blocks {
		n := b.size
		diagonal := b.diagonal()
		var l []float64
		if !diagonal {
			l = copied(b.matrix)
			cholesky(l, n)
		}
		for i := range f.count {
			if !f.load[i] {
				continue
			}
			x := b.of(part(shapes, i, s.unknowns))
			copy(x, b.of(part(f.values, i, s.unknowns)))
			if diagonal {
				for k := range x {
					x[k] /= b.matrix[k*n+k]
				}
			} else {
				forward(l, n, x)
				backward(l, n, x)
			}
		}
	}
	return shapes
}

// onlyStrips returns the tail of strips.
func (f *flexibility) onlyStrips(list []*attachment) []float64 {
	x := zeros(len(f.tail))
	at := 0
	for _, a := range list {
		if a.strip != nil {
			for i := at; i < at+len(a.list); i++ {
				copy(part(x, i, f.count), part(f.tail, i, f.count))
			}
		}
		at += len(a.list)
	}
	return x
}

// between turns a matrix between functionals into one between the residual
// deflections.
func (f *flexibility) between(matrix []float64, pivots []int, factor []float64) []float64 {
	n := len(pivots)
	l, x := zeros(n*n), zeros(n*n)
	for i, p := range pivots {
		copy(l[i*n:i*n+i+1], factor[p*n:p*n+i+1])
		for j, q := range pivots {
			x[i*n+j] = matrix[p*f.count+q]
		}
	}
	congruent(x, l, n)
	return x
}

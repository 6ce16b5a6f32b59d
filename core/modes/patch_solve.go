package modes

import (
	"cmp"
	"math"
	"slices"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
	"hoopsheet/core/internal/sorting"
)

// attach adds masses to a solved system. It is a Ritz solution in the solved
// modes and what they lack of the static deflections under the attached masses,
// which makes it a change of low rank: only the solved modes and a few
// deflections take part.
func (s *unevenSystem) attach(raw []rawMode, patches []Patch, strips []Strip, even *Solution) []rawMode {
	k := s.waveNumber()
	radius := even.orders[0].radius
	var list []*attachment
	for i, p := range merged(patches) {
		list = append(list, newPatchAttachment(i, p, radius, s.axis, k))
	}
	for _, p := range strips {
		list = append(list, newStripAttachment(p, radius, s.axis, k))
	}
	real := even.Real
	f := s.flexibility(list, real.Tension)
	fluid := 0.0
	if len(even.orders[0].faces) > 0 {
		fluid = (real.Upper.Density + real.Lower.Density) * radius / real.ArealDensity
	}
	f.weighTail(list, real.Tension, real.ArealDensity*radius*radius, fluid)
	return s.ritz(raw, list, f)
}

// merged puts limp patches that lie on each other into one.
func merged(patches []Patch) []Patch {
	var list []Patch
	for _, p := range patches {
		same := slices.IndexFunc(list, func(q Patch) bool {
			q.Mass = p.Mass
			return p == q && !p.Rigid
		})
		if same >= 0 {
			list[same].Mass += p.Mass
		} else {
			list = append(list, p)
		}
	}
	return list
}

// waveNumber returns the largest j_mn of the reported modes.
func (s *unevenSystem) waveNumber() float64 {
	k := 0.0
	for _, o := range s.orders {
		if o.listed > 0 {
			k = math.Max(k, bessel.ZeroJ(float64(o.m), o.listed))
		}
	}
	// The highest modes only just: their answer is right to fewer digits.
	return 0.75 * k
}

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
	f.values = make([]float64, f.count*s.unknowns)
	f.matrix = make([]float64, f.count*f.count)
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
	f.tail = slices.Clone(f.matrix)
	f.shapes = s.deflections(f)
	for j := range f.count {
		if !f.load[j] {
			continue
		}
		for i := range f.count {
			v := dot(f.values[i*s.unknowns:(i+1)*s.unknowns], f.shapes[j*s.unknowns:(j+1)*s.unknowns])
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
		energy := make([]float64, len(a.list))
		for i := range energy {
			at := len(scale) + i
			energy[i] = T * f.tail[at*f.count+at]
		}
		for _, v := range a.inertiaOf(energy, fluid) {
			scale = append(scale, math.Sqrt(v*sheet/T))
		}
	}
	f.inertia = make([]float64, f.count*f.count)
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
			straight = rowsOf(order, a.strip.r, a.strip.t, a.strip.weights)
		}
		for side, rows := range both {
			node := s.pairs[o][side]
			if node == nil {
				continue
			}
			kept, lefts := len(order.omega), len(order.left)
			left := make([]float64, len(a.list)*lefts)
			for i := range a.list {
				row := rows[i*n : (i+1)*n]
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
				part.shapes = make([]float64, len(a.list)*n)
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
	u := make([]float64, len(r)*n)
	cos, sin := make([]float64, len(r)), make([]float64, len(r))
	for p := range r {
		disc.HeldEdge.Shapes(u[p*n:(p+1)*n], order.m, math.Min(1, r[p]))
		sin[p], cos[p] = math.Sincos(float64(order.m) * t[p])
	}
	for side, trig := range [2][]float64{cos, sin} {
		both[side] = make([]float64, len(weights)*n)
		if side == 1 && order.m == 0 {
			continue
		}
		for i, list := range weights {
			row := both[side][i*n : (i+1)*n]
			for p, w := range list {
				if w *= trig[p]; w == 0 {
					continue
				}
				for j, v := range u[p*n : (p+1)*n] {
					row[j] += w * v
				}
			}
		}
	}
	return both
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
			for part := range a.parts {
				p, q := a.parts[part], b.parts[part]
				o := p.order
				scale := make([]float64, o.n)
				for j := range scale {
					if whole { // tension 1/(2b) in each shape
						scale[j] = -2 * disc.HeldEdge.Order(o.m, j) / (circle(o.m) * T)
					}
				}
				lefts := len(o.left)
				weighed := make([]float64, o.n)
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
							v = dot(weighed, q.shapes[j*o.n:(j+1)*o.n])
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
	shapes := make([]float64, f.count*s.unknowns)
	for _, b := range s.blocks {
		n := b.size
		diagonal := b.diagonal()
		var l []float64
		if !diagonal {
			l = slices.Clone(b.matrix)
			cholesky(l, n)
		}
		x := make([]float64, n)
		for i := range f.count {
			if !f.load[i] {
				continue
			}
			for _, node := range b.nodes {
				copy(x[node.at:], f.values[i*s.unknowns+node.global:][:len(node.order.omega)])
			}
			if diagonal {
				for k := range x {
					x[k] /= b.matrix[k*n+k]
				}
			} else {
				forward(l, n, x)
				backward(l, n, x)
			}
			for _, node := range b.nodes {
				copy(shapes[i*s.unknowns+node.global:][:len(node.order.omega)], x[node.at:])
			}
		}
	}
	return shapes
}

// inertia returns M x for a vector over all unknowns.
func (s *unevenSystem) inertia(x []float64) []float64 {
	y := slices.Clone(x)
	for _, b := range s.blocks {
		if b.mass == nil {
			continue
		}
		in := make([]float64, b.size)
		for _, n := range b.nodes {
			copy(in[n.at:], x[n.global:][:len(n.order.omega)])
		}
		for _, n := range b.nodes {
			for k := range n.order.omega {
				y[n.global+k] = dot(b.mass[(n.at+k)*b.size:(n.at+k+1)*b.size], in)
			}
		}
	}
	return y
}

// ritz solves in the modes and the residual deflections.
func (s *unevenSystem) ritz(raw []rawMode, list []*attachment, f *flexibility) []rawMode {
	modes, r, u := len(raw), f.count, s.unknowns
	// Functionals of the modes, over omega: unknowns are scaled to a strain energy
	// of one half, in which the eigenvalues are 1/omega^2.
	onModes := make([]float64, r*modes)
	spans := make([][2]int, modes) // where a vector is not zero
	for k, m := range raw {
		scale := 1 / math.Sqrt(m.value)
		lo, hi := span(m.vector)
		spans[k] = [2]int{lo, hi}
		for i := range r {
			onModes[i*modes+k] = scale * dot(m.vector[lo:hi], f.values[i*u+lo:i*u+hi])
		}
	}
	residual := slices.Clone(f.matrix)
	for i := range r {
		for j := range r {
			if !f.load[i] && !f.load[j] {
				continue
			}
			residual[i*r+j] -= dot(onModes[i*modes:(i+1)*modes], onModes[j*modes:(j+1)*modes])
		}
	}
	pivots, factor := pivotedCholesky(residual, r, f.matrix, f.load)
	extra := len(pivots)
	// The residual deflections in the unknowns, made orthonormal.
	extras := make([]float64, extra*u)
	for e, p := range pivots {
		x := extras[e*u : (e+1)*u]
		copy(x, f.shapes[p*u:(p+1)*u])
		for k, m := range raw {
			c := onModes[p*modes+k] / math.Sqrt(m.value)
			lo := spans[k][0]
			for i, v := range m.vector[lo:spans[k][1]] {
				x[lo+i] -= c * v
			}
		}
		for d := range e {
			c := factor[p*extra+d]
			for i, v := range extras[d*u : (d+1)*u] {
				x[i] -= c * v
			}
		}
		for i := range x {
			x[i] /= factor[p*extra+e]
		}
	}
	size := modes + extra
	c := make([]float64, size*size)
	for k, m := range raw {
		c[k*size+k] = 1 / m.value
	}
	tail := f.between(f.inertia, pivots, factor)
	strips := f.between(f.onlyStrips(list), pivots, factor)
	for e := range extra {
		y := s.inertia(extras[e*u : (e+1)*u])
		for d := range e + 1 {
			v := dot(y, extras[d*u:(d+1)*u]) + tail[e*extra+d]
			c[(modes+e)*size+modes+d], c[(modes+d)*size+modes+e] = v, v
		}
	}
	// Masses and constraints.
	rows := make([]float64, r*size)
	for i := range r {
		copy(rows[i*size:], onModes[i*modes:(i+1)*modes])
		copy(rows[i*size+modes:(i+1)*size], factor[i*extra:(i+1)*extra])
	}
	var constraints [][]float64
	at := 0
	for _, a := range list {
		for i, g := range a.list {
			if g.mass > 0 {
				addLower(c, size, rows[(at+i)*size:(at+i+1)*size], g.mass)
			}
		}
		if a.rigid() {
			for _, weights := range a.constraints() {
				row := make([]float64, size)
				for i, w := range weights {
					if w != 0 {
						for k, v := range rows[(at+i)*size : (at+i+1)*size] {
							row[k] += w * v
						}
					}
				}
				constraints = append(constraints, row)
			}
		}
		at += len(a.list)
	}
	for i := range size { // the upper triangle
		for j := range i {
			c[j*size+i] = c[i*size+j]
		}
	}
	constrain(c, size, constraints)
	wanted := min(modes, size-len(constraints))
	vectors := make([]float64, wanted*size)
	values := newSymmetric(size).largest(c, wanted, vectors)
	out := make([]rawMode, wanted)
	for k, v := range values {
		y := vectors[k*size : (k+1)*size]
		m := rawMode{value: 1 / v, vector: make([]float64, u)}
		// y'Cy = v is the modal mass.
		scale := 1 / math.Sqrt(v)
		for i, w := range raw {
			p := scale * y[i]
			m.change += y[i] * y[i] * w.change / w.value
			p /= math.Sqrt(w.value)
			lo := spans[i][0]
			for j, x := range w.vector[lo:spans[i][1]] {
				m.vector[lo+j] += p * x
			}
		}
		for e := range extra {
			p := scale * y[modes+e]
			for j, x := range extras[e*u : (e+1)*u] {
				m.vector[j] += p * x
			}
		}
		// The inertia of what the unknowns do not express is an estimate, so it is
		// counted twice; of the deflection under strips, a quarter of what the
		// unknowns do not express, for square ends and for what bends across them.
		inertia := 2*math.Abs(bilinear(tail, extra, y[modes:]))*m.value + math.Abs(bilinear(strips, extra, y[modes:]))/4/v
		m.change = m.value * (m.change + inertia + s.unresolved(list, rows, size, y, v))
		out[k] = m
	}
	sorting.By(out, func(a, b rawMode) int { return cmp.Compare(a.value, b.value) })
	return out
}

// span returns the range outside which a vector is zero.
func span(x []float64) (lo, hi int) {
	hi = len(x)
	for lo < hi && x[lo] == 0 {
		lo++
	}
	for hi > lo && x[hi-1] == 0 {
		hi--
	}
	return lo, hi
}

// onlyStrips returns the tail of strips.
func (f *flexibility) onlyStrips(list []*attachment) []float64 {
	x := make([]float64, len(f.tail))
	at := 0
	for _, a := range list {
		if a.strip != nil {
			for i := at; i < at+len(a.list); i++ {
				copy(x[i*f.count:(i+1)*f.count], f.tail[i*f.count:(i+1)*f.count])
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
	l, x := make([]float64, n*n), make([]float64, n*n)
	for i, p := range pivots {
		copy(l[i*n:i*n+i+1], factor[p*n:p*n+i+1])
		for j, q := range pivots {
			x[i*n+j] = matrix[p*f.count+q]
		}
	}
	congruent(x, l, n)
	return x
}

// unresolved estimates the relative change of omega^2 by the next functionals:
// the share in the modal mass of the last degree of each patch.
func (s *unevenSystem) unresolved(list []*attachment, rows []float64, size int, y []float64, v float64) float64 {
	sum := 0.0
	at := 0
	for _, a := range list {
		top := 0
		for _, g := range a.list {
			top = max(top, g.degree)
		}
		for i, g := range a.list {
			if a.patch != nil && g.degree >= top-1 {
				sum += g.mass * square(dot(rows[(at+i)*size:(at+i+1)*size], y)) / v
			}
		}
		at += len(a.list)
	}
	return sum
}

// addLower adds factor v v' to the lower triangle of a matrix.
func addLower(c []float64, n int, v []float64, factor float64) {
	for i, x := range v {
		if x *= factor; x != 0 {
			row := c[i*n : i*n+i+1]
			for j, y := range v[:len(row)] {
				row[j] += x * y
			}
		}
	}
}

// constrain projects a symmetric matrix onto what is at right angles to rows: the
// directions taken out get eigenvalue 0, below all others.
func constrain(c []float64, n int, rows [][]float64) {
	var basis [][]float64
	for _, row := range rows {
		before := math.Sqrt(dot(row, row))
		for range 2 { // once more for rounding
			for _, b := range basis {
				p := dot(row, b)
				for i, v := range b {
					row[i] -= p * v
				}
			}
		}
		if after := math.Sqrt(dot(row, row)); after > 1e-9*before && after > 0 {
			basis = append(basis, scaled(row, 1/after))
		}
	}
	for _, b := range basis {
		// (1 - b b')C(1 - b b') = C - b w' - w b' + (b'w) b b', w = C b.
		w := make([]float64, n)
		for i := range w {
			w[i] = dot(c[i*n:(i+1)*n], b)
		}
		q := dot(b, w) / 2
		for i := range w {
			w[i] -= q * b[i]
		}
		for i := range n {
			row := c[i*n : (i+1)*n]
			for j := range row {
				row[j] -= b[i]*w[j] + w[i]*b[j]
			}
		}
	}
}

// pivotedCholesky factors a positive semidefinite matrix as L L' with as many
// columns as matter, biggest diagonal first and only those allowed, and returns
// the rows chosen and L (n by their number). scale holds, on its diagonal, what
// sizes are measured by.
func pivotedCholesky(a []float64, n int, scale []float64, allowed []bool) (pivots []int, l []float64) {
	// N. J. Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed.
	// (2002), section 10.3.
	largest := 0.0
	left := make([]float64, n)
	for i := range left {
		if allowed[i] {
			left[i] = a[i*n+i]
			largest = math.Max(largest, scale[i*n+i])
		}
	}
	var columns [][]float64
	for len(columns) < min(n, maxResidual) {
		p := 0
		for i, v := range left {
			if v > left[p] {
				p = i
			}
		}
		if left[p] <= residualTolerance*largest {
			break
		}
		column := make([]float64, n)
		root := math.Sqrt(left[p])
		for i := range column {
			v := a[i*n+p]
			for _, c := range columns {
				v -= c[i] * c[p]
			}
			column[i] = v / root
		}
		for _, q := range pivots {
			column[q] = 0
		}
		column[p] = root
		for i, v := range column {
			if allowed[i] {
				left[i] -= v * v
			}
		}
		left[p] = 0
		columns, pivots = append(columns, column), append(pivots, p)
	}
	l = make([]float64, n*len(columns))
	for e, c := range columns {
		for i, v := range c {
			l[i*len(columns)+e] = v
		}
	}
	return pivots, l
}

const (
	// maxResidual bounds the residual deflections, for speed.
	maxResidual = 120
	// residualTolerance is the share of the flexibility of an attached mass below
	// which a residual deflection is left out.
	residualTolerance = 1e-9
)

package modes

import (
	"math"
	"slices"

	"hoopsheet/core/bessel"
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

// waveNumber returns the wave number that the functionals are made for, from the
// largest j_mn of the reported modes.
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

// inertia returns M x for a vector over all unknowns.
func (s *unevenSystem) inertia(x []float64) []float64 {
	y := copied(x)
	for _, b := range s.blocks {
		if b.mass == nil {
			continue
		}
		for k := range b.size {
			y[b.first+k] = dot(part(b.mass, k, b.size), b.of(x))
		}
	}
	return y
}

// ritzFunction is a function by its unknowns from first on, as far as they are
// not zero.
type ritzFunction struct {
	first  int
	vector []float64
}

// ritz solves in the modes and the residual deflections.
func (s *unevenSystem) ritz(raw []rawMode, list []*attachment, f *flexibility) []rawMode {
	modes, r, u := len(raw), f.count, s.unknowns
	// Functions and their functionals are scaled to a strain energy of one half, in
	// which the eigenvalues are 1/omega^2.
	basis := make([]ritzFunction, modes)
	onModes := zeros(r * modes)
	for k, m := range raw {
		lo, hi := span(m.vector)
		basis[k] = ritzFunction{lo, scaled(m.vector[lo:hi], 1/math.Sqrt(m.value))}
		for i := range r {
			onModes[i*modes+k] = dot(basis[k].vector, part(f.values, i, u)[lo:])
		}
	}
	residual := copied(f.matrix)
	for i := range r {
		for j := range r {
			if !f.load[i] && !f.load[j] {
				continue
			}
			residual[i*r+j] -= dot(part(onModes, i, modes), part(onModes, j, modes))
		}
	}
	pivots, factor := pivotedCholesky(residual, r, f.matrix, f.load)
	extra := len(pivots)
	// The residual deflections in the unknowns, made orthonormal.
	for e, p := range pivots {
		x := copied(part(f.shapes, p, u))
		for k := range basis {
			c := 0.0
			if k < modes {
				c = onModes[p*modes+k]
			} else {
				c = factor[p*extra+k-modes]
			}
			addTo(x[basis[k].first:], -c, basis[k].vector)
		}
		basis = append(basis, ritzFunction{0, scaled(x, 1/factor[p*extra+e])})
	}
	size := modes + extra
	c := zeros(size * size)
	for k, m := range raw {
		c[k*size+k] = 1 / m.value
	}
	tail := f.between(f.inertia, pivots, factor)
	strips := f.between(f.onlyStrips(list), pivots, factor)
	for e := range extra {
		y := s.inertia(basis[modes+e].vector)
		for d := range e + 1 {
			c[(modes+e)*size+modes+d] = dot(y, basis[modes+d].vector) + tail[e*extra+d]
		}
	}
	// Masses and constraints.
	rows := zeros(r * size)
	for i := range r {
		copy(rows[i*size:], part(onModes, i, modes))
		copy(rows[i*size+modes:(i+1)*size], part(factor, i, extra))
	}
	var constraints [][]float64
	at := 0
	for _, a := range list {
		for i, g := range a.list {
			if g.mass > 0 {
				addLower(c, size, part(rows, at+i, size), g.mass)
			}
		}
		if a.rigid() {
			for _, weights := range a.constraints() {
				row := zeros(size)
				for i, w := range weights {
					if w != 0 {
						addTo(row, w, part(rows, at+i, size))
					}
				}
				constraints = append(constraints, row)
			}
		}
		at += len(a.list)
	}
	mirrored(c, size)
	constrain(c, size, constraints)
	wanted := min(modes, size-len(constraints))
	vectors := zeros(wanted * size)
	values := newSymmetric(size).largest(c, wanted, vectors)
	out := make([]rawMode, wanted)
	for k, v := range values {
		y := part(vectors, k, size)
		m := rawMode{value: 1 / v, vector: zeros(u)}
		// y'Cy = v is the modal mass.
		scale := 1 / math.Sqrt(v)
		for i, b := range basis {
			if i < modes {
				m.change += y[i] * y[i] * raw[i].change / raw[i].value
			}
			addTo(m.vector[b.first:], scale*y[i], b.vector)
		}
		// The inertia of what the unknowns do not express is an estimate, so it is
		// counted twice; of the deflection under strips, a quarter of what the
		// unknowns do not express, for square ends and for what bends across them.
		inertia := 2*math.Abs(bilinear(tail, extra, y[modes:]))*m.value + math.Abs(bilinear(strips, extra, y[modes:]))/4
		m.change = m.value * (m.change + inertia + s.unresolved(list, rows, size, y, v))
		out[k] = m
	}
	return byValue(out)
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
				sum += g.mass * square(dot(part(rows, at+i, size), y)) / v
			}
		}
		at += len(a.list)
	}
	return sum
}

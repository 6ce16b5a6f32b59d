package response

import (
	"math"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
)

// mostJoined bounds the modes that a body on the sheet joins.
const mostJoined = 900

// bodies lets the bodies strike one after another: each meets the sheet as what
// came before has left it.
func (s *start) bodies(c *Case, begin []state, acts []acting) []diaphragm.Problem {
	var list []*given
	for _, g := range s.list {
		if g.Kind == SourceBody {
			list = append(list, g)
		}
	}
	if len(list) == 0 {
		return nil
	}
	byTime(list)
	// Momenta of one on the modes as they are now.
	unit := make([][]float64, len(list))
	for i, g := range list {
		unit[i] = slices.Clone(g.q)
	}
	now := s.moves.stages[0]
	scale := c.Sheet.ArealDensity * c.Sheet.Radius * c.Sheet.Radius // kg
	for n, g := range list {
		// The mean displacement of the contact is that of the modes times contact;
		// a momentum of one moves it at 1/mass.
		contact := make([]float64, len(now.modes))
		inverse, speed := 0.0, 0.0
		for i, v := range unit[n] {
			contact[i] = v * now.modes[i].norm * scale / c.unit()
			inverse += v * contact[i] / c.unit()
			speed += contact[i] * now.before(i, g.at, begin) / c.unit()
		}
		bounce := 1 + g.Restitution
		if g.Stays {
			bounce = 1
		}
		momentum := bounce * (g.Speed - speed) / (1/g.Mass + inverse)
		g.note.Momentum, g.note.EffectiveMass = momentum, 1/inverse
		blow := make([]float64, len(unit[n]))
		for i, v := range unit[n] {
			blow[i] = v * momentum
		}
		for i := range g.q {
			g.q[i] *= momentum
		}
		g.scale *= momentum
		g.left *= momentum * momentum
		if !g.Stays {
			acts = append(acts, acting{at: g.at, kick: blow})
			now.act(begin, acts, infinity)
			continue
		}
		joined := join(now.modes, contact, g.Mass/scale)
		if joined == nil {
			return refusal("sources", diaphragm.CodeConflict, -1,
				say("A body that stays joins the modes of the sheet; with # modes these are more than #. Take fewer nodal diameters or circles.", len(now.modes), mostJoined))
		}
		// Before: the stage up to here.
		at := make([]state, len(now.modes))
		if g.at > now.from {
			now.act(begin, acts, g.at)
		}
		for i := range at {
			at[i] = begin[i]
			if g.at > now.from {
				last := len(now.legs) - 1
				at[i].q, at[i].v, _ = now.within(i, last, g.at-now.legs[last].from)
			}
			at[i].v += blow[i]
		}
		next := &stage{from: g.at, basis: now.basis, modes: joined.modes}
		begin = joined.states(at)
		for i := range acts {
			a := &acts[i]
			if a.force != nil {
				a.force = joined.loads(a.force, a.shake)
			}
			if a.kick != nil {
				a.kick = joined.loads(a.kick, 0)
			}
			a.pieces = joined.own(a.pieces)
		}
		for i := n + 1; i < len(list); i++ {
			unit[i] = joined.loads(unit[i], 0)
		}
		if g.at > now.from {
			s.moves.stages = append(s.moves.stages, next)
		} else {
			s.moves.stages[len(s.moves.stages)-1] = next
		}
		now = next
		now.act(begin, acts, infinity)
	}
	return nil
}

// before is the velocity of mode i just before the time t.
func (s *stage) before(i int, t float64, begin []state) float64 {
	if t <= s.from {
		return begin[i].v
	}
	l := s.legAt(t)
	if s.legs[l].from == t {
		l--
	}
	_, v, _ := s.within(i, l, t-s.legs[l].from)
	return v
}

// joint takes the modes of a sheet to those of the sheet with a body on it.
type joint struct {
	modes []modal
	// rows of the new modes over the old ones, in coordinates times the root of
	// their norms; new modes have norm one.
	rows [][]float64
	root []float64 // of the old norms
	// mass of the body over sigma a^2, and what each new mode moves it.
	mass  float64
	moved []float64
	d     []float64 // what each old mode moves it, over the root of its norm
}

// join finds the modes of a sheet whose contact, moved by the modes, carries a
// mass: K q = lambda (M + mass c c') q. It returns nil if there are too many.
func join(list []modal, contact []float64, mass float64) *joint {
	// In coordinates x = sqrt(norm) q and d = c/sqrt(norm) the roots of
	//   1 = lambda mass sum d_i^2/(omega_i^2 - lambda)
	// interlace: one below each omega_i^2 and above the one before (Golub, Some
	// modified matrix eigenvalue problems, SIAM Review 15 (1973)). The vector of a
	// root is d_i/(omega_i^2 - lambda). Each root is kept as its distance to the
	// nearer pole, so that the differences do not cancel.
	n := len(list)
	j := &joint{mass: mass, root: make([]float64, n), d: make([]float64, n)}
	d := j.d
	whole := 0.0
	for i := range list {
		j.root[i] = math.Sqrt(list[i].norm)
		d[i] = contact[i] / j.root[i]
		whole += d[i] * d[i]
	}
	// Directions over the old modes: of those with one frequency a single one
	// moves the body, the others do not.
	type direction struct {
		row     []float64
		d, pole float64
	}
	order := make([]int, n)
	for i := range order {
		order[i] = i
	}
	sorting.By(order, func(p, q int) int {
		switch {
		case list[p].omega < list[q].omega:
			return -1
		case list[p].omega > list[q].omega:
			return 1
		}
		return p - q
	})
	var moving []direction
	still := func(row []float64) {
		j.add(list, row, 0, 0)
	}
	for _, i := range order {
		row := make([]float64, n)
		row[i] = 1
		if d[i]*d[i] <= 1e-28*whole {
			still(row)
			continue
		}
		own := direction{row, d[i], list[i].omega * list[i].omega}
		if k := len(moving) - 1; k >= 0 && own.pole-moving[k].pole <= 1e-12*own.pole {
			first := &moving[k]
			r := math.Hypot(first.d, own.d)
			c, s := first.d/r, own.d/r
			other := make([]float64, n)
			for l := range row {
				a, b := first.row[l], row[l]
				first.row[l], other[l] = c*a+s*b, c*b-s*a
			}
			first.d = r
			still(other)
			continue
		}
		moving = append(moving, own)
	}
	if len(moving) > mostJoined {
		return nil
	}
	secular := func(origin, delta float64) float64 {
		sum := 0.0
		for i := range moving {
			m := &moving[i]
			sum += m.d * m.d / ((m.pole - origin) - delta)
		}
		return mass*(origin+delta)*sum - 1
	}
	for k := range moving {
		low := 0.0
		if k > 0 {
			low = moving[k-1].pole
		}
		high := moving[k].pole
		half := (high - low) / 2
		origin, from, to := low, 0.0, half
		if secular(low, half) < 0 {
			origin, from, to = high, -half, 0.0
		}
		for range 200 {
			middle := (from + to) / 2
			if origin == low && from > 0 && to > 4*from || origin == high && to < 0 && from < 4*to {
				middle = math.Copysign(math.Sqrt(from*to), to)
			} else if middle == from || middle == to {
				break
			}
			if secular(origin, middle) < 0 {
				from = middle
			} else {
				to = middle
			}
		}
		delta := (from + to) / 2
		row := make([]float64, n)
		squares, along := 0.0, 0.0
		for i := range moving {
			m := &moving[i]
			x := m.d / ((m.pole - origin) - delta)
			squares += x * x
			along += x * m.d
			for l, v := range m.row {
				row[l] += x * v
			}
		}
		size := 1 / math.Sqrt(squares+mass*along*along)
		for l := range row {
			row[l] *= size
		}
		j.add(list, row, origin+delta, along*size)
	}
	return j
}

// add adds a new mode; square is its frequency squared, 0 for that of the old
// modes it is made of.
func (j *joint) add(list []modal, row []float64, square, moved float64) {
	// Its damping is that of the old modes, by their share in its motion.
	best := 0
	var damping, strain, film float64
	for i, x := range row {
		k := &list[i]
		if math.Abs(x) > math.Abs(row[best]) {
			best = i
		}
		damping += x * x * 2 * k.zeta * k.omega
		strain += x * x * k.omega * k.omega
		film += x * x * k.omega * k.omega * k.film
	}
	if square == 0 {
		square = strain
	}
	k := modal{m: list[best].m, n: list[best].n, upper: list[best].upper, omega: math.Sqrt(square), norm: 1, film: film / strain}
	k.zeta = damping / (2 * k.omega)
	k.shape, k.peak = mixedShape(list, row, j.root)
	j.modes = append(j.modes, k)
	j.rows = append(j.rows, row)
	j.moved = append(j.moved, moved)
}

// mixedShape adds up the shapes of modes times row over root.
func mixedShape(list []modal, row, root []float64) ([]block, float64) {
	most := 0
	for i := range list {
		for _, b := range list[i].shape {
			most = max(most, b.n, len(b.row))
		}
	}
	var blocks []block
	find := func(b *block) *block {
		for i := range blocks {
			if blocks[i].m == b.m && blocks[i].part == b.part {
				return &blocks[i]
			}
		}
		blocks = append(blocks, block{m: b.m, part: b.part, n: b.n, row: make([]float64, most)})
		return &blocks[len(blocks)-1]
	}
	peak := 0.0
	for i, x := range row {
		if x == 0 {
			continue
		}
		by := x / root[i]
		peak += math.Abs(by) * list[i].peak
		for k := range list[i].shape {
			b := &list[i].shape[k]
			to := find(b)
			to.n = max(to.n, b.n)
			if b.row == nil {
				to.row[b.n-1] += by
				continue
			}
			for n, v := range b.row {
				to.row[n] += by * v
			}
		}
	}
	return blocks, peak
}

// states takes displacements and velocities of the old modes, which the body
// shares, to the new ones.
func (j *joint) states(old []state) []state {
	// The new modes are orthogonal in the mass of sheet and body together.
	var contact state
	for i, d := range j.d {
		contact.q += d * j.root[i] * old[i].q
		contact.v += d * j.root[i] * old[i].v
	}
	out := make([]state, len(j.rows))
	for k, row := range j.rows {
		for i, x := range row {
			out[k].q += x * j.root[i] * old[i].q
			out[k].v += x * j.root[i] * old[i].v
		}
		out[k].q += j.mass * j.moved[k] * contact.q
		out[k].v += j.mass * j.moved[k] * contact.v
	}
	return out
}

// loads takes loads or kicks of the old modes to the new ones; body is the same
// on a body of mass one.
func (j *joint) loads(old []float64, body float64) []float64 {
	out := make([]float64, len(j.rows))
	for k, row := range j.rows {
		for i, x := range row {
			out[k] += x * j.root[i] * old[i]
		}
		out[k] += j.mass * j.moved[k] * body
	}
	return out
}

// own takes the pieces of a load that has its own course for each mode.
func (j *joint) own(pieces []piece) []piece {
	out := slices.Clone(pieces)
	for n := range out {
		old := out[n].own
		if old == nil {
			continue
		}
		out[n].own = make([][]float64, len(j.rows))
		for k, row := range j.rows {
			var sum []float64
			for i, x := range row {
				if x == 0 {
					continue
				}
				for len(sum) < len(old[i]) {
					sum = append(sum, 0)
				}
				for l, v := range old[i] {
					sum[l] += x * j.root[i] * v
				}
			}
			out[n].own[k] = sum
		}
	}
	return out
}

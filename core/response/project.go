package response

import (
	"math"

	"hoopsheet/core/disc"
)

// way is how a source acts on the modes.
type way int

const (
	wayDisplacement way = iota // split by strain; held until its time
	wayVelocity                // split by strain
	wayImpulse                 // by work over modal mass
	wayPressure                // likewise, as a load in time
	wayRelease                 // likewise; held until its time
)

// projector takes Fourier-Bessel coefficients to the modes of a case.
type projector struct {
	basis *disc.Basis
	modes []modal
	// of the even diaphragm as it stands, by orders; nil for the ideal sheet.
	orders []*wetOrder
	// of modes that mix orders.
	mixed *mixedModes
}

// newProjector lists the modes of a case.
func (c *Case) newProjector(b *disc.Basis) *projector {
	p := &projector{basis: b}
	switch {
	case c.Wet == nil:
		p.modes = idealModes(b, c.Zeta)
	case c.Wet.Mixed != nil:
		p.mixed = newMixedModes(b, c.Wet, c.unit())
		p.modes = p.mixed.modes
	default:
		for m := 0; m <= b.M; m++ {
			order := newWetOrder(b, m, c.Wet, c.unit())
			p.orders = append(p.orders, order)
			for i := range order.modes {
				for part := range parts(m) {
					p.modes = append(p.modes, order.modes[i].of(disc.Part(part)))
				}
			}
		}
	}
	return p
}

// split gives the amplitudes of a displacement let go, or of a velocity with
// which the fluid moves along.
func (p *projector) split(coef []float64) []float64 {
	if p.mixed != nil {
		return p.mixed.split(coef)
	}
	return p.byOrders(coef, (*wetOrder).split)
}

// struck gives what a load, or an impulse, of unit mass per area does to the
// coordinates: its work on each mode over the modal mass.
func (p *projector) struck(coef []float64) []float64 {
	if p.mixed != nil {
		return p.mixed.struck(coef)
	}
	return p.byOrders(coef, (*wetOrder).struck)
}

func (p *projector) byOrders(coef []float64, does func(*wetOrder, []float64) []float64) []float64 {
	out := make([]float64, len(p.modes))
	if p.orders == nil {
		// A mode of the ideal sheet is one function of the basis.
		for i := range out {
			k := p.modes[i].shape[0]
			out[i] = coef[p.basis.Index(k.m, k.n, k.part)]
		}
		return out
	}
	at := 0
	for m, order := range p.orders {
		n := parts(m)
		for part := range n {
			for i, v := range does(order, order.take(coef, disc.Part(part))) {
				out[at+n*i+part] = v
			}
		}
		at += n * len(order.list)
	}
	return out
}

// held writes the coefficients of the modes times q.
func (p *projector) held(q []float64) []float64 {
	s := stage{basis: p.basis, modes: p.modes}
	coef := make([]float64, p.basis.Len())
	s.fill(coef, q)
	return coef
}

// strain of the modes times q, with k = 0, and the same of speeds with k = 1,
// in units of T/2.
func (p *projector) energy(q []float64, k int) float64 {
	sum := 0.0
	for i, v := range q {
		mode := &p.modes[i]
		e := mode.norm * v * v
		if k == 0 {
			e *= mode.omega * mode.omega
		}
		sum += e
	}
	return sum
}

// left is the energy, in units of T/2, of a source that the modes leave out: of
// form times scale, with coefficients coef and amplitudes q.
func (p *projector) left(c *Case, by way, form form, scale float64, coef, q []float64) float64 {
	n := form.norms()
	square := scale * scale
	switch by {
	case wayDisplacement:
		whole := times(square, n.slope)
		switch {
		case math.IsInf(whole, 1):
			return whole
		case c.Wet != nil && c.Wet.Cavity:
			volume := 0.0
			for n := 1; n <= p.basis.N; n++ {
				volume += coef[p.basis.Index(0, n, disc.Cos)] * volumeOf(p.basis, n)
			}
			return math.Max(0, whole+c.Wet.CavitySpring*volume*volume-p.energy(q, 0))
		}
		// Without a cavity the part left out is orthogonal in G to the part held.
		return leftOut(p.basis, whole, coef, p.held(q), 1)
	case wayVelocity:
		// The part of a velocity left out waves faster than the modes held, so the
		// fluid adds no more to its mass than to that of the modes at the edge of
		// the band.
		left := leftOut(p.basis, times(square, n.square), coef, p.held(q), 0)
		if c.Wet != nil {
			left *= c.Wet.edgeMass(p.basis, c.unit())
		}
		return left
	case wayImpulse:
		whole := times(square, n.square)
		if c.Wet == nil {
			return math.Max(0, whole-p.energy(q, 1))
		}
		return p.impulseLeft(whole, coef, q)
	}
	// The work of a load that comes slowly, p^2/omega^2 of every mode, falls off
	// at least like that of an impulse.
	still := make([]float64, len(q))
	for i, v := range q {
		still[i] = v / p.modes[i].omega
	}
	return p.tail(still)
}

// tail estimates the energy beyond the modes from those held: that of modes
// (N/4, N/2] and (N/2, N], and the like of orders, and the blocks beyond, each
// twice as long, form a geometric series under a power law.
func (p *projector) tail(speed []float64) float64 {
	blocks := func(number func(k *modal) int) float64 {
		last := 0
		for i := range p.modes {
			last = max(last, number(&p.modes[i]))
		}
		var block [2]float64
		for i, v := range speed {
			k := &p.modes[i]
			if n := number(k); 2*n > last {
				block[0] += k.norm * v * v
			} else if 4*n > last {
				block[1] += k.norm * v * v
			}
		}
		if last < 4 || block[1] == 0 {
			return block[0]
		}
		ratio := math.Min(block[0]/block[1], 0.9)
		return block[0] * ratio / (1 - ratio)
	}
	return blocks(func(k *modal) int { return k.n }) + blocks(func(k *modal) int { return k.m })
}

// impulseLeft estimates the energy of an impulse that the modes leave out, in
// units of T/2; whole is that which the sheet alone would take.
func (p *projector) impulseLeft(whole float64, impulse, speed []float64) float64 {
	// An impulse sets less than the sheet alone moving, which bounds what lies
	// beyond the basis and what an order can hold. Within an order the energies
	// are taken to go on falling as they did: those of modes (N/4, N/2] and
	// (N/2, N] and the blocks beyond, each twice as long, form a geometric series
	// under a power law. It is at least n^-2: the velocity of a light sheet in a
	// heavy fluid does not vanish at the rim but for a narrow zone.
	b := p.basis
	left := math.Max(0, whole-b.Energy(impulse))
	for m := 0; m <= b.M; m++ {
		var whole, held float64
		for n := 1; n <= b.N; n++ {
			i := b.Index(m, n, disc.Cos)
			whole += b.Norm(m, n) * (impulse[i]*impulse[i] + impulse[i+1]*impulse[i+1])
		}
		var blocks [2]float64
		last := 0
		for i := range p.modes {
			if k := &p.modes[i]; k.m == m && speed[i] != 0 {
				last = max(last, k.n)
			}
		}
		for i := range p.modes {
			k := &p.modes[i]
			if k.m != m {
				continue
			}
			energy := k.norm * speed[i] * speed[i]
			held += energy
			if 2*k.n > last {
				blocks[0] += energy
			} else if 4*k.n > last {
				blocks[1] += energy
			}
		}
		most := math.Max(0, whole-held)
		if last >= 4 && blocks[1] > 0 {
			ratio := math.Min(math.Max(blocks[0]/blocks[1], 0.5), 0.9)
			most = math.Min(most, blocks[0]*ratio/(1-ratio))
		}
		left += most
	}
	return left
}

package response

import (
	"math"

	"hoopsheet/core/diaphragm"
)

// Bounds of the modes that Choose takes.
const (
	leastCircles = 8
	spareCircles = 2 // a fluid mixes neighbours
)

// Choose sets the orders and circles of a case so that, for the ideal sheet, the
// modes leave out no more than the given share of the energy of its sources,
// within the largest numbers given. A source with a sharp edge may want more than
// these; what is left out is stated with the answer.
//
// Problems are those of the sources.
func (c *Case) Choose(tolerance float64, mostOrders, mostCircles int) []diaphragm.Problem {
	b := basisOf(mostOrders, mostCircles)
	wide := *c
	wide.Orders, wide.Circles, wide.Wet = mostOrders, mostCircles, nil
	p := wide.newProjector(b)
	// Shares by orders and by circles, summed over the sources.
	byOrder, byCircle := make([]float64, b.M+1), make([]float64, b.N+1)
	for _, g := range c.sources() {
		if g.Kind == SourceFront {
			// On its way a front loads a part of the disc.
			g.Kind, g.Shape = SourcePressure, Shape{Kind: ShapeHalf, Peak: g.Shape.Peak, Angle: g.FrontDirection}
		}
		if problems := wide.project(p, g); len(problems) > 0 {
			return problems
		}
		length := infinity
		if g.way == wayPressure {
			length = g.pulse().length() / c.unit()
		}
		energy, whole := make([]float64, len(g.q)), 0.0
		for k, v := range g.q {
			mode := &p.modes[k]
			switch g.way {
			case wayDisplacement:
				v *= mode.omega
			case wayPressure, wayRelease:
				// A load moves a mode like its impulse, or like a static one.
				v *= math.Min(length, 1/mode.omega)
			}
			energy[k] = mode.norm * v * v
			whole += energy[k]
		}
		if g.way < wayPressure && !math.IsInf(g.left, 1) {
			whole += g.left
		}
		for k, e := range energy {
			if whole > 0 {
				byOrder[p.modes[k].m] += e / whole
				byCircle[p.modes[k].n] += e / whole
			}
		}
	}
	c.Orders = lastAbove(byOrder, tolerance/2)
	c.Circles = min(mostCircles, max(leastCircles, lastAbove(byCircle, tolerance/2)+spareCircles))
	return nil
}

// lastAbove returns the least place after which the shares sum to no more than
// the tolerance.
func lastAbove(shares []float64, tolerance float64) int {
	sum := 0.0
	for i := len(shares) - 1; i > 0; i-- {
		if sum += shares[i]; sum > tolerance {
			return i
		}
	}
	return 0
}

// length of a pulse, s; infinite if it stays.
func (p *Pulse) length() float64 {
	switch p.Kind {
	case PulseStep, PulseRamp:
		return infinity
	case PulseTable:
		if rows, _ := p.rows(""); len(rows) > 1 {
			return rows[len(rows)-1][0] - rows[0][0]
		}
	}
	return p.Duration
}

// missedTravel estimates how far the modes left out could move the sheet
// anywhere: the sizes of modes go on falling as they did; -1 where their sum has
// no end.
func (mo *motion) missedTravel() float64 {
	list := mo.stages[0].modes
	total := 0.0
	for i := range list {
		total += list[i].size
	}
	sum := 0.0
	for _, number := range []func(k *modal) int{func(k *modal) int { return k.n }, func(k *modal) int { return k.m }} {
		last := 0
		for i := range list {
			last = max(last, number(&list[i]))
		}
		var block [2]float64
		for i := range list {
			if n := number(&list[i]); 2*n > last {
				block[0] += list[i].size
			} else if 4*n > last {
				block[1] += list[i].size
			}
		}
		if last == 0 || block[0] < 1e-9*total {
			continue
		}
		ratio := 0.5
		if last >= 4 && block[1] > 0 {
			if ratio = block[0] / block[1]; ratio > 0.95 {
				return -1
			}
		}
		sum += block[0] * ratio / (1 - ratio)
	}
	return sum
}

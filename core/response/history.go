package response

import (
	"context"
	"math"
)

const (
	// samplesPerPeriod of the fastest mode in a history.
	samplesPerPeriod = 8
	leastSamples     = 512
	mostSamples      = 8192
)

// histories are the displacements of some points at the same instants.
type histories struct {
	times  []float32   // s
	values [][]float32 // m, one list per point
	capped bool        // there are fewer than samplesPerPeriod
}

// follow computes the histories of the points of a case. unit is a/c in s.
func follow(ctx context.Context, c *Case, moves *motion, unit float64) (*histories, error) {
	h := &histories{values: make([][]float32, len(c.Points))}
	if len(c.Points) == 0 {
		return h, nil
	}
	end := c.Duration / unit
	wanted := samplesPerPeriod*moves.fastest()*end/(2*math.Pi) + 1
	h.capped = wanted > mostSamples
	count := int(math.Ceil(math.Min(math.Max(wanted, leastSamples), mostSamples)))
	h.times = make([]float32, count)
	for i := range h.times {
		h.times[i] = float32(c.Duration * float64(i) / float64(count-1))
	}
	sums := make([][]float64, len(c.Points))
	for i := range sums {
		sums[i] = make([]float64, count)
	}
	// The two solutions of a mode are stepped once and shared by the points.
	solutions := [2][]float64{make([]float64, count), make([]float64, count)}
	step := end / float64(count-1)
	radials := make([][]float64, len(c.Points))
	for i, p := range c.Points {
		radials[i] = moves.radials(p.Radius)
	}
	shapes := make([]float64, len(c.Points))
	for i := range moves.modes {
		if i%32 == 0 {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
		}
		for k := range shapes {
			shapes[k] = radials[k][i]
		}
		moves.modes[i].addHistory(sums, c.Points, shapes, solutions, step)
	}
	for i, sum := range sums {
		h.values[i] = make([]float32, count)
		for k, w := range sum {
			h.values[i][k] = float32(w)
		}
	}
	return h, nil
}

// addHistory adds the mode's displacement of every point, at which the radial
// functions are given, at even steps of time; solutions is work space.
func (k *modal) addHistory(sums [][]float64, points []Point, radial []float64, solutions [2][]float64, step float64) {
	advance := newStepper(k.omega, k.zeta, step)
	cs, ss := solutions[0], solutions[1]
	c, s := 1.0, 0.0
	for n := range cs {
		cs[n], ss[n] = c, s
		c, s = advance.next(c, s)
	}
	for i, p := range points {
		j := radial[i]
		sin, cos := math.Sincos(float64(k.m) * p.Angle)
		alpha := j * (k.a*cos + k.b*sin)
		beta := j * (k.va*cos + k.vb*sin) / k.omega
		sum := sums[i]
		for n, c := range cs {
			sum[n] += alpha*c + beta*ss[n]
		}
	}
}

// stepper takes the two fundamental solutions of a mode from one instant to
// the next, without evaluating them anew. It is exact but for rounding, which
// grows by about one unit in the last place a step.
type stepper struct {
	cc, cs, sc, ss float64
}

func newStepper(omega, zeta, step float64) stepper {
	// From c' = -omega s and s' = omega (c - 2 zeta s).
	c, s := fundamental(omega, zeta, step)
	return stepper{cc: c, cs: -s, sc: s, ss: c - 2*zeta*s}
}

func (a stepper) next(c, s float64) (nextC, nextS float64) {
	return a.cc*c + a.cs*s, a.sc*c + a.ss*s
}

package response

import (
	"context"
	"math"
)

const (
	// samplesPerPeriod of the fastest mode in a history, apart from the fastest
	// ones that together have no more than finerShare of all sizes: they are in
	// the values, at fewer instants of their period.
	samplesPerPeriod = 8
	finerShare       = 0.01
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
	fastest := math.Min(moves.slowerThan(finerShare), moves.fastest())
	wanted := samplesPerPeriod*fastest*end/(2*math.Pi) + 1
	h.capped = wanted > mostSamples
	count := int(math.Ceil(math.Min(math.Max(wanted, leastSamples), mostSamples)))
	h.times = make([]float32, count)
	for i := range h.times {
		h.times[i] = float32(c.Duration * float64(i) / float64(count-1))
	}
	step := end / float64(count-1)
	sum := make([]float64, count)
	for i, p := range c.Points {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		clear(sum)
		moves.addHistory(sum, p, step)
		h.values[i] = make([]float32, count)
		for k, w := range sum {
			h.values[i][k] = float32(w)
		}
	}
	return h, nil
}

// addHistory adds the displacement of a point at even steps of time.
func (mo *motion) addHistory(sum []float64, at Point, step float64) {
	// By Cayley and Hamilton's theorem the values of one mode at even steps, that
	// of any solution, follow y'' = trace y' - determinant y of its stepper. In n
	// steps rounding grows at most like n^2 units in the last place, which for
	// mostSamples is below that of float32. Four modes go together, so that none
	// waits for its last step.
	radials := mo.radials(at.Radius)
	for first := 0; first < len(radials); first += 4 {
		var now, next, trace, det [4]float64
		for i := range now {
			if first+i == len(radials) {
				break
			}
			k := &mo.modes[first+i]
			sin, cos := math.Sincos(float64(k.m) * at.Angle)
			alpha := radials[first+i] * (k.a*cos + k.b*sin)
			beta := radials[first+i] * (k.va*cos + k.vb*sin) / k.omega
			a := newStepper(k.omega, k.zeta, step)
			c, s := a.next(1, 0)
			now[i], next[i] = alpha, alpha*c+beta*s
			trace[i], det[i] = a.cc+a.ss, a.cc*a.ss-a.cs*a.sc
		}
		y0, y1, y2, y3 := now[0], now[1], now[2], now[3]
		z0, z1, z2, z3 := next[0], next[1], next[2], next[3]
		t0, t1, t2, t3 := trace[0], trace[1], trace[2], trace[3]
		d0, d1, d2, d3 := det[0], det[1], det[2], det[3]
		for n := range sum {
			sum[n] += (y0 + y1) + (y2 + y3)
			y0, z0 = z0, t0*z0-d0*y0
			y1, z1 = z1, t1*z1-d1*y1
			y2, z2 = z2, t2*z2-d2*y2
			y3, z3 = z3, t3*z3-d3*y3
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

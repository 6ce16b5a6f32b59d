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

// histories are the displacements of some points at the same instants, their
// velocities and accelerations.
type histories struct {
	times  []float32      // s
	values [3][][]float32 // m/s^k, one list per point
	capped bool           // there are fewer than samplesPerPeriod
}

// follow computes the histories of the points of a case. unit is a/c in s.
func follow(ctx context.Context, c *Case, moves *motion, unit float64) (*histories, error) {
	h := &histories{}
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
	scale := 1.0
	for d := range h.values {
		h.values[d] = make([][]float32, len(c.Points))
		for i := range h.values[d] {
			sum := make([]float64, count)
			for n, stage := range moves.stages {
				until := infinity
				if n+1 < len(moves.stages) {
					until = moves.stages[n+1].from
				}
				if ctx.Err() != nil {
					return nil, ctx.Err()
				}
				stage.follow(sum, stage.radials(c.Points[i]), d, step, until)
			}
			h.values[d][i] = make([]float32, count)
			for k, w := range sum {
				h.values[d][i][k] = float32(w * scale)
			}
		}
		scale /= unit
	}
	return h, nil
}

// follow writes the displacement of a point at which the modes have the values
// given, or its derivative of order d, at even steps of time, those within the
// stage.
func (s *stage) follow(sum, values []float64, d int, step, until float64) {
	at := 0
	for float64(at)*step < s.from {
		at++
	}
	for l := range s.legs {
		end := until
		if l+1 < len(s.legs) {
			end = s.legs[l+1].from
		}
		first := at
		for at < len(sum) && float64(at)*step < end {
			at++
		}
		t := float64(first)*step - s.legs[l].from
		if at-first > 3 && s.legs[l].quiet() {
			s.swing(sum[first:at], values, d, l, t, step)
			continue
		}
		for k := range sum[first:at] {
			for i, v := range values {
				sum[first+k] += v * s.derivative(i, l, d, t+float64(k)*step)
			}
		}
	}
}

// derivative of order d of the coordinate of mode i at the time t of leg l.
func (s *stage) derivative(i, l, d int, t float64) float64 {
	var q [3]float64
	q[0], q[1], q[2] = s.within(i, l, t)
	return q[d]
}

// swing does the work of follow in a quiet leg, from the time t of it on.
func (s *stage) swing(sum, values []float64, d, l int, t, step float64) {
	// By Cayley and Hamilton's theorem the values of one mode at even steps, that
	// of any solution and its derivatives, follow y'' = trace y' - determinant y of
	// its stepper. In n steps rounding grows at most like n^2 units in the last
	// place, which for mostSamples is below that of float32. Four go together, so
	// that none waits for its last step; modes that swing alike are one.
	var rest float64
	var now, next, trace, det [4]float64
	for i, lane := 0, 0; i < len(s.modes) || lane > 0; {
		if lane < 4 && i < len(s.modes) {
			k := &s.modes[i]
			a := newStepper(k.omega, k.zeta, step)
			var y, z float64
			for ; i < len(s.modes) && s.modes[i].same(k); i++ {
				v, around := values[i], 0.0
				if d == 0 {
					around = s.legs[l].around(&s.modes[i])
				}
				rest += v * around
				y += v * (s.derivative(i, l, d, t) - around)
				z += v * (s.derivative(i, l, d, t+step) - around)
			}
			now[lane], next[lane], trace[lane], det[lane] = y, z, a.cc+a.ss, a.cc*a.ss-a.cs*a.sc
			lane++
			continue
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
		lane = 0
		now, next = [4]float64{}, [4]float64{}
	}
	for n := range sum {
		sum[n] += rest
	}
}

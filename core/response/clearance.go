package response

import (
	"context"
	"math"

	"hoopsheet/core/internal/sorting"
)

// Neighbour is a flat surface beside the sheet.
type Neighbour struct {
	// Below tells that it lies below the sheet at rest, not above.
	Below bool `json:"below,omitempty"`
	// Gap at the centre, m, of the sheet at rest.
	Gap float64 `json:"gap"`
	// Tilt, rad, by which it falls away from the sheet towards Direction, rad.
	Tilt      float64 `json:"tilt,omitempty"`
	Direction float64 `json:"direction,omitempty"`
}

// Approach is how near the sheet comes to a neighbour within the duration.
type Approach struct {
	// Least gap, m, below zero where the sheet would pass through, with its place
	// and time, s.
	Least float64 `json:"least"`
	At    Point   `json:"at"`
	Time  float64 `json:"time"`
	// Touches tells whether there is contact; First is when, s, and FirstAt where.
	Touches bool    `json:"touches"`
	First   float64 `json:"first,omitempty"`
	FirstAt Point   `json:"firstAt"`
}

// check lists what is wrong with a neighbour; radius is that of the ring, m.
func (n *Neighbour) check(r *refusals, radius float64) {
	r.within("neighbour.gap", "The gap to the neighbour", " m", n.Gap, 1e-9, 100)
	r.within("neighbour.tilt", "The tilt of the neighbour", " rad", n.Tilt, -1.5, 1.5)
	r.within("neighbour.direction", "The direction of the tilt", " rad", n.Direction, -mostAngle, mostAngle)
	if math.Abs(n.Tilt) <= 1.5 && radius*math.Tan(math.Abs(n.Tilt)) >= n.Gap {
		r.bounds("neighbour.tilt", "The neighbour touches the rim: the tilt times the radius must stay below the gap.")
	}
}

// plane is a function sign w - (slope of the gap) to be made largest.
type plane struct{ sign, x, y float64 }

// lift is what is left of the gap at the centre, taken off.
func (p *plane) lift(w, x, y float64) float64 { return p.sign*w - p.x*x - p.y*y }

// clearance seeks where a motion comes nearest to a neighbour between 0 and end.
func (mo *motion) clearance(ctx context.Context, c *Case, end float64) (*Approach, error) {
	n := c.Neighbour
	unit, slope := c.unit(), c.Sheet.Radius*math.Tan(n.Tilt)
	p := plane{sign: 1, x: slope * math.Cos(n.Direction), y: slope * math.Sin(n.Direction)}
	if n.Below {
		p.sign = -1
	}
	s := newSearch(mo, end)
	defer keepTable(s.table)
	walk := newWalk(s.moves, s.step)
	values := make([]float64, s.table.Len())
	tops := make([]candidate, s.count)
	for i := range tops {
		if i%16 == 0 && ctx.Err() != nil {
			return nil, ctx.Err()
		}
		s.table.Synthesise(values, walk.coef)
		best := candidate{value: math.Inf(-1), t: float64(i) * s.step}
		for k, w := range values {
			r, theta := s.table.R[k/s.table.NTheta], 2*math.Pi*float64(k%s.table.NTheta)/float64(s.table.NTheta)
			if v := p.lift(w, r*math.Cos(theta), r*math.Sin(theta)); v > best.value {
				best.value, best.r, best.theta = v, r, theta
			}
		}
		tops[i] = best
		walk.next()
	}
	// Peaks in time: the highest few are refined for the least gap, and in order of
	// time all that could reach the neighbour for the first contact.
	var peaks []candidate
	for i, q := range tops {
		if (i == 0 || tops[i-1].value <= q.value) && (i == len(tops)-1 || tops[i+1].value <= q.value) {
			peaks = append(peaks, q)
		}
	}
	out := &Approach{}
	for _, q := range peaks {
		if q.value < hopeless*n.Gap {
			continue
		}
		if top := mo.climbOn(p, q, 0, end); top.value >= n.Gap {
			first := mo.contact(p, n.Gap, top, s.step)
			out.Touches, out.First, out.FirstAt = true, first.t*unit, placeOf(first)
			break
		}
	}
	sorting.By(peaks, byValue)
	best := candidate{value: math.Inf(-1)}
	for _, q := range peaks[:min(refined, len(peaks))] {
		if top := mo.climbOn(p, q, 0, end); top.value > best.value {
			best = top
		}
	}
	out.Least, out.At, out.Time = n.Gap-best.value, placeOf(best), best.t*unit
	return out, nil
}

// contact finds when the lift reaches the gap, before a top that is above it.
func (mo *motion) contact(p plane, gap float64, top candidate, step float64) candidate {
	// Back in steps of the search until the lift there is below the gap, then by
	// halves; at each instant the place is the top beside the one before.
	at := func(from candidate, t float64) candidate {
		from.t = t
		return mo.climbOn(p, from, t, t)
	}
	high, low := top, top
	for low.value >= gap && low.t > 0 {
		high = low
		low = at(low, math.Max(0, low.t-step))
	}
	if low.value >= gap {
		return low
	}
	for range 50 {
		middle := at(high, (low.t+high.t)/2)
		if middle.value >= gap {
			high = middle
		} else {
			low = middle
		}
	}
	return high
}

// placeOf is the place of a candidate.
func placeOf(c candidate) Point {
	if c.r < 1e-7 {
		return Point{}
	}
	angle := c.theta
	if angle < 0 {
		angle += 2 * math.Pi
	}
	return Point{Radius: math.Min(c.r, 1), Angle: angle}
}

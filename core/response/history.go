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
	for i := range h.values {
		h.values[i] = make([]float32, count)
	}
	walk := newWalk(moves, end/float64(count-1))
	walk.bare = true
	var seen *stage
	radials := make([][]float64, len(c.Points))
	for k := range count {
		if k%64 == 0 {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
		}
		if walk.stage != seen {
			seen = walk.stage
			for i, p := range c.Points {
				radials[i] = seen.radials(p)
			}
		}
		for i := range h.values {
			h.values[i][k] = float32(dotted(walk.q, radials[i]))
		}
		walk.next()
	}
	return h, nil
}

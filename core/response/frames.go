package response

import (
	"context"
	"math"
)

// pictures are the frames on the display grid.
type pictures struct {
	times    []float32 // s
	motion   []float32 // m, frame by frame, radius by radius
	envelope []float32 // m
	// steepest is the largest slope between neighbours of the grid.
	steepest float64
	// best is where the largest of all values stands.
	best candidate
}

// candidate is a place and time at which the displacement may be largest;
// value is its size on the grid where it was found.
type candidate struct {
	value, r, theta, t float64
}

// drawFrames computes the frames of a case. unit is a/c in s.
func drawFrames(ctx context.Context, c *Case, moves *motion, unit float64, report func(share float64)) (*pictures, error) {
	radii := c.radii()
	table := takeTable(moves.basis, radii, c.Angles)
	defer keepTable(table)
	size := table.Len()
	p := &pictures{
		times:    make([]float32, c.Frames),
		motion:   make([]float32, c.Frames*size),
		envelope: make([]float32, size),
	}
	values := make([]float64, size)
	walk := newWalk(moves, c.Duration/unit/float64(c.Frames-1))
	var steepest float64
	for f := range c.Frames {
		if f%8 == 0 {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
			report(float64(f) / float64(c.Frames))
		}
		share := float64(f) / float64(c.Frames-1)
		t := share * c.Duration / unit
		p.times[f] = float32(share * c.Duration)
		table.Synthesise(values, walk.coef)
		if i, value := p.take(f, values); value > p.best.value {
			p.best = candidate{value: value, r: radii[i/c.Angles], theta: 2 * math.Pi * float64(i%c.Angles) / float64(c.Angles), t: t}
		}
		steepest = max(steepest, steepestOf(values, radii, c.Angles))
		walk.next()
	}
	p.steepest = steepest / c.Sheet.Radius
	report(1)
	return p, nil
}

// radii of the display grid.
func (c *Case) radii() []float64 {
	radii := make([]float64, c.Radii)
	for i := range radii {
		radii[i] = float64(i) / float64(c.Radii-1)
	}
	return radii
}

// take keeps frame number f and returns the place and size of its largest value.
func (p *pictures) take(f int, values []float64) (index int, largest float64) {
	dst := p.motion[f*len(values):][:len(values)]
	envelope := p.envelope[:len(values)]
	for i, w := range values {
		dst[i] = float32(w)
		size := math.Abs(w)
		if size > largest {
			index, largest = i, size
		}
		if size := float32(size); size > envelope[i] {
			envelope[i] = size
		}
	}
	return index, largest
}

// largestOf returns the place and size of the largest value.
func largestOf(values []float64) (index int, largest float64) {
	for i, w := range values {
		if size := math.Abs(w); size > largest {
			index, largest = i, size
		}
	}
	return index, largest
}

// steepestOf returns the largest slope between neighbours of a grid, per unit
// of the ring radius.
func steepestOf(values, radii []float64, angles int) float64 {
	var most float64
	for i := 1; i < len(radii); i++ {
		row := values[i*angles:][:angles]
		inner := values[(i-1)*angles:][:len(row)]
		out := 1 / (radii[i] - radii[i-1])
		around := float64(angles) / (2 * math.Pi * radii[i])
		before := row[len(row)-1]
		for k, w := range row {
			dr, dt := (w-inner[k])*out, (w-before)*around
			if square := dr*dr + dt*dt; square > most {
				most = square
			}
			before = w
		}
	}
	return math.Sqrt(most)
}

package response

import (
	"context"
	"math"

	"hoopsheet/core/disc"
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
	radii := make([]float64, c.Radii)
	for i := range radii {
		radii[i] = float64(i) / float64(c.Radii-1)
	}
	table := takeTable(moves.basis, radii, c.Angles)
	defer keepTable(table)
	size := table.Len()
	p := &pictures{
		times:    make([]float32, c.Frames),
		motion:   make([]float32, c.Frames*size),
		envelope: make([]float32, size),
	}
	frame := newFrame(moves, table)
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
		frame.at(t)
		dst := p.motion[f*size:][:size]
		for i, w := range frame.values {
			dst[i] = float32(w)
			if w = math.Abs(w); w > float64(p.envelope[i]) {
				p.envelope[i] = float32(w)
			}
		}
		if i, value := frame.largest(); value > p.best.value {
			p.best = candidate{value: value, r: radii[i/c.Angles], theta: 2 * math.Pi * float64(i%c.Angles) / float64(c.Angles), t: t}
		}
		steepest = math.Max(steepest, frame.steepest())
	}
	p.steepest = steepest / c.Sheet.Radius
	report(1)
	return p, nil
}

// frame computes the displacement on a grid, one instant after another.
type frame struct {
	moves  *motion
	table  *disc.Table
	coef   []float64
	values []float64
}

func newFrame(moves *motion, table *disc.Table) *frame {
	return &frame{
		moves:  moves,
		table:  table,
		coef:   make([]float64, moves.basis.Len()),
		values: make([]float64, table.Len()),
	}
}

// at computes the frame at the time t. It does not allocate.
func (f *frame) at(t float64) {
	f.moves.amplitudes(f.coef, t)
	f.table.Synthesise(f.values, f.coef)
}

// largest returns the place and size of the largest value.
func (f *frame) largest() (index int, value float64) {
	return largestOf(f.values)
}

func largestOf(values []float64) (index int, value float64) {
	for i, w := range values {
		if w = math.Abs(w); w > value {
			index, value = i, w
		}
	}
	return index, value
}

// steepest returns the largest slope between neighbours of the grid, per unit
// of the ring radius.
func (f *frame) steepest() float64 {
	angles := f.table.NTheta
	radii := f.table.R
	var most float64
	for i := 1; i < len(radii); i++ {
		inner := f.values[(i-1)*angles:][:angles]
		row := f.values[i*angles:][:angles]
		out := 1 / (radii[i] - radii[i-1])
		around := float64(angles) / (2 * math.Pi * radii[i])
		before := row[angles-1]
		for k, w := range row {
			dr, dt := (w-inner[k])*out, (w-before)*around
			most = math.Max(most, dr*dr+dt*dt)
			before = w
		}
	}
	return math.Sqrt(most)
}

package response

import (
	"context"
	"math"

	"hoopsheet/core/diaphragm"
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
	kept := c.Frames
	if c.Stream {
		kept = 3 // this one and the two before
	}
	p := &pictures{
		times:    make([]float32, c.Frames),
		motion:   make([]float32, kept*size),
		envelope: make([]float32, size),
	}
	frame := func(f int) []float32 { return p.motion[f%kept*size:][:size] }
	values := make([]float64, size)
	step := c.Duration / unit / float64(c.Frames-1)
	walk := newWalk(moves, step)
	breaks := append(moves.breaks(), infinity)
	var steepest float64
	smooth := 0 // frames since a break
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
		if i, value := p.take(frame(f), values); value > p.best.value {
			p.best = candidate{value: value, r: radii[i/c.Angles], theta: 2 * math.Pi * float64(i%c.Angles) / float64(c.Angles), t: t}
		}
		for smooth++; breaks[0] <= t; smooth = 1 {
			breaks = breaks[1:]
		}
		if smooth > 2 {
			crest(p.envelope, frame(f-2), frame(f-1), frame(f))
		}
		steepest = max(steepest, steepestOf(values, radii, c.Angles))
		walk.next()
	}
	p.steepest = steepest / c.Sheet.Radius
	if c.Stream {
		p.motion = nil
	}
	report(1)
	return p, nil
}

// crest raises the envelope to the extremes between three frames.
func crest(envelope, before, now, after []float32) {
	// The parabola through the three misses w by no more than step^3/16 times the third derivative
	// within half a step of the middle one, and that is where its extreme lies if
	// the middle value is the largest.
	before, now, after = before[:len(envelope)], now[:len(envelope)], after[:len(envelope)]
	for i, b := range now {
		a, c := before[i], after[i]
		if b < 0 {
			a, b, c = -a, -b, -c
		}
		if a > b || c > b || -a > b || -c > b || a+c >= 2*b {
			continue
		}
		d := c - a
		if top := b + d*d/(8*(2*b-a-c)); top > envelope[i] {
			envelope[i] = top
		}
	}
}

// Frames writes frames to dst, at the time from, s, and at even steps after it:
// as many as it holds, each the values in m on the display grid, radius by
// radius.
func (m *Motion) Frames(dst []float32, from, step float64) {
	table := takeTable(m.moves.basis, m.radii, m.angles)
	defer keepTable(table)
	values := make([]float64, table.Len())
	walk := walkFrom(m.moves, from/m.unit, step/m.unit)
	for ; len(dst) >= len(values); dst = dst[len(values):] {
		table.Synthesise(values, walk.coef)
		for i, w := range values {
			dst[i] = float32(w)
		}
		walk.next()
	}
}

// Grid returns the numbers of radii and angles of a frame.
func (m *Motion) Grid() (radii, angles int) { return len(m.radii), m.angles }

// Prepare is the first step of Respond: a Motion that holds nothing but what
// Frames needs.
func Prepare(c *Case) (*Motion, []diaphragm.Problem) {
	if problems := c.Check(); len(problems) > 0 {
		return nil, problems
	}
	begin, problems := c.start()
	if len(problems) > 0 {
		return nil, problems
	}
	return c.motionOf(begin.moves), nil
}

func (c *Case) motionOf(moves *motion) *Motion {
	for _, s := range moves.stages {
		s.pair() // here, so that Frames changes nothing
	}
	return &Motion{moves: moves, radii: c.radii(), angles: c.Angles, unit: c.unit()}
}

// radii of the display grid.
func (c *Case) radii() []float64 {
	radii := make([]float64, c.Radii)
	for i := range radii {
		radii[i] = float64(i) / float64(c.Radii-1)
	}
	return radii
}

// take keeps a frame in dst and returns the place and size of its largest value.
func (p *pictures) take(dst []float32, values []float64) (index int, largest float64) {
	dst = dst[:len(values)]
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

package response

import (
	"math"
	"testing"
)

// Frames on demand are those of Respond, from whatever time they begin.
func TestFramesOnDemand(t *testing.T) {
	c := benchCase()
	c.Sources = []Source{{Kind: SourceBlow, At: 0.11, Momentum: 0.01, Shape: Shape{Kind: ShapePatch, Radius: 0.2, Width: 0.2}}}
	all := respond(t, c)
	c.Stream = true
	m := respond(t, c)
	if len(m.Values) != 0 || m.Travel != all.Travel {
		t.Errorf("%d values kept, travel %v and %v", len(m.Values), m.Travel, all.Travel)
	}
	for i, e := range m.Envelope {
		if e != all.Envelope[i] {
			t.Fatalf("envelope %g and %g", e, all.Envelope[i])
		}
	}
	fresh, problems := Prepare(c)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	var largest float64
	for _, v := range all.Values {
		largest = math.Max(largest, math.Abs(float64(v)))
	}
	radii, angles := m.Grid()
	size := radii * angles
	for _, first := range []int{0, 1, 43, 44, 60, 115} {
		dst := make([]float32, 5*size+3)
		step := c.Duration / float64(c.Frames-1)
		for _, of := range []*Motion{m, fresh} {
			of.Frames(dst, step*float64(first), step)
			for i, v := range dst[:5*size] {
				// Half a unit of float32 each; a float64 step adds one of its own
				// units a frame, far less.
				if d := math.Abs(float64(v - all.Values[first*size+i])); d > 0x1p-23*largest {
					t.Fatalf("frames from %d: off by %g of %g", first, d, largest)
				}
			}
		}
	}
	if fresh, problems := Prepare(&Case{}); fresh != nil || len(problems) == 0 {
		t.Error("prepares a case with errors")
	}
}

// TestEnvelopeBetweenFrames: the envelope on the grid, refined in time, does not
// depend on the frames.
func TestEnvelopeBetweenFrames(t *testing.T) {
	c := benchCase()
	c.Orders, c.Circles, c.Frames, c.Radii, c.Angles = 2, 2, 401, 9, 16
	coarse := respond(t, c)
	const finer = 4
	c.Frames = (c.Frames-1)*finer + 1
	fine := respond(t, c)
	// A parabola through three values misses w by at most step^3/16 times the
	// third derivative within half a step of the middle one; that is at most the
	// sum of omega^3 size. The finer one misses 1/64 of it. At both ends of the
	// time the largest value may lie between two frames with no third beyond: there
	// the coarser one may be lower by what w changes in a step, and such a place is
	// left out, known by its largest value at the fine frames.
	step := c.Duration / c.unit() / 400
	var third float64
	begin, _ := c.start()
	for _, k := range begin.moves.stages[0].modes {
		third += math.Pow(k.omega, 3) * k.size
	}
	allowed := step * step * step * third / 16 * (1 + 1.0/64)
	size := len(fine.Envelope)
	var seen, plain float64
	compared := 0
	for i, e := range fine.Envelope {
		var ends, between, most float64
		for f := range c.Frames {
			if v := math.Abs(float64(fine.Values[f*size+i])); f <= finer || f >= c.Frames-1-finer {
				ends = math.Max(ends, v)
			} else {
				between = math.Max(between, v)
			}
		}
		if ends >= between {
			continue
		}
		compared++
		for f := range 401 {
			most = math.Max(most, math.Abs(float64(coarse.Values[f*size+i])))
		}
		seen = math.Max(seen, math.Abs(float64(e-coarse.Envelope[i])))
		plain = math.Max(plain, float64(e)-most)
	}
	t.Logf("%d of %d places: off by %.2g, at the frames alone by %.2g, allowed %.2g", compared, size, seen, plain, allowed)
	if seen > allowed || compared < size/2 {
		t.Errorf("envelopes differ by %g, allowed %g, at %d places", seen, allowed, compared)
	}
	if plain < allowed {
		t.Error("it would hold without refining")
	}
}

func TestCrest(t *testing.T) {
	for _, c := range []struct{ a, b, c, want float64 }{
		// The parabola through (-1, 1/2), (0, 1), (1, 3/4) has its top at 1/6, 1 + 1/96.
		{0, 1, 0, 1}, {-0.5, -1, -0.75, 1 + 1.0/96}, {0, 0, 0, 0}, {1, 1, 1, 1}, {0, 1, 2, 1}, {-3, 1, 0, 1}, {0, 1, 1, 1.125},
	} {
		envelope := []float32{float32(math.Abs(c.b))}
		crest(envelope, []float32{float32(c.a)}, []float32{float32(c.b)}, []float32{float32(c.c)})
		// A few operations of float32.
		if math.Abs(float64(envelope[0])-c.want) > 4*0x1p-24 {
			t.Errorf("crest of %v: %v", c, envelope)
		}
	}
}

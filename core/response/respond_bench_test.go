package response

import (
	"context"
	"testing"
)

func benchCase() *Case {
	return &Case{
		Sheet:        Sheet{Radius: 1.5, Tension: 200, ArealDensity: 0.032, Stretch: 1.3e5},
		Zeta:         0.01,
		Displacement: Shape{Kind: ShapeBump, Peak: 0.004, Radius: 0.3, Angle: 0.4, Width: 0.3},
		Velocity:     Shape{Kind: ShapePatch, Peak: 0.5, Radius: 0.5, Angle: 2, Width: 0.2},
		Orders:       16, Circles: 16,
		Duration: 0.3, Frames: 120, Radii: 40, Angles: 80,
		Points: []Point{{0, 0}, {0.5, 1}, {0.7, 3}, {0.2, 5}},
	}
}

func BenchmarkRespond(b *testing.B) {
	c := benchCase()
	for b.Loop() {
		if _, problems, err := Respond(context.Background(), c, func(float64) {}); err != nil || len(problems) > 0 {
			b.Fatal(problems, err)
		}
	}
}

func BenchmarkRespondFrame(b *testing.B) {
	c := benchCase()
	begin, _ := c.start()
	radii := make([]float64, c.Radii)
	for i := range radii {
		radii[i] = float64(i) / float64(c.Radii-1)
	}
	f := newFrame(begin.moves, takeTable(begin.moves.basis, radii, c.Angles))
	t := 0.0
	for b.Loop() {
		f.at(t)
		t += 0.01
	}
}

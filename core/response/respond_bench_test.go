package response

import (
	"context"
	"fmt"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
	"hoopsheet/core/modes"
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
	table := takeTable(begin.moves.basis, c.radii(), c.Angles)
	walk, values := newWalk(begin.moves, 0.01), make([]float64, table.Len())
	for b.Loop() {
		walk.next()
		table.Synthesise(values, walk.coef)
	}
}

// framesOf gives a table of the display grid and a walk of its motion.
func framesOf(orders, circles, radii, angles int) (*disc.Table, *walk) {
	c := benchCase()
	c.Orders, c.Circles, c.Radii, c.Angles = orders, circles, radii, angles
	begin, _ := c.start()
	return takeTable(begin.moves.basis, c.radii(), c.Angles), newWalk(begin.moves, 0.001)
}

func benchFrames(b *testing.B, table *disc.Table, walk *walk, frames int) {
	values := make([]float64, table.Len())
	for b.Loop() {
		for range frames {
			walk.next()
			table.Synthesise(values, walk.coef)
		}
	}
}

// BenchmarkFrame1600 is one frame of 1,600 modes, m to 39 and n to 40, on
// 128 x 256 points.
func BenchmarkFrame1600(b *testing.B) {
	table, walk := framesOf(39, 40, 128, 256)
	benchFrames(b, table, walk, 1)
}

// BenchmarkFrameGrowth lets modes, points and frames grow by themselves.
func BenchmarkFrameGrowth(b *testing.B) {
	for _, n := range []int{10, 20, 40} {
		b.Run(fmt.Sprintf("modes=%d", n), func(b *testing.B) {
			table, walk := framesOf(n-1, n, 128, 256)
			benchFrames(b, table, walk, 1)
		})
	}
	for _, n := range []int{32, 64, 128, 256} {
		b.Run(fmt.Sprintf("radii=%d", n), func(b *testing.B) {
			table, walk := framesOf(39, 40, n, max(2*n, 80))
			benchFrames(b, table, walk, 1)
		})
	}
	for _, n := range []int{1, 10, 100} {
		b.Run(fmt.Sprintf("frames=%d", n), func(b *testing.B) {
			table, walk := framesOf(39, 40, 128, 256)
			benchFrames(b, table, walk, n)
		})
	}
}

// BenchmarkRespondWet is the same sheet in air that is 70 times its mass.
func BenchmarkRespondWet(b *testing.B) {
	c := benchCase()
	real := modes.Real{Radius: 1.5, Tension: 200, ArealDensity: 0.032, Remainder: 0.01,
		Upper: face(diaphragm.FaceBaffled, 0.75), Lower: face(diaphragm.FaceBaffled, 0.75)}
	still, err := modes.Solve(real, modes.Request{MaxM: c.Orders, MaxN: c.Circles, Effects: stillFluid})
	if err != nil {
		b.Fatal(err)
	}
	c.Wet = NewWet(still, nil, false, c.Orders, c.Circles)
	c.Duration = 6 * c.period()
	for b.Loop() {
		if _, problems, err := Respond(context.Background(), c, func(float64) {}); err != nil || len(problems) > 0 {
			b.Fatal(problems, err)
		}
	}
}

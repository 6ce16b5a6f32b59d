package disc_test

import (
	"fmt"
	"math"

	"hoopsheet/core/disc"
)

// A sheet pulled up into a bulge beside its centre: which modes does it hold,
// and how much is missed?
func ExampleTransform_AnalyseFunc() {
	tr := disc.NewTransform(12, 12, 0, 0)
	coef := make([]float64, tr.Basis.Len())
	q := tr.AnalyseFunc(coef, func(r, theta float64) float64 {
		x := r * math.Cos(theta)
		return (1 - r*r) * (1 + x) // zero at the rim, higher on the right
	})
	fmt.Printf("(0,1) %.4f\n", coef[tr.Basis.Index(0, 1, disc.Cos)])
	fmt.Printf("(1,1) %.4f\n", coef[tr.Basis.Index(1, 1, disc.Cos)])
	fmt.Printf("energy missed: less than 1e-6 %v, smooth %v\n", q.Missed < 1e-6, q.Smooth)
	// Output:
	// (0,1) 1.1080
	// (1,1) 0.7062
	// energy missed: less than 1e-6 true, smooth true
}

// Frames of a vibration: the coefficients at an instant, drawn on a display
// grid whose Bessel functions are evaluated once.
func ExampleTable_Synthesise() {
	b := disc.NewBasis(2, 3)
	radii := []float64{0, 0.5, 1}
	table := disc.NewTable(b, radii, 8)

	start := make([]float64, b.Len())
	start[b.Index(0, 1, disc.Cos)] = 1
	now := make([]float64, b.Len())
	frame := make([]float64, table.Len())
	for _, t := range []float64{0, 1.0 / 6, 0.5} { // in periods of (0, 1)
		for i, a := range start {
			m, n, _ := b.At(i)
			now[i] = a * math.Cos(2*math.Pi*t*b.Zero(m, n)/b.Zero(0, 1))
		}
		table.Synthesise(frame, now)
		fmt.Printf("centre %.3f half way %.3f rim %.3f\n", frame[0], frame[8], frame[16])
	}
	// Output:
	// centre 1.000 half way 0.670 rim 0.000
	// centre 0.500 half way 0.335 rim 0.000
	// centre -1.000 half way -0.670 rim 0.000
}

package modes

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
)

// Without any effect the drawing of the diaphragm as it stands is that of the
// ideal sheet: circles, diameters, lobes and values.
func TestRealShapeOfIdealSheet(t *testing.T) {
	real := Real{Radius: 0.4, Tension: 300, ArealDensity: 0.07,
		Upper: Face{Kind: diaphragm.FaceVacuum}, Lower: Face{Kind: diaphragm.FaceVacuum}}
	solution, err := Solve(real, Request{MaxM: 4, MaxN: 4})
	if err != nil {
		t.Fatal(err)
	}
	// Linear interpolation between 800 steps finds a circle to within the
	// curvature at a zero, which vanishes, and a lobe to half a step.
	const circleTolerance, lobeTolerance, valueTolerance = 1e-5, 1.0 / realShapeSteps, 2e-4
	for i := range solution.Modes {
		mode := &solution.Modes[i]
		got, want := NewRealShape(mode, 0.3), NewShape(mode.M, mode.N, 0.3)
		circles := want.CircleRadii()
		if found := got.CircleRadii(); len(found) != len(circles) {
			t.Errorf("(%d,%d): %d nodal circles, want %d", mode.M, mode.N, len(found), len(circles))
		} else {
			for k := range found {
				if math.Abs(found[k]-circles[k]) > circleTolerance {
					t.Errorf("(%d,%d): circle at %v, want %v", mode.M, mode.N, found[k], circles[k])
				}
			}
		}
		lobes := want.Lobes()
		found := got.Lobes()
		if len(found) != len(lobes) {
			t.Fatalf("(%d,%d): %d lobes, want %d", mode.M, mode.N, len(found), len(lobes))
		}
		for k := range found {
			if math.Abs(found[k].Radius-lobes[k].Radius) > lobeTolerance || math.Abs(found[k].Value-lobes[k].Value) > valueTolerance {
				t.Errorf("(%d,%d): lobe %+v, want %+v", mode.M, mode.N, found[k], lobes[k])
			}
		}
		a, b := make([]float32, 33*33), make([]float32, 33*33)
		got.Raster(a, 33)
		want.Raster(b, 33)
		for k := range a {
			if math.IsNaN(float64(a[k])) != math.IsNaN(float64(b[k])) || math.Abs(float64(a[k]-b[k])) > valueTolerance {
				t.Fatalf("(%d,%d): raster value %d is %v, want %v", mode.M, mode.N, k, a[k], b[k])
			}
		}
	}
}

package modes

import (
	"math"
	"math/rand/v2"
	"testing"

	"hoopsheet/core/diaphragm"
)

// TestErrorHolds: over 40 random diaphragms (seed fixed before the first run), frequencies of a solution with few shapes
// lie within their stated errors of one with many more. The other's own error is counted too, and the thin edge's share,
// which both have alike, is not what is tested here.
func TestErrorHolds(t *testing.T) {
	r := rand.New(rand.NewPCG(71, 4))
	between := func(lo, hi float64) float64 { return lo * math.Pow(hi/lo, r.Float64()) }
	kinds := []diaphragm.FaceKind{diaphragm.FaceVacuum, diaphragm.FaceBaffled, diaphragm.FaceCavity}
	worst, count := 0.0, 0
	for range 40 {
		face := Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343}
		real := Real{Radius: between(0.1, 2), Tension: between(30, 5000), ArealDensity: between(0.01, 2), Upper: face, Lower: face,
			Rim: RimClamped, Poisson: 0.3}
		real.Stiffness = real.Tension * real.Radius * real.Radius * between(1e-5, 1e-1)
		if r.IntN(3) == 0 {
			real.Upper.Kind, real.Lower.Kind = diaphragm.FaceOpen, diaphragm.FaceOpen
		} else {
			real.Lower.Kind = kinds[r.IntN(len(kinds))]
			if real.Lower.Kind == diaphragm.FaceCavity {
				real.Lower.Depth = real.Radius * between(0.05, 2)
			}
		}
		few, err := Solve(real, Request{MaxM: 4, MaxN: 3, Effects: AllEffects()})
		if err != nil {
			t.Fatal(err)
		}
		many, err := Solve(real, Request{MaxM: 4, MaxN: 16, Effects: AllEffects()})
		if err != nil {
			t.Fatal(err)
		}
		for _, mode := range few.Modes {
			if mode.BeyondSound {
				continue
			}
			better := modeOf(t, many, mode.M, mode.N)
			off := math.Abs(mode.Frequency - better.Frequency)
			allowed := mode.Error + better.Error + 4e-15*mode.Frequency
			worst = math.Max(worst, off/allowed)
			count++
			if off > allowed {
				t.Errorf("(%d,%d) at %.6g Hz is off by %.2g Hz, stated %.2g; %+v", mode.M, mode.N, mode.Frequency, off, allowed, real)
			}
		}
	}
	t.Logf("%d modes, worst %.2f of what is stated", count, worst)
}

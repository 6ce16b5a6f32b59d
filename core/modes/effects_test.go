package modes

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
)

// kettledrumHead is the head of a 26 inch kettledrum without its kettle: radius,
// areal density and tension as recalled from Christian et al., J. Acoust. Soc.
// Am. 76 (1984) 1336-1345 (from memory).
func kettledrumHead() Real {
	air := Face{Kind: diaphragm.FaceOpen, Density: 1.2, SoundSpeed: 343.5, Viscosity: 1.5e-5}
	return Real{Radius: 0.328, Tension: 3990, ArealDensity: 0.262, Stiffness: 2.2e-3, Upper: air, Lower: air}
}

func modeOf(t *testing.T, s *Solution, m, n int) RealMode {
	t.Helper()
	for _, mode := range s.Modes {
		if mode.M == m && mode.N == n {
			return mode
		}
	}
	t.Fatalf("no mode (%d,%d)", m, n)
	return RealMode{}
}

func solve(t *testing.T, r Real, request Request) *Solution {
	t.Helper()
	s, err := Solve(r, request)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func TestKettledrumHead(t *testing.T) {
	// Ratios to (1,1) measured without kettle: Rossing, Percussionist 19 (1982)
	// 18-31. The ideal sheet is off by up to 18 %; the open model by less than 4 %,
	// whether still or with sound and stiffness. What is left is the measured head's: its
	// tension was not even, and the room is not open space.
	measured := []struct {
		m, n  int
		ratio float64
	}{{0, 1, 0.53}, {1, 1, 1}, {2, 1, 1.48}, {0, 2, 1.55}, {3, 1, 1.92}, {1, 2, 2.08}, {4, 1, 2.36}, {5, 1, 2.78}}
	head := kettledrumHead()
	for _, c := range []struct {
		name     string
		effects  Effects
		tension  float64
		most     float64
		computed []float64
	}{
		{"ideal", Effects{}, 3990, 0.19, nil},
		{"still", Effects{Fluid: true}, 3990, 0.04, []float64{0.543, 1, 1.435, 0, 1.859, 0, 2.275, 2.686}},
		{"all", AllEffects(), 3990, 0.04, nil},
		{"all, 4000 N/m", AllEffects(), 4000, 0.04, nil},
	} {
		head.Tension = c.tension
		s := solve(t, head, Request{MaxM: 5, MaxN: 2, Effects: c.effects})
		first := modeOf(t, s, 1, 1).Frequency
		worst := 0.0
		for i, want := range measured {
			ratio := modeOf(t, s, want.m, want.n).Frequency / first
			worst = math.Max(worst, math.Abs(ratio/want.ratio-1))
			// An independent model of the same head in still fluid, three decimals
			// and an air density that is not stated.
			if c.computed != nil && c.computed[i] != 0 && math.Abs(ratio-c.computed[i]) > 0.003 {
				t.Errorf("(%d,%d): ratio %.4f, want %.3f", want.m, want.n, ratio, c.computed[i])
			}
		}
		if worst > c.most {
			t.Errorf("%s: off by %.1f %%, expected at most %.0f %%", c.name, 100*worst, 100*c.most)
		}
		if c.name == "ideal" && worst < 0.1 {
			t.Errorf("the ideal sheet is off by only %.1f %%", 100*worst)
		}
	}
}

// film is a foil window of 1.5 m diameter.
func film() Real {
	air := Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343.5, Viscosity: 1.5e-5}
	return Real{Radius: 0.75, Tension: 180, ArealDensity: 0.032, Stiffness: 6e-6, Upper: air, Lower: air}
}

func BenchmarkWetModes(b *testing.B) {
	still := AllEffects()
	still.Sound = false
	cavity := film()
	cavity.Lower = Face{Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343.5, Depth: 0.4}
	open := film()
	open.Upper.Kind, open.Lower.Kind = diaphragm.FaceOpen, diaphragm.FaceOpen
	baffledHead := kettledrumHead()
	baffledHead.Upper.Kind, baffledHead.Lower.Kind = diaphragm.FaceBaffled, diaphragm.FaceBaffled
	for _, c := range []struct {
		name    string
		real    Real
		effects Effects
	}{
		{"film baffled still", film(), still}, {"film baffled", film(), AllEffects()},
		{"film open still", open, still}, {"film open", open, AllEffects()},
		{"film cavity", cavity, AllEffects()},
		{"head baffled", baffledHead, AllEffects()}, {"head open", kettledrumHead(), AllEffects()},
	} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				if _, err := Solve(c.real, Request{Effects: c.effects}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

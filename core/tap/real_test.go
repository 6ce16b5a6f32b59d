package tap

import (
	"math"
	"slices"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

// realCase is a diaphragm as package modes computes it.
type realCase struct {
	name    string
	real    modes.Real
	effects modes.Effects
}

func airAt(kind diaphragm.FaceKind, depth float64) modes.Face {
	return modes.Face{Kind: kind, Density: 1.19, SoundSpeed: 344, Depth: depth}
}

// bending is D = E h^3 / (12 (1 - nu^2)).
func bending(e, h, nu float64) float64 { return e * h * h * h / (12 * (1 - nu*nu)) }

// realCases are invented diaphragms without a cavity, each at its nominal
// tension.
func realCases() []realCase {
	open, baffled, vacuum := airAt(diaphragm.FaceOpen, 0), airAt(diaphragm.FaceBaffled, 0), modes.Face{Kind: diaphragm.FaceVacuum}
	all := modes.AllEffects()
	return []realCase{
		{"film, open", modes.Real{Radius: 1.5, Tension: 200, ArealDensity: 0.032, Stiffness: bending(4.5e9, 23e-6, 0.38), Upper: open, Lower: open}, all},
		{"film, baffled", modes.Real{Radius: 1.5, Tension: 200, ArealDensity: 0.032, Stiffness: bending(4.5e9, 23e-6, 0.38), Upper: baffled, Lower: baffled}, all},
		{"fabric, baffled on one side", modes.Real{Radius: 0.8, Tension: 1500, ArealDensity: 0.6, Stiffness: 1e-3, Upper: baffled, Lower: vacuum}, all},
		{"stiff foil, vacuum", modes.Real{Radius: 0.3, Tension: 1000, ArealDensity: 2.7, Stiffness: bending(70e9, 1e-3, 0.33), Poisson: 0.33, Upper: vacuum, Lower: vacuum}, all},
		{"stiff foil, supported rim", modes.Real{Radius: 0.3, Tension: 1000, ArealDensity: 2.7, Stiffness: bending(70e9, 1e-3, 0.33), Poisson: 0.33, Rim: modes.RimSupported, Upper: vacuum, Lower: vacuum}, all},
		{"film, still air", modes.Real{Radius: 0.75, Tension: 180, ArealDensity: 0.07, Upper: open, Lower: open}, modes.Effects{Fluid: true}},
	}
}

// solver gives the modes of a case as the engine would, box by box.
func (c realCase) solver() Solver {
	return func(tension float64, want Want) (list []ModeFrequency, complete float64, err error) {
		real := c.real
		real.Tension = tension
		m, n := min(4, want.MaxM), min(2, want.MaxN)
		for {
			if want.Highest == 0 {
				m, n = want.MaxM, want.MaxN
			}
			solution, err := modes.Solve(real, modes.Request{MaxM: m, MaxN: n, Effects: c.effects})
			if err != nil {
				return nil, 0, err
			}
			if m == want.MaxM && n == want.MaxN || solution.Complete >= want.Highest {
				for _, mode := range solution.Modes {
					list = append(list, ModeFrequency{M: mode.M, N: mode.N, Frequency: mode.Frequency, Error: mode.Error / mode.Frequency})
				}
				return list, solution.Complete, nil
			}
			m, n = min(m+2, want.MaxM), min(n+1, want.MaxN)
		}
	}
}

// at solves a case for the modes named.
func (c realCase) at(t *testing.T, tension float64, names ...ModeName) []float64 {
	t.Helper()
	want := Want{}
	for _, k := range names {
		want.MaxM, want.MaxN = max(want.MaxM, k.M), max(want.MaxN, k.N)
	}
	list, _, err := c.solver()(tension, want)
	if err != nil {
		t.Fatal(err)
	}
	frequencies := make([]float64, len(names))
	for i, k := range names {
		for _, f := range list {
			if f.M == k.M && f.N == k.N {
				frequencies[i] = f.Frequency
			}
		}
	}
	return frequencies
}

func (c realCase) spectrum(t *testing.T, highest float64) *Spectrum {
	t.Helper()
	s, err := NewSpectrum(c.solver(), Range{Nominal: c.real.Tension, Highest: highest})
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func (c realCase) question(s *Spectrum, peaks []Peak) Question {
	return Question{Spectrum: s, Radius: c.real.Radius, ArealDensity: c.real.ArealDensity, Nominal: c.real.Tension, Tolerance: 0.1, Peaks: peaks}
}

// TestInterpolation holds the curves against the diaphragm solved between the
// knots. What NewSpectrum states: 2e-3 in all, 2e-4 within a factor of two of
// the nominal tension; and no error is above what the curve itself states.
func TestInterpolation(t *testing.T) {
	for _, c := range realCases() {
		highest := 1.3 * c.at(t, c.real.Tension, ModeName{5, 1})[0]
		s := c.spectrum(t, highest)
		for i := -6; i <= 6; i++ {
			tension := c.real.Tension * math.Pow(9.99, float64(i)/6*0.97)
			list, complete, err := c.solver()(tension, Want{MaxM: 10, MaxN: 5})
			if err != nil {
				t.Fatal(err)
			}
			allowed := 2e-3
			if math.Abs(math.Log(tension/c.real.Tension)) < math.Ln2 {
				allowed = 2e-4
			}
			for _, f := range list {
				if f.Frequency > min(complete, highest) {
					continue
				}
				got, stated, ok := s.Frequency(f.M, f.N, tension)
				if e := math.Abs(got/f.Frequency - 1); !ok || e > allowed || e > stated {
					t.Errorf("%s, %.4g N/m: mode (%d, %d) at %.5f Hz, solved %.5f: off by %.1e, stated %.1e", c.name, tension, f.M, f.N, got, f.Frequency, e, stated)
				}
				// And back: the slope is at most 1/2 on logarithmic axes, so that
				// the tension errs by twice as much or little more.
				if back, ok := s.Tension(f.M, f.N, got); !ok || math.Abs(back/tension-1) > 1e-11 {
					t.Errorf("%s: mode (%d, %d) at %.5f Hz comes back as %.15g N/m, not %.15g", c.name, f.M, f.N, got, back, tension)
				}
			}
		}
	}
}

// TestReadRealExact gives exact peaks of diaphragms at tensions of their own.
// The tension comes back within twice the error of a curve that was moved onto
// its exact value and followed for less than sharpMove: even with a slope off by
// one, 2e-6.
func TestReadRealExact(t *testing.T) {
	for _, c := range realCases() {
		for _, factor := range []float64{0.3, 0.93, 1, 1.4, 4} {
			tension := c.real.Tension * factor
			names := []ModeName{{0, 1}, {1, 1}, {2, 1}, {0, 2}, {3, 1}, {1, 2}, {4, 1}}
			var peaks []Peak
			for _, f := range c.at(t, tension, names...) {
				peaks = append(peaks, Peak{Frequency: f, Use: true})
			}
			a := mustRead(t, c.question(c.spectrum(t, peaks[len(peaks)-1].Frequency*1.1), peaks))
			if !a.Chosen || a.Poor {
				t.Errorf("%s, %g N/m: not chosen: %s", c.name, tension, a.Reason)
				continue
			}
			best := a.Readings[0]
			if math.Abs(best.Tension/tension-1) > 2e-6 || len(best.Matches) != len(names) {
				t.Errorf("%s, %g N/m: read as %.8g by %d modes", c.name, tension, best.Tension, len(best.Matches))
			}
			for _, m := range best.Matches {
				if names[m.Peak] != (ModeName{m.M, m.N}) || math.Abs(m.Residual) > 1e-6 {
					t.Errorf("%s, %g N/m: %+v", c.name, tension, m)
				}
			}
		}
	}
}

// TestReadCavity gives exact peaks of sheets over a closed cavity, where curves
// bend; within TestReadRealExact's bound, because readings are solved again.
func TestReadCavity(t *testing.T) {
	baffled := airAt(diaphragm.FaceBaffled, 0)
	for _, c := range []realCase{
		{"kettle", modes.Real{Radius: 0.42, Tension: 1300, ArealDensity: 0.26, Upper: baffled, Lower: airAt(diaphragm.FaceCavity, 0.34)}, modes.AllEffects()},
		{"shallow, below still air", modes.Real{Radius: 0.75, Tension: 180, ArealDensity: 0.07, Upper: baffled, Lower: airAt(diaphragm.FaceCavity, 0.05)}, modes.Effects{Fluid: true, Cavity: true}},
	} {
		names := []ModeName{{0, 1}, {1, 1}, {2, 1}, {3, 1}, {0, 2}, {1, 2}}
		highest := 1.2 * slices.Max(c.at(t, c.real.Tension*1.5, names...))
		s, err := NewSpectrum(c.solver(), Range{Nominal: c.real.Tension, Widest: 3, Highest: highest, MaxM: 6, MaxN: 4})
		if err != nil {
			t.Fatal(err)
		}
		for _, factor := range []float64{0.7, 1.02, 1.5} {
			tension := c.real.Tension * factor
			var peaks []Peak
			for _, f := range c.at(t, tension, names...) {
				peaks = append(peaks, Peak{Frequency: f, Use: true})
			}
			a := mustRead(t, c.question(s, peaks))
			if !a.Chosen {
				t.Errorf("%s, %g N/m: %s", c.name, tension, a.Reason)
				continue
			}
			best := a.Readings[0]
			if math.Abs(best.Tension/tension-1) > 2e-6 || len(best.Matches) != len(names) {
				t.Errorf("%s, %g N/m: read as %.8g by %d modes", c.name, tension, best.Tension, len(best.Matches))
			}
			for _, m := range best.Matches {
				if names[m.Peak] != (ModeName{m.M, m.N}) {
					t.Errorf("%s, %g N/m: %+v is %v", c.name, tension, m, names[m.Peak])
				}
			}
		}
	}
}

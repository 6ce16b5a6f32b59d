package tap

import (
	"errors"
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

// pairSpectrum is the ideal sheet of unit radius and areal density whose pairs
// split by 4 %.
func pairSpectrum(t *testing.T) *Spectrum {
	t.Helper()
	s, err := NewSpectrum(func(tension float64, want Want) ([]ModeFrequency, float64, error) {
		var list []ModeFrequency
		for m := range want.MaxM + 1 {
			for n := 1; n <= want.MaxN; n++ {
				f := bessel.ZeroJ(float64(m), n) * math.Sqrt(tension) / (2 * math.Pi)
				if m == 0 {
					list = append(list, ModeFrequency{M: m, N: n, Frequency: f})
					continue
				}
				list = append(list, ModeFrequency{M: m, N: n, Frequency: 0.98 * f}, ModeFrequency{M: m, N: n, Upper: true, Frequency: 1.02 * f})
			}
		}
		return list, math.Inf(1), nil
	}, Range{Nominal: 100, MaxM: 4, MaxN: 2})
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// A pin names either of a split pair. Two pins to a pair are its two modes in
// order, one is the one nearer to what the other pins say, and three are too many.
func TestPinsOfASplitPair(t *testing.T) {
	const tension = 115
	f := func(m, n int, part float64) float64 {
		return part * bessel.ZeroJ(float64(m), n) * math.Sqrt(tension) / (2 * math.Pi)
	}
	pin := func(m, n int, frequency float64) Peak { return Peak{Frequency: frequency, Use: true, M: m, N: n} }
	for name, c := range map[string]struct {
		peaks []Peak
		upper []bool // by peak
	}{
		"both":           {[]Peak{pin(1, 1, f(1, 1, 1.02)), pin(1, 1, f(1, 1, 0.98))}, []bool{true, false}},
		"upper by (0,1)": {[]Peak{pin(0, 1, f(0, 1, 1)), pin(2, 1, f(2, 1, 1.02))}, []bool{false, true}},
		"lower by (0,1)": {[]Peak{pin(0, 1, f(0, 1, 1)), pin(2, 1, f(2, 1, 0.98))}, []bool{false, false}},
	} {
		answer, err := Read(Question{Spectrum: pairSpectrum(t), Radius: 1, ArealDensity: 1, Nominal: 100, Tolerance: 0.1, Peaks: c.peaks}, Options{})
		if err != nil {
			t.Fatal(name, err)
		}
		r := answer.Readings[0]
		// The curve through the solved tensions is exact for a power law.
		if math.Abs(r.Tension/tension-1) > 1e-6 || len(r.Matches) != len(c.peaks) {
			t.Errorf("%s: %v N/m from %+v", name, r.Tension, r.Matches)
		}
		for _, m := range r.Matches {
			if m.Upper != c.upper[m.Peak] {
				t.Errorf("%s: peak %d is upper: %v", name, m.Peak, m.Upper)
			}
		}
	}
	three := []Peak{pin(1, 1, 10), pin(1, 1, 11), pin(1, 1, 12)}
	_, err := Read(Question{Spectrum: pairSpectrum(t), Radius: 1, ArealDensity: 1, Nominal: 100, Tolerance: 0.1, Peaks: three}, Options{})
	var refusal *diaphragm.Refusal
	if !errors.As(err, &refusal) || len(refusal.Problems) != 1 || refusal.Problems[0].Field != "peaks.2.m" {
		t.Errorf("three pins to a pair: %v", err)
	}
	two := []Peak{pin(0, 1, 10), pin(0, 1, 11)}
	if _, err := Read(Question{Spectrum: pairSpectrum(t), Radius: 1, ArealDensity: 1, Nominal: 100, Tolerance: 0.1, Peaks: two}, Options{}); err == nil {
		t.Error("two peaks are taken as (0, 1)")
	}
}

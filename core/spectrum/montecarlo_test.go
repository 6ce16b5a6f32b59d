package spectrum

import (
	"math"
	"math/rand/v2"
	"testing"
)

// TestScatter draws tones with random phase, frequency and noise, and compares the scatter of the
// frequencies and decay rates read with the standard uncertainties stated. With z the error over its
// stated uncertainty, the sum of z^2 over n trials is chi-square distributed with n degrees of freedom
// if the statement is true: mean 1, standard deviation sqrt(2/n). Bounds are 4 of these, and 10 % more
// (in the square) for what the statement leaves out by derivation: the noise floor it is worked out
// from is itself a median of a few hundred bins (standard deviation 4 % to 8 % of the power), and the
// formulas are of first order in the noise. The mean error is held to 4 sqrt(1/n) uncertainties.
func TestScatter(t *testing.T) {
	const rate, trials = 8000.0, 200
	for _, c := range []struct {
		name    string
		noise   float64
		seconds float64
		parts   []part
		seed    uint64
	}{
		{"ringing", 2e-3, 1.3, []part{{237.3, 0.2, 6}}, 1},
		{"ringing, weak", 4e-2, 1.3, []part{{237.3, 0.2, 6}}, 2},
		{"ringing slowly", 1e-2, 1.3, []part{{411.7, 0.1, 1.2}}, 3},
		{"steady", 5e-2, 1.0, []part{{611.7, 0.1, 0}}, 4},
		{"three", 2e-2, 1.3, []part{{205.1, 0.2, 4}, {311.6, 0.2, 6}, {466.2, 0.15, 9}}, 5},
	} {
		a := NewAnalyzer()
		r := rand.New(rand.NewPCG(41, c.seed))
		var f2, f1, d2, d1, efficiency float64
		n := 0.0
		for range trials {
			parts := make([]part, len(c.parts))
			for i, p := range c.parts {
				parts[i] = part{p.Frequency + 2*r.Float64(), p.Amplitude, p.Decay}
			}
			start := 0.2
			if c.parts[0].Decay == 0 {
				start = 0 // no strike: all of it is used
			}
			rec, err := FromSamples(syntheticTap(r, rate, start, c.seconds, c.noise, parts...), rate)
			if err != nil {
				t.Fatal(err)
			}
			res, err := a.Analyse(rec, Options{Lowest: 100, Highest: 800})
			if err != nil {
				t.Fatal(err)
			}
			if len(res.Peaks) != len(parts) {
				t.Fatalf("%s: %d peaks, want %d", c.name, len(res.Peaks), len(parts))
			}
			for i, p := range res.Peaks {
				if !p.DecayKnown {
					t.Fatalf("%s: no decay: %+v", c.name, p)
				}
				z := (p.Frequency - parts[i].Frequency) / p.FrequencyU
				q := (p.Decay - parts[i].Decay) / p.DecayU
				f1, f2, d1, d2 = f1+z, f2+z*z, d1+q, d2+q*q
				efficiency += math.Pow(p.Bound/p.FrequencyU, 2)
				if p.FrequencyU < p.Bound {
					t.Fatalf("%s: uncertainty %g under the Cramer-Rao bound %g", c.name, p.FrequencyU, p.Bound)
				}
				n++
			}
		}
		t.Logf("%-15s frequency: mean square %.3f, mean %+.3f; decay: %.3f, %+.3f; efficiency %.2f",
			c.name, f2/n, f1/n, d2/n, d1/n, efficiency/n)
		spread, shift := 4*math.Sqrt(2/n)+0.1, 4*math.Sqrt(1/n)
		if math.Abs(f2/n-1) > spread || math.Abs(f1/n) > shift {
			t.Errorf("%s: frequency errors: mean square %.3f, mean %.3f uncertainties", c.name, f2/n, f1/n)
		}
		if math.Abs(d2/n-1) > spread || math.Abs(d1/n) > shift {
			t.Errorf("%s: decay errors: mean square %.3f, mean %.3f uncertainties", c.name, d2/n, d1/n)
		}
	}
}

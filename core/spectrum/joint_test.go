package spectrum

import (
	"math"
	"math/rand/v2"
	"testing"
)

// TestPairs: lines of a split pair, closer than a spectrum resolves, are read as two, with honest uncertainties. The
// bound of the standard deviation is that of two lines (Hua & Sarkar 1990), which the stated uncertainty cannot pass;
// statistics as in TestScatter, with the 3 % to 5 % of first-order error at 4 uncertainties apart inside the 0.1.
func TestPairs(t *testing.T) {
	const rate, trials, seconds = 8000.0, 100, 1.5
	for _, c := range []struct {
		name            string
		apart           float64 // Hz; Hann over 1.3 s resolves 1.5 of 0.77 Hz
		second          float64 // amplitude against the first
		decay1, decay2  float64
		noise           float64
		seed            uint64
		resolvedAtLeast float64 // equal lines in opposite phase start from nothing, and one in a hundred may stay hidden
	}{
		{"equal", 1.0, 1, 4, 4, 2e-3, 1, 0.97},
		{"close", 0.6, 0.9, 4, 4.6, 1e-3, 2, 1},
		{"weak", 1.2, 0.3, 5, 4, 1e-3, 3, 1},
		{"wide", 2.5, 0.7, 5, 6, 5e-3, 4, 1},
	} {
		a := NewAnalyzer()
		r := rand.New(rand.NewPCG(53, c.seed))
		resolved, n := 0, 0.0
		var f2, f1, d2, d1 float64
		for range trials {
			f := 200 + 300*r.Float64()
			parts := []part{{f, 0.2, c.decay1}, {f + c.apart, 0.2 * c.second, c.decay2}}
			rec, err := FromSamples(syntheticTap(r, rate, 0.2, seconds, c.noise, parts...), rate)
			if err != nil {
				t.Fatal(err)
			}
			res, err := a.Analyse(rec, Options{Lowest: 100, Highest: 800})
			if err != nil {
				t.Fatal(err)
			}
			if len(res.Peaks) > 2 {
				t.Errorf("%s: %d peaks of two lines: %+v", c.name, len(res.Peaks), res.Peaks)
			}
			if len(res.Peaks) != 2 {
				continue
			}
			resolved++
			for i, p := range res.Peaks {
				z := (p.Frequency - parts[i].Frequency) / p.FrequencyU
				q := (p.Decay - parts[i].Decay) / p.DecayU
				f1, f2, d1, d2, n = f1+z, f2+z*z, d1+q, d2+q*q, n+1
			}
		}
		t.Logf("%-6s resolved %d of %d; frequency: mean square %.3f, mean %+.3f; decay: %.3f, %+.3f", c.name, resolved, trials, f2/n, f1/n, d2/n, d1/n)
		if float64(resolved) < c.resolvedAtLeast*trials {
			t.Errorf("%s: %d of %d pairs resolved", c.name, resolved, trials)
		}
		spread, shift := 4*math.Sqrt(2/n)+0.1, 4*math.Sqrt(1/n)
		if math.Abs(f2/n-1) > spread || math.Abs(d2/n-1) > spread || math.Abs(f1/n) > shift || math.Abs(d1/n) > shift {
			t.Errorf("%s: errors in uncertainties: frequency %.3f %+.3f, decay %.3f %+.3f", c.name, f2/n, f1/n, d2/n, d1/n)
		}
	}
}

// TestGlide: a single line stays one also where it is no exponential but glides by stretching (its frequency falls with
// the square of its amplitude); the frequency at no amplitude and the glide are read with honest uncertainties. The
// frames average over a glide: of 2 Hz, its frequency turns by 0.5 Hz/s x 0.1 s within one, a hundredth of the glide.
func TestGlide(t *testing.T) {
	const rate, trials = 8000.0, 100
	for _, c := range []struct {
		hertz, within float64 // relative to the glide
		mostSplit     int     // of 100; 8 Hz is a fiftieth of the frequency, far beyond what the linear answers are for
	}{{0, 0, 0}, {0.3, 0.02, 0}, {2, 0.02, 0}, {8, 0.05, 2}} {
		r := rand.New(rand.NewPCG(59, uint64(10*c.hertz)))
		a := NewAnalyzer()
		split, glided := 0, 0
		var f1, f2, worst float64
		for range trials {
			x := syntheticTap(r, rate, 0.2, 1.5, 1e-3)
			f, d, phase := 200+300*r.Float64(), 3+3*r.Float64(), 2*math.Pi*r.Float64()
			for i := int(0.2 * rate); i < len(x); i++ {
				s := float64(i)/rate - 0.2
				fall := math.Exp(-d * s)
				x[i] += 0.3 * fall * math.Cos(phase+2*math.Pi*(f*s+c.hertz*(1-fall*fall)/(2*d)))
			}
			rec, err := FromSamples(x, rate)
			if err != nil {
				t.Fatal(err)
			}
			res, err := a.Analyse(rec, Options{Lowest: 100, Highest: 800})
			if err != nil {
				t.Fatal(err)
			}
			switch {
			case len(res.Peaks) == 0:
				t.Errorf("glide of %g Hz: no peak", c.hertz)
			case len(res.Peaks) > 1:
				split++
			case res.Peaks[0].Glide != 0:
				p := res.Peaks[0]
				glided++
				z := (p.Frequency - f) / p.FrequencyU
				f1, f2 = f1+z, f2+z*z
				// The stretch begins a little after the strike; the glide has fallen with the square of the amplitude since.
				want := c.hertz * math.Exp(-2*d*(res.From-0.2))
				worst = max(worst, (math.Abs(p.Glide-want)-4*p.GlideU)/want)
			}
		}
		n := float64(glided)
		t.Logf("glide of %g Hz: %d of %d split; %d glide, by %.3f at most off beyond 4 uncertainties; frequency: mean square %.2f, mean %+.2f", c.hertz, split, trials, glided, worst, f2/n, f1/n)
		if split > c.mostSplit {
			t.Errorf("glide of %g Hz: %d of %d read as more than one line", c.hertz, split, trials)
		}
		if c.hertz == 0 {
			if glided > 0 {
				t.Errorf("%d of %d lines without a glide were read with one", glided, trials)
			}
			continue
		}
		if glided < trials*9/10 || worst > c.within {
			t.Errorf("glide of %g Hz: %d of %d seen, by %.3f off at most", c.hertz, glided, trials, worst)
		}
		if c.hertz < 1 && (math.Abs(f2/n-1) > 4*math.Sqrt(2/n)+0.1 || math.Abs(f1/n) > 4*math.Sqrt(1/n)) {
			t.Errorf("glide of %g Hz: frequency errors: mean square %.3f, mean %.3f uncertainties", c.hertz, f2/n, f1/n)
		}
	}
}

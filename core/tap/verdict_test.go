package tap

import (
	"math"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
)

// TestConformanceProbability holds it against the example of JCGM 106:2012
// (clause 7, from memory): upper limit -5.40 V, estimate -5.47 V, u = 0.05 V,
// p = 0.92; recomputed 0.9192433407662273.
func TestConformanceProbability(t *testing.T) {
	got := ConformanceProbability(-5.47, 0.05, math.Inf(-1), -5.40, 0)
	// The quotient 0.07/0.05 carries the rounding of its terms, 5e-15.
	if math.Abs(got-0.9192433407662273) > 1e-14 {
		t.Errorf("%.16f, published 0.9192433407662273", got)
	}
}

// TestGuardBand: the largest probability of a false acceptance behind a guard
// band of w = r u, JCGM 106:2012, 8.3.2; recomputed values of the normal
// distribution.
func TestGuardBand(t *testing.T) {
	for _, row := range []struct{ r, want float64 }{
		{1, 0.15865525393145707}, {1.645, 0.04998490553912138}, {2, 0.02275013194817921}, {2.33, 0.009903075559164254},
	} {
		// An estimate at the edge of acceptance, r u below the upper limit 0.
		if got := 1 - ConformanceProbability(-row.r, 1, math.Inf(-1), 0, 0); math.Abs(got-row.want) > 1e-15 {
			t.Errorf("guard band %g u: %.17f, want %.17f", row.r, got, row.want)
		}
	}
	// The band used here, one expanded uncertainty of 95 %, leaves 2.5 %.
	for nu := 0; nu < 12; nu++ {
		factor := StudentQuantile(0.95, nu)
		if got := 1 - ConformanceProbability(-factor, 1, math.Inf(-1), 0, nu); math.Abs(got-0.025) > 1e-10 {
			t.Errorf("%d degrees of freedom: %.6f, want 0.025", nu, got)
		}
	}
}

func TestVerdicts(t *testing.T) {
	both := func(kind diaphragm.FaceKind) diaphragm.Faces {
		return diaphragm.Faces{Upper: diaphragm.Face{Kind: kind}, Lower: diaphragm.Face{Kind: kind}}
	}
	cavity := both(diaphragm.FaceBaffled)
	cavity.Lower = diaphragm.Face{Kind: diaphragm.FaceCavity, Depth: 1}
	// Six exact peaks: u = 2 x 0.2 % / sqrt 6 = 0.163 %, times t(5) = 2.571:
	// the interval is +-0.42 %. The limits are 180 and 220 N/m.
	for _, row := range []struct {
		name    string
		tension float64
		air     Air
		want    Verdict
		words   string
	}{
		{"middle", 200, Air{}, VerdictPass, "lies within"},
		{"inside the upper guard band", 219.5, Air{}, VerdictUndecided, "reaches across a limit"},
		{"below the upper guard band", 218.5, Air{}, VerdictPass, "lies within"},
		{"above the upper guard band", 221.5, Air{}, VerdictFail, "lies above"},
		{"inside the lower guard band", 180.5, Air{}, VerdictUndecided, "reaches across a limit"},
		{"below the lower guard band", 178.5, Air{}, VerdictFail, "lies below"},
		{"vacuum", 200, Air{1.2, both(diaphragm.FaceVacuum)}, VerdictPass, "lies within"},
		// rho a / sigma = 56: air raises the tension many times.
		{"heavy air", 200, Air{1.2, both(diaphragm.FaceOpen)}, VerdictUndecided, "air that moves with the sheet"},
		{"heavy air, above all the same", 230, Air{1.2, both(diaphragm.FaceOpen)}, VerdictFail, "lies above"},
		{"heavy air, below without it", 100, Air{1.2, both(diaphragm.FaceBaffled)}, VerdictUndecided, "air that moves with the sheet"},
		// 1e-3 kg/m^3: mode (0,1) carries 2 x 0.493 x 0.047 = 4.6 %.
		{"thin air, middle", 200, Air{1e-3, both(diaphragm.FaceOpen)}, VerdictPass, "lies within"},
		{"thin air, near the upper limit", 215, Air{1e-3, both(diaphragm.FaceOpen)}, VerdictUndecided, "air that moves with the sheet"},
		{"thin air, below even with it", 165, Air{1e-3, both(diaphragm.FaceOpen)}, VerdictFail, "lies below"},
		{"cavity", 200, Air{1e-9, cavity}, VerdictUndecided, "closed cavity"},
	} {
		q := question(peaksOf(row.tension, lowestModes[:6]...))
		q.Air = row.air
		a := mustRead(t, q)
		if a.Verdict != row.want || !strings.Contains(a.Reason, row.words) {
			t.Errorf("%s: %s: %s; want %s with %q", row.name, a.Verdict, a.Reason, row.want, row.words)
		}
		if a.Lower != 180 && math.Abs(a.Lower-180) > 1e-12 || math.Abs(a.Upper-220) > 1e-12 {
			t.Errorf("%s: limits %g to %g", row.name, a.Lower, a.Upper)
		}
	}
}

// TestIntervalByHand works one reading by hand: (0,1) and (1,1) pinned, with
// frequencies 1 % high and 1 % low.
func TestIntervalByHand(t *testing.T) {
	peaks := peaksOf(200, ModeName{0, 1}, ModeName{1, 1})
	peaks[0].N, peaks[1].M, peaks[1].N = 1, 1, 1
	peaks[0].Frequency *= 1.01
	peaks[1].Frequency *= 0.99
	r := mustRead(t, question(peaks)).Readings[0]
	// T is the geometric mean of 200 x 1.0201 and 200 x 0.9801:
	// 200 x 1.01 x 0.99 = 199.98. Deviations relative to it: 1.0201/0.9999 - 1
	// = 0.0202020 and 0.9801/0.9999 - 1 = -0.0198020; their root mean square
	// over n - 1 = 1 is sqrt(0.000408122 + 0.000392118) = 0.0282885. u(T) =
	// 0.0282885/sqrt 2 x 199.98 = 4.00020 N/m, t(1) = 12.7062: +-50.8274.
	for _, v := range []struct {
		name      string
		got, want float64
	}{
		{"tension", r.Tension, 199.98}, {"spread", r.Spread, 0.0282885}, {"standard uncertainty", r.StandardUncertainty, 4.00020},
		{"low", r.Low, 199.98 - 50.8274}, {"high", r.High, 199.98 + 50.8274}, {"tension of the first", r.Matches[0].Tension, 204.02},
		{"residual of the first", r.Matches[0].Residual, 1.01/math.Sqrt(1.01*0.99) - 1},
	} {
		if math.Abs(v.got-v.want) > 5e-6*math.Abs(v.want) { // six digits were carried
			t.Errorf("%s: %.8g, by hand %.8g", v.name, v.got, v.want)
		}
	}
}

func TestSignificant(t *testing.T) {
	for _, row := range []struct {
		x      float64
		digits int
		want   string
	}{{199.98, 4, "200"}, {213.456, 4, "213.5"}, {1234567, 4, "1234567"}, {0.0012345, 2, "0.0012"}, {0, 3, "0"}, {56.25, 2, "56"}, {0.5, 2, "0.5"}, {99.96, 3, "100"}} {
		if got := significant(row.x, row.digits); got != row.want {
			t.Errorf("%g to %d digits: %s, want %s", row.x, row.digits, got, row.want)
		}
	}
}

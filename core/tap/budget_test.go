package tap

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

// raised is the solver of a case with one input changed by a factor.
func (c realCase) raised(step float64, change func(r *modes.Real, factor float64)) Solver {
	change(&c.real, 1+step)
	return c.solver()
}

// realNuisances are radius, areal density and fluid density, 1 % each.
func (c realCase) nuisances() []Nuisance {
	const step = 1e-3
	return []Nuisance{
		{Name: "radius", RelativeStandard: 0.01, Step: step, Solve: c.raised(step, func(r *modes.Real, f float64) { r.Radius *= f })},
		{Name: "areal density", RelativeStandard: 0.01, Step: step, Solve: c.raised(step, func(r *modes.Real, f float64) { r.ArealDensity *= f })},
		{Name: "air", RelativeStandard: 0.01, Step: step, Solve: c.raised(step, func(r *modes.Real, f float64) {
			r.Upper.Density *= f
			r.Lower.Density *= f
		})},
	}
}

// TestSensitivities: in still fluid without bending f a = sqrt(T/sigma) times a
// function of rho a/sigma, for every mode. Hence with g = d ln T/d ln rho at
// fixed frequencies d ln T/d ln sigma = 1 - g and d ln T/d ln a = 2 + g; and g
// lies between the shares of fluid in the modal mass of the modes read. The
// differences err by half the step times a curvature of order one.
func TestSensitivities(t *testing.T) {
	still := modes.Effects{Fluid: true}
	for _, ratio := range []float64{0, 1, 30} {
		c := realCase{"still", modes.Real{Radius: 0.75, Tension: 180, ArealDensity: 0.07, Upper: airAt(diaphragm.FaceOpen, 0), Lower: airAt(diaphragm.FaceOpen, 0)}, still}
		c.real.Upper.Density = ratio * c.real.ArealDensity / c.real.Radius
		c.real.Lower.Density = c.real.Upper.Density
		var peaks []Peak
		for _, f := range c.at(t, 170, ModeName{0, 1}, ModeName{1, 1}, ModeName{2, 1}, ModeName{0, 2}, ModeName{3, 1}) {
			peaks = append(peaks, Peak{Frequency: f, Uncertainty: 1e-3 * f, Use: true})
		}
		q := c.question(c.spectrum(t, peaks[4].Frequency*1.1), peaks)
		q.Nuisances = c.nuisances()
		a := mustRead(t, q)
		got := map[string]Share{}
		var sum, variance float64
		for _, share := range a.Budget {
			got[share.Name] = share
			sum += share.Share
			variance += share.Relative * share.Relative
		}
		g := got["air"].Sensitivity
		if s := got["areal density"].Sensitivity; math.Abs(s-(1-g)) > 1e-3 {
			t.Errorf("ratio %g: areal density %.5f, want %.5f", ratio, s, 1-g)
		}
		if s := got["radius"].Sensitivity; math.Abs(s-(2+g)) > 2e-3 {
			t.Errorf("ratio %g: radius %.5f, want %.5f", ratio, s, 2+g)
		}
		solution, err := modes.Solve(c.real, modes.Request{MaxM: 3, MaxN: 2, Effects: still})
		if err != nil {
			t.Fatal(err)
		}
		least, most := 1.0, 0.0
		for _, mode := range solution.Modes {
			share := mode.FluidMass / (mode.FluidMass + mode.SheetMass)
			least, most = min(least, share), max(most, share)
		}
		if g < least-1e-3 || g > most+1e-3 {
			t.Errorf("ratio %g: air %.4f, the shares of fluid are %.4f to %.4f", ratio, g, least, most)
		}
		// The shares add up, and the parts to the standard uncertainty. Peaks of
		// 0.1 % and a model of 0.5 %: 2 x 0.1 % / sqrt 5 and 2 x 0.5 % / sqrt 5 of
		// T, all modes having the same slope; the curves were solved at the
		// tension itself, so that nothing of theirs is added.
		best := a.Readings[0]
		if math.Abs(sum-1) > 1e-12 || math.Abs(math.Sqrt(variance)*best.Tension/best.StandardUncertainty-1) > 1e-12 {
			t.Errorf("ratio %g: shares add up to %g, parts to %g of %g", ratio, sum, math.Sqrt(variance)*best.Tension, best.StandardUncertainty)
		}
		for name, want := range map[string]float64{SharePeaks: 0.002 / math.Sqrt(5), ShareModel: 2 * RealModelError / math.Sqrt(5), ShareScatter: 0} {
			// Slopes are read off the curves and hold to 1e-3 here.
			if math.Abs(got[name].Relative-want) > 1e-3*want+1e-12 {
				t.Errorf("ratio %g: %s %.6g, want %.6g", ratio, name, got[name].Relative, want)
			}
		}
	}
}

// TestStatedSensitivities: the ideal sheet takes them as stated. Radius 0.1 %
// and areal density 1 %: 2 x 0.1 % and 1 % of T beside the fit's 0.163 %.
func TestStatedSensitivities(t *testing.T) {
	q := question(peaksOf(200, lowestModes[:6]...))
	q.Nuisances = []Nuisance{{Name: "radius", RelativeStandard: 0.001, Sensitivity: 2}, {Name: "areal density", RelativeStandard: 0.01, Sensitivity: 1}}
	a := mustRead(t, q)
	fit := 2 * IdealModelError / math.Sqrt(6)
	want := math.Sqrt(fit*fit + 0.002*0.002 + 0.01*0.01)
	best := a.Readings[0]
	if math.Abs(best.StandardUncertainty/best.Tension/want-1) > 1e-12 {
		t.Errorf("relative standard uncertainty %.8f, by hand %.8f", best.StandardUncertainty/best.Tension, want)
	}
	// Effective degrees of freedom 5 (u/fit)^4 = 7860: the factor is that of the
	// normal distribution to 4 digits.
	if factor := (best.High - best.Tension) / best.StandardUncertainty; math.Abs(factor-1.9600) > 5e-4 {
		t.Errorf("coverage factor %.4f", factor)
	}
	if a.Budget[0].Name != "areal density" || math.Abs(a.Budget[0].Share-1e-4/(want*want)) > 1e-12 {
		t.Errorf("budget %+v", a.Budget)
	}
}

// TestEffectiveFreedom works JCGM 100:2008, G.4.1 by hand: five peaks of 0.3 %
// and inputs of 0.4 % make 0.5 %, with 4 (5/3)^4 = 30.86 degrees of freedom, cut
// to 30, whose factor is 2.04 (table G.2, 30 degrees, from memory).
func TestEffectiveFreedom(t *testing.T) {
	relative, factor, freedom := coverage(9e-6, 16e-6, 5)
	if math.Abs(relative-0.005) > 1e-15 || freedom != 30 || math.Abs(factor-2.04) > 0.005 {
		t.Errorf("%g, factor %.3f, %d degrees of freedom", relative, factor, freedom)
	}
	if _, factor, freedom = coverage(9e-6, 0, 5); freedom != 4 || math.Abs(factor-2.78) > 0.005 {
		t.Errorf("without inputs: factor %.3f, %d degrees of freedom", factor, freedom)
	}
	if _, factor, freedom = coverage(9e-6, 16e-6, 1); freedom != 0 || math.Abs(factor-1.96) > 0.005 {
		t.Errorf("one peak: factor %.3f, %d degrees of freedom", factor, freedom)
	}
}

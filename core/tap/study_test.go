package tap

import (
	"math"
	"math/rand/v2"
	"testing"

	"hoopsheet/core/modes"
)

// TestReadRealSeeded is a study of random diaphragms in air and with stiffness.
// The reader knows the nominal radius, areal density and air; the truth differs
// by normal errors of 0.1 %, 0.5 % and 5 K, and its frequencies scatter by the
// model error of 0.5 % about those solved, for slight unevenness. Tensions lie
// within a factor of two of the nominal one; six of the ten lowest modes show,
// each with 0.1 % of noise, and every other time a foreign peak among them.
//
// Bounds as in TestReadSeeded: a count of right readings and of intervals that
// hold the tension that has a probability below 0.1 % under shares of 95 % by
// the binomial distribution fails.
func TestReadRealSeeded(t *testing.T) {
	const (
		each                             = 36
		radiusU, densityU, kelvin, noise = 0.001, 0.005, 5.0, 0.001
		room                             = 293.15 // K
	)
	random := rand.New(rand.NewPCG(2026, 9))
	var count, chosen, right, covered int
	for _, c := range realCases() {
		names := modesUpTo(t, c, 10)
		highest := 1.5 * c.at(t, c.real.Tension, names...)[len(names)-1]
		spectrum := c.spectrum(t, highest)
		// Density goes with 1/T and the speed of sound with its root.
		heat := func(r *modes.Real, factor float64) {
			for _, f := range []*modes.Face{&r.Upper, &r.Lower} {
				f.Density /= factor
				f.SoundSpeed *= math.Sqrt(factor)
			}
		}
		const step = 1e-3
		nuisances := []Nuisance{
			{Name: "radius", RelativeStandard: radiusU, Step: step, Solve: c.raised(step, func(r *modes.Real, f float64) { r.Radius *= f })},
			{Name: "areal density", RelativeStandard: densityU, Step: step, Solve: c.raised(step, func(r *modes.Real, f float64) { r.ArealDensity *= f })},
			{Name: "temperature", RelativeStandard: kelvin / room, Step: step, Solve: c.raised(step, heat)},
		}
		for range each {
			count++
			truth := c
			truth.real.Radius *= 1 + radiusU*random.NormFloat64()
			truth.real.ArealDensity *= 1 + densityU*random.NormFloat64()
			heat(&truth.real, 1+kelvin/room*random.NormFloat64())
			tension := c.real.Tension * math.Exp2(2*random.Float64()-1)
			frequencies := truth.at(t, tension, names...)
			var peaks []Peak
			var shown []ModeName
			for _, i := range random.Perm(len(names))[:6] {
				f := frequencies[i] * (1 + RealModelError*random.NormFloat64())
				peaks = append(peaks, Peak{Frequency: f * (1 + noise*random.NormFloat64()), Uncertainty: noise * f, Use: true})
				shown = append(shown, names[i])
			}
			if count%2 == 0 {
				foreign := frequencies[0] * (1 + 2*random.Float64())
				peaks, shown = append(peaks, Peak{Frequency: foreign, Uncertainty: noise * foreign, Use: true}), append(shown, ModeName{-1, 0})
			}
			q := c.question(spectrum, peaks)
			q.Nuisances = nuisances
			a := mustRead(t, q)
			if !a.Chosen {
				continue
			}
			chosen++
			best := a.Readings[0]
			agree := 0
			for _, m := range best.Matches {
				if shown[m.Peak] == (ModeName{m.M, m.N}) {
					agree++
				}
			}
			// Right means most modes: at another tension few agree, and a foreign
			// peak that lies on a mode that does not show is nobody's error.
			if 2*agree > len(shown) {
				right++
			}
			if best.Low <= tension && tension <= best.High {
				covered++
			}
		}
	}
	t.Logf("of %d diaphragms %d chosen, of these %d right; the interval holds the tension in %d", count, chosen, right, covered)
	if count < 200 || chosen < count*3/4 {
		t.Errorf("only %d of %d were chosen", chosen, count)
	}
	if p := binomialCDF(right, chosen, choosingOdds); p < 0.001 {
		t.Errorf("%d of %d right; so few have a probability of %.2g", right, chosen, p)
	}
	if p := binomialCDF(covered, chosen, 0.95); p < 0.001 {
		t.Errorf("%d of %d covered; so few have a probability of %.2g", covered, chosen, p)
	}
}

// modesUpTo names the lowest modes of a case, lowest first.
func modesUpTo(t *testing.T, c realCase, count int) []ModeName {
	t.Helper()
	solution, err := modes.Solve(c.real, modes.Request{MaxM: 6, MaxN: 3, Count: count, Effects: c.effects})
	if err != nil {
		t.Fatal(err)
	}
	names := make([]ModeName, 0, count)
	for _, mode := range solution.Modes {
		names = append(names, ModeName{mode.M, mode.N})
	}
	return names
}

package tap

import (
	"math"
	"strconv"
	"strings"
)

// ConformanceProbability is the probability that a quantity lies within its
// limits, from its estimate and standard uncertainty u,
//
//	p = F((upper - estimate)/u) - F((lower - estimate)/u)
//
// with F the normal distribution for nu <= 0 or Student's t with nu degrees of
// freedom. A limit may be infinite. Source: JCGM 106:2012, 7.2 and 7.4.
func ConformanceProbability(estimate, u, lower, upper float64, nu int) float64 {
	return StudentCDF((upper-estimate)/u, nu) - StudentCDF((lower-estimate)/u, nu)
}

// judge gives the verdict on the first reading, and why, in sentences.
//
// The decision rule is a guard band of one expanded uncertainty on either side
// of both limits (JCGM 106:2012, 8.3.2): of diaphragms that pass at the edge
// of the acceptance interval at most 2.5 % lie beyond that limit, as far as
// the stated uncertainty is whole.
func judge(q Question, a Answer) (Verdict, string) {
	limits := "the limits, " + newtons(a.Lower) + " to " + newtons(a.Upper)
	if len(a.Readings) == 0 {
		return VerdictUndecided, "No mode of " + q.Spectrum.name + " within the range looked at explains any of the peaks."
	}
	best := a.Readings[0]
	interval := newtons(best.Low) + " to " + newtons(best.High)
	if a.Poor {
		return VerdictUndecided, capital(q.Spectrum.name) + " explains these peaks badly: " + misfit(best) + " A tension from them would mean little."
	}
	if !a.Chosen {
		if len(a.Readings) > 1 {
			return VerdictUndecided, "The peaks can be read in more than one way: as " + newtons(best.Tension) + " (" + percent(best.Odds) + ") or as " +
				newtons(a.Readings[1].Tension) + " (" + percent(a.Readings[1].Odds) + "), for example. More peaks, or setting the mode of one that you know, would tell them apart."
		}
		return VerdictUndecided, "The reading as " + newtons(best.Tension) + " is not likely enough to stand (" + percent(best.Odds) + "). More peaks would help."
	}
	if len(best.Matches) == 1 {
		return VerdictUndecided, "One peak alone gives " + newtons(best.Tension) + " but no spread, so nothing shows whether it is read rightly. Use at least two, better four or more."
	}
	// The air left out makes the true tension higher, by an estimated share:
	// the upper end of the interval is raised by it.
	air := q.Air.effect(q.Radius, q.ArealDensity, best.Matches)
	high := best.High * (1 + air.share)
	withAir := ""
	if air.share > 0 {
		withAir = " (or up to " + newtons(high) + " with the air that is left out)"
	}
	switch {
	case air.cavity:
		return VerdictUndecided, "A closed cavity lies on one side, and its air is left out of this reading. No verdict can be given without it."
	case best.Low > a.Upper:
		return VerdictFail, "The whole interval of 95 % coverage, " + interval + ", lies above " + limits + "."
	case high < a.Lower:
		return VerdictFail, "The whole interval of 95 % coverage, " + interval + withAir + ", lies below " + limits + "."
	case best.Low >= a.Lower && high <= a.Upper:
		return VerdictPass, "The whole interval of 95 % coverage, " + interval + withAir + ", lies within " + limits + "."
	case best.Low >= a.Lower && best.High <= a.Upper, best.High < a.Lower:
		return VerdictUndecided, "The air that moves with the sheet is left out of this reading, " + interval +
			", and could raise the tension up to about " + newtons(high) + ". That decides whether it lies within " + limits + ", so no verdict can be given without it."
	}
	p := ConformanceProbability(best.Tension, best.StandardUncertainty, a.Lower, a.Upper, best.freedom)
	return VerdictUndecided, "The interval of 95 % coverage, " + interval + ", reaches across a limit (" + limits +
		"). The probability that the tension lies within is about " + percent(p) + ". More peaks would narrow it."
}

func capital(s string) string { return strings.ToUpper(s[:1]) + s[1:] }

func misfit(r Reading) string {
	worst := 0.0
	for _, m := range r.Matches {
		worst = max(worst, math.Abs(m.Residual))
	}
	text := "the best reading leaves " + count(len(r.Unmatched), "peak") + " without a mode and misses the others by up to " + percentPlus(worst) + "."
	if len(r.Unmatched) == 0 {
		text = "the best reading misses them by up to " + percentPlus(worst) + "."
	}
	return text
}

func count(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return strconv.Itoa(n) + " " + noun + "s"
}

// newtons formats a tension to four significant digits.
func newtons(t float64) string { return significant(t, 4) + " N/m" }

// percent formats odds or a probability, never as a certainty.
func percent(p float64) string {
	switch {
	case p < 0.01:
		return "below 1 %"
	case p > 0.99:
		return "above 99 %"
	}
	return strconv.FormatFloat(math.Round(100*p), 'f', 0, 64) + " %"
}

// percentPlus formats a relative size to two significant digits.
func percentPlus(x float64) string { return significant(100*x, 2) + " %" }

// significant formats with the given significant digits, without an exponent.
func significant(x float64, digits int) string {
	if x == 0 {
		return "0"
	}
	decimals := max(0, digits-1-int(math.Floor(math.Log10(math.Abs(x)))))
	text := strconv.FormatFloat(x, 'f', decimals, 64)
	if decimals > 0 {
		for text[len(text)-1] == '0' {
			text = text[:len(text)-1]
		}
		if text[len(text)-1] == '.' {
			text = text[:len(text)-1]
		}
	}
	return text
}

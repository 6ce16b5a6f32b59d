package tap

import (
	"cmp"
	"math"

	"hoopsheet/core/internal/sorting"
)

// report turns a reading into figures. nuisance is the relative variance of the
// tension from the inputs.
func (s *search) report(r reading, nuisance float64) Reading {
	s.turnTo(r)
	out := Reading{Tension: s.spectrum.tension(r.c), Odds: r.odds, Matches: []Match{}, Unmatched: []int{}, Missing: []ModeName{}}
	matched := map[int]bool{}
	shown := map[int]bool{}
	highest := 0
	for _, p := range r.pairs {
		l, k := s.lines[p.line], s.spectrum.modes[p.mode]
		y, _ := s.curveAt(p.mode, r.c)
		fitted := math.Exp(y)
		measured := s.q.Peaks[l.peak].Frequency
		alone := s.spectrum.tension(s.spectrum.invert(p.mode, l.log-s.shift[p.mode]))
		out.Matches = append(out.Matches, Match{Peak: l.peak, M: k.M, N: k.N, Upper: s.spectrum.isUpper(p.mode), Measured: measured, Fitted: fitted, Residual: measured/fitted - 1, Tension: alone})
		matched[p.line], shown[p.mode] = true, true
		highest = max(highest, s.view.rank[p.mode])
	}
	sorting.By(out.Matches, func(a, b Match) int { return cmp.Compare(a.Fitted, b.Fitted) })
	for i, l := range s.lines {
		if !matched[i] {
			out.Unmatched = append(out.Unmatched, l.peak)
		}
	}
	for _, id := range s.view.order[:highest] {
		if !shown[id] {
			out.Missing = append(out.Missing, s.spectrum.modes[id])
		}
	}
	fit, spread := s.fitUncertainty(r)
	if len(r.pairs) > 1 {
		out.Spread = spread
	}
	relative, factor, freedom := coverage(fit.total(), nuisance, len(r.pairs))
	out.freedom = freedom
	out.StandardUncertainty = relative * out.Tension
	out.Low = max(0, out.Tension-factor*out.StandardUncertainty)
	out.High = out.Tension + factor*out.StandardUncertainty
	return out
}

// fitVariance is the relative variance of the tension from the fit, by cause.
type fitVariance struct {
	peaks, model float64
	// scatter is what the peaks scatter more than both explain.
	scatter float64
}

func (f fitVariance) total() float64 { return f.peaks + f.model + f.scatter }

// fitUncertainty gives the variance of the fit, and the standard deviation of
// the tensions that the peaks give one by one, relative. A mode that follows
// the tension less counts by its slope.
func (s *search) fitUncertainty(r reading) (f fitVariance, spread float64) {
	tension := s.spectrum.tension(r.c)
	var weight, slopes, squares float64
	for _, p := range r.pairs {
		l := s.lines[p.line]
		_, slope := s.curveAt(p.mode, r.c)
		slope = max(slope, flattest)
		w := 1 / s.spread(p)
		weight += w * slope * slope
		// T goes with the square of e^c: twice the relative deviation.
		f.peaks += 4 * w * w * slope * slope * l.u * l.u
		f.model += 4 * w * w * slope * slope * (s.spread(p) - l.u*l.u)
		deviation := s.spectrum.tension(s.spectrum.invert(p.mode, l.log-s.shift[p.mode]))/tension - 1
		if slope < 0.5 { // a straight line, where the curve would lead astray
			deviation = 2 * s.residual(p, r.c) / slope
		}
		slopes += slope * slope
		squares += slope * slope * deviation * deviation
	}
	f.peaks /= weight * weight
	f.model /= weight * weight
	if n := float64(len(r.pairs)); n > 1 {
		spread = math.Sqrt(squares / slopes * n / (n - 1))
		f.scatter = max(0, spread*spread/n-f.peaks-f.model)
	}
	return f, spread
}

// coverage joins the relative variance of a fit of n peaks with that of the
// inputs. It gives the relative standard uncertainty, the factor for 95 %
// coverage and the degrees of freedom that it rests on, 0 for infinitely many.
func coverage(fit, nuisance float64, n int) (relative, factor float64, freedom int) {
	relative = math.Sqrt(fit + nuisance)
	if n > 1 {
		// Welch-Satterthwaite (JCGM 100:2008, G.4.1), the inputs with infinitely
		// many degrees of freedom, cut to a whole number; 1e-9 is for rounding.
		share := fit / (fit + nuisance)
		freedom = int(min(1e6, float64(n-1)/(share*share)+1e-9))
	}
	return relative, StudentQuantile(0.95, freedom), freedom
}

// IdealTension is the tension that the ideal sheet would give for the peaks of
// a reading, each as the mode that it was matched to: their geometric mean,
// N/m. misfit is the largest relative deviation of a peak from it.
func IdealTension(radius, arealDensity float64, matches []Match) (tension, misfit float64) {
	s := IdealSpectrum(radius, arealDensity)
	var sum float64
	places := make([]float64, 0, len(matches))
	for _, m := range matches {
		if id := s.find(m.M, m.N); id >= 0 {
			c := s.invert(id, math.Log(m.Measured))
			places = append(places, c)
			sum += c
		}
	}
	if len(places) == 0 {
		return 0, 0
	}
	mean := sum / float64(len(places))
	for _, c := range places {
		misfit = max(misfit, math.Abs(math.Expm1(c-mean)))
	}
	return s.tension(mean), misfit
}

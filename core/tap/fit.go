package tap

import (
	"math"
	"sort"
)

// reading is one way to read the peaks, while the search goes on.
type reading struct {
	pairs []pair // lowest mode first
	c     float64
	sc    float64 // standard deviation of c from the stated ones
	// logEvidence as odds.go defines it; odds among all rivals.
	logEvidence, odds float64
}

// refine fits c to the pairs and matches again until nothing changes.
func (s *search) refine(c float64) (reading, bool) {
	var last []pair
	for range 20 {
		pairs := s.match(c)
		if len(pairs) == 0 {
			return reading{}, false
		}
		sort.Slice(pairs, func(a, b int) bool { return pairs[a].mode < pairs[b].mode })
		r := reading{pairs: pairs}
		r.c, r.sc = s.fit(pairs)
		if samePairs(pairs, last) {
			r.logEvidence = s.evidence(r)
			return r, true
		}
		last, c = pairs, r.c
	}
	// The matching goes round in a ring between equal neighbours: take it as
	// it stands.
	r := reading{pairs: last}
	r.c, r.sc = s.fit(last)
	r.logEvidence = s.evidence(r)
	return r, true
}

// fit is the weighted least-squares shift: with one unknown on the logarithmic
// scale it is the weighted mean of ln f - ln j, weights 1/s^2.
func (s *search) fit(pairs []pair) (c, sc float64) {
	var sum, weight float64
	for _, p := range pairs {
		w := 1 / (s.lines[p.line].s * s.lines[p.line].s)
		sum += w * s.residual(p, 0)
		weight += w
	}
	return sum / weight, 1 / math.Sqrt(weight)
}

// residual is ln f - ln j - c of a pair.
func (s *search) residual(p pair, c float64) float64 {
	return s.lines[p.line].log - s.modes[p.mode].log - c
}

// fitsBadly reports whether the residuals are larger than the stated scatter
// allows, their chi-squared lying above its 99.9 % point, or whether modes set
// by the person leave most of the other peaks without one.
func (s *search) fitsBadly(r reading) bool {
	if s.pinCount > 0 && len(r.pairs) < len(s.lines)-len(r.pairs) {
		return true
	}
	nu := float64(len(r.pairs) - 1)
	if nu < 1 {
		return false
	}
	var chi2 float64
	for _, p := range r.pairs {
		z := s.residual(p, r.c) / s.lines[p.line].s
		chi2 += z * z
	}
	// Wilson & Hilferty, Proc. Natl Acad. Sci. 17 (1931) 684: the cube root of
	// chi^2/nu is nearly normal. 3.09 is the 99.9 % point of the normal
	// distribution; at nu = 1 the approximation is 1 % low.
	h := 2 / (9 * nu)
	return chi2 > nu*math.Pow(1-h+3.09*math.Sqrt(h), 3)
}

// tension at the shift c, N/m: T = sigma (2 pi a e^c)^2.
func (s *search) tension(c float64) float64 {
	v := 2 * math.Pi * s.q.Radius * math.Exp(c)
	return s.q.ArealDensity * v * v
}

// report turns a reading into figures.
func (s *search) report(r reading) Reading {
	out := Reading{Tension: s.tension(r.c), Odds: r.odds, Matches: []Match{}, Unmatched: []int{}, Missing: []ModeName{}}
	matched := map[int]bool{}
	shown := map[int]bool{}
	var squares float64
	for _, p := range r.pairs {
		l, k := s.lines[p.line], s.modes[p.mode]
		fitted := k.zero * math.Exp(r.c)
		measured := s.q.Peaks[l.peak].Frequency
		m := Match{Peak: l.peak, M: k.m, N: k.n, Measured: measured, Fitted: fitted, Residual: measured/fitted - 1, Tension: s.tension(l.log - k.log)}
		out.Matches = append(out.Matches, m)
		matched[p.line], shown[p.mode] = true, true
		squares += (m.Tension/out.Tension - 1) * (m.Tension/out.Tension - 1)
	}
	for i, l := range s.lines {
		if !matched[i] {
			out.Unmatched = append(out.Unmatched, l.peak)
		}
	}
	for i := range r.pairs[len(r.pairs)-1].mode {
		if !shown[i] {
			out.Missing = append(out.Missing, ModeName{s.modes[i].m, s.modes[i].n})
		}
	}
	// T goes with the square of the frequency: twice the relative deviation.
	n := len(r.pairs)
	relative, factor := 2*r.sc, StudentQuantile(0.95, 0)
	if n > 1 {
		out.Spread = math.Sqrt(squares / float64(n-1))
		relative = max(relative, out.Spread/math.Sqrt(float64(n)))
		factor = StudentQuantile(0.95, n-1)
	}
	out.StandardUncertainty = relative * out.Tension
	out.Low = max(0, out.Tension-factor*out.StandardUncertainty)
	out.High = out.Tension + factor*out.StandardUncertainty
	return out
}

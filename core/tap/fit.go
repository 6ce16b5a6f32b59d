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
	// logEvidence as odds.go defines it, and what of it came from readings
	// merged into this one; odds among all rivals.
	logEvidence, joined, odds float64
	// solved is where on the c axis the modes of the pairs were solved, by mode,
	// for this reading; nil where they were not.
	solved *solved
}

// refine fits c to the pairs and matches again until nothing changes. It leaves
// the view at the c found.
func (s *search) refine(c float64) (reading, bool) {
	var last []pair
	var r reading
	for range 20 {
		s.look(c)
		pairs := s.match()
		if len(pairs) == 0 {
			return reading{}, false
		}
		sort.Slice(pairs, func(a, b int) bool { return pairs[a].mode < pairs[b].mode })
		again := samePairs(pairs, last)
		r = reading{pairs: pairs}
		r.c, r.sc = s.fit(pairs, c)
		if again {
			break
		}
		last, c = pairs, r.c
	}
	// Where the matching goes round in a ring between equal neighbours, it is
	// taken as it stands.
	s.look(r.c)
	r.logEvidence = s.evidence(r)
	return r, true
}

// fit is the weighted least-squares shift from c: with one unknown on the
// logarithmic scale it is, for the ideal sheet, the weighted mean of ln f -
// ln j, weights 1/s^2; in general the same by Gauss-Newton steps, a mode that
// follows the tension less counting by its slope.
func (s *search) fit(pairs []pair, c float64) (fitted, sc float64) {
	weights := make([]float64, len(pairs))
	for i, p := range pairs {
		weights[i] = 1 / s.spread(p)
	}
	var weight float64
	for range 30 {
		var sum float64
		weight = 0
		for i, p := range pairs {
			y, slope := s.curveAt(p.mode, c)
			slope = max(slope, flattest)
			sum += weights[i] * slope * (s.lines[p.line].log - y)
			weight += weights[i] * slope * slope
		}
		step := min(0.5, max(-0.5, sum/weight))
		c += step
		if math.Abs(step) < 1e-12 {
			break
		}
	}
	return c, 1 / math.Sqrt(weight)
}

// flattest is the smallest slope, d ln f / d c, that a mode counts with: one
// that a cavity rules says next to nothing of the tension.
const flattest = 1e-3

// residual is ln f of a pair's peak less ln f of its mode at c.
func (s *search) residual(p pair, c float64) float64 {
	y, _ := s.curveAt(p.mode, c)
	return s.lines[p.line].log - y
}

// fitsBadly reports whether the residuals are larger than the stated scatter
// allows, their chi-squared lying above its 99.9 % point, or whether modes set
// by the person leave most of the other peaks without one. The view is at the
// reading.
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
		z := s.residual(p, r.c)
		chi2 += z * z / s.spread(p)
	}
	// Wilson & Hilferty, Proc. Natl Acad. Sci. 17 (1931) 684: the cube root of
	// chi^2/nu is nearly normal. 3.09 is the 99.9 % point of the normal
	// distribution; at nu = 1 the approximation is 1 % low.
	h := 2 / (9 * nu)
	return chi2 > nu*math.Pow(1-h+3.09*math.Sqrt(h), 3)
}

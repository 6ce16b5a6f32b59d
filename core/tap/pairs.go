package tap

import (
	"math"
	"sort"
)

// pinPairs says which of a split pair a pinned peak is: of two peaks the higher
// is the upper, and one by itself is the one nearer to where the other pinned
// peaks put the tension, or else the nominal one.
func (s *search) pinPairs() {
	var places []float64
	upper := make([]int, len(s.lines)) // the upper of the pair, or -1
	for i, l := range s.lines {
		upper[i] = -1
		if l.pin < 0 {
			continue
		}
		name := s.spectrum.modes[l.pin]
		if upper[i] = s.spectrum.findOf(name.M, name.N, true); upper[i] < 0 {
			places = append(places, s.spectrum.invert(l.pin, l.log))
		}
	}
	middle := s.c0
	if len(places) > 0 {
		sort.Float64s(places)
		middle = places[len(places)/2]
	}
	for i := range s.lines {
		if upper[i] < 0 {
			continue
		}
		l := &s.lines[i]
		below, above := false, false // the other peak of the pair
		for j := range s.lines {
			if j != i && upper[j] == upper[i] {
				below, above = below || j < i, above || j > i
			}
		}
		far := func(id int) float64 { return math.Abs(s.spectrum.invert(id, l.log) - middle) }
		if below || !above && far(upper[i]) < far(l.pin) {
			l.pin = upper[i]
		}
	}
}

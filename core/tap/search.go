package tap

import (
	"math"
	"sort"
)

// line is one used peak on the logarithmic scale, where a change of tension
// shifts all modes of the ideal sheet alike: ln f = ln j + c with
//
//	c = ln( sqrt(T/sigma) / (2 pi a) )
//
// and those of the real diaphragm nearly so.
type line struct {
	peak int     // index in the question
	log  float64 // ln f
	// s is the relative standard deviation about the model: the model
	// error alone where the peak states no uncertainty; logS its logarithm.
	s, logS float64
	u       float64 // what the peak itself states
	pin     int     // index of the mode it is pinned to, or -1
}

// search holds what one Read needs.
type search struct {
	q        Question
	spectrum *Spectrum
	lines    []line  // lowest first
	c0       float64 // c of the nominal tension
	reach    float64 // largest |c - c0| looked at
	pinCount int
	best     runningBest // working memory of match
	view     view
	// shift moves the curves of modes to where they were solved exactly, by
	// mode; unused where the spectrum is fixed.
	shift []float64
	exact []bool
}

func newSearch(q Question, o Options) *search {
	s := &search{
		q: q, spectrum: q.Spectrum,
		c0:    q.Spectrum.position(q.Nominal),
		reach: 0.5 * math.Log(o.Widest),
		view:  newView(q.Spectrum),
		shift: make([]float64, len(q.Spectrum.modes)),
		exact: make([]bool, len(q.Spectrum.modes)),
	}
	for i, p := range q.Peaks {
		if !p.Use {
			continue
		}
		l := line{peak: i, log: math.Log(p.Frequency), u: p.Uncertainty / p.Frequency, pin: -1}
		l.s = math.Hypot(o.ModelError, l.u)
		l.logS = math.Log(l.s)
		if p.N > 0 {
			l.pin = s.spectrum.find(p.M, p.N)
			s.pinCount++
		}
		s.lines = append(s.lines, l)
	}
	sort.SliceStable(s.lines, func(a, b int) bool { return s.lines[a].log < s.lines[b].log })
	s.pinPairs()
	return s
}

func (s *search) allPinned() bool { return s.pinCount == len(s.lines) }

// start is a place on the c axis where several peaks meet modes.
type start struct {
	c, score float64
}

// No more than mostStarts are fitted, and none whose estimate lies more than
// hopeless below the best one: the estimate errs by far less, and e^-30 is
// nothing among odds.
const (
	mostStarts = 300
	hopeless   = 30
)

// starts finds where to fit. Every pair of a peak and a mode votes for the c at
// which the one is the other; a window that slides along the c axis counts how
// many peaks vote within it. The windows are ranked by a first estimate of the
// evidence, and only the best of any neighbourhood is kept.
func (s *search) starts() []start {
	if s.pinCount > 0 {
		// The pinned peaks say where; they are fitted together later.
		sum, weight := 0.0, 0.0
		for _, l := range s.lines {
			if l.pin >= 0 {
				w := 1 / (l.s * l.s)
				sum, weight = sum+w*s.spectrum.invert(l.pin, l.log), weight+w
			}
		}
		return []start{{c: sum / weight}}
	}
	type vote struct {
		c    float64
		line int
	}
	var votes []vote
	for i, l := range s.lines {
		for id := range s.spectrum.modes {
			if c := s.spectrum.invert(id, l.log); math.Abs(c-s.c0) <= s.reach && l.log <= s.spectrum.limit(c) {
				votes = append(votes, vote{c, i})
			}
		}
	}
	sort.Slice(votes, func(a, b int) bool { return votes[a].c < votes[b].c })
	spreads := make([]float64, len(s.lines))
	for i, l := range s.lines {
		spreads[i] = l.s
	}
	sort.Float64s(spreads)
	window := 4 * spreads[len(spreads)/2]
	// Mode id lies below the highest line where c is at most tops[id].
	top := s.lines[len(s.lines)-1].log
	tops := make([]float64, len(s.spectrum.modes))
	for id := range tops {
		tops[id] = s.spectrum.invert(id, top+0.01)
	}
	sort.Float64s(tops)
	var all []start
	counts := make([]int, len(s.lines))
	distinct, end := 0, 0
	for begin := range votes {
		for end < len(votes) && votes[end].c <= votes[begin].c+window {
			if counts[votes[end].line]++; counts[votes[end].line] == 1 {
				distinct++
			}
			end++
		}
		c := 0.5 * (votes[begin].c + votes[end-1].c)
		inBand := len(tops) - sort.SearchFloat64s(tops, c)
		limit := s.spectrum.limit(c)
		beyond := len(s.lines) - sort.Search(len(s.lines), func(i int) bool { return s.lines[i].log > limit })
		score := logShown(min(distinct, inBand), inBand) + float64(distinct)*math.Log(0.4/window) +
			float64(len(s.lines)-distinct)*logForeign + float64(beyond)*(logBeyond-logForeign) + s.logPrior(c)
		all = append(all, start{c, score})
		if counts[votes[begin].line]--; counts[votes[begin].line] == 0 {
			distinct--
		}
	}
	sort.Slice(all, func(a, b int) bool {
		if all[a].score != all[b].score {
			return all[a].score > all[b].score
		}
		return all[a].c < all[b].c
	})
	var kept []start
	for _, candidate := range all {
		if candidate.score < all[0].score-hopeless {
			break
		}
		near := false
		for _, k := range kept {
			if near = math.Abs(k.c-candidate.c) < window/2; near {
				break
			}
		}
		if !near {
			if kept = append(kept, candidate); len(kept) == mostStarts {
				break
			}
		}
	}
	return kept
}

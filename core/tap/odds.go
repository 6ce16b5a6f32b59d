package tap

import (
	"math"
	"sort"
)

// What peaks and modes are taken to do, for the odds. The shape of the model
// is that of data association in tracking: each mode in the band shows a peak
// or not, foreign peaks come at a rate (D. B. Reid, IEEE Trans. Automatic
// Control 24 (1979) 843-854); the figures are our own.
const (
	// foreignRate is the expected number of foreign peaks per unit of ln f,
	// one in about seven octaves.
	foreignRate = 0.2
	// otherRate is the expected number of peaks per unit of ln f, where the
	// modes have nothing to do with them.
	otherRate = 3
	// narrowest span of ln f in which peaks are looked for, an octave.
	narrowestSpan = 0.7
)

var logForeign = math.Log(foreignRate)

// logBeyond is for peaks above the frequency to which the modes are known: it
// says neither that they are foreign nor that they are not.
var logBeyond = math.Log(otherRate)

// evidence is the logarithm of the probability density of the peaks, under a
// reading, with the unknown tension and the unknown share of modes that show
// integrated out:
//
//	p(c) sqrt(2 pi) s_c x prod N(residual) x foreign^u x B(k+1, K-k+1)
//
// for k pairs, u unmatched peaks and K modes up to the highest one matched, at
// the place of the view.
// The last factor lets a reading pay for modes that should show and do not,
// which is what keeps low tensions, with their many modes, from explaining
// everything.
func (s *search) evidence(r reading) float64 {
	k, inBand := len(r.pairs), 0
	log := s.logPrior(r.c) + math.Log(math.Sqrt(2*math.Pi)*r.sc) + s.logUnmatched(r.pairs, s.view.limit)
	for _, p := range r.pairs {
		inBand = max(inBand, 1+s.view.rank[p.mode])
		log += s.logDensity(p, s.residual(p, r.c))
	}
	return log + logShown(k, inBand)
}

// logUnmatched is what the peaks without a mode cost.
func (s *search) logUnmatched(pairs []pair, limit float64) float64 {
	log := float64(len(s.lines)-len(pairs)) * logForeign
	if s.lines[len(s.lines)-1].log <= limit {
		return log
	}
	matched := make(map[int]bool, len(pairs))
	for _, p := range pairs {
		matched[p.line] = true
	}
	for i, l := range s.lines {
		if l.log > limit && !matched[i] {
			log += logBeyond - logForeign
		}
	}
	return log
}

// logShown is ln B(k+1, K-k+1): the probability that just these k of K modes
// show, when any share of modes that show is equally likely beforehand.
func logShown(k, inBand int) float64 {
	a, _ := math.Lgamma(float64(k + 1))
	b, _ := math.Lgamma(float64(inBand - k + 1))
	c, _ := math.Lgamma(float64(inBand + 2))
	return a + b - c
}

// logPrior is the logarithm of the density of c before the tap. The tension
// was meant to be the nominal one, but a factor of two counts only half: a
// Cauchy density in ln T of half-width ln 2 (c moves by half of ln T).
func (s *search) logPrior(c float64) float64 {
	const width = math.Ln2 / 2
	x := (c - s.c0) / width
	return -math.Log(math.Pi * width * (1 + x*x))
}

// logOther is the evidence for peaks that the modes do not explain:
// they come at an unknown rate, exponentially distributed about otherRate.
//
//	integral of rate^P exp(-rate W) exp(-rate/otherRate)/otherRate d rate
func (s *search) logOther() float64 {
	count := float64(len(s.lines))
	span := max(narrowestSpan, s.lines[len(s.lines)-1].log-s.lines[0].log)
	factorial, _ := math.Lgamma(count + 1)
	return factorial - math.Log(otherRate) - (count+1)*math.Log(span+1/float64(otherRate))
}

// readings returns the rivals, most likely first, and the odds that the modes
// explain nothing.
func (s *search) readings() (found []reading, lost float64, err error) {
	for _, start := range s.starts() {
		if r, ok := s.refine(start.c); ok && (s.pinCount > 0 || math.Abs(r.c-s.c0) <= s.reach+0.01) {
			found = append(found, r)
		}
	}
	found = merge(found)
	if found, err = s.sharpen(found); err != nil {
		return nil, 0, err
	}
	other := s.logOther()
	if s.pinCount > 0 { // the person says that the sheet explains them
		other = math.Inf(-1)
	}
	top := other
	for _, r := range found {
		top = max(top, r.logEvidence)
	}
	total := math.Exp(other - top)
	for _, r := range found {
		total += math.Exp(r.logEvidence - top)
	}
	for i := range found {
		found[i].odds = math.Exp(found[i].logEvidence-top) / total
	}
	sort.SliceStable(found, func(a, b int) bool { return found[a].odds > found[b].odds })
	return found, math.Exp(other-top) / total, nil
}

// merge joins readings of nearly the same tension: within 1 % of T, or within
// two of its standard deviations. The best one stays and takes their evidence.
// They come back most likely first.
func merge(found []reading) []reading {
	sort.Slice(found, func(a, b int) bool {
		if found[a].logEvidence != found[b].logEvidence {
			return found[a].logEvidence > found[b].logEvidence
		}
		return found[a].c < found[b].c
	})
	var different, kept []reading
	for _, r := range found {
		again := false // found from another start already
		for i := 0; i < len(different) && !again; i++ {
			again = samePairs(different[i].pairs, r.pairs)
		}
		if !again {
			different = append(different, r)
		}
	}
next:
	for _, r := range different {
		for i := range kept {
			if math.Abs(kept[i].c-r.c) < max(0.005, 2*kept[i].sc) {
				kept[i].join(r.logEvidence)
				continue next
			}
		}
		kept = append(kept, r)
	}
	return kept
}

func samePairs(a, b []pair) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if a[i] != b[i] {
			return false
		}
	}
	return true
}

// join adds the evidence of a reading of nearly the same tension.
func (r *reading) join(logEvidence float64) {
	sum := logAdd(r.logEvidence, logEvidence)
	r.joined += sum - r.logEvidence
	r.logEvidence = sum
}

// logAdd is ln(e^a + e^b) for a >= b or not.
func logAdd(a, b float64) float64 {
	if a < b {
		a, b = b, a
	}
	return a + math.Log1p(math.Exp(b-a))
}

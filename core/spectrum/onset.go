package spectrum

import (
	"math"
	"slices"
)

// How a strike is told from the sound before it. Common practice in kind; the figures are ours.
const (
	frameSeconds  = 0.010 // energy is taken over this long
	hopSeconds    = 0.0025
	lookBack      = 0.060 // and compared with the largest this long before: half a period of 8 Hz
	strikeRise    = 4.0   // rise of energy against lookBack that makes a strike (6 dB)
	overQuiet     = 10.0  // and against the quiet parts (10 dB)
	underLoudest  = 1e-3  // and not less than this below the loudest frame (30 dB)
	holdSeconds   = 0.100 // no second strike sooner
	settleSeconds = 0.005 // left out after a strike: the touch of the finger or mallet
	risenShare    = 0.1   // a strike starts where the sample first reaches this share of its peak
	atCutShare    = 0.05  // energy of the first frame against the loudest: it begins in the strike
	quietQuantile = 0.1   // share of frames taken for the quiet parts
)

// strikes is what onset detection found.
type strikes struct {
	at      []int   // first samples of the strikes
	quiet   float64 // mean square of the quiet parts
	cutIn   bool    // the first strike was under way when the recording began
	loudest float64 // mean square of the loudest frame
}

// findStrikes looks for sudden rises of energy in x (its mean taken off).
func findStrikes(x []float64, rate float64) strikes {
	hop := max(1, int(hopSeconds*rate))
	frame := max(hop, int(frameSeconds*rate))
	if len(x) < frame {
		return strikes{}
	}
	e := frameEnergies(x, frame, hop)
	s := strikes{loudest: slices.Max(e)}
	sorted := slices.Clone(e)
	slices.Sort(sorted)
	s.quiet = sorted[int(quietQuantile*float64(len(sorted)))]
	if s.loudest == 0 {
		return s
	}
	back := int(lookBack * rate / float64(hop))
	apart := (frame + hop - 1) / hop
	hold := int(holdSeconds * rate)
	if e[0] >= atCutShare*s.loudest && e[0] >= overQuiet*s.quiet {
		s.at, s.cutIn = append(s.at, 0), true
	}
	for k := 1; k < len(e); k++ {
		before := 0.0
		for j := max(0, k-back); j <= k-apart; j++ {
			before = max(before, e[j])
		}
		if k < apart {
			before = e[0]
		}
		rises := e[k] > strikeRise*before && e[k] > overQuiet*s.quiet && e[k] > underLoudest*s.loudest
		if !rises || (len(s.at) > 0 && k*hop-s.at[len(s.at)-1] < hold) {
			continue
		}
		s.at = append(s.at, strikeStart(x, k*hop, frame, rate, math.Sqrt(s.quiet)))
	}
	return s
}

func frameEnergies(x []float64, frame, hop int) []float64 {
	e := make([]float64, (len(x)-frame)/hop+1)
	for k := range e {
		s := 0.0
		for _, v := range x[k*hop : k*hop+frame] {
			s += v * v
		}
		e[k] = s / float64(frame)
	}
	return e
}

// strikeStart returns the first sample near the frame at from that stands out both of the quiet
// and of what follows.
func strikeStart(x []float64, from, frame int, rate, quiet float64) int {
	lo, hi := max(0, from-frame), min(len(x), from+frame+int(0.02*rate))
	peak := 0.0
	for _, v := range x[lo:hi] {
		peak = max(peak, math.Abs(v))
	}
	limit := max(risenShare*peak, min(4*quiet, peak/2))
	for i, v := range x[lo:hi] {
		if math.Abs(v) >= limit {
			return lo + i
		}
	}
	return from
}

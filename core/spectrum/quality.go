package spectrum

import "math"

// Below this peak the strike uses fewer than nine bits of a 16-bit converter (-42 dB).
const quietPeak = 1.0 / 128

// quietRise is the smallest energy ratio of the strike to the quiet before or after it that is
// not called too quiet (20 dB).
const quietRise = 100.0

// level describes the stretch used.
type level struct {
	peak    float64 // largest magnitude, in parts of full scale
	share   float64 // of samples at full scale
	clipped bool    // two of them in a row: one alone may be a recording scaled to its peak
}

// measure looks at the raw samples: every channel that went into the mix counts.
func measure(channels [][]float64, from, to int, fullScale float64) level {
	var l level
	at := 0
	for _, c := range channels {
		before := false
		for _, v := range c[from:to] {
			m := math.Abs(v)
			l.peak = max(l.peak, m)
			full := m >= fullScale
			if full {
				at++
				l.clipped = l.clipped || before
			}
			before = full
		}
	}
	if n := (to - from) * len(channels); n > 0 {
		l.share = float64(at) / float64(n)
	}
	return l
}

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
	clipped float64 // share of samples at full scale
}

// measure looks at the raw samples: every channel that went into the mix counts.
func measure(channels [][]float64, from, to int, fullScale float64) level {
	var l level
	at := 0
	for _, c := range channels {
		for _, v := range c[from:to] {
			m := math.Abs(v)
			l.peak = max(l.peak, m)
			if m >= fullScale {
				at++
			}
		}
	}
	if n := (to - from) * len(channels); n > 0 {
		l.clipped = float64(at) / float64(n)
	}
	return l
}

package spectrum

import "math"

// The running median's half width follows the frequency, so that the rising floor at low
// frequencies is followed, between these bounds.
const (
	floorWidest   = 100.0 // Hz
	floorFewest   = 16.0  // natural bins to each side, for a median of at least some 32 values
	floorPerHz    = 0.5   // share of the frequency
	medianToMean  = 1 / math.Ln2
	leastUnmasked = 0.25 // share of bins that must be left for a median
)

// noiseFloor writes to dst the mean power of the noise at each bin of power, from running
// medians: for Gaussian noise a bin's power is exponentially distributed, with median ln 2
// times its mean. Bins where masked is true do not count (masked may be nil). step is the
// distance of bins in Hz and natural that of the unpadded length. Of bins closer together than
// natural ones only as many are taken as there are natural ones: the others tell nothing new.
func (a *Analyzer) noiseFloor(dst, power []float64, masked []bool, step, natural float64) []float64 {
	dst = resize(dst, len(power))
	half := func(k int) int {
		f := float64(k) * step
		h := max(min(floorPerHz*f, floorWidest), floorFewest*natural)
		return max(1, int(h/step))
	}
	stride := max(1, int(natural/step))
	at, level := 0, math.Log(a.medianAround(power, masked, 0, half(0), stride))
	dst[0] = math.Exp(level)
	for at < len(power)-1 {
		next := min(at+max(1, half(at)/4), len(power)-1)
		nextLevel := math.Log(a.medianAround(power, masked, next, half(next), stride))
		// A straight line in decibels; the factor is set afresh at every median, so rounding does
		// not pile up.
		p, rise := math.Exp(level), math.Exp((nextLevel-level)/float64(next-at))
		for k := at + 1; k <= next; k++ {
			p *= rise
			dst[k] = p
		}
		at, level = next, nextLevel
	}
	return dst
}

// leastPower keeps logarithms finite in digital silence: -400 dB of full scale.
const leastPower = 1e-40

// medianAround returns the mean noise power by the median of the unmasked bins within half of k.
func (a *Analyzer) medianAround(power []float64, masked []bool, k, half, stride int) float64 {
	lo, hi := max(0, k-half), min(len(power)-1, k+half)
	take := func(all bool) {
		a.scratch = a.scratch[:0]
		for i := lo; i <= hi; i += stride {
			if all || masked == nil || !masked[i] {
				a.scratch = append(a.scratch, power[i])
			}
		}
	}
	take(false)
	if float64(len(a.scratch)) < leastUnmasked*float64((hi-lo)/stride+1) {
		take(true)
	}
	return max(medianToMean*selectNth(a.scratch, len(a.scratch)/2), leastPower)
}

// selectNth returns the n-th smallest of x, from 0, and reorders x.
func selectNth(x []float64, n int) float64 {
	// Hoare, "Algorithm 65: Find", Comm. ACM 4 (1961) 321.
	lo, hi := 0, len(x)-1
	for lo < hi {
		pivot := x[n]
		i, j := lo, hi
		for i <= j {
			for x[i] < pivot {
				i++
			}
			for x[j] > pivot {
				j--
			}
			if i <= j {
				x[i], x[j] = x[j], x[i]
				i++
				j--
			}
		}
		if j < n {
			lo = i
		}
		if i > n {
			hi = j
		}
	}
	return x[n]
}

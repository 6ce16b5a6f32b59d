package spectrum

import (
	"cmp"
	"math"

	"hoopsheet/core/internal/sorting"
)

// saddleDrop is how far the spectrum must fall (power ratio, 3 dB) on both sides of a top before
// it rises above it again. Two steady tones 1.5 bins apart under Hann show at least that.
const saddleDrop = 2.0

// lobeMargin is the power ratio (6 dB) by which a weak top must pass the side lobes of stronger ones:
// a top may stand on a lobe, which doubles its magnitude.
const lobeMargin = 4.0

// mostTops bounds how many local maxima of a spectrum are looked into.
const mostTops = 400

// top is a local maximum of a power spectrum that stands out.
type top struct {
	bin   int
	power float64
}

// findTops writes to dst the local maxima of power in bins lo to hi that stand ratio times above
// the floor, fall off to both sides, and are no side lobe of a stronger one; strongest first.
// natural is the distance of natural bins in bins.
func findTops(dst []top, power, floor []float64, lo, hi int, ratio, natural float64, w Window) []top {
	dst = dst[:0]
	for k := max(lo, 1); k <= min(hi, len(power)-2); k++ {
		p := power[k]
		if p > power[k-1] && p >= power[k+1] && p > ratio*floor[k] && fallsOff(power, k, -1) && fallsOff(power, k, 1) {
			dst = append(dst, top{k, p})
		}
	}
	sorting.By(dst, func(a, b top) int { return cmp.Compare(b.power, a.power) })
	dst = dst[:min(len(dst), mostTops)]
	kept := dst[:0]
	for _, t := range dst {
		if !isSideLobe(kept, t, natural, w) {
			kept = append(kept, t)
		}
	}
	return kept
}

// fallsOff reports whether the spectrum falls below power[k]/saddleDrop before it exceeds power[k].
func fallsOff(power []float64, k, step int) bool {
	p := power[k]
	for i := k + step; i >= 0 && i < len(power); i += step {
		if power[i] > p {
			return false
		}
		if power[i]*saddleDrop < p {
			return true
		}
	}
	return false
}

// isSideLobe reports whether the side lobes of stronger tops, all adding up, may be the top t.
func isSideLobe(stronger []top, t top, natural float64, w Window) bool {
	sum := 0.0
	for _, s := range stronger {
		sum += math.Sqrt(s.power) * w.envelope(float64(t.bin-s.bin)/natural)
	}
	return t.power < lobeMargin*sum*sum
}

// maskTops marks the bins around each top down to where its slope meets four times the floor or
// rises again, so that tones do not lift the median.
func maskTops(dst []bool, tops []top, power, floor []float64) []bool {
	if cap(dst) < len(power) {
		dst = make([]bool, len(power))
	}
	dst = dst[:len(power)]
	clear(dst)
	for _, t := range tops {
		for _, step := range []int{-1, 1} {
			least := math.Inf(1)
			for i := t.bin; i >= 0 && i < len(power); i += step {
				if power[i] < 4*floor[i] || power[i] > saddleDrop*least {
					break
				}
				least = min(least, power[i])
				dst[i] = true
			}
		}
	}
	return dst
}

package bessel

import "math"

// JSeq fills dst with J_0(x), J_1(x), ... J_{len(dst)-1}(x) in one stable sweep
// of the recurrence in compensated arithmetic. The time is proportional to
// len(dst), plus some seventy orders where x < 25 or len(dst) > x.
//
// Domain, limits, signs and accuracy are those of JInt; the length is not
// bounded by MaxOrder. It does not allocate.
func JSeq(dst []float64, x float64) {
	switch {
	case len(dst) == 0:
		return
	case math.IsNaN(x):
		for k := range dst {
			dst[k] = x
		}
		return
	case x == 0 || math.IsInf(x, 0):
		clear(dst)
		if x == 0 {
			dst[0] = 1
		}
		return
	case x < 0:
		JSeq(dst, -x)
		for k := 1; k < len(dst); k += 2 {
			dst[k] = -dst[k]
		}
		return
	}
	switch {
	case x < 0x1p-60:
		seqSeries(dst, x)
	case x >= hankelMin && float64(len(dst)-1) <= x:
		seqForward(dst, x)
	default:
		seqBackward(dst, x)
	}
}

// seqSeries fills dst term by term for so small an x that at most twenty
// orders do not underflow.
func seqSeries(dst []float64, x float64) {
	for k := range dst {
		h, l := jSeries(float64(k), x)
		dst[k] = h + l
		if dst[k] == 0 {
			clear(dst[k:])
			return
		}
	}
}

// seqForward fills dst from J_0 and J_1 upwards, stable while n <= x.
func seqForward(dst []float64, x float64) {
	ah, al, bh, bl := hankelJ(0, x)
	ih, il := invDD(x)
	dst[0] = ah + al
	for k := 1; k < len(dst); k++ {
		dst[k] = bh + bl
		h, l := step(float64(k), 0, ih, il, bh, bl, ah, al)
		ah, al, bh, bl = bh, bl, h, l
	}
}

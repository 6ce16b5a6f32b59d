package spectrum

import "math"

// decimation returns by how many times fewer samples will do for frequencies up to highest:
// the new rate stays at least three times that, which leaves the filter a transition band as
// wide as the pass band.
func decimation(rate, highest float64) int {
	return max(1, int(rate/(3*highest)))
}

// decimationFilter returns a linear-phase low-pass of odd length for taking every m-th sample:
// a sinc of cut-off 1/(2m) cycles a sample under a Kaiser window for 100 dB.
// With new rate fs the pass band ends at fs/3 and what aliases onto it starts at 2 fs/3.
func decimationFilter(m int) []float64 {
	// Kaiser, "Nonrecursive digital filter design using the I0-sinh window function", IEEE ISCAS
	// 1974: beta = 0.1102 (A - 8.7), length (A - 7.95) / (14.36 df) + 1, df = 1/(3m) cycles.
	const attenuation = 100.0
	beta := 0.1102 * (attenuation - 8.7)
	half := int(math.Ceil((attenuation - 7.95) / 14.36 * 3 * float64(m) / 2))
	h := make([]float64, 2*half+1)
	sum := 0.0
	for i := range h {
		t := float64(i - half)
		s := 1.0
		if t != 0 {
			x := math.Pi * t / float64(m)
			s = math.Sin(x) / x
		}
		u := t / float64(half)
		h[i] = s * besselI0(beta*math.Sqrt(max(0, 1-u*u)))
		sum += h[i]
	}
	for i := range h {
		h[i] /= sum
	}
	return h
}

// besselI0 is the modified Bessel function of order 0 by its power series, for 0 <= x < 12.
func besselI0(x float64) float64 {
	sum, term := 1.0, 1.0
	for k := 1.0; term > 1e-17*sum; k++ {
		term *= x * x / (4 * k * k)
		sum += term
	}
	return sum
}

// decimate writes to dst every m-th sample of x[from:to] after the low-pass, without delay:
// dst[i] belongs to the time of x[from+i*m]. The filter looks beyond from and to where x has
// samples and takes the edge value's place as zero beyond x.
func decimate(dst, x []float64, from, to, m int, h []float64) []float64 {
	n := (to - from + m - 1) / m
	dst = resize(dst, n)
	if m == 1 {
		copy(dst, x[from:to])
		return dst
	}
	half := len(h) / 2
	for i := range dst {
		first := from + i*m - half
		lo, hi := max(0, -first), min(len(h), len(x)-first)
		s := 0.0
		for j, v := range x[first+lo : first+hi] {
			s += v * h[lo+j]
		}
		dst[i] = s
	}
	return dst
}

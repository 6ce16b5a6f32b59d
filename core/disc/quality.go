package disc

import "math"

// Quality says what an analysis leaves out.
type Quality struct {
	// Energy is the integral of f^2 over the disc, from the samples.
	Energy float64
	// Missed is the share of Energy that the coefficients do not carry, from 0
	// to 1. It is a difference of sums, so values below about 1e-14 mean "none".
	Missed float64
	// MissedOrders is the part of Missed in orders above M: raise M. The rest,
	// Missed - MissedOrders, asks for a larger N.
	MissedOrders float64
	// Smooth tells whether the coefficients fall off fast enough, in both m and
	// n, for the series to converge evenly. It is false for a function with a
	// jump or one that is not zero at the rim, and when the band is too small to
	// tell (N < 4; or M < 3 and orders are missed).
	Smooth bool
	// Tail is an estimate, from above, of the largest pointwise error
	// |f - series| anywhere on the disc, for smooth f: the last coefficients are
	// taken to go on falling as they did within the band. It is +Inf when Smooth
	// is false. For a bound that is a theorem see Transform.PointwiseBound.
	Tail float64
}

// quality compares the energies of samples and coefficients.
func (t *Transform) quality(coef []float64, energy, kept float64) Quality {
	q := Quality{Energy: energy, Smooth: true}
	if energy == 0 {
		return q
	}
	q.MissedOrders = share(energy-kept, energy)
	q.Missed = max(share(energy-t.Basis.Energy(coef), energy), q.MissedOrders)
	q.Tail = t.tail(coef, math.Sqrt(energy/math.Pi), q.MissedOrders)
	q.Smooth = !math.IsInf(q.Tail, 1) && !math.IsNaN(q.Tail)
	return q
}

func share(part, whole float64) float64 {
	return min(max(part/whole, 0), 1) // NaN stays NaN
}

// noShare is the share of energy below which a difference of sums means none:
// 2^10 units of its rounding.
const noShare = 0x1p-42

// tail estimates the sum of the sizes of everything beyond the band. Sizes are
// added up in blocks that double in length, (N/4, N/2] and (N/2, N]; under a
// power law the blocks beyond form a geometric series with the ratio of these
// two, and under anything faster they stay below it.
func (t *Transform) tail(coef []float64, rms, missedOrders float64) float64 {
	b := t.Basis
	// Rounding leaves about 2^-50 of the function in a coefficient times
	// 1/J_{m+1}(j_mn)^2 < 2 j_mn; what is below this is noise, not a trend.
	noise := 0x1p-50 * rms * 2 * b.Zero(b.M, b.N)

	var zeros, orders [3]float64 // last block, one before, all
	for m := 0; m <= b.M; m++ {
		top := largestJ(m)
		var row float64
		for n := 1; n <= b.N; n++ {
			k := 2 * (m*b.N + n - 1)
			v := top * math.Hypot(coef[k], coef[k+1])
			row += v
			addBlock(&zeros, v, n, b.N)
		}
		addBlock(&orders, row, m, b.M)
	}
	radial := math.Inf(1)
	if b.N >= 4 {
		radial = extrapolate(zeros, noise*float64(b.N/2*(b.M+1)))
	}
	angular := math.Inf(1)
	if b.M >= 3 {
		angular = extrapolate(orders, noise*float64((b.M/2+1)*b.N))
	} else if missedOrders < noShare {
		angular = 0
	}
	// Beyond both limits at once: in proportion.
	corner := 0.0
	if zeros[2] > 0 {
		corner = radial / zeros[2] * angular
	}
	if math.IsNaN(corner) { // Inf times 0
		corner = math.Inf(1)
	}
	return radial + angular + corner
}

func addBlock(s *[3]float64, v float64, i, last int) {
	s[2] += v
	if 2*i > last {
		s[0] += v
	} else if 4*i > last {
		s[1] += v
	}
}

// extrapolate continues the geometric series whose last two terms are in s.
// Above the ratio 0.9, which is a fall like n^-1.15, the sum is not trusted.
func extrapolate(s [3]float64, noise float64) float64 {
	if s[0] <= noise {
		return s[0]
	}
	ratio := s[0] / s[1]
	if !(ratio < 0.9) {
		return math.Inf(1)
	}
	return s[0] * ratio / (1 - ratio)
}

// largestJ bounds |J_m(x)| for all x.
func largestJ(m int) float64 {
	if m == 0 {
		return 1
	}
	// L. J. Landau, Bessel functions: monotonicity and bounds, J. London Math.
	// Soc. 61 (2000) 197-215, doi:10.1112/S0024610799008352.
	return 0.674886 / math.Cbrt(float64(m))
}

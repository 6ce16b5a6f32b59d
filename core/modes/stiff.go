package modes

import (
	"math"

	"hoopsheet/core/bessel"
)

// Rim says how a stiff sheet is held at the rim.
type Rim string

// The rims. A clamped sheet keeps its slope there, a supported one is free to
// turn. A limp sheet does not tell them apart.
const (
	RimClamped   Rim = "clamped"
	RimSupported Rim = "supported"
)

// Rims lists every rim.
func Rims() []Rim { return []Rim{RimClamped, RimSupported} }

// StiffRoots fills dst with the wave numbers alpha_m1 < alpha_m2 < ... (times
// the radius) of a sheet with bending stiffness D under tension T, in vacuum,
// for m nodal diameters and s = T a^2/D. The shape is
//
//	w = J_m(alpha r) - J_m(alpha) I_m(beta r)/I_m(beta),  beta^2 = alpha^2 + s,
//
// and alpha solves, with L_J = alpha J_m'(alpha)/J_m(alpha) and
// L_I = beta I_m'(beta)/I_m(beta),
//
//	clamped    L_J - L_I = 0
//	supported  L_J - L_I = -(alpha^2 + beta^2)/(1 - nu).
//
// s runs from 0, a plate without tension, to +Inf, the ideal sheet, whose roots
// are the zeros of J_m. Poisson's ratio -0.9 <= nu < 1 counts for a supported rim
// only. The roots are good to a few ulp (TestStiffPublished, TestStiffRitz).
//
// It panics unless m >= 0, s >= 0 and -0.9 <= nu < 1.
func StiffRoots(dst []float64, m int, s, nu float64, rim Rim) []float64 {
	if m < 0 || !(s >= 0) || !(nu >= -0.9 && nu < 1) {
		panic("modes: a stiff sheet needs m >= 0, s >= 0 and -0.9 <= nu < 1")
	}
	if math.IsInf(s, 1) {
		return bessel.ZerosJ(dst, float64(m))
	}
	// Clamped: L_J falls steadily between zeros of J_m and L_I rises with alpha
	// from a positive value, so exactly one root lies between j_mn and
	// j_m,n+1, for every s. Supported: a root cannot meet a zero of J_m, where
	// J_m' does not vanish, nor 0, where the left side exceeds the right for
	// s >= 0 and nu > -1, and two roots cannot meet because the eigenvalues of
	// one order are simple; so each interval from j_m,n-1 (or 0) to j_mn keeps
	// the one root it has in both limits. TestStiffCount counts them.
	zeros := bessel.ZerosJ(make([]float64, len(dst)+1), float64(m))
	for i := range dst {
		lo, hi := zeros[i], zeros[i+1]
		if rim == RimSupported {
			lo, hi = 0, zeros[i]
			if i > 0 {
				lo = zeros[i-1]
			}
		}
		dst[i] = stiffRoot(m, s, nu, rim, lo, hi)
	}
	return dst
}

// stiffRoot returns the root between two neighbouring zeros of J_m.
func stiffRoot(m int, s, nu float64, rim Rim, lo, hi float64) float64 {
	order := float64(m)
	// The equation times J_m, with the sign J_m has in between: positive near
	// lo, negative near hi.
	sign := 1.0
	if bessel.JInt(m, lo+(hi-lo)/2) < 0 {
		sign = -1
	}
	equation := func(alpha float64) float64 {
		beta := math.Sqrt(alpha*alpha + s)
		right := beta * bessel.RatioI(order, beta)
		if rim == RimSupported {
			right -= (2*alpha*alpha + s) / (1 - nu)
		}
		// Divided by a measure of the right side, to keep values of order one.
		scale := sign / (order + alpha + math.Abs(right))
		return scale * (alpha*bessel.JPrime(order, alpha) - right*bessel.JInt(m, alpha))
	}
	if lo == 0 {
		lo = 1e-3 * hi // alpha_m1 > 0.3 for nu > -0.9, and J_m does not underflow here
	}
	return root(equation, lo, hi)
}

// stiffFrequency returns the angular frequency of wave number alpha/a,
//
//	omega = (alpha/a) sqrt((T + D alpha^2/a^2)/sigma),
//
// the dispersion relation of a stiff sheet. Either of T and D may be zero.
func stiffFrequency(alpha, a, T, D, sigma float64) float64 {
	k := alpha / a
	return k * math.Sqrt((T+D*k*k)/sigma)
}

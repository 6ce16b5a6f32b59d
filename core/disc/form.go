package disc

import "math"

// Form returns the quadratic form with symbol k^p between two shapes of one
// family and order,
//
//	integral_0^inf k^p U_i(k) U_j(k) k dk,   U_j(k) = J_b(k) / k^(nu+1),
//
// in closed form and to a few ulp. On the unit disc, with unit coefficients and
// per radial integral (times pi eps_m for the whole disc):
//
//	p =  4   bending, integral of (Laplacian u)^2 (ClampedEdge)
//	p =  2   tension, integral of |grad u|^2:   HeldEdge 1/(2b), diagonal
//	p =  0   mass of the sheet, integral of u^2: HeldEdge 1/(4(b-1)b(b+1)),
//	         next to it 1/(8 b (b+1)(b+2)), tridiagonal
//	p = -1   mass of still fluid of unit density on one baffled face
//	p =  1   twice the static pressure operator of open faces (RootEdge 1/(2b))
//
// and p = -3, -5, ... are the terms in even powers of the wave number when the
// fluid has sound. Where the integral does not converge at k = 0 the value is
// its finite part; it is +Inf where there is none (a logarithm).
//
// Domain: m, i, j >= 0 and p <= 2 nu; beyond that the integral does not exist
// and Form panics.
func (e Edge) Form(m, i, j, p int) float64 {
	if m < 0 || i < 0 || j < 0 {
		panic(errIndex)
	}
	lambda := int(2*e.Nu()) + 1 - p
	if lambda < 1 {
		panic(errForm)
	}
	return productMoment(e.Order(m, i)+e.Order(m, j), i-j, lambda)
}

// FillForm writes the n by n matrix of Form(m, i, j, p), 0 <= i, j < n, row by
// row to dst, of length n^2.
func (e Edge) FillForm(dst []float64, m, n, p int) {
	if len(dst) != n*n {
		panic(errLength)
	}
	for i := range n {
		for j := range i + 1 {
			v := e.Form(m, i, j, p)
			dst[i*n+j], dst[j*n+i] = v, v
		}
	}
}

// productMoment returns the integral of J_b(k) J_b'(k) k^-lambda over k > 0 for
// b + b' = s, b - b' = 2q and lambda >= 1, or its finite part.
func productMoment(s float64, q, lambda int) float64 {
	// Weber and Schafheitlin's integral, DLMF 10.22.57 with a = b = 1. With q
	// and lambda whole its gamma functions pair off into products.
	d := float64(2 * q)
	half := lambda / 2
	if lambda%2 == 0 {
		// (lambda-1)! 4^L (-1)^q / pi / product over odd o < lambda of
		// (o^2-d^2)(s^2-o^2), L = lambda/2.
		v := 1 / math.Pi
		if q%2 != 0 {
			v = -v
		}
		for l := 1; l <= half; l++ {
			o := float64(2*l - 1)
			f := float64((2*l - 1) * max(2*l-2, 1))
			den := (o - d) * (o + d) * (s - o) * (s + o)
			if den == 0 {
				return math.Inf(1)
			}
			v *= 4 * f / den
		}
		return v
	}
	// binomial(2L, L-q) / [s product over l = 1..L of (s^2 - 4 l^2)], zero for
	// |q| > L, L = (lambda-1)/2.
	if q < 0 {
		q = -q
	}
	if q > half {
		return 0
	}
	v := 1 / s
	for l := 1; l <= half-q; l++ {
		v *= float64(half+q+l) / float64(l)
	}
	for l := 1; l <= half; l++ {
		o := float64(2 * l)
		if s == o {
			return math.Inf(1)
		}
		v /= (s - o) * (s + o)
	}
	return v
}

// OpenCoupling returns the integral of u_j s_q r dr between shape j of family e
// (HeldEdge or ClampedEdge) and shape q of RootEdge, both of order m. It is zero
// for q > j + nu.
func (e Edge) OpenCoupling(m, j, q int) float64 {
	if e != HeldEdge && e != ClampedEdge {
		panic(errEdge)
	}
	if m < 0 || j < 0 || q < 0 {
		panic(errIndex)
	}
	// DLMF 10.22.57 with orders b and m+2q+3/2 and lambda = nu + 3/2:
	//
	//	Gamma(nu+3/2)/2^(nu+3/2) Gamma(n)/Gamma(n+nu+3/2) / [Gamma(3/2-p) Gamma(p+nu+1)],
	//
	// n = m+j+q+1, p = j-q.
	nu := int(e.Nu())
	n := m + j + q + 1
	p := j - q
	if p < -nu {
		return 0
	}
	v := gammaRatio(n)
	for i := 0; i <= nu; i++ {
		v /= float64(n+i) + 0.5
	}
	sqrtPi := math.Sqrt(math.Pi)
	gammaHalf := 0.5 * sqrtPi // Gamma(3/2), times (3/2)(5/2)... to Gamma(nu+3/2)
	for i := 1; i <= nu; i++ {
		gammaHalf *= float64(i) + 0.5
	}
	v *= gammaHalf / (math.Sqrt(8) * float64(int(1)<<nu))
	return v * reciprocalGammas(p, nu)
}

// reciprocalGammas returns 1 / [Gamma(3/2-p) Gamma(p+nu+1)] for p >= -nu.
func reciprocalGammas(p, nu int) float64 {
	if p >= 1 {
		// Reflection: 1/Gamma(3/2-p) = (-1)^(p-1) Gamma(p-1/2) / pi.
		f := float64(p)
		v := 1 / (math.Pi * f * gammaRatio(p) * (f - 0.5))
		for i := 1; i <= nu; i++ {
			v /= f + float64(i)
		}
		if p%2 == 0 {
			v = -v
		}
		return v
	}
	v := 2 / math.Sqrt(math.Pi) // 1/Gamma(3/2)
	for i := 1; i <= -p; i++ {
		v /= float64(i) + 0.5
	}
	for i := 2; i <= nu+p; i++ {
		v /= float64(i)
	}
	return v
}

// FillOpenFluid writes to dst, row by row, the n by n mass matrix of still
// fluid of unit density on both faces of an open disc (no baffle), for shapes
// 0..n-1 of family e and order m. Like Form it is per radial integral and for
// unit radius. Each entry is a finite sum and exact.
func (e Edge) FillOpenFluid(dst []float64, m, n int) {
	if len(dst) != n*n {
		panic(errLength)
	}
	// The pressure difference is expanded in RootEdge, where its operator is
	// diagonal with entries 1/(4 mu): mass = B' diag(4 mu) B.
	nu := int(e.Nu())
	clear(dst)
	col := make([]float64, n)
	for q := 0; q < n+nu; q++ {
		for j := range col {
			col[j] = e.OpenCoupling(m, j, q)
		}
		mu := RootEdge.Order(m, q)
		for i := max(q-nu, 0); i < n; i++ {
			for j := max(q-nu, 0); j <= i; j++ {
				dst[i*n+j] += 4 * mu * col[i] * col[j]
			}
		}
	}
	for i := range n {
		for j := range i {
			dst[j*n+i] = dst[i*n+j]
		}
	}
}

package disc

import "math"

// PointwiseBound returns a bound, for the whole disc, on the error of the series
// for a function f that is zero at the rim and whose Laplacian is square
// integrable:
//
//	|f - series| <= C sqrt(laplacian^2 - L^2),
//
// with laplacian = (integral of (Laplacian f)^2)^(1/2) over the disc given by
// the caller, L the same of the series with the given coefficients, and C a
// constant of the band, 0.2 to 0.6 over the smallest zero left out. It is a
// theorem for exact coefficients; those of Analyse are exact for what the
// grid resolves, so use a grid finer than MinRadii and MinAngles ask (twice, say)
// for an f outside the band. The result is 0 if laplacian is below L.
//
// The first call makes C, in a few milliseconds.
func (t *Transform) PointwiseBound(coef []float64, laplacian float64) float64 {
	if t.tailC == 0 {
		t.tailC = t.tailConstant()
	}
	rest := laplacian*laplacian - t.Basis.Roughness(coef, 2)
	return t.tailC * math.Sqrt(max(rest, 0))
}

// betweenRadii covers the rise of the kernel between the radii where it is
// evaluated; TestTailKernelBetweenRadii finds less than half of it.
const betweenRadii = 1.05

// tailConstant returns C. By Cauchy and Schwarz the part of f outside the band
// is at most the norm of its Laplacian times the root of
//
//	T(r) = sum over the (m, n) left out of phi_mn(r)^2 / (Norm j_mn^4),
//
// cosine and sine together. Over all n the sum is the integral of the square of
// Green's function of order m, known in closed form (green2); the zeros kept
// are taken off, and the orders beyond M are added.
func (t *Transform) tailConstant() float64 {
	top := t.tailKernel(0, func(m, n int) float64 {
		if m == 0 {
			return 1
		}
		return 0
	})
	for i, r := range t.Grid.R {
		v := t.tailKernel(r, func(m, n int) float64 { return t.table.radial.value(m, n, i) })
		top = max(top, v)
	}
	return math.Sqrt(betweenRadii * top)
}

// tailKernel returns T(r); bessel(m, n) is J_m(j_mn r).
func (t *Transform) tailKernel(r float64, bessel func(m, n int) float64) float64 {
	b := t.Basis
	var total float64
	for m := 0; m <= b.M; m++ {
		rest := green2(m, r)
		for n := 1; n <= b.N; n++ {
			k := m*b.N + n - 1
			v := bessel(m, n) / (b.slope[k] * b.zeros[k] * b.zeros[k])
			rest -= 2 * v * v
		}
		if m == 0 {
			rest /= 2
		}
		total += max(rest, 0)
	}
	// green2(m, r) <= r^2/(4 m (m^2-1)), and the sum of 1/(m(m^2-1)) over m > M
	// is 1/(2 M (M+1)).
	from := b.M
	if from == 0 {
		total += green2(1, r)
		from = 1
	}
	total += r * r / (8 * float64(from) * float64(from+1))
	return total / math.Pi
}

// green2 returns the integral over s of G_m(r, s)^2 s, where G_m is Green's
// function of -(Laplacian) for order m on the unit disc with a fixed rim,
// (1/2m) [(r</r>)^m - (r s)^m], or -ln r> for m = 0. By its expansion in Bessel
// functions this is the sum over all n of 2 J_m(j_mn r)^2 / (J_{m+1}(j_mn)^2 j_mn^4).
func green2(m int, r float64) float64 {
	if r == 0 {
		if m == 0 {
			return 0.25
		}
		return 0
	}
	q := r * r
	switch m {
	case 0:
		return (1-q)/4 + q/2*math.Log(r)
	case 1:
		return (q*(1-q)*(1-q)/4 + q*(-math.Log(r)-(1-q)+(1-q*q)/4)) / 4
	}
	f := float64(m)
	p := math.Pow(q, f) // r^(2m)
	in := (1 - p) * (1 - p) * q / (2*f + 2)
	out := (q-p)/(2*f-2) - p*(1-q) + p*(1-p*q)/(2*f+2)
	return (in + out) / (4 * f * f)
}

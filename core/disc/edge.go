package disc

import "math"

// Edge is a family of polynomial shapes on the unit disc, told apart by how
// they meet the rim. With
//
//	b = m + 2j + nu + 1,   m, j = 0, 1, 2, ...
//
// the shapes of order m are
//
//	u_j(r) = c_j r^m (1-r^2)^nu P_j^(m,nu)(1-2r^2),   c_j = j! / (2^nu Gamma(j+nu+1)),
//
// scaled so that the Hankel transform (held by TestHankelTransformOfShapes) is
//
//	integral_0^1 u_j(r) J_m(kr) r dr = J_b(k) / k^(nu+1).
//
// Every integral over the disc, or over the half-space beside it, then becomes
// an integral of two Bessel functions and a power of k: see Form.
type Edge int

const (
	// RootEdge has nu = 1/2: the pressure difference across an open diaphragm.
	RootEdge Edge = iota
	// HeldEdge has nu = 1: a sheet held at the rim. c_j = 1/(2(j+1)).
	HeldEdge
	// ClampedEdge has nu = 2: a stiff sheet clamped at the rim, so that value
	// and slope vanish. c_j = 1/(4(j+1)(j+2)).
	ClampedEdge
)

// Nu returns the exponent of 1-r^2 in the family.
func (e Edge) Nu() float64 {
	switch e {
	case RootEdge:
		return 0.5
	case HeldEdge:
		return 1
	case ClampedEdge:
		return 2
	}
	panic(errEdge)
}

// Order returns b = m + 2j + nu + 1, the order of the Hankel transform of u_j.
func (e Edge) Order(m, j int) float64 { return float64(m+2*j) + e.Nu() + 1 }

// norm returns c_j.
func (e Edge) norm(j int) float64 {
	f := float64(j)
	switch e {
	case RootEdge:
		return gammaRatio(j+1) / math.Sqrt2
	case HeldEdge:
		return 0.5 / (f + 1)
	case ClampedEdge:
		return 0.25 / ((f + 1) * (f + 2))
	}
	panic(errEdge)
}

// Shapes fills dst with u_0(r), u_1(r), ... of order m >= 0 at 0 <= r <= 1. For
// m and j up to 200 the error is below 2e-14 of the largest value of u_j on the
// disc (TestShapesAccuracy); values below 1e-300 may come out as 0. It does not
// allocate.
func (e Edge) Shapes(dst []float64, m int, r float64) {
	if m < 0 {
		panic(errIndex)
	}
	if !(r >= 0 && r <= 1) {
		panic(errRadius)
	}
	if len(dst) == 0 {
		return
	}
	// The recurrence of DLMF 18.9.1-2 written for differences from the value at
	// the centre, or, in the outer half, from the value at the rim: the plain
	// form loses j^2 units in the last place beside both.
	nu := e.Nu()
	rim := (1 - r) * (1 + r)
	a, b, t, sign := float64(m), nu, r*r, 1.0
	if t > 0.5 {
		a, b, t, sign = nu, float64(m), rim, -1
	}
	v := powInt(r, m)
	switch e {
	case RootEdge:
		v *= math.Sqrt(rim)
	case HeldEdge:
		v *= rim
	case ClampedEdge:
		v *= rim * rim
	}
	dst[0] = v * e.norm(0)
	s, d := sign, 0.0
	for j := 1; j < len(dst); j++ {
		n := float64(j)
		w := 2*n + a + b
		den := (n + a) * (n + a + b)
		d = (n+a-1)*(n+b-1)*w/(den*(w-2))*d - (w-1)*w/den*t*v
		v = (n + a) / n * (v + d)
		dst[j] = s * v * e.norm(j)
		s *= sign
	}
}

// gammaRatio returns Gamma(n) / Gamma(n+1/2) for n >= 1, to 2 ulp.
func gammaRatio(n int) float64 {
	// Expansion in 1/z^2, z = n - 1/4: DLMF 5.11.14 with a = 0, b = 1/2. The
	// first term left out is below 2e-18 for n >= 16.
	shift := 1.0
	for n < 16 {
		shift *= (float64(n) + 0.5) / float64(n)
		n++
	}
	z := float64(n) - 0.25
	y := 1 / (64 * z * z)
	sum := 1 - y*(1-y*(10.5-y*(335.5-y*(22540.375-y*(2612302.875-y*464147669.0625)))))
	return shift * sum / math.Sqrt(z)
}

// powInt returns r^m, 0 <= r <= 1, m >= 0, to 1 ulp unless it underflows. Plain
// repeated multiplication would lose m/2 ulp; the product is carried in two
// doubles.
func powInt(r float64, m int) float64 {
	hi, lo := 1.0, 0.0
	baseHi, baseLo := r, 0.0
	for m > 0 {
		if m&1 == 1 {
			hi, lo = mulTwo(hi, lo, baseHi, baseLo)
		}
		baseHi, baseLo = mulTwo(baseHi, baseLo, baseHi, baseLo)
		m >>= 1
	}
	return hi + lo
}

// mulTwo multiplies two sums of two doubles.
func mulTwo(a, al, b, bl float64) (hi, lo float64) {
	// T. J. Dekker, A floating-point technique for extending the available
	// precision, Numer. Math. 18 (1971) 224-242, doi:10.1007/BF01397083. The
	// conversions keep the compiler from fusing the products.
	const split = 1<<27 + 1
	p := float64(a * b)
	c, d := float64(split*a), float64(split*b)
	ah := c - (c - a)
	bh := d - (d - b)
	at, bt := a-ah, b-bh
	e := ((float64(ah*bh) - p) + float64(ah*bt) + float64(at*bh)) + float64(at*bt)
	e += float64(a*bl) + float64(al*b)
	hi = p + e
	return hi, e - (hi - p)
}

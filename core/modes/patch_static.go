package modes

import (
	"math"
	"math/cmplx"
)

// What attached masses do to a sheet shows near them as a logarithm or a kink,
// which smooth functions approach slowly. The static deflection under an even
// tension has it in closed form, by Green's function of the disc,
//
//	G(z, z') = -(1/2 pi) ln |z - z'| + (1/2 pi) ln |1 - z conj z'|,
//
// in units of 1/T, and at the frequencies of interest it is static.

// staticSelf returns the matrix of deflections, as seen by the functionals of a
// patch, under loads like them, times T.
func (a *attachment) staticSelf() []float64 {
	n := len(a.list)
	x := a.harmonicPart(a, func(z, w complex128) float64 {
		return math.Log(cmplx.Abs(1-z*cmplx.Conj(w))) / (2 * math.Pi)
	})
	for i, f := range a.list {
		for j, g := range a.list {
			if f.order == g.order && f.sine == g.sine {
				x[i*n+j] += freeSelf(f, g, a.size)
			}
		}
	}
	return x
}

// freeSelf is the part without the rim of the sheet.
func freeSelf(f, g functional, size float64) float64 {
	l := float64(f.order)
	if f.degree > g.degree {
		f, g = g, f
	}
	logarithm := -math.Log(size) / (2 * math.Pi)
	switch {
	case g.degree == -1: // both along the rim of the patch
		if f.order == 0 {
			return logarithm
		}
		return 1 / (4 * math.Pi * l)
	case f.degree == -1:
		// Inside, a load along the rim gives s^l, orthogonal to all but the first.
		switch {
		case g.degree != g.order:
			return 0
		case f.order == 0:
			return logarithm
		}
		return 1 / (4 * math.Pi * l * math.Sqrt(l+1))
	}
	// The transform of s^l P_j^(l,0)(1-2s^2) is J_b(k)/k, b = degree + 1, so this
	// is the integral of J_b J_b' k^-3, as for the mass of disc.HeldEdge shapes.
	b := float64(f.degree + 1)
	v := 0.0
	switch g.degree - f.degree {
	case 0:
		if b == 1 {
			return 1/(8*math.Pi) + logarithm
		}
		v = 1 / (4 * (b - 1) * b * (b + 1))
	case 2:
		v = 1 / (8 * b * (b + 1) * (b + 2))
	}
	return circle(f.order) / (math.Pi * math.Pi) * v * zernikeNorm(f.order, f.degree) * zernikeNorm(g.order, g.degree)
}

// staticBetween returns the matrix of deflections at a under loads on another
// patch that does not overlap it.
func (a *attachment) staticBetween(b *attachment) []float64 {
	return a.harmonicPart(b, func(z, w complex128) float64 {
		return (math.Log(cmplx.Abs(1-z*cmplx.Conj(w))) - math.Log(cmplx.Abs(z-w))) / (2 * math.Pi)
	})
}

// circlePoints returns how many points on the rim of a patch take a kernel whose
// Fourier terms fall like ratio^l to 1e-12.
func circlePoints(ratio float64, top int) int {
	points := 16
	for points < 128 && (math.Pow(ratio, float64(points-top)) > 1e-12 || points < 2*top+2) {
		points *= 2
	}
	return points
}

// harmonicPart applies the functionals of a and b to a kernel that is harmonic
// in both places.
func (a *attachment) harmonicPart(b *attachment, kernel func(z, w complex128) float64) []float64 {
	// Such a kernel is sum c s^l s'^l' cos l phi cos l' phi' and so on; Fourier
	// sums along the rims of the patches give c. They converge geometrically,
	// slowly only where a rim all but touches another or the image of one.
	top := 0
	for _, f := range append(append([]functional{}, a.list...), b.list...) {
		top = max(top, f.order)
	}
	away := math.Inf(1) // of the image of b from the middle of a, less its radius
	if d := cmplx.Abs(b.centre) + b.size; d > 0 {
		away = 1/d - cmplx.Abs(a.centre)
	}
	if a != b {
		away = math.Min(away, cmplx.Abs(a.centre-b.centre)-math.Max(a.size, b.size))
	}
	points := circlePoints(math.Max(a.size, b.size)/away, top)
	turn := make([]complex128, points)
	for i := range turn {
		turn[i] = cmplx.Rect(1, 2*math.Pi*float64(i)/float64(points))
	}
	// By row: sums over w of kernel times conj(turn)^l.
	inner := make([]complex128, points*(top+1))
	for i, u := range turn {
		z := a.centre + complex(a.size, 0)*u
		for j, v := range turn {
			k := complex(kernel(z, b.centre+complex(b.size, 0)*v)/float64(points), 0)
			for l := range top + 1 {
				inner[i*(top+1)+l] += k * cmplx.Conj(turn[j*l%points])
			}
		}
	}
	// And over z: outer[l, l'] by cosine and sine of a.
	outer := func(f, g functional) float64 {
		sum := 0.0
		for i := range points {
			v := inner[i*(top+1)+g.order]
			x := real(v)
			if g.sine {
				x = -imag(v)
			}
			c := turn[i*f.order%points]
			if f.sine {
				sum += imag(c) * x
			} else {
				sum += real(c) * x
			}
		}
		sum /= float64(points)
		if f.order > 0 {
			sum *= 2
		}
		if g.order > 0 {
			sum *= 2
		}
		return sum
	}
	n := len(b.list)
	x := zeros(len(a.list) * n)
	for j, g := range b.list {
		for i, f := range a.list {
			if weight := f.onHarmonic() * g.onHarmonic(); weight != 0 {
				x[i*n+j] = weight * outer(f, g)
			}
		}
	}
	return x
}

// onHarmonic is the functional of s^l cos l phi.
func (f functional) onHarmonic() float64 {
	switch {
	case f.degree > f.order:
		return 0
	case f.order == 0:
		return 1
	case f.degree == -1:
		return math.Sqrt2 / 2
	}
	return 1 / math.Sqrt(2*float64(f.order+1))
}

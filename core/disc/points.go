package disc

import "math"

// Points synthesises coefficients at scattered points, for instance the history
// of a few points of a vibrating sheet. It holds (M+1) N numbers a point.
type Points struct {
	Basis  *Basis
	count  int
	radial []float64 // J_m(j_mn r), point by point in the order of the zeros
	angle  []pair    // cos and sin of m theta, M+1 a point
}

// NewPoints evaluates the basis at the points (r[i], theta[i]), 0 <= r <= 1.
func NewPoints(b *Basis, r, theta []float64) *Points {
	if len(r) != len(theta) {
		panic(errLength)
	}
	p := &Points{
		Basis:  b,
		count:  len(r),
		radial: make([]float64, 0, len(r)*len(b.zeros)),
		angle:  make([]pair, 0, len(r)*(b.M+1)),
	}
	for i, ri := range r {
		if !(ri >= 0 && ri <= 1) {
			panic(errRadius)
		}
		for k, z := range b.zeros {
			p.radial = append(p.radial, atZero(k/b.N, z, ri))
		}
		for m := 0; m <= b.M; m++ {
			s, c := math.Sincos(float64(m) * theta[i])
			p.angle = append(p.angle, pair{c, s})
		}
	}
	return p
}

// Len returns the number of points.
func (p *Points) Len() int { return p.count }

// Synthesise writes the value of the function with these coefficients at each
// point to dst. It panics unless len(dst) = Len() and len(coef) = Basis.Len().
// It does not allocate.
func (p *Points) Synthesise(dst, coef []float64) {
	b := p.Basis
	if len(dst) != p.count || len(coef) != b.Len() {
		panic(errLength)
	}
	for i := range dst {
		radial := p.radial[i*len(b.zeros):][:len(b.zeros)]
		angle := p.angle[i*(b.M+1):][:b.M+1]
		var sum float64
		for m, a := range angle {
			row := radial[m*b.N:][:b.N]
			c := coef[2*m*b.N:][:2*b.N]
			var cos, sin float64
			for n, v := range row {
				cos += v * c[2*n]
				sin += v * c[2*n+1]
			}
			sum += a.c*cos + a.s*sin
		}
		dst[i] = sum
	}
}

package disc

// Table synthesises coefficients on a polar grid with any radii, for instance
// frame after frame of a vibration for display. Its Bessel functions are
// evaluated once, by NewTable; a frame then costs about 2 M N nr multiplications
// and one Fourier transform a circle, and allocates nothing. A Table has work
// space of its own: one goroutine at a time.
type Table struct {
	Basis  *Basis
	R      []float64 // radii, rising, 0 <= R[i] <= 1
	NTheta int       // angles theta_k = 2 pi k / NTheta

	radial *radialTable
	fft    *RealFFT
	orders []pair       // (M+1) rows of stride values: one order on all radii
	stride int          // nr and a little more, see newTable
	line   []complex128 // one circle's spectrum
}

// NewTable evaluates the basis at the given radii, which must rise and lie in
// 0 <= r <= 1 (the radii are copied). ntheta is even, at least 2M+2, with no
// prime factor of ntheta/2 above 5: see MinAngles and NextAngles.
func NewTable(b *Basis, radii []float64, ntheta int) *Table {
	return newTable(b, radii, ntheta, atZero)
}

func newTable(b *Basis, radii []float64, ntheta int, f radialFunc) *Table {
	for i, r := range radii {
		if !(r >= 0 && r <= 1) || i > 0 && r < radii[i-1] {
			panic(errRadius)
		}
	}
	if ntheta < 2*b.M+2 {
		panic(errFewAngles)
	}
	fft := NewRealFFT(ntheta)
	// A stride that is a multiple of a large power of two would put the same
	// radius of every order in the same few cache lines; three more pairs keep
	// them apart.
	stride := len(radii) + 3
	return &Table{
		Basis:  b,
		R:      append([]float64(nil), radii...),
		NTheta: ntheta,
		radial: newRadialTable(b, radii, f),
		fft:    fft,
		orders: make([]pair, (b.M+1)*stride),
		stride: stride,
		line:   make([]complex128, b.M+1),
	}
}

// Len returns the number of samples of a frame, len(R) NTheta.
func (t *Table) Len() int { return len(t.R) * t.NTheta }

// Synthesise writes to dst the function with these coefficients,
//
//	dst[i*NTheta+k] = sum over m, n of J_m(j_mn R[i]) [a_mn cos(m theta_k) + b_mn sin(m theta_k)].
//
// The rounding error is a few 1e-16 of the sum of sizes of the coefficients; on
// the rim the result is exactly 0. It panics unless len(dst) = Len() and
// len(coef) = Basis.Len(). It does not allocate.
func (t *Table) Synthesise(dst, coef []float64) {
	b := t.Basis
	if len(dst) != t.Len() || len(coef) != b.Len() {
		panic(errLength)
	}
	for m, panels := range t.radial.orders {
		row := t.orders[m*t.stride:][:t.radial.nr]
		clear(row)
		c := coef[2*m*b.N : 2*(m+1)*b.N]
		// The Fourier sum below is a_0 + 2 Re sum (a - i b)/2 exp(i m theta).
		half := 0.5
		if m == 0 {
			half = 1
		}
		for j := range panels {
			var k [4]pair
			for i := range k {
				if at := 2 * (4*j + i); at+1 < len(c) {
					k[i] = pair{half * c[at], -half * c[at+1]}
				}
			}
			panels[j].add(row, &k)
		}
	}
	for i := range t.R {
		at := i
		for m := range t.line {
			v := t.orders[at]
			t.line[m] = complex(v.c, v.s)
			at += t.stride
		}
		t.fft.Inverse(dst[i*t.NTheta:(i+1)*t.NTheta], t.line)
	}
}

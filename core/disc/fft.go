package disc

import "math"

// RealFFT is the Fourier transform of n real samples, along one circle of a
// polar grid or of a recording. The loops are short and flat enough to run well
// as WebAssembly, and only as much of the spectrum is formed as is asked for.
// Its results are held against gonum's dsp/fourier by TestFFTAgainstGonum. One
// RealFFT serves one goroutine at a time.
//
// The length n is even and n/2 has no prime factor above 5; NewRealFFT panics
// otherwise.
type RealFFT struct {
	n      int          // samples on the circle
	stages []fftStage   // factors of n/2
	rot    []complex128 // exp(-2 pi i k/n), k = 0..n/2
	a, b   []complex128 // work, n/2 each
}

// fftStage is one pass of a self-sorting complex transform: radix r, m groups
// of twiddles, stride s.
type fftStage struct {
	r, m, s int
	tw      []complex128 // (r-1) per group
}

// smoothEven reports whether n is a length that RealFFT takes.
func smoothEven(n int) bool {
	if n < 2 || n%2 != 0 {
		return false
	}
	n /= 2
	for _, p := range [...]int{2, 3, 5} {
		for n%p == 0 {
			n /= p
		}
	}
	return n == 1
}

// NewRealFFT prepares the transform of n samples.
func NewRealFFT(n int) *RealFFT {
	if !smoothEven(n) {
		panic(errAngles)
	}
	h := n / 2
	f := &RealFFT{
		n:   n,
		rot: make([]complex128, h+1),
		a:   make([]complex128, h),
		b:   make([]complex128, h),
	}
	for k := range f.rot {
		f.rot[k] = unitRoot(k, n)
	}
	for rest, s := h, 1; rest > 1; {
		r := 4
		for _, c := range [...]int{4, 2, 3, 5} {
			if rest%c == 0 {
				r = c
				break
			}
		}
		m := rest / r
		st := fftStage{r: r, m: m, s: s, tw: make([]complex128, 0, m*(r-1))}
		for p := 0; p < m; p++ {
			for k := 1; k < r; k++ {
				st.tw = append(st.tw, unitRoot(p*k, rest))
			}
		}
		f.stages = append(f.stages, st)
		rest, s = m, s*r
	}
	return f
}

// unitRoot returns exp(-2 pi i k/n), exact at multiples of a quarter turn and
// with its angle folded into the first eighth so that symmetric entries agree
// to the last bit.
func unitRoot(k, n int) complex128 {
	k %= n
	eighths := 8 * k / n
	var re, im float64
	switch eighths {
	case 0:
		im, re = math.Sincos(2 * math.Pi * float64(k) / float64(n))
	case 1, 2:
		re, im = math.Sincos(2 * math.Pi * float64(n-4*k) / float64(4*n))
	case 3, 4:
		im, re = math.Sincos(2 * math.Pi * float64(n-2*k) / float64(2*n))
		re = -re
	case 5, 6:
		re, im = math.Sincos(2 * math.Pi * float64(3*n-4*k) / float64(4*n))
		re, im = -re, -im
	default:
		im, re = math.Sincos(2 * math.Pi * float64(k-n) / float64(n))
	}
	return complex(re, -im)
}

// Forward writes sum_j row[j] exp(-i k theta_j), k = 0..len(dst)-1, to dst.
// len(row) = n and len(dst) <= n/2+1.
func (f *RealFFT) Forward(dst []complex128, row []float64) {
	h := f.n / 2
	a := f.a
	row = row[:2*len(a)]
	for k := range a {
		a[k] = complex(row[2*k], row[2*k+1])
	}
	z := f.run()
	// Untangle the transforms of the even and the odd samples.
	dst[0] = complex(real(z[0])+imag(z[0]), 0)
	for k := 1; k < len(dst) && k < h; k++ {
		p, q := z[k], z[h-k]
		sr, si := real(p)+real(q), imag(p)-imag(q)
		dr, di := real(p)-real(q), imag(p)+imag(q)
		w := f.rot[k]
		wr, wi := real(w), imag(w)
		dst[k] = complex(0.5*(sr+wr*di+wi*dr), 0.5*(si+wi*di-wr*dr))
	}
	if len(dst) == h+1 {
		dst[h] = complex(real(z[0])-imag(z[0]), 0)
	}
}

// Inverse writes src[0] + 2 Re sum_{k>=1} src[k] exp(i k theta_j) to row.
// len(row) = n and len(src) <= n/2; the imaginary part of src[0] is ignored.
func (f *RealFFT) Inverse(row []float64, src []complex128) {
	h := f.n / 2
	a := f.a
	clear(a)
	// The forward transform with real and imaginary parts exchanged is the
	// inverse one, so the parts are written to a exchanged.
	a[0] = complex(real(src[0]), real(src[0]))
	for k := 1; k < len(src); k++ {
		p := src[k]
		pr, pi := real(p), imag(p)
		w := f.rot[k]
		wr, wi := real(w), -imag(w)
		// i W^-k p and its mirror at h-k.
		gr, gi := -(wr*pi + wi*pr), wr*pr-wi*pi
		a[k] += complex(pi+gi, pr+gr)
		a[h-k] += complex(gi-pi, pr-gr)
	}
	z := f.run()
	row = row[:2*len(z)]
	for k := range z {
		row[2*k], row[2*k+1] = imag(z[k]), real(z[k])
	}
}

// run transforms f.a and returns the slice that holds the result (f.a or f.b).
func (f *RealFFT) run() []complex128 {
	// Stockham's self-sorting form: C. Van Loan, Computational Frameworks for
	// the Fast Fourier Transform, SIAM 1992, section 1.7,
	// doi:10.1137/1.9781611970999.
	x, y := f.a, f.b
	for i := range f.stages {
		st := &f.stages[i]
		switch st.r {
		case 4:
			if st.s == 1 {
				pass4First(y, x, st)
			} else {
				pass4(y, x, st)
			}
		case 2:
			pass2(y, x, st)
		case 3:
			pass3(y, x, st)
		default:
			pass5(y, x, st)
		}
		x, y = y, x
	}
	return x
}

// pass4First is pass4 at stride 1.
func pass4First(y, x []complex128, st *fftStage) {
	m := st.m
	x0, x1, x2, x3 := x[:m], x[m:2*m], x[2*m:3*m], x[3*m:4*m]
	for p := 0; p < m && p < len(x0) && p < len(x1) && p < len(x2) && p < len(x3); p++ {
		w := st.tw[3*p : 3*p+3]
		o := y[4*p : 4*p+4]
		a, b, c, d := x0[p], x1[p], x2[p], x3[p]
		sr, si := real(a)+real(c), imag(a)+imag(c)
		dr, di := real(a)-real(c), imag(a)-imag(c)
		tr, ti := real(b)+real(d), imag(b)+imag(d)
		ur, ui := real(b)-real(d), imag(b)-imag(d)
		o[0] = complex(sr+tr, si+ti)
		o[1] = w[0] * complex(dr+ui, di-ur)
		o[2] = w[1] * complex(sr-tr, si-ti)
		o[3] = w[2] * complex(dr-ui, di+ur)
	}
}

func pass4(y, x []complex128, st *fftStage) {
	m, s := st.m, st.s
	for p := 0; p < m; p++ {
		w := st.tw[3*p : 3*p+3]
		w1, w2, w3 := w[0], w[1], w[2]
		x0, x1 := x[s*p:s*p+s], x[s*(p+m):s*(p+m)+s]
		x2, x3 := x[s*(p+2*m):s*(p+2*m)+s], x[s*(p+3*m):s*(p+3*m)+s]
		o := y[4*s*p : 4*s*p+4*s]
		o0, o1, o2, o3 := o[:s], o[s:2*s], o[2*s:3*s], o[3*s:4*s]
		for q := 0; q < s; q++ {
			a, b, c, d := x0[q], x1[q], x2[q], x3[q]
			sr, si := real(a)+real(c), imag(a)+imag(c)
			dr, di := real(a)-real(c), imag(a)-imag(c)
			tr, ti := real(b)+real(d), imag(b)+imag(d)
			ur, ui := real(b)-real(d), imag(b)-imag(d)
			o0[q] = complex(sr+tr, si+ti)
			o1[q] = w1 * complex(dr+ui, di-ur)
			o2[q] = w2 * complex(sr-tr, si-ti)
			o3[q] = w3 * complex(dr-ui, di+ur)
		}
	}
}

func pass2(y, x []complex128, st *fftStage) {
	m, s := st.m, st.s
	for p := 0; p < m; p++ {
		w := st.tw[p]
		x0, x1 := x[s*p:s*p+s], x[s*(p+m):s*(p+m)+s]
		o0, o1 := y[2*s*p:2*s*p+s], y[2*s*p+s:2*s*p+2*s]
		for q := 0; q < s; q++ {
			a, b := x0[q], x1[q]
			o0[q] = a + b
			o1[q] = w * (a - b)
		}
	}
}

func pass3(y, x []complex128, st *fftStage) {
	const h = 0.86602540378443864676 // sin(pi/3)
	m, s := st.m, st.s
	for p := 0; p < m; p++ {
		w1, w2 := st.tw[2*p], st.tw[2*p+1]
		o := y[3*s*p : 3*s*p+3*s]
		for q := 0; q < s; q++ {
			a, b, c := x[s*p+q], x[s*(p+m)+q], x[s*(p+2*m)+q]
			t := b + c
			u := complex(h*(imag(b)-imag(c)), -h*(real(b)-real(c)))
			v := a - complex(0.5*real(t), 0.5*imag(t))
			o[q] = a + t
			o[s+q] = w1 * (v + u)
			o[2*s+q] = w2 * (v - u)
		}
	}
}

func pass5(y, x []complex128, st *fftStage) {
	const (
		c1 = 0.30901699437494742410  // cos(2 pi/5)
		c2 = -0.80901699437494742410 // cos(4 pi/5)
		s1 = 0.95105651629515357212  // sin(2 pi/5)
		s2 = 0.58778525229247312917  // sin(4 pi/5)
	)
	m, s := st.m, st.s
	for p := 0; p < m; p++ {
		w := st.tw[4*p : 4*p+4]
		o := y[5*s*p : 5*s*p+5*s]
		for q := 0; q < s; q++ {
			a := x[s*p+q]
			b, e := x[s*(p+m)+q], x[s*(p+4*m)+q]
			c, d := x[s*(p+2*m)+q], x[s*(p+3*m)+q]
			be, cd := b+e, c+d
			bm, cm := b-e, c-d
			u := complex(real(a)+c1*real(be)+c2*real(cd), imag(a)+c1*imag(be)+c2*imag(cd))
			v := complex(real(a)+c2*real(be)+c1*real(cd), imag(a)+c2*imag(be)+c1*imag(cd))
			// -i (s1 bm + s2 cm) and -i (s2 bm - s1 cm)
			f := complex(s1*imag(bm)+s2*imag(cm), -s1*real(bm)-s2*real(cm))
			g := complex(s2*imag(bm)-s1*imag(cm), -s2*real(bm)+s1*real(cm))
			o[q] = a + be + cd
			o[s+q] = w[0] * (u + f)
			o[2*s+q] = w[1] * (v + g)
			o[3*s+q] = w[2] * (v - g)
			o[4*s+q] = w[3] * (u - f)
		}
	}
}

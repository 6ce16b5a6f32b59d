package spectrum

import (
	"math"

	"hoopsheet/core/disc"
)

// Analyzer holds FFT plans, windows and buffers, so that one after another recording is read
// without new memory. It is not safe for use from several goroutines at once.
type Analyzer struct {
	plans   map[int]*disc.RealFFT
	windows map[windowKey][]float64
	padded  []float64
	bins    []complex128
	scratch []float64

	centred   []float64 // the samples without their mean
	stretch   []float64 // after the strike, at the lower rate
	filter    []float64 // low-pass for taking every filterFor-th sample
	filterFor int
	shifted   []complex128
	narrow    []complex128
	noise     []float64
	rungs     []rung
	masked    []bool
	found     []found
	tones     []tone
}

type windowKey struct {
	window Window
	n      int
}

// NewAnalyzer returns an empty work space.
func NewAnalyzer() *Analyzer {
	return &Analyzer{plans: map[int]*disc.RealFFT{}, windows: map[windowKey][]float64{}}
}

// Power writes the squared magnitudes of the windowed, zero-padded transform
//
//	dst[k] = |sum_i w(i/N) x[i] exp(-2 pi i k i / M)|^2,  k = 0 ... M/2
//
// with N = len(x) and M = padded >= N, and returns dst. If dst is nil or too short, a new one
// is allocated; otherwise nothing is, once a length has been met before. A padded length below
// len(x) or an empty x panics.
func (a *Analyzer) Power(dst, x []float64, padded int, w Window) []float64 {
	if len(x) == 0 || padded < len(x) {
		panic("spectrum: padded length below the number of samples")
	}
	plan := a.plan(padded)
	a.padded = resize(a.padded, padded)
	for i, v := range a.window(w, len(x)) {
		a.padded[i] = v * x[i]
	}
	clear(a.padded[len(x):])
	if cap(a.bins) < padded/2+1 {
		a.bins = make([]complex128, padded/2+1)
	}
	a.bins = a.bins[:padded/2+1]
	plan.Forward(a.bins, a.padded)
	dst = resize(dst, padded/2+1)
	for k, v := range a.bins {
		dst[k] = real(v)*real(v) + imag(v)*imag(v)
	}
	return dst
}

func (a *Analyzer) plan(n int) *disc.RealFFT {
	p := a.plans[n]
	if p == nil {
		if len(a.plans) >= mostPlans {
			clear(a.plans)
		}
		p = disc.NewRealFFT(n)
		a.plans[n] = p
	}
	return p
}

func (a *Analyzer) window(w Window, n int) []float64 {
	key := windowKey{w, n}
	v := a.windows[key]
	if v == nil {
		if len(a.windows) >= mostWindows {
			clear(a.windows)
		}
		v = make([]float64, n)
		w.Fill(v)
		a.windows[key] = v
	}
	return v
}

// An Analyzer forgets its plans and windows when it has met this many lengths: recordings of ever new
// lengths must not fill the memory.
const (
	mostPlans   = 4 * maxRungs
	mostWindows = 200
)

// resize returns x with length n, new only if its capacity does not do.
func resize(x []float64, n int) []float64 {
	if cap(x) < n {
		return make([]float64, n)
	}
	return x[:n]
}

// paddedLength returns the smallest even 2^a 3^b 5^c that is at least 2n: lengths the FFT does
// fast, with bins at most half a natural bin apart.
func paddedLength(n int) int {
	best := math.MaxInt
	for five := 1; five < 4*n; five *= 5 {
		for three := five; three < 4*n; three *= 3 {
			m := 2 * three
			for m < 2*n {
				m *= 2
			}
			best = min(best, m)
		}
	}
	return best
}

package spectrum

import (
	"math"
	"sync"
)

// Window names a window function.
type Window string

// The windows that can be chosen.
const (
	Hann           Window = "hann"            // the default: side lobes fall fast, close neighbours stay apart
	BlackmanHarris Window = "blackman-harris" // four terms: side lobes under -92 dB, half the resolution of Hann
	Rectangular    Window = "rectangular"     // best for one steady tone alone; its side lobes hide weak neighbours
)

// Windows lists every window, the default first.
func Windows() []Window { return []Window{Hann, BlackmanHarris, Rectangular} }

// terms returns the cosine coefficients a_k of the periodic window
//
//	w(x) = sum_k (-1)^k a_k cos(2 pi k x),  0 <= x < 1.
func (w Window) terms() []float64 {
	// Harris, Proc. IEEE 66 (1978) 51-83, table 1 (four-term, minimum side lobe).
	switch w {
	case BlackmanHarris:
		return blackmanHarrisTerms
	case Rectangular:
		return rectangularTerms
	}
	return hannTerms
}

var (
	hannTerms           = []float64{0.5, 0.5}
	blackmanHarrisTerms = []float64{0.35875, 0.48829, 0.14128, 0.01168}
	rectangularTerms    = []float64{1}
)

// blackmanHarrisLobes is -92 dB, the highest side lobe in Harris's table 1.
const blackmanHarrisLobes = 2.5118864315095823e-5

// halfLobe is the distance, in bins of the unpadded length, from the main lobe's top to its foot.
func (w Window) halfLobe() float64 { return float64(len(w.terms())) }

// At returns the window at x in [0, 1), and 0 outside.
func (w Window) At(x float64) float64 {
	if x < 0 || x >= 1 {
		return 0
	}
	s, sign := 0.0, 1.0
	for k, a := range w.terms() {
		s += sign * a * math.Cos(2*math.Pi*float64(k)*x)
		sign = -sign
	}
	return s
}

// Fill writes the periodic window of length len(dst): dst[i] = w(i/len(dst)).
func (w Window) Fill(dst []float64) {
	for i := range dst {
		dst[i] = w.At(float64(i) / float64(len(dst)))
	}
}

// transform returns the spectrum of w(x) exp(-c x) on [0, 1) at a distance of delta bins:
//
//	W(c, delta) = integral_0^1 w(x) exp(-(c + 2 pi i delta) x) dx
//
// For c = 0 its magnitude is the familiar lobe pattern, for c > 0 that of a decaying tone.
func (w Window) transform(c, delta float64) complex128 {
	sum, sign := complex(0, 0), 1.0
	for k, a := range w.terms() {
		d := float64(k)
		sum += complex(sign*a/2, 0) * (ramp(c, delta-d) + ramp(c, delta+d))
		sign = -sign
	}
	return sum
}

// ramp returns the integral of exp(-s x) over [0, 1] with s = c + 2 pi i delta.
func ramp(c, delta float64) complex128 {
	s := complex(c, 2*math.Pi*delta)
	if m := math.Hypot(c, 2*math.Pi*delta); m < 1e-4 {
		return 1 - s/2 + s*s/6 // remainder below |s|^3/24 < 1e-13
	}
	sin, cos := math.Sincos(2 * math.Pi * delta)
	e := math.Exp(-c)
	return (1 - complex(e*cos, -e*sin)) / s
}

// envelope bounds the side lobes of the steady window, relative to the top, at delta bins
// (magnitude, not power). Inside the main lobe it is 0: there two tops are told apart by their saddle.
func (w Window) envelope(delta float64) float64 {
	d := math.Abs(delta)
	if d < w.halfLobe() {
		return 0
	}
	switch w {
	case Rectangular:
		return 1 / (math.Pi * d)
	case BlackmanHarris:
		return blackmanHarrisLobes
	}
	return 1 / (math.Pi * d * (d*d - 1)) // |sinc(d)/(1-d^2)|, sine replaced by 1
}

// moments holds the integrals over [0, 1] that the uncertainty of a frequency needs, for a
// window w and a tone that decays as g(x) = exp(-c x).
type moments struct {
	wg   float64 // integral of w g
	ww   float64 // integral of w^2
	wwtt float64 // integral of w^2 (x - xm)^2, xm the centre of w g
	wgtt float64 // integral of w g (x - xm)^2
}

func (w Window) moments(c float64) moments {
	if c == 0 {
		return w.steadyMoments()
	}
	return w.integrate(c)
}

// steadyMoments are those for c = 0, in closed form with a_k the cosine coefficients:
// integral w = a_0, integral w^2 = a_0^2 + sum a_k^2 / 2, and
// integral cos(2 pi k x) (x - 1/2)^2 = 1 / (2 pi^2 k^2), which is 1/12 for k = 0.
func (w Window) steadyMoments() moments {
	second := func(k int) float64 {
		if k == 0 {
			return 1.0 / 12
		}
		return 1 / (2 * math.Pi * math.Pi * float64(k*k))
	}
	t := w.terms()
	var m moments
	m.wg = t[0]
	for i, p := range t {
		sign := 1.0
		if i%2 == 1 {
			sign = -1
		}
		m.wgtt += sign * p * second(i)
		for j, q := range t {
			pair := 1.0
			if (i+j)%2 == 1 {
				pair = -1
			}
			m.wwtt += pair * p * q / 2 * (second(i+j) + second(max(i-j, j-i)))
		}
		m.ww += p * p / 2
	}
	m.ww += t[0] * t[0] / 2
	return m
}

// momentSteps is the number of steps of the trapezoid rule; see TestMoments for its error.
const momentSteps = 256

// momentTables holds each window's values at the rule's places.
var momentTables = sync.OnceValue(func() map[Window][]float64 {
	all := map[Window][]float64{}
	for _, w := range Windows() {
		t := make([]float64, momentSteps+1)
		w.Fill(t[:momentSteps])
		t[momentSteps] = t[0] // periodic
		all[w] = t
	}
	return all
})

func (w Window) integrate(c float64) moments {
	const n = momentSteps
	table := momentTables()[w]
	var m moments
	var wgt float64
	sum := func(f func(x, win, tone, ends float64)) {
		for i := 0; i <= n; i++ {
			x, ends := float64(i)/n, 1.0/n
			if i == 0 || i == n {
				ends /= 2
			}
			f(x, table[i], math.Exp(-c*x), ends)
		}
	}
	sum(func(x, win, tone, h float64) {
		m.wg += h * win * tone
		m.ww += h * win * win
		wgt += h * win * tone * x
	})
	xm := wgt / m.wg
	sum(func(x, win, tone, h float64) {
		m.wwtt += h * win * win * (x - xm) * (x - xm)
		m.wgtt += h * win * tone * (x - xm) * (x - xm)
	})
	return m
}

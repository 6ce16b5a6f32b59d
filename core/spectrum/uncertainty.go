package spectrum

import (
	"math"
	"math/cmplx"
)

// CramerRao returns the smallest standard deviation, in Hz, that any unbiased estimate of the
// frequency of
//
//	A exp(-d t) cos(2 pi f t + phase) + white Gaussian noise of standard deviation s
//
// can have from n samples at the given rate, A, d, f and phase all unknown:
//
//	u(f) = rate / (2 pi) sqrt( 2 s^2 / (A^2 sum g_i^2 (i - m)^2) ),  g_i = exp(-d i / rate),
//
// m the mean of i weighted by g_i^2. The decay rate's bound is 2 pi times that. It holds for f well
// inside (0, rate/2); for d = 0 it is the familiar sqrt(12 / (SNR n (n^2 - 1))) rad a sample with
// SNR = A^2 / (2 s^2). It returns +Inf for n < 2 or A = 0.
func CramerRao(amplitude, decay, noise float64, n int, rate float64) float64 {
	// Rife & Boorstyn, IEEE Trans. Inf. Theory 20 (1974) 591-598 for d = 0; Yao & Pandit, IEEE
	// Trans. Signal Process. 43 (1995) 878-885 for d > 0. Magnitude and phase separate, so only
	// the mean time has to be taken out.
	keep := math.Exp(-2 * decay / rate)
	var s0, s1, s2 float64
	for i, g := 0, 1.0; i < n && g > 1e-30; i, g = i+1, g*keep {
		t := float64(i)
		s0 += g
		s1 += g * t
		s2 += g * t * t
	}
	return rate / (2 * math.Pi) * math.Sqrt(2*noise*noise/(amplitude*amplitude*(s2-s1*s1/s0)))
}

// tone is what is known of a peak while it is being read.
type tone struct {
	f, amplitude, decay float64
}

// reading is what one rung says about a tone, with the parts of its uncertainty in Hz.
type reading struct {
	tone
	steady      float64 // amplitude of the steady tone that would give the top
	snr         float64 // power over the floor at the top
	noiseSD     float64 // white noise of this standard deviation a sample gives the floor here
	uNoise      float64
	uParabola   float64
	uNeighbours float64
	seconds     float64
	natural     float64 // Hz, bin width of the unpadded length
	offset      float64 // what logParabola gave, in bins
}

// settle sets the decay rate, and the amplitude at the start that goes with it.
func (r *reading) settle(decay float64, w Window) {
	r.decay = decay
	r.amplitude = r.steady * w.terms()[0] / real(w.transform(min(decay*r.seconds, mostDecay), 0))
}

func (r reading) u() float64 {
	return math.Sqrt(r.uNoise*r.uNoise + r.uParabola*r.uParabola + r.uNeighbours*r.uNeighbours)
}

// noiseUncertainty is the standard deviation, in bins of the unpadded length n, of the place of
// the spectrum's top under white noise of standard deviation s:
//
//	var = 2 s^2 sum w^2 (i - m)^2 / (A^2 (sum w g (i - m)^2)^2)   rad^2 a sample^2
//
// m the mean of i weighted by w g. It is the first-order effect of the noise on the maximum of
// |sum w x exp(-i omega i)|, and becomes the Cramer-Rao bound for w = g.
func noiseUncertainty(amplitude, s float64, n int, m moments) float64 {
	// Own derivation; compare Rife & Vincent, Bell Syst. Tech. J. 49 (1970) 197-228.
	return s / amplitude * math.Sqrt(2*m.wwtt/float64(n)) / m.wgtt / (2 * math.Pi)
}

// neighbourUncertainty is the standard uncertainty, in natural bins, of the top's place from the
// skirts of the other tones and of all tones' images at negative frequencies, their phases being
// unknown. With R(delta) the ratio of the foreign to the own lobe,
//
//	shift = Re(R' exp(i phase)) / -(ln |W|)'',  standard deviation |R'| / (sqrt 2 |(ln |W|)''|).
func neighbourUncertainty(own tone, others []tone, self int, seconds float64, w Window) float64 {
	const h = 0.05 // bins; differences of smooth lobes
	c := own.decay * seconds
	mid, up, down := w.transform(c, 0), w.transform(c, h), w.transform(c, -h)
	bend := (2*math.Log(cmplx.Abs(mid)) - 2*math.Log(cmplx.Abs(up))) / (h * h)
	if !(bend > 0) || own.amplitude <= 0 {
		return math.Inf(1)
	}
	sum := 0.0
	add := func(o tone, delta float64) {
		oc := o.decay * seconds
		scale := complex(o.amplitude/own.amplitude, 0)
		slope := scale * (w.transform(oc, h-delta)/up - w.transform(oc, -h-delta)/down) / (2 * h)
		sum += real(slope)*real(slope) + imag(slope)*imag(slope)
	}
	for i, o := range others {
		if i != self {
			add(o, (o.f-own.f)*seconds)
		}
		add(o, -(o.f+own.f)*seconds)
	}
	return math.Sqrt(sum/2) / bend
}

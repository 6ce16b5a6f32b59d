package spectrum

import (
	"cmp"
	"math"
	"slices"

	"hoopsheet/core/internal/sorting"
)

// Kind tells whether a peak rings down.
type Kind string

// The kinds of peak.
const (
	Ringing Kind = "ringing" // its envelope decays
	Steady  Kind = "steady"  // it does not: hum, a fan, another machine
	Unclear Kind = "unclear" // too weak, too short or too close to another to tell
)

// Kinds lists every kind of peak.
func Kinds() []Kind { return []Kind{Ringing, Steady, Unclear} }

const (
	steadyFall     = 0.5   // natural logarithm of the fall over the stretch below which a line is steady
	coverage       = 2.0   // standard uncertainties that a decay must differ by
	mainsTolerance = 0.004 // relative: grids stay within 0.2 Hz of 50 Hz
)

// Peak is one line of the spectrum.
type Peak struct {
	Frequency  float64 // Hz
	FrequencyU float64 // standard uncertainty, Hz: noise, interpolation and neighbours together
	Bound      float64 // Cramer-Rao bound of the frequency over the whole stretch, Hz
	Amplitude  float64 // at the start of the stretch, in parts of full scale
	Level      float64 // Amplitude in dB against the largest of the peaks
	Height     float64 // dB in the display spectrum, for marking it there
	SNR        float64 // dB of the top over the noise floor beside it
	Kind       Kind
	Decay      float64 // decay rate of the amplitude, 1/s; 0 unless DecayKnown
	DecayU     float64 // its standard uncertainty, 1/s
	DecayKnown bool
	Residual   float64 // rms of the ring-down about a pure exponential, dB; large where two lines beat
	Mains      int     // 50 or 60 if a steady line sits on a multiple of that mains frequency, else 0
	Order      int     // which multiple
	Seconds    float64 // length of the stretch it was read over
	// Glide is how much higher the line is at the start of the stretch, Hz: a hard tap rings sharp. Frequency is then that
	// at no amplitude. 0 where none is seen; GlideU is its standard uncertainty.
	Glide, GlideU float64
}

// peaks turns candidates into peaks: the o.MaxPeaks loudest at most, by rising
// frequency. It returns how many were left out.
func (a *Analyzer) peaks(n int, rate float64, o *Options) (out []Peak, left int) {
	a.sortByLoudness()
	kept := a.found[:0]
	for _, c := range a.found {
		same := func(k found) bool { return math.Abs(k.f-c.f) < max(k.natural, c.natural)/2 }
		stated := c.u() < c.f && c.amplitude > 0 // else there is nothing to say about it
		if stated && !slices.ContainsFunc(kept, same) {
			kept = append(kept, c)
		}
	}
	left = max(0, len(kept)-o.MaxPeaks)
	kept = kept[:len(kept)-left]
	out = make([]Peak, 0, len(kept))
	largest := 0.0
	for _, c := range kept {
		largest = max(largest, c.start())
	}
	for _, c := range kept {
		start := c.start()
		p := Peak{
			Frequency: c.f, FrequencyU: c.u(), Amplitude: start,
			Bound: CramerRao(c.amplitude, c.decay, c.noiseSD, n, rate),
			Level: relative(start*start, largest*largest),
			SNR:   relative(c.snr, 1), Residual: c.ring.residual, Seconds: c.seconds,
			Glide: c.glide, GlideU: c.glideU,
		}
		p.judge(c.ring, float64(n)/rate)
		out = append(out, p)
	}
	sorting.By(out, func(p, q Peak) int { return cmp.Compare(p.Frequency, q.Frequency) })
	return out, left
}

// judge sets the kind from the ring-down over a stretch of the given length.
func (p *Peak) judge(r ringDown, seconds float64) {
	p.Kind = Unclear
	if !r.known {
		return
	}
	p.Decay, p.DecayU, p.DecayKnown = r.decay, r.u, true
	limit := steadyFall / seconds
	switch {
	case r.decay+coverage*r.u < limit:
		p.Kind = Steady
		p.Mains, p.Order = mains(p.Frequency)
	case r.decay-coverage*r.u > 0 && r.decay > limit:
		p.Kind = Ringing
	}
}

// mains returns the mains frequency and the order of its multiple nearest to f, if near enough. What is
// a multiple of both, as 300 Hz, is put down to 50 Hz.
func mains(f float64) (base, order int) {
	best := mainsTolerance
	for _, b := range []int{50, 60} {
		k := math.Round(f / float64(b))
		if k < 1 || k > 40 {
			continue
		}
		if off := math.Abs(f/(k*float64(b)) - 1); off < best {
			best, base, order = off, b, int(k)
		}
	}
	return base, order
}

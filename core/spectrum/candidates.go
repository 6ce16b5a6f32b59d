package spectrum

import (
	"math"
	"math/cmplx"
)

// mostDecay is the decay rate times length beyond which a rung is not read: the tone is gone before
// the window opens.
const mostDecay = 12.0

// found is a candidate: where it was seen first and what has been read of it.
type found struct {
	reading
	rung     int
	loudness float64 // mean amplitude over that rung
	envelope envelope
	ring     ringDown
	// Hz at the start above the frequency at no amplitude, and its standard uncertainty; 0 without a glide.
	glide, glideU float64
}

// start is the amplitude at the start of the stretch: by the ring-down, which has seen it, and not
// from the later average where that can be had.
func (c *found) start() float64 {
	if c.ring.known {
		return c.ring.start
	}
	return c.amplitude
}

// measureDecays finds the ring-down of every candidate: first as if it were alone, then knowing
// of the others.
func (a *Analyzer) measureDecays(x []float64, rate float64, o *Options) {
	a.measureEach(x, rate, nil, o)
	a.dropSkirts(rate, o)
	a.measureEach(x, rate, a.tones, o)
}

func (a *Analyzer) measureEach(x []float64, rate float64, others []tone, o *Options) {
	whole := float64(len(x)) / rate
	for i := range a.found {
		c := &a.found[i]
		// Hann frames of length L null what is 2/L away and hold it 31 dB down beyond; but a
		// line needs several frames within the time it is heard.
		length := min(max(2.5/a.nearest(i), c.seconds/8), c.seconds/3)
		length = min(max(length, 4/c.f), whole/3)
		if n, hop := frameOf(length, rate); n != c.envelope.n {
			c.envelope = a.follow(c.envelope, x, rate, c.f, n, hop)
		}
		r := a.ringDown(c.envelope, rate, i, c.f, c.noiseSD*c.noiseSD, others)
		if r.known || others == nil {
			c.ring = r
		}
	}
	for i := range a.found {
		if c := &a.found[i]; c.ring.known {
			c.settle(max(0, c.ring.decay), o.Window)
		}
	}
	a.listTones()
}

// listTones copies what is known of the candidates to a.tones.
func (a *Analyzer) listTones() {
	a.tones = a.tones[:0]
	for i := range a.found {
		a.tones = append(a.tones, a.found[i].tone)
	}
}

// nearest is the distance to the next candidate, in Hz.
func (a *Analyzer) nearest(i int) float64 {
	d := 2 * a.found[i].f // its own image
	for j := range a.found {
		if j != i {
			d = min(d, math.Abs(a.found[j].f-a.found[i].f))
		}
	}
	return max(d, 1e-6)
}

// choose reads every candidate again on the rung where its uncertainty is smallest.
func (a *Analyzer) choose(rate float64, o *Options) {
	for i := range a.found {
		c := &a.found[i]
		best := a.atRung(i, c.rung, rate, o)
		for k := range a.rungs {
			if k == c.rung || c.decay*a.rungs[k].seconds(rate) > mostDecay {
				continue
			}
			if r := a.atRung(i, k, rate, o); r.u() < best.u() {
				best = r
			}
		}
		if best.seconds > 0 {
			c.reading = best
		}
	}
}

// dropSkirts removes candidates that noise on the skirts of stronger tones can have made: what is left
// has a magnitude beyond all their skirts and the threshold over the noise taken together. The skirts of a
// decaying tone reach further than a steady one's side lobes, and are known only with its decay rate.
func (a *Analyzer) dropSkirts(rate float64, o *Options) {
	a.listTones()
	// Of two close lines each can seem to stand on the other's skirt: the louder one stays.
	loudness := make([]float64, len(a.found))
	for i, c := range a.found {
		loudness[i] = c.loudness
	}
	kept := a.found[:0]
	for i, c := range a.found {
		n := c.seconds * rate
		own := c.steady * o.Window.steadyMoments().wg // magnitudes are in parts of n/2
		skirts := 0.0
		for j, other := range a.tones {
			fall := other.decay * c.seconds
			if j != i && loudness[j] >= c.loudness && other.amplitude*cmplx.Abs(o.Window.transform(fall, 0)) > own {
				skirts += other.amplitude * cmplx.Abs(o.Window.transform(fall, (other.f-c.f)*c.seconds))
			}
		}
		noise := 2 * c.noiseSD * math.Sqrt(o.ratio()*o.Window.steadyMoments().ww/n)
		if own > skirts+noise {
			kept = append(kept, c)
		}
	}
	a.found = kept
	a.listTones()
}

// atRung reads candidate i on rung k, with its uncertainties; they are infinite where it has no
// top of its own there.
func (a *Analyzer) atRung(i, k int, rate float64, o *Options) reading {
	c, g := a.found[i], &a.rungs[k]
	none := reading{uNoise: math.Inf(1)}
	bin, ok := g.nearestTop(c.f/g.step(rate), max(c.natural, rate/float64(g.n))/g.step(rate))
	if !ok || c.f*g.seconds(rate) < fewestPeriods {
		return none
	}
	r, ok := g.read(bin, rate, o.Window)
	if !ok {
		return none
	}
	fall := c.decay * r.seconds
	m := o.Window.moments(fall)
	r.settle(c.decay, o.Window)
	if c.ring.known {
		// The lobe's shape is known, and with it what the parabola gets wrong.
		bins := g.natural()
		wrong := o.Window.parabolaError(fall, r.offset, bins)
		other := o.Window.parabolaError(max(0, c.ring.decay+c.ring.u)*r.seconds, r.offset, bins)
		r.f -= wrong * g.step(rate)
		r.uParabola = math.Abs(other-wrong) * g.step(rate)
	}
	r.uNoise = noiseUncertainty(r.amplitude, r.noiseSD, g.n, m) * r.natural
	r.uNeighbours = neighbourUncertainty(r.tone, a.tones, i, r.seconds, o.Window) * r.natural
	return r
}

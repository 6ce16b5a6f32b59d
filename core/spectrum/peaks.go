package spectrum

import (
	"cmp"
	"math"
	"math/cmplx"
	"slices"
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
}

const (
	maxRungs       = 8
	shortestRung   = 0.06  // s
	fewestSamples  = 64    // of a rung
	fewestPeriods  = 3.0   // of a peak in its rung
	apartBins      = 2.0   // natural bins between a peak and those already found on longer rungs
	mostDecay      = 12.0  // decay rate times length beyond which a rung is not read
	steadyFall     = 0.5   // natural logarithm of the fall over the stretch below which a line is steady
	coverage       = 2.0   // standard uncertainties that a decay must differ by
	mainsTolerance = 0.004 // relative: grids stay within 0.2 Hz of 50 Hz
)

// rung is the spectrum over one length.
type rung struct {
	n      int // samples
	padded int
	power  []float64
	floor  []float64
	tops   []top
}

func (g *rung) step(rate float64) float64    { return rate / float64(g.padded) }
func (g *rung) seconds(rate float64) float64 { return float64(g.n) / rate }
func (g *rung) natural() float64             { return float64(g.padded) / float64(g.n) }

// found is a candidate: where it was seen first and what has been read of it.
type found struct {
	reading
	rung     int
	loudness float64 // mean amplitude over that rung
	ring     ringDown
}

// isLobeOfFound reports whether a top of a short rung may be a side lobe of tones found on longer
// ones. There close tones beat: their common top may all but vanish while their side lobes stay.
func (a *Analyzer) isLobeOfFound(r reading, upTo int, w Window) bool {
	sum := 0.0
	for _, c := range a.found[:upTo] {
		sum += c.loudness * w.envelope((c.f-r.f)*r.seconds)
	}
	return r.amplitude*r.amplitude < lobeMargin*sum*sum
}

// start is the amplitude at the start of the stretch: by the ring-down, which has seen it, and not
// from the later average where that can be had.
func (c *found) start() float64 {
	if c.ring.known {
		return c.ring.start
	}
	return c.amplitude
}

// climb fills the rungs of the ladder for the stretch x.
func (a *Analyzer) climb(x []float64, rate float64, o *Options) {
	a.rungs = a.rungs[:0]
	for n := len(x); len(a.rungs) < maxRungs; n /= 2 {
		if len(a.rungs) > 0 && (n < fewestSamples || float64(n) < shortestRung*rate) {
			break
		}
		if len(a.rungs) < cap(a.rungs) {
			a.rungs = a.rungs[:len(a.rungs)+1]
		} else {
			a.rungs = append(a.rungs, rung{})
		}
		g := &a.rungs[len(a.rungs)-1]
		g.n, g.padded = n, paddedLength(n)
		g.power = a.Power(g.power, x[:n], g.padded, o.Window)
		step, natural := g.step(rate), rate/float64(n)
		lo, hi := g.band(rate, o)
		g.power = g.power[:min(len(g.power), hi+2+int(floorWidest/step))] // nothing above is looked at
		g.floor = a.noiseFloor(g.floor, g.power, nil, step, natural)
		g.tops = findTops(g.tops, g.power, g.floor, lo, hi, o.ratio(), g.natural(), o.Window)
		a.masked = maskTops(a.masked, g.tops, g.power, g.floor)
		g.floor = a.noiseFloor(g.floor, g.power, a.masked, step, natural)
		g.tops = findTops(g.tops, g.power, g.floor, lo, hi, o.ratio(), g.natural(), o.Window)
		a.collect(len(a.rungs)-1, rate, o)
	}
}

// band returns the first and last bin of the frequencies asked for.
func (g *rung) band(rate float64, o *Options) (lo, hi int) {
	step := g.step(rate)
	return max(1, int(math.Ceil(o.Lowest/step))), max(1, min(len(g.power)-2, int(o.Highest/step)))
}

// collect adds the tops of rung k that longer rungs have not shown.
func (a *Analyzer) collect(k int, rate float64, o *Options) {
	if k == 0 {
		a.found = a.found[:0]
	}
	g := &a.rungs[k]
	already := len(a.found)
	for _, t := range g.tops {
		r, ok := g.read(t.bin, rate, o.Window)
		if !ok || r.f*g.seconds(rate) < fewestPeriods || a.isFound(r.f, apartBins*r.natural, already) || a.isLobeOfFound(r, already, o.Window) {
			continue
		}
		a.found = append(a.found, found{reading: r, rung: k, loudness: r.amplitude})
	}
}

func (a *Analyzer) isFound(f, within float64, upTo int) bool {
	for _, c := range a.found[:upTo] {
		if math.Abs(c.f-f) < within {
			return true
		}
	}
	return false
}

// read interpolates the top at bin k. The amplitude is that of a steady tone.
func (g *rung) read(k int, rate float64, w Window) (reading, bool) {
	if k < 1 || k > len(g.power)-2 {
		return reading{}, false
	}
	offset, power := logParabola(g.power[k-1], g.power[k], g.power[k+1])
	m := w.steadyMoments()
	n := float64(g.n)
	steady := 2 * math.Sqrt(power) / (n * m.wg)
	return reading{
		tone:      tone{f: (float64(k) + offset) * g.step(rate), amplitude: steady},
		steady:    steady,
		offset:    offset,
		snr:       power / g.floor[k],
		noiseSD:   math.Sqrt(g.floor[k] / (n * m.ww)),
		uParabola: w.parabolaBias() / math.Sqrt2 * rate / n,
		seconds:   g.seconds(rate),
		natural:   rate / n,
	}, true
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
		r := a.ringDown(x, rate, i, c.f, length, c.noiseSD*c.noiseSD, others)
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
	kept := a.found[:0]
	for i, c := range a.found {
		n := c.seconds * rate
		own := c.steady * o.Window.steadyMoments().wg // magnitudes are in parts of n/2
		skirts := 0.0
		for j, other := range a.tones {
			fall := other.decay * c.seconds
			if j != i && other.amplitude*cmplx.Abs(o.Window.transform(fall, 0)) > own {
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

// nearestTop returns the strongest of the rung's tops within the given distance of a place, in bins.
func (g *rung) nearestTop(place, within float64) (int, bool) {
	for _, t := range g.tops {
		if math.Abs(float64(t.bin)-place) <= within {
			return t.bin, true
		}
	}
	return 0, false
}

// peaks turns candidates into peaks: the o.MaxPeaks loudest at most, by rising
// frequency. It returns how many were left out.
func (a *Analyzer) peaks(n int, rate float64, o *Options) (out []Peak, left int) {
	a.sortByLoudness()
	kept := a.found[:0]
	for _, c := range a.found {
		same := func(k found) bool { return math.Abs(k.f-c.f) < max(k.natural, c.natural)/2 }
		if !slices.ContainsFunc(kept, same) {
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
		}
		p.judge(c.ring, float64(n)/rate)
		out = append(out, p)
	}
	slices.SortFunc(out, func(p, q Peak) int { return cmp.Compare(p.Frequency, q.Frequency) })
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

// mains returns the mains frequency and the order of its multiple nearest to f, if near enough.
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

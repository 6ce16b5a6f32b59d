package spectrum

import "math"

const (
	maxRungs      = 8
	shortestRung  = 0.06 // s
	fewestSamples = 64   // of a rung
	fewestPeriods = 3.0  // of a peak in its rung
	apartBins     = 2.0  // natural bins between a peak and those already found on longer rungs
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

// isLobeOfFound reports whether a top of a short rung may be a side lobe of tones found on longer
// ones. There close tones beat: their common top may all but vanish while their side lobes stay.
func (a *Analyzer) isLobeOfFound(r reading, upTo int, w Window) bool {
	sum := 0.0
	for _, c := range a.found[:upTo] {
		sum += c.loudness * w.envelope((c.f-r.f)*r.seconds)
	}
	return r.amplitude*r.amplitude < lobeMargin*sum*sum
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

package spectrum

import (
	"cmp"
	"math"
	"math/cmplx"

	"hoopsheet/core/internal/sorting"
)

// What a joint fit may and must do.
const (
	mostLines   = 4    // damped lines fitted together
	joinWithin  = 4.0  // natural bins of the whole stretch within which lines are always fitted together
	frameGap    = 2.5  // frames times the distance to the next line outside: Hann nulls what is 2 away
	soundFit    = 1.6  // squares of the residuals over those of noise up to which a fit is taken at its word
	pairGain    = 25.0 // twice the log likelihood that a further line must bring, beside the usual penalty
	pairFall    = 20.0 // by which a further line must shrink residuals that do not come down to the noise
	leastShare  = 0.05 // of the stronger line's amplitude that the weaker of a pair must have
	likeDecay   = 3.0  // ratio of decay rates beyond which two lines are no pair
	clearlyTwo  = 4.0  // standard uncertainties that a pair must be apart
	mostGroups  = 60
	mostUpdates = 30
)

// line is one damped exponential c exp(s t) in a narrow band about a centre: s = -d + 2 pi i (f - centre).
type line struct{ s, c complex128 }

// narrowBand is the signal of a few close lines: averages z[m] of the samples, turned back by the centre, under Hann
// frames of n samples, step seconds apart. An exponential goes through such an average unchanged but for a factor.
type narrowBand struct {
	z           []complex128
	centre      float64 // Hz
	step        float64 // s
	n           int
	rate        float64
	white       float64   // E |noise|^2 of a frame
	correlation []float64 // of the noise of frames 0, 1, 2 ... apart

	powers []complex128 // exp(s t), frame by frame, of the lines last expanded
	work   []complex128 // a row of derivatives
}

// refine reads lines again by maximum likelihood: each group of close ones as a sum of damped exponentials in white
// noise, fitted to the narrow-band signal. A group may turn out to hold one line more than its spectrum shows: a pair
// closer than any spectrum resolves. What does not fit keeps its reading.
func (a *Analyzer) refine(x []float64, rate float64) {
	sorting.By(a.found, func(p, q found) int { return cmp.Compare(p.f, q.f) })
	var added []found
	natural := rate / float64(len(x))
	for from, groups := 0, 0; from < len(a.found) && groups < mostGroups; groups++ {
		to := from + 1
		for to < len(a.found) && a.found[to].f-a.found[to-1].f < joinWithin*natural {
			to++
		}
		if to-from <= mostLines {
			if further, ok := a.refineGroup(x, rate, from, to); ok {
				added = append(added, further)
			}
		}
		from = to
	}
	a.found = append(a.found, added...)
	a.listTones()
}

// refineGroup fits found[from:to] together, and returns the line that their spectrum did not show, if there is one.
func (a *Analyzer) refineGroup(x []float64, rate float64, from, to int) (further found, split bool) {
	group := a.found[from:to]
	b, ok := a.narrowBand(x, rate, from, to)
	if !ok {
		return found{}, false
	}
	lines := make([]line, 0, mostLines)
	for _, c := range group {
		lines = append(lines, line{s: complex(-max(c.decay, 0), 2*math.Pi*(c.f-b.centre))})
	}
	rss, ok := b.fit(lines)
	if !ok {
		return found{}, false
	}
	plain, noise := rss, b.white*float64(len(b.z))
	if len(lines) < mostLines && rss > soundFit*noise {
		if more, left, ok := b.oneMore(lines, rss); ok {
			lines, rss, split = more, left, true
		}
	}
	// One line that glides looks like two, and has fewer parameters.
	if len(group) == 1 {
		g, left, ok := b.glide(lines[0])
		if ok && left < glideLike*max(rss, noise) && b.gain(plain, left) > 2*math.Log(2*b.independent())+pairGain {
			b.adoptGlide(&group[0], g, left/noise)
			return found{}, false
		}
	}
	ratio := rss / noise
	if ratio > soundFit && !split {
		return found{}, false
	}
	b.adoptAll(group, lines, ratio, split, &further)
	return further, split
}

// adoptAll writes the fitted lines over the group's readings, in rising frequency; the one too many goes to further.
func (b *narrowBand) adoptAll(group []found, lines []line, ratio float64, split bool, further *found) {
	sorting.By(lines, func(p, q line) int { return cmp.Compare(imag(p.s), imag(q.s)) })
	variance := b.variances(lines)
	old := append([]found(nil), group...)
	for k, l := range lines {
		f := b.centre + imag(l.s)/(2*math.Pi)
		nearest := 0
		for i := range old {
			if math.Abs(old[i].f-f) < math.Abs(old[nearest].f-f) {
				nearest = i
			}
		}
		to := further
		if k < len(group) {
			to = &group[k]
		}
		*to = old[nearest]
		u := math.Sqrt(variance[k] * max(1, ratio) / 2) // of the real and of the imaginary part of s
		to.f, to.decay, to.amplitude = f, -real(l.s), 2*cmplx.Abs(l.c)/cmplx.Abs(b.through(l.s))
		to.uNoise, to.uParabola, to.uNeighbours = u/(2*math.Pi), 0, 0
		to.ring.known, to.ring.decay, to.ring.u, to.ring.start = true, to.decay, u, to.amplitude
		if len(lines) > 1 {
			to.ring.residual = b.misfit(lines)
			to.natural = min(to.natural, to.uNoise) // nearer lines than that are the same
		}
	}
}

// narrowBand takes found[from:to] out of the samples, or reports that they stand too close to others or end too soon.
func (a *Analyzer) narrowBand(x []float64, rate float64, from, to int) (narrowBand, bool) {
	lo, hi := a.found[from].f, a.found[to-1].f
	gap, slowest, noise := 2*lo, math.Inf(1), 0.0
	if from > 0 {
		gap = min(gap, lo-a.found[from-1].f)
	}
	if to < len(a.found) {
		gap = min(gap, a.found[to].f-hi)
	}
	for _, c := range a.found[from:to] {
		slowest = min(slowest, c.decay)
		noise = max(noise, c.noiseSD)
	}
	whole := float64(len(x)) / rate
	length := max(frameGap/max(gap, 1e-6), 4/lo, min(whole/12, 0.3/max(slowest, 1e-9)))
	n, hop := frameOf(length, rate)
	if length > whole/6 || (hi-lo)*length > 1 || len(x) < n+fewestFrames*2*hop {
		return narrowBand{}, false
	}
	b := narrowBand{centre: (lo + hi) / 2, step: float64(hop) / rate, n: n, rate: rate}
	b.z = a.frames(nil, x, rate, b.centre, n, hop)
	win := a.window(Hann, n)
	b.white = max(noise*noise*sumSquares(win), leastPower)
	b.correlation = overlap(win, hop)
	return b, true
}

// through is the factor that the first frame puts to exp(s t).
func (b *narrowBand) through(s complex128) complex128 {
	w := Hann.transform(-real(s)*float64(b.n)/b.rate, imag(s)/(2*math.Pi)*float64(b.n)/b.rate)
	return w * complex(float64(b.n), 0)
}

// fit improves the lines' exponents by least squares, the amplitudes with them, and returns the sum of the squared
// residuals. It reports failure where the fit runs away.
func (b *narrowBand) fit(lines []line) (rss float64, ok bool) {
	// Levenberg-Marquardt on the complex exponents: the model is holomorphic in s and c, so that the normal equations are
	// Hermitian of twice the number of lines. For damped exponentials in white noise least squares is maximum likelihood:
	// Hua and Sarkar, IEEE Trans. Acoust. Speech Signal Process. 38 (1990) 814-824.
	b.amplitudes(lines)
	rss = b.residual(lines)
	damp := 1e-3
	trial := make([]line, len(lines))
	for range mostUpdates {
		step, solved := b.newton(lines, damp)
		if !solved {
			return rss, false
		}
		change := 0.0
		for k := range lines {
			trial[k] = lines[k]
			trial[k].s += step[k]
			change = max(change, cmplx.Abs(step[k])*b.step*float64(len(b.z)))
		}
		b.amplitudes(trial)
		if left := b.residual(trial); left <= rss {
			copy(lines, trial)
			rss, damp = left, damp/8
		} else {
			damp *= 8
		}
		if change < 1e-7 || damp > 1e8 {
			break
		}
	}
	limit := math.Pi / b.step / framesApart // the frames' first null
	for _, l := range lines {
		if !(math.Abs(imag(l.s)) < limit && math.Abs(real(l.s)) < limit) {
			return rss, false
		}
	}
	return rss, true
}

// oneMore looks for a further line in what the fit leaves: each of the lines in turn is parted in two.
func (b *narrowBand) oneMore(lines []line, rss float64) ([]line, float64, bool) {
	duration := b.step * float64(len(b.z))
	var best []line
	least := rss
	for k := range lines {
		for _, apart := range []float64{0.4, 0.8, 1.6, 3.2} {
			trial := append(append(make([]line, 0, mostLines), lines...), lines[k])
			shift := complex(0, math.Pi*apart/duration)
			trial[k].s -= shift
			trial[len(lines)].s += shift
			if left, ok := b.fit(trial); ok && left < least {
				best, least = trial, left
			}
		}
	}
	if best == nil {
		return nil, 0, false
	}
	// A line has four real parameters: 2 log likelihood must grow by 4 log of the number of real data (Schwarz 1978) and
	// by pairGain beyond. Unless the rest is noise then, what rings is no sum of exponentials (it glides, or the tap was
	// no clean one), and a further line only stands for that.
	ratio := least / (b.white * float64(len(b.z)))
	if b.gain(rss, least) < 4*math.Log(2*b.independent())+pairGain || ratio > soundFit && rss < pairFall*least || !b.plausible(best, max(1, ratio)) {
		return nil, 0, false
	}
	return best, least, true
}

// plausible reports whether all lines are decaying tones of their own: loud enough, clearly apart, neighbours alike.
func (b *narrowBand) plausible(lines []line, ratio float64) bool {
	variance := b.variances(lines)
	for i, p := range lines {
		for j, q := range lines[:i] {
			apart := math.Abs(imag(p.s - q.s))
			if apart < clearlyTwo*math.Sqrt((variance[i]+variance[j])*ratio/2) {
				return false
			}
			dp, dq := -real(p.s), -real(q.s)
			near := apart < 2*max(dp, dq) || apart < 2*math.Pi/(b.step*float64(len(b.z)))
			if near && !(dp > 0 && dq > 0 && max(dp, dq) < likeDecay*min(dp, dq)) {
				return false
			}
			ap, aq := cmplx.Abs(p.c), cmplx.Abs(q.c)
			if near && min(ap, aq) < leastShare*max(ap, aq) {
				return false
			}
		}
	}
	return true
}

// independent is how many independent complex values the overlapping frames stand for.
func (b *narrowBand) independent() float64 {
	sum := 1.0
	for _, r := range b.correlation[1:] {
		sum += 2 * r * r
	}
	return float64(len(b.z)) / sum
}

// gain is twice the logarithm of the likelihood ratio of two fits with the given squares of residuals.
func (b *narrowBand) gain(before, after float64) float64 {
	return 2 * b.independent() * math.Log(before/max(after, leastPower))
}

// misfit is the rms of the residuals in dB of the fitted magnitude, over the frames where that stands out of the noise.
func (b *narrowBand) misfit(lines []line) float64 {
	b.expand(lines)
	sum, used := 0.0, 0.0
	for m, z := range b.z {
		model := b.model(lines, m)
		size := real(model)*real(model) + imag(model)*imag(model)
		if size > frameSNR*b.white {
			off := z - model
			sum += (real(off)*real(off) + imag(off)*imag(off)) / (2 * size)
			used++
		}
	}
	return 20 / math.Ln10 * math.Sqrt(sum/max(used, 1))
}

// model is the sum of the lines last expanded at frame m.
func (b *narrowBand) model(lines []line, m int) complex128 {
	var sum complex128
	for k := range lines {
		sum += lines[k].c * b.powers[m*len(lines)+k]
	}
	return sum
}

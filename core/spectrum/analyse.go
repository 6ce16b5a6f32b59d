package spectrum

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"hoopsheet/core/internal/sorting"
)

// Options says what to look for. The zero value asks for the defaults.
type Options struct {
	Lowest    float64 // Hz; 0 means 20 Hz
	Highest   float64 // Hz; 0 means 5000 Hz or 0.45 of the sample rate, whichever is less
	MaxPeaks  int     // 1 to 200; 0 means 24
	Window    Window  // "" means Hann
	Channel   int     // from 1; 0 means the mean of all
	Tap       int     // which strike, from 1; 0 means the first
	Longest   float64 // s, longest stretch used after the strike, 0.1 to 20; 0 means 4 s
	Threshold float64 // dB that a peak must stand over the noise floor, 12 to 60; 0 means 15 dB
	Points    int     // most points of the display spectrum, 50 to 20000; 0 means 2000
}

// The defaults. A threshold of 15 dB is passed by a bin of Gaussian noise with a chance of
// exp(-10^1.5) = 2e-14.
const (
	defaultLowest    = 20.0
	defaultHighest   = 5000.0
	highestShare     = 0.45
	defaultPeaks     = 24
	defaultLongest   = 4.0
	defaultThreshold = 15.0
	defaultPoints    = 2000
)

// Result is what a tap says.
type Result struct {
	Strikes    []float64 // s from the start of the recording
	Tap        int       // which of them is read, from 1; 0 if there is none
	From       float64   // s, start of the stretch used
	Seconds    float64   // its length
	Peak       float64   // largest magnitude in the stretch, in parts of full scale
	Clipped    float64   // share of its samples at full scale
	Background float64   // dB of the quiet parts against the loudest 10 ms
	Spectrum   Display
	Peaks      []Peak // by rising frequency
	Notes      []Note // the recording's, then those of the analysis
}

// Analyse finds the peaks of the recording; see Analyzer.Analyse.
func (r *Recording) Analyse(o Options) (Result, error) { return NewAnalyzer().Analyse(r, o) }

// shortestStretch is the least that can be analysed, in seconds.
const shortestStretch = 0.05

// Analyse finds a strike in the recording, takes the stretch after it up to the next one, and
// returns its spectrum and its peaks. Options that are out of range and recordings too short give
// an *Error; everything doubtful gives a Note.
func (a *Analyzer) Analyse(r *Recording, o Options) (Result, error) {
	if err := o.settle(r); err != nil {
		return Result{}, err
	}
	if r.Duration() < shortestStretch {
		return Result{}, &Error{"recording", CodeTooShort, fmt.Sprintf(
			"The recording lasts %.3g s; at least %.3g s are needed.", r.Duration(), shortestStretch)}
	}
	res := Result{Notes: slices.Clone(r.Notes), Strikes: []float64{}}
	if res.Notes == nil {
		res.Notes = []Note{}
	}
	mono, channels := a.pick(r, &o, &res)
	a.centred = resize(a.centred, len(mono))
	for i, m := 0, mean(mono); i < len(mono); i++ {
		a.centred[i] = mono[i] - m
	}
	from, to, err := res.place(findStrikes(a.centred, r.Rate), len(mono), r.Rate, &o)
	if err != nil {
		return Result{}, err
	}
	res.grade(measure(channels, from, to, r.FullScale))

	m := decimation(r.Rate, o.Highest)
	if m > 1 && a.filterFor != m {
		a.filter, a.filterFor = decimationFilter(m), m
	}
	a.stretch = decimate(a.stretch, a.centred, from, to, m, a.filter)
	rate := r.Rate / float64(m)
	a.climb(a.stretch, rate, &o)
	a.limit(3 * o.MaxPeaks)
	a.measureDecays(a.stretch, rate, &o)
	a.choose(rate, &o)
	a.dropSkirts(rate, &o)
	a.refine(a.stretch, rate)
	a.present(&res, rate, &o)
	return res, nil
}

// settle fills in defaults and checks the ranges.
func (o *Options) settle(r *Recording) *Error {
	top := highestShare * r.Rate
	if o.Highest == 0 {
		o.Highest = min(defaultHighest, top)
	}
	setDefault(&o.Lowest, defaultLowest)
	setDefault(&o.Longest, defaultLongest)
	setDefault(&o.Threshold, defaultThreshold)
	setDefault(&o.MaxPeaks, defaultPeaks)
	setDefault(&o.Points, defaultPoints)
	if o.Window == "" {
		o.Window = Hann
	}
	for _, c := range []struct {
		field, words, unit string
		v, lo, hi          float64
	}{
		{"highest", "highest frequency", " Hz", o.Highest, 50, top},
		{"lowest", "lowest frequency", " Hz", o.Lowest, 1, o.Highest / 2},
		{"longest", "longest stretch", " s", o.Longest, 0.1, 20},
		{"threshold", "threshold over the noise floor", " dB", o.Threshold, 12, 60},
		{"maxPeaks", "largest number of peaks", "", float64(o.MaxPeaks), 1, 200},
		{"points", "number of points drawn", "", float64(o.Points), 50, 20000},
		{"channel", "channel", "", float64(o.Channel), 0, float64(len(r.Channels))},
		{"tap", "number of the tap", "", float64(o.Tap), 0, 1000},
	} {
		if !(c.v >= c.lo && c.v <= c.hi) {
			return &Error{c.field, CodeOptionRange, fmt.Sprintf(
				"The %s is %.6g%s; it must lie between %.6g%s and %.6g%s.", c.words, c.v, c.unit, c.lo, c.unit, c.hi, c.unit)}
		}
	}
	if !slices.Contains(Windows(), o.Window) {
		names := make([]string, 0, len(Windows()))
		for _, w := range Windows() {
			names = append(names, string(w))
		}
		return &Error{"window", CodeOptionChoice, fmt.Sprintf(
			"The window %q is not known; it may be %s.", string(o.Window), strings.Join(names, ", "))}
	}
	return nil
}

func setDefault[T int | float64](v *T, to T) {
	if *v == 0 {
		*v = to
	}
}

func (o *Options) ratio() float64 { return math.Pow(10, o.Threshold/10) }

// pick returns the samples to analyse and the channels they come from.
func (a *Analyzer) pick(r *Recording, o *Options, res *Result) ([]float64, [][]float64) {
	if o.Channel > 0 {
		c := r.Channels[o.Channel-1]
		return c, [][]float64{c}
	}
	mix := r.Mix()
	if cancel, best := r.cancelling(mix); cancel {
		res.note(NoteChannel, "The channels cancel each other (one microphone may be wired the other way round); channel %d alone is used.", best)
		c := r.Channels[best-1]
		return c, [][]float64{c}
	}
	return mix, r.Channels
}

// place chooses the stretch [from, to) after the strike asked for.
func (res *Result) place(s strikes, n int, rate float64, o *Options) (from, to int, err error) {
	for _, at := range s.at {
		res.Strikes = append(res.Strikes, float64(at)/rate)
	}
	res.Background = relative(s.quiet, s.loudest)
	to = n
	switch {
	case len(s.at) == 0 && o.Tap <= 1:
		res.note(NoteNoStrike, "Nothing in the recording rises like a tap; all of it is used.")
	case o.Tap > len(s.at):
		return 0, 0, &Error{"tap", CodeOptionRange, fmt.Sprintf(
			"Tap %d was asked for; the recording has %d.", o.Tap, len(s.at))}
	default:
		res.Tap = max(1, o.Tap)
		from = min(s.at[res.Tap-1]+int(settleSeconds*rate), n)
		if res.Tap < len(s.at) {
			to = max(from, s.at[res.Tap]-int(frameSeconds*rate))
		}
	}
	whole := float64(to-from) / rate
	to = min(to, from+int(o.Longest*rate))
	if whole < shortestStretch {
		return 0, 0, &Error{"recording", CodeTooShort, fmt.Sprintf(
			"Only %.3g s are left after the tap; at least %.3g s are needed.", whole, shortestStretch)}
	}
	res.From, res.Seconds = float64(from)/rate, float64(to-from)/rate
	if s.cutIn && res.Tap == 1 {
		res.note(NoteStrikeAtCut, "The recording begins in the middle of a tap: its start is missing.")
	}
	if res.Tap > 0 && res.Tap < len(s.at) && whole < o.Longest {
		res.note(NoteNextStrike, "Another tap follows at %.2f s; only the %.2f s before it are used.", res.Strikes[res.Tap], res.Seconds)
	}
	if res.Seconds < 0.5 {
		res.note(NoteShort, "Only %.2f s after the tap can be used; close peaks will not be told apart.", res.Seconds)
	}
	if res.Tap > 0 && s.quiet*quietRise > s.loudest && !s.cutIn {
		res.note(NoteQuiet, "The tap stands only %.0f dB over the background; tap nearer to the microphone or harder.", -res.Background)
	}
	return from, to, nil
}

// grade adds what the raw samples say.
func (res *Result) grade(l level) {
	res.Peak, res.Clipped = l.peak, l.share
	if l.clipped {
		res.note(NoteClipped, "%.2g %% of the samples are at full scale: the recording is clipped, and false peaks may appear at sums and multiples.", 100*l.share)
	}
	if l.peak < quietPeak && l.peak > 0 {
		res.note(NoteQuiet, "The recording is very quiet: its largest sample is %.2g of full scale.", l.peak)
	}
}

// present fills the display spectrum and the peaks.
func (a *Analyzer) present(res *Result, rate float64, o *Options) {
	var left int
	res.Peaks, left = a.peaks(len(a.stretch), rate, o)
	g := a.displayRung(res.Peaks, rate)
	lo, hi := g.band(rate, o)
	res.Spectrum.Seconds = g.seconds(rate)
	res.Spectrum.fill(g.power, g.floor, lo, hi, o.Points, g.step(rate))
	largest := slices.Max(g.power[lo : hi+1])
	for i := range res.Peaks {
		p := &res.Peaks[i]
		k := min(max(int(math.Round(p.Frequency/g.step(rate))), lo), hi)
		p.Height = relative(slices.Max(g.power[max(lo, k-1):min(hi, k+1)+1]), largest)
	}
	if g := steepest(res.Peaks); g.Glide != 0 {
		res.note(NoteGlide, "The line at %.4g Hz starts %.2g Hz higher and glides down as it fades, as a hard tap makes it do; it is read at no amplitude. Tap more softly.", g.Frequency, g.Glide)
	}
	if left > 0 {
		res.note(NoteMorePeaks, "%d weaker peaks are left out.", left)
	}
	if len(res.Peaks) == 0 {
		res.note(NoteNoPeaks, "No peak stands %.0f dB over the noise between %.4g and %.4g Hz.", o.Threshold, o.Lowest, o.Highest)
	}
}

// displayRung is the rung on which the strongest ringing peak was read, else the longest.
func (a *Analyzer) displayRung(peaks []Peak, rate float64) *rung {
	best, level := &a.rungs[0], math.Inf(-1)
	for _, p := range peaks {
		if p.Kind != Ringing || p.Level <= level {
			continue
		}
		for k := range a.rungs {
			if a.rungs[k].seconds(rate) == p.Seconds {
				best, level = &a.rungs[k], p.Level
			}
		}
	}
	return best
}

// limit keeps the n loudest candidates.
func (a *Analyzer) limit(n int) {
	a.sortByLoudness()
	a.found = a.found[:min(n, len(a.found))]
}

// sortByLoudness puts first what is largest on average over the rung it was seen on: by that a
// short strong line and a long weak one are compared as the display shows them.
func (a *Analyzer) sortByLoudness() {
	sorting.By(a.found, func(p, q found) int { return cmp.Compare(q.loudness, p.loudness) })
}

func (res *Result) note(code Code, format string, args ...any) {
	res.Notes = append(res.Notes, Note{code, fmt.Sprintf(format, args...)})
}

// steepest returns the peak that glides down by most of its frequency, or a zero peak.
func steepest(peaks []Peak) Peak {
	var most Peak
	for _, p := range peaks {
		if p.Glide > 3*p.GlideU && p.Glide*most.Frequency >= most.Glide*p.Frequency {
			most = p
		}
	}
	return most
}

package spectrum

import (
	"fmt"
	"math"
)

// Recording holds the samples of one file or one take, a slice per channel, all of one length.
type Recording struct {
	Rate      float64     // samples per second
	Channels  [][]float64 // in parts of full scale
	Encoding  string      // how the file stored them, in words; empty for FromSamples
	FullScale float64     // magnitude at which a sample counts as clipped; +Inf if there is none
	Notes     []Note      // what was repaired on reading
}

// The rates accepted, in Hz. Below the lower one no mode of interest is left; the upper
// one is far above any converter and only stops nonsense.
const (
	minRate = 1000
	maxRate = 1e6
)

// clipMargin is how near to full scale counts as clipped: 1/2048 is half a step of the
// coarsest limiter of 10 bits, and 16 steps of a 16-bit converter.
const clipMargin = 1.0 / 2048

// FromSamples makes a Recording of one channel. The samples are not copied. They are in
// parts of full scale (1 is the largest), rate is in Hz. An empty slice, a rate outside
// 1 kHz to 1 MHz, or samples that are not finite give an *Error.
func FromSamples(samples []float64, rate float64) (*Recording, error) {
	if !(rate >= minRate && rate <= maxRate) {
		return nil, badRate(rate)
	}
	if len(samples) == 0 {
		return nil, &Error{"recording", CodeNoData, "The recording holds no samples."}
	}
	for i, v := range samples {
		if math.IsNaN(v) || math.Abs(v) > largestSample {
			return nil, &Error{"recording", CodeNotFinite, fmt.Sprintf(
				"Sample %d of the recording is no usable number; samples must lie between -1 and 1.", i+1)}
		}
	}
	return &Recording{Rate: rate, Channels: [][]float64{samples}, FullScale: 1 - clipMargin, Notes: []Note{}}, nil
}

func badRate(rate float64) *Error {
	return &Error{"recording", CodeRate, fmt.Sprintf(
		"The recording gives a sample rate of %.6g Hz; it must lie between 1000 Hz and 1000000 Hz.", rate)}
}

// Len returns the number of samples of each channel.
func (r *Recording) Len() int {
	if len(r.Channels) == 0 {
		return 0
	}
	return len(r.Channels[0])
}

// Duration returns the length in seconds.
func (r *Recording) Duration() float64 { return float64(r.Len()) / r.Rate }

// Mix returns the mean of all channels. With one channel it is that channel itself, not a copy.
func (r *Recording) Mix() []float64 {
	if len(r.Channels) == 1 {
		return r.Channels[0]
	}
	out := make([]float64, r.Len())
	k := 1 / float64(len(r.Channels))
	for _, c := range r.Channels {
		for i, v := range c {
			out[i] += v * k
		}
	}
	return out
}

// Channel returns channel i, counted from 1; 0 is the mean of all. Another number gives an *Error.
func (r *Recording) Channel(i int) ([]float64, error) {
	switch {
	case i == 0:
		return r.Mix(), nil
	case i < 0 || i > len(r.Channels):
		return nil, &Error{"channel", CodeOptionRange, fmt.Sprintf(
			"Channel %d was asked for; the recording has %d, and 0 means the mean of all.", i, len(r.Channels))}
	}
	return r.Channels[i-1], nil
}

// cancelling reports whether the mean of the channels holds less than a hundredth of their
// mean power, and which channel (from 1) is the strongest. Two microphone wires swapped do that.
func (r *Recording) cancelling(mix []float64) (bool, int) {
	if len(r.Channels) < 2 {
		return false, 1
	}
	total, best, strongest := 0.0, 1, 0.0
	for i, c := range r.Channels {
		p := acPower(c)
		total += p
		if p > strongest {
			best, strongest = i+1, p
		}
	}
	return acPower(mix) < 0.01*total/float64(len(r.Channels)), best
}

// acPower returns the mean square about the mean.
func acPower(x []float64) float64 {
	if len(x) == 0 {
		return 0
	}
	m := mean(x)
	s := 0.0
	for _, v := range x {
		s += (v - m) * (v - m)
	}
	return s / float64(len(x))
}

func mean(x []float64) float64 {
	s := 0.0
	for _, v := range x {
		s += v
	}
	return s / float64(len(x))
}

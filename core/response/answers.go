package response

import (
	"math"

	"hoopsheet/core/disc"
	"hoopsheet/core/internal/sorting"
)

// Spot is what is told of one point besides its history.
type Spot struct {
	// Spectrum holds amplitudes, m, of its displacement at the frequencies 0,
	// SpectrumStep, 2 SpectrumStep ... Hz, over the duration in a Hann window: a
	// steady swing of amplitude A shows as a peak of A.
	Spectrum     []float32
	SpectrumStep float64
	// Modes that move it most, the first most; Share is that of the sum of how far
	// each may move it.
	Modes []Share
}

// usualLevel, dB, of a ring-down.
const usualLevel = 60

// spectrumOf returns the spectrum of values at even steps, s.
func spectrumOf(values []float32, step float64) (amplitudes []float32, between float64) {
	n := len(values)
	if n < 2 {
		return nil, 0
	}
	mean := 0.0
	for _, v := range values {
		mean += float64(v) / float64(n)
	}
	// Zeros after the values make the length one that the transform takes, twice
	// over, so that a line between two frequencies is seen.
	f := disc.NewRealFFT(disc.NextAngles(2 * n))
	padded := make([]float64, disc.NextAngles(2*n))
	for i, v := range values {
		sin := math.Sin(math.Pi * float64(i) / float64(n))
		padded[i] = (float64(v) - mean) * sin * sin
	}
	lines := make([]complex128, len(padded)/2+1)
	f.Forward(lines, padded)
	amplitudes = make([]float32, len(lines))
	for k, z := range lines {
		// The window sums to n/2, half of it for a frequency above 0.
		amplitudes[k] = float32(math.Hypot(real(z), imag(z)) * 4 / float64(n))
	}
	amplitudes[0] = float32(math.Abs(mean))
	return amplitudes, 1 / (float64(len(padded)) * step)
}

// spots answers for the points of a case.
func (mo *motion) spots(c *Case, h *histories) []Spot {
	var list []Spot
	for i, p := range c.Points {
		var spot Spot
		spot.Spectrum, spot.SpectrumStep = spectrumOf(h.values[0][i], c.Duration/float64(len(h.times)-1))
		s := mo.stages[len(mo.stages)-1]
		sum := 0.0
		for n, v := range s.radials(p) {
			k := &s.modes[n]
			reach := math.Abs(v) * k.swing
			sum += reach
			if last := len(spot.Modes) - 1; n > 0 && k.same(&s.modes[n-1]) && last >= 0 {
				// Cosine and sine together, at the worst.
				spot.Modes[last].Share += reach
				continue
			}
			spot.Modes = append(spot.Modes, Share{M: k.m, N: k.n, Share: reach, Frequency: k.omega / (2 * math.Pi * c.unit())})
		}
		sorting.By(spot.Modes, byShare)
		spot.Modes = spot.Modes[:min(5, len(spot.Modes))]
		for n := range spot.Modes {
			if sum > 0 {
				spot.Modes[n].Share /= sum
			}
		}
		list = append(list, spot)
	}
	return list
}

func byShare(p, q Share) int {
	switch {
	case p.Share > q.Share:
		return -1
	case p.Share < q.Share:
		return 1
	}
	return 0
}

// energyDown returns how long, in units of a/c, after the last load or blow the
// energy takes to fall by a level in dB; 0 if it does not, or a load stays.
func (mo *motion) energyDown(level float64) float64 {
	s := mo.stages[len(mo.stages)-1]
	last := &s.legs[len(s.legs)-1]
	if len(last.loads) > 0 {
		return 0
	}
	energy := func(t float64) float64 {
		u, v := mo.energy(last.from + t)
		return u + v
	}
	wanted := energy(0) * math.Pow(10, -level/10)
	if wanted == 0 {
		return 0 // at rest
	}
	// Left to itself it never rises.
	high := 1.0
	for energy(high) > wanted {
		if high *= 2; high > 1e8 {
			return 0
		}
	}
	low := 0.0
	for high-low > 1e-7*high {
		if middle := (low + high) / 2; energy(middle) > wanted {
			low = middle
		} else {
			high = middle
		}
	}
	return high
}

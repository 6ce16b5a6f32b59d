package engine

import (
	"context"
	"math"

	"hoopsheet/core/spectrum"
)

// waveformColumns of the drawing of a recording.
const waveformColumns = 600

func runPeaks(_ context.Context, request *PeaksRequest) (*PeaksResult, error) {
	recording, err := spectrum.Read(request.Recording.Bytes)
	if err != nil {
		return nil, asError(err, "recording")
	}
	found, err := recording.Analyse(spectrum.Options{
		Lowest:   request.Lowest,
		Highest:  request.Highest,
		MaxPeaks: request.Most,
		Tap:      request.Tap,
		Points:   request.DisplayPoints,
	})
	if err != nil {
		return nil, asError(err, "recording")
	}
	result := &PeaksResult{
		Rate:        recording.Rate,
		Channels:    len(recording.Channels),
		Format:      recording.Encoding,
		Length:      recording.Duration(),
		Strikes:     found.Strikes,
		Tap:         found.Tap,
		From:        found.From,
		Analysed:    found.Seconds,
		Background:  found.Background,
		Clipped:     found.Clipped,
		Waveform:    waveform(recording.Mix(), waveformColumns),
		Frequencies: make(Numbers, len(found.Spectrum.Level)),
		Levels:      make(Numbers, len(found.Spectrum.Level)),
		Floor:       make(Numbers, len(found.Spectrum.Level)),
	}
	for i, level := range found.Spectrum.Level {
		result.Frequencies[i] = float32(found.Spectrum.Start + float64(i)*found.Spectrum.Step)
		result.Levels[i] = float32(level)
		result.Floor[i] = float32(found.Spectrum.Floor[i])
	}
	for _, p := range found.Peaks {
		peak := FoundPeak{
			Frequency:   p.Frequency,
			Uncertainty: p.FrequencyU,
			Level:       p.Level,
			Height:      p.Height,
			Prominence:  p.SNR,
			Kind:        p.Kind,
			Mains:       p.Mains,
			Glide:       p.Glide,
		}
		if p.DecayKnown && p.Decay > 0 {
			// exp(-decay t) = 10^-3 is a fall by 60 dB.
			peak.RingDown = 3 * math.Ln10 / p.Decay
		}
		result.Peaks = append(result.Peaks, peak)
	}
	for _, note := range found.Notes {
		result.Notes = append(result.Notes, note.Message)
	}
	return result, nil
}

// waveform gives the lowest and the highest sample of each of at most so many
// columns.
func waveform(samples []float64, columns int) Numbers {
	columns = min(columns, len(samples))
	out := make(Numbers, 0, 2*columns)
	for c := range columns {
		part := samples[c*len(samples)/columns : (c+1)*len(samples)/columns]
		low, high := part[0], part[0]
		for _, v := range part {
			low, high = min(low, v), max(high, v)
		}
		out = append(out, float32(low), float32(high))
	}
	return out
}

package engine

import (
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/spectrum"
	"hoopsheet/core/tap"
)

// PeaksRequest asks for the spectrum and the peaks of a recording.
type PeaksRequest struct {
	// Recording is a WAV file.
	Recording Blob `json:"recording"`
	// Lowest and Highest frequency looked at, Hz; 0 for the defaults.
	Lowest  float64 `json:"lowest"`
	Highest float64 `json:"highest"`
	// Most peaks wanted, 1 to 200; 0 for the default.
	Most int `json:"most"`
	// Tap says which strike of the recording is read, from 1; 0 for the first.
	Tap int `json:"tap"`
	// DisplayPoints of the spectrum curve, 0 for the default.
	DisplayPoints int `json:"displayPoints"`
}

// PeaksResult is what a recording shows.
type PeaksResult struct {
	// Rate, Hz; Channels; Bits of a sample; Format in words; Length, s.
	Rate     float64 `json:"rate"`
	Channels int     `json:"channels"`
	Format   string  `json:"format"`
	Length   float64 `json:"length"`
	// Strikes found, s from the start; Tap is the one read, from 1, or 0 where
	// nothing rises like a tap and all of the recording is used.
	Strikes []float64 `json:"strikes"`
	Tap     int       `json:"tap"`
	// From and Analysed are the start and the length of the stretch read, s.
	From     float64 `json:"from"`
	Analysed float64 `json:"analysed"`
	// Background is the level of the quiet parts against the loudest 10 ms, dB.
	Background float64 `json:"background"`
	// Clipped is the share of samples at full scale.
	Clipped float64 `json:"clipped"`
	// Waveform for show: lowest and highest value of each column in turn.
	Waveform Numbers `json:"waveform"`
	// Frequencies, Hz, and Levels and noise floor, dB relative to the largest,
	// of the curve.
	Frequencies Numbers     `json:"frequencies"`
	Levels      Numbers     `json:"levels"`
	Floor       Numbers     `json:"floor"`
	Peaks       []FoundPeak `json:"peaks"`
	Notes       []string    `json:"notes"`
}

// FoundPeak is one ringing line of a recording.
type FoundPeak struct {
	// Frequency and its standard uncertainty, Hz.
	Frequency   float64 `json:"frequency"`
	Uncertainty float64 `json:"uncertainty"`
	// Level relative to the strongest, dB, and Height where the peak stands in
	// the curve, dB.
	Level  float64 `json:"level"`
	Height float64 `json:"height"`
	// Prominence over the noise floor, dB.
	Prominence float64 `json:"prominence"`
	// RingDown to -60 dB, s; 0 where it could not be read.
	RingDown float64 `json:"ringDown"`
	// Kind tells ringing lines from steady tones (mains, a machine).
	Kind spectrum.Kind `json:"kind"`
	// Mains is 50 or 60 for a steady tone on a multiple of that mains
	// frequency; 0 otherwise.
	Mains int `json:"mains"`
}

// TapRequest asks for the tension that explains the peaks.
type TapRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	Peaks    []tap.Peak          `json:"peaks"`
}

// TapResult is the tension with its verdict.
type TapResult struct {
	// Readings, the most likely first.
	Readings []tap.Reading `json:"readings"`
	// Chosen is true when the first reading is likely enough to stand.
	Chosen bool `json:"chosen"`
	// Lower and Upper limit of the specified tension, N/m.
	Lower   float64     `json:"lower"`
	Upper   float64     `json:"upper"`
	Verdict tap.Verdict `json:"verdict"`
	// Reason for the verdict, in a sentence.
	Reason string `json:"reason"`
	// MassRatio rho a / sigma, and what leaving the moving air out does to the
	// tension, in sentences.
	MassRatio   float64  `json:"massRatio"`
	AirNote     string   `json:"airNote"`
	Assumptions []string `json:"assumptions"`
	Cautions    []string `json:"cautions"`
}

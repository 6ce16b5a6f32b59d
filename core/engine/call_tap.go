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
	// Glide is how much higher the line is at first, Hz: a hard tap rings sharp.
	// The frequency is then that at no amplitude. 0 where none is seen.
	Glide float64 `json:"glide"`
}

// TapRequest asks for the tension that explains the peaks.
type TapRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	Peaks    []tap.Peak          `json:"peaks"`
	// Without names effects to leave out; without all of them the peaks are read
	// as modes of the ideal sheet.
	Without []Effect  `json:"without,omitempty"`
	Inputs  TapInputs `json:"inputs,omitzero"`
}

// TapInputs are the standard uncertainties of what a tension rests on beside
// its peaks; 0 stands for the usual one, which the assumptions then state.
type TapInputs struct {
	// Radius and ArealDensity, relative.
	Radius       float64 `json:"radius,omitempty"`
	ArealDensity float64 `json:"arealDensity,omitempty"`
	// Temperature of the air, K, and its pressure, relative.
	Temperature float64 `json:"temperature,omitempty"`
	Pressure    float64 `json:"pressure,omitempty"`
	// Model is the relative standard deviation by which the frequencies of a
	// sound diaphragm scatter about those computed.
	Model float64 `json:"model,omitempty"`
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
	// Budget of the uncertainty of the first reading, largest share first.
	Budget []tap.Share `json:"budget"`
	// Ideal is what the ideal sheet would make of the first reading; left out
	// without one, or where the peaks are read as modes of the ideal sheet.
	Ideal *IdealReading `json:"ideal,omitempty"`
	// MassRatio rho a / sigma.
	MassRatio float64 `json:"massRatio"`
	// AirNote says what leaving the moving fluid out does to the tension, in
	// sentences; empty where it is taken into account.
	AirNote     string   `json:"airNote"`
	Assumptions []string `json:"assumptions"`
	Cautions    []string `json:"cautions"`
}

// IdealReading is the tension that the ideal sheet in vacuum would give for the
// same peaks, read as the same modes.
type IdealReading struct {
	// Tension, N/m, and how many times as much the diaphragm really has.
	Tension float64 `json:"tension"`
	Factor  float64 `json:"factor"`
	// Misfit is the largest relative deviation of a peak from the ideal sheet,
	// and RealMisfit that from the diaphragm as it stands.
	Misfit     float64 `json:"misfit"`
	RealMisfit float64 `json:"realMisfit"`
}

// Package tap turns the peaks of a tapped diaphragm into its tension: which
// mode each peak is, the tension that fits them, its spread, and whether the
// specified tolerance is met.
package tap

// Peak is one measured ringing frequency.
type Peak struct {
	// Frequency, Hz, and its standard uncertainty, Hz (0: not known).
	Frequency   float64 `json:"frequency"`
	Uncertainty float64 `json:"uncertainty"`
	// Level relative to the strongest peak, dB.
	Level float64 `json:"level"`
	// Use is false for a peak that the person has set aside.
	Use bool `json:"use"`
	// Pinned peaks belong to mode (M, N) by the person's decision, of a split
	// pair to either; N is 0 where the mode is free.
	M int `json:"m"`
	N int `json:"n"`
}

// Verdict is the outcome against the specified tolerance.
type Verdict string

// The verdicts.
const (
	VerdictPass      Verdict = "pass"
	VerdictFail      Verdict = "fail"
	VerdictUndecided Verdict = "undecided"
)

// Verdicts lists every verdict.
func Verdicts() []Verdict { return []Verdict{VerdictPass, VerdictFail, VerdictUndecided} }

// Match is one peak read as a mode.
type Match struct {
	// Peak is the index of the peak in the request.
	Peak int `json:"peak"`
	M    int `json:"m"`
	N    int `json:"n"`
	// Upper is true for the higher of a pair that unevenness or masses split.
	Upper bool `json:"upper,omitempty"`
	// Measured and Fitted frequency, Hz; Fitted is that of the model at the
	// fitted tension.
	Measured float64 `json:"measured"`
	Fitted   float64 `json:"fitted"`
	// Residual is (Measured - Fitted) / Fitted.
	Residual float64 `json:"residual"`
	// Tension that this peak alone gives, N/m.
	Tension float64 `json:"tension"`
}

// Reading is one way to read the peaks.
type Reading struct {
	Matches []Match `json:"matches"`
	// Tension fitted, N/m, with its standard uncertainty and the interval of
	// 95 % coverage.
	Tension             float64 `json:"tension"`
	StandardUncertainty float64 `json:"standardUncertainty"`
	Low                 float64 `json:"low"`
	High                float64 `json:"high"`
	// Spread is the sample standard deviation of the tensions that the peaks
	// give one by one, relative to Tension; a mode that follows the tension less
	// than the others counts less.
	Spread float64 `json:"spread"`
	// Odds of this reading among the rivals found, 0 to 1.
	Odds float64 `json:"odds"`
	// Unmatched are the indices of used peaks that no mode explains.
	Unmatched []int `json:"unmatched"`
	// Missing are modes below the highest match that show no peak, of a split
	// pair each by itself.
	Missing []ModeName `json:"missing"`

	// freedom is the degrees of freedom of the interval, 0 for infinitely many.
	freedom int
}

// ModeName names a mode by its nodal diameters and circles.
type ModeName struct {
	M int `json:"m"`
	N int `json:"n"`
}

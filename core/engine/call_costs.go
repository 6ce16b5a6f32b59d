package engine

import "hoopsheet/core/diaphragm"

// CostsRequest asks what each effect does to one mode, and what its frequency
// is most sensitive to.
type CostsRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	M        int                 `json:"m"`
	N        int                 `json:"n"`
	// Upper asks for the higher of a split pair.
	Upper bool `json:"upper,omitempty"`
	// Short leaves the sensitivities out, which take longest.
	Short bool `json:"short,omitempty"`
}

// CostsResult lists the effects one after another, and the sensitivities.
type CostsResult struct {
	Steps         []CostStep    `json:"steps"`
	Sensitivities []Sensitivity `json:"sensitivities"`
	// Note says what could not be listed; empty otherwise.
	Note string `json:"note,omitempty"`
}

// CostStep is one more effect taken into account.
type CostStep struct {
	// Name in words: "ideal sheet", "+ stiffness".
	Name string `json:"name"`
	// Frequency with this effect and those before it, Hz, and its change
	// against the step before, relative.
	Frequency float64 `json:"frequency"`
	Change    float64 `json:"change"`
}

// Sensitivity is what one input does to the frequency.
type Sensitivity struct {
	Field string `json:"field"`
	Name  string `json:"name"`
	// PerPercent is the change of frequency in percent for one percent of the
	// input: d ln f / d ln x.
	PerPercent float64 `json:"perPercent"`
}

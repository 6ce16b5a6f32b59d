package modes

import "math"

// Clearance is the verdict on the distance of a mode from a line: hit within
// the line's half-width, near within twice the half-width, clear beyond.
type Clearance string

// The clearances.
const (
	Hit   Clearance = "hit"
	Near  Clearance = "near"
	Clear Clearance = "clear"
)

// Clearances lists every clearance.
func Clearances() []Clearance { return []Clearance{Hit, Near, Clear} }

// Separation returns how far a frequency lies from a line, both in Hz,
// relative to the line: (frequency - line)/line, and what that means for the
// line's relative half-width. The bounds belong to the worse verdict.
func Separation(frequency, line, halfWidth float64) (relative float64, verdict Clearance) {
	relative = (frequency - line) / line
	// The bounds are compared as frequencies: typed numbers such as 105 Hz
	// against 100 Hz +- 5 % must not depend on how a quotient rounds.
	away := math.Abs(frequency - line)
	switch {
	case away <= line*halfWidth:
		return relative, Hit
	case away <= 2*line*halfWidth:
		return relative, Near
	}
	return relative, Clear
}

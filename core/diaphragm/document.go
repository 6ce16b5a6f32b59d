// Package diaphragm holds the document that describes one tensioned round
// diaphragm: its schema, defaults, validation, the list of fields a person can
// edit, and the codec of the links that carry it.
//
// Every stored value is in SI units (m, kg, s, K, Pa, N/m); units are chosen
// at the edge, for show, by package quantity. Directions count anticlockwise
// from the right in the plan.
package diaphragm

import "hoopsheet/core/air"

// Schema is the version of the document that this program writes. Documents of
// a later version are refused in words; older ones are migrated by Open.
const Schema = 1

// The largest numbers of entries of the document's lists.
const (
	MostLines     = 24
	MostHarmonics = 8
	MostPatches   = 8
	MostStrips    = 8
)

// Diaphragm is one document: what a workshop builds and an inspector checks.
type Diaphragm struct {
	Schema int `json:"schema"`
	// ID names the document for ever: a ULID, 26 characters of Crockford base 32.
	ID    string `json:"id"`
	Name  string `json:"name"`
	Place string `json:"place"`
	Notes string `json:"notes"`
	// Created is the time of creation, RFC 3339 in UTC.
	Created string `json:"created"`
	// Revision counts the kept revisions; 0 means that none has been kept.
	Revision int `json:"revision"`
	// Invented marks a demonstration document whose data are made up.
	Invented     bool         `json:"invented,omitempty"`
	Ring         Ring         `json:"ring"`
	Sheet        Sheet        `json:"sheet"`
	Tension      Tension      `json:"tension"`
	Attached     Attached     `json:"attached,omitzero"`
	Faces        Faces        `json:"faces"`
	Surroundings Surroundings `json:"surroundings"`
	Avoid        Avoid        `json:"avoid"`
	Damping      Damping      `json:"damping"`
}

// Ring is what the sheet is stretched on.
type Ring struct {
	// Radius is the inner, free radius of the sheet, m.
	Radius float64 `json:"radius"`
	// HubRadius is the radius of a fixed hub in the middle, m; 0 for none.
	HubRadius float64 `json:"hubRadius,omitempty"`
	// OutOfRound is half the difference of the semi-axes of the ring, m: they
	// are Radius + OutOfRound and Radius - OutOfRound. 0 for a round ring.
	OutOfRound float64 `json:"outOfRound,omitempty"`
	// OutOfRoundAngle is the direction of the longer axis, rad.
	OutOfRoundAngle float64 `json:"outOfRoundAngle,omitempty"`
	// Clamps is the number of clamps around the rim; 0 means not stated.
	Clamps int `json:"clamps"`
	// CTE is the ring's coefficient of thermal expansion, 1/K.
	CTE float64 `json:"cte"`
}

// Sheet is the film, foil, fabric or skin itself.
type Sheet struct {
	// Material is the generic name of the material, free text.
	Material string `json:"material"`
	// Thickness h, m.
	Thickness float64 `json:"thickness"`
	// Density of the sheet material, kg/m^3.
	Density float64 `json:"density"`
	// MeasuredArealDensity, kg/m^2, replaces Density times Thickness where it
	// is greater than zero.
	MeasuredArealDensity float64 `json:"measuredArealDensity"`
	// E is the in-plane modulus of elasticity, Pa.
	E float64 `json:"e"`
	// Nu is Poisson's ratio, 0 <= Nu <= 0.5.
	Nu float64 `json:"nu"`
	// CTE is the sheet's coefficient of thermal expansion, 1/K.
	CTE float64 `json:"cte"`
	// AllowableStress is the largest permitted membrane stress, Pa.
	AllowableStress float64 `json:"allowableStress"`
	// LossFactor eta of the material, 0 to 1: the share of its elastic energy
	// that is lost per radian. It acts on bending only, because tension stores
	// energy without loss.
	LossFactor float64 `json:"lossFactor,omitempty"`
}

// Tension is the specified line tension and how it differs around the rim.
type Tension struct {
	// Nominal line tension T, N/m, at the temperature of Surroundings: the mean
	// over all directions.
	Nominal float64 `json:"nominal"`
	// Tolerance is the permitted relative deviation, 0.1 for ten percent.
	Tolerance float64 `json:"tolerance"`
	// Rim says how the edge of the sheet is held; empty means RimClamped.
	Rim Rim `json:"rim,omitempty"`
	// Bonded is true where the sheet is glued or welded to the rim, so that it
	// cannot slide along it; false where it slides while it is tensioned.
	Bonded bool `json:"bonded,omitempty"`
	// WeftRatio q is the weft tension of a fabric over its warp tension; 0 or 1
	// where both are the same. With the mean T the warp tension is 2 T/(1 + q)
	// and the weft tension 2 T q/(1 + q).
	WeftRatio float64 `json:"weftRatio,omitempty"`
	// WarpAngle is the direction of the warp, rad.
	WarpAngle float64 `json:"warpAngle,omitempty"`
	// Upright is true where the plan stands vertical, its lower side down, so
	// that the weight of the sheet hangs in the ring.
	Upright bool `json:"upright,omitempty"`
	// Harmonics of the tension around the rim, at most MostHarmonics.
	Harmonics []Harmonic `json:"harmonics,omitempty"`
}

// Rim says how the edge of the sheet is held against bending.
type Rim string

// The kinds of rim.
const (
	RimClamped   Rim = "clamped"   // neither travel nor slope
	RimSupported Rim = "supported" // no travel, free to turn
)

// Rims lists every kind of rim in the order in which it is offered.
func Rims() []Rim { return []Rim{RimClamped, RimSupported} }

// OrClamped is the rim itself, or RimClamped where none is given.
func (r Rim) OrClamped() Rim {
	if r == "" {
		return RimClamped
	}
	return r
}

// Harmonic is one part of uneven tension: the pull of the rim at angle theta is
//
//	T [1 + Epsilon cos(Order (theta - Angle))].
type Harmonic struct {
	// Order k is the number of tight places around the rim, 2 or more; 1 exists
	// with a bonded rim only, because a sliding one would be out of balance.
	Order int `json:"order"`
	// Epsilon is the relative amplitude, 0 <= Epsilon < 1.
	Epsilon float64 `json:"epsilon"`
	// Angle of a tight place, rad.
	Angle float64 `json:"angle"`
}

// Faces says what lies on each side of the sheet.
type Faces struct {
	Upper Face `json:"upper"`
	Lower Face `json:"lower"`
}

// Face is one side of the sheet.
type Face struct {
	Kind FaceKind `json:"kind"`
	// Fluid at this face; empty means air. Not used by FaceVacuum.
	Fluid air.FluidName `json:"fluid,omitempty"`
	// Wall is the distance of a parallel wall or floor, m; 0 for none. Used by
	// FaceBaffled only.
	Wall float64 `json:"wall,omitempty"`
	// Depth of a cavity behind this face, m; used by FaceCavity only.
	Depth float64 `json:"depth,omitempty"`
	// VentArea is the cross-section of a vent or leak of the cavity, m^2, 0 for
	// none, and VentLength the length of the passage, m, without end
	// corrections. Used by FaceCavity only.
	VentArea   float64 `json:"ventArea,omitempty"`
	VentLength float64 `json:"ventLength,omitempty"`
}

// FaceKind says how the fluid on one side of the sheet is bounded.
type FaceKind string

// The kinds of face. FaceOpen holds for both faces or for neither, because the
// fluid passes around the rim.
const (
	FaceVacuum  FaceKind = "vacuum"
	FaceOpen    FaceKind = "open"
	FaceBaffled FaceKind = "baffled"
	FaceCavity  FaceKind = "cavity"
)

// FaceKinds lists every kind of face in the order in which it is offered.
func FaceKinds() []FaceKind {
	return []FaceKind{FaceOpen, FaceBaffled, FaceCavity, FaceVacuum}
}

// Surroundings is the state of the air and the range of service.
type Surroundings struct {
	// Temperature of air and sheet at which Tension.Nominal holds, K.
	Temperature float64 `json:"temperature"`
	// Pressure of the air, Pa.
	Pressure float64 `json:"pressure"`
	// Humidity is the relative humidity, 0 to 1.
	Humidity float64 `json:"humidity"`
	// ServiceMin and ServiceMax bound the temperature in service, K.
	ServiceMin float64 `json:"serviceMin"`
	ServiceMax float64 `json:"serviceMax"`
}

// Avoid lists the frequencies to keep clear of.
type Avoid struct {
	// Lowest is the lowest frequency that a mode may have, Hz; 0 for none.
	Lowest float64 `json:"lowest"`
	Lines  []Line  `json:"lines"`
}

// Line is one frequency to keep clear of.
type Line struct {
	Name string `json:"name"`
	// Frequency of the line, Hz.
	Frequency float64 `json:"frequency"`
	// HalfWidth is the relative half-width of the band in which a mode counts
	// as a hit, 0.05 for five percent to either side.
	HalfWidth float64 `json:"halfWidth"`
}

// Damping is what is known or assumed of the decay.
type Damping struct {
	// Ratio is the damping ratio zeta (share of critical) of every mode.
	Ratio float64 `json:"ratio"`
}

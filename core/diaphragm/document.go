// Package diaphragm holds the document that describes one tensioned round
// diaphragm: its schema, defaults, validation, the list of fields a person can
// edit, and the codec of the links that carry it.
//
// Every stored value is in SI units (m, kg, s, K, Pa, N/m); units are chosen
// at the edge, for show, by package quantity.
package diaphragm

// Schema is the version of the document that this program writes. Documents of
// a later version are refused in words; older ones are migrated by Open.
const Schema = 1

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
	Faces        Faces        `json:"faces"`
	Surroundings Surroundings `json:"surroundings"`
	Avoid        Avoid        `json:"avoid"`
	Damping      Damping      `json:"damping"`
}

// Ring is what the sheet is stretched on.
type Ring struct {
	// Radius is the inner, free radius of the sheet, m.
	Radius float64 `json:"radius"`
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
}

// Tension is the specified line tension.
type Tension struct {
	// Nominal line tension T, N/m, at the temperature of Surroundings.
	Nominal float64 `json:"nominal"`
	// Tolerance is the permitted relative deviation, 0.1 for ten percent.
	Tolerance float64 `json:"tolerance"`
}

// Faces says what lies on each side of the sheet.
type Faces struct {
	Upper Face `json:"upper"`
	Lower Face `json:"lower"`
}

// Face is one side of the sheet.
type Face struct {
	Kind FaceKind `json:"kind"`
	// Depth of a cavity behind this face, m; used by FaceCavity only.
	Depth float64 `json:"depth,omitempty"`
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

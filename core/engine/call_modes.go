package engine

import (
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

// ModesRequest asks for the modes of the diaphragm as it stands.
type ModesRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	// Count of modes to list, lowest first; 1 to 400.
	Count int `json:"count"`
	// Without names effects to leave out.
	Without []Effect `json:"without,omitempty"`
	// Quick leaves out uneven tension, out-of-round and attached masses, for a
	// list at once; the result then says that it is rough.
	Quick bool `json:"quick,omitempty"`
}

// ModesResult is the mode table.
type ModesResult struct {
	// ArealDensity sigma, kg/m^2, and WaveSpeed sqrt(T/sigma), m/s.
	ArealDensity float64 `json:"arealDensity"`
	WaveSpeed    float64 `json:"waveSpeed"`
	// AirDensity, kg/m^3, and MassRatio rho a / sigma.
	AirDensity float64 `json:"airDensity"`
	MassRatio  float64 `json:"massRatio"`
	Modes      []Mode  `json:"modes"`
	// Rough is true where a quick list leaves something out.
	Rough bool `json:"rough,omitempty"`
	// Smallest and Largest principal tension over the sheet, where it is uneven.
	Smallest *Tautness `json:"smallest,omitempty"`
	Largest  *Tautness `json:"largest,omitempty"`
	// Applies lists the effects that this diaphragm has, in or left out.
	Applies     []Effect `json:"applies"`
	Assumptions []string `json:"assumptions"`
	Cautions    []string `json:"cautions"`
}

// Tautness is a principal tension and where it is.
type Tautness struct {
	// Tension, N/m, and its Share of the mean.
	Tension float64 `json:"tension"`
	Share   float64 `json:"share"`
	// Radius, r/a, Angle and Direction of the pull, rad.
	Radius    float64 `json:"radius"`
	Angle     float64 `json:"angle"`
	Direction float64 `json:"direction"`
}

// Mode is one line of the table.
type Mode struct {
	// M nodal diameters; N nodal circles counting the rim.
	M int `json:"m"`
	N int `json:"n"`
	// Upper marks the higher of a pair that unevenness or masses split; then
	// Even is the frequency without them, Hz, Split the difference of the pair
	// over its mean, SplitHertz that difference, Partner the frequency of the
	// other, Hz, NodalAngle where the first nodal diameter lies, rad, and Share
	// the share of the even pair in the mode. All are 0 otherwise.
	Upper      bool    `json:"upper"`
	Even       float64 `json:"even"`
	Split      float64 `json:"split"`
	SplitHertz float64 `json:"splitHertz"`
	Partner    float64 `json:"partner"`
	NodalAngle float64 `json:"nodalAngle"`
	Share      float64 `json:"share"`
	// Frequency, Hz, with the error of the computation, Hz.
	Frequency float64 `json:"frequency"`
	Error     float64 `json:"error"`
	// Ideal frequency of the ideal sheet in vacuum, Hz.
	Ideal float64 `json:"ideal"`
	// FluidShare is the share of the moving mass that is fluid.
	FluidShare float64 `json:"fluidShare"`
	// Damping ratios by cause.
	Damping ModeDamping `json:"damping"`
	// RingDown to -60 dB, s, and Q; 0 without damping.
	RingDown float64 `json:"ringDown"`
	Q        float64 `json:"q"`
	// Kind is "film-dominated" or "cavity-dominated" for the modes of a
	// diaphragm with a cavity, by where most of the strain energy is; empty
	// otherwise.
	Kind string `json:"kind"`
	// NodalLines in words.
	NodalLines string `json:"nodalLines"`
	// Distances to every line to keep clear of, nearest first.
	Distances []Distance `json:"distances"`
	// BelowLowest is true when the mode lies below the lowest frequency
	// allowed.
	BelowLowest bool `json:"belowLowest"`
}

// ModeDamping are ratios to critical damping.
type ModeDamping struct {
	// Radiation of sound and Viscous friction of the fluid are computed; Sheet
	// is the loss of the material by its share of the energy; Remainder is what
	// was given.
	Radiation float64 `json:"radiation"`
	Viscous   float64 `json:"viscous"`
	Sheet     float64 `json:"sheet"`
	Remainder float64 `json:"remainder"`
	Total     float64 `json:"total"`
	// RadiationKnown is false where nothing is stated of radiation.
	RadiationKnown bool `json:"radiationKnown"`
}

// Distance is how far a mode is from one line to keep clear of.
type Distance struct {
	Line string `json:"line"`
	// LineFrequency, Hz.
	LineFrequency float64 `json:"lineFrequency"`
	// Relative is (mode - line) / line.
	Relative float64 `json:"relative"`
	// Clearance is hit within the line's half-width, near within twice the
	// half-width, clear beyond.
	Clearance modes.Clearance `json:"clearance"`
}

// ShapeRequest asks for the drawing of one mode.
type ShapeRequest struct {
	// Document of the diaphragm; without it the ideal sheet is drawn.
	Document *diaphragm.Diaphragm `json:"document,omitempty"`
	Without  []Effect             `json:"without,omitempty"`
	// Upper asks for the higher of a split pair.
	Upper bool `json:"upper,omitempty"`
	M     int  `json:"m"`
	N     int  `json:"n"`
	// Orientation of the first antinode, rad.
	Orientation float64 `json:"orientation"`
	// Size of the square raster, pixels a side, 16 to 1024.
	Size int `json:"size"`
	// Section through the centre at this angle, rad, with SectionPoints points
	// from rim to rim.
	SectionAngle  float64 `json:"sectionAngle"`
	SectionPoints int     `json:"sectionPoints"`
}

// ShapeResult is the mode shape, scaled to a largest value of one.
type ShapeResult struct {
	// Raster rows from top to bottom, left to right, of a square around the
	// unit disc; NaN outside the disc.
	Raster Numbers `json:"raster"`
	// Section displacement from the far rim (-1) through the centre to +1.
	Section Numbers `json:"section"`
	// Bent is true for a mode whose nodal lines are neither circles nor
	// diameters: they are where the raster changes sign.
	Bent bool `json:"bent,omitempty"`
	// Oval is the half difference of the semi-axes of the ring over its radius,
	// and OvalAngle the direction of the longer, rad. The raster is drawn as if
	// the ring were round.
	Oval      float64 `json:"oval,omitempty"`
	OvalAngle float64 `json:"ovalAngle,omitempty"`
	// Hub is the radius of a hub over that of the ring.
	Hub float64 `json:"hub,omitempty"`
	// Patches and Strips on the sheet, in units of the ring radius.
	Patches []PatchOutline `json:"patches,omitempty"`
	Strips  []StripOutline `json:"strips,omitempty"`
	// CircleRadii of the nodal circles inside the rim, r/a.
	CircleRadii []float64 `json:"circleRadii"`
	// DiameterAngles of the nodal diameters, rad, 0 <= angle < pi.
	DiameterAngles []float64 `json:"diameterAngles"`
	// Lobes are the local extremes, for the + and - signs.
	Lobes []Lobe `json:"lobes"`
}

// Lobe is one local extreme of a shape.
type Lobe struct {
	Radius float64 `json:"radius"`
	Angle  float64 `json:"angle"`
	// Value, -1 to 1.
	Value float64 `json:"value"`
}

// PatchOutline is a patch on a drawing, in units of the ring radius and rad.
type PatchOutline struct {
	Radius float64 `json:"radius"`
	Angle  float64 `json:"angle"`
	Size   float64 `json:"size"`
	Rigid  bool    `json:"rigid"`
}

// StripOutline is a strip on a drawing, in units of the ring radius; Angle,
// rad, is square to it.
type StripOutline struct {
	Offset float64 `json:"offset"`
	Angle  float64 `json:"angle"`
	Width  float64 `json:"width"`
}

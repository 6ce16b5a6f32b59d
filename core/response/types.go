// Package response computes what a diaphragm does after it is let go or
// struck: the initial-value problem, its frames, histories and largest travel.
package response

// ShapeKind names a form of initial displacement or velocity.
type ShapeKind string

// The shapes that can be chosen.
const (
	// ShapeRest is zero everywhere.
	ShapeRest ShapeKind = "rest"
	// ShapeBulge is the static form under even pressure, 1 - r^2.
	ShapeBulge ShapeKind = "bulge"
	// ShapePoint is the sheet pulled at one place by a small round pad; the
	// static form of the ideal sheet.
	ShapePoint ShapeKind = "point"
	// ShapeBump is a smooth local bump (1 - s^2)^3 of the distance s from its
	// centre in units of its width, zero outside.
	ShapeBump ShapeKind = "bump"
	// ShapePatch is one inside a round patch and zero outside.
	ShapePatch ShapeKind = "patch"
	// ShapeEven is one everywhere.
	ShapeEven ShapeKind = "even"
	// ShapeHalf is one on the half of the disc about Angle, zero on the other.
	ShapeHalf ShapeKind = "half"
	// ShapeFormula is a formula in r, theta, x and y, and in metres rho, X and Y.
	ShapeFormula ShapeKind = "formula"
	// ShapeMeasured is fitted to measured values at points.
	ShapeMeasured ShapeKind = "measured"
)

// ShapeKinds lists every kind of shape in the order in which it is offered.
func ShapeKinds() []ShapeKind {
	return []ShapeKind{ShapeRest, ShapeBulge, ShapePoint, ShapeBump, ShapePatch, ShapeEven, ShapeHalf, ShapeFormula, ShapeMeasured}
}

// Shape is an initial displacement (Peak in m) or velocity (Peak in m/s) over
// the sheet.
type Shape struct {
	Kind ShapeKind `json:"kind"`
	// Peak scales the shape: its largest value for the built-in kinds, the
	// factor before a formula. m for a displacement, m/s for a velocity.
	Peak float64 `json:"peak"`
	// Radius and Angle (rad) place the centre of a point, bump or patch;
	// Radius is in units of the ring radius, 0 <= Radius < 1.
	Radius float64 `json:"radius"`
	Angle  float64 `json:"angle"`
	// Width is the radius of the pad, bump or patch in units of the ring
	// radius, 0 < Width <= 1.
	Width float64 `json:"width"`
	// Formula in r (0 to 1), theta (rad, from 0 to below 2 pi), x and y
	// (r cos theta, r sin theta).
	Formula string `json:"formula"`
	// Table of a measured shape: lines "x, y, value", or "r, theta, value" where
	// the first line names these (theta in degrees).
	Table string `json:"table,omitempty"`
	// PlaceUnit and ValueUnit of the table; m, and the unit of the shape, if
	// empty.
	PlaceUnit string `json:"placeUnit,omitempty"`
	ValueUnit string `json:"valueUnit,omitempty"`
}

// Point is a place on the sheet: Radius in units of the ring radius, Angle in
// rad, counted anticlockwise from the right in the plan.
type Point struct {
	Radius float64 `json:"radius"`
	Angle  float64 `json:"angle"`
}

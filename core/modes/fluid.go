package modes

import (
	"math/cmplx"

	"hoopsheet/core/diaphragm"
)

// Face is one side of a diaphragm and the fluid there.
type Face struct {
	Kind diaphragm.FaceKind
	// Density of the fluid, kg/m^3, and its speed of sound, m/s. Not used in
	// vacuum.
	Density, SoundSpeed float64
	// Viscosity is the kinematic viscosity, m^2/s; 0 leaves viscous damping out.
	Viscosity float64
	// Depth of a cavity, m, and its vent or leak, if any.
	Depth float64
	Vent  *Vent
	// WallDistance of a rigid wall parallel to a baffled face, m; 0 for none.
	WallDistance float64
}

// MaxSoundNumber is the largest k0 a = omega a/c0 for which the power series of
// the radiating fluid keeps 8 digits (TestSeriesReach).
const MaxSoundNumber = 10

// seriesPowers returns how many powers of k0 a sound series needs.
func seriesPowers(k0 complex128) int {
	// Terms fall like (2 k0)^p/p! (products J_b J_b' have the type of J(2k));
	// p = 2 e k0 + 20 leaves less than 1e-16 of the whole. In steps, so that few
	// tables are made.
	switch k := cmplx.Abs(k0); {
	case k <= 1:
		return 32
	case k <= 4:
		return 48
	}
	return 96
}

// fluidFace is what a face adds to the matrices of one order.
type fluidFace interface {
	// static adds the part that does not depend on frequency to x (n by n).
	static(x []float64)
	// moving tells whether there is a part that depends on frequency.
	moving() bool
	// dynamic adds that part at angular frequency omega to the lower triangles
	// of re and im; false if omega is out of reach.
	dynamic(re, im []float64, omega complex128) bool
}

// outside tells whether there is fluid on an open or baffled face.
func (r Real) outside() bool {
	for _, f := range []Face{r.Upper, r.Lower} {
		if f.Density > 0 && (f.Kind == diaphragm.FaceOpen || f.Kind == diaphragm.FaceBaffled) {
			return true
		}
	}
	return false
}

// cavity tells whether there is a cavity behind a face.
func (r Real) cavity() bool {
	return r.Upper.Kind == diaphragm.FaceCavity || r.Lower.Kind == diaphragm.FaceCavity
}

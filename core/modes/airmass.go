package modes

import "hoopsheet/core/diaphragm"

// Added-mass factors of mode (0,1) of the sheet for one side in incompressible
// fluid: the mass per area that a side adds is factor times rho a.
//
// Baffled: Gamma = 2 j^2 integral_0^inf J_0(k)^2/(j^2-k^2)^2 dk with j = j_01,
// in the definition of Kwak, J. Sound Vib. 178 (1994) 688-690. Without baffle,
// fluid on both sides: Copson's solution of the dual integral equations,
// Gamma = [J_v'(j)^2 + (1-v^2/j^2) J_v(j)^2]/(j J_0'(j)^2) with v = 1/2. Both
// values were computed with mpmath in two ways; TestAirMassFactors computes
// them again.
const (
	airMassBaffled = 0.7464351569
	airMassOpen    = 0.4929631608
)

// AirMass estimates the mass of the air that moves with mode (0,1), in units
// of the mass of the sheet that moves, for the mass ratio rho a/sigma and the
// two faces. It is the limit of slow motion, in which the air is
// incompressible and the mode keeps its shape: an estimate good enough to warn
// with. known is false where a face is a cavity, whose air is a spring as well.
//
// The frequency falls to about 1/sqrt(1 + share) of that of the ideal sheet.
func AirMass(massRatio float64, faces diaphragm.Faces) (share float64, known bool) {
	for _, face := range []diaphragm.Face{faces.Upper, faces.Lower} {
		switch face.Kind {
		case diaphragm.FaceBaffled:
			share += airMassBaffled * massRatio
		case diaphragm.FaceOpen:
			share += airMassOpen * massRatio
		case diaphragm.FaceCavity:
			return 0, false
		}
	}
	return share, true
}

package modes

import (
	"math"

	"hoopsheet/core/diaphragm"
)

// Damping of a mode: ratios to critical damping by cause.
type Damping struct {
	// Radiation of sound, computed with the mode.
	Radiation float64
	// Viscous friction of the fluid along the sheet and its baffle, computed from
	// a boundary layer thin against the wave on the sheet.
	Viscous float64
	// Sheet is the material's loss, half the loss factor times the share of
	// bending energy.
	Sheet float64
	// Remainder is what was given, not computed.
	Remainder float64
	// Total of the above; Q = 1/(2 Total); RingDown is the time to fall by 60 dB,
	// s. Q and RingDown are +Inf without damping.
	Total, Q, RingDown float64
}

func (d *Damping) sum(omega float64) {
	d.Total = d.Radiation + d.Viscous + d.Sheet + d.Remainder
	d.Q = 1 / (2 * d.Total)
	d.RingDown = math.Log(1000) / (d.Total * omega)
}

// viscousRatio returns the damping ratio from friction at one face: square is
// the integral of the squared shape over the sheet, m^2, mass the modal mass, k
// the wave number on the sheet, 1/m.
func viscousRatio(f Face, omega, square, mass, k float64) float64 {
	// A Stokes layer of depth delta takes (rho omega delta/4) |u_t|^2 per area
	// (Landau & Lifshitz, Fluid Mechanics, section 24). In a still half-space the
	// velocities along and across a plane have equal integrals of the square,
	// |u_t|^2 = |k phi|^2 = |u_n|^2 in wave numbers, over sheet and baffle
	// together. Power over twice omega times the energy mass |u|^2/2. With open
	// faces this leaves out the flow around the edge. In a gap the flow along is
	// coth(kd) of that across at the sheet and 1/sinh(kd) at the wall, taken at
	// the one wave number of the mode.
	if f.Viscosity == 0 || f.Kind == diaphragm.FaceCavity {
		return 0
	}
	delta := math.Sqrt(2 * f.Viscosity / omega)
	ratio := f.Density * delta / 4 * square / mass
	if f.WallDistance > 0 {
		s := math.Sinh(k * f.WallDistance)
		ratio *= 1 + 2/(s*s)
	}
	return ratio
}

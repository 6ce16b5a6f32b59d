package response

import (
	"math"
	"math/cmplx"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
	"hoopsheet/core/modes"
)

// leastTerms is the number of Bessel functions that a shape has at least, so
// that a response of few circles has them in their true form: beyond it the
// coefficients of (0,1) are below 1e-3 even with a fluid far heavier than the
// sheet, and they fall off like n^-2.5.
const leastTerms = 12

// NewWet takes the modes of a diaphragm with up to the given nodal diameters
// and circles from its solution with still fluid, which must hold them. Of
// loud, the solution with sound, which may hold fewer or be nil, it takes
// frequency and damping; the strain energy of a shape does not depend on sound.
func NewWet(still, loud *modes.Solution, cavity bool, orders, circles int) *Wet {
	return newWet(still, loud, cavity, orders, circles, max(circles, leastTerms))
}

func newWet(still, loud *modes.Solution, cavity bool, orders, circles, terms int) *Wet {
	w := &Wet{Orders: make([][]WetMode, orders+1)}
	for m := range w.Orders {
		w.Orders[m] = make([]WetMode, circles)
	}
	real := &still.Real
	basis := basisOf(orders, terms)
	converters := map[[2]int]*disc.Converter{}
	for i := range still.Modes {
		mode := &still.Modes[i]
		if mode.M > orders || mode.N > circles {
			continue
		}
		// The clamped edge of a thin sheet makes the disc of the shapes smaller by
		// less than a thousandth. They are drawn out to the ring, which leaves the
		// strain energy as it is.
		coef, _ := mode.Coefficients()
		size := [2]int{mode.M, len(coef)}
		if converters[size] == nil {
			converters[size] = disc.NewConverter(basis, mode.M, disc.HeldEdge, len(coef))
		}
		shape := make([]float64, terms)
		converters[size].ToBessel(shape, coef)
		omega := cmplx.Abs(mode.Omega())
		volume := 0.0
		if mode.M == 0 {
			// The Hankel transform J_b(k)/k^2 of a shape is 1/8 at k = 0 for b = 2 and
			// zero for the others.
			volume = 2 * math.Pi * coef[0] / 8
		}
		w.Orders[mode.M][mode.N-1] = WetMode{
			N: mode.N, Omega: omega, Zeta: mode.Damping.Total, Shape: shape, FilmShare: mode.FilmShare,
			Volume: volume, Strain: omega * omega * (mode.SheetMass + mode.FluidMass) / real.Tension,
		}
	}
	if loud != nil {
		for i := range loud.Modes {
			if mode := &loud.Modes[i]; mode.M <= orders && mode.N <= circles {
				own := &w.Orders[mode.M][mode.N-1]
				own.Omega, own.Zeta = cmplx.Abs(mode.Omega()), mode.Damping.Total
			}
		}
	}
	for _, face := range []modes.Face{real.Upper, real.Lower} {
		if !cavity || face.Kind != diaphragm.FaceCavity {
			continue
		}
		w.Cavity = true
		if face.Vent == nil {
			w.CavitySpring = face.Density * face.SoundSpeed * face.SoundSpeed * real.Radius * real.Radius / (math.Pi * face.Depth * real.Tension)
		}
	}
	return w
}

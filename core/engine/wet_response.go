package engine

import (
	"math"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
	"hoopsheet/core/modes"
	"hoopsheet/core/response"
)

// soundDiameters and soundCircles bound the modes of a response whose radiation
// is computed; higher ones radiate little in their share of a motion, and
// computing theirs would make typing wait.
const (
	soundDiameters = 5
	soundCircles   = 3
)

// wets keeps those of the last few diaphragms, which stay while a person
// changes the shapes.
var wets = newCache[solutionKey, *response.Wet](3)

// wetOf gives the modes that a response is summed of; nil where every effect is
// left out, which is the ideal sheet.
func wetOf(doc *diaphragm.Diaphragm, without []Effect, orders, circles int) (*response.Wet, error) {
	effects, err := effectsWithout(without)
	if err != nil || effects == (modes.Effects{}) {
		return nil, err
	}
	if orders > modes.MaxDiameters || circles > modes.MaxCircles {
		return nil, Fail("orders", CodeRange, "With the fluid, up to 40 nodal diameters and 20 nodal circles can be taken.")
	}
	real, err := realOf(doc)
	if err != nil {
		return nil, err
	}
	key := keyOf(real, effects, orders, circles)
	if wet, ok := wets.get(key); ok {
		return wet, nil
	}
	still := effects
	still.Sound = false
	all, err := solve(real, still, orders, circles)
	if err != nil {
		return nil, err
	}
	wet := &response.Wet{Orders: make([][]response.WetMode, orders+1), Words: realAssumptions(doc, effects, nil)}
	basis := disc.NewBasis(orders, circles)
	converters := map[[2]int]*disc.Converter{}
	for m := range wet.Orders {
		wet.Orders[m] = make([]response.WetMode, circles)
	}
	for i := range all.Modes {
		mode := &all.Modes[i]
		coef, _ := mode.Coefficients()
		size := [2]int{mode.M, len(coef)}
		if converters[size] == nil {
			converters[size] = disc.NewConverter(basis, mode.M, disc.HeldEdge, len(coef))
		}
		shape := make([]float64, circles)
		converters[size].ToBessel(shape, coef)
		wet.Orders[mode.M][mode.N-1] = response.WetMode{
			N: mode.N, Omega: 2 * math.Pi * mode.Frequency, Zeta: mode.Damping.Total, Shape: shape, FilmShare: mode.FilmShare,
		}
	}
	if effects.Sound && effects.Fluid {
		if err := addSound(wet, real, effects, orders, circles); err != nil {
			return nil, err
		}
	}
	for _, face := range []modes.Face{real.Upper, real.Lower} {
		if effects.Cavity && face.Kind == diaphragm.FaceCavity && face.Vent == nil {
			wet.CavitySpring = face.Density * face.SoundSpeed * face.SoundSpeed * real.Radius * real.Radius / (math.Pi * face.Depth * real.Tension)
		}
	}
	wets.put(key, wet)
	return wet, nil
}

// addSound gives the lowest modes the frequency and the damping that they have
// in a fluid that radiates sound.
func addSound(wet *response.Wet, real modes.Real, effects modes.Effects, orders, circles int) error {
	loud, err := solve(real, effects, min(orders, soundDiameters), min(circles, soundCircles))
	if err != nil {
		return err
	}
	for i := range loud.Modes {
		mode := &loud.Modes[i]
		list := wet.Orders[mode.M]
		for k := range list {
			if list[k].N == mode.N {
				list[k].Omega, list[k].Zeta = 2*math.Pi*mode.Frequency, mode.Damping.Total
			}
		}
	}
	wet.Words = append(wet.Words, "Radiation of sound damps the modes with up to 5 nodal diameters and 3 nodal circles; that of higher ones is left out.")
	return nil
}

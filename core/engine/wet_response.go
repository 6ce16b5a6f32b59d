package engine

import (
	"strconv"

	"hoopsheet/core/diaphragm"
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

// reallyThere are the effects of those given that the diaphragm has.
func reallyThere(real *modes.Real, effects modes.Effects) modes.Effects {
	var fluid, cavity bool
	for _, face := range []modes.Face{real.Upper, real.Lower} {
		fluid = fluid || face.Kind != diaphragm.FaceVacuum && face.Density > 0
		cavity = cavity || face.Kind == diaphragm.FaceCavity
	}
	effects.Stiffness = effects.Stiffness && real.Stiffness > 0
	effects.Fluid = effects.Fluid && fluid
	effects.Sound = effects.Sound && fluid
	effects.Cavity = effects.Cavity && cavity
	return effects
}

// wetOf gives the modes that a response is summed of; nil where every effect is
// left out, or absent and more modes are wanted than can be had with one, which
// is the ideal sheet.
func wetOf(doc *diaphragm.Diaphragm, without []Effect, effects modes.Effects, orders, circles int) (*response.Wet, error) {
	uneven, coupled := unevenOf(doc, without)
	coupled = coupled && doc.Ring.HubRadius == 0
	if effects == (modes.Effects{}) && !coupled {
		return nil, nil
	}
	real, err := realOf(doc)
	if err != nil {
		return nil, err
	}
	if (orders > modes.MaxDiameters || circles > modes.MaxCircles) && !coupled && reallyThere(&real, effects) == (modes.Effects{}) {
		return nil, nil
	}
	if orders > modes.MaxDiameters {
		return nil, Fail("orders", CodeRange, "With the fluid or the stiffness, up to "+strconv.Itoa(modes.MaxDiameters)+" nodal diameters can be taken.")
	}
	if circles > modes.MaxCircles {
		return nil, Fail("circles", CodeRange, "With the fluid or the stiffness, up to "+strconv.Itoa(modes.MaxCircles)+" nodal circles can be taken.")
	}
	if coupled {
		return mixedOf(doc, real, effects, uneven, orders, circles)
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
	words := realAssumptions(doc, effects, all.Notes)
	var loud *modes.Solution
	if effects.Sound && effects.Fluid && radiates(real) {
		if loud, err = solve(real, effects, min(orders, soundDiameters), min(circles, soundCircles)); err != nil {
			return nil, err
		}
		words = append(words, "Radiation of sound damps the modes with up to "+strconv.Itoa(soundDiameters)+" nodal diameters and "+
			strconv.Itoa(soundCircles)+" nodal circles; that of higher ones is left out.")
	}
	wet := response.NewWet(all, loud, effects.Cavity, orders, circles)
	wet.Words = words
	wets.put(key, wet)
	return wet, nil
}

// radiates tells whether sound can leave a face.
func radiates(real modes.Real) bool {
	for _, face := range []modes.Face{real.Upper, real.Lower} {
		if (face.Kind == diaphragm.FaceOpen || face.Kind == diaphragm.FaceBaffled) && face.Density > 0 {
			return true
		}
	}
	return false
}

// mixeds keeps the modes of the last few uneven diaphragms for a response.
var mixeds = newCache[string, *response.Wet](2)

// mixedOf gives the modes that a response of an uneven diaphragm is summed of.
func mixedOf(doc *diaphragm.Diaphragm, real modes.Real, effects modes.Effects, uneven modes.Uneven, orders, circles int) (*response.Wet, error) {
	key := strconv.Itoa(orders) + " " + strconv.Itoa(circles) + unevenKey(real, effects, uneven)
	if wet, ok := mixeds.get(key); ok {
		return wet, nil
	}
	low, err := solve(real, effects, coupledDiameters, coupledCircles)
	if err != nil {
		return nil, err
	}
	coupled, err := modes.SolveCoupled(low, uneven)
	if err != nil {
		return nil, unevenRefusal(err)
	}
	still := effects
	still.Sound = false
	all, err := solve(real, still, orders, circles)
	if err != nil {
		return nil, err
	}
	even := response.NewWet(all, nil, effects.Cavity, orders, circles)
	wet := response.NewMixed(coupled, even, real.Tension)
	wet.Words = append(unevenWords(doc, uneven), realAssumptions(doc, effects, low.Notes)[1:]...)
	wet.Words = append(wet.Words, "Modes with more than "+strconv.Itoa(coupledDiameters)+" nodal diameters or "+strconv.Itoa(coupledCircles)+
		" circles, and the highest of the others, are those of the even diaphragm without the masses, and do not radiate.")
	mixeds.put(key, wet)
	return wet, nil
}

package engine

import "hoopsheet/core/modes"

// Effect names one effect that a calculation can leave out.
type Effect string

// The effects, in the order in which their cost is listed.
const (
	// EffectStiffness is the bending stiffness of the sheet.
	EffectStiffness Effect = "stiffness"
	// EffectFluid is the mass of the fluid that moves with the sheet.
	EffectFluid Effect = "fluid"
	// EffectSound is the finite speed of sound of that fluid: radiation, and a
	// mass that changes with frequency.
	EffectSound Effect = "sound"
	// EffectCavity is the closed cavity behind a face.
	EffectCavity Effect = "cavity"
	// EffectMasses are the patches and strips fixed to the sheet.
	EffectMasses Effect = "masses"
	// EffectUnevenness is uneven tension and a ring out of round.
	EffectUnevenness Effect = "unevenness"
)

// AllEffects lists every effect.
func AllEffects() []Effect {
	return []Effect{EffectStiffness, EffectFluid, EffectSound, EffectCavity, EffectMasses, EffectUnevenness}
}

// effectsWithout has every effect of the even diaphragm on but those named;
// unevenOf reads the others.
func effectsWithout(without []Effect) (modes.Effects, error) {
	effects := modes.AllEffects()
	for _, e := range without {
		switch e {
		case EffectStiffness:
			effects.Stiffness = false
		case EffectFluid:
			effects.Fluid = false
		case EffectSound:
			effects.Sound = false
		case EffectCavity:
			effects.Cavity = false
		case EffectMasses, EffectUnevenness:
		default:
			return effects, Fail("without", CodeRange, "There is no effect named "+quote(string(e))+"; it may be stiffness, fluid, sound, cavity, masses or unevenness.")
		}
	}
	return effects, nil
}

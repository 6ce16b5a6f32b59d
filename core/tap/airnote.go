package tap

import (
	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

// Air says which air moves with the sheet. The zero value stands for none.
type Air struct {
	// Density rho, kg/m^3.
	Density float64
	Faces   diaphragm.Faces
}

// airEffect is what leaving the air out does to the tension.
type airEffect struct {
	// share by which the true tension exceeds the ideal reading: 1.5 for a
	// true tension of two and a half times the reading.
	share float64
	// cavity is true where a closed cavity lies on one side, whose stiffness
	// can go either way.
	cavity   bool
	sentence string
}

// Note says in sentences what leaving the moving air out does to the tension,
// with a figure for the lowest mode matched, and gives the factor by which the
// true tension exceeds the ideal reading:
//
//	1 + sum over the faces of Gamma_mn rho a / sigma
//
// It is an estimate of one mode at a time, incompressible, from the added-mass
// factors of addedMass, or 1/j_mn, the limit of short waves, beyond them. The
// factor leaves a cavity out. Matches come lowest mode first, as in a Reading;
// without any, mode (0, 1) stands for them.
func (air Air) Note(radius, arealDensity float64, matches []Match) (note string, factor float64) {
	e := air.effect(radius, arealDensity, matches)
	if e.sentence == "" {
		return "No air moves with the sheet: both faces are in vacuum.", 1
	}
	return "The air that moves with the sheet is left out of this reading. " + e.sentence, 1 + e.share
}

func (air Air) effect(radius, arealDensity float64, matches []Match) airEffect {
	upper, lower := air.Faces.Upper.Kind, air.Faces.Lower.Kind
	wet := func(kind diaphragm.FaceKind) bool { return kind != diaphragm.FaceVacuum && kind != "" }
	if air.Density == 0 || !wet(upper) && !wet(lower) {
		return airEffect{}
	}
	e := airEffect{cavity: upper == diaphragm.FaceCavity || lower == diaphragm.FaceCavity}
	ratio := air.Density * radius / arealDensity
	sentence := "The ratio of air to sheet, rho a / sigma, is " + significant(ratio, 2) + ". "
	lowest := Match{M: 0, N: 1}
	if len(matches) > 0 {
		lowest = matches[0]
	}
	factor, tabled := addedMass[ModeName{lowest.M, lowest.N}]
	atLeast := ""
	if !tabled {
		// Waves that are short against the radius carry rho/k on each side.
		shortWave := 1 / bessel.ZeroJ(float64(lowest.M), lowest.N)
		factor, atLeast = airFactor{shortWave, shortWave}, "at least "
	}
	sides := 0
	for _, kind := range []diaphragm.FaceKind{upper, lower} {
		switch kind {
		case diaphragm.FaceBaffled:
			e.share += factor.baffled * ratio
			sides++
		case diaphragm.FaceOpen:
			e.share += factor.open * ratio
			sides++
		}
	}
	if sides > 0 {
		sentence += "Taken by itself, mode " + modeText(lowest.M, lowest.N) + " carries air worth about " + atLeast + significant(e.share, 2) +
			" times the mass of the sheet, so the true tension is about " + atLeast + significant(1+e.share, 2) +
			" times the reading. This is an estimate of one mode at a time, from added-mass factors for incompressible air."
	}
	if e.cavity {
		if sides > 0 {
			sentence += " "
		}
		sentence += "A closed cavity also stiffens mode (0, 1), so that it sounds higher than the sheet alone, and loads the others; no factor is given for it."
	}
	e.sentence = sentence
	return e
}

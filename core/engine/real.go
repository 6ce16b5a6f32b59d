package engine

import (
	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// realOf is the document as package modes takes it.
func realOf(doc *diaphragm.Diaphragm) (modes.Real, error) {
	real := modes.Real{
		Radius:       doc.Ring.Radius,
		Tension:      doc.Tension.Nominal,
		ArealDensity: doc.Sheet.ArealDensity(),
		Stiffness:    sheet.BendingStiffness(doc.Sheet.E, doc.Sheet.Thickness, doc.Sheet.Nu),
		Poisson:      doc.Sheet.Nu,
		Rim:          modes.Rim(doc.Tension.Rim.OrClamped()),
		LossFactor:   doc.Sheet.LossFactor,
		Remainder:    doc.Damping.Ratio,
	}
	var err error
	if real.Upper, err = faceOf(doc.Faces.Upper, "upper", &doc.Surroundings); err != nil {
		return real, err
	}
	real.Lower, err = faceOf(doc.Faces.Lower, "lower", &doc.Surroundings)
	return real, err
}

func faceOf(face diaphragm.Face, name string, around *diaphragm.Surroundings) (modes.Face, error) {
	out := modes.Face{Kind: face.Kind}
	if face.Kind == diaphragm.FaceVacuum {
		return out, nil
	}
	state, err := air.Fluid(face.Fluid, around.Temperature, around.Pressure, around.Humidity)
	if err != nil {
		return out, Fail("faces."+name+".fluid", CodeRange, err.Error())
	}
	out.Density, out.SoundSpeed, out.Viscosity = state.Density, state.SoundSpeed, state.KinematicViscosity
	switch face.Kind {
	case diaphragm.FaceBaffled:
		out.WallDistance = face.Wall
	case diaphragm.FaceCavity:
		out.Depth = face.Depth
		if face.VentArea > 0 {
			out.Vent = &modes.Vent{Area: face.VentArea, Length: face.VentLength}
		}
	}
	return out, nil
}

// realAssumptions says in words what the modes of the diaphragm as it stands
// rest on, and which effects were left out.
func realAssumptions(doc *diaphragm.Diaphragm, effects modes.Effects, notes []modes.Note) []string {
	list := []string{
		"The sheet is evenly tensioned at the nominal tension on a round, rigid ring, and moves little, so that its tension stays the same.",
	}
	list = append(list, effectAssumptions(doc, effects, notes)...)
	return append(list, "Clamps, leaks and the ring lose energy too: that remainder is the damping ratio given, not computed.")
}

// effectAssumptions says what is assumed of bending, fluid and cavity.
func effectAssumptions(doc *diaphragm.Diaphragm, effects modes.Effects, notes []modes.Note) []string {
	var list []string
	if effects.Stiffness {
		list = append(list, "Its bending stiffness is taken into account, with the rim "+string(doc.Tension.Rim.OrClamped())+".")
	} else {
		list = append(list, "Its bending stiffness is left out.")
	}
	upper, lower := doc.Faces.Upper.Kind, doc.Faces.Lower.Kind
	has := func(kind diaphragm.FaceKind) bool { return upper == kind || lower == kind }
	switch {
	case !effects.Fluid:
		list = append(list, "The fluid that moves with the sheet is left out.")
	case has(diaphragm.FaceOpen):
		list = append(list, "The fluid is free on both sides and passes around the rim; no wall, floor or other body is near.")
	case has(diaphragm.FaceBaffled):
		list = append(list, "A baffled face looks into a half space over an endless rigid wall; rooms that are small against the wavelength change that.")
	}
	if effects.Fluid && !effects.Sound {
		list = append(list, "The fluid is taken as incompressible: no sound is radiated.")
	}
	if has(diaphragm.FaceCavity) {
		if effects.Cavity {
			list = append(list, "The cavity is a rigid, smooth cylinder of the ring's radius.")
		} else {
			list = append(list, "The cavity is left out.")
		}
	}
	for _, note := range notes {
		switch note {
		case modes.NoteThinEdge:
			list = append(list, "The clamped edge of the thin sheet is taken as a ring smaller by √(D/T).")
		case modes.NoteBeyondSound:
			list = append(list, "Modes whose sound waves are short against the ring are computed as in still fluid, and nothing is stated of their radiation.")
		}
	}
	return list
}

// limitCautions warns where the sound of listed modes comes near what is
// computed.
func limitCautions(list []modes.RealMode) []string {
	for i := range list {
		if mode := &list[i]; !mode.BeyondSound && mode.SoundNumber > 0.8*modes.MaxSoundNumber {
			return []string{"From " + quantity.FormatNumber(mode.Frequency, 3) + " Hz on the sound waves are nearly as short as the ring is wide: radiation is computed up to " +
				quantity.FormatNumber(mode.Frequency*modes.MaxSoundNumber/mode.SoundNumber, 3) + " Hz."}
		}
	}
	return nil
}

// roomWords says how far walls must be from a diaphragm that sounds into the
// open, by its lowest frequency, Hz; empty without such a face.
func roomWords(real *modes.Real, lowest float64) []string {
	for _, face := range []modes.Face{real.Upper, real.Lower} {
		if (face.Kind == diaphragm.FaceBaffled && face.WallDistance == 0 || face.Kind == diaphragm.FaceOpen) && face.SoundSpeed > 0 && lowest > 0 {
			return []string{"At the lowest mode a wave of sound is " + quantity.FormatNumber(face.SoundSpeed/lowest, 2) +
				" m long: walls or a baffle's edge nearer than a quarter of that change its radiation, and those nearer than a diameter its frequency."}
		}
	}
	return nil
}

// assumptionsOf are those of a diaphragm with all its effects.
func assumptionsOf(doc diaphragm.Diaphragm) []string {
	return realAssumptions(&doc, modes.AllEffects(), nil)
}

// solutionKey names a solved diaphragm.
type solutionKey struct {
	real         modes.Real
	upper, lower modes.Vent
	effects      modes.Effects
	m, n         int
}

func keyOf(real modes.Real, effects modes.Effects, m, n int) solutionKey {
	key := solutionKey{real: real, effects: effects, m: m, n: n}
	if v := real.Upper.Vent; v != nil {
		key.upper, key.real.Upper.Vent = *v, nil
	}
	if v := real.Lower.Vent; v != nil {
		key.lower, key.real.Lower.Vent = *v, nil
	}
	return key
}

// solutions keeps the last few solved diaphragms: typing, the table, the
// drawing and the reading of taps ask for the same one.
var solutions = newCache[solutionKey, *modes.Solution](6)

// solve gives the modes up to m nodal diameters and n nodal circles.
func solve(real modes.Real, effects modes.Effects, m, n int) (*modes.Solution, error) {
	key := keyOf(real, effects, m, n)
	if solution, ok := solutions.get(key); ok {
		return solution, nil
	}
	solution, err := modes.Solve(real, modes.Request{MaxM: m, MaxN: n, Effects: effects})
	if err != nil {
		return nil, asError(err, "document")
	}
	solutions.put(key, solution)
	return solution, nil
}

// solveLowest gives the lowest count modes, complete: orders and circles are
// added until none can be missing, or the bounds of package modes are reached.
func solveLowest(real modes.Real, effects modes.Effects, count int) (list []modes.RealMode, notes []modes.Note, err error) {
	m, n := 1, 1
	for _, ideal := range modes.Ideal(1, 1, 1, count) {
		m, n = max(m, ideal.M), max(n, ideal.N)
	}
	for {
		m, n = min(m, modes.MaxDiameters), min(n, modes.MaxCircles)
		solution, err := solve(real, effects, m, n)
		if err != nil {
			return nil, nil, err
		}
		list = solution.Modes[:min(count, len(solution.Modes))]
		if len(list) == count && list[count-1].Frequency <= solution.Complete || m == modes.MaxDiameters && n == modes.MaxCircles {
			return list, solution.Notes, nil
		}
		m, n = m+2, n+1
	}
}

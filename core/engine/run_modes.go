package engine

import (
	"context"
	"math"
	"slices"
	"strconv"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
	"hoopsheet/core/modes"
)

// Bounds of the requests for modes.
const (
	mostModes         = 400
	mostOrder         = 300
	leastRaster       = 16
	mostRaster        = 1024
	mostSectionPoints = 4096
)

// usualDiameters and usualCircles are those of a table of usual length, which
// the drawing then finds solved.
const (
	usualDiameters = 6
	usualCircles   = 3
)

// CodeRange is the code of a number outside what a call takes.
const CodeRange Code = "range"

func runModes(_ context.Context, request *ModesRequest) (*ModesResult, error) {
	problems := diaphragm.Validate(request.Document)
	problems = append(problems, outside("count", "The number of modes", request.Count, 1, mostModes)...)
	if err := refuse(problems); err != nil {
		return nil, err
	}
	effects, err := effectsWithout(request.Without)
	if err != nil {
		return nil, err
	}
	doc := &request.Document
	real, err := realOf(doc)
	if err != nil {
		return nil, err
	}
	result := &ModesResult{Applies: effectsOf(doc)}
	uneven, coupling := unevenOf(doc, request.Without)
	switch {
	case doc.Ring.HubRadius > 0:
		result.Modes = hubLines(doc, request.Count)
		result.Assumptions = hubAssumptions()
	case coupling && !request.Quick:
		coupled, complete, notes, err := solveCoupled(real, effects, uneven)
		if err != nil {
			return nil, err
		}
		result.Modes = coupledLines(doc, coupled, complete, request.Count)
		if len(uneven.Field) > 0 {
			smallest, largest := tautness(doc, coupled.Smallest), tautness(doc, coupled.Largest)
			result.Smallest, result.Largest = &smallest, &largest
		}
		result.Assumptions = append(unevenWords(doc, uneven), realAssumptions(doc, effects, notes)[1:]...)
		if len(result.Modes) < request.Count {
			result.Assumptions = append(result.Assumptions, "The list ends where modes beyond "+strconv.Itoa(coupledDiameters)+
				" nodal diameters or "+strconv.Itoa(coupledCircles)+" circles could be missing.")
		}
		result.Cautions = unevenCautions(coupled, result.Modes)
	default:
		list, notes, err := solveLowest(real, effects, request.Count)
		if err != nil {
			return nil, err
		}
		for _, mode := range list {
			result.Modes = append(result.Modes, modeLine(doc, mode))
		}
		result.Rough = coupling
		result.Assumptions = realAssumptions(doc, effects, notes)
		result.Cautions = limitCautions(list)
	}
	if doc.Ring.HubRadius == 0 && effects.Fluid {
		result.Assumptions = append(result.Assumptions, roomWords(&real, result.Modes[0].Frequency)...)
	}
	sigma := doc.Sheet.ArealDensity()
	result.ArealDensity = sigma
	result.WaveSpeed = math.Sqrt(doc.Tension.Nominal / sigma)
	around := doc.Surroundings
	if state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity); err == nil {
		result.AirDensity = state.Density
		result.MassRatio = state.Density * doc.Ring.Radius / sigma
	}
	result.Cautions = append(append(effectCautions(doc, request.Without), hubCautions(doc)...), result.Cautions...)
	return result, nil
}

// lineOf is what every line of the table has.
func lineOf(doc *diaphragm.Diaphragm, m, n int, frequency float64, d *modes.Damping) Mode {
	line := Mode{
		M: m, N: n, Frequency: frequency,
		Damping:     ModeDamping{Radiation: d.Radiation, Viscous: d.Viscous, Sheet: d.Sheet, Remainder: d.Remainder, Total: d.Total},
		NodalLines:  modes.Mode{M: m, N: n}.NodalLines(),
		Distances:   distances(frequency, doc.Avoid.Lines),
		BelowLowest: frequency < doc.Avoid.Lowest,
	}
	if d.Total > 0 {
		line.RingDown, line.Q = d.RingDown, d.Q
	}
	return line
}

func modeLine(doc *diaphragm.Diaphragm, mode modes.RealMode) Mode {
	line := lineOf(doc, mode.M, mode.N, mode.Frequency, &mode.Damping)
	line.Error, line.Ideal = mode.Error, mode.Ideal
	line.FluidShare = mode.FluidMass / (mode.SheetMass + mode.FluidMass)
	line.Damping.RadiationKnown = !mode.BeyondSound
	if mode.FilmShare < 1 {
		line.Kind = string(mode.Dominated()) + "-dominated"
	}
	return line
}

// effectsOf lists the effects that a diaphragm has.
func effectsOf(doc *diaphragm.Diaphragm) []Effect {
	if doc.Ring.HubRadius > 0 {
		return []Effect{}
	}
	list := []Effect{EffectStiffness}
	upper, lower := doc.Faces.Upper.Kind, doc.Faces.Lower.Kind
	if upper != diaphragm.FaceVacuum || lower != diaphragm.FaceVacuum {
		list = append(list, EffectFluid, EffectSound)
	}
	if upper == diaphragm.FaceCavity || lower == diaphragm.FaceCavity {
		list = append(list, EffectCavity)
	}
	if len(doc.Attached.Patches)+len(doc.Attached.Strips) > 0 {
		list = append(list, EffectMasses)
	}
	if len(fieldOf(doc)) > 0 || doc.Ring.OutOfRound != 0 {
		list = append(list, EffectUnevenness)
	}
	return list
}

// effectCautions warns where an effect that the diaphragm has is left out.
func effectCautions(doc *diaphragm.Diaphragm, without []Effect) []string {
	list := []string{}
	for _, e := range effectsOf(doc) {
		if slices.Contains(without, e) {
			list = append(list, "You have left out the "+string(e)+": the frequencies are not those of the diaphragm that stands on site.")
		}
	}
	return list
}

// distances returns the distance of a frequency to every line, nearest first.
func distances(frequency float64, lines []diaphragm.Line) []Distance {
	list := make([]Distance, 0, len(lines))
	for _, line := range lines {
		relative, clearance := modes.Separation(frequency, line.Frequency, line.HalfWidth)
		list = append(list, Distance{
			Line:          line.Name,
			LineFrequency: line.Frequency,
			Relative:      relative,
			Clearance:     clearance,
		})
	}
	sorting.By(list, func(a, b Distance) int {
		switch da, db := math.Abs(a.Relative), math.Abs(b.Relative); {
		case da < db:
			return -1
		case da > db:
			return 1
		}
		return 0
	})
	return list
}

// outside refuses a whole number that a call does not take.
func outside(field, name string, value, least, most int) []Problem {
	if value >= least && value <= most {
		return nil
	}
	return []Problem{{
		Field: field,
		Code:  CodeRange,
		Message: name + " is " + strconv.Itoa(value) + "; it must be from " +
			strconv.Itoa(least) + " to " + strconv.Itoa(most) + ".",
		Offset: -1,
	}}
}

// notAnAngle refuses an angle whose cosine would mean nothing.
func notAnAngle(field, name string, value float64) []Problem {
	const most = 1000 // rad; far beyond it little of a float64 is left below one turn
	if math.Abs(value) <= most {
		return nil
	}
	return []Problem{{
		Field:   field,
		Code:    CodeRange,
		Message: name + " must be from -" + strconv.Itoa(most) + " to " + strconv.Itoa(most) + " rad.",
		Offset:  -1,
	}}
}

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
	if uneven, ok := unevenOf(doc, request.Without); coupledHere && ok {
		coupled, complete, notes, err := solveCoupled(real, effects, uneven)
		if err != nil {
			return nil, err
		}
		for i := range coupled.Modes {
			if mode := &coupled.Modes[i]; mode.Frequency <= complete && len(result.Modes) < request.Count {
				result.Modes = append(result.Modes, coupledLine(doc, mode))
			}
		}
		result.Assumptions = append(realAssumptions(doc, effects, notes)[1:], unevenWords(doc, uneven, coupled)...)
		if len(result.Modes) < request.Count {
			result.Assumptions = append(result.Assumptions, "The list ends where modes beyond 12 nodal diameters or 4 circles could be missing.")
		}
	} else {
		list, notes, err := solveLowest(real, effects, request.Count)
		if err != nil {
			return nil, err
		}
		for _, mode := range list {
			result.Modes = append(result.Modes, modeLine(doc, mode))
		}
		result.Assumptions = realAssumptions(doc, effects, notes)
	}
	sigma := doc.Sheet.ArealDensity()
	result.ArealDensity = sigma
	result.WaveSpeed = math.Sqrt(doc.Tension.Nominal / sigma)
	around := doc.Surroundings
	if state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity); err == nil {
		result.AirDensity = state.Density
		result.MassRatio = state.Density * doc.Ring.Radius / sigma
	}
	result.Cautions = append(effectCautions(doc, request.Without), hubCautions(doc)...)
	if _, uneven := unevenOf(doc, nil); uneven && !coupledHere {
		result.Cautions = append(result.Cautions, "Uneven tension, the ring's being out of round and attached masses are not in these frequencies: "+
			"the browser computes the even diaphragm. A script in Go computes them too (For scripts).")
	}
	return result, nil
}

func modeLine(doc *diaphragm.Diaphragm, mode modes.RealMode) Mode {
	d := mode.Damping
	line := Mode{
		M: mode.M, N: mode.N,
		Frequency:  mode.Frequency,
		Error:      mode.Error,
		Ideal:      mode.Ideal,
		FluidShare: mode.FluidMass / (mode.SheetMass + mode.FluidMass),
		Damping: ModeDamping{
			Radiation: d.Radiation, Viscous: d.Viscous, Sheet: d.Sheet, Remainder: d.Remainder, Total: d.Total,
			RadiationKnown: !mode.BeyondSound,
		},
		NodalLines:  modes.Mode{M: mode.M, N: mode.N}.NodalLines(),
		Distances:   distances(mode.Frequency, doc.Avoid.Lines),
		BelowLowest: mode.Frequency < doc.Avoid.Lowest,
	}
	if mode.FilmShare < 1 {
		line.Kind = string(mode.Dominated()) + "-dominated"
	}
	if d.Total > 0 {
		line.RingDown, line.Q = d.RingDown, d.Q
	}
	return line
}

// effectsOf lists the effects that a diaphragm has.
func effectsOf(doc *diaphragm.Diaphragm) []Effect {
	list := []Effect{EffectStiffness}
	upper, lower := doc.Faces.Upper.Kind, doc.Faces.Lower.Kind
	if upper != diaphragm.FaceVacuum || lower != diaphragm.FaceVacuum {
		list = append(list, EffectFluid, EffectSound)
	}
	if upper == diaphragm.FaceCavity || lower == diaphragm.FaceCavity {
		list = append(list, EffectCavity)
	}
	if coupledHere && len(doc.Attached.Patches)+len(doc.Attached.Strips) > 0 {
		list = append(list, EffectMasses)
	}
	if coupledHere && len(fieldOf(doc)) > 0 || coupledHere && doc.Ring.OutOfRound != 0 {
		list = append(list, EffectUnevenness)
	}
	return list
}

// hubCautions says that a hub is not in these figures.
func hubCautions(doc *diaphragm.Diaphragm) []string {
	if doc.Ring.HubRadius == 0 {
		return nil
	}
	return []string{"The hub in the middle is not in these frequencies: they are those of the whole sheet. A hub raises them, the modes without nodal diameters most."}
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

func runShape(_ context.Context, request *ShapeRequest) (*ShapeResult, error) {
	problems := slices.Concat(
		outside("m", "The number of nodal diameters", request.M, 0, mostOrder),
		outside("n", "The number of nodal circles", request.N, 1, mostOrder),
		outside("size", "The size of the raster", request.Size, leastRaster, mostRaster),
		outside("sectionPoints", "The number of points of the section", request.SectionPoints, 2, mostSectionPoints),
		notAnAngle("orientation", "The orientation", request.Orientation),
		notAnAngle("sectionAngle", "The angle of the section", request.SectionAngle),
	)
	if err := refuse(problems); err != nil {
		return nil, err
	}
	if request.Document == nil {
		return drawShape(request, modes.NewShape(request.M, request.N, request.Orientation)), nil
	}
	if uneven, ok := unevenOf(request.Document, request.Without); coupledHere && ok {
		mode, err := coupledModeOf(request, uneven)
		if err != nil {
			return nil, err
		}
		return drawCoupled(request, mode), nil
	}
	mode, err := realModeOf(request)
	if err != nil {
		return nil, err
	}
	return drawShape(request, modes.NewRealShape(mode, request.Orientation)), nil
}

// coupledModeOf finds the mode of an uneven diaphragm that a drawing is asked
// of.
func coupledModeOf(request *ShapeRequest, uneven modes.Uneven) (*modes.CoupledMode, error) {
	if err := refuse(diaphragm.Validate(*request.Document)); err != nil {
		return nil, err
	}
	effects, err := effectsWithout(request.Without)
	if err != nil {
		return nil, err
	}
	real, err := realOf(request.Document)
	if err != nil {
		return nil, err
	}
	coupled, _, _, err := solveCoupled(real, effects, uneven)
	if err != nil {
		return nil, err
	}
	return coupledShapeOf(coupled, request.M, request.N, request.Upper)
}

// realModeOf finds the mode that a drawing is asked of.
func realModeOf(request *ShapeRequest) (*modes.RealMode, error) {
	problems := slices.Concat(
		diaphragm.Validate(*request.Document),
		outside("m", "The number of nodal diameters", request.M, 0, modes.MaxDiameters),
		outside("n", "The number of nodal circles", request.N, 1, modes.MaxCircles),
	)
	if err := refuse(problems); err != nil {
		return nil, err
	}
	effects, err := effectsWithout(request.Without)
	if err != nil {
		return nil, err
	}
	real, err := realOf(request.Document)
	if err != nil {
		return nil, err
	}
	solution, err := solve(real, effects, max(request.M, usualDiameters), max(request.N, usualCircles))
	if err != nil {
		return nil, err
	}
	for i := range solution.Modes {
		if mode := &solution.Modes[i]; mode.M == request.M && mode.N == request.N {
			return mode, nil
		}
	}
	return nil, Fail("n", CodeRange, "This diaphragm has no such mode among those computed.")
}

// shaped is a mode shape that can be drawn.
type shaped interface {
	Raster(dst []float32, size int)
	Section(dst []float32, angle float64)
	CircleRadii() []float64
	DiameterAngles() []float64
	Lobes() []modes.Lobe
}

func drawShape(request *ShapeRequest, shape shaped) *ShapeResult {
	result := &ShapeResult{
		Raster:         make(Numbers, request.Size*request.Size),
		Section:        make(Numbers, request.SectionPoints),
		CircleRadii:    shape.CircleRadii(),
		DiameterAngles: shape.DiameterAngles(),
	}
	shape.Raster(result.Raster, request.Size)
	shape.Section(result.Section, request.SectionAngle)
	for _, lobe := range shape.Lobes() {
		result.Lobes = append(result.Lobes, Lobe{Radius: lobe.Radius, Angle: lobe.Angle, Value: lobe.Value})
	}
	return result
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

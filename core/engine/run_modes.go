package engine

import (
	"context"
	"math"
	"slices"
	"strconv"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
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

// notableAir is the mass of moving air, in units of the sheet's, that is worth
// a word: it lowers a frequency by one percent.
const notableAir = 0.02

// CodeRange is the code of a number outside what a call takes.
const CodeRange Code = "range"

func runModes(_ context.Context, request *ModesRequest) (*ModesResult, error) {
	problems := diaphragm.Validate(request.Document)
	problems = append(problems, outside("count", "The number of modes", request.Count, 1, mostModes)...)
	if err := refuse(problems); err != nil {
		return nil, err
	}
	doc := &request.Document
	sigma := doc.Sheet.ArealDensity()
	result := &ModesResult{
		ArealDensity: sigma,
		WaveSpeed:    math.Sqrt(doc.Tension.Nominal / sigma),
		Assumptions:  idealAssumptions(),
		Cautions:     []string{},
	}
	result.Cautions = append(result.Cautions, airCautions(doc, result)...)
	for _, mode := range modes.Ideal(doc.Ring.Radius, doc.Tension.Nominal, sigma, request.Count) {
		result.Modes = append(result.Modes, Mode{
			M:           mode.M,
			N:           mode.N,
			Frequency:   mode.Frequency,
			Zero:        mode.Zero,
			CircleRadii: mode.CircleRadii,
			NodalLines:  mode.NodalLines(),
			Distances:   distances(mode.Frequency, doc.Avoid.Lines),
			BelowLowest: mode.Frequency < doc.Avoid.Lowest,
		})
	}
	return result, nil
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
	slices.SortStableFunc(list, func(a, b Distance) int {
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

// airCautions fills in the air's density and mass ratio and says what the air
// does to the frequencies.
func airCautions(doc *diaphragm.Diaphragm, result *ModesResult) []string {
	around := doc.Surroundings
	state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity)
	if err != nil {
		return []string{err.Error() + " The mass of the air is therefore not stated."}
	}
	result.AirDensity = state.Density
	result.MassRatio = state.Density * doc.Ring.Radius / result.ArealDensity
	share, known := modes.AirMass(result.MassRatio, doc.Faces)
	switch {
	case !known:
		return []string{"The air behind the sheet is closed in. It is a spring and a mass, so the real frequencies " +
			"differ from those of the ideal sheet, that of mode (0, 1) most."}
	case share > notableAir:
		return []string{"The air that moves with mode (0, 1) has about " + rounded(share) +
			" times the mass of the sheet that moves: expect its frequency near " +
			strconv.Itoa(int(math.Round(100/math.Sqrt(1+share)))) +
			" % of the ideal one. The higher modes are lowered too, by less."}
	}
	return nil
}

// rounded writes two significant digits.
func rounded(x float64) string {
	if x >= 100 {
		return strconv.FormatFloat(math.Round(x), 'f', -1, 64)
	}
	text := strconv.FormatFloat(x, 'g', 2, 64)
	value, _ := strconv.ParseFloat(text, 64)
	return strconv.FormatFloat(value, 'f', -1, 64)
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
	shape := modes.NewShape(request.M, request.N, request.Orientation)
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
	return result, nil
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

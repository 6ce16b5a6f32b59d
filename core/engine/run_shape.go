package engine

import (
	"context"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

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
	return drawMode(request)
}

// drawMode draws a mode of a document, with what is on the sheet.
func drawMode(request *ShapeRequest) (*ShapeResult, error) {
	doc := request.Document
	problems := slices.Concat(
		diaphragm.Validate(*doc),
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
	real, err := realOf(doc)
	if err != nil {
		return nil, err
	}
	uneven, coupling := unevenOf(doc, request.Without)
	var result *ShapeResult
	switch {
	case doc.Ring.HubRadius > 0:
		result = drawShape(request, modes.DrawHub(doc.Ring.HubRadius/doc.Ring.Radius, request.M, request.N, request.Orientation))
		result.Hub = doc.Ring.HubRadius / doc.Ring.Radius
	case coupling:
		coupled, _, _, err := solveCoupled(real, effects, uneven)
		if err != nil {
			return nil, err
		}
		mode, err := coupledModeNamed(coupled, request.M, request.N, request.Upper)
		if err != nil {
			return nil, err
		}
		result = drawShape(request, mode.Drawing())
		result.Bent = true
		result.Oval, result.OvalAngle = uneven.Oval.Half, uneven.Oval.Angle
		addOutlines(result, doc.Ring.Radius, uneven)
	default:
		mode, err := realModeOf(request, real, effects)
		if err != nil {
			return nil, err
		}
		result = drawShape(request, modes.NewRealShape(mode, request.Orientation))
	}
	return result, nil
}

// addOutlines puts patches and strips on a drawing.
func addOutlines(result *ShapeResult, radius float64, uneven modes.Uneven) {
	for _, p := range uneven.Patches {
		result.Patches = append(result.Patches, PatchOutline{Radius: p.Distance / radius, Angle: p.Angle, Size: p.Radius / radius, Rigid: p.Rigid})
	}
	for _, s := range uneven.Strips {
		result.Strips = append(result.Strips, StripOutline{Offset: s.Offset / radius, Angle: s.Angle, Width: s.Width / radius})
	}
}

// realModeOf finds the mode of an even diaphragm that a drawing is asked of.
func realModeOf(request *ShapeRequest, real modes.Real, effects modes.Effects) (*modes.RealMode, error) {
	solution, err := solve(real, effects, max(request.M, usualDiameters), max(request.N, usualCircles))
	if err != nil {
		return nil, err
	}
	for i := range solution.Modes {
		if mode := &solution.Modes[i]; mode.M == request.M && mode.N == request.N {
			return mode, nil
		}
	}
	return nil, errNoMode()
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

package response

import (
	"errors"
	"math"
	"slices"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

// CodeFormula is the code of a formula that cannot be read or has no finite
// value somewhere on the sheet.
const CodeFormula diaphragm.Code = "formula"

const (
	// mostPeak bounds the peak of a shape, in m or m/s: anything larger is a
	// slip of a unit.
	mostPeak = 1e6
	// leastWidth is the smallest pad, bump or patch in units of the radius.
	leastWidth = 1e-6
	// mostAngle, rad: far beyond it little of a number is left below one turn.
	mostAngle = 1000
)

// Check lists what is wrong with the shape; prefix is put before the names of
// its fields, such as "displacement.". It does not look at the values of a
// formula over the sheet.
func (s Shape) Check(prefix string) []diaphragm.Problem {
	var problems []diaphragm.Problem
	add := func(field string, code diaphragm.Code, offset int, message string) {
		problems = append(problems, diaphragm.Problem{Field: prefix + field, Code: code, Message: message, Offset: offset})
	}
	if !slices.Contains(ShapeKinds(), s.Kind) {
		names := make([]string, len(ShapeKinds()))
		for i, kind := range ShapeKinds() {
			names[i] = string(kind)
		}
		add("kind", diaphragm.CodeChoice, -1, "There is no shape named "+quoted(string(s.Kind))+"; the shapes are "+strings.Join(names, ", ")+".")
		return problems
	}
	if s.Kind == ShapeRest {
		return nil
	}
	if !(math.Abs(s.Peak) <= mostPeak) {
		add("peak", diaphragm.CodeBounds, -1, "The peak must lie between -1,000,000 and 1,000,000 m or m/s.")
	}
	switch s.Kind {
	case ShapePoint, ShapeBump, ShapePatch:
		placed := true
		if !(s.Radius >= 0 && s.Radius < 1) {
			placed = false
			add("radius", diaphragm.CodeBounds, -1, "The place is at "+short(s.Radius)+" ring radii from the centre; it must be from 0 to below 1.")
		}
		if !(math.Abs(s.Angle) <= mostAngle) {
			add("angle", diaphragm.CodeBounds, -1, "The angle of the place must lie between -1000 and 1000 rad.")
		}
		if !(s.Width >= leastWidth && s.Width <= 1) {
			placed = false
			add("width", diaphragm.CodeBounds, -1, "The width is "+short(s.Width)+" ring radii; it must be above 0 and at most 1.")
		}
		if placed && s.Radius+s.Width > 1+1e-12 {
			add("width", diaphragm.CodeConflict, -1, "The "+s.noun()+" reaches over the rim: its place at "+short(s.Radius)+
				" and its width of "+short(s.Width)+" ring radii add up to more than 1.")
		}
	case ShapeFormula:
		if _, err := Compile(s.Formula); err != nil {
			offset := -1
			var refusal *FormulaError
			if errors.As(err, &refusal) {
				offset = refusal.Offset
			}
			add("formula", CodeFormula, offset, err.Error())
		}
	}
	return problems
}

// noun names the shape in a sentence.
func (s Shape) noun() string {
	switch s.Kind {
	case ShapePoint:
		return "pad"
	case ShapePatch:
		return "patch"
	case ShapeBump:
		return "bump"
	}
	return "shape"
}

// form returns the shape at unit peak on a ring of the given radius, m. The shape has passed Check; a formula
// may still have no finite value somewhere on the sheet.
func (s Shape) form(b *disc.Basis, prefix string, radius float64) (form, []diaphragm.Problem) {
	// A sum of radius and width that rounds above one is taken as one.
	width := math.Min(s.Width, 1-s.Radius)
	at := func(p profile) form { return local{place{s.Radius, s.Angle}, p} }
	switch s.Kind {
	case ShapeBulge:
		return bulge{}, nil
	case ShapePoint:
		return newPull(s.Radius, s.Angle, width), nil
	case ShapeBump:
		return at(bump{width}), nil
	case ShapePatch:
		return at(patch{width}), nil
	case ShapeEven:
		return even{}, nil
	case ShapeHalf:
		return halfForm{s.Angle}, nil
	case ShapeFormula:
		formula, err := Compile(s.Formula)
		if err != nil {
			return nil, s.Check(prefix)
		}
		formula.length = radius
		form, message := newSampled(formula, b)
		if message != "" {
			return nil, []diaphragm.Problem{{Field: prefix + "formula", Code: CodeFormula, Message: message, Offset: -1}}
		}
		if math.Abs(s.Peak)*form.largest > mostPeak {
			return nil, []diaphragm.Problem{{Field: prefix + "peak", Code: diaphragm.CodeBounds, Offset: -1,
				Message: "The peak times the formula reaches " + short(math.Abs(s.Peak)*form.largest) + "; at most 1,000,000 m or m/s are computed."}}
		}
		return form, nil
	}
	if s.Kind == ShapeMeasured {
		list, problem := s.readMeasured(prefix, radius)
		if problem != nil {
			return nil, []diaphragm.Problem{*problem}
		}
		fit := fitMeasured(list)
		form, message := newSampled(fit, b)
		if message != "" {
			return nil, []diaphragm.Problem{{Field: prefix + "table", Code: diaphragm.CodeConflict, Message: message, Offset: -1}}
		}
		form.fit = fit
		fit.largest = form.largest
		return form, nil
	}
	return rest{}, nil
}

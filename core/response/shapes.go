package response

import (
	"errors"
	"math"

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
func (s *Shape) Check(prefix string) []diaphragm.Problem {
	r := refusals{prefix: prefix}
	var names []string
	for _, kind := range ShapeKinds() {
		names = append(names, string(kind))
	}
	if !r.choice("kind", "shape", string(s.Kind), names) || s.Kind == ShapeRest {
		return r.list
	}
	if !(math.Abs(s.Peak) <= mostPeak) {
		r.bounds("peak", "The peak must lie between -1,000,000 and 1,000,000 m or m/s.")
	}
	switch s.Kind {
	case ShapePoint, ShapeBump, ShapePatch:
		placed := true
		if !(s.Radius >= 0 && s.Radius < 1) {
			placed = false
			r.bounds("radius", say("The place is at # ring radii from the centre; it must be from 0 to below 1.", s.Radius))
		}
		if !(math.Abs(s.Angle) <= mostAngle) {
			r.bounds("angle", "The angle of the place must lie between -1000 and 1000 rad.")
		}
		if !(s.Width >= leastWidth && s.Width <= 1) {
			placed = false
			r.bounds("width", say("The width is # ring radii; it must be above 0 and at most 1.", s.Width))
		}
		if placed && s.Radius+s.Width > 1+1e-12 {
			r.add("width", diaphragm.CodeConflict, -1, say("The # reaches over the rim: its place at # and its width of # ring radii add up to more than 1.", s.noun(), s.Radius, s.Width))
		}
	case ShapeHalf:
		r.within("angle", "The direction of the loaded half", " rad", s.Angle, -mostAngle, mostAngle)
	case ShapeFormula:
		if _, err := Compile(s.Formula); err != nil {
			offset := -1
			var refusal *FormulaError
			if errors.As(err, &refusal) {
				offset = refusal.Offset
			}
			r.add("formula", CodeFormula, offset, err.Error())
		}
	}
	return r.list
}

// noun names the shape in a sentence.
func (s *Shape) noun() string {
	if s.Kind == ShapePoint {
		return "pad"
	}
	return string(s.Kind)
}

// form returns the shape at unit peak on a ring of the given radius, m. The shape has passed Check; a formula
// may still have no finite value somewhere on the sheet.
func (s *Shape) form(b *disc.Basis, prefix string, radius float64) (form, []diaphragm.Problem) {
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
			return nil, refusal(prefix+"formula", CodeFormula, -1, message)
		}
		if math.Abs(s.Peak)*form.largest > mostPeak {
			return nil, refusal(prefix+"peak", diaphragm.CodeBounds, -1,
				say("The peak times the formula reaches #; at most 1,000,000 m or m/s are computed.", math.Abs(s.Peak)*form.largest))
		}
		return form, nil
	}
	if s.Kind == ShapeMeasured {
		list, problems := s.readMeasured(prefix, radius)
		if problems != nil {
			return nil, problems
		}
		fit := fitMeasured(list)
		form, message := newSampled(fit, b)
		if message != "" {
			return nil, refusal(prefix+"table", diaphragm.CodeConflict, -1, message)
		}
		form.fit = fit
		fit.largest = form.largest
		return form, nil
	}
	return rest{}, nil
}

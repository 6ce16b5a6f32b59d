package engine

import (
	"math"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
	"hoopsheet/core/tap"
)

// Usual standard uncertainties (common practice): a radius taped on site, the
// areal density weighed or from a nominal thickness, the air without a
// barometer beside the diaphragm.
const (
	usualRadius      = 0.001
	usualWeighed     = 0.005
	usualThickness   = 0.02
	usualTemperature = 3 // K
	usualPressure    = 0.01
)

// problems refuses uncertainties that cannot be meant.
func (in TapInputs) problems() []Problem {
	var list []Problem
	for _, input := range []struct {
		field, name, most string
		value, limit      float64
	}{
		{"radius", "of the radius", "20 %", in.Radius, 0.2},
		{"arealDensity", "of the areal density", "50 %", in.ArealDensity, 0.5},
		{"temperature", "of the temperature", "50 K", in.Temperature, 50},
		{"pressure", "of the pressure", "50 %", in.Pressure, 0.5},
		{"model", "of the model", "10 %", in.Model, 0.1},
	} {
		if !(input.value >= 0 && input.value <= input.limit) {
			list = append(list, Problem{
				Field: "inputs." + input.field, Code: CodeRange, Offset: -1,
				Message: "The standard uncertainty " + input.name + " must lie from 0, which stands for the usual one, to " + input.most + ".",
			})
		}
	}
	return list
}

// orUsual fills in the usual ones.
func (in TapInputs) orUsual(doc *diaphragm.Diaphragm) TapInputs {
	set := func(value *float64, usual float64) {
		if *value == 0 {
			*value = usual
		}
	}
	set(&in.Radius, usualRadius)
	if doc.Sheet.MeasuredArealDensity > 0 {
		set(&in.ArealDensity, usualWeighed)
	} else {
		set(&in.ArealDensity, usualThickness)
	}
	set(&in.Temperature, usualTemperature)
	set(&in.Pressure, usualPressure)
	return in
}

// model is the relative standard deviation of the model.
func (in TapInputs) model(ideal bool) float64 {
	switch {
	case in.Model > 0:
		return max(in.Model, 1e-5)
	case ideal:
		return tap.IdealModelError
	}
	return tap.RealModelError
}

// The names of the inputs.
const (
	inputRadius      = "radius"
	inputDensity     = "areal density"
	inputTemperature = "air temperature"
	inputPressure    = "air pressure"
)

func (in TapInputs) idealNuisances() []tap.Nuisance {
	return []tap.Nuisance{
		{Name: inputRadius, RelativeStandard: in.Radius, Sensitivity: 2},
		{Name: inputDensity, RelativeStandard: in.ArealDensity, Sensitivity: 1},
	}
}

// nuisances are the inputs of the diaphragm as it stands, each with the modes
// that it has when the input is a little higher.
func (in TapInputs) nuisances(doc *diaphragm.Diaphragm, real modes.Real, effects modes.Effects) ([]tap.Nuisance, error) {
	const step = 1e-3 // of each input; small against all that bends its effect
	larger, heavier := real, real
	larger.Radius *= 1 + step
	heavier.ArealDensity *= 1 + step
	list := []tap.Nuisance{
		{Name: inputRadius, RelativeStandard: in.Radius, Step: step, Solve: tapSolver(larger, effects)},
		{Name: inputDensity, RelativeStandard: in.ArealDensity, Step: step, Solve: tapSolver(heavier, effects)},
	}
	if !wet(doc.Faces) || facesLeftOut(doc.Faces, effects) == doc.Faces {
		return list, nil
	}
	// Towards the middle of what the formulas of air cover, so that none ends.
	warmer, denser := *doc, *doc
	warm, dense := step, step
	if doc.Surroundings.Temperature > 293.15 {
		warm = -step
	}
	if doc.Surroundings.Pressure > 1e5 {
		dense = -step
	}
	warmer.Surroundings.Temperature *= 1 + warm
	denser.Surroundings.Pressure *= 1 + dense
	hot, err := realOf(&warmer)
	if err != nil {
		return nil, err
	}
	thick, err := realOf(&denser)
	if err != nil {
		return nil, err
	}
	return append(list,
		tap.Nuisance{Name: inputTemperature, RelativeStandard: in.Temperature / doc.Surroundings.Temperature, Step: warm, Solve: tapSolver(hot, effects)},
		tap.Nuisance{Name: inputPressure, RelativeStandard: in.Pressure, Step: dense, Solve: tapSolver(thick, effects)},
	), nil
}

// assumptions says in words what the tension of a tap rests on.
func (in TapInputs) assumptions(doc *diaphragm.Diaphragm, without []Effect, effects modes.Effects, ideal bool) []string {
	list := []string{"The sheet is evenly tensioned on a round, rigid ring, and moves little, so that its tension stays the same."}
	if uneven, coupling := unevenOf(doc, without); coupling {
		list = unevenWords(doc, uneven)
	}
	list = append(list, effectAssumptions(doc, effects, nil)...)
	percent := func(x float64) string { return quantity.FormatNumber(100*x, 2) + " %" }
	known := "Standard uncertainties taken: radius " + percent(in.Radius) + ", areal density " + percent(in.ArealDensity)
	if !ideal && wet(doc.Faces) && facesLeftOut(doc.Faces, effects) != doc.Faces {
		known += ", air temperature " + quantity.FormatNumber(in.Temperature, 2) + " K, air pressure " + percent(in.Pressure)
	}
	return append(list, known+". Other inputs count as exact.",
		"Frequencies of a sound diaphragm are taken to scatter by "+percent(in.model(ideal))+" about those computed: slight unevenness, walls near by, a ring that gives way.",
		"Where no uncertainty is given, the usual ones are taken (common practice).",
		"Pass and fail follow JCGM 106:2012 with a guard band of one expanded uncertainty (coverage 95 %).")
}

// highestTapped is the frequency, Hz, up to which modes are needed: somewhat
// above the highest peak in use, in steps, so that a peak more or less does not
// call for other modes.
func highestTapped(peaks []tap.Peak) float64 {
	const steps = 4 // per octave
	highest := 0.0
	for _, p := range peaks {
		if p.Use && p.Frequency > highest && !math.IsInf(p.Frequency, 1) {
			highest = p.Frequency
		}
	}
	if highest == 0 {
		return 0
	}
	return math.Exp2(math.Ceil(steps*math.Log2(1.03*highest)) / steps)
}

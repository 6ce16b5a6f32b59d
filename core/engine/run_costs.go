package engine

import (
	"context"
	"math"
	"slices"
	"sort"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

func runCosts(ctx context.Context, request *CostsRequest) (*CostsResult, error) {
	problems := slices.Concat(
		diaphragm.Validate(request.Document),
		outside("m", "The number of nodal diameters", request.M, 0, modes.MaxDiameters),
		outside("n", "The number of nodal circles", request.N, 1, modes.MaxCircles),
	)
	if err := refuse(problems); err != nil {
		return nil, err
	}
	doc := request.Document
	full := modes.AllEffects()
	result := &CostsResult{}
	steps, err := costSteps(&doc, request.M, request.N)
	if err != nil {
		return nil, err
	}
	result.Steps = steps
	report := progress(ctx)
	for i, input := range inputs {
		if ctx.Err() != nil {
			return nil, ctx.Err()
		}
		if slope, ok := slopeOf(&doc, input, full, request.M, request.N); ok {
			result.Sensitivities = append(result.Sensitivities, Sensitivity{Field: input.field, Name: input.name, PerPercent: slope})
		}
		report(float64(i+1) / float64(len(inputs)))
	}
	list := result.Sensitivities
	sort.SliceStable(list, func(i, j int) bool { return math.Abs(list[i].PerPercent) > math.Abs(list[j].PerPercent) })
	return result, nil
}

// costSteps switches the effects on one after another.
func costSteps(doc *diaphragm.Diaphragm, m, n int) ([]CostStep, error) {
	real, err := realOf(doc)
	if err != nil {
		return nil, err
	}
	var effects modes.Effects
	steps := []CostStep{}
	add := func(name string) error {
		f, err := frequencyOf(real, effects, m, n)
		if err != nil {
			return err
		}
		step := CostStep{Name: name, Frequency: f}
		if len(steps) > 0 {
			step.Change = f/steps[len(steps)-1].Frequency - 1
		}
		steps = append(steps, step)
		return nil
	}
	if err := add("ideal sheet"); err != nil {
		return nil, err
	}
	for _, e := range effectsOf(doc) {
		if e == EffectMasses || e == EffectUnevenness {
			continue
		}
		name := ""
		switch e {
		case EffectStiffness:
			effects.Stiffness, name = true, "+ stiffness"
		case EffectFluid:
			effects.Fluid, name = true, "+ fluid"
		case EffectSound:
			effects.Sound, name = true, "+ sound of it"
		case EffectCavity:
			effects.Cavity, name = true, "+ cavity"
		}
		if err := add(name); err != nil {
			return nil, err
		}
	}
	for _, e := range []struct {
		effect  Effect
		name    string
		without []Effect
	}{{EffectMasses, "+ attached masses", []Effect{EffectUnevenness}}, {EffectUnevenness, "+ unevenness", nil}} {
		uneven, ok := unevenOf(doc, e.without)
		if !coupledHere || !ok || !slices.Contains(effectsOf(doc), e.effect) {
			continue
		}
		coupled, _, _, err := solveCoupled(real, effects, uneven)
		if err != nil {
			return nil, err
		}
		mode, err := coupledShapeOf(coupled, m, n, false)
		if err != nil {
			continue // beyond what is coupled
		}
		steps = append(steps, CostStep{Name: e.name, Frequency: mode.Frequency, Change: mode.Frequency/steps[len(steps)-1].Frequency - 1})
	}
	return steps, nil
}

// frequencyOf is the frequency of one mode, Hz.
func frequencyOf(real modes.Real, effects modes.Effects, m, n int) (float64, error) {
	mode, err := modes.SolveMode(real, effects, m, n)
	if err != nil {
		return 0, asError(err, "document")
	}
	return mode.Frequency, nil
}

// input is one quantity that a frequency depends on.
type input struct {
	field, name string
	of          func(*diaphragm.Diaphragm) *float64
}

var inputs = []input{
	{"ring.radius", "ring radius", func(d *diaphragm.Diaphragm) *float64 { return &d.Ring.Radius }},
	{"tension.nominal", "tension", func(d *diaphragm.Diaphragm) *float64 { return &d.Tension.Nominal }},
	{"sheet.thickness", "sheet thickness", func(d *diaphragm.Diaphragm) *float64 { return &d.Sheet.Thickness }},
	{"sheet.density", "density of the sheet", func(d *diaphragm.Diaphragm) *float64 { return &d.Sheet.Density }},
	{"sheet.measuredArealDensity", "measured areal density", func(d *diaphragm.Diaphragm) *float64 { return &d.Sheet.MeasuredArealDensity }},
	{"sheet.e", "modulus of elasticity", func(d *diaphragm.Diaphragm) *float64 { return &d.Sheet.E }},
	{"surroundings.pressure", "air pressure", func(d *diaphragm.Diaphragm) *float64 { return &d.Surroundings.Pressure }},
	{"surroundings.temperature", "absolute temperature", func(d *diaphragm.Diaphragm) *float64 { return &d.Surroundings.Temperature }},
	{"faces.upper.depth", "depth of the upper cavity", func(d *diaphragm.Diaphragm) *float64 { return &d.Faces.Upper.Depth }},
	{"faces.lower.depth", "depth of the lower cavity", func(d *diaphragm.Diaphragm) *float64 { return &d.Faces.Lower.Depth }},
	{"faces.upper.wall", "distance of the upper wall", func(d *diaphragm.Diaphragm) *float64 { return &d.Faces.Upper.Wall }},
	{"faces.lower.wall", "distance of the lower wall", func(d *diaphragm.Diaphragm) *float64 { return &d.Faces.Lower.Wall }},
}

// sensitivityStep is the relative step of the central difference: its error of
// second order is about 1e-6, and frequencies of 10 digits leave 1e-7.
const sensitivityStep = 1e-3

// slopeOf is d ln f / d ln x; false where the diaphragm does not have the
// input or does not depend on it.
func slopeOf(doc *diaphragm.Diaphragm, in input, effects modes.Effects, m, n int) (float64, bool) {
	if *in.of(doc) == 0 {
		return 0, false
	}
	var logs [2]float64
	for i, step := range []float64{1 + sensitivityStep, 1 - sensitivityStep} {
		changed := *doc
		*in.of(&changed) *= step
		real, err := realOf(&changed)
		if err != nil {
			return 0, false
		}
		f, err := frequencyOf(real, effects, m, n)
		if err != nil {
			return 0, false
		}
		logs[i] = math.Log(f)
	}
	slope := (logs[0] - logs[1]) / (math.Log1p(sensitivityStep) - math.Log1p(-sensitivityStep))
	return slope, math.Abs(slope) > 1e-6
}

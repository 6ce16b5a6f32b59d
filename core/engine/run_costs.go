package engine

import (
	"cmp"
	"context"
	"math"
	"slices"
	"strconv"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
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
	doc := &request.Document
	wanted := wantedMode{request.M, request.N, request.Upper}
	result := &CostsResult{Steps: []CostStep{}, Sensitivities: []Sensitivity{}}
	if err := costSteps(doc, wanted, result); err != nil {
		return nil, err
	}
	if request.Short {
		return result, nil
	}
	inputs := inputsOf(doc)
	report := progress(ctx)
	for i, input := range inputs {
		if ctx.Err() != nil {
			return nil, ctx.Err()
		}
		if slope, ok := slopeOf(doc, input, wanted); ok {
			result.Sensitivities = append(result.Sensitivities, Sensitivity{Field: input.field, Name: input.name, PerPercent: slope})
		}
		report(float64(i+1) / float64(len(inputs)))
	}
	sorting.By(result.Sensitivities, func(a, b Sensitivity) int {
		return cmp.Compare(math.Abs(b.PerPercent), math.Abs(a.PerPercent))
	})
	return result, nil
}

// wantedMode names a mode.
type wantedMode struct {
	m, n  int
	upper bool
}

// stepNames name the effects as steps.
var stepNames = map[Effect]string{
	EffectStiffness: "+ stiffness", EffectFluid: "+ fluid", EffectSound: "+ sound of it",
	EffectCavity: "+ cavity", EffectMasses: "+ attached masses", EffectUnevenness: "+ unevenness",
}

// costSteps switches the effects on one after another.
func costSteps(doc *diaphragm.Diaphragm, wanted wantedMode, result *CostsResult) error {
	left := AllEffects()
	name := "ideal sheet"
	for _, e := range append([]Effect{""}, effectsOf(doc)...) {
		if e != "" {
			name = stepNames[e]
			left = slices.DeleteFunc(left, func(x Effect) bool { return x == e })
		}
		f, err := frequencyOf(doc, left, wanted, false)
		if err != nil && (e == EffectMasses || e == EffectUnevenness) {
			result.Note = "Attached masses and unevenness are not listed for this mode. " + err.Error()
			return nil
		}
		if err != nil {
			return err
		}
		step := CostStep{Name: name, Frequency: f}
		if n := len(result.Steps); n > 0 {
			step.Change = f/result.Steps[n-1].Frequency - 1
		}
		result.Steps = append(result.Steps, step)
	}
	return nil
}

// frequencyOf is the frequency of one mode, Hz. Small takes no more modes along
// than a derivative needs.
func frequencyOf(doc *diaphragm.Diaphragm, without []Effect, wanted wantedMode, small bool) (float64, error) {
	if q := doc.Ring.HubRadius / doc.Ring.Radius; q > 0 {
		return idealFrequency(doc, wanted.m, wanted.n) * bessel.ZeroAnnulus(wanted.m, q, wanted.n) / bessel.ZeroJ(float64(wanted.m), wanted.n), nil
	}
	effects, err := effectsWithout(without)
	if err != nil {
		return 0, err
	}
	real, err := realOf(doc)
	if err != nil {
		return 0, err
	}
	uneven, coupling := unevenOf(doc, without)
	if !coupling {
		mode, err := modes.SolveMode(real, effects, wanted.m, wanted.n)
		if err != nil {
			return 0, asError(err, "document")
		}
		return mode.Frequency, nil
	}
	if wanted.m > coupledDiameters || wanted.n > coupledCircles {
		return 0, errNoMode()
	}
	var coupled *modes.Coupled
	if small {
		even, err := modes.Solve(real, modes.Request{MaxM: max(4, wanted.m+3), MaxN: max(2, wanted.n), Effects: effects})
		if err != nil {
			return 0, asError(err, "document")
		}
		if coupled, err = modes.SolveCoupled(even, uneven); err != nil {
			return 0, unevenRefusal(err)
		}
	} else if coupled, _, _, err = solveCoupled(real, effects, uneven); err != nil {
		return 0, err
	}
	mode, err := coupledModeNamed(coupled, wanted.m, wanted.n, wanted.upper)
	if err != nil {
		return 0, err
	}
	return mode.Frequency, nil
}

// input is one quantity that a frequency depends on.
type input struct {
	field, name string
	of          func(*diaphragm.Diaphragm) *float64
}

// inputsOf lists the quantities of a diaphragm.
func inputsOf(doc *diaphragm.Diaphragm) []input {
	list := slices.Clone(fixedInputs)
	for i := range doc.Attached.Patches {
		patch := func(member, name string, of func(*diaphragm.Patch) *float64) {
			which := strconv.Itoa(i)
			list = append(list, input{"attached.patches." + which + "." + member, name + " of patch " + strconv.Itoa(i+1),
				func(d *diaphragm.Diaphragm) *float64 { return of(&d.Attached.Patches[i]) }})
		}
		patch("mass", "mass", func(p *diaphragm.Patch) *float64 { return &p.Mass })
		patch("radius", "place", func(p *diaphragm.Patch) *float64 { return &p.Radius })
		patch("size", "radius", func(p *diaphragm.Patch) *float64 { return &p.Size })
	}
	for i := range doc.Attached.Strips {
		list = append(list, input{"attached.strips." + strconv.Itoa(i) + ".mass", "mass of strip " + strconv.Itoa(i+1),
			func(d *diaphragm.Diaphragm) *float64 { return &d.Attached.Strips[i].Mass }})
	}
	for i, h := range doc.Tension.Harmonics {
		list = append(list, input{"tension.harmonics." + strconv.Itoa(i) + ".epsilon", "amplitude of harmonic k = " + strconv.Itoa(h.Order),
			func(d *diaphragm.Diaphragm) *float64 { return &d.Tension.Harmonics[i].Epsilon }})
	}
	return list
}

var fixedInputs = []input{
	{"ring.radius", "ring radius", func(d *diaphragm.Diaphragm) *float64 { return &d.Ring.Radius }},
	{"tension.nominal", "tension", func(d *diaphragm.Diaphragm) *float64 { return &d.Tension.Nominal }},
	{"ring.hubRadius", "hub radius", func(d *diaphragm.Diaphragm) *float64 { return &d.Ring.HubRadius }},
	{"ring.outOfRound", "out of round", func(d *diaphragm.Diaphragm) *float64 { return &d.Ring.OutOfRound }},
	{"tension.weftRatio", "weft over warp tension", func(d *diaphragm.Diaphragm) *float64 { return &d.Tension.WeftRatio }},
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

// Relative steps of the central difference: its error of second order is about
// 1e-6 and frequencies of 10 digits leave 1e-7. Those of coupled modes have 6
// digits where the numbers of functions jump, which leaves 1e-4.
const (
	sensitivityStep = 1e-3
	coupledStep     = 5e-3
)

// slopeOf is d ln f / d ln x; false where the diaphragm does not have the
// input or does not depend on it.
func slopeOf(doc *diaphragm.Diaphragm, in input, wanted wantedMode) (float64, bool) {
	if *in.of(doc) == 0 {
		return 0, false
	}
	size, least := sensitivityStep, 1e-6
	if _, coupling := unevenOf(doc, nil); coupling {
		size, least = coupledStep, 2e-5
	}
	var logs [2]float64
	for i, step := range []float64{1 + size, 1 - size} {
		changed := *doc
		changed.Attached.Patches = slices.Clone(doc.Attached.Patches)
		changed.Attached.Strips = slices.Clone(doc.Attached.Strips)
		changed.Tension.Harmonics = slices.Clone(doc.Tension.Harmonics)
		*in.of(&changed) *= step
		f, err := frequencyOf(&changed, nil, wanted, true)
		if err != nil {
			return 0, false
		}
		logs[i] = math.Log(f)
	}
	slope := (logs[0] - logs[1]) / (math.Log1p(size) - math.Log1p(-size))
	return slope, math.Abs(slope) > least
}

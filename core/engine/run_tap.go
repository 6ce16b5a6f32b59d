package engine

import (
	"context"
	"math"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/tap"
)

func runTap(_ context.Context, request *TapRequest) (*TapResult, error) {
	doc := request.Document
	problems := diaphragm.Validate(doc)
	problems = append(problems, request.Inputs.problems()...)
	if doc.Ring.HubRadius > 0 {
		problems = append(problems, Problem{
			Field: "document.ring.hubRadius", Code: CodeRange, Offset: -1,
			Message: "A tap of a sheet with a hub cannot be read: the modes used here are those of a full sheet.",
		})
	}
	if err := refuse(problems); err != nil {
		return nil, err
	}
	effects, err := effectsWithout(request.Without)
	if err != nil {
		return nil, err
	}
	inputs := request.Inputs.orUsual(&doc)
	sigma := doc.Sheet.ArealDensity()
	question := tap.Question{
		Radius:       doc.Ring.Radius,
		ArealDensity: sigma,
		Nominal:      doc.Tension.Nominal,
		Tolerance:    doc.Tension.Tolerance,
		Peaks:        request.Peaks,
	}
	result := &TapResult{Cautions: append(tapCautions(&doc, request.Without), cautions(doc)...)}
	around := doc.Surroundings
	if state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity); err == nil {
		result.MassRatio = state.Density * doc.Ring.Radius / sigma
		question.Air = tap.Air{Density: state.Density, Faces: facesLeftOut(doc.Faces, effects)}
	} else {
		result.Cautions = append([]string{err.Error() + " What leaving the air out does to the tension is therefore not stated."}, result.Cautions...)
	}
	ideal, ratios, err := setModes(&question, &doc, request.Without, effects, inputs)
	if err != nil {
		return nil, err
	}
	result.Assumptions = inputs.assumptions(&doc, request.Without, effects, ideal)
	answer, err := tap.Read(question, tap.Options{ModelError: inputs.model(ideal)})
	if err != nil {
		return nil, asError(err, "peaks")
	}
	result.Readings = answer.Readings
	result.Chosen = answer.Chosen
	result.Lower, result.Upper = answer.Lower, answer.Upper
	result.Verdict, result.Reason = answer.Verdict, answer.Reason
	result.Budget = answer.Budget
	if len(answer.Readings) == 0 {
		return result, nil
	}
	best := answer.Readings[0]
	result.Assumptions = append(result.Assumptions, ratios.words(best.Matches)...)
	if !ideal {
		result.Ideal = idealReading(&question, best)
	}
	if wet(question.Air.Faces) && question.Air.Density > 0 {
		result.AirNote, _ = question.Air.Note(doc.Ring.Radius, sigma, best.Matches)
	}
	return result, nil
}

// setModes gives the question its modes and the inputs that are not known
// exactly. ideal is true where nothing is left but the ideal sheet.
func setModes(question *tap.Question, doc *diaphragm.Diaphragm, without []Effect, effects modes.Effects, inputs TapInputs) (ideal bool, ratios *coupledRatios, err error) {
	uneven, coupling := unevenOf(doc, without)
	if !coupling && !effects.Stiffness && !effects.Fluid && !effects.Cavity {
		question.Nuisances = inputs.idealNuisances()
		return true, nil, nil
	}
	real, err := realOf(doc)
	if err != nil {
		return false, nil, err
	}
	var couples *modes.Uneven
	if coupling {
		couples = &uneven
	}
	if question.Spectrum, ratios, err = tapSpectrum(real, effects, couples, question.Peaks); err != nil {
		return false, nil, err
	}
	question.Nuisances, err = inputs.nuisances(doc, real, effects)
	for i := range question.Nuisances {
		question.Nuisances[i].Solve = ratios.couple(question.Nuisances[i].Solve)
	}
	return false, ratios, err
}

// facesLeftOut are the faces whose fluid the modes do not know of; the others
// stand as vacuum.
func facesLeftOut(faces diaphragm.Faces, effects modes.Effects) diaphragm.Faces {
	for _, face := range []*diaphragm.Face{&faces.Upper, &faces.Lower} {
		known := effects.Fluid
		if face.Kind == diaphragm.FaceCavity {
			known = effects.Cavity
		}
		if known {
			*face = diaphragm.Face{Kind: diaphragm.FaceVacuum}
		}
	}
	return faces
}

func wet(faces diaphragm.Faces) bool {
	return faces.Upper.Kind != diaphragm.FaceVacuum || faces.Lower.Kind != diaphragm.FaceVacuum
}

// idealReading sets the ideal sheet beside a reading.
func idealReading(question *tap.Question, best tap.Reading) *IdealReading {
	tension, misfit := tap.IdealTension(question.Radius, question.ArealDensity, best.Matches)
	if tension == 0 {
		return nil
	}
	out := &IdealReading{Tension: tension, Factor: best.Tension / tension, Misfit: misfit}
	for _, match := range best.Matches {
		out.RealMisfit = max(out.RealMisfit, math.Abs(match.Residual))
	}
	return out
}

// tapCautions warns of what the document has and the reading does not know of.
func tapCautions(doc *diaphragm.Diaphragm, without []Effect) []string {
	return effectCautions(doc, without)
}

package engine

import (
	"context"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/tap"
)

func runTap(_ context.Context, request *TapRequest) (*TapResult, error) {
	doc := request.Document
	if err := refuse(diaphragm.Validate(doc)); err != nil {
		return nil, err
	}
	sigma := doc.Sheet.ArealDensity()
	result := &TapResult{
		Assumptions: append(idealAssumptions(),
			"The radius and the areal density are taken as exact; the interval holds the scatter of the peaks only.",
			"Pass and fail follow JCGM 106:2012 with a guard band of one expanded uncertainty (coverage 95 %)."),
		Cautions: cautions(doc),
	}
	question := tap.Question{
		Radius:       doc.Ring.Radius,
		ArealDensity: sigma,
		Nominal:      doc.Tension.Nominal,
		Tolerance:    doc.Tension.Tolerance,
		Air:          tap.Air{Faces: doc.Faces},
		Peaks:        request.Peaks,
	}
	around := doc.Surroundings
	if state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity); err == nil {
		question.Air.Density = state.Density
		result.MassRatio = state.Density * doc.Ring.Radius / sigma
	} else {
		result.Cautions = append([]string{err.Error() + " What leaving the air out does to the tension is therefore not stated."}, result.Cautions...)
	}
	answer, err := tap.Read(question, tap.Options{})
	if err != nil {
		return nil, asError(err, "peaks")
	}
	result.Readings = answer.Readings
	result.Chosen = answer.Chosen
	result.Lower, result.Upper = answer.Lower, answer.Upper
	result.Verdict, result.Reason = answer.Verdict, answer.Reason
	if len(answer.Readings) > 0 && question.Air.Density > 0 {
		result.AirNote, _ = question.Air.Note(doc.Ring.Radius, sigma, answer.Readings[0].Matches)
	}
	return result, nil
}

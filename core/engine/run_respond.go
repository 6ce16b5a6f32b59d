package engine

import (
	"context"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
	"hoopsheet/core/response"
)

func runRespond(ctx context.Context, request *RespondRequest) (*RespondResult, error) {
	if problems := diaphragm.Validate(request.Document); len(problems) > 0 {
		// Without a sound sheet there is no wave speed to judge the rest by.
		problems = append(problems, request.Displacement.Check("displacement.")...)
		return nil, refuse(append(problems, request.Velocity.Check("velocity.")...))
	}
	c := respondCase(request)
	if err := refuse(c.Check()); err != nil {
		return nil, err
	}
	motion, problems, err := response.Respond(ctx, c, progress(ctx))
	if err != nil {
		return nil, err
	}
	if err := refuse(problems); err != nil {
		return nil, err
	}
	result := &RespondResult{
		Times:        motion.Times,
		Motion:       motion.Values,
		HistoryTimes: motion.HistoryTimes,
		Travel: Travel{
			Displacement: motion.Travel.Displacement,
			At:           motion.Travel.At,
			Time:         motion.Travel.Time,
		},
		Envelope:           motion.Envelope,
		MissedDisplacement: motion.MissedDisplacement,
		MissedVelocity:     motion.MissedVelocity,
		MissedEnergy:       motion.MissedEnergy,
		Energy:             motion.Energy,
		Period:             motion.Period,
		RingDown:           motion.RingDown,
		Histories:          []History{},
		Strongest:          []ModeShare{},
		Assumptions:        motion.Assumptions,
		Warnings:           append(airWarnings(&request.Document), motion.Warnings...),
	}
	for i, values := range motion.Histories {
		result.Histories = append(result.Histories, History{Point: request.Points[i], Values: values})
	}
	for _, share := range motion.Strongest {
		result.Strongest = append(result.Strongest, ModeShare{M: share.M, N: share.N, Share: share.Share, Frequency: share.Frequency})
	}
	return result, nil
}

// shownPeriods of mode (0, 1) are computed where no duration is asked for.
const shownPeriods = 6

func respondCase(request *RespondRequest) *response.Case {
	doc := &request.Document
	duration := request.Duration
	if lowest := modes.Ideal(doc.Ring.Radius, doc.Tension.Nominal, doc.Sheet.ArealDensity(), 1); duration == 0 && len(lowest) == 1 {
		duration = shownPeriods / lowest[0].Frequency
	}
	return &response.Case{
		Sheet: response.Sheet{
			Radius:       doc.Ring.Radius,
			Tension:      doc.Tension.Nominal,
			ArealDensity: doc.Sheet.ArealDensity(),
			Stretch:      doc.Sheet.E * doc.Sheet.Thickness / (1 - doc.Sheet.Nu),
		},
		Zeta:         doc.Damping.Ratio,
		Displacement: request.Displacement,
		Velocity:     request.Velocity,
		Orders:       request.Orders,
		Circles:      request.Circles,
		Duration:     duration,
		Frames:       request.Frames,
		Radii:        request.Radii,
		Angles:       request.Angles,
		Points:       request.Points,
	}
}

// airWarnings says what the air, which the motion leaves out, would do to it.
func airWarnings(doc *diaphragm.Diaphragm) []string {
	around := doc.Surroundings
	state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity)
	if err != nil {
		return []string{}
	}
	share, known := modes.AirMass(state.Density*doc.Ring.Radius/doc.Sheet.ArealDensity(), doc.Faces)
	switch {
	case !known:
		return []string{"The air closed in behind the sheet is left out; it stiffens and slows the real motion, that of mode (0, 1) most."}
	case share > notableAir:
		return []string{"The air that moves with mode (0, 1) has about " + quantity.FormatNumber(share, 2) +
			" times the mass of the sheet that moves and is left out: the real motion is slower, and a blow of given momentum moves the sheet less."}
	}
	return []string{}
}

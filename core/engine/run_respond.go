package engine

import (
	"context"
	"math"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/response"
)

func runRespond(ctx context.Context, request *RespondRequest) (*RespondResult, error) {
	c, err := respondCaseOf(request)
	if err != nil {
		return nil, err
	}
	motion, problems, err := response.Respond(ctx, c, progress(ctx))
	if err != nil {
		return nil, err
	}
	if err := refuse(problems); err != nil {
		return nil, err
	}
	if c.Stream {
		key := motionKey(request)
		if _, kept := motions.get(key); !kept {
			motions.put(key, motion)
		}
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
		Clearance:          motion.Clearance,
		EnergyTimes:        motion.Energies.Times,
		Potential:          motion.Energies.Potential,
		Kinetic:            motion.Energies.Kinetic,
		EnergyOrders:       motion.Energies.Orders,
		Angles:             c.Angles,
		Orders:             c.Orders,
		Circles:            c.Circles,
		Sources:            motion.Sources,
		MissedTravel:       motion.MissedTravel,
		MissedDisplacement: motion.MissedDisplacement,
		MissedVelocity:     motion.MissedVelocity,
		MissedEnergy:       motion.MissedEnergy,
		Energy:             motion.Energy,
		Period:             motion.Period,
		RingDown:           motion.RingDown,
		EnergyDown:         motion.EnergyDown,
		Histories:          []History{},
		Assumptions:        motion.Assumptions,
		Warnings:           append(respondCautions(&request.Document, request.Without), motion.Warnings...),
	}
	for i, values := range motion.Histories {
		spot := &motion.Spots[i]
		result.Histories = append(result.Histories, History{Point: request.Points[i], Values: values, Velocity: motion.Speeds[i], Acceleration: motion.Accelerations[i],
			Spectrum: spot.Spectrum, SpectrumStep: spot.SpectrumStep, Modes: modeShares(spot.Modes)})
	}
	result.Strongest = modeShares(motion.Strongest)
	return result, nil
}

func modeShares(shares []response.Share) []ModeShare {
	list := make([]ModeShare, len(shares))
	for i, s := range shares {
		list[i] = ModeShare{M: s.M, N: s.N, Share: s.Share, Frequency: s.Frequency}
	}
	return list
}

// respondCaseOf gives the case that is asked for, with its modes.
func respondCaseOf(request *RespondRequest) (*response.Case, error) {
	c := respondCase(request)
	doc := &request.Document
	effects, err := effectsWithout(request.Without)
	if err != nil {
		return nil, err
	}
	chosen := request.Circles == 0
	_, coupled := unevenOf(doc, request.Without)
	coupled = coupled && doc.Ring.HubRadius == 0
	if coupled {
		// The modes that are coupled take part whole.
		c.Orders, c.Circles = max(c.Orders, coupledDiameters), max(c.Circles, leastChosen)
	}
	if chosen {
		c.Circles = leastChosen
		if !coupled {
			c.Orders = 0
		}
	}
	c.Fit()
	// How long a duration may be depends on the modes, which are still to come.
	problems := slices.DeleteFunc(append(diaphragm.Validate(*doc), c.Check()...), func(p Problem) bool { return p.Field == "duration" })
	if !(request.Tolerance >= 0 && request.Tolerance < 1) {
		problems = append(problems, Problem{Field: "tolerance", Code: CodeRange, Offset: -1, Message: "The share of the energy that may be left out must be from 0 to below 1."})
	}
	if err := refuse(problems); err != nil {
		return nil, err
	}
	if chosen {
		if err := chooseModes(c, request, effects, coupled); err != nil {
			return nil, err
		}
	}
	if c.Wet, err = wetOf(doc, request.Without, effects, c.Orders, c.Circles); err != nil {
		return nil, err
	}
	if request.Duration == 0 && c.Wet != nil {
		c.Duration = shownPeriods * 2 * math.Pi / c.Wet.Orders[0][0].Omega
	}
	return c, nil
}

// The modes that are chosen where none are asked for.
const (
	leastChosen    = 8
	mostChosen     = 40 // of the ideal sheet, both ways
	defaultMissed  = 0.001
	mostWetCircles = 20
	// of an uneven diaphragm, whose modes are many small parts
	mostMixedOrders  = 18
	mostMixedCircles = 12
)

// chooseModes sets orders and circles from the tolerance.
func chooseModes(c *response.Case, request *RespondRequest, effects modes.Effects, coupled bool) error {
	tolerance := request.Tolerance
	if tolerance == 0 {
		tolerance = defaultMissed
	}
	orders, circles := mostChosen, mostChosen
	switch {
	case coupled:
		orders, circles = mostMixedOrders, mostMixedCircles
	case effects != (modes.Effects{}):
		orders, circles = min(orders, modes.MaxDiameters), min(circles, mostWetCircles, modes.MaxCircles)
	}
	if err := refuse(c.Choose(tolerance, orders, circles)); err != nil {
		return err
	}
	if coupled {
		c.Orders = max(c.Orders, coupledDiameters)
	}
	c.Fit()
	return refuse(slices.DeleteFunc(c.Check(), func(p Problem) bool { return p.Field == "duration" }))
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
		Impulse:      request.Impulse,
		Sources:      request.Sources,
		Smooth:       request.Smooth,
		Orders:       request.Orders,
		Circles:      request.Circles,
		Duration:     duration,
		Frames:       request.Frames,
		Stream:       request.Stream,
		Radii:        request.Radii,
		Angles:       request.Angles,
		Points:       request.Points,
		Level:        request.Level,
		Neighbour:    request.Neighbour,
	}
}

// respondCautions warns of what the motion leaves out.
func respondCautions(doc *diaphragm.Diaphragm, without []Effect) []string {
	list := append(effectCautions(doc, without), hubIgnored(doc)...)
	if _, uneven := unevenOf(doc, nil); uneven && doc.Ring.HubRadius > 0 {
		list = append(list, "Uneven tension, the ring's being out of round and attached masses are left out of the motion: it is that of the even diaphragm.")
	}
	return list
}

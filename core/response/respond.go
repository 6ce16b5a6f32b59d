package response

import (
	"context"
	"math"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
)

// Motion is the answer to a Case.
type Motion struct {
	// Times of the frames, s, and Values, m: frame by frame, in each radius by
	// radius.
	Times, Values []float32
	// HistoryTimes, s, and one list of displacements, m, per point.
	HistoryTimes []float32
	Histories    [][]float32
	// Envelope is the largest |w| on the display grid within the duration, m,
	// refined between the frames.
	Envelope []float32
	Travel   Travel
	// Clearance to the neighbour of the case, if it has one.
	Clearance *Approach
	// Speeds, m/s, and Accelerations, m/s^2, belong to Histories.
	Speeds, Accelerations [][]float32
	// Energies against time.
	Energies Energies
	// Spots tell more of each point.
	Spots []Spot
	// EnergyDown is how long after the last load or blow the energy takes to fall
	// by the level of the case, s; 0 if it does not or a load stays.
	EnergyDown float64
	// Sources tell what was found about each source.
	Sources []SourceNote
	// MissedTravel estimates how far the modes left out could move the sheet
	// anywhere, m; -1 where their sum has no end.
	MissedTravel float64
	// MissedDisplacement and MissedVelocity are the shares, 0 to 1, of the
	// potential and kinetic energy given outside the chosen modes; MissedEnergy
	// that of both. With wet modes that of the kinetic energy is an
	// estimate from above: the fluid's share in what is left out is not known.
	MissedDisplacement, MissedVelocity, MissedEnergy float64
	// Energy at the start, J; where the initial displacement has a jump, and so
	// no finite energy, that of the chosen modes.
	Energy float64
	// Period of mode (0,1) without damping, s, and its time to -60 dB; 0 without
	// damping.
	Period, RingDown float64
	// Strongest lists the modes that carry most energy, largest first.
	Strongest             []Share
	Assumptions, Warnings []string

	// What Frames needs: the motion, the display grid, and a/c in s.
	moves  *motion
	radii  []float64
	angles int
	unit   float64
}

// Share is the share of the initial energy that one mode carries.
type Share struct {
	M, N  int
	Share float64
	// Frequency without damping, Hz.
	Frequency float64
}

// Respond computes the motion of a case: the ideal sheet, released from its
// initial displacement and velocity, each of its modes with the same damping
// ratio, by Fourier-Bessel series and closed forms in time.
//
// Problems are those of Case.Check and those that only show over the whole
// sheet, such as a division by zero of a formula at the centre. The error is
// that of ctx. report is told the share of the work done.
func Respond(ctx context.Context, c *Case, report func(share float64)) (*Motion, []diaphragm.Problem, error) {
	if problems := c.Check(); len(problems) > 0 {
		return nil, problems, nil
	}
	begin, problems := c.start()
	if len(problems) > 0 {
		return nil, problems, nil
	}
	part := func(from, to float64) func(float64) {
		return func(share float64) { report(from + (to-from)*share) }
	}
	unit := c.unit()
	pictures, err := drawFrames(ctx, c, begin.moves, unit, part(0.1, 0.5))
	if err != nil {
		return nil, nil, err
	}
	histories, err := follow(ctx, c, begin.moves, unit)
	if err != nil {
		return nil, nil, err
	}
	top, coarse, err := begin.moves.largestTravel(ctx, c.Duration/unit, pictures.best, part(0.6, 1))
	if err != nil {
		return nil, nil, err
	}
	var clearance *Approach
	if c.Neighbour != nil {
		if clearance, err = begin.moves.clearance(ctx, c, c.Duration/unit); err != nil {
			return nil, nil, err
		}
	}
	m := c.motionOf(begin.moves)
	m.Clearance = clearance
	m.Times, m.Values, m.Envelope = pictures.times, pictures.motion, pictures.envelope
	m.HistoryTimes = histories.times
	m.Histories, m.Speeds, m.Accelerations = histories.values[0], histories.values[1], histories.values[2]
	m.Travel = travelOf(top, unit, c.Duration)
	m.Period = c.period()
	m.RingDown = ringDown(2*math.Pi/c.period(), c.lowestZeta())
	begin.energies(m, c)
	m.Energies = begin.moves.energies(c)
	m.Spots = begin.moves.spots(c, histories)
	level := c.Level
	if level == 0 {
		level = usualLevel
	}
	m.EnergyDown = begin.moves.energyDown(level) * unit
	m.Assumptions = c.assumptions()
	m.Warnings = c.warnings(begin, m, warned{
		steepest:      math.Max(pictures.steepest, begin.steepest/c.Sheet.Radius),
		cappedHistory: histories.capped,
		coarseSearch:  coarse,
	})
	report(1)
	return m, nil, nil
}

// lowestZeta is the damping ratio of mode (0,1).
func (c *Case) lowestZeta() float64 {
	if c.Wet != nil {
		return c.Wet.lowest().Zeta
	}
	return c.Zeta
}

// times is the product in which nothing times anything is nothing.
func times(scale, value float64) float64 {
	if scale == 0 {
		return 0
	}
	return scale * value
}

// energies fills in energies and what they say of the modes.
func (s *start) energies(m *Motion, c *Case) {
	m.MissedDisplacement = missed(s.keptPotential, s.potential)
	m.MissedVelocity = missed(s.keptKinetic, s.kinetic)
	m.MissedEnergy = missed(s.keptPotential+s.keptKinetic, s.potential+s.kinetic)
	whole := s.potential + s.kinetic
	if math.IsInf(whole, 1) {
		whole = s.keptPotential + s.keptKinetic
	}
	if c.Wet != nil || c.later() {
		// The fluid moves too, and a cavity stores energy: what the modes hold.
		potential, kinetic := s.moves.energy(0)
		whole = potential + kinetic
	}
	m.Energy = c.Sheet.Tension / 2 * whole
	m.Strongest = s.moves.strongest(whole, c)
	m.MissedTravel = s.moves.missedTravel()
	m.Sources = []SourceNote{}
	for i, g := range s.list {
		if i < len(s.list)-len(c.Sources) {
			continue // a start that is no source
		}
		s.remark(c, g)
		m.Sources = append(m.Sources, g.note)
	}
}

// missed is the share of a whole that the kept part leaves out.
func missed(kept, whole float64) float64 {
	switch {
	case whole == 0:
		return 0
	case math.IsInf(whole, 1):
		return 1
	}
	return math.Min(math.Max((whole-kept)/whole, 0), 1)
}

// strongest returns the modes that carry the largest shares of the energy.
func (mo *motion) strongest(whole float64, c *Case) []Share {
	const most = 10
	s := mo.stages[0]
	shares := make([]Share, 0, len(s.modes))
	hertz := c.Sheet.WaveSpeed() / c.Sheet.Radius / (2 * math.Pi)
	energyOf := func(k *modal) float64 { return k.energy(0) }
	if c.later() {
		// What each may reach.
		energyOf = func(k *modal) float64 { return k.norm * k.omega * k.omega * k.swing * k.swing }
		whole = 0
		for i := range s.modes {
			whole += energyOf(&s.modes[i])
		}
	}
	for i := 0; i < len(s.modes); i++ {
		k := &s.modes[i]
		energy := energyOf(k)
		if i+1 < len(s.modes) && k.same(&s.modes[i+1]) {
			i++
			energy += energyOf(&s.modes[i])
		}
		if energy > 0 {
			shares = append(shares, Share{M: k.m, N: k.n, Share: energy / whole, Frequency: k.omega * hertz})
		}
	}
	sorting.By(shares, byShare)
	return slices.Clip(shares[:min(most, len(shares))])
}

// travelOf takes a candidate to SI units.
func travelOf(top candidate, unit, duration float64) Travel {
	return Travel{Displacement: top.value, At: placeOf(top), Time: math.Min(top.t*unit, duration)}
}

// ringDown returns the time, s, in which a mode of angular frequency omega
// (rad/s) falls to -60 dB, a thousandth of its displacement; 0 without damping.
func ringDown(omega, zeta float64) float64 {
	rate := zeta * omega
	if zeta > 1 {
		// The slower of the two exponentials.
		rate = omega / (zeta + math.Sqrt((zeta-1)*(zeta+1)))
	}
	if rate == 0 {
		return 0
	}
	return math.Log(1000) / rate
}

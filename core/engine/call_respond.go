package engine

import (
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/response"
)

// RespondRequest asks what the diaphragm does under sources.
type RespondRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	// Sources set the sheet moving, each at its time.
	Sources []response.Source `json:"sources,omitempty"`
	// Displacement and Velocity are a shape let go and a velocity given at the
	// start, besides Sources.
	Displacement response.Shape `json:"displacement,omitempty"`
	Velocity     response.Shape `json:"velocity,omitempty"`
	// Impulse reads Velocity as a blow: momentum per area, N s/m^2, instead of
	// m/s. A blow sets the fluid moving too.
	Impulse bool `json:"impulse,omitempty"`
	// Without names effects to leave out; without all of them the ideal sheet
	// moves, every mode with the damping ratio of the document.
	Without []Effect `json:"without,omitempty"`
	// Orders M and Circles N set the modes used: m = 0..M, n = 1..N. With
	// Circles 0 both are chosen.
	Orders  int `json:"orders"`
	Circles int `json:"circles"`
	// Tolerance is the share of the energy that the modes may leave out where
	// they are chosen; 0 stands for 0.001.
	Tolerance float64 `json:"tolerance,omitempty"`
	// Smooth is the radius, in ring radii, over which sharp edges are smoothed; 0
	// leaves them.
	Smooth float64 `json:"smooth,omitempty"`
	// Duration of the computed time, s, 0 for six periods of mode (0, 1);
	// Frames evenly spaced over it.
	Duration float64 `json:"duration"`
	Frames   int     `json:"frames"`
	// Stream leaves the frames out of the result: the call "frames" gives them
	// when they are drawn. There may then be as many on any grid.
	Stream bool `json:"stream,omitempty"`
	// Radii and Angles set the display grid: radii j/(Radii-1), angles
	// 2 pi i/Angles. Angles is even and its half has no prime factor above 5;
	// it is raised if the orders used need more.
	Radii  int              `json:"radii"`
	Angles int              `json:"angles"`
	Points []response.Point `json:"points"`
	// Level of the ring-down of the energy, dB below; 0 stands for 60.
	Level float64 `json:"level,omitempty"`
	// Neighbour is a flat surface to which the clearance is sought.
	Neighbour *response.Neighbour `json:"neighbour,omitempty"`
}

// RespondResult is the motion, ready to draw.
type RespondResult struct {
	// Times of the frames, s.
	Times Numbers `json:"times"`
	// Motion holds the frames one after another, each Radii x Angles values of
	// displacement in m, a radius at a time; empty with Stream.
	Motion Numbers `json:"motion"`
	// Histories holds one list per point; HistoryTimes belong to all, s.
	HistoryTimes Numbers   `json:"historyTimes"`
	Histories    []History `json:"histories"`
	// Travel is the largest |w| anywhere within the duration.
	Travel Travel `json:"travel"`
	// Envelope is the largest |w| on the display grid within the duration, m,
	// refined between the frames.
	Envelope Numbers `json:"envelope"`
	// Clearance to the neighbour asked about.
	Clearance *response.Approach `json:"clearance,omitempty"`
	// EnergyTimes, s, and the potential and kinetic energy then, J; EnergyOrders
	// holds, instant by instant, that of each number of nodal diameters.
	EnergyTimes  Numbers `json:"energyTimes"`
	Potential    Numbers `json:"potential"`
	Kinetic      Numbers `json:"kinetic"`
	EnergyOrders Numbers `json:"energyOrders"`
	// Angles of the display grid, as used.
	Angles int `json:"angles"`
	// Orders and Circles of the modes used.
	Orders  int `json:"orders"`
	Circles int `json:"circles"`
	// Sources tell what was found about each.
	Sources []response.SourceNote `json:"sources"`
	// MissedTravel estimates, from above, how far the modes left out could move
	// the sheet anywhere, m; -1 where their sum has no end.
	MissedTravel float64 `json:"missedTravel"`
	// MissedDisplacement and MissedVelocity are the shares (0 to 1) of the
	// potential and kinetic energy given that the chosen modes leave out;
	// MissedEnergy is the share of both together. They are estimates from above
	// where a fluid moves along.
	MissedDisplacement float64 `json:"missedDisplacement"`
	MissedVelocity     float64 `json:"missedVelocity"`
	MissedEnergy       float64 `json:"missedEnergy"`
	// Energy is the initial energy, J, of sheet, fluid and cavity.
	Energy float64 `json:"energy"`
	// Period of mode (0,1), s, for choosing a duration.
	Period float64 `json:"period"`
	// RingDown is the time to -60 dB at the damping ratio of mode (0,1), s; 0
	// without damping.
	RingDown float64 `json:"ringDown"`
	// EnergyDown is how long after the last load or blow the energy takes to fall
	// by Level, s; 0 if it does not, or a load stays.
	EnergyDown float64 `json:"energyDown"`
	// Strongest lists the modes that carry most energy, largest first.
	Strongest   []ModeShare `json:"strongest"`
	Assumptions []string    `json:"assumptions"`
	Warnings    []string    `json:"warnings"`
}

// History is the displacement, m, of one point against time, with its velocity,
// m/s, and acceleration, m/s^2.
type History struct {
	Point        response.Point `json:"point"`
	Values       Numbers        `json:"values"`
	Velocity     Numbers        `json:"velocity"`
	Acceleration Numbers        `json:"acceleration"`
	// Spectrum holds amplitudes, m, of the displacement, Hann-windowed over the
	// duration, at the frequencies 0, SpectrumStep, 2 SpectrumStep ... Hz.
	Spectrum     Numbers `json:"spectrum"`
	SpectrumStep float64 `json:"spectrumStep"`
	// Modes that move the point most; the shares are of the sum of how far each
	// may move it.
	Modes []ModeShare `json:"modes"`
}

// Travel is the largest displacement found, with its place and time.
type Travel struct {
	// Displacement with its sign, m.
	Displacement float64        `json:"displacement"`
	At           response.Point `json:"at"`
	// Time, s.
	Time float64 `json:"time"`
}

// ModeShare is the share that one mode has, of the initial energy or of the
// movement of a point.
type ModeShare struct {
	M     int     `json:"m"`
	N     int     `json:"n"`
	Share float64 `json:"share"`
	// Frequency of the mode, Hz.
	Frequency float64 `json:"frequency"`
}

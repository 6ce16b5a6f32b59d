package response

import (
	"math"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

// Sheet is what the response needs to know of the sheet.
type Sheet struct {
	Radius       float64 // a, m
	Tension      float64 // T, N/m
	ArealDensity float64 // sigma, kg/m^2
	// Stretch is the resistance to even stretching E h/(1-nu), N/m.
	Stretch float64
}

// WaveSpeed returns c = sqrt(T/sigma), m/s.
//
//go:noinline
func (s Sheet) WaveSpeed() float64 { return math.Sqrt(s.Tension / s.ArealDensity) }

// Case is one initial-value problem of the ideal sheet and what to show of it.
type Case struct {
	Sheet Sheet
	// Zeta is the damping ratio of every mode, 0 and up.
	Zeta                   float64
	Displacement, Velocity Shape
	// Impulse reads Velocity as momentum per area, N s/m^2, instead of m/s: a
	// blow sets the fluid moving too, a prescribed velocity does not ask what it
	// takes.
	Impulse bool
	// Sources are what sets the sheet moving besides.
	Sources []Source
	// Smooth is the radius, in units of the ring radius, over which sharp edges
	// of all shapes are smoothed: every coefficient is multiplied by
	// exp(-(j_mn Smooth)^2/4). 0 leaves them as they are.
	Smooth float64
	// Wet gives the modes of the diaphragm as it stands; nil stands for the
	// ideal sheet, whose modes all have the damping ratio Zeta.
	Wet *Wet
	// Modes m = 0..Orders, n = 1..Circles.
	Orders, Circles int
	// Duration, s, and the number of frames spread evenly over it.
	Duration float64
	Frames   int
	// Stream keeps no frames: Motion.Frames gives them when they are wanted.
	Stream bool
	// Display grid: radii j/(Radii-1) and angles 2 pi i/Angles.
	Radii, Angles int
	// Points whose history is kept.
	Points []Point
	// Level of the ring-down of energy, dB below; 0 stands for 60.
	Level float64
	// Neighbour, if there is one, to which the clearance is sought.
	Neighbour *Neighbour
}

// Bounds of a Case.
const (
	MostOrders  = 60
	MostCircles = 60
	MostFrames  = 2000
	MostRadii   = 257
	MostAngles  = 512
	MostPoints  = 8
	// MostMotion is the largest number of values of all frames together that are
	// kept.
	MostMotion = 8 << 20
	// MostPeriods of mode (0,1) in a duration.
	MostPeriods = 10000
)

// Check lists what is wrong with the case, by the names of its fields with a
// small first letter. It does not look at the values of a formula over the
// sheet; Respond does.
func (c *Case) Check() []diaphragm.Problem {
	var r refusals
	if c.Displacement.Kind != "" {
		r.list = append(r.list, c.Displacement.Check("displacement.")...)
	}
	if c.Velocity.Kind != "" {
		r.list = append(r.list, c.Velocity.Check("velocity.")...)
	}
	c.checkSources(&r)
	if !(c.Smooth >= 0 && c.Smooth <= 0.5) {
		r.bounds("smooth", say("The radius of smoothing is # ring radii; it must be from 0 to 0.5.", c.Smooth))
	}
	if !(c.Level >= 0 && c.Level <= 200) {
		r.bounds("level", say("The level is # dB below; it must be from 0 to 200.", c.Level))
	}
	if c.Neighbour != nil {
		c.Neighbour.check(&r, c.Sheet.Radius)
	}
	before := len(r.list)
	for _, w := range [...]struct {
		field, name        string
		value, least, most int
	}{
		{"orders", "largest number of nodal diameters", c.Orders, 0, MostOrders},
		{"circles", "largest number of nodal circles", c.Circles, 1, MostCircles},
		{"frames", "number of frames", c.Frames, 2, MostFrames},
		{"radii", "number of radii of the display grid", c.Radii, 2, MostRadii},
		{"angles", "number of angles of the display grid", c.Angles, 4, MostAngles},
	} {
		if w.value < w.least || w.value > w.most {
			r.bounds(w.field, say("The # is #; it must be from # to #.", w.name, w.value, w.least, w.most))
		}
	}
	if len(r.list) == before {
		if c.Angles != disc.NextAngles(c.Angles) || c.Angles < disc.MinAngles(c.Orders) {
			r.bounds("angles", say("The number of angles of the display grid is #; modes with up to # nodal diameters need an even number of at least #, whose half has no prime factor above 5, such as #.",
				c.Angles, c.Orders, 2*c.Orders+2, disc.NextAngles(max(c.Angles, 2*c.Orders+2))))
		}
		if !c.Stream && c.Frames*c.Radii*c.Angles > MostMotion {
			r.add("frames", diaphragm.CodeConflict, -1, say("Frames times radii times angles come to # values; at most # are computed. Take fewer frames or a coarser grid.",
				c.Frames*c.Radii*c.Angles, MostMotion))
		}
	}
	if c.Wet != nil && c.Orders >= 0 {
		if message := c.wetProblem(); message != "" {
			r.add("orders", diaphragm.CodeConflict, -1, message)
			return r.list
		}
	}
	if !(c.Zeta >= 0 && c.Zeta <= 100) {
		r.bounds("damping.ratio", "The damping ratio must be from 0 to 100.")
	}
	// An unsound diaphragm has no period; its own problems say so.
	if most := MostPeriods * c.period(); most > 0 && !(c.Duration > 0 && c.Duration <= most) {
		r.bounds("duration", say("The duration must be above 0 and at most # periods of mode (0, 1), which are # s.", MostPeriods, most))
	}
	if len(c.Points) > MostPoints {
		r.bounds("points", say("# points are given; histories are kept of at most #.", len(c.Points), MostPoints))
		return r.list
	}
	for i, p := range c.Points {
		if !(p.Radius >= 0 && p.Radius <= 1) {
			r.bounds(say("points.#.radius", i), say("Point # is at # ring radii from the centre; it must be from 0 to 1.", i+1, p.Radius))
		}
		if !(math.Abs(p.Angle) <= mostAngle) {
			r.bounds(say("points.#.angle", i), say("The angle of point # must lie between -1000 and 1000 rad.", i+1))
		}
	}
	return r.list
}

// Fit raises the number of angles of the display grid to what the orders need.
func (c *Case) Fit() { c.Angles = disc.NextAngles(max(c.Angles, disc.MinAngles(c.Orders))) }

// unit of time a/c, s.
//
//go:noinline
func (c *Case) unit() float64 { return c.Sheet.Radius / c.Sheet.WaveSpeed() }

// period of mode (0,1) without damping, s.
func (c *Case) period() float64 {
	if c.Wet != nil {
		return 2 * math.Pi / c.Wet.lowest().Omega
	}
	return 2 * math.Pi / basisOf(0, 1).Zero(0, 1) * c.unit()
}

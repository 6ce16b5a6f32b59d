package response

import (
	"math"
	"strconv"

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
	// Display grid: radii j/(Radii-1) and angles 2 pi i/Angles.
	Radii, Angles int
	// Points whose history is kept.
	Points []Point
}

// Bounds of a Case.
const (
	MostOrders  = 60
	MostCircles = 60
	MostFrames  = 2000
	MostRadii   = 257
	MostAngles  = 512
	MostPoints  = 4
	// MostMotion is the largest number of values of all frames together.
	MostMotion = 8 << 20
	// MostPeriods of mode (0,1) in a duration.
	MostPeriods = 10000
)

// Check lists what is wrong with the case, by the names of its fields with a
// small first letter. It does not look at the values of a formula over the
// sheet; Respond does.
func (c *Case) Check() []diaphragm.Problem {
	var problems []diaphragm.Problem
	if c.Displacement.Kind != "" {
		problems = append(problems, c.Displacement.Check("displacement.")...)
	}
	if c.Velocity.Kind != "" {
		problems = append(problems, c.Velocity.Check("velocity.")...)
	}
	add := func(field string, code diaphragm.Code, message string) {
		problems = append(problems, diaphragm.Problem{Field: field, Code: code, Message: message, Offset: -1})
	}
	problems = append(problems, c.checkSources()...)
	if !(c.Smooth >= 0 && c.Smooth <= 0.5) {
		add("smooth", diaphragm.CodeBounds, "The radius of smoothing is "+short(c.Smooth)+" ring radii; it must be from 0 to 0.5.")
	}
	sound := true
	within := func(field, name string, value, least, most int) {
		if value < least || value > most {
			sound = false
			add(field, diaphragm.CodeBounds, name+" is "+strconv.Itoa(value)+"; it must be from "+strconv.Itoa(least)+" to "+strconv.Itoa(most)+".")
		}
	}
	within("orders", "The largest number of nodal diameters", c.Orders, 0, MostOrders)
	within("circles", "The largest number of nodal circles", c.Circles, 1, MostCircles)
	within("frames", "The number of frames", c.Frames, 2, MostFrames)
	within("radii", "The number of radii of the display grid", c.Radii, 2, MostRadii)
	within("angles", "The number of angles of the display grid", c.Angles, 4, MostAngles)
	if sound {
		if c.Angles != disc.NextAngles(c.Angles) || c.Angles < disc.MinAngles(c.Orders) {
			add("angles", diaphragm.CodeBounds, "The number of angles of the display grid is "+strconv.Itoa(c.Angles)+
				"; modes with up to "+strconv.Itoa(c.Orders)+" nodal diameters need an even number of at least "+strconv.Itoa(2*c.Orders+2)+
				", whose half has no prime factor above 5, such as "+strconv.Itoa(disc.NextAngles(max(c.Angles, 2*c.Orders+2)))+".")
		}
		if c.Frames*c.Radii*c.Angles > MostMotion {
			add("frames", diaphragm.CodeConflict, "Frames times radii times angles come to "+strconv.Itoa(c.Frames*c.Radii*c.Angles)+
				" values; at most "+strconv.Itoa(MostMotion)+" are computed. Take fewer frames or a coarser grid.")
		}
	}
	if c.Wet != nil && c.Orders >= 0 {
		if message := c.wetProblem(); message != "" {
			add("orders", diaphragm.CodeConflict, message)
			return problems
		}
	}
	if !(c.Zeta >= 0 && c.Zeta <= 100) {
		add("damping.ratio", diaphragm.CodeBounds, "The damping ratio must be from 0 to 100.")
	}
	// An unsound diaphragm has no period; its own problems say so.
	if most := MostPeriods * c.period(); most > 0 && !(c.Duration > 0 && c.Duration <= most) {
		add("duration", diaphragm.CodeBounds, "The duration must be above 0 and at most "+strconv.Itoa(MostPeriods)+
			" periods of mode (0, 1), which are "+short(most)+" s.")
	}
	if len(c.Points) > MostPoints {
		add("points", diaphragm.CodeBounds, strconv.Itoa(len(c.Points))+" points are given; histories are kept of at most "+strconv.Itoa(MostPoints)+".")
		return problems
	}
	for i, p := range c.Points {
		name := "points." + strconv.Itoa(i)
		if !(p.Radius >= 0 && p.Radius <= 1) {
			add(name+".radius", diaphragm.CodeBounds, "Point "+strconv.Itoa(i+1)+" is at "+short(p.Radius)+" ring radii from the centre; it must be from 0 to 1.")
		}
		if !(math.Abs(p.Angle) <= mostAngle) {
			add(name+".angle", diaphragm.CodeBounds, "The angle of point "+strconv.Itoa(i+1)+" must lie between -1000 and 1000 rad.")
		}
	}
	return problems
}

// Fit raises the number of angles of the display grid to what the orders need.
func (c *Case) Fit() { c.Angles = disc.NextAngles(max(c.Angles, disc.MinAngles(c.Orders))) }

// unit of time a/c, s.
func (c *Case) unit() float64 { return c.Sheet.Radius / c.Sheet.WaveSpeed() }

// period of mode (0,1) without damping, s.
func (c *Case) period() float64 {
	if c.Wet != nil {
		return 2 * math.Pi / c.Wet.lowest().Omega
	}
	return 2 * math.Pi / basisOf(0, 1).Zero(0, 1) * c.unit()
}

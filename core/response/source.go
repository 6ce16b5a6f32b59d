package response

import (
	"math"

	"hoopsheet/core/diaphragm"
)

// SourceKind names what sets a sheet moving.
type SourceKind string

// The kinds of sources.
const (
	// SourceDisplacement is a shape held until its time and then let go. What
	// holds it is a force: the sheet may move beside it.
	SourceDisplacement SourceKind = "displacement"
	// SourceVelocity adds a velocity at its time, whatever that takes.
	SourceVelocity SourceKind = "velocity"
	// SourceImpulse adds momentum per area, N s/m^2.
	SourceImpulse SourceKind = "impulse"
	// SourceBlow adds a momentum, N s, spread over a contact.
	SourceBlow SourceKind = "blow"
	// SourceBody is a body that strikes and rebounds, or stays.
	SourceBody SourceKind = "body"
	// SourcePressure is a pressure, Pa, that follows a pulse.
	SourcePressure SourceKind = "pressure"
	// SourceFront is a pressure behind a straight front that travels over the
	// sheet.
	SourceFront SourceKind = "front"
	// SourceRelease is a static pressure, Pa, or the force, N, of a pad, held
	// until its time.
	SourceRelease SourceKind = "release"
	// SourceShake accelerates the ring along its axis, m/s^2.
	SourceShake SourceKind = "shake"
)

// Source is one thing that sets the sheet moving. What its kind does not name is
// not read.
type Source struct {
	Kind SourceKind `json:"kind"`
	// At is when it happens, or begins, s.
	At float64 `json:"at"`
	// Shape over the sheet: a displacement (Peak in m), velocity (m/s), impulse
	// (N s/m^2) or pressure (Pa); the force of a pad (N) that is released. For a
	// blow or a body the contact, a patch or bump of which Peak is not read.
	Shape Shape `json:"shape"`
	// Momentum of a blow, N s.
	Momentum float64 `json:"momentum,omitempty"`
	// Mass, kg, and Speed, m/s, of a body.
	Mass  float64 `json:"mass,omitempty"`
	Speed float64 `json:"speed,omitempty"`
	// Restitution, 0 to 1, of a body that does not stay.
	Restitution float64 `json:"restitution,omitempty"`
	Stays       bool    `json:"stays,omitempty"`
	// Pulse in time of a pressure, a front or a shake.
	Pulse *Pulse `json:"pulse,omitempty"`
	// FrontSpeed, m/s, and FrontDirection, rad, of a travelling front: where it
	// goes. At is when it reaches the ring.
	FrontSpeed     float64 `json:"frontSpeed,omitempty"`
	FrontDirection float64 `json:"frontDirection,omitempty"`
}

// Bounds of sources.
const (
	MostSources = 20
	mostTime    = 1e5
	leastTime   = 1e-9
	mostForce   = 1e9
)

// Which parts of a source its kind reads.
const (
	usesShape = 1 << iota
	usesPulse
	usesContact
)

// sourceTable has what depends on the kind alone, in the order of SourceKinds.
var sourceTable = [...]struct {
	kind SourceKind
	way  way
	uses int
	note string
}{
	{SourceDisplacement, wayDisplacement, usesShape, ""},
	{SourceVelocity, wayVelocity, usesShape, "The fluid is taken to move along with the sheet."},
	{SourceImpulse, wayImpulse, usesShape, blowNote},
	{SourceBlow, wayImpulse, usesShape | usesContact, blowNote},
	{SourceBody, wayImpulse, usesShape | usesContact, "The body meets the mass of the sheet, and of the fluid with it, that the modes used let move under its contact at once."},
	{SourcePressure, wayPressure, usesShape | usesPulse, ""},
	{SourceFront, wayPressure, usesPulse, ""},
	{SourceRelease, wayRelease, usesShape, ""},
	{SourceShake, wayPressure, usesPulse, "Displacements are seen from the ring. Wall and fluid are carried along with it, so that only the inertia of the sheet is left."},
}

const blowNote = "The blow is over before anything has moved; it sets sheet and fluid moving."

// place of the kind in the table; -1 if there is none.
//
//go:noinline
func (s *Source) place() int {
	for i := range sourceTable {
		if sourceTable[i].kind == s.Kind {
			return i
		}
	}
	return -1
}

func (s *Source) way() way { return sourceTable[s.place()].way }

// SourceKinds lists every kind in the order in which it is offered.
func SourceKinds() []SourceKind {
	list := make([]SourceKind, len(sourceTable))
	for i := range list {
		list[i] = sourceTable[i].kind
	}
	return list
}

// Check lists what is wrong with a source; prefix is put before the names of its
// fields, such as "sources.0.".
func (s *Source) Check(prefix string) []diaphragm.Problem {
	r := refusals{prefix: prefix}
	var names []string
	for i := range sourceTable {
		names = append(names, string(sourceTable[i].kind))
	}
	if !r.choice("kind", "source", string(s.Kind), names) {
		return r.list
	}
	uses := sourceTable[s.place()].uses
	r.within("at", "The time of the source", " s", s.At, 0, mostTime)
	if uses&usesShape != 0 {
		r.list = append(r.list, s.Shape.Check(prefix+"shape.")...)
	}
	if uses&usesContact != 0 && s.Shape.Kind != ShapePatch && s.Shape.Kind != ShapeBump {
		r.add("shape.kind", diaphragm.CodeChoice, -1, "A contact is a patch or a bump.")
	}
	switch s.Kind {
	case SourceBlow:
		r.within("momentum", "The momentum", " N s", s.Momentum, -mostForce, mostForce)
	case SourceBody:
		r.within("mass", "The mass of the body", " kg", s.Mass, 1e-12, 1e6)
		r.within("speed", "The speed of the body", " m/s", s.Speed, -1e4, 1e4)
		if !s.Stays {
			r.within("restitution", "The restitution", "", s.Restitution, 0, 1)
		}
	case SourceFront:
		r.within("frontSpeed", "The speed of the front", " m/s", s.FrontSpeed, 1e-6, 1e6)
		r.within("frontDirection", "The direction of the front", " rad", s.FrontDirection, -mostAngle, mostAngle)
		r.within("shape.peak", "The pressure behind the front", " Pa", s.Shape.Peak, -mostForce, mostForce)
	}
	if uses&usesPulse != 0 {
		p := s.pulse()
		r.list = append(r.list, p.check(prefix+"pulse.")...)
		if s.Kind == SourceFront && p.Kind != PulseStep && p.Kind != PulseRectangle && p.Kind != PulseDecay {
			r.add("pulse.kind", diaphragm.CodeChoice, -1, "Behind a travelling front the pressure stays (step), lasts for a time (rectangle) or decays (decay).")
		}
	}
	return r.list
}

// pulse of the source; a step where none is given.
func (s *Source) pulse() *Pulse {
	if s.Pulse == nil {
		return &Pulse{Kind: PulseStep}
	}
	return s.Pulse
}

// sources lists everything that sets the sheet of a case moving, with the names
// of their fields.
func (c *Case) sources() (list []*given) {
	add := func(s Source, prefix string) {
		list = append(list, &given{Source: s, prefix: prefix, way: s.way(), at: s.At / c.unit()})
	}
	if c.Displacement.Kind != ShapeRest && c.Displacement.Kind != "" {
		add(Source{Kind: SourceDisplacement, Shape: c.Displacement}, "displacement.")
	}
	if c.Velocity.Kind != ShapeRest && c.Velocity.Kind != "" {
		kind := SourceVelocity
		if c.Impulse {
			kind = SourceImpulse
		}
		add(Source{Kind: kind, Shape: c.Velocity}, "velocity.")
	}
	for i, s := range c.Sources {
		add(s, say("sources.#.shape.", i))
	}
	return list
}

// checkSources lists what is wrong with the sources of a case.
func (c *Case) checkSources(r *refusals) {
	if len(c.Sources) > MostSources {
		r.bounds("sources", say("# sources are given; at most # are computed.", len(c.Sources), MostSources))
		return
	}
	for i := range c.Sources {
		r.list = append(r.list, c.Sources[i].Check(say("sources.#.", i))...)
	}
}

// later tells whether anything acts after the start.
func (c *Case) later() bool {
	for i := range c.Sources {
		if s := &c.Sources[i]; s.At > 0 || sourceTable[s.place()].uses&usesPulse != 0 {
			return true
		}
	}
	return false
}

var infinity = math.Inf(1)

package response

import (
	"math"
	"slices"
	"strconv"
	"strings"

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

// SourceKinds lists every kind in the order in which it is offered.
func SourceKinds() []SourceKind {
	return []SourceKind{SourceDisplacement, SourceVelocity, SourceImpulse, SourceBlow, SourceBody, SourcePressure, SourceFront, SourceRelease, SourceShake}
}

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

// uses says which parts of a source its kind reads.
type uses struct{ shape, pulse, contact bool }

var usesOf = map[SourceKind]uses{
	SourceDisplacement: {shape: true}, SourceVelocity: {shape: true}, SourceImpulse: {shape: true},
	SourceBlow: {shape: true, contact: true}, SourceBody: {shape: true, contact: true},
	SourcePressure: {shape: true, pulse: true}, SourceFront: {pulse: true}, SourceRelease: {shape: true}, SourceShake: {pulse: true},
}

// Check lists what is wrong with a source; prefix is put before the names of its
// fields, such as "sources.0.".
func (s *Source) Check(prefix string) []diaphragm.Problem {
	var problems []diaphragm.Problem
	within := func(field, name string, value, least, most float64, unit string) {
		if !(value >= least && value <= most) {
			problems = append(problems, diaphragm.Problem{Field: prefix + field, Code: diaphragm.CodeBounds, Offset: -1,
				Message: name + " is " + short(value) + unit + "; it must be from " + short(least) + " to " + short(most) + unit + "."})
		}
	}
	use, known := usesOf[s.Kind]
	if !known {
		return []diaphragm.Problem{{Field: prefix + "kind", Code: diaphragm.CodeChoice, Offset: -1,
			Message: "There is no source named " + quoted(string(s.Kind)) + "; the sources are " + listed(SourceKinds()) + "."}}
	}
	within("at", "The time of the source", s.At, 0, mostTime, " s")
	if use.shape {
		problems = append(problems, s.Shape.Check(prefix+"shape.")...)
	}
	if use.contact && s.Shape.Kind != ShapePatch && s.Shape.Kind != ShapeBump {
		problems = append(problems, diaphragm.Problem{Field: prefix + "shape.kind", Code: diaphragm.CodeChoice, Offset: -1,
			Message: "A contact is a patch or a bump, not " + quoted(string(s.Shape.Kind)) + "."})
	}
	switch s.Kind {
	case SourceBlow:
		within("momentum", "The momentum", s.Momentum, -mostForce, mostForce, " N s")
	case SourceBody:
		within("mass", "The mass of the body", s.Mass, 1e-12, 1e6, " kg")
		within("speed", "The speed of the body", s.Speed, -1e4, 1e4, " m/s")
		if !s.Stays {
			within("restitution", "The restitution", s.Restitution, 0, 1, "")
		}
	case SourceFront:
		within("frontSpeed", "The speed of the front", s.FrontSpeed, 1e-6, 1e6, " m/s")
		within("frontDirection", "The direction of the front", s.FrontDirection, -mostAngle, mostAngle, " rad")
		within("shape.peak", "The pressure behind the front", s.Shape.Peak, -mostForce, mostForce, " Pa")
	}
	if use.pulse {
		problems = append(problems, s.pulse().check(prefix+"pulse.")...)
		if kind := s.pulse().Kind; s.Kind == SourceFront && kind != PulseStep && kind != PulseRectangle && kind != PulseDecay {
			problems = append(problems, diaphragm.Problem{Field: prefix + "pulse.kind", Code: diaphragm.CodeChoice, Offset: -1,
				Message: "Behind a travelling front the pressure stays (step), lasts for a time (rectangle) or decays (decay)."})
		}
	}
	return problems
}

// pulse of the source; a step where none is given.
func (s *Source) pulse() *Pulse {
	if s.Pulse == nil {
		return &Pulse{Kind: PulseStep}
	}
	return s.Pulse
}

// listed writes the words of a choice.
func listed[T ~string](words []T) string {
	texts := make([]string, len(words))
	for i, w := range words {
		texts[i] = string(w)
	}
	return strings.Join(texts, ", ")
}

// sources lists everything that sets the sheet of a case moving, with the names
// of their fields.
func (c *Case) sources() (list []Source, prefixes []string) {
	add := func(s Source, prefix string) {
		list, prefixes = append(list, s), append(prefixes, prefix)
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
		add(s, "sources."+strconv.Itoa(i)+".shape.")
	}
	return list, prefixes
}

// checkSources lists what is wrong with the sources of a case.
func (c *Case) checkSources() []diaphragm.Problem {
	var problems []diaphragm.Problem
	if len(c.Sources) > MostSources {
		return []diaphragm.Problem{{Field: "sources", Code: diaphragm.CodeBounds, Offset: -1,
			Message: strconv.Itoa(len(c.Sources)) + " sources are given; at most " + strconv.Itoa(MostSources) + " are computed."}}
	}
	for i := range c.Sources {
		problems = append(problems, c.Sources[i].Check("sources."+strconv.Itoa(i)+".")...)
	}
	return problems
}

// later tells whether anything acts after the start.
func (c *Case) later() bool {
	return slices.ContainsFunc(c.Sources, func(s Source) bool {
		return s.At > 0 || usesOf[s.Kind].pulse
	})
}

var infinity = math.Inf(1)

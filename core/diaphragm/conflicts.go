package diaphragm

import (
	"errors"
	"math"
	"strconv"

	"hoopsheet/core/air"
	"hoopsheet/core/quantity"
)

// conflict is a disagreement between fields; it is shown at the first one, or
// at the one that was edited last.
type conflict struct {
	fields  []string
	code    Code
	message string
}

func (c conflict) problem(field string) Problem {
	return Problem{Field: field, Code: c.code, Message: c.message, Offset: -1}
}

func (c conflict) concerns(path string) bool { return contains(c.fields, path) }

// clash is what conflicts are looked for in.
type clash struct {
	doc    Diaphragm
	units  map[string]string
	system quantity.System
	found  []conflict
}

func (c *clash) add(code Code, message string, fields ...string) {
	c.found = append(c.found, conflict{fields, code, message})
}

// say writes a value in the unit in which a field is shown.
func (c *clash) say(path string, value float64) string {
	f, _ := FieldByPath(path)
	unit := f.unit(c.units, c.system)
	return withUnit(show(value, unit), unit)
}

// conflicts lists where fields that are sound by themselves do not go
// together.
func conflicts(doc Diaphragm, units map[string]string, system quantity.System) []conflict {
	c := clash{doc: doc, units: units, system: system}
	c.ring()
	c.evenness()
	c.attached()
	c.faces()
	c.service()
	c.fluids()
	return c.found
}

// mostOutOfRound is the largest half difference of the semi-axes over the ring
// radius: what is worked out for small deviations holds no farther.
const mostOutOfRound = 0.1

func (c *clash) ring() {
	r := c.doc.Ring
	if r.OutOfRound > 0 && r.OutOfRound > mostOutOfRound*r.Radius {
		c.add(CodeConflict, "The ring is out of round by "+c.say("ring.outOfRound", r.OutOfRound)+", more than a tenth of its radius, "+
			c.say("ring.radius", r.Radius)+"; that is an oval, and at most a tenth is computed.", "ring.outOfRound", "ring.radius")
	}
	if r.HubRadius > 0 && r.HubRadius >= r.Radius-r.OutOfRound {
		c.add(CodeConflict, "The hub radius, "+c.say("ring.hubRadius", r.HubRadius)+", reaches the ring radius, "+
			c.say("ring.radius", r.Radius)+"; it must be smaller, or no sheet is left.", "ring.hubRadius", "ring.radius", "ring.outOfRound")
	}
}

func (c *clash) evenness() {
	const path = "tension.harmonics"
	harmonics := c.doc.Tension.Harmonics[:min(len(c.doc.Tension.Harmonics), MostHarmonics)]
	var sum float64
	var amplitudes []string
	for i, h := range harmonics {
		sum += h.Epsilon
		amplitudes = append(amplitudes, entryPath(path, i, "epsilon"))
		order := entryPath(path, i, "order")
		if h.Order == 1 && !c.doc.Tension.Bonded {
			c.add(CodeConflict, "Harmonic "+strconv.Itoa(i+1)+" has order 1, a pull to one side, which only a bonded rim can hold; "+
				"give it an order of 2 or more, or say that the rim is bonded.", order, "tension.bonded")
		}
		for j := range i {
			if harmonics[j].Order == h.Order {
				c.add(CodeConflict, "Harmonics "+strconv.Itoa(j+1)+" and "+strconv.Itoa(i+1)+" both have order "+strconv.Itoa(h.Order)+
					"; give one of them another order, or make them one.", order, entryPath(path, j, "order"))
			}
		}
	}
	if sum >= 1 {
		c.add(CodeConflict, "The amplitudes of the harmonics come to "+quantity.Format(sum, "%", digitsShown)+
			" %; together they must stay below 100 %, or the rim could be slack somewhere.", amplitudes...)
	}
}

// snug is the relative slack for what just fits: a place, a size and the ring
// radius are each rounded to 53 bits, and people type round figures that meet
// exactly.
const snug = 1e-12

func (c *clash) attached() {
	a := c.doc.Ring.Radius
	for i, p := range c.doc.Attached.Patches[:min(len(c.doc.Attached.Patches), MostPatches)] {
		size := entryPath("attached.patches", i, "size")
		if p.Radius*a+p.Size > a*(1+snug) {
			c.add(CodeConflict, "Patch "+strconv.Itoa(i+1)+" reaches beyond the ring: its middle lies "+c.say("ring.radius", p.Radius*a)+
				" from the centre and its own radius is "+c.say(size, p.Size)+", together more than the ring radius, "+c.say("ring.radius", a)+
				"; move it inwards or make it smaller.", size, entryPath("attached.patches", i, "radius"), "ring.radius")
		}
	}
	for i, s := range c.doc.Attached.Strips[:min(len(c.doc.Attached.Strips), MostStrips)] {
		width := entryPath("attached.strips", i, "width")
		if s.Offset*a+s.Width/2 > a*(1+snug) {
			c.add(CodeConflict, "Strip "+strconv.Itoa(i+1)+" reaches beyond the ring: its middle line lies "+c.say("ring.radius", s.Offset*a)+
				" from the centre and its width is "+c.say(width, s.Width)+", but the ring radius is "+c.say("ring.radius", a)+
				"; move it inwards or make it narrower.", width, entryPath("attached.strips", i, "offset"), "ring.radius")
		}
	}
}

func (c *clash) faces() {
	upper, lower := c.doc.Faces.Upper, c.doc.Faces.Lower
	switch {
	case (upper.Kind == FaceOpen) != (lower.Kind == FaceOpen):
		c.add(CodeConflict, "The upper face is "+string(upper.Kind)+" and the lower face is "+string(lower.Kind)+
			"; open holds for both faces or for neither, because the air passes around the rim.", "faces.upper.kind", "faces.lower.kind")
	case upper.Kind == FaceOpen && upper.Fluid.OrAir() != lower.Fluid.OrAir():
		c.add(CodeConflict, "The upper face has "+string(upper.Fluid.OrAir())+" and the lower face has "+string(lower.Fluid.OrAir())+
			"; open faces need the same fluid, because it passes around the rim.",
			"faces.upper.fluid", "faces.lower.fluid", "faces.upper.kind", "faces.lower.kind")
	}
	for _, side := range []struct {
		name string
		face Face
	}{{"upper", upper}, {"lower", lower}} {
		path := "faces." + side.name
		if side.face.Kind != FaceCavity {
			continue
		}
		if side.face.Depth == 0 {
			c.add(CodeEmpty, "The "+side.name+" face is a cavity, whose depth is needed; type the depth of the "+side.name+" cavity.",
				path+".depth", path+".kind")
		}
		if sheet := math.Pi * c.doc.Ring.Radius * c.doc.Ring.Radius; side.face.VentArea >= sheet && sheet > 0 {
			c.add(CodeConflict, "The vent of the "+side.name+" cavity, "+c.say(path+".ventArea", side.face.VentArea)+
				", is as large as the whole sheet, "+c.say(path+".ventArea", sheet)+"; it must be smaller, or there is no cavity.",
				path+".ventArea", path+".kind", "ring.radius")
		}
	}
}

func (c *clash) service() {
	s := c.doc.Surroundings
	if s.ServiceMin > s.ServiceMax {
		c.add(CodeConflict, "The lowest temperature in service, "+c.say("surroundings.serviceMin", s.ServiceMin)+", lies above the highest, "+
			c.say("surroundings.serviceMin", s.ServiceMax)+"; the lowest must not be above the highest.",
			"surroundings.serviceMin", "surroundings.serviceMax")
	}
}

// fluids finds a state that a fluid cannot have, though each of its fields
// could: air with so much water that it is steam, water that freezes or boils.
func (c *clash) fluids() {
	s := c.doc.Surroundings
	for _, f := range surroundingsFields()[:3] {
		if f.check(&c.doc, quantity.Unit{}) != nil {
			return // said at that field
		}
	}
	upper, lower := c.doc.Faces.Upper, c.doc.Faces.Lower
	for _, name := range air.FluidNames() {
		fields := []string{"surroundings.temperature", "surroundings.pressure"}
		if name == air.FluidAir {
			fields = []string{"surroundings.humidity", "surroundings.temperature", "surroundings.pressure"}
		}
		used := false
		if upper.Kind != FaceVacuum && upper.Fluid.OrAir() == name {
			used, fields = true, append(fields, "faces.upper.fluid", "faces.upper.kind")
		}
		if lower.Kind != FaceVacuum && lower.Fluid.OrAir() == name {
			used, fields = true, append(fields, "faces.lower.fluid", "faces.lower.kind")
		}
		if !used {
			continue
		}
		_, err := air.Fluid(name, s.Temperature, s.Pressure, s.Humidity)
		var domain *air.DomainError
		if errors.As(err, &domain) {
			c.add(CodeConflict, domain.Message, fields...)
		}
	}
}

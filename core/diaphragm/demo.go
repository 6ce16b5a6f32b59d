package diaphragm

import (
	"bytes"
	"encoding/json"
	"slices"

	"hoopsheet/core/air"
	"hoopsheet/core/sheet"
)

// Demo is the demonstration document. Place and figures are invented.
func Demo(id, created string) Diaphragm {
	doc := Blank(id, created)
	doc.Name = "Film port B, listening room"
	doc.Place = "Test house, wall between listening room and source room"
	doc.Notes = "Invented for demonstration: there is no such port, and its figures prove nothing about a real one."
	doc.Invented = true
	doc.Ring = Ring{Radius: 0.45, Clamps: 16, CTE: 23e-6}
	doc.Sheet.Thickness, doc.Sheet.LossFactor = 50e-6, 0.015
	doc.Tension = Tension{Nominal: 310, Tolerance: 0.08}
	doc.Faces = Faces{Upper: Face{Kind: FaceBaffled}, Lower: Face{Kind: FaceBaffled}}
	doc.Surroundings.ServiceMin, doc.Surroundings.ServiceMax = 278.15, 308.15
	doc.Avoid = Avoid{
		Lowest: 12,
		Lines: []Line{
			{Name: "mains hum", Frequency: 50, HalfWidth: 0.03},
			{Name: "mains hum, doubled", Frequency: 100, HalfWidth: 0.03},
			{Name: "blades of the supply fan", Frequency: 171, HalfWidth: 0.05},
		},
	}
	doc.Damping.Ratio = 0.004
	return doc
}

// Blank is a sound document to start from: a small ring with polyester film
// from the catalogue, in ordinary air. All of it is to be replaced.
func Blank(id, created string) Diaphragm {
	doc := Diaphragm{
		Schema:  Schema,
		ID:      id,
		Name:    "New diaphragm",
		Created: created,
		Ring:    Ring{Radius: 0.3, CTE: 23e-6},
		Sheet:   Sheet{Thickness: 23e-6},
		Tension: Tension{Nominal: 200, Tolerance: 0.1},
		Faces:   Faces{Upper: Face{Kind: FaceBaffled}, Lower: Face{Kind: FaceBaffled}},
		Surroundings: Surroundings{
			Temperature: 293.15, Pressure: 101325, Humidity: 0.5,
			ServiceMin: 283.15, ServiceMax: 303.15,
		},
		Avoid:   Avoid{Lines: []Line{}},
		Damping: Damping{Ratio: 0.005},
	}
	if material, ok := sheet.MaterialByID("polyester-film"); ok {
		adopt(&doc.Sheet, material)
	}
	return doc
}

// adopt takes a material's name and properties; thickness and measured areal
// density stay.
func adopt(s *Sheet, m sheet.Material) {
	s.Material, s.Density, s.E, s.Nu, s.CTE, s.AllowableStress = m.Name, m.Density, m.E, m.Nu, m.CTE, m.AllowableStress
}

// SameContent is true when two documents differ at most in their revision
// number: whether a working copy still is what was kept.
func SameContent(a, b Diaphragm) bool {
	return bytes.Equal(content(a), content(b))
}

func content(doc Diaphragm) []byte {
	doc = cloned(doc)
	doc.Revision = 0
	text, err := json.Marshal(doc)
	if err != nil {
		return nil // a figure that is no number, which no document holds that was read
	}
	return text
}

// normal brings what can be written in two ways to one: the list of lines is
// never nil, other empty lists are, and what is meant by "" is not spelt out.
func normal(doc Diaphragm) Diaphragm {
	if doc.Avoid.Lines == nil {
		doc.Avoid.Lines = []Line{}
	}
	if len(doc.Tension.Harmonics) == 0 {
		doc.Tension.Harmonics = nil
	}
	if len(doc.Attached.Patches) == 0 {
		doc.Attached.Patches = nil
	}
	if len(doc.Attached.Strips) == 0 {
		doc.Attached.Strips = nil
	}
	if doc.Tension.Rim == RimClamped {
		doc.Tension.Rim = ""
	}
	for _, face := range []*Face{&doc.Faces.Upper, &doc.Faces.Lower} {
		if face.Fluid == air.FluidAir {
			face.Fluid = ""
		}
	}
	return doc
}

// cloned is the normal form of a document that shares nothing with it.
func cloned(doc Diaphragm) Diaphragm {
	doc.Avoid.Lines = slices.Clone(doc.Avoid.Lines)
	doc.Tension.Harmonics = slices.Clone(doc.Tension.Harmonics)
	doc.Attached.Patches = slices.Clone(doc.Attached.Patches)
	doc.Attached.Strips = slices.Clone(doc.Attached.Strips)
	return normal(doc)
}

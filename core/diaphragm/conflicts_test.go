package diaphragm

import (
	"strings"
	"testing"

	"hoopsheet/core/air"
	"hoopsheet/core/quantity"
)

// One document on each side of every limit that several fields share.
func TestConflictsOnBothSides(t *testing.T) {
	patch := func(radius, size float64) func(*Diaphragm) {
		return func(d *Diaphragm) { d.Attached.Patches = []Patch{{Name: "x", Radius: radius, Size: size, Mass: 1e-3}} }
	}
	strip := func(offset, width float64) func(*Diaphragm) {
		return func(d *Diaphragm) { d.Attached.Strips = []Strip{{Name: "x", Offset: offset, Width: width, Mass: 1e-3}} }
	}
	harmonics := func(list ...Harmonic) func(*Diaphragm) {
		return func(d *Diaphragm) { d.Tension.Harmonics = list }
	}
	open := func(upper, lower air.FluidName) func(*Diaphragm) {
		return func(d *Diaphragm) {
			d.Faces = Faces{Face{Kind: FaceOpen, Fluid: upper}, Face{Kind: FaceOpen, Fluid: lower}}
		}
	}
	water := func(celsius float64, kind FaceKind) func(*Diaphragm) {
		return func(d *Diaphragm) {
			d.Faces.Upper = Face{Kind: kind, Fluid: air.FluidWater}
			d.Surroundings.Temperature = celsius + 273.15
		}
	}
	vent := func(area float64) func(*Diaphragm) {
		return func(d *Diaphragm) { d.Faces.Lower = Face{Kind: FaceCavity, Depth: 0.2, VentArea: area} }
	}
	// The ring of the demonstration has a radius of 450 mm.
	for _, c := range []struct {
		name   string
		change func(*Diaphragm)
		field  string // of the problem; empty where the document is sound
		words  string
	}{
		{"hub", func(d *Diaphragm) { d.Ring.HubRadius = 0.4499 }, "", ""},
		{"hub as large as the ring", func(d *Diaphragm) { d.Ring.HubRadius = 0.45 }, "ring.hubRadius", "The hub radius, 450 mm, reaches the ring radius, 450 mm; it must be smaller"},
		{"hub that meets the oval", func(d *Diaphragm) { d.Ring.HubRadius, d.Ring.OutOfRound = 0.4199, 0.03 }, "", ""},
		{"hub across the oval", func(d *Diaphragm) { d.Ring.HubRadius, d.Ring.OutOfRound = 0.4201, 0.03 }, "ring.hubRadius", "reaches the ring"},
		{"out of round", func(d *Diaphragm) { d.Ring.OutOfRound = 0.045 }, "", ""},
		{"oval", func(d *Diaphragm) { d.Ring.OutOfRound = 0.0451 }, "ring.outOfRound", "out of round by 45.1 mm, more than a tenth of its radius, 450 mm"},
		{"hub with patches, strips and harmonics", func(d *Diaphragm) {
			d.Ring.HubRadius = 0.1
			patch(0.5, 0.01)(d)
			strip(0.5, 0.01)(d)
			harmonics(Harmonic{2, 0.1, 0})(d)
		}, "", ""},
		{"two orders", harmonics(Harmonic{2, 0.1, 0}, Harmonic{3, 0.1, 0}), "", ""},
		{"the same order twice", harmonics(Harmonic{2, 0.1, 0}, Harmonic{3, 0.1, 0}, Harmonic{2, 0.1, 1}), "tension.harmonics.2.order",
			"Harmonics 1 and 3 both have order 2; give one of them another order"},
		{"amplitudes below 100 %", harmonics(Harmonic{2, 0.6, 0}, Harmonic{3, 0.39, 0}), "", ""},
		{"amplitudes of 100 %", harmonics(Harmonic{2, 0.6, 0}, Harmonic{3, 0.4, 0}), "tension.harmonics.0.epsilon", "come to 100 %; together they must stay below 100 %"},
		{"order 1, sliding", harmonics(Harmonic{1, 0.1, 0}), "tension.harmonics.0.order", "which only a bonded rim can hold"},
		{"order 1, bonded", func(d *Diaphragm) { d.Tension.Bonded = true; harmonics(Harmonic{1, 0.1, 0})(d) }, "", ""},
		{"order 0", harmonics(Harmonic{0, 0.1, 0}), "tension.harmonics.0.order", "it must lie from 1 to 24"},
		{"patch at the rim", patch(0.9, 0.045), "", ""},
		{"patch over the rim", patch(0.9, 0.0451), "attached.patches.0.size",
			"Patch 1 reaches beyond the ring: its middle lies 405 mm from the centre and its own radius is 45.1 mm, together more than the ring radius, 450 mm"},
		{"strip at the rim", strip(0.9, 0.09), "", ""},
		{"strip over the rim", strip(0.9, 0.0901), "attached.strips.0.width", "its middle line lies 405 mm from the centre and its width is 90.1 mm, but the ring radius is 450 mm"},
		{"strip over all", strip(0, 0.9), "", ""},
		{"open in helium", open(air.FluidHelium, air.FluidHelium), "", ""},
		{"open in air, once spelt out", open("", air.FluidAir), "", ""},
		{"open in two fluids", open(air.FluidHelium, ""), "faces.upper.fluid", "The upper face has helium and the lower face has air; open faces need the same fluid"},
		{"two fluids, baffled", func(d *Diaphragm) { d.Faces.Upper.Fluid = air.FluidSF6 }, "", ""},
		{"water on both sides", func(d *Diaphragm) { d.Faces.Upper.Fluid, d.Faces.Lower.Fluid = air.FluidWater, air.FluidWater }, "", ""},
		{"water", water(0, FaceBaffled), "", ""},
		{"ice", water(-1, FaceBaffled), "surroundings.temperature", "The temperature is -1 °C; water is computed from 0 °C to 95 °C."},
		{"water that is not there", water(-1, FaceVacuum), "", ""},
		{"unknown fluid", func(d *Diaphragm) { d.Faces.Upper.Fluid = "gravy" }, "faces.upper.fluid", "choose air, nitrogen, helium, sulfur-hexafluoride or water"},
		{"unknown rim", func(d *Diaphragm) { d.Tension.Rim = "nailed" }, "tension.rim", "choose clamped or supported"},
		// pi 0.45^2 = 0.636 m^2.
		{"vent", vent(0.63), "", ""},
		{"vent as large as the sheet", vent(0.64), "faces.lower.ventArea", "The vent of the lower cavity, 6400 cm², is as large as the whole sheet"},
		{"vent of no cavity", func(d *Diaphragm) { d.Faces.Lower.VentArea = 0.64 }, "", ""},
		{"eight patches", func(d *Diaphragm) { d.Attached.Patches = patches(8) }, "", ""},
		{"nine patches", func(d *Diaphragm) { d.Attached.Patches = patches(9) }, "attached.patches", "There are 9 patches; at most 8 are allowed."},
	} {
		doc := Demo(testID, testCreated)
		c.change(&doc)
		problems := Validate(doc)
		if c.field == "" {
			if len(problems) > 0 {
				t.Errorf("%s: %v", c.name, problems)
			}
			continue
		}
		if len(problems) != 1 || problems[0].Field != c.field || !strings.Contains(problems[0].Message, c.words) || !strings.HasSuffix(problems[0].Message, ".") {
			t.Errorf("%s: %+v, want %s with %q", c.name, problems, c.field, c.words)
		}
	}
}

func patches(count int) []Patch {
	list := make([]Patch, count)
	for i := range list {
		list[i] = Patch{Name: "x", Radius: 0.5, Size: 0.01, Mass: 0.001}
	}
	return list
}

// A conflict is shown where the edit was made, and goes when its other end
// changes.
func TestConflictsWaitAsDrafts(t *testing.T) {
	s := demoState().apply(Edit{"attached.patches", ActionAdd, "2 g"}, set("attached.patches.0.radius", "0.9"), set("attached.patches.0.size", "60"))
	if p, told := problemAt(s.problems, "attached.patches.0.size"); !told || p.Code != CodeConflict || len(s.problems) != 1 || s.doc.Attached.Patches[0].Size != 0.0225 {
		t.Fatalf("%v %+v", s.problems, s.doc.Attached)
	}
	s = s.apply(set("attached.patches.0.radius", "0.5"))
	if len(s.problems)+len(s.drafts) > 0 || s.doc.Attached.Patches[0] != (Patch{Name: "patch 1", Radius: 0.5, Size: 0.06, Mass: 0.002}) {
		t.Errorf("%v %v %+v", s.problems, s.drafts, s.doc.Attached)
	}
	s = s.apply(set("ring.radius", "100"))
	if p, told := problemAt(s.problems, "ring.radius"); !told || p.Code != CodeConflict || s.doc.Ring.Radius != 0.45 {
		t.Errorf("%v", s.problems)
	}

	s = demoState().apply(Edit{"tension.harmonics", ActionAdd, "1"})
	if _, told := problemAt(s.problems, "tension.harmonics.0.order"); !told || s.doc.Tension.Harmonics[0].Order != 2 {
		t.Errorf("%v %+v", s.problems, s.doc.Tension)
	}
	s = s.apply(set("tension.bonded", "bonded"))
	if len(s.problems) > 0 || s.doc.Tension.Harmonics[0].Order != 1 || !s.doc.Tension.Bonded {
		t.Errorf("%v %+v", s.problems, s.doc.Tension)
	}
}

// Open faces take their fluid from the one that was edited.
func TestOpenFacesShareTheirFluid(t *testing.T) {
	s := demoState().apply(set("faces.lower.fluid", "helium"), set("faces.lower.kind", "open"))
	if want := (Face{Kind: FaceOpen, Fluid: air.FluidHelium}); s.doc.Faces.Upper != want || s.doc.Faces.Lower != want || len(s.problems) > 0 {
		t.Errorf("%+v %v", s.doc.Faces, s.problems)
	}
	s = s.apply(set("faces.upper.fluid", "air, as below"))
	if want := (Face{Kind: FaceOpen}); s.doc.Faces.Upper != want || s.doc.Faces.Lower != want || len(s.problems) > 0 {
		t.Errorf("%+v %v", s.doc.Faces, s.problems)
	}
}

func TestFieldsAreShownWhereTheyApply(t *testing.T) {
	shown := func(edits ...Edit) map[string]Row {
		s := demoState().apply(edits...)
		rows := map[string]Row{}
		for _, r := range Rows(s.doc, s.drafts, s.units, quantity.SI) {
			rows[r.Field] = r
		}
		return rows
	}
	for _, c := range []struct {
		edits      []Edit
		there, not string
	}{
		{nil, "ring.outOfRound", "ring.outOfRoundAngle"},
		{[]Edit{set("ring.outOfRound", "0.5")}, "ring.outOfRoundAngle", ""},
		{nil, "tension.weftRatio", "tension.warpAngle"},
		{[]Edit{set("tension.weftRatio", "0.8")}, "tension.warpAngle", ""},
		{nil, "faces.upper.fluid", "faces.upper.depth"},
		{nil, "faces.upper.wall", "faces.upper.ventArea"},
		{[]Edit{set("faces.upper.kind", "vacuum")}, "faces.lower.fluid", "faces.upper.fluid"},
		{[]Edit{set("faces.upper.kind", "open")}, "faces.lower.fluid", "faces.upper.wall"},
		{[]Edit{set("faces.upper.kind", "cavity")}, "faces.upper.depth", "faces.upper.ventLength"},
		{[]Edit{set("faces.upper.kind", "cavity"), set("faces.upper.depth", "90"), set("faces.upper.ventArea", "2")}, "faces.upper.ventLength", "faces.upper.wall"},
	} {
		rows := shown(c.edits...)
		_, there := rows[c.there]
		_, not := rows[c.not]
		if !there || not {
			t.Errorf("%v: %s is shown %v, %s %v", c.edits, c.there, there, c.not, not)
		}
	}
	rows := shown(set("faces.upper.kind", "cavity"), Edit{"attached.patches", ActionAdd, ""})
	if rows["faces.upper.depth"].Optional || !rows["faces.upper.ventArea"].Optional || !rows["ring.hubRadius"].Optional {
		t.Error("the depth of a cavity is needed, vent and hub are not")
	}
	// What the document need not spell out is shown in words all the same.
	for field, want := range map[string]string{
		"tension.rim": "clamped", "tension.bonded": "sliding", "faces.lower.fluid": "air", "attached.patches.0.rigid": "limp", "attached.patches.0.radius": "0",
	} {
		if r := rows[field]; r.Text != want || len(r.Choices) == 0 && r.Kind == KindChoice {
			t.Errorf("%s: %+v", field, r)
		}
	}
}

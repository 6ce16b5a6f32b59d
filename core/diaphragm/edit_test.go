package diaphragm

import (
	"math"
	"reflect"
	"strings"
	"testing"

	"hoopsheet/core/quantity"
)

func set(field, text string) Edit { return Edit{field, ActionSet, text} }

// state is what edits work on.
type state struct {
	doc      Diaphragm
	drafts   map[string]string
	units    map[string]string
	problems []Problem
}

func (s state) apply(edits ...Edit) state {
	s.doc, s.drafts, s.units, s.problems = Apply(s.doc, s.drafts, s.units, edits, quantity.SI)
	return s
}

func (s state) row(t *testing.T, field string, edits ...Edit) Row {
	t.Helper()
	for _, r := range Rows(s.doc, s.drafts, s.units, quantity.SI, edits...) {
		if r.Field == field {
			return r
		}
	}
	t.Fatalf("no row %s", field)
	return Row{}
}

func demoState() state { return state{doc: Demo(testID, testCreated)} }

func TestSetReadsUnits(t *testing.T) {
	s := demoState().apply(set("sheet.thickness", "0.9 mil"))
	// 0.9 mil = 22.86 µm by the inch of 1959; ToSI rounds twice.
	if got := s.doc.Sheet.Thickness; math.Abs(got-22.86e-6) > 1.5*0x1p-52*22.86e-6 {
		t.Errorf("%.17g m", got)
	}
	if s.units["sheet.thickness"] != "mil" || len(s.drafts) > 0 || len(s.problems) > 0 {
		t.Errorf("%v %v %v", s.units, s.drafts, s.problems)
	}
	if r := s.row(t, "sheet.thickness"); r.Text != "0.9" || r.Unit != "mil" {
		t.Errorf("%q %q", r.Text, r.Unit)
	}
	// A bare number is in the unit shown.
	s = s.apply(set("sheet.thickness", "2"))
	if got := s.doc.Sheet.Thickness; math.Abs(got-50.8e-6) > 1.5*0x1p-52*50.8e-6 {
		t.Errorf("%.17g m", got)
	}
}

func TestSetOfEachKind(t *testing.T) {
	s := demoState().apply(
		set("name", "  Port C "), set("notes", "one\r\ntwo"), set("ring.clamps", "24"), set("sheet.nu", "0,4"),
		set("faces.lower.kind", "vacuum"), set("sheet.material", "kite cloth"), set("avoid.lines.1.frequency", "6000 rpm"),
		set("sheet.measuredArealDensity", "2 oz/yd²"))
	if len(s.problems) > 0 {
		t.Fatal(s.problems)
	}
	d := s.doc
	if d.Name != "Port C" || d.Notes != "one\ntwo" || d.Ring.Clamps != 24 || d.Sheet.Nu != 0.4 || d.Faces.Lower.Kind != FaceVacuum ||
		d.Sheet.Material != "kite cloth" || d.Avoid.Lines[1].Frequency != 100 {
		t.Errorf("%+v", d)
	}
	// NIST SP 811: 1 oz/yd^2 = 3.390575E-02 kg/m^2 (seven digits; from memory).
	if math.Abs(d.Sheet.MeasuredArealDensity-0.0678115) > 1e-8 {
		t.Errorf("%g kg/m^2", d.Sheet.MeasuredArealDensity)
	}
	s = s.apply(set("ring.clamps", ""), set("sheet.measuredArealDensity", " "), set("place", ""))
	if len(s.problems) > 0 || s.doc.Ring.Clamps != 0 || s.doc.Sheet.MeasuredArealDensity != 0 || s.doc.Place != "" {
		t.Errorf("%v %+v", s.problems, s.doc)
	}
	if r := s.row(t, "sheet.measuredArealDensity"); r.Text != "" || !r.Optional || r.Unit != "oz/yd²" {
		t.Errorf("%+v", r)
	}
	s = s.apply(set("faces.upper.kind", "vacuum"), set("faces.lower.kind", "baffled: set in a wall"))
	if s.doc.Faces.Lower.Kind != FaceBaffled {
		t.Errorf("%+v", s.doc.Faces)
	}
}

// Bad text of every kind is kept to the letter, with its sentence at the
// field, while the document keeps the last sound value; a later sound text
// takes its place.
func TestBadTextLosesNothing(t *testing.T) {
	bad := map[FieldKind][]string{
		KindQuantity: {"abc", "1,500", "5 parsec", "-1e9", "1e99", "1 2 3", "\x00", strings.Repeat("9", 5000)},
		KindCount:    {"many", "16.5", "1,500", "-3", "1e12", "5 m"},
		KindChoice:   {"", "sideways", "BAFFLED"},
		KindText:     {"\u202eeman", "a\nb", strings.Repeat("x", 5000)},
		KindLongText: {"\x07", strings.Repeat("x", 5000)},
		KindMaterial: {"a\x00", strings.Repeat("x", 5000)},
	}
	for _, f := range FieldsOf(richDocument()) {
		texts := bad[f.Kind]
		if f.Kind == KindCount && f.Low > 2 {
			texts = append(texts, "2")
		}
		if !f.Optional && f.Kind != KindChoice {
			texts = append(texts, "", "  ")
		}
		for _, text := range texts {
			before := state{doc: richDocument()}
			before.doc.Faces.Upper = Face{Kind: FaceCavity, Depth: 0.1, VentArea: 1e-4}
			if strings.HasSuffix(f.Path, ".wall") {
				before.doc.Faces.Upper, before.doc.Faces.Lower = Face{Kind: FaceBaffled, Wall: 1}, Face{Kind: FaceBaffled, Wall: 1}
			}
			after := before.apply(set(f.Path, text))
			if !SameContent(before.doc, after.doc) {
				t.Errorf("%s: %.30q changed the document", f.Path, text)
			}
			if draft, kept := after.drafts[f.Path]; !kept || draft != text {
				t.Errorf("%s: %.30q is kept as %.30q", f.Path, text, draft)
			}
			p, told := problemAt(after.problems, f.Path)
			if !told || len(after.problems) != 1 || !strings.HasSuffix(p.Message, ".") {
				t.Errorf("%s: %.30q gives %v", f.Path, text, after.problems)
			}
			if r := after.row(t, f.Path); r.Text != text || r.Problem != p.Message {
				t.Errorf("%s: the row shows %.30q with %q, want %q", f.Path, r.Text, r.Problem, p.Message)
			}
			// An edit of another field leaves the draft alone.
			other := after.apply(set("avoid.lines.2.name", "fan"), set("place", "attic"))
			if f.Path != "place" && f.Path != "avoid.lines.2.name" && other.drafts[f.Path] != text {
				t.Errorf("%s: an edit elsewhere lost the draft", f.Path)
			}
			// What was shown before is sound.
			unit := f.unit(before.units, quantity.SI)
			healed := after.apply(set(f.Path, f.write(&before.doc, unit)))
			if len(healed.drafts) > 0 || len(healed.problems) > 0 || !SameContent(before.doc, healed.doc) {
				t.Errorf("%s: sound text leaves %v %v", f.Path, healed.drafts, healed.problems)
			}
		}
	}
}

func TestOpenIsSetOnBothFaces(t *testing.T) {
	s := demoState().apply(set("faces.upper.kind", "open"))
	if s.doc.Faces.Upper.Kind != FaceOpen || s.doc.Faces.Lower.Kind != FaceOpen || len(s.problems) > 0 {
		t.Errorf("%+v %v", s.doc.Faces, s.problems)
	}
	s = s.apply(set("faces.lower.kind", "vacuum"))
	if s.doc.Faces.Upper.Kind != FaceBaffled || s.doc.Faces.Lower.Kind != FaceVacuum || len(s.problems) > 0 {
		t.Errorf("%+v %v", s.doc.Faces, s.problems)
	}
}

// A cavity waits for its depth; an order of temperatures waits for the other
// one. Both are taken over when they can be.
func TestDraftsWaitForOtherFields(t *testing.T) {
	s := demoState().apply(set("faces.lower.kind", "cavity"))
	if s.doc.Faces.Lower.Kind != FaceBaffled || s.drafts["faces.lower.kind"] != "cavity" {
		t.Errorf("%+v %v", s.doc.Faces, s.drafts)
	}
	p, _ := problemAt(s.problems, "faces.lower.kind")
	if p.Message != "The lower face is a cavity, whose depth is needed; type the depth of the lower cavity." {
		t.Errorf("%v", s.problems)
	}
	if r := s.row(t, "faces.lower.depth"); r.Text != "" || r.Optional {
		t.Errorf("%+v", r)
	}
	s = s.apply(set("faces.lower.depth", "120"))
	if s.doc.Faces.Lower != (Face{Kind: FaceCavity, Depth: 0.12}) || len(s.drafts) > 0 || len(s.problems) > 0 {
		t.Errorf("%+v %v %v", s.doc.Faces, s.drafts, s.problems)
	}
	// The depth of a cavity cannot be emptied.
	s = s.apply(set("faces.lower.depth", ""))
	if p, told := problemAt(s.problems, "faces.lower.depth"); !told || p.Code != CodeEmpty || s.doc.Faces.Lower.Depth != 0.12 {
		t.Errorf("%+v %v", s.doc.Faces, s.problems)
	}

	s = demoState().apply(set("surroundings.serviceMin", "40"))
	if p, told := problemAt(s.problems, "surroundings.serviceMin"); !told || p.Code != CodeConflict || s.doc.Surroundings.ServiceMin != 278.15 {
		t.Errorf("%+v %v", s.doc.Surroundings, s.problems)
	}
	s = s.apply(set("surroundings.serviceMax", "60"))
	if s.doc.Surroundings.ServiceMin != 313.15 || s.doc.Surroundings.ServiceMax != 333.15 || len(s.drafts)+len(s.problems) > 0 {
		t.Errorf("%+v %v", s.doc.Surroundings, s.problems)
	}
	// The conflict is shown at the field that was edited.
	s = s.apply(set("surroundings.serviceMax", "-10"))
	if _, told := problemAt(s.problems, "surroundings.serviceMax"); !told || s.doc.Surroundings.ServiceMax != 333.15 {
		t.Errorf("%v", s.problems)
	}
}

func TestAdoptEndsDraftsOfItsProperties(t *testing.T) {
	s := demoState().apply(set("sheet.e", "stiff"), set("sheet.thickness", "thin"), Edit{"sheet.material", ActionAdopt, "aluminium-foil"})
	if _, there := s.drafts["sheet.e"]; there || s.drafts["sheet.thickness"] != "thin" || s.doc.Sheet.Density != 2700 {
		t.Errorf("%v %+v", s.drafts, s.doc.Sheet)
	}
}

func TestEditsThatCannotBeDone(t *testing.T) {
	for _, c := range []struct {
		edit    Edit
		code    Code
		message string
	}{
		{set("sheet.colour", "red"), CodeUnknownField, `There is no field named "sheet.colour" in this diaphragm.`},
		{set("avoid.lines.3.name", "x"), CodeUnknownField, `There is no field named "avoid.lines.3.name" in this diaphragm.`},
		{set("", ""), CodeUnknownField, `There is no field named nothing in this diaphragm.`},
		{Edit{"sheet.e", "paint", "red"}, CodeAction, `There is no action named "paint"; an edit can set, unit, add, remove or adopt.`},
		{Edit{"name", ActionUnit, "mm"}, CodeAction, `Name has no unit to choose.`},
		{Edit{"ring.radius", ActionUnit, "N/m"}, CodeUnit, `N/m is a unit of line tension; ring radius takes mm, cm, m, in or ft.`},
		{Edit{"ring.radius", ActionUnit, ""}, CodeUnit, `Ring radius needs the name of a unit.`},
		{Edit{"sheet.material", ActionAdopt, "unobtainium"}, CodeChoice, `There is no material "unobtainium" in the list; type a name and its properties instead.`},
		{Edit{"sheet.e", ActionAdopt, "polyester-film"}, CodeAction, `Modulus of elasticity cannot adopt a material; only the field "sheet.material" can.`},
		{Edit{"ring.radius", ActionAdd, ""}, CodeAction, `Nothing can be added to "ring.radius", only to "tension.harmonics", "attached.patches", "attached.strips" or "avoid.lines".`},
		{Edit{"attached.patches.0", ActionRemove, ""}, CodeUnknownField, `There is no patch named "attached.patches.0"; there are 0, counted from "attached.patches.0".`},
		{Edit{"ring", ActionRemove, ""}, CodeAction, `"ring" cannot be removed; it is no entry of a list.`},
		{Edit{"attached", ActionAdd, ""}, CodeAction, `Nothing can be added to "attached", only to "tension.harmonics", "attached.patches", "attached.strips" or "avoid.lines".`},
		{Edit{"avoid.lines.3", ActionRemove, ""}, CodeUnknownField, `There is no line to keep clear of named "avoid.lines.3"; there are 3, counted from "avoid.lines.0".`},
		{Edit{"avoid.lines.0.name", ActionRemove, ""}, CodeUnknownField, `There is no line to keep clear of named "avoid.lines.0.name"; there are 3, counted from "avoid.lines.0".`},
	} {
		s := demoState().apply(c.edit)
		want := []Problem{{c.edit.Field, c.code, c.message, -1}}
		if !reflect.DeepEqual(s.problems, want) || !SameContent(s.doc, demoState().doc) || len(s.drafts)+len(s.units) > 0 {
			t.Errorf("%v: %+v", c.edit, s.problems)
		}
	}
}

func TestApplyLeavesItsArgumentsAlone(t *testing.T) {
	doc := Demo("", "")
	drafts, units := map[string]string{"sheet.e": "stiff"}, map[string]string{"ring.radius": "in"}
	Apply(doc, drafts, units, []Edit{
		set("avoid.lines.0.frequency", "60"), {"avoid.lines.1", ActionRemove, ""}, set("sheet.e", "5"), set("ring.radius", "x"),
		{"ring.radius", ActionUnit, "m"}, {"avoid.lines", ActionAdd, ""},
	}, quantity.SI)
	Rows(doc, drafts, units, quantity.SI)
	if !SameContent(doc, Demo("", "")) || len(drafts) != 1 || drafts["sheet.e"] != "stiff" || len(units) != 1 || units["ring.radius"] != "in" {
		t.Errorf("%+v %v %v", doc, drafts, units)
	}
}

// Drafts and units of fields that do not exist come from old or damaged
// records; they are dropped.
func TestUnknownDraftsAreDropped(t *testing.T) {
	s := state{doc: Demo("", ""), drafts: map[string]string{"x": "y", "avoid.lines.7.name": "z"}, units: map[string]string{"x": "mm", "ring.radius": "parsec"}}.apply()
	if len(s.drafts) != 0 || len(s.units) != 1 || len(s.problems) != 0 {
		t.Errorf("%v %v %v", s.drafts, s.units, s.problems)
	}
	if r := s.row(t, "ring.radius"); r.Unit != "mm" {
		t.Errorf("%+v", r)
	}
}

// Whatever is typed into whatever field, a sound document stays sound, the text
// is taken over or kept to the letter, and a kept one has its problem.
func FuzzApply(f *testing.F) {
	for i, text := range []string{"23 um", "1,5", "1,500", "", "cavity", "open", "-40 °F", "60", "1e9", "\u202ex", "29.4 Hz", "polyester-film"} {
		f.Add(uint8(3*i), text, uint8(7*i+2), text, uint8(i))
	}
	f.Fuzz(func(t *testing.T, first uint8, text string, second uint8, other string, action uint8) {
		s := state{doc: richDocument()}
		fields := FieldsOf(s.doc)
		a, b := fields[int(first)%len(fields)].Path, fields[int(second)%len(fields)].Path
		s = s.apply(set(a, text), Edit{b, Actions()[int(action)%len(Actions())], other})
		if wrong := Validate(s.doc); len(wrong) > 0 {
			t.Fatalf("%s = %q, %s = %q make the document unsound: %v", a, text, b, other, wrong)
		}
		for path, draft := range s.drafts {
			if draft != text && draft != other {
				t.Fatalf("%s holds %q, which nobody typed", path, draft)
			}
			if _, told := problemAt(s.problems, path); !told {
				t.Fatalf("%s keeps %q without a problem", path, draft)
			}
		}
		Rows(s.doc, s.drafts, s.units, quantity.InchPound, set(a, text))
	})
}

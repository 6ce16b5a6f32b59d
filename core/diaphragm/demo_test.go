package diaphragm

import (
	"encoding/json"
	"math"
	"strings"
	"testing"

	"hoopsheet/core/air"
)

const (
	testID      = "01ARYZ6S41TSV4RRFFQ69G5FAV"
	testCreated = "2031-05-17T09:30:00Z"
)

func TestDemoAndBlankAreSound(t *testing.T) {
	for name, doc := range map[string]Diaphragm{"demo": Demo(testID, testCreated), "blank": Blank(testID, testCreated)} {
		if problems := Validate(doc); len(problems) > 0 {
			t.Errorf("%s: %v", name, problems)
		}
		if doc.ID != testID || doc.Created != testCreated || doc.Schema != Schema || doc.Revision != 0 {
			t.Errorf("%s: %+v", name, doc)
		}
		data, err := json.Marshal(doc)
		if err != nil {
			t.Fatal(err)
		}
		if _, err := OpenDocument(data); err != nil {
			t.Errorf("%s is not opened again: %v", name, err)
		}
	}
	if Blank(testID, testCreated).Invented {
		t.Error("a blank document counts as invented")
	}
}

func TestDemoSaysThatItIsInvented(t *testing.T) {
	doc := Demo(testID, testCreated)
	if !doc.Invented || !strings.Contains(doc.Notes, "Invented") {
		t.Errorf("%v, %q", doc.Invented, doc.Notes)
	}
	// 50 µm of 1390 kg/m^3 weigh 0.0695 kg/m^2; one rounding of 2^-53 each in
	// the thickness, the product and the expected value.
	if got := doc.Sheet.ArealDensity(); math.Abs(got-0.0695) > 1.5*0x1p-52*0.0695 {
		t.Errorf("areal density %.17g", got)
	}
}

func TestListsOfLinesAreNeverNull(t *testing.T) {
	for name, doc := range map[string]Diaphragm{"blank": Blank("", ""), "zero": {}, "demo": Demo("", "")} {
		data, err := json.Marshal(doc)
		if err != nil {
			t.Fatal(err)
		}
		if strings.Contains(string(data), "null") || !strings.Contains(string(data), `"lines":[`) {
			t.Errorf("%s: %s", name, data)
		}
		var back Diaphragm
		if err := json.Unmarshal(data, &back); err != nil || !SameContent(doc, back) {
			t.Errorf("%s comes back as %+v, %v", name, back, err)
		}
	}
	changed, _, _, _ := Apply(Diaphragm{}, nil, nil, nil, "si")
	if changed.Avoid.Lines == nil {
		t.Error("Apply leaves a list of lines that is nil")
	}
}

func TestSameContent(t *testing.T) {
	base := richDocument()
	kept := cloned(base)
	kept.Revision = 7
	if !SameContent(base, kept) {
		t.Error("the revision counts as content")
	}
	empty, none := Blank("", ""), Blank("", "")
	none.Avoid.Lines = nil
	if !SameContent(empty, none) {
		t.Error("no lines differ from an empty list")
	}
	spelt := richDocument()
	spelt.Tension.Rim, spelt.Faces.Upper.Fluid, spelt.Attached = RimClamped, air.FluidAir, Attached{}
	short := richDocument()
	short.Tension.Rim, short.Faces.Upper.Fluid = "", ""
	short.Attached = Attached{Patches: []Patch{}, Strips: []Strip{}}
	if !SameContent(spelt, short) {
		t.Error("spelling out what is meant anyway counts as content")
	}
	for _, f := range FieldsOf(base) {
		other := cloned(base)
		change(f, &other)
		if SameContent(base, other) {
			t.Errorf("a change of %s is no change", f.Path)
		}
		if !SameContent(base, richDocument()) {
			t.Fatalf("changing a copy at %s changed the original", f.Path)
		}
	}
	for name, change := range map[string]func(*Diaphragm){
		"id":       func(d *Diaphragm) { d.ID = "other" },
		"created":  func(d *Diaphragm) { d.Created = "" },
		"invented": func(d *Diaphragm) { d.Invented = false },
		"line":     func(d *Diaphragm) { d.Avoid.Lines = d.Avoid.Lines[:1] },
		"harmonic": func(d *Diaphragm) { d.Tension.Harmonics = nil },
		"patch":    func(d *Diaphragm) { d.Attached.Patches = d.Attached.Patches[1:] },
		"strip":    func(d *Diaphragm) { d.Attached.Strips = append(d.Attached.Strips, Strip{}) },
	} {
		other := cloned(base)
		change(&other)
		if SameContent(base, other) {
			t.Errorf("a change of %s is no change", name)
		}
	}
}

// change gives the field another value.
func change(f Field, doc *Diaphragm) {
	switch f.Kind {
	case KindQuantity:
		*f.number(doc) += 1
	case KindCount:
		*f.count(doc) += 1
	case KindChoice:
		if f.flag != nil {
			*f.flag(doc) = !*f.flag(doc)
			return
		}
		*f.text(doc) += "x"
	default:
		*f.text(doc) += "x"
	}
}

package diaphragm

import (
	"reflect"
	"slices"
	"strings"
	"testing"

	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

func TestFieldsAreWhole(t *testing.T) {
	seen := map[string]bool{}
	group := 0
	for _, f := range Fields() {
		if seen[f.Path] {
			t.Errorf("%s stands twice", f.Path)
		}
		seen[f.Path] = true
		if at := slices.Index(GroupNames(), f.Group); at < group {
			t.Errorf("%s is out of page order", f.Path)
		} else {
			group = at
		}
		if f.Name == "" || !strings.HasSuffix(f.Help, ".") || len(f.Help) > 130 || strings.Count(f.Help, ". ") > 1 {
			t.Errorf("%s: name %q, help %q", f.Path, f.Name, f.Help)
		}
		same, ok := FieldByPath(f.Path)
		if !ok || same.Name != f.Name {
			t.Errorf("%s is not found by its path", f.Path)
		}
		accessors := 0
		for _, has := range []bool{f.number != nil, f.count != nil, f.text != nil, f.flag != nil} {
			if has {
				accessors++
			}
		}
		if accessors != 1 {
			t.Errorf("%s has %d accessors", f.Path, accessors)
		}
		if f.Kind != KindQuantity {
			continue
		}
		for _, symbol := range append([]string{f.SI, f.InchPound}, f.Units...) {
			if u, ok := quantity.Find(f.Dimension, symbol); !ok || u.Symbol != symbol {
				t.Errorf("%s offers %q, which is no unit of %s", f.Path, symbol, f.Dimension)
			}
		}
		if !slices.Contains(f.Units, f.SI) || !slices.Contains(f.Units, f.InchPound) || f.Low >= f.High {
			t.Errorf("%s: units %q, %q of %q, bounds %g to %g", f.Path, f.SI, f.InchPound, f.Units, f.Low, f.High)
		}
	}
	for _, g := range GroupNames() {
		if !slices.ContainsFunc(Fields(), func(f Field) bool { return f.Group == g }) {
			t.Errorf("the group %s has no field", g)
		}
	}
}

// Every member of the document is a field, or one of those that no form edits.
func TestEveryMemberHasItsField(t *testing.T) {
	doc := Diaphragm{
		Tension:  Tension{Harmonics: []Harmonic{{}}},
		Attached: Attached{Patches: []Patch{{}}, Strips: []Strip{{}}},
		Avoid:    Avoid{Lines: []Line{{}}},
	}
	for _, f := range FieldsOf(doc) {
		change(f, &doc)
	}
	// Those that no form edits.
	doc.Schema, doc.ID, doc.Created, doc.Revision, doc.Invented = 1, "x", "x", 1, true
	var walk func(path string, v reflect.Value)
	walk = func(path string, v reflect.Value) {
		switch v.Kind() {
		case reflect.Struct:
			for i := range v.NumField() {
				walk(path+"."+v.Type().Field(i).Name, v.Field(i))
			}
		case reflect.Slice:
			if v.Len() != 1 {
				t.Errorf("%s has %d entries", path, v.Len())
				return
			}
			walk(path+".0", v.Index(0))
		default:
			if v.IsZero() {
				t.Errorf("no field reaches %s", path)
			}
		}
	}
	walk("doc", reflect.ValueOf(doc))
}

func TestFieldByPathRefusesOthers(t *testing.T) {
	for _, path := range []string{"", "id", "ring", "ring.Radius", "avoid.lines", "avoid.lines.0", "avoid.lines.-1.name", "avoid.lines.01.name",
		"avoid.lines.24.name", "avoid.lines.0.names", "avoid.lines.x.name", "avoid.lines.0.name.x"} {
		if _, ok := FieldByPath(path); ok {
			t.Errorf("%q is a field", path)
		}
	}
	if f, ok := FieldByPath("avoid.lines.23.name"); !ok || f.Name != "name of line 24" {
		t.Errorf("%v %v", f.Name, ok)
	}
}

// Each material of the catalogue can be adopted as it is.
func TestCatalogueIsWithinBounds(t *testing.T) {
	for _, m := range sheet.Materials() {
		doc, _, _, problems := Apply(Blank("", ""), nil, nil, []Edit{{"sheet.material", ActionAdopt, m.ID}}, quantity.SI)
		if len(problems) > 0 || doc.Sheet.Material != m.Name || doc.Sheet.E != m.E || doc.Sheet.CTE != m.CTE || doc.Sheet.Nu != m.Nu ||
			doc.Sheet.Density != m.Density || doc.Sheet.AllowableStress != m.AllowableStress || doc.Sheet.Thickness != 23e-6 {
			t.Errorf("%s: %+v %v", m.ID, doc.Sheet, problems)
		}
	}
}

func TestSpecificationLines(t *testing.T) {
	doc := Demo("", "")
	find := func(list []SpecificationLine, name string) (SpecificationLine, bool) {
		i := slices.IndexFunc(list, func(l SpecificationLine) bool { return l.Name == name })
		if i < 0 {
			return SpecificationLine{}, false
		}
		return list[i], true
	}
	list := SpecificationLines(doc, map[string]string{"ring.radius": "m"}, quantity.InchPound)
	for _, want := range []SpecificationLine{
		{GroupRing, "a", "ring radius", "0.45", "m"},
		{GroupRing, "N", "number of clamps", "16", ""},
		{GroupSheet, "h", "sheet thickness", "1.9685", "mil"},
		{GroupSheet, "ν", "Poisson's ratio", "0.38", ""},
		{GroupFaces, "", "upper face", "baffled: set in a wall", ""},
		{GroupSurroundings, "t", "temperature", "68", "°F"},
		{GroupAvoid, "f", "frequency of line 2", "100", "Hz"},
		{GroupDamping, "ζ", "damping ratio", "0.4", "%"},
	} {
		if got, _ := find(list, want.Name); got != want {
			t.Errorf("%+v, want %+v", got, want)
		}
	}
	if _, there := find(list, "measured areal density"); there {
		t.Error("what is not stated is listed")
	}
	if _, there := find(list, "depth of the upper cavity"); there {
		t.Error("the depth of no cavity is listed")
	}
	for _, name := range []string{"edge of the sheet", "sheet along the rim", "fluid at the upper face", "hub radius", "direction of the warp"} {
		if l, there := find(list, name); there {
			t.Errorf("what goes without saying is listed: %+v", l)
		}
	}
	for _, want := range []SpecificationLine{
		{GroupRing, "", "out of round", "0.4", "mm"},
		{GroupTension, "", "edge of the sheet", "supported: free to turn, as over a sharp edge", ""},
		{GroupEvenness, "", "sheet along the rim", "bonded: glued or welded to the rim", ""},
		{GroupEvenness, "k", "order of harmonic 2", "3", ""},
		{GroupAttached, "M", "mass of patch 1", "2.3", "g"},
		{GroupAttached, "", "stiffness of patch 1", "rigid: stays flat", ""},
		{GroupAttached, "", "stiffness of patch 2", "limp: bends with the sheet", ""},
		{GroupAttached, "θ", "angle of strip 1", "90", "°"},
		{GroupFaces, "", "fluid at the upper face", "nitrogen, dry", ""},
		{GroupFaces, "d", "wall before the upper face", "650", "mm"},
		{GroupFaces, "", "vent of the lower cavity", "12.5", "cm²"},
	} {
		if got, _ := find(SpecificationLines(richDocument(), nil, quantity.SI), want.Name); got != want {
			t.Errorf("%+v, want %+v", got, want)
		}
	}
	doc.Faces.Upper = Face{Kind: FaceCavity, Depth: 0.12}
	if got, _ := find(SpecificationLines(doc, nil, quantity.SI), "depth of the upper cavity"); got.Text != "120" || got.Unit != "mm" {
		t.Errorf("%+v", got)
	}
}

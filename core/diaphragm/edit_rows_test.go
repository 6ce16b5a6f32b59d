package diaphragm

import (
	"math"
	"slices"
	"strings"
	"testing"

	"hoopsheet/core/quantity"
)

func TestRows(t *testing.T) {
	s := demoState()
	rows := Rows(s.doc, nil, nil, quantity.SI)
	for _, r := range rows {
		if r.Units == nil || r.Choices == nil || r.Problem != "" || r.Echo != "" {
			t.Errorf("%+v", r)
		}
		if strings.HasSuffix(r.Field, "depth") {
			t.Errorf("%s is shown without a cavity", r.Field)
		}
	}
	if r := s.row(t, "ring.radius"); r.Text != "450" || r.Unit != "mm" || r.Symbol != "a" || !slices.Equal(r.Units, []string{"mm", "cm", "m", "in", "ft"}) {
		t.Errorf("%+v", r)
	}
	if r := s.row(t, "faces.upper.kind"); r.Text != "baffled" || len(r.Choices) != 4 || r.Unit != "" {
		t.Errorf("%+v", r)
	}
	inchPound := map[string]string{}
	for _, r := range Rows(s.doc, nil, map[string]string{"tension.nominal": "N/m"}, quantity.InchPound) {
		inchPound[r.Field] = r.Text + " " + r.Unit
	}
	// 0.45 m / 0.0254 m = 17.716535...; 293.15 K = 68 °F.
	for field, want := range map[string]string{"ring.radius": "17.7165 in", "surroundings.temperature": "68 °F", "tension.nominal": "310 N/m"} {
		if inchPound[field] != want {
			t.Errorf("%s: %q, want %q", field, inchPound[field], want)
		}
	}
}

func TestRowsEchoTheEditsJustMade(t *testing.T) {
	edits := []Edit{set("ring.radius", "1,5 m"), set("ring.clamps", "1 000"), set("sheet.thickness", "23 um")}
	s := demoState().apply(edits...)
	for field, want := range map[string]string{
		"ring.radius": `"1,5" is read as 1.5`, "ring.clamps": `"1 000" is read as 1000`, "sheet.thickness": "", "name": "",
	} {
		if r := s.row(t, field, edits...); r.Echo != want {
			t.Errorf("%s: %q", field, r.Echo)
		}
	}
	if r := s.row(t, "ring.radius"); r.Echo != "" || r.Text != "1.5" || r.Unit != "m" {
		t.Errorf("%+v", r)
	}
}

// A unit that is typed but not offered stands in the list, so that it can be
// shown as chosen.
func TestRowsOfferTheTypedUnit(t *testing.T) {
	s := demoState().apply(set("sheet.nu", "38 %"))
	if r := s.row(t, "sheet.nu"); r.Unit != "%" || !slices.Equal(r.Units, []string{"", "%"}) || r.Text != "38" {
		t.Errorf("%+v", r)
	}
	s = s.apply(Edit{"sheet.nu", ActionUnit, ""})
	if r := s.row(t, "sheet.nu"); r.Unit != "" || r.Text != "0.38" {
		t.Errorf("%+v", r)
	}
}

// An unsound document, from a script or an old file, shows its problems at
// their fields, and can be mended there.
func TestUnsoundDocumentsAreMended(t *testing.T) {
	s := demoState()
	s.doc.Ring.Radius, s.doc.Tension.Nominal = -1, math.NaN()
	s = s.apply()
	if r := s.row(t, "ring.radius"); len(s.problems) != 2 || r.Text != "-1000" || !strings.Contains(r.Problem, "-1000 mm") {
		t.Errorf("%+v %v", r, s.problems)
	}
	s = s.apply(set("ring.radius", "300"), set("tension.nominal", "200"))
	if len(s.problems) > 0 || s.doc.Ring.Radius != 0.3 {
		t.Errorf("%v", s.problems)
	}
}

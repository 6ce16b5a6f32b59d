package diaphragm

import (
	"strings"
	"testing"

	"hoopsheet/core/quantity"
)

// Switching units, even through all of them, and setting what is shown leave
// the SI value as it is, to the last bit.
func TestUnitsChangeNoValue(t *testing.T) {
	for _, f := range FieldsOf(richDocument()) {
		if f.Kind != KindQuantity {
			continue
		}
		s := state{doc: richDocument()}
		if !strings.HasSuffix(f.Path, ".wall") {
			s.doc.Faces.Upper, s.doc.Faces.Lower.Depth = Face{Kind: FaceCavity, Depth: 0.123456789, VentArea: 1e-3 / 7}, 1.0/3
		} else {
			s.doc.Faces.Upper, s.doc.Faces.Lower = Face{Kind: FaceBaffled, Wall: 0.123456789}, Face{Kind: FaceBaffled, Wall: 1.0 / 3}
		}
		s.doc.Sheet.MeasuredArealDensity, s.doc.Ring.Radius = 0.07, 4.0/3
		want := *f.number(&s.doc)
		for _, symbol := range f.Units {
			s = s.apply(Edit{f.Path, ActionUnit, symbol})
			if s.units[f.Path] != symbol || len(s.problems) > 0 {
				t.Errorf("%s in %s: %v %v", f.Path, symbol, s.units, s.problems)
			}
			r := s.row(t, f.Path)
			s = s.apply(set(f.Path, r.Text))
			if got := *f.number(&s.doc); got != want || r.Unit != symbol {
				t.Errorf("%s in %s: %.17g, want %.17g", f.Path, symbol, got, want)
			}
		}
	}
}

func TestTypedNumbersComeBackAsTyped(t *testing.T) {
	for _, f := range Fields() {
		if f.Kind != KindQuantity || f.Dimension == quantity.Temperature {
			continue
		}
		for _, symbol := range f.Units {
			unit, _ := quantity.Find(f.Dimension, symbol)
			for _, x := range []float64{0.07, 1, 12.5, 123.456, 98765.4321} {
				text := quantity.FormatNumber(x, digitsTyped)
				if got := show(unit.ToSI(x), unit); got != text {
					t.Errorf("%s %s is shown as %s", text, symbol, got)
				}
			}
		}
	}
	for _, symbol := range []string{"°C", "K", "°F"} {
		unit, _ := quantity.Find(quantity.Temperature, symbol)
		for _, text := range []string{"0", "20", "-40", "5.5", "35", "68", "0.1", "-12.25"} {
			reading, err := quantity.Parse(text, quantity.Temperature, symbol)
			if symbol == "K" && text[0] == '-' {
				continue
			}
			if got := show(reading.SI, unit); err != nil || got != text {
				t.Errorf("%s %s is shown as %s, %v", text, symbol, got, err)
			}
		}
	}
	// A change of unit is shown with six digits.
	mil, _ := quantity.Find(quantity.Length, "mil")
	if got := show(23e-6, mil); got != "0.905512" {
		t.Errorf("23 µm are %s mil", got)
	}
}

func TestAnEditRoundsNothingElse(t *testing.T) {
	s := demoState().apply(Edit{"ring.radius", ActionUnit, "in"}, set("tension.nominal", "2 lbf/in"), set("name", "x"))
	if s.doc.Ring.Radius != 0.45 {
		t.Errorf("%.17g", s.doc.Ring.Radius)
	}
}

package sheet

import (
	"strings"
	"testing"
)

func TestMaterialsAreWholeAndPlausible(t *testing.T) {
	seen := map[string]bool{}
	for _, m := range Materials() {
		if seen[m.ID] {
			t.Errorf("id %q stands twice", m.ID)
		}
		seen[m.ID] = true
		if m.Name == "" || m.ID == "" || len(m.Source) < 40 {
			t.Errorf("%q lacks a name, an id or a source", m.ID)
		}
		// Bounds of any solid film: lighter than 900 or heavier than 23000
		// kg/m^3, or more elastic than 0.1 GPa or stiffer than 1200 GPa, would
		// be a slip of the unit. Isotropic bodies need nu < 0.5.
		if m.Density < 900 || m.Density > 23000 || m.E < 0.1e9 || m.E > 1200e9 ||
			m.Nu <= 0 || m.Nu >= 0.5 || m.CTE <= 0 || m.CTE > 300e-6 {
			t.Errorf("%s: a figure is out of the range of solid films: %+v", m.ID, m)
		}
		// The allowable stress must stay far inside the elastic range.
		if strain := m.AllowableStress / m.E; strain <= 0 || strain > 0.015 {
			t.Errorf("%s: allowable strain %g", m.ID, strain)
		}
		if !strings.Contains(m.Source, "Allowable stress: ") {
			t.Errorf("%s: the source does not say where the allowable stress comes from", m.ID)
		}
	}
	if len(seen) < 5 {
		t.Errorf("only %d materials", len(seen))
	}
}

func TestMaterialByID(t *testing.T) {
	// Density and modulus of oriented polyester film: product bulletin of a
	// film maker (1390 kg/m^3, 490 kg/mm^2 = 4.8 GPa along the web).
	m, ok := MaterialByID("polyester-film")
	if !ok || m.Density != 1390 || m.E != 4.8e9 {
		t.Errorf("got %+v, %v", m, ok)
	}
	if _, ok := MaterialByID("no-such-film"); ok {
		t.Error("an unknown id was found")
	}
}

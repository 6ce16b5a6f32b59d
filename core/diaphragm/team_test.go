package diaphragm

import (
	"strings"
	"testing"

	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

const teamFile = `{
  "materials": [{"id": "roll-7", "name": "Roll 7", "density": 1400, "e": 4.5e9, "nu": 0.38, "cte": 18e-6, "allowableStress": 30e6, "source": "weighed"}],
  "units": "inch-pound", "linkAddress": "https://example.org/hoopsheet/hand-over.html",
  "limits": {"tolerance": 0.05, "lowest": 25, "lines": [{"name": "mains hum", "frequency": 60, "halfWidth": 0.04}]}}`

func TestReadTeam(t *testing.T) {
	team, problems := ReadTeam([]byte(teamFile))
	if len(problems) > 0 {
		t.Fatalf("problems with a sound file: %v", problems)
	}
	if len(team.Materials) != 1 || team.Units != quantity.InchPound {
		t.Errorf("read %+v", team)
	}
	doc := team.Limits.Start("", "")
	if doc.Tension.Tolerance != 0.05 || doc.Avoid.Lowest != 25 || len(doc.Avoid.Lines) != 1 {
		t.Errorf("a new diaphragm starts with %+v and %+v", doc.Tension, doc.Avoid)
	}
}

// A slip costs the part it is in and nothing else.
func TestReadTeamKeepsWhatIsSound(t *testing.T) {
	tests := []struct {
		name, file, want string
		materials        int
	}{
		{"no JSON", `{"units": `, "ends in the middle", 0},
		{"unknown member", `{"unit": "si"}`, `"unit"`, 0},
		{"units", strings.Replace(teamFile, "inch-pound", "cubits", 1), "must be si or inch-pound", 1},
		{"address", strings.Replace(teamFile, "https://", "ftp://", 1), "must begin with https://", 1},
		{"material", strings.Replace(teamFile, "1400", "-1400", 1), "material 1 is left out", 0},
		{"limits", strings.Replace(teamFile, "0.05", "7", 1), "limits are left out", 1},
	}
	for _, test := range tests {
		team, problems := ReadTeam([]byte(test.file))
		if len(problems) != 1 || !strings.Contains(problems[0].Message, test.want) {
			t.Errorf("%s: problems %v, want one with %q", test.name, problems, test.want)
		}
		if len(team.Materials) != test.materials {
			t.Errorf("%s: %d materials, want %d", test.name, len(team.Materials), test.materials)
		}
	}
}

// Adopting a team's material sets exactly its figures, whatever the units.
func TestAdoptEdits(t *testing.T) {
	m := sheet.Material{ID: "x", Name: "Roll 7", Density: 1401.7, E: 4.51e9, Nu: 0.371, CTE: 18.3e-6, AllowableStress: 30.1e6}
	doc, drafts, _, problems := Apply(Blank("", ""), nil, nil, AdoptEdits(m), quantity.InchPound)
	if len(problems) > 0 || len(drafts) > 0 {
		t.Fatalf("problems %v, drafts %v", problems, drafts)
	}
	want := doc.Sheet
	adopt(&want, m)
	if doc.Sheet != want {
		t.Errorf("adopted %+v, want %+v", doc.Sheet, want)
	}
}

package diaphragm

import (
	"strconv"
	"strings"

	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// Team is what a team that hosts the pages puts beside them: its materials,
// the limits that new diaphragms start with, its units and the address of its
// links. Everything may be left out.
type Team struct {
	// Materials stand before the catalogue.
	Materials []sheet.Material `json:"materials"`
	// Units of fields on devices where nobody has chosen; empty for SI.
	Units quantity.System `json:"units"`
	// LinkAddress that hand-over links start with where the device has none.
	LinkAddress string `json:"linkAddress"`
	Limits      Limits `json:"limits"`
}

// Limits are requirements that a new diaphragm starts with.
type Limits struct {
	// Tolerance of the tension, relative; 0 for the usual one.
	Tolerance float64 `json:"tolerance"`
	// Lowest frequency that a mode may have, Hz; 0 for none.
	Lowest float64 `json:"lowest"`
	// Lines to keep clear of.
	Lines []Line `json:"lines"`
}

// mostTeamMaterials of one file.
const mostTeamMaterials = 200

// ReadTeam reads a team's file. It never fails as a whole: what is wrong is
// left out and told in a problem, so that a slip in the file does not take the
// rest from everybody.
func ReadTeam(data []byte) (Team, []Problem) {
	var team Team
	if err := readStrictly(data, &team, "defaults", "The file defaults.json"); err != nil {
		return Team{}, teamProblem("", CodeUnreadable, err.Error())
	}
	var problems []Problem
	switch team.Units {
	case "", quantity.SI, quantity.InchPound:
	default:
		problems = append(problems, teamProblem("units", CodeChoice, "In defaults.json the units are "+clip(string(team.Units))+"; they must be si or inch-pound.")...)
		team.Units = ""
	}
	if a := team.LinkAddress; a != "" && !strings.HasPrefix(a, "https://") && !strings.HasPrefix(a, "http://") {
		problems = append(problems, teamProblem("linkAddress", CodeText, "In defaults.json the address of links is "+clip(a)+"; it must begin with https:// or http://.")...)
		team.LinkAddress = ""
	}
	materials := team.Materials
	team.Materials = nil
	for i, m := range materials {
		if fault := MaterialFault(m, team.Materials); fault != "" || i >= mostTeamMaterials {
			if fault == "" {
				fault = "one file holds at most " + strconv.Itoa(mostTeamMaterials)
			}
			problems = append(problems, teamProblem("materials."+strconv.Itoa(i), CodeBounds, "In defaults.json material "+strconv.Itoa(i+1)+" is left out: "+fault+".")...)
			continue
		}
		team.Materials = append(team.Materials, m)
	}
	doc := team.Limits.apply(Blank("", ""))
	for _, p := range Validate(doc) {
		problems = append(problems, teamProblem("limits", p.Code, "In defaults.json the limits are left out: "+p.Message)...)
	}
	if len(Validate(doc)) > 0 {
		team.Limits = Limits{}
	}
	return team, problems
}

func teamProblem(member string, code Code, message string) []Problem {
	field := "defaults"
	if member != "" {
		field += "." + member
	}
	return []Problem{{Field: field, Code: code, Message: message, Offset: -1}}
}

// MaterialFault says why a material cannot be offered beside those before it;
// empty where it can.
func MaterialFault(m sheet.Material, before []sheet.Material) string {
	if strings.TrimSpace(m.ID) == "" || strings.TrimSpace(m.Name) == "" {
		return "it has no id or no name"
	}
	for _, other := range before {
		if other.ID == m.ID {
			return "another one has the id " + clip(m.ID)
		}
	}
	doc := Blank("", "")
	adopt(&doc.Sheet, m)
	for _, p := range Validate(doc) {
		if strings.HasPrefix(p.Field, "sheet.") {
			return strings.TrimSuffix(p.Message, ".")
		}
	}
	return ""
}

// Start gives an empty document that starts with the limits.
func (l Limits) Start(id, created string) Diaphragm { return l.apply(Blank(id, created)) }

func (l Limits) apply(doc Diaphragm) Diaphragm {
	if l.Tolerance != 0 {
		doc.Tension.Tolerance = l.Tolerance
	}
	doc.Avoid.Lowest = l.Lowest
	doc.Avoid.Lines = append([]Line{}, l.Lines...)
	return doc
}

// AdoptEdits writes the adoption of a team's material as plain edits.
func AdoptEdits(m sheet.Material) []Edit {
	set := func(member, text string) Edit { return Edit{Field: "sheet." + member, Action: ActionSet, Text: text} }
	exact := func(si float64, unit string) string { return strconv.FormatFloat(si, 'g', -1, 64) + " " + unit }
	return []Edit{
		set("material", m.Name),
		set("density", exact(m.Density, "kg/m³")),
		set("e", exact(m.E, "Pa")),
		set("nu", strconv.FormatFloat(m.Nu, 'g', -1, 64)),
		set("cte", exact(m.CTE, "1/K")),
		set("allowableStress", exact(m.AllowableStress, "Pa")),
	}
}

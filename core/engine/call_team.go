package engine

import (
	"context"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/sheet"
)

// TeamRequest reads the file that a team puts beside the pages.
type TeamRequest struct {
	// Text of defaults.json.
	Text string `json:"text"`
}

// TeamResult is what the file says; what is wrong in it is left out.
type TeamResult struct {
	Team     diaphragm.Team `json:"team"`
	Problems []Problem      `json:"problems"`
}

func runTeam(_ context.Context, request *TeamRequest) (*TeamResult, error) {
	team, problems := diaphragm.ReadTeam([]byte(request.Text))
	return &TeamResult{Team: team, Problems: problems}, nil
}

// teamEdits turns the adoption of a team's material into plain edits.
func teamEdits(edits []diaphragm.Edit, materials []sheet.Material) []diaphragm.Edit {
	var out []diaphragm.Edit
	for _, edit := range edits {
		i := slices.IndexFunc(materials, func(m sheet.Material) bool {
			return edit.Action == diaphragm.ActionAdopt && m.ID == edit.Text
		})
		if i < 0 {
			out = append(out, edit)
		} else {
			out = append(out, diaphragm.AdoptEdits(materials[i])...)
		}
	}
	return out
}

// offerMaterials puts a team's materials before the catalogue's.
func offerMaterials(rows []diaphragm.Row, materials []sheet.Material) {
	for i := range rows {
		if rows[i].Kind != diaphragm.KindMaterial {
			continue
		}
		var choices []diaphragm.Choice
		for _, m := range materials {
			choices = append(choices, diaphragm.Choice{Value: m.ID, Name: m.Name})
		}
		rows[i].Choices = append(choices, rows[i].Choices...)
	}
}

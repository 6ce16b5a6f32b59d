package engine

import (
	"context"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
)

func runEdit(_ context.Context, request *EditRequest) (*EditResult, error) {
	system := request.System
	if !slices.Contains(quantity.Systems(), system) {
		if system != "" {
			return nil, Fail("system", CodeRequest, "The system of units is "+quote(string(system))+"; it must be si or inch-pound.")
		}
		system = quantity.SI
	}
	edits := teamEdits(request.Edits, request.Materials)
	document, drafts, units, problems := diaphragm.Apply(request.Document, request.Drafts, request.Units, edits, system)
	rows := diaphragm.Rows(document, drafts, units, system, edits...)
	offerMaterials(rows, request.Materials)
	return &EditResult{
		Document: document,
		Drafts:   drafts,
		Units:    units,
		Rows:     rows,
		Derived:  derive(document, system),
		Problems: problems,
		Cautions: cautions(document),
	}, nil
}

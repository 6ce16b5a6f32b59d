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
	document, drafts, units, problems := diaphragm.Apply(request.Document, request.Drafts, request.Units, request.Edits, system)
	return &EditResult{
		Document: document,
		Drafts:   drafts,
		Units:    units,
		Rows:     diaphragm.Rows(document, drafts, units, system, request.Edits...),
		Derived:  derive(document, system),
		Problems: problems,
		Cautions: cautions(document),
	}, nil
}

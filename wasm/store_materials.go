//go:build js && wasm

package main

import (
	"errors"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
	"hoopsheet/core/sheet"
)

// materialsKey is a key of inSettings.
const materialsKey = "materials"

// mostMaterials that one browser keeps.
const mostMaterials = 200

func (t *txn) readMaterials() ([]sheet.Material, error) {
	own := engine.OwnMaterials{Materials: []sheet.Material{}}
	if err := t.getJSON(inSettings, materialsKey, &own); err != nil && !errors.Is(err, errAbsent) {
		return nil, err
	}
	return own.Materials, nil
}

func (s *store) materials(*engine.NoRequest) (*engine.OwnMaterials, error) {
	var own engine.OwnMaterials
	err := s.base.read([]string{inSettings}, func(t *txn) (err error) {
		own.Materials, err = t.readMaterials()
		return err
	})
	return &own, err
}

func (s *store) putMaterials(request *engine.OwnMaterials) (*engine.Done, error) {
	if len(request.Materials) > mostMaterials {
		return nil, engine.Fail("materials", engine.CodeRequest, "At most 200 materials can be kept.")
	}
	for i, m := range request.Materials {
		if fault := diaphragm.MaterialFault(m, request.Materials[:i]); fault != "" {
			return nil, engine.Fail("materials", engine.CodeRequest, "The material "+strings.TrimSpace(m.Name)+" cannot be kept: "+fault+".")
		}
	}
	err := s.base.write([]string{inSettings}, func(t *txn) error {
		return t.putJSON(inSettings, materialsKey, engine.OwnMaterials{Materials: append([]sheet.Material{}, request.Materials...)})
	})
	return &engine.Done{}, err
}

package main

import (
	"encoding/json"
	"os"
	"path/filepath"
	"testing"

	"hoopsheet/core/engine"
)

// TestContractIsFresh holds the committed schema against the one that the Go
// types give now. That the TypeScript types follow from the schema is held in
// site/tests/unit/contract.test.mjs.
func TestContractIsFresh(t *testing.T) {
	schema, err := Build(filepath.Join("..", ".."), engine.Calls(), engine.StoreCalls())
	if err != nil {
		t.Fatal(err)
	}
	want, err := json.MarshalIndent(schema, "", " ")
	if err != nil {
		t.Fatal(err)
	}
	got, err := os.ReadFile("contract.schema.json")
	if err != nil {
		t.Fatal(err)
	}
	if string(got) != string(want)+"\n" {
		t.Error("contract.schema.json is older than the Go types: run make generate")
	}
}

// TestContractNamesEveryCall counts what is in the file, so that an empty list
// cannot pass for a fresh one.
func TestContractNamesEveryCall(t *testing.T) {
	schema, err := Build(filepath.Join("..", ".."), engine.Calls(), engine.StoreCalls())
	if err != nil {
		t.Fatal(err)
	}
	for _, list := range []struct {
		entries []Entry
		infos   []engine.CallInfo
	}{{schema.Calls, engine.Calls()}, {schema.Store, engine.StoreCalls()}} {
		if len(list.entries) != len(list.infos) || len(list.entries) == 0 {
			t.Fatalf("%d entries for %d calls", len(list.entries), len(list.infos))
		}
		for _, e := range list.entries {
			if schema.Defs[e.Request] == nil || schema.Defs[e.Result] == nil || e.Summary == "" {
				t.Errorf("%s: a type or the summary is missing", e.Name)
			}
		}
	}
	for name, def := range schema.Defs {
		if def.Type == "object" && def.Description == "" {
			t.Errorf("%s has no description", name)
		}
	}
}

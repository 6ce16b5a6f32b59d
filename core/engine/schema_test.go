//go:build !js

package engine

import (
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"reflect"
	"testing"

	"github.com/google/jsonschema-go/jsonschema"

	"hoopsheet/core/diaphragm"
)

// contractSchema gives the resolved schema of a type of the generated
// contract by its name.
func contractSchema(t *testing.T, name string) *jsonschema.Resolved {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("..", "..", "site", "contract", "contract.schema.json"))
	if err != nil {
		t.Fatal(err)
	}
	var contract struct {
		Schema string                        `json:"$schema"`
		Defs   map[string]*jsonschema.Schema `json:"$defs"`
	}
	if err := json.Unmarshal(text, &contract); err != nil {
		t.Fatal(err)
	}
	if contract.Defs[name] == nil {
		t.Fatalf("the contract has no type %s: run make generate", name)
	}
	root := &jsonschema.Schema{Schema: contract.Schema, Ref: "#/$defs/" + name, Defs: contract.Defs}
	resolved, err := root.Resolve(nil)
	if err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	return resolved
}

func checkAgainst(t *testing.T, schema *jsonschema.Resolved, text []byte) {
	t.Helper()
	var instance any
	if err := json.Unmarshal(text, &instance); err != nil {
		t.Fatal(err)
	}
	if err := schema.Validate(instance); err != nil {
		t.Error(err)
	}
}

// TestCallsAgainstTheirSchemas holds a real request and the result it gets
// against the committed JSON Schema, for every call.
func TestCallsAgainstTheirSchemas(t *testing.T) {
	requests := sampleRequests(t)
	for _, c := range Calls() {
		t.Run(c.Name, func(t *testing.T) {
			request := []byte(requests[c.Name])
			checkAgainst(t, contractSchema(t, c.Request.Name()), request)
			response, err := Call(context.Background(), c.Name, request)
			if err != nil {
				t.Fatal(err)
			}
			checkAgainst(t, contractSchema(t, c.Result.Name()), response)
		})
	}
}

// TestSchemasRefuse makes sure that the schemas are not so loose that anything
// passes.
func TestSchemasRefuse(t *testing.T) {
	for _, bad := range []string{`{}`, `{"m":0.5}`, `[]`, `null`,
		`{"m":2,"n":1,"orientation":0,"size":64,"sectionAngle":0,"sectionPoints":41,"unheardOf":1}`} {
		var instance any
		if err := json.Unmarshal([]byte(bad), &instance); err != nil {
			t.Fatal(err)
		}
		if err := contractSchema(t, "ShapeRequest").Validate(instance); err == nil {
			t.Errorf("%s passes", bad)
		}
	}
}

// TestRefusalAgainstItsSchema does the same for what a refused call returns.
func TestRefusalAgainstItsSchema(t *testing.T) {
	_, err := Call(context.Background(), "modes", []byte(`{"count":-1}`))
	if err == nil {
		t.Fatal("a negative count was taken")
	}
	text, fault := json.Marshal(err)
	if fault != nil {
		t.Fatal(fault)
	}
	checkAgainst(t, contractSchema(t, "Error"), text)
}

// TestStoreCallsAgainstTheirSchemas does it for the calls of the store: each
// type is filled as the store and the pages fill it, and written by the
// encoder that both use.
func TestStoreCallsAgainstTheirSchemas(t *testing.T) {
	for _, c := range StoreCalls() {
		for _, kind := range []reflect.Type{c.Request, c.Result} {
			t.Run(c.Name+"/"+kind.Name(), func(t *testing.T) {
				text, err := Encode(storeSample(kind))
				if err != nil {
					t.Fatal(err)
				}
				checkAgainst(t, contractSchema(t, kind.Name()), text)
			})
		}
	}
}

// storeSample is a value of a type of the store; the zero value but for
// strings that are one of a list.
func storeSample(kind reflect.Type) any {
	doc := diaphragm.Demo("01JZZZZZZZZZZZZZZZZZZZZZZZ", "2026-05-04T10:00:00Z")
	tap := diaphragm.TapSession{Diaphragm: doc.ID, Taken: doc.Created}
	switch kind {
	case reflect.TypeFor[CreateRequest]():
		return &CreateRequest{From: CreateDocument, Document: &doc}
	case reflect.TypeFor[OpenedRecord]():
		return &OpenedRecord{Document: doc, Revisions: []RevisionInfo{{Number: 1, Kept: doc.Created}}}
	case reflect.TypeFor[SaveRequest]():
		return &SaveRequest{Document: doc, Drafts: map[string]string{"ring.radius": "x"}}
	case reflect.TypeFor[RevisionResult]():
		return &RevisionResult{Document: doc}
	case reflect.TypeFor[RecordList]():
		return &RecordList{Records: []RecordInfo{{ID: doc.ID, Name: doc.Name}}}
	case reflect.TypeFor[TapPutRequest]():
		return &TapPutRequest{Session: tap, Recording: Blob{Bytes: []byte("RIFF")}}
	case reflect.TypeFor[TapList]():
		return &TapList{Sessions: []diaphragm.TapSession{tap}}
	case reflect.TypeFor[TapRecording]():
		return &TapRecording{Session: tap}
	case reflect.TypeFor[Settings]():
		return &Settings{Units: "si"}
	}
	return reflect.New(kind).Interface()
}

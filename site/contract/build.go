package main

import (
	"fmt"
	"reflect"
	"slices"

	"github.com/google/jsonschema-go/jsonschema"

	"hoopsheet/core/engine"
)

// Contract is the whole schema file.
type Contract struct {
	Schema string                        `json:"$schema"`
	Title  string                        `json:"title"`
	Calls  []Entry                       `json:"calls"`
	Store  []Entry                       `json:"store"`
	Defs   map[string]*jsonschema.Schema `json:"$defs"`
}

// Entry is one call by the names of its types.
type Entry struct {
	Name    string `json:"name"`
	Summary string `json:"summary"`
	Request string `json:"request"`
	Result  string `json:"result"`
}

// Build makes the contract of the calls; root is the top of the repository.
func Build(root string, calls, store []engine.CallInfo) (*Contract, error) {
	docs, err := readDocs(root)
	if err != nil {
		return nil, err
	}
	c := &Contract{
		Schema: "https://json-schema.org/draft/2020-12/schema",
		Title:  "Hoopsheet calls",
		Defs:   map[string]*jsonschema.Schema{},
	}
	named := map[reflect.Type]bool{reflect.TypeFor[engine.Error](): true}
	collect(reflect.TypeFor[engine.Error](), named)
	for _, list := range []struct {
		infos   []engine.CallInfo
		entries *[]Entry
	}{{calls, &c.Calls}, {store, &c.Store}} {
		for _, info := range list.infos {
			collect(info.Request, named)
			collect(info.Result, named)
			*list.entries = append(*list.entries, Entry{info.Name, info.Summary, info.Request.Name(), info.Result.Name()})
		}
	}
	enums := engine.Enums()
	refs := map[reflect.Type]*jsonschema.Schema{}
	owner := map[string]reflect.Type{}
	for t := range named {
		if other, taken := owner[t.Name()]; taken {
			return nil, fmt.Errorf("two types of the contract are called %s: %v and %v", t.Name(), other, t)
		}
		owner[t.Name()] = t
		refs[t] = &jsonschema.Schema{Ref: "#/$defs/" + t.Name()}
	}
	for t := range named {
		schema, err := define(t, refs, enums)
		if err != nil {
			return nil, fmt.Errorf("%v: %w", t, err)
		}
		describe(schema, t, docs)
		c.Defs[t.Name()] = schema
	}
	return c, nil
}

// collect gathers the named types of the contract reachable from t.
func collect(t reflect.Type, named map[reflect.Type]bool) {
	switch t.Kind() {
	case reflect.Pointer, reflect.Slice, reflect.Map:
		if isLeaf(t) {
			named[t] = true
			return
		}
		collect(t.Elem(), named)
	case reflect.String:
		if t.Name() != "string" {
			named[t] = true
		}
	case reflect.Struct:
		known := named[t]
		named[t] = true
		if isLeaf(t) || known && t != reflect.TypeFor[engine.Error]() {
			return
		}
		for i := range t.NumField() {
			if f := t.Field(i); f.IsExported() {
				collect(f.Type, named)
			}
		}
	}
}

func isLeaf(t reflect.Type) bool {
	return t == reflect.TypeFor[engine.Numbers]() || t == reflect.TypeFor[engine.Blob]()
}

// define makes the schema of one named type; other named types stand in it as
// references.
func define(t reflect.Type, refs map[reflect.Type]*jsonschema.Schema, enums map[reflect.Type][]string) (*jsonschema.Schema, error) {
	switch {
	case t == reflect.TypeFor[engine.Numbers]():
		return &jsonschema.Schema{
			Type:  "array",
			Items: &jsonschema.Schema{Types: []string{"number", "null"}},
		}, nil
	case t == reflect.TypeFor[engine.Blob]():
		return &jsonschema.Schema{Type: "string", ContentEncoding: "base64"}, nil
	case t.Kind() == reflect.String:
		schema := &jsonschema.Schema{Type: "string"}
		for _, word := range enums[t] {
			schema.Enum = append(schema.Enum, word)
		}
		return schema, nil
	}
	others := make(map[reflect.Type]*jsonschema.Schema, len(refs))
	for other, ref := range refs {
		if other != t {
			others[other] = ref
		}
	}
	schema, err := jsonschema.ForType(t, &jsonschema.ForOptions{TypeSchemas: others})
	if err != nil {
		return nil, err
	}
	tidy(schema)
	return schema, nil
}

// tidy says what our encoder guarantees: lists and maps are never null, and an
// optional pointer is left out rather than null.
func tidy(s *jsonschema.Schema) {
	if s == nil {
		return
	}
	if len(s.Types) == 2 && slices.Contains(s.Types, "null") && s.Ref == "" {
		s.Type = s.Types[0]
		if s.Type == "null" {
			s.Type = s.Types[1]
		}
		s.Types = nil
	}
	if s.Ref != "" {
		s.Types = nil
	}
	tidy(s.Items)
	tidy(s.AdditionalProperties)
	for _, p := range s.Properties {
		tidy(p)
	}
}

// Command contract writes the JSON Schema of every type that crosses the
// boundary between the engine and the pages, and the list of calls for the
// page on scripting. It is a host program and is never
// linked into the WebAssembly.
//
// It reads the engine's list of calls, asks google/jsonschema-go for the
// schema of each named type, gathers them under $defs, closes the string types
// that have a list of values, and takes the descriptions from the Go doc
// comments.
package main

import (
	"encoding/json"
	"errors"
	"flag"
	"fmt"
	"os"

	"hoopsheet/core/engine"
)

func main() {
	out := flag.String("out", "site/contract/contract.schema.json", "file to write")
	page := flag.String("page", "site/pages/generated/calls.md", "page to write")
	root := flag.String("root", ".", "top of the repository, for doc comments")
	flag.Parse()
	schema, err := Build(*root, engine.Calls(), engine.StoreCalls())
	if err == nil {
		err = errors.Join(write(*out, schema), os.WriteFile(*page, []byte(Page(schema)), 0o644))
	}
	if err != nil {
		fmt.Fprintln(os.Stderr, "contract:", err)
		os.Exit(1)
	}
}

func write(path string, schema any) error {
	text, err := json.MarshalIndent(schema, "", " ")
	if err != nil {
		return err
	}
	return os.WriteFile(path, append(text, '\n'), 0o644)
}

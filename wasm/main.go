//go:build js && wasm

// Command wasm is the engine as a page runs it. One file serves two instances:
// compute, which answers the calls of core/engine and may be ended at any
// moment, and store, which keeps records in IndexedDB and computes nothing.
// The loader says which by globalThis.hoopsheetHost.role. See protocol.go for
// the messages.
package main

import (
	"context"
	"syscall/js"
	"time"

	"hoopsheet/core/engine"
)

// buildID names the build; set by -ldflags "-X main.buildID=...". The page
// compares it with its own.
var buildID string

// answerer carries out one call.
type answerer func(ctx context.Context, name string, request []byte, blobs [][]byte) (response []byte, arrays []engine.Array, err error)

func main() {
	host := js.Global().Get("hoopsheetHost")
	role := host.Get("role").String()
	var answer answerer
	switch role {
	case "compute":
		answer = engine.CallBulk
	case "store":
		answer = newStore(databaseName, time.Now, random{}).answer
	default:
		panic("hoopsheetHost.role is " + role)
	}
	serve(host, role, answer)
	select {}
}

//go:build js && wasm

package main

import "syscall/js"

// random reads the browser's cryptographic random numbers. crypto/rand would
// read the same and bring in 0.1 MB of code for other systems.
type random struct{}

// Read fills p. Browsers hand out at most 65 536 bytes a time; ids need ten.
func (random) Read(p []byte) (int, error) {
	array := uint8Array.New(min(len(p), 65536))
	js.Global().Get("crypto").Call("getRandomValues", array)
	return js.CopyBytesToGo(p, array), nil
}

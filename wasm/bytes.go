//go:build js && wasm

package main

import (
	"syscall/js"
	"unsafe"

	"hoopsheet/core/engine"
)

var uint8Array = js.Global().Get("Uint8Array")

// blobsOf copies the files of a request into Go.
func blobsOf(list js.Value) [][]byte {
	blobs := make([][]byte, list.Length())
	for i := range blobs {
		blobs[i] = bytesOf(uint8Array.New(list.Index(i)))
	}
	return blobs
}

// bytesOf copies a Uint8Array into Go.
func bytesOf(array js.Value) []byte {
	data := make([]byte, array.Length())
	js.CopyBytesToGo(data, array)
	return data
}

// arrayOf copies bytes into a new Uint8Array.
func arrayOf(data []byte) js.Value {
	array := uint8Array.New(len(data))
	js.CopyBytesToJS(array, data)
	return array
}

// sideArrays makes the entries of a result's arrays and the list of their
// buffers.
func sideArrays(arrays []engine.Array) (list, buffers []any) {
	list, buffers = make([]any, len(arrays)), make([]any, len(arrays))
	for i, array := range arrays {
		kind, data := "bytes", array.Bytes
		if array.Values != nil {
			kind, data = "f32", floatBytes(array.Values)
		}
		path := make([]any, len(array.Path))
		for j, name := range array.Path {
			path[j] = name
		}
		buffers[i] = arrayOf(data).Get("buffer")
		list[i] = map[string]any{"path": path, "kind": kind, "buffer": buffers[i]}
	}
	return list, buffers
}

// floatBytes views float32 values as bytes without copying them. WebAssembly
// is little-endian, and so is every typed array on the machines that run it.
func floatBytes(values []float32) []byte {
	if len(values) == 0 {
		return nil
	}
	return unsafe.Slice((*byte)(unsafe.Pointer(&values[0])), 4*len(values))
}

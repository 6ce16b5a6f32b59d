//go:build js && wasm

package main

// Messages between a page and this program (site/src/engine/protocol.ts is the
// other side). The loader puts an object hoopsheetHost on globalThis:
//
//	role                     "compute" or "store"
//	post(message, transfer)  sends a message to the page
//	receive(message)         set here: takes a message of the page
//
// The first message from here is
//
//	{type: "ready", build, role, version}
//
// and the page goes no further if build is not its own. The page sends
//
//	{type: "call", id, name, request: JSON text, blobs: [ArrayBuffer]}
//
// and each call is answered by exactly one of
//
//	{type: "result", id, response: JSON text, arrays: [{path, kind, buffer}]}
//	{type: "refused", id, problems: [{field, code, message, offset}]}
//
// before which any number of {type: "progress", id, share} may come. A call
// that panics is answered by "refused" with the code "internal" and followed
// by {type: "panic", message}: the page then starts a fresh compute instance.
//
// Large data do not cross as JSON. A file of a request is the string "blob:0",
// its bytes are blobs[0]. An array of a result is [] in the JSON (a file is
// ""), and an entry of arrays holds it: path leads to it by member names, a
// list's index as text; kind is "f32" for little-endian float32 values or
// "bytes" for a file; buffer is transferred.

import (
	"context"
	"errors"
	"fmt"
	"syscall/js"

	"hoopsheet/core/engine"
)

// server answers the calls of one page.
type server struct {
	host   js.Value
	answer answerer
}

// serve starts to listen and says that it does. The one js.Func it makes lives
// as long as the program.
func serve(host js.Value, role string, answer answerer) {
	s := &server{host: host, answer: answer}
	host.Set("receive", js.FuncOf(func(_ js.Value, args []js.Value) any {
		// Waiting here would stop the event loop that is waited for, so every
		// call runs in a goroutine of its own.
		go s.carryOut(args[0])
		return nil
	}))
	s.post(map[string]any{"type": "ready", "build": buildID, "role": role, "version": engine.Version}, nil)
}

// post sends a message; transfer lists the buffers in it that change hands.
func (s *server) post(message map[string]any, transfer []any) {
	if transfer == nil {
		transfer = []any{}
	}
	s.host.Call("post", message, transfer)
}

// carryOut answers one call, whatever happens in it.
func (s *server) carryOut(message js.Value) {
	id := message.Get("id")
	defer func() {
		if fault := recover(); fault != nil {
			text := fmt.Sprint(fault)
			s.refuse(id, engine.Fail("", engine.CodeInternal,
				"This is a fault of the program, not of your input: the calculation stopped ("+text+"). Nothing you typed is lost."))
			s.post(map[string]any{"type": "panic", "message": text}, nil)
		}
	}()
	ctx := engine.WithProgress(context.Background(), func(share float64) {
		s.post(map[string]any{"type": "progress", "id": id, "share": share}, nil)
	})
	response, arrays, err := s.answer(ctx, message.Get("name").String(), []byte(message.Get("request").String()), blobsOf(message.Get("blobs")))
	if err != nil {
		s.refuse(id, err)
		return
	}
	list, buffers := sideArrays(arrays)
	s.post(map[string]any{"type": "result", "id": id, "response": string(response), "arrays": list}, buffers)
}

// refuse answers a call with what was wrong with it.
func (s *server) refuse(id js.Value, err error) {
	var refused *engine.Error
	if !errors.As(err, &refused) {
		refused = engine.Fail("", engine.CodeInternal, err.Error())
	}
	problems := make([]any, len(refused.Problems))
	for i, p := range refused.Problems {
		problems[i] = map[string]any{"field": p.Field, "code": string(p.Code), "message": p.Message, "offset": p.Offset}
	}
	s.post(map[string]any{"type": "refused", "id": id, "problems": problems}, nil)
}

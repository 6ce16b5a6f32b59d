//go:build js && wasm

package main

import (
	"context"
	"io"
	"reflect"
	"time"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

// databaseName contains the tool's name because every page opened from a disk
// shares one set of databases.
const databaseName = "hoopsheet"

// store answers the calls of engine.StoreCalls with what IndexedDB holds. Its
// musts:
//
//   - An answer to a call that writes means that the transaction has completed
//     with durability "strict".
//   - A working copy is written only by someone who has seen the last one:
//     stamps are compared inside the writing transaction.
//   - Nothing is overwritten or removed by an import, nor by anything else but
//     a save of the working copy, records.erase, taps.put and taps.delete.
//   - A failed call leaves everything as it was and says why in a sentence.
type store struct {
	base     *base
	handlers map[string]handler
	now      func() time.Time
	random   io.Reader
}

// handler is one call of the store.
type handler struct {
	request, result reflect.Type
	run             func(ctx context.Context, request []byte, blobs [][]byte) (any, error)
}

// handle makes a handler of a typed function.
func handle[Request, Result any](run func(*Request) (*Result, error)) handler {
	return handler{
		request: reflect.TypeFor[Request](),
		result:  reflect.TypeFor[Result](),
		run: func(_ context.Context, data []byte, blobs [][]byte) (any, error) {
			request := new(Request)
			if err := engine.Decode(data, blobs, request); err != nil {
				return nil, err
			}
			result, err := run(request)
			if err != nil {
				return nil, err
			}
			return result, nil
		},
	}
}

func newStore(name string, now func() time.Time, random io.Reader) *store {
	s := &store{base: newBase(name, schema), now: now, random: random}
	s.handlers = map[string]handler{
		"records.list":      handle(s.list),
		"records.create":    handle(s.create),
		"records.open":      handle(s.open),
		"records.save":      handle(s.save),
		"records.keep":      handle(s.keep),
		"records.revision":  handle(s.revision),
		"records.duplicate": handle(s.duplicate),
		"records.rename":    handle(s.rename),
		"records.delete":    handle(s.delete),
		"records.restore":   handle(s.restore),
		"records.erase":     handle(s.erase),
		"taps.put":          handle(s.putTap),
		"taps.list":         handle(s.listTaps),
		"taps.recording":    handle(s.recording),
		"taps.delete":       handle(s.deleteTap),
		"archive.export":    handle(s.export),
		"archive.import":    handle(s.importFile),
		"materials.list":    handle(s.materials),
		"materials.put":     handle(s.putMaterials),
		"settings.get":      handle(s.settings),
		"settings.put":      handle(s.putSettings),
	}
	return s
}

// answer carries out one call, as engine.CallBulk does for those of the engine.
func (s *store) answer(ctx context.Context, name string, request []byte, blobs [][]byte) ([]byte, []engine.Array, error) {
	h, known := s.handlers[name]
	if !known {
		return nil, nil, engine.Fail("call", engine.CodeUnknownCall, "The store has no call named \""+name+"\".")
	}
	result, err := h.run(ctx, request, blobs)
	if err != nil {
		return nil, nil, sentence(err)
	}
	arrays := engine.TakeArrays(result)
	response, err := engine.Encode(result)
	return response, arrays, err
}

// stampTime is the present time as it is stored.
func (s *store) stampTime() string { return diaphragm.FormatTime(s.now().Unix()) }

func (s *store) newID() (string, error) { return diaphragm.NewID(s.now(), s.random) }

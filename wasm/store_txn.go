//go:build js && wasm

package main

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"syscall/js"
	"time"

	"github.com/hack-pad/go-indexeddb/idb"
)

// txn is one transaction. Between its requests nothing may be waited for that
// comes from outside (a timer, a fetch, another channel): the browser would
// commit it. Computing is fine.
type txn struct{ t *idb.Transaction }

// runOn does work in one transaction and returns when it has completed. If the
// work returns an error or panics, the transaction is rolled back.
func runOn(c *connection, write bool, names []string, work func(*txn) error) error {
	t, finished, err := c.transaction(write, names)
	if err != nil {
		return err
	}
	type outcome struct {
		err   error
		fault any
	}
	done := make(chan outcome, 1)
	go func() {
		var o outcome
		defer func() {
			if o.fault = recover(); o.fault != nil {
				_ = t.Abort()
			}
			done <- o
		}()
		if o.err = work(&txn{t}); o.err == nil {
			o.err = <-finished
			return
		}
		// Abort fails where the error has ended the transaction already.
		_ = t.Abort()
		if cause := <-finished; is(o.err, "AbortError") && cause != nil {
			o.err = cause // the request only suffered from it
		}
	}()
	select {
	case o := <-done:
		if o.fault != nil {
			panic(o.fault)
		}
		return o.err
	case <-time.After(transactionLimit):
		// If it can still be rolled back, then nothing was saved, as we say.
		_ = t.Abort()
		return errSlow
	}
}

// transaction begins a transaction. finished gives nil when it has completed,
// and why when it was aborted.
//
// It is begun and listened to here, because go-indexeddb takes one that was
// aborted without an error for completed, and waits for ever for one that has
// ended before it listens.
func (c *connection) transaction(write bool, names []string) (_ *idb.Transaction, finished <-chan error, err error) {
	defer func() {
		fault := recover()
		if thrown, ok := fault.(js.Error); ok {
			err = thrown
		} else if fault != nil {
			panic(fault)
		}
	}()
	list := make([]any, len(names))
	for i, name := range names {
		list[i] = name
	}
	arguments := []any{list, "readonly"}
	if write {
		arguments = []any{list, "readwrite", map[string]any{"durability": "strict"}}
	}
	raw := c.raw.Call("transaction", arguments...)
	finished = c.endings.of(raw)
	// Let go-indexeddb find the transaction when it asks for one.
	c.raw.Set("transaction", returning(raw))
	t, err := c.db.Transaction(idb.TransactionReadOnly, names[0])
	c.raw.Delete("transaction")
	return t, finished, err
}

// returning is a JavaScript function that returns the given object.
func returning(object js.Value) js.Value {
	return js.Global().Get("Object").Get("prototype").Get("valueOf").Call("bind", object)
}

// endings tells how transactions ended, with one listener for all of them.
type endings struct {
	listener js.Func
	waiting  map[int]chan<- error
	last     int
}

// numbered is the property by which a transaction is known in waiting.
const numbered = "hoopsheetNumber"

func newEndings() *endings {
	e := &endings{waiting: map[int]chan<- error{}}
	e.listener = js.FuncOf(func(transaction js.Value, args []js.Value) any {
		number := transaction.Get(numbered).Int()
		e.waiting[number] <- ending(args[0].Get("type").String(), transaction.Get("error"))
		delete(e.waiting, number)
		return nil
	})
	return e
}

// of returns a channel that gets how the transaction ends.
func (e *endings) of(transaction js.Value) <-chan error {
	e.last++
	ended := make(chan error, 1)
	e.waiting[e.last] = ended
	transaction.Set(numbered, e.last)
	transaction.Call("addEventListener", "complete", e.listener)
	transaction.Call("addEventListener", "abort", e.listener)
	return ended
}

// ending is the error that an event of the end of a transaction stands for.
func ending(event string, fault js.Value) error {
	switch {
	case event == "complete":
		return nil
	case fault.Truthy():
		return js.Error{Value: fault}
	}
	return errAborted
}

// get reads one value; undefined where there is none.
func (t *txn) get(store string, key any) (js.Value, error) {
	s, err := t.t.ObjectStore(store)
	if err != nil {
		return js.Undefined(), err
	}
	request, err := s.Get(js.ValueOf(key))
	if err != nil {
		return js.Undefined(), err
	}
	return request.Await(context.Background())
}

// put writes one value.
func (t *txn) put(store string, key, value any) error {
	s, err := t.t.ObjectStore(store)
	if err != nil {
		return err
	}
	request, err := s.PutKey(js.ValueOf(key), js.ValueOf(value))
	if err != nil {
		return err
	}
	_, err = request.Await(context.Background())
	return err
}

// remove deletes one value; it is no error if there is none.
func (t *txn) remove(store string, key any) error {
	s, err := t.t.ObjectStore(store)
	if err != nil {
		return err
	}
	request, err := s.Delete(js.ValueOf(key))
	if err != nil {
		return err
	}
	return request.Await(context.Background())
}

// all reads every key and value of a store in the order of their keys, or
// those within a range.
func (t *txn) all(store string, within *idb.KeyRange) (list []entry, err error) {
	s, err := t.t.ObjectStore(store)
	if err != nil {
		return nil, err
	}
	var request *idb.CursorWithValueRequest
	if within == nil {
		request, err = s.OpenCursor(idb.CursorNext)
	} else {
		request, err = s.OpenCursorRange(within, idb.CursorNext)
	}
	if err != nil {
		return nil, err
	}
	return collect(request)
}

// indexed reads every key and value that an index lists under a key.
func (t *txn) indexed(store, index string, key any) ([]entry, error) {
	s, err := t.t.ObjectStore(store)
	if err != nil {
		return nil, err
	}
	i, err := s.Index(index)
	if err != nil {
		return nil, err
	}
	request, err := i.OpenCursorKey(js.ValueOf(key), idb.CursorNext)
	if err != nil {
		return nil, err
	}
	return collect(request)
}

// countIndexed counts the values that an index lists under a key.
func (t *txn) countIndexed(store, index string, key any) (int, error) {
	s, err := t.t.ObjectStore(store)
	if err != nil {
		return 0, err
	}
	i, err := s.Index(index)
	if err != nil {
		return 0, err
	}
	request, err := i.CountKey(js.ValueOf(key))
	if err != nil {
		return 0, err
	}
	n, err := request.Await(context.Background())
	return int(n), err
}

// entry is one value with its primary key.
type entry struct{ key, value js.Value }

func collect(request *idb.CursorWithValueRequest) ([]entry, error) {
	var list []entry
	err := request.Iter(context.Background(), func(c *idb.CursorWithValue) error {
		key, err := c.PrimaryKey()
		if err != nil {
			return err
		}
		value, err := c.Value()
		if err != nil {
			return err
		}
		list = append(list, entry{key, value})
		return nil
	})
	return list, err
}

// errAborted is the end of a transaction that was aborted without a cause.
var errAborted = errors.New("the transaction was aborted")

// errAbsent says that there is no value under a key.
var errAbsent = errors.New("there is no such value")

// getJSON reads a value that is JSON text; errAbsent where there is none.
func (t *txn) getJSON(store string, key, into any) error {
	value, err := t.get(store, key)
	if err != nil {
		return err
	}
	return fromText(value, into)
}

// putJSON writes a value as JSON text.
func (t *txn) putJSON(store string, key, value any) error {
	data, err := json.Marshal(value)
	if err != nil {
		return err
	}
	return t.put(store, key, string(data))
}

// fromText decodes JSON text that the database holds.
func fromText(value js.Value, into any) error {
	switch value.Type() {
	case js.TypeUndefined, js.TypeNull:
		return errAbsent
	case js.TypeString:
		return json.Unmarshal([]byte(value.String()), into)
	}
	return fmt.Errorf("the database holds a %s where text belongs", value.Type())
}

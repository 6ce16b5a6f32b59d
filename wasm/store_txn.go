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
func runOn(db *idb.Database, write bool, names []string, work func(*txn) error) error {
	options := idb.TransactionOptions{Mode: idb.TransactionReadOnly}
	if write {
		options = idb.TransactionOptions{Mode: idb.TransactionReadWrite, Durability: idb.DurabilityStrict}
	}
	t, err := db.TransactionWithOptions(options, names[0], names[1:]...)
	if err != nil {
		return err
	}
	// Await must listen before the transaction can finish, else it would wait
	// for ever; and it must have a context without an end, since it may not
	// answer at all when its context ends.
	finished := make(chan error, 1)
	go func() { finished <- t.Await(context.Background()) }()

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
		if o.err = work(&txn{t}); o.err != nil {
			// Fails where the error has ended the transaction already.
			if t.Abort() == nil {
				<-finished
			} else if cause := t.Err(); is(o.err, "AbortError") && cause != nil {
				o.err = cause // the request only suffered from it
			}
			return
		}
		o.err = <-finished
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

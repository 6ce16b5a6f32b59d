//go:build js && wasm && browser

package main

import (
	"errors"
	"strings"
	"syscall/js"
	"testing"

	"github.com/hack-pad/go-indexeddb/idb"

	"hoopsheet/core/engine"
)

// rawOpen opens the test's database without go-indexeddb, as another tab with
// another version of the tool would.
func rawOpen(t *testing.T, name string, version int) js.Value {
	t.Helper()
	request := js.Global().Get("indexedDB").Call("open", name, version)
	await(t, request, "success")
	return request.Get("result")
}

func code(err error) engine.Code {
	var own *engine.Error
	if errors.As(err, &own) {
		return own.Problems[0].Code
	}
	return ""
}

// A newer tab upgrades the database: the connection closes itself, and the
// next call says to reload.
func TestNewerVersionTakesOver(t *testing.T) {
	s := freshStore(t)
	o := createDemo(t, s, "")
	db := rawOpen(t, s.base.name, len(schema)+1) // waits until the store has let go
	refused(t, s, codeLost, "records.save", saveOf(o))
	db.Call("close")
}

// The connection is lost under the store: it is made again and the call is
// carried out.
func TestLostConnectionIsMadeAgain(t *testing.T) {
	s := freshStore(t)
	o := createDemo(t, s, "")
	closed := s.base.attempt
	if err := closed.connection.db.Close(); err != nil {
		t.Fatal(err)
	}
	ask[engine.Saved](t, s, "records.save", saveOf(o))
	if s.base.attempt == closed {
		t.Error("the old connection is still in use")
	}
}

// Somebody clears the site's data: the next call meets an empty database.
func TestDeletedDatabase(t *testing.T) {
	s := freshStore(t)
	o := createDemo(t, s, "")
	deleteDatabase(t, s.base.name)
	refused(t, s, codeNotFound, "records.save", saveOf(o))
	if list := ask[engine.RecordList](t, s, "records.list", struct{}{}); len(list.Records) != 0 {
		t.Errorf("the emptied database lists %d diaphragms", len(list.Records))
	}
}

// A tab of an older version does not let go: the call says so in a sentence,
// and the next one joins the waiting request and succeeds once it lets go.
func TestBlockedUpgrade(t *testing.T) {
	s := freshStore(t)
	createDemo(t, s, "Old")
	if err := s.base.attempt.connection.db.Close(); err != nil {
		t.Fatal(err)
	}
	old := rawOpen(t, s.base.name, len(schema))
	newer := newStore(s.base.name, clock(), random{})
	newer.base.steps = append(newer.base.steps[:len(schema):len(schema)], step{
		create: func(db *idb.Database) error {
			_, err := db.CreateObjectStore("next", idb.ObjectStoreOptions{})
			return err
		},
	})
	p := refused(t, newer, codeBusy, "records.list", struct{}{})
	if !strings.Contains(p.Message, "older version") {
		t.Errorf("the sentence does not say what is in the way: %s", p.Message)
	}
	waiting := newer.base.attempt
	old.Call("close")
	if list := ask[engine.RecordList](t, newer, "records.list", struct{}{}); len(list.Records) != 1 || list.Records[0].Name != "Old" {
		t.Errorf("after the upgrade: %+v", list)
	}
	if newer.base.attempt != waiting {
		t.Error("the second call made a request of its own")
	}
}

// A later schema creates a store, and fills rows in the transaction after it;
// a failing fill is tried again, a failing create leaves the old version.
func TestMigration(t *testing.T) {
	s := freshStore(t)
	id := createDemo(t, s, "Before").Document.ID
	next := func(create func(*idb.Database) error, fill func(*txn) error) *base {
		return newBase(s.base.name, append(schema[:len(schema):len(schema)], step{create, fill}))
	}
	makeStore := func(db *idb.Database) error {
		_, err := db.CreateObjectStore("names", idb.ObjectStoreOptions{})
		return err
	}

	failing := next(func(db *idb.Database) error {
		if err := makeStore(db); err != nil {
			return err
		}
		return errors.New("no")
	}, nil)
	if _, err := failing.database(); err == nil || err.Error() != "no" {
		t.Fatalf("the failed upgrade gave %v", err)
	}
	if list := ask[engine.RecordList](t, s, "records.list", struct{}{}); len(list.Records) != 1 {
		t.Fatalf("after a failed upgrade: %+v", list)
	}

	runs := 0
	migrating := next(makeStore, func(x *txn) error {
		runs++
		if err := x.put("names", id, "half done"); err != nil {
			return err
		}
		if runs == 1 {
			return errors.New("not yet")
		}
		r, err := x.readRecord(id)
		if err != nil {
			return err
		}
		return x.put("names", id, r.doc.Name)
	})
	if _, err := migrating.database(); err == nil {
		t.Fatal("the failing fill was not reported")
	}
	for range 2 {
		err := migrating.read([]string{"names"}, func(x *txn) error {
			value, err := x.get("names", id)
			if value.Type() != js.TypeString || value.String() != "Before" {
				t.Errorf("filled with %v", value)
			}
			return err
		})
		if err != nil {
			t.Fatal(err)
		}
	}
	if runs != 2 {
		t.Errorf("the fill ran %d times, once to fail and once to succeed are wanted", runs)
	}
	refused(t, s, codeLost, "records.list", struct{}{}) // the older tab is told to reload
}

// A panic inside a transaction rolls it back and comes out again.
func TestPanicRollsBack(t *testing.T) {
	s := freshStore(t)
	id := createDemo(t, s, "").Document.ID
	func() {
		defer func() {
			if recover() == nil {
				t.Error("the panic was swallowed")
			}
		}()
		_ = s.base.write([]string{inRecords}, func(x *txn) error {
			if err := x.remove(inRecords, id); err != nil {
				return err
			}
			panic("test")
		})
	}()
	ask[engine.OpenedRecord](t, s, "records.open", ref(id))
}

// An error after the first write leaves nothing of it.
func TestErrorRollsBack(t *testing.T) {
	s := freshStore(t)
	id := createDemo(t, s, "").Document.ID
	err := s.base.write([]string{inRecords}, func(x *txn) error {
		if err := x.remove(inRecords, id); err != nil {
			return err
		}
		return errAbsent
	})
	if !errors.Is(err, errAbsent) {
		t.Errorf("the error came out as %v", err)
	}
	ask[engine.OpenedRecord](t, s, "records.open", ref(id))
}

// A transaction that ends without an error of its own, but not by completing,
// is no success.
func TestAbortIsAnError(t *testing.T) {
	s := freshStore(t)
	id := createDemo(t, s, "").Document.ID
	err := s.base.write([]string{inRecords}, func(x *txn) error {
		if err := x.remove(inRecords, id); err != nil {
			return err
		}
		return x.t.Abort()
	})
	if err == nil {
		t.Error("an aborted transaction counts as completed")
	}
	ask[engine.OpenedRecord](t, s, "records.open", ref(id))
}

// withIndexedDB puts something else in the place of indexedDB.
func withIndexedDB(t *testing.T, descriptor map[string]any, work func()) {
	t.Helper()
	object, global := js.Global().Get("Object"), js.Global()
	own := object.Call("getOwnPropertyDescriptor", global, "indexedDB")
	descriptor["configurable"] = true
	object.Call("defineProperty", global, "indexedDB", descriptor)
	defer object.Call("defineProperty", global, "indexedDB", own)
	work()
}

// Private windows and sandboxed frames: indexedDB is missing, null, or throws.
func TestStorageRefused(t *testing.T) {
	for name, descriptor := range map[string]map[string]any{
		"missing":    {"value": js.Undefined()},
		"null":       {"value": js.Null()},
		"open fails": {"value": map[string]any{}},
		// A getter that throws: reading a prototype's accessor of the wrong
		// receiver is a TypeError, as in a frame without an origin.
		"getter throws": {"get": js.Global().Get("Object").Call("getOwnPropertyDescriptor",
			js.Global().Get("IDBRequest").Get("prototype"), "result").Get("get")},
	} {
		t.Run(name, func(t *testing.T) {
			s := newStore("test "+t.Name(), clock(), random{})
			withIndexedDB(t, descriptor, func() { refused(t, s, codeRefused, "records.list", struct{}{}) })
			// The next call tries again.
			deleteDatabase(t, s.base.name)
			ask[engine.RecordList](t, s, "records.list", struct{}{})
		})
	}
}

func TestSentences(t *testing.T) {
	for name, want := range map[string]engine.Code{
		"QuotaExceededError": codeFull, "SecurityError": codeRefused, "VersionError": codeLost,
		"InvalidStateError": codeLost, "UnknownError": codeLost, "DataError": codeFault,
	} {
		if got := code(sentence(idb.NewDOMException(name))); got != want {
			t.Errorf("%s gives %q, want %q", name, got, want)
		}
	}
}

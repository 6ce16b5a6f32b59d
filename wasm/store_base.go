//go:build js && wasm

package main

import (
	"context"
	"errors"
	"fmt"
	"syscall/js"
	"time"

	"github.com/hack-pad/go-indexeddb/idb"

	"hoopsheet/core/engine"
)

// Limits on waiting, generous for a slow tablet; without them a blocked or
// broken database would never answer.
const (
	openLimit = 15 * time.Second
	// Tabs of this tool let go as soon as they are asked to.
	blockedLimit     = 2 * time.Second
	transactionLimit = 30 * time.Second
)

// base is one connection to the database, made when first needed and made
// again when it is lost.
type base struct {
	name  string
	steps []step

	// attempt is the present connection or the attempt to make one. There is
	// one thread and no preemption: between two waits nobody else changes it.
	attempt *opening

	endings *endings
	blocked js.Func // listener of "blocked"; this is the request
	gone    js.Func // listener of "close" and "versionchange"; this is the database
}

// opening is an attempt to open the database. It outlives the call that began
// it: when the database is blocked, later calls join it, since only the first
// of several waiting requests is told that it is blocked.
type opening struct {
	request js.Value
	// blocked is closed when another connection is in the way.
	blocked chan struct{}
	// done is closed when connection or err is set.
	done       chan struct{}
	connection *connection
	err        error
}

// connection is an open database, as go-indexeddb and as JavaScript has it.
type connection struct {
	db      *idb.Database
	raw     js.Value
	endings *endings
}

func newBase(name string, steps []step) *base {
	b := &base{name: name, steps: steps, endings: newEndings()}
	b.blocked = js.FuncOf(func(this js.Value, _ []js.Value) any {
		if a := b.attempt; a != nil && a.request.Equal(this) {
			select {
			case <-a.blocked:
			default:
				close(a.blocked)
			}
		}
		return nil
	})
	b.gone = js.FuncOf(func(this js.Value, _ []js.Value) any {
		// go-indexeddb closes the connection on "versionchange" by itself.
		if a := b.attempt; a != nil && a.request.Get("result").Equal(this) {
			b.attempt = nil
		}
		return nil
	})
	return b
}

// database returns the open connection.
func (b *base) database() (*connection, error) {
	a := b.attempt
	if a == nil {
		var err error
		if a, err = b.begin(); err != nil {
			return nil, err
		}
		b.attempt = a
	}
	limit, blocked, because := time.After(openLimit), a.blocked, errSlow
	for {
		select {
		case <-a.done:
			if a.err != nil && b.attempt == a {
				b.attempt = nil // the next call tries anew
			}
			return a.connection, a.err
		case <-blocked:
			limit, blocked, because = time.After(blockedLimit), nil, errBlocked
		case <-limit:
			return nil, because
		}
	}
}

// begin asks for the database. The request is made here and not by
// go-indexeddb, which would hide "blocked" and the failure of an upgrade.
func (b *base) begin() (*opening, error) {
	request, err := openRequest(b.name, len(b.steps))
	if err != nil {
		return nil, err
	}
	a := &opening{request: request, blocked: make(chan struct{}), done: make(chan struct{})}
	request.Call("addEventListener", "blocked", b.blocked)
	factory, err := idb.WrapFactory(js.ValueOf(map[string]any{"open": returning(request)}))
	if err != nil {
		return nil, err
	}
	var upgradeFault error
	wrapped, err := factory.Open(context.Background(), b.name, uint(len(b.steps)), func(db *idb.Database, from, _ uint) error {
		// An error returned from here would end the program; aborting the
		// upgrade makes the request fail instead.
		if upgradeFault = b.upgrade(db, from); upgradeFault != nil {
			request.Get("transaction").Call("abort")
		}
		return nil
	})
	if err != nil {
		return nil, err
	}
	go func() {
		defer close(a.done)
		db, err := wrapped.Await(context.Background())
		switch {
		case upgradeFault != nil:
			a.err = upgradeFault
		case err != nil:
			a.err = err
		default:
			c := &connection{db: db, raw: request.Get("result"), endings: b.endings}
			c.raw.Call("addEventListener", "versionchange", b.gone)
			c.raw.Call("addEventListener", "close", b.gone)
			if a.err = b.fill(c); a.err != nil {
				_ = db.Close() // so that it is in nobody's way
				return
			}
			a.connection = c
		}
	}()
	return a, nil
}

// upgrade runs the create parts of the steps that the database lacks.
func (b *base) upgrade(db *idb.Database, from uint) (err error) {
	defer func() {
		if fault := recover(); fault != nil {
			err = fmt.Errorf("upgrade of the database: %v", fault)
		}
	}()
	for _, s := range b.steps[from:] {
		if err := s.create(db); err != nil {
			return err
		}
	}
	return nil
}

// fill runs the fill parts of the steps that have not been filled.
func (b *base) fill(c *connection) error {
	pending := false
	for _, s := range b.steps {
		pending = pending || s.fill != nil
	}
	if !pending {
		return nil
	}
	names, err := c.db.ObjectStoreNames()
	if err != nil {
		return err
	}
	return runOn(c, true, names, func(t *txn) error {
		filled := 0
		if value, err := t.get(inState, "filled"); err != nil {
			return err
		} else if value.Type() == js.TypeNumber {
			filled = value.Int()
		}
		for _, s := range b.steps[min(filled, len(b.steps)):] {
			if s.fill == nil {
				continue
			}
			if err := s.fill(t); err != nil {
				return err
			}
		}
		return t.put(inState, "filled", len(b.steps))
	})
}

// openRequest calls indexedDB.open, which in private windows and sandboxed
// frames is missing, null, or throws.
func openRequest(name string, version int) (request js.Value, err error) {
	defer func() {
		if fault := recover(); fault != nil {
			request, err = js.Value{}, errRefused
		}
	}()
	// A plain Get would not survive a getter that throws; a Call does.
	factory := js.Global().Get("Reflect").Call("get", js.Global(), "indexedDB")
	if !factory.Truthy() {
		return js.Value{}, errRefused
	}
	return factory.Call("open", name, version), nil
}

// run does work in one transaction over the named object stores, on a fresh
// connection if the old one turns out to be lost. The work may therefore be
// done twice, the first time without effect.
func (b *base) run(write bool, names []string, work func(*txn) error) error {
	for again := false; ; again = true {
		c, err := b.database()
		if err != nil {
			if again && connectionLost(err) {
				return errLost
			}
			return err
		}
		err = runOn(c, write, names, work)
		var own *engine.Error
		if err == nil || errors.As(err, &own) || !connectionLost(err) || again {
			return err
		}
		if b.attempt != nil && b.attempt.connection == c {
			b.attempt = nil
			_ = c.db.Close() // so that it is in nobody's way
		}
	}
}

func (b *base) read(names []string, work func(*txn) error) error  { return b.run(false, names, work) }
func (b *base) write(names []string, work func(*txn) error) error { return b.run(true, names, work) }

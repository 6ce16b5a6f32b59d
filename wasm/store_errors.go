//go:build js && wasm

package main

import (
	"errors"
	"syscall/js"

	"github.com/hack-pad/go-indexeddb/idb"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

// Codes of the store. Pages act on them (site/src/engine/answer.ts).
const (
	codeConflict  engine.Code = "conflict"
	codeNotFound  engine.Code = "not-found"
	codeDeleted   engine.Code = "deleted"
	codeUnread    engine.Code = "unread"
	codeUnchanged engine.Code = "unchanged"
	codeFull      engine.Code = "storage-full"
	codeRefused   engine.Code = "storage-refused"
	codeBusy      engine.Code = "storage-busy"
	codeLost      engine.Code = "storage-lost"
	codeFault     engine.Code = "storage-fault"
)

// Faults of the database that no DOMException stands for.
var (
	errRefused = engine.Fail("", codeRefused, "This browser keeps nothing here: the window is private, or storage is switched off for this site. You can go on working, but nothing is saved; hand over a file before you close the page.")
	errBlocked = engine.Fail("", codeBusy, "Another tab holds the records open in an older version of this tool. Close or reload the other tabs with this tool, then try again; nothing is lost meanwhile.")
	errSlow    = engine.Fail("", codeBusy, "The browser's storage does not answer. Try again; if it goes on, reload this tab.")
	errNewer   = engine.Fail("", codeLost, "A newer version of this tool has been opened in another tab and has taken over the records. Reload this tab to go on.")
	errLost    = engine.Fail("", codeLost, "The connection to the browser's storage was lost and could not be made again. Reload this tab; what was acknowledged as saved is safe.")
	errFull    = engine.Fail("", codeFull, "The storage of this browser is full, so this was not saved. Erase recordings or diaphragms that are no longer needed, or make room on the device, and try again.")
)

// sentence turns any error of the store into one that people can read.
func sentence(err error) error {
	var own *engine.Error
	if errors.As(err, &own) {
		return own
	}
	var refusal *diaphragm.Refusal
	if errors.As(err, &refusal) {
		return &engine.Error{Problems: refusal.Problems}
	}
	switch {
	case is(err, "QuotaExceededError"):
		return errFull
	case is(err, "SecurityError"):
		return errRefused
	case is(err, "VersionError"):
		return errNewer
	case connectionLost(err):
		return errLost
	}
	return engine.Fail("", codeFault, "The browser's storage failed, and this was not saved ("+err.Error()+"). Try again; if it goes on, reload this tab.")
}

// connectionLost reports whether a fresh connection may help: the old one was
// closed under us by an upgrade in another tab, by the person clearing site
// data, or by the browser (WebKit loses its storage process in the background
// and says UnknownError).
func connectionLost(err error) bool {
	return is(err, "InvalidStateError") || is(err, "UnknownError") || is(err, "AbortError")
}

// is reports whether err is the DOMException of that name. What a method
// threw comes from go-indexeddb as it was thrown, what a request failed with
// as a DOMException.
func is(err error, name string) bool {
	var thrown js.Error
	if errors.As(err, &thrown) {
		return thrown.Value.Get("name").String() == name
	}
	return errors.Is(err, idb.NewDOMException(name))
}

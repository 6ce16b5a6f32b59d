//go:build js && wasm

package main

import (
	"syscall/js"

	"github.com/hack-pad/go-indexeddb/idb"
)

// Object stores. Rows are JSON text except where noted; keys stand outside.
const (
	// inRecords: diaphragm id -> recordRow.
	inRecords = "records"
	// inRevisions: [diaphragm id, number] -> revisionRow.
	inRevisions = "revisions"
	// inTaps: tap id -> {diaphragm, session}, an object, so that the index
	// byDiaphragm finds the taps of a diaphragm; session is JSON text.
	inTaps = "taps"
	// inRecordings: tap id -> Uint8Array, the file as it came.
	inRecordings = "recordings"
	// inSettings: "settings" -> engine.Settings, "materials" -> engine.OwnMaterials.
	inSettings = "settings"
)

// byDiaphragm is the index of inTaps.
const byDiaphragm = "diaphragm"

// step leads the database from the version before it to its own version.
type step struct {
	// create makes and drops object stores and indexes. It runs inside the
	// upgrade, where nothing may be waited for and no row can be reached.
	create func(db *idb.Database) error
	// fill changes rows, in an ordinary transaction over every object store
	// after the upgrade; nil where there is nothing to change. It must bear
	// being run again, because a tab may be closed before it completes.
	fill func(t *txn) error
}

// schema lists the steps from an empty database to the present one; the
// version of the database is their number.
var schema = []step{
	{create: createFirst},
}

func createFirst(db *idb.Database) error {
	for _, name := range []string{inRecords, inRevisions, inRecordings, inSettings, inState} {
		if _, err := db.CreateObjectStore(name, idb.ObjectStoreOptions{}); err != nil {
			return err
		}
	}
	taps, err := db.CreateObjectStore(inTaps, idb.ObjectStoreOptions{})
	if err != nil {
		return err
	}
	_, err = taps.CreateIndex(byDiaphragm, js.ValueOf("diaphragm"), idb.IndexOptions{})
	return err
}

// inState: "filled" -> the number of steps whose fill has completed. Kept in
// the database because the upgrade and the fill are two transactions.
const inState = "state"

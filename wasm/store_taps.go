//go:build js && wasm

package main

import (
	"cmp"
	"encoding/json"
	"errors"
	"slices"
	"syscall/js"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/engine"
)

// tapOf reads a tap session out of a value of inTaps.
func tapOf(value js.Value) (diaphragm.TapSession, error) {
	var session diaphragm.TapSession
	if value.Type() != js.TypeObject {
		return session, errAbsent
	}
	err := fromText(value.Get("session"), &session)
	return session, err
}

func (t *txn) writeTap(session diaphragm.TapSession) error {
	if session.Peaks == nil {
		session.Peaks = []diaphragm.ChosenPeak{}
	}
	text, err := json.Marshal(session)
	if err != nil {
		return err
	}
	return t.put(inTaps, session.ID, map[string]any{"diaphragm": session.Diaphragm, "session": string(text)})
}

func (t *txn) readTap(id string) (diaphragm.TapSession, error) {
	value, err := t.get(inTaps, id)
	if err != nil {
		return diaphragm.TapSession{}, err
	}
	session, err := tapOf(value)
	if errors.Is(err, errAbsent) {
		return session, engine.Fail("id", codeNotFound, "There is no such tap in this browser.")
	}
	return session, err
}

// readRecording reads the file kept with a tap; nil where there is none.
func (t *txn) readRecording(id string) ([]byte, error) {
	value, err := t.get(inRecordings, id)
	if err != nil || value.Type() != js.TypeObject {
		return nil, err
	}
	return bytesOf(value), nil
}

// tapsOf reads the sessions of a diaphragm, newest first.
func (t *txn) tapsOf(id string) ([]diaphragm.TapSession, error) {
	entries, err := t.indexed(inTaps, byDiaphragm, id)
	if err != nil {
		return nil, err
	}
	sessions := make([]diaphragm.TapSession, len(entries))
	for i, e := range entries {
		if sessions[i], err = tapOf(e.value); err != nil {
			return nil, err
		}
	}
	slices.SortFunc(sessions, func(a, b diaphragm.TapSession) int {
		return cmp.Or(cmp.Compare(b.Taken, a.Taken), cmp.Compare(b.ID, a.ID))
	})
	return sessions, nil
}

// putTap keeps a new session, or changes one. A changed session that still
// names its recording keeps it without sending it again.
func (s *store) putTap(request *engine.TapPutRequest) (*engine.TapRef, error) {
	session := request.Session
	if session.ID == "" {
		id, err := s.newID()
		if err != nil {
			return nil, err
		}
		session.ID = id
	}
	if session.Taken == "" {
		session.Taken = s.stampTime()
	}
	err := s.base.write([]string{inRecords, inTaps, inRecordings}, func(t *txn) error {
		if _, err := t.liveRecord(session.Diaphragm); err != nil {
			return err
		}
		switch {
		case len(request.Recording.Bytes) > 0:
			if err := t.put(inRecordings, session.ID, arrayOf(request.Recording.Bytes)); err != nil {
				return err
			}
		case session.RecordingName == "":
			if err := t.remove(inRecordings, session.ID); err != nil {
				return err
			}
		}
		return t.writeTap(session)
	})
	return &engine.TapRef{ID: session.ID}, err
}

func (s *store) listTaps(request *engine.RecordRef) (*engine.TapList, error) {
	var list engine.TapList
	err := s.base.read([]string{inTaps}, func(t *txn) (err error) {
		list.Sessions, err = t.tapsOf(request.ID)
		return err
	})
	return &list, err
}

func (s *store) recording(request *engine.TapRef) (*engine.TapRecording, error) {
	var result *engine.TapRecording
	err := s.base.read([]string{inTaps, inRecordings}, func(t *txn) (err error) {
		result, err = t.wholeTap(request.ID)
		return err
	})
	return result, err
}

func (s *store) deleteTap(request *engine.TapRef) (*engine.TapRecording, error) {
	var result *engine.TapRecording
	err := s.base.write([]string{inTaps, inRecordings}, func(t *txn) (err error) {
		if result, err = t.wholeTap(request.ID); err != nil {
			return err
		}
		if err := t.remove(inRecordings, request.ID); err != nil {
			return err
		}
		return t.remove(inTaps, request.ID)
	})
	return result, err
}

// wholeTap is a session with its recording.
func (t *txn) wholeTap(id string) (*engine.TapRecording, error) {
	session, err := t.readTap(id)
	if err != nil {
		return nil, err
	}
	data, err := t.readRecording(id)
	return &engine.TapRecording{Session: session, Recording: engine.Blob{Bytes: data}}, err
}

//go:build js && wasm

package main

import (
	"errors"
	"slices"
	"strings"

	"hoopsheet/core/engine"
	"hoopsheet/core/quantity"
)

// settingsKey is the one key of inSettings.
const settingsKey = "settings"

// firstSettings are those of a browser in which none have been made.
var firstSettings = engine.Settings{Units: quantity.SI}

func (t *txn) readSettings() (engine.Settings, bool, error) {
	settings := firstSettings
	err := t.getJSON(inSettings, settingsKey, &settings)
	if errors.Is(err, errAbsent) {
		return settings, false, nil
	}
	return settings, true, err
}

func (s *store) settings(*engine.NoRequest) (*engine.Settings, error) {
	var settings engine.Settings
	err := s.base.read([]string{inSettings}, func(t *txn) (err error) {
		settings, _, err = t.readSettings()
		return err
	})
	return &settings, err
}

func (s *store) putSettings(request *engine.Settings) (*engine.Done, error) {
	if !slices.Contains(quantity.Systems(), request.Units) {
		return nil, engine.Fail("units", engine.CodeRequest, "The units are either \"si\" or \"inch-pound\".")
	}
	settings := *request
	settings.Chosen = true
	settings.LinkAddress = strings.TrimSpace(settings.LinkAddress)
	settings.By = strings.TrimSpace(settings.By)
	err := s.base.write([]string{inSettings}, func(t *txn) error { return t.putJSON(inSettings, settingsKey, settings) })
	return &engine.Done{}, err
}

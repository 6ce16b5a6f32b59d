package engine

import (
	"context"

	"hoopsheet/core/diaphragm"
)

// demoID and demoCreated stand in the document that the call "demo" gives; the
// store gives every diaphragm that it makes an id and a time of its own.
const (
	demoID      = "00000000000000000000000000"
	demoCreated = "2026-01-01T00:00:00Z"
)

func runAbout(context.Context, *NoRequest) (*About, error) {
	about := &About{Version: Version, Schema: diaphragm.Schema}
	for _, info := range Calls() {
		about.Calls = append(about.Calls, CallLine{Name: info.Name, Summary: info.Summary})
	}
	return about, nil
}

func runDemo(context.Context, *NoRequest) (*DemoResult, error) {
	return &DemoResult{Document: diaphragm.Demo(demoID, demoCreated)}, nil
}

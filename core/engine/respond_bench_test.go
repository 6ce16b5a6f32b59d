package engine

import (
	"context"
	"testing"

	"hoopsheet/core/response"
)

// benchRespond is the demonstration at the page's own setting.
func benchRespond() *RespondRequest {
	return &RespondRequest{
		Document:     demoDocument(),
		Displacement: response.Shape{Kind: response.ShapeBump, Peak: 5e-4, Radius: 0.3, Angle: 1, Width: 0.4},
		Velocity:     response.Shape{Kind: response.ShapePatch, Peak: 0.1, Radius: 0.5, Angle: 2, Width: 0.2},
		Orders:       16, Circles: 16, Frames: 160, Radii: 41, Angles: 80,
		Points: []response.Point{{}, {Radius: 0.5, Angle: 1}},
	}
}

// BenchmarkRespondDragging changes a shape only.
func BenchmarkRespondDragging(b *testing.B) {
	request := benchRespond()
	for b.Loop() {
		request.Displacement.Angle += 0.01
		if _, err := runRespond(context.Background(), request); err != nil {
			b.Fatal(err)
		}
	}
}

// BenchmarkRespondTyping changes the tension, so the modes are solved anew.
func BenchmarkRespondTyping(b *testing.B) {
	request := benchRespond()
	for b.Loop() {
		request.Document.Tension.Nominal += 0.01
		if _, err := runRespond(context.Background(), request); err != nil {
			b.Fatal(err)
		}
	}
}

package engine

import (
	"context"
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
)

// TestCompare: against itself nothing differs; a sheet in vacuum under 1.21 times the tension rings 1.1 times as high
// (frequency goes with the root of the tension) and leaves the line it hit; what differs is listed.
func TestCompare(t *testing.T) {
	now := diaphragm.Demo("01HZX3J6D8Q0V5T2K7N9B4M1RC", "2026-01-02T03:04:05Z")
	now.Faces.Upper.Kind, now.Faces.Lower.Kind = diaphragm.FaceVacuum, diaphragm.FaceVacuum
	now.Sheet.E = 1e4 // next to no bending stiffness
	same, err := runCompare(context.Background(), &CompareRequest{Document: now, Other: now, Count: 12})
	if err != nil {
		t.Fatal(err)
	}
	if len(same.Lines) != 0 || same.Changed != 0 || len(same.Modes) != 12 {
		t.Errorf("against itself: %+v", same)
	}
	for _, mode := range same.Modes {
		if math.Abs(mode.Relative) > 1e-12 || mode.Differs { // lists of other lengths round otherwise
			t.Errorf("against itself: %+v", mode)
		}
	}
	first := same.Modes[0].Frequency
	now.Avoid.Lowest = 0
	now.Avoid.Lines = []diaphragm.Line{{Name: "shaft", Frequency: first, HalfWidth: 0.02}}
	tighter := now
	tighter.Tension.Nominal *= 1.21
	got, err := runCompare(context.Background(), &CompareRequest{Document: tighter, Other: now, Count: 12})
	if err != nil {
		t.Fatal(err)
	}
	for _, mode := range got.Modes {
		if math.Abs(mode.Relative-0.1) > 1e-6 { // the stiffness left is 1e-10 of the tension's
			t.Errorf("(%d,%d): %v, want 0.1", mode.M, mode.N, mode.Relative)
		}
	}
	if !got.Modes[0].Differs || got.Modes[0].OtherVerdict != "hit: shaft" || got.Modes[0].Verdict != "clear: shaft" {
		t.Errorf("verdict: %+v", got.Modes[0])
	}
	if len(got.Lines) != 1 || got.Lines[0].Unit != "N/m" || got.Lines[0].Now == got.Lines[0].Other {
		t.Errorf("lines: %+v", got.Lines)
	}
	if _, err := runCompare(context.Background(), &CompareRequest{Document: now, Other: now, Count: 0}); err == nil {
		t.Error("no modes are compared without an error")
	}
}

package engine

import (
	"context"
	"math"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
)

func unevenDocument() diaphragm.Diaphragm {
	doc := demoDocument()
	doc.Tension.Harmonics = []diaphragm.Harmonic{{Order: 2, Epsilon: 0.1, Angle: 0.4}}
	doc.Attached.Patches = []diaphragm.Patch{{Name: "target", Radius: 0.3, Angle: 1, Size: 0.02, Mass: 0.004}}
	return doc
}

// A k = 2 harmonic of a sliding rim splits (1,1) by eps 3/6 of its frequency's
// square at first order, dry: (4m - 1)/(2 (4m^2 - 1)) eps with m = 1, so the
// split of frequencies is half of eps; second order is of the size eps^2.
func TestUnevenTensionSplitsThePair(t *testing.T) {
	doc := unevenDocument()
	doc.Attached = diaphragm.Attached{}
	doc.Faces = diaphragm.Faces{Upper: diaphragm.Face{Kind: diaphragm.FaceVacuum}, Lower: diaphragm.Face{Kind: diaphragm.FaceVacuum}}
	result, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 12})
	if err != nil {
		t.Fatal(err)
	}
	var split float64
	pair := 0
	for _, mode := range result.Modes {
		if mode.M == 1 && mode.N == 1 {
			pair++
			split = mode.Split
		}
	}
	if want := 0.1 * 3 / 6.0; pair != 2 || math.Abs(split-want) > 0.1*0.1 {
		t.Errorf("%d modes (1,1), split %v, want 2 and about %v", pair, split, want)
	}
	even, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 12, Without: []Effect{EffectUnevenness}})
	if err != nil {
		t.Fatal(err)
	}
	if len(even.Cautions) != 1 || even.Modes[1].Split != 0 {
		t.Errorf("without unevenness: %q, split %v", even.Cautions, even.Modes[1].Split)
	}
}

// A mass lowers every frequency, by Rayleigh's principle, in the table, the
// costs and the drawing alike; and a hub is said to be left out.
func TestAttachedMassInTableCostsAndDrawing(t *testing.T) {
	doc := unevenDocument()
	doc.Tension.Harmonics = nil
	with, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 8})
	if err != nil {
		t.Fatal(err)
	}
	for _, mode := range with.Modes {
		if mode.Frequency > mode.Even*(1+1e-9) {
			t.Errorf("(%d,%d) with a mass %v, without %v", mode.M, mode.N, mode.Frequency, mode.Even)
		}
	}
	costs, err := runCosts(context.Background(), &CostsRequest{Document: doc, M: 0, N: 1})
	if err != nil {
		t.Fatal(err)
	}
	last := costs.Steps[len(costs.Steps)-1]
	if last.Name != "+ attached masses" || last.Frequency != with.Modes[0].Frequency || last.Change >= 0 {
		t.Errorf("last step %+v, table %v", last, with.Modes[0].Frequency)
	}
	shape, err := runShape(context.Background(), &ShapeRequest{Document: &doc, M: 0, N: 1, Size: 32, SectionPoints: 9})
	if err != nil {
		t.Fatal(err)
	}
	largest := 0.0
	for _, v := range shape.Raster {
		if f := math.Abs(float64(v)); f > largest {
			largest = f
		}
	}
	// One to 1 %, and the raster's pixels miss the top by little.
	if math.Abs(largest-1) > 0.05 {
		t.Errorf("largest value of the drawing %v", largest)
	}
	doc.Ring.HubRadius = 0.05
	hub, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 3})
	if err != nil {
		t.Fatal(err)
	}
	if len(hub.Cautions) != 1 || !strings.Contains(hub.Cautions[0], "hub") {
		t.Errorf("cautions with a hub: %q", hub.Cautions)
	}
}

// Tension that would wrinkle the sheet is refused at its field.
func TestWrinklingIsRefused(t *testing.T) {
	doc := unevenDocument()
	// Across the warp 1 - 0.6 is left of the mean, and the harmonic takes 0.5.
	doc.Tension.WeftRatio = 0.25
	doc.Tension.WarpAngle = doc.Tension.Harmonics[0].Angle
	doc.Tension.Harmonics[0].Epsilon = 0.5
	_, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 3})
	if p := refusal(t, err); p[0].Field != "tension.harmonics" || !strings.Contains(p[0].Message, "wrinkles") {
		t.Errorf("%v", p)
	}
}

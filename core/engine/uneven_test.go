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

// The weight of an upright sheet is bounded by its own: rim to rim along the
// vertical it adds sigma g times a diameter, so the largest and the smallest
// tension differ by about that over T. By the closed field of OwnWeight the
// radial tension at the rim is T -+ 2 sigma g a/(3 - nu).
func TestUprightSheetHangs(t *testing.T) {
	doc := demoDocument()
	doc.Sheet.MeasuredArealDensity, doc.Tension.Nominal = 8, 200
	doc.Tension.Upright = true
	result, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 4})
	if err != nil {
		t.Fatal(err)
	}
	pull := 8 * 9.80665 * doc.Ring.Radius // standard gravity
	want := 2 * pull / (3 - doc.Sheet.Nu)
	if got := 200 - result.Smallest.Tension; math.Abs(got/want-1) > 1e-6 || math.Abs(math.Sin(result.Smallest.Angle)+1) > 1e-6 {
		t.Errorf("the smallest tension is %v below the mean, want %v, at %v rad", got, want, result.Smallest.Angle)
	}
	if got := result.Largest.Tension - 200; math.Abs(got/want-1) > 1e-6 {
		t.Errorf("the largest is %v above the mean, want %v", got, want)
	}
}

// A sheet on a hub: (m, n) of the annulus, the ideal sheet.
func TestHubIsListedAndDrawn(t *testing.T) {
	doc := demoDocument()
	doc.Ring.HubRadius = doc.Ring.Radius / 2
	result, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 6})
	if err != nil {
		t.Fatal(err)
	}
	// Roots of J_0(x) Y_0(x/2) = J_0(x/2) Y_0(x): 6.2461 (Abramowitz & Stegun,
	// Table 9.7: lambda = 2, first root 3.1230 in units of the smaller radius).
	wave := math.Sqrt(doc.Tension.Nominal / doc.Sheet.ArealDensity())
	want := 2 * 3.1230 * wave / (2 * math.Pi * doc.Ring.Radius)
	if f := result.Modes[0].Frequency; math.Abs(f/want-1) > 0.00005/3.1230 {
		t.Errorf("f(0,1) = %v, want %v", f, want)
	}
	if len(result.Applies) != 0 || len(result.Cautions) != 1 || !strings.Contains(result.Cautions[0], "bending stiffness, the fluid") {
		t.Errorf("applies %v, cautions %q", result.Applies, result.Cautions)
	}
	shape, err := runShape(context.Background(), &ShapeRequest{Document: &doc, M: 0, N: 1, Size: 65, SectionPoints: 9})
	if err != nil {
		t.Fatal(err)
	}
	if shape.Hub != 0.5 || shape.Raster[32*65+32] != 0 || len(shape.Lobes) != 1 {
		t.Errorf("hub %v, centre %v, lobes %v", shape.Hub, shape.Raster[32*65+32], shape.Lobes)
	}
	costs, err := runCosts(context.Background(), &CostsRequest{Document: doc, M: 0, N: 1})
	if err != nil {
		t.Fatal(err)
	}
	for _, s := range costs.Sensitivities {
		if s.Field == "tension.nominal" && math.Abs(s.PerPercent-0.5) > 1e-6 {
			t.Errorf("tension: %v", s.PerPercent)
		}
	}
	if len(costs.Steps) != 1 || math.Abs(costs.Steps[0].Frequency/want-1) > 0.00005/3.1230 {
		t.Errorf("steps %v", costs.Steps)
	}
}

// Sensitivities of a coupled mode: d ln f/d ln of the mass is negative and, for a
// light patch, minus half its share of the kinetic energy (Rayleigh); tension
// has the share of a half that radius and densities leave.
func TestCoupledSensitivities(t *testing.T) {
	doc := unevenDocument()
	doc.Faces = diaphragm.Faces{Upper: diaphragm.Face{Kind: diaphragm.FaceVacuum}, Lower: diaphragm.Face{Kind: diaphragm.FaceVacuum}}
	doc.Sheet.E = 1e4 // no stiffness to speak of
	doc.Tension.Harmonics = nil
	doc.Attached.Patches[0].Radius, doc.Attached.Patches[0].Mass = 0, 1e-5
	costs, err := runCosts(context.Background(), &CostsRequest{Document: doc, M: 0, N: 1})
	if err != nil {
		t.Fatal(err)
	}
	sheet := doc.Sheet.ArealDensity() * math.Pi * doc.Ring.Radius * doc.Ring.Radius
	want := map[string]float64{
		"tension.nominal": 0.5,
		// The mean of the square of J_0(j_01 r) over the disc is J_1(j_01)^2,
		// J_1(j_01) = 0.519147 (Abramowitz & Stegun, Table 9.5), and 1 in the middle.
		"attached.patches.0.mass": -0.5 * doc.Attached.Patches[0].Mass / sheet / (0.519147 * 0.519147),
	}
	found := 0
	for _, s := range costs.Sensitivities {
		if w, ok := want[s.Field]; ok {
			found++
			// Of second order in the mass's share of 2e-4, and over the patch the
			// shape falls by j^2 s^2/4 = 0.3 % at its radius over a of 0.044.
			if math.Abs(s.PerPercent-w) > 0.01*math.Abs(w) {
				t.Errorf("%s: %v, want %v", s.Field, s.PerPercent, w)
			}
		}
	}
	if found != 2 {
		t.Errorf("%d of 2 are listed: %+v", found, costs.Sensitivities)
	}
}

// Where nothing is stated of the radiation of an even mode, nothing is of the
// coupled one that goes on from it.
func TestRadiationOfCoupledModes(t *testing.T) {
	doc := unevenDocument()
	doc.Tension.Nominal = 2e5 // sound waves as short as the ring is wide
	both := map[bool]int{}
	for _, without := range [][]Effect{nil, {EffectMasses, EffectUnevenness}} {
		result, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 40, Without: without})
		if err != nil {
			t.Fatal(err)
		}
		known := 0
		for _, mode := range result.Modes {
			if mode.Damping.RadiationKnown {
				known++
			}
		}
		if known == 0 || known == len(result.Modes) {
			t.Errorf("without %v: radiation of %d of %d is known", without, known, len(result.Modes))
		}
		both[without == nil] = known
	}
	if both[true] < both[false] {
		t.Errorf("known of %d coupled modes, of %d even ones and pairs", both[true], both[false])
	}
}

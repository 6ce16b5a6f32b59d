package engine

import (
	"context"
	"math"
	"slices"
	"testing"

	"hoopsheet/core/modes"
	"hoopsheet/core/tap"
)

// coupledAt are the modes of a document at another tension, all coupled at that
// tension itself.
func coupledAt(t *testing.T, tension float64) []modes.CoupledMode {
	t.Helper()
	doc := unevenDocument()
	doc.Tension.Nominal = tension
	real, err := realOf(&doc)
	if err != nil {
		t.Fatal(err)
	}
	uneven, _ := unevenOf(&doc, nil)
	coupled, _, _, err := solveCoupled(real, modes.AllEffects(), uneven)
	if err != nil {
		t.Fatal(err)
	}
	return coupled.Modes
}

// The modes that a tap is read by, from ratios at three tensions, against those
// coupled at the tension itself with more orders.
func TestTapRatiosAgainstFull(t *testing.T) {
	doc := unevenDocument()
	real, err := realOf(&doc)
	if err != nil {
		t.Fatal(err)
	}
	uneven, _ := unevenOf(&doc, nil)
	ratios, err := tapRatios(real, modes.AllEffects(), uneven, 4, 2)
	if err != nil {
		t.Fatal(err)
	}
	if r := ratios.find(0, 1); !(r.doubt > 0 && r.doubt < 1e-3) {
		t.Fatalf("the ratio of (0,1) is stated to err by %v", r.doubt)
	}
	solve := ratios.couple(tapSolver(real, modes.AllEffects()))
	for _, factor := range []float64{0.7, 1, 1.4} {
		list, complete, err := solve(factor*real.Tension, tap.Want{MaxM: 4, MaxN: 2})
		if err != nil {
			t.Fatal(err)
		}
		if !(complete > 0) {
			t.Fatalf("complete up to %v", complete)
		}
		full := coupledAt(t, factor*real.Tension)
		pairs := 0
		for _, f := range list {
			if f.M > 3 || f.N > 1 { // the truncation of the smaller set reaches those beyond
				continue
			}
			i := slices.IndexFunc(full, func(m modes.CoupledMode) bool { return m.M == f.M && m.N == f.N && m.Upper == f.Upper })
			if f.Upper {
				pairs++
			}
			// Its own statement, and the change from fewer orders: the harmonic's
			// amplitude to the power of the two orders taken along beyond.
			if d := math.Abs(f.Frequency/full[i].Frequency - 1); d > f.Error+0.1*0.1*0.1 {
				t.Errorf("T times %v, (%d,%d): off by %v, stated %v", factor, f.M, f.N, d, f.Error)
			}
		}
		if pairs == 0 {
			t.Errorf("T times %v: no pair is listed apart", factor)
		}
	}
}

// Peaks at the coupled modes of a diaphragm 15 % slacker than specified are read
// as that tension, both peaks of a split pair as themselves.
func TestTapOfUnevenDiaphragm(t *testing.T) {
	doc := unevenDocument()
	want := 0.85 * doc.Tension.Nominal
	request := &TapRequest{Document: doc}
	for _, mode := range coupledAt(t, want)[:8] {
		request.Peaks = append(request.Peaks, tap.Peak{Frequency: mode.Frequency, Uncertainty: mode.Frequency * 1e-3, Use: true})
	}
	result, err := runTap(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	// The ratios err by some 1e-3, which is twice that of tension.
	if r := result.Readings[0]; !result.Chosen || math.Abs(r.Tension/want-1) > 4e-3 || len(r.Matches) != 8 {
		t.Errorf("read %v N/m, want %v; %d matches, odds %v", r.Tension, want, len(r.Matches), r.Odds)
	}
	uppers := 0
	for _, m := range result.Readings[0].Matches {
		if m.Upper {
			uppers++
		}
	}
	if uppers == 0 {
		t.Error("no peak is read as the upper of a pair")
	}
	if len(result.Cautions) > 0 && len(tapCautions(&doc, nil)) > 0 {
		t.Errorf("cautions %q", tapCautions(&doc, nil))
	}
	// Pinned to the names alone, the same: two peaks to a pair.
	for _, m := range result.Readings[0].Matches {
		request.Peaks[m.Peak].M, request.Peaks[m.Peak].N = m.M, m.N
	}
	pinned, err := runTap(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	if a, b := pinned.Readings[0].Tension, result.Readings[0].Tension; math.Abs(a/b-1) > 1e-9 {
		t.Errorf("pinned %v, free %v", a, b)
	}
	// Read as even, the same peaks give another tension.
	request.Without = []Effect{EffectMasses, EffectUnevenness}
	for i := range request.Peaks {
		request.Peaks[i].M, request.Peaks[i].N = 0, 0
	}
	even, err := runTap(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	if d := math.Abs(even.Readings[0].Tension/want - 1); d < 5e-3 {
		t.Errorf("as even the tension is off by %v only", d)
	}
}

package engine

import (
	"context"
	"errors"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/tap"
)

func tapDemo() diaphragm.Diaphragm {
	return diaphragm.Demo("01JZZZZZZZZZZZZZZZZZZZZZZZ", "2026-05-04T09:00:00Z")
}

// peaksOfModes are the frequencies of a document at a tension, as the call for
// modes gives them, with the modes themselves.
func peaksOfModes(t *testing.T, doc diaphragm.Diaphragm, tension float64, count int, without ...Effect) (peaks []tap.Peak, names []tap.ModeName) {
	t.Helper()
	doc.Tension.Nominal = tension
	table, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: count, Without: without})
	if err != nil {
		t.Fatal(err)
	}
	for _, mode := range table.Modes {
		peaks = append(peaks, tap.Peak{Frequency: mode.Frequency, Uncertainty: 1e-4 * mode.Frequency, Use: true})
		names = append(names, tap.ModeName{M: mode.M, N: mode.N})
	}
	return peaks, names
}

func readTap(t *testing.T, request *TapRequest) *TapResult {
	t.Helper()
	result, err := runTap(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	return result
}

// TestTapReadsTheRealDiaphragm hands the frequencies of the mode table, at a
// tension of its own, to the reading, for every kind of face and with effects
// left out on both sides alike. The tension comes back within the 2e-6 of the
// reading (package tap).
func TestTapReadsTheRealDiaphragm(t *testing.T) {
	for _, row := range []struct {
		name    string
		change  func(doc *diaphragm.Diaphragm)
		without []Effect
	}{
		{"baffled", func(*diaphragm.Diaphragm) {}, nil},
		{"open", func(doc *diaphragm.Diaphragm) {
			doc.Faces.Upper.Kind, doc.Faces.Lower.Kind = diaphragm.FaceOpen, diaphragm.FaceOpen
		}, nil},
		{"helium below", func(doc *diaphragm.Diaphragm) { doc.Faces.Lower.Fluid = "helium" }, nil},
		{"vacuum", func(doc *diaphragm.Diaphragm) {
			doc.Faces.Upper.Kind, doc.Faces.Lower.Kind = diaphragm.FaceVacuum, diaphragm.FaceVacuum
		}, nil},
		{"without sound", func(*diaphragm.Diaphragm) {}, []Effect{EffectSound}},
		{"fluid only", func(*diaphragm.Diaphragm) {}, []Effect{EffectSound, EffectStiffness, EffectCavity}},
		{"ideal", func(*diaphragm.Diaphragm) {}, AllEffects()},
	} {
		doc := tapDemo()
		row.change(&doc)
		peaks, names := peaksOfModes(t, doc, 287, 7, row.without...)
		result := readTap(t, &TapRequest{Document: doc, Peaks: peaks, Without: row.without})
		if !result.Chosen || len(result.Readings) == 0 {
			t.Errorf("%s: not chosen: %s", row.name, result.Reason)
			continue
		}
		best := result.Readings[0]
		if math.Abs(best.Tension/287-1) > 2e-6 || len(best.Matches) != len(names) {
			t.Errorf("%s: read as %.8g N/m with %d modes", row.name, best.Tension, len(best.Matches))
		}
		for _, m := range best.Matches {
			if names[m.Peak] != (tap.ModeName{M: m.M, N: m.N}) {
				t.Errorf("%s: peak %d is %v, read as (%d, %d)", row.name, m.Peak, names[m.Peak], m.M, m.N)
			}
		}
	}
}

// TestTapIdealBeside: for the demonstration the air weighs several times the
// film, so that the ideal sheet reads a fraction of the tension.
func TestTapIdealBeside(t *testing.T) {
	doc := tapDemo()
	peaks, _ := peaksOfModes(t, doc, 310, 7)
	result := readTap(t, &TapRequest{Document: doc, Peaks: peaks})
	if result.Ideal == nil || result.AirNote != "" {
		t.Fatalf("ideal %+v, note %q", result.Ideal, result.AirNote)
	}
	best, ideal := result.Readings[0], *result.Ideal
	// rho a / sigma = 1.2 x 0.45 / 0.0695 = 7.8; mode (0,1) carries 2 x 0.746 of
	// that and (3,1) 2 x 0.175, the factors of package tap for one mode at a time:
	// factors of 12.6 and 3.7, the mean of the modes lying between.
	if math.Abs(ideal.Factor*ideal.Tension/best.Tension-1) > 1e-12 || ideal.Factor < 3 || ideal.Factor > 10 {
		t.Errorf("ideal %+v beside %g", ideal, best.Tension)
	}
	if ideal.Misfit < 0.1 || ideal.RealMisfit > 1e-5 {
		t.Errorf("misfits %+v", ideal)
	}
	names := map[string]bool{}
	for _, share := range result.Budget {
		names[share.Name] = true
	}
	for _, name := range []string{inputRadius, inputDensity, inputTemperature, inputPressure, tap.SharePeaks, tap.ShareModel} {
		if !names[name] {
			t.Errorf("the budget lacks %s: %+v", name, result.Budget)
		}
	}
	all := strings.Join(result.Assumptions, " ")
	for _, words := range []string{"radius 0.1 %", "areal density 2 %", "air temperature 3 K", "scatter by 0.5 %", "JCGM 106", "half space"} {
		if !strings.Contains(all, words) {
			t.Errorf("the assumptions lack %q: %s", words, all)
		}
	}
}

// TestTapVerdicts: with the fluid in the model the verdict stands; without it,
// the old note bars it.
func TestTapVerdicts(t *testing.T) {
	doc := tapDemo() // 310 N/m +- 8 %
	known := TapInputs{Radius: 1e-4, ArealDensity: 1e-3, Temperature: 0.5, Pressure: 1e-3}
	for tension, want := range map[float64]tap.Verdict{310: tap.VerdictPass, 250: tap.VerdictFail, 380: tap.VerdictFail, 334: tap.VerdictUndecided} {
		peaks, _ := peaksOfModes(t, doc, tension, 8)
		if result := readTap(t, &TapRequest{Document: doc, Peaks: peaks, Inputs: known}); result.Verdict != want {
			t.Errorf("%g N/m: %s, %s", tension, result.Verdict, result.Reason)
		}
	}
	for _, without := range [][]Effect{{EffectFluid}, AllEffects()} {
		peaks, _ := peaksOfModes(t, doc, 310, 8, without...)
		result := readTap(t, &TapRequest{Document: doc, Peaks: peaks, Without: without, Inputs: known})
		if result.Verdict != tap.VerdictUndecided || !strings.Contains(result.Reason, "left out") || result.AirNote == "" {
			t.Errorf("without %v: %s, %s, %q", without, result.Verdict, result.Reason, result.AirNote)
		}
		if len(result.Cautions) == 0 || !strings.Contains(result.Cautions[0]+result.Cautions[1], "left out the fluid") {
			t.Errorf("without %v: %q", without, result.Cautions)
		}
	}
}

// TestTapInputs: larger uncertainties widen the interval, as the budget says.
func TestTapInputs(t *testing.T) {
	doc := tapDemo()
	peaks, _ := peaksOfModes(t, doc, 310, 7)
	narrow := readTap(t, &TapRequest{Document: doc, Peaks: peaks, Inputs: TapInputs{Radius: 1e-4, ArealDensity: 1e-4, Temperature: 0.1, Pressure: 1e-4, Model: 1e-3}})
	wide := readTap(t, &TapRequest{Document: doc, Peaks: peaks, Inputs: TapInputs{Radius: 0.02, ArealDensity: 1e-4, Temperature: 0.1, Pressure: 1e-4, Model: 1e-3}})
	if narrow.Budget[0].Name != tap.ShareModel || wide.Budget[0].Name != inputRadius || wide.Budget[0].Share < 0.99 {
		t.Errorf("largest shares: %+v, %+v", narrow.Budget[0], wide.Budget[0])
	}
	// d ln T/d ln a lies between 2, all sheet, and 3, all air.
	share := wide.Budget[0]
	if share.Sensitivity < 2 || share.Sensitivity > 3 || math.Abs(share.Relative-0.02*share.Sensitivity) > 1e-12 {
		t.Errorf("%+v", share)
	}
}

func TestTapRefusals(t *testing.T) {
	peaks, _ := peaksOfModes(t, tapDemo(), 310, 3)
	hub := tapDemo()
	hub.Ring.HubRadius = 0.1
	for _, row := range []struct {
		request TapRequest
		field   string
	}{
		{TapRequest{Document: hub, Peaks: peaks}, "document.ring.hubRadius"},
		{TapRequest{Document: tapDemo(), Peaks: peaks, Without: []Effect{"weather"}}, "without"},
		{TapRequest{Document: tapDemo(), Peaks: peaks, Inputs: TapInputs{Radius: 0.5}}, "inputs.radius"},
		{TapRequest{Document: tapDemo(), Peaks: peaks, Inputs: TapInputs{Temperature: -1}}, "inputs.temperature"},
		{TapRequest{Document: tapDemo(), Peaks: peaks, Inputs: TapInputs{Model: math.NaN()}}, "inputs.model"},
		{TapRequest{Document: tapDemo(), Peaks: nil}, "peaks"},
		{TapRequest{Document: tapDemo(), Peaks: []tap.Peak{{Frequency: 40, Use: true, M: 30, N: 1}}}, "peaks.0.m"},
	} {
		_, err := runTap(context.Background(), &row.request)
		var refused *Error
		if !errors.As(err, &refused) || refused.Problems[0].Field != row.field {
			t.Errorf("%s: %v", row.field, err)
		}
	}
}

// TestTapHighPins: a mode beyond the usual ones is solved where a peak is set
// to it.
func TestTapHighPins(t *testing.T) {
	doc := tapDemo()
	peaks, names := peaksOfModes(t, doc, 310, 60)
	for i, k := range names {
		if k.M != 12 || k.N != 1 {
			continue
		}
		peaks[i].M, peaks[i].N = 12, 1
		result := readTap(t, &TapRequest{Document: doc, Peaks: append(peaks[:3:3], peaks[i])})
		if len(result.Readings) == 0 || math.Abs(result.Readings[0].Tension/310-1) > 2e-6 {
			t.Errorf("%+v", result.Readings)
		}
		return
	}
	t.Error("mode (12, 1) is not among the modes")
}

// TestTapSolver: every mode up to the frequency wanted is there, and not many
// beside.
func TestTapSolver(t *testing.T) {
	doc := tapDemo()
	real, err := realOf(&doc)
	if err != nil {
		t.Fatal(err)
	}
	solution, err := modes.Solve(real, modes.Request{MaxM: 12, MaxN: 6, Effects: modes.AllEffects()})
	if err != nil {
		t.Fatal(err)
	}
	for _, highest := range []float64{20, 60, 100} {
		list, complete, err := tapSolver(real, modes.AllEffects())(real.Tension, tap.Want{MaxM: 10, MaxN: 5, Highest: highest})
		if err != nil {
			t.Fatal(err)
		}
		needed := 0
		for _, mode := range solution.Modes {
			if mode.Frequency > highest {
				continue
			}
			needed++
			found := false
			for _, f := range list {
				// Other orders of the same sizes are solved: the same but for the
				// truncation that both state.
				found = found || f.M == mode.M && f.N == mode.N && math.Abs(f.Frequency/mode.Frequency-1) < 1e-8
			}
			if !found {
				t.Errorf("up to %g Hz: no mode (%d, %d) at %.3f Hz", highest, mode.M, mode.N, mode.Frequency)
			}
		}
		if complete < highest || len(list) > 4*needed+6 {
			t.Errorf("up to %g Hz: complete to %.2f Hz, %d modes where %d are needed", highest, complete, len(list), needed)
		}
	}
}

func BenchmarkTapFivePeaks(b *testing.B) {
	doc := tapDemo()
	table, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 5})
	if err != nil {
		b.Fatal(err)
	}
	request := &TapRequest{Document: doc}
	for _, mode := range table.Modes {
		request.Peaks = append(request.Peaks, tap.Peak{Frequency: mode.Frequency * 0.97, Uncertainty: 1e-3 * mode.Frequency, Use: true})
	}
	for _, kept := range []bool{true, false} {
		name := "modes kept"
		if !kept {
			name = "modes solved anew"
		}
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				if !kept {
					tapSpectra = newCache[tapKey, *tap.Spectrum](4)
				}
				if _, err := runTap(context.Background(), request); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// TestTapExtremes: whatever the peaks, an answer with finite figures, also for
// a cavity.
func TestTapExtremes(t *testing.T) {
	random := rand.New(rand.NewPCG(4, 4))
	kettle := tapDemo()
	kettle.Faces.Lower = diaphragm.Face{Kind: diaphragm.FaceCavity, Depth: 0.1}
	open := tapDemo()
	open.Faces.Upper.Kind, open.Faces.Lower.Kind = diaphragm.FaceOpen, diaphragm.FaceOpen
	for i := range 6 {
		request := &TapRequest{Document: []diaphragm.Diaphragm{kettle, open, tapDemo()}[i%3]}
		for range 1 + random.IntN(8) {
			p := tap.Peak{Frequency: math.Exp(12 * (random.Float64() - 0.2)), Use: true}
			if random.IntN(8) == 0 {
				p.M, p.N = random.IntN(9), 1+random.IntN(3)
			}
			request.Peaks = append(request.Peaks, p)
		}
		result, err := runTap(context.Background(), request)
		var refused *Error
		if errors.As(err, &refused) && strings.Contains(refused.Problems[0].Message, "both set to mode") {
			continue
		}
		if err != nil {
			t.Errorf("%+v: %v", request.Peaks, err)
			continue
		}
		for _, r := range result.Readings {
			for _, x := range []float64{r.Tension, r.StandardUncertainty, r.Low, r.High, r.Spread, r.Odds} {
				if math.IsNaN(x) || math.IsInf(x, 0) || x < 0 {
					t.Errorf("%+v from %+v", r, request.Peaks)
				}
			}
		}
		if result.Reason == "" {
			t.Errorf("no reason for %+v", request.Peaks)
		}
	}
}

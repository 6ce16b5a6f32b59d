package engine

import (
	"context"
	"math"
	"slices"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/response"
)

func wetRespond(t *testing.T, request *RespondRequest) *RespondResult {
	t.Helper()
	result, err := runRespond(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	return result
}

// likeIdeal checks that two answers agree to a share of their largest value.
func likeIdeal(t *testing.T, what string, got, want *RespondResult, share float64) {
	t.Helper()
	largest := 0.0
	for _, w := range want.Motion {
		largest = math.Max(largest, math.Abs(float64(w)))
	}
	for i := range want.Motion {
		if math.Abs(float64(got.Motion[i]-want.Motion[i])) > share*largest {
			t.Errorf("%s: value %d is %v, of the ideal sheet %v", what, i, got.Motion[i], want.Motion[i])
			return
		}
	}
	if math.Abs(got.Travel.Displacement-want.Travel.Displacement) > share*largest || math.Abs(got.Energy/want.Energy-1) > 2*share+math.Abs(got.MissedEnergy) {
		t.Errorf("%s: travel %v and energy %v, of the ideal sheet %v and %v", what, got.Travel, got.Energy, want.Travel, want.Energy)
	}
}

func TestRespondWithoutEffectsIsIdeal(t *testing.T) {
	request := respondRequest()
	request.Velocity = response.Shape{Kind: response.ShapePatch, Peak: 0.05, Radius: 0.4, Angle: -1, Width: 0.3}
	request.Document.Faces = diaphragm.Faces{Upper: diaphragm.Face{Kind: diaphragm.FaceVacuum}, Lower: diaphragm.Face{Kind: diaphragm.FaceVacuum}}
	request.Without = AllEffects()
	ideal := wetRespond(t, request)
	// In vacuum and without stiffness the modes of the diaphragm as it stands are
	// the ideal ones, to float32.
	request.Without = []Effect{EffectStiffness}
	likeIdeal(t, "vacuum", wetRespond(t, request), ideal, 1e-6)
	// The stiffness at a thin clamped edge makes the ring smaller by e = sqrt(D/T)/a,
	// so the phases drift by e omega t: omega at most 30 c/a with 8 diameters and
	// circles, and most of the motion in slower modes.
	request.Without = nil
	request.Document.Sheet.E /= 100
	sheet := &request.Document.Sheet
	stiffness := sheet.E * math.Pow(sheet.Thickness, 3) / 12 / (1 - sheet.Nu*sheet.Nu)
	edge := math.Sqrt(stiffness/request.Document.Tension.Nominal) / request.Document.Ring.Radius
	unit := request.Document.Ring.Radius * math.Sqrt(sheet.ArealDensity()/request.Document.Tension.Nominal)
	likeIdeal(t, "limp film", wetRespond(t, request), ideal, edge*30*request.Duration/unit)
}

func TestRespondKinds(t *testing.T) {
	// Every kind of shape moves with air, at rest and struck; the energy is that
	// of the sheet at the start (displacement), and more with a velocity that the
	// air shares than without air.
	for _, shape := range []response.Shape{
		{Kind: response.ShapeBulge, Peak: 2e-4},
		{Kind: response.ShapePoint, Peak: 2e-4, Radius: 0.4, Angle: 2, Width: 0.1},
		{Kind: response.ShapeBump, Peak: 2e-4, Radius: 0.4, Angle: 2, Width: 0.3},
		{Kind: response.ShapePatch, Peak: 2e-4, Radius: 0.4, Angle: 2, Width: 0.3},
		{Kind: response.ShapeFormula, Peak: 2e-4, Formula: "(1-r^2)*(1+x)"},
	} {
		for _, how := range []string{"displacement", "velocity", "blow"} {
			request := respondRequest()
			rest := response.Shape{Kind: response.ShapeRest}
			request.Displacement, request.Velocity = rest, rest
			switch how {
			case "displacement":
				request.Displacement = shape
			case "blow":
				request.Impulse = true
				fallthrough
			case "velocity":
				request.Velocity = shape
			}
			wet := wetRespond(t, request)
			request.Without = AllEffects()
			ideal := wetRespond(t, request)
			for name, result := range map[string]*RespondResult{"wet": wet, "ideal": ideal} {
				if !(result.Energy > 0) || math.IsInf(result.Energy, 0) || !(math.Abs(result.Travel.Displacement) > 0) || len(result.Strongest) == 0 {
					t.Errorf("%s, %s, %s: energy %v, travel %v", shape.Kind, how, name, result.Energy, result.Travel)
				}
				for _, missed := range []float64{result.MissedDisplacement, result.MissedVelocity, result.MissedEnergy} {
					if !(missed >= 0 && missed <= 1) {
						t.Errorf("%s, %s, %s: missed %v", shape.Kind, how, name, missed)
					}
				}
				shares := 0.0
				for _, share := range result.Strongest {
					shares += share.Share
				}
				if shares > 1+1e-9 {
					t.Errorf("%s, %s, %s: shares add up to %v", shape.Kind, how, name, shares)
				}
			}
			ratio := wet.Energy / ideal.Energy
			switch {
			case how == "displacement" && shape.Kind == response.ShapePatch:
				// Modes hold less than all of a jump, and not the same part.
			case how == "displacement" && math.Abs(ratio-1) > 0.01+ideal.MissedEnergy+wet.MissedEnergy,
				how == "velocity" && !(ratio > 1.5), how == "blow" && !(ratio < 0.7):
				t.Errorf("%s, %s: energy %v, of the ideal sheet %v", shape.Kind, how, wet.Energy, ideal.Energy)
			}
		}
	}
}

func TestRespondAtItsBounds(t *testing.T) {
	request := respondRequest()
	request.Orders, request.Circles = 40, 20
	request.Angles, request.Frames = 96, 5
	result := wetRespond(t, request)
	if result.MissedEnergy > 1e-4 || math.Abs(result.Travel.Displacement) < 5e-4*0.99 {
		t.Errorf("missed %v, travel %v", result.MissedEnergy, result.Travel)
	}
	for field, change := range map[string]func(*RespondRequest){
		"orders":  func(r *RespondRequest) { r.Orders = 41 },
		"circles": func(r *RespondRequest) { r.Circles = 21 },
	} {
		request := respondRequest()
		request.Angles = 96
		change(request)
		_, err := runRespond(context.Background(), request)
		if p := refusal(t, err); len(p) != 1 || p[0].Field != field {
			t.Errorf("%s: %v", field, p)
		}
		request.Without = AllEffects()
		wetRespond(t, request)
	}
	request = respondRequest()
	request.Orders, request.Circles, request.Angles = 0, 1, 4
	result = wetRespond(t, request)
	if len(result.Strongest) != 1 || result.Strongest[0].Share < 1-1e-12 {
		t.Errorf("one mode: %v", result.Strongest)
	}
}

func TestRespondDuration(t *testing.T) {
	// Ten thousand periods of the diaphragm as it stands, which in air are longer
	// than those of the ideal sheet.
	request := respondRequest()
	period := wetRespond(t, request).Period
	request.Duration = 9999 * period
	request.Points = nil
	request.Orders, request.Circles, request.Angles, request.Frames = 1, 1, 4, 3
	if result := wetRespond(t, request); !slices.ContainsFunc(result.Warnings, func(w string) bool { return strings.Contains(w, "sought at") }) {
		t.Errorf("warnings %q", result.Warnings)
	}
	for _, duration := range []float64{10001 * period, -1, math.NaN()} {
		request.Duration = duration
		_, err := runRespond(context.Background(), request)
		if p := refusal(t, err); len(p) != 1 || p[0].Field != "duration" {
			t.Errorf("%v s: %v", duration, p)
		}
	}
}

func TestRespondFromCavity(t *testing.T) {
	request := respondRequest()
	request.Displacement = response.Shape{Kind: response.ShapeBulge, Peak: 1e-4}
	request.Points = nil
	request.Duration = 0
	request.Document.Faces.Lower = diaphragm.Face{Kind: diaphragm.FaceCavity, Depth: 1.2}
	result := wetRespond(t, request)
	doc := &request.Document
	real, err := realOf(doc)
	if err != nil {
		t.Fatal(err)
	}
	// The bulge holds pi a^2 w/2 of the air of the cavity.
	a, volume := doc.Ring.Radius, math.Pi*doc.Ring.Radius*doc.Ring.Radius*1e-4/2
	film := doc.Tension.Nominal / 2 * 2 * math.Pi * 1e-8
	air := real.Lower.Density * real.Lower.SoundSpeed * real.Lower.SoundSpeed * volume * volume / (2 * math.Pi * a * a * 1.2)
	// Twelve Bessel functions have the volume to 32/(3 pi j^3) at the twelfth.
	if got := result.Energy / (1 - result.MissedDisplacement); math.Abs(got/(film+air)-1) > 2*32/(3*math.Pi*37*37*37) {
		t.Errorf("energy %v with what is missed, film %v and air %v", got, film, air)
	}
	table, err := runModes(context.Background(), &ModesRequest{Document: *doc, Count: 12})
	if err != nil {
		t.Fatal(err)
	}
	found := false
	for _, mode := range table.Modes {
		if mode.M == 0 && mode.N == 1 {
			found = true
			if got := result.Period * mode.Frequency / math.Sqrt(1-mode.Damping.Radiation*mode.Damping.Radiation); math.Abs(got-1) > 1e-9 {
				t.Errorf("period times the frequency of (0,1) is %v", got)
			}
		}
	}
	if !found {
		t.Error("the table lacks (0,1)")
	}
	if got := float64(result.Times[len(result.Times)-1]) / result.Period; math.Abs(got-6) > 1e-6 {
		t.Errorf("%v periods, want 6", got)
	}
}

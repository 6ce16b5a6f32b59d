package engine

import (
	"context"
	"errors"
	"math"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/response"
)

// sourcesRequest lets the engine choose the modes.
func sourcesRequest(sources ...response.Source) *RespondRequest {
	return &RespondRequest{Document: demoDocument(), Sources: sources, Duration: 0.05, Frames: 11, Radii: 9, Angles: 8,
		Points: []response.Point{{Radius: 0.3, Angle: 1}}}
}

func blowAt(radius, angle float64) response.Source {
	return response.Source{Kind: response.SourceBlow, Momentum: 1e-3, Shape: response.Shape{Kind: response.ShapeBump, Radius: radius, Angle: angle, Width: 0.3}}
}

func TestRespondChoosesModes(t *testing.T) {
	// A smooth blow at the centre needs no nodal diameters, beside it some, and
	// what is left out is within the tolerance for the ideal sheet.
	ideal := []Effect{EffectStiffness, EffectFluid, EffectSound, EffectCavity}
	for _, c := range []struct {
		source    response.Source
		tolerance float64
	}{{blowAt(0, 0), 0}, {blowAt(0.5, 1), 0}, {blowAt(0.5, 1), 1e-5}} {
		request := sourcesRequest(c.source)
		request.Without, request.Tolerance = ideal, c.tolerance
		result, err := runRespond(context.Background(), request)
		if err != nil {
			t.Fatal(err)
		}
		within := c.tolerance
		if within == 0 {
			within = 0.001
		}
		if result.MissedEnergy > within || result.Sources[0].Missed > within {
			t.Errorf("%v: missed %v with %d, %d", c, result.MissedEnergy, result.Orders, result.Circles)
		}
		if centre := c.source.Shape.Radius == 0; centre != (result.Orders == 0) || result.Circles < 8 || result.Angles < 2*result.Orders+2 {
			t.Errorf("%v: %d diameters, %d circles, %d angles", c, result.Orders, result.Circles, result.Angles)
		}
		// Many more modes move the picture by no more than what is stated, beside
		// the digits of float32.
		fine := *request
		fine.Orders, fine.Circles = 40, 40
		request.Angles = 84
		if result, err = runRespond(context.Background(), request); err != nil {
			t.Fatal(err)
		}
		fine.Angles = request.Angles
		more, err := runRespond(context.Background(), &fine)
		if err != nil {
			t.Fatal(err)
		}
		off := 0.0
		for i, v := range more.Motion {
			off = math.Max(off, math.Abs(float64(v-result.Motion[i])))
		}
		travel := math.Abs(result.Travel.Displacement)
		if off > result.MissedTravel+1e-6*travel || result.MissedTravel > travel {
			t.Errorf("%v: missed travel %v, off by %v, of %v", c, result.MissedTravel, off, travel)
		}
	}
	request := sourcesRequest(blowAt(0, 0))
	request.Tolerance = 1
	if _, err := runRespond(context.Background(), request); !refusedAt(err, "tolerance") {
		t.Errorf("%v", err)
	}
}

func refusedAt(err error, field string) bool {
	var refusal *Error
	return errors.As(err, &refusal) && len(refusal.Problems) == 1 && refusal.Problems[0].Field == field
}

func TestRespondLimitsOnlyWhereEffects(t *testing.T) {
	// In vacuum and without stiffness there is no fluid to limit the modes.
	request := sourcesRequest(blowAt(0.2, 0))
	request.Document.Faces.Upper, request.Document.Faces.Lower = diaphragm.Face{Kind: diaphragm.FaceVacuum}, diaphragm.Face{Kind: diaphragm.FaceVacuum}
	request.Without = []Effect{EffectStiffness}
	request.Orders, request.Circles = 60, 60
	if _, err := runRespond(context.Background(), request); err != nil {
		t.Errorf("60 and 60 without effects: %v", err)
	}
	request.Without = nil
	if _, err := runRespond(context.Background(), request); !refusedAt(err, "orders") {
		t.Errorf("60 and 60 with stiffness: %v", err)
	}
}

func TestRespondRefusesSources(t *testing.T) {
	for field, source := range map[string]response.Source{
		"sources.0.kind":           {Kind: "kick"},
		"sources.0.momentum":       {Kind: response.SourceBlow, Momentum: math.NaN(), Shape: response.Shape{Kind: response.ShapePatch, Width: 0.1}},
		"sources.0.shape.width":    {Kind: response.SourceBlow, Shape: response.Shape{Kind: response.ShapePatch}},
		"sources.0.shape.kind":     {Kind: response.SourceBody, Mass: 1, Shape: response.Shape{Kind: response.ShapeBulge}},
		"sources.0.mass":           {Kind: response.SourceBody, Shape: response.Shape{Kind: response.ShapePatch, Width: 0.1}},
		"sources.0.restitution":    {Kind: response.SourceBody, Mass: 1, Restitution: 2, Shape: response.Shape{Kind: response.ShapePatch, Width: 0.1}},
		"sources.0.pulse.duration": {Kind: response.SourcePressure, Shape: response.Shape{Kind: response.ShapeEven}, Pulse: &response.Pulse{Kind: response.PulseRamp}},
		"sources.0.pulse.kind":     {Kind: response.SourceFront, FrontSpeed: 1, Pulse: &response.Pulse{Kind: response.PulseTriangle, Duration: 1}},
		"sources.0.pulse.table":    {Kind: response.SourceShake, Pulse: &response.Pulse{Kind: response.PulseTable, Table: "0,1\nx"}},
		"sources.0.frontSpeed":     {Kind: response.SourceFront},
		"sources.0.at":             {Kind: response.SourceVelocity, At: -1, Shape: response.Shape{Kind: response.ShapeRest}},
		"sources.0.shape.table":    {Kind: response.SourceDisplacement, Shape: response.Shape{Kind: response.ShapeMeasured, Peak: 1, Table: "1,2"}},
		"sources.0.shape.formula":  {Kind: response.SourceImpulse, Shape: response.Shape{Kind: response.ShapeFormula, Peak: 1, Formula: "1/r"}},
	} {
		if _, err := runRespond(context.Background(), sourcesRequest(source)); !refusedAt(err, field) {
			t.Errorf("%s: %v", field, err)
		}
	}
}

func TestRespondOfEverySource(t *testing.T) {
	at := response.Shape{Kind: response.ShapePatch, Peak: 1, Radius: 0.4, Angle: 1, Width: 0.2}
	half := response.Shape{Kind: response.ShapeHalf, Peak: 5}
	pulse := &response.Pulse{Kind: response.PulseHalfSine, Duration: 0.005}
	for _, source := range []response.Source{
		{Kind: response.SourceDisplacement, At: 0.01, Shape: response.Shape{Kind: response.ShapePoint, Peak: 1e-3, Width: 0.05}},
		{Kind: response.SourceVelocity, Shape: at},
		{Kind: response.SourceImpulse, At: 0.002, Shape: half},
		blowAt(0.4, 2),
		{Kind: response.SourceBody, At: 0.003, Shape: at, Mass: 0.01, Speed: -1, Restitution: 0.5},
		{Kind: response.SourceBody, At: 0.003, Shape: at, Mass: 0.01, Speed: -1, Stays: true},
		{Kind: response.SourcePressure, At: 0.001, Shape: half, Pulse: pulse},
		{Kind: response.SourceFront, Shape: response.Shape{Peak: 3}, FrontSpeed: 343, FrontDirection: 2, Pulse: &response.Pulse{Kind: response.PulseDecay, Duration: 0.01}},
		{Kind: response.SourceRelease, At: 0.01, Shape: response.Shape{Kind: response.ShapePoint, Peak: 0.5, Width: 0.05}},
		{Kind: response.SourceShake, Pulse: &response.Pulse{Kind: response.PulseTable, Table: "0,0\n0.01,3\n0.02,-3\n0.03,0"}},
	} {
		request := sourcesRequest(source)
		request.Neighbour = &response.Neighbour{Below: true, Gap: 0.05}
		result, err := runRespond(context.Background(), request)
		if err != nil {
			t.Errorf("%s: %v", source.Kind, err)
			continue
		}
		if h := result.Histories[0]; result.Clearance == nil || math.Abs(result.Clearance.Least) > 1 || len(h.Velocity) != len(h.Values) || len(h.Acceleration) != len(h.Values) || len(result.Kinetic) != len(result.EnergyTimes) {
			t.Errorf("%s: clearance %+v", source.Kind, result.Clearance)
		}
		note := result.Sources[0]
		if len(result.Sources) != 1 || note.Kind != source.Kind || !(math.Abs(result.Travel.Displacement) > 0) || math.IsNaN(note.Missed) || math.IsNaN(result.MissedTravel) {
			t.Errorf("%s: %+v, travel %v", source.Kind, result.Sources, result.Travel)
		}
		if body := source.Kind == response.SourceBody; body != (note.EffectiveMass > 0) {
			t.Errorf("%s: effective mass %v", source.Kind, note.EffectiveMass)
		}
		for _, share := range result.Strongest {
			if !(share.Share > 0 && share.Share <= 1) {
				t.Errorf("%s: share %v", source.Kind, share)
			}
		}
	}
}

func TestRespondOfUnevenDiaphragm(t *testing.T) {
	// With tension even but for 1e-9 the answer is that of the even diaphragm,
	// but for the radiation of modes above 5 diameters or 3 circles, left out here
	// with the sound; with 10 % it is another, and says so.
	even := sourcesRequest(blowAt(0.4, 1))
	even.Without = []Effect{EffectSound}
	even.Orders, even.Circles = 12, 8
	uneven := *even
	uneven.Document.Tension.Harmonics = []diaphragm.Harmonic{{Order: 2, Epsilon: 1e-9}}
	strong := *even
	strong.Document.Tension.Harmonics = []diaphragm.Harmonic{{Order: 2, Epsilon: 0.1}}
	var histories [3]Numbers
	for i, request := range []*RespondRequest{even, &uneven, &strong} {
		result, err := runRespond(context.Background(), request)
		if err != nil {
			t.Fatal(err)
		}
		histories[i] = result.Motion
		if i == 2 && !strings.Contains(strings.Join(result.Assumptions, " "), "those of the even diaphragm") {
			t.Errorf("%q", result.Assumptions)
		}
	}
	largest, off, other := 0.0, 0.0, 0.0
	for k, v := range histories[0] {
		largest = math.Max(largest, math.Abs(float64(v)))
		off = math.Max(off, math.Abs(float64(histories[1][k]-v)))
		other = math.Max(other, math.Abs(float64(histories[2][k]-v)))
	}
	if off > 1e-4*largest || other < 1e-2*largest {
		t.Errorf("largest %v, off by %v, with 10 %% by %v", largest, off, other)
	}
}

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

func respondRequest() *RespondRequest {
	return &RespondRequest{
		Document:     demoDocument(),
		Displacement: response.Shape{Kind: response.ShapeBump, Peak: 5e-4, Radius: 0.3, Angle: 1, Width: 0.5},
		Velocity:     response.Shape{Kind: response.ShapeRest},
		Orders:       8, Circles: 8,
		Duration: 0.05, Frames: 11, Radii: 9, Angles: 20,
		Points: []response.Point{{Radius: 0.3, Angle: 1}},
	}
}

func TestRespondOfDemo(t *testing.T) {
	request := respondRequest()
	reports := 0
	ctx := WithProgress(context.Background(), func(float64) { reports++ })
	result, err := runRespond(ctx, request)
	if err != nil {
		t.Fatal(err)
	}
	if len(result.Times) != 11 || len(result.Motion) != 11*9*20 || len(result.Envelope) != 9*20 || len(result.Histories) != 1 ||
		len(result.Histories[0].Values) != len(result.HistoryTimes) || reports == 0 {
		t.Errorf("%d times, %d values, %d of the envelope, %d histories, %d reports",
			len(result.Times), len(result.Motion), len(result.Envelope), len(result.Histories), reports)
	}
	// Potential energy of a bump: T/2 times 6 pi/5 times the peak squared.
	// The modes leave out the share that is stated of it; the rest of the
	// tolerance is for shapes that sound and the clamped edge change a little.
	if want := request.Document.Tension.Nominal / 2 * 6 * math.Pi / 5 * 5e-4 * 5e-4 * (1 - result.MissedEnergy); math.Abs(result.Energy-want) > 1e-3*want {
		t.Errorf("energy %v, want %v", result.Energy, want)
	}
	table, err := runModes(context.Background(), &ModesRequest{Document: request.Document, Count: 1})
	if err != nil {
		t.Fatal(err)
	}
	// The table's frequency is that of the oscillation as radiation damps it.
	lowest := table.Modes[0]
	if got := result.Period * lowest.Frequency / math.Sqrt(1-lowest.Damping.Radiation*lowest.Damping.Radiation); math.Abs(got-1) > 1e-9 {
		t.Errorf("period times the frequency of (0,1) is %v", got)
	}
	if len(result.Strongest) == 0 || len(result.Assumptions) == 0 || len(result.Warnings) != 0 {
		t.Errorf("%v %q %q", result.Strongest, result.Assumptions, result.Warnings)
	}
	// Without a duration, six periods.
	request.Duration = 0
	result, err = runRespond(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	if got := float64(result.Times[10]) / result.Period; math.Abs(got-6) > 1e-6 {
		t.Errorf("%v periods, want 6", got)
	}
}

func TestRespondStaysQuietInVacuum(t *testing.T) {
	request := respondRequest()
	request.Displacement.Peak = 1e-5
	request.Document.Faces = diaphragm.Faces{Upper: diaphragm.Face{Kind: diaphragm.FaceVacuum}, Lower: diaphragm.Face{Kind: diaphragm.FaceVacuum}}
	request.Frames = 200
	result, err := runRespond(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	if len(result.Warnings) != 0 {
		t.Errorf("warnings %q", result.Warnings)
	}
}

func TestRespondRefusals(t *testing.T) {
	request := respondRequest()
	request.Document.Tension.Nominal = -1
	request.Velocity = response.Shape{Kind: response.ShapeFormula, Peak: 1, Formula: "2*sen(theta)"}
	_, err := runRespond(context.Background(), request)
	problems := refusal(t, err)
	if len(problems) != 2 || problems[0].Field != "tension.nominal" || problems[1].Field != "velocity.formula" || problems[1].Offset != 2 {
		t.Errorf("%v", problems)
	}
	request = respondRequest()
	request.Displacement = response.Shape{Kind: response.ShapeFormula, Peak: 1, Formula: "(1 - r)/r"}
	_, err = runRespond(context.Background(), request)
	if p := refusal(t, err); len(p) != 1 || p[0].Field != "displacement.formula" || !strings.Contains(p[0].Message, "At r = 0") {
		t.Errorf("%v", p)
	}
}

func TestRespondStops(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	stop()
	if _, err := runRespond(ctx, respondRequest()); !errors.Is(err, context.Canceled) {
		t.Errorf("error %v", err)
	}
}

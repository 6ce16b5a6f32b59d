package engine

import (
	"context"
	"errors"
	"math"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

func demoDocument() diaphragm.Diaphragm { return diaphragm.Demo(demoID, demoCreated) }

func TestModesOfDemo(t *testing.T) {
	doc := demoDocument()
	result, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 24})
	if err != nil {
		t.Fatal(err)
	}
	if len(result.Modes) != 24 {
		t.Fatalf("%d modes", len(result.Modes))
	}
	sigma := doc.Sheet.Density * doc.Sheet.Thickness
	if result.ArealDensity != sigma || result.WaveSpeed != math.Sqrt(doc.Tension.Nominal/sigma) {
		t.Errorf("areal density %v, wave speed %v", result.ArealDensity, result.WaveSpeed)
	}
	// j_01/(2 pi a) c, j_01 from Abramowitz & Stegun, Table 9.5.
	if want := 2.404825557695773 / (2 * math.Pi * doc.Ring.Radius) * result.WaveSpeed; math.Abs(result.Modes[0].Frequency-want) > 1e-13*want {
		t.Errorf("f_01 = %v, want %v", result.Modes[0].Frequency, want)
	}
	// rho a/sigma in air of 1.2 kg/m^3 within a percent.
	if want := 1.2 * doc.Ring.Radius / sigma; math.Abs(result.MassRatio-want) > 0.01*want {
		t.Errorf("mass ratio %v, about %v", result.MassRatio, want)
	}
	if len(result.Cautions) != 1 || !strings.Contains(result.Cautions[0], "The air that moves with mode (0, 1)") {
		t.Errorf("cautions %q", result.Cautions)
	}
	for i, mode := range result.Modes {
		if len(mode.Distances) != len(doc.Avoid.Lines) || mode.CircleRadii == nil {
			t.Fatalf("mode %d: %+v", i, mode)
		}
		for k := 1; k < len(mode.Distances); k++ {
			if math.Abs(mode.Distances[k].Relative) < math.Abs(mode.Distances[k-1].Relative) {
				t.Errorf("mode %d: the nearest line is not first", i)
			}
		}
	}

	doc.Sheet.MeasuredArealDensity = 2 * sigma
	doc.Faces = diaphragm.Faces{Upper: diaphragm.Face{Kind: diaphragm.FaceVacuum}, Lower: diaphragm.Face{Kind: diaphragm.FaceVacuum}}
	doc.Avoid = diaphragm.Avoid{Lowest: 2 * result.Modes[0].Frequency / math.Sqrt2, Lines: []diaphragm.Line{
		{Name: "at (1,1)", Frequency: result.Modes[1].Frequency / math.Sqrt2 * 1.01, HalfWidth: 0.02},
	}}
	measured, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 3})
	if err != nil {
		t.Fatal(err)
	}
	if got, want := measured.Modes[0].Frequency, result.Modes[0].Frequency/math.Sqrt2; math.Abs(got-want) > 1e-13*want {
		t.Errorf("with twice the areal density f_01 = %v, want %v", got, want)
	}
	if len(measured.Cautions) != 0 {
		t.Errorf("in vacuum: %q", measured.Cautions)
	}
	if got := measured.Modes[1].Distances[0].Clearance; got != modes.Hit {
		t.Errorf("(1,1) beside its line is %s", got)
	}
	if !measured.Modes[0].BelowLowest || !measured.Modes[1].BelowLowest || measured.Modes[2].BelowLowest {
		t.Errorf("below the lowest: %v %v %v", measured.Modes[0].BelowLowest, measured.Modes[1].BelowLowest, measured.Modes[2].BelowLowest)
	}
}

// refusal returns the problems of an error.
func refusal(t *testing.T, err error) []Problem {
	t.Helper()
	var e *Error
	if !errors.As(err, &e) {
		t.Fatalf("error %v", err)
	}
	return e.Problems
}

func TestModesRefusals(t *testing.T) {
	for _, count := range []int{0, 401} {
		_, err := runModes(context.Background(), &ModesRequest{Document: demoDocument(), Count: count})
		if p := refusal(t, err); len(p) != 1 || p[0].Field != "count" || !strings.HasSuffix(p[0].Message, "; it must be from 1 to 400.") {
			t.Errorf("count %d: %v", count, p)
		}
	}
	doc := demoDocument()
	doc.Tension.Nominal = 0
	_, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 4})
	if p := refusal(t, err); p[0].Field != "tension.nominal" {
		t.Errorf("no tension: %v", p)
	}
}

func TestShapeOfMode(t *testing.T) {
	request := ShapeRequest{M: 2, N: 2, Size: 32, SectionPoints: 21}
	result, err := runShape(context.Background(), &request)
	if err != nil {
		t.Fatal(err)
	}
	if len(result.Raster) != 32*32 || len(result.Section) != 21 || len(result.CircleRadii) != 1 || len(result.DiameterAngles) != 2 || len(result.Lobes) != 8 {
		t.Errorf("%d pixels, %d points, %d circles, %d diameters, %d lobes",
			len(result.Raster), len(result.Section), len(result.CircleRadii), len(result.DiameterAngles), len(result.Lobes))
	}
	_, err = runShape(context.Background(), &ShapeRequest{M: -1, N: 0, Size: 8, SectionPoints: 1, Orientation: math.NaN(), SectionAngle: 1e9})
	if p := refusal(t, err); len(p) != 6 {
		t.Errorf("%d problems, want six: %v", len(p), p)
	}
}

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
	ideal := 2.404825557695773 / (2 * math.Pi * doc.Ring.Radius) * result.WaveSpeed
	lowest := result.Modes[0]
	if math.Abs(lowest.Ideal-ideal) > 1e-13*ideal {
		t.Errorf("ideal f_01 = %v, want %v", lowest.Ideal, ideal)
	}
	// The shape of the ideal mode with its added mass on both baffled faces,
	// 0.7464 rho a a side (Kwak 1994), bounds the frequency in still fluid from
	// above (Rayleigh's principle); sound and stiffness change it by less than
	// 2 %, and the true shape lowers it by less than 10 % at this mass ratio.
	if bound := ideal / math.Sqrt(1+2*0.7464*result.MassRatio); lowest.M != 0 || lowest.N != 1 || lowest.Frequency > 1.02*bound || lowest.Frequency < 0.9*bound {
		t.Errorf("f_01 = %v, not near %v", lowest.Frequency, bound)
	}
	if d := lowest.Damping; !(d.Radiation > 0 && d.Viscous > 0 && d.RadiationKnown) || math.Abs(d.Radiation+d.Viscous+d.Sheet+d.Remainder-d.Total) > 1e-15 {
		t.Errorf("damping %+v", d)
	}
	// rho a/sigma in air of 1.2 kg/m^3 within a percent.
	if want := 1.2 * doc.Ring.Radius / sigma; math.Abs(result.MassRatio-want) > 0.01*want {
		t.Errorf("mass ratio %v, about %v", result.MassRatio, want)
	}
	if len(result.Cautions) != 0 {
		t.Errorf("cautions %q", result.Cautions)
	}
	dry, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 24, Without: AllEffects()})
	if err != nil {
		t.Fatal(err)
	}
	if len(dry.Cautions) != 3 || !strings.Contains(dry.Cautions[1], "left out the fluid") {
		t.Errorf("cautions without effects: %q", dry.Cautions)
	}
	if f := dry.Modes[0].Frequency; math.Abs(f-ideal) > 1e-11*ideal {
		t.Errorf("without any effect f_01 = %v, want %v", f, ideal)
	}
	for i, mode := range result.Modes {
		if len(mode.Distances) != len(doc.Avoid.Lines) {
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
	doc.Sheet.E = 1e4 // no stiffness to speak of
	doc.Avoid = diaphragm.Avoid{Lowest: 2 * dry.Modes[0].Frequency / math.Sqrt2, Lines: []diaphragm.Line{
		{Name: "at (1,1)", Frequency: dry.Modes[1].Frequency / math.Sqrt2 * 1.01, HalfWidth: 0.02},
	}}
	measured, err := runModes(context.Background(), &ModesRequest{Document: doc, Count: 3})
	if err != nil {
		t.Fatal(err)
	}
	if got, want := measured.Modes[0].Frequency, ideal/math.Sqrt2; math.Abs(got-want) > 1e-5*want {
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

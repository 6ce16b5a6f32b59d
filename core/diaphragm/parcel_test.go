package diaphragm

import (
	"errors"
	"math"
	"math/rand/v2"
	"reflect"
	"strconv"
	"strings"
	"testing"

	"hoopsheet/core/air"
)

// fullDocument is a document in which every text and number is filled in. All
// of it is invented.
func fullDocument() Diaphragm {
	return Diaphragm{
		Schema: Schema, ID: "01JZ7Q4M8WQ0T3X5B2N6V9C1DK", Name: "Film port 7, spare", Place: "Workshop 2, rack B, shelf 4",
		Notes: "Film from roll 31/b, cut across the web. Clamps tightened in three rounds to half a turn each, " +
			"then left over night. Two clamps (11 and 12) carry the cable bracket & its plate; \"light\" side up. " +
			"Ring was out of round by 0.4 mm before clamping. Ask Åse <test room> before moving it.",
		Created: "2026-03-02T08:15:30Z", Revision: 12, Invented: true,
		Ring: Ring{Radius: 1.4925, Clamps: 96, CTE: 11.7e-6},
		Sheet: Sheet{Material: "Polyester film (PET, biaxially oriented)", Thickness: 23.4e-6, Density: 1387.5, MeasuredArealDensity: 0.032467,
			E: 4.83e9, Nu: 0.38, CTE: 17.3e-6, AllowableStress: 33e6},
		Tension:      Tension{Nominal: 213.4, Tolerance: 0.075},
		Faces:        Faces{Upper: Face{Kind: FaceBaffled}, Lower: Face{Kind: FaceCavity, Depth: 1.234}},
		Surroundings: Surroundings{Temperature: 294.35, Pressure: 98720, Humidity: 0.43, ServiceMin: 258.15, ServiceMax: 318.15},
		Avoid: Avoid{Lowest: 4.5, Lines: []Line{
			{Name: "mains 50 Hz", Frequency: 50, HalfWidth: 0.02}, {Name: "supply fan, blade passing", Frequency: 23.75, HalfWidth: 0.06},
			{Name: "pump", Frequency: 16.53, HalfWidth: 0.05}, {Name: "mains 100 Hz", Frequency: 100, HalfWidth: 0.02}}},
		Damping: Damping{Ratio: 0.0123},
	}
}

// richDocument is fullDocument with everything that a real diaphragm may have,
// a cavity with its vent below and a wall above.
func richDocument() Diaphragm {
	d := fullDocument()
	d.Ring.HubRadius, d.Ring.OutOfRound, d.Ring.OutOfRoundAngle = 0.0315, 0.0004, 0.7
	d.Sheet.LossFactor = 0.017
	d.Tension.Rim, d.Tension.Bonded, d.Tension.WeftRatio, d.Tension.WarpAngle = RimSupported, true, 0.85, 0.35
	d.Tension.Harmonics = []Harmonic{{2, 0.034, 0.52}, {3, 0.012, 2.1}, {1, 0.02, 4.7}}
	d.Attached = Attached{
		Patches: []Patch{
			{Name: "accelerometer", Radius: 0.412, Angle: 1.31, Size: 0.0065, Mass: 0.0023, Rigid: true},
			{Name: "tape over a scratch", Radius: 0.75, Angle: 3.9, Size: 0.0125, Mass: 0.00041},
		},
		Strips: []Strip{{Name: "seam", Offset: 0.23, Angle: 1.5707963267948966, Width: 0.012, Mass: 0.0085}},
	}
	d.Faces.Upper.Fluid, d.Faces.Upper.Wall = air.FluidNitrogen, 0.65
	d.Faces.Lower.Fluid, d.Faces.Lower.VentArea, d.Faces.Lower.VentLength = air.FluidHelium, 0.00125, 0.018
	return d
}

// fullParcel is what a long hand-over looks like: 24 figures and 12 peaks of
// full precision.
func fullParcel() Parcel {
	random := rand.New(rand.NewPCG(7, 1))
	p := Parcel{Document: fullDocument(), Tapped: "2026-03-05T13:02:11+01:00", Sent: "2026-03-06T09:40:00Z", Engine: "1.0.0"}
	for _, id := range []string{"sheet.arealDensity", "sheet.stress", "air.density", "air.massRatio"} {
		p.Figures = append(p.Figures, Figure{id, random.Float64()})
	}
	for m := range 5 {
		for n := 1; n <= 4; n++ {
			p.Figures = append(p.Figures, Figure{"f." + strconv.Itoa(m) + "." + strconv.Itoa(n), 100 * random.Float64()})
		}
	}
	for i := range 12 {
		p.Peaks = append(p.Peaks, ChosenPeak{Frequency: 100 * random.Float64(), Uncertainty: 0.1 * random.Float64(), M: i % 5, N: 1 + i/5})
	}
	return p
}

func codeOf(err error) Code {
	var refusal *Refusal
	if errors.As(err, &refusal) {
		return refusal.Problems[0].Code
	}
	return ""
}

func TestParcelRoundTrip(t *testing.T) {
	want := fullParcel()
	data, err := EncodeParcel(want)
	if err != nil {
		t.Fatal(err)
	}
	got, err := DecodeParcel(data)
	if err != nil || !reflect.DeepEqual(got, want) {
		t.Errorf("got %+v (%v)\nwant %+v", got, err, want)
	}
	if KindOfFile(data) != FileParcel {
		t.Errorf("taken for %q", KindOfFile(data))
	}
}

// TestParcelHasNoNil checks that lists come back empty rather than missing.
func TestParcelHasNoNil(t *testing.T) {
	doc := fullDocument()
	doc.Avoid.Lines = nil
	data, err := EncodeParcel(Parcel{Document: doc})
	if err != nil {
		t.Fatal(err)
	}
	if strings.Contains(string(data), "null") {
		t.Errorf("the file holds null: %s", data)
	}
	got, err := DecodeParcel([]byte(strings.ReplaceAll(string(data), "[]", "null")))
	if err != nil || got.Figures == nil || got.Peaks == nil || got.Document.Avoid.Lines == nil {
		t.Errorf("got %+v (%v)", got, err)
	}
}

func TestDecodeParcelRefuses(t *testing.T) {
	data, err := EncodeParcel(fullParcel())
	if err != nil {
		t.Fatal(err)
	}
	whole := string(data)
	replace := func(old, new string) string {
		if !strings.Contains(whole, old) {
			t.Fatalf("the file does not hold %s", old)
		}
		return strings.Replace(whole, old, new, 1)
	}
	for _, row := range []struct {
		name, text string
		code       Code
		words      string
	}{
		{"empty", "", CodeCutShort, "ends in the middle"},
		{"other JSON", `{"format":"something"}`, CodeUnreadable, "not a hand-over file"},
		{"not JSON", "RIFF....", CodeUnreadable, "cannot be read"},
		{"newer file", replace(`"version": 1`, `"version": 2`), CodeNewer, "newer version"},
		{"no version", replace(`"version": 1`, `"version": 0`), CodeUnreadable, "which version"},
		{"newer document", replace(`"schema": 1`, `"schema": 2`), CodeNewer, "newer version"},
		{"text for a number", replace(`1.4925`, `"1.4925"`), CodeUnreadable, `"ring.radius" holds a text, and a number belongs there`},
		{"number for a text", replace(`"Film port 7, spare"`, `7`), CodeUnreadable, `"name" holds a number, and a text belongs there`},
		{"part of a clamp", replace(`"clamps": 96`, `"clamps": 96.5`), CodeUnreadable, `a whole number belongs there`},
		{"beyond all numbers", replace(`1.4925`, `1e999`), CodeUnreadable, `the number "1e999"`},
		{"NaN", replace(`1.4925`, `NaN`), CodeUnreadable, "cannot be read"},
		{"unknown member", replace(`"clamps": 96`, `"clamps": 96, "bolts": 3`), CodeUnreadable, `"bolts"`},
		{"unknown face", replace(`"baffled"`, `"glued"`), CodeUnreadable, `"glued"`},
		{"unknown fluid", replace(`"kind": "baffled"`, `"kind": "baffled", "fluid": "gravy"`), CodeUnreadable, `fluid at the upper face that is not known: "gravy"`},
		{"unknown rim", replace(`"nominal": 213.4`, `"nominal": 213.4, "rim": "nailed"`), CodeUnreadable, `kind of rim that is not known: "nailed"`},
		{"no document", `{"format":"hoopsheet hand-over","version":1}`, CodeUnreadable, "no specification"},
		{"list for a document", `{"format":"hoopsheet hand-over","version":1,"document":[]}`, CodeUnreadable, "a list"},
		{"negative frequency", replace(`"frequency": 7`, `"frequency": -7`), CodeUnreadable, "a peak must have"},
		{"no time", replace(`2026-03-06T09:40:00Z`, `yesterday`), CodeUnreadable, `"yesterday", which is not a time`},
		{"second value", whole + "{}", CodeUnreadable, "cannot be read"},
		{"huge", whole + strings.Repeat(" ", mostParcelBytes), CodeTooLarge, "1 MiB"},
		{"deep", `{"format":` + strings.Repeat("[", 20000), CodeUnreadable, "cannot be read"},
	} {
		_, err := DecodeParcel([]byte(row.text))
		if codeOf(err) != row.code || !strings.Contains(err.Error(), row.words) {
			t.Errorf("%s: %q %v; want %q with %q", row.name, codeOf(err), err, row.code, row.words)
		}
	}
	// Every beginning of the file is refused.
	for k := 0; k < len(whole)-2; k += 7 {
		if _, err := DecodeParcel([]byte(whole[:k])); codeOf(err) != CodeCutShort && !strings.Contains(err.Error(), "may be cut short") {
			t.Errorf("the first %d bytes: %q %v", k, codeOf(err), err)
		}
	}
}

func TestEncodeParcelRefuses(t *testing.T) {
	for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		p := fullParcel()
		p.Figures[3].Value = bad
		if _, err := EncodeParcel(p); err == nil || !strings.Contains(err.Error(), `"air.massRatio"`) {
			t.Errorf("figure %g: %v", bad, err)
		}
		p = fullParcel()
		p.Document.Sheet.E = bad
		if _, err := EncodeLink(p); err == nil || !strings.Contains(err.Error(), "not a finite number") {
			t.Errorf("modulus %g: %v", bad, err)
		}
		p = fullParcel()
		p.Peaks[0].Frequency = bad
		if _, err := EncodeLink(p); err == nil || !strings.Contains(err.Error(), "a peak must have") {
			t.Errorf("peak %g: %v", bad, err)
		}
	}
}

package diaphragm

import (
	"math"
	"strings"
	"testing"

	"hoopsheet/core/quantity"
)

// problemAt gives the first problem of a field.
func problemAt(problems []Problem, field string) (Problem, bool) {
	for _, p := range problems {
		if p.Field == field {
			return p, true
		}
	}
	return Problem{}, false
}

// own lists the problems of the field that are no conflict with others.
func own(f Field, doc Diaphragm) (Problem, bool) {
	for _, p := range Validate(doc) {
		if p.Field == f.Path && p.Code != CodeConflict {
			return p, true
		}
	}
	return Problem{}, false
}

func TestBoundsOfEveryQuantityOnBothSides(t *testing.T) {
	for _, f := range Fields() {
		if f.Kind != KindQuantity {
			continue
		}
		try := func(value float64, sound bool) {
			t.Helper()
			doc := richDocument()
			doc.Faces.Lower.Kind = FaceBaffled // so that no depth is needed
			*f.number(&doc) = value
			p, wrong := own(f, doc)
			if wrong == sound {
				t.Errorf("%s = %g: %q", f.Path, value, p.Message)
			}
			if wrong && (p.Code != CodeBounds || !strings.HasPrefix(p.Message, f.capital()+" is ") || !strings.Contains(p.Message, "must lie from") || !strings.HasSuffix(p.Message, ".")) {
				t.Errorf("%s: %s %q", f.Path, p.Code, p.Message)
			}
		}
		try(f.Low, true)
		try(f.High, true)
		try(math.Nextafter(f.Low, math.Inf(-1)), false)
		try(math.Nextafter(f.High, math.Inf(1)), false)
		try(math.NaN(), false)
		try(math.Inf(1), false)
		try(math.Inf(-1), false)
		if f.Low > 0 {
			try(0, f.Optional)
			try(-f.High, false)
		}
		if f.Reason == "" {
			t.Errorf("%s has bounds without a reason", f.Path)
		}
	}
}

func TestBoundsOfCounts(t *testing.T) {
	for value, sound := range map[int]bool{0: true, 1: false, 2: false, 3: true, 1000: true, 1001: false, -1: false} {
		doc := Demo(testID, testCreated)
		doc.Ring.Clamps = value
		if p, wrong := problemAt(Validate(doc), "ring.clamps"); wrong == sound {
			t.Errorf("%d clamps: %v %s", value, wrong, p.Message)
		}
	}
}

// The bounds that a message names can be typed: in every unit they are rounded
// inwards, by at most one unit of the sixth digit.
func TestNamedBoundsAreAllowed(t *testing.T) {
	for _, f := range Fields() {
		if f.Kind != KindQuantity {
			continue
		}
		for _, symbol := range f.Units {
			unit, _ := quantity.Find(f.Dimension, symbol)
			for _, c := range []struct{ bound, direction float64 }{{f.Low, +1}, {f.High, -1}} {
				text := inside(c.bound, unit, c.direction)
				reading, err := f.asked(symbol).Parse(text)
				if err != nil || reading.SI < f.Low || reading.SI > f.High {
					t.Errorf("%s: the bound %s %s is read as %g, %v; allowed are %g to %g", f.Path, text, symbol, reading.SI, err, f.Low, f.High)
				}
				// One unit of the sixth digit is at most 1e-5 of the number,
				// which for temperatures counts from the unit's zero.
				if x := unit.FromSI(c.bound); math.Abs(unit.FromSI(reading.SI)-x) > 1.5e-5*math.Abs(x) {
					t.Errorf("%s: the bound %g is named as %s", f.Path, x, text)
				}
			}
		}
	}
}

func TestBoundsOfTexts(t *testing.T) {
	for _, f := range Fields() {
		if f.Kind != KindText && f.Kind != KindLongText && f.Kind != KindMaterial {
			continue
		}
		for _, c := range []struct {
			text   string
			code   Code
			offset int
		}{
			{"Port", "", 0},
			{"Membrane für Prüfraum 3, 静かな部屋, عمان", "", 0},
			{strings.Repeat("x", f.Most), "", 0},
			{strings.Repeat("€", f.Most), "", 0},
			{strings.Repeat("x", f.Most+1), CodeTooLong, f.Most},
			{strings.Repeat("\U0001F941", f.Most+1), CodeTooLong, 2 * f.Most},
			{"\U0001F941a\x00b", CodeText, 3},
			{"a\x1b[31m", CodeText, 1},
			{"310\u202e013", CodeText, 3},
			{"a\u2066b", CodeText, 1},
			{"a\xffb", CodeText, 1},
		} {
			doc := richDocument()
			*f.text(&doc) = c.text
			p, wrong := problemAt(Validate(doc), f.Path)
			if wrong != (c.code != "") || wrong && (p.Code != c.code || p.Offset != c.offset) {
				t.Errorf("%s = %.20q: %+v", f.Path, c.text, p)
			}
		}
		doc := richDocument()
		*f.text(&doc) = "  "
		if _, wrong := problemAt(Validate(doc), f.Path); wrong == f.Optional {
			t.Errorf("%s: empty gives a problem: %v", f.Path, wrong)
		}
		*f.text(&doc) = "two\nlines\tand a tab"
		if _, wrong := problemAt(Validate(doc), f.Path); wrong != (f.Kind != KindLongText) {
			t.Errorf("%s: a line break gives a problem: %v", f.Path, wrong)
		}
	}
}

func TestConflictsBetweenFields(t *testing.T) {
	for _, c := range []struct {
		name    string
		change  func(*Diaphragm)
		field   string
		code    Code
		message string
	}{
		{"open above only", func(d *Diaphragm) { d.Faces.Upper.Kind = FaceOpen }, "faces.upper.kind", CodeConflict,
			"The upper face is open and the lower face is baffled; open holds for both faces or for neither, because the air passes around the rim."},
		{"open below only", func(d *Diaphragm) { d.Faces.Lower.Kind = FaceOpen }, "faces.upper.kind", CodeConflict,
			"The upper face is baffled and the lower face is open; open holds for both faces or for neither, because the air passes around the rim."},
		{"open on both", func(d *Diaphragm) { d.Faces = Faces{Face{Kind: FaceOpen}, Face{Kind: FaceOpen}} }, "", "", ""},
		{"cavity without depth", func(d *Diaphragm) { d.Faces.Lower.Kind = FaceCavity }, "faces.lower.depth", CodeEmpty,
			"The lower face is a cavity, whose depth is needed; type the depth of the lower cavity."},
		{"cavity with depth", func(d *Diaphragm) { d.Faces.Lower = Face{Kind: FaceCavity, Depth: 0.1} }, "", "", ""},
		{"no kind", func(d *Diaphragm) { d.Faces.Upper.Kind = "" }, "faces.upper.kind", CodeChoice,
			"Upper face cannot be nothing; choose open, baffled, cavity or vacuum."},
		{"unknown kind", func(d *Diaphragm) { d.Faces.Upper.Kind = "water" }, "faces.upper.kind", CodeChoice,
			`Upper face cannot be "water"; choose open, baffled, cavity or vacuum.`},
		{"service upside down", func(d *Diaphragm) { d.Surroundings.ServiceMin = 313.15 }, "surroundings.serviceMin", CodeConflict,
			"The lowest temperature in service, 40 °C, lies above the highest, 35 °C; the lowest must not be above the highest."},
		{"one service temperature", func(d *Diaphragm) { d.Surroundings.ServiceMin = d.Surroundings.ServiceMax }, "", "", ""},
		{"steam", func(d *Diaphragm) { d.Surroundings.Temperature, d.Surroundings.Humidity = 371.15, 1 }, "surroundings.humidity", CodeConflict,
			"At 98 °C and 101.33 kPa a relative humidity of 100 % means that most of the gas is steam; that is no longer air."},
		{"steam is none in a vacuum", func(d *Diaphragm) {
			d.Surroundings.Temperature, d.Surroundings.Humidity = 371.15, 1
			d.Faces = Faces{Face{Kind: FaceVacuum}, Face{Kind: FaceVacuum}}
		}, "", "", ""},
		{"schema", func(d *Diaphragm) { d.Schema = 2 }, "schema", CodeSchema, "The document's schema is 2; this version works with schema 1."},
		{"id", func(d *Diaphragm) { d.ID = "../x" }, "id", CodeText, "The document's id must be 1 to 64 letters, digits, - or _."},
		{"created", func(d *Diaphragm) { d.Created = "yesterday" }, "created", CodeText, "The time of creation must be written like 2031-05-17T09:30:00Z."},
		{"revision", func(d *Diaphragm) { d.Revision = -1 }, "revision", CodeBounds, "The revision is -1; it must be a number from 0 to 1000000000."},
		{"script without id or time", func(d *Diaphragm) { d.ID, d.Created = "", "" }, "", "", ""},
		{"most lines", func(d *Diaphragm) { d.Avoid.Lines = lines(MostLines) }, "", "", ""},
		{"too many lines", func(d *Diaphragm) { d.Avoid.Lines = lines(MostLines + 1) }, "avoid.lines", CodeTooMany,
			"There are 25 lines to keep clear of; at most 24 are allowed."},
		{"bad line", func(d *Diaphragm) { d.Avoid.Lines[2].HalfWidth = 0.6 }, "avoid.lines.2.halfWidth", CodeBounds,
			"Half-width of line 3 is 60 %; it must lie from 0 % to 50 %, because a wider band would forbid everything."},
	} {
		doc := Demo(testID, testCreated)
		c.change(&doc)
		problems := Validate(doc)
		if c.field == "" {
			if len(problems) > 0 {
				t.Errorf("%s: %v", c.name, problems)
			}
			continue
		}
		if len(problems) != 1 || problems[0] != (Problem{c.field, c.code, c.message, -1}) {
			t.Errorf("%s: %+v", c.name, problems)
		}
	}
}

func lines(count int) []Line {
	list := make([]Line, count)
	for i := range list {
		list[i] = Line{Name: "hum", Frequency: 50, HalfWidth: 0.03}
	}
	return list
}

func TestAZeroDocumentIsRefusedInWords(t *testing.T) {
	problems := Validate(Diaphragm{})
	if len(problems) < 10 {
		t.Errorf("%d problems", len(problems))
	}
	codes := map[Code]bool{}
	for _, code := range Codes() {
		codes[code] = true
	}
	for _, p := range problems {
		if p.Field == "" || !codes[p.Code] || !strings.HasSuffix(p.Message, ".") {
			t.Errorf("%+v", p)
		}
	}
}

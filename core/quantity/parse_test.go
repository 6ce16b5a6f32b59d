package quantity

import (
	"errors"
	"math"
	"strings"
	"testing"
)

func TestParseReads(t *testing.T) {
	for _, c := range []struct {
		text   string
		d      Dimension
		bare   string
		want   float64
		symbol string
		echo   string
	}{
		// Spaces, micro signs and raised digits in all the ways they arrive.
		{"23 um", Length, "mm", 23e-6, "µm", ""},
		{"23um", Length, "mm", 23e-6, "µm", ""},
		{"23 µm", Length, "mm", 23e-6, "µm", ""},
		{"23 \u03bcm", Length, "mm", 23e-6, "µm", ""},
		{"23\u00a0µm", Length, "mm", 23e-6, "µm", ""},
		{"23\u2009µm", Length, "mm", 23e-6, "µm", ""},
		{"\t23 \u202fµm ", Length, "mm", 23e-6, "µm", ""},
		{"69.5 g/m2", ArealDensity, "kg/m²", 0.0695, "g/m²", ""},
		{"69.5 g/m^2", ArealDensity, "kg/m²", 0.0695, "g/m²", ""},
		{"69.5 g/m²", ArealDensity, "kg/m²", 0.0695, "g/m²", ""},
		{"69.5 g m⁻²", ArealDensity, "kg/m²", 0.0695, "g/m²", ""},
		{"400 N·m⁻¹", LineTension, "lbf/in", 400, "N/m", ""},
		{"1 in\u00b2", Length, "", 0, "", "refused"},
		// Signs and exponents.
		{"+5", Length, "mm", 0.005, "mm", ""},
		{"-40", Temperature, "°C", 233.15, "°C", ""},
		{"\u221240 °C", Temperature, "K", 233.15, "°C", ""},
		{"\u201340 °F", Temperature, "K", 233.15, "°F", ""},
		{"1e-3", Length, "m", 1e-3, "m", ""},
		{"1E3 mm", Length, "m", 1, "mm", ""},
		{"2.3e−5 m", Length, "mm", 2.3e-5, "m", ""},
		{"1.7×10⁻⁵", Expansion, "1/K", 1.7e-5, "1/K", `"1.7×10⁻⁵" is read as 1.7e-5`},
		{"1.7 x 10^-5 1/K", Expansion, "ppm/K", 1.7e-5, "1/K", `"1.7 x 10^-5" is read as 1.7e-5`},
		{"1.7·10^0", Ratio, "", 1.7, "", `"1.7·10^0" is read as 1.7`},
		{"17e-6 /K", Expansion, "ppm/K", 17e-6, "1/K", ""},
		{"5 1/K", Expansion, "ppm/K", 5, "1/K", ""},
		{"17 um/(m K)", Expansion, "1/K", 17e-6, "ppm/K", ""},
		// Decimal comma and groups of digits.
		{"1,5", Length, "m", 1.5, "m", `"1,5" is read as 1.5`},
		{"1,5 mm", Length, "m", 0.0015, "mm", `"1,5" is read as 1.5`},
		{"-1,5", Ratio, "", -1.5, "", `"-1,5" is read as -1.5`},
		{"0,500", Length, "m", 0.5, "m", `"0,500" is read as 0.500`},
		{"1234,567", Length, "m", 1234.567, "m", `"1234,567" is read as 1234.567`},
		{"1,50", Length, "m", 1.5, "m", `"1,50" is read as 1.50`},
		{"1,5000", Length, "m", 1.5, "m", `"1,5000" is read as 1.5000`},
		{"1,5e-3", Length, "m", 1.5e-3, "m", `"1,5e-3" is read as 1.5e-3`},
		{",5", Length, "m", 0.5, "m", `",5" is read as 0.5`},
		{"5,", Length, "m", 5, "m", `"5," is read as 5`},
		{".5", Length, "m", 0.5, "m", ""},
		{"5.", Length, "m", 5, "m", ""},
		{"1.500", Length, "m", 1.5, "m", ""},
		{"1,234.5", Length, "m", 1234.5, "m", `"1,234.5" is read as 1234.5`},
		{"12,345.6", Length, "m", 12345.6, "m", `"12,345.6" is read as 12345.6`},
		{"1.234,5", Length, "m", 1234.5, "m", `"1.234,5" is read as 1234.5`},
		{"1.500,5", Length, "m", 1500.5, "m", `"1.500,5" is read as 1500.5`},
		{"1,234,567", Length, "m", 1234567, "m", `"1,234,567" is read as 1234567`},
		{"1.234.567", Length, "m", 1234567, "m", `"1.234.567" is read as 1234567`},
		{"1 500", Length, "m", 1500, "m", `"1 500" is read as 1500`},
		{"1\u202f500,25 mm", Length, "m", 1.50025, "mm", "\"1\u202f500,25\" is read as 1500.25"},
		{"1 500,250", Length, "m", 1500.25, "m", `"1 500,250" is read as 1500.250`},
		{"0.000 023 m", Length, "mm", 23e-6, "m", `"0.000 023" is read as 0.000023`},
		{"3 000 rpm", Frequency, "Hz", 50, "rpm", `"3 000" is read as 3000`},
		// Fractions.
		{"3/4 in", Length, "mm", 0.01905, "in", `"3/4" is read as 0.75`},
		{"3/4\"", Length, "mm", 0.01905, "in", `"3/4" is read as 0.75`},
		{"1 3/4 in", Length, "mm", 0.04445, "in", `"1 3/4" is read as 1.75`},
		{"1-3/4 in", Length, "mm", 0.04445, "in", `"1-3/4" is read as 1.75`},
		{"1¾ in", Length, "mm", 0.04445, "in", `"1¾" is read as 1.75`},
		{"½", Length, "in", 0.0127, "in", `"½" is read as 0.5`},
		{"-1/2", Ratio, "", -0.5, "", `"-1/2" is read as -0.5`},
		{"1/64", Length, "in", 0.0254 / 64, "in", `"1/64" is read as 0.015625`},
		// Trade spellings.
		{"0.9 mil", Length, "mm", 22.86e-6, "mil", ""},
		{"2 thou", Length, "mm", 50.8e-6, "mil", ""},
		{"170 gsm", ArealDensity, "kg/m²", 0.17, "g/m²", ""},
		{"10 pli", LineTension, "N/m", 1751.268352464764, "lbf/in", ""},
		{"20C", Temperature, "K", 293.15, "°C", ""},
		{"68 degF", Temperature, "K", 293.15, "°F", ""},
		{"68 ºF", Temperature, "K", 293.15, "°F", ""},
		{"20 ℃", Temperature, "K", 293.15, "°C", ""},
		{"45°", Angle, "rad", math.Pi / 4, "°", ""},
		{"8 percent", Ratio, "", 0.08, "%", ""},
		// Zero in its forms, never a negative one.
		{"-0", Length, "m", 0, "m", ""},
		{"0e5", Length, "m", 0, "m", ""},
		{"00.00", Length, "m", 0, "m", ""},
	} {
		got, err := Parse(c.text, c.d, c.bare)
		if c.echo == "refused" {
			if err == nil {
				t.Errorf("%q was read as %v", c.text, got)
			}
			continue
		}
		if err != nil {
			t.Errorf("%q: %v", c.text, err)
			continue
		}
		// Two roundings in ToSI, one each in reading the decimal and the
		// expected value: 4 x 2^-53. Temperatures add one.
		if relative(got.SI, c.want) > 2.5 || math.Signbit(got.SI) != math.Signbit(c.want) {
			t.Errorf("%q is read as %.17g, want %.17g", c.text, got.SI, c.want)
		}
		if got.Unit.Symbol != c.symbol {
			t.Errorf("%q is read in %q, want %q", c.text, got.Unit.Symbol, c.symbol)
		}
		if got.Echo != c.echo {
			t.Errorf("%q has the echo %q, want %q", c.text, got.Echo, c.echo)
		}
	}
}

func TestTypedTellsBareNumbers(t *testing.T) {
	for text, want := range map[string]bool{"5": false, "5 mm": true, "5 m": true, "3/4": false, "1,5in": true} {
		if got, err := Parse(text, Length, "mm"); err != nil || got.Typed != want {
			t.Errorf("%q: typed %v, %v", text, got.Typed, err)
		}
	}
	// A bare number is in the first unit offered where the one given is none.
	if got, err := Parse("5", Length, "lbf/in"); err != nil || got.Unit.Symbol != "mm" {
		t.Errorf("%v, %v", got, err)
	}
}

func TestParseRefuses(t *testing.T) {
	thickness := Asked{Name: "thickness", Dimension: Length, Unit: "µm", Offered: []string{"m", "mm", "µm", "in", "mil"}}
	takes := "thickness takes m, mm, µm, in or mil."
	number := func(typed string) string {
		return `Thickness must be a number with a unit, such as 1.5 µm; "` + typed + `" cannot be read as one.`
	}
	for _, c := range []struct {
		text    string
		code    Code
		offset  int
		message string
	}{
		{"", CodeEmpty, 0, "Thickness is empty; type a number with a unit, such as 1.5 µm."},
		{" \t\u00a0", CodeEmpty, 0, "Thickness is empty; type a number with a unit, such as 1.5 µm."},
		{"2.3 lbf/in", CodeUnit, 4, "lbf/in is a unit of line tension; " + takes},
		{"  20 °C", CodeUnit, 5, "°C is a unit of temperature; " + takes},
		{"5 furlongs", CodeUnit, 2, `"furlongs" is not a unit known here; ` + takes},
		{"5 MM", CodeUnit, 2, `"MM" is not a unit; was mm meant? Thickness takes m, mm, µm, in or mil.`},
		{"5 (", CodeUnit, 2, `"(" is not a unit known here; ` + takes},
		{"5 mm 3", CodeUnit, 2, `"mm 3" is not a unit known here; ` + takes},
		{"5 \U0001F4CFmm", CodeUnit, 2, "\"\U0001F4CFmm\" is not a unit known here; " + takes},
		{"1,500", CodeAmbiguous, 1, `Thickness "1,500" can mean 1.5 or 1500; type 1.5 or 1500, whichever is meant.`},
		{"1,500 mm", CodeAmbiguous, 1, `Thickness "1,500 mm" can mean 1.5 or 1500; type 1.5 or 1500, whichever is meant.`},
		{"-12,000", CodeAmbiguous, 3, `Thickness "-12,000" can mean -12.0 or -12000; type -12.0 or -12000, whichever is meant.`},
		{"NaN", CodeNumber, 0, number("NaN")},
		{"Inf", CodeNumber, 0, number("Inf")},
		{"-Infinity", CodeNumber, 1, number("-Infinity")},
		{"mm", CodeNumber, 0, number("mm")},
		{"thin", CodeNumber, 0, number("thin")},
		{".", CodeNumber, 0, number(".")},
		{"-", CodeNumber, 1, number("-")},
		{"--5", CodeNumber, 1, number("--5")},
		{"1.2.3", CodeNumber, 3, number("1.2.3")},
		{"1,,5", CodeNumber, 2, number("1,,5")},
		{"1,234,56", CodeNumber, 7, number("1,234,56")},
		{"1,23.4", CodeNumber, 4, number("1,23.4")},
		{"1.23,4.5", CodeNumber, 0, number("1.23,4.5")},
		{"12 34", CodeUnit, 3, `"34" is not a unit known here; ` + takes},
		{"1e", CodeUnit, 1, `"e" is not a unit known here; ` + takes},
		{"1e-", CodeNumber, 1, number("1e-")},
		{"2 x 10^", CodeNumber, 1, number("2 x 10^")},
		{"2 x 10", CodeUnit, 2, `"x 10" is not a unit known here; ` + takes},
		{"2 x 10^a", CodeNumber, 1, number("2 x 10^a")},
		{"23 x 100 mm", CodeNumber, 2, number("23 x 100 mm")},
		{"1/0", CodeNumber, 0, number("1/0")},
		{"2 5/4", CodeNumber, 2, number("2 5/4")},
		{"1 500/700", CodeNumber, 2, number("1 500/700")},
		{"3/4/5", CodeNumber, 3, number("3/4/5")},
		{"1/2.5", CodeNumber, 3, number("1/2.5")},
		{"1/10000000", CodeRange, 0, `Thickness "1/10000000" is too large or too small a number to compute with.`},
		{"0x10", CodeUnit, 1, `"x10" is not a unit known here; ` + takes},
		{"1_000", CodeUnit, 1, `"_000" is not a unit known here; ` + takes},
		{"1e400", CodeRange, 0, `Thickness "1e400" is too large or too small a number to compute with.`},
		{"1e-400", CodeRange, 0, `Thickness "1e-400" is too large or too small a number to compute with.`},
		{"1e99999999999999999999", CodeRange, 0, `Thickness "1e99999999999999999999" is too large or too small a number to compute with.`},
		{strings.Repeat("1", 65), CodeTooLong, 64, "Thickness is typed in more than 64 characters; type a number with a unit, such as 1.5 µm."},
		{strings.Repeat("\U0001F4CF", 70), CodeTooLong, 128, "Thickness is typed in more than 64 characters; type a number with a unit, such as 1.5 µm."},
	} {
		got, err := thickness.Parse(c.text)
		var refused *Error
		if !errors.As(err, &refused) {
			t.Errorf("%q was read as %v, %v", c.text, got.SI, err)
			continue
		}
		if refused.Code != c.code || refused.Offset != c.offset || refused.Message != c.message {
			t.Errorf("%q: %s at %d, %q;\nwant %s at %d, %q", c.text, refused.Code, refused.Offset, refused.Message, c.code, c.offset, c.message)
		}
	}
}

func TestBothSidesOfEverySwitch(t *testing.T) {
	if _, err := Parse(strings.Repeat("0", 63)+"1", Length, "m"); err != nil {
		t.Errorf("64 characters: %v", err)
	}
	for text, ok := range map[string]bool{
		"1e100": true, "1.0001e100": false, "1e-100": true, "0.9999e-100": false,
		"-273.15 °C": true, "-273.16 °C": false, "-459.67 °F": true, "-459.68 °F": false, "0 K": true, "-0.001 K": false,
		"999999/999999": true, "1/1000000": false,
		"999,999": false, "1000,999": true, "0,999": true, "1,99": true, "1,9999": true,
	} {
		if _, err := Parse(text, Temperature, "K"); (err == nil) != ok {
			t.Errorf("%s: %v", text, err)
		}
	}
	_, err := Asked{Name: "ring temperature", Dimension: Temperature}.Parse("-300 °C")
	if err == nil || err.Error() != `Ring temperature "-300 °C" lies below absolute zero (-273.15 °C, -459.67 °F).` {
		t.Errorf("%v", err)
	}
}

func TestParseNamesDimensionsAndPlainNumbers(t *testing.T) {
	for _, c := range []struct {
		asked Asked
		text  string
		want  string
	}{
		{Asked{Dimension: LineTension}, "x", `Line tension must be a number with a unit, such as 1.5 N/m; "x" cannot be read as one.`},
		{Asked{Name: "Poisson's ratio", Dimension: Ratio, Offered: []string{""}}, "x", `Poisson's ratio must be a number; "x" cannot be read as one.`},
		{Asked{Name: "Poisson's ratio", Dimension: Ratio, Offered: []string{""}}, "1 m", `m is a unit of length; Poisson's ratio takes no unit.`},
		{Asked{Dimension: "warmth"}, "5", `There is no dimension named "warmth".`},
	} {
		_, err := c.asked.Parse(c.text)
		if err == nil || err.Error() != c.want {
			t.Errorf("%q: %v, want %s", c.text, err, c.want)
		}
	}
}

func FuzzParse(f *testing.F) {
	for _, line := range readLines(f, "parse_seeds.txt") {
		cells := strings.SplitN(line, "|", 3)
		if len(cells) != 3 {
			f.Fatalf("seed %q has no three parts", line)
		}
		f.Add(cells[2], cells[0], cells[1])
	}
	f.Fuzz(func(t *testing.T, text, dimension, unit string) {
		got, err := Parse(text, Dimension(dimension), unit)
		if err != nil {
			var refused *Error
			if !errors.As(err, &refused) || refused.Message == "" || refused.Offset < 0 {
				t.Fatalf("%q: %#v", text, err)
			}
			return
		}
		// What was read is written in its unit and read again. Writing uses 17
		// digits, which are exact; FromSI and ToSI round twice each, for
		// temperatures four and three times, which count by the size of the unit's
		// zero: at most 7 x 2^-53.
		written := FormatWithUnit(got.SI, got.Unit.Symbol, 17)
		again, err := Parse(written, Dimension(dimension), "")
		if err != nil {
			// A size at the limit may step over it by the rounding.
			if size := math.Abs(got.Number); size > 0.99*largest || size < 1.01*smallest {
				return
			}
			// So may absolute zero.
			if got.Unit.add != 0 && got.SI < 1e-9 {
				return
			}
			t.Fatalf("%q is written as %q: %v", text, written, err)
		}
		if again.Unit.Symbol != got.Unit.Symbol && got.Unit.Symbol != "" {
			t.Fatalf("%q is read in %s, then %q in %s", text, got.Unit.Symbol, written, again.Unit.Symbol)
		}
		if got.Unit.Symbol == "" {
			return // a bare number is read in another unit
		}
		allowed := 3.5 * 0x1p-52 * (math.Abs(got.SI) + math.Abs(got.Unit.add/math.Max(got.Unit.div, 1)))
		if math.Abs(again.SI-got.SI) > allowed {
			t.Fatalf("%q is %.17g, written as %q it is %.17g", text, got.SI, written, again.SI)
		}
	})
}

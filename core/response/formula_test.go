package response

import (
	"errors"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode/utf16"
)

func TestFormulaValues(t *testing.T) {
	// Each is held against the same expression written in Go.
	const r, theta = 0.6, 2.1
	x, y := r*math.Cos(theta), r*math.Sin(theta)
	for _, c := range []struct {
		text string
		want float64
	}{
		{"1 - r^2", 1 - r*r},
		{"-r^2", -(r * r)},
		{"2^3^2", 512},
		{"2^-1", 0.5},
		{"-2^-2", -0.25},
		{"2 - 3 - 4", -5},
		{"12/3/2", 2},
		{"2*-3", -6},
		{"--3", 3},
		{"-+-+-3", -3},
		{"1 + 2*3", 7},
		{"(1 + 2)*3", 9},
		{"x^2 + y^2", x*x + y*y},
		{"x*sin(theta) - y*cos(theta)", x*math.Sin(theta) - y*math.Cos(theta)},
		{"atan2(y, x)", math.Atan2(y, x)},
		{"tan(x) + asin(x) + acos(x) + atan(x)", math.Tan(x) + math.Asin(x) + math.Acos(x) + math.Atan(x)},
		{"sqrt(r)*exp(-r)*ln(r)*log10(r)", math.Sqrt(r) * math.Exp(-r) * math.Log(r) * math.Log10(r)},
		{"abs(x) + sign(x) + sign(y) + sign(0)", math.Abs(x)},
		{"min(3, 1, 2) + 10*max(3, 1, 2)", 31},
		{"step(0) + step(-0.1) + step(0.1)", 2},
		{"pow(2, 10) + hypot(3, 4)", 1029},
		{"2*pi + e", 2*math.Pi + math.E},
		{"1e3 + .5 + 5. + 2.5E-1 + 1e+2", 1105.75},
		{"(1 − r^2)·cos(2·θ)×π", (1 - r*r) * math.Cos(2*theta) * math.Pi},
		{"\t1\n-\u00a0r ", 1 - r},
		{"(((((r)))))", r},
	} {
		f, err := Compile(c.text)
		if err != nil {
			t.Errorf("%q: %v", c.text, err)
			continue
		}
		// A few roundings of the largest term.
		if got := f.At(r, theta); math.Abs(got-c.want) > 1e-15*(1+math.Abs(c.want)) {
			t.Errorf("%q = %.17g, want %.17g", c.text, got, c.want)
		}
	}
}

func TestFormulaRefusals(t *testing.T) {
	for _, c := range []struct {
		text   string
		offset int
		want   string
	}{
		{"", 0, "The formula is empty. Write one in r, theta, x and y, such as (1 - r^2)*cos(2*theta)."},
		{"2*sen(theta)", 2, "There is no function named \"sen\"; did you mean sin?"},
		{"sqr(r)", 0, "There is no function named \"sqr\"; did you mean sqrt?"},
		{"1 - thetta", 4, "There is nothing named \"thetta\"; did you mean theta?"},
		{"1 - q", 4, "There is nothing named \"q\". A formula is written in r, theta, x and y, or rho, X and Y in metres, with pi and e."},
		{"log(r)", 0, "There is no function named \"log\", which is read in two ways; use ln for the natural logarithm or log10."},
		{"sin(t)", 4, "There is no \"t\" in a formula: it gives the shape at the start, which has no time in it."},
		{"2r", 1, "A sign is missing before r. Write products with *, as in 2*r or r*(1 - r)."},
		{"(1 - r)(1 + r)", 7, "A sign is missing before the bracket. Write products with *, as in 2*r or r*(1 - r)."},
		{"r(1 - r)", 1, "A sign is missing before the bracket. Write products with *, as in 2*r or r*(1 - r)."},
		{"r 2", 2, "A sign is missing before 2. Write products with *, as in 2*r or r*(1 - r)."},
		{"sin r", 0, "sin is a function; write its value in brackets, as in sin(r)."},
		{"atan2", 0, "atan2 is a function; write its value in brackets, as in atan2(x, y)."},
		{"sin()", 0, "sin takes one value, and here it has 0."},
		{"sin(1,5)", 0, "sin takes one value, and here it has 2. Decimals are written with a point, as in 1.5."},
		{"1 + atan2(y)", 4, "atan2 takes two values, and here it has 1."},
		{"max(r)", 0, "max takes two values or more, and here it has 1."},
		{"1,5*r", 1, "A comma stands only between the values of a function. Decimals are written with a point, as in 1.5."},
		{"(1 - r", 0, "This bracket is not closed."},
		{"1 - r)", 5, "This bracket closes nothing."},
		{"(1 - )", 5, "A value is expected before this bracket."},
		{"1 -", 3, "The formula ends where a value is expected."},
		{"r**2", 2, "A value is expected before *. A power is written with ^, as in r^2."},
		{"/r", 0, "A value is expected in place of /."},
		{"[r]", 0, "Use round brackets in a formula."},
		{"r < 0.5", 2, "A formula makes no comparisons. Use step, as in step(0.5 - r), which is 1 where its value is 0 or more and 0 elsewhere."},
		{"r²", 1, "Write a power with ^, as in r^2."},
		{"sin(90°)", 6, "Angles are in radians: 90 degrees are pi/2."},
		{"r; 1", 1, "A formula has no use for ';'."},
		{"1.2.3", 3, "A number has one decimal point."},
		{"1e999", 0, "The number \"1e999\" is too large."},
		// An offset counts UTF-16 units: the letter outside the basic plane is two.
		{"θ + 𝛑", 4, "There is nothing named \"𝛑\". A formula is written in r, theta, x and y, or rho, X and Y in metres, with pi and e."},
		{"θ + sin(𝛑) + q", 8, ""},
		{"1 + \xff", 4, "This character cannot be read."},
		{strings.Repeat("(", 60) + "r" + strings.Repeat(")", 60), 51, "The formula is nested too deeply; at most 50 brackets, signs and powers may stand inside one another."},
		{strings.Repeat("r+", 600) + "r", 0, "The formula has 1201 characters; at most 1000 are read."},
	} {
		_, err := Compile(c.text)
		var refusal *FormulaError
		if !errors.As(err, &refusal) {
			t.Errorf("%q is read", c.text)
			continue
		}
		if c.want != "" && refusal.Message != c.want {
			t.Errorf("%q: %s\nwant %s", c.text, refusal.Message, c.want)
		}
		if refusal.Offset != c.offset {
			t.Errorf("%q: offset %d, want %d (%s)", c.text, refusal.Offset, c.offset, refusal.Message)
		}
	}
}

func TestFormulaDoesNotAllocate(t *testing.T) {
	for _, text := range []string{
		"(1 - r^2)*cos(2*theta)*exp(-x^2) + max(x, y, r)",
		strings.Repeat("(1+", 40) + "r" + strings.Repeat(")", 40),
	} {
		f, err := Compile(text)
		if err != nil {
			t.Fatal(err)
		}
		if n := testing.AllocsPerRun(10, func() { f.At(0.3, 1) }); n != 0 {
			t.Errorf("%d allocations of %q", int(n), text)
		}
	}
}

func FuzzFormula(f *testing.F) {
	names, err := filepath.Glob("../../testdata/formulas/*.txt")
	if err != nil || len(names) == 0 {
		f.Fatalf("no seeds: %v", err)
	}
	for _, name := range names {
		text, err := os.ReadFile(name)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(string(text))
	}
	f.Fuzz(func(t *testing.T, text string) {
		formula, err := Compile(text)
		if err == nil {
			for _, r := range []float64{0, 0.3, 1} {
				formula.At(r, 2)
			}
			return
		}
		var refusal *FormulaError
		if !errors.As(err, &refusal) || refusal.Message == "" {
			t.Fatalf("%q: %v", text, err)
		}
		if refusal.Offset < 0 || refusal.Offset > len(utf16.Encode([]rune(text))) {
			t.Fatalf("%q: offset %d", text, refusal.Offset)
		}
	})
}

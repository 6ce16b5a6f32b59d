package quantity

import (
	"math"
	"os"
	"strconv"
	"strings"
	"testing"
)

// readLines gives the lines of a file of testdata that are no comment.
func readLines(t testing.TB, name string) []string {
	t.Helper()
	data, err := os.ReadFile("../../testdata/quantity/" + name)
	if err != nil {
		t.Fatal(err)
	}
	var lines []string
	for line := range strings.Lines(string(data)) {
		line = strings.TrimSuffix(line, "\n")
		if line != "" && line[0] != '#' {
			lines = append(lines, line)
		}
	}
	return lines
}

// relative is the distance of got from want in units of want's last place, by
// size: 1 is 2^-52 of want.
func relative(got, want float64) float64 {
	if got == want {
		return 0
	}
	return math.Abs(got-want) / math.Abs(want) / 0x1p-52
}

// The factors against the printed ones of NIST SP 811, appendix B.8.
// Tolerance: half a unit of the last digit printed; exact factors are printed
// short and held to the same.
func TestFactorsArePublished(t *testing.T) {
	lines := readLines(t, "nist_sp811.csv")
	if len(lines) != 26 {
		t.Errorf("%d factors, want 26", len(lines))
	}
	for _, line := range lines {
		cells := strings.Split(line, ",")
		want, err := strconv.ParseFloat(cells[2], 64)
		if err != nil {
			t.Fatal(err)
		}
		u, ok := Find(Dimension(cells[0]), cells[1])
		if !ok {
			t.Errorf("no unit %s of %s", cells[1], cells[0])
			continue
		}
		exponent := math.Floor(math.Log10(want))
		if halfLastDigit := 0.5 * math.Pow(10, exponent-6); math.Abs(u.ToSI(1)-want) > halfLastDigit*(1+1e-9) {
			t.Errorf("1 %s = %.10g, NIST prints %s", cells[1], u.ToSI(1), cells[2])
		}
	}
}

// The factors against SciPy. It multiplies rounded constants: up to three
// factors and as many operations, each good to half an ulp (2^-53 relative),
// with squares and cubes of feet counting two and three times; ours adds two
// roundings. Eight half-ulps in all, 4 x 2^-52.
//
// Temperatures: SciPy adds a rounded zero offset (273.15 or 459.67), so errors
// are a few half-ulps of 512, 2^-44 K.
func TestFactorsAgreeWithSciPy(t *testing.T) {
	lines := readLines(t, "scipy_constants.csv")
	if len(lines) != 37 {
		t.Errorf("%d values, want 37", len(lines))
	}
	for _, line := range lines {
		cells := strings.Split(line, ",")
		want, err := strconv.ParseFloat(cells[2], 64)
		if err != nil {
			t.Fatal(err)
		}
		if cells[0] == "temperature" {
			reading, err := Parse(cells[1], Temperature, "K")
			if err != nil || math.Abs(reading.SI-want) > 0x1p-44 {
				t.Errorf("%s = %.17g K, %v; SciPy says %.17g", cells[1], reading.SI, err, want)
			}
			continue
		}
		u, ok := Find(Dimension(cells[0]), cells[1])
		if got := u.ToSI(1); !ok || relative(got, want) > 4 {
			t.Errorf("1 %s = %.17g, %v; SciPy says %.17g", cells[1], got, ok, want)
		}
	}
}

// Factors that are exact by definition come out as the nearest float64: prefix
// units by the SI, the others by the agreement of 1959 and the definition of
// the atmosphere. The inputs are whole, so that ToSI rounds once, by division.
func TestDefinedFactorsAreExact(t *testing.T) {
	for _, c := range []struct {
		d      Dimension
		number float64
		symbol string
		want   float64
	}{
		{Length, 23, "µm", 23e-6}, {Length, 450, "mm", 0.45}, {Length, 100, "nm", 100e-9},
		{Length, 1, "in", 0.0254}, {Length, 1, "ft", 0.3048}, {Length, 1, "mil", 25.4e-6}, {Area, 3, "cm²", 3e-4}, {Area, 1, "in²", 6.4516e-4}, {Area, 50, "mm²", 50e-6},
		{Mass, 1, "lb", 0.45359237}, {Mass, 1, "oz", 0.028349523125},
		{LineTension, 2, "kN/m", 2000}, {LineTension, 3, "N/mm", 3000},
		{Pressure, 1, "atm", 101325}, {Pressure, 1013, "hPa", 101300}, {Stress, 4, "GPa", 4e9},
		{Pressure, 1, "inH₂O", 249.08891}, {Pressure, 1, "inHg", 3386.388640341},
		{Temperature, 0, "°C", 273.15}, {Temperature, 20, "°C", 293.15}, {Temperature, 32, "°F", 273.15}, {Temperature, 68, "°F", 293.15},
		{Frequency, 3000, "rpm", 50}, {Expansion, 17, "ppm/K", 17e-6}, {Expansion, 5, "1/°F", 9}, {Expansion, 10, "ppm/°F", 18e-6},
		{Ratio, 8, "%", 0.08}, {Ratio, 4, "‰", 0.004}, {Time, 30, "ms", 0.03}, {Angle, 180, "°", math.Pi},
	} {
		u, ok := Find(c.d, c.symbol)
		if got := u.ToSI(c.number); !ok || got != c.want {
			t.Errorf("%g %s = %.17g, want %.17g", c.number, c.symbol, got, c.want)
		}
	}
}

// ToSI and FromSI round at most twice each for units with a common zero (the
// factors are whole, so they bring no error of their own; pi is only used both
// ways): together 4 x 2^-53, and one more as the errors multiply.
//
// For temperatures three operations round on the way to SI and four on the way
// back, each by half an ulp of a number no larger than |x| + offset in the
// unit's steps: 7 x 2^-53 of that.
func TestEveryUnitRoundTrips(t *testing.T) {
	numbers := []float64{1, 0.9, 23, 1.0 / 3, 101.325, 1e-7, 6.02e23, 12345.678, 20, -40, 0.01, 0}
	for _, d := range Dimensions() {
		for _, u := range units(d) {
			for _, x := range numbers {
				if u.add != 0 && x > 1e6 {
					continue // no temperature
				}
				back := u.FromSI(u.ToSI(x))
				allowed := 2.5 * 0x1p-52 * math.Abs(x)
				if u.add != 0 {
					allowed = 3.5 * 0x1p-52 * (math.Abs(x) + u.add/u.mul)
				}
				if math.Abs(back-x) > allowed {
					t.Errorf("%g %s comes back as %.17g", x, u.Symbol, back)
				}
			}
		}
	}
}

func TestASymbolMeansOneUnit(t *testing.T) {
	for _, d := range Dimensions() {
		spellings := map[string]string{}
		for _, u := range units(d) {
			for _, s := range append([]string{key(u.Symbol)}, u.also...) {
				if other, twice := spellings[s]; twice {
					t.Errorf("%s: %q means %s and %s", d, s, other, u.Symbol)
				}
				spellings[s] = u.Symbol
				if s != key(s) {
					t.Errorf("%s: the spelling %q can never match; its key is %q", d, s, key(s))
				}
			}
			same, ok := bySymbol(u.Symbol)
			if !ok || same.mul != u.mul || same.div != u.div || same.add != u.add {
				t.Errorf("%s: the symbol %q means another unit elsewhere", d, u.Symbol)
			}
			for name, x := range map[string]float64{"mul": u.mul, "div": u.div, "add": u.add} {
				if x != math.Trunc(x) && d != Angle || math.Abs(x) > 1<<53 {
					t.Errorf("%s: %s of %s is %g, not a whole number below 2^53", d, name, u.Symbol, x)
				}
			}
		}
	}
}

func TestOfferedUnitsExist(t *testing.T) {
	for _, d := range Dimensions() {
		if d.Words() == "" {
			t.Errorf("%s has no words", d)
		}
		for _, system := range Systems() {
			list := Offered(d, system)
			if len(list) == 0 {
				t.Errorf("%s: nothing offered", d)
			}
			for _, symbol := range list {
				if u, ok := Find(d, symbol); !ok || u.Symbol != symbol {
					t.Errorf("%s: %q is offered but is not a symbol", d, symbol)
				}
			}
		}
	}
	if got := Offered(LineTension, InchPound)[0]; got != "lbf/in" {
		t.Errorf("inch-pound tension begins with %s", got)
	}
	if Offered("warmth", SI) != nil && len(Offered("warmth", SI)) != 0 || Dimension("warmth").Words() != "" {
		t.Error("a dimension that does not exist has units or words")
	}
}

func TestZeroUnitIsPlain(t *testing.T) {
	if got := (Unit{}).ToSI(0.38); got != 0.38 {
		t.Errorf("ToSI gives %g", got)
	}
	if got := (Unit{}).FromSI(0.38); got != 0.38 {
		t.Errorf("FromSI gives %g", got)
	}
}

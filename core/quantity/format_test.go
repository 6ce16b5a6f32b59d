package quantity

import (
	"math"
	"math/rand/v2"
	"strconv"
	"testing"
)

func TestFormat(t *testing.T) {
	for _, c := range []struct {
		si     float64
		symbol string
		digits int
		want   string
	}{
		{23e-6, "µm", 3, "23"},
		{23e-6, "m", 3, "0.000023"},
		{0.45, "mm", 6, "450"},
		{0.0695, "g/m²", 4, "69.5"},
		{310, "lbf/in", 4, "1.77"},
		{310, "lbf/in", 6, "1.77015"},
		{293.15, "°C", 6, "20"},
		{273.15, "°C", 17, "0"},
		{293.15, "°F", 6, "68"},
		{101325, "kPa", 4, "101.3"},
		{4.8e9, "Pa", 3, "4800000000"},
		{4.8e9, "GPa", 3, "4.8"},
		{0.08, "%", 3, "8"},
		{0.38, "", 3, "0.38"},
		{1.7e-5, "1/K", 3, "0.000017"},
		{1.7e-6, "1/K", 3, "1.7e-6"},
		{-1.7e-6, "1/K", 1, "-2e-6"},
		{9999999999, "", 10, "9999999999"},
		{9999999999, "", 9, "1e10"},
		{1e10, "", 5, "1e10"},
		{9.99e-6, "", 3, "9.99e-6"},
		{1e-5, "", 3, "0.00001"},
		{123456, "", 3, "123000"},
		{0.05, "", 0, "0.05"},
		{1.0 / 3, "", 99, "0.33333333333333331"},
		{0, "mm", 3, "0"},
		{math.Copysign(0, -1), "mm", 3, "0"},
		{math.NaN(), "mm", 3, "–"},
		{math.Inf(-1), "mm", 3, "–"},
	} {
		if got := Format(c.si, c.symbol, c.digits); got != c.want {
			t.Errorf("%g in %q to %d digits: %q, want %q", c.si, c.symbol, c.digits, got, c.want)
		}
	}
}

func TestFormatWithUnit(t *testing.T) {
	for _, c := range []struct {
		si           float64
		symbol, want string
	}{{23e-6, "µm", "23\u00a0µm"}, {0.38, "", "0.38"}, {math.Pi / 2, "°", "90°"}, {293.15, "°C", "20\u00a0°C"}} {
		if got := FormatWithUnit(c.si, c.symbol, 6); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}

func TestFormatPanicsOnlyOnUnknownSymbols(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("an unknown symbol went through")
		}
	}()
	Format(1, "furlong", 3)
}

// The text reads back to the value rounded to its digits: exactly what
// strconv gives for them.
func TestFormatRoundTrips(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	for range 20000 {
		x := math.Ldexp(r.Float64()-0.5, r.IntN(120)-60)
		digits := 1 + r.IntN(17)
		text := FormatNumber(x, digits)
		got, err := strconv.ParseFloat(text, 64)
		want, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'e', digits-1, 64), 64)
		if err != nil || got != want {
			t.Fatalf("%g to %d digits is %q, which reads as %g", x, digits, text, got)
		}
		if again, err := Parse(text, Ratio, ""); err != nil || again.Number != want || again.Echo != "" {
			t.Fatalf("Parse(%q) = %v, %v", text, again, err)
		}
	}
}

package sheet

import (
	"math"
	"testing"
)

// The relative tolerance covers the rounding of at most eight operations on
// double precision numbers, 8 x 1.1e-16, with a factor of ten to spare.
const rounding = 1e-14

func TestStress(t *testing.T) {
	// By hand: 200 N/m on 23 um is 200/23e-6 = 8.695652 MPa; against 33 MPa
	// that is 26.35 %. 1390 kg/m^3 x 23 um = 31.97 g/m^2.
	if got, want := Stress(200, 23e-6), 200e6/23; !withinRelative(got, want, rounding) {
		t.Errorf("stress %g, want %g", got, want)
	}
	if got, want := StressShare(200, 23e-6, 33e6), 200.0/759; !withinRelative(got, want, rounding) {
		t.Errorf("share %g, want %g", got, want)
	}
	if got, want := ArealDensity(1390, 23e-6), 0.03197; !withinRelative(got, want, rounding) {
		t.Errorf("areal density %g, want %g", got, want)
	}
	if got := TensionAtStress(Stress(371, 50e-6), 50e-6); !withinRelative(got, 371, rounding) {
		t.Errorf("tension of its own stress %g", got)
	}
	if got := StressShare(200, 23e-6, 0); !math.IsInf(got, 1) {
		t.Errorf("share of no allowable stress is %g, want +Inf", got)
	}
}

func TestBendingStiffness(t *testing.T) {
	// By hand: steel, 210 GPa, 1 mm, nu 0.3: 210e9 x 1e-9 / (12 x 0.91) =
	// 210/10.92 = 19.2307692 N m; the textbook value is 19.23. Twice the thickness
	// makes eight times the stiffness.
	if got, want := BendingStiffness(210e9, 1e-3, 0.3), 210/10.92; !withinRelative(got, want, rounding) {
		t.Errorf("bending stiffness %g, want %g", got, want)
	}
	if got, want := BendingStiffness(4.8e9, 46e-6, 0.38), 8*BendingStiffness(4.8e9, 23e-6, 0.38); !withinRelative(got, want, rounding) {
		t.Errorf("twice the thickness gives %g, want %g", got, want)
	}
}

func TestThermalByHand(t *testing.T) {
	// Worked by hand with round numbers: E h = 4.8e9 x 25e-6 = 120000 N/m;
	// divided by 1 - 0.4 = 0.6: 200000 N/m. Expansion 17e-6 - 12e-6 = 5e-6:
	// 1 N/m per kelvin. From 200 N/m at 293.15 K it is slack 200 K higher and
	// at 20 MPa (500 N/m) 300 K lower, which is below absolute zero; at 10 MPa
	// (250 N/m) 50 K lower.
	p := Thermal{Tension: 200, Temperature: 293.15, Thickness: 25e-6, E: 4.8e9, Nu: 0.4, SheetCTE: 17e-6, RingCTE: 12e-6}
	if got := p.PerKelvin(); !withinRelative(got, -1, 100*rounding) { // the difference 17e-6 - 12e-6 loses a digit
		t.Errorf("%g N/m per kelvin, want -1", got)
	}
	table := []struct{ celsius, tension float64 }{
		{-20, 240}, {0, 220}, {20, 200}, {60, 160}, {120, 100}, {220, 0}, {300, 0},
	}
	for _, row := range table {
		if got := p.TensionAt(row.celsius + 273.15); math.Abs(got-row.tension) > 1e-9 {
			t.Errorf("tension at %g °C is %g, want %g", row.celsius, got, row.tension)
		}
	}
	if got, ok := p.SlackTemperature(); !ok || math.Abs(got-493.15) > 1e-9 {
		t.Errorf("slack at %g K (%v), want 493.15", got, ok)
	}
	if got, ok := p.OverStressTemperature(10e6); !ok || math.Abs(got-243.15) > 1e-9 {
		t.Errorf("over-stressed at %g K (%v), want 243.15", got, ok)
	}
	if got, ok := p.OverStressTemperature(20e6); ok {
		t.Errorf("over-stressed at %g K, want none above absolute zero", got)
	}
}

func TestThermalOtherSide(t *testing.T) {
	// A ring that expands more than the sheet tightens it when warm: steel
	// foil on an aluminium ring. E h/(1-nu) = 200e9 x 50e-6/0.75 = 13333333.3;
	// x 6e-6 = 80 N/m per kelvin. 1000 N/m slackens 12.5 K lower; 100 MPa
	// (5000 N/m) is reached 50 K higher.
	p := Thermal{Tension: 1000, Temperature: 293.15, Thickness: 50e-6, E: 200e9, Nu: 0.25, SheetCTE: 17e-6, RingCTE: 23e-6}
	if got := p.TensionAt(303.15); math.Abs(got-1800) > 1e-8 {
		t.Errorf("tension 10 K warmer is %g, want 1800", got)
	}
	if got, ok := p.SlackTemperature(); !ok || math.Abs(got-280.65) > 1e-9 {
		t.Errorf("slack at %g K (%v), want 280.65", got, ok)
	}
	if got, ok := p.OverStressTemperature(100e6); !ok || math.Abs(got-343.15) > 1e-9 {
		t.Errorf("over-stressed at %g K (%v), want 343.15", got, ok)
	}
}

func TestThermalEqualExpansion(t *testing.T) {
	p := Thermal{Tension: 1000, Temperature: 293.15, Thickness: 50e-6, E: 200e9, Nu: 0.25, SheetCTE: 17e-6, RingCTE: 17e-6}
	if got := p.TensionAt(400); got != 1000 {
		t.Errorf("tension %g, want 1000 unchanged", got)
	}
	if _, ok := p.SlackTemperature(); ok {
		t.Error("a slack temperature was given although nothing changes")
	}
	if _, ok := p.OverStressTemperature(1e9); ok {
		t.Error("an over-stress temperature was given although nothing changes")
	}
}

func withinRelative(got, want, tolerance float64) bool {
	return math.Abs(got-want) <= tolerance*math.Abs(want)
}

package air

import (
	"math"
	"testing"
)

// TestSoundSpeedCramer holds the polynomial against values of Cramer,
// J. Acoust. Soc. Am. 93 (1993) 2510-2516, eq. 15, computed by an independent
// implementation with coefficients that agree in eight public files; 331.455
// m/s at 0 °C, dry, 314 ppm is the value he states (331.45).
func TestSoundSpeedCramer(t *testing.T) {
	const tolerance = 5.1e-6 // half a unit of the fifth decimal, m/s
	for _, row := range []struct {
		celsius, humidity, carbon, sound, vapour float64
	}{
		{0, 0, 0.000314, 331.455, 0},
		{20, 0, 0.000314, 343.36718, 0},
		{20, 0.5, 0.000314, 343.9944, 0.011586411},
		{20, 0.5, 0.0004, 343.98673, 0.011586411},
		{25, 0.5, 0.0004, 347.12655, 0.015701498},
		{30, 1, 0.0004, 351.46888, 0.042077164},
		{0, 0, 0.0004, 331.44767, 0},
		{20, 0, 0.0004, 343.35947, 0},
		{20, 0, 0, 343.39536, 0},
	} {
		kelvin := row.celsius + 273.15
		if got := SoundSpeed(kelvin, 101325, row.humidity, row.carbon); math.Abs(got-row.sound) > tolerance {
			t.Errorf("%g °C, humidity %g, carbon dioxide %g: %.6f m/s, published %.5f", row.celsius, row.humidity, row.carbon, got, row.sound)
		}
		if got := cramerVapourFraction(kelvin, 101325, row.humidity); math.Abs(got-row.vapour) > 5e-10 {
			t.Errorf("%g °C, humidity %g: vapour fraction %.10f, published %.9f", row.celsius, row.humidity, got, row.vapour)
		}
	}
}

// TestSoundSpeedSimple holds it against ISO 9613-1:1993 (A.5),
// c = 343.2 sqrt(T/293.15), which leaves humidity out: within 0.05 % dry and
// within 0.24 % at half humidity, as the published comparison says.
func TestSoundSpeedSimple(t *testing.T) {
	for celsius := 0.0; celsius <= 30; celsius += 5 {
		kelvin := celsius + 273.15
		simple := 343.2 * math.Sqrt(kelvin/293.15)
		if relative := SoundSpeed(kelvin, 101325, 0, CarbonDioxide)/simple - 1; math.Abs(relative) > 0.0007 {
			t.Errorf("dry at %g °C: %+.4f %% from the simple formula", celsius, 100*relative)
		}
	}
	if relative := SoundSpeed(293.15, 101325, 0.5, CarbonDioxide)/343.2 - 1; relative < 0.0022 || relative > 0.0024 {
		t.Errorf("half humidity at 20 °C: %+.4f %%, published comparison 0.23 %%", 100*relative)
	}
}

// TestSoundSpeedStandardAtmosphere checks the scaling outside the polynomial's
// range. The standard atmosphere puts kappa = 1.4 where dry air has up to
// 1.4025 (from memory), 0.09 % in the speed.
func TestSoundSpeedStandardAtmosphere(t *testing.T) {
	for _, row := range standard {
		got := SoundSpeed(row.temperature, row.pressure, 0, CarbonDioxide)
		if relative := got/row.sound - 1; math.Abs(relative) > 0.001 {
			t.Errorf("at %g K: %g m/s, standard atmosphere %g (%+.3f %%)", row.temperature, got, row.sound, 100*relative)
		}
	}
}

// TestSoundSpeedJoins checks that nothing jumps where the range ends. A step
// of 1e-6 K or 1e-3 Pa to either side changes the speed by 1e-6 m/s at most.
func TestSoundSpeedJoins(t *testing.T) {
	for _, kelvin := range []float64{soundColdest, soundHottest} {
		below, above := SoundSpeed(kelvin-1e-6, 101325, 0.4, CarbonDioxide), SoundSpeed(kelvin+1e-6, 101325, 0.4, CarbonDioxide)
		if math.Abs(above-below) > 2e-6 {
			t.Errorf("at %g K the speed jumps by %g m/s", kelvin, above-below)
		}
	}
	for _, pressure := range []float64{soundLowest, soundHighest} {
		below, above := SoundSpeed(293.15, pressure-1e-3, 0.4, CarbonDioxide), SoundSpeed(293.15, pressure+1e-3, 0.4, CarbonDioxide)
		if math.Abs(above-below) > 2e-6 {
			t.Errorf("at %g Pa the speed jumps by %g m/s", pressure, above-below)
		}
	}
}

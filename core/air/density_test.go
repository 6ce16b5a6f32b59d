package air

import (
	"math"
	"testing"
)

// TestDensityCIPM holds the density against values of the CIPM-2007 equation
// (Picard, Davis, Glaser, Fujii, Metrologia 45 (2008) 149-155) computed by an
// independent implementation with the coefficients of two complete public
// ones, 400 ppm carbon dioxide.
func TestDensityCIPM(t *testing.T) {
	// The reference is given to ten digits; half a unit of the tenth is at
	// most 5e-10 relative.
	const tolerance = 5e-10
	for _, row := range []struct {
		celsius, pressure, humidity float64
		density, z, vapour          float64
		saturation, enhancement     float64
	}{
		{20, 101325, 0.5, 1.199313895, 0.9996147675, 0.01158934013, 2339.16323, 1.004025605},
		{20, 101325, 0, 1.204557342, 0.9996431394, 0, 2339.16323, 1.004025605},
		{20, 100000, 0.5, 1.183556609, 0.9996193142, 0.01174241228, 2339.16323, 1.003984},
		{15, 101325, 0, 1.225521345, 0.9995922115, 0, 1705.669094, 1.003927605},
		{25, 101325, 0.5, 1.177315374, 0.9996508382, 0.01570647202, 3169.756976, 1.004151605},
		{23, 101325, 0.5, 1.186084134, 0.9996372648, 0.01392757567, 2810.904558, 1.004097845},
		{0, 101325, 0, 1.293048698, 0.9994159608, 0, 611.212624, 1.003801605},
		{30, 101325, 0.9, 1.148181388, 0.9996074661, 0.03788379617, 4246.799013, 1.004305605},
		{20, 60000, 0.5, 0.7079335179, 0.9997549992, 0.0195462039, 2339.16323, 1.002728},
		{27, 110000, 1, 1.261551617, 0.9995686165, 0.03258118345, 3567.937826, 1.00448224},
	} {
		kelvin := row.celsius + 273.15
		x := VapourFraction(kelvin, row.pressure, row.humidity)
		for _, value := range []struct {
			name      string
			got, want float64
		}{
			{"density", Density(kelvin, row.pressure, row.humidity, CarbonDioxide), row.density},
			{"compressibility", compressibility(kelvin, row.pressure, x), row.z},
			{"vapour fraction", x, row.vapour},
			{"saturation pressure", SaturationPressure(kelvin), row.saturation},
			{"enhancement factor", enhancement(kelvin, row.pressure), row.enhancement},
		} {
			if math.Abs(value.got-value.want) > tolerance*math.Abs(value.want) {
				t.Errorf("%g °C, %g Pa, %g: %s is %.11g, published %.11g", row.celsius, row.pressure, row.humidity, value.name, value.got, value.want)
			}
		}
	}
}

// standard atmosphere: ISO 2533:1975 by geopotential height, with kappa = 1.4
// and the gas constant of dry air 287.05287 J/(kg K).
var standard = []struct{ temperature, pressure, density, sound float64 }{
	{294.65, 113929.09, 1.346996, 344.11071},
	{288.15, 101325.0, 1.225, 340.29399},
	{281.65, 89874.563, 1.1116425, 336.43397},
	{275.15, 79495.202, 1.0064901, 332.52915},
	{255.65, 54019.888, 0.73611555, 320.52939},
	{236.15, 35599.785, 0.52516713, 308.06257},
}

// TestDensityStandardAtmosphere checks the extrapolation: the standard
// atmosphere treats air as an ideal gas, whose Z = 1 is up to 0.1 % too large
// at these states, and its molar mass differs by 4e-5.
func TestDensityStandardAtmosphere(t *testing.T) {
	for _, row := range standard {
		got := Density(row.temperature, row.pressure, 0, CarbonDioxide)
		if relative := got/row.density - 1; relative < 0 || relative > 0.0015 {
			t.Errorf("at %g K: %g, standard atmosphere %g (%+.3f %%)", row.temperature, got, row.density, 100*relative)
		}
	}
}

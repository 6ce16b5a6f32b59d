package quantity

import "math"

// The units of each dimension with their spellings.
//
// Sources of the factors:
//   - The international yard and pound agreement of 1959 (Federal Register
//     Doc. 59-5442): 1 yd = 0.9144 m, so 1 in = 0.0254 m, 1 ft = 0.3048 m, and
//     1 lb = 0.453 592 37 kg, all exact; 1 oz = 1/16 lb.
//   - Standard gravity 9.806 65 m/s^2, exact (3rd General Conference on
//     Weights and Measures, 1901), so 1 lbf = 4.448 221 615 260 5 N.
//   - Conventional inch of mercury and of water: columns of 13 595.1 kg/m^3
//     and 1000 kg/m^3 under standard gravity (NIST SP 811, appendix B).
//   - All else by definition of the prefix or of the unit.
//
// Each quotient is written with whole numbers; TestFactorsArePublished holds
// all of them against the decimal factors of NIST SP 811.
func units(d Dimension) []Unit {
	switch d {
	case Length:
		return lengths
	case Area:
		return areas
	case ArealDensity:
		return arealDensities
	case LineTension:
		return lineTensions
	case Pressure, Stress:
		return pressures
	case Density:
		return densities
	case Temperature:
		return temperatures
	case Frequency:
		return frequencies
	case Expansion:
		return expansions
	case Ratio:
		return ratios
	case Angle:
		return angles
	case Time:
		return times
	case Speed:
		return speeds
	case Mass:
		return masses
	}
	return nil
}

var lengths = []Unit{
	{Symbol: "m", mul: 1, div: 1, also: []string{"metre", "metres", "meter", "meters"}},
	{Symbol: "mm", mul: 1, div: 1e3},
	{Symbol: "µm", mul: 1, div: 1e6, also: []string{"um", "micron", "microns"}},
	{Symbol: "nm", mul: 1, div: 1e9},
	{Symbol: "cm", mul: 1, div: 1e2},
	{Symbol: "in", mul: 254, div: 1e4, also: []string{"inch", "inches", "in.", "\"", "″", "”"}},
	{Symbol: "ft", mul: 3048, div: 1e4, also: []string{"foot", "feet", "'", "′", "’"}},
	// A mil is a thousandth of an inch; film is sold by it.
	{Symbol: "mil", mul: 254, div: 1e7, also: []string{"mils", "thou"}},
}

var areas = []Unit{
	{Symbol: "m²", mul: 1, div: 1, also: []string{"sqm"}},
	{Symbol: "cm²", mul: 1, div: 1e4, also: []string{"sqcm"}},
	{Symbol: "mm²", mul: 1, div: 1e6, also: []string{"sqmm"}},
	// (0.0254 m)^2 and (0.3048 m)^2.
	{Symbol: "in²", mul: 64516, div: 1e8, also: []string{"sqin", "sq.in."}},
	{Symbol: "ft²", mul: 9290304, div: 1e8, also: []string{"sqft", "sq.ft."}},
}

var arealDensities = []Unit{
	{Symbol: "kg/m²", mul: 1, div: 1, also: []string{"kgm-2"}},
	{Symbol: "g/m²", mul: 1, div: 1e3, also: []string{"gsm", "gm-2"}},
	// 1 oz / (0.9144 m)^2 = 0.028349523125 / 0.83612736 kg/m^2.
	{Symbol: "oz/yd²", mul: 28349523125, div: 836127360000, also: []string{"oz/sqyd"}},
	{Symbol: "oz/ft²", mul: 28349523125, div: 92903040000, also: []string{"oz/sqft"}},
	// 1 lb / (0.3048 m)^2 = 0.45359237 / 0.09290304 kg/m^2.
	{Symbol: "lb/ft²", mul: 45359237, div: 9290304, also: []string{"lb/sqft"}},
}

var lineTensions = []Unit{
	{Symbol: "N/m", mul: 1, div: 1, also: []string{"Nm-1"}},
	{Symbol: "kN/m", mul: 1e3, div: 1},
	{Symbol: "N/mm", mul: 1e3, div: 1},
	{Symbol: "N/cm", mul: 1e2, div: 1},
	// 4.4482216152605 N / 0.0254 m. "lb/in" for it is common practice.
	{Symbol: "lbf/in", mul: 44482216152605, div: 254e9, also: []string{"lb/in", "lbs/in", "pli"}},
	{Symbol: "lbf/ft", mul: 44482216152605, div: 3048e9, also: []string{"lb/ft", "lbs/ft", "plf"}},
}

var pressures = []Unit{
	{Symbol: "Pa", mul: 1, div: 1, also: []string{"N/m2"}},
	{Symbol: "hPa", mul: 1e2, div: 1},
	{Symbol: "kPa", mul: 1e3, div: 1},
	{Symbol: "MPa", mul: 1e6, div: 1, also: []string{"N/mm2"}},
	{Symbol: "GPa", mul: 1e9, div: 1, also: []string{"kN/mm2"}},
	{Symbol: "mbar", mul: 1e2, div: 1},
	{Symbol: "bar", mul: 1e5, div: 1},
	{Symbol: "atm", mul: 101325, div: 1},
	// 4.4482216152605 N / (0.0254 m)^2.
	{Symbol: "psi", mul: 44482216152605, div: 6451600000, also: []string{"PSI", "lbf/in2", "psia"}},
	{Symbol: "ksi", mul: 44482216152605, div: 6451600, also: []string{"KSI", "kpsi"}},
	{Symbol: "lbf/ft²", mul: 44482216152605, div: 929030400000, also: []string{"psf"}},
	// 13595.1 kg/m^3 x 9.80665 m/s^2 x 0.0254 m.
	{Symbol: "inHg", mul: 33863886403410, div: 1e10, also: []string{"inHg."}},
	{Symbol: "inH₂O", mul: 24908891, div: 1e5, also: []string{"inwc", "inw.c."}},
}

var densities = []Unit{
	{Symbol: "kg/m³", mul: 1, div: 1, also: []string{"kgm-3"}},
	{Symbol: "g/cm³", mul: 1e3, div: 1, also: []string{"g/cc", "gcm-3", "kg/l", "kg/L"}},
	// 0.45359237 kg / (0.3048 m)^3 and / (0.0254 m)^3.
	{Symbol: "lb/ft³", mul: 453592370000, div: 28316846592, also: []string{"lb/cuft", "pcf"}},
	{Symbol: "lb/in³", mul: 453592370000, div: 16387064, also: []string{"lb/cuin"}},
}

// Absolute temperatures. x °F = (x + 459.67) 5/9 K.
var temperatures = []Unit{
	{Symbol: "K", mul: 1, div: 1},
	{Symbol: "°C", mul: 100, div: 100, add: 27315, also: []string{"C", "degC"}},
	{Symbol: "°F", mul: 500, div: 900, add: 229835, also: []string{"F", "degF"}},
}

var frequencies = []Unit{
	{Symbol: "Hz", mul: 1, div: 1, also: []string{"hz", "HZ", "1/s"}},
	{Symbol: "kHz", mul: 1e3, div: 1, also: []string{"khz", "KHz", "KHZ"}},
	{Symbol: "rpm", mul: 1, div: 60, also: []string{"RPM", "r/min", "1/min"}},
}

// 1/°F = 1.8/K.
var expansions = []Unit{
	{Symbol: "1/K", mul: 1, div: 1, also: []string{"/K", "K-1", "1/°C", "/°C", "m/m/K", "m/mK", "1/C"}},
	{Symbol: "ppm/K", mul: 1, div: 1e6, also: []string{"ppm/°C", "ppm/C", "µm/mK", "um/mK", "µm/m/K", "um/m/K", "µm/m°C", "um/m°C", "µm/m/°C", "um/m/°C"}},
	{Symbol: "1/°F", mul: 9, div: 5, also: []string{"/°F", "1/F", "in/in/°F", "in/in°F"}},
	{Symbol: "ppm/°F", mul: 9, div: 5e6, also: []string{"ppm/F", "µin/in/°F", "uin/in/°F", "µin/in°F", "uin/in°F"}},
}

var ratios = []Unit{
	{Symbol: "", mul: 1, div: 1},
	{Symbol: "%", mul: 1, div: 1e2, also: []string{"percent", "％"}},
	{Symbol: "‰", mul: 1, div: 1e3, also: []string{"permille"}},
}

// A degree is pi/180 rad; mul is the float64 nearest to pi, the one factor here
// that is not exact.
var angles = []Unit{
	{Symbol: "rad", mul: 1, div: 1},
	{Symbol: "°", mul: math.Pi, div: 180, also: []string{"deg", "degree", "degrees"}},
}

var times = []Unit{
	{Symbol: "s", mul: 1, div: 1, also: []string{"sec", "second", "seconds"}},
	{Symbol: "ms", mul: 1, div: 1e3},
	{Symbol: "µs", mul: 1, div: 1e6, also: []string{"us"}},
	{Symbol: "min", mul: 60, div: 1},
}

var speeds = []Unit{
	{Symbol: "m/s", mul: 1, div: 1, also: []string{"ms-1"}},
	{Symbol: "mm/s", mul: 1, div: 1e3},
	{Symbol: "ft/s", mul: 3048, div: 1e4},
	{Symbol: "in/s", mul: 254, div: 1e4},
}

var masses = []Unit{
	{Symbol: "kg", mul: 1, div: 1},
	{Symbol: "g", mul: 1, div: 1e3},
	{Symbol: "mg", mul: 1, div: 1e6},
	{Symbol: "lb", mul: 45359237, div: 1e8, also: []string{"lbs"}},
	// 0.45359237 kg / 16.
	{Symbol: "oz", mul: 28349523125, div: 1e12},
}

package air

import "math"

// The range of the formulas for water, K.
const waterColdest, waterHottest = 273.15, 368.15

// WaterDensity is the density of pure water without dissolved air at 101.325
// kPa, kg/m^3, from the temperature, K, 273.15 to 368.15: within 0.02 kg/m^3 of
// newer formulations. Pressure adds 0.05 kg/m^3 per 100 kPa, which is left out.
//
// Source: Kell, J. Chem. Eng. Data 20 (1975) 97-105.
func WaterDensity(temperature float64) float64 {
	// Copies in circulation turn 16.87985e-3 into 16.89785e-3; the greatest
	// density, 999.972 kg/m^3 near 4 °C, tells which is right.
	t := temperature - zeroCelsius
	return (999.83952 + t*(16.945176+t*(-7.9870401e-3+t*(-46.170461e-6+t*(105.56302e-9-t*280.54253e-12))))) / (1 + 16.87985e-3*t)
}

// WaterSoundSpeed is the sound speed of pure water at 101.325 kPa, m/s, from
// the temperature, K, 273.15 to 368.15, with an uncertainty of 0.02 m/s.
// Pressure adds 0.17 m/s per 100 kPa, which is left out. A few bubbles lower it
// by far more.
//
// Source: Marczak, J. Acoust. Soc. Am. 102 (1997) 2776-2779.
func WaterSoundSpeed(temperature float64) float64 {
	// A copy in circulation has 5.779136e-2 in the square.
	t := temperature - zeroCelsius
	return 1402.385 + t*(5.038813+t*(-5.799136e-2+t*(3.287156e-4+t*(-1.398845e-6+t*2.78786e-9))))
}

// WaterViscosity is the dynamic viscosity mu of water at 0.1 MPa, Pa s, from
// the temperature, K, 253.15 to 383.15, with an uncertainty of 1 %.
//
// Source: Patek, Hruby, Klomfar, Souckova, Harvey, J. Phys. Chem. Ref. Data 38
// (2009) 21-29, adopted as IAPWS SR6-08; coefficients from memory, held by the
// table values of the test.
func WaterViscosity(temperature float64) float64 {
	t := temperature / 300
	return 1e-6 * (280.68*math.Pow(t, -1.9) + 511.45*math.Pow(t, -7.7) + 61.131*math.Pow(t, -19.6) + 0.45903*math.Pow(t, -40))
}

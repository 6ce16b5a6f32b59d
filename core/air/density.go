package air

import "math"

const (
	// zeroCelsius is 0 °C in kelvin.
	zeroCelsius = 273.15
	// CarbonDioxide is the mole fraction of carbon dioxide that is assumed
	// where none is given, 400 parts per million.
	CarbonDioxide = 0.0004
)

// Density of moist air by the CIPM-2007 equation, kg/m^3:
//
//	rho = p M_a / (Z R T) [1 - x_v (1 - M_v/M_a)]
//
// from the temperature T, K, the pressure p, Pa, the relative humidity, 0 to
// 1, and the mole fraction of carbon dioxide. The equation is stated for 288.15
// to 300.15 K and 60 to 110 kPa, with a relative standard uncertainty of 22e-6
// there; it runs smoothly beyond, where its error is not stated (within 0.2 %
// of the standard atmosphere down to 236 K). NaN for arguments that are not
// finite.
//
// Source: Picard, Davis, Glaser, Fujii, Metrologia 45 (2008) 149-155.
func Density(temperature, pressure, humidity, carbonDioxide float64) float64 {
	const (
		gasConstant = 8.314472    // J/(mol K), the value the equation was published with
		molarWater  = 18.01528e-3 // kg/mol
	)
	molarDry := (28.96546 + 12.011*(carbonDioxide-0.0004)) * 1e-3 // kg/mol
	x := VapourFraction(temperature, pressure, humidity)
	z := compressibility(temperature, pressure, x)
	return pressure * molarDry / (z * gasConstant * temperature) * (1 - x*(1-molarWater/molarDry))
}

// VapourFraction is the mole fraction of water vapour in moist air,
//
//	x_v = h f(p, t) p_sv(T) / p
//
// with the enhancement factor f and the saturation vapour pressure p_sv of the
// CIPM-2007 equation.
func VapourFraction(temperature, pressure, humidity float64) float64 {
	return humidity * enhancement(temperature, pressure) * SaturationPressure(temperature) / pressure
}

// SaturationPressure of water vapour over liquid water in the CIPM-2007
// equation, Pa.
func SaturationPressure(temperature float64) float64 {
	return math.Exp((1.2378847e-5*temperature-1.9121316e-2)*temperature + 33.93711047 - 6.3431645e3/temperature)
}

// enhancement is the factor by which air raises the saturation vapour pressure.
func enhancement(temperature, pressure float64) float64 {
	t := temperature - zeroCelsius
	return 1.00062 + 3.14e-8*pressure + 5.6e-7*t*t
}

// compressibility is the factor Z of moist air with the vapour fraction x.
func compressibility(temperature, pressure, x float64) float64 {
	t := temperature - zeroCelsius
	q := pressure / temperature
	return 1 -
		q*(1.58123e-6+t*(-2.9331e-8+t*1.1043e-10)+
			x*(5.707e-6-2.051e-8*t)+
			x*x*(1.9898e-4-2.376e-6*t)) +
		q*q*(1.83e-11-0.765e-8*x*x)
}

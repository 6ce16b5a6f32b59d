package air

import "math"

// The range of temperature, K, pressure, Pa, and vapour fraction over which
// Cramer's polynomial was fitted.
const (
	soundColdest, soundHottest = 273.15, 303.15
	soundLowest, soundHighest  = 75e3, 102e3
	soundWettest               = 0.06
)

// SoundSpeed of moist air at low frequency, m/s, by Cramer's polynomial in
// temperature, pressure, water vapour and carbon dioxide. It was fitted for
// 273.15 to 303.15 K, 75 to 102 kPa and vapour fractions up to 0.06, with an
// uncertainty of 300 parts per million there.
//
// Outside that range the value at the nearest point of the range is scaled by
// sqrt(T), the law of an ideal gas of constant composition (within 0.1 % of
// the standard atmosphere down to 236 K).
//
// Source: Cramer, J. Acoust. Soc. Am. 93 (1993) 2510-2516, eq. 15, table III.
func SoundSpeed(temperature, pressure, humidity, carbonDioxide float64) float64 {
	near := min(max(temperature, soundColdest), soundHottest)
	p := min(max(pressure, soundLowest), soundHighest)
	x := min(cramerVapourFraction(temperature, pressure, humidity), soundWettest)
	return cramer(near-zeroCelsius, p, x, carbonDioxide) * math.Sqrt(temperature/near)
}

// cramer is the polynomial itself: t in °C, p in Pa, mole fractions of water
// vapour and of carbon dioxide.
func cramer(t, p, water, carbon float64) float64 {
	// Copies in circulation hold 400^-6 for 400e-6, lose the last-but-one
	// term, or turn signs in the pressure terms; each line below is held by
	// the published check values of the test.
	return 331.5024 + t*(0.603055-0.000528*t) +
		water*(51.471935+t*(0.1495874-0.000782*t)) +
		p*(-1.82e-7+t*(3.73e-8-2.93e-10*t)) +
		carbon*(-85.20931+t*(-0.228525+5.91e-5*t)) -
		2.835149*water*water -
		2.15e-13*p*p +
		29.179762*carbon*carbon +
		0.000486*water*p*carbon
}

// cramerVapourFraction uses the saturation pressure that Cramer's appendix
// gives (Giacomo 1981), which differs slightly from that of CIPM-2007.
func cramerVapourFraction(temperature, pressure, humidity float64) float64 {
	saturation := math.Exp((1.2811805e-5*temperature-1.9509874e-2)*temperature + 34.04926034 - 6.3536311e3/temperature)
	return humidity * enhancement(temperature, pressure) * saturation / pressure
}

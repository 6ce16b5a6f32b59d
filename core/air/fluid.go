package air

import "math"

// Fluid gives the state of a fluid by its name from temperature, K, pressure,
// Pa, and relative humidity, 0 to 1, which counts for FluidAir only.
//
//   - FluidAir, and the empty name: Moist, which see.
//   - FluidNitrogen, FluidHelium, FluidSF6: the dry, pure gas from 223.15 to
//     373.15 K and 10 to 200 kPa; see gases for formulas, sources and accuracy.
//   - FluidWater: pure water without dissolved air from 273.15 to 368.15 K and
//     10 to 200 kPa, as long as it does not boil; see WaterDensity,
//     WaterSoundSpeed and WaterViscosity.
//
// It returns a *DomainError outside, and for names that are not in FluidNames.
func Fluid(name FluidName, temperature, pressure, humidity float64) (State, error) {
	switch name {
	case FluidAir, "":
		return Moist(temperature, pressure, humidity)
	case FluidWater:
		return water(temperature, pressure)
	}
	g, known := gases(name)
	switch {
	case !known:
		return State{}, &DomainError{"fluid", "There is no fluid of that name; known are air, nitrogen, helium, sulfur-hexafluoride and water."}
	case !(temperature >= coldest && temperature <= hottest):
		return State{}, &DomainError{"temperature", "The temperature is " + celsius(temperature) + "; " + g.words + " is computed from -50 °C to 100 °C."}
	case !(pressure >= lowest && pressure <= highest):
		return State{}, &DomainError{"pressure", "The pressure is " + kilopascal(pressure) + "; " + g.words + " is computed from 10 kPa to 200 kPa."}
	}
	return g.state(temperature, pressure), nil
}

func water(temperature, pressure float64) (State, error) {
	switch {
	case !(temperature >= waterColdest && temperature <= waterHottest):
		return State{}, &DomainError{"temperature", "The temperature is " + celsius(temperature) + "; water is computed from 0 °C to 95 °C."}
	case !(pressure >= lowest && pressure <= highest):
		return State{}, &DomainError{"pressure", "The pressure is " + kilopascal(pressure) + "; water is computed from 10 kPa to 200 kPa."}
	case pressure <= SaturationPressure(temperature):
		return State{}, &DomainError{"temperature", "At " + celsius(temperature) + " and " + kilopascal(pressure) + " water boils; it must be colder or under more pressure."}
	}
	density := WaterDensity(temperature)
	return State{Density: density, SoundSpeed: WaterSoundSpeed(temperature), KinematicViscosity: WaterViscosity(temperature) / density}, nil
}

// molarGasConstant R, J/(mol K), exact in the SI of 2019.
const molarGasConstant = 8.31446261815324

// gas is what the state of a pure gas follows from.
type gas struct {
	words string  // its name in a sentence
	molar float64 // molar mass M, kg/mol
	// heat is the molar heat capacity at constant pressure and zero density
	// over the gas constant.
	heat func(temperature float64) float64
	// virial are the coefficients b_i of the second virial coefficient
	// B(T) = sum b_i (300 K/T)^i, m^3/mol.
	virial []float64
	// viscosity mu, Pa s.
	viscosity func(temperature float64) float64
}

// gases describes the dry gases.
//
// Sources: the thermophysical properties of gases used in the semiconductor
// industry, NIST Standard Reference Database 134, for molar masses and for the
// tables of cp/R, B and viscosity that are met here; what was not read there
// says "from memory".
//
//   - Nitrogen: an ideal gas with cp/R = 3.503 (29.124 J/(mol K), from memory).
//     The density is good to 0.1 % from 0 °C up and to 0.3 % at -50 °C and 200
//     kPa, the sound speed to 0.1 %. Viscosity by Sutherland's law with 16.63
//     µPa s at 273 K and 107 K (White, Viscous Fluid Flow, table 1-2; from
//     memory), within 1 % of the table.
//   - Helium: cp/R = 5/2, B = 11.9e-6 m^3/mol, which hardly changes; density and
//     sound speed to 0.02 %. Viscosity 19.93 µPa s (T/300 K)^0.68, fitted here to
//     the table, 0.5 %.
//   - Sulfur hexafluoride: far from ideal, by 1.2 % in density and 1 % in sound
//     speed at 20 °C and 1 bar. cp from its molecular vibrations (see below),
//     0.5 %; B fitted here to the table from 223 to 315 K, 0.05e-6 m^3/mol there.
//     Density to 0.1 % and sound speed to 0.2 % at 1 bar above 0 °C; both to 0.5 %
//     at -50 °C and 2 bar. Viscosity by Sutherland's law fitted to the table, 0.2 %.
func gases(name FluidName) (gas, bool) {
	switch name {
	case FluidNitrogen:
		return gas{
			words: "nitrogen", molar: 28.0135e-3,
			heat:      func(float64) float64 { return 3.503 },
			viscosity: func(t float64) float64 { return sutherland(16.63e-6*(273+107)/math.Pow(273, 1.5), 107, t) },
		}, true
	case FluidHelium:
		return gas{
			words: "helium", molar: 4.0026e-3,
			heat:      func(float64) float64 { return 2.5 },
			virial:    []float64{11.9e-6},
			viscosity: func(t float64) float64 { return 19.93e-6 * math.Pow(t/300, 0.68) },
		}, true
	case FluidSF6:
		return gas{
			words: "sulfur hexafluoride", molar: 146.056e-3,
			heat:      hexafluorideHeat,
			virial:    []float64{188.918e-6, -456.135e-6, 145.398e-6, -150.808e-6},
			viscosity: func(t float64) float64 { return sutherland(1.3876e-6, 170.6, t) },
		}, true
	}
	return gas{}, false
}

// hexafluorideHeat is cp/R of SF6 at zero density: 4 of a rigid molecule and
// one Einstein term x^2 e^x/(e^x - 1)^2 for each vibration, x = h c nu/(k T).
func hexafluorideHeat(temperature float64) float64 {
	// Wave numbers of the six fundamentals, 1/cm, and how many vibrations have
	// each: from memory.
	const secondRadiation = 1.438777 // h c/k, cm K
	heat := 4.0
	for _, mode := range [...]struct{ wave, count float64 }{{774.5, 1}, {642.1, 2}, {948.1, 3}, {615.0, 3}, {523.6, 3}, {348.1, 3}} {
		x := secondRadiation * mode.wave / temperature
		part := x / (2 * math.Sinh(x/2))
		heat += mode.count * part * part
	}
	return heat
}

// state gives density and sound speed by the virial equation cut off behind
// its second coefficient,
//
//	p = (rho R T/M) (1 + B rho/M)
//	c^2 = (gamma R T/M) {1 + 2 p/(R T) [B + (gamma-1) T B' + (gamma-1)^2 T^2 B''/(2 gamma)]}
//
// with gamma at zero density.
func (g gas) state(temperature, pressure float64) State {
	var b, slope, bend float64 // B, T dB/dT and T^2 d2B/dT2
	power := 1.0
	for i, c := range g.virial {
		n := float64(i)
		b += c * power
		slope -= n * c * power
		bend += n * (n + 1) * c * power
		power *= 300 / temperature
	}
	ideal := molarGasConstant * temperature
	heat := g.heat(temperature)
	gamma := heat / (heat - 1)
	// The larger root of Z^2 - Z = B p/(R T).
	z := (1 + math.Sqrt(1+4*b*pressure/ideal)) / 2
	density := pressure * g.molar / (z * ideal)
	k := b + (gamma-1)*slope + (gamma-1)*(gamma-1)/(2*gamma)*bend
	return State{
		Density:            density,
		SoundSpeed:         math.Sqrt(gamma * ideal / g.molar * (1 + 2*pressure/ideal*k)),
		KinematicViscosity: g.viscosity(temperature) / density,
	}
}

// sutherland is Sutherland's law of the viscosity of a gas,
// mu = c T^(3/2)/(T + s), Pa s.
func sutherland(c, s, temperature float64) float64 {
	return c * temperature * math.Sqrt(temperature) / (temperature + s)
}

// Viscosity of dry air by Sutherland's law,
//
//	mu = 1.458e-6 T^(3/2)/(T + 110.4 K),  Pa s,
//
// from the temperature T, K. Good to 1 % from 223 to 373 K at any pressure of
// this package. Moisture lowers it by less than 1 % at ordinary temperatures
// (from memory), which is left out.
//
// Source: ISO 2533:1975, the standard atmosphere.
func Viscosity(temperature float64) float64 { return sutherland(1.458e-6, 110.4, temperature) }

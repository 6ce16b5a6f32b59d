package air

import (
	"math"
	"strconv"
)

// State is a fluid at rest.
type State struct {
	// Density rho, kg/m^3.
	Density float64
	// SoundSpeed c0, m/s.
	SoundSpeed float64
	// KinematicViscosity nu, m^2/s.
	KinematicViscosity float64
	// VapourFraction is the mole fraction of water vapour in air; 0 for other
	// fluids.
	VapourFraction float64
	// Notes are sentences that say where a formula was used outside the range
	// it was published for; empty inside.
	Notes []string
}

// DomainError says which quantity lies where no answer can be given.
type DomainError struct {
	// Quantity is "temperature", "pressure", "humidity" or "fluid".
	Quantity string
	// Message is a sentence for people.
	Message string
}

// Error returns the sentence.
func (e *DomainError) Error() string { return e.Message }

// The limits of Moist.
const (
	coldest, hottest = 223.15, 373.15 // K
	lowest, highest  = 10e3, 200e3    // Pa
)

// Moist gives the state of moist air from temperature, K, pressure, Pa, and
// relative humidity, 0 to 1, with 400 parts per million of carbon dioxide, by
// Density, SoundSpeed and Viscosity.
//
// It answers from 223.15 to 373.15 K and from 10 to 200 kPa and returns a
// *DomainError outside, or where the vapour asked for would exceed the
// pressure. Where a published formula is used outside its own narrower range,
// Notes say so.
func Moist(temperature, pressure, humidity float64) (State, error) {
	switch {
	case !(temperature >= coldest && temperature <= hottest):
		return State{}, &DomainError{"temperature", "The air temperature is " + celsius(temperature) + "; the density of air is computed from -50 °C to 100 °C."}
	case !(pressure >= lowest && pressure <= highest):
		return State{}, &DomainError{"pressure", "The air pressure is " + kilopascal(pressure) + "; the density of air is computed from 10 kPa to 200 kPa."}
	case !(humidity >= 0 && humidity <= 1):
		return State{}, &DomainError{"humidity", "The relative humidity is " + number(humidity*100) + " %; it must lie from 0 % to 100 %."}
	}
	state := State{
		Density:        Density(temperature, pressure, humidity, CarbonDioxide),
		SoundSpeed:     SoundSpeed(temperature, pressure, humidity, CarbonDioxide),
		VapourFraction: VapourFraction(temperature, pressure, humidity),
	}
	state.KinematicViscosity = Viscosity(temperature) / state.Density
	if state.VapourFraction > 0.5 {
		return State{}, &DomainError{"humidity", "At " + celsius(temperature) + " and " + kilopascal(pressure) +
			" a relative humidity of " + number(humidity*100) + " % means that most of the gas is steam; that is no longer air."}
	}
	if temperature < 288.15 || temperature > 300.15 || pressure < 60e3 || pressure > 110e3 {
		state.Notes = append(state.Notes, "The air density formula (CIPM-2007) is published for 15 °C to 27 °C and 60 kPa to 110 kPa; "+
			"it is used outside that range here.")
	}
	if temperature < soundColdest || temperature > soundHottest || pressure < soundLowest || pressure > soundHighest ||
		state.VapourFraction > soundWettest {
		state.Notes = append(state.Notes, "The sound speed formula (Cramer 1993) is published for 0 °C to 30 °C, 75 kPa to 102 kPa and at most 6 % water vapour; "+
			"outside that range its nearest value is scaled with the square root of the absolute temperature.")
	}
	return state, nil
}

func celsius(temperature float64) string {
	return number(math.Round((temperature-zeroCelsius)*100)/100) + " °C"
}

func kilopascal(pressure float64) string { return number(pressure/1e3) + " kPa" }

func number(x float64) string { return strconv.FormatFloat(x, 'g', 5, 64) }

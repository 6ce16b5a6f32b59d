package sheet

// Thermal describes a sheet on a ring for changes of temperature.
type Thermal struct {
	// Tension is the line tension T0, N/m, at Temperature t0, K.
	Tension, Temperature float64
	// Thickness h, m; modulus E, Pa; Poisson's ratio Nu of the sheet.
	Thickness, E, Nu float64
	// SheetCTE and RingCTE are the coefficients of thermal expansion, 1/K.
	SheetCTE, RingCTE float64
}

// PerKelvin is the change of tension per kelvin, N/m/K:
//
//	dT/dt = -E h (cte_sheet - cte_ring) / (1 - nu)
//
// It holds for an isotropic, elastic sheet bonded or clamped to a stiff ring
// with sheet and ring at the same temperature. A ring that gives way makes the
// change smaller by the factor 1/[1 + E h a / ((1 - nu) E_r A_r)]; creep and
// moisture are left out. The equation follows from equal biaxial strain,
// s = E e / (1 - nu).
func (p Thermal) PerKelvin() float64 {
	return -p.E * p.Thickness * (p.SheetCTE - p.RingCTE) / (1 - p.Nu)
}

// TensionAt is the line tension at temperature t, N/m:
//
//	T(t) = T0 - E h (cte_sheet - cte_ring) (t - t0) / (1 - nu)
//
// It is 0 where the sheet is slack: a thin sheet wrinkles and carries no
// compression.
func (p Thermal) TensionAt(t float64) float64 {
	return max(0, p.Tension+p.PerKelvin()*(t-p.Temperature))
}

// SlackTemperature is the temperature at which the tension reaches zero, K. It
// reports false where no temperature above absolute zero does that.
func (p Thermal) SlackTemperature() (float64, bool) { return p.temperatureOf(0) }

// OverStressTemperature is the temperature at which the membrane stress
// reaches the allowable stress, Pa, in K. It reports false where no temperature
// above absolute zero does that. Where the tension at t0 is over the limit
// already, it is the temperature at which the stress comes back to the limit.
func (p Thermal) OverStressTemperature(allowable float64) (float64, bool) {
	return p.temperatureOf(TensionAtStress(allowable, p.Thickness))
}

func (p Thermal) temperatureOf(tension float64) (float64, bool) {
	slope := p.PerKelvin()
	if slope == 0 {
		return 0, false
	}
	t := p.Temperature + (tension-p.Tension)/slope
	if !(t > 0) || t > 1e4 {
		return 0, false
	}
	return t, true
}

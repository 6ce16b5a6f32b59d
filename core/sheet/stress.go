package sheet

// ArealDensity is the mass per area of a sheet:
//
//	sigma = rho h
//
// in kg/m^2, from the density rho of the material, kg/m^3, and the thickness
// h, m.
func ArealDensity(density, thickness float64) float64 { return density * thickness }

// Stress is the membrane stress of a line tension,
//
//	s = T / h
//
// in Pa, from the tension T, N/m, and the thickness h > 0, m. It is the mean
// over the thickness, the same in every direction of the sheet, and leaves out
// the stress concentration at clamps, holes and creases.
func Stress(tension, thickness float64) float64 { return tension / thickness }

// StressShare is the share of the allowable stress that a line tension takes,
// T / (h S): 1 means that the limit is reached. It is +Inf where the allowable
// stress S is 0 and the tension is not.
func StressShare(tension, thickness, allowable float64) float64 {
	return Stress(tension, thickness) / allowable
}

// TensionAtStress is the line tension at which the sheet carries the given
// membrane stress, T = s h, N/m.
func TensionAtStress(stress, thickness float64) float64 { return stress * thickness }

package diaphragm

// ArealDensity returns sigma, kg/m^2: the measured value where there is one,
// else density times thickness.
func (s Sheet) ArealDensity() float64 {
	if s.MeasuredArealDensity > 0 {
		return s.MeasuredArealDensity
	}
	return s.Density * s.Thickness
}

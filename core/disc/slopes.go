package disc

import "hoopsheet/core/bessel"

// Slopes synthesises the gradient of a function on a polar grid, for slopes and
// stretching of a sheet. It is to the gradient what Table is to the function.
type Slopes struct {
	Basis          *Basis
	radial, around *Table
	turned         []float64
}

// NewSlopes evaluates the slopes of the basis; arguments as for NewTable.
func NewSlopes(b *Basis, radii []float64, ntheta int) *Slopes {
	return &Slopes{
		Basis:  b,
		radial: newTable(b, radii, ntheta, radialSlope),
		around: newTable(b, radii, ntheta, aroundSlope),
		turned: make([]float64, b.Len()),
	}
}

// radialSlope is d/dr J_m(z r).
func radialSlope(m int, z, r float64) float64 {
	if m == 0 {
		return -z * bessel.JInt(1, z*r)
	}
	return z / 2 * (bessel.JInt(m-1, z*r) - bessel.JInt(m+1, z*r))
}

// aroundSlope is m J_m(z r) / r, also at r = 0.
func aroundSlope(m int, z, r float64) float64 {
	if m == 0 || r == 1 {
		return 0
	}
	return z / 2 * (bessel.JInt(m-1, z*r) + bessel.JInt(m+1, z*r))
}

// Len returns the number of samples of each component.
func (s *Slopes) Len() int { return s.radial.Len() }

// Synthesise writes df/dr to radial and (1/r) df/dtheta to around, at the places
// Table.Synthesise gives f; at r = 0 both are limits along the given angle. It
// panics unless both have length Len() and len(coef) = Basis.Len(). It does not
// allocate.
func (s *Slopes) Synthesise(radial, around, coef []float64) {
	if len(coef) != len(s.turned) {
		panic(errLength)
	}
	s.radial.Synthesise(radial, coef)
	for k := 0; k+1 < len(coef); k += 2 {
		s.turned[k], s.turned[k+1] = coef[k+1], -coef[k]
	}
	s.around.Synthesise(around, s.turned)
}

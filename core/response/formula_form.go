package response

import (
	"math"
	"strconv"

	"hoopsheet/core/disc"
)

// sampled is a formula on the grid of a disc transform.
type sampled struct {
	formula overSheet
	coef    []float64
	basis   *disc.Basis
	n       norms
	// rim is the largest |f| on the rim, largest that anywhere on the samples.
	rim, largest float64
	fit          *measuredFit
}

// overSheet is a function over the sheet.
type overSheet interface {
	At(r, theta float64) float64
}

// mostValue is the largest |f| of a formula: its square must stay finite.
const mostValue = 1e100

// newSampled analyses a formula. The message, where there is one, says at
// which place of the sheet the formula has no use.
func newSampled(f overSheet, b *disc.Basis) (s *sampled, message string) {
	largest, message := survey(f)
	if message != "" {
		return nil, message
	}
	// Beyond the least grid of the band, so that what lies outside the band is
	// removed and not taken for what lies inside.
	const spare = 8
	transform := takeTransform(b, disc.MinRadii(b.M, b.N)+spare, disc.NextAngles(3*b.M+24))
	defer keepTransform(transform)
	grid := transform.Grid
	s = &sampled{formula: f, basis: b, coef: make([]float64, b.Len()), largest: largest}
	values := make([]float64, grid.Len())
	for i, r := range grid.R {
		// Differences over a step h err by h^2/6 of the third derivative and
		// by rounding/h: 1e-11 and 1e-10 of a smooth shape of unit size.
		const h = 3e-6
		var around float64
		for k := range grid.NTheta {
			theta := grid.Theta(k)
			value := f.At(r, theta)
			if message := badValue(value, r, theta); message != "" {
				return nil, message
			}
			values[i*grid.NTheta+k] = value
			s.largest = math.Max(s.largest, math.Abs(value))
			out := (f.At(r+h, theta) - f.At(r-h, theta)) / (2 * h)
			across := (f.At(r, theta+h) - f.At(r, theta-h)) / (2 * h * r)
			slope := out*out + across*across
			around += slope
			s.n.steepest = math.Max(s.n.steepest, math.Sqrt(slope))
		}
		s.n.slope += grid.W[i] * around * 2 * math.Pi / float64(grid.NTheta)
	}
	s.n.square = grid.Energy(values)
	transform.Analyse(s.coef, values)
	for k := range grid.NTheta {
		s.rim = math.Max(s.rim, math.Abs(f.At(1, grid.Theta(k))))
	}
	if s.jumps() {
		s.n.slope, s.n.steepest = math.Inf(1), math.Inf(1)
	}
	return s, ""
}

func (s *sampled) at(r, theta float64) float64           { return s.formula.At(r, theta) }
func (s *sampled) project(_ *disc.Basis, coef []float64) { copy(coef, s.coef) }
func (s *sampled) norms() norms                          { return s.n }

// leavesRim reports whether the formula is not zero on the rim, beyond
// rounding.
func (s *sampled) leavesRim() bool { return s.rim > 1e-9*s.largest }

// jumps reports whether the formula has a jump, at the rim or inside.
func (s *sampled) jumps() bool {
	if s.leavesRim() {
		return true
	}
	// The modes carry no more slope than the shape has (Bessel's inequality).
	// The differences do not see a jump between two samples, the modes do. A
	// shape with a kink may exceed by the error of the grid, which is of the
	// order of its spacing squared.
	const margin = 0.02
	potential := slopeEnergy(s.basis, s.coef)
	return math.IsNaN(s.n.slope) || potential > (1+margin)*s.n.slope
}

// slopeEnergy is the integral of |grad f|^2 of the function with these
// coefficients.
func slopeEnergy(b *disc.Basis, coef []float64) float64 {
	var sum float64
	for m := 0; m <= b.M; m++ {
		for n := 1; n <= b.N; n++ {
			i := b.Index(m, n, disc.Cos)
			z := b.Zero(m, n)
			sum += z * z * b.Norm(m, n) * (coef[i]*coef[i] + coef[i+1]*coef[i+1])
		}
	}
	return sum
}

// survey looks at a grid that holds the centre, the rim, the axes and the
// diagonals. It returns the largest |f|, or a message about the first place
// without a finite value.
func survey(f overSheet) (largest float64, message string) {
	const radii, angles = 64, 48
	for i := range radii + 1 {
		r := float64(i) / radii
		for k := range angles {
			theta := 2 * math.Pi * float64(k) / angles
			value := f.At(r, theta)
			if message := badValue(value, r, theta); message != "" {
				if i == 0 {
					message += " Where a quotient has a limit at the centre, divide by max(r, 0.000001) in place of r."
				}
				return 0, message
			}
			largest = math.Max(largest, math.Abs(value))
		}
	}
	return largest, ""
}

func badValue(value, r, theta float64) string {
	place := "At r = " + short(r) + ", theta = " + short(theta) + " the formula "
	switch {
	case math.IsNaN(value):
		return place + "has no value, as for 0/0 or the root of a negative number."
	case math.IsInf(value, 0):
		return place + "has no finite value, as for a division by zero."
	case math.Abs(value) > mostValue:
		return place + "is larger than 1e100."
	}
	return ""
}

func short(x float64) string { return strconv.FormatFloat(x, 'g', 4, 64) }

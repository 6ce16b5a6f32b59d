package modes

import "math"

// RealShape draws a mode of the diaphragm as it stands:
//
//	R(r) cos m(theta - Orientation)
//
// with R from RealMode.Radial, at radii of the ring's. It is for drawings: R is
// interpolated linearly between 800 steps, which errs by less than 2e-4 for
// modes of up to 20 nodal circles (step^2/8 times the largest curvature, about
// (20 pi)^2).
type RealShape struct {
	M           int
	Orientation float64

	radial []float64
	scale  float64
}

const realShapeSteps = 800

// NewRealShape prepares the drawing of a mode.
func NewRealShape(mode *RealMode, orientation float64) *RealShape {
	return newRealShape(mode.M, orientation, mode.Radial)
}

func newRealShape(m int, orientation float64, radial func(r float64) float64) *RealShape {
	s := &RealShape{M: m, Orientation: orientation, radial: make([]float64, realShapeSteps+1)}
	largest := 0.0
	for i := range s.radial {
		s.radial[i] = radial(float64(i) / realShapeSteps)
		if math.Abs(s.radial[i]) > math.Abs(largest) {
			largest = s.radial[i]
		}
	}
	s.scale = 1 / largest
	return s
}

func (s *RealShape) at(r float64) float64 {
	place := r * realShapeSteps
	i := min(int(place), realShapeSteps-1)
	u := place - float64(i)
	return s.scale * ((1-u)*s.radial[i] + u*s.radial[i+1])
}

// Raster fills dst as Shape.Raster does.
func (s *RealShape) Raster(dst []float32, size int) {
	turn := complex(math.Cos(float64(s.M)*s.Orientation), -math.Sin(float64(s.M)*s.Orientation))
	outside := float32(math.NaN())
	for row := range size {
		y := float64(size-1-2*row) / float64(size)
		line := dst[row*size : (row+1)*size]
		for column := range line {
			x := float64(2*column-size+1) / float64(size)
			r := math.Sqrt(x*x + y*y)
			switch {
			case r > 1:
				line[column] = outside
			case s.M == 0:
				line[column] = float32(s.at(r))
			case r == 0:
				line[column] = 0
			default:
				line[column] = float32(s.at(r) * real(turn*power(complex(x/r, y/r), s.M)))
			}
		}
	}
}

// Section fills dst as Shape.Section does.
func (s *RealShape) Section(dst []float32, angle float64) {
	ahead := math.Cos(float64(s.M) * (angle - s.Orientation))
	behind := ahead
	if s.M%2 == 1 {
		behind = -ahead
	}
	last := len(dst) - 1
	for i := range dst {
		place := float64(2*i-last) / float64(max(1, last))
		side := ahead
		if place < 0 {
			side = behind
		}
		dst[i] = float32(side * s.at(math.Abs(place)))
	}
}

// CircleRadii returns the radii of the nodal circles inside the rim, inside
// out: the changes of sign of R, leaving out the rim and, for m > 0, the
// centre.
func (s *RealShape) CircleRadii() []float64 {
	radii := []float64{}
	for i := 1; i < realShapeSteps; i++ {
		a, b := s.radial[i], s.radial[i+1]
		if a*b < 0 && i+1 < realShapeSteps {
			radii = append(radii, (float64(i)+a/(a-b))/realShapeSteps)
		}
	}
	return radii
}

// DiameterAngles returns the angles of the nodal diameters as Shape does.
func (s *RealShape) DiameterAngles() []float64 { return diameterAngles(s.M, s.Orientation) }

// Lobes returns the local extremes, inside out, as Shape does.
func (s *RealShape) Lobes() []Lobe {
	var lobes []Lobe
	around := max(1, 2*s.M)
	add := func(i int) {
		for k := range around {
			sign := float64(1 - 2*(k%2))
			lobes = append(lobes, Lobe{
				Radius: float64(i) / realShapeSteps,
				Angle:  s.Orientation + 2*math.Pi*float64(k)/float64(around),
				Value:  sign * s.scale * s.radial[i],
			})
		}
	}
	if s.M == 0 && s.radial[0] != 0 { // a hub holds the centre
		add(0)
	}
	for i := 1; i < realShapeSteps; i++ {
		before, here, after := math.Abs(s.radial[i-1]), math.Abs(s.radial[i]), math.Abs(s.radial[i+1])
		if here > before && here >= after {
			add(i)
		}
	}
	return lobes
}

package modes

import (
	"math"

	"hoopsheet/core/bessel"
)

// Shape is the form of one mode of the ideal sheet on the unit disc,
//
//	J_m(j_mn r) cos m(theta - Orientation),
//
// scaled to a largest value of one.
type Shape struct {
	M, N int
	// Zero is j_mn.
	Zero float64
	// Orientation of the first antinode, rad.
	Orientation float64

	scale float64   // 1 / largest J_m
	zeros []float64 // j_m1 .. j_mn
	turns []float64 // places of the extremes of J_m inside, in x = j_mn r
}

// NewShape returns the shape of mode (m, n), m >= 0 and n >= 1.
func NewShape(m, n int, orientation float64) *Shape {
	s := &Shape{M: m, N: n, Orientation: orientation}
	s.zeros = bessel.ZerosJ(make([]float64, n), float64(m))
	s.Zero = s.zeros[n-1]
	if m == 0 {
		// J_0 is largest at the centre, and J_0' vanishes with J_1.
		s.turns = append([]float64{0}, bessel.ZerosJPrime(make([]float64, n-1), 0)...)
	} else {
		s.turns = bessel.ZerosJPrime(make([]float64, n), float64(m))
	}
	// The extremes of J_m fall off along x, so the first is the largest
	// (Watson 15.31).
	s.scale = 1 / bessel.JInt(m, s.turns[0])
	return s
}

// At returns the shape at radius r (0 to 1) and angle theta (rad).
func (s *Shape) At(r, theta float64) float64 {
	return s.scale * bessel.JInt(s.M, s.Zero*r) * math.Cos(float64(s.M)*(theta-s.Orientation))
}

// CircleRadii returns the radii of the nodal circles inside the rim, inside
// out.
func (s *Shape) CircleRadii() []float64 {
	return ratios(s.zeros[:s.N-1], s.Zero)
}

// DiameterAngles returns the angles of the nodal diameters, rad, in order,
// each from 0 up to but not including pi.
func (s *Shape) DiameterAngles() []float64 { return diameterAngles(s.M, s.Orientation) }

func diameterAngles(m int, orientation float64) []float64 {
	angles := make([]float64, m)
	if m == 0 {
		return angles
	}
	step := math.Pi / float64(m)
	first := math.Mod(orientation+step/2, step)
	if first < 0 {
		first += step
	}
	// An orientation a rounding below a whole step must not give pi.
	if first >= step {
		first = 0
	}
	for i := range angles {
		angles[i] = first + float64(i)*step
	}
	return angles
}

// Lobe is one local extreme of a shape.
type Lobe struct {
	Radius, Angle float64
	// Value, -1 to 1.
	Value float64
}

// Lobes returns the local extremes, inside out. An axisymmetric mode has
// extreme rings; each is given once, at the angle of Orientation.
func (s *Shape) Lobes() []Lobe {
	around := max(1, 2*s.M)
	lobes := make([]Lobe, 0, len(s.turns)*around)
	for _, x := range s.turns {
		value := s.scale * bessel.JInt(s.M, x)
		for i := range around {
			sign := float64(1 - 2*(i%2))
			angle := s.Orientation + 2*math.Pi*float64(i)/float64(around)
			lobes = append(lobes, Lobe{Radius: x / s.Zero, Angle: angle, Value: sign * value})
		}
	}
	return lobes
}

// Section fills dst with the shape along the diameter at the given angle
// (rad), evenly spaced from the far rim (-1) through the centre to +1.
func (s *Shape) Section(dst []float32, angle float64) {
	ahead := s.scale * math.Cos(float64(s.M)*(angle-s.Orientation))
	behind := ahead
	if s.M%2 == 1 {
		behind = -ahead
	}
	last := len(dst) - 1
	for i := range dst {
		// 2i - last is exact, so the places lie even about the centre.
		place := float64(2*i-last) / float64(max(1, last))
		side := ahead
		if place < 0 {
			side = behind
		}
		dst[i] = float32(side * bessel.JInt(s.M, s.Zero*math.Abs(place)))
	}
}

package modes

import (
	"math"

	"hoopsheet/core/bessel"
)

// Hub returns the count lowest modes of an ideal sheet in vacuum stretched
// evenly between a ring of radius a (m) and a fixed hub of radius q a, lowest
// first:
//
//	f_mn = x_mn/(2 pi a) sqrt(T/sigma),
//	J_m(x) Y_m(q x) - J_m(q x) Y_m(x) = 0,
//
// T in N/m, sigma in kg/m^2. Zero holds x_mn; N counts the rim and not the
// hub. The nodal circles are those of HubShape.
// Frequency equals Ideal. The roots are as good as bessel.ZeroAnnulus.
//
// As q goes to 0 the modes with m >= 1 reach those of the full sheet like
// q^(2m), but those with m = 0 only like 1/ln(1/q): for the (0,n) of the full sheet
// with zero j,
//
//	x_0n - j  ~  (pi/2) |Y_0(j)/J_1(j)| / ln(1/q),
//
// a point that is held counts. It returns nil unless a, T and sigma are
// positive and finite, 0 < q < 1 and count is positive.
func Hub(a, q, T, sigma float64, count int) []Mode {
	if !positive(a) || !positive(T) || !positive(sigma) || !(q > 0 && q < 1) || count < 1 {
		return nil
	}
	scale := math.Sqrt(T/sigma) / (2 * math.Pi * a)
	// x_mn rises with n, and with m because the quotient of Rayleigh gains
	// m^2/r^2: so the next lowest is the next of an order begun or the first of
	// a new one.
	next := []float64{bessel.ZeroAnnulus(0, q, 1)}
	taken := []int{0}
	list := make([]Mode, 0, count)
	for len(list) < count {
		m := 0
		for i, x := range next {
			if x < next[m] {
				m = i
			}
		}
		x := next[m]
		taken[m]++
		next[m] = bessel.ZeroAnnulus(m, q, taken[m]+1)
		if taken[m] == 1 {
			next = append(next, bessel.ZeroAnnulus(len(next), q, 1))
			taken = append(taken, 0)
		}
		f := scale * x
		list = append(list, Mode{M: m, N: taken[m], Zero: x, Ideal: f, Frequency: f})
	}
	return list
}

// HubShape is the form of one mode of the ideal sheet between hub and ring,
//
//	[J_m(x r) Y_m(x q) - J_m(x q) Y_m(x r)] cos m(theta - Orientation),
//
// q <= r <= 1, scaled to a largest value of one; zero on the hub.
type HubShape struct {
	M, N int
	// Hub is q, the radius of the hub over that of the ring.
	Hub float64
	// Zero is x_mn.
	Zero float64
	// Orientation of the first antinode, rad.
	Orientation float64

	ratio float64 // J_m(x q) / Y_m(x q)
	scale float64
	zeros []float64 // nodal circles inside
	turns []float64 // radii of the extremes between
}

// NewHubShape returns the shape of mode (m, n), m >= 0, n >= 1, for 0 < q < 1.
func NewHubShape(q float64, m, n int, orientation float64) *HubShape {
	return newHubShape(q, m, n, bessel.ZeroAnnulus(m, q, n), orientation)
}

func newHubShape(q float64, m, n int, x, orientation float64) *HubShape {
	s := plainHubShape(q, m, n, x, orientation)
	// The radial part has n-1 zeros between the edges, and one extreme in each
	// of the n spans. Zeros lie no closer than pi/x for m >= 1, by Sturm's
	// comparison of sqrt(r) times it with sin(x r), and little closer for m = 0:
	// steps an eighth of that cannot miss one.
	steps := 8 + int(8*x*(1-q)/math.Pi)
	radius := func(i int) float64 { return q + (1-q)*float64(i)/float64(steps) }
	s.zeros = make([]float64, 0, n-1)
	for i := 1; i < steps-1; i++ {
		if a, b := s.radial(radius(i)), s.radial(radius(i+1)); (a > 0) != (b > 0) {
			s.zeros = append(s.zeros, root(s.radial, radius(i), radius(i+1)))
		}
	}
	edges := append(append([]float64{q}, s.zeros...), 1)
	largest := 0.0
	s.turns = make([]float64, len(edges)-1)
	for i := range s.turns {
		s.turns[i] = root(s.slope, edges[i], edges[i+1])
		largest = math.Max(largest, math.Abs(s.radial(s.turns[i])))
	}
	if len(s.turns) > 0 && s.radial(s.turns[0]) < 0 {
		largest = -largest
	}
	s.scale = 1 / largest
	return s
}

// plainHubShape has neither its scale nor its circles yet.
func plainHubShape(q float64, m, n int, x, orientation float64) *HubShape {
	return &HubShape{M: m, N: n, Hub: q, Zero: x, Orientation: orientation, scale: 1, ratio: bessel.JInt(m, x*q) / bessel.Y(float64(m), x*q)}
}

// DrawHub prepares the drawing of mode (m, n) between hub and ring.
func DrawHub(q float64, m, n int, orientation float64) *RealShape {
	s := plainHubShape(q, m, n, bessel.ZeroAnnulus(m, q, n), orientation)
	return newRealShape(m, orientation, func(r float64) float64 {
		if r <= q || r >= 1 {
			return 0
		}
		return s.radial(r)
	})
}

// radial is the radial part times scale.
func (s *HubShape) radial(r float64) float64 {
	y := bessel.Y(float64(s.M), s.Zero*r)
	if math.IsInf(y, 0) {
		return 0 // next to a small hub and for large m, where J_m underflows too
	}
	return s.scale * (bessel.JInt(s.M, s.Zero*r) - s.ratio*y)
}

// slope is the derivative of radial over Zero.
func (s *HubShape) slope(r float64) float64 {
	m, z := float64(s.M), s.Zero*r
	y := bessel.YPrime(m, z)
	if math.IsInf(y, 0) {
		return 0
	}
	return s.scale * (bessel.JPrime(m, z) - s.ratio*y)
}

// At returns the shape at radius r (0 to 1) and angle theta (rad).
func (s *HubShape) At(r, theta float64) float64 {
	if r <= s.Hub || r >= 1 {
		return 0
	}
	return s.radial(r) * math.Cos(float64(s.M)*(theta-s.Orientation))
}

// CircleRadii returns the radii of the nodal circles between hub and rim,
// inside out.
func (s *HubShape) CircleRadii() []float64 { return append([]float64{}, s.zeros...) }

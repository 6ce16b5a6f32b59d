package modes

import (
	"errors"
	"math"
	"math/cmplx"
)

// Strip is a band of extra mass across the sheet from rim to rim: a seam, a
// double overlap. It is limp, and its mass even over its area.
type Strip struct {
	// Offset of its middle line from the centre of the sheet, m, in direction
	// Angle, rad: the line runs at right angles to that.
	Offset, Angle float64
	Width         float64 // m
	Mass          float64 // kg, all of it
}

func (s Strip) check(radius float64) error {
	switch {
	case !(s.Mass >= 0) || math.IsInf(s.Mass, 1):
		return errors.New("the mass must be zero or a positive number of kg")
	case !finite(s.Offset) || !finite(s.Angle):
		return errors.New("the offset must be a number of metres and its angle a number")
	case !positive(s.Width):
		return errors.New("the width must be a positive number of metres")
	case math.Abs(s.Offset)+s.Width/2 > radius*(1-1e-3):
		return errors.New("the strip must cross the free sheet, inside the ring")
	}
	return nil
}

// newStripAttachment sets up the functionals of a strip: products of polynomials
// along it that vanish at the rim, as the sheet does, and across it, orthonormal
// under the mean over the strip, fit for waves of wave number k (times the
// radius of the sheet).
func newStripAttachment(s Strip, radius, axis, k float64) *attachment {
	width, middle := s.Width/radius, s.Offset/radius
	a := &attachment{strip: &stripLine{width: width, middle: middle}}
	// Legendre coefficients of a wave of k over a length 2 fall off beyond degree
	// k; the modes with the longest waves are resolved best.
	degrees := min(8+int(math.Ceil(k)), maxAlong)
	loads := min(8+int(k/3), degrees)
	a.strip.loads = loads
	across := min(2+int(k*width/2), 5) // at least 1 and linear
	x, wx := legendre(across + 1)
	y, wy := legendre(degrees + 8)
	along := vanishing(degrees, y)
	half, sum := zeros(len(x)), 0.0
	for i, v := range x {
		offset := middle + v*width/2
		half[i] = math.Sqrt(1 - offset*offset)
		sum += wx[i] * half[i]
	}
	a.strip.half = sum / 2 // of the same area
	measure := zeros(len(x))
	for i := range measure {
		measure[i] = wx[i] * half[i] / sum
	}
	sin, cos := math.Sincos(s.Angle - axis)
	place := func(offset, t float64) (r, theta float64) {
		px, py := offset*cos-t*sin, offset*sin+t*cos
		return math.Hypot(px, py), math.Atan2(py, px)
	}
	for i, v := range x {
		for _, u := range y {
			r, t := place(middle+v*width/2, half[i]*u)
			a.r, a.t = append(a.r, r), append(a.t, t)
			r, t = place(middle+v*width/2, a.strip.half*u)
			a.strip.r, a.strip.t = append(a.strip.r, r), append(a.strip.t, t)
		}
	}
	// Lines along the strip first, then their combinations across it.
	for i := range x {
		for l := range degrees {
			row := zeros(len(a.r))
			for j := range y {
				row[i*len(y)+j] = wy[j] / 2 * along[l][j]
			}
			a.weights = append(a.weights, row)
		}
	}
	for d, shape := range orthonormal(across, x, measure) {
		mix, straight := zeros(len(x)), zeros(len(x))
		for i := range x {
			mix[i], straight[i] = measure[i]*shape[i], wx[i]/2*linear(d, x[i])
		}
		a.strip.mix = append(a.strip.mix, mix)
		if d <= 1 {
			a.strip.square = append(a.strip.square, straight)
		}
		for l := range degrees {
			f := functional{patch: -1, mass: s.Mass, degree: l, order: d, load: d <= 1 && l < loads/(1+d)}
			a.list = append(a.list, f)
		}
	}
	a.strip.nodes, a.strip.along = y, along
	a.strip.measure = wy
	return a
}

// maxAlong bounds the polynomials along a strip, for speed.
const maxAlong = 40

// vanishing returns polynomials (1-y^2) times those of degree 0, 1, .. at the
// points y, orthonormal under the mean over -1 to 1.
func vanishing(count int, y []float64) [][]float64 {
	// Gegenbauer's polynomials with lambda = 5/2: DLMF 18.9.1; their norm, DLMF
	// 18.3, over the mean.
	list := make([][]float64, count)
	before, value := zeros(len(y)), zeros(len(y))
	for j := range y {
		value[j] = 1
	}
	for l := range list {
		n := float64(l)
		norm := math.Sqrt((n + 2.5) * 18 / ((n + 1) * (n + 2) * (n + 3) * (n + 4)))
		list[l] = zeros(len(y))
		for j, v := range y {
			list[l][j] = norm * (1 - v*v) * value[j]
			before[j], value[j] = value[j], (2*(n+2.5)*v*value[j]-(n+4)*before[j])/(n+1)
		}
	}
	return list
}

// orthonormal returns polynomials of degree 0, 1, .. at the points x,
// orthonormal under the weights.
func orthonormal(count int, x, w []float64) [][]float64 {
	list := make([][]float64, count)
	for d := range list {
		row := zeros(len(x))
		for i, v := range x {
			row[i] = math.Pow(v, float64(d))
		}
		for range 2 {
			for _, b := range list[:d] {
				addTo(row, -dot3(w, b, row), b)
			}
		}
		list[d] = scaled(row, 1/math.Sqrt(dot3(w, row, row)))
	}
	return list
}

// dot3 is the sum of products of three.
func dot3(a, b, c []float64) float64 {
	s := 0.0
	for i, v := range a {
		s += v * b[i] * c[i]
	}
	return s
}

// stripLine is a strip with square ends, for the part of its static deflection
// that the functions of the sheet do not express.
type stripLine struct {
	width, middle, half float64
	loads               int         // how many of the polynomials along it load the sheet
	r, t                []float64   // the points, with square ends
	mix, square         [][]float64 // functionals from lines, by degree across; with square ends
	nodes, measure      []float64
	along               [][]float64 // polynomials at the nodes
}

// linear is 1 or the line through 0, of mean square 1 over -1 to 1.
func linear(degree int, x float64) float64 {
	if degree == 0 {
		return 1
	}
	return math.Sqrt(3) * x
}

// staticSelf returns the deflection of the line under loads that are even (first)
// or linear across it, as a matrix between these times the polynomials along it,
// times T.
func (s *stripLine) staticSelf() []float64 {
	n := len(s.along)
	x := zeros(4 * n * n)
	s.addFree(x)
	s.mirror(x)
	s.addImage(x)
	return x
}

// addFree adds the part without the rim of the sheet.
func (s *stripLine) addFree(x []float64) {
	// Loads at a distance u along the strip act by the mean of Green's function
	// across it; in u the rule closes in on 0.
	n := len(s.along)
	edges := []float64{0}
	for e := s.width / s.half / 4; e < 2; e *= 2 {
		edges = append(edges, e)
	}
	edges = append(edges, 2)
	g, wg := legendre(12)
	points, weights := legendre(n + 4)
	here, there := zeros(len(points)), zeros(len(points))
	for i := range len(edges) - 1 {
		for j, v := range g {
			length := (edges[i+1] - edges[i]) / 2
			u := edges[i] + length*(1+v)
			even, odd := s.across(s.half * u)
			// Products over the common part, from -1 to 1-u.
			for p, v := range points {
				here[p] = -1 + (1-u/2)*(1+v)
				there[p] = here[p] + u
			}
			a, b := vanishing(n, here), vanishing(n, there)
			for k := range n {
				for p := range a[k] {
					a[k][p] *= weights[p] * (1 - u/2) * wg[j] * length / 4
				}
				// Odd sums vanish when both ends are exchanged; and so the sum over
				// k, l equals that over l, k. Only loads matter on one side.
				for l := k % 2; l <= k && l < s.loads; l += 2 {
					c := 2 * dot(a[k], b[l])
					x[k*2*n+l] += c * even
					x[(n+k)*2*n+n+l] += c * odd
				}
			}
		}
	}
}

// mirror fills the entries above the diagonal of the part without the rim.
func (s *stripLine) mirror(x []float64) {
	n := len(s.along)
	for k := range 2 * n {
		for l := range k {
			x[l*2*n+k] = x[k*2*n+l]
		}
	}
}

// addImage adds the image in the rim, smooth but at the ends, where the loads
// vanish.
func (s *stripLine) addImage(x []float64) {
	n, m := len(s.along), len(s.nodes)
	side, ws := legendre(3)
	var image [2][2][]float64
	for d := range 2 {
		for e := range 2 {
			image[d][e] = zeros(m * m)
		}
	}
	for p, t := range s.nodes {
		for q, u := range s.nodes {
			for i, v := range side {
				for j, w := range side {
					z := complex(s.middle+v*s.width/2, s.half*t)
					y := complex(s.middle+w*s.width/2, -s.half*u)
					g := ws[i] * ws[j] / 4 * math.Log(cmplx.Abs(1-z*y)) / (2 * math.Pi)
					for d := range 2 {
						for e := range 2 {
							image[d][e][p*m+q] += g * linear(d, v) * linear(e, w)
						}
					}
				}
			}
		}
	}
	inner := zeros(m)
	for d := range 2 {
		for e := range 2 {
			for l, q := range s.along {
				for p := range inner {
					inner[p] = 0
					for k, v := range q {
						inner[p] += image[d][e][p*m+k] * s.measure[k] / 2 * v
					}
					inner[p] *= s.measure[p] / 2
				}
				for k, row := range s.along {
					x[(d*n+k)*2*n+e*n+l] += dot(row, inner)
				}
			}
		}
	}
}

// across is the mean of -(1/2 pi) ln sqrt(u^2 + (s-s')^2) over s and s' across
// the strip, by itself and times the product of linear at both.
func (s *stripLine) across(u float64) (even, odd float64) {
	// Over the distance v = |s-s'| the weights are (h-v)/h^2 and
	// (h^3 - 3 h^2 v + 2 v^3)/h^4; what is left are integrals of v^k ln(u^2+v^2).
	h := s.width
	p, q := u*u+h*h, u*u
	lp, lq := math.Log(p), math.Log(q)
	i0 := h*lp - 2*h + 2*u*math.Atan(h/u)
	i1 := (p*(lp-1) - q*(lq-1)) / 2
	i3 := (p*p*(2*lp-1)-q*q*(2*lq-1))/8 - q*i1
	even = -(h*i0 - i1) / (2 * math.Pi * h * h)
	odd = -(h*h*h*i0 - 3*h*h*i1 + 2*i3) / (2 * math.Pi * h * h * h * h)
	return even, odd
}

// legendre returns the Gauss rule of n points on -1 to 1.
func legendre(n int) (x, w []float64) {
	// Newton's method on P_n from DLMF 18.16.6; weights DLMF 3.5(v).
	x, w = zeros(n), zeros(n)
	for i := range x {
		z := math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		slope := 0.0
		for range 20 {
			before, p := 0.0, 1.0
			for j := 1; j <= n; j++ {
				before, p = p, (float64(2*j-1)*z*p-float64(j-1)*before)/float64(j)
			}
			slope = float64(n) * (z*p - before) / (z*z - 1)
			step := p / slope
			z -= step
			if math.Abs(step) < 1e-15 {
				break
			}
		}
		x[i], w[i] = z, 2/((1-z*z)*slope*slope)
	}
	return x, w
}

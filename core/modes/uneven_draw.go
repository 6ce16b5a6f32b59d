package modes

import (
	"math"

	"hoopsheet/core/disc"
)

// CoupledShape draws a coupled mode: the sum over m of
//
//	R_m(r) cos m theta + S_m(r) sin m theta,
//
// with R and S interpolated linearly between steps of the radius, which errs by
// less than 1e-3 of the largest value for modes of up to 12 nodal diameters and
// 4 circles (step^2/8 times the square of the largest wave number, 25).
type CoupledShape struct {
	orders []radialPair
}

// radialPair holds R_m and S_m at even steps.
type radialPair struct{ cos, sin []float64 }

const coupledSteps = 320

// Drawing prepares the drawing of the mode, at the scale of At.
func (m *CoupledMode) Drawing() *CoupledShape {
	m.shape.normalise()
	return &CoupledShape{m.shape.table(coupledSteps)}
}

// table returns the radial functions at r = i/steps of the ring's radius.
func (s *coupledShape) table(steps int) []radialPair {
	list := make([]radialPair, len(s.cos))
	for m := range list {
		u := zeros(len(s.cos[m]))
		p := radialPair{zeros(steps + 1), zeros(steps + 1)}
		for i := range steps {
			if x := float64(i) / float64(steps) / s.inner; x < 1 {
				disc.HeldEdge.Shapes(u, m, x)
				p.cos[i], p.sin[i] = s.scale*dot(u, s.cos[m]), s.scale*dot(u, s.sin[m])
			}
		}
		list[m] = p
	}
	return list
}

// grid is the shape at step i of its table.
func (s *CoupledShape) grid(i int, turn complex128) float64 {
	w, z := 0.0, complex(1, 0)
	for _, o := range s.orders {
		w += real(z)*o.cos[i] + imag(z)*o.sin[i]
		z *= turn
	}
	return w
}

// at is the shape at radius r in the direction of the unit number turn.
func (s *CoupledShape) at(r float64, turn complex128) float64 {
	place := r * coupledSteps
	i := min(int(place), coupledSteps-1)
	u := place - float64(i)
	return (1-u)*s.grid(i, turn) + u*s.grid(i+1, turn)
}

// Raster fills dst as Shape.Raster does.
func (s *CoupledShape) Raster(dst []float32, size int) {
	for i := range dst {
		x := float64(2*(i%size)-size+1) / float64(size)
		y := float64(size-1-2*(i/size)) / float64(size)
		switch r := math.Hypot(x, y); {
		case r > 1:
			dst[i] = float32(math.NaN())
		case r == 0:
			dst[i] = float32(s.at(0, 1))
		default:
			dst[i] = float32(s.at(r, complex(x/r, y/r)))
		}
	}
}

// Section fills dst as Shape.Section does.
func (s *CoupledShape) Section(dst []float32, angle float64) {
	sin, cos := math.Sincos(angle)
	last := float64(len(dst) - 1)
	for i := range dst {
		place := (2*float64(i) - last) / math.Max(1, last)
		dst[i] = float32(s.at(math.Abs(place), complex(math.Copysign(cos, cos*place), math.Copysign(sin, sin*place))))
	}
}

// CircleRadii and DiameterAngles are empty: the nodal lines are where the shape
// changes sign.
func (s *CoupledShape) CircleRadii() []float64    { return []float64{} }
func (s *CoupledShape) DiameterAngles() []float64 { return []float64{} }

// Lobes returns the local extremes of at least a tenth of the largest value, on
// a grid of 32 radii and 96 angles.
func (s *CoupledShape) Lobes() []Lobe {
	const rings, spokes = 32, 96
	value := zeros((rings + 1) * spokes)
	for i := range rings {
		for k := range spokes {
			sin, cos := math.Sincos(2 * math.Pi * float64(k) / spokes)
			value[i*spokes+k] = s.at(float64(i)/rings, complex(cos, sin))
		}
	}
	var lobes []Lobe
	for i := range rings {
		for k := range spokes {
			v := value[i*spokes+k]
			if i == 0 && k > 0 || math.Abs(v) < 0.1 {
				continue
			}
			best := true
			for turn := range spokes {
				// Around the centre every direction is a neighbour.
				if i > 0 && turn > 1 && turn < spokes-1 {
					continue
				}
				for step := -1; step <= 1; step++ {
					j := i + step
					if j < 0 || step == 0 && turn == 0 {
						continue
					}
					at := j*spokes + (k+turn)%spokes
					w := value[at] * math.Copysign(1, v)
					// Of equal neighbours the first counts.
					if w > math.Abs(v) || w == math.Abs(v) && at < i*spokes+k {
						best = false
					}
				}
			}
			if best {
				lobes = append(lobes, Lobe{Radius: float64(i) / rings, Angle: 2 * math.Pi * float64(k) / spokes, Value: v})
			}
		}
	}
	return lobes
}

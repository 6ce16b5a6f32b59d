package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// halfForm is one on the half of the disc about an angle.
type halfForm struct{ angle float64 }

func (h halfForm) at(_, theta float64) float64 {
	if math.Cos(theta-h.angle) > 0 {
		return 1
	}
	return 0
}

func (h halfForm) project(b *disc.Basis, coef []float64) {
	// Around, the integral of cos m phi over -pi/2..pi/2; along the radius, Gauss's
	// rule, exact to rounding for half a wave a point and some more.
	nodes, weights := make([]float64, b.N+b.M/2+24), make([]float64, b.N+b.M/2+24)
	disc.RadialRule(nodes, weights, 0)
	clear(coef)
	for m := 0; m <= b.M; m++ {
		if m > 0 && m%2 == 0 {
			continue
		}
		around := math.Pi
		if m > 0 {
			around = 2 / float64(m)
			if m%4 == 3 {
				around = -around
			}
		}
		sin, cos := math.Sincos(float64(m) * h.angle)
		for n := 1; n <= b.N; n++ {
			j, sum := b.Zero(m, n), 0.0
			if m == 0 {
				sum = b.Slope(0, n) / j // DLMF 10.22.1
			} else {
				for i, r := range nodes {
					sum += weights[i] * bessel.JInt(m, j*r)
				}
			}
			c := around * sum / b.Norm(m, n)
			coef[b.Index(m, n, disc.Cos)] = c * cos
			if m > 0 {
				coef[b.Index(m, n, disc.Sin)] = c * sin
			}
		}
	}
}

func (halfForm) norms() norms {
	return norms{square: math.Pi / 2, slope: math.Inf(1), steepest: math.Inf(1)}
}

// even is one everywhere.
type even struct{}

func (even) at(_, _ float64) float64 { return 1 }

func (even) project(b *disc.Basis, coef []float64) {
	clear(coef)
	for n := 1; n <= b.N; n++ {
		coef[b.Index(0, n, disc.Cos)] = 2 / (b.Zero(0, n) * b.Slope(0, n))
	}
}

func (even) norms() norms {
	return norms{square: math.Pi, slope: math.Inf(1), steepest: math.Inf(1)}
}

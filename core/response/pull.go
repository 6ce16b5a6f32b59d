package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// pull is the static form of the ideal sheet under an even load on a round
// pad, scaled to a largest value of one:
//
//	-div grad w = q inside the pad, 0 outside; w = 0 at the rim.
type pull struct {
	place
	width float64
	scale float64 // 1/largest displacement for q = 1
}

// newPull places a pad of the given width within the rim.
func newPull(radius, angle, width float64) pull {
	p := pull{place: place{radius, angle}, width: width, scale: 1}
	// On the diameter through the pad, at s inside it, the slope
	// -(s-r0)/2 - b^2 r0/(2 (1 - s r0)) vanishes where
	// r0 s^2 - (1+r0^2) s + r0 (1-b^2) = 0: the place of the largest value.
	r0, b := radius, width
	sum := 1 + r0*r0
	top := 2 * r0 * (1 - b*b) / (sum + math.Sqrt(sum*sum-4*r0*r0*(1-b*b)))
	p.scale = 1 / p.at(top, angle)
	return p
}

func (p pull) at(r, theta float64) float64 {
	// The potential of an evenly loaded disc is that of a point outside it
	// (Newton), -(b^2/2) ln d, and falls off by d^2/4 inside; the image of the
	// pad in the rim has the same load, opposite. Together, with the distance
	// to the image scaled by r0, they vanish at the rim.
	b := p.width
	w := b * b / 2 * (math.Log(p.toImage(r, theta)) - math.Log(b))
	if d := p.distance(r, theta); d > b {
		w -= b * b / 2 * math.Log(d/b)
	} else {
		w += (b - d) * (b + d) / 4
	}
	return p.scale * w
}

// toImage returns r0 |x - x0/r0^2|, which is the distance to the pad's centre
// at the rim and 1 at the centre of the ring.
func (p pull) toImage(r, theta float64) float64 {
	s := math.Sin((theta - p.angle) / 2)
	q := r * p.radius
	return math.Hypot(1-q, 2*math.Sqrt(q)*s)
}

func (p pull) project(b *disc.Basis, coef []float64) {
	// The mode's static answer to the load is its load divided by j^2.
	p.place.project(b, coef, func(k float64) float64 {
		return p.scale * 2 * math.Pi * p.width * bessel.JInt(1, k*p.width) / (k * k * k)
	})
}

func (p pull) norms() norms {
	b, r0 := p.width, p.radius
	// By Green's identity the integral of |grad w|^2 is that of w over the pad;
	// the image's part is harmonic, so its mean there is its value at the centre.
	slope := math.Pi * b * b * b * b * (0.125 + math.Log((1-r0)*(1+r0)/b)/2)
	// b/2 at the edge of the pad; the image adds at most b^2 r0 / 2 over the
	// least distance, on the side of the rim.
	steepest := b/2 + b*b/2*r0/(1-r0*(r0+b))
	return norms{
		square:   p.square(),
		slope:    p.scale * p.scale * slope,
		steepest: p.scale * steepest,
	}
}

// square integrates the square of the form over the disc.
func (p pull) square() float64 {
	// Polar coordinates about the pad: Gauss rules inside it and, in the
	// logarithm of the distance, from there to the rim; even steps around. The
	// distance to the rim, sqrt(1 - r0^2 sin^2) - r0 cos, is analytic within
	// arcosh(1/r0) of the real axis, so n steps err like exp(-n arcosh(1/r0)).
	const radial = 24
	nodes, weights := gaussLegendre(radial)
	around := 16
	if p.radius > 0 {
		around = min(2048, max(16, int(math.Ceil(40/math.Acosh(1/p.radius)))))
	}
	var sum float64
	for k := range around {
		sin, cos := math.Sincos(2 * math.Pi * (float64(k) + 0.5) / float64(around))
		rim := math.Sqrt((1-p.radius*sin)*(1+p.radius*sin)) - p.radius*cos
		stretch := math.Log(rim / p.width)
		for i, u := range nodes {
			inner := p.width * u
			w := p.along(inner, sin, cos)
			sum += weights[i] * w * w * inner * p.width
			if stretch > 0 {
				outer := p.width * math.Exp(stretch*u)
				w = p.along(outer, sin, cos)
				sum += weights[i] * w * w * outer * outer * stretch
			}
		}
	}
	return sum * 2 * math.Pi / float64(around)
}

// along returns the form at the distance d from the pad's centre, in the
// direction with this sine and cosine against that from the ring's centre.
func (p pull) along(d, sin, cos float64) float64 {
	x, y := p.radius+d*cos, d*sin
	return p.at(math.Hypot(x, y), p.angle+math.Atan2(y, x))
}

// gaussLegendre returns the nodes and weights of Gauss's rule on 0 to 1.
func gaussLegendre(n int) (nodes, weights []float64) {
	// With t = r^2 the radial rule of the disc is this one: r dr = dt/2.
	nodes, weights = make([]float64, n), make([]float64, n)
	disc.RadialRule(nodes, weights, 0)
	for i := range nodes {
		nodes[i] *= nodes[i]
		weights[i] *= 2
	}
	return nodes, weights
}

package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// form is a shape of unit peak over the unit disc.
type form interface {
	// at returns its value at radius r and angle theta.
	at(r, theta float64) float64
	// project writes its Fourier-Bessel coefficients.
	project(b *disc.Basis, coef []float64)
	// norms returns what the missed energy and the limits need.
	norms() norms
}

// norms are integrals and bounds of a form of unit peak, with lengths in units
// of the ring radius.
type norms struct {
	// square is the integral of f^2 over the disc; slope that of |grad f|^2,
	// +Inf where f jumps.
	square, slope float64
	// steepest is the largest |grad f|, or a bound of it; +Inf where f jumps.
	steepest float64
}

// rest is zero everywhere.
type rest struct{}

func (rest) at(_, _ float64) float64               { return 0 }
func (rest) project(_ *disc.Basis, coef []float64) { clear(coef) }
func (rest) norms() norms                          { return norms{} }

// bulge is 1 - r^2.
type bulge struct{}

func (bulge) at(r, _ float64) float64 { return (1 - r) * (1 + r) }

func (bulge) project(b *disc.Basis, coef []float64) {
	// A_n = 8/(j^3 J_1(j)): integrate r (1-r^2) J_0(j r) by parts, or Asmar,
	// Partial Differential Equations, on the vibrating membrane.
	clear(coef)
	for n := 1; n <= b.N; n++ {
		j := b.Zero(0, n)
		coef[b.Index(0, n, disc.Cos)] = 8 / (j * j * j * b.Slope(0, n))
	}
}

func (bulge) norms() norms {
	return norms{square: math.Pi / 3, slope: 2 * math.Pi, steepest: 2}
}

// place is the centre of a form that lies wholly within the rim.
type place struct{ radius, angle float64 }

// distance of a point from the place.
func (p place) distance(r, theta float64) float64 {
	// The law of cosines in a form that does not cancel.
	s := math.Sin((theta - p.angle) / 2)
	return math.Hypot(r-p.radius, 2*math.Sqrt(r*p.radius)*s)
}

// project writes the coefficients of a load with rotational symmetry about the
// place; hankel(k) is 2 pi times the integral of the load times J_0(k d) d over
// the distance d.
func (p place) project(b *disc.Basis, coef []float64, hankel func(k float64) float64) {
	// J_m(k r) exp(i m theta) satisfies Helmholtz's equation, so its mean over
	// a circle of radius d is its value at the centre times J_0(k d) (Graf's
	// addition theorem, DLMF 10.23.7, averaged). The integral over the form is
	// therefore the value of the mode at its centre times a Hankel transform.
	clear(coef)
	for m := 0; m <= b.M; m++ {
		if m > 0 && p.radius == 0 {
			break
		}
		sin, cos := math.Sincos(float64(m) * p.angle)
		for n := 1; n <= b.N; n++ {
			j := b.Zero(m, n)
			c := hankel(j) * bessel.JInt(m, j*p.radius) / b.Norm(m, n)
			coef[b.Index(m, n, disc.Cos)] = c * cos
			coef[b.Index(m, n, disc.Sin)] = c * sin
		}
	}
	for n := 1; n <= b.N; n++ {
		coef[b.Index(0, n, disc.Sin)] = 0
	}
}

// profile is a function of the distance from a place that vanishes beyond a
// width.
type profile interface {
	// near returns the value at the distance d.
	near(d float64) float64
	// hankel returns 2 pi times the integral of the profile times J_0(k d) d.
	hankel(k float64) float64
	norms() norms
}

// local is a profile about a place.
type local struct {
	place
	profile
}

func (l local) at(r, theta float64) float64           { return l.near(l.distance(r, theta)) }
func (l local) project(b *disc.Basis, coef []float64) { l.place.project(b, coef, l.hankel) }

// patch is one within its width and zero beyond.
type patch struct{ width float64 }

func (p patch) near(d float64) float64 {
	if d <= p.width {
		return 1
	}
	return 0
}

func (p patch) hankel(k float64) float64 {
	return 2 * math.Pi * p.width * bessel.JInt(1, k*p.width) / k
}

func (p patch) norms() norms {
	return norms{square: math.Pi * p.width * p.width, slope: math.Inf(1), steepest: math.Inf(1)}
}

// bump is (1 - s^2)^3 of the distance s in units of its width, zero beyond.
type bump struct{ width float64 }

func (b bump) near(d float64) float64 {
	s := d / b.width
	if s >= 1 {
		return 0
	}
	q := (1 - s) * (1 + s)
	return q * q * q
}

func (b bump) hankel(k float64) float64 {
	// Sonine's first integral, DLMF 10.22.37 with mu = 0 and nu = 3:
	// integral_0^1 (1-s^2)^3 J_0(x s) s ds = 48 J_4(x)/x^4.
	x := k * b.width
	return 2 * math.Pi * b.width * b.width * 48 * bessel.JInt(4, x) / (x * x * x * x)
}

func (b bump) norms() norms {
	// Beta integrals; the slope 6 s (1-s^2)^2 is largest at s^2 = 1/5.
	return norms{
		square:   math.Pi * b.width * b.width / 7,
		slope:    6 * math.Pi / 5,
		steepest: 6 * 0.64 / math.Sqrt(5) / b.width,
	}
}

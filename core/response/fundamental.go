package response

import (
	"math"
	"math/cmplx"
)

// fundamental returns the two fundamental solutions of one mode at the time t:
// c with value one and slope zero at t = 0, and s omega times that with value
// zero and slope one. Their slopes are c' = -omega s and
// s' = omega (c - 2 zeta s).
//
// It holds for every zeta >= 0, through the critical value without loss.
func fundamental(omega, zeta, t float64) (c, s float64) {
	x := omega * t
	if zeta <= 1 {
		root := math.Sqrt((1 - zeta) * (1 + zeta))
		sin, cos := math.Sincos(root * x)
		decay := 1.0
		if zeta > 0 {
			decay = math.Exp(-zeta * x)
		}
		if root > 0 {
			s = decay * sin / root
		} else {
			s = decay * x
		}
		return decay*cos + zeta*s, s
	}
	// exp(-(zeta -+ root) x) with zeta - root = 1/(zeta + root).
	root := math.Sqrt((zeta - 1) * (zeta + 1))
	slow := math.Exp(-x / (zeta + root))
	// 1 - fast/slow, which does not cancel as root goes to zero.
	gap := -math.Expm1(-2 * root * x)
	s = slow * gap / (2 * root)
	return slow*(1-gap/2) + zeta*s, s
}

// mostDegree of a polynomial load.
const mostDegree = 8

// powers is what a mode at rest at t = 0 does under the loads 1, t, t^2, ...:
// the displacement under t^j.
type powers [mostDegree + 1]float64

// driven fills the first degree+1 of the powers of one mode; c and s are its
// fundamental solutions at t. The velocity under t^j is j times the displacement
// under t^(j-1), and under 1 it is s/omega.
func (p *powers) driven(omega, zeta, t, c, s float64, degree int) {
	// Two ways, each where it does not cancel. R_j = j! t^(j+2) times the sum over
	// i >= 1 of h_i/(i+j+1)!, where h_i is the divided difference of z^i at the two
	// roots times t; its terms fall from the first on while the roots are below
	// j + 2. Beyond, by the equation of motion,
	//   omega^2 R_j = t^j - 2 zeta omega j R_{j-1} - j (j-1) R_{j-2}.
	x := omega * t
	large := x // of the roots, at most
	if zeta > 1 {
		large *= zeta + math.Sqrt((zeta-1)*(zeta+1))
	}
	if zeta > 1.05 && large > 2 {
		p.overdamped(omega, zeta, t, degree)
		return
	}
	for j := degree; j >= 0 && large <= float64(j+2); j-- {
		p[j] = differences(-2*zeta*x, x*x, j) * math.Pow(t, float64(j+2))
		degree = j - 1
	}
	if degree < 0 {
		return
	}
	w2 := omega * omega
	power := 1.0
	for j := 0; j <= degree; j++ {
		switch j {
		case 0:
			p[0] = (1 - c) / w2
		case 1:
			p[1] = (t - 2*zeta*omega*p[0] - s/omega) / w2
		default:
			p[j] = (power - float64(j)*(2*zeta*omega*p[j-1]+float64(j-1)*p[j-2])) / w2
		}
		power *= t
	}
}

// differences sums h_i j!/(i+j+1)!, h_i the divided difference of z^i at two
// roots with this sum and product.
func differences(sum, product float64, j int) float64 {
	before, h, total := 0.0, 1.0, 0.0
	weight := 1 / float64((j+1)*(j+2))
	for i := 1; i < 60; i++ {
		term := h * weight
		total += term
		if math.Abs(term)+math.Abs(before*weight) < 1e-18*math.Abs(total) {
			break
		}
		before, h = h, sum*h-product*before
		weight /= float64(i + j + 2)
	}
	return total
}

// overdamped does the work of driven where both roots are real and apart:
// R_j = j! t^(j+1) (phi_{j+1}(slow t) - phi_{j+1}(fast t))/(slow - fast).
func (p *powers) overdamped(omega, zeta, t float64, degree int) {
	root := math.Sqrt((zeta - 1) * (zeta + 1))
	slow, fast := -omega*t/(zeta+root), -omega*t*(zeta+root)
	factor := t / (2 * omega * root)
	for j := 0; j <= degree; j++ {
		p[j] = factor * (phi(j, slow) - phi(j, fast))
		factor *= t
	}
}

// phi is j! phi_{j+1}(z) for z <= 0: the integral of exp(z (1-u)) u^j over 0..1.
func phi(j int, z float64) float64 {
	// phi_{k+1} = (phi_k - 1/k!)/z upwards where |z| > k, the series beyond.
	if -z <= float64(j+1) {
		term, sum := 1/float64(j+1), 0.0
		for i := j + 2; i < 100 && math.Abs(term) > 1e-18; i++ {
			sum += term
			term *= z / float64(i)
		}
		return sum
	}
	value := math.Expm1(z) / z
	for k := 1; k <= j; k++ {
		value = (float64(k)*value - 1) / z
	}
	return value
}

// drivenExp is what a mode at rest at t = 0 does under the load exp(mu t), mu of
// any kind but growing; c and s are its fundamental solutions at t. Its velocity
// is s/omega + mu times it.
func drivenExp(omega, zeta, t, c, s float64, mu complex128) complex128 {
	// The solution (exp(mu t) - c - s mu/omega)/D with D = mu^2 + 2 zeta omega mu +
	// omega^2 cancels for short times and near resonance. There stand the divided
	// difference of exp in a power series, and in terms of (e^z - 1)/z.
	sum := complex(-2*zeta*omega, 0) - 2*mu
	d := mu*mu + complex(2*zeta*omega, 0)*mu + complex(omega*omega, 0)
	size := cmplx.Abs(mu) + omega*(1+2*zeta)
	whole := cmplx.Exp(mu * complex(t, 0))
	if size*t <= 2 {
		a, b := sum*complex(t, 0), d*complex(t*t, 0)
		before, h, total := complex(0, 0), complex(1, 0), complex(0, 0)
		weight := 0.5
		for i := 1; i < 40; i++ {
			total += h * complex(weight, 0)
			before, h = h, a*h-b*before
			weight /= float64(i + 2)
		}
		return whole * total * complex(t*t, 0)
	}
	root := cmplx.Sqrt(complex((zeta-1)*(zeta+1), 0))
	if cmplx.Abs(d) > 0.02*size*size || cmplx.Abs(root) < 1e-4 {
		return (whole - complex(c, 0) - complex(s/omega, 0)*mu) / d
	}
	one := complex(omega, 0) * (complex(-zeta, 0) + root)
	two := complex(omega, 0) * (complex(-zeta, 0) - root)
	return whole * complex(t, 0) * (meanExp((one-mu)*complex(t, 0)) - meanExp((two-mu)*complex(t, 0))) / (one - two)
}

// meanExp is (exp(z) - 1)/z.
func meanExp(z complex128) complex128 {
	if cmplx.Abs(z) > 1 {
		return (cmplx.Exp(z) - 1) / z
	}
	term, sum := complex(1, 0), complex(0, 0)
	for i := 2; i < 24; i++ {
		sum += term
		term *= z / complex(float64(i), 0)
	}
	return sum
}

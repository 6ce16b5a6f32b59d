package modes

import (
	"math"
	"math/cmplx"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// wallFace is a baffled face with a rigid wall parallel to it, a gap that is open
// all round at infinity. Its matrix is density a^3 times
//
//	integral U_i U_j coth(kappa d)/kappa k dk,  kappa^2 = k^2 - k0^2,
//
// taken at the nodes of a quadrature rule as a cavity's is at its radial modes.
// The integrand has a pole for every wave that runs out through the gap, at
// kappa d = i p pi, p = 0, 1, ..; each is taken away and put back in closed form.
//
// A still fluid could not get out of the gap at all: for m = 0 its mass is
// without bound. So this face always has its speed of sound, like a cavity.
type wallFace struct {
	cavityFace
	m   int
	ref float64 // sound number of the static part; 0 for m > 0
}

// wallEdges are the ends of the panels of the rule in k, wallNodes their numbers
// of nodes: half the phase 2k of the integrand and a dozen more.
var (
	wallEdges = []float64{0, 0.25, 1, 3, 8, 20, 160}
	wallNodes = []int{10, 10, 14, 18, 26, 160}
)

// gapModes returns the nodes and the shapes there, made when first asked for.
func (t *fluidTables) gapModes() *cavityTable {
	t.mu.Lock()
	defer t.mu.Unlock()
	if t.gap != nil {
		return t.gap
	}
	c := &cavityTable{n: t.n, beyond: 0.5}
	values := make([]float64, t.m+2*t.n+1)
	for p, count := range wallNodes {
		lo, hi := wallEdges[p]*wallEdges[p], wallEdges[p+1]*wallEdges[p+1]
		r, w := make([]float64, count), make([]float64, count)
		disc.RadialRule(r, w, 0) // in k^2 = lo + (hi-lo) r^2
		for i := range r {
			k := math.Sqrt(lo + (hi-lo)*r[i]*r[i])
			c.k = append(c.k, k)
			bessel.JSeq(values, k)
			c.weights = append(c.weights, (hi-lo)*w[i])
			f := math.Sqrt((hi-lo)*w[i]) / (k * k)
			for j := range t.n {
				c.part = append(c.part, f*values[t.m+2*j+2])
			}
		}
	}
	c.last = wallEdges[len(wallEdges)-1]
	t.gap = c
	return c
}

// pole returns the factor of U_i(k) U_j(k) that makes up for the pole at k^2 = z
// left out at the nodes, for a residue of one in k^2.
func (f *wallFace) pole(z complex128) complex128 {
	// With g = exp(-(k^2-z)/s) the integral of g k/(k^2-z) is E_1(-z/s)/2 (DLMF
	// 6.2.1), continued from Im z > 0; E_1 by its series, DLMF 6.6.2.
	s := complex(math.Max(1, cmplx.Abs(z)), 0)
	w := -z / s
	log := cmplx.Log(z / s)
	if real(z) < 0 && imag(z) < 0 {
		log += 2i * math.Pi // a wave that does not run, the frequency being damped
	}
	e1 := complex(-0.57721566490153286, math.Pi) - log
	term := complex(-1, 0)
	for n := 1; n < 30; n++ {
		term *= -w / complex(float64(n), 0)
		e1 += term / complex(float64(n), 0)
	}
	sum := e1 / 2
	for q, k := range f.modes.k {
		d := complex(k*k, 0) - z
		if real(d) > 40*real(s) {
			break
		}
		sum -= complex(f.modes.weights[q], 0) * cmplx.Exp(-d/s) / d
	}
	return sum
}

// shapesAt writes U_j(k) = J_b(k)/k^2 at a complex wave number.
func shapesAt(dst []complex128, m int, k complex128) {
	// The power series, DLMF 10.2.2; for |k| <= 10 it loses 4 digits.
	half := k / 2
	square := half * half
	lead := complex(0.25, 0) // (k/2)^b/(b! k^2) at b = 2, without (k/2)^(b-2)/(b!/1)
	for b := 1; b <= m+2; b++ {
		lead /= complex(float64(b), 0)
		if b > 2 {
			lead *= half
		}
	}
	for j := range dst {
		b := float64(m + 2*j + 2)
		term, sum := lead, lead
		for n := 1.0; n < 60; n++ {
			term *= -square / complex(n*(n+b), 0)
			sum += term
			if cmplx.Abs(term) < 1e-18*cmplx.Abs(sum) {
				break
			}
		}
		dst[j] = sum
		lead *= square / complex((b+1)*(b+2), 0)
	}
}

// addPoles adds the parts of the poles to the lower triangles of re and im.
func (f *wallFace) addPoles(re, im []float64, k0 complex128) {
	n := f.modes.n
	u := make([]complex128, f.live)
	residue := complex(f.density/f.depth, 0)
	for p := 0.0; ; p++ {
		across := p * math.Pi / f.depth
		z := k0*k0 - complex(across*across, 0)
		if real(z) < -1 {
			return // too far from the nodes to be felt
		}
		shapesAt(u, f.m, cmplx.Sqrt(z))
		factor := f.pole(z) * residue
		residue = complex(2*f.density/f.depth, 0)
		for i, v := range u {
			v *= factor
			for j := range i + 1 {
				p := v * u[j]
				re[i*n+j] += real(p)
				im[i*n+j] += imag(p)
			}
		}
	}
}

// static adds the fluid at rest for m > 0 and what reacts at the sound number
// ref for m = 0.
func (f *wallFace) static(x []float64) {
	f.cavityFace.static(x)
	if f.m > 0 {
		return
	}
	n := f.modes.n
	re, im := make([]float64, n*n), make([]float64, n*n)
	f.change(re, im, complex(f.ref/f.reach, 0))
	for i := range n {
		for j := range i + 1 {
			x[i*n+j] += re[i*n+j]
			if i != j {
				x[j*n+i] += re[i*n+j]
			}
		}
	}
}

// change adds the difference from the fluid at rest.
func (f *wallFace) change(re, im []float64, omega complex128) {
	f.cavityFace.dynamic(re, im, omega)
	f.addPoles(re, im, omega*complex(f.reach, 0))
}

func (f *wallFace) dynamic(re, im []float64, omega complex128) bool {
	f.change(re, im, omega)
	if f.m == 0 {
		n := f.modes.n
		a, b := make([]float64, n*n), make([]float64, n*n)
		f.change(a, b, complex(f.ref/f.reach, 0))
		for i, v := range a {
			re[i] -= v
		}
	}
	return cmplx.Abs(omega)*f.reach <= MaxSoundNumber
}

package modes

import (
	"math"
	"math/cmplx"
)

// Vent joins a cavity to the open through a hole or a leak.
type Vent struct {
	// Area, m^2, and Length of the passage, m, without end corrections.
	Area, Length float64
	// Resistance of the passage, Pa s/m^3: pressure over volume flow.
	Resistance float64
}

// effectiveLength is the length with an end correction of 8/(3 pi) radii, that
// of a piston in a baffle, at both ends.
func (v *Vent) effectiveLength() float64 {
	return v.Length + 2*8/(3*math.Pi)*math.Sqrt(v.Area/math.Pi)
}

// cavityFace is a rigid closed cylinder of fluid behind the sheet, of the
// sheet's radius. Radial mode q, of wave number k_q, has the mass per area
//
//	density coth(kappa L)/kappa,  kappa^2 = k_q^2 - k0^2,
//
// which is -cot(|kappa| L)/|kappa| where waves run: a spring for long waves.
type cavityFace struct {
	modes   *cavityTable
	density float64 // times a^3
	reach   float64 // a/c0
	depth   float64 // L/a
	// A vent takes part in the piston mode only, as if the pressure at the sheet
	// were that at the vent: s_v = -omega^2 ventMass - i omega ventResistance is
	// its stiffness per mean travel of the sheet, over density omega^2/a^3.
	vented         bool
	ventMass       float64 // effective length times sheet area over vent area, over a
	ventResistance float64 // Resistance times sheet area over rho a, 1/s

	live   int       // shapes whose change with frequency counts
	most   float64   // the largest sound number the sums are ready for
	exact  int       // radial modes that follow the frequency exactly
	terms  int       // of tail in use
	atRest []float64 // coth(k l)/k of each mode, none for the piston
	still  []float64 // their matrix
	tail   [cavityTerms - 1][]float64
}

// prepare sums what does not depend on frequency.
func (f *cavityFace) prepare() {
	n := f.modes.n
	f.still = make([]float64, n*n)
	f.atRest = make([]float64, len(f.modes.k))
	for q, k := range f.modes.k {
		if k > 0 {
			f.atRest[q] = 1 / (k * math.Tanh(k*f.depth))
			f.modes.addMode(f.still, q, f.atRest[q], n)
		}
	}
	f.modes.addBeyond(f.still, f.depth)
	for i := range n {
		for j := range i {
			f.still[j*n+i] = f.still[i*n+j]
		}
	}
}

// follow sets the largest sound number that the face has to follow.
func (f *cavityFace) follow(most float64) {
	f.most, f.exact, f.terms = most, 1, 0
	for f.exact < len(f.modes.k) && f.modes.k[f.exact] < cavityAbove*most {
		f.exact++
	}
	n := f.modes.n
	for p := range f.tail {
		f.tail[p] = make([]float64, n*n)
	}
	for q := f.exact; q < len(f.modes.k); q++ {
		k := f.modes.k[q]
		largest := 0.0
		for _, v := range f.modes.part[q*n : (q+1)*n] {
			largest = math.Max(largest, v*v)
		}
		series := cothSeries(k, f.depth)
		for p, v := range series[1:] {
			largest *= most * most
			if v*largest < 1e-15 {
				break // the first entry of the matrix is about 0.03
			}
			f.modes.addMode(f.tail[p], q, v, f.live)
			f.terms = max(f.terms, p+1)
		}
	}
}

// static adds the radial modes but the piston as they are at low frequency.
func (f *cavityFace) static(x []float64) { addScaled(x, f.still, f.density) }

func (f *cavityFace) moving() bool { return true }

// mobility returns the mass per area over density of radial mode q at k0.
func (f *cavityFace) mobility(q int, k0, omega complex128) complex128 {
	if k, x := f.modes.k[q], real(k0); imag(k0) == 0 && (k > 0 || !f.vented) && k != x {
		if k > x {
			kappa := math.Sqrt((k - x) * (k + x))
			return complex(1/(kappa*math.Tanh(kappa*f.depth)), 0)
		}
		kappa := math.Sqrt((x - k) * (x + k))
		return complex(-1/(kappa*math.Tan(kappa*f.depth)), 0)
	}
	k := complex(f.modes.k[q], 0)
	kappa := cmplx.Sqrt((k - k0) * (k + k0))
	l := complex(f.depth, 0)
	// coth is even in kappa over kappa: either root will do.
	v := 1 / (kappa * cmplx.Tanh(kappa*l))
	if real(kappa)*f.depth > 20 {
		v = 1 / kappa
	}
	if k == 0 && f.vented {
		// Compliances add. As masses per area: 1/m = 1/m_cavity + 1/m_vent.
		vent := complex(f.ventMass, 0) + 1i*complex(f.ventResistance, 0)/omega
		v = v * vent / (v + vent)
	}
	return v
}

func (f *cavityFace) dynamic(re, im []float64, omega complex128) bool {
	k0 := omega * complex(f.reach, 0)
	if size := cmplx.Abs(k0); size > f.most {
		f.follow(2 * size)
	}
	for q := range f.exact {
		v := (f.mobility(q, k0, omega) - complex(f.atRest[q], 0)) * complex(f.density, 0)
		f.modes.addMode(re, q, real(v), f.live)
		if imag(v) != 0 {
			f.modes.addMode(im, q, imag(v), f.live)
		}
	}
	z := k0 * k0
	power := complex(f.density, 0)
	n := f.modes.n
	for _, x := range f.tail[:f.terms] {
		power *= z
		a, b := real(power), imag(power)
		for i := range f.live {
			for j, v := range x[i*n : i*n+i+1] {
				re[i*n+j] += a * v
				im[i*n+j] += b * v
			}
		}
	}
	return true
}

// poles returns how many resonances the cavity has below omega with the sheet
// held still.
func (f *cavityFace) poles(omega float64) int {
	k0 := omega * f.reach
	count := 0
	for _, k := range f.modes.k {
		if k >= k0 {
			break
		}
		x := math.Sqrt((k0-k)*(k0+k)) * f.depth / math.Pi
		whole := int(math.Ceil(x)) - 1 // p = 1, 2, .. below x
		count += whole
		switch {
		case k > 0:
			count++ // p = 0
		case f.vented:
			// The poles are those of cavity and vent together: one in each branch
			// of the cotangent instead of one at its end.
			if k0 > 0 && math.Cos(x*math.Pi)/math.Sin(x*math.Pi)/k0 < f.ventMass {
				count++
			}
		}
	}
	return count
}

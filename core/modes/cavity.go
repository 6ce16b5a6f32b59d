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
	tail           [4][]float64
}

func (f *cavityFace) prepare() {
	n := f.modes.n
	for p := range f.tail {
		f.tail[p] = make([]float64, n*n)
	}
	for q := cavityLive; q < len(f.modes.k); q++ {
		for p, v := range cothSeries(f.modes.k[q], f.depth) {
			f.modes.addMode(f.tail[p], q, v)
		}
	}
	f.modes.addBeyond(f.tail[0], f.depth)
}

// static adds nothing: every part depends on frequency.
func (f *cavityFace) static([]float64) {}

func (f *cavityFace) moving() bool { return true }

// mobility returns the mass per area over density of radial mode q at k0.
func (f *cavityFace) mobility(q int, k0, omega complex128) complex128 {
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
	for q := range min(cavityLive, len(f.modes.k)) {
		v := f.mobility(q, k0, omega) * complex(f.density, 0)
		f.modes.addMode(re, q, real(v))
		if imag(v) != 0 {
			f.modes.addMode(im, q, imag(v))
		}
	}
	z := k0 * k0
	power := complex(f.density, 0)
	for _, x := range f.tail {
		a, b := real(power), imag(power)
		for i, v := range x {
			re[i] += a * v
		}
		if b != 0 {
			for i, v := range x {
				im[i] += b * v
			}
		}
		power *= z
	}
	// The first wave number left to the series must be well above k0.
	return cmplx.Abs(k0) < f.modes.k[cavityLive]/4
}

// poles returns how many resonances the cavity has below omega with the sheet
// held still.
func (f *cavityFace) poles(omega float64) int {
	k0 := omega * f.reach
	count := 0
	for q, k := range f.modes.k {
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
		_ = q
	}
	return count
}

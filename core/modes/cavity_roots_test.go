package modes

import (
	"math"
	"math/cmplx"
	"testing"

	"hoopsheet/core/diaphragm"
)

// TestCavityWithSoundNoneTwice: with a cavity behind one face and a half space that radiates before the other, no two
// modes of an order are one and the same root, whatever the depth, tension and vent. 40 um of polyester in air (sigma
// 0.055 kg/m^2; 1.2 kg/m^3, 343 m/s).
func TestCavityWithSoundNoneTwice(t *testing.T) {
	air := Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343}
	for _, depth := range []float64{0.05, 0.15, 0.3, 0.5, 0.8, 1.2, 2} {
		for _, tension := range []float64{60, 120, 180, 300, 700, 2000} {
			for _, vent := range []*Vent{nil, {Area: 1e-3, Length: 0.02, Resistance: 20}} {
				below := air
				below.Kind, below.Depth, below.Vent = diaphragm.FaceCavity, depth, vent
				r := Real{Radius: 0.75, Tension: tension, ArealDensity: 0.055, Upper: air, Lower: below}
				s, err := Solve(r, Request{MaxM: 2, MaxN: 8, Effects: AllEffects()})
				if err != nil {
					t.Fatal(err)
				}
				for i, a := range s.Modes {
					for _, b := range s.Modes[:i] {
						if a.M == b.M && math.Abs(a.Frequency/b.Frequency-1) < 1e-6 && math.Abs(a.Damping.Total-b.Damping.Total) < 1e-6*math.Max(a.Damping.Total, 1e-3) {
							t.Errorf("depth %v m, %v N/m, vent %v: (%d,%d) and (%d,%d) both at %.8g Hz", depth, tension, vent != nil, a.M, a.N, b.M, b.N, a.Frequency)
						}
					}
				}
			}
		}
	}
}

// TestCavityWithSoundCounted: by the argument principle, as many roots lie between two frequencies (and above a rate of
// decay) as there are modes. det(theta - C) has a pole at each resonance of the cavity with the sheet at rest, and one at
// infinity of theta that the contour leaves out.
func TestCavityWithSoundCounted(t *testing.T) {
	air := Face{Kind: diaphragm.FaceBaffled, Density: 1.2, SoundSpeed: 343}
	for _, depth := range []float64{0.05, 0.5, 2} {
		for _, tension := range []float64{180, 700, 2000} {
			for m := range 2 {
				below := air
				below.Kind, below.Depth = diaphragm.FaceCavity, depth
				r := Real{Radius: 0.75, Tension: tension, ArealDensity: 0.055, Upper: air, Lower: below}
				p := newWetPlan(r, AllEffects())
				o := p.order(m, 9)
				starts := o.solve(9)
				modes := p.refined(o, starts, 9)
				// Corners: halfway between modes on the real axis and deep enough for all.
				right := (real(modes[5].omega()) + real(modes[6].omega())) / 2
				left := real(modes[0].omega()) / 3
				low := 0.0
				inside := 0
				for _, w := range modes {
					low = math.Min(low, imag(w.omega()))
					if x := real(w.omega()); x > left && x < right {
						inside++
					}
				}
				low = 1.5*low - 0.02*right
				corners := []complex128{complex(left, -low/2), complex(left, low), complex(right, low), complex(right, -low/2)}
				turns, was := 0.0, complex(0, 0)
				const steps = 800
				for side, from := range corners {
					to := corners[(side+1)%4]
					for i := range steps {
						d := determinant(o, from+(to-from)*complex(float64(i)/steps, 0))
						if was != 0 {
							turns += cmplx.Phase(d / was)
						}
						was = d
					}
				}
				d := determinant(o, corners[0])
				turns += cmplx.Phase(d / was)
				zeros := int(math.Round(turns/(2*math.Pi))) + o.cavity.poles(right) - o.cavity.poles(left)
				if zeros != inside {
					t.Errorf("depth %v m, %v N/m, m = %d: %d roots, %d modes", depth, tension, m, zeros, inside)
				}
			}
		}
	}
}

// determinant of 1 - C(omega)/theta, by elimination with partial pivoting, scaled to magnitude one.
func determinant(o *wetOrder, omega complex128) complex128 {
	n := o.size()
	c := make([]complex128, n*n)
	o.at(c, omega)
	for i := range n {
		for j := range i {
			c[j*n+i] = c[i*n+j]
		}
	}
	for i := range c {
		c[i] *= -omega * omega
	}
	for i := range n {
		c[i*n+i]++
	}
	det := complex(1, 0)
	for k := range n {
		p := k
		for i := k; i < n; i++ {
			if cmplx.Abs(c[i*n+k]) > cmplx.Abs(c[p*n+k]) {
				p = i
			}
		}
		if p != k {
			det = -det
			for j := range n {
				c[k*n+j], c[p*n+j] = c[p*n+j], c[k*n+j]
			}
		}
		d := c[k*n+k]
		det *= d / complex(cmplx.Abs(d), 0)
		for i := k + 1; i < n; i++ {
			f := c[i*n+k] / d
			for j := k; j < n; j++ {
				c[i*n+j] -= f * c[k*n+j]
			}
		}
	}
	return det
}

package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/disc"
)

// probe is the displacement at one place and instant, with its first and
// second derivatives in x, y and t.
type probe struct {
	w float64
	// d holds the slopes in x, y, t; dd the second ones in the order xx, xy,
	// yy, xt, yt, tt.
	d  [3]float64
	dd [6]float64
}

// probe evaluates the motion anywhere on the sheet, the centre included.
func (mo *motion) probe(x, y, t float64) probe {
	// With F_m = J_m(k r) exp(i m theta), from DLMF 10.6.1-2,
	//
	//	dF_m/dx = k/2 (F_{m-1} - F_{m+1}),  dF_m/dy = i k/2 (F_{m-1} + F_{m+1}),
	//
	// for every whole m: derivatives in Cartesian coordinates without a
	// division by r.
	var p probe
	r := math.Hypot(x, y)
	turn := complex(1, 0)
	if r > 0 {
		turn = complex(x/r, y/r)
	}
	s := mo.stage(t)
	mixed := make([]amplitude, mo.basis.Len()/2)
	for i := range s.modes {
		var own amplitude
		q, dq, ddq := s.at(i, t)
		for _, b := range s.modes[i].shape {
			// The cosine and the sine part are the real part of q exp(i m theta).
			if b.part == disc.Cos {
				own = amplitude{complex(q, 0), complex(dq, 0), complex(ddq, 0)}
			} else {
				own = amplitude{complex(0, -q), complex(0, -dq), complex(0, -ddq)}
			}
			if b.row == nil {
				mixed[mo.basis.Index(b.m, b.n, disc.Cos)/2].add(own, 1)
				continue
			}
			to := mixed[mo.basis.Index(b.m, 1, disc.Cos)/2:]
			for n, v := range b.row {
				to[n].add(own, v)
			}
		}
	}
	phase := complex(1, 0) // exp(i m theta)
	for m := 0; m <= mo.basis.M; m++ {
		for n := 1; n <= mo.basis.N; n++ {
			if own := mixed[mo.basis.Index(m, n, disc.Cos)/2]; own.q != 0 || own.dq != 0 || own.ddq != 0 {
				p.add(m, mo.basis.Zero(m, n), r, phase, turn, own)
			}
		}
		phase *= turn
	}
	return p
}

// amplitude of a Bessel function with its first and second derivative in time.
type amplitude struct{ q, dq, ddq complex128 }

func (a *amplitude) add(b amplitude, by float64) {
	a.q += scaled(b.q, by)
	a.dq += scaled(b.dq, by)
	a.ddq += scaled(b.ddq, by)
}

// add adds J_m(wave r) exp(i m theta) with its amplitude.
func (p *probe) add(m int, wave, r float64, phase, turn complex128, own amplitude) {
	back := complex(real(turn), -imag(turn))
	j := besselAround(m, wave*r)
	h := wave / 2
	f := scaled(phase, j[2])
	below, above := scaled(phase*back, j[1]), scaled(phase*turn, j[3])
	below2, above2 := scaled(phase*back*back, j[0]), scaled(phase*turn*turn, j[4])
	fx := scaled(below-above, h)
	fy := complex(0, h) * (below + above)
	outer := scaled(below2+above2, h*h)
	fxx := outer - scaled(f, 2*h*h)
	fyy := -outer - scaled(f, 2*h*h)
	fxy := complex(0, h*h) * (below2 - above2)

	q, dq, ddq := own.q, own.dq, own.ddq
	p.w += real(q * f)
	p.d[0] += real(q * fx)
	p.d[1] += real(q * fy)
	p.d[2] += real(dq * f)
	p.dd[0] += real(q * fxx)
	p.dd[1] += real(q * fxy)
	p.dd[2] += real(q * fyy)
	p.dd[3] += real(dq * fx)
	p.dd[4] += real(dq * fy)
	p.dd[5] += real(ddq * f)
}

func scaled(z complex128, by float64) complex128 { return complex(real(z)*by, imag(z)*by) }

// besselAround returns J_{m-2}, ... J_{m+2} at x >= 0 for m >= 0.
func besselAround(m int, x float64) (j [5]float64) {
	if x < 1e-9 {
		// Only J_0 differs from zero by more than x/2.
		if m <= 2 {
			j[2-m] = 1
		}
		return j
	}
	// One evaluation gives J_m and J_m' = (m/x) J_m - J_{m+1}. Downwards the
	// recurrence is stable; the steps upwards lose what J_{m+1} and J_{m+2} are
	// smaller than J_m, which does not matter beside J_m.
	over := 2 / x
	value, slope := bessel.JAndPrime(float64(m), x)
	j[2], j[3] = value, float64(m)/x*value-slope
	j[1] = float64(m)*over*j[2] - j[3]
	j[0] = float64(m-1)*over*j[1] - j[2]
	j[4] = float64(m+1)*over*j[3] - j[2]
	return j
}

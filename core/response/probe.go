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
	// Of every Bessel function displacement, velocity and acceleration, first of
	// the cosine, then of the sine.
	const parts = 6
	mixed := make([]float64, parts*mo.basis.Len()/2)
	for i := range s.modes {
		q, dq, ddq := s.at(i, t)
		for k := range s.modes[i].shape {
			b := &s.modes[i].shape[k]
			n, row := 1, b.row
			if row == nil {
				n, row = b.n, singleRow[:]
			}
			at := parts/2*int(b.part) + parts*(mo.basis.Index(b.m, n, disc.Cos)/2)
			for _, v := range row {
				to := mixed[at : at+3]
				to[0] += v * q
				to[1] += v * dq
				to[2] += v * ddq
				at += parts
			}
		}
	}
	phase := complex(1, 0) // exp(i m theta)
	for m := 0; m <= mo.basis.M; m++ {
		for n := 1; n <= mo.basis.N; n++ {
			own := mixed[parts*(mo.basis.Index(m, n, disc.Cos)/2):][:parts]
			if own[0] != 0 || own[1] != 0 || own[2] != 0 || own[3] != 0 || own[4] != 0 || own[5] != 0 {
				// Cosine and sine part are the real part of q exp(i m theta).
				p.add(m, mo.basis.Zero(m, n), r, phase, turn, amplitude{complex(own[0], -own[3]), complex(own[1], -own[4]), complex(own[2], -own[5])})
			}
		}
		phase *= turn
	}
	return p
}

// singleRow is the row of a mode that is a Bessel function by itself.
var singleRow = [1]float64{1}

// amplitude of a Bessel function with its first and second derivative in time.
type amplitude struct{ q, dq, ddq complex128 }

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

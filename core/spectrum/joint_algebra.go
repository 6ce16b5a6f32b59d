package spectrum

import (
	"math"
	"math/cmplx"
)

// expand works out the exponentials of the lines at every frame, each from the one before.
func (b *narrowBand) expand(lines []line) {
	p := len(lines)
	if len(b.powers) != p*len(b.z) {
		b.powers = make([]complex128, p*len(b.z))
		b.work = make([]complex128, 2*p)
	}
	for k := range lines {
		step, e := cmplx.Exp(lines[k].s*complex(b.step, 0)), complex(1, 0)
		for m := range b.z {
			b.powers[m*p+k] = e
			e *= step
		}
	}
}

// columns writes the derivatives of the model of the lines last expanded at frame m: by every amplitude, then by every
// exponent.
func (b *narrowBand) columns(dst []complex128, lines []line, m int) {
	p, t := len(lines), complex(float64(m)*b.step, 0)
	for k := range lines {
		e := b.powers[m*p+k]
		dst[k] = e
		dst[p+k] = lines[k].c * t * e
	}
}

// amplitudes expands the lines and sets the amplitudes that fit best with the exponents as they are.
func (b *narrowBand) amplitudes(lines []line) {
	b.expand(lines)
	p := len(lines)
	g, right, row := newSquare(p), make([]complex128, p), b.work
	for m, z := range b.z {
		b.columns(row, lines, m)
		g.add(row[:p])
		addConj(right, row[:p], z)
	}
	if !g.solve(right, 0, p) {
		clear(right) // two equal exponents: the fit will not be taken
	}
	for k := range lines {
		lines[k].c = right[k]
	}
}

// residual is the sum of the squared residuals of the lines last expanded.
func (b *narrowBand) residual(lines []line) float64 {
	sum := 0.0
	for m, z := range b.z {
		off := z - b.model(lines, m)
		sum += real(off)*real(off) + imag(off)*imag(off)
	}
	return sum
}

// newton returns the damped Gauss-Newton step of the exponents.
func (b *narrowBand) newton(lines []line, damp float64) ([]complex128, bool) {
	b.expand(lines)
	p := len(lines)
	g, right, row := newSquare(2*p), make([]complex128, 2*p), b.work
	for m, z := range b.z {
		b.columns(row, lines, m)
		g.add(row)
		addConj(right, row, z-b.model(lines, m))
	}
	ok := g.solve(right, damp, p)
	return right[p:], ok
}

// variances returns E |error|^2 of every exponent under the noise of the band.
func (b *narrowBand) variances(lines []line) []float64 {
	b.expand(lines)
	p := len(lines)
	rows := make([]complex128, 2*p*len(b.z))
	for m := range b.z {
		b.columns(rows[2*p*m:2*p*(m+1)], lines, m)
	}
	return b.errors(rows, 2*p)[p:]
}

// errors returns E |error|^2 of each of n complex parameters whose derivatives stand in rows, frame by frame, frames
// overlapping: the diagonal of (J'J)^-1 J'R J (J'J)^-1 with R the covariance of the frames' noise.
func (b *narrowBand) errors(rows []complex128, n int) []float64 {
	g := newSquare(n)
	for m := range b.z {
		g.add(rows[m*n : (m+1)*n])
	}
	out := make([]float64, n)
	weights := make([]complex128, len(b.z))
	for k := range out {
		// Row k of the pseudo-inverse: what each frame's noise does to the parameter.
		unit := make([]complex128, n)
		unit[k] = 1
		h := g.clone()
		if !h.solve(unit, 0, n) {
			out[k] = math.Inf(1)
			continue
		}
		for m := range weights {
			weights[m] = 0
			for j, v := range rows[m*n : (m+1)*n] {
				weights[m] += v * unit[j]
			}
		}
		for lag, r := range b.correlation {
			for m := lag; m < len(weights); m++ {
				cross := r * real(weights[m]*cmplx.Conj(weights[m-lag]))
				if lag > 0 {
					cross *= 2
				}
				out[k] += cross
			}
		}
		out[k] *= b.white
	}
	return out
}

// square is a Hermitian matrix, of which the lower triangle counts.
type square struct {
	n int
	v []complex128
}

func newSquare(n int) square     { return square{n, make([]complex128, n*n)} }
func (s square) clone() square   { return square{s.n, append([]complex128(nil), s.v...)} }
func (s square) at(i, j int) int { return i*s.n + j }

// add adds conj(row) row.
func (s square) add(row []complex128) {
	for i, v := range row {
		c := cmplx.Conj(v)
		for j := range i + 1 {
			s.v[s.at(i, j)] += c * row[j]
		}
	}
}

func addConj(dst, row []complex128, by complex128) {
	for i, v := range row {
		dst[i] += cmplx.Conj(v) * by
	}
}

// solve overwrites right with the solution, the diagonal from index first on raised by 1 + damp, and the matrix with its
// factor. The unknowns are scaled to a diagonal of one. It reports failure where the matrix is not positive definite.
func (s square) solve(right []complex128, damp float64, first int) bool {
	const leastPivot = 1e-13 // of the scaled matrix: below, rounding decides
	scale := make([]float64, s.n)
	for i := range scale {
		d := real(s.v[s.at(i, i)])
		if !(d > 0) {
			return false
		}
		scale[i] = 1 / math.Sqrt(d)
	}
	for i := range s.n {
		for j := range i + 1 {
			s.v[s.at(i, j)] *= complex(scale[i]*scale[j], 0)
		}
		if i >= first {
			s.v[s.at(i, i)] += complex(damp, 0)
		}
		right[i] *= complex(scale[i], 0)
	}
	for j := range s.n {
		for i := j; i < s.n; i++ {
			v := s.v[s.at(i, j)]
			for k := range j {
				v -= s.v[s.at(i, k)] * cmplx.Conj(s.v[s.at(j, k)])
			}
			if i == j {
				if !(real(v) > leastPivot) {
					return false
				}
				s.v[s.at(j, j)] = complex(math.Sqrt(real(v)), 0)
			} else {
				s.v[s.at(i, j)] = v / s.v[s.at(j, j)]
			}
		}
	}
	for i := range s.n {
		for k := range i {
			right[i] -= s.v[s.at(i, k)] * right[k]
		}
		right[i] /= s.v[s.at(i, i)]
	}
	for i := s.n - 1; i >= 0; i-- {
		for k := i + 1; k < s.n; k++ {
			right[i] -= cmplx.Conj(s.v[s.at(k, i)]) * right[k]
		}
		right[i] /= s.v[s.at(i, i)]
	}
	for i := range right {
		right[i] *= complex(scale[i], 0)
	}
	return true
}

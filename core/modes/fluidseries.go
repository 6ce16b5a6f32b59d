package modes

import (
	"math"
	"math/cmplx"

	"hoopsheet/core/disc"
)

// soundSeries is a radiation operator as a power series in k0 with real
// matrices: see disc.Edge.SoundSeries.
type soundSeries struct {
	n, powers int
	first     int // the power at which pair (0, 0) begins to radiate
	// Lower triangles row by row, all powers of one pair together: even powers
	// 2, 4, .. and odd powers 1, 3, .., half of the powers each.
	even, odd         []float64
	evenSize, oddSize []float64 // largest magnitude by power, for each row
	still             float64   // largest magnitude of the power 0
}

func newSoundSeries(edge disc.Edge, m, n, powers int) *soundSeries {
	half := powers / 2
	pairs := n * (n + 1) / 2
	s := &soundSeries{
		n: n, powers: powers, first: 2*m + 1,
		even: make([]float64, pairs*half), odd: make([]float64, pairs*half),
		evenSize: make([]float64, n*half), oddSize: make([]float64, n*half),
	}
	if edge == disc.RootEdge {
		s.first = 2*m + 3
	}
	terms := make([]float64, 2*half+1)
	at := 0
	for i := range n {
		for j := range i + 1 {
			edge.SoundSeries(terms, m, i, j)
			s.still = math.Max(s.still, math.Abs(terms[0]))
			for l := range half {
				s.odd[at+l], s.even[at+l] = terms[2*l+1], terms[2*l+2]
				o, e := &s.oddSize[i*half+l], &s.evenSize[i*half+l]
				*o = math.Max(*o, math.Abs(terms[2*l+1]))
				*e = math.Max(*e, math.Abs(terms[2*l+2]))
			}
			at += half
		}
	}
	return s
}

// at adds to the lower triangles of re and im (rows of the given length, of which
// the first n are filled) the operator at the complex wave number k0, times
// factor. The static term is left out: it belongs to the still fluid. It returns
// false if the series has too few terms.
func (s *soundSeries) at(re, im []float64, stride int, k0 complex128, factor float64) bool {
	n, half := s.n, s.powers/2
	// Real and imaginary parts of the powers, the odd ones with their i.
	weights := make([]float64, 4*half)
	ex, ey, ox, oy := weights[:half], weights[half:2*half], weights[2*half:3*half], weights[3*half:]
	power := complex(factor, 0)
	for l := range half {
		power *= k0
		ox[l], oy[l] = -imag(power), real(power)
		power *= k0
		ex[l], ey[l] = real(power), imag(power)
	}
	size := cmplx.Abs(k0)
	floor := 0x1p-54 * s.still
	all := true
	pair := 0
	for i := range n {
		evens, good := needed(s.evenSize[i*half:(i+1)*half], size*size, size*size, floor)
		odds, enough := needed(s.oddSize[i*half:(i+1)*half], size, size*size, floor)
		all = all && good && enough
		for j := range i + 1 {
			v := s.even[pair : pair+evens]
			x, y := ex[:len(v)], ey[:len(v)]
			var a, b float64
			for l, c := range v {
				a += c * x[l]
				b += c * y[l]
			}
			if from := s.first/2 + i + j; from < odds {
				v := s.odd[pair+from : pair+odds]
				x, y := ox[from:][:len(v)], oy[from:][:len(v)]
				for l, c := range v {
					a += c * x[l]
					b += c * y[l]
				}
			}
			re[i*stride+j] += a
			im[i*stride+j] += b
			pair += half
		}
	}
	return all
}

// needed returns how many terms of sizes times first, first step, first
// step^2, .. lie above floor, and whether the last term is below it.
func needed(sizes []float64, first, step, floor float64) (count int, good bool) {
	for l, v := range sizes {
		if v*first > floor {
			count = l + 1
		}
		first *= step
	}
	return count, count < len(sizes)
}

package response

import (
	"math"

	"hoopsheet/core/disc"
)

// MixedMode is a mode of an uneven diaphragm, which mixes orders.
type MixedMode struct {
	M, N  int
	Upper bool
	// Omega is the angular frequency without damping, rad/s, and Zeta the
	// damping ratio.
	Omega, Zeta float64
	// Strain is as in WetMode.
	Strain, Volume, FilmShare float64
	// Cos and Sin hold by orders the coefficients of J_m(j_m1 r), ...; an order
	// that takes no part is nil.
	Cos, Sin [][]float64
}

// mixedModes holds what the projections on such modes need.
type mixedModes struct {
	b      *disc.Basis
	modes  []modal
	strain []float64
	gram   [][]float64 // Cholesky factor of phi_i'G phi_k; without a cavity
	spring float64
	volume []float64
}

// negligibleBlock is the share of a shape's largest coefficient below which an
// order is left out of it.
const negligibleBlock = 1e-12

func newMixedModes(b *disc.Basis, wet *Wet, unit float64) *mixedModes {
	x := &mixedModes{b: b}
	tops := make([]float64, b.M+1)
	for m := range tops {
		tops[m] = largestBessel(m)
	}
	for i := range wet.Mixed {
		mode := &wet.Mixed[i]
		omega := mode.Omega * unit
		k := modal{m: mode.M, n: mode.N, upper: mode.Upper, omega: omega, zeta: mode.Zeta,
			norm: mode.Strain / (omega * omega), film: mode.FilmShare}
		for part, rows := range [][][]float64{mode.Cos, mode.Sin} {
			for m, row := range rows {
				if m > b.M || row == nil {
					continue
				}
				k.shape = append(k.shape, block{m: m, part: disc.Part(part), n: mode.N, row: row})
			}
		}
		for _, bl := range k.shape {
			for _, v := range bl.row {
				k.peak += tops[bl.m] * math.Abs(v)
			}
		}
		x.modes = append(x.modes, k)
		x.strain = append(x.strain, mode.Strain)
	}
	if wet.Cavity {
		x.spring = wet.CavitySpring
		for i := range wet.Mixed {
			x.volume = append(x.volume, wet.Mixed[i].Volume)
		}
		return x
	}
	x.gram = make([][]float64, len(x.modes))
	loaded := make([]float64, b.Len())
	for i := range x.modes {
		x.dense(loaded, i)
		x.weigh(loaded, 1)
		row := make([]float64, i+1)
		for k := range row {
			row[k] = x.work(k, loaded)
		}
		factorRow(x.gram, row)
	}
	return x
}

// dense writes the coefficients of mode i.
func (x *mixedModes) dense(dst []float64, i int) {
	clear(dst)
	for _, b := range x.modes[i].shape {
		addRow(dst[x.b.Index(b.m, 1, b.part):], b.row, 1)
	}
}

// weigh multiplies coefficients by the norm of their functions, with p = 1 by
// that of their slopes.
func (x *mixedModes) weigh(coef []float64, p int) {
	for i := 0; i < len(coef); i += 2 {
		m, n, _ := x.b.At(i)
		w := x.b.Norm(m, n)
		if p == 1 {
			j := x.b.Zero(m, n)
			w *= j * j
		}
		coef[i] *= w
		coef[i+1] *= w
	}
}

// work is the product of mode i with weighed coefficients.
func (x *mixedModes) work(i int, weighed []float64) float64 {
	sum := 0.0
	for _, b := range x.modes[i].shape {
		from := weighed[x.b.Index(b.m, 1, b.part):]
		for n, v := range b.row {
			sum += v * from[2*n]
		}
	}
	return sum
}

func (x *mixedModes) split(coef []float64) []float64 {
	weighed := append([]float64(nil), coef...)
	x.weigh(weighed, 1)
	out := make([]float64, len(x.modes))
	even := 0.0
	if x.spring > 0 {
		for n := 1; n <= x.b.N; n++ {
			even += x.spring * coef[x.b.Index(0, n, disc.Cos)] * volumeOf(x.b, n)
		}
	}
	for i := range out {
		out[i] = x.work(i, weighed)
		if x.gram == nil {
			out[i] = (out[i] + even*x.volume[i]) / x.strain[i]
		}
	}
	if x.gram != nil {
		solveFactored(x.gram, out)
	}
	return out
}

func (x *mixedModes) struck(coef []float64) []float64 {
	weighed := append([]float64(nil), coef...)
	x.weigh(weighed, 0)
	out := make([]float64, len(x.modes))
	for i := range out {
		out[i] = x.work(i, weighed) / x.modes[i].norm
	}
	return out
}

// factorRow puts the row len(row)-1 of a symmetric matrix, of which the rows
// before are factorised in gram, in its place by Cholesky's method.
func factorRow(gram [][]float64, row []float64) {
	i := len(row) - 1
	whole := row[i]
	for k := range i {
		row[k] = (row[k] - dotted(row[:k], gram[k])) / gram[k][k]
	}
	row[i] -= dotted(row[:i], row)
	// A mode within the span of those before it has no part of its own: the
	// factor without bound gives it the amplitude zero.
	if row[i] > 1e-12*whole {
		row[i] = math.Sqrt(row[i])
	} else {
		row[i] = math.Inf(1)
	}
	gram[i] = row
}

// solveFactored replaces x by the solution of the factorised system.
func solveFactored(gram [][]float64, x []float64) {
	for i, row := range gram {
		x[i] = (x[i] - dotted(row[:i], x)) / row[i]
	}
	for i := len(x) - 1; i >= 0; i-- {
		x[i] /= gram[i][i]
		for k, v := range gram[i][:i] {
			x[k] -= v * x[i]
		}
	}
}

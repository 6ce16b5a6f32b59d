package disc

import "math"

// Transform is the discrete Fourier-Bessel transform between samples on a Grid
// and the coefficients of a Basis. Its tables are made once, by NewTransform;
// neither Analyse nor Synthesise allocates. It has work space of its own: one
// goroutine at a time.
type Transform struct {
	Basis *Basis
	Grid  *Grid

	table   *Table
	samples []float64 // of AnalyseFunc
	tailC   float64   // constant of PointwiseBound, 0 until asked for
}

// NewTransform prepares the transform for orders 0..M and zeros 1..N on a grid
// of nr radii and ntheta angles; nr = 0 and ntheta = 0 stand for MinRadii(M, N)
// and MinAngles(M). It panics if the band or the grid is invalid, or the grid
// too coarse for the band.
//
// Building costs (M+1) N nr Bessel functions: half a second for M = N = 64 on
// 256 radii, 20 ms for M = N = 24 on its own grid.
func NewTransform(M, N, nr, ntheta int) *Transform {
	return NewTransformOf(NewBasis(M, N), nr, ntheta)
}

// NewTransformOf is NewTransform for a basis that is there already.
func NewTransformOf(b *Basis, nr, ntheta int) *Transform {
	least := minRadii(b.Zero(b.M, b.N))
	if nr == 0 {
		nr = least
	}
	if ntheta == 0 {
		ntheta = MinAngles(b.M)
	}
	if nr < least {
		panic(errFewRadii)
	}
	g := NewGrid(nr, ntheta)
	return &Transform{Basis: b, Grid: g, table: newTable(b, g.R, ntheta, atZero)}
}

// Synthesise writes the function with these coefficients at the samples of
// Grid; see Table.Synthesise.
func (t *Transform) Synthesise(samples, coef []float64) { t.table.Synthesise(samples, coef) }

// Analyse writes to coef the projections of the sampled function on the basis,
//
//	a_mn = (1/Norm(m, n)) integral of f J_m(j_mn r) cos(m theta) r dr dtheta,
//
// b_mn with sin, in the order of Basis.Index, and returns what they miss. A
// function inside the band is recovered to a few 1e-15 of its largest value.
// It panics unless len(samples) = Grid.Len() and len(coef) = Basis.Len(). It
// does not allocate. Samples that are not finite make coefficients that are not.
func (t *Transform) Analyse(coef, samples []float64) Quality {
	b, g, tab := t.Basis, t.Grid, t.table
	if len(samples) != g.Len() || len(coef) != b.Len() {
		panic(errLength)
	}
	energy, kept := t.angles(samples)
	for m, panels := range tab.radial.orders {
		row := tab.orders[m*tab.stride:][:len(g.R)]
		dst := coef[2*m*b.N : 2*(m+1)*b.N]
		slope := b.slope[m*b.N : (m+1)*b.N]
		for j := range panels {
			var out [4]pair
			ac, as, bc, bs, cc, cs, dc, ds := panels[j].dot(row)
			out[0], out[1] = pair{ac, as}, pair{bc, bs}
			out[2], out[3] = pair{cc, cs}, pair{dc, ds}
			for i, o := range out {
				n := 4*j + i
				if n >= len(slope) {
					break
				}
				// The radial norm is J_{m+1}(j_mn)^2 / 2.
				f := 2 / (slope[n] * slope[n])
				dst[2*n], dst[2*n+1] = f*o.c, f*o.s
			}
		}
	}
	for n := 0; n < b.N; n++ {
		coef[2*n+1] = 0
	}
	return t.quality(coef, energy, kept)
}

// AnalyseFunc is Analyse for a function of r and theta that can be called: it is
// taken at every sample of Grid, once. The first call allocates Grid.Len()
// numbers, later ones nothing.
func (t *Transform) AnalyseFunc(coef []float64, f func(r, theta float64) float64) Quality {
	g := t.Grid
	if t.samples == nil {
		t.samples = make([]float64, g.Len())
	}
	for i, r := range g.R {
		row := t.samples[i*g.NTheta:][:g.NTheta]
		for k := range row {
			row[k] = f(r, g.Theta(k))
		}
	}
	return t.Analyse(coef, t.samples)
}

// angles takes each circle of samples to its Fourier series, weighted for the
// radial sums, in t.table.orders. It returns the energy of the samples and that
// of orders 0..M among it.
func (t *Transform) angles(samples []float64) (energy, kept float64) {
	g, tab := t.Grid, t.table
	nt := g.NTheta
	inv := 1 / float64(nt)
	for i, w := range g.W {
		row := samples[i*nt : (i+1)*nt]
		tab.fft.Forward(tab.line, row)
		var square, zero, sum float64
		for _, x := range row {
			square += x * x
		}
		energy += w * square
		c := real(tab.line[0]) * inv
		zero = c * c
		tab.orders[i] = pair{w * c, 0}
		f := 2 * inv
		wf := w * f
		for m := 1; m < len(tab.line); m++ {
			v := tab.line[m]
			re, im := real(v), imag(v)
			sum += re*re + im*im
			tab.orders[i+m*tab.stride] = pair{wf * re, -wf * im}
		}
		kept += w * (2*zero + sum*f*f)
	}
	return energy * 2 * math.Pi * inv, kept * math.Pi
}

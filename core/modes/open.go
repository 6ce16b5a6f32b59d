package modes

import "hoopsheet/core/disc"

// openFaces is fluid on both sides of a sheet without baffle. The pressure jump
// is expanded in shapes of disc.RootEdge, with B the coupling to the shapes of
// the sheet and S the operator of the jump,
//
//	S_pq = 1/2 integral V_p V_q k dk sqrt(k^2 - k0^2),
//
// and the matrix is density a^3 times B' S^-1 B. S is diagonal in still fluid.
type openFaces struct {
	tables  *fluidTables
	live    *fluidTables // of the shapes whose share of sound counts
	density float64      // times a^3
	reach   float64      // a/c0; 0 for still fluid
	work    struct {
		s, z   []complex128
		re, im []float64
	}
}

func (f *openFaces) static(x []float64) {
	addScaled(x, f.tables.openMass(), f.density)
}

func (f *openFaces) moving() bool { return f.reach > 0 }

func (f *openFaces) dynamic(re, im []float64, omega complex128) bool {
	n, stride := f.live.n, f.tables.n
	size := n + 1
	w := &f.work
	if w.s == nil {
		w.s, w.z = make([]complex128, size*size), make([]complex128, size*n)
		w.re, w.im = make([]float64, size*size), make([]float64, size*size)
	}
	clear(w.re)
	clear(w.im)
	k0 := omega * complex(f.reach, 0)
	good := f.live.series(disc.RootEdge, seriesPowers(k0)).at(w.re, w.im, size, k0, 0.5)
	for i := range size {
		for j := range i + 1 {
			w.s[i*size+j] = complex(w.re[i*size+j], w.im[i*size+j])
		}
		w.s[i*size+i] += complex(1/(4*disc.RootEdge.Order(f.tables.m, i)), 0)
	}
	// S = U D U', Z = U^-1 B, matrix Z' D^-1 Z less that of still fluid. Row q of
	// B and so of Z begins at column q-1.
	symmetricLDL(w.s, size, 1e-300)
	b := f.live.openCoupling()
	for i, v := range b {
		w.z[i] = complex(v, 0)
	}
	for k := size - 1; k >= 1; k-- {
		from := max(0, k-1)
		zk := w.z[k*n+from : (k+1)*n]
		for i, l := range w.s[k*size : k*size+k] {
			zi := w.z[i*n+from : (i+1)*n]
			for j, v := range zk {
				zi[j] -= l * v
			}
		}
	}
	for q := range size {
		from := max(0, q-1)
		row := w.z[q*n : (q+1)*n]
		inverse := complex(f.density, 0) / w.s[q*size+q]
		for i := from; i < n; i++ {
			v := row[i] * inverse
			x, y := re[i*stride:i*stride+i+1], im[i*stride:i*stride+i+1]
			for j := from; j <= i; j++ {
				p := v * row[j]
				x[j] += real(p)
				y[j] += imag(p)
			}
		}
	}
	still := f.live.openMass()
	for i := range n {
		for j := range i + 1 {
			re[i*stride+j] -= f.density * still[i*n+j]
		}
	}
	return good
}

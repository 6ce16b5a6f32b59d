package modes

import (
	"math"

	"hoopsheet/core/disc"
)

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
	// edge is sqrt(D/T)/a where a clamped sheet moves on a disc of radius
	// a (1 - edge): the fluid still has to pass around the ring at a.
	edge float64
	work struct {
		s, z   []complex128
		re, im []float64
	}
}

func (f *openFaces) static(x []float64) {
	addScaled(x, f.still(f.tables), f.density)
}

// still returns the matrix of still fluid of unit density.
func (f *openFaces) still(t *fluidTables) []float64 {
	if f.edge == 0 {
		return t.openMass()
	}
	// S is diagonal there, with entries 1/(4 mu).
	n := t.n
	b := f.coupling(t)
	x := make([]float64, n*n)
	for q := range n + 1 {
		row := b[q*n : (q+1)*n]
		weight := 4 * disc.RootEdge.Order(t.m, q)
		for i := max(0, q-1); i < n; i++ {
			v := weight * row[i]
			for j := max(0, q-1); j <= i; j++ {
				x[i*n+j] += v * row[j]
			}
		}
	}
	for i := range n {
		for j := range i {
			x[j*n+i] = x[i*n+j]
		}
	}
	return x
}

// coupling returns B for the shapes u_j(r/(1-edge)), to first order in edge.
func (f *openFaces) coupling(t *fluidTables) []float64 {
	b := t.openCoupling()
	if f.edge == 0 {
		return b
	}
	// u_j + edge r u_j' in Zernike's radial polynomials, b = m+2j+2:
	//
	//	u_j = (-1)^j (R_{b-2} - R_b)/(2b),  r u_j' = -(-1)^j (R_{b-2} + R_b)/2.
	//
	// With C_l = (-1)^l integral of R_{m+2l} s_q r dr, zero for l < q, the first
	// gives 2b B_qj = C_j + C_{j+1}, hence all of them from C_0 for q = 0 (DLMF
	// 5.12.1), and the second what is wanted.
	n := t.n
	out := make([]float64, len(b))
	first := 1 / (2 * math.Sqrt2) * 4 / (3 * math.Sqrt(math.Pi)) // Gamma(m+1)/Gamma(m+5/2)
	for i := 1; i <= t.m; i++ {
		first *= float64(i) / (float64(i) + 1.5)
	}
	for q := range n + 1 {
		c := 0.0
		if q == 0 {
			c = first
		}
		for j := max(0, q-1); j < n; j++ {
			v := b[q*n+j]
			next := 2*float64(t.m+2*j+2)*v - c
			out[q*n+j] = v - f.edge*(c-next)/2
			c = next
		}
	}
	return out
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
	b := f.coupling(f.live)
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
	still := f.still(f.live)
	for i := range n {
		for j := range i + 1 {
			re[i*stride+j] -= f.density * still[i*n+j]
		}
	}
	return good
}

package modes

import (
	"math"
	"math/cmplx"
	"sync"

	"hoopsheet/core/disc"
)

// fluidTables holds the matrices of one order and number of shapes that depend
// on nothing else. They are made when first asked for and then only read.
type fluidTables struct {
	m, n         int
	mu           sync.Mutex
	sheet        []float64 // integral of u_i u_j
	baffled      []float64 // still fluid, one face
	open         []float64 // still fluid, both faces
	coupling     []float64 // u_j against pressure shape q: row q, column j
	soundBaffled *soundSeries
	soundOpen    *soundSeries
	grid         []float64 // see gridShapes
	cavity       *cavityTable
}

var fluidCache struct {
	mu     sync.Mutex
	tables map[[2]int]*fluidTables
}

// tablesOf returns the shared tables of order m with n shapes.
func tablesOf(m, n int) *fluidTables {
	c := &fluidCache
	c.mu.Lock()
	defer c.mu.Unlock()
	t := c.tables[[2]int{m, n}]
	if t == nil {
		// A bound on what a long session may keep; one diaphragm needs about 20.
		if c.tables == nil || len(c.tables) >= 200 {
			c.tables = map[[2]int]*fluidTables{}
		}
		t = &fluidTables{m: m, n: n}
		c.tables[[2]int{m, n}] = t
	}
	return t
}

func (t *fluidTables) filled(dst *[]float64, fill func([]float64)) []float64 {
	t.mu.Lock()
	defer t.mu.Unlock()
	if *dst == nil {
		x := make([]float64, t.n*t.n)
		fill(x)
		*dst = x
	}
	return *dst
}

// sheetMass is the matrix of integral u_i u_j r dr.
func (t *fluidTables) sheetMass() []float64 {
	return t.filled(&t.sheet, func(x []float64) { disc.HeldEdge.FillForm(x, t.m, t.n, 0) })
}

// baffledMass is the mass of still fluid of unit density on one baffled face.
func (t *fluidTables) baffledMass() []float64 {
	return t.filled(&t.baffled, func(x []float64) { disc.HeldEdge.FillForm(x, t.m, t.n, -1) })
}

// openMass is the mass of still fluid of unit density on both open faces.
func (t *fluidTables) openMass() []float64 {
	return t.filled(&t.open, func(x []float64) { disc.HeldEdge.FillOpenFluid(x, t.m, t.n) })
}

// series returns the sound series of a baffled face or of open faces with at
// least the given number of powers.
func (t *fluidTables) series(edge disc.Edge, powers int) *soundSeries {
	t.mu.Lock()
	defer t.mu.Unlock()
	s, n := &t.soundBaffled, t.n
	if edge == disc.RootEdge {
		s, n = &t.soundOpen, t.n+1
	}
	if *s == nil || len((*s).term) < powers {
		*s = newSoundSeries(edge, t.m, n, powers)
	}
	return *s
}

// openCoupling is the n+1 by n matrix of integral of u_j times pressure shape q.
func (t *fluidTables) openCoupling() []float64 {
	t.mu.Lock()
	defer t.mu.Unlock()
	if t.coupling == nil {
		x := make([]float64, (t.n+1)*t.n)
		for q := range t.n + 1 {
			for j := max(0, q-1); j < t.n; j++ {
				x[q*t.n+j] = disc.HeldEdge.OpenCoupling(t.m, j, q)
			}
		}
		t.coupling = x
	}
	return t.coupling
}

// soundSeries is a radiation operator as a power series in k0 with real
// matrices: see disc.Edge.SoundSeries.
type soundSeries struct {
	n     int
	first int         // the power at which pair (0, 0) begins to radiate
	term  [][]float64 // lower triangles, packed row by row
	size  []float64   // largest magnitude in each term
}

func newSoundSeries(edge disc.Edge, m, n, powers int) *soundSeries {
	s := &soundSeries{n: n, term: make([][]float64, powers), size: make([]float64, powers), first: 2*m + 1}
	if edge == disc.RootEdge {
		s.first = 2*m + 3
	}
	for p := range s.term {
		s.term[p] = make([]float64, n*(n+1)/2)
	}
	column := make([]float64, powers)
	at := 0
	for i := range n {
		for j := range i + 1 {
			edge.SoundSeries(column, m, i, j)
			for p, v := range column {
				s.term[p][at] = v
				s.size[p] = math.Max(s.size[p], math.Abs(v))
			}
			at++
		}
	}
	return s
}

// at adds to the lower triangles of re and im (n by n) the operator at the
// complex wave number k0, times factor. The static term is left out: it belongs
// to the still fluid. It returns false if the series has too few terms.
func (s *soundSeries) at(re, im []float64, k0 complex128, factor float64) bool {
	n := s.n
	power := complex(1, 0)
	floor := 0x1p-56 * s.size[0]
	quiet := 0
	for p := 1; p < len(s.term); p++ {
		power *= k0
		z := power * complex(factor, 0)
		if p%2 == 1 {
			z *= 1i
		}
		// Even terms from the first power on, odd ones from where they begin.
		if p%2 == 1 && p < s.first {
			continue
		}
		if s.size[p]*cmplx.Abs(power) < floor {
			// Two terms of each kind in a row, and past where odd ones begin.
			if quiet++; quiet >= 4 && p >= min(s.first+4, len(s.term)-1) {
				return true
			}
			continue
		}
		quiet = 0
		x, y := real(z), imag(z)
		term := s.term[p]
		last := n - 1 // rows i and columns j with i + j <= reach have odd terms
		reach := 2 * n
		if p%2 == 1 {
			reach = (p - s.first) / 2
			last = min(last, reach)
		}
		at := 0
		for i := range last + 1 {
			row := term[at : at+i+1]
			at += i + 1
			if len(row) > reach-i+1 {
				row = row[:reach-i+1]
			}
			a, b := re[i*n:i*n+len(row)], im[i*n:i*n+len(row)]
			for j, v := range row {
				a[j] += x * v
				b[j] += y * v
			}
		}
	}
	return quiet >= 2 || len(s.term) == 1
}

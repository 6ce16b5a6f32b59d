package modes

import (
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
	cavity, gap  *cavityTable
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
	if *s == nil || (*s).powers < powers {
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

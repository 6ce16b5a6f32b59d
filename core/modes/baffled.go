package modes

import "hoopsheet/core/disc"

// baffledFace is a half-space of fluid behind a face set in an infinite rigid
// baffle. Its matrix, per radial integral, is density a^3 times
//
//	integral U_i U_j k dk / sqrt(k^2 - k0^2),  k0 = omega a/c0,
//
// still fluid for c0 infinite.
type baffledFace struct {
	tables  *fluidTables
	live    *fluidTables // of the shapes whose share of sound counts
	density float64      // times a^3
	reach   float64      // a/c0; 0 for still fluid
}

func (f *baffledFace) static(x []float64) {
	addScaled(x, f.tables.baffledMass(), f.density)
}

func (f *baffledFace) moving() bool { return f.reach > 0 }

func (f *baffledFace) dynamic(re, im []float64, omega complex128) bool {
	k0 := omega * complex(f.reach, 0)
	return f.live.series(disc.HeldEdge, seriesPowers(k0)).at(re, im, f.tables.n, k0, f.density)
}

// addScaled adds factor times y to x.
func addScaled(x, y []float64, factor float64) {
	for i, v := range y {
		x[i] += factor * v
	}
}

package modes

import (
	"math"
	"math/cmplx"
	"slices"
)

// wetOrder is the eigenproblem of one number of nodal diameters: in the unknowns
// of its strain, (static + dynamic(omega)) y = theta y with theta = 1/omega^2.
type wetOrder struct {
	m      int
	strain *strain
	tables *fluidTables
	sheet  float64 // sigma a^2
	radius float64 // effective, m
	faces  []fluidFace
	cavity *cavityFace // one of faces, or nil
	// sound scales the sound number of open and baffled faces from 0, still
	// fluid, to 1; on the way it may be complex.
	sound complex128
	// gained is ln of theta over that in still fluid of the last two modes.
	gained [2]complex128
	static []float64 // size by size
	values []float64 // theta in still fluid, largest first
	// vectors, row by mode, in still fluid.
	vectors []float64
	// With many shapes the frequency-dependent problem is solved in the lowest
	// modes in still fluid: live coefficients of each, row by mode. Nil without.
	reduced []float64
	open    bool // the faces are
	live    int  // shapes whose dependence on frequency counts

	work *wetWork
}

type wetWork struct {
	re, im, cre, cim []float64
	half             []float64
	f                []complex128
	built            [3][]complex128 // the last matrices, newest first
	at               [3]complex128   // and the theta each belongs to
	count            int
	slope            complex128 // assumed while there is one matrix only
}

func (o *wetOrder) space() *wetWork {
	if o.work == nil {
		n, size := o.strain.n, o.size()
		w := &wetWork{
			re: make([]float64, n*n), im: make([]float64, n*n), half: make([]float64, size*o.live),
			cre: make([]float64, size*size), cim: make([]float64, size*size),
			f: make([]complex128, size*size),
		}
		for i := range w.built {
			w.built[i] = make([]complex128, size*size)
		}
		o.work = w
	}
	return o.work
}

// solveStill solves the order in still fluid for count modes.
func (o *wetOrder) solveStill(count int) {
	n, size := o.strain.n, o.strain.size
	x := make([]float64, n*n)
	addScaled(x, o.tables.sheetMass(), o.sheet)
	for _, f := range o.faces {
		f.static(x)
	}
	o.static = make([]float64, size*size)
	o.strain.congruence(o.static, x)
	o.vectors = make([]float64, count*size)
	o.values = newSymmetric(size).largest(o.static, count, o.vectors)
}

// size is the number of unknowns of the frequency-dependent problem.
func (o *wetOrder) size() int {
	if o.reduced != nil {
		return len(o.values)
	}
	return o.strain.size
}

// reduceAbove is the number of unknowns above which, with open faces, a reduced
// basis of count + reducedMore modes pays; it leaves out 1e-8 of the frequency of
// the last mode and far less of the first (TestReducedBasis). On baffled faces,
// where the pressure does not vanish at the rim, it would leave out 1e-6.
const (
	reduceAbove = 30
	reducedMore = 14
)

// solve returns the count lowest modes of the order, lowest first, with sound in
// a cavity but not yet on other faces.
func (o *wetOrder) solve(count int) []wetMode {
	if o.cavity != nil {
		o.solveStill(count)
		return newCavitySearch(o).find(count)
	}
	o.settleWalls()
	if o.open && o.moving() && o.strain.size > reduceAbove && count+reducedMore < o.strain.size {
		o.solveStill(count + reducedMore)
		o.reduce()
	} else {
		o.solveStill(count)
	}
	modes := make([]wetMode, count)
	for k := range modes {
		modes[k] = o.still(k)
	}
	return modes
}

// settleWalls gives gaps with a wall, for m = 0, the sound number of the lowest
// mode for their static part.
func (o *wetOrder) settleWalls() {
	for _, f := range o.faces {
		if w, ok := f.(*wallFace); ok && o.m == 0 {
			for range 3 {
				o.solveStill(1)
				w.ref = math.Min(MaxSoundNumber, w.reach/math.Sqrt(o.values[0]))
			}
		}
	}
}

// reduce goes over to the modes in still fluid as unknowns.
func (o *wetOrder) reduce() {
	size := o.strain.size
	o.reduced = make([]float64, len(o.values)*o.live)
	q := make([]float64, o.strain.n)
	for k := range o.values {
		o.strain.shapes(q, o.vectors[k*size:(k+1)*size])
		copy(o.reduced[k*o.live:(k+1)*o.live], q)
	}
	o.work = nil
}

// moving tells whether anything is left to refine after solve: sound on a face
// that is not a cavity, or a vent with resistance.
func (o *wetOrder) moving() bool {
	for _, f := range o.faces {
		if f.moving() && (f != fluidFace(o.cavity) || o.cavity.ventResistance > 0) {
			return true
		}
	}
	return false
}

// at writes the matrix at omega to the lower triangle of c.
func (o *wetOrder) at(c []complex128, omega complex128) bool {
	w := o.space()
	clear(w.re)
	clear(w.im)
	good := true
	for _, f := range o.faces {
		switch {
		case !f.moving():
		case f == fluidFace(o.cavity):
			good = f.dynamic(w.re, w.im, omega) && good
		case o.sound != 0:
			good = f.dynamic(w.re, w.im, omega*o.sound) && good
		}
	}
	size := o.size()
	if !slices.ContainsFunc(w.im, func(v float64) bool { return v != 0 }) {
		clear(w.cim)
	} else if o.reduced != nil {
		o.project(w.cim, w.im)
	} else {
		o.strain.congruence(w.cim, w.im)
	}
	if o.reduced != nil {
		o.project(w.cre, w.re)
		for i := range size {
			for k := i * size; k <= i*size+i; k++ {
				c[k] = complex(w.cre[k], w.cim[k])
			}
			c[i*size+i] += complex(o.values[i], 0)
		}
		return good
	}
	o.strain.congruence(w.cre, w.re)
	for i := range size {
		for k := i * size; k <= i*size+i; k++ {
			c[k] = complex(o.static[k]+w.cre[k], w.cim[k])
		}
	}
	return good
}

// project writes the lower triangle of the reduced matrix of x, of which the
// lower triangle of the live part is given.
func (o *wetOrder) project(dst, x []float64) {
	n, live, size := o.strain.n, o.live, o.size()
	for i := range live {
		for j := range i {
			x[j*n+i] = x[i*n+j]
		}
	}
	half := o.work.half
	for k := range size {
		row, out := o.reduced[k*live:(k+1)*live], half[k*live:(k+1)*live]
		for i := range out {
			out[i] = dot(x[i*n:i*n+live], row)
		}
	}
	for k := range size {
		for l := range k + 1 {
			dst[k*size+l] = dot(half[k*live:(k+1)*live], o.reduced[l*live:(l+1)*live])
		}
	}
}

// wetMode is one solution: 1/omega^2 and the vector, y'y = 1 (not conjugated).
type wetMode struct {
	theta complex128
	y     []complex128
	// change is the last relative change of theta.
	change float64
	slope  complex128 // of y'C(theta)y in theta
	good   bool
	still  bool // sound was not put in: its number is beyond what the series reach
}

// still returns mode number k in still fluid.
func (o *wetOrder) still(k int) wetMode {
	y := make([]complex128, o.size())
	if o.reduced != nil {
		y[k] = 1
	} else {
		for i, v := range o.vectors[k*len(y) : (k+1)*len(y)] {
			y[i] = complex(v, 0)
		}
	}
	return wetMode{theta: complex(o.values[k], 0), y: y, good: true}
}

// unknowns returns the real part of a mode in the unknowns of the strain. The
// vector is as near to real as a phase can make it when y'y = 1.
func (o *wetOrder) unknowns(mode wetMode) []float64 {
	y := make([]float64, o.strain.size)
	for k, v := range mode.y {
		if o.reduced == nil {
			y[k] = real(v)
			continue
		}
		for i, u := range o.vectors[k*len(y) : (k+1)*len(y)] {
			y[i] += real(v) * u
		}
	}
	return y
}

// truncation estimates how much 1/omega^2 of a mode would change, relatively,
// if the last drop unknowns were left out.
func (o *wetOrder) truncation(mode wetMode, drop int) float64 {
	// The Rayleigh functional of the shortened vector in the smaller problem. In
	// still fluid that problem's own value lies between it and the full one.
	y := o.unknowns(mode)
	size := len(y)
	keep := size - drop
	cross := 0.0
	for i := keep; i < size; i++ {
		cross += y[i] * dot(o.static[i*size:i*size+keep], y[:keep])
	}
	return math.Abs(cross) / (dot(y[:keep], y[:keep]) * cmplx.Abs(mode.theta))
}

// liveError is the relative error of a frequency by the shapes whose part does
// not follow the frequency: over 600 modes of random diaphragms it was at most
// 2.1e-8 (TestErrorHolds).
func (o *wetOrder) liveError() float64 {
	if o.moving() && o.live < o.tables.n {
		return 4e-8
	}
	return 0
}

// omega returns the complex angular frequency, real part positive.
func (m wetMode) omega() complex128 {
	w := 1 / cmplx.Sqrt(m.theta)
	if real(w) < 0 {
		w = -w
	}
	return w
}

// realPart returns the real part of the shape coefficients.
func (o *wetOrder) realPart(mode wetMode) []float64 {
	q := make([]float64, o.strain.n)
	o.strain.shapes(q, o.unknowns(mode))
	return q
}

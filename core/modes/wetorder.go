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
	// fluid, to 1.
	sound  float64
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
		case o.sound > 0:
			good = f.dynamic(w.re, w.im, omega*complex(o.sound, 0)) && good
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

// refine follows a mode from still fluid to the solution with sound and other
// losses.
func (o *wetOrder) refine(start wetMode) wetMode {
	mode, overlap := o.iterate(start)
	moved := cmplx.Abs(mode.theta / start.theta)
	if mode.good && mode.change < 1e-8 && overlap > sameMode && moved > 0.5 && moved < 2 {
		return mode
	}
	// Strong coupling: raise sound number and resistance step by step.
	resistance := 0.0
	if o.cavity != nil {
		resistance = o.cavity.ventResistance
	}
	mode = start
	for step := 1; step <= soundSteps; step++ {
		o.sound = float64(step) / soundSteps
		if o.cavity != nil {
			o.cavity.ventResistance = resistance * o.sound
		}
		mode, _ = o.iterate(mode)
	}
	return mode
}

// sameMode is the overlap with the start above which a solution counts as the
// same mode; soundSteps the steps taken otherwise.
const (
	sameMode   = 0.8
	soundSteps = 8
)

// iterate solves the nonlinear eigenproblem by inverse iteration with the
// Rayleigh functional. overlap is |start' y|.
func (o *wetOrder) iterate(start wetMode) (mode wetMode, overlap float64) {
	// Guettel & Tisseur, The nonlinear eigenvalue problem, Acta Numerica 26
	// (2017) 1-94, section 4.3, doi:10.1017/S0962492917000034. The matrix is
	// complex symmetric, so the left vector is y itself and the functional errs
	// by the square of the error of y. Between the values of omega at which the
	// matrix was built it is interpolated.
	size := o.size()
	w := o.space()
	w.count, w.slope = 0, start.slope
	theta := start.theta
	y := append([]complex128(nil), start.y...)
	for range maxBuilds {
		mode.good = o.build(theta)
		next, slope := w.functional(size, y, theta)
		// Near a pole of a cavity the slope is large and theta moves little; the
		// other side of the equation tells how far off it was.
		steep := math.Max(1, cmplx.Abs(1-slope))
		change := cmplx.Abs(next-theta) / cmplx.Abs(next) * steep
		theta, mode.slope = next, slope
		// The value errs by the square of the residual over the gap to other modes,
		// taken as a quarter, and by what interpolation left.
		r := residualOf(w.built[0], size, y) / cmplx.Abs(theta)
		mode.change = (4*r*r + change*change) / steep
		if w.count >= 2 && mode.change < 1e-12 || change+r < 1e-14 {
			break
		}
		if w.count == 1 && cmplx.Abs(w.slope) > 1 {
			continue // the matrix at theta cannot be told from one alone
		}
		w.between(theta)
		for i := range size {
			w.f[i*size+i] -= theta
		}
		symmetricLDL(w.f, size, 1e-17*cmplx.Abs(theta))
		symmetricSolve(w.f, size, y)
		turnToUnit(y)
		theta, mode.slope = w.functional(size, y, theta)
	}
	mode.theta, mode.y = theta, y
	sum := complex(0, 0)
	for i, v := range y {
		sum += v * start.y[i]
	}
	return mode, cmplx.Abs(sum)
}

// maxBuilds bounds how often the matrix is built for one mode.
const maxBuilds = 14

// build adds the matrix at theta to those kept, newest first.
func (o *wetOrder) build(theta complex128) bool {
	w := o.space()
	oldest := w.built[2]
	w.built[2], w.built[1], w.built[0] = w.built[1], w.built[0], oldest
	w.at[2], w.at[1], w.at[0] = w.at[1], w.at[0], theta
	w.count++
	return o.at(oldest, 1/cmplx.Sqrt(theta))
}

// functional solves y'C(theta)y = theta near a start, C interpolated in the
// last three builds, and returns the derivative of the left side too.
func (w *wetWork) functional(size int, y []complex128, start complex128) (theta, slope complex128) {
	q0 := quadratic(w.built[0], size, y)
	switch w.count {
	case 1:
		return w.at[0] + (q0-w.at[0])/(1-w.slope), w.slope
	case 2:
		slope = w.difference(q0, quadratic(w.built[1], size, y), 0, 1)
		return w.at[0] + (q0-w.at[0])/(1-slope), slope
	}
	q1, q2 := quadratic(w.built[1], size, y), quadratic(w.built[2], size, y)
	first := w.difference(q0, q1, 0, 1)
	second := w.difference(first, w.difference(q1, q2, 1, 2), 0, 2)
	theta = start
	for range 4 {
		a, b := theta-w.at[0], theta-w.at[1]
		value := q0 + a*(first+b*second) - theta
		slope = first + (a+b)*second
		theta -= value / (slope - 1)
	}
	return theta, slope
}

// difference is the divided difference of p and q between two builds, 0 where
// these coincide.
func (w *wetWork) difference(p, q complex128, i, j int) complex128 {
	if d := w.at[i] - w.at[j]; d != 0 {
		return (p - q) / d
	}
	return 0
}

// between writes the matrix at theta, interpolated in the last two builds, to
// w.f.
func (w *wetWork) between(theta complex128) {
	if w.count < 2 || w.at[0] == w.at[1] {
		copy(w.f, w.built[0])
		return
	}
	f := (theta - w.at[0]) / (w.at[0] - w.at[1])
	old := w.built[1]
	for i, v := range w.built[0] {
		w.f[i] = v + f*(v-old[i])
	}
}

// residualOf returns |Cy - (y'Cy)y| for the lower triangle of C and y'y = 1.
func residualOf(c []complex128, n int, y []complex128) float64 {
	z := make([]complex128, n)
	for i := range n {
		row := c[i*n : i*n+i+1]
		s, v := row[i]*y[i], y[i]
		for j, x := range row[:i] {
			s += x * y[j]
			z[j] += x * v
		}
		z[i] += s
	}
	q := complex(0, 0)
	for i, v := range z {
		q += v * y[i]
	}
	sum := 0.0
	for i, v := range z {
		v -= q * y[i]
		sum += real(v)*real(v) + imag(v)*imag(v)
	}
	return math.Sqrt(sum)
}

// quadratic returns y'Cy from the lower triangle.
func quadratic(c []complex128, n int, y []complex128) complex128 {
	sum := complex(0, 0)
	for i := range n {
		row := c[i*n : i*n+i+1]
		s := complex(0, 0)
		for j, v := range row[:i] {
			s += v * y[j]
		}
		sum += y[i] * (2*s + row[i]*y[i])
	}
	return sum
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

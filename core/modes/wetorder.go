package modes

import (
	"math/cmplx"
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
	static []float64 // size by size
	values []float64 // theta in still fluid, largest first
	// vectors, row by mode, in still fluid.
	vectors []float64

	work *wetWork
}

type wetWork struct {
	re, im, cre, cim []float64
	c, before, f     []complex128
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

// moving tells whether any face depends on frequency.
func (o *wetOrder) moving() bool {
	for _, f := range o.faces {
		if f.moving() {
			return true
		}
	}
	return false
}

// at writes the matrix at omega to the lower triangle of c.
func (o *wetOrder) at(c []complex128, omega complex128) bool {
	n, size := o.strain.n, o.strain.size
	w := o.work
	if w == nil {
		w = &wetWork{
			re: make([]float64, n*n), im: make([]float64, n*n),
			cre: make([]float64, size*size), cim: make([]float64, size*size),
			c: make([]complex128, size*size), before: make([]complex128, size*size), f: make([]complex128, size*size),
		}
		o.work = w
	}
	clear(w.re)
	clear(w.im)
	good := true
	for _, f := range o.faces {
		if f.moving() {
			good = f.dynamic(w.re, w.im, omega) && good
		}
	}
	o.strain.congruence(w.cre, w.re)
	o.strain.congruence(w.cim, w.im)
	for i := range size {
		for k := i * size; k <= i*size+i; k++ {
			c[k] = complex(o.static[k]+w.cre[k], w.cim[k])
		}
	}
	return good
}

// wetMode is one solution: 1/omega^2 and the vector, y'y = 1 (not conjugated).
type wetMode struct {
	theta complex128
	y     []complex128
	// change is the last relative change of theta.
	change float64
	good   bool
}

// still returns mode number k in still fluid.
func (o *wetOrder) still(k int) wetMode {
	size := o.strain.size
	y := make([]complex128, size)
	for i, v := range o.vectors[k*size : (k+1)*size] {
		y[i] = complex(v, 0)
	}
	return wetMode{theta: complex(o.values[k], 0), y: y, good: true}
}

// refine follows a mode from a start to the solution with everything that
// depends on frequency.
func (o *wetOrder) refine(start wetMode) wetMode {
	mode, overlap := o.iterate(start)
	if mode.good && overlap > 0.7 {
		return mode
	}
	return mode
}

// iterate solves the nonlinear eigenproblem by inverse iteration with the
// Rayleigh functional. overlap is |start' y|.
func (o *wetOrder) iterate(start wetMode) (mode wetMode, overlap float64) {
	// Guettel & Tisseur, The nonlinear eigenvalue problem, Acta Numerica 26
	// (2017) 1-94, section 4.3, doi:10.1017/S0962492917000034. The matrix is
	// complex symmetric, so the left vector is y itself and the functional errs
	// by the square of the error of y.
	size := o.strain.size
	theta := start.theta
	y := append([]complex128(nil), start.y...)
	mode.good = o.at0(theta)
	w := o.work
	var before complex128
	for step := range 12 {
		if step > 0 {
			w.c, w.before = w.before, w.c
			mode.good = o.at(w.c, 1/cmplx.Sqrt(theta))
		}
		q := quadratic(w.c, size, y)
		next := q
		if step > 0 && theta != before {
			slope := (q - quadratic(w.before, size, y)) / (theta - before)
			next = theta + (q-theta)/(1-slope)
		}
		mode.change = cmplx.Abs(next-theta) / cmplx.Abs(next)
		before, theta = theta, next
		if step > 0 && mode.change < 1e-13 {
			break
		}
		copy(w.f, w.c)
		for i := range size {
			w.f[i*size+i] -= theta
		}
		symmetricLDL(w.f, size, 1e-17*cmplx.Abs(theta))
		symmetricSolve(w.f, size, y)
		s := complex(0, 0)
		for _, v := range y {
			s += v * v
		}
		s = 1 / cmplx.Sqrt(s)
		for i := range y {
			y[i] *= s
		}
		if step > 1 && mode.change < 1e-7 {
			// The vector now errs by about that, the functional by its square.
			mode.change *= mode.change
			w.c, w.before = w.before, w.c
			mode.good = o.at(w.c, 1/cmplx.Sqrt(theta))
			q := quadratic(w.c, size, y)
			slope := (q - quadratic(w.before, size, y)) / (theta - before)
			theta += (q - theta) / (1 - slope)
			break
		}
	}
	mode.theta, mode.y = theta, y
	sum := complex(0, 0)
	for i, v := range y {
		sum += v * start.y[i]
	}
	return mode, cmplx.Abs(sum)
}

func (o *wetOrder) at0(theta complex128) bool {
	if o.work == nil {
		size := o.strain.size
		o.at(make([]complex128, size*size), 1/cmplx.Sqrt(theta))
	}
	return o.at(o.work.c, 1/cmplx.Sqrt(theta))
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
	size := o.strain.size
	keep := size - drop
	cross, norm := complex(0, 0), complex(0, 0)
	for i := range keep {
		norm += mode.y[i] * mode.y[i]
	}
	for i := keep; i < size; i++ {
		row := o.static[i*size : (i+1)*size]
		s := complex(0, 0)
		for j := range keep {
			s += complex(row[j], 0) * mode.y[j]
		}
		cross += mode.y[i] * s
	}
	return cmplx.Abs(cross / (norm * mode.theta))
}

// omega returns the complex angular frequency, real part positive.
func (m wetMode) omega() complex128 {
	w := 1 / cmplx.Sqrt(m.theta)
	if real(w) < 0 {
		w = -w
	}
	return w
}

// realPart turns y by a constant phase so that it is as real as may be (it is,
// with y'y = 1) and returns the real part of the shape coefficients.
func (o *wetOrder) realPart(mode wetMode) []float64 {
	y := make([]float64, len(mode.y))
	for i, v := range mode.y {
		y[i] = real(v)
	}
	q := make([]float64, o.strain.n)
	o.strain.shapes(q, y)
	return q
}

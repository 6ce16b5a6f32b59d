package modes

import (
	"math"
	"math/cmplx"
)

// refine follows a mode from still fluid to the solution with sound and other
// losses.
func (o *wetOrder) refine(start wetMode) wetMode {
	// The change grows evenly along the order: the modes before tell where to
	// begin, which saves a build.
	ahead := start
	ahead.theta *= cmplx.Exp(2*o.gained[0] - o.gained[1])
	mode, overlap := o.iterate(ahead, iterateEnd)
	moved := cmplx.Abs(mode.theta / start.theta)
	if mode.good && mode.change < 1e-8 && overlap > sameMode && moved > 0.5 && moved < 2 {
		gained := cmplx.Log(mode.theta / start.theta)
		if o.gained[0] == 0 {
			o.gained[0] = gained
		}
		o.gained[1], o.gained[0] = o.gained[0], gained
		return mode
	}
	// Strong coupling: raise sound number and resistance step by step.
	resistance := 0.0
	if o.cavity != nil {
		resistance = o.cavity.ventResistance
	}
	o.gained = [2]complex128{}
	mode = start
	for step := 1; step <= soundSteps; step++ {
		done := float64(step) / soundSteps
		o.sound = complex(done, 0)
		if o.cavity != nil {
			o.cavity.ventResistance = resistance * done
		}
		mode, _ = o.iterate(mode, iterateEnd)
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
// Rayleigh functional, until theta is good to end. overlap is |start' y|.
func (o *wetOrder) iterate(start wetMode, end float64) (mode wetMode, overlap float64) {
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
		if w.count >= 2 && mode.change < end || change+r < 1e-14 {
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

// iterateEnd is the relative error of 1/omega^2 at which an iteration ends.
const iterateEnd = 3e-11

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

package response

// stepper takes the two fundamental solutions of a mode from one instant to
// the next, without evaluating them anew. It is exact but for rounding, which
// grows by about one unit in the last place a step.
type stepper struct {
	cc, cs, sc, ss float64
}

func newStepper(omega, zeta, step float64) stepper {
	// From c' = -omega s and s' = omega (c - 2 zeta s).
	c, s := fundamental(omega, zeta, step)
	return stepper{cc: c, cs: -s, sc: s, ss: c - 2*zeta*s}
}

func (a stepper) next(c, s float64) (nextC, nextS float64) {
	return a.cc*c + a.cs*s, a.sc*c + a.ss*s
}

// walk steps the coordinates of a motion and their coefficients through time.
type walk struct {
	mo    *motion
	from  float64
	step  float64
	count int // of steps taken
	stage *stage
	leg   int
	quiet bool
	// Of a quiet leg: the fundamental solutions, and about what they swing.
	steppers     []stepper
	c, s, around []float64
	twin         []bool // swings like the one before
	// q by modes, and the coefficients.
	q, coef []float64
}

// newWalk begins at t = 0.
func newWalk(mo *motion, step float64) *walk { return walkFrom(mo, 0, step) }

// walkFrom begins at any time.
func walkFrom(mo *motion, from, step float64) *walk {
	w := &walk{mo: mo, from: from, step: step, coef: make([]float64, mo.basis.Len())}
	w.settle()
	return w
}

// time of the walk.
func (w *walk) time() float64 { return w.from + float64(w.count)*w.step }

func (w *walk) next() {
	w.count++
	t := w.time()
	s := w.stage
	if w.quiet && w.mo.stage(t) == s && s.legAt(t) == w.leg {
		for i := range w.steppers {
			if w.twin[i] {
				w.c[i], w.s[i] = w.c[i-1], w.s[i-1]
				continue
			}
			w.c[i], w.s[i] = w.steppers[i].next(w.c[i], w.s[i])
		}
		w.sum()
		return
	}
	w.settle()
}

// settle evaluates the closed form.
func (w *walk) settle() {
	t := w.time()
	if s := w.mo.stage(t); s != w.stage {
		w.stage = s
		n := len(s.modes)
		lists := make([]float64, 4*n)
		w.c, w.s, w.around, w.q = lists[:n], lists[n:2*n], lists[2*n:3*n], lists[3*n:]
		w.steppers = make([]stepper, n)
		w.twin = make([]bool, n)
		for i := range w.steppers {
			if w.twin[i] = i > 0 && s.modes[i].same(&s.modes[i-1]); !w.twin[i] {
				w.steppers[i] = newStepper(s.modes[i].omega, s.modes[i].zeta, w.step)
			}
		}
	}
	w.leg = w.stage.legAt(t)
	leg := &w.stage.legs[w.leg]
	w.quiet = leg.quiet()
	if !w.quiet {
		for i := range w.q {
			w.q[i], _, _ = w.stage.within(i, w.leg, t-leg.from)
		}
		w.stage.fill(w.coef, w.q)
		return
	}
	for i := range w.q {
		k := &w.stage.modes[i]
		w.c[i], w.s[i] = fundamental(k.omega, k.zeta, t-leg.from)
		w.around[i] = leg.around(k)
	}
	w.sum()
}

// sum forms the coordinates of a quiet leg.
func (w *walk) sum() {
	for i := range w.q {
		k := &w.stage.modes[i]
		st, x := &k.states[w.leg], w.around[i]
		w.q[i] = x + w.c[i]*(st.q-x) + w.s[i]/k.omega*st.v
	}
	w.stage.fill(w.coef, w.q)
}

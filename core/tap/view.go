package tap

import "math"

// view is the spectrum at one place of the c axis.
type view struct {
	c float64
	// log is ln f - c by mode, and order the modes by rising frequency, which
	// rank undoes.
	log         []float64
	order, rank []int
	// variance by mode of the interpolation, relative; nil where there is none.
	variance []float64
	widest   float64 // the largest standard deviation
	// admitted modes, lowest first, lie below limit, ln f to which no mode is
	// missing.
	admitted int
	limit    float64
}

// newView makes the view of a fixed spectrum, or room for one that changes.
func newView(s *Spectrum) view {
	n := len(s.modes)
	v := view{log: s.fixed, order: make([]int, n), rank: make([]int, n), admitted: n, limit: math.Inf(1)}
	for i := range n {
		v.order[i], v.rank[i] = i, i
	}
	if s.fixed == nil {
		v.log, v.variance = make([]float64, n), make([]float64, n)
	}
	return v
}

// look moves the view to c.
func (s *search) look(c float64) {
	v, spectrum := &s.view, s.spectrum
	v.c = c
	if spectrum.fixed != nil {
		return
	}
	p := placeOf(spectrum.knots, c)
	v.widest = 0
	for id := range v.log {
		y, _ := spectrum.curves[id].at(p)
		v.log[id] = y + s.shift[id] - c
		e := spectrum.curves[id].doubt(p)
		if s.exact[id] {
			e = 0
		}
		v.variance[id] = e * e
		v.widest = max(v.widest, e)
	}
	y, _ := spectrum.complete.at(p)
	v.limit = y
	// Nearly in order from the last time: insertion sort.
	for i := 1; i < len(v.order); i++ {
		id := v.order[i]
		j := i
		for ; j > 0 && v.log[v.order[j-1]] > v.log[id]; j-- {
			v.order[j] = v.order[j-1]
		}
		v.order[j] = id
	}
	v.admitted = 0
	for i, id := range v.order {
		v.rank[id] = i
		if v.log[id]+c <= v.limit {
			v.admitted = i + 1
		}
	}
}

// upTo is the number of admitted modes with ln f - c <= x.
func (v *view) upTo(x float64) int {
	low, high := 0, v.admitted
	for low < high {
		if middle := (low + high) / 2; v.log[v.order[middle]] > x {
			high = middle
		} else {
			low = middle + 1
		}
	}
	return low
}

// curveAt gives ln f of a mode at c with its slope, as the view would.
func (s *search) curveAt(id int, c float64) (y, slope float64) {
	if s.spectrum.fixed != nil {
		return s.spectrum.fixed[id] + c, 1
	}
	y, slope = s.spectrum.curves[id].at(placeOf(s.spectrum.knots, c))
	return y + s.shift[id], slope
}

// spread is the variance of ln f of a line about a mode in the view: of the
// line, and of the interpolation.
func (s *search) spread(p pair) float64 {
	l := s.lines[p.line]
	if s.view.variance == nil {
		return l.s * l.s
	}
	return l.s*l.s + s.view.variance[p.mode]
}

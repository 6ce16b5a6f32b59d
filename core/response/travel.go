package response

import (
	"context"
	"math"
	"slices"

	"hoopsheet/core/disc"
	"hoopsheet/core/internal/sorting"
)

// Travel is a displacement with its place and time.
type Travel struct {
	Displacement float64 // with its sign, m
	At           Point
	Time         float64 // s
}

const (
	// omittedShare of the summed sizes of the modes, the fastest ones, is left
	// out of the search for places that are then refined with all of them.
	omittedShare = 0.08
	// wetNeighbours is how many Bessel functions beyond its own a wet mode keeps
	// in the search: later ones are below 2 % of it.
	wetNeighbours = 4
	// searchSteps per period of the fastest mode of the search, and points per
	// wavelength of it: at the worst phase an extreme of it alone is seen at
	// cos(pi/4) of its height.
	searchSteps = 4
	// mostSearch bounds the instants of the search.
	mostSearch = 3000
	// refined is the number of places that are refined.
	refined = 4
	// hopeless is the height, relative to the best one refined, below which a
	// place seen on the grid is not climbed: the grid sees the fastest mode of
	// the search at 0.7 of its height, the others nearly whole.
	hopeless = 0.75
)

// search is what is looked at to find places near the largest travel.
type search struct {
	moves  *motion // the slower modes
	table  *disc.Table
	step   float64 // of time
	count  int     // of instants
	capped bool    // instants are further apart than searchSteps asks for
}

// newSearch prepares the search from time 0 to end.
func newSearch(mo *motion, end float64) *search {
	s := &search{moves: mo.slower()}
	fastest := math.Max(s.moves.fastest(), 1)
	shortest := math.Max(s.moves.shortest(), 1)
	wanted := fastest*end/(2*math.Pi)*searchSteps + 1
	s.capped = wanted > mostSearch
	s.count = int(math.Ceil(math.Min(math.Max(wanted, 16), mostSearch)))
	s.step = end / float64(s.count-1)

	radii := make([]float64, max(9, int(math.Ceil(shortest/(2*math.Pi)*searchSteps))+1))
	for i := range radii {
		radii[i] = float64(i) / float64(len(radii))
	}
	// As many angles as points per wavelength ask for, at least those that the
	// transform needs.
	angles := 2
	if m := s.moves.basis.M; m > 0 {
		angles = disc.NextAngles(max(searchSteps*m, 2*m+2))
	}
	s.table = takeTable(s.moves.basis, radii, angles)
	return s
}

// slowerThan returns the angular frequency at and above which the modes together
// have at most the given share of all sizes.
func (mo *motion) slowerThan(share float64) float64 {
	var order []modal
	for _, s := range mo.stages {
		order = append(order, s.modes...)
	}
	sorting.By(order, func(p, q modal) int {
		switch {
		case p.omega > q.omega:
			return -1
		case p.omega < q.omega:
			return 1
		}
		return 0
	})
	var total, left float64
	for i := range order {
		total += order[i].size
	}
	cut := math.Inf(1)
	for i := range order {
		left += order[i].size
		if left > share*total {
			break
		}
		cut = order[i].omega
	}
	return cut
}

// slower returns the motion without its fastest modes, as far as these are
// small together.
func (mo *motion) slower() *motion {
	cut := mo.slowerThan(omittedShare)
	kept := &motion{}
	highest, circles := 0, 1
	for _, s := range mo.stages {
		own := &stage{from: s.from, legs: s.legs}
		for _, mode := range s.modes {
			if mode.omega >= cut {
				continue
			}
			own.modes = append(own.modes, mode)
			for _, b := range mode.shape {
				highest, circles = max(highest, b.m), max(circles, b.n)
				if b.row != nil {
					// Of a wet mode, the Bessel functions about its own.
					circles = min(mo.basis.N, max(circles, b.n+wetNeighbours))
				}
			}
		}
		kept.stages = append(kept.stages, own)
	}
	kept.basis = basisOf(highest, circles)
	for _, s := range kept.stages {
		s.basis = kept.basis
		for i := range s.modes {
			shape := slices.Clone(s.modes[i].shape)
			for k := range shape {
				if row := shape[k].row; row != nil {
					shape[k].row = row[:min(len(row), circles)]
				}
			}
			s.modes[i].shape = shape
		}
	}
	return kept
}

// run returns the instants at which the largest displacement on the grid is
// larger than just before and after, largest first.
func (s *search) run(ctx context.Context, report func(share float64)) ([]candidate, error) {
	defer keepTable(s.table)
	walk := newWalk(s.moves, s.step)
	values := make([]float64, s.table.Len())
	found := make([]candidate, 0, s.count)
	best := 0.0
	for i := range s.count {
		t := float64(i) * s.step
		if i%16 == 0 {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
			report(float64(i) / float64(s.count))
			if s.moves.reach(t) < best {
				break // nothing larger can follow
			}
		}
		s.table.Synthesise(values, walk.coef)
		place, value := largestOf(values)
		best = math.Max(best, value)
		found = append(found, candidate{
			value: value,
			r:     s.table.R[place/s.table.NTheta],
			theta: 2 * math.Pi * float64(place%s.table.NTheta) / float64(s.table.NTheta),
			t:     t,
		})
		walk.next()
	}
	peaks := make([]candidate, 0, len(found))
	for i, c := range found {
		if (i == 0 || found[i-1].value <= c.value) && (i == len(found)-1 || found[i+1].value <= c.value) {
			peaks = append(peaks, c)
		}
	}
	sorting.By(peaks, byValue)
	return peaks, nil
}

// largestTravel finds the largest displacement anywhere on the sheet and
// between the times 0 and end, refined between the points of the search. The
// candidate given is one more place to start from. capped reports that the
// search was too coarse in time to be sure.
func (mo *motion) largestTravel(ctx context.Context, end float64, start candidate, report func(share float64)) (found candidate, capped bool, err error) {
	if mo.moving() == 0 {
		return candidate{}, false, nil
	}
	s := newSearch(mo, end)
	peaks, err := s.run(ctx, report)
	if err != nil {
		return candidate{}, false, err
	}
	places := append([]candidate{start}, peaks[:min(refined, len(peaks))]...)
	sorting.By(places, byValue)
	var tops []candidate
	for _, p := range places {
		if p.value < hopeless*math.Abs(found.value) || s.near(p, tops) {
			continue
		}
		top := mo.climb(p, end)
		tops = append(tops, p, top)
		if math.Abs(top.value) > math.Abs(found.value) {
			found = top
		}
	}
	return found, s.capped, nil
}

// near reports whether a place is within a step of the search of a place from
// which, or to which, it has been climbed already.
func (s *search) near(p candidate, tops []candidate) bool {
	for _, q := range tops {
		sin := math.Sin((p.theta - q.theta) / 2)
		apart := math.Hypot(p.r-q.r, 2*math.Sqrt(p.r*q.r)*sin)
		if math.Hypot(apart, p.t-q.t) < s.step {
			return true
		}
	}
	return false
}

// byValue puts the larger first.
func byValue(p, q candidate) int {
	switch {
	case p.value > q.value:
		return -1
	case p.value < q.value:
		return 1
	}
	return 0
}

// climb goes from a place to the extreme of the displacement beside it, in x, y
// and t at once, within the times 0 to end. The value has its sign.
func (mo *motion) climb(from candidate, end float64) candidate {
	sin, cos := math.Sincos(from.theta)
	p := plane{sign: 1}
	if mo.probe(from.r*cos, from.r*sin, math.Min(math.Max(from.t, 0), end)).w < 0 {
		p.sign = -1
	}
	top := mo.climbOn(p, from, 0, end)
	top.value *= p.sign
	return top
}

// climbOn goes to the largest lift beside a place, within two times, which may be
// one.
func (mo *motion) climbOn(on plane, from candidate, begin, end float64) candidate {
	// Newton's method, held back by a multiple of the unit matrix where the
	// second derivatives show no extreme or a step leads down (Levenberg and
	// Marquardt; Nocedal & Wright, Numerical Optimization, section 10.3).
	sin, cos := math.Sincos(from.theta)
	at := [3]float64{from.r * cos, from.r * sin, math.Min(math.Max(from.t, begin), end)}
	p := mo.probe(at[0], at[1], at[2])
	hold := 0.0
	for range 40 {
		uphill := [3]float64{on.sign*p.d[0] - on.x, on.sign*p.d[1] - on.y, on.sign * p.d[2]}
		fixed := begin == end || at[2] == begin && uphill[2] <= 0 || at[2] == end && uphill[2] >= 0
		step, ok := newtonStep(uphill, p.dd, on.sign, hold, fixed)
		if !ok {
			hold = math.Max(4*hold, 1e-3*curvature(p.dd))
			continue
		}
		next := at
		for i := range next {
			next[i] += step[i]
		}
		next[2] = math.Min(math.Max(next[2], begin), end)
		if r := math.Hypot(next[0], next[1]); r > 1 {
			next[0], next[1] = next[0]/r, next[1]/r
		}
		q := mo.probe(next[0], next[1], next[2])
		if on.lift(q.w, next[0], next[1]) < on.lift(p.w, at[0], at[1]) {
			if math.Hypot(math.Hypot(step[0], step[1]), step[2]) < 1e-9 {
				break // rounding
			}
			hold = math.Max(4*hold, 1e-2*curvature(p.dd))
			continue
		}
		at, p = next, q
		// The method doubles the digits of the place at every step, so one that
		// is this short leaves an error near 1e-10 and much less in the value.
		if hold == 0 && math.Hypot(math.Hypot(step[0], step[1]), step[2]) < 1e-5 {
			break
		}
		if hold /= 8; hold < 1e-6*curvature(p.dd) {
			hold = 0
		}
	}
	return candidate{value: on.lift(p.w, at[0], at[1]), r: math.Hypot(at[0], at[1]), theta: math.Atan2(at[1], at[0]), t: at[2]}
}

// curvature is a scale of the second derivatives.
func curvature(dd [6]float64) float64 {
	return math.Abs(dd[0]) + math.Abs(dd[2]) + math.Abs(dd[5]) + math.SmallestNonzeroFloat64
}

// newtonStep solves (-sign H + hold I) step = uphill by Cholesky's method; not
// ok if that matrix is not positive definite. With fixed time does not move.
func newtonStep(uphill [3]float64, dd [6]float64, sign, hold float64, fixed bool) (step [3]float64, ok bool) {
	a := [3][3]float64{
		{hold - sign*dd[0], -sign * dd[1], -sign * dd[3]},
		{-sign * dd[1], hold - sign*dd[2], -sign * dd[4]},
		{-sign * dd[3], -sign * dd[4], hold - sign*dd[5]},
	}
	n := 3
	if fixed {
		n = 2
	}
	least := 1e-10 * (curvature(dd) + hold)
	var l [3][3]float64
	for i := range n {
		for k := range i + 1 {
			sum := a[i][k]
			for m := range k {
				sum -= l[i][m] * l[k][m]
			}
			if i > k {
				l[i][k] = sum / l[k][k]
				continue
			}
			if !(sum > least) {
				return step, false
			}
			l[i][i] = math.Sqrt(sum)
		}
	}
	for i := range n {
		sum := uphill[i]
		for k := range i {
			sum -= l[i][k] * step[k]
		}
		step[i] = sum / l[i][i]
	}
	for i := n - 1; i >= 0; i-- {
		sum := step[i]
		for k := i + 1; k < n; k++ {
			sum -= l[k][i] * step[k]
		}
		step[i] = sum / l[i][i]
	}
	return step, true
}

package tap

import "math"

// solved is the modes of a reading, solved again at one place of the c axis.
type solved struct {
	c          float64
	maxM, maxN int
	log        map[int]float64 // ln f by mode
}

// The readings solved again are the most likely ones, down to one in a hundred
// of the first.
const (
	mostSharpened   = 3
	sharpenedWithin = 4.6 // ln 100
	// sharpMove is how far on the c axis a curve moved onto its exact value may
	// be followed: even where modes cross the slope errs by less than one, so
	// that the tension errs by less than 2e-6, and mostly a hundredth of it.
	sharpMove   = 1e-6
	mostSolving = 4
)

// sharpen solves the readings that matter at their own tension, moves the
// curves onto what comes out, and fits them again. Readings come most likely
// first, and go so.
func (s *search) sharpen(found []reading) ([]reading, error) {
	if s.spectrum.fixed != nil || len(found) == 0 {
		return found, nil
	}
	for i := range found[:min(len(found), mostSharpened)] {
		if found[i].logEvidence < found[0].logEvidence-sharpenedWithin {
			break
		}
		joined := found[i].joined
		for range mostSolving {
			exact, err := s.solveAt(found[i])
			if err != nil {
				return nil, err
			}
			s.stand(exact)
			r, ok := s.refine(exact.c)
			if !ok {
				break
			}
			r.solved = exact
			found[i] = r
			if math.Abs(r.c-exact.c) < sharpMove && exact.holds(r.pairs) {
				break
			}
		}
		found[i].logEvidence += joined
		found[i].joined = joined
	}
	s.stand(nil)
	return merge(found), nil
}

// solveAt solves the modes of a reading at its tension.
func (s *search) solveAt(r reading) (*solved, error) {
	out := &solved{c: r.c, maxN: 1, log: map[int]float64{}}
	for _, p := range r.pairs {
		name := s.spectrum.modes[p.mode]
		out.maxM, out.maxN = max(out.maxM, name.M), max(out.maxN, name.N)
	}
	list, _, err := s.spectrum.solve(s.spectrum.tension(r.c), Want{MaxM: out.maxM, MaxN: out.maxN})
	if err != nil {
		return nil, err
	}
	for _, f := range list {
		if id := s.spectrum.findOf(f.M, f.N, f.Upper); id >= 0 && f.Frequency > 0 {
			out.log[id] = math.Log(f.Frequency)
		}
	}
	return out, nil
}

// holds tells whether every mode of the pairs was solved.
func (e *solved) holds(pairs []pair) bool {
	for _, p := range pairs {
		if _, ok := e.log[p.mode]; !ok {
			return false
		}
	}
	return true
}

// stand moves the curves onto the modes solved for one reading, or back where
// exact is nil.
func (s *search) stand(exact *solved) {
	clear(s.shift)
	clear(s.exact)
	if exact == nil {
		return
	}
	p := placeOf(s.spectrum.knots, exact.c)
	for id, log := range exact.log {
		y, _ := s.spectrum.curves[id].at(p)
		s.shift[id], s.exact[id] = log-y, true
	}
}

// turnTo puts curves and view where a reading stands.
func (s *search) turnTo(r reading) {
	if s.spectrum.fixed == nil {
		s.stand(r.solved)
	}
	s.look(r.c)
}

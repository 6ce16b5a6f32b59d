package tap

import (
	"cmp"
	"errors"
	"math"
	"slices"

	"hoopsheet/core/internal/sorting"
)

// Range says over which tensions and modes a Spectrum is solved.
type Range struct {
	// Nominal tension, N/m, about which the knots lie closest.
	Nominal float64
	// Widest is how many times above and below it the knots reach, above 1 and
	// at most 1000; 10 if it is 0.
	Widest float64
	// Highest frequency to be read, Hz; 0 for all modes within the bounds.
	Highest float64
	// MaxM and MaxN bound the nodal diameters and circles; 10 and 5 if both are
	// 0. Peaks above the frequency to which such a list is complete, for the
	// ideal sheet 6.5 times that of mode (0, 1), are not read.
	MaxM, MaxN int
	// Include lists modes that are wanted whatever their frequency.
	Include []ModeName
}

const (
	realWidest = 10
	realMaxM   = 10
	realMaxN   = 5
	mostModes  = 1200
	// The tensions solved: so many to begin with, at this power of an even
	// spacing, and more where the estimated error is above roughness.
	firstKnots   = 7
	mostKnots    = 15
	knotCrowding = 1.5
	roughness    = 6e-3
	// beyondKnots is how far a curve is followed beyond them, on the c axis: a
	// factor of a thousand in tension.
	beyondKnots = 3.5
)

// NewSpectrum solves a diaphragm at 7 to 15 tensions and interpolates between
// them: a monotone cubic in ln f over ln T. What is interpolated departs from
// the square root of T only by what bending, the finite speed of sound and a
// cavity do, so that few knots do. Without a cavity the error is below 2e-3, and
// below 2e-4 within a factor of two of the nominal tension (TestInterpolation);
// with one, curves have bends where a mode of the sheet meets one of the cavity,
// and the error there may be a few percent. The estimated error counts in the
// odds, and readings that matter are solved again at their own tension.
func NewSpectrum(solve Solver, r Range) (*Spectrum, error) {
	if r.Widest == 0 {
		r.Widest = realWidest
	}
	if r.MaxM == 0 && r.MaxN == 0 {
		r.MaxM, r.MaxN = realMaxM, realMaxN
	}
	if !(r.Nominal > 0 && r.Widest > 1 && r.Widest <= 1000 && r.Highest >= 0 && r.MaxM >= 0 && r.MaxN >= 1 && (r.MaxM+1)*r.MaxN <= mostModes) || math.IsInf(r.Nominal, 1) {
		return nil, errors.New("a spectrum needs a nominal tension above zero, a range of above 1 to 1000 times it, and at least one mode")
	}
	s := &Spectrum{name: "the modelled diaphragm", solve: solve, modelError: RealModelError, widest: r.Widest, maxM: r.MaxM, maxN: r.MaxN}
	want := Want{MaxM: r.MaxM, MaxN: r.MaxN, Highest: r.Highest, Include: r.Include}
	middle, reach := 0.5*math.Log(r.Nominal), 0.5*math.Log(r.Widest)
	// Modes below the highest frequency anywhere between two knots are wanted at
	// both; from one to the next they rise like the root of tension at most, but
	// for some percent.
	above := func(gap float64) Want {
		want := want
		want.Highest *= 1.02 * math.Exp(gap)
		return want
	}
	var all []knot
	for i := range firstKnots {
		u := 2*float64(i)/(firstKnots-1) - 1
		c, gap := middle+reach*math.Copysign(math.Pow(math.Abs(u), knotCrowding), u), 0.0
		if i > 0 {
			gap = c - all[i-1].c
		}
		k, err := newKnot(solve, c, above(gap))
		if err != nil {
			return nil, err
		}
		all = append(all, k)
	}
	for {
		s.join(all)
		at := s.roughest(r.Highest)
		if at < 0 || len(all) == mostKnots {
			break
		}
		c := 0.5 * (all[at].c + all[at+1].c)
		k, err := newKnot(solve, c, above(c-all[at].c))
		if err != nil {
			return nil, err
		}
		all = slices.Insert(all, at+1, k)
	}
	if len(s.modes) == 0 {
		return nil, errors.New("no mode was found at any tension")
	}
	return s, nil
}

// knot is the modes at one place of the c axis.
type knot struct {
	c, complete float64 // complete as ln f
	modes       map[knotName]knotMode
}

type knotName struct {
	ModeName
	upper bool
}

type knotMode struct{ log, err float64 }

func newKnot(solve Solver, c float64, want Want) (knot, error) {
	list, complete, err := solve(math.Exp(2*c), want)
	if err != nil {
		return knot{}, err
	}
	k := knot{c: c, complete: math.Log(complete), modes: make(map[knotName]knotMode, len(list))}
	for _, f := range list {
		if f.M >= 0 && f.M <= want.MaxM && f.N >= 1 && f.N <= want.MaxN && f.Frequency > 0 {
			k.modes[knotName{ModeName{f.M, f.N}, f.Upper}] = knotMode{math.Log(f.Frequency), f.Error}
		}
	}
	return k, nil
}

// join makes the curves from the knots. The higher the tension, the fewer modes
// lie below the highest frequency wanted: a curve ends at the last knot that
// has its mode.
func (s *Spectrum) join(all []knot) {
	s.knots, s.modes, s.upper, s.curves = nil, nil, nil, nil
	var complete []float64
	for _, k := range all {
		s.knots, complete = append(s.knots, k.c), append(complete, k.complete)
	}
	s.complete = newCurve(s.knots, complete, make([]float64, len(all)))
	type named struct {
		knotName
		curve
	}
	var list []named
	for name := range all[0].modes {
		var y, own []float64
		for _, k := range all {
			mode, ok := k.modes[name]
			if !ok {
				break
			}
			y, own = append(y, mode.log), append(own, mode.err)
		}
		if len(y) > 1 {
			list = append(list, named{name, newCurve(s.knots[:len(y)], y, own)})
		}
	}
	sorting.By(list, func(a, b named) int {
		return cmp.Or(cmp.Compare(a.y[0], b.y[0]), cmp.Compare(a.M, b.M), cmp.Compare(a.N, b.N))
	})
	for _, n := range list {
		s.modes, s.upper, s.curves = append(s.modes, n.ModeName), append(s.upper, n.upper), append(s.curves, n.curve)
	}
}

// roughest is the interval with the largest estimated error among the modes up
// to a frequency, Hz, or -1 where none is above roughness.
func (s *Spectrum) roughest(highest float64) int {
	top := math.Inf(1)
	if highest > 0 {
		top = math.Log(highest)
	}
	at, worst := -1, roughness
	for _, k := range s.curves {
		for i, e := range k.e {
			// What the values state of their own no knot will mend.
			if e -= max(k.own[i], k.own[i+1]); e > worst && k.y[i] <= min(top, s.complete.y[i]) {
				at, worst = i, e
			}
		}
	}
	return at
}

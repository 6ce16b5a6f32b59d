package tap

import (
	"cmp"
	"math"

	"hoopsheet/core/internal/sorting"
)

// Nuisance is an input x that the tension rests on and that is not known
// exactly.
type Nuisance struct {
	Name string
	// RelativeStandard is its relative standard uncertainty u(x)/x.
	RelativeStandard float64
	// Solve gives the modes of the diaphragm with x raised by the relative Step,
	// for the sensitivity of the tension by a finite difference. Where it is
	// nil, Sensitivity states d ln T / d ln x: 2 for the radius and 1 for the
	// areal density of the ideal sheet.
	Solve       Solver
	Step        float64
	Sensitivity float64
}

// Share is one part of the uncertainty of the tension.
type Share struct {
	Name string `json:"name"`
	// Input is the relative standard uncertainty of the input, and Sensitivity
	// the percent of tension per percent of it; 0 for what the peaks themselves
	// bring.
	Input       float64 `json:"input"`
	Sensitivity float64 `json:"sensitivity"`
	// Relative standard uncertainty of the tension from it.
	Relative float64 `json:"relative"`
	// Share of the variance, 0 to 1.
	Share float64 `json:"share"`
}

// The names of what the fit itself brings.
const (
	SharePeaks   = "uncertainty of the peaks"
	ShareModel   = "model error"
	ShareScatter = "scatter of the peaks beyond both"
)

// inputs gives the sensitivity of the tension to every input at a reading, by
// linear propagation (JCGM 100:2008, 5.1), and the relative variance that they
// come to.
func (s *search) inputs(r reading) (shares []Share, variance float64, err error) {
	s.turnTo(r)
	base := r.solved
	for _, x := range s.q.Nuisances {
		share := Share{Name: x.Name, Input: x.RelativeStandard, Sensitivity: x.Sensitivity}
		if x.Solve != nil && s.spectrum.fixed == nil {
			if base == nil {
				if base, err = s.solveAt(r); err != nil {
					return nil, 0, err
				}
			}
			if share.Sensitivity, err = s.sensitivity(r, base, x); err != nil {
				return nil, 0, err
			}
		}
		share.Relative = math.Abs(share.Sensitivity) * x.RelativeStandard
		variance += share.Relative * share.Relative
		shares = append(shares, share)
	}
	return shares, variance, nil
}

// sensitivity is d ln T / d ln x with the peaks kept: the fit answers a change
// of the curves by delta with -sum w slope delta / sum w slope^2 on the c axis,
// half of ln T.
func (s *search) sensitivity(r reading, base *solved, x Nuisance) (float64, error) {
	list, _, err := x.Solve(s.spectrum.tension(base.c), Want{MaxM: base.maxM, MaxN: base.maxN})
	if err != nil {
		return 0, err
	}
	var sum, weight float64
	for _, p := range r.pairs {
		name := s.spectrum.modes[p.mode]
		from, known := base.log[p.mode]
		for _, f := range list {
			if known && f.M == name.M && f.N == name.N && f.Upper == s.spectrum.isUpper(p.mode) {
				_, slope := s.curveAt(p.mode, r.c)
				slope = max(slope, flattest)
				w := 1 / s.spread(p)
				sum += w * slope * (math.Log(f.Frequency) - from)
				weight += w * slope * slope
			}
		}
	}
	if weight == 0 {
		return 0, nil
	}
	return -2 * sum / weight / math.Log1p(x.Step), nil
}

// budget sets out what the uncertainty of a reading comes from, largest first.
func (s *search) budget(r reading, inputs []Share) []Share {
	s.turnTo(r)
	f, _ := s.fitUncertainty(r)
	shares := append([]Share{}, inputs...)
	for _, part := range []struct {
		name     string
		variance float64
	}{{SharePeaks, f.peaks}, {ShareModel, f.model}, {ShareScatter, f.scatter}} {
		shares = append(shares, Share{Name: part.name, Relative: math.Sqrt(part.variance)})
	}
	var total float64
	for _, share := range shares {
		total += share.Relative * share.Relative
	}
	for i := range shares {
		if total > 0 {
			shares[i].Share = shares[i].Relative * shares[i].Relative / total
		}
	}
	sorting.By(shares, func(a, b Share) int { return cmp.Compare(b.Relative, a.Relative) })
	return shares
}

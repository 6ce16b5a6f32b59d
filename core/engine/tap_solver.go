package engine

import (
	"cmp"
	"math"
	"strconv"
	"strings"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
	"hoopsheet/core/modes"
	"hoopsheet/core/tap"
)

// tapSolver gives the modes of a diaphragm at any tension, as package tap asks
// for them.
func tapSolver(real modes.Real, effects modes.Effects) tap.Solver {
	return func(tension float64, want tap.Want) (list []tap.ModeFrequency, complete float64, err error) {
		real := real
		real.Tension = tension
		m, n := tapBounds(&real, effects, want)
		for {
			solution, err := modes.Solve(real, modes.Request{MaxM: m, MaxN: n, Effects: effects})
			if err != nil {
				return nil, 0, asError(err, "document")
			}
			// A cavity adds modes to an order, so that there may be more of them
			// than expected.
			if want.Highest == 0 || solution.Complete >= want.Highest || m == want.MaxM && n == want.MaxN {
				return tapModes(solution), solution.Complete, nil
			}
			m, n = min(m+1, want.MaxM), min(n+1, want.MaxN)
		}
	}
}

// tapBounds estimates how many nodal diameters and circles the modes up to the
// highest frequency wanted have.
func tapBounds(real *modes.Real, effects modes.Effects, want tap.Want) (m, n int) {
	if want.Highest == 0 {
		return want.MaxM, want.MaxN
	}
	// A wave on the sheet, which carries fluid of mass rho/k on either side:
	// T k^2 = omega^2 (sigma + sum of rho/k). Bending would make k smaller. A
	// mode has k a near its zero j_mn, or above, because it also stirs fluid by
	// waves longer than its own: hence a margin, and the search goes on where it
	// is too small.
	omega := 2 * math.Pi * want.Highest
	fluid := 0.0
	for _, face := range []modes.Face{real.Upper, real.Lower} {
		switch {
		case face.Kind == diaphragm.FaceVacuum,
			face.Kind == diaphragm.FaceCavity && !effects.Cavity,
			face.Kind != diaphragm.FaceCavity && !effects.Fluid:
		default:
			fluid += face.Density
		}
	}
	k := omega * math.Sqrt(real.ArealDensity/real.Tension)
	for range 50 {
		k = omega * math.Sqrt((real.ArealDensity+fluid/k)/real.Tension)
	}
	top := 1.15 * k * real.Radius
	n = 1
	for _, mode := range want.Include {
		m, n = max(m, mode.M), max(n, mode.N)
	}
	for m < want.MaxM && bessel.ZeroJ(float64(m+1), 1) < top {
		m++
	}
	for n < want.MaxN && bessel.ZeroJ(0, n+1) < top {
		n++
	}
	return min(m, want.MaxM), min(n, want.MaxN)
}

// Relative standard errors of a mode whose computation says itself that it left
// something out.
const (
	beyondSoundError = 0.02 // fluid taken as still above its reach
	doubledError     = 0.05 // the search met another mode of the order
)

// tapModes lists solved modes, the index n by rising frequency within an order.
func tapModes(solution *modes.Solution) []tap.ModeFrequency {
	list := make([]tap.ModeFrequency, 0, len(solution.Modes))
	for _, mode := range solution.Modes {
		f := tap.ModeFrequency{M: mode.M, N: mode.N, Frequency: mode.Frequency, Error: mode.Error / mode.Frequency}
		if mode.BeyondSound {
			f.Error += beyondSoundError
		}
		list = append(list, f)
	}
	sorting.By(list, func(a, b tap.ModeFrequency) int {
		return cmp.Or(cmp.Compare(a.M, b.M), cmp.Compare(a.Frequency, b.Frequency))
	})
	for i := range list {
		list[i].N = 1
		if i > 0 && list[i].M == list[i-1].M {
			list[i].N = list[i-1].N + 1
			if list[i].Frequency < list[i-1].Frequency*(1+1e-9) {
				list[i].Error += doubledError
			}
		}
	}
	return list
}

// tapKey names a spectrum.
type tapKey struct {
	solutionKey
	highest float64
	include string
	ratios  *coupledRatios
}

// tapSpectra keeps the last few spectra: while peaks are typed, the diaphragm
// stays the same.
var tapSpectra = newCache[tapKey, *tap.Spectrum](4)

// Modes that peaks can be read as by themselves have up to so many nodal
// diameters and circles; a mode that is set may have more.
const (
	tapDiameters = 10
	tapCircles   = 5
	mostPinnedM  = 24
	mostPinnedN  = 12
)

// tapSpectrum gives the modes of a diaphragm over tension, as far as peaks can
// need them, and the ratios by which what is uneven changes them, if anything.
func tapSpectrum(real modes.Real, effects modes.Effects, uneven *modes.Uneven, peaks []tap.Peak) (*tap.Spectrum, *coupledRatios, error) {
	wanted := tap.Range{Nominal: real.Tension, Highest: highestTapped(peaks), MaxM: tapDiameters, MaxN: tapCircles}
	var include strings.Builder
	for _, p := range peaks {
		if p.Use && p.N > 0 && p.N <= mostPinnedN && p.M >= 0 && p.M <= mostPinnedM {
			wanted.MaxM, wanted.MaxN = max(wanted.MaxM, p.M), max(wanted.MaxN, p.N)
			wanted.Include = append(wanted.Include, tap.ModeName{M: p.M, N: p.N})
		}
	}
	sorting.By(wanted.Include, func(a, b tap.ModeName) int { return cmp.Or(cmp.Compare(a.M, b.M), cmp.Compare(a.N, b.N)) })
	for _, name := range wanted.Include {
		include.WriteString(strconv.Itoa(name.M) + " " + strconv.Itoa(name.N) + " ")
	}
	real.LossFactor, real.Remainder = 0, 0 // neither moves a frequency
	var ratios *coupledRatios
	if uneven != nil {
		m, n := tapBounds(&real, effects, tap.Want{MaxM: wanted.MaxM, MaxN: wanted.MaxN, Highest: wanted.Highest, Include: wanted.Include})
		var err error
		if ratios, err = tapRatios(real, effects, *uneven, m, n); err != nil {
			return nil, nil, err
		}
	}
	key := tapKey{keyOf(real, effects, wanted.MaxM, wanted.MaxN), wanted.Highest, include.String(), ratios}
	if spectrum, ok := tapSpectra.get(key); ok {
		return spectrum, ratios, nil
	}
	spectrum, err := tap.NewSpectrum(ratios.couple(tapSolver(real, effects)), wanted)
	if err != nil {
		return nil, nil, asError(err, "document")
	}
	tapSpectra.put(key, spectrum)
	return spectrum, ratios, nil
}

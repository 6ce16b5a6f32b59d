package engine

import (
	"math"
	"strconv"

	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
	"hoopsheet/core/tap"
)

// A tap is read by modes at many tensions. What couples the orders changes them
// by a ratio that hardly depends on the tension, because uneven tension is given
// relative to it: so the ratios of the coupled modes to the even ones are worked
// out at three tensions, and the even modes at all others.

// coupledRatios are ratios of frequencies, by mode.
type coupledRatios struct {
	middle float64 // ln of the nominal tension
	list   []modeRatio
	// rest is the root of the mean square of what a ratio is off one, for modes
	// beyond, and least the smallest ratio.
	rest, least float64
}

// modeRatio holds the ratios of mode (m, n) at the three tensions; a mode
// without nodal diameters has both alike.
type modeRatio struct {
	m, n         int
	lower, upper [3]float64
	doubt        float64 // the error of a ratio between the tensions
}

const (
	// ratioStep is ln of how far apart the three tensions lie.
	ratioStep = 0.5
	// tapSplit is the split of a pair from which its peaks are read apart; a
	// smaller one counts as an error of half of it, a peak being either.
	tapSplit = 2e-3
	// ratioOrders are the orders taken along beyond those of the peaks.
	ratioOrders = 2
)

var tapRatiosKept = newCache[string, *coupledRatios](3)

// tapRatios works the ratios out for modes with up to m nodal diameters and n
// circles.
func tapRatios(real modes.Real, effects modes.Effects, uneven modes.Uneven, m, n int) (*coupledRatios, error) {
	m, n = min(m+ratioOrders, coupledDiameters), min(n, coupledCircles)
	key := unevenKey(real, effects, uneven) + strconv.Itoa(m) + " " + strconv.Itoa(n)
	if kept, ok := tapRatiosKept.get(key); ok {
		return kept, nil
	}
	c := &coupledRatios{middle: math.Log(real.Tension), least: 1}
	for i := range 3 {
		real.Tension = math.Exp(c.middle + float64(i-1)*ratioStep)
		even, err := modes.Solve(real, modes.Request{MaxM: m, MaxN: n, Effects: effects})
		if err != nil {
			return nil, asError(err, "document")
		}
		coupled, err := modes.SolveCoupled(even, uneven)
		if err != nil {
			return nil, unevenRefusal(err)
		}
		for k := range coupled.Modes {
			mode := &coupled.Modes[k]
			r := c.find(mode.M, mode.N)
			if r == nil {
				c.list = append(c.list, modeRatio{m: mode.M, n: mode.N})
				r = &c.list[len(c.list)-1]
			}
			ratio := mode.Frequency / mode.Even
			if !mode.Upper {
				r.lower[i] = ratio
			}
			if mode.Upper || mode.M == 0 {
				r.upper[i] = ratio
			}
			c.least = math.Min(c.least, ratio)
		}
	}
	for i := range c.list {
		r := &c.list[i]
		for _, y := range [2]*[3]float64{&r.lower, &r.upper} {
			// Straight pieces miss an eighth of the second difference of a parabola
			// through the three. Where two mixed modes change names it is large.
			r.doubt = math.Max(r.doubt, math.Abs(y[0]-2*y[1]+y[2])/8)
			c.rest += (y[1] - 1) * (y[1] - 1) / float64(2*len(c.list))
		}
	}
	c.rest = math.Sqrt(c.rest)
	tapRatiosKept.put(key, c)
	return c, nil
}

func (c *coupledRatios) find(m, n int) *modeRatio {
	for i := range c.list {
		if r := &c.list[i]; r.m == m && r.n == n {
			return r
		}
	}
	return nil
}

// at is the ratio at ln T, straight between the tensions and even beyond them.
func (c *coupledRatios) at(y *[3]float64, log float64) float64 {
	place := math.Max(-1, math.Min(1, (log-c.middle)/ratioStep))
	if place < 0 {
		return y[1] + place*(y[1]-y[0])
	}
	return y[1] + place*(y[2]-y[1])
}

// couple gives the coupled modes of a solver of even ones. Inputs that change a
// little change the ratios by the share of the attached mass of it, which is
// left out.
func (c *coupledRatios) couple(solve tap.Solver) tap.Solver {
	if c == nil {
		return solve
	}
	return func(tension float64, want tap.Want) ([]tap.ModeFrequency, float64, error) {
		even, complete, err := solve(tension, want)
		if err != nil {
			return nil, 0, err
		}
		var list []tap.ModeFrequency
		log := math.Log(tension)
		for _, f := range even {
			r := c.find(f.M, f.N)
			if r == nil {
				f.Error += c.rest
				list = append(list, f)
				continue
			}
			lower, upper := c.at(&r.lower, log), c.at(&r.upper, log)
			f.Error += r.doubt
			if r.upper[1] < r.lower[1]*(1+tapSplit) {
				f.Frequency *= (lower + upper) / 2
				f.Error += math.Abs(upper-lower) / 2
				list = append(list, f)
				continue
			}
			second := f
			second.Upper = true
			f.Frequency *= lower
			second.Frequency *= upper
			list = append(list, f, second)
		}
		return list, complete * c.least, nil
	}
}

// words state the approximation and its size for the modes of a reading.
func (c *coupledRatios) words(matches []tap.Match) []string {
	if c == nil {
		return nil
	}
	doubt := 1e-6
	for _, m := range matches {
		if r := c.find(m.M, m.N); r != nil {
			doubt = math.Max(doubt, r.doubt)
		} else {
			doubt = math.Max(doubt, c.rest)
		}
	}
	return []string{"Attached masses and unevenness are in the modes as ratios to those of the even diaphragm, worked out at the nominal tension and about 1.6 times above and below it; " +
		"in between that errs by at most " + quantity.FormatNumber(100*doubt, 2) + " % of a frequency read here. Peaks of a pair are read apart where it splits by more than " +
		quantity.FormatNumber(100*tapSplit, 1) + " %."}
}

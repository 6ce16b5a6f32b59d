package modes

import "math/cmplx"

// follow refines the modes of an order, which solve gave lowest first. Where losses bring modes so close that two starts
// lead to one root, these are followed together from still fluid in steps small enough to stay apart.
func (o *wetOrder) follow(starts []wetMode) []wetMode {
	out := make([]wetMode, len(starts))
	for k, start := range starts {
		out[k] = o.refine(start)
	}
	if o.cavity == nil {
		return out
	}
	together := make([]bool, len(out))
	for range out {
		if !markTwins(together, out) {
			break
		}
		apart := false
		for i := 0; i < len(detours) && !apart; i++ {
			apart = o.followTogether(out, starts, together, detours[i])
		}
		for k := range out {
			if together[k] && !apart {
				out[k] = starts[k]
				out[k].still = true
			}
		}
	}
	return out
}

// oneRoot is the relative distance of 1/omega^2 below which two solutions are one.
const oneRoot = 1e-7

// detours are what a path of sound numbers takes on as imaginary parts, four times the largest, until one is free.
var detours = []float64{0, 1, -1, 2, -2, 0.4, -0.4}

// markTwins marks modes that came out as one root, and tells whether any were not marked before.
func markTwins(mark []bool, modes []wetMode) bool {
	found := false
	for i := range modes {
		for k := range i {
			if cmplx.Abs(modes[i].theta/modes[k].theta-1) < oneRoot && !(mark[i] && mark[k]) {
				mark[i], mark[k], found = true, true, true
			}
		}
	}
	return found
}

// followTogether raises sound number and resistance for the marked modes from their starts, all by the same steps, and
// tells whether they stayed apart. Steps are halved where a mode does not resemble itself or two are one.
func (o *wetOrder) followTogether(out, starts []wetMode, marked []bool, aside float64) bool {
	// Numerical continuation: E. L. Allgower & K. Georg, Introduction to Numerical Continuation Methods, SIAM 2003,
	// chapter 2. Two roots meet at isolated complex values of the sound number, near which a path of real ones may lead:
	// then it goes around through complex ones. It may exchange the two, but not lose one.
	const least, most = 1.0 / 2048, 1.0 / 4
	resistance := o.cavity.ventResistance
	defer func() { o.sound, o.cavity.ventResistance = 1, resistance }()
	var which []int
	for k := range marked {
		if marked[k] {
			which = append(which, k)
			out[k] = starts[k]
		}
	}
	trial, before := make([]wetMode, len(out)), make([]complex128, len(out))
	done, step, last := 0.0, most, 0.0
	for done < 1 {
		step = min(step, 1-done)
		o.sound = complex(done+step, aside*(1-done-step)*(done+step))
		o.cavity.ventResistance = resistance * (done + step)
		fine := true
		end, apart := roughEnd, 100*oneRoot // on the way
		if done+step == 1 {
			end, apart = iterateEnd, oneRoot
		}
		for i, k := range which {
			start := out[k]
			if last > 0 {
				start.theta += (out[k].theta - before[k]) * complex(step/last, 0)
			}
			overlap := 0.0
			trial[k], overlap = o.iterate(start, end)
			fine = overlap > sameMode && trial[k].good
			for _, j := range which[:i] {
				fine = fine && cmplx.Abs(trial[k].theta/trial[j].theta-1) >= apart
			}
			if !fine {
				break
			}
		}
		if !fine {
			if step /= 4; step < least {
				return false
			}
			continue
		}
		for _, k := range which {
			before[k], out[k] = out[k].theta, trial[k]
		}
		done, last, step = done+step, step, min(most, 2*step)
	}
	return true
}

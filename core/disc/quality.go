package disc

import "math"

// Quality says what an analysis leaves out.
type Quality struct {
	// Energy is the integral of f^2 over the disc, from the samples.
	Energy float64
	// Missed is the share of Energy that the coefficients do not carry, from 0
	// to 1. It is a difference of sums, so values below about 1e-14 mean "none".
	Missed float64
	// MissedOrders is the part of Missed in orders above M: raise M. The rest,
	// Missed - MissedOrders, asks for a larger N.
	MissedOrders float64
}

// quality compares the energies of samples and coefficients.
func (t *Transform) quality(coef []float64, energy, kept float64) Quality {
	q := Quality{Energy: energy}
	if !(energy > 0) {
		return q
	}
	q.MissedOrders = share(energy-kept, energy)
	q.Missed = max(share(energy-t.Basis.Energy(coef), energy), q.MissedOrders)
	return q
}

func share(part, whole float64) float64 {
	if math.IsNaN(part) {
		return math.NaN()
	}
	return min(max(part/whole, 0), 1)
}

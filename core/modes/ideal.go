package modes

import (
	"math"

	"hoopsheet/core/bessel"
)

// Ideal returns the count lowest modes of the ideal sheet, lowest first: a
// limp, evenly tensioned sheet in vacuum, of radius a (m), line tension T
// (N/m) and areal density sigma (kg/m^2), fixed at the rim, with
//
//	f_mn = j_mn/(2 pi a) sqrt(T/sigma).
//
// No mode is left out of the order. The frequencies are as good as the zeros,
// a few units in the last place. It returns nil unless a, T and sigma are
// positive and finite and count is positive.
func Ideal(a, T, sigma float64, count int) []Mode {
	if !positive(a) || !positive(T) || !positive(sigma) || count < 1 {
		return nil
	}
	scale := math.Sqrt(T/sigma) / (2 * math.Pi * a)
	list := lowestZeros(count)
	for i := range list {
		list[i].Ideal = scale * list[i].Zero
		list[i].Frequency = list[i].Ideal
	}
	return list
}

func positive(x float64) bool { return x > 0 && !math.IsInf(x, 1) }

// lowestZeros returns the modes with the count smallest zeros j_mn, in order.
func lowestZeros(count int) []Mode {
	// j_mn increases strictly with n and with m (DLMF 10.21(iv)), so the next
	// smallest is always among the first unused zero of each order begun and
	// the first zero of the next order. No two are equal (Bourget's
	// hypothesis, proved by Siegel; Watson 15.28).
	list := make([]Mode, 0, count)
	orders := []*order{newOrder(0)}
	for len(list) < count {
		lowest := orders[0]
		for _, o := range orders[1:] {
			if o.next() < lowest.next() {
				lowest = o
			}
		}
		list = append(list, lowest.take())
		if lowest.taken == 1 {
			orders = append(orders, newOrder(len(orders)))
		}
	}
	return list
}

// order walks along the zeros of one J_m.
type order struct {
	m     int
	zeros []float64 // one more than taken
	taken int
}

func newOrder(m int) *order {
	return &order{m: m, zeros: []float64{bessel.ZeroJ(float64(m), 1)}}
}

func (o *order) next() float64 { return o.zeros[o.taken] }

func (o *order) take() Mode {
	o.taken++
	o.zeros = append(o.zeros, bessel.ZeroJ(float64(o.m), o.taken+1))
	zero := o.zeros[o.taken-1]
	return Mode{M: o.m, N: o.taken, Zero: zero, CircleRadii: ratios(o.zeros[:o.taken-1], zero)}
}

// ratios returns each of values divided by whole; never nil.
func ratios(values []float64, whole float64) []float64 {
	r := make([]float64, len(values))
	for i, v := range values {
		r[i] = v / whole
	}
	return r
}

package response

import (
	"math"

	"hoopsheet/core/disc"
	"hoopsheet/core/modes"
)

// NewMixed takes the modes of an uneven diaphragm, with the tension N/m, and for
// those that it does not have, or of which it has one of a pair, those of the even
// one.
func NewMixed(c *modes.Coupled, even *Wet, tension float64) *Wet {
	orders, terms := len(even.Orders)-1, len(even.Orders[0][0].Shape)
	w := &Wet{Terms: terms, Cavity: even.Cavity, CavitySpring: even.CavitySpring}
	basis := basisOf(orders, terms)
	converters := make([]*disc.Converter, orders+1)
	take := func(rows [][]float64) [][]float64 {
		out := make([][]float64, orders+1)
		most := 0.0
		for _, row := range rows {
			for _, v := range row {
				most = math.Max(most, math.Abs(v))
			}
		}
		for m, row := range rows {
			size := 0.0
			for _, v := range row {
				size = math.Max(size, math.Abs(v))
			}
			if m > orders || size <= negligibleBlock*most {
				continue
			}
			if converters[m] == nil {
				converters[m] = disc.NewConverter(basis, m, disc.HeldEdge, len(row))
			}
			out[m] = make([]float64, terms)
			converters[m].ToBessel(out[m], row)
		}
		return out
	}
	count := make([]int, (orders+1)*terms)
	place := func(m, n int) *int {
		if m > orders || n > terms {
			return new(int)
		}
		return &count[m*terms+n-1]
	}
	for i := range c.Modes {
		*place(c.Modes[i].M, c.Modes[i].N)++
	}
	for i := range c.Modes {
		k := &c.Modes[i]
		if *place(k.M, k.N) < parts(k.M) {
			continue
		}
		// A smaller disc of a clamped edge is drawn out to the ring, as by NewWet.
		cos, sin, _ := k.Coefficients()
		omega := 2 * math.Pi * k.Frequency
		w.Mixed = append(w.Mixed, MixedMode{M: k.M, N: k.N, Upper: k.Upper, Omega: omega, Zeta: k.Damping.Total,
			Strain: omega * omega * k.ModalMass() / tension, Volume: 2 * math.Pi * cos[0][0] / 8, FilmShare: 1,
			Cos: take(cos), Sin: take(sin)})
	}
	for m, list := range even.Orders {
		for _, k := range list {
			if *place(m, k.N) >= parts(m) {
				continue
			}
			mode := MixedMode{M: m, N: k.N, Omega: k.Omega, Zeta: k.Zeta, Strain: k.Strain, Volume: k.Volume, FilmShare: k.FilmShare}
			rows := make([][]float64, m+1)
			rows[m] = k.Shape
			mode.Cos = rows
			w.Mixed = append(w.Mixed, mode)
			if m > 0 {
				mode.Cos, mode.Sin, mode.Volume = nil, rows, 0
				w.Mixed = append(w.Mixed, mode)
			}
		}
	}
	return w
}

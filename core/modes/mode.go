package modes

import "strconv"

// Mode is one mode of a diaphragm, or one degenerate pair.
type Mode struct {
	// M nodal diameters; N nodal circles counting the rim.
	M, N int
	// Zero is j_mn, the n-th positive zero of J_m.
	Zero float64
	// Ideal is the frequency of the ideal sheet in vacuum, Hz.
	Ideal float64
	// Frequency of the diaphragm as it stands, Hz. It is Ideal where no other
	// effect is taken into account.
	Frequency float64
	// CircleRadii of the nodal circles inside the rim, r/a, inside out.
	CircleRadii []float64
}

// NodalLines says in words which nodal lines the mode has inside the rim.
func (m Mode) NodalLines() string {
	circles := m.N - 1
	switch {
	case m.M == 0 && circles == 0:
		return "none inside the rim"
	case circles == 0:
		return counted(m.M, "diameter")
	case m.M == 0:
		return counted(circles, "circle")
	}
	return counted(m.M, "diameter") + ", " + counted(circles, "circle")
}

func counted(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return strconv.Itoa(n) + " " + noun + "s"
}

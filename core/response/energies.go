package response

// energySteps of time in the record of energies.
const energySteps = 121

// Energies are those of the sheet and what moves with it, against time.
type Energies struct {
	// Times, s; Potential and Kinetic, J.
	Times, Potential, Kinetic []float32
	// Orders holds, instant by instant, the energy, J, of each number of nodal
	// diameters m = 0, 1, ...
	Orders []float32
}

// energies records the energies over the duration.
func (mo *motion) energies(c *Case) Energies {
	half := c.Sheet.Tension / 2
	e := Energies{}
	for n := range energySteps {
		time := c.Duration * float64(n) / (energySteps - 1)
		t := time / c.unit()
		s := mo.stage(t)
		l := s.legAt(t)
		orders := make([]float32, c.Orders+1)
		var potential, kinetic float64
		for i := range s.modes {
			k := &s.modes[i]
			q, v, _ := s.within(i, l, t-s.legs[l].from)
			u, w := k.norm*k.omega*k.omega*q*q*half, k.norm*v*v*half
			potential += u
			kinetic += w
			orders[min(k.m, c.Orders)] += float32(u + w)
		}
		e.Times, e.Potential, e.Kinetic = append(e.Times, float32(time)), append(e.Potential, float32(potential)), append(e.Kinetic, float32(kinetic))
		e.Orders = append(e.Orders, orders...)
	}
	return e
}

package modes

import "errors"

// Cost is the frequency of one mode with one effect more than the entry before.
type Cost struct {
	Effect    string // "ideal", "stiffness", "fluid", "sound", "cavity"
	Frequency float64
	// Change from the entry before, relative.
	Change float64
}

// SolveMode returns one mode, without solving the other orders.
func SolveMode(real Real, effects Effects, m, n int) (RealMode, error) {
	if err := checkReal(real, effects); err != nil {
		return RealMode{}, err
	}
	if m < 0 || m > MaxDiameters || n < 1 || n > MaxCircles {
		return RealMode{}, errBounds
	}
	plan := newWetPlan(real, effects)
	o := plan.order(m, n+1)
	return plan.mode(o, n, plan.refined(o, o.solve(n+1), n)[n-1]), nil
}

var errBounds = errors.New("the nodal diameters asked for must be 0 to 40 and the nodal circles 1 to 20")

// Costs returns the frequency of mode (m, n) of the ideal sheet and then with
// one effect after another, those that the diaphragm has. With a cavity, mode
// (m, n) is the n-th of its order, which may be the cavity's.
func Costs(real Real, m, n int) ([]Cost, error) {
	steps := []struct {
		name string
		has  bool
		turn func(*Effects)
	}{
		{"ideal", true, func(*Effects) {}},
		{"stiffness", real.Stiffness > 0, func(e *Effects) { e.Stiffness = true }},
		{"fluid", real.outside(), func(e *Effects) { e.Fluid = true }},
		{"sound", real.outside(), func(e *Effects) { e.Sound = true }},
		{"cavity", real.cavity(), func(e *Effects) { e.Cavity = true }},
	}
	var effects Effects
	var costs []Cost
	for _, step := range steps {
		if !step.has {
			continue
		}
		step.turn(&effects)
		mode, err := SolveMode(real, effects, m, n)
		if err != nil {
			return nil, err
		}
		cost := Cost{Effect: step.name, Frequency: mode.Frequency}
		if len(costs) > 0 {
			cost.Change = cost.Frequency/costs[len(costs)-1].Frequency - 1
		}
		costs = append(costs, cost)
	}
	return costs, nil
}

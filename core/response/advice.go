package response

import (
	"math"
	"strconv"
)

// Limits of the linear answer, common practice.
const (
	warnStretch   = 0.05 // extra tension relative to T: warn
	refuseStretch = 0.20 // say that the answer is not to be used
	warnSlope     = 0.1
	// notableMiss is the share of the energy outside the chosen modes that is
	// worth a word.
	notableMiss = 0.01
)

// warned is what the computation noticed on its way.
type warned struct {
	steepest                    float64 // largest slope seen
	cappedHistory, coarseSearch bool
}

// assumptions says in words what was assumed.
func (c *Case) assumptions() []string {
	if c.Wet != nil {
		list := append([]string{}, c.Wet.Words...)
		switch {
		case c.Velocity.Kind == ShapeRest || c.Velocity.Peak == 0:
		case c.Impulse:
			list = append(list, "The blow is over before anything has moved; it sets sheet and fluid moving.")
		default:
			list = append(list, "At the start the fluid moves along with the sheet.")
		}
		return append(list,
			say("The motion is the sum of the modes with m = 0 to # nodal diameters and n = 1 to # within each, each with its own damping.", c.Orders, c.Circles))
	}
	list := []string{
		"The sheet is ideal: limp, evenly tensioned, fixed at the rim, without air, stiffness, cavity or attached masses.",
		"The motion is small, so that the tension stays the same.",
		say("The motion is the sum of the modes with m = 0 to # nodal diameters and n = 1 to # nodal circles.", c.Orders, c.Circles),
	}
	if c.Zeta > 0 {
		return append(list, say("Every mode has the damping ratio #.", c.Zeta))
	}
	return append(list, "There is no damping.")
}

// warnings says in words where the answer reaches a limit.
func (c *Case) warnings(s *start, m *Motion, seen warned) []string {
	list := []string{}
	add := func(text string, parts ...any) { list = append(list, say(text, parts...)) }

	energy := m.Energy
	if c.Wet != nil || c.later() {
		// The fluid moves too, and a cavity keeps its share for itself.
		energy = c.Sheet.Tension / 2 * s.moves.strain()
	}
	if stretch := c.extraTension(energy); stretch > refuseStretch {
		add("The motion stretches the sheet: its tension could rise by up to #. This is far beyond small motion; do not use these figures.", percent(stretch))
	} else if stretch > warnStretch {
		add("The motion stretches the sheet: its tension could rise by up to #, which this answer leaves out. Frequencies would be higher and travel smaller.", percent(stretch))
	}
	if seen.steepest > warnSlope && !math.IsInf(seen.steepest, 1) {
		add("The sheet reaches a slope of #; the equations are for slopes well below 0.1.", short2(seen.steepest))
	}

	for _, value := range []struct {
		what   string
		shape  Shape
		form   form
		missed float64
		jumpUp bool // has no finite energy if it jumps
	}{
		{"initial displacement", c.Displacement, s.displacement, m.MissedDisplacement, true},
		{"initial velocity", c.Velocity, s.velocity, m.MissedVelocity, false},
	} {
		if value.shape.Peak == 0 {
			continue
		}
		formula, isFormula := value.form.(*sampled)
		jumps := math.IsInf(value.form.norms().slope, 1)
		if isFormula && formula.leavesRim() {
			add("The formula of the # is not zero at the rim, where the sheet is fixed; it reaches # of its largest value there. The modes bring it to zero with ripples beside the rim.",
				value.what, short2(formula.rim/formula.largest))
		} else if jumps {
			add("The # has a sharp edge. However many modes are taken, their sum overshoots beside it by about 9 % of the jump.", value.what)
		}
		switch {
		case jumps && value.jumpUp:
			add("An unbroken sheet cannot take up an # with a jump: its energy would have no limit. Energies here are those of the chosen modes.", value.what)
		case value.missed > notableMiss:
			add("The chosen modes leave out # of the energy of the #; take more nodal diameters or circles to see finer detail.", percent(value.missed), value.what)
		}
	}
	if spacing := c.Duration / float64(c.Frames-1); spacing > m.Period/4 {
		add("The frames are # ms apart and the period of mode (0, 1) is # ms, so the moving picture may mislead. Take more frames or a shorter duration; travel and histories do not depend on the frames.",
			short2(spacing*1e3), short2(m.Period*1e3))
	}
	if seen.cappedHistory {
		add("The duration is long for the fastest modes: the histories show fewer than 8 instants of their period.")
	}
	if seen.coarseSearch {
		add("The duration is long for the fastest modes: the largest travel was sought at # instants, between which a larger one may have been missed.", mostSearch)
	}
	return list
}

// extraTension bounds the mean extra tension from stretching, relative to T, by
// the energy (J) that the sheet can take up: E h/(1-nu) mean(|grad w|^2)/4, and
// the mean of |grad w|^2 is never more than 2 energy/(pi a^2 T). An initial displacement reaches the
// bound, an initial velocity approaches it.
func (c *Case) extraTension(energy float64) float64 {
	a := c.Sheet.Radius
	mean := 2 * energy / (math.Pi * a * a * c.Sheet.Tension)
	return c.Sheet.Stretch * mean / 4 / c.Sheet.Tension
}

//go:noinline
func percent(share float64) string { return short2(share*100) + " %" }

// short2 writes two significant digits, without an exponent where that is
// short.
func short2(x float64) string {
	if x >= 100 && x < 1e6 {
		return strconv.FormatFloat(math.Round(x), 'f', -1, 64)
	}
	return strconv.FormatFloat(x, 'g', 2, 64)
}

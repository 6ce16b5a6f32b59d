package response

import "math"

// remark says of a source what is assumed and what converges.
func (s *start) remark(c *Case, g *given) {
	add := func(text string) { g.note.Notes = append(g.note.Notes, text) }
	switch g.Kind {
	case SourceDisplacement:
		if g.at > 0 {
			add("Until it is let go a steady force holds this shape; the sheet may move beside it.")
		}
	case SourceRelease:
		if g.at > 0 {
			add("Until it ends the load holds its static displacement; the sheet may move beside it.")
		}
	case SourceVelocity:
		if c.Wet != nil {
			add("The fluid is taken to move along with the sheet.")
		}
	case SourceImpulse, SourceBlow:
		add("The blow is over before anything has moved; it sets sheet and fluid moving.")
	case SourceBody:
		text := "The body meets the mass of the sheet, and of the fluid with it, that the modes used let move under its contact at once"
		if g.Stays {
			add(text + ": it stays without bouncing, moves with the mean of the sheet under it and does not stiffen it; its weight is left out. From then on sheet and body have modes of their own, each with the damping of those it is made of.")
		} else {
			add(text + "; it leaves at the restitution times the speed at which it came, and does not come back.")
		}
	case SourceShake:
		add("Displacements are seen from the ring. Wall and fluid are carried along with it, so that only the inertia of the sheet is left.")
	}
	if form, ok := g.form.(*sampled); ok && form.leavesRim() && g.way == wayDisplacement {
		add("The formula is not zero at the rim, where the sheet is fixed; it reaches " + short2(form.rim/form.largest) +
			" of its largest value there. The modes bring it to zero with ripples beside the rim.")
	}
	jumps := math.IsInf(g.form.norms().slope, 1) && g.scale != 0
	switch {
	case c.Smooth > 0:
		add("Edges are smoothed over " + short2(c.Smooth) + " of the radius, as asked for.")
	case !jumps:
	case g.way == wayDisplacement:
		add("An unbroken sheet cannot take up a displacement with a jump: its energy has no limit, and neither energy nor slope converges. Smooth it, or take a shape without a jump.")
	case g.way == wayVelocity || g.way == wayImpulse:
		add("It has a sharp edge. Displacement and energy converge as modes are added, slowly; the velocity beside the edge overshoots by about 9 % of the jump however many are taken, and the acceleration does not converge.")
	case g.way == wayPressure:
		add("It has a sharp edge, or is not zero at the rim: displacement, slope and velocity converge as modes are added, the acceleration beside the edge does not.")
	}
	if g.note.Missed > notableMiss && !math.IsInf(g.left, 1) {
		add("The modes leave out " + percent(g.note.Missed) + " of its energy.")
	}
}

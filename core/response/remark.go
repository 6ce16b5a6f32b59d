package response

import "math"

// remark says of a source what is assumed and what converges.
func (s *start) remark(c *Case, g *given) {
	add := func(text string, parts ...any) { g.note.Notes = append(g.note.Notes, say(text, parts...)) }
	if text := sourceTable[g.place()].note; text != "" && (g.Kind != SourceVelocity || c.Wet != nil) {
		add(text)
	}
	switch {
	case g.Stays && g.Kind == SourceBody:
		add("It stays without bouncing, moves with the mean of the sheet under it and does not stiffen it; its weight is left out. From then on sheet and body have modes of their own, each with the damping of those it is made of.")
	case g.Kind == SourceBody:
		add("It leaves at the restitution times the speed at which it came, and does not come back.")
	case g.at > 0 && (g.way == wayDisplacement || g.way == wayRelease):
		add("Until then a steady load holds the shape; the sheet may move beside it.")
	}
	form, ok := g.form.(*sampled)
	if ok && form.leavesRim() && g.way == wayDisplacement {
		add("The formula is not zero at the rim, where the sheet is fixed; it reaches # of its largest value there. The modes bring it to zero with ripples beside the rim.", short2(form.rim/form.largest))
	}
	if c.Smooth > 0 {
		add("Edges are smoothed over # of the radius, as asked for.", c.Smooth)
	} else if math.IsInf(g.form.norms().slope, 1) && g.scale != 0 {
		add(sharpNotes[g.way])
	}
	if g.note.Missed > notableMiss && !math.IsInf(g.left, 1) {
		add("The modes leave out # of its energy.", percent(g.note.Missed))
	}
}

// sharpNotes say, by way, what a shape with a jump does to convergence.
var sharpNotes = [...]string{
	wayDisplacement: "An unbroken sheet cannot take up a displacement with a jump: its energy has no limit, and neither energy nor slope converges. Smooth it, or take a shape without a jump.",
	wayVelocity:     sharpSpeed,
	wayImpulse:      sharpSpeed,
	wayPressure:     "It has a sharp edge, or is not zero at the rim: displacement, slope and velocity converge as modes are added, the acceleration beside the edge does not.",
	wayRelease:      "It has a sharp edge, or is not zero at the rim: displacement and slope converge as modes are added.",
}

const sharpSpeed = "It has a sharp edge. Displacement and energy converge as modes are added, slowly; the velocity beside the edge overshoots by about 9 % of the jump however many are taken, and the acceleration does not converge."

package response

import (
	"math"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
)

// given is a source on the modes of a case.
type given struct {
	Source
	prefix string
	way    way
	form   form
	scale  float64 // m, m per a/c, or m per (a/c)^2 by way
	at     float64 // in units of a/c
	coef   []float64
	q      []float64 // by modes: amplitude, speed or load
	left   float64   // energy left out by the modes, in units of T/2
	note   SourceNote
}

// SourceNote is what the computation found out about a source.
type SourceNote struct {
	Kind SourceKind `json:"kind"`
	// Notes say what is assumed and what converges.
	Notes []string `json:"notes"`
	// EffectiveMass, kg, is that with which the sheet meets a body; Momentum,
	// N s, is that given to the sheet.
	EffectiveMass float64 `json:"effectiveMass,omitempty"`
	Momentum      float64 `json:"momentum,omitempty"`
	// Missed is the share of its energy that the modes leave out.
	Missed float64 `json:"missed"`
	// Residual is the root mean square by which a fit misses the measured values,
	// and RimMisfit the largest by which it misses one within a twentieth of the
	// radius from the rim; in the unit of the shape, SI.
	Residual  float64 `json:"residual,omitempty"`
	RimMisfit float64 `json:"rimMisfit,omitempty"`
	// Outliers are the lines of the table that lie far off and are left out of the
	// fit.
	Outliers []int `json:"outliers,omitempty"`
}

// acting is a load or a blow on the modes of a stage.
type acting struct {
	pieces []piece
	force  []float64 // by modes; nil for a blow
	at     float64
	kick   []float64
	shake  float64 // the load on a body of mass sigma a^2 on the sheet
}

// start is the beginning of a motion.
type start struct {
	projector              *projector
	list                   []*given
	displacement, velocity form
	moves                  *motion
	potential, kinetic     float64 // of all modes, in units of T/2; +Inf with a jump
	// of the chosen modes
	keptPotential, keptKinetic float64
	// steepest initial slope per unit of a
	steepest float64
}

// mostStates bounds modes times legs.
const mostStates = 3 << 20

// start projects the sources and joins them to a motion.
func (c *Case) start() (*start, []diaphragm.Problem) {
	basis := basisOf(c.Orders, c.terms())
	s := &start{projector: c.newProjector(basis), displacement: rest{}, velocity: rest{}}
	var problems []diaphragm.Problem
	for _, g := range c.sources() {
		if more := c.project(s.projector, g); len(more) > 0 {
			problems = append(problems, more...)
			continue
		}
		s.list = append(s.list, g)
		switch g.prefix {
		case "displacement.":
			s.displacement = g.form
		case "velocity.":
			s.velocity = g.form
		}
	}
	if len(problems) > 0 {
		return nil, problems
	}
	if problems := s.join(c); problems != nil {
		return nil, problems
	}
	s.account(c)
	return s, nil
}

// project takes a source to the modes.
func (c *Case) project(p *projector, g *given) []diaphragm.Problem {
	unit, a := c.unit(), c.Sheet.Radius
	g.note = SourceNote{Kind: g.Kind, Notes: []string{}}
	shape := g.Shape
	pressure := a * a / c.Sheet.Tension
	switch g.Kind {
	case SourceRelease:
		if shape.Kind == ShapePoint {
			// The force of a pad, spread over it.
			shape.Kind = ShapePatch
			shape.Peak /= math.Pi * shape.Width * shape.Width * a * a
		}
	case SourceShake:
		shape = Shape{Kind: ShapeEven, Peak: -c.Sheet.ArealDensity}
	case SourceFront:
		shape = Shape{Kind: ShapeEven, Peak: shape.Peak}
	}
	var problems []diaphragm.Problem
	if g.form, problems = shape.form(p.basis, g.prefix, a); len(problems) > 0 {
		return problems
	}
	switch g.Kind {
	case SourceDisplacement:
		g.scale = shape.Peak
	case SourceVelocity:
		g.scale = shape.Peak * unit
	case SourceImpulse:
		// Momentum per area over sigma is the velocity that the sheet alone would
		// take.
		g.scale = shape.Peak * unit / c.Sheet.ArealDensity
	case SourceBlow, SourceBody:
		// A momentum of one, or the one given, over the contact.
		g.scale = unit / (c.Sheet.ArealDensity * a * a * contactArea(shape))
		if g.Kind == SourceBlow {
			g.scale *= g.Momentum
			g.note.Momentum = g.Momentum
		}
	default:
		g.scale = shape.Peak * pressure
	}
	g.coef = make([]float64, p.basis.Len())
	g.form.project(p.basis, g.coef)
	for i := range g.coef {
		g.coef[i] *= g.scale
		if c.Smooth > 0 {
			m, n, _ := p.basis.At(i)
			j := p.basis.Zero(m, n) * c.Smooth / 2
			g.coef[i] *= math.Exp(-j * j)
		}
	}
	if g.way == wayDisplacement || g.way == wayVelocity {
		g.q = p.split(g.coef)
	} else {
		g.q = p.struck(g.coef)
	}
	if f, ok := g.form.(*sampled); ok && f.fit != nil {
		f.fit.report(&g.note, shape.Peak)
	}
	g.left = p.left(c, g.way, g.form, g.scale, g.coef, g.q)
	return nil
}

// contactArea is the integral of a patch or bump of peak one over the unit disc.
func contactArea(s Shape) float64 {
	width := math.Min(s.Width, 1-s.Radius)
	area := math.Pi * width * width
	if s.Kind == ShapeBump {
		area /= 4 // 2 times the integral of (1-s^2)^3 s ds
	}
	return area
}

// join makes the motion of all sources.
func (s *start) join(c *Case) []diaphragm.Problem {
	p := s.projector
	begin := make([]state, len(p.modes))
	var acts []acting
	for _, g := range s.list {
		switch g.way {
		case wayDisplacement, wayRelease:
			force := make([]float64, len(g.q))
			for i, v := range g.q {
				w2 := p.modes[i].omega * p.modes[i].omega
				if g.way == wayRelease {
					v /= w2
				}
				begin[i].q += v
				force[i] = v * w2
			}
			if g.at > 0 {
				acts = append(acts, acting{force: force, pieces: []piece{{from: 0, to: g.at, poly: []float64{1}}}})
			}
		case wayVelocity, wayImpulse:
			if g.Kind != SourceBody {
				acts = append(acts, acting{at: g.at, kick: g.q})
			}
		case wayPressure:
			if g.Kind == SourceFront {
				more, problem := c.frontOn(p, g)
				if problem != nil {
					return problem
				}
				acts = append(acts, more...)
				continue
			}
			act := acting{force: g.q, pieces: g.pulse().pieces(g.At, c.unit())}
			if g.Kind == SourceShake {
				act.shake = -c.unit() * c.unit()
			}
			acts = append(acts, act)
		}
	}
	first := &stage{basis: p.basis, modes: slices.Clone(p.modes)}
	count := 0
	for i := range acts {
		count += len(acts[i].pieces) + 1
	}
	if count*len(first.modes) > mostStates {
		return refusal("sources", diaphragm.CodeConflict, -1,
			say("The pulses have # parts, too many for # modes; take a shorter table or fewer modes.", count, len(first.modes)))
	}
	s.moves = &motion{basis: p.basis, stages: []*stage{first}}
	first.act(begin, acts, infinity)
	if problem := s.bodies(c, begin, acts); problem != nil {
		return problem
	}
	s.moves.keep()
	return nil
}

// act cuts the time of a stage into legs and fills the states of its modes.
func (s *stage) act(begin []state, acts []acting, until float64) {
	times := []float64{s.from}
	add := func(t float64) {
		if t > s.from && t < until {
			times = append(times, t)
		}
	}
	var kicks []kick
	for i := range acts {
		a := &acts[i]
		for _, p := range a.pieces {
			add(p.from)
			add(p.to)
		}
		if a.kick != nil && a.at >= s.from && a.at < until {
			add(a.at)
			kicks = append(kicks, kick{a.at, a.kick})
		}
	}
	slices.Sort(times)
	s.legs = nil
	for i, t := range times {
		if i == 0 || t > times[i-1] {
			s.legs = append(s.legs, leg{from: t})
		}
	}
	for i := range s.modes {
		gains := make([]float64, len(acts))
		for k := range acts {
			if acts[k].force != nil {
				gains[k] = acts[k].force[i]
			}
		}
		s.modes[i].gains = gains
	}
	for k := range acts {
		for n := range acts[k].pieces {
			p := &acts[k].pieces[n]
			for l := s.legAt(p.from); l < len(s.legs) && s.legs[l].from < p.to; l++ {
				if t := s.legs[l].from; t >= p.from {
					s.legs[l].loads = append(s.legs[l].loads, p.begun(k, t))
				}
			}
		}
	}
	s.run(begin, kicks, until)
}

// account adds up what the modes hold of the sources and what they leave out.
func (s *start) account(c *Case) {
	p := s.projector
	var sums [2][]float64 // displacements, speeds
	var left [2]float64   // roots of energies, which at most add
	add := func(k int, q []float64, over func(i int) float64, g *given) {
		if sums[k] == nil {
			sums[k] = make([]float64, len(p.modes))
		}
		own := make([]float64, len(q))
		for i, v := range q {
			own[i] = v / over(i)
			sums[k][i] += own[i]
		}
		left[k] += math.Sqrt(g.left)
		g.note.Missed = missed(p.energy(own, k), p.energy(own, k)+g.left)
	}
	one := func(int) float64 { return 1 }
	for _, g := range s.list {
		switch g.way {
		case wayDisplacement:
			add(0, g.q, one, g)
			s.steepest += times(math.Abs(g.scale), g.form.norms().steepest)
		case wayVelocity, wayImpulse:
			add(1, g.q, one, g)
		default:
			// The static displacement.
			add(0, g.q, func(i int) float64 { return p.modes[i].omega * p.modes[i].omega }, g)
		}
	}
	if sums[0] != nil {
		s.keptPotential = p.energy(sums[0], 0)
	}
	if sums[1] != nil {
		s.keptKinetic = p.energy(sums[1], 1)
	}
	s.potential = s.keptPotential + left[0]*left[0]
	s.kinetic = s.keptKinetic + left[1]*left[1]
}

// byTime puts the earlier source first.
func byTime(list []*given) {
	sorting.By(list, func(p, q *given) int {
		switch {
		case p.at < q.at:
			return -1
		case p.at > q.at:
			return 1
		}
		return 0
	})
}

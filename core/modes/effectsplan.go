package modes

import (
	"math"

	"hoopsheet/core/diaphragm"
)

// wetPlan is a diaphragm with the wanted effects, ready to be solved order by
// order.
type wetPlan struct {
	real    Real
	effects Effects
	// thin: a clamped edge is taken as a ring smaller by sqrt(D/T), radius being
	// what is left.
	thin   bool
	radius float64
	faces  []Face // those with fluid
}

// thinEdge is sqrt(D/T)/a below which a clamped edge is treated to first order.
// Above it the boundary layer is resolved.
const thinEdge = 1e-3

func newWetPlan(real Real, effects Effects) *wetPlan {
	p := &wetPlan{real: real, effects: effects, radius: real.Radius}
	if p.real.Rim == "" {
		p.real.Rim = RimClamped
	}
	if !effects.Stiffness {
		p.real.Stiffness = 0
	}
	if edge := p.edge(); p.real.Rim == RimClamped && edge > 0 && edge < thinEdge {
		p.thin = true
		p.radius *= 1 - edge
	}
	for _, f := range []Face{real.Upper, real.Lower} {
		wanted := effects.Fluid
		switch f.Kind {
		case diaphragm.FaceCavity:
			wanted = effects.Cavity
		case diaphragm.FaceVacuum, "":
			wanted = false
		}
		if wanted && f.Density > 0 {
			p.faces = append(p.faces, f)
		}
	}
	return p
}

// edge returns sqrt(D/T)/a, the width of the bent zone at a clamped rim.
func (p *wetPlan) edge() float64 {
	if p.real.Stiffness == 0 {
		return 0
	}
	return math.Sqrt(p.real.Stiffness/p.real.Tension) / p.real.Radius
}

// edgeError bounds the relative error of a frequency from taking a clamped edge
// as a smaller ring, for zero j_mn of the ideal sheet (TestThinEdge).
func (p *wetPlan) edgeError(zero float64) float64 {
	if !p.thin {
		return 0
	}
	e := p.edge()
	return e * e * (10 + zero*zero/8)
}

// shapes returns how many shapes the first count modes of order m take.
func (p *wetPlan) shapes(m, count int) int {
	// A mode n has a polynomial of degree m + 2j; 2 count + 6 + m/6 shapes leave
	// 1e-9 of the frequency of the last in vacuum, far less of those before
	// (TestShapeCount).
	n := 2*count + 5 + m/6
	if e := p.edge(); e > 0 && !p.thin && p.real.Rim == RimClamped {
		// The bent zone of width e takes 2 e^-1/2.
		n = max(n, 6+int(math.Ceil(2/math.Sqrt(e))))
	}
	for _, f := range p.faces {
		if f.Kind == diaphragm.FaceOpen {
			n += 4 // its pressure is not a polynomial at the rim
			break
		}
	}
	return n + n%2 // few different sizes, so that tables are shared
}

// order sets up order m for count modes.
func (p *wetPlan) order(m, count int) *wetOrder {
	n := p.shapes(m, count)
	live := n
	if l := 2*count + 4 + m/12; l < n {
		live = l // the rest changes no frequency by more than liveError
	}
	a, r := p.radius, p.real
	nu, rim := r.Poisson, r.Rim
	if p.thin {
		nu, rim = 1, RimSupported // bending of the inner part alone
	}
	o := &wetOrder{
		m: m, tables: tablesOf(m, n), radius: a, sheet: r.ArealDensity * a * a, sound: 1, live: live,
		strain: newStrain(m, n, r.Tension, r.Stiffness/(a*a), nu, rim),
	}
	open := false
	liveTables := tablesOf(m, live)
	edge := 0.0
	if p.thin {
		edge = p.edge()
	}
	for _, f := range p.faces {
		reach := 0.0
		if p.effects.Sound && !math.IsInf(f.SoundSpeed, 1) {
			reach = a / f.SoundSpeed
		}
		switch f.Kind {
		case diaphragm.FaceBaffled:
			if f.WallDistance > 0 {
				o.addWall(f)
				continue
			}
			o.faces = append(o.faces, &baffledFace{tables: o.tables, live: liveTables, density: f.Density * a * a * a, reach: reach})
		case diaphragm.FaceOpen:
			if !open { // one for both sides
				open, o.open = true, true
				b := r.Radius
				o.faces = append(o.faces, &openFaces{
					tables: o.tables, live: liveTables, edge: edge, density: f.Density * b * b * b, reach: reach * b / a,
				})
			}
		case diaphragm.FaceCavity:
			o.addCavity(f, r.Radius, edge)
		}
	}
	return o
}

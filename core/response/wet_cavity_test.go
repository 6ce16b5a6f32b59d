package response

import (
	"math"
	"testing"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
)

// shallow is a film over a closed cavity, vacuum on the other side.
func shallow(depth, tension, sigma float64) modes.Real {
	return modes.Real{Radius: 0.5, Tension: tension, ArealDensity: sigma,
		Upper: modes.Face{Kind: diaphragm.FaceVacuum},
		Lower: modes.Face{Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343, Depth: depth}}
}

func TestReleasedOverACavity(t *testing.T) {
	// A bulge w (1-r^2) held still stores T/2 2 pi w^2 in the film and, its volume
	// being pi a^2 w/2, rho c0^2 V^2/(2 pi a^2 L) in the cavity (adiabatic spring).
	const w = 1e-4
	for _, depth := range []float64{0.1, 0.5, 2} {
		window := shallow(depth, 3000, 2)
		c := wetCase(window, NewWet(solved(t, window, stillFluid, 0, 20), nil, true, 0, 20), 0, 20, Shape{Kind: ShapeBulge, Peak: w}, Shape{Kind: ShapeRest})
		c.Sheet.Stretch = 2e5
		c.Duration = 3 * c.period()
		m := respond(t, c)
		volume := math.Pi * 0.25 * w / 2
		film, air := 3000.0/2*2*math.Pi*w*w, 1.2*343*343*volume*volume/(2*math.Pi*0.25*depth)
		// The modes are orthogonal, so the energy held is the whole less what is
		// stated to be missed. The volume is that of 20 Bessel functions, which for
		// coefficients 8/(j^3 J_1) leave out the sum of 32/j^4 beyond: less than
		// 32/(3 pi j^3) at the 20th, of which the energy has twice the share.
		j := basisOf(0, 20).Zero(0, 20)
		if got := m.Energy / (1 - m.MissedDisplacement); math.Abs(got/(film+air)-1) > 2*32/(3*math.Pi*j*j*j) {
			t.Errorf("depth %v: energy %v with what is missed, film %v and air %v", depth, got, film, air)
		}
		if m.MissedDisplacement > 0.02 {
			t.Errorf("depth %v: %v missed", depth, m.MissedDisplacement)
		}
		// For f of m = 0 that vanishes at the rim, f(r)^2 <= ln(1/r)/(2 pi) times the
		// integral of |grad f|^2 (Cauchy and Schwarz), which the missed strain bounds.
		mo := started(t, c).moves
		for _, r := range []float64{0.1, 0.4, 0.8} {
			within := math.Sqrt(math.Log(1/r) / (2 * math.Pi) * m.MissedDisplacement * (film + air) * 2 / 3000)
			if got := mo.probe(r, 0, 0).w; math.Abs(got-w*(1-r*r)) > within {
				t.Errorf("depth %v: starts at %v at radius %v, want %v within %v", depth, got, r, w*(1-r*r), within)
			}
		}
		sum := 0.0
		for _, share := range m.Strongest {
			sum += share.Share
		}
		if sum > 1+1e-12 || sum < 0.9 {
			t.Errorf("depth %v: shares add up to %v", depth, sum)
		}
		// The film alone can hold no more than its modes reach: far less than the
		// energy where the air holds most.
		strain := 3000.0 / 2 * mo.strain()
		if strain > m.Energy || strain < film*0.9 {
			t.Errorf("depth %v: the film may hold %v of %v, at the start %v", depth, strain, m.Energy, film)
		}
	}
}

func TestShallowCavityLiftsTheFirstMode(t *testing.T) {
	// With a heavy film the air is a spring only, and with the shape 1-r^2 or
	// J_0(j r) Rayleigh's quotient bounds omega^2 of the first mode from above:
	// (2 pi T + spring of the mean) over (sigma a^2 times the integral of the
	// square); a shape kept from moving volume bounds the others. The motion
	// after a release passes through zero a quarter period on.
	window := shallow(0.5, 3000, 50)
	solution := solved(t, window, stillFluid, 0, 20)
	c := wetCase(window, NewWet(solution, nil, true, 0, 20), 0, 20, Shape{Kind: ShapeBulge, Peak: 1e-4}, Shape{Kind: ShapeRest})
	spring := c.Wet.CavitySpring
	if want := 1.2 * 343 * 343 * 0.25 / (math.Pi * 0.5 * 3000); math.Abs(spring-want) > 1e-12*want {
		t.Errorf("spring %v, want %v", spring, want)
	}
	j := basisOf(0, 1).Zero(0, 1)
	norm, volume := basisOf(0, 1).Norm(0, 1), volumeOf(basisOf(0, 1), 1)
	most := (j*j*norm + spring*volume*volume) / norm
	omega := 2 * math.Pi / c.period() * c.unit()
	if omega*omega > most || omega*omega < 0.6*most {
		t.Errorf("omega^2 %v, Rayleigh's quotient %v", omega*omega, most)
	}
	// The air's mass is rho L/(3 sigma) of the film's: 0.4 %.
	vacuum := j * j
	if omega*omega < 1.2*vacuum {
		t.Errorf("omega^2 %v, without cavity %v", omega*omega, vacuum)
	}
}

func TestVentedCavityHoldsNothing(t *testing.T) {
	// A slow displacement over a vented cavity stores nothing in the air.
	window := windows()["vented"]
	c := wetCase(window, NewWet(solved(t, window, stillFluid, 0, 20), nil, true, 0, 20), 0, 20, Shape{Kind: ShapeBulge, Peak: 1e-4}, Shape{Kind: ShapeRest})
	if !c.Wet.Cavity || c.Wet.CavitySpring != 0 {
		t.Errorf("cavity %v with spring %v", c.Wet.Cavity, c.Wet.CavitySpring)
	}
	m := respond(t, c)
	film := 300.0 / 2 * 2 * math.Pi * 1e-8
	if got := m.Energy / (1 - m.MissedDisplacement); math.Abs(got/film-1) > 1e-6 {
		t.Errorf("energy %v, film %v", got, film)
	}
}

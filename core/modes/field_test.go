package modes

import (
	"math"
	"testing"
)

// Equilibrium by differences: dN_rr/dr + (N_rr - N_tt)/r + dN_rt/(r dtheta) +
// load_r = 0 and dN_rt/dr + 2 N_rt/r + dN_tt/(r dtheta) + load_t = 0
// (Timoshenko & Goodier, art. 27, eq. 37).
func TestFieldEquilibrium(t *testing.T) {
	const h = 1e-4
	for name, c := range map[string]struct {
		field Field
		pull  float64 // of a load along angle 0.3
	}{
		"sliding 2":    {SlidingHarmonic(2, 0.2, 0.3), 0},
		"sliding 5":    {SlidingHarmonic(5, 0.2, -1), 0},
		"bonded 1":     {BondedHarmonic(1, 0.2, 0.3, 0.4), 0},
		"bonded 4":     {BondedHarmonic(4, 0.2, 2, 0.3), 0},
		"own weight":   {OwnWeight(0.3, 0.3, 0.38), 0.3},
		"warp weft":    {WarpWeft(0.25, 0.7), 0},
		"several":      {append(SlidingHarmonic(3, 0.1, 0), WarpWeft(0.1, 1)...), 0},
		"own weight 0": {OwnWeight(0.3, 0.3, 0), 0.3},
	} {
		for _, r := range []float64{0.2, 0.55, 0.9} {
			for _, theta := range []float64{0.1, 1.7, 4} {
				rr, tt, rt := c.field.At(r, theta)
				rr1, _, rt1 := c.field.At(r+h, theta)
				rr0, _, rt0 := c.field.At(r-h, theta)
				_, ttB, rtB := c.field.At(r, theta+h)
				_, ttA, rtA := c.field.At(r, theta-h)
				radial := (rr1-rr0)/(2*h) + (rr-tt)/r + (rtB-rtA)/(2*h*r) + c.pull*math.Cos(theta-0.3)
				along := (rt1-rt0)/(2*h) + 2*rt/r + (ttB-ttA)/(2*h*r) - c.pull*math.Sin(theta-0.3)
				// Central differences err by h^2/6 times third derivatives, below 200.
				if bound := h * h / 6 * 200; math.Abs(radial) > bound || math.Abs(along) > bound {
					t.Errorf("%s at %v, %v: %g radial, %g along", name, r, theta, radial, along)
				}
			}
		}
	}
}

// What the fields do at the rim, and compatibility: without load the sum of the
// two tensions is harmonic; with an even load p too, for it has constant
// divergence.
func TestFieldRim(t *testing.T) {
	for k := 2; k < 8; k++ {
		for _, theta := range []float64{0, 0.3, 1, 2.5} {
			rr, _, rt := SlidingHarmonic(k, 0.1, 0.2).At(1, theta)
			if want := 1 + 0.1*math.Cos(float64(k)*(theta-0.2)); math.Abs(rr-want) > 1e-14 || math.Abs(rt) > 1e-14 {
				t.Errorf("sliding k=%d: N_rr %v, want %v; N_rt %g", k, rr, want, rt)
			}
		}
	}
	for k := 1; k < 8; k++ {
		const nu, stretch, T, a, u = 0.35, 5000.0, 200.0, 1.5, 0.002
		eps := BondedTension(k, u, stretch, nu, T, a)
		field := BondedHarmonic(k, eps, 0, nu)
		if rr, _, _ := field.At(1, 0); math.Abs(rr-1-eps) > 1e-13 {
			t.Errorf("bonded k=%d: radial tension varies by %v, want %v", k, rr-1, eps)
		}
		// Strain along the rim: u_r/a, since nothing slips there.
		rr, tt, _ := field.At(1, 0)
		strain := T / stretch * ((tt - 1) - nu*(rr-1))
		if math.Abs(strain/(u/a)-1) > 1e-12 {
			t.Errorf("bonded k=%d: strain along the rim %v, want %v", k, strain, u/a)
		}
		harmonicSum(t, field)
	}
	harmonicSum(t, SlidingHarmonic(4, 0.3, 1))
	// Own weight: strain along the rim vanishes, and shear and radial tension at
	// the rim together carry the weight: integral (N_rr cos - N_rt sin) = -pi pull.
	for _, nu := range []float64{0, 0.3, 0.5} {
		field := OwnWeight(0.2, 0, nu)
		sum := 0.0
		for i := range 64 {
			theta := 2 * math.Pi * float64(i) / 64
			rr, tt, rt := field.At(1, theta)
			if strain := (tt - 1) - nu*(rr-1); math.Abs(strain) > 1e-15 {
				t.Errorf("own weight, nu %v: strain %g along the rim", nu, strain)
			}
			sum += (rr*math.Cos(theta) - rt*math.Sin(theta)) * 2 * math.Pi / 64
		}
		if math.Abs(sum+math.Pi*0.2) > 1e-14 {
			t.Errorf("own weight, nu %v: the rim carries %v, want %v", nu, -sum, math.Pi*0.2)
		}
	}
}

// harmonicSum checks that N_rr + N_tt is harmonic by its mean on a circle.
func harmonicSum(t *testing.T, field Field) {
	t.Helper()
	x, y := 0.35, 0.2
	sum := func(x, y float64) float64 {
		rr, tt, _ := field.At(math.Hypot(x, y), math.Atan2(y, x))
		return rr + tt
	}
	mean := 0.0
	for i := range 64 {
		s, c := math.Sincos(2 * math.Pi * float64(i) / 64)
		mean += sum(x+0.3*c, y+0.3*s) / 64
	}
	if math.Abs(mean-sum(x, y)) > 1e-13 {
		t.Errorf("mean on a circle differs from the centre by %g", mean-sum(x, y))
	}
}

func TestFieldExtremes(t *testing.T) {
	// Sliding k = 2 has N_rr = 1 + eps cos 2theta and N_tt = 1 + eps (2r^2 - 1)
	// cos 2theta, N_rt = eps (r^2-1) sin 2theta: smallest 1 - eps at the rim or
	// the centre, largest 1 + eps.
	for _, c := range []struct {
		field    Field
		low, top float64
	}{
		{nil, 1, 1},
		{SlidingHarmonic(2, 0.3, 0.5), 0.7, 1.3},
		{WarpWeft(0.25, 1.1), 0.75, 1.25},
		// k = 3: N_tt at the rim varies by eps too.
		{SlidingHarmonic(3, 0.3, 0), 0.7, 1.3},
		// At the rim, in line with the weight: 1 -+ 2 pull/(3-nu).
		{OwnWeight(0.27, 0.4, 0.3), 0.8, 1.2},
	} {
		low, top := c.field.Extremes()
		if math.Abs(low.Value-c.low) > 1e-6 || math.Abs(top.Value-c.top) > 1e-6 {
			t.Errorf("%v: tension from %v to %v, want %v to %v", c.field, low.Value, top.Value, c.low, c.top)
		}
	}
	low, top := WarpWeft(0.25, 1.1).Extremes()
	if math.Abs(top.Direction-1.1) > 1e-9 || math.Abs(low.Direction-1.1-math.Pi/2) > 1e-9 {
		t.Errorf("tension is largest along %v and smallest along %v", top.Direction, low.Direction)
	}
	low, _ = OwnWeight(0.27, 0.4, 0.3).Extremes()
	if math.Abs(low.Angle-0.4) > 1e-3 || low.Radius != 1 {
		t.Errorf("a hanging sheet is slackest at r=%v, angle %v", low.Radius, low.Angle)
	}
	if got := WarpWeftRatio(1.5); math.Abs(1.5*(1-got)-(1+got)) > 1e-15 {
		t.Errorf("ratio 1.5 gives %v", got)
	}
}

package modes

import "math"

// Field is how the line tension of a sheet departs from the even tension T, as a
// sum of parts; no part is an even sheet. All figures are relative to T. With r
// scaled by the radius, the tensions are
//
//	N_rr/T = 1 + sum RR r^p cos k(theta - Angle),
//	N_tt/T = 1 + sum TT r^p cos k(theta - Angle),
//	N_rt/T =     sum RT r^p sin k(theta - Angle).
//
// The fields made by the functions of this file satisfy equilibrium in the full
// disc. They do not hold for a sheet with a hub, which needs r^-k terms too.
type Field []Part

// Part is one harmonic and one power of a field.
type Part struct {
	K          int     // harmonic k >= 0
	Angle      float64 // rad
	Power      int     // p >= 0, with p - k even and p >= k-2
	RR, TT, RT float64
}

// SlidingHarmonic is the field of a rim free of shear whose radial tension is
// T (1 + eps cos k(theta - angle)): clamps that can follow the sheet sideways.
// It is elastic for every Poisson's ratio. It panics unless k >= 2; without
// shear the rim cannot balance k = 1.
func SlidingHarmonic(k int, eps, angle float64) Field {
	if k < 2 {
		panic("modes: a rim free of shear has harmonics from 2 on")
	}
	f := float64(k)
	return airy(k, angle, -eps/(2*(f-1)), eps/(2*(f+1)))
}

// BondedHarmonic is the field of a rim that was moved in or out like
// cos k(theta - angle) and lets nothing slip, where eps is the relative
// variation of the radial tension at the rim and nu Poisson's ratio. k >= 1; it
// panics for k < 1. BondedTension gives eps for a known displacement.
func BondedHarmonic(k int, eps, angle, nu float64) Field {
	a, b, rim := bonded(k, nu)
	return airy(k, angle, a*eps/rim, b*eps/rim)
}

// BondedTension returns the relative variation eps of the radial tension at the
// rim for a radial displacement of amplitude u (m, outwards), membrane stiffness
// stretch = E h (N/m), tension T (N/m) and radius a (m).
func BondedTension(k int, u, stretch, nu, T, a float64) float64 {
	_, b, rim := bonded(k, nu)
	return u / a * stretch / T / (b * (6 - 2*nu)) * rim
}

// bonded returns the two constants of Airy's function and the radial tension
// they give at the rim.
func bonded(k int, nu float64) (a, b, rim float64) {
	if k < 1 {
		panic("modes: harmonics of a bonded rim start at 1")
	}
	// Displacements of airy, times E h: radial
	//
	//	-[A k (1+nu) r^(k-1) + B (k-2 + nu(k+2)) r^(k+1)] cos k theta
	//
	// and along [A k (1+nu) r^(k-1) + B (k+4 + nu k) r^(k+1)] sin k theta. No
	// slip makes the second vanish at r = 1, and the first is then B (6-2 nu).
	// For k = 1 the A term is a rigid shift without tension.
	f := float64(k)
	b = 1
	if k > 1 {
		a = -(f + 4 + nu*f) / (f * (1 + nu))
	}
	return a, b, a*f*(1-f) + b*(2-f)*(f+1)
}

// airy is the field of the stress function (A r^k + B r^(k+2)) cos k theta.
func airy(k int, angle, a, b float64) Field {
	// Timoshenko & Goodier, Theory of Elasticity, 3rd ed. (1970), art. 43.
	f := float64(k)
	field := Field{{K: k, Angle: angle, Power: k, RR: b * (2 - f) * (f + 1), TT: b * (f + 2) * (f + 1), RT: b * f * (f + 1)}}
	if a != 0 {
		field = append(field, Part{K: k, Angle: angle, Power: k - 2, RR: a * f * (1 - f), TT: a * f * (f - 1), RT: a * f * (f - 1)})
	}
	return field
}

// OwnWeight is the field of a sheet that hangs vertical in a bonded rim: pull =
// sigma g a/T, with down the angle of the vertical (rad) and nu Poisson's ratio.
// The tension is higher above.
func OwnWeight(pull, down, nu float64) Field {
	// A displacement (1 - r^2) along the vertical satisfies Navier's equations
	// under an even load and vanishes on the rim. Its strain along theta is zero,
	// so N_tt = nu N_rr.
	c := pull / (3 - nu)
	return Field{{K: 1, Angle: down, Power: 1, RR: -2 * c, TT: -2 * nu * c, RT: c * (1 - nu)}}
}

// WarpWeft is the field of a fabric with even tensions T (1 + eps) along the
// warp, at the given angle (rad), and T (1 - eps) across it.
func WarpWeft(eps, angle float64) Field {
	return Field{{K: 2, Angle: angle, Power: 0, RR: eps, TT: -eps, RT: -eps}}
}

// WarpWeftRatio returns the eps of WarpWeft for a ratio of warp to weft tension
// whose mean is T.
func WarpWeftRatio(ratio float64) float64 { return (ratio - 1) / (ratio + 1) }

// At returns N_rr, N_tt and N_rt over T at radius r (0 to 1) and angle theta.
func (f Field) At(r, theta float64) (rr, tt, rt float64) {
	rr, tt = 1, 1
	for _, p := range f {
		power := math.Pow(r, float64(p.Power))
		s, c := math.Sincos(float64(p.K) * (theta - p.Angle))
		rr += p.RR * power * c
		tt += p.TT * power * c
		rt += p.RT * power * s
	}
	return rr, tt, rt
}

// turned returns the field seen from axes turned by angle.
func (f Field) turned(angle float64) Field {
	g := make(Field, len(f))
	for i, p := range f {
		p.Angle -= angle
		g[i] = p
	}
	return g
}

// even tells whether the field has no part that is not zero.
func (f Field) even() bool {
	for _, p := range f {
		if p.RR != 0 || p.TT != 0 || p.RT != 0 {
			return false
		}
	}
	return true
}

// Tautness is a principal tension over T and where it is.
type Tautness struct {
	Value         float64
	Radius, Angle float64 // r/a, rad
	// Direction of the tension, rad.
	Direction float64
}

// Extremes returns the smallest and the largest principal tension over the
// sheet, over T, with their places. Values are good to 1e-6 of the field's
// variation.
func (f Field) Extremes() (smallest, largest Tautness) {
	highest := 1
	for _, p := range f {
		highest = max(highest, p.K, p.Power)
	}
	// A grid of eight points to the shortest wave, then a search around the best
	// that halves its step.
	nr, nt := 8*highest+8, 16*highest
	sample := func(r, theta float64, sign float64) Tautness {
		rr, tt, rt := f.At(r, theta)
		turn := math.Atan2(2*rt, rr-tt) / 2
		if sign < 0 {
			turn += math.Pi / 2
		}
		return Tautness{Value: principal(rr, tt, rt, sign), Radius: r, Angle: theta, Direction: theta + turn}
	}
	best := [2]Tautness{sample(0, 0, -1), sample(0, 0, 1)}
	// A margin, so that a place is not chosen by rounding.
	better := func(side int, value float64) bool {
		return float64(2*side-1)*(value-best[side].Value) > 1e-13*(1+math.Abs(best[side].Value))
	}
	cos, sin := zeros(nt*len(f)), zeros(nt*len(f)) // of each part, by angle
	for j := range nt {
		for i, p := range f {
			sin[j*len(f)+i], cos[j*len(f)+i] = math.Sincos(float64(p.K) * (2*math.Pi*float64(j)/float64(nt) - p.Angle))
		}
	}
	power := zeros(len(f))
	for i := nr; i >= 0; i-- {
		r := float64(i) / float64(nr)
		for k, p := range f {
			power[k] = math.Pow(r, float64(p.Power))
		}
		for j := range nt {
			rr, tt, rt := 1.0, 1.0, 0.0
			for k, p := range f {
				c, s := power[k]*cos[j*len(f)+k], power[k]*sin[j*len(f)+k]
				rr += p.RR * c
				tt += p.TT * c
				rt += p.RT * s
			}
			for side := range 2 {
				if sign := float64(2*side - 1); better(side, principal(rr, tt, rt, sign)) {
					best[side] = sample(r, 2*math.Pi*float64(j)/float64(nt), sign)
				}
			}
		}
	}
	for side := range best {
		b := &best[side]
		dr, dt := 1/float64(nr), 2*math.Pi/float64(nt)
		for range 30 {
			at := *b
			moved := false
			for _, step := range [4][2]float64{{dr, 0}, {-dr, 0}, {0, dt}, {0, -dt}} {
				r := math.Min(1, math.Max(0, at.Radius+step[0]))
				if t := sample(r, at.Angle+step[1], float64(2*side-1)); better(side, t.Value) {
					*b, moved = t, true
				}
			}
			if !moved {
				dr, dt = dr/2, dt/2
			}
		}
		b.Angle, b.Direction = wrap(b.Angle, 2*math.Pi), wrap(b.Direction, math.Pi)
	}
	return best[0], best[1]
}

// principal is the smaller (sign -1) or larger principal value.
func principal(rr, tt, rt, sign float64) float64 {
	return (rr+tt)/2 + sign*math.Hypot((rr-tt)/2, rt)
}

// wrap returns x less whole turns, from 0 up to but not including turn.
func wrap(x, turn float64) float64 {
	x = math.Mod(x, turn)
	if x < 0 {
		x += turn
	}
	if x >= turn {
		x = 0
	}
	return x
}

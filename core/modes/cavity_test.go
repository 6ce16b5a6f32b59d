package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

func TestCavityClosedVolume(t *testing.T) {
	// A kettledrum head over a closed volume whose pressure is even: J_0(x) =
	// -B J_2(x)/x^2, B = rho c0^2 pi a^4/(T V). Morse, Vibration and Sound; the
	// roots recomputed with mpmath (the often printed 5.87 for B = 10, n = 2 is
	// wrong). The limit is a light gas with a high speed of sound at fixed
	// rho c0^2: its mass is 1e-7 of the sheet's and its radial resonances lie 1e4
	// times above, which leaves 1e-7.
	for _, c := range []struct {
		b     float64
		roots [3]float64
	}{
		{1, [3]float64{2.54367474, 5.53227488, 8.65685187}},
		{2, [3]float64{2.67355798, 5.5451084, 8.66005309}},
		{5, [3]float64{3.01972499, 5.58780378, 8.67014751}},
		{10, [3]float64{3.487426, 5.67529808, 8.68878747}},
	} {
		const density, speed, depth = 1e-7, 1e5, 0.5
		tension := density * speed * speed / (c.b * depth)
		r := Real{Radius: 1, Tension: tension, ArealDensity: 1, Lower: Face{
			Kind: diaphragm.FaceCavity, Density: density, SoundSpeed: speed, Depth: depth,
		}}
		s := solve(t, r, Request{MaxN: 3, Effects: AllEffects()})
		for i, want := range c.roots {
			got := 2 * math.Pi * modeOf(t, s, 0, i+1).Frequency / math.Sqrt(tension)
			if math.Abs(got-want) > 1e-7*want {
				t.Errorf("B = %v, (0,%d): %.10g, want %.9g", c.b, i+1, got, want)
			}
		}
	}
}

// cavityEquation is the exact frequency equation of a limp sheet with vacuum
// above and a cavity below, an ordinary function of omega:
//
//	w = J_m(alpha r) + sum_q a_q J_m(k_q r),  alpha = omega sqrt(sigma/T),
//	a_q (sigma + rho mu_q - T k_q^2/omega^2) = -rho mu_q h_q,  w(1) = 0,
//
// h_q being the part of J_m(alpha r) in J_m(k_q r) and mu_q the cavity's mass
// per area over rho. Radius 1.
func cavityEquation(zeros []float64, m int, T, sigma, rho, c0, depth, omega float64) float64 {
	alpha := omega * math.Sqrt(sigma/T)
	slope := alpha * bessel.JPrime(float64(m), alpha)
	sum := bessel.JInt(m, alpha)
	k0 := omega / c0
	term := func(k float64) float64 {
		var mu float64
		if k > k0 {
			x := math.Sqrt((k - k0) * (k + k0))
			mu = 1 / (x * math.Tanh(x*depth))
		} else {
			x := math.Sqrt((k0 - k) * (k0 + k))
			mu = -1 / (x * math.Tan(x*depth))
		}
		// J_m(k)^2 over the norm of J_m(k r).
		share := 2 / (1 - float64(m*m)/(k*k))
		if k == 0 {
			share = 2
		}
		h := -slope * share / (alpha*alpha - k*k)
		return -rho * mu * h / (sigma + rho*mu - T*k*k/(omega*omega))
	}
	for _, k := range zeros {
		sum += term(k)
	}
	// Terms fall off like k^-5: the rest as an integral from half way.
	last := zeros[len(zeros)-1] + math.Pi/2
	sum += term(last) * last / (4 * math.Pi)
	// alpha = k_q gives w = 0 everywhere, with the slope a factor of all of it.
	return sum / slope
}

func TestCavityExact(t *testing.T) {
	// The wet solver against the exact equation: every mode it returns is a root,
	// and there are no others below the last.
	const sigma, radius = 0.032, 1.0
	for _, c := range []struct {
		tension, density, depth float64
	}{
		{180, 1.2, 0.01}, {180, 1.2, 0.1}, {180, 1.2, 0.5}, {180, 1.2, 2}, {180, 1.2, 8},
		{3000, 1.2, 0.3}, {3000, 1.2, 3}, {180, 0.001, 0.5}, {180, 32, 1},
	} {
		for _, m := range []int{0, 1, 3} {
			zeros := make([]float64, 3000)
			if m == 0 {
				bessel.ZerosJPrime(zeros[1:], 0)
			} else {
				bessel.ZerosJPrime(zeros, float64(m))
			}
			const speed = 343
			r := Real{Radius: radius, Tension: c.tension, ArealDensity: sigma, Lower: Face{
				Kind: diaphragm.FaceCavity, Density: c.density, SoundSpeed: speed, Depth: c.depth,
			}}
			const count = 5
			s := solve(t, r, Request{MaxM: m, MaxN: count, Effects: AllEffects()})
			equation := func(f float64) float64 {
				return cavityEquation(zeros, m, c.tension, sigma, c.density, speed, c.depth, 2*math.Pi*f)
			}
			for n := 1; n <= count; n++ {
				f := modeOf(t, s, m, n).Frequency
				// Ten digits: the sign changes within 1e-9 of the frequency, and by a
				// zero, not a pole.
				const near = 1e-9
				lo, mid, hi := equation(f*(1-near)), equation(f), equation(f*(1+near))
				if (lo > 0) == (hi > 0) || math.Abs(mid) > math.Max(math.Abs(lo), math.Abs(hi)) {
					t.Errorf("%+v (%d,%d): %.12g Hz is no root: %g %g %g", c, m, n, f, lo, mid, hi)
				}
			}
			// Completeness: sign changes that are zeros on a fine grid.
			last := modeOf(t, s, m, count).Frequency
			found := 0
			const steps = 6000
			zeros = zeros[:200] // good to 1e-7, enough to count
			before := equation(last * 1e-3)
			for i := 1; i <= steps; i++ {
				f := last * (1e-3 + (1+1e-6-1e-3)*float64(i)/steps)
				now := equation(f)
				if (now > 0) != (before > 0) {
					a, b := f-last*(1-1e-3)/steps, f
					x := root(equation, a, b)
					if math.Abs(equation(x)) <= math.Min(math.Abs(before), math.Abs(now)) {
						found++
					}
				}
				before = now
			}
			// With little gas zeros and poles of the equation lie closer together than
			// the grid.
			if found != count && c.density > 0.01 {
				t.Errorf("%+v m %d: %d roots up to the last mode, want %d", c, m, found, count)
			}
		}
	}
}

func TestCavityStiffnessLimit(t *testing.T) {
	// A cavity that is shallow against everything puts rho c0^2/L per mean
	// displacement on the sheet: d ln omega^2/d ln T falls short of one by the
	// spring's share, which for a light gas is (rho c0^2/L) (mean w)^2 area over
	// the strain energy. For (0,1) of the ideal sheet: mean of J_0(j r) is
	// 2 J_1(j)/j, mean square J_1(j)^2.
	const density, speed, depth, tension = 1e-9, 1e5, 0.4, 100
	r := Real{Radius: 1, Tension: tension, ArealDensity: 1, Lower: Face{
		Kind: diaphragm.FaceCavity, Density: density, SoundSpeed: speed, Depth: depth,
	}}
	s := solve(t, r, Request{MaxN: 1, Effects: AllEffects()})
	got := modeOf(t, s, 0, 1)
	j := bessel.ZeroJ(0, 1)
	spring := density * speed * speed / depth * 4 / (j * j)
	ratio := spring / (tension * j * j)
	// First order in ratio (0.024), so the square of it is left.
	if want := math.Sqrt(1 + ratio); math.Abs(got.Frequency/got.Ideal-want) > ratio*ratio {
		t.Errorf("frequency ratio %.8g, want %.8g", got.Frequency/got.Ideal, want)
	}
	if want := 1 / (1 + ratio); math.Abs(got.FilmShare-want) > ratio*ratio {
		t.Errorf("share of the film %.8g, want %.8g", got.FilmShare, want)
	}
}

func TestCavityDeep(t *testing.T) {
	// Modes with m >= 1 and low sound number see a deep cavity as a tube, whose
	// evanescent field ends within 1/j'_m1 of a radius: 4 radii and 6 radii are
	// the same to exp(-2 x 1.84 x 4) = 4e-7.
	r := Real{Radius: 0.5, Tension: 200, ArealDensity: 0.03, Lower: Face{
		Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343, Depth: 2,
	}}
	a := solve(t, r, Request{MaxM: 2, MaxN: 1, Effects: AllEffects()})
	r.Lower.Depth = 3
	b := solve(t, r, Request{MaxM: 2, MaxN: 1, Effects: AllEffects()})
	for m := 1; m <= 2; m++ {
		x, y := modeOf(t, a, m, 1).Frequency, modeOf(t, b, m, 1).Frequency
		if math.Abs(x-y) > 1e-6*x {
			t.Errorf("(%d,1): %.10g at 4 radii, %.10g at 6", m, x, y)
		}
	}
}

func TestCavityVent(t *testing.T) {
	r := Real{Radius: 0.4, Tension: 500, ArealDensity: 0.1, Lower: Face{
		Kind: diaphragm.FaceCavity, Density: 1.2, SoundSpeed: 343, Depth: 0.3,
	}}
	frequencies := func(v *Vent) []float64 {
		r.Lower.Vent = v
		s := solve(t, r, Request{MaxN: 3, Effects: AllEffects()})
		return []float64{modeOf(t, s, 0, 1).Frequency, modeOf(t, s, 0, 2).Frequency, modeOf(t, s, 0, 3).Frequency}
	}
	closed := frequencies(nil)
	tiny := frequencies(&Vent{Area: 1e-12, Length: 0.01})
	// A tiny hole is a Helmholtz resonator of nearly no frequency: one mode more,
	// the others as if closed. Its share is of the order of area over volume.
	for i := range 2 {
		if math.Abs(tiny[i+1]-closed[i]) > 1e-8*closed[i] {
			t.Errorf("mode %d with a tiny hole %.12g, closed %.12g", i+1, tiny[i+1], closed[i])
		}
	}
	// With a sheet too heavy to move the lowest is Helmholtz's resonance,
	// c0 sqrt(S/(l V))/(2 pi), but for the depth of the cavity in wave lengths.
	r.ArealDensity, r.Tension = 1e4, 1e9
	vent := Vent{Area: 1e-4, Length: 0.05}
	got := frequencies(&vent)[0]
	volume := math.Pi * 0.4 * 0.4 * 0.3
	want := 343 / (2 * math.Pi) * math.Sqrt(vent.Area/(vent.effectiveLength()*volume))
	k := 2 * math.Pi * want / 343 * 0.3
	if math.Abs(got/want-1) > k*k {
		t.Errorf("vented cavity at %.8g Hz, Helmholtz %.8g Hz", got, want)
	}
	// Resistance damps it: 1/Q = R S/(omega rho l). The sheet takes part in this
	// mode by 1e-5 only, and the damping is kept below that.
	vent.Resistance = 0.05
	r.Lower.Vent = &vent
	mode := modeOf(t, solve(t, r, Request{MaxN: 1, Effects: AllEffects()}), 0, 1)
	wantZeta := vent.Resistance * vent.Area / (2 * 2 * math.Pi * want * 1.2 * vent.effectiveLength())
	if math.Abs(mode.Damping.Radiation/wantZeta-1) > 2*k*k {
		t.Errorf("damping ratio %.6g, want %.6g", mode.Damping.Radiation, wantZeta)
	}
}

func TestCothSeries(t *testing.T) {
	// The series against the function, at |z| = (k/cavityAbove)^2 of either sign,
	// and to each side of the switch at k l = 20.
	for _, k := range []float64{0.3, 2, 30} {
		for _, x := range []float64{0.001, 0.1, 1, 5, 19.99, 20.01, 200} {
			l := x / k
			g := cothSeries(k, l)
			for _, sign := range []float64{1, -1} {
				z := sign * k * k / (cavityAbove * cavityAbove)
				sum, power := 0.0, 1.0
				for _, v := range g {
					sum += v * power
					power *= z
				}
				kappa := math.Sqrt(k*k - z)
				want := 1 / (kappa * math.Tanh(kappa*l))
				// What is left out is at most 2 x 16^-9 = 3e-11 (1/kappa^2 for small x).
				if math.Abs(sum-want) > 4e-11*want {
					t.Errorf("k %v, kl %v, z %v: %.14g, want %.14g", k, x, z, sum, want)
				}
			}
		}
	}
}

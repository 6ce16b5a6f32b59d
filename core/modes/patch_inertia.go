package modes

import (
	"math"

	"hoopsheet/core/bessel"
)

// The part of a static deflection that the unknowns do not express has short
// waves only: its strain energy is known, its inertia is small and is estimated
// from the spectrum of the load above the wave number where the unknowns end.

// inertiaOf returns, for each functional, the mass (times T over sigma a^2) that
// goes with a strain energy of one in what the unknowns leave of the deflection
// under it. tail is that energy, times T; fluid the density of the fluid at both
// faces times a over sigma.
func (a *attachment) inertiaOf(tail []float64, fluid float64) []float64 {
	list := zeros(len(a.list))
	for i, f := range a.list {
		if !f.load {
			continue
		}
		if a.patch != nil {
			size := a.size
			list[i] = tailInertia(tail[i], 0, fluid, 200/size, func(k float64) float64 {
				return patchSpectrum(f, k*size) / (2 * math.Pi * k)
			})
			continue
		}
		s := a.strip
		along := (float64(f.degree) + 1.5) * math.Pi / (2 * s.half)
		list[i] = tailInertia(tail[i], along, fluid, 200/s.width, func(k float64) float64 {
			return stripSpectrum(f.order, k*s.width/2) / (2 * math.Pi * s.half) / (k*k + along*along)
		})
	}
	return list
}

// tailInertia finds the wave number above which the spectrum holds the given
// energy, and returns the inertia over the energy there.
func tailInertia(energy, along, fluid, top float64, spectrum func(k float64) float64) float64 {
	// From the top down in equal ratios; what lies above the top is less than the
	// last step.
	const steps = 160
	ratio := math.Pow(top, 1.0/steps)
	e, m := 0.0, 0.0
	k := top
	for range steps {
		part := spectrum(k) * k * math.Log(ratio)
		whole := math.Hypot(k, along)
		e += part
		m += part * (1 + fluid/whole) / (whole * whole)
		if e >= energy {
			break
		}
		k /= ratio
	}
	return m / e
}

// patchSpectrum is the mean square over the angles of the Fourier transform of a
// functional, at x = k times the radius of the patch.
func patchSpectrum(f functional, x float64) float64 {
	if f.degree == -1 {
		return squaredJ(f.order, x)
	}
	return 4 * float64(f.degree+1) * squaredJ(f.degree+1, x) / (x * x)
}

// squaredJ is J_n(x)^2, without its waves for large x.
func squaredJ(n int, x float64) float64 {
	if x > float64(n)+6 {
		return 1 / (math.Pi * math.Sqrt((x-float64(n))*(x+float64(n))))
	}
	return square(bessel.JInt(n, x))
}

// stripSpectrum is the square of the Fourier transform across a strip, x = k
// times half its width.
func stripSpectrum(degree int, x float64) float64 {
	sin, cos := math.Sincos(x)
	switch {
	case degree == 0 && x > 6:
		return 0.5 / (x * x)
	case degree == 0:
		return square(sin / x)
	case x > 6:
		return 1.5 / (x * x)
	case x < 1e-2:
		return x * x / 3
	}
	return 3 * square((sin/x-cos)/x)
}

package engine

import (
	"context"
	"math"

	"hoopsheet/core/air"
	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/response"
	"hoopsheet/core/tap"
)

// quantityOf is one quantity that published values give.
type quantityOf struct {
	name      string
	arguments int
	compute   func(a []float64) float64
}

// checkable lists the quantities of the call "check". Each is computed by the
// function that the pages use, not by one of its own.
var checkable = []quantityOf{
	{"zero-j", 2, func(a []float64) float64 { return bessel.ZeroJ(a[0], int(a[1])) }},
	{"zero-j-prime", 2, func(a []float64) float64 { return bessel.ZeroJPrime(a[0], int(a[1])) }},
	{"zero-annulus", 3, func(a []float64) float64 { return bessel.ZeroAnnulus(int(a[0]), a[1], int(a[2])) }},
	{"frequency-ratio", 2, func(a []float64) float64 { return unitMode(a[0], a[1]).Frequency / unitMode(0, 1).Frequency }},
	{"frequency-number", 2, func(a []float64) float64 { return unitMode(a[0], a[1]).Frequency }},
	{"nodal-circle", 3, func(a []float64) float64 { return circle(unitMode(a[0], a[1]), int(a[2])) }},
	{"clamped-number", 3, func(a []float64) float64 { return stiffNumber(a[0], a[1], a[2], 0, modes.RimClamped) }},
	{"supported-number", 4, func(a []float64) float64 { return stiffNumber(a[0], a[1], a[2], a[3], modes.RimSupported) }},
	{"added-mass-baffled", 2, func(a []float64) float64 {
		return addedMass(a, diaphragm.FaceBaffled, diaphragm.FaceVacuum)
	}},
	{"added-mass-open", 2, func(a []float64) float64 { return addedMass(a, diaphragm.FaceOpen, diaphragm.FaceOpen) / 2 }},
	{"kettle-number", 2, kettleNumber},
	{"ellipse-number", 4, ellipseNumber},
	{"air-density", 3, func(a []float64) float64 { return air.Density(a[0], a[1], a[2], air.CarbonDioxide) }},
	{"sound-speed", 4, func(a []float64) float64 { return air.SoundSpeed(a[0], a[1], a[2], a[3]) }},
	{"bulge-motion", 2, bulgeMotion},
	{"conformance", 3, func(a []float64) float64 {
		return tap.ConformanceProbability(a[0], a[1], math.Inf(-1), a[2], 0)
	}},
	{"false-acceptance", 1, func(a []float64) float64 { return 1 - tap.StudentCDF(a[0], 0) }},
}

// evaluate computes a quantity; the problem is a sentence, empty where there
// is a value.
func evaluate(name string, arguments []float64) (value float64, problem string) {
	for _, q := range checkable {
		if q.name != name {
			continue
		}
		if len(arguments) != q.arguments {
			return 0, "The quantity " + quote(name) + " takes another number of arguments."
		}
		value = q.compute(arguments)
		if math.IsNaN(value) || math.IsInf(value, 0) {
			return 0, "The quantity " + quote(name) + " has no value for these arguments."
		}
		return value, ""
	}
	return 0, "There is no quantity named " + quote(name) + "."
}

// unitMode is mode (m, n) of the sheet of unit radius, tension and areal
// density, among the lowest 400; the zero Mode where it is not.
func unitMode(m, n float64) modes.Mode {
	for _, mode := range modes.Ideal(1, 1, 1, mostModes) {
		if float64(mode.M) == m && float64(mode.N) == n {
			return mode
		}
	}
	return modes.Mode{}
}

func circle(mode modes.Mode, k int) float64 {
	if k < 1 || k > len(mode.CircleRadii) {
		return math.NaN()
	}
	return mode.CircleRadii[k-1]
}

// stiffNumber is omega a^2 sqrt(sigma/D) of mode (m, n) of a sheet with s = T a^2/D.
func stiffNumber(s, m, n, nu float64, rim modes.Rim) float64 {
	roots := modes.StiffRoots(make([]float64, int(n)), int(m), s, nu, rim)
	alpha := roots[len(roots)-1]
	return alpha * math.Sqrt(alpha*alpha+s)
}

// addedMass is the mass of the fluid over rho a of mode (m, n) of a unit sheet, in the limit of a thin fluid, which leaves
// the shape as it is: extrapolated from three densities.
func addedMass(a []float64, upper, lower diaphragm.FaceKind) float64 {
	factor := func(density float64) float64 {
		r := modes.Real{Radius: 1, Tension: 1, ArealDensity: 1,
			Upper: modes.Face{Kind: upper, Density: density, SoundSpeed: 1}, Lower: modes.Face{Kind: lower, Density: density, SoundSpeed: 1}}
		mode, err := modes.SolveMode(r, modes.Effects{Fluid: true}, int(a[0]), int(a[1]))
		if err != nil {
			return math.NaN()
		}
		return mode.FluidMass / mode.SheetMass / density
	}
	const d = 1e-3
	return (8*factor(d/4) - 6*factor(d/2) + factor(d)) / 3 // Richardson: the error is of the third order
}

// kettleNumber is omega a sqrt(sigma/T) of mode (0, n) over a closed volume whose pressure is even: a cavity with a light
// gas that is fast, a[0] = rho c^2 a^2/(T L).
func kettleNumber(a []float64) float64 {
	const density, speed, depth = 1e-7, 1e5, 0.5
	r := modes.Real{Radius: 1, Tension: density * speed * speed / (a[0] * depth), ArealDensity: 1,
		Lower: modes.Face{Kind: diaphragm.FaceCavity, Density: density, SoundSpeed: speed, Depth: depth}}
	mode, err := modes.SolveMode(r, modes.Effects{Fluid: true, Sound: true, Cavity: true}, 0, int(a[1]))
	if err != nil {
		return math.NaN()
	}
	return 2 * math.Pi * mode.Frequency / math.Sqrt(r.Tension)
}

// ellipseNumber is k times the longer semi-axis of mode (m, n) of an elliptic sheet of eccentricity a[0], a[3] being 1 for
// the higher of a pair.
func ellipseNumber(a []float64) float64 {
	even, err := modes.Solve(modes.Real{Radius: 1, Tension: 1, ArealDensity: 1}, modes.Request{MaxM: coupledDiameters, MaxN: coupledCircles})
	if err != nil {
		return math.NaN()
	}
	ratio := math.Sqrt(1 - a[0]*a[0]) // of the semi-axes
	half := (1 - ratio) / (1 + ratio)
	coupled, err := modes.SolveCoupled(even, modes.Uneven{Oval: modes.Oval{Half: half}})
	if err != nil {
		return math.NaN()
	}
	mode, err := coupledModeNamed(coupled, int(a[1]), int(a[2]), a[3] == 1)
	if err != nil {
		return math.NaN()
	}
	return 2 * math.Pi * mode.Frequency * (1 + half)
}

// bulgeMotion is the displacement at radius r and time t of the sheet of unit
// radius and wave speed that is let go from 1 - r^2; NaN where it cannot be had.
func bulgeMotion(a []float64) float64 {
	motion, problems, err := response.Respond(context.Background(), &response.Case{
		Sheet:        response.Sheet{Radius: 1, Tension: 1, ArealDensity: 1},
		Displacement: response.Shape{Kind: response.ShapeBulge, Peak: 1},
		Velocity:     response.Shape{Kind: response.ShapeRest},
		Circles:      response.MostCircles,
		Duration:     a[1],
		Frames:       2,
		Radii:        2,
		Angles:       4,
		Points:       []response.Point{{Radius: a[0]}},
	}, func(float64) {})
	if err != nil || len(problems) > 0 {
		return math.NaN()
	}
	history := motion.Histories[0]
	return float64(history[len(history)-1])
}

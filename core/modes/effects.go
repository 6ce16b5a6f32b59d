package modes

import (
	"cmp"
	"errors"
	"math"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/internal/sorting"
)

// Real is a diaphragm as it stands, in SI units.
type Real struct {
	Radius       float64 // of the ring, m
	Tension      float64 // line tension T, N/m
	ArealDensity float64 // sigma, kg/m^2
	Stiffness    float64 // bending stiffness D = E h^3/(12 (1 - nu^2)), N m
	Poisson      float64 // nu, counts with a supported rim
	Rim          Rim     // RimClamped if empty
	Upper, Lower Face
	// LossFactor of the sheet's material; it acts on the bending energy only,
	// because tension stores energy without loss.
	LossFactor float64
	// Remainder is the damping ratio that is assumed or measured and not
	// computed: clamps, leaks, the ring.
	Remainder float64
}

// Effects says which effects are taken into account.
type Effects struct {
	Stiffness bool
	Fluid     bool // mass of the fluid on open and baffled faces
	Sound     bool // its finite speed of sound, hence radiation
	Cavity    bool
}

// AllEffects has every effect on.
func AllEffects() Effects { return Effects{true, true, true, true} }

// Request says which modes are wanted.
type Request struct {
	// MaxM and MaxN bound the nodal diameters and circles; 12 and 8 if both are
	// zero.
	MaxM, MaxN int
	// Count, if positive, keeps the lowest so many; MaxFrequency, if positive,
	// those up to so many Hz.
	Count        int
	MaxFrequency float64
	Effects      Effects
}

// Bounds of a request.
const (
	MaxDiameters = 40
	MaxCircles   = 20
)

// Solution holds the modes of a diaphragm, lowest first, and the orders they
// were solved in.
type Solution struct {
	Real  Real
	Modes []RealMode
	// Complete is the frequency, Hz, up to which no mode is missing.
	Complete float64
	Notes    []Note

	orders []*wetOrder
}

// Note is an assumption near its limit, by code.
type Note string

// The notes.
const (
	// NoteThinEdge: a clamped edge acts as a ring smaller by sqrt(D/T).
	NoteThinEdge Note = "thin-edge"
	// NoteBeyondSound: modes above MaxSoundNumber are left at their values in
	// still fluid.
	NoteBeyondSound Note = "beyond-sound"
)

// Solve returns the modes of a diaphragm. Order by order it is a Ritz problem in
// polynomial shapes whose matrices are in closed form; sound and cavities make
// it nonlinear in the frequency, which may be complex.
//
// The first three radial modes of m <= 6 are good to 8 digits, the others of a
// full request to 7 (TestShapeCount, TestWetReference, TestCavityExact), but for
// a clamped edge that is taken as a smaller ring: see RealMode.Error. It assumes
// small motion, a rigid ring and rigid cavity walls, and a baffle without end.
// Errors are sentences that name the field.
func Solve(real Real, request Request) (*Solution, error) {
	if err := checkReal(real, request.Effects); err != nil {
		return nil, err
	}
	if request.MaxM == 0 && request.MaxN == 0 {
		request.MaxM, request.MaxN = 12, 8
	}
	if request.MaxM < 0 || request.MaxM > MaxDiameters || request.MaxN < 1 || request.MaxN > MaxCircles {
		return nil, errBounds
	}
	s := &Solution{Real: real, Complete: math.Inf(1)}
	plan := newWetPlan(real, request.Effects)
	if plan.thin {
		s.Notes = append(s.Notes, NoteThinEdge)
	}
	beyond := false
	var edge []candidate // the lowest mode left out of each order
	for m := 0; m <= request.MaxM; m++ {
		o := plan.order(m, request.MaxN+1)
		s.orders = append(s.orders, o)
		starts := o.solve(request.MaxN + 1)
		refined := plan.refined(o, starts, request.MaxN)
		for n := 1; n <= request.MaxN; n++ {
			mode := plan.mode(o, n, refined[n-1])
			beyond = beyond || mode.BeyondSound
			s.Modes = append(s.Modes, mode)
		}
		edge = append(edge, candidate{o, starts[request.MaxN]})
	}
	next := plan.order(request.MaxM+1, 1)
	edge = append(edge, candidate{next, next.solve(1)[0]})
	s.Complete = plan.complete(edge)
	if beyond {
		s.Notes = append(s.Notes, NoteBeyondSound)
	}
	sorting.By(s.Modes, func(a, b RealMode) int { return cmp.Compare(a.Frequency, b.Frequency) })
	if request.MaxFrequency > 0 {
		s.Modes = slices.DeleteFunc(s.Modes, func(m RealMode) bool { return m.Frequency > request.MaxFrequency })
	}
	if request.Count > 0 && len(s.Modes) > request.Count {
		s.Modes = s.Modes[:request.Count]
	}
	return s, nil
}

// candidate is a mode that is not among those asked for.
type candidate struct {
	order *wetOrder
	mode  wetMode
}

// complete returns the lowest frequency of the modes left out, Hz.
func (p *wetPlan) complete(left []candidate) float64 {
	lowest := math.Inf(1)
	sorting.By(left, func(a, b candidate) int { return cmp.Compare(real(b.mode.theta), real(a.mode.theta)) })
	for i, c := range left {
		// Sound moves a mode of an open or baffled face by some percent, so the
		// next two above the lowest in still fluid are looked at as well.
		if i > 2 {
			break
		}
		mode := c.mode
		if p.soundNumber(real(mode.omega())) <= MaxSoundNumber && c.order.moving() {
			mode = c.order.refine(mode)
		}
		lowest = math.Min(lowest, real(mode.omega())/(2*math.Pi))
	}
	return lowest
}

// checkReal says in a sentence what is wrong with a diaphragm.
func checkReal(r Real, e Effects) error {
	switch {
	case !positive(r.Radius):
		return errors.New("the radius must be a positive number of metres")
	case !positive(r.ArealDensity):
		return errors.New("the areal density must be a positive number of kg/m^2")
	case !(r.Stiffness >= 0) || math.IsInf(r.Stiffness, 0):
		return errors.New("the bending stiffness must be zero or a positive number of N m")
	case !positive(r.Tension) && !(r.Tension == 0 && r.Stiffness > 0 && e.Stiffness):
		return errors.New("the tension must be a positive number of N/m")
	case r.Rim != "" && r.Rim != RimClamped && r.Rim != RimSupported:
		return errors.New("the rim must be clamped or supported")
	case r.Rim == RimSupported && !(r.Poisson >= -0.9 && r.Poisson < 1):
		return errors.New("Poisson's ratio must be at least -0.9 and below 1")
	case !(r.LossFactor >= 0 && r.LossFactor <= 1):
		return errors.New("the loss factor of the sheet must be from 0 to 1")
	case !(r.Remainder >= 0 && r.Remainder < 1):
		return errors.New("the remaining damping ratio must be at least 0 and below 1")
	case r.Upper.Kind == diaphragm.FaceCavity && r.Lower.Kind == diaphragm.FaceCavity:
		return errors.New("only one face may have a cavity behind it")
	case (r.Upper.Kind == diaphragm.FaceOpen) != (r.Lower.Kind == diaphragm.FaceOpen):
		return errors.New("both faces must be open or neither, because the fluid passes around the rim")
	case r.Upper.Kind == diaphragm.FaceOpen && (r.Upper.Density != r.Lower.Density || r.Upper.SoundSpeed != r.Lower.SoundSpeed):
		return errors.New("open faces must have the same fluid on both sides")
	}
	for i, f := range []Face{r.Upper, r.Lower} {
		if err := checkFace(f, [2]string{"upper", "lower"}[i]); err != nil {
			return err
		}
	}
	return nil
}

func checkFace(f Face, name string) error {
	switch f.Kind {
	case diaphragm.FaceVacuum, "":
		return nil
	case diaphragm.FaceOpen, diaphragm.FaceBaffled, diaphragm.FaceCavity:
	default:
		return errors.New("the " + name + " face must be vacuum, open, baffled or cavity")
	}
	switch {
	case !(f.Density >= 0) || math.IsInf(f.Density, 0):
		return errors.New("the density of the fluid at the " + name + " face must be zero or a positive number of kg/m^3")
	case f.Density > 0 && !(f.SoundSpeed > 0):
		return errors.New("the speed of sound at the " + name + " face must be a positive number of m/s")
	case !(f.Viscosity >= 0) || math.IsInf(f.Viscosity, 0):
		return errors.New("the kinematic viscosity at the " + name + " face must be zero or a positive number of m^2/s")
	case f.Kind == diaphragm.FaceCavity && !positive(f.Depth):
		return errors.New("the depth of the cavity at the " + name + " face must be a positive number of metres")
	case f.Kind == diaphragm.FaceCavity && f.Vent != nil && !(f.Vent.Area >= 0 && f.Vent.Length >= 0 && f.Vent.Resistance >= 0):
		return errors.New("area, length and resistance of the vent at the " + name + " face must be zero or positive")
	case f.WallDistance != 0 && f.Kind != diaphragm.FaceBaffled:
		return errors.New("a wall can only be given for a baffled face, but the " + name + " face is not one")
	case !(f.WallDistance >= 0) || math.IsInf(f.WallDistance, 0):
		return errors.New("the distance of the wall from the " + name + " face must be zero or a positive number of metres")
	}
	return nil
}

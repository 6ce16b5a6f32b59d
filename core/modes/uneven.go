package modes

import (
	"errors"
	"fmt"
	"math"
)

// Uneven is what couples the orders of a diaphragm: everything that is not the
// same all around.
type Uneven struct {
	// Field is the departure from the even tension; empty if there is none.
	Field Field
	// Oval is the shape of a ring that is out of round.
	Oval Oval
	// Patches and Strips are masses fixed to the sheet. They may overlap, rigid
	// patches may not.
	Patches []Patch
	Strips  []Strip
	// MaxFrequency, Hz, if positive, bounds the even modes that are followed. Above
	// Complete of the even solution the list has gaps and takes most of the time.
	MaxFrequency float64
}

// Coupled holds the modes of a diaphragm with what couples its orders, lowest
// first. Modes with nodal diameters are listed one by one, two to a pair.
type Coupled struct {
	Modes []CoupledMode
	// Smallest and Largest principal tension over the sheet, over T.
	Smallest, Largest Tautness
	// Unknowns of the largest eigenproblem solved.
	Unknowns int
}

// maxUnknowns bounds the eigenproblems, for speed: the polynomials of highest
// degree are left out beyond it.
const maxUnknowns = 400

// SolveCoupled returns the modes of the diaphragm of an even solution with what
// couples its orders added. The solution must come from Solve with neither Count
// nor MaxFrequency; its MaxM and MaxN bound the modes that are followed. MaxM = 12
// and MaxN = 3 or 4 just fit maxUnknowns if nothing is symmetric.
//
// Uneven tension and oval rings are a Ritz solution in all functions of the even
// solution, with exact integrals. Dry or in still fluid the lowest modes are good
// to 1e-10, those with eight half waves to 1e-8 (TestUnevenReference,
// TestWarpWeftMathieu, TestOvalMathieu). Where the fluid depends on frequency
// (sound, a cavity), each even mode enters with its own frequency and effective
// mass: frequencies are right to first order in the unevenness, and at second but
// for the change of the fluid's mass over the shift. Shapes are taken as real, so
// a split errs by the square of the imaginary part that radiation brings, up to
// 1 % of the split for a loud mode over a cavity. A cavity or a wall stays round
// in an oval ring, and sound and stiffness stay those of the even diaphragm.
//
// Attached masses are good to five digits (TestPatchReference, TestPatchCentred,
// TestStripReference), four for points (radius 1/50) of a tenth of the sheet's
// weight, for large rigid patches in the higher modes and for strips that outweigh
// the sheet under them several times. Limp patches that overlap are good to three
// or four digits. Every mode carries its own estimate.
//
// It refuses, in words, tensions that wrinkle the sheet and attached masses that
// do not lie on it.
func SolveCoupled(even *Solution, uneven Uneven) (*Coupled, error) {
	if len(even.orders) == 0 || len(even.Modes) == 0 {
		return nil, errors.New("the even diaphragm has no modes to start from")
	}
	if err := uneven.check(even); err != nil {
		return nil, err
	}
	c := &Coupled{}
	c.Smallest, c.Largest = uneven.Field.Extremes()
	if c.Smallest.Value <= 0 {
		return nil, fmt.Errorf("the tension must stay above zero everywhere, or the sheet wrinkles: the smallest is %.3g of the mean, at %.2g of the radius and %.0f degrees",
			c.Smallest.Value, c.Smallest.Radius, c.Smallest.Angle*180/math.Pi)
	}
	orders := even.coupledOrders(uneven.MaxFrequency)
	system := newUnevenSystem(orders, uneven.Field, uneven.Oval, even)
	system.solve()
	for _, b := range system.blocks {
		c.Unknowns = max(c.Unknowns, b.size)
	}
	raw := system.modes()
	if len(uneven.Patches)+len(uneven.Strips) > 0 {
		raw = system.attach(raw, uneven.Patches, uneven.Strips, even)
	}
	c.Modes = system.label(raw, even)
	return c, nil
}

// check says in a sentence what is wrong.
func (u Uneven) check(even *Solution) error {
	radius := even.orders[0].radius
	for _, p := range u.Field {
		switch {
		case p.K < 0 || p.K > MaxHarmonic || p.Power < 0 || p.Power > MaxHarmonic+2:
			return fmt.Errorf("a harmonic of the tension must be from 0 to %d", MaxHarmonic)
		case (p.Power-p.K)%2 != 0 || p.Power < p.K-2:
			return errors.New("a part of the tension must go with a power of the radius that keeps it smooth at the centre")
		case !finite(p.Angle) || !finite(p.RR) || !finite(p.TT) || !finite(p.RT):
			return errors.New("the amplitudes and angles of the tension must be numbers")
		}
	}
	if !(u.MaxFrequency >= 0) {
		return errors.New("the highest frequency to follow must be zero or a positive number of Hz")
	}
	if !(math.Abs(u.Oval.Half) <= MaxOval) || !finite(u.Oval.Angle) {
		return fmt.Errorf("the half difference of the semi-axes must be at most %.0f %% of the radius", MaxOval*100)
	}
	for i, p := range u.Patches {
		if err := p.check(radius); err != nil {
			return fmt.Errorf("patch %d: %w", i+1, err)
		}
		for j, q := range u.Patches[:i] {
			if (p.Rigid || q.Rigid) && p.gap(q) < 0 {
				return fmt.Errorf("patches %d and %d: a rigid patch must not overlap another", j+1, i+1)
			}
		}
	}
	for i, s := range u.Strips {
		if err := s.check(radius); err != nil {
			return fmt.Errorf("strip %d: %w", i+1, err)
		}
	}
	return nil
}

// MaxHarmonic is the highest harmonic of the tension that is taken.
const MaxHarmonic = 24

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

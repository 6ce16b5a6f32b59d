package modes

import (
	"errors"
	"math"

	"hoopsheet/core/disc"
)

// Patch is a round mass fixed to the sheet: a sensor, a target, repair tape. Its
// weight is taken as even over its area.
type Patch struct {
	// Distance of its centre from that of the sheet, m, in direction Angle, rad.
	Distance, Angle float64
	Radius          float64 // m
	Mass            float64 // kg
	// Rigid patches keep flat; limp ones follow the sheet. A limp one of given
	// mass lowers frequencies without bound as its radius goes to 0, like
	// 1/ln(1/Radius): a point mass on a membrane has no modes.
	Rigid bool
}

// smallestPatch is the radius over that of the sheet below which a patch is
// refused: ever more of the answer is then the logarithm of its size.
const smallestPatch = 1e-4

func (p Patch) check(radius float64) error {
	switch {
	case !(p.Mass >= 0) || math.IsInf(p.Mass, 1):
		return errors.New("the mass must be zero or a positive number of kg")
	case !(p.Distance >= 0) || !finite(p.Distance) || !finite(p.Angle):
		return errors.New("the distance from the centre must be zero or a positive number of metres, and its angle a number")
	case !positive(p.Radius):
		return errors.New("the radius must be a positive number of metres")
	case p.Radius < smallestPatch*radius:
		return errors.New("the radius must be at least 1/10000 of that of the sheet: a point mass on a sheet has no frequency of its own")
	case p.Distance+p.Radius > radius*(1-1e-6):
		return errors.New("the patch must lie on the free sheet, inside the ring")
	}
	return nil
}

// gap returns the distance between two patches, negative where they overlap, m.
func (p Patch) gap(q Patch) float64 {
	s, c := math.Sincos(p.Angle - q.Angle)
	return math.Hypot(p.Distance*c-q.Distance, p.Distance*s) - p.Radius - q.Radius
}

// A functional is a weighted mean of the deflection over an attached mass:
// values of weight w_p at points. Functionals of a limp mass are orthonormal, so
// that its kinetic energy is half its mass times the sum of their squares.
type functional struct {
	patch  int     // index of the patch, or -1 for a strip
	mass   float64 // kg it carries; 0 for one that only constrains
	order  int     // l of a patch function
	degree int     // its degree, or -1 for the rim of the patch
	sine   bool
	// load marks those whose static deflection takes part in the solution.
	load bool
}

// attachment is a set of functionals over common points.
type attachment struct {
	list    []functional
	r, t    []float64   // points, over the radius of the sheet
	weights [][]float64 // by functional and point
	// Of a patch: place and size over the radius of the sheet, in the axes of
	// the system.
	patch  *Patch
	centre complex128
	size   float64

	strip *stripLine // of a strip

	parts []shapePart // functionals of the shapes, by node
}

// newPatchAttachment sets up the functionals of a patch: Zernike's polynomials on
// it up to a degree that resolves waves of wave number k (times the radius of the
// sheet), orthonormal under the mean over the patch; for a rigid one also means
// along its rim, where the sheet pulls on it.
func newPatchAttachment(index int, p Patch, radius, axis, k float64) *attachment {
	size := p.Radius / radius
	sin, cos := math.Sincos(p.Angle - axis)
	d := p.Distance / radius
	a := &attachment{patch: &p, centre: complex(d*cos, d*sin), size: size}
	// A plane wave of wave number k has Zernike coefficients falling like
	// (k size/2)^n/n!, whose square is below 1e-7 from n = 4 + 1.5 k size on. What
	// loads the sheet is the inertia of long waves, so fewer are needed there; and
	// a rigid patch is held by no more than what loads it.
	top := min(3+int(math.Ceil(1.5*k*size)), 14)
	loads := min(3+int(k*size/2), 8)
	if p.Rigid {
		top = loads
	}
	// Enough for products with functions of the sheet beyond k, whose own
	// coefficients fall off alike.
	spokes := 2*top + 6
	rings := top/2 + 4
	radii, weights := zeros(rings), zeros(rings)
	disc.RadialRule(radii, weights, 0)
	for _, s := range radii {
		a.addCircle(s*size, spokes)
	}
	if p.Rigid {
		a.addCircle(size, spokes)
	}
	count := len(a.r)
	for l := 0; l <= top; l++ {
		values := make([][]float64, rings)
		for g, s := range radii {
			values[g] = zeros((top-l)/2 + 1)
			zernike(values[g], l, s)
		}
		for _, sine := range [2]bool{false, true} {
			if l == 0 && sine {
				continue
			}
			trig := zeros(spokes)
			for i := range trig {
				angle := 2 * math.Pi * float64(i) / float64(spokes)
				if trig[i] = math.Cos(float64(l) * angle); sine {
					trig[i] = math.Sin(float64(l) * angle)
				}
			}
			for j := range (top-l)/2 + 1 {
				degree := l + 2*j
				f := functional{patch: index, order: l, degree: degree, sine: sine, load: degree <= loads}
				if !p.Rigid || degree <= 1 {
					f.mass = p.Mass
				}
				row := zeros(count)
				// Mean over the patch: (1/pi) integral s ds dphi.
				norm := zernikeNorm(l, degree) * 2 / float64(spokes)
				for g := range radii {
					for i, c := range trig {
						row[g*spokes+i] = norm * weights[g] * values[g][j] * c
					}
				}
				a.list, a.weights = append(a.list, f), append(a.weights, row)
			}
			if p.Rigid {
				f := functional{patch: index, order: l, degree: -1, sine: sine, load: true}
				row := zeros(count)
				norm := 1 / float64(spokes)
				if l > 0 {
					norm *= math.Sqrt2
				}
				for i, c := range trig {
					row[rings*spokes+i] = norm * c
				}
				a.list, a.weights = append(a.list, f), append(a.weights, row)
			}
		}
	}
	return a
}

// zernikeNorm makes the mean square of a Zernike polynomial times cos l phi one.
func zernikeNorm(l, degree int) float64 {
	if l == 0 {
		return math.Sqrt(float64(degree + 1))
	}
	return math.Sqrt(2 * float64(degree+1))
}

func (a *attachment) addCircle(s float64, spokes int) {
	for i := range spokes {
		sin, cos := math.Sincos(2 * math.Pi * float64(i) / float64(spokes))
		x, y := real(a.centre)+s*cos, imag(a.centre)+s*sin
		a.r, a.t = append(a.r, math.Hypot(x, y)), append(a.t, math.Atan2(y, x))
	}
}

// rigid tells whether the attachment constrains the sheet.
func (a *attachment) rigid() bool { return a.patch != nil && a.patch.Rigid }

// constraints returns, for a rigid patch, the combinations of its functionals
// that must vanish, as rows over its list.
func (a *attachment) constraints() [][]float64 {
	var rows [][]float64
	find := func(order, degree int, sine bool) int {
		for i, f := range a.list {
			if f.order == order && f.degree == degree && f.sine == sine {
				return i
			}
		}
		panic("modes: a rigid patch lacks a plane")
	}
	for i, f := range a.list {
		if f.degree == 0 || f.degree == 1 {
			continue
		}
		row := zeros(len(a.list))
		row[i] = 1
		if f.degree == -1 && f.order <= 1 {
			// A plane b s cos phi gives b/sqrt(2) along the rim and b/2 over the
			// patch.
			row[find(f.order, f.order, f.sine)] = -1
			if f.order == 1 {
				row[find(1, 1, f.sine)] = -math.Sqrt2
			}
		}
		rows = append(rows, row)
	}
	return rows
}

package modes

import (
	"math"
	"math/cmplx"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

// RealMode is one mode of a diaphragm as it stands, or one degenerate pair.
type RealMode struct {
	// M nodal diameters; N is the place within the order, lowest first. Without a
	// cavity that is the number of nodal circles counting the rim.
	M, N int
	// Frequency of the damped oscillation, Hz. Error, Hz, is what leaving out the
	// last four shapes would change, and what taking a clamped edge as a smaller
	// ring may.
	Frequency, Error float64
	// Ideal is the frequency of the ideal sheet in vacuum, Hz.
	Ideal float64
	// Damping ratios by cause, and what they come to.
	Damping Damping
	// FilmShare is the share of the sheet in the strain energy of sheet and
	// cavity: by how many percent the square of the frequency follows one percent
	// of tension (stiffness alike). It is 1 without a cavity.
	FilmShare float64
	// BendingShare is the share of bending in the strain energy.
	BendingShare float64
	// SheetMass and FluidMass are the modal masses, kg, for a shape of largest
	// value one. A force F exp(-i omega t) on the mode moves it by F over their
	// sum times (omega_n^2 - omega^2). In still fluid half of the sum times
	// velocity squared is the kinetic energy; with a cavity or sound the second
	// takes in their stored energy.
	SheetMass, FluidMass float64
	// SoundNumber is the largest k0 a = omega a/c0 of the faces.
	SoundNumber float64
	// BeyondSound: the sound number is above MaxSoundNumber, so the fluid is
	// taken as still and there is no figure for radiation.
	BeyondSound bool

	omega complex128
	inner float64   // effective radius over the ring's
	coef  []float64 // of disc.HeldEdge shapes on the effective radius
}

// mode finishes mode n of an order from what refined gave.
func (p *wetPlan) mode(o *wetOrder, n int, w wetMode) RealMode {
	r := p.real
	mode := RealMode{M: o.m, N: n, inner: p.radius / r.Radius}
	zero := bessel.ZeroJ(float64(o.m), n)
	if r.Tension > 0 {
		mode.Ideal = zero * math.Sqrt(r.Tension/r.ArealDensity) / (2 * math.Pi * r.Radius)
	}
	mode.BeyondSound = o.moving() && (w.still || !w.good)
	mode.omega = w.omega()
	omega := real(mode.omega)
	mode.Frequency = omega / (2 * math.Pi)
	mode.FilmShare = 1
	if o.cavity != nil {
		// With the strain energy scaled by s the functional is
		// theta = y'C(theta)y/s, so d ln omega^2/d ln s = 1/(1 - slope).
		mode.FilmShare = real(1 / (1 - w.slope))
	}
	mode.SoundNumber = p.soundNumber(omega)
	mode.Error = mode.Frequency * (o.truncation(w, 4)/2 + w.change + p.edgeError(zero) + o.liveError())
	mode.coef = o.realPart(w)
	peak := o.peak(mode.coef)
	for i := range mode.coef {
		mode.coef[i] /= peak
	}
	p.weigh(o, w, &mode)
	return mode
}

// refined puts sound and losses into the count lowest modes that solve gave, as far as their sound numbers allow. With a
// cavity it looks at those beyond too, which might turn out to be the same.
func (p *wetPlan) refined(o *wetOrder, starts []wetMode, count int) []wetMode {
	if !o.moving() {
		return starts
	}
	if o.cavity == nil {
		starts = starts[:count]
	}
	within := 0
	for within < len(starts) && p.soundNumber(real(starts[within].omega())) <= MaxSoundNumber {
		within++
	}
	out := append(o.follow(starts[:within]), starts[within:]...)
	for k := within; k < len(out); k++ {
		out[k].still = true
	}
	return out
}

// soundNumber returns the largest k0 a of the faces in which sound is free to
// leave.
func (p *wetPlan) soundNumber(omega float64) float64 {
	k := 0.0
	for _, f := range p.faces {
		if f.Kind != diaphragm.FaceCavity {
			k = math.Max(k, omega*p.radius/f.SoundSpeed)
		}
	}
	return k
}

// weigh fills in masses, bending share and damping.
func (p *wetPlan) weigh(o *wetOrder, w wetMode, mode *RealMode) {
	r := p.real
	n := o.strain.n
	area := math.Pi // of the radial integral
	if o.m == 0 {
		area = 2 * math.Pi
	}
	square := bilinear(o.tables.sheetMass(), n, mode.coef)
	mode.SheetMass = area * o.sheet * square
	// With y'y = 1 the mass in the denominator of the response near the mode,
	// -d(1 - omega^2 C)/d omega^2, is theta (1 - slope); theta alone if the fluid
	// is still.
	y := o.unknowns(w)
	q := make([]float64, n)
	o.strain.shapes(q, y)
	sheetShare := o.sheet * bilinear(o.tables.sheetMass(), n, q)
	mode.FluidMass = mode.SheetMass * math.Max(0, real(w.theta*(1-w.slope))/sheetShare-1)
	mode.BendingShare = o.strain.bendingEnergy(y) / dot(y, y)
	if p.thin {
		// omega depends on D also through the radius a (1 - e), e = sqrt(D/T)/a:
		// the share of bending is d ln omega^2/d ln D, the tension being kept.
		e := p.edge()
		total := mode.SheetMass + mode.FluidMass
		mode.BendingShare += e / 2 / (1 - e) * (2*mode.SheetMass + 3*mode.FluidMass) / total
	}
	omega := real(mode.omega)
	d := &mode.Damping
	if o.moving() && !mode.BeyondSound {
		d.Radiation = -imag(mode.omega) / cmplx.Abs(mode.omega)
	}
	d.Sheet = r.LossFactor / 2 * mode.BendingShare
	d.Remainder = r.Remainder
	k := bessel.ZeroJ(float64(o.m), mode.N) / p.radius
	for _, f := range p.faces {
		d.Viscous += viscousRatio(f, omega, mode.SheetMass/r.ArealDensity, mode.SheetMass+mode.FluidMass, k)
	}
	d.sum(omega)
}

// bilinear returns q'Xq.
func bilinear(x []float64, n int, q []float64) float64 {
	s := 0.0
	for i, v := range q {
		s += v * dot(x[i*n:(i+1)*n], q)
	}
	return s
}

// Dominated names what a mode of a diaphragm with a cavity is governed by.
type Dominated string

// The names.
const (
	FilmDominated   Dominated = "film"
	CavityDominated Dominated = "cavity"
)

// Dominated tells whether the frequency follows the tension of the sheet (more
// than half of the strain energy is the sheet's) or the cavity.
func (m *RealMode) Dominated() Dominated {
	if m.FilmShare > 0.5 {
		return FilmDominated
	}
	return CavityDominated
}

// Radial returns the shape at radius r (0 to 1, of the ring's radius), to be
// multiplied by cos m(theta - orientation); its largest value is one.
func (m *RealMode) Radial(r float64) float64 {
	x := r / m.inner
	if x >= 1 {
		return 0
	}
	shapes := make([]float64, len(m.coef))
	disc.HeldEdge.Shapes(shapes, m.M, x)
	return dot(shapes, m.coef)
}

// Coefficients returns the shape as coefficients of disc.HeldEdge shapes of
// order M on a disc of the returned radius (of the ring's radius; below one
// where the clamped edge is taken as a smaller ring).
func (m *RealMode) Coefficients() (coef []float64, radius float64) { return m.coef, m.inner }

// Omega returns the complex angular frequency, rad/s, of exp(-i omega t):
// radiation is in it, the other losses are not.
func (m *RealMode) Omega() complex128 { return m.omega }

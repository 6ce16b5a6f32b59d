package modes

import (
	"math"
	"math/cmplx"
)

// cavitySearch finds the modes of an order with a cavity, whose poles make the
// problem nonlinear even without losses. Other faces are taken with still
// fluid, a vent without resistance.
type cavitySearch struct {
	o      *wetOrder
	re, im []float64
	c      []float64
}

func newCavitySearch(o *wetOrder) *cavitySearch {
	n, size := o.strain.n, o.strain.size
	return &cavitySearch{o: o, re: make([]float64, n*n), im: make([]float64, n*n), c: make([]float64, size*size)}
}

// below returns the number of modes below omega and, apart, how many of them
// are poles of the cavity.
func (s *cavitySearch) below(omega float64) (modes, poles int) {
	// W. H. Wittrick & F. W. Williams, Q. J. Mech. Appl. Math. 24 (1971)
	// 263-284, doi:10.1093/qjmam/24.3.263: modes below omega are the negative
	// eigenvalues of 1 - omega^2 C(omega), counted by the signs of its pivots
	// (Sylvester), and the resonances with the sheet held still.
	o := s.o
	size := o.strain.size
	clear(s.re)
	clear(s.im)
	resistance := o.quiet()
	o.cavity.dynamic(s.re, s.im, complex(omega, 0))
	o.loud(resistance)
	o.strain.congruence(s.c, s.re)
	square := omega * omega
	for i := range size {
		for k := i * size; k <= i*size+i; k++ {
			s.c[k] = -square * (s.c[k] + o.static[k])
		}
		s.c[i*size+i]++
	}
	negative := 0
	for k := size - 1; k >= 0; k-- {
		row := s.c[k*size : k*size+k+1]
		d := row[k]
		if d < 0 {
			negative++
		}
		if d == 0 {
			d = 1e-300
		}
		for i := range k {
			f := row[i] / d
			if f == 0 {
				continue
			}
			ci := s.c[i*size : i*size+i+1]
			for j := range ci {
				ci[j] -= f * row[j]
			}
		}
	}
	poles = o.cavity.poles(omega)
	return negative + poles, poles
}

// find returns the count lowest modes of the order, lowest first.
func (s *cavitySearch) find(count int) []wetMode {
	o := s.o
	reach := o.cavity.reach
	if o.m > 0 {
		// Below its first resonance the cavity is nearly a mass, and the modes with
		// the mass at rest lead to the answer; the count proves it.
		most := 1.5 * reach / math.Sqrt(o.values[count-1])
		o.cavity.follow(math.Max(most, 0.1))
		if modes, ok := s.fromRest(count); ok {
			return modes
		}
	}
	return s.fromCounts(count)
}

// fromRest starts from the modes with the cavity as at rest.
func (s *cavitySearch) fromRest(count int) ([]wetMode, bool) {
	modes := make([]wetMode, count)
	before := 0.0
	for k := range modes {
		mode := s.lossless(s.o.still(k))
		w := real(mode.omega())
		if !mode.good || mode.change > 2*roughEnd || w <= before*(1+1e-6) || math.Abs(imag(mode.omega())) > 1e-9*w {
			return nil, false
		}
		modes[k], before = mode, w
	}
	found, _ := s.below(before * (1 + 1e-6))
	return modes, found == count
}

// fromCounts closes in on every mode by counting.
func (s *cavitySearch) fromCounts(count int) []wetMode {
	o := s.o
	modes := make([]wetMode, 0, count)
	lo := 0.0
	for k := 1; k <= count; k++ {
		// An upper bound by doubling, then bisection until mode k is alone with no
		// pole beside it.
		hi := math.Max(2*lo, 1/math.Sqrt(o.values[0]))
		for range 200 {
			if n, _ := s.below(hi); n >= k {
				break
			}
			lo, hi = hi, 2*hi
		}
		a, b := lo, hi
		aModes, aPoles := s.below(a)
		bModes, bPoles := s.below(b)
		for {
			if aModes == k-1 && bModes == k && aPoles == bPoles && b-a < 0.02*b {
				if mode, ok := s.polish(a, b); ok {
					modes = append(modes, mode)
					break
				}
			}
			if b-a <= 1e-13*b {
				// The mode lies on a pole or on its neighbour: take the place; the
				// vector is the best there is.
				mode, _ := s.polish(a, b)
				mode.theta = complex(4/((a+b)*(a+b)), 0)
				mode.change = 2e-13
				modes = append(modes, mode)
				break
			}
			x := a + (b-a)/2
			if n, p := s.below(x); n >= k {
				b, bModes, bPoles = x, n, p
			} else {
				a, aModes, aPoles = x, n, p
			}
		}
		lo = a
	}
	return modes
}

// polish solves for the mode between a and b and tells whether it stayed there.
func (s *cavitySearch) polish(a, b float64) (wetMode, bool) {
	o := s.o
	size := o.strain.size
	x := a + (b-a)/2
	theta := complex(1/(x*x), 0)
	c := make([]complex128, size*size)
	y := make([]complex128, size)
	resistance := o.quiet()
	o.at(c, complex(x, 0))
	o.loud(resistance)
	for i := range size {
		c[i*size+i] -= theta
		y[i] = complex(1+0.5*math.Sin(float64(7*i+1)), 0)
	}
	symmetricLDL(c, size, 1e-17*real(theta))
	for range 2 {
		symmetricSolve(c, size, y)
		turnToUnit(y)
	}
	mode := s.lossless(wetMode{theta: theta, y: y, good: true})
	w := real(mode.omega())
	return mode, mode.good && mode.change < 2*roughEnd && w > a && w < b && math.Abs(imag(mode.omega())) < 1e-9*w
}

// lossless solves for a mode from a start, other faces still, a vent without
// resistance.
func (s *cavitySearch) lossless(start wetMode) wetMode {
	resistance := s.o.quiet()
	defer s.o.loud(resistance)
	end := iterateEnd
	if resistance > 0 || s.o.moving() {
		end = roughEnd // losses are still to come
	}
	mode, _ := s.o.iterate(start, end)
	return mode
}

// roughEnd is the error of a start for what follows.
const roughEnd = 1e-7

// quiet takes losses away and returns the resistance for loud to put back.
func (o *wetOrder) quiet() float64 {
	resistance := o.cavity.ventResistance
	o.sound, o.cavity.ventResistance = 0, 0
	return resistance
}

func (o *wetOrder) loud(resistance float64) {
	o.sound, o.cavity.ventResistance = 1, resistance
}

// turnToUnit scales y to y'y = 1.
func turnToUnit(y []complex128) {
	s := complex(0, 0)
	for _, v := range y {
		s += v * v
	}
	s = 1 / cmplx.Sqrt(s)
	for i := range y {
		y[i] *= s
	}
}

// addCavity puts a cavity of radius a behind one face of the order, whose sheet
// moves on a disc of radius a (1 - edge).
func (o *wetOrder) addCavity(f Face, a, edge float64) {
	c := &cavityFace{
		modes: o.tables.radialModes().shrunk(edge), density: f.Density * a * a * a,
		reach: a / f.SoundSpeed, depth: f.Depth / a, live: o.tables.n,
	}
	if f.Vent != nil && f.Vent.Area > 0 && o.m == 0 {
		ratio := math.Pi * a * a / f.Vent.Area
		c.vented = true
		c.ventMass = f.Vent.effectiveLength() * ratio / a
		c.ventResistance = f.Vent.Resistance * math.Pi * a * a / (f.Density * a)
	}
	c.prepare()
	o.cavity = c
	o.faces = append(o.faces, c)
}

// addWall puts a gap with a wall at one face of the order.
func (o *wetOrder) addWall(f Face) {
	a := o.radius
	w := &wallFace{m: o.m, cavityFace: cavityFace{
		modes: o.tables.gapModes(), density: f.Density * a * a * a,
		reach: a / f.SoundSpeed, depth: f.WallDistance / a, live: o.tables.n,
	}}
	w.prepare()
	if o.m == 0 {
		w.ref = 0.1
	}
	o.faces = append(o.faces, w)
}

package tap

import (
	"math"
	"strconv"
	"sync"
)

// ModeFrequency is one mode at one tension; a pair of equal frequency counts
// once.
type ModeFrequency struct {
	// M nodal diameters; N is the place within the order m, lowest first.
	M, N int
	// Upper is the higher of a split pair, whose lower is listed too.
	Upper bool
	// Frequency, Hz, and the relative standard error of its computation.
	Frequency, Error float64
}

// Want says which modes a Solver is asked for: those with m <= MaxM and n <=
// MaxN, and of them, where Highest is above 0, those up to so many Hz at least
// and those in Include.
type Want struct {
	MaxM, MaxN int
	Highest    float64
	Include    []ModeName
}

// Solver gives the modes of one diaphragm at a line tension, N/m, and the
// frequency up to which no mode is missing among them, Hz. It may give more than
// what is wanted. A repeated call must give the same figures.
type Solver func(tension float64, want Want) (modes []ModeFrequency, complete float64, err error)

// Spectrum is the modes of one diaphragm over tension: for each mode a rising
// curve f_mn(T). The modes of an order keep their index n, lowest first,
// whatever they come to be like, so that each curve rises. It does not change
// once made, and may be shared.
type Spectrum struct {
	// name of what is tapped, for sentences.
	name string
	// offset of the axis c = ln(T)/2 + offset on which readings are looked for.
	offset float64
	modes  []ModeName
	// upper marks the higher of split pairs, by mode; nil without one.
	upper []bool
	// fixed holds ln f - c where it is the same at every tension, else nil.
	fixed []float64
	// knots on the c axis, curves of ln f by mode, and that of the frequency up
	// to which no mode is missing.
	knots    []float64
	curves   []curve
	complete curve
	solve    Solver
	// The default options, and the bounds of the modes.
	modelError, widest float64
	maxM, maxN         int
}

// The relative standard deviations by which the frequencies of a sound
// diaphragm are taken to scatter about a model, where Options state none
// (common practice). That of the real diaphragm is larger, because it answers
// for more: walls near by, small rooms, a ring that gives way.
const (
	IdealModelError = 0.002
	RealModelError  = 0.005
)

// idealModes holds the modes of the ideal sheet with ln j_mn.
var idealModes = sync.OnceValues(func() (names []ModeName, logs []float64) {
	for _, k := range allModes() {
		names, logs = append(names, ModeName{k.m, k.n}), append(logs, k.log)
	}
	return names, logs
})

// IdealSpectrum is that of the ideal sheet of radius a, m, and areal density
// sigma, kg/m^2, in vacuum:
//
//	f_mn = j_mn / (2 pi a) sqrt(T / sigma)
func IdealSpectrum(radius, arealDensity float64) *Spectrum {
	s := &Spectrum{
		name:   "the ideal sheet",
		offset: -0.5*math.Log(arealDensity) - math.Log(2*math.Pi*radius),
		widest: defaultWidest, modelError: IdealModelError,
	}
	s.modes, s.fixed = idealModes()
	return s
}

// position of a tension on the c axis, and the tension there.
func (s *Spectrum) position(tension float64) float64 { return 0.5*math.Log(tension) + s.offset }

func (s *Spectrum) tension(c float64) float64 { return math.Exp(2 * (c - s.offset)) }

// Frequency of mode (m, n), of a split pair the lower, at a tension, Hz, with the estimated relative error
// of the interpolation; ok is false for a mode that the spectrum does not hold.
func (s *Spectrum) Frequency(m, n int, tension float64) (frequency, relative float64, ok bool) {
	id := s.find(m, n)
	if id < 0 || !(tension > 0) {
		return 0, 0, false
	}
	c := s.position(tension)
	if s.fixed != nil {
		return math.Exp(s.fixed[id] + c), 0, true
	}
	p := placeOf(s.knots, c)
	y, _ := s.curves[id].at(p)
	return math.Exp(y), s.curves[id].doubt(p), true
}

// Tension at which mode (m, n) has a frequency, N/m: the one there is, because
// the frequency rises with tension. Beyond the tensions solved the curve goes
// on as a power law, at most a thousandfold.
func (s *Spectrum) Tension(m, n int, frequency float64) (tension float64, ok bool) {
	id := s.find(m, n)
	if id < 0 || !(frequency > 0) {
		return 0, false
	}
	return s.tension(s.invert(id, math.Log(frequency))), true
}

// invert is the c at which mode id has ln f.
func (s *Spectrum) invert(id int, log float64) float64 {
	if s.fixed != nil {
		return log - s.fixed[id]
	}
	return s.curves[id].inverse(log, beyondKnots)
}

// limit is ln of the frequency up to which no mode is missing at c.
func (s *Spectrum) limit(c float64) float64 {
	if s.fixed != nil {
		return math.Inf(1)
	}
	y, _ := s.complete.at(placeOf(s.knots, c))
	return y
}

// find is the index of mode (m, n), of a split pair the lower, or -1.
func (s *Spectrum) find(m, n int) int { return s.findOf(m, n, false) }

// findOf is the index of either of a pair, or -1.
func (s *Spectrum) findOf(m, n int, upper bool) int {
	for id, name := range s.modes {
		if name.M == m && name.N == n && s.isUpper(id) == upper {
			return id
		}
	}
	return -1
}

func (s *Spectrum) isUpper(id int) bool { return s.upper != nil && s.upper[id] }

// bounds says in words which modes there are.
func (s *Spectrum) bounds() string {
	if s.fixed != nil {
		return "modes beyond j = " + strconv.Itoa(highestZero) + " are not told apart"
	}
	return "the modes that were solved end at m = " + strconv.Itoa(s.maxM) + " and n = " + strconv.Itoa(s.maxN)
}

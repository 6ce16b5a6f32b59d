package tap

import (
	"math"
	"strconv"

	"hoopsheet/core/diaphragm"
)

// Question is what a tapped diaphragm is asked.
type Question struct {
	// Spectrum is the modes that peaks are read as; that of the ideal sheet if
	// it is nil.
	Spectrum *Spectrum
	// Radius a, m, and ArealDensity sigma, kg/m^2, of the sheet.
	Radius, ArealDensity float64
	// Nominal tension, N/m, and the permitted relative deviation.
	Nominal, Tolerance float64
	// Air says what moves with the sheet and is not in the Spectrum; the zero
	// value stands for nothing.
	Air   Air
	Peaks []Peak
	// Nuisances are the inputs that are not known exactly.
	Nuisances []Nuisance
}

// Options of Read. The zero value stands for the defaults.
type Options struct {
	// ModelError is the relative standard deviation by which the frequencies
	// of a sound diaphragm scatter about those of the model (slight unevenness,
	// slight out-of-round, small rooms); IdealModelError or RealModelError by
	// default.
	ModelError float64
	// Widest is how many times above or below the nominal tension is looked
	// at; 30 by default for the ideal sheet, else as far as the spectrum was
	// solved.
	Widest float64
	// Most readings to return; 5 by default.
	Most int
}

// Answer is what the peaks say.
type Answer struct {
	// Readings, the most likely first. Their odds add up to at most 1; the
	// rest is for peaks that the model does not explain, and for readings that
	// are not returned.
	Readings []Reading
	// Chosen is true when the first reading is likely enough to stand, or when
	// the person has pinned every peak of it.
	Chosen bool
	// Poor is true when the model explains the peaks badly, so that the tension
	// means little.
	Poor bool
	// Lower and Upper limit of the specified tension, N/m.
	Lower, Upper float64
	Verdict      Verdict
	// Reason for the verdict, in one or two sentences.
	Reason string
	// Budget of the uncertainty of the first reading, largest share first.
	Budget []Share
}

const (
	defaultWidest = 30
	defaultMost   = 5
	mostPeaks     = 200
	// choosingOdds are the odds from which a reading stands by itself.
	choosingOdds = 0.95
)

// Read finds which mode of the spectrum f_mn(T) each peak is, and from that the
// line tension T. Peaks may be missing, and peaks may be
// foreign; pinned peaks keep their mode. Rival readings are ranked by their
// odds (see evidence in odds.go). The standard uncertainty of T is the larger
// of what the stated uncertainties give and of what the scatter of the peaks
// gives, joined with what the inputs in Nuisances bring; the interval of 95 %
// coverage takes Student's t with one degree of freedom less than there are
// peaks, or more by the Welch-Satterthwaite formula as far as inputs of known
// uncertainty make it up. Inputs that are not listed count as exact; the
// sensitivities are those of the first reading.
//
// The verdict follows JCGM 106:2012 with a guard band of one expanded
// uncertainty: pass when the whole interval lies within the limits, fail when
// it lies wholly outside, else undecided. The error is a *diaphragm.Refusal
// that names the field of the request.
func Read(q Question, o Options) (Answer, error) {
	if q.Spectrum == nil {
		q.Spectrum = IdealSpectrum(q.Radius, q.ArealDensity)
	}
	if o.ModelError == 0 {
		o.ModelError = q.Spectrum.modelError
	}
	if o.Widest == 0 {
		o.Widest = q.Spectrum.widest
	}
	if o.Most == 0 {
		o.Most = defaultMost
	}
	if err := check(q, o); err != nil {
		return Answer{}, err
	}
	s := newSearch(q, o)
	found, lost, err := s.readings()
	if err != nil {
		return Answer{}, err
	}
	answer := Answer{Lower: q.Nominal * (1 - q.Tolerance), Upper: q.Nominal * (1 + q.Tolerance), Budget: []Share{}}
	if len(found) > 0 {
		best := found[0]
		inputs, variance, err := s.inputs(best)
		if err != nil {
			return Answer{}, err
		}
		for _, r := range found[:min(len(found), o.Most)] {
			answer.Readings = append(answer.Readings, s.report(r, variance))
		}
		answer.Budget = s.budget(best, inputs)
		answer.Poor = s.fitsBadly(best) || lost > best.odds
		answer.Chosen = s.allPinned() || best.odds >= choosingOdds && !answer.Poor
	} else {
		answer.Poor = true
	}
	answer.Verdict, answer.Reason = judge(q, answer)
	if answer.Readings == nil {
		answer.Readings = []Reading{}
	}
	return answer, nil
}

// check refuses what cannot be read.
func check(q Question, o Options) error {
	var problems []diaphragm.Problem
	add := func(field, message string) {
		problems = append(problems, diaphragm.Problem{Field: field, Code: diaphragm.CodeBounds, Message: message, Offset: -1})
	}
	positive := func(x float64) bool { return x > 0 && !math.IsInf(x, 1) }
	if !positive(q.Radius) {
		add("document.ring.radius", "The ring's radius must be above zero before a tap can be read.")
	}
	if !positive(q.ArealDensity) {
		add("document.sheet.density", "The sheet's areal density must be above zero before a tap can be read.")
	}
	if !positive(q.Nominal) {
		add("document.tension.nominal", "The nominal tension must be above zero: readings are looked for around it.")
	}
	if !(q.Tolerance >= 0 && q.Tolerance <= 1) {
		add("document.tension.tolerance", "The tension tolerance must lie from 0 % to 100 %.")
	}
	if !(o.ModelError >= 1e-5 && o.ModelError <= 0.1 && o.Widest >= 1 && o.Widest <= 1000 && o.Most > 0) {
		add("options", "The allowance for model error must lie from 0.001 % to 10 %, and the range of tensions from 1 to 1000 times the nominal one.")
	}
	if len(q.Peaks) > mostPeaks {
		add("peaks", "There are "+strconv.Itoa(len(q.Peaks))+" peaks; at most "+strconv.Itoa(mostPeaks)+" can be read at once.")
		return &diaphragm.Refusal{Problems: problems}
	}
	for _, x := range q.Nuisances {
		if !(x.RelativeStandard >= 0 && x.RelativeStandard <= 1) {
			add("options", "The relative standard uncertainty of the "+x.Name+" must lie from 0 % to 100 %.")
		}
	}
	used := 0
	pins := map[ModeName][]int{}
	for i, p := range q.Peaks {
		if !p.Use {
			continue
		}
		used++
		field, name := "peaks."+strconv.Itoa(i), "Peak "+strconv.Itoa(i+1)
		if !positive(p.Frequency) {
			add(field+".frequency", name+" must have a frequency above 0 Hz.")
		} else if !(p.Uncertainty >= 0 && p.Uncertainty <= p.Frequency) {
			add(field+".uncertainty", name+" must have an uncertainty from 0 Hz to its own frequency.")
		}
		if p.N == 0 && p.M == 0 {
			continue
		}
		if p.M < 0 || p.N < 1 || q.Spectrum.find(p.M, p.N) < 0 {
			add(field+".m", name+" cannot be mode ("+strconv.Itoa(p.M)+", "+strconv.Itoa(p.N)+"): m counts from 0 and n from 1, and "+q.Spectrum.bounds()+".")
			continue
		}
		pin, room := ModeName{p.M, p.N}, 1
		if q.Spectrum.findOf(p.M, p.N, true) >= 0 {
			room = 2 // a split pair has two peaks
		}
		if taken := pins[pin]; len(taken) == room {
			add(field+".m", name+" and peak "+strconv.Itoa(taken[0]+1)+" are both set to mode "+modeText(p.M, p.N)+"; free one of them.")
		}
		pins[pin] = append(pins[pin], i)
	}
	if used == 0 {
		add("peaks", "No peak is in use. Mark at least one as used.")
	}
	if len(problems) > 0 {
		return &diaphragm.Refusal{Problems: problems}
	}
	return nil
}

func modeText(m, n int) string { return "(" + strconv.Itoa(m) + ", " + strconv.Itoa(n) + ")" }

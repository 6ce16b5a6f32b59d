package response

import (
	"math"
	"math/cmplx"

	"hoopsheet/core/diaphragm"
)

// PulseKind names the course of a load in time.
type PulseKind string

// The pulses; all are 1 at their largest but a table, which is in the unit of
// the load, and begin at zero time.
const (
	// PulseStep stays at one.
	PulseStep PulseKind = "step"
	// PulseRamp rises to one over Duration and stays.
	PulseRamp PulseKind = "ramp"
	// PulseHalfSine is half a wave of Duration.
	PulseHalfSine PulseKind = "halfSine"
	// PulseTriangle rises and falls, each over half of Duration.
	PulseTriangle PulseKind = "triangle"
	// PulseRectangle is one for Duration.
	PulseRectangle PulseKind = "rectangle"
	// PulseDecay is exp(-t/Duration).
	PulseDecay PulseKind = "decay"
	// PulseTable goes straight from point to point, and is zero before the first
	// and after the last.
	PulseTable PulseKind = "table"
)

// PulseKinds lists every kind in the order in which it is offered.
func PulseKinds() []PulseKind {
	var list []PulseKind
	for _, kind := range pulseNames {
		list = append(list, PulseKind(kind))
	}
	return list
}

var pulseNames = []string{string(PulseStep), string(PulseRamp), string(PulseHalfSine), string(PulseTriangle), string(PulseRectangle), string(PulseDecay), string(PulseTable)}

// Pulse is the course of a load in time.
type Pulse struct {
	Kind PulseKind `json:"kind"`
	// Duration, s.
	Duration float64 `json:"duration,omitempty"`
	// Table holds the lines "time in s, value" of a table.
	Table string `json:"table,omitempty"`
}

// MostTable is the largest number of lines of a table of a pulse.
const MostTable = 5000

func (p *Pulse) check(prefix string) []diaphragm.Problem {
	r := refusals{prefix: prefix}
	if !r.choice("kind", "pulse", string(p.Kind), pulseNames) || p.Kind == PulseStep {
		return r.list
	}
	if p.Kind == PulseTable {
		_, problems := p.rows(prefix + "table")
		return problems
	}
	r.within("duration", "The duration of the pulse", " s", p.Duration, leastTime, mostTime)
	return r.list
}

// rows reads the table.
func (p *Pulse) rows(field string) ([][3]float64, []diaphragm.Problem) {
	table, problems := readTable(p.Table, field, 2, 2, MostTable)
	if problems != nil {
		return nil, problems
	}
	for i, row := range table.rows {
		message := ""
		if math.Abs(row[0]) > mostTime || math.Abs(row[1]) > mostForce {
			message = "A time of the table must lie within 1e+05 s of zero, and a value between -1e+09 and 1e+09."
		} else if i > 0 && row[0] < table.rows[i-1][0] {
			message = say("The times of the table must rise; # s follows # s.", row[0], table.rows[i-1][0])
		}
		if message != "" {
			return nil, refusal(field, diaphragm.CodeConflict, table.offsets[i], message)
		}
	}
	return table.rows, nil
}

// piece is a part of a pulse: poly in the time from its start, and
// Re(amp exp(mu t)).
type piece struct {
	from, to float64
	poly     []float64
	amp, mu  complex128
	own      [][]float64 // by modes, in place of poly
}

// pieces returns the pulse from the time at on, with times in the given unit, s.
// Before zero time nothing acts.
func (p *Pulse) pieces(at, unit float64) []piece {
	start, length := at/unit, p.Duration/unit
	end, middle := start+length, start+length/2
	switch p.Kind {
	case PulseStep:
		return []piece{{from: start, to: infinity, poly: []float64{1}}}
	case PulseRamp:
		return []piece{{from: start, to: end, poly: []float64{0, 1 / length}}, {from: end, to: infinity, poly: []float64{1}}}
	case PulseTriangle:
		return []piece{{from: start, to: middle, poly: []float64{0, 2 / length}}, {from: middle, to: end, poly: []float64{1, -2 / length}}}
	case PulseRectangle:
		return []piece{{from: start, to: end, poly: []float64{1}}}
	case PulseHalfSine:
		return []piece{{from: start, to: end, amp: complex(0, -1), mu: complex(0, math.Pi/length)}}
	case PulseDecay:
		return []piece{{from: start, to: infinity, amp: 1, mu: complex(-1/length, 0)}}
	}
	rows, _ := p.rows("")
	var list []piece
	for i := 1; i < len(rows); i++ {
		t0, t1 := (rows[i-1][0]+at)/unit, (rows[i][0]+at)/unit
		if !(t1 > t0) || t1 <= 0 {
			continue // a jump, or over before the start
		}
		slope := (rows[i][1] - rows[i-1][1]) / (t1 - t0)
		list = append(list, piece{from: t0, to: t1, poly: []float64{rows[i-1][1], slope}})
	}
	return list
}

// begun returns the piece as a load from the time t on, which lies within it.
func (p *piece) begun(source int, t float64) load {
	gone := t - p.from
	if gone == 0 {
		return load{source: source, poly: p.poly, amp: p.amp, mu: p.mu, own: p.own}
	}
	l := load{source: source, poly: shifted(p.poly, gone), mu: p.mu}
	if p.amp != 0 {
		l.amp = p.amp * cmplx.Exp(p.mu*complex(gone, 0))
	}
	if p.own != nil {
		l.own = make([][]float64, len(p.own))
		for i, poly := range p.own {
			l.own[i] = shifted(poly, gone)
		}
	}
	return l
}

// shifted writes a polynomial in t as one in t - by.
func shifted(poly []float64, by float64) []float64 {
	// Horner's scheme, again and again (Knuth, TAOCP 2, section 4.6.4).
	out := append([]float64(nil), poly...)
	for i := range out {
		for k := len(out) - 2; k >= i; k-- {
			out[k] += by * out[k+1]
		}
	}
	return out
}

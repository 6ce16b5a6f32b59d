package response

import (
	"math"
	"math/cmplx"
)

// leg is a time in which every load is one smooth function of it.
type leg struct {
	from  float64
	loads []load
}

// load is a force on the modes: for each its gain times
//
//	poly[0] + poly[1] t + ... + Re(amp exp(mu t)),  t from the start of the leg,
//
// or a polynomial of its own, which has no gain.
type load struct {
	source  int
	poly    []float64
	amp, mu complex128
	own     [][]float64 // by modes
}

// steady tells whether a load is constant.
func (l *load) steady() bool { return l.amp == 0 && l.own == nil && len(l.poly) <= 1 }

// quiet tells whether no load of the leg changes with time.
func (l *leg) quiet() bool {
	for i := range l.loads {
		if !l.loads[i].steady() {
			return false
		}
	}
	return true
}

// around is where a mode would rest under the steady loads of a quiet leg.
func (l *leg) around(k *modal) float64 {
	sum := 0.0
	for n := range l.loads {
		if load := &l.loads[n]; len(load.poly) > 0 {
			sum += k.gains[load.source] * load.poly[0] / (k.omega * k.omega)
		}
	}
	return sum
}

// value returns the load on mode i at the time t of its leg, for a gain of one.
func (l *load) value(i int, t float64) float64 {
	poly := l.poly
	if l.own != nil {
		poly = l.own[i]
	}
	sum := 0.0
	for j := len(poly) - 1; j >= 0; j-- {
		sum = sum*t + poly[j]
	}
	if l.amp != 0 {
		sum += real(l.amp * cmplx.Exp(l.mu*complex(t, 0)))
	}
	return sum
}

// bounds of a load over a leg of the given length: its largest size, and that of
// its start and all its changes together.
func (l *load) bounds(i int, length float64) (most, change float64) {
	poly := l.poly
	if l.own != nil {
		poly = l.own[i]
	}
	power := 1.0
	for j, v := range poly {
		if j > 0 && v != 0 {
			power *= length
		}
		if v != 0 {
			most += math.Abs(v) * power
		}
	}
	change = most
	if l.amp != 0 {
		size := cmplx.Abs(l.amp)
		most += size
		turn := math.Abs(imag(l.mu))
		if turn > 0 {
			turn *= length
		}
		change += size * (2 + turn)
	}
	return most, change
}

// legAt returns the number of the leg that holds at the time t.
func (s *stage) legAt(t float64) int {
	low, high := 0, len(s.legs)
	for high-low > 1 {
		if middle := (low + high) / 2; s.legs[middle].from <= t {
			low = middle
		} else {
			high = middle
		}
	}
	return low
}

// at returns displacement, velocity and acceleration of the coordinate of mode i
// at the time t, m per (a/c)^k; where they jump, those after it.
func (s *stage) at(i int, t float64) (q, dq, ddq float64) {
	l := s.legAt(t)
	return s.within(i, l, t-s.legs[l].from)
}

// within is at, with the time from the start of leg number l.
func (s *stage) within(i, l int, t float64) (q, dq, ddq float64) {
	k := &s.modes[i]
	c, sn := fundamental(k.omega, k.zeta, t)
	st := k.states[l]
	h := sn / k.omega
	q = c*st.q + h*st.v
	dq = (c-2*k.zeta*sn)*st.v - k.omega*sn*st.q
	force := 0.0
	for n := range s.legs[l].loads {
		load := &s.legs[l].loads[n]
		poly, gain := load.poly, 1.0
		if load.own != nil {
			poly = load.own[i]
		} else if gain = k.gains[load.source]; gain == 0 {
			continue
		}
		force += gain * load.value(i, t)
		if len(poly) > 0 {
			var p powers
			p.driven(k.omega, k.zeta, t, c, sn, len(poly)-1)
			q += gain * poly[0] * p[0]
			dq += gain * poly[0] * h
			for j := 1; j < len(poly); j++ {
				q += gain * poly[j] * p[j]
				dq += gain * poly[j] * float64(j) * p[j-1]
			}
		}
		if load.amp != 0 {
			r := drivenExp(k.omega, k.zeta, t, c, sn, load.mu)
			q += gain * real(load.amp*r)
			dq += gain * real(load.amp*(complex(h, 0)+load.mu*r))
		}
	}
	return q, dq, force - k.omega*(2*k.zeta*dq+k.omega*q)
}

// kick is a jump of the velocities of all modes.
type kick struct {
	at    float64
	speed []float64 // by modes
}

// run fills the states of all modes from those at the start of the stage; kicks
// act at the starts of legs. until is where the stage ends, +Inf for the last.
func (s *stage) run(start []state, kicks []kick, until float64) {
	for i := range s.modes {
		k := &s.modes[i]
		k.states = make([]state, len(s.legs))
		k.states[0] = start[i]
		for l := range s.legs {
			if l > 0 {
				q, v, _ := s.within(i, l-1, s.legs[l].from-s.legs[l-1].from)
				k.states[l] = state{q, v}
			}
			for n := range kicks {
				if kicks[n].at == s.legs[l].from {
					k.states[l].v += kicks[n].speed[i]
				}
			}
		}
		s.bound(i, until)
	}
}

// bound sets swing, size and decay of mode i.
func (s *stage) bound(i int, until float64) {
	k := &s.modes[i]
	k.swing, k.decay = 0, 0
	if k.zeta < 0.99 {
		k.decay = k.zeta * k.omega
	}
	var rest, ring float64
	for l := range s.legs {
		end := until
		if l+1 < len(s.legs) {
			end = s.legs[l+1].from
		}
		length := end - s.legs[l].from
		var steady, driven float64
		for n := range s.legs[l].loads {
			load := &s.legs[l].loads[n]
			gain := 1.0
			if load.own == nil {
				gain = k.gains[load.source]
			}
			if gain == 0 {
				continue
			}
			if load.steady() {
				if len(load.poly) > 0 {
					steady += gain * load.poly[0] / (k.omega * k.omega)
				}
				continue
			}
			// |h| <= 1/omega, and |1 - c| <= 2 after a step; a load is a step and
			// its changes.
			most, change := load.bounds(i, length)
			driven += math.Abs(gain) * math.Min(most*length/k.omega, 2*change/(k.omega*k.omega))
		}
		rest, ring = math.Abs(steady), driven+k.freeSwing(state{k.states[l].q - steady, k.states[l].v})
		k.swing = math.Max(k.swing, rest+ring)
	}
	k.size = k.peak * k.swing
	k.rest, k.ring = k.peak*rest, k.peak*ring
}

// freeSwing bounds the coordinate left to itself from a state on.
func (k *modal) freeSwing(s state) float64 {
	if k.zeta < 0.99 {
		root := math.Sqrt((1 - k.zeta) * (1 + k.zeta))
		return math.Hypot(s.q, (s.v/k.omega+k.zeta*s.q)/root)
	}
	// Near and above critical damping |C| <= 1 and omega |S| < 1; see
	// fundamental.
	return math.Abs(s.q) + math.Abs(s.v)/k.omega
}

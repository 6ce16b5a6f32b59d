package tap

import "math"

// pair is one peak read as one mode, both as indices of the search.
type pair struct{ line, mode int }

// match assigns peaks to modes one to one at a given c, so that the sum of the
// gains is largest. A pair gains ln N(residual; 0, s^2) - ln(foreign rate),
// the logarithm of how much better the mode explains the peak than chance
// does; pairs that gain nothing are not made. Pinned peaks keep their modes.
func (s *search) match(c float64) []pair {
	// On the logarithmic scale both are ordered. With equal s an assignment
	// that crosses is never better than the uncrossed one, because the cost is
	// convex in the distance, so the best one is found along the order by
	// dynamic programming, as sequences are aligned. With unequal s a crossing
	// could be better only between modes closer than the uncertainties, where
	// nothing can be told apart anyway.
	taken := make(map[int]bool, s.pinCount)
	var pairs []pair
	var free []int
	for i, l := range s.lines {
		if l.pin >= 0 {
			pairs = append(pairs, pair{i, l.pin})
			taken[l.pin] = true
		} else {
			free = append(free, i)
		}
	}
	// Modes within reach of a free peak, in order.
	var near []int
	next := 0
	for _, i := range free {
		l := s.lines[i]
		gate := l.s * gateWidth
		next = max(next, countUpTo(s.modes, l.log-c-gate))
		for next < len(s.modes) && s.modes[next].log <= l.log-c+gate {
			if !taken[next] {
				near = append(near, next)
			}
			next++
		}
	}
	// best[i][j] is the largest gain of the first i peaks and j modes.
	width := len(near) + 1
	best := make([]float64, (len(free)+1)*width)
	for i := 1; i <= len(free); i++ {
		for j := 1; j <= len(near); j++ {
			value := max(best[(i-1)*width+j], best[i*width+j-1])
			if gain := s.gain(free[i-1], near[j-1], c); gain > 0 {
				value = max(value, best[(i-1)*width+j-1]+gain)
			}
			best[i*width+j] = value
		}
	}
	for i, j := len(free), len(near); i > 0 && j > 0; {
		switch best[i*width+j] {
		case best[(i-1)*width+j]:
			i--
		case best[i*width+j-1]:
			j--
		default:
			pairs = append(pairs, pair{free[i-1], near[j-1]})
			i, j = i-1, j-1
		}
	}
	return pairs
}

// gateWidth is the largest residual, in standard deviations, that can gain:
// N(r) > foreign rate means r < s sqrt(2 ln(1 / (sqrt(2 pi) s rate))), which is
// below 5 for every s from 1e-5, the smallest model error allowed.
const gateWidth = 5

func (s *search) gain(line, mode int, c float64) float64 {
	return logNormal(s.lines[line].log-s.modes[mode].log-c, s.lines[line].s) - logForeign
}

func logNormal(x, s float64) float64 {
	z := x / s
	return -0.5*z*z - math.Log(s) - 0.5*math.Log(2*math.Pi)
}

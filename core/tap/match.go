package tap

import "math"

// pair is one peak read as one mode, both as indices of the search.
type pair struct{ line, mode int }

// match assigns peaks to modes one to one at the c of the view, so that the sum
// of the gains is largest. A pair gains ln N(residual; 0, s^2) - ln(foreign rate),
// the logarithm of how much better the mode explains the peak than chance
// does; pairs that gain nothing are not made. Pinned peaks keep their modes.
func (s *search) match() []pair {
	// On the logarithmic scale both are ordered. With equal s an assignment
	// that crosses is never better than the uncrossed one, because the cost is
	// convex in the distance; so the best one is the heaviest chain of pairs in
	// which line and mode both rise, found by dynamic programming over a tree
	// of running maxima (Fenwick, Software: Practice and Experience 24 (1994)
	// 327). With unequal s a crossing could be better only between modes closer
	// than the uncertainties, where nothing can be told apart anyway.
	var pairs []pair
	taken := make(map[int]bool, s.pinCount)
	for i, l := range s.lines {
		if l.pin >= 0 {
			pairs = append(pairs, pair{i, l.pin})
			taken[l.pin] = true
		}
	}
	type link struct {
		pair
		total float64 // of the chain that ends here
		back  int     // the link before, or -1
	}
	var links []link
	best, v, c := &s.best, &s.view, s.view.c
	best.clear(v.admitted)
	for i, l := range s.lines {
		if l.pin >= 0 {
			continue
		}
		gate := (l.s + v.widest) * gateWidth
		first := len(links)
		for rank := v.upTo(l.log - c - gate); rank < v.admitted && v.log[v.order[rank]] <= l.log-c+gate; rank++ {
			p := pair{i, v.order[rank]}
			gain := s.logDensity(p, l.log-c-v.log[p.mode]) - logForeign
			if gain <= 0 || taken[p.mode] {
				continue
			}
			total, back := best.before(rank)
			links = append(links, link{p, total + gain, back})
		}
		for j := first; j < len(links); j++ {
			best.add(v.rank[links[j].mode], links[j].total, j)
		}
	}
	_, end := best.before(v.admitted)
	for ; end >= 0; end = links[end].back {
		pairs = append(pairs, links[end].pair)
	}
	return pairs
}

// gateWidth is the largest residual, in standard deviations, that can gain:
// N(r) > foreign rate means r < s sqrt(2 ln(1 / (sqrt(2 pi) s rate))), which is
// below 5 for every s from 1e-5, the smallest model error allowed.
const gateWidth = 5

// logDensity is the logarithm of the density of a pair's residual.
func (s *search) logDensity(p pair, residual float64) float64 {
	l := s.lines[p.line]
	if s.view.variance == nil || s.view.variance[p.mode] == 0 {
		return logNormal(residual, l.s, l.logS)
	}
	deviation := math.Sqrt(s.spread(p))
	return logNormal(residual, deviation, math.Log(deviation))
}

// logNormal is the logarithm of the normal density with standard deviation s,
// whose logarithm the caller has at hand.
func logNormal(x, s, logS float64) float64 {
	const logRootTwoPi = 0.918938533204672741780329736406
	z := x / s
	return -0.5*z*z - logS - logRootTwoPi
}

// runningBest is a Fenwick tree over modes that answers which chain among
// those that end below a mode is the heaviest.
type runningBest struct {
	total []float64
	link  []int
}

// clear makes it empty for n modes, in the memory it has.
func (b *runningBest) clear(n int) {
	if len(b.total) != n+1 {
		b.total, b.link = make([]float64, n+1), make([]int, n+1)
		return
	}
	clear(b.total) // a link is read only where its total is above zero
}

// before returns the heaviest chain that ends at a mode below k; 0 and -1 where
// there is none.
func (b *runningBest) before(k int) (total float64, link int) {
	link = -1
	for i := k; i > 0; i -= i & -i {
		if b.total[i] > total {
			total, link = b.total[i], b.link[i]
		}
	}
	return total, link
}

// add notes a chain that ends at mode k.
func (b *runningBest) add(k int, total float64, link int) {
	for i := k + 1; i < len(b.total); i += i & -i {
		if total > b.total[i] {
			b.total[i], b.link[i] = total, link
		}
	}
}

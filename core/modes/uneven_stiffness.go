package modes

import "math"

// node is one family of unknowns: the functions of one order times cos m theta
// or sin m theta.
type node struct {
	order  *coupledOrder
	sine   bool
	at     int // of its first unknown within its block
	global int // and among all
}

// harmonicPart is the parts of a field with one harmonic and angle, the powers
// summed at the points of a rule.
type harmonicPart struct {
	k          int
	cos, sin   float64 // of k times the angle
	rr, tt, rt []float64
}

// harmonicParts gathers a field. Weights of the rule and T are put in.
func (f Field) harmonicParts(radii, weights []float64, T float64) []*harmonicPart {
	var list []*harmonicPart
	byKey := map[[2]float64]*harmonicPart{}
	for _, p := range f {
		if p.RR == 0 && p.TT == 0 && p.RT == 0 {
			continue
		}
		key := [2]float64{float64(p.K), p.Angle}
		h := byKey[key]
		if h == nil {
			s, c := math.Sincos(float64(p.K) * p.Angle)
			// What would be zero in exact arithmetic must not join blocks.
			if math.Abs(s) < symmetryTolerance {
				s = 0
			}
			if math.Abs(c) < symmetryTolerance {
				c = 0
			}
			h = &harmonicPart{k: p.K, cos: c, sin: s}
			h.rr, h.tt, h.rt = zeros(len(radii)), zeros(len(radii)), zeros(len(radii))
			byKey[key] = h
			list = append(list, h)
		}
		for g, r := range radii {
			v := T * weights[g] * math.Pow(r, float64(p.Power))
			h.rr[g] += v * p.RR
			h.tt[g] += v * p.TT
			h.rt[g] += v * p.RT
		}
	}
	return list
}

// symmetryTolerance is the rounding allowed where angles decide which unknowns
// are joined: those of k theta for k up to 100.
const symmetryTolerance = 1e-13

// angular returns the integral over the circle of a(m theta) b(l theta)
// c(k theta), each a cosine or a sine.
func angular(sineA bool, m int, sineB bool, l int, sineC bool, k int) float64 {
	if (sineA != sineB) != sineC {
		return 0 // an odd number of sines
	}
	// The product is a quarter of the sum of cos(m + s l + t k) over signs s, t,
	// each with a sign where there are sines.
	sum := 0.0
	for _, s := range [2]int{1, -1} {
		for _, t := range [2]int{1, -1} {
			if m+s*l+t*k != 0 {
				continue
			}
			v := 1
			switch {
			case sineA && sineB:
				v = -s
			case sineA && sineC:
				v = -t
			case sineB && sineC:
				v = -s * t
			}
			sum += float64(v)
		}
	}
	return math.Pi / 2 * sum
}

// factors are the angular integrals of the four products of slopes.
type factors struct{ rr, tt, rt, tr float64 }

func (f factors) none() bool { return f.rr == 0 && f.tt == 0 && f.rt == 0 && f.tr == 0 }

// factorsOf integrates over the circle for one harmonic and two nodes.
func (h *harmonicPart) factorsOf(a, b *node) factors {
	m, l := a.order.m, b.order.m
	// Slopes around: -sin for a cosine, cos for a sine.
	turnA, turnB := -1.0, -1.0
	if a.sine {
		turnA = 1
	}
	if b.sine {
		turnB = 1
	}
	// cos k(theta - angle) = cos cos k theta + sin sin k theta, and its quarter turn.
	even := func(p, q bool) float64 {
		return h.cos*angular(p, m, q, l, false, h.k) + h.sin*angular(p, m, q, l, true, h.k)
	}
	odd := func(p, q bool) float64 {
		return h.cos*angular(p, m, q, l, true, h.k) - h.sin*angular(p, m, q, l, false, h.k)
	}
	return factors{
		rr: even(a.sine, b.sine),
		tt: turnA * turnB * even(!a.sine, !b.sine),
		rt: turnB * odd(a.sine, !b.sine),
		tr: turnA * odd(!a.sine, b.sine),
	}
}

// joined tells whether a harmonic couples two nodes.
func (h *harmonicPart) joined(a, b *node) bool {
	m, l := a.order.m, b.order.m
	if h.k != m+l && h.k != m-l && h.k != l-m {
		return false
	}
	return !h.factorsOf(a, b).none()
}

// addStrain adds to matrix (size by size) the strain energy of the field between
// nodes a and b, both triangles.
func (h *harmonicPart) addStrain(matrix []float64, size int, a, b *node, ga, gb *gradientTable) {
	f := h.factorsOf(a, b)
	if f.none() {
		return
	}
	for g := range h.rr {
		rr, tt := f.rr*h.rr[g], f.tt*h.tt[g]
		rt, tr := f.rt*h.rt[g], f.tr*h.rt[g]
		bRadial := gb.radial[g*gb.functions : (g+1)*gb.functions]
		bAround := gb.around[g*gb.functions : (g+1)*gb.functions]
		for i := range ga.functions {
			pr, pt := ga.radial[g*ga.functions+i], ga.around[g*ga.functions+i]
			x, y := rr*pr+tr*pt, rt*pr+tt*pt
			row := matrix[(a.at+i)*size+b.at:]
			row = row[:gb.functions]
			for j, v := range bRadial {
				row[j] += x*v + y*bAround[j]
			}
		}
	}
}

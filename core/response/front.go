package response

import (
	"math"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
)

const (
	// frontDegree of the polynomials that the load of a front is made of. On a
	// panel over which the phase of the shortest wave turns by 2 w, Chebyshev
	// interpolation errs by w^9/(2^8 9!) of its amplitude: 1e-8 for w = 1.
	frontDegree = mostDegree
	// mostPanels of a front on its way over the sheet.
	mostPanels = 1200
)

// frontOn gives the loads of a travelling front on the modes.
func (c *Case) frontOn(p *projector, g *given) ([]acting, []diaphragm.Problem) {
	// The load on a mode while the front passes over the place s, -1 to 1 along its
	// way, is known exactly; see crossing. Between its start and its end it is
	// interpolated in time on panels that are even in arccos s, so that they are
	// short where the chord of the front begins and ends.
	speed := g.FrontSpeed / c.Sheet.WaveSpeed()
	pulse := g.pulse()
	decay := 0.0 // rate
	if pulse.Kind == PulseDecay {
		decay = c.unit() / pulse.Duration
	}
	wave := 1.0
	for m := 0; m <= p.basis.M; m++ {
		wave = math.Max(wave, p.basis.Zero(m, p.basis.N))
	}
	panels := max(16, int(math.Ceil(math.Pi/2*math.Max(wave, decay/speed))))
	if panels > mostPanels {
		return nil, refusal(g.prefix, diaphragm.CodeConflict, -1,
			say("The load behind the front decays within # ring radii of its way, or there are too many modes: that takes # steps, and at most # are computed.", speed/decay, panels, mostPanels))
	}
	cross := newCrossing(p.basis, g, c.Smooth)
	time := func(s float64) float64 { return g.at + (1+s)/speed }

	list := make([]piece, panels)
	past := make([]float64, len(p.modes)) // of the load, by its decay
	var nodes [frontDegree + 1]float64
	for i := range nodes {
		nodes[i] = (1 - math.Cos(math.Pi*(float64(i)+0.5)/float64(len(nodes)))) / 2
	}
	for k := range list {
		// 1 + s without cancellation where the front comes in.
		edge := func(k int) float64 { v := math.Sin(math.Pi * float64(k) / float64(2*panels)); return 2*v*v - 1 }
		low, high := edge(k), edge(k+1)
		own := make([][]float64, len(p.modes))
		values := make([][]float64, len(nodes))
		for i, x := range nodes {
			values[i] = p.struck(cross.at(low + (high-low)*x))
		}
		length := (high - low) / speed
		for i := range own {
			poly := make([]float64, len(nodes))
			for n := range poly {
				poly[n] = values[n][i]
			}
			interpolate(poly, nodes[:])
			if decay > 0 {
				poly, past[i] = decaying(poly, nodes[:], decay*length, past[i])
			}
			scale := 1.0
			for n := range poly {
				poly[n] *= scale
				scale /= length
			}
			own[i] = poly
		}
		list[k] = piece{from: time(low), to: time(high), own: own}
	}
	whole := p.struck(cross.at(1))
	end := time(1)
	if decay > 0 {
		for i := range past {
			past[i] = whole[i] - past[i]
		}
		return []acting{{pieces: list}, {force: past, pieces: []piece{{from: end, to: infinity, amp: 1, mu: complex(-decay, 0)}}}}, nil
	}
	acts := []acting{{pieces: list}, {force: whole, pieces: []piece{{from: end, to: infinity, poly: []float64{1}}}}}
	if pulse.Kind == PulseRectangle {
		// A second front takes the pressure away.
		later := pulse.Duration / c.unit()
		back := make([]piece, panels)
		for k, q := range list {
			own := make([][]float64, len(q.own))
			for i, poly := range q.own {
				own[i] = make([]float64, len(poly))
				for n, v := range poly {
					own[i][n] = -v
				}
			}
			back[k] = piece{from: q.from + later, to: q.to + later, own: own}
		}
		acts = append(acts, acting{pieces: back}, acting{force: whole, pieces: []piece{{from: end + later, to: infinity, poly: []float64{-1}}}})
	}
	return acts, nil
}

// crossing is the load of even pressure behind a straight front on every Bessel
// function.
type crossing struct {
	b *disc.Basis
	// terms of sin N psi (pi - psi for N = 0), by (m, n) and N.
	terms [][]float64
	load  []float64 // by the basis: scale and direction
	coef  []float64
}

func newCrossing(b *disc.Basis, g *given, smooth float64) *crossing {
	// With the Zernike polynomials R_m+2l of r (Born and Wolf, 9.2.1),
	//   J_m(k r) = sum over l of 2 N (-1)^l J_N(k)/k R_m,m+2l(r),  N = m + 2l + 1,
	// and the chord at the place s = cos psi of R cos m phi is 2/N sin N psi (the
	// Radon transform of Zernike polynomials; Cormack, J. Appl. Phys. 35 (1964)
	// 2908), so that the integral along the front is
	//   (4/k) sum over l of (-1)^l J_N(k) sin N psi,
	// whose terms vanish faster than any power once N is above k. The load behind
	// the front is the integral of that over s, term by term.
	x := &crossing{b: b, terms: make([][]float64, b.Len()/2), load: make([]float64, b.Len()), coef: make([]float64, b.Len())}
	for m := 0; m <= b.M; m++ {
		sin, cos := math.Sincos(float64(m) * g.FrontDirection)
		for n := 1; n <= b.N; n++ {
			k := b.Zero(m, n)
			i := b.Index(m, n, disc.Cos)
			sequence := make([]float64, int(k+12*math.Cbrt(k))+20)
			bessel.JSeq(sequence, k)
			terms := make([]float64, len(sequence)+1)
			sign := 4 / k
			for order := m + 1; order < len(sequence); order += 2 {
				v := sign * sequence[order] / 2
				// Integral of sin N x sin x from psi to pi.
				if order > 1 {
					terms[order-1] -= v / float64(order-1)
				} else {
					terms[0] += v // times pi - psi
				}
				terms[order+1] += v / float64(order+1)
				sign = -sign
			}
			x.terms[i/2] = terms
			size := g.scale / b.Norm(m, n)
			if smooth > 0 {
				size *= math.Exp(-k * k * smooth * smooth / 4)
			}
			x.load[i] = size * cos
			if m > 0 {
				x.load[i+1] = size * sin
			}
		}
	}
	return x
}

// at gives the coefficients of the pressure behind a front at the place s.
func (x *crossing) at(s float64) []float64 {
	psi := math.Acos(math.Max(-1, math.Min(1, s)))
	most := 0
	for _, t := range x.terms {
		most = max(most, len(t))
	}
	waves := make([]float64, most)
	waves[0] = math.Pi - psi
	for n := 1; n < most; n++ {
		waves[n] = math.Sin(float64(n) * psi)
	}
	for i, t := range x.terms {
		sum := dotted(t, waves)
		x.coef[2*i], x.coef[2*i+1] = sum*x.load[2*i], sum*x.load[2*i+1]
	}
	return x.coef
}

// interpolate replaces the values of a polynomial at the nodes by its
// coefficients.
func interpolate(values, nodes []float64) {
	// Divided differences, then Newton's form multiplied out (Bjoerck and Pereyra).
	n := len(values)
	for k := 1; k < n; k++ {
		for i := n - 1; i >= k; i-- {
			values[i] = (values[i] - values[i-1]) / (nodes[i] - nodes[i-k])
		}
	}
	for k := n - 2; k >= 0; k-- {
		for i := k; i < n-1; i++ {
			values[i] -= nodes[k] * values[i+1]
		}
	}
}

// decaying gives, of a load that has grown as the polynomial in 0..1, what is
// left of it if each part decays at the rate from when it came; past is what has
// gone before, and the second result what has gone at the end.
func decaying(poly, nodes []float64, rate, past float64) ([]float64, float64) {
	// What has gone, z, grows by z' = rate (load - z).
	gone := func(x float64) (load, z float64) {
		z = past * math.Exp(-rate*x)
		power := 1.0
		for j, v := range poly {
			load += v * power
			power *= x
			z += rate * v * power * phi(j, -rate*x)
		}
		return load, z
	}
	out := make([]float64, len(nodes))
	for i, x := range nodes {
		load, z := gone(x)
		out[i] = load - z
	}
	interpolate(out, nodes)
	_, z := gone(1)
	return out, z
}

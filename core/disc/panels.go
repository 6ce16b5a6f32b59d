package disc

import (
	"math"

	"hoopsheet/core/bessel"
)

// pair is a cosine and a sine value; the two share every radial factor.
type pair struct{ c, s float64 }

// quad is J_m(j_mn r) at one radius for four successive n.
type quad struct{ a, b, c, d float64 }

// panel holds the quads of four successive n for the radii lo, lo+1, ...;
// below lo all four are smaller than panelFloor and are left out.
type panel struct {
	lo int
	q  []quad
}

// panelFloor: leaving out values below it changes a sum of N coefficients by
// less than 1e-22 of the largest, far below its rounding.
const panelFloor = 0x1p-80

// radialTable is J_m(j_mn r_i), or a slope of it, for all orders of a basis at given radii.
type radialTable struct {
	nr     int
	orders [][]panel // orders[m][n/4]
}

// radialFunc is a function of order m, a zero z of J_m and a radius that, inside
// the turning point z r = m, falls off towards the centre.
type radialFunc func(m int, z, r float64) float64

// newRadialTable evaluates the table. Radii must rise.
func newRadialTable(b *Basis, radii []float64, f radialFunc) *radialTable {
	t := &radialTable{nr: len(radii), orders: make([][]panel, b.M+1)}
	for m := range t.orders {
		z := b.zeros[m*b.N : (m+1)*b.N]
		for len(z) > 0 {
			k := min(4, len(z))
			t.orders[m] = append(t.orders[m], newPanel(m, z[:k], radii, f))
			z = z[k:]
		}
	}
	return t
}

// value returns J_m(j_mn r_i), or 0 where it was left out.
func (t *radialTable) value(m, n, i int) float64 {
	p := &t.orders[m][(n-1)/4]
	if i < p.lo {
		return 0
	}
	q := &p.q[i-p.lo]
	switch (n - 1) % 4 {
	case 0:
		return q.a
	case 1:
		return q.b
	case 2:
		return q.c
	}
	return q.d
}

// newPanel works from the rim inwards: once the largest of the four, the last,
// is below the floor inside its turning point, the rest is smaller still.
func newPanel(m int, z, radii []float64, f radialFunc) panel {
	q := make([]quad, len(radii))
	last := z[len(z)-1]
	lo := len(radii)
	for lo > 0 {
		r := radii[lo-1]
		v := f(m, last, r)
		if last*r < float64(m) && math.Abs(v) < panelFloor {
			break
		}
		lo--
		e := &q[lo]
		put := [...]*float64{&e.a, &e.b, &e.c, &e.d}
		for i, zi := range z[:len(z)-1] {
			*put[i] = f(m, zi, r)
		}
		*put[len(z)-1] = v
	}
	return panel{lo: lo, q: q[lo:]}
}

// atZero returns J_m(z r) for a zero z of J_m: exactly 0 at the rim.
func atZero(m int, z, r float64) float64 {
	if r == 1 {
		return 0
	}
	return bessel.JInt(m, z*r)
}

// dot returns sum over i of q[i] v[i] for the four n and both parts.
func (p *panel) dot(v []pair) (ac, as, bc, bs, cc, cs, dc, ds float64) {
	q := p.q
	v = v[p.lo:][:len(q)]
	for i := range q {
		t, x := &q[i], &v[i]
		xc, xs := x.c, x.s
		a, b, c, d := t.a, t.b, t.c, t.d
		ac += a * xc
		as += a * xs
		bc += b * xc
		bs += b * xs
		cc += c * xc
		cs += c * xs
		dc += d * xc
		ds += d * xs
	}
	return
}

// add adds the four functions with coefficients k[0..3] to v.
func (p *panel) add(v []pair, k *[4]pair) {
	q := p.q
	v = v[p.lo:][:len(q)]
	ac, as, bc, bs := k[0].c, k[0].s, k[1].c, k[1].s
	cc, cs, dc, ds := k[2].c, k[2].s, k[3].c, k[3].s
	for i := range q {
		t, x := &q[i], &v[i]
		a, b, c, d := t.a, t.b, t.c, t.d
		x.c += (a*ac + b*bc) + (c*cc + d*dc)
		x.s += (a*as + b*bs) + (c*cs + d*ds)
	}
}

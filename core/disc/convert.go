package disc

import "hoopsheet/core/bessel"

// Converter turns expansions of order m between a polynomial family and the
// Bessel functions J_m(j_mn r) of a Basis. Its table is made once; the
// conversions do not allocate.
type Converter struct {
	edge  Edge
	m     int
	n, j  int         // numbers of Bessel functions and of shapes
	value [][]float64 // value[n-1][j] = J_b(j_mn)
	zeros []float64
	slope []float64
}

// NewConverter prepares conversions between the first n Bessel functions of
// order m of b (all of them, 1..b.N) and the first shapes of a family.
func NewConverter(b *Basis, m int, e Edge, shapes int) *Converter {
	if m < 0 || m > b.M || shapes < 1 {
		panic(errIndex)
	}
	if e != HeldEdge && e != ClampedEdge {
		panic(errEdge)
	}
	c := &Converter{
		edge: e, m: m, n: b.N, j: shapes,
		zeros: b.zeros[m*b.N : (m+1)*b.N],
		slope: b.slope[m*b.N : (m+1)*b.N],
	}
	first := int(e.Order(m, 0))
	seq := make([]float64, first+2*shapes)
	for _, z := range c.zeros {
		bessel.JSeq(seq, z)
		row := make([]float64, shapes)
		for j := range row {
			row[j] = seq[first+2*j]
		}
		c.value = append(c.value, row)
	}
	return c
}

// ToBessel writes to dst, of length N, the coefficients a_n with which
//
//	sum over j of shape[j] u_j(r)  =  sum over n = 1, 2, ... of a_n J_m(j_mn r),
//
// each exact: a_n = sum over j of shape[j] 2 J_b(j_mn) / (j_mn^(nu+1) J_{m+1}(j_mn)^2).
// The series goes on beyond N.
func (c *Converter) ToBessel(dst, shape []float64) {
	if len(dst) != c.n || len(shape) != c.j {
		panic(errLength)
	}
	for n, row := range c.value {
		var sum float64
		for j, v := range row {
			sum += v * shape[j]
		}
		z, s := c.zeros[n], c.slope[n]
		sum *= 2 / (z * z * s * s)
		if c.edge == ClampedEdge {
			sum /= z
		}
		dst[n] = sum
	}
}

// FromBessel writes to dst, of length shapes, the coefficients of HeldEdge with
// which
//
//	sum over n of coef[n-1] J_m(j_mn r)  =  sum over j of dst[j] u_j(r),
//
// each exact: dst[j] = sum over n of coef[n-1] 2 b J_b(j_mn). The terms fall off
// faster than any power of 1/b once b exceeds j_mN. It panics for ClampedEdge,
// which cannot represent a function with a slope at the rim.
func (c *Converter) FromBessel(dst, coef []float64) {
	if len(dst) != c.j || len(coef) != c.n {
		panic(errLength)
	}
	if c.edge != HeldEdge {
		panic(errEdge)
	}
	clear(dst)
	for n, row := range c.value {
		for j, v := range row {
			dst[j] += v * coef[n]
		}
	}
	for j := range dst {
		dst[j] *= 2 * c.edge.Order(c.m, j)
	}
}

// BesselShapes fills dst with the coefficients of HeldEdge with which, for any
// kappa >= 0,
//
//	J_m(kappa r) = J_m(kappa) r^m + sum over j of dst[j] u_j(r),   dst[j] = 2 b J_b(kappa),
//
// b = m + 2j + 2. At a zero of J_m the first term is absent.
func BesselShapes(dst []float64, m int, kappa float64) {
	// Project in the tension form, in which u_j is orthogonal and r^m, being
	// harmonic, is orthogonal to every u_j: 1/(2b) dst[j] is kappa^2 times the
	// Hankel transform of u_j at kappa.
	if m < 0 || kappa < 0 {
		panic(errIndex)
	}
	for j := range dst {
		b := m + 2*j + 2
		dst[j] = 2 * float64(b) * bessel.JInt(b, kappa)
	}
}

package modes

import "math"

// strain is the strain energy of a sheet in the shapes u_0 .. u_{n-1} of
// disc.HeldEdge, order m, per radial integral on the unit disc:
//
//	tension T integral |grad w|^2 + (D/a^2) [integral (Laplacian w)^2 - edge],
//
// as a change of unknowns, w = sum_j (P y)_j u_j, in which it is y'y. A mass
// matrix X becomes P'XP, whose largest eigenvalue is 1/omega^2 of the lowest
// mode.
type strain struct {
	m, n  int // order, shapes
	size  int // of y: n, or n-1 with a clamped rim
	first int // n - size
	// Limp: P is diagonal.
	scale []float64
	// Stiff: the Cholesky factor of the tridiagonal strain matrix in tails.
	diag, below []float64
	inverse     []float64 // 1/diag
	bending     []float64 // bending energy is sum bending_i t_i^2
}

// newStrain builds the strain of a sheet with tension T, bending term d = D/a^2
// (both N/m) and Poisson's ratio nu. d > 0 with tension zero is a plate.
func newStrain(m, n int, T, d, nu float64, rim Rim) *strain {
	s := &strain{m: m, n: n, size: n}
	if d == 0 {
		s.scale = make([]float64, n)
		for j := range s.scale {
			s.scale[j] = math.Sqrt(2 * float64(m+2*j+2) / T)
		}
		return s
	}
	// With b = m+2j+2, Zernike's radial polynomials R and w = sum_j q_j u_j,
	//
	//	u_j = (-1)^j (R_{b-2} - R_b)/(2b),
	//	Laplacian u_j = -(-1)^j 2 sum over s = m, m+2, .. b-2 of (s+1) R_s,
	//
	// by the Laplacian of R_n (A. J. E. M. Janssen, J. Opt. Soc. Am. A 31 (2014)
	// 1604, doi:10.1364/JOSAA.31.001604). In the tails t_i = sum over j >= i of
	// (-1)^j q_j therefore
	//
	//	integral (Laplacian w)^2 r dr = sum_i 2 (m+2i+1) t_i^2,  w'(1) = -t_0,
	//
	// the tension is tridiagonal, a clamped rim is t_0 = 0 and a supported one
	// takes off (1-nu) w'(1)^2.
	if rim == RimClamped {
		s.first, s.size = 1, n-1
	}
	s.diag, s.below = make([]float64, s.size), make([]float64, s.size)
	s.inverse, s.bending = make([]float64, s.size), make([]float64, s.size)
	for k := range s.size {
		i := k + s.first
		s.bending[k] = d * 2 * float64(m+2*i+1)
		if i == 0 && rim == RimSupported {
			s.bending[k] -= d * (1 - nu)
		}
		v := s.bending[k] + T/(2*float64(m+2*i+2))
		if i > 0 {
			v += T / (2 * float64(m+2*i))
		}
		if k > 0 {
			off := -T / (2 * float64(m+2*i))
			s.below[k] = off / s.diag[k-1]
			v -= s.below[k] * s.below[k]
		}
		s.diag[k] = math.Sqrt(v)
		s.inverse[k] = 1 / s.diag[k]
	}
	return s
}

// shapes writes the coefficients q = P y to q.
func (s *strain) shapes(q, y []float64) {
	if s.scale != nil {
		for j, f := range s.scale {
			q[j] = f * y[j]
		}
		return
	}
	s.tails(q[s.first:], y)
	if s.first == 1 {
		q[0] = 0
	}
	for j := range q {
		next := 0.0
		if j+1 < len(q) {
			next = q[j+1]
		}
		q[j] -= next
		if j%2 == 1 {
			q[j] = -q[j]
		}
	}
}

// tails writes t = L^-T y.
func (s *strain) tails(t, y []float64) {
	for k := s.size - 1; k >= 0; k-- {
		v := y[k]
		if k+1 < s.size {
			v -= s.below[k+1] * t[k+1]
		}
		t[k] = v / s.diag[k]
	}
}

// bendingEnergy returns the bending part of y'y.
func (s *strain) bendingEnergy(y []float64) float64 {
	if s.scale != nil {
		return 0
	}
	t := make([]float64, s.size)
	s.tails(t, y)
	e := 0.0
	for k, v := range t {
		e += s.bending[k] * v * v
	}
	return e
}

// congruence writes P'XP, size by size, to dst for the symmetric n by n matrix
// x, of which it uses and overwrites all. Only the lower triangle of x need be
// filled.
func (s *strain) congruence(dst, x []float64) {
	n := s.n
	if s.scale != nil {
		for i := range n {
			f := s.scale[i]
			row := x[i*n : i*n+i+1]
			for j, v := range row {
				v *= f * s.scale[j]
				dst[i*n+j], dst[j*n+i] = v, v
			}
		}
		return
	}
	for i := range n {
		for j := range i {
			if (i-j)%2 == 1 {
				x[i*n+j] = -x[i*n+j]
			}
			x[j*n+i] = x[i*n+j]
		}
	}
	// Differences along rows and columns, from the end so that x is reused.
	for i := range n {
		row := x[i*n : (i+1)*n]
		for j := n - 1; j >= 1; j-- {
			row[j] -= row[j-1]
		}
	}
	for i := n - 1; i >= 1; i-- {
		row, before := x[i*n:(i+1)*n], x[(i-1)*n:i*n]
		for j := range row {
			row[j] -= before[j]
		}
	}
	// L^-1 from the left, then from the right, by symmetry for the lower triangle
	// only.
	m := s.size
	for i := range m {
		row := x[(i+s.first)*n+s.first:][:m]
		out := dst[i*m : (i+1)*m]
		g := s.inverse[i]
		if i == 0 {
			for j, v := range row {
				out[j] = g * v
			}
			continue
		}
		f, before := g*s.below[i], dst[(i-1)*m:][:m]
		for j, v := range row {
			out[j] = g*v - f*before[j]
		}
	}
	for i := range m {
		row := dst[i*m : i*m+i+1]
		before := 0.0
		for j, v := range row {
			before = (v - s.below[j]*before) * s.inverse[j]
			row[j] = before
		}
	}
	for i := range m {
		for j := range i {
			dst[j*m+i] = dst[i*m+j]
		}
	}
}

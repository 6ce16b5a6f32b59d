package modes

import (
	"math"

	"hoopsheet/core/internal/sorting"
)

// symmetric finds the largest eigenvalues of real symmetric matrices, with
// vectors. It keeps its work space and is for one goroutine.
type symmetric struct {
	n          int
	a          []float64 // reflectors below the diagonal
	d, e       []float64 // the tridiagonal matrix
	tau        []float64
	values     []float64
	off        []float64
	lower      []float64
	diag       []float64
	up1, up2   []float64
	swapped    []bool
	projection []float64
}

func newSymmetric(n int) *symmetric {
	f := func() []float64 { return make([]float64, n) }
	return &symmetric{
		n: n, a: make([]float64, n*n), d: f(), e: f(), tau: f(), values: f(), off: f(),
		lower: f(), diag: f(), up1: f(), up2: f(), swapped: make([]bool, n), projection: f(),
	}
}

// largest returns the count largest eigenvalues of the n by n matrix c, largest
// first, and writes unit eigenvectors to the rows of vectors (count by n).
// Values are good to a few eps times the largest, vectors to that over the gap.
func (s *symmetric) largest(c []float64, count int, vectors []float64) []float64 {
	copy(s.a, c)
	s.reduce()
	s.eigenvalues()
	values := s.values[:count]
	n := s.n
	for k := range values {
		v := vectors[k*n : (k+1)*n]
		s.tridiagonalVector(values[k], k, v)
		// Neighbours closer than this need help to stay at right angles.
		for i := k - 1; i >= 0 && values[i]-values[k] < 1e-3*values[0]; i-- {
			removePart(v, vectors[i*n:(i+1)*n])
		}
	}
	for k := range values {
		s.unreduce(vectors[k*n : (k+1)*n])
	}
	return values
}

// removePart makes v orthogonal to the unit vector u and of unit length.
func removePart(v, u []float64) {
	p := dot(v, u)
	for i := range v {
		v[i] -= p * u[i]
	}
	normalise(v)
}

func normalise(v []float64) {
	f := 1 / math.Sqrt(dot(v, v))
	for i := range v {
		v[i] *= f
	}
}

// dot returns the sum of products of a with the first of b.
//
//go:noinline
func dot(a, b []float64) float64 {
	// Four sums at a time, because an addition waits for the one before.
	b = b[:len(a)]
	var s0, s1, s2, s3 float64
	i := 0
	for ; i+3 < len(a); i += 4 {
		s0 += a[i] * b[i]
		s1 += a[i+1] * b[i+1]
		s2 += a[i+2] * b[i+2]
		s3 += a[i+3] * b[i+3]
	}
	for ; i < len(a); i++ {
		s0 += a[i] * b[i]
	}
	return (s0 + s1) + (s2 + s3)
}

// reduce brings s.a to tridiagonal form by reflections H = 1 - tau v v', from
// the last row up, so that the small entries of a graded matrix go first.
func (s *symmetric) reduce() {
	// Golub & Van Loan, Matrix Computations, 4th ed., algorithm 8.3.1, run
	// backwards. Row i keeps v in columns 0..i-1, v[i-1] = 1.
	n, a := s.n, s.a
	p := s.projection
	for i := n - 1; i >= 1; i-- {
		row := a[i*n : i*n+i]
		s.d[i] = a[i*n+i]
		alpha := row[i-1]
		below := 0.0
		for _, v := range row[:i-1] {
			below += v * v
		}
		if below == 0 {
			s.tau[i], s.e[i] = 0, alpha
			continue
		}
		beta := -math.Copysign(math.Sqrt(alpha*alpha+below), alpha)
		s.tau[i], s.e[i] = (beta-alpha)/beta, beta
		f := 1 / (alpha - beta)
		for k := range i - 1 {
			row[k] *= f
		}
		row[i-1] = 1
		// p = tau A v on the leading i by i block (lower triangle stored).
		w := p[:i]
		clear(w)
		for r := range i {
			ar := a[r*n : r*n+r+1]
			vr, sum := row[r], 0.0
			for k, x := range ar[:r] {
				sum += x * row[k]
				w[k] += x * vr
			}
			w[r] += sum + ar[r]*vr
		}
		tau := s.tau[i]
		for k := range w {
			w[k] *= tau
		}
		half := tau * dot(w, row) / 2
		for k := range w {
			w[k] -= half * row[k]
		}
		for r := range i {
			ar := a[r*n : r*n+r+1]
			vr, wr := row[r], w[r]
			for k := range ar {
				ar[k] -= vr*w[k] + wr*row[k]
			}
		}
	}
	s.d[0], s.e[0] = a[0], 0
}

// unreduce turns a vector of the tridiagonal matrix into one of the matrix.
func (s *symmetric) unreduce(v []float64) {
	n := s.n
	for i := 1; i < n; i++ {
		if s.tau[i] == 0 {
			continue
		}
		row := s.a[i*n : i*n+i]
		f := s.tau[i] * dot(row, v)
		for k, x := range row {
			v[k] -= f * x
		}
	}
}

// eigenvalues writes all eigenvalues of the tridiagonal matrix to s.values,
// largest first.
func (s *symmetric) eigenvalues() {
	// Implicit QL with Wilkinson's shift: Bowdler, Martin, Reinsch & Wilkinson,
	// Numer. Math. 11 (1968) 293-306, doi:10.1007/BF02166681.
	n := s.n
	d, e := s.values, s.off
	copy(d, s.d)
	copy(e, s.e[1:])
	e[n-1] = 0
	for l := range n {
		for range 60 {
			m := l
			for ; m < n-1; m++ {
				if math.Abs(e[m]) <= 0x1p-53*(math.Abs(d[m])+math.Abs(d[m+1])) {
					break
				}
			}
			if m == l {
				break
			}
			g := (d[l+1] - d[l]) / (2 * e[l])
			r := math.Hypot(g, 1)
			g = d[m] - d[l] + e[l]/(g+math.Copysign(r, g))
			sn, cs, p := 1.0, 1.0, 0.0
			i := m - 1
			for ; i >= l; i-- {
				f, b := sn*e[i], cs*e[i]
				r = math.Sqrt(f*f + g*g)
				e[i+1] = r
				if r == 0 {
					d[i+1] -= p
					e[m] = 0
					break
				}
				sn, cs = f/r, g/r
				g = d[i+1] - p
				r = (d[i]-g)*sn + 2*cs*b
				p = sn * r
				d[i+1] = g + p
				g = cs*r - b
			}
			if r == 0 && i >= l {
				continue
			}
			d[l] -= p
			e[l], e[m] = g, 0
		}
	}
	sorting.By(d, func(x, y float64) int {
		switch {
		case x > y:
			return -1
		case x < y:
			return 1
		}
		return 0
	})
}

// tridiagonalVector writes the unit eigenvector of the tridiagonal matrix for
// the eigenvalue numbered k to v, by inverse iteration.
func (s *symmetric) tridiagonalVector(value float64, k int, v []float64) {
	n := s.n
	// Factor with row exchanges: Golub & Van Loan section 4.3 and 8.4.2.
	diag, up1, up2, lower := s.diag, s.up1, s.up2, s.lower
	for i := range n {
		diag[i] = s.d[i] - value
		up2[i] = 0
		if i+1 < n {
			up1[i] = s.e[i+1]
		} else {
			up1[i] = 0
		}
	}
	tiny := 0x1p-60 * math.Abs(s.values[0])
	for i := 0; i+1 < n; i++ {
		below := s.e[i+1]
		s.swapped[i] = math.Abs(below) > math.Abs(diag[i])
		if s.swapped[i] {
			f := diag[i] / below
			lower[i] = f
			diag[i], diag[i+1], up1[i] = below, up1[i]-f*diag[i+1], diag[i+1]
			up2[i], up1[i+1] = up1[i+1], -f*up1[i+1]
		} else {
			if diag[i] == 0 {
				diag[i] = tiny
			}
			lower[i] = below / diag[i]
			diag[i+1] -= lower[i] * up1[i]
		}
	}
	if math.Abs(diag[n-1]) < tiny {
		diag[n-1] = tiny
	}
	// A start without symmetry, the same on every run.
	for i := range v {
		v[i] = 1 + 0.5*math.Sin(float64(7*i+3*k+1))
	}
	for range 3 {
		for i := 0; i+1 < n; i++ {
			if s.swapped[i] {
				v[i], v[i+1] = v[i+1], v[i]-lower[i]*v[i+1]
			} else {
				v[i+1] -= lower[i] * v[i]
			}
		}
		for i := n - 1; i >= 0; i-- {
			x := v[i]
			if i+1 < n {
				x -= up1[i] * v[i+1]
			}
			if i+2 < n {
				x -= up2[i] * v[i+2]
			}
			v[i] = x / diag[i]
		}
		largest := 0.0
		for _, x := range v {
			largest = math.Max(largest, math.Abs(x))
		}
		for i := range v {
			v[i] /= largest
		}
		normalise(v)
	}
}

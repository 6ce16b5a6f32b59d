package modes

import "math"

// cholesky overwrites the lower triangle of a positive definite matrix (n by n)
// with L, A = LL'. It returns false if the matrix is not positive definite.
func cholesky(a []float64, n int) bool {
	for i := range n {
		row := a[i*n : i*n+i+1]
		for j := range i {
			row[j] = (row[j] - dot(row[:j], a[j*n:j*n+j])) / a[j*n+j]
		}
		d := row[i] - dot(row[:i], row[:i])
		if !(d > 0) {
			return false
		}
		row[i] = math.Sqrt(d)
	}
	return true
}

// forward solves L x = b in place, for as many of the first unknowns as x has.
func forward(l []float64, n int, x []float64) {
	for i := range x {
		x[i] = (x[i] - dot(l[i*n:i*n+i], x[:i])) / l[i*n+i]
	}
}

// backward solves L'x = b in place.
func backward(l []float64, n int, x []float64) {
	for i := n - 1; i >= 0; i-- {
		v := x[i] / l[i*n+i]
		x[i] = v
		for j, c := range l[i*n : i*n+i] {
			x[j] -= v * c
		}
	}
}

// congruent overwrites the symmetric matrix a with L^-1 A L^-T.
func congruent(a, l []float64, n int) {
	// Rows of A hold its columns too: solve for each row, turn over, and once more
	// for the lower triangle.
	for i := range n {
		forward(l, n, part(a, i, n))
	}
	for i := range n {
		for j := range i {
			a[i*n+j], a[j*n+i] = a[j*n+i], a[i*n+j]
		}
	}
	for i := range n {
		forward(l, n, part(a, i, n)[:i+1])
	}
	mirrored(a, n)
}

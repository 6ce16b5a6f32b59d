package modes

import "math"

// addLower adds factor v v' to the lower triangle of a matrix.
func addLower(c []float64, n int, v []float64, factor float64) {
	for i, x := range v {
		if x != 0 {
			addTo(c[i*n:], factor*x, v[:i+1])
		}
	}
}

// constrain projects a symmetric matrix onto what is at right angles to rows: the
// directions taken out get eigenvalue 0, below all others.
func constrain(c []float64, n int, rows [][]float64) {
	var basis [][]float64
	for _, row := range rows {
		before := math.Sqrt(dot(row, row))
		for range 2 { // once more for rounding
			for _, b := range basis {
				addTo(row, -dot(row, b), b)
			}
		}
		if after := math.Sqrt(dot(row, row)); after > 1e-9*before && after > 0 {
			basis = append(basis, scaled(row, 1/after))
		}
	}
	for _, b := range basis {
		// (1 - b b')C(1 - b b') = C - b w' - w b' + (b'w) b b', w = C b.
		w := zeros(n)
		for i := range w {
			w[i] = dot(part(c, i, n), b)
		}
		addTo(w, -dot(b, w)/2, b)
		for i := range n {
			addTo(part(c, i, n), -b[i], w)
			addTo(part(c, i, n), -w[i], b)
		}
	}
}

// pivotedCholesky factors a positive semidefinite matrix as L L' with as many
// columns as matter, biggest diagonal first and only those allowed, and returns
// the rows chosen and L (n by their number). scale holds, on its diagonal, what
// sizes are measured by.
func pivotedCholesky(a []float64, n int, scale []float64, allowed []bool) (pivots []int, l []float64) {
	// N. J. Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed.
	// (2002), section 10.3.
	largest := 0.0
	left := zeros(n)
	for i := range left {
		if allowed[i] {
			left[i] = a[i*n+i]
			largest = math.Max(largest, scale[i*n+i])
		}
	}
	var columns [][]float64
	for len(columns) < min(n, maxResidual) {
		p := 0
		for i, v := range left {
			if v > left[p] {
				p = i
			}
		}
		if left[p] <= residualTolerance*largest {
			break
		}
		column := zeros(n)
		root := math.Sqrt(left[p])
		for i := range column {
			v := a[i*n+p]
			for _, c := range columns {
				v -= c[i] * c[p]
			}
			column[i] = v / root
		}
		for _, q := range pivots {
			column[q] = 0
		}
		column[p] = root
		for i, v := range column {
			if allowed[i] {
				left[i] -= v * v
			}
		}
		left[p] = 0
		columns, pivots = append(columns, column), append(pivots, p)
	}
	l = zeros(n * len(columns))
	for e, c := range columns {
		for i, v := range c {
			l[i*len(columns)+e] = v
		}
	}
	return pivots, l
}

const (
	// maxResidual bounds the residual deflections, for speed.
	maxResidual = 120
	// residualTolerance is the share of the flexibility of an attached mass below
	// which a residual deflection is left out.
	residualTolerance = 1e-9
)

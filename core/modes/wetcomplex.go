package modes

import "math/cmplx"

// symmetricLDL factors the complex symmetric matrix in the lower triangle of a
// (n by n) in place as U D U', U unit upper triangular, from the last row up:
// in the matrices of a sheet, less an eigenvalue, the later rows are close to
// diagonal, so no exchanges are needed. floor replaces pivots that vanish.
func symmetricLDL(a []complex128, n int, floor float64) {
	for k := n - 1; k >= 1; k-- {
		row := a[k*n : k*n+k+1]
		d := row[k]
		if cmplx.Abs(d) < floor {
			d = complex(floor, 0)
			row[k] = d
		}
		inverse := 1 / d
		for i := range k {
			f := row[i] * inverse
			if f == 0 {
				continue
			}
			ai := a[i*n : i*n+i+1]
			for j := range ai {
				ai[j] -= f * row[j]
			}
		}
		for i := range k {
			row[i] *= inverse
		}
	}
	if cmplx.Abs(a[0]) < floor {
		a[0] = complex(floor, 0)
	}
}

// symmetricSolve solves with the factor of symmetricLDL, in place.
func symmetricSolve(a []complex128, n int, x []complex128) {
	for k := n - 1; k >= 1; k-- {
		f := x[k]
		for i, l := range a[k*n : k*n+k] {
			x[i] -= l * f
		}
	}
	for k := range n {
		x[k] /= a[k*n+k]
	}
	for k := 1; k < n; k++ {
		s := x[k]
		for i, l := range a[k*n : k*n+k] {
			s -= l * x[i]
		}
		x[k] = s
	}
}

package modes

import (
	"math"
	"math/rand/v2"
	"testing"
)

// residual returns |c v - value v| over |value of the largest|.
func residual(c []float64, n int, value float64, v []float64) float64 {
	sum := 0.0
	for i := range n {
		r := dot(c[i*n:(i+1)*n], v) - value*v[i]
		sum += r * r
	}
	return math.Sqrt(sum)
}

func TestSymmetricEigenpairs(t *testing.T) {
	source := rand.New(rand.NewPCG(1, 2))
	for _, n := range []int{1, 2, 3, 10, 48} {
		for _, grade := range []float64{0, 0.3} {
			c := make([]float64, n*n)
			trace := 0.0
			for i := range n {
				for j := range i + 1 {
					// Graded like the matrices of a sheet, or not at all.
					v := (source.Float64() - 0.5) * math.Exp(-grade*float64(i+j))
					c[i*n+j], c[j*n+i] = v, v
				}
				trace += c[i*n+i]
			}
			s := newSymmetric(n)
			vectors := make([]float64, n*n)
			values := s.largest(c, n, vectors)
			sum := 0.0
			scale := math.Max(math.Abs(values[0]), math.Abs(values[n-1]))
			// A backward stable reduction errs by a small multiple of n eps.
			bound := 4 * float64(n) * 0x1p-52 * scale
			for k, value := range values {
				sum += value
				v := vectors[k*n : (k+1)*n]
				if r := residual(c, n, value, v); r > bound {
					t.Errorf("n %d grade %v: residual %g of pair %d, bound %g", n, grade, r, k, bound)
				}
				for l := range k {
					// Eigenvectors of distinct values are at right angles as far as
					// the residual over the gap allows.
					gap := values[l] - value
					if p := math.Abs(dot(v, vectors[l*n:(l+1)*n])); p > 2*bound/gap+1e-14 {
						t.Errorf("n %d grade %v: vectors %d and %d meet at %g", n, grade, k, l, p)
					}
				}
			}
			if math.Abs(sum-trace) > float64(n)*bound {
				t.Errorf("n %d: eigenvalues sum to %v, trace %v", n, sum, trace)
			}
		}
	}
}

func TestSymmetricChain(t *testing.T) {
	// Eigenvalues of the second difference: 2 - 2 cos(k pi/(n+1)).
	const n = 30
	c := make([]float64, n*n)
	for i := range n {
		c[i*n+i] = 2
		if i > 0 {
			c[i*n+i-1], c[(i-1)*n+i] = -1, -1
		}
	}
	vectors := make([]float64, n*n)
	for k, got := range newSymmetric(n).largest(c, n, vectors) {
		want := 2 - 2*math.Cos(float64(n-k)*math.Pi/(n+1))
		if math.Abs(got-want) > 1e-14*4 {
			t.Errorf("eigenvalue %d is %v, want %v", k, got, want)
		}
	}
}

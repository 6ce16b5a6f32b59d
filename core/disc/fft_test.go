package disc

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/dsp/fourier"
)

// Lengths that go through every radix and every order of them.
var fftLengths = []int{2, 4, 6, 8, 10, 12, 16, 18, 20, 24, 30, 32, 36, 48, 50, 60, 64, 90, 96, 120, 128, 150, 180, 240, 256, 270, 360, 450, 500, 512, 720, 1024}

// A radix-r transform of length n has an error of at most about
// 3 eps log2(n) relative to the root mean square of the result (Higham,
// Accuracy and Stability of Numerical Algorithms, 2nd ed., theorem 24.2, with
// twiddles good to eps); both sides of the comparison have it.
func fftTol(n int) float64 {
	return 2 * 3 * 0x1p-52 * math.Log2(float64(2*n))
}

func TestFFTAgainstGonum(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for _, n := range fftLengths {
		f := NewRealFFT(n)
		g := fourier.NewFFT(n)
		row := make([]float64, n)
		var norm float64
		for i := range row {
			row[i] = rng.NormFloat64()
			norm += row[i] * row[i]
		}
		norm = math.Sqrt(norm) // |X_k| <= sqrt(n) norm; the rms of X_k is norm
		want := g.Coefficients(nil, row)
		for _, m := range []int{1, n/4 + 1, n / 2, n/2 + 1} {
			got := make([]complex128, m)
			f.Forward(got, row)
			for k := range got {
				if d := cmplx.Abs(got[k] - want[k]); d > fftTol(n)*norm*math.Sqrt(2) {
					t.Errorf("n=%d k=%d: got %v want %v", n, k, got[k], want[k])
				}
			}
		}
		for _, m := range []int{1, n / 4, n / 2} {
			if m < 1 {
				continue
			}
			src := make([]complex128, m)
			full := make([]complex128, n/2+1)
			norm := 0.0
			for k := range src {
				src[k] = complex(rng.NormFloat64(), rng.NormFloat64())
				norm += 4 * real(src[k]*cmplx.Conj(src[k]))
				full[k] = src[k]
			}
			full[0] = complex(real(full[0]), 0)
			want := g.Sequence(nil, full)
			got := make([]float64, n)
			f.Inverse(got, src)
			for j := range got {
				if d := math.Abs(got[j] - want[j]); d > fftTol(n)*math.Sqrt(norm)*math.Sqrt(float64(n)) {
					t.Errorf("inverse n=%d m=%d j=%d: got %v want %v", n, m, j, got[j], want[j])
				}
			}
		}
	}
}

func TestUnitRoot(t *testing.T) {
	for _, n := range fftLengths {
		for k := 0; k < 2*n; k++ {
			want := cmplx.Exp(complex(0, -2*math.Pi*float64(k%n)/float64(n)))
			// The unreduced angle, below 2 pi, carries three roundings of
			// 2^-53 each (pi, product, quotient); the parts add two of 2^-52.
			if cmplx.Abs(unitRoot(k, n)-want) > 3*0x1p-53*2*math.Pi+2*0x1p-52 {
				t.Fatalf("unitRoot(%d, %d) = %v, want %v", k, n, unitRoot(k, n), want)
			}
		}
	}
	for _, c := range []struct {
		k, n int
		want complex128
	}{{0, 8, 1}, {2, 8, -1i}, {4, 8, -1}, {6, 8, 1i}} {
		if got := unitRoot(c.k, c.n); got != c.want {
			t.Errorf("unitRoot(%d, %d) = %v, want exactly %v", c.k, c.n, got, c.want)
		}
	}
}

func BenchmarkFFT512(b *testing.B) {
	f := NewRealFFT(512)
	row := make([]float64, 512)
	for i := range row {
		row[i] = float64(i % 7)
	}
	dst := make([]complex128, 65)
	b.Run("forward", func(b *testing.B) {
		for range b.N {
			f.Forward(dst, row)
		}
	})
	b.Run("inverse", func(b *testing.B) {
		for range b.N {
			f.Inverse(row, dst)
		}
	})
}

package spectrum

import (
	"math"
	"math/cmplx"
	"testing"
)

// lobe returns |sum w(i/n) exp(2 pi i offset i / n)|^2 of one complex tone at bins -1, 0 and 1,
// by plain summation.
func lobe(w Window, n int, offset float64) (left, middle, right float64) {
	win := make([]float64, n)
	w.Fill(win)
	at := func(k float64) float64 {
		s := complex(0, 0)
		for i, v := range win {
			s += complex(v, 0) * cmplx.Exp(complex(0, 2*math.Pi*(offset-k)*float64(i)/float64(n)))
		}
		return real(s)*real(s) + imag(s)*imag(s)
	}
	return at(-1), at(0), at(1)
}

// TestParabolaPublished holds logParabola against estimates of the offset for true offsets of 0.1 to
// 0.4 bin, N = 1024, periodic windows, one complex tone. Method: Smith & Serra 1987; Werner &
// Germain, Appl. Sci. 6 (2016) 306. Values: check-values, section 11, six decimals printed.
func TestParabolaPublished(t *testing.T) {
	const printed = 0.5e-6 + 1e-9
	for _, c := range []struct {
		offset, rect, hann, bh float64
	}{
		{0.1, 0.021835, 0.107887, 0.101593},
		{0.2, 0.063791, 0.21387, 0.202789},
		{0.25, 0.094316, 0.265538, 0.253113},
		{0.3, 0.13378, 0.315986, 0.303188},
		{0.4, 0.255483, 0.41214, 0.402392},
		{0.5, 0.5, 0.5, 0.5},
	} {
		for w, want := range map[Window]float64{Rectangular: c.rect, Hann: c.hann, BlackmanHarris: c.bh} {
			l, m, r := lobe(w, 1024, c.offset)
			if got, _ := logParabola(l, m, r); math.Abs(got-want) > printed {
				t.Errorf("%s at %g: %.7f, want %.6f", w, c.offset, got, want)
			}
		}
	}
}

// TestParabolaWorst: with Hann and no padding the parabola is wrong by at most 0.0160075 bin, at
// 0.291 bin (check-values, section 11, from |W| = sinc(d)/(1 - d^2); printed to 3 decimals of place).
func TestParabolaWorst(t *testing.T) {
	worst, at := 0.0, 0.0
	for d := 0.0; d <= 0.5; d += 0.001 {
		p := func(delta float64) float64 { v := Hann.transform(0, delta); return real(v)*real(v) + imag(v)*imag(v) }
		got, _ := logParabola(p(-1-d), p(-d), p(1-d))
		if e := math.Abs(got - d); e > worst {
			worst, at = e, d
		}
	}
	if math.Abs(worst-0.016007528) > 1e-8 || math.Abs(at-0.291) > 0.0005 {
		t.Errorf("worst %.9f at %.4f, want 0.016007528 at 0.291", worst, at)
	}
}

// TestCramerRaoPublished: sd of omega for a real tone, 12/(SNR N (N^2-1)) under the root, SNR =
// A^2/(2 s^2). Rife & Boorstyn, IEEE Trans. Inf. Theory 20 (1974) 591-598; the second column is a
// numerical Fisher matrix of the real tone, which the formula meets within 2 % at N = 64 and 0.1 % at
// N = 1024 (check-values, section 11).
func TestCramerRaoPublished(t *testing.T) {
	for _, c := range []struct {
		n              int
		db             float64
		formula, exact float64
		within         float64
	}{
		{64, 0, 0.0067666495, 0.0068852091, 0.02},
		{64, 10, 0.0021398025, 0.0021772943, 0.02},
		{64, 20, 0.00067666495, 0.00068852091, 0.02},
		{64, 40, 6.7666495e-05, 6.8852091e-05, 0.02},
		{512, 0, 0.00029901055, 0.0002993461, 0.002},
		{512, 20, 2.9901055e-05, 2.993461e-05, 0.002},
		{1024, 0, 0.00010571604, 0.00010581374, 0.001},
		{1024, 10, 3.3430348e-05, 3.3461243e-05, 0.001},
		{1024, 20, 1.0571604e-05, 1.0581374e-05, 0.001},
		{1024, 40, 1.0571604e-06, 1.0581374e-06, 0.001},
	} {
		noise := math.Sqrt(0.5 / math.Pow(10, c.db/10)) // for A = 1
		got := CramerRao(1, 0, noise, c.n, 2*math.Pi)   // with this rate Hz are rad a sample
		if math.Abs(got/c.formula-1) > 5e-8 {           // half a step of the eighth figure printed
			t.Errorf("N = %d, %g dB: %.9g, want %.8g", c.n, c.db, got, c.formula)
		}
		if math.Abs(got/c.exact-1) > c.within {
			t.Errorf("N = %d, %g dB: %.9g, numerical Fisher matrix %.8g", c.n, c.db, got, c.exact)
		}
	}
}

// TestCramerRaoDecaying compares with the Fisher matrix of the real tone in A, d, omega and phase,
// inverted numerically. The formula leaves out sums at twice the frequency: relative to those kept
// they are at most sum g^2 exp(2 i omega i) / sum g^2 = about d / sin(omega).
func TestCramerRaoDecaying(t *testing.T) {
	const rate, n, amplitude, noise = 1.0, 4000, 0.7, 0.01
	for _, decay := range []float64{0.002, 0.005, 0.01} {
		for _, omega := range []float64{0.5, 1.3, 2.2} {
			want := fisherSD(amplitude, decay, omega, noise, n)
			got := CramerRao(amplitude, decay, noise, n, rate) * 2 * math.Pi
			if math.Abs(got/want-1) > decay/math.Sin(omega) {
				t.Errorf("d %g, omega %g: %.6g, want %.6g", decay, omega, got, want)
			}
		}
	}
	// Gone long before the end: var(omega) = 16 d^3 s^2 / A^2 a sample^3, from integrals in place of
	// sums (they differ by the part d, per sample, here 0.0016).
	if got, want := CramerRao(1, 0.01, 1, 1e6, 2*math.Pi*1), math.Sqrt(16*math.Pow(0.01/(2*math.Pi), 3)); math.Abs(got/want-1) > 0.0016 {
		t.Errorf("long record: %g, want %g", got, want)
	}
	if !math.IsInf(CramerRao(0, 1, 1, 100, 1), 1) {
		t.Error("no bound for no tone")
	}
}

// fisherSD is the standard deviation of omega from the full Fisher matrix.
func fisherSD(amplitude, decay, omega, noise float64, n int) float64 {
	var m [4][8]float64
	for i := range n {
		t := float64(i)
		g := amplitude * math.Exp(-decay*t)
		s, c := math.Sincos(omega*t + 0.4)
		d := [4]float64{g * c / amplitude, -t * g * c, -t * g * s, -g * s}
		for a := range d {
			for b := range d {
				m[a][b] += d[a] * d[b] / (noise * noise)
			}
		}
	}
	var scale [4]float64
	for a := range m {
		scale[a] = 1 / math.Sqrt(m[a][a])
	}
	for a := range m {
		for b := range 4 {
			m[a][b] *= scale[a] * scale[b]
		}
		m[a][4+a] = 1
	}
	for a := range m { // Gauss-Jordan on a matrix of unit diagonal, positive definite
		p := m[a][a]
		for b := range m[a] {
			m[a][b] /= p
		}
		for r := range m {
			if r != a {
				f := m[r][a]
				for b := range m[r] {
					m[r][b] -= f * m[a][b]
				}
			}
		}
	}
	return math.Sqrt(m[2][6]) * scale[2]
}

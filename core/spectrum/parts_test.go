package spectrum

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"
)

// TestTransform compares the closed form of a decaying tone's lobe with a sum over 4096 samples. The
// sum is a trapezoid rule but for half the difference of the ends, which is put in; its error is then
// that of the rule, (max |integrand”|) / (12 n^2): the integrand turns at most (3 + 6) times (delta
// and the window's third term), |”| < (2 pi 9)^2, which gives 1.6e-5.
func TestTransform(t *testing.T) {
	const n = 4096
	const tol = 3198.0 / (12 * n * n)
	for _, w := range Windows() {
		for _, c := range []float64{0, 1e-6, 0.5, 4, 12} {
			for _, delta := range []float64{-3.3, -1, 0, 1e-7, 0.4, 2, 5.7} {
				s := complex(0, 0)
				f := func(x, win float64) complex128 {
					return complex(win, 0) * cmplx.Exp(complex(-c*x, -2*math.Pi*delta*x))
				}
				for i := range n {
					x := float64(i) / n
					s += f(x, w.At(x)) / n
				}
				s += (f(1, w.At(0)) - f(0, w.At(0))) / (2 * n)
				if got := w.transform(c, delta); cmplx.Abs(got-s) > tol {
					t.Errorf("%s, c %g, delta %g: %v, sum %v", w, c, delta, got, s)
				}
			}
		}
	}
}

// TestTransformSeries: on both sides of the switch to a series the two agree.
func TestTransformSeries(t *testing.T) {
	for _, c := range []float64{0.99e-4, 1.01e-4} {
		s := complex(c, 0)
		series := 1 - s/2 + s*s/6
		closed := complex(-math.Expm1(-c)/c, 0)
		if got := ramp(c, 0); cmplx.Abs(got-series) > 1e-12 || cmplx.Abs(got-closed) > 1e-11 { // 1 - exp(-c) loses c's last four figures
			t.Errorf("c %g: %v, series %v, closed %v", c, got, series, closed)
		}
	}
}

// TestWindowFigures: coherent gain and noise bandwidth of Harris, Proc. IEEE 66 (1978) 51-83, table 1:
// rectangular 1.00 and 1.00 bins, Hann 0.50 and 1.50, four-term Blackman-Harris (-92 dB) 0.36 and 2.00,
// all to two decimals.
func TestWindowFigures(t *testing.T) {
	for w, want := range map[Window][2]float64{Rectangular: {1, 1}, Hann: {0.5, 1.5}, BlackmanHarris: {0.36, 2}} {
		m := w.steadyMoments()
		if math.Abs(m.wg-want[0]) > 0.005 || math.Abs(m.ww/(m.wg*m.wg)-want[1]) > 0.005 {
			t.Errorf("%s: gain %.4f, noise bandwidth %.4f, want %v", w, m.wg, m.ww/(m.wg*m.wg), want)
		}
	}
}

// TestMoments compares closed forms and the rule of 256 steps with sums over 65536 samples at their
// midpoints, whose own error is 256^2 times smaller. The rule is off by at most
// F / (12 256^2), F the largest second derivative, at most (c + 12 pi)^2 for squares of windows of
// cosines up to the third: under 0.004 at c = 12, and far less for smooth windows.
func TestMoments(t *testing.T) {
	const n = 65536
	for _, w := range Windows() {
		for _, c := range []float64{0, 0.3, 3, 12} {
			var wg, ww, wgt, a, b float64
			each := func(f func(x, win, g float64)) {
				for i := range n {
					x := (float64(i) + 0.5) / n
					f(x, w.At(x), math.Exp(-c*x))
				}
			}
			each(func(x, win, g float64) { wg += win * g / n; ww += win * win / n; wgt += win * g * x / n })
			each(func(x, win, g float64) {
				d := (x - wgt/wg) * (x - wgt/wg) / n
				a += win * win * d
				b += win * g * d
			})
			m := w.moments(c)
			tol := math.Pow(c+12*math.Pi, 2) / (12 * 256 * 256)
			if c == 0 {
				tol = 1e-8 // closed form: the sums' own error, (12 pi)^2 / (24 n^2)
			}
			for i, v := range [][2]float64{{m.wg, wg}, {m.ww, ww}, {m.wwtt, a}, {m.wgtt, b}} {
				if math.Abs(v[0]-v[1]) > tol {
					t.Errorf("%s, c %g, moment %d: %.9g, sum %.9g", w, c, i, v[0], v[1])
				}
			}
		}
	}
}

// TestEnvelope: no side lobe passes the envelope, and the first one reaches within 1.5 dB of it for
// Hann and the rectangle (Harris 1978, table 1: highest side lobes -32, -13, -92 dB; printed whole).
func TestEnvelope(t *testing.T) {
	for w, highest := range map[Window]float64{Hann: -32, Rectangular: -13, BlackmanHarris: -92} {
		top := cmplx.Abs(w.transform(0, 0))
		worst := 0.0
		for d := w.halfLobe(); d < 60; d += 0.01 {
			v := cmplx.Abs(w.transform(0, d)) / top
			worst = max(worst, v)
			if v > w.envelope(d)*(1+1e-3) { // -92 dB is printed to a decibel, 1e-3 is 0.01 dB
				t.Fatalf("%s: %.6g at %.2f bins passes the envelope %.6g", w, v, d, w.envelope(d))
			}
		}
		if db := 20 * math.Log10(worst); math.Abs(db-highest) > 0.6 {
			t.Errorf("%s: highest side lobe %.2f dB, want %g", w, db, highest)
		}
	}
}

// TestParabolaBias: the bound used holds for bins at most half a natural bin apart and every decay,
// and is not idle: it is reached within 3 %.
func TestParabolaBias(t *testing.T) {
	for _, w := range Windows() {
		worst := 0.0
		for _, natural := range []float64{2, 2.2, 2.5} {
			for _, c := range []float64{0, 0.5, 1, 2, 4, 8} {
				for d := 0.0; d <= 0.5; d += 0.01 {
					p := func(k float64) float64 { v := w.transform(c, (k-d)/natural); return real(v)*real(v) + imag(v)*imag(v) }
					got, _ := logParabola(p(-1), p(0), p(1))
					worst = max(worst, math.Abs(got-d)/natural)
				}
			}
		}
		if worst > w.parabolaBias() || worst < 0.97*w.parabolaBias() {
			t.Errorf("%s: worst %.6f natural bins, bound %.6f", w, worst, w.parabolaBias())
		}
	}
}

// TestParabolaError: with the lobe known the parabola's error is known. Four steps shrink it from
// 0.04 bin by the slope of the error, at most 0.2 for the rectangle, to 0.04 0.2^4 = 6e-5, and from
// 0.005 by 0.07 to 1.2e-7 for the others.
func TestParabolaError(t *testing.T) {
	for w, tol := range map[Window]float64{Hann: 1.2e-7, BlackmanHarris: 1.2e-7, Rectangular: 6e-5} {
		for _, c := range []float64{0, 1, 3, 6} {
			for d := -0.5; d <= 0.5; d += 0.05 {
				p := func(k float64) float64 { v := w.transform(c, (k-d)/2); return real(v)*real(v) + imag(v)*imag(v) }
				got, _ := logParabola(p(-1), p(0), p(1))
				if e := got - w.parabolaError(c, got, 2) - d; math.Abs(e) > tol {
					t.Errorf("%s, c %g, offset %.2f: left %.3g", w, c, d, e)
				}
			}
		}
	}
}

// TestDecimation: the pass band is flat and what would alias onto it is 100 dB down, by the design of
// the filter (Kaiser's formula is good to a decibel: 99 dB, ripple 1.2e-5; the pass band's gain is set
// by its value at zero frequency, itself on the ripple, so it varies by twice that).
func TestDecimation(t *testing.T) {
	for _, m := range []int{2, 3, 7} {
		h := decimationFilter(m)
		gain := func(f float64) float64 { // f in parts of the new rate
			s := 0.0
			for i, v := range h {
				s += v * math.Cos(2*math.Pi*f/float64(m)*float64(i-len(h)/2))
			}
			return math.Abs(s)
		}
		for f := 0.0; f <= 1.0/3; f += 0.005 {
			if math.Abs(gain(f)-1) > 2.4e-5 {
				t.Errorf("m %d: gain %.7f at %.3f of the new rate", m, gain(f), f)
			}
		}
		for f := 2.0 / 3; f <= float64(m)/2; f += 0.01 {
			if gain(f) > 1.2e-5 {
				t.Errorf("m %d: gain %.3g at %.3f of the new rate", m, gain(f), f)
			}
		}
		x := make([]float64, 4000)
		for i := range x {
			x[i] = math.Cos(0.3 / float64(m) * float64(i))
		}
		y := decimate(nil, x, 1001, 3002, m, h)
		if len(y) != (2001+m-1)/m {
			t.Fatalf("m %d: %d samples", m, len(y))
		}
		for i, v := range y {
			if want := x[1001+i*m]; math.Abs(v-want) > 2.4e-5 {
				t.Fatalf("m %d: sample %d is %g, want %g: the filter delays", m, i, v, want)
			}
		}
	}
	if decimation(48000, 5000) != 3 || decimation(8000, 3600) != 1 {
		t.Error("the new rate must be at least three times the highest frequency")
	}
}

// TestFloor: on white noise the floor is the mean power. With Hann natural bins are correlated:
// power correlations 4/9 and 1/36 at one and two bins make a median of m bins as good as one of
// m / (1 + 2 (4/9 + 1/36)) = m / 1.94 free ones, whose relative standard deviation is
// 1 / (ln 2 sqrt(m_free)). Averaged over the band of n = 2048 bins that is 0.044: bounds of 4 of these.
func TestFloor(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 1))
	const n, sd = 4096, 0.3
	x := make([]float64, n)
	for i := range x {
		x[i] = sd * r.NormFloat64()
	}
	a := NewAnalyzer()
	p := a.Power(nil, x, paddedLength(n), Hann)
	step := 8000.0 / float64(paddedLength(n))
	floor := a.noiseFloor(nil, p, nil, step, 8000.0/n)
	want := sd * sd * n * Hann.steadyMoments().ww
	if got := mean(floor[50:]); math.Abs(got/want-1) > 4*math.Sqrt(1.94/2048)/math.Ln2 {
		t.Errorf("floor %.4g of the mean power", got/want)
	}
}

func TestSelectNth(t *testing.T) {
	r := rand.New(rand.NewPCG(12, 1))
	for range 200 {
		x := make([]float64, 1+r.IntN(40))
		for i := range x {
			x[i] = float64(r.IntN(10))
		}
		n := r.IntN(len(x))
		v := selectNth(append([]float64{}, x...), n)
		below, same := 0, 0
		for _, y := range x {
			if y < v {
				below++
			} else if y == v {
				same++
			}
		}
		if below > n || below+same <= n {
			t.Fatalf("%v is not number %d of %v", v, n, x)
		}
	}
}

// TestPower: Parseval, for any window: sum over all M bins of |X|^2 = M sum (w x)^2.
func TestPower(t *testing.T) {
	r := rand.New(rand.NewPCG(13, 1))
	a := NewAnalyzer()
	for _, n := range []int{1, 2, 100, 777} {
		x := make([]float64, n)
		for i := range x {
			x[i] = r.NormFloat64()
		}
		for _, w := range Windows() {
			m := paddedLength(n)
			p := a.Power(nil, x, m, w)
			got := p[0] + p[m/2]
			for _, v := range p[1 : m/2] {
				got += 2 * v
			}
			want := 0.0
			for i, v := range x {
				s := v * w.At(float64(i)/float64(n))
				want += s * s * float64(m)
			}
			if math.Abs(got-want) > 1e-12*float64(m)*(want+1e-300) {
				t.Errorf("%s, n %d: %g, want %g", w, n, got, want)
			}
		}
	}
}

// TestPowerAllocates nothing once a length is known.
func TestPowerAllocates(t *testing.T) {
	a := NewAnalyzer()
	x := make([]float64, 500)
	dst := a.Power(nil, x, 1000, Hann)
	if n := testing.AllocsPerRun(20, func() { dst = a.Power(dst, x, 1000, Hann) }); n != 0 {
		t.Errorf("%g allocations", n)
	}
}

func TestPaddedLength(t *testing.T) {
	for n := 1; n < 3000; n++ {
		m := paddedLength(n)
		k := m
		for _, p := range []int{2, 3, 5} {
			for k%p == 0 {
				k /= p
			}
		}
		if m < 2*n || m%2 != 0 || k != 1 || m > 4*n {
			t.Fatalf("%d for %d", m, n)
		}
	}
}

// TestDisplay: with far fewer values than bins, a single bin is still seen.
func TestDisplay(t *testing.T) {
	power, floor := make([]float64, 5001), make([]float64, 5001)
	for i := range power {
		power[i], floor[i] = 1e-6, 1e-6
	}
	for _, at := range []int{20, 1234, 4999, 5000} {
		power[at] = 1
		var d Display
		d.fill(power, floor, 20, 5000, 100, 0.5)
		if len(d.Level) > 100 || len(d.Level) != len(d.Floor) {
			t.Fatalf("%d levels, %d floors", len(d.Level), len(d.Floor))
		}
		for i, l := range d.Level {
			f := d.Start + float64(i)*d.Step
			if near := math.Abs(f-float64(at)*0.5) <= d.Step/2; near != (l == 0) || (!near && math.Abs(l+60) > 1e-9) {
				t.Errorf("peak at %g Hz: level %g at %g Hz", float64(at)*0.5, l, f)
			}
		}
		power[at] = 1e-6
	}
}

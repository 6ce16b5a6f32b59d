package spectrum

import "math"

const (
	framesApart  = 4   // frames overlap by three quarters
	frameSNR     = 4.0 // power ratio under which a frame of the envelope no longer counts
	weightCap    = 1e4 // power ratio at which a frame's weight stops growing: beats then count, not noise
	fewestFrames = 5
	misfit       = 2.0 // weighted squared residuals, against those of noise alone, that widens the uncertainty
)

// ringDown is the decay of one tone.
type ringDown struct {
	known    bool    // enough of the envelope stands out of the noise
	decay    float64 // d in exp(-d t), 1/s; negative if it grows
	u        float64 // standard uncertainty of decay, 1/s
	start    float64 // amplitude at the start
	residual float64 // rms of the envelope about the straight line, dB
}

// envelope is the narrow-band envelope of one tone: y[m] = ln |z_m|, of frames of n samples, hop apart.
type envelope struct {
	y      []float64
	n, hop int
}

// frameOf returns the frame and the hop for frames of about the given length in seconds.
func frameOf(length, rate float64) (n, hop int) {
	hop = max(1, int(length*rate/framesApart))
	return hop * framesApart, hop
}

// follow shifts the samples by -f and averages them under overlapping Hann windows of n samples. It
// uses the memory of old. Too short an x gives no frames.
func (a *Analyzer) follow(old envelope, x []float64, rate, f float64, n, hop int) envelope {
	e := envelope{y: old.y[:0], n: n, hop: hop}
	if len(x) < n+(fewestFrames-1)*hop {
		return e
	}
	a.narrow = a.frames(a.narrow[:0], x, rate, f, n, hop)
	for _, z := range a.narrow {
		e.y = append(e.y, math.Log(max(real(z)*real(z)+imag(z)*imag(z), leastPower))/2)
	}
	return e
}

// frames appends to dst the samples shifted by -f and summed under Hann windows of n samples, hop apart.
func (a *Analyzer) frames(dst []complex128, x []float64, rate, f float64, n, hop int) []complex128 {
	a.heterodyne(x, 2*math.Pi*f/rate)
	win := a.window(Hann, n)
	for from := 0; from+n <= len(x); from += hop {
		re, im := 0.0, 0.0
		for i, v := range a.shifted[from : from+n] {
			re += win[i] * real(v)
			im += win[i] * imag(v)
		}
		dst = append(dst, complex(re, im))
	}
	return dst
}

// ringDown fits the decay rate to the envelope of the tone at f: a straight line through
//
//	ln |z_m| = b - d t_m + Re(n_m / s_m)
//
// by weighted least squares, reweighted three times. noise is the variance of a sample of the white
// noise that would give the floor met at f. The uncertainty follows from the covariance of n_m
// (frames overlap) and is widened where the residuals are larger than noise makes them, as
// beating neighbours do. What leaks in from the other tones given (all but number self) counts as
// noise of its own in each frame.
func (a *Analyzer) ringDown(e envelope, rate float64, self int, f, noise float64, others []tone) ringDown {
	// The logarithm of a magnitude at a power ratio r has the bias E1(r)/2, under 0.002 at
	// frameSNR, and the variance 1/(2 r): Rice, Bell Syst. Tech. J. 24 (1945) 46-156, sec. 3.10.
	if len(e.y) < fewestFrames {
		return ringDown{}
	}
	win := a.window(Hann, e.n)
	step, seconds := float64(e.hop)/rate, float64(e.n)/rate
	a.noise = resize(a.noise, len(e.y))
	white := max(noise*sumSquares(win), leastPower)
	for m := range a.noise {
		a.noise[m] = white
	}
	addLeaks(a.noise, others, self, f, seconds, step, e.n)
	fit := envelopeFit{y: e.y, step: step, noise: a.noise}
	if !fit.start() {
		return ringDown{}
	}
	for range 3 {
		if !fit.reweight() {
			return ringDown{}
		}
	}
	r := fit.result(overlap(win, e.hop))
	r.start = 2 * math.Exp(fit.b) / (float64(e.n) * real(Hann.transform(r.decay*seconds, 0)))
	return r
}

// addLeaks adds to each frame's noise what the other tones put into a frame of n samples, seconds
// long, at f: |A n W / 2|^2 with W the decaying tone's lobe at that distance.
func addLeaks(noise []float64, others []tone, self int, f, seconds, step float64, n int) {
	for j, o := range others {
		for _, distance := range []float64{o.f - f, o.f + f} {
			if j == self && distance == 0 {
				continue
			}
			c := o.decay * seconds
			w := Hann.transform(c, distance*seconds)
			leak := o.amplitude * float64(n) / 2
			p := leak * leak * (real(w)*real(w) + imag(w)*imag(w))
			keep := math.Exp(-2 * o.decay * step)
			for m := range noise {
				noise[m] += p
				p *= keep
			}
		}
	}
}

// heterodyne writes x[i] exp(-i omega i) to a.shifted.
func (a *Analyzer) heterodyne(x []float64, omega float64) {
	if cap(a.shifted) < len(x) {
		a.shifted = make([]complex128, len(x))
	}
	a.shifted = a.shifted[:len(x)]
	const stretch = 256 // the turning phase is set afresh so often; rounding stays under 256 ulp
	s, c := math.Sincos(omega)
	turn := complex(c, -s)
	for from := 0; from < len(x); from += stretch {
		s, c := math.Sincos(omega * float64(from))
		phase := complex(c, -s)
		for i := from; i < min(from+stretch, len(x)); i++ {
			a.shifted[i] = complex(x[i]*real(phase), x[i]*imag(phase))
			phase *= turn
		}
	}
}

// envelopeFit is a weighted straight line through y[0:used] at t = 0, step, 2 step ...
type envelopeFit struct {
	y     []float64 // ln |z|
	step  float64   // s
	noise []float64 // E |n|^2
	used  int
	b, d  float64
	tm    float64 // weighted mean time
	stt   float64 // weighted sum of squares about it
}

// start takes the frames up to where the measured envelope first meets the noise.
func (f *envelopeFit) start() bool {
	return f.fit(func(m int) float64 { return f.y[m] })
}

// reweight takes weights and the last frame from the line itself, which noise does not shake.
func (f *envelopeFit) reweight() bool {
	b, d := f.b, f.d
	return f.fit(func(m int) float64 { return b - d*float64(m)*f.step })
}

// fit uses the frames up to where the given line is no longer frameSNR above the noise.
func (f *envelopeFit) fit(line func(int) float64) bool {
	for f.used = 0; f.used < len(f.y) && f.ratio(line, f.used) > frameSNR; f.used++ {
	}
	if f.used < fewestFrames {
		return false
	}
	f.solve(line)
	return true
}

// ratio is the power over the noise in frame m, for the magnitude on the line.
func (f *envelopeFit) ratio(line func(int) float64, m int) float64 {
	return math.Exp(2*line(m)) / f.noise[m]
}

func (f *envelopeFit) weight(line func(int) float64, m int) float64 {
	return 1 / (1/f.ratio(line, m) + 1.0/weightCap)
}

func (f *envelopeFit) solve(line func(int) float64) {
	var w, wt, wy float64
	for m := range f.used {
		k := f.weight(line, m)
		w += k
		wt += k * float64(m) * f.step
		wy += k * f.y[m]
	}
	f.tm = wt / w
	ym := wy / w
	var sty float64
	f.stt = 0
	for m := range f.used {
		k, t := f.weight(line, m), float64(m)*f.step-f.tm
		f.stt += k * t * t
		sty += k * t * (f.y[m] - ym)
	}
	f.d = -sty / f.stt
	f.b = ym + f.d*f.tm
}

// result works out the uncertainty; correlation[j] is that of the noise of frames j apart.
func (f *envelopeFit) result(correlation []float64) ringDown {
	line := func(m int) float64 { return f.b - f.d*float64(m)*f.step }
	share := func(m int) float64 { // d's derivative by y[m], times the relative noise there
		return f.weight(line, m) * (float64(m)*f.step - f.tm) / f.stt / math.Sqrt(2*f.ratio(line, m))
	}
	variance, squares, expected, plain := 0.0, 0.0, 0.0, 0.0
	for m := range f.used {
		variance += correlation[0] * share(m) * share(m)
		for j := 1; j < len(correlation) && m+j < f.used; j++ {
			variance += 2 * correlation[j] * share(m) * share(m+j)
		}
		r := f.y[m] - line(m)
		plain += r * r
		squares += 2 * f.weight(line, m) * r * r
		expected += f.weight(line, m) / f.ratio(line, m)
	}
	if s := squares / expected * float64(f.used) / float64(f.used-2); s > misfit {
		variance *= s
	}
	return ringDown{
		known: true, decay: f.d, u: math.Sqrt(variance),
		residual: 20 / math.Ln10 * math.Sqrt(plain/float64(f.used)),
	}
}

// overlap returns the correlation of white noise under the window and under itself j hops later.
func overlap(win []float64, hop int) []float64 {
	out := []float64{}
	for j := 0; j*hop < len(win); j++ {
		s := 0.0
		for i := j * hop; i < len(win); i++ {
			s += win[i] * win[i-j*hop]
		}
		out = append(out, s)
	}
	for j := len(out) - 1; j >= 0; j-- {
		out[j] /= out[0]
	}
	return out
}

func sumSquares(x []float64) float64 {
	s := 0.0
	for _, v := range x {
		s += v * v
	}
	return s
}

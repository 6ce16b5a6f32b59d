package spectrum

import (
	"math"
	"math/cmplx"
)

// gliding is a line whose frequency falls with the square of its amplitude, as stretching makes a hard tap ring sharp at
// first:
//
//	exp(b + s t + k exp(-2 d t)),  d = -Re s,
//
// so that Im s / 2 pi is the frequency at no amplitude, and -2 d Im k / 2 pi what is above it at t = 0.
type gliding struct{ b, s, k complex128 }

const (
	mostGlide   = 12.0 // rad of phase that a glide may take; more is not followed from frame to frame
	fewestGlide = 12   // frames above the noise
	glideLeft   = 5e-4 // of the glide and per radian of phase that it takes: what averaging over frames does beyond first order
	glideLike   = 1.5  // squares of the residuals, against those of two lines, up to which a glide explains them as well
)

func (g gliding) at(t float64) complex128 {
	return cmplx.Exp(g.b + g.s*complex(t, 0) + g.k*complex(math.Exp(2*real(g.s)*t), 0))
}

// columns writes the derivatives by b, s and k, the rate in the exponential of k held.
func (g gliding) columns(dst []complex128, t float64) {
	v := g.at(t)
	dst[0], dst[1], dst[2] = v, v*complex(t, 0), v*complex(math.Exp(2*real(g.s)*t), 0)
}

// glide fits one gliding line, from the line that fits without a glide. It reports failure where the line is not followed
// or does not decay.
func (b *narrowBand) glide(from line) (g gliding, rss float64, ok bool) {
	if !(real(from.s) < 0) {
		return g, 0, false
	}
	if g, ok = b.followPhase(from); !ok {
		return g, 0, false
	}
	residual := func(g gliding) float64 {
		sum := 0.0
		for m, z := range b.z {
			off := z - g.at(float64(m)*b.step)
			sum += real(off)*real(off) + imag(off)*imag(off)
		}
		return sum
	}
	rss = residual(g)
	damp := 1e-3
	for range mostUpdates {
		h, right, row := newSquare(3), make([]complex128, 3), make([]complex128, 3)
		for m, z := range b.z {
			t := float64(m) * b.step
			g.columns(row, t)
			h.add(row)
			addConj(right, row, z-g.at(t))
		}
		if !h.solve(right, damp, 0) {
			return g, 0, false
		}
		trial := gliding{g.b + right[0], g.s + right[1], g.k + right[2]}
		left := residual(trial)
		if left <= rss && real(trial.s) < 0 {
			small := rss-left < 1e-9*rss
			g, rss, damp = trial, left, damp/8
			if small {
				break
			}
		} else if damp *= 8; damp > 1e8 {
			break
		}
	}
	return g, rss, real(g.s) < 0 && cmplx.Abs(g.k) < mostGlide
}

// followPhase fits the logarithm of the frames above the noise, phase and all, which is linear in b, s and k.
func (b *narrowBand) followPhase(from line) (gliding, bool) {
	g := gliding{s: from.s}
	var logs []complex128
	last := 0.0
	for _, z := range b.z {
		power := real(z)*real(z) + imag(z)*imag(z)
		if power < 2*frameSNR*b.white {
			break
		}
		phase := cmplx.Phase(z)
		if len(logs) > 0 {
			phase += 2 * math.Pi * math.Round((last-phase)/(2*math.Pi))
		}
		last = phase
		logs = append(logs, complex(math.Log(power)/2, phase))
	}
	if len(logs) < fewestGlide {
		return g, false
	}
	for range 4 {
		h, right := newSquare(3), make([]complex128, 3)
		for m, y := range logs {
			t := float64(m) * b.step
			weight := math.Exp(real(y)-real(logs[0])) + 1e-12
			row := []complex128{complex(weight, 0), complex(weight*t, 0), complex(weight*math.Exp(2*real(g.s)*t), 0)}
			h.add(row)
			addConj(right, row, y*complex(weight, 0))
		}
		if !h.solve(right, 0, 0) || !(real(right[1]) < 0) {
			return g, false
		}
		g = gliding{right[0], right[1], right[2]}
	}
	return g, true
}

// adoptGlide takes the frequency at no amplitude, the decay rate and the glide of a gliding line.
func (b *narrowBand) adoptGlide(to *found, g gliding, ratio float64) {
	rows := make([]complex128, 3*len(b.z))
	for m := range b.z {
		g.columns(rows[3*m:3*m+3], float64(m)*b.step)
	}
	variance := b.errors(rows, 3)
	scale := math.Sqrt(max(1, ratio) / 2)
	u := math.Sqrt(variance[1]) * scale
	to.f, to.decay = b.centre+imag(g.s)/(2*math.Pi), -real(g.s)
	to.amplitude = 2 * cmplx.Abs(g.at(0)) / cmplx.Abs(b.through(g.s))
	// To first order exp(k e) = 1 + k e: the frames put another factor to the faster exponential than to the line.
	through := real(b.through(complex(real(g.s), 0)) / b.through(complex(3*real(g.s), 0)))
	hertz := through * to.decay / math.Pi
	to.glide, to.glideU = -hertz*imag(g.k), hertz*math.Sqrt(variance[2])*scale
	to.uNoise, to.uParabola, to.uNeighbours = math.Hypot(u/(2*math.Pi), glideLeft*to.glide*imag(g.k)), 0, 0
	to.ring.known, to.ring.decay, to.ring.u, to.ring.start = true, to.decay, u, to.amplitude
}

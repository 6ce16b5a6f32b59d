package bessel

import (
	"math"
	"testing"
)

// Both sides of every change of method. Each pair of methods is compared where
// both hold, and each public function is followed over the switch by one ulp of
// its argument.

// Two compensated methods: each good to an ulp of the scale.
const twoMethods = 2 * ulpUnit

func TestHankelAgainstBackward(t *testing.T) {
	for x := 25.0; x < 45; x += 0.37 {
		for n := 0; n <= int(x); n++ {
			nu := float64(n)
			ah, al, bh, bl := hankelJ(0, x)
			ah, al, _, _ = up(0, n, x, ah, al, bh, bl)
			ch, cl, _, _ := intBackward(n, x)
			within(t, "upwards, downwards", nu, x, ah+al, ch+cl, twoMethods*scaleJ(nu, x))
		}
	}
}

func TestHankelAgainstNeumann(t *testing.T) {
	const x = hankelMin
	for mu := 1.0 / 64; mu < 1; mu += 1.0 / 32 {
		for n := range 40 {
			nu := mu + float64(n)
			ch, cl, dh, dl := realBackward(mu, n, x)
			var ah, al, bh, bl float64
			if nu <= x {
				ah, al, bh, bl = hankelJ(mu, x)
				ah, al, bh, bl = up(mu, n, x, ah, al, bh, bl)
			} else {
				ah, al, bh, bl = realDown(mu, n, x)
			}
			within(t, "Hankel, Neumann", nu, x, ah+al, ch+cl, twoMethods*scaleJ(nu, x))
			within(t, "Hankel, Neumann, next order", nu+1, x, bh+bl, dh+dl, twoMethods*scaleJ(nu+1, x))
		}
	}
}

func TestSeriesAgainstBackward(t *testing.T) {
	for n := range 150 {
		for _, mu := range []float64{0, 0.25, 0.875} {
			nu := float64(n) + mu
			x := math.Sqrt(2 * (nu + 1)) // at the switch
			h, l := jSeries(nu, x)
			var ah, al float64
			if mu == 0 {
				ah, al, _, _ = intBackward(n, x)
			} else {
				ah, al, _, _ = realBackward(mu, n, x)
			}
			within(t, "series, recurrence", nu, x, h+l, ah+al, twoMethods*(h+l))
			ph, pl, qh, ql := jSeriesPair(nu, x)
			within(t, "series, pair", nu, x, h+l, ph+pl, ulpUnit*h)
			v := J(nu+1, x)
			within(t, "series, next order", nu, x, qh+ql, v, 2*twoMethods*v)
		}
	}
}

func TestSequenceMethods(t *testing.T) {
	a, b := make([]float64, 61), make([]float64, 61)
	for x := 60.0; x < 90; x += 1.7 {
		seqForward(a, x)
		seqBackward(b, x)
		for n := range a {
			within(t, "JSeq upwards, downwards", float64(n), x, a[n], b[n], twoMethods*scaleJ(float64(n), x))
		}
	}
	c := make([]float64, 10)
	seqSeries(c, 0x1p-60)
	seqBackward(b[:10], 0x1p-60)
	for n := range c {
		within(t, "JSeq by series, downwards", float64(n), 0x1p-60, c[n], b[n], twoMethods*c[n])
	}
}

func TestContinuedFractionAgainstHankel(t *testing.T) {
	x := math.Nextafter(hankelMin, 0)
	for mu := 0.0; mu < 1; mu += 1.0 / 16 {
		ah, al, bh, bl := yStart(mu, x)
		ch, cl, dh, dl := hankelY(mu, x)
		within(t, "Y", mu, x, ah+al, ch+cl, twoMethods*scaleY(mu, x))
		within(t, "Y next order", mu, x, bh+bl, dh+dl, twoMethods*scaleY(mu+1, x))
	}
}

func TestTemmeAgainstContinuedFraction(t *testing.T) {
	for _, x := range []float64{1, 1.1} {
		for mu := -0.5; mu <= 0.5; mu += 1.0 / 16 {
			k0, k1, _ := kTemmePair(mu, x)
			s0, s1 := kSteed(mu, x)
			s0, s1 = s0*math.Exp(-x), s1*math.Exp(-x)
			within(t, "K", mu, x, k0, s0, promiseM*ulpUnit*k0)
			within(t, "K next order", mu, x, k1, s1, promiseM*ulpUnit*k1)
			if mu < 0 {
				continue
			}
			y0, y1, _ := yTemmePair(mu, x)
			ah, _, bh, _ := yStart(mu, x)
			within(t, "Y", mu, x, y0, ah, promiseY*ulpUnit*scaleY(mu, x))
			within(t, "Y next order", mu, x, y1, bh, promiseY*ulpUnit*scaleY(mu+1, x))
		}
	}
}

func TestDebyeAgainstOthers(t *testing.T) {
	for angle := 0.01; angle < math.Pi/2; angle += 0.03 {
		// Just outside the circle, where the others are still good.
		nu, x := debyeMin*math.Cos(angle), debyeMin*math.Sin(angle)*1.0001
		if !useDebye(nu, x) {
			continue
		}
		h, l, k := prefix(nu, x)
		sh, sl := iSum(nu, 0, x)
		h, l = mulDD(h, l, sh, sl)
		series := math.Ldexp(h+l, k)
		within(t, "I", nu, x, iDebye(nu, x, 0), series, promiseM*ulpUnit*series)
		ah, al, bh, bl := kPair(nu, x)
		if x >= steedMin {
			f := math.Ldexp(ah+al, growScale)
			within(t, "exp(x) K", nu, x, kDebye(nu, x, 1), f, promiseM*ulpUnit*f)
		}
		r := nu/x - (bh+bl)/(ah+al)
		within(t, "K'/K", nu, x, -ratioDebye(nu, x, -1), r, promiseM*ulpUnit*-r)
	}
}

func TestPhaseAgainstLocalExpansion(t *testing.T) {
	for _, nu := range []float64{0, 1e-6, 0.3, 0.5, 1, 2.75, 10, 63, 250.5, 1000} {
		for n := 11; n < 60; n++ {
			start := startZeroJ(nu, n)
			a, da := zeroJ(nu, n, start, true)
			b, db := refineZeroJ(nu, start)
			// Each is promised to 2 ulp; slopes to 4.
			within(t, "zero of J", nu, float64(n), a, b, 4*ulpUnit*b)
			within(t, "slope at zero of J", nu, float64(n), da, db, 8*ulpUnit*math.Abs(db))
			if nu == 0 {
				continue
			}
			start = startZeroJPrime(nu, n)
			a, da = zeroJPrime(nu, n, start, true)
			b, db = refineZeroJPrime(nu, start)
			within(t, "zero of J'", nu, float64(n), a, b, 4*ulpUnit*b)
			within(t, "value at zero of J'", nu, float64(n), da, db, 8*ulpUnit*math.Abs(db))
		}
	}
}

func TestPhaseReductions(t *testing.T) {
	// math.Sincos reduces by three parts of pi/4 with an error near 2^-53; the
	// compensated reduction must agree with it and with its own shift.
	r := newRand()
	for range points(2000) {
		x, mu := math.Exp(r.Float64()*16+3), r.Float64()
		ch, cl, sh, sl := phase(mu, x)
		c, s := farPhase(mu, x)
		within(t, "cosine", mu, x, ch+cl, c, 4*ulpUnit)
		within(t, "sine", mu, x, sh+sl, s, 4*ulpUnit)
		within(t, "modulus", mu, x, ch*ch+sh*sh+2*(ch*cl+sh*sl), 1, 2*ulpUnit)
	}
}

// TestOneULPAcross steps over each switch: the function may move by its slope
// and by the promised error at both points.
func TestOneULPAcross(t *testing.T) {
	type fn struct {
		name    string
		f, d    func(nu, x float64) float64
		scale   func(nu, x float64) float64
		promise float64
	}
	abs := func(f func(nu, x float64) float64) func(nu, x float64) float64 {
		return func(nu, x float64) float64 { return math.Abs(f(nu, x)) }
	}
	scaledI := func(nu, x float64) float64 { return IScaled(nu, x) * (RatioI(nu, x) - 1) }
	scaledK := func(nu, x float64) float64 { return KScaled(nu, x) * (RatioK(nu, x) + 1) }
	flat := func(nu, x float64) float64 { return (1 + nu*nu/x) / x } // bounds the slope of both ratios
	for _, f := range []fn{
		{"J", J, JPrime, scaleJ, promiseJ},
		{"Y", Y, YPrime, func(nu, x float64) float64 { return math.Max(math.Abs(Y(nu, x)), scaleJ(nu, x)) }, promiseY},
		{"IScaled", IScaled, scaledI, IScaled, promiseM},
		{"KScaled", KScaled, scaledK, KScaled, promiseM},
		{"RatioI", RatioI, flat, abs(RatioI), promiseM},
		{"RatioK", RatioK, flat, abs(RatioK), promiseM},
	} {
		for _, nu := range []float64{0, 0.3, 0.5, 0.75, 1, 2, 7.5, 12, 24, 25, 30.25, 39, 40, 80} {
			for _, x := range []float64{steedMin, hankelMin, debyeMin, math.Sqrt(2 * (nu + 1)),
				math.Sqrt(math.Max(debyeMin*debyeMin-nu*nu, 1)), math.Max(nu, 1)} {
				mid := f.f(nu, x)
				for _, to := range []float64{0, math.Inf(1)} {
					y := math.Nextafter(x, to)
					tol := math.Abs(f.d(nu, x)*(y-x)) + 2*f.promise*ulpUnit*f.scale(nu, x)
					within(t, f.name+" one ulp on", nu, x, f.f(nu, y), mid, tol)
				}
			}
		}
	}
}

func TestDecayOrder(t *testing.T) {
	for e := -3.0; e <= 6; e += 0.01 {
		x := math.Pow(10, e)
		if xi := debyeExponent(float64(decayOrder(x)), x); xi < 41 {
			t.Errorf("x=%v: exponent %v at order %d, want at least 41", x, xi, decayOrder(x))
		}
		if n := float64(underflowOrder(x)); debyeExponent(n, x) < underflowExponent {
			t.Errorf("x=%v: J of order %v does not underflow", x, n)
		}
	}
}

func TestDebyeDownAgainstOthers(t *testing.T) {
	for x := 20.0; x < 160; x += 4.7 {
		for n := int(max(x, debyeMin)) + 1; n < 320; n += 7 {
			for _, mu := range []float64{0, 0.3125, 0.875} {
				nu := float64(n) + mu
				ch, cl, dh, dl := jDebyeDown(mu, n, x)
				var ah, al, bh, bl float64
				switch {
				case mu == 0:
					ah, al, bh, bl = intBackward(n, x)
				case x >= hankelMin:
					ah, al, bh, bl = realDown(mu, n, x)
				default:
					ah, al, bh, bl = realBackward(mu, n, x)
				}
				const tiny = 2 * 0x1p-1074 // the end of the range is reached
				within(t, "Debye, recurrence", nu, x, ch+cl, ah+al, twoMethods*(ah+al)+tiny)
				within(t, "Debye, recurrence, next order", nu+1, x, dh+dl, bh+bl, twoMethods*(bh+bl)+tiny)
			}
		}
	}
}

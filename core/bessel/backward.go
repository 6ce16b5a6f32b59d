package bessel

import "math"

// startTiny starts a backward recurrence, which may then grow by a factor of
// exp(1300), far more than the range of J.
const startTiny = 0x1p-1000

// underflowExponent is the Debye exponent xi beyond which J_n(x) < 2^-1090 is
// zero in double precision.
const underflowExponent = 760

// debyeExponent returns xi = nu acosh(nu/x) - sqrt(nu^2 - x^2) for nu > x > 0,
// so that J_nu(x) is about exp(-xi)/sqrt(2 pi sqrt(nu^2 - x^2)).
func debyeExponent(nu, x float64) float64 {
	return nu*math.Acosh(nu/x) - math.Sqrt((nu-x)*(nu+x))
}

// startAbove returns an order from which a backward recurrence may start with
// zero if the value at order n is wanted to full relative accuracy.
func startAbove(n int, x float64) int {
	if float64(n) <= x+7*math.Cbrt(x) { // where xi(n) < 20.5
		return decayOrder(x)
	}
	// xi is convex, so xi(n + d) >= xi(n) + d acosh(n/x); an error of the
	// start shrinks by exp(-2 d acosh(n/x)), as J falls while Y grows.
	return n + int(21/math.Acosh(float64(n)/x)) + 3
}

// seqBackward fills dst with J_0(x)..J_{len-1}(x) for x > 0.
func seqBackward(dst []float64, x float64) {
	n := len(dst)
	m := max(startAbove(n-1, x), decayOrder(x))
	if top := underflowOrder(x); m > top {
		m = top
	}
	for k := m + 1; k < n; k++ {
		dst[k] = 0
	}
	// Normalise by J_0 + 2 J_2 + 2 J_4 + ... = 1 (DLMF 10.12.4), carried in
	// compensated arithmetic because the terms alternate.
	ih, il := invDD(x)
	var ah, al, sh, sl float64 // order k+1
	bh, bl := startTiny, 0.0   // order k
	for k := m; ; k-- {
		if k < n {
			dst[k] = bh + bl
		}
		if k == 0 {
			break
		}
		if k&1 == 0 {
			h, l := twoSum(sh, bh)
			sh, sl = h, sl+(l+bl)
		}
		h, l := step(float64(k), 0, ih, il, bh, bl, ah, al)
		ah, al, bh, bl = bh, bl, h, l
	}
	sh, sl = addDD(2*sh, 2*sl, bh, bl)
	nh, nl := divDD(1, 0, sh, sl)
	for k := range dst[:min(n, m+1)] {
		dst[k] = dst[k]*nh + dst[k]*nl
	}
}

// underflowOrder returns an order above which J_n(x) is zero in doubles.
func underflowOrder(x float64) int {
	nu := x + math.Cbrt(1.125*underflowExponent*underflowExponent*x) + 10
	// Newton on the convex xi(nu) = underflowExponent.
	for range 60 {
		d := (debyeExponent(nu, x) - underflowExponent) / math.Acosh(nu/x)
		nu = math.Max(nu-d, x+1)
		if math.Abs(d) < 0.5 {
			break
		}
	}
	return int(nu) + 2
}

// intBackward returns J_n(x) and J_{n+1}(x), normalised as seqBackward, where x
// is beyond the power series and J_n far from underflow.
func intBackward(n int, x float64) (ah, al, bh, bl float64) {
	m := max(startAbove(n+1, x), decayOrder(x))
	ih, il := invDD(x)
	var sh, sl, oh, ol, ph, pl float64
	ch, cl := startTiny, 0.0
	for k := m; k > 0; k-- {
		if k == n {
			ah, al, bh, bl = ch, cl, oh, ol
		}
		if k&1 == 0 {
			h, l := twoSum(sh, ch)
			sh, sl = h, sl+(l+cl)
		}
		ph, pl = step(float64(k), 0, ih, il, ch, cl, oh, ol)
		oh, ol, ch, cl = ch, cl, ph, pl
	}
	if n == 0 {
		ah, al, bh, bl = ch, cl, oh, ol
	}
	sh, sl = addDD(2*sh, 2*sl, ch, cl)
	nh, nl := divDD(1, 0, sh, sl)
	ah, al = mulDD(ah, al, nh, nl)
	bh, bl = mulDD(bh, bl, nh, nl)
	return ah, al, bh, bl
}

// realBackward returns J_nu and J_{nu+1} for 0 < x <= hankelMin, nu = mu + n.
// It recurs down from above and normalises by
//
//	(x/2)^lambda / Gamma(lambda) = sum over k of
//	    (lambda+2k) (lambda)_k / k! J_{lambda+2k}(x),   DLMF 10.23.15,
//
// at an order lambda >= x, lambda >= nu, where every term is positive.
func realBackward(mu float64, n int, x float64) (ah, al, bh, bl float64) {
	low := max(n, int(x)+1)
	// Half as many terms as orders: enough for 2^-60 when x <= hankelMin
	// (computed for lambda = x, the slowest case).
	terms := int(7+4.5*math.Sqrt(x)) + 1
	ih, il := invDD(x)
	var oh, ol float64
	ch, cl := 1.0, 0.0
	if float64(low) > 4*x { // growth per step at most 2(low+2 terms)/x
		ch = startTiny
	}
	var sh, sl float64
	lam, lamLow := twoSum(float64(low), mu)
	for k := 2 * terms; k >= 0; k-- {
		if k&1 == 0 {
			j := float64(k / 2)
			sh, sl = neumannTerm(lam, lamLow, j, ch, cl, sh, sl)
		}
		if k == 0 {
			break
		}
		mh, ml := twoSum(float64(low+k), mu)
		h, l := step(mh, ml, ih, il, ch, cl, oh, ol)
		oh, ol, ch, cl = ch, cl, h, l
	}
	// The prefix at lam + lamLow; its logarithmic derivative is
	// ln(x/2) - psi(lam+1), and psi(lam+1) is about ln(lam + 1/2).
	ph, pl, exp := prefix(lam, x)
	pl += ph * (lamLow * math.Log(x/(2*lam+1)))
	ph, pl = mulDD(ph, pl, lam, lamLow)
	ph, pl = divDD(ph, pl, sh, sl)
	ph, pl = math.Ldexp(ph, exp), math.Ldexp(pl, exp)
	for k := low; k > n; k-- {
		mh, ml := fastTwoSum(float64(k), mu)
		h, l := step(mh, ml, ih, il, ch, cl, oh, ol)
		oh, ol, ch, cl = ch, cl, h, l
	}
	ah, al = mulDD(ch, cl, ph, pl)
	bh, bl = mulDD(oh, ol, ph, pl)
	return ah, al, bh, bl
}

// neumannTerm is one step of Horner's rule for the sum in realBackward: it
// returns (lambda + 2j) c + (lambda + j)/(j + 1) s, lambda = lam + lamLow.
func neumannTerm(lam, lamLow, j, ch, cl, sh, sl float64) (h, l float64) {
	uh, ul := twoSum(lam, 2*j)
	ul += lamLow
	vh, vl := twoSum(lam, j)
	wh := vh / (j + 1)
	p, pe := twoProd(wh, j+1)
	wl := ((vh - p) - pe + vl + lamLow) / (j + 1)
	p, pe = twoProd(uh, ch)
	q, qe := twoProd(wh, sh)
	h, l = twoSum(p, q)
	return h, l + (pe + qe + (uh*cl + ul*ch) + (wh*sl + wl*sh))
}

// realDown returns J_nu and J_{nu+1} for nu = mu + n > x >= hankelMin: down to
// mu, normalised there by the larger of Hankel's J_mu and J_{mu+1}.
func realDown(mu float64, n int, x float64) (ah, al, bh, bl float64) {
	m := startAbove(n+1, x)
	ih, il := invDD(x)
	var oh, ol float64
	ch, cl := startTiny, 0.0
	for k := m; k > 0; k-- {
		if k == n {
			ah, al, bh, bl = ch, cl, oh, ol
		}
		mh, ml := fastTwoSum(float64(k), mu)
		h, l := step(mh, ml, ih, il, ch, cl, oh, ol)
		oh, ol, ch, cl = ch, cl, h, l
	}
	if n == 0 {
		ah, al, bh, bl = ch, cl, oh, ol
	}
	th, tl, uh, ul := hankelJ(mu, x)
	if math.Abs(oh) > math.Abs(ch) {
		th, tl, ch, cl = uh, ul, oh, ol
	}
	sh, sl := divDD(th, tl, ch, cl)
	ah, al = mulDD(ah, al, sh, sl)
	bh, bl = mulDD(bh, bl, sh, sl)
	return ah, al, bh, bl
}

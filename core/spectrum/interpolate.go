package spectrum

import "math"

// logParabola returns the top of the parabola through the logarithms of three neighbouring
// powers, as a distance from the middle bin in (-1/2, 1/2) bins and as the power there:
//
//	p = (a - c) / (2 (a - 2 b + c)),  ln P = b - (a - c) p / 4
//
// with a, b, c the logarithms. The middle power must be the largest and positive. On a Hann
// window without zero-padding the distance is wrong by up to 0.0160 bin (at 0.291 bin), with bins
// half as far apart by up to 0.0016 natural bins; it is right in the middle and half-way.
func logParabola(left, middle, right float64) (offset, power float64) {
	// Smith & Serra, "PARSHL", Proc. Int. Computer Music Conf. 1987; Werner & Germain, Appl.
	// Sci. 6 (2016) 306, doi 10.3390/app6100306.
	if left <= 0 || right <= 0 {
		return 0, middle
	}
	a, b, c := math.Log(left), math.Log(middle), math.Log(right)
	bend := a - 2*b + c
	if bend >= 0 {
		return 0, middle
	}
	p := (a - c) / (2 * bend)
	return p, math.Exp(b - (a-c)*p/4)
}

// parabolaError returns how much logParabola overstates the offset of a tone whose amplitude
// falls by exp(-c) over the window, given the offset p it returned, with bins natural to a
// natural bin. All in bins. Without noise p less this is right to 1e-6 bin (TestParabolaError).
func (w Window) parabolaError(c, p, natural float64) float64 {
	lobe := func(delta float64) float64 {
		v := w.transform(c, delta/natural)
		return real(v)*real(v) + imag(v)*imag(v)
	}
	wrong := 0.0
	for range 4 { // each step shrinks the rest by the slope of the error, under 0.1 at twice the length
		d := p - wrong
		q, _ := logParabola(lobe(-1-d), lobe(-d), lobe(1-d))
		wrong = q - d
	}
	return wrong
}

// parabolaBias is the largest error of logParabola, in bins of the unpadded length, when the
// padded length is at least twice that. It bounds the error for decaying tones too, whose lobes
// are wider. TestParabolaBias computes it.
func (w Window) parabolaBias() float64 {
	switch w {
	case BlackmanHarris:
		return 0.000386
	case Rectangular:
		return 0.0104
	}
	return 0.00163
}

package tap

import "math"

// curve is one rising quantity, ln f of a mode, over knots on the c axis: a
// piecewise cubic through y with slopes d, and beyond the knots the straight
// line on from the last.
//
// It may end before the last knot.
type curve struct {
	x, y, d []float64
	// own are the errors that the values state themselves; e estimates, interval
	// by interval, the largest error of the cubic, theirs included.
	own, e []float64
}

// newCurve interpolates y over the knots x, two or more.
func newCurve(x, y, own []float64) curve {
	// Slopes are those of the polynomial through the five nearest knots, cut
	// back so that the cubic rises everywhere (Fritsch & Carlson, SIAM J. Numer.
	// Anal. 17 (1980) 238: slopes of at most three times the chords suffice).
	// The same with three knots instead of five is of a lower order; what the
	// slopes differ by stands for their error. A slope that is off by delta makes
	// up to 4/27 h delta; twice that covers a bend in the next interval.
	y = append([]float64(nil), y...)
	for i := 1; i < len(y); i++ {
		y[i] = max(y[i], y[i-1]) // numbers that should be equal may fall by a rounding
	}
	k := curve{x: x, y: y, d: slopes(x, y, 5), own: own, e: make([]float64, len(x)-1)}
	coarse := slopes(x, y, 3)
	for i := range k.e {
		k.e[i] = (x[i+1]-x[i])/3*(math.Abs(k.d[i]-coarse[i])+math.Abs(k.d[i+1]-coarse[i+1])) + k.bend(i) + max(own[i], own[i+1]) + leastDoubt
	}
	return k
}

// leastDoubt is added to every estimated error: it is nothing beside the model
// error, and makes up for curves of so few knots that no estimate can be had.
const leastDoubt = 5e-4

// bend is the error to be feared where the chord of an interval turns sharply
// against those on both sides: a bend lies within, and nothing says where.
// Between straight lines whose slopes differ by delta, a bend at the share x of
// an interval of length h turns the chords by x delta and (1 - x) delta, and
// lies x (1 - x) h delta off its own chord: at most h times the smaller turn.
// The cubic takes half of that back.
func (k *curve) bend(i int) float64 {
	const gentle = 0.05 // change of slope that the cubic follows
	chord := func(i int) float64 { return (k.y[i+1] - k.y[i]) / (k.x[i+1] - k.x[i]) }
	turn := math.Inf(1)
	if i > 0 {
		turn = min(turn, math.Abs(chord(i)-chord(i-1)))
	}
	if i+2 < len(k.x) {
		turn = min(turn, math.Abs(chord(i+1)-chord(i)))
	}
	if math.IsInf(turn, 1) || turn < gentle {
		return 0
	}
	return (k.x[i+1] - k.x[i]) / 2 * (turn - gentle)
}

// slopes differentiates the polynomial through the count knots nearest to each
// knot and keeps the cubic through them monotone.
func slopes(x, y []float64, count int) []float64 {
	n := len(x)
	count = min(count, n)
	d := make([]float64, n)
	for i := range d {
		first := min(max(0, i-count/2), n-count)
		for j := first; j < first+count; j++ {
			if j == i {
				continue
			}
			// The derivative of Lagrange's polynomial at its knot i, by the
			// differences y_j - y_i.
			weight := 1 / (x[j] - x[i])
			for l := first; l < first+count; l++ {
				if l != i && l != j {
					weight *= (x[i] - x[l]) / (x[j] - x[l])
				}
			}
			d[i] += weight * (y[j] - y[i])
		}
		d[i] = max(0, d[i])
		for _, j := range []int{i - 1, i} {
			if j >= 0 && j+1 < n {
				d[i] = min(d[i], 3*(y[j+1]-y[j])/(x[j+1]-x[j]))
			}
		}
	}
	return d
}

// place is a point on the c axis against the knots: the interval it lies in
// and the cubic's weights there. It serves every curve over the same knots.
type place struct {
	c              float64
	i              int
	y0, y1, d0, d1 float64 // weights for the value
	sy, sd0, sd1   float64 // and for the slope: sy (y1 - y0) + ...
	beyond         float64 // signed distance from the knots, 0 inside
}

func placeOf(x []float64, c float64) place {
	n := len(x)
	i := 0
	for i < n-2 && c > x[i+1] {
		i++
	}
	return placeIn(x, i, c)
}

// placeIn is the place of c taken as one of interval i.
func placeIn(x []float64, i int, c float64) place {
	p := place{c: c, i: i, beyond: min(0, c-x[0]) + max(0, c-x[len(x)-1])}
	h := x[i+1] - x[i]
	t := min(1, max(0, (c-x[i])/h))
	u := 1 - t
	p.y0, p.y1 = u*u*(1+2*t), t*t*(3-2*t)
	p.d0, p.d1 = h*t*u*u, -h*t*t*u
	p.sy, p.sd0, p.sd1 = 6*t*u/h, u*(1-3*t), t*(3*t-2)
	return p
}

// at gives the value and the slope at a place among all the knots.
func (k *curve) at(p place) (y, slope float64) {
	i := p.i
	if last := len(k.x) - 1; i >= last {
		return k.y[last] + (p.c-k.x[last])*k.d[last], k.d[last]
	}
	y = p.y0*k.y[i] + p.y1*k.y[i+1] + p.d0*k.d[i] + p.d1*k.d[i+1]
	slope = p.sy*(k.y[i+1]-k.y[i]) + p.sd0*k.d[i] + p.sd1*k.d[i+1]
	return y + p.beyond*slope, slope
}

// inverse is the c at which the curve reaches y: the one place, because it
// rises. Beyond the knots it follows the line, and never further than far.
func (k *curve) inverse(y, far float64) float64 {
	x := k.x
	last := len(x) - 1
	line := func(i int) float64 {
		c := x[i] + (y-k.y[i])/k.d[i]
		return min(max(c, x[0]-far), x[last]+far) // d may be 0
	}
	switch {
	case y < k.y[0]:
		return line(0)
	case y > k.y[last]:
		return line(last)
	}
	i := 0
	for i < last-1 && y > k.y[i+1] {
		i++
	}
	low, high := x[i], x[i+1]
	c := low
	if rise := k.y[i+1] - k.y[i]; rise > 0 {
		c += (high - low) * (y - k.y[i]) / rise
	}
	for range 60 {
		value, slope := k.at(placeIn(x, i, c))
		if value < y {
			low = c
		} else {
			high = c
		}
		next := c + (y-value)/slope
		if !(next > low && next < high) {
			next = 0.5 * (low + high)
		}
		if math.Abs(next-c) < 1e-13 {
			return next
		}
		c = next
	}
	return c
}

// doubt is the estimated error at a place.
func (k *curve) doubt(p place) float64 { return k.e[min(p.i, len(k.e)-1)] }

package bessel

import "math"

// steedMin is the smallest argument at which the continued fractions below are
// used; they need about 100/x terms.
const steedMin = 1

// steedPQ returns p + 1/(2x) and q - 1 where p + iq = H'/H, H = J_mu + iY_mu,
// for x >= steedMin and 0 <= mu <= 1.
func steedPQ(mu, x float64) (p, q float64) {
	// The continued fraction of Temme (J. Comput. Phys. 19, 1975, 324;
	// doi:10.1016/0021-9991(75)90082-0) and Steed,
	//
	//	p + iq = -1/(2x) + i + (i/x) (a_1/(b_1 + a_2/(b_2 + ...))),
	//	a_k = (k - 1/2)^2 - mu^2,  b_k = 2 (x + ik),
	//
	// from a fixed term downwards: 100/x + 3 terms give 2e-17.
	var re, im float64
	for k := math.Floor(100/x) + 3; k >= 1; k-- {
		h := k - 0.5
		a := (h - mu) * (h + mu)
		u, v := 2*x+re, 2*k+im
		a /= u*u + v*v
		re, im = a*u, -a*v
	}
	return -im / x, re / x
}

// kSteed returns exp(x) K_mu(x) and exp(x) K_{mu+1}(x) for x >= steedMin and
// |mu| <= 1/2.
func kSteed(mu, x float64) (k0, k1 float64) {
	// Steed's form of the continued fraction for a confluent hypergeometric
	// function together with the sum that normalises it: Temme (as above);
	// Thompson and Barnett, Comput. Phys. Commun. 47 (1987) 245.
	a1 := (0.5 - mu) * (0.5 + mu)
	b := 2 * (1 + x)
	d := 1 / b
	delta := d
	h := d
	q1, q2 := 0.0, 1.0
	c := a1
	q := a1
	a := -a1
	s := q * delta
	for i := 2.0; i < 500; i++ {
		a -= 2 * (i - 1)
		c = -a * c / i
		q1, q2 = q2, (q1-b*q2)/a
		q += c * q2
		b += 2
		d = 1 / (b + a*d)
		delta *= b*d - 1
		h += delta
		ds := q * delta
		s += ds
		if math.Abs(ds) < 0x1p-56 {
			break
		}
	}
	fh, fl := hankelFactor(x)
	fh, fl = mulDD(fh, fl, halfPiH, halfPiL)
	k0 = (fh + fl) / (1 + s)
	return k0, k0 * (mu + x + 0.5 - a1*h) / x
}

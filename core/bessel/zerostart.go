package bessel

import "math"

// Starting values for zeros. Each is good to a small part of the distance to
// the neighbouring zeros, so that the refinement cannot reach another one;
// the tests count zeros to prove it.

// startZeroJ approximates j_{nu,n}.
func startZeroJ(nu float64, n int) float64 {
	if nu <= 1.5 {
		return mcMahonJ(nu, n)
	}
	// Olver's uniform expansion, DLMF 10.21.41: nu z(zeta) + f_1(zeta)/nu
	// with zeta = nu^(-2/3) a_n, a_n the n-th zero of Ai.
	s := -airyZero(n)
	zeta := s / math.Cbrt(nu*nu) // minus zeta
	w := inverseZeta(zeta)       // sqrt(z^2 - 1)
	z := math.Sqrt(1 + w*w)
	var b0 float64
	if zeta < 0.05 {
		b0 = 0.0179988721413553 // 2^(1/3)/70, the limit at the turning point
	} else {
		b0 = -5/(48*zeta*zeta) + (5/(24*w*w*w)+1/(8*w))/math.Sqrt(zeta)
	}
	h2 := 2 * math.Sqrt(zeta) / w
	return nu*z + 0.5*z*h2*b0/nu
}

// mcMahonJ is the expansion of DLMF 10.21.19 for nu small against n.
func mcMahonJ(nu float64, n int) float64 {
	a := (float64(n) + 0.5*nu - 0.25) * math.Pi
	mu := 4 * nu * nu
	b := 1 / (8 * a)
	b2 := b * b
	return a - (mu-1)*b*(1+b2*(4*(7*mu-31)/3+b2*(32*((83*mu-982)*mu+3779)/15)))
}

// startZeroJPrime approximates the n-th positive zero of J'_nu.
func startZeroJPrime(nu float64, n int) float64 {
	if nu == 0 {
		return startZeroJ(1, n)
	}
	if nu <= 1 {
		if n == 1 {
			// nu = 2 s_1 x^2 + 2 s_2 x^4 + 2 s_3 x^6 + ... with the Rayleigh
			// sums s_k of j_{nu,n}^(-2k), DLMF 10.21(xiii).
			s1 := 2 / (4 * (nu + 1))
			s2 := 2 / (16 * (nu + 1) * (nu + 1) * (nu + 2))
			s3 := 4 / (64 * (nu + 1) * (nu + 1) * (nu + 1) * (nu + 2) * (nu + 3))
			t := nu / s1
			for range 8 {
				t = nu / (s1 + t*(s2+t*s3))
			}
			return math.Sqrt(t)
		}
		// DLMF 10.21.20.
		a := (float64(n) + 0.5*nu - 0.75) * math.Pi
		mu := 4 * nu * nu
		b := 1 / (8 * a)
		return a - b*((mu+3)+b*b*4*((7*mu+82)*mu-9)/3)
	}
	s := -airyPrimeZero(n)
	w := inverseZeta(s / math.Cbrt(nu*nu))
	return nu * math.Sqrt(1+w*w)
}

// inverseZeta returns w = sqrt(z^2 - 1) >= 0 for
//
//	(2/3) t^(3/2) = w - atan(w),    t = -zeta,  DLMF 10.20.3.
func inverseZeta(t float64) float64 {
	c := 2.0 / 3 * t * math.Sqrt(t)
	w := math.Cbrt(3 * c)
	if w > 1 {
		w = c + math.Pi/2 - 1/(c+math.Pi/2)
	} else {
		w *= 1 + 0.2*w*w
	}
	for range 4 {
		d := w - math.Atan(w) - c
		d *= (1 + w*w) / (w * w)
		w -= d
		if math.Abs(d) < 1e-9*w {
			break
		}
	}
	return w
}

// airyZero approximates the n-th zero of Ai, DLMF 9.9.6 and 9.9.18.
func airyZero(n int) float64 {
	if n == 1 {
		return -2.338107410459767
	}
	t := 0.375 * math.Pi * float64(4*n-1)
	r := 1 / (t * t)
	return -math.Cbrt(t*t) * (1 + r*(5.0/48+r*(-5.0/36+r*(77125.0/82944))))
}

// airyPrimeZero approximates the n-th zero of Ai', DLMF 9.9.8 and 9.9.19.
func airyPrimeZero(n int) float64 {
	switch n {
	case 1:
		return -1.018792971647471
	case 2:
		return -3.248197582179837
	}
	t := 0.375 * math.Pi * float64(4*n-3)
	r := 1 / (t * t)
	return -math.Cbrt(t*t) * (1 + r*(-7.0/48+r*(35.0/288+r*(-181223.0/207360))))
}

package bessel

import (
	"math"
	"testing"
)

// Tolerances: the sum over the terms of an identity of the promised error of
// each, in the magnitude it is promised in, and one more ulp of each term for
// the arithmetic of the test itself.

func TestWronskianJY(t *testing.T) {
	r := newRand()
	for range points(4000) {
		nu, x := dyadic(r, 0, 300), r.Float64()*400+1e-3
		if math.IsInf(Y(nu+1, x), 0) || math.Abs(J(nu+1, x)) < 1e-290 {
			continue
		}
		a := J(nu+1, x) * Y(nu, x)
		b := J(nu, x) * Y(nu+1, x)
		scale := scaleJ(nu+1, x)*scaleY(nu, x) + scaleJ(nu, x)*scaleY(nu+1, x)
		within(t, "J_{nu+1} Y_nu - J_nu Y_{nu+1}", nu, x, a-b, 2/(math.Pi*x),
			(promiseJ+promiseY+1)*ulpUnit*scale)
	}
}

func TestWronskianIK(t *testing.T) {
	r := newRand()
	n := 0
	for range points(4000) {
		nu, x := dyadic(r, 0, 400), math.Exp(r.Float64()*25-7)
		i, i1 := IScaled(nu, x), IScaled(nu+1, x)
		k, k1 := KScaled(nu, x), KScaled(nu+1, x)
		if math.IsInf(k1, 0) || i1 < 1e-290 {
			continue
		}
		n++
		within(t, "x (I_{nu+1} K_nu + I_nu K_{nu+1})", nu, x, x*(i1*k+i*k1), 1, (2*promiseM+3)*ulpUnit)
		within(t, "x I K (I'/I - K'/K)", nu, x, x*i*k*(RatioI(nu, x)-RatioK(nu, x)), 1, (3*promiseM+4)*ulpUnit)
	}
	if n < points(2000) {
		t.Errorf("only %d points in range", n)
	}
}

func TestRecurrences(t *testing.T) {
	r := newRand()
	for range points(3000) {
		nu, x := dyadic(r, 1, 260), r.Float64()*300+1e-2
		c := 2 * nu / x
		tiny := (2 + c) * 0x1p-1074 // where a value is subnormal
		within(t, "recurrence of J", nu, x, J(nu-1, x)+J(nu+1, x), c*J(nu, x),
			(promiseJ+1)*ulpUnit*(scaleJ(nu-1, x)+scaleJ(nu+1, x)+c*scaleJ(nu, x))+tiny)
		within(t, "derivative of J", nu, x, (J(nu-1, x)-J(nu+1, x))/2, JPrime(nu, x),
			(promiseJ+1)*ulpUnit*(scaleJ(nu-1, x)+scaleJ(nu+1, x)+nu/x*scaleJ(nu, x))+tiny)
		if y := Y(nu+1, x); !math.IsInf(y, 0) {
			within(t, "recurrence of Y", nu, x, Y(nu-1, x)+y, c*Y(nu, x),
				(promiseY+1)*ulpUnit*(scaleY(nu-1, x)+scaleY(nu+1, x)+c*scaleY(nu, x)))
			within(t, "derivative of Y", nu, x, (Y(nu-1, x)-y)/2, YPrime(nu, x),
				(promiseY+1)*ulpUnit*(scaleY(nu-1, x)+scaleY(nu+1, x)+nu/x*scaleY(nu, x)))
		}
		i, k := IScaled(nu, x), KScaled(nu, x)
		if i > 1e-290 && !math.IsInf(KScaled(nu+1, x), 0) {
			within(t, "recurrence of I", nu, x, IScaled(nu+1, x)+c*i, IScaled(nu-1, x),
				(promiseM+1)*ulpUnit*3*IScaled(nu-1, x))
			within(t, "recurrence of K", nu, x, KScaled(nu-1, x)+c*k, KScaled(nu+1, x),
				(promiseM+1)*ulpUnit*3*KScaled(nu+1, x))
		}
		d := (I(nu-1, x) + I(nu+1, x)) / 2
		within(t, "derivative of I", nu, x, IPrime(nu, x), d, (3*promiseM+2)*ulpUnit*d+1e-300)
		d = (K(nu-1, x) + K(nu+1, x)) / 2
		if !math.IsInf(d, 0) {
			within(t, "derivative of K", nu, x, -KPrime(nu, x), d, (3*promiseM+2)*ulpUnit*d+1e-300)
		}
	}
}

// J_0^2 + 2 (J_1^2 + J_2^2 + ...) = 1, DLMF 10.23.3.
func TestSumOfSquares(t *testing.T) {
	dst := make([]float64, 400)
	for _, x := range []float64{0.1, 1, 5, 24.9, 25, 60, 123.4, 250} {
		JSeq(dst, x)
		sum, tol := 0.0, 0.0
		for n := len(dst) - 1; n >= 0; n-- {
			w := 2.0
			if n == 0 {
				w = 1
			}
			sum += w * dst[n] * dst[n]
			tol += w * 2 * math.Abs(dst[n]) * (promiseJ + 1) * ulpUnit * scaleJ(float64(n), x)
		}
		within(t, "sum of squares", 0, x, sum, 1, tol)
	}
}

// Neumann's addition theorem, DLMF 10.23.2, and Gegenbauer's for order 0,
// DLMF 10.23.8.
func TestAdditionTheorems(t *testing.T) {
	const n = 220
	a, b := make([]float64, n), make([]float64, n)
	r := newRand()
	at := func(s []float64, k int) float64 {
		switch {
		case k >= n || k <= -n:
			return 0
		case k >= 0:
			return s[k]
		case k&1 == 0:
			return s[-k]
		}
		return -s[-k]
	}
	for range points(200) {
		x, y, phi := r.Float64()*60, r.Float64()*60, r.Float64()*math.Pi
		JSeq(a, x)
		JSeq(b, y)
		m := r.IntN(40)
		sum, size := 0.0, 0.0
		for k := -n + 1; k < n; k++ {
			p := at(a, m-k) * at(b, k)
			sum += p
			size += math.Abs(p)
		}
		// The envelope exceeds |J| in the mean by a factor below 2; the
		// rounding of x + y moves J by at most half an ulp of it.
		tol := (2*2*promiseJ+2)*ulpUnit*size + ulpUnit*(x+y)/2
		within(t, "J_m(x+y)", float64(m), x+y, JInt(m, x+y), sum, tol)

		w := math.Sqrt(math.Max(0, x*x+y*y-2*x*y*math.Cos(phi)))
		sum, size = 0, 0
		for k := n - 1; k >= 0; k-- {
			p := 2 * a[k] * b[k]
			if k == 0 {
				p /= 2
			}
			sum += p * math.Cos(float64(k)*phi)
			size += math.Abs(p) * (1 + float64(k)*phi/8)
		}
		// w^2 is good to 3 ulp of (x+y)^2, and |dJ_0/d(w^2)| <= 1/4.
		tol = (2*2*promiseJ+2)*ulpUnit*size + 3*ulpUnit*(x+y)*(x+y)/4
		within(t, "J_0(w)", 0, w, J(0, w), sum, tol)
	}
}

// Closed forms for order 1/2, DLMF 10.16.1 and 10.39.1-2.
func TestHalfOddOrders(t *testing.T) {
	r := newRand()
	for range points(2000) {
		x := math.Exp(r.Float64()*12 - 5)
		f := math.Sqrt(2 / (math.Pi * x))
		// Sin, Cos, Sqrt and the products add at most 3 ulp.
		within(t, "J_1/2", 0.5, x, J(0.5, x), f*math.Sin(x), (promiseJ+3)*ulpUnit*scaleJ(0.5, x))
		within(t, "Y_1/2", 0.5, x, Y(0.5, x), -f*math.Cos(x), (promiseY+3)*ulpUnit*scaleY(0.5, x))
		k := math.Sqrt(math.Pi / (2 * x))
		within(t, "exp(x) K_1/2", 0.5, x, KScaled(0.5, x), k, (promiseM+3)*ulpUnit*k)
		i := f * -math.Expm1(-2*x) / 2
		within(t, "exp(-x) I_1/2", 0.5, x, IScaled(0.5, x), i, (promiseM+4)*ulpUnit*i)
		q := 1 + 1/(2*x)
		within(t, "K'/K", 0.5, x, RatioK(0.5, x), -q, (promiseM+2)*ulpUnit*q)
	}
}

// Orthogonality on the unit disc, DLMF 10.22.37-38:
// the integral of r J(j_n r) J(j_k r) is J_{nu+1}(j_n)^2/2 for n = k, else 0.
func TestOrthogonality(t *testing.T) {
	nodes, weights := gaussLegendre(120)
	const zeros = 25
	z, d := make([]float64, zeros), make([]float64, zeros)
	for _, nu := range []float64{0, 1, 2.5, 7, 40} {
		ZerosJAndDerivative(z, d, nu)
		for n := range z {
			for k := range n + 1 {
				sum := 0.0
				for i, s := range nodes {
					sum += weights[i] * s * J(nu, z[n]*s) * J(nu, z[k]*s)
				}
				want := 0.0
				if n == k {
					want = d[n] * d[n] / 2
				}
				// The rule is exact far beyond degree j_n + j_k. |J| <= 1 with
				// its promised error, and a rounded argument moves each factor
				// by at most z ulp.
				tol := ulpUnit * (2*promiseJ + z[n] + z[k]) / 2
				within(t, "orthogonality", nu, z[n], sum, want, tol)
			}
		}
	}
}

// gaussLegendre returns the rule of n points on [0, 1], by Newton's method.
func gaussLegendre(n int) (x, w []float64) {
	x, w = make([]float64, n), make([]float64, n)
	for i := range x {
		s := math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		var dp float64
		for range 10 {
			p0, p1 := 1.0, s
			for k := 2; k <= n; k++ {
				p0, p1 = p1, (float64(2*k-1)*s*p1-float64(k-1)*p0)/float64(k)
			}
			dp = float64(n) * (s*p1 - p0) / (s*s - 1)
			s -= p1 / dp
		}
		x[i], w[i] = (1+s)/2, 1/((1-s*s)*dp*dp)
	}
	return x, w
}

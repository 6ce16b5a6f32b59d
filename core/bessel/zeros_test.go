package bessel

import (
	"math"
	"testing"
)

var zeroOrders = []float64{0, 1e-9, 1e-3, 0.1, 0.4, 0.5, 0.6, 1, 1.4999, 1.5001, 2, 3.25, 5, 10, 20.5, 39, 40, 100, 333.25, 1000}

// Sturm's comparison theorem: the gaps between zeros of J_nu fall towards pi
// for nu > 1/2 and rise towards it for nu < 1/2 (Watson 15.83). A zero missed
// or doubled breaks that.
func TestGapsAreMonotone(t *testing.T) {
	z := make([]float64, 500)
	for _, nu := range zeroOrders {
		ZerosJ(z, nu)
		last := math.Inf(1)
		if nu < 0.5 {
			last = 0
		}
		for k := 1; k < len(z); k++ {
			gap := z[k] - z[k-1]
			slack := 4 * 2 * ulpUnit * z[k] // two ulp for each of four zeros
			switch {
			case nu > 0.5 && !(gap < last+slack && gap > math.Pi-slack),
				nu < 0.5 && !(gap > last-slack && gap < math.Pi+slack),
				nu == 0.5 && math.Abs(gap-math.Pi) > slack:
				t.Errorf("nu=%v: gap %v after zero %d, gap before %v", nu, gap, k, last)
			}
			last = gap
		}
	}
}

// The bounds of Qu and Wong (Trans. AMS 351, 1999, 2833), DLMF 10.21(viii),
// nu - a_k (nu/2)^(1/3) < j_{nu,k} < that + (3/20) a_k^2 (2/nu)^(1/3), hold for
// all nu > 0 and fix the number of each zero as long as they are closer than
// the zeros, here for the first two.
func TestFirstZerosWithinBounds(t *testing.T) {
	airy := []float64{-2.338107410459767, -4.087949444130970}
	for _, nu := range zeroOrders {
		if nu < 1 {
			continue
		}
		for k, a := range airy {
			lo := nu - a*math.Cbrt(nu/2)
			hi := lo + 0.15*a*a*math.Cbrt(2/nu)
			if z := ZeroJ(nu, k+1); !(lo < z && z < hi) {
				t.Errorf("j(%v, %d) = %v, outside (%v, %v)", nu, k+1, z, lo, hi)
			}
		}
	}
}

// nu <= j'_{nu,1} < j_{nu,1} < j'_{nu,2} < ... and j_{nu,k} < j_{nu+1,k} <
// j_{nu,k+1}, DLMF 10.21.2-3.
func TestInterlacing(t *testing.T) {
	const n = 300
	j, p, next := make([]float64, n), make([]float64, n), make([]float64, n)
	for _, nu := range zeroOrders {
		ZerosJ(j, nu)
		ZerosJPrime(p, nu)
		ZerosJ(next, nu+1)
		if p[0] < nu {
			t.Errorf("nu=%v: first zero of J' at %v", nu, p[0])
		}
		for k := range n - 1 {
			lo, hi := p[k], p[k+1]
			if nu == 0 { // its first positive zero is beyond the first of J
				lo, hi = 0, p[k]
				if k > 0 {
					lo = p[k-1]
				}
			}
			if !(lo < j[k] && j[k] < hi) {
				t.Errorf("nu=%v: zero %d of J, %v, not between %v and %v", nu, k+1, j[k], lo, hi)
			}
			if !(j[k] < next[k] && next[k] < j[k+1]) {
				t.Errorf("nu=%v: zero %d of the next order, %v, not between %v and %v", nu, k+1, next[k], j[k], j[k+1])
			}
		}
	}
}

// Every zero is a change of sign within two ulp, and J alternates between.
func TestSignChanges(t *testing.T) {
	r := newRand()
	for range points(3000) {
		nu := math.Exp(r.Float64()*12 - 5)
		n := int(math.Exp(r.Float64() * 6))
		z := ZeroJ(nu, n)
		up, down := J(nu, z*(1+2*ulpUnit)), J(nu, z*(1-2*ulpUnit))
		if up*down > 0 {
			t.Errorf("J(%v) does not change sign at zero %d, %v", nu, n, z)
		}
		// The slope at the n-th zero is negative for odd n.
		if (up < down) != (n&1 == 1) {
			t.Errorf("J(%v) has the wrong slope at zero %d, %v", nu, n, z)
		}
		z = ZeroJPrime(nu, n)
		up, down = JPrime(nu, z*(1+2*ulpUnit)), JPrime(nu, z*(1-2*ulpUnit))
		if up*down > 0 || (up < down) != (n&1 == 1) {
			t.Errorf("J'(%v) does not change sign rightly at zero %d, %v", nu, n, z)
		}
	}
}

// The number of zeros below x, counted by sign changes on a grid of eight
// points to a half wave.
func TestCountBySigns(t *testing.T) {
	for _, nu := range []float64{0, 0.3, 1, 7, 22.5, 60} {
		count := 0
		last := 1.0
		for x := nu + 0.1; x < 260; x += 0.4 {
			v := J(nu, x)
			if v*last < 0 {
				count++
				if z := ZeroJ(nu, count); !(z > x-0.4 && z <= x) {
					t.Errorf("nu=%v: zero %d = %v, sign change in (%v, %v)", nu, count, z, x-0.4, x)
				}
			}
			last = v
		}
		if count < 50 {
			t.Errorf("nu=%v: %d sign changes", nu, count)
		}
	}
}

// Zeros rise with the order, DLMF 10.21(iv), at a rate between 1 and 2.
func TestMonotoneInOrder(t *testing.T) {
	r := newRand()
	for range points(2000) {
		nu := r.Float64() * 300
		d := math.Exp(-r.Float64() * 15)
		n := 1 + r.IntN(60)
		a, b := ZeroJ(nu, n), ZeroJ(nu+d, n)
		if !(b > a) {
			t.Errorf("j(%v, %d) = %v, j(%v, %d) = %v", nu, n, a, nu+d, n, b)
		}
		if nu == 0 {
			continue
		}
		if a, b = ZeroJPrime(nu, n), ZeroJPrime(nu+d, n); !(b > a) {
			t.Errorf("j'(%v, %d) = %v, j'(%v, %d) = %v", nu, n, a, nu+d, n, b)
		}
	}
}

// Far out zeros are a phase of pi apart and J at the middle has the sign of
// its number: no slip in a million.
func TestFarZeros(t *testing.T) {
	for _, nu := range []float64{0, 0.7, 40, 999.5} {
		for _, n := range []int{1000, 99_999, 1_000_000} {
			a, b := ZeroJ(nu, n), ZeroJ(nu, n+1)
			within(t, "gap", nu, float64(n), b-a, math.Pi, 4*ulpUnit*b+math.Pi*(nu*nu+1)/(a*a))
			if v := J(nu, a+(b-a)/2); (v < 0) != (n&1 == 1) {
				t.Errorf("J(%v) after zero %d is %v", nu, n, v)
			}
			// (n + nu/2 - 1/4) pi - (4 nu^2 - 1)/(8 that), DLMF 10.21.19; the
			// next term is below mu^2 / (8 b)^3 * 28/3.
			beta := (float64(n) + nu/2 - 0.25) * math.Pi
			mu := 4 * nu * nu
			within(t, "McMahon", nu, float64(n), a, beta-(mu-1)/(8*beta),
				4*ulpUnit*beta+10*(mu+31)*(mu+1)/math.Pow(8*beta, 3))
		}
	}
}

// A sequence and single calls start differently and must agree.
func TestSequenceAgainstSingle(t *testing.T) {
	z, d := make([]float64, 120), make([]float64, 120)
	for _, nu := range zeroOrders {
		ZerosJAndDerivative(z, d, nu)
		for k, v := range z {
			within(t, "zero of J", nu, float64(k+1), v, ZeroJ(nu, k+1), 4*ulpUnit*v)
			within(t, "slope", nu, float64(k+1), d[k], JPrime(nu, v), 8*ulpUnit*math.Abs(d[k]))
		}
		ZerosJPrimeAndValue(z, d, nu)
		for k, v := range z {
			within(t, "zero of J'", nu, float64(k+1), v, ZeroJPrime(nu, k+1), 4*ulpUnit*v)
			within(t, "value", nu, float64(k+1), d[k], J(nu, v), 8*ulpUnit*math.Abs(d[k]))
		}
	}
}

// Starts must be well inside the basin of their zero: within an eighth of the
// gap to the next one, and of the distance to the turning point.
func TestStarts(t *testing.T) {
	for _, nu := range zeroOrders {
		for n := 1; n < 60; n++ {
			z, next := ZeroJ(nu, n), ZeroJ(nu, n+1)
			within(t, "start", nu, float64(n), startZeroJ(nu, n), z, (next-z)/8)
			z, next = ZeroJPrime(nu, n), ZeroJPrime(nu, n+1)
			within(t, "start of J'", nu, float64(n), startZeroJPrime(nu, n), z, math.Min(next-z, z)/8)
		}
	}
}

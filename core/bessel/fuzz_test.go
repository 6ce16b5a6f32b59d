package bessel

import (
	"math"
	"testing"
)

// fold maps any float64 to [0, top], keeping what is inside already.
func fold(v, top float64) float64 {
	v = math.Abs(v)
	if !(v <= top) {
		v = math.Mod(v, top)
	}
	if math.IsNaN(v) {
		return top / 2
	}
	return v
}

// FuzzAnyArguments: no call panics or hangs, and NaN comes exactly where the
// rule says.
func FuzzAnyArguments(f *testing.F) {
	for _, nu := range []float64{0, 0.5, 1, -1, 24.999, 1e-300, 999.5, 1e6, 1e300, math.NaN(), math.Inf(1)} {
		for _, x := range []float64{0, 1, -1, 25, 1e-320, 1e-20, 1e6, 1e10, math.NaN(), math.Inf(-1)} {
			f.Add(nu, x)
		}
	}
	f.Add(27.5, 9e-20) // K of this and the next order overflow, their ratio does not
	f.Fuzz(func(t *testing.T, nu, x float64) {
		if nu > 2000 && nu <= MaxOrder { // keeps an execution short
			nu = math.Mod(nu, 2000)
		}
		bad := !(nu >= 0 && nu <= MaxOrder) || math.IsNaN(x)
		twoSided := bad || x < 0 && nu != math.Floor(nu)
		oneSided := bad || x < 0
		for _, c := range []struct {
			name string
			v    float64
			nan  bool
		}{
			{"J", J(nu, x), twoSided}, {"JPrime", JPrime(nu, x), twoSided},
			{"I", I(nu, x), twoSided}, {"IScaled", IScaled(nu, x), twoSided}, {"RatioI", RatioI(nu, x), twoSided},
			{"IPrime", IPrime(nu, x), twoSided},
			{"Y", Y(nu, x), oneSided}, {"YPrime", YPrime(nu, x), oneSided},
			{"K", K(nu, x), oneSided}, {"KScaled", KScaled(nu, x), oneSided}, {"RatioK", RatioK(nu, x), oneSided},
			{"KPrime", KPrime(nu, x), oneSided},
		} {
			if math.IsNaN(c.v) != c.nan {
				t.Errorf("%s(%v, %v) = %v", c.name, nu, x, c.v)
			}
		}
		if j := J(nu, x); math.Abs(j) > 1 {
			t.Errorf("J(%v, %v) = %v", nu, x, j)
		}
	})
}

// FuzzIdentities: Wronskians and ratios hold over the whole domain.
func FuzzIdentities(f *testing.F) {
	for _, nu := range []float64{0, 0.25, 1, 7, 24, 25, 39, 40, 200, 900} {
		for _, x := range []float64{1e-3, 0.99, 1, 4, 24.9, 25, 40, 200, 1e4, 1e6} {
			f.Add(nu, x)
		}
	}
	f.Fuzz(func(t *testing.T, nu, x float64) {
		nu, x = math.Floor(fold(nu, 1000)*1024)/1024, fold(x, 1e6)
		if x < 1e-6 {
			return
		}
		if j1, y1 := J(nu+1, x), Y(nu+1, x); math.Abs(j1) > 1e-290 && !math.IsInf(y1, 0) {
			a, b := j1*Y(nu, x), J(nu, x)*y1
			scale := scaleJ(nu+1, x)*scaleY(nu, x) + scaleJ(nu, x)*scaleY(nu+1, x)
			within(t, "Wronskian of J and Y", nu, x, a-b, 2/(math.Pi*x), (promiseJ+promiseY+1)*ulpUnit*scale)
		}
		if i, k := IScaled(nu, x), KScaled(nu, x); i > 1e-290 && !math.IsInf(k, 0) {
			within(t, "Wronskian of I and K", nu, x, x*i*k*(RatioI(nu, x)-RatioK(nu, x)), 1, (3*promiseM+4)*ulpUnit)
		}
	})
}

// FuzzZeros: each zero is a change of sign of the right direction.
func FuzzZeros(f *testing.F) {
	for _, nu := range []float64{0, 1e-12, 0.5, 1.5, 40, 999} {
		for _, n := range []int{1, 2, 10, 11, 12, 200, 1_000_000} {
			f.Add(nu, n)
		}
	}
	f.Fuzz(func(t *testing.T, nu float64, n int) {
		nu = fold(nu, 1000)
		n = 1 + (n&math.MaxInt)%1_000_000
		z := ZeroJ(nu, n)
		up, down := J(nu, z*(1+2*ulpUnit)), J(nu, z*(1-2*ulpUnit))
		// Far out the promised error of J is larger than its change over two
		// ulp only if x ulp is below it, which it never is for x >= 2.
		if up*down > 0 || (up < down) != (n&1 == 1) {
			t.Errorf("j(%v, %d) = %v: J beside it is %v and %v", nu, n, z, down, up)
		}
		if p := ZeroJPrime(nu, n); nu > 0 && !(p < z && p >= nu) {
			t.Errorf("j'(%v, %d) = %v, j = %v", nu, n, p, z)
		}
	})
}

// FuzzAnnulus: roots of neighbouring number and of nested conditions interlace.
func FuzzAnnulus(f *testing.F) {
	for _, q := range []float64{0.01, 0.1, 0.5, 0.9, 0.99} {
		for _, m := range []int{0, 1, 7, 300} {
			f.Add(m, q, 1)
			f.Add(m, q, 9)
		}
	}
	f.Fuzz(func(t *testing.T, m int, q float64, n int) {
		m, q, n = (m&math.MaxInt)%500, 0.01+fold(q, 0.98), 1+(n&math.MaxInt)%200
		z, next := ZeroAnnulus(m, q, n), ZeroAnnulus(m, q, n+1)
		if !(z < next) {
			t.Errorf("m=%d q=%v: roots %d and %d are %v and %v", m, q, n, n+1, z, next)
		}
		// Freeing the inner edge lowers every root, freeing the outer as well;
		// a removed constraint moves it past no more than one.
		for _, e := range edgePairs[2:] {
			p := ZeroAnnulusEdges(m, q, n, e[0], e[1])
			slack := 4 * ulpUnit * z * math.Max(1, q/(1-q))
			if !(p <= z+slack) {
				t.Errorf("m=%d q=%v edges %v: root %d = %v, clamped %v", m, q, e, n, p, z)
			}
		}
	})
}

package bessel

import (
	"math"
	"testing"
)

var (
	nan  = math.NaN()
	inf  = math.Inf(1)
	tiny = math.SmallestNonzeroFloat64
)

func same(a, b float64) bool {
	return a == b || math.IsNaN(a) && math.IsNaN(b)
}

func TestSpecialValues(t *testing.T) {
	for _, c := range []struct {
		name        string
		f           func(nu, x float64) float64
		nu, x, want float64
	}{
		{"J", J, nan, 1, nan}, {"J", J, 1, nan, nan}, {"J", J, -1, 1, nan}, {"J", J, inf, 1, nan},
		{"J", J, 2e6, 1, nan}, {"J", J, 0.5, -1, nan},
		{"J", J, 0, 0, 1}, {"J", J, 1, 0, 0}, {"J", J, 0.5, 0, 0}, {"J", J, 0, inf, 0}, {"J", J, 3, -inf, 0},
		{"J", J, 0, tiny, 1}, {"J", J, 1, tiny, 0}, {"J", J, 1, 2e-308, 1e-308}, {"J", J, 500, 1e-3, 0},
		{"J", J, 1000, 20, 0}, {"J", J, 1e6, 1, 0},
		{"JPrime", JPrime, 0, 0, 0}, {"JPrime", JPrime, 1, 0, 0.5}, {"JPrime", JPrime, 0.5, 0, inf},
		{"JPrime", JPrime, 2, 0, 0}, {"JPrime", JPrime, 0, inf, 0}, {"JPrime", JPrime, nan, 1, nan},
		{"Y", Y, 0, 0, -inf}, {"Y", Y, 2.5, 0, -inf}, {"Y", Y, 0, -1, nan}, {"Y", Y, nan, 1, nan},
		{"Y", Y, 1, nan, nan}, {"Y", Y, 0, inf, 0}, {"Y", Y, 1000, 1, -inf}, {"Y", Y, 1, tiny, -inf},
		{"YPrime", YPrime, 1, 0, inf}, {"YPrime", YPrime, 1000, 1, inf}, {"YPrime", YPrime, 1, -1, nan},
		{"I", I, 0, 0, 1}, {"I", I, 1, 0, 0}, {"I", I, 0, inf, inf}, {"I", I, 0, 720, inf}, {"I", I, 0.5, -1, nan},
		{"I", I, 1000, 1, 0}, {"I", I, nan, 1, nan}, {"I", I, -1, 1, nan}, {"I", I, 1, -inf, -inf},
		{"IScaled", IScaled, 0, inf, 0}, {"IScaled", IScaled, 0, 0, 1}, {"IScaled", IScaled, 3, nan, nan},
		{"IPrime", IPrime, 1, 0, 0.5}, {"IPrime", IPrime, 0, 0, 0}, {"IPrime", IPrime, 0.5, 0, inf}, {"IPrime", IPrime, -1, 0, nan},
		{"K", K, 0, 0, inf}, {"K", K, 0, inf, 0}, {"K", K, 0, 800, 0}, {"K", K, 1000, 1, inf}, {"K", K, 0, -1, nan},
		{"KScaled", KScaled, 0, inf, 0}, {"KScaled", KScaled, 1000, 1, inf}, {"KScaled", KScaled, nan, 1, nan},
		{"KPrime", KPrime, 0, 0, -inf}, {"KPrime", KPrime, 0, 800, 0},
		{"RatioI", RatioI, 0, 0, 0}, {"RatioI", RatioI, 2, 0, inf}, {"RatioI", RatioI, 2, inf, 1},
		{"RatioI", RatioI, 2, -inf, -1}, {"RatioI", RatioI, 0.5, -1, nan}, {"RatioI", RatioI, nan, 1, nan},
		{"RatioK", RatioK, 2, 0, -inf}, {"RatioK", RatioK, 2, inf, -1}, {"RatioK", RatioK, 2, -1, nan},
	} {
		if got := c.f(c.nu, c.x); !same(got, c.want) {
			t.Errorf("%s(%v, %v) = %v, want %v", c.name, c.nu, c.x, got, c.want)
		}
	}
}

// Values at the ends of the range, from mpmath 1.2.1 at 40 digits.
func TestRangeEnds(t *testing.T) {
	for _, c := range []struct {
		name           string
		got, want, tol float64
	}{
		// A subnormal result is good to one unit of 2^-1074.
		{"J(150, 0.5)", J(150, 0.5), 0, 0},
		{"J(2, 1e-160)", J(2, 1e-160), 1.25e-321, 5e-324},
		{"J(0.5, 1e-300)", J(0.5, 1e-300), 7.978845608028654e-151, 4e-166},
		{"JInt(-3, 2)", JInt(-3, 2), -J(3, 2), 0},
		{"JInt(-4, 2)", JInt(-4, 2), J(4, 2), 0},
		{"J(3, -2)", J(3, -2), -J(3, 2), 0},
		{"J(4, -2)", J(4, -2), J(4, 2), 0},
		{"JPrime(3, -2)", JPrime(3, -2), JPrime(3, 2), 0},
		{"I(3, -2)", I(3, -2), -I(3, 2), 0},
		{"RatioI(3, -2)", RatioI(3, -2), -RatioI(3, 2), 0},
	} {
		within(t, c.name, 0, 0, c.got, c.want, c.tol)
	}
}

func TestSequenceSpecialValues(t *testing.T) {
	dst := []float64{9, 9, 9, 9}
	JSeq(nil, 1)
	for _, c := range []struct {
		x    float64
		want [4]float64
	}{
		{0, [4]float64{1, 0, 0, 0}},
		{inf, [4]float64{}},
		{-inf, [4]float64{}},
		{nan, [4]float64{nan, nan, nan, nan}},
		{tiny, [4]float64{1, 0, 0, 0}},
		{-1.5, [4]float64{J(0, 1.5), -J(1, 1.5), J(2, 1.5), -J(3, 1.5)}},
	} {
		JSeq(dst, c.x)
		for n := range dst {
			if !same(dst[n], c.want[n]) && !(math.Abs(dst[n]-c.want[n]) <= 2*promiseJ*ulpUnit*math.Abs(c.want[n])) {
				t.Errorf("JSeq at %v: J_%d = %v, want %v", c.x, n, dst[n], c.want[n])
			}
		}
	}
	// Far beyond the order where J underflows.
	long := make([]float64, 2000)
	JSeq(long, 3)
	if long[1999] != 0 || long[300] != 0 || long[0] == 0 {
		t.Errorf("J_0, J_300, J_1999 at 3 = %v, %v, %v", long[0], long[300], long[1999])
	}
}

func TestZeroSpecialValues(t *testing.T) {
	for _, got := range []float64{
		ZeroJ(-1, 1), ZeroJ(nan, 1), ZeroJ(inf, 1), ZeroJ(0, 0), ZeroJ(0, -3),
		ZeroJPrime(-1, 1), ZeroJPrime(nan, 1), ZeroJPrime(1, 0), ZerosJ(make([]float64, 1), nan)[0],
		ZeroAnnulus(0, 0, 1), ZeroAnnulus(0, 1, 1), ZeroAnnulus(0, nan, 1), ZeroAnnulus(0, 0.5, 0),
		ZeroAnnulus(2e6, 0.5, 1),
	} {
		if !math.IsNaN(got) {
			t.Errorf("outside the domain: %v, want NaN", got)
		}
	}
	if a, b := ZeroAnnulus(-3, 0.4, 2), ZeroAnnulus(3, 0.4, 2); a != b {
		t.Errorf("orders -3 and 3 give %v and %v", a, b)
	}
}

func TestLengthMismatchPanics(t *testing.T) {
	for _, f := range []func(a, b []float64, nu float64){ZerosJAndDerivative, ZerosJPrimeAndValue} {
		func() {
			defer func() {
				if recover() != lengthMismatch {
					t.Error("slices of different length were accepted")
				}
			}()
			f(make([]float64, 2), make([]float64, 3), 0)
		}()
	}
}

func TestNoAllocation(t *testing.T) {
	dst, other := make([]float64, 100), make([]float64, 100)
	if n := testing.AllocsPerRun(10, func() {
		JSeq(dst, 50)
		JSeq(dst, 200)
		ZerosJ(dst, 3)
		ZerosJPrimeAndValue(dst, other, 2.5)
		sink += J(2.5, 7) + J(3, 80) + Y(1.5, 3) + I(2, 3) + K(2, 3) + RatioI(60, 3) + ZeroAnnulus(2, 0.5, 3)
	}); n != 0 {
		t.Errorf("%v allocations in a run", n)
	}
}

// At x = 1e-300 the leading terms, DLMF 10.7.3-4: Y_0' = 2/(pi x), and for a
// small order nearly the same; Y_nu' = Gamma(nu+1) (2/x)^(nu+1)/(2 pi).
func TestTinyArguments(t *testing.T) {
	const x = 1e-300
	want := 2 / (math.Pi * x)
	within(t, "Y_0'", 0, x, YPrime(0, x), want, promiseY*ulpUnit*want)
	within(t, "Y_1e-10'", 1e-10, x, YPrime(1e-10, x), want, 1e-13*want) // (nu ln x)^2/2
	within(t, "x K_0'", 0, x, x*KPrime(0, x), -1, promiseM*ulpUnit)
	want = 0.5 * math.Sqrt(2/(math.Pi*x)) // of J_1/2 = sqrt(2/(pi x)) sin x
	within(t, "J_1/2'", 0.5, x, JPrime(0.5, x), want, 4*ulpUnit*want)
	within(t, "J_1'", 1, 1e-320, JPrime(1, 1e-320), 0.5, ulpUnit)
	within(t, "x I_2'/I_2", 2, x, x*RatioI(2, x), 2, ulpUnit)
}

// Far beyond the tested range the phase is reduced in plain arithmetic: still
// right to about 1e-15 of the envelope.
func TestFarArguments(t *testing.T) {
	for _, x := range []float64{phaseLimit - 1, phaseLimit, 1e10, 1e15} {
		a, b := J(0, x), J(1, x)
		within(t, "J_0^2 + J_1^2", 0, x, (a*a+b*b)*math.Pi*x/2, 1, 2/x+8*ulpUnit)
		within(t, "Wronskian", 0, x, (b*Y(0, x)-a*Y(1, x))*math.Pi*x/2, 1, 8*ulpUnit)
	}
}

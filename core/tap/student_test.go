package tap

import (
	"math"
	"testing"
)

// TestStudentQuantile holds coverage factors against JCGM 100:2008 (GUM),
// table G.2, which prints two decimals, from memory, and against the factor
// 2.92 (99 %, 16 degrees of freedom) of its example H.1.
func TestStudentQuantile(t *testing.T) {
	for _, row := range []struct {
		p    float64
		nu   int
		want float64
	}{
		{0.95, 1, 12.71}, {0.95, 2, 4.30}, {0.95, 3, 3.18}, {0.95, 4, 2.78}, {0.95, 5, 2.57}, {0.95, 6, 2.45}, {0.95, 7, 2.36}, {0.95, 8, 2.31},
		{0.95, 9, 2.26}, {0.95, 10, 2.23}, {0.95, 15, 2.13}, {0.95, 20, 2.09}, {0.95, 50, 2.01}, {0.95, 0, 1.96},
		{0.99, 1, 63.66}, {0.99, 2, 9.92}, {0.99, 5, 4.03}, {0.99, 16, 2.92}, {0.99, 0, 2.576},
	} {
		digit := 0.005 // half a unit of the second decimal
		if got := StudentQuantile(row.p, row.nu); math.Abs(got-row.want) > digit {
			t.Errorf("%g of %d degrees of freedom: %.4f, table %.2f", row.p, row.nu, got, row.want)
		}
	}
}

// TestGaugeBlockExample is JCGM 100:2008, H.1.6: 99 % expanded uncertainty of
// an end gauge, t_99(16) = 2.92 times 32 nm = 93 nm.
func TestGaugeBlockExample(t *testing.T) {
	if got := StudentQuantile(0.99, 16) * 32; math.Abs(got-93.465) > 0.005 {
		t.Errorf("%.3f nm, recomputed example 93.465", got)
	}
}

func TestStudentCDF(t *testing.T) {
	// nu = 1 is the Cauchy distribution, 1/2 + atan(t)/pi; nu = 2 has the
	// closed form 1/2 + t / (2 sqrt(2 + t^2)).
	for x := -30.0; x <= 30; x += 0.37 {
		if got, want := StudentCDF(x, 1), 0.5+math.Atan(x)/math.Pi; math.Abs(got-want) > 1e-15 {
			t.Errorf("nu 1, t %g: %g, want %g", x, got, want)
		}
		if got, want := StudentCDF(x, 2), 0.5+x/(2*math.Sqrt(2+x*x)); math.Abs(got-want) > 1e-15 {
			t.Errorf("nu 2, t %g: %g, want %g", x, got, want)
		}
		// Many degrees of freedom come to the normal distribution with a
		// difference of (x^3 + x) phi(x) / (4 nu) to first order, which is
		// largest near x = 1.65 and stays below 0.16/nu.
		if got, want := StudentCDF(x, 10000), StudentCDF(x, 0); math.Abs(got-want) > 0.16/10000 {
			t.Errorf("nu 10000, t %g: %g, normal %g", x, got, want)
		}
	}
	// The density of nu = 3, by differences against its closed form
	// 6 sqrt(3) / (pi (3 + t^2)^2), and of nu = 4, 12 (4 + t^2)^-5/2. A
	// central difference of step 1e-4 errs by the third derivative times
	// 1e-8/6, below 1e-8.
	for x := -4.0; x <= 4; x += 0.5 {
		const step = 1e-4
		for nu, want := range map[int]float64{3: 6 * math.Sqrt(3) / (math.Pi * math.Pow(3+x*x, 2)), 4: 12 * math.Pow(4+x*x, -2.5)} {
			if got := (StudentCDF(x+step, nu) - StudentCDF(x-step, nu)) / (2 * step); math.Abs(got-want) > 1e-8 {
				t.Errorf("density of nu %d at %g: %g, want %g", nu, x, got, want)
			}
		}
	}
}

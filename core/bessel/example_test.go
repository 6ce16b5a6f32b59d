package bessel_test

import (
	"fmt"

	"hoopsheet/core/bessel"
)

// The lowest four frequencies of an ideal round membrane, in units of the
// lowest, are ratios of zeros.
func ExampleZeroJ() {
	f01 := bessel.ZeroJ(0, 1)
	for _, mode := range []struct{ m, n int }{{0, 1}, {1, 1}, {2, 1}, {0, 2}} {
		fmt.Printf("(%d,%d) %.4f\n", mode.m, mode.n, bessel.ZeroJ(float64(mode.m), mode.n)/f01)
	}
	// Output:
	// (0,1) 1.0000
	// (1,1) 1.5933
	// (2,1) 2.1355
	// (0,2) 2.2954
}

func ExampleJSeq() {
	dst := make([]float64, 4)
	bessel.JSeq(dst, 2.5)
	fmt.Printf("%.6f\n", dst)
	// Output: [-0.048384 0.497094 0.446059 0.216600]
}

func ExampleZerosJAndDerivative() {
	zeros, slope := make([]float64, 3), make([]float64, 3)
	bessel.ZerosJAndDerivative(zeros, slope, 0)
	fmt.Printf("%.6f\n%.6f\n", zeros, slope)
	// Output:
	// [2.404826 5.520078 8.653728]
	// [-0.519147 0.340265 -0.271452]
}

func ExampleZeroAnnulus() {
	// A drumhead with a clamped hub of a tenth of its radius.
	fmt.Printf("%.6f\n", bessel.ZeroAnnulus(0, 0.1, 1))
	// Output: 3.313939
}

//go:build !wasm

package bessel

import "math"

// twoProd returns p = fl(a*b) and e with p + e = a * b exactly.
// The processor has a fused multiply-add, so the error costs one instruction.
func twoProd(a, b float64) (p, e float64) {
	p = float64(a * b)
	return p, math.FMA(a, b, -p)
}

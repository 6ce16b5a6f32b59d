//go:build wasm

package bessel

// twoProd returns p = fl(a*b) and e with p + e = a * b exactly (Dekker).
// WebAssembly has no fused multiply-add and math.FMA is emulated there with
// integers at about a hundred times the cost of these seventeen operations.
// Overflows for |a| or |b| above 2^996; callers stay far below.
func twoProd(a, b float64) (p, e float64) {
	const split = 1<<27 + 1
	p = float64(a * b)
	t := float64(split * a)
	ah := t - (t - a)
	al := a - ah
	t = float64(split * b)
	bh := t - (t - b)
	bl := b - bh
	return p, ((float64(ah*bh) - p) + float64(ah*bl) + float64(al*bh)) + float64(al*bl)
}

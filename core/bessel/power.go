package bessel

import "math"

// The factor (x/2)^nu / Gamma(nu+1) in front of every power series. math.Pow
// and math.Gamma are not good enough for it (108 and 27 ulp off for large
// orders), so its logarithm is taken in compensated arithmetic.

// ln 2 in two parts; the first has 41 bits, so that its product with an
// exponent is exact.
const (
	ln2H = 0x1.62e42fefa3000p-1
	ln2L = 0x1.3de6af278ece6p-42
)

// logTable holds ln(j/32) for j = 23..45, as compensated numbers. 368 bytes: a
// series without it would need four times the terms in compensated arithmetic.
var logTable = [...][2]float64{
	{-0x1.522ae0738a3d8p-2, 0x1.8f7e9b38a6979p-57},  // 23/32
	{-0x1.269621134db92p-2, -0x1.e0efadd9db02bp-56}, // 24/32
	{-0x1.f991c6cb3b379p-3, -0x1.f665066f980a2p-57}, // 25/32
	{-0x1.a93ed3c8ad9e3p-3, -0x1.bcafa9de97203p-57}, // 26/32
	{-0x1.5bf406b543db2p-3, 0x1.1f5b44c0df7e7p-61},  // 27/32
	{-0x1.1178e8227e47cp-3, 0x1.0e63a5f01c691p-58},  // 28/32
	{-0x1.9335e5d594989p-4, 0x1.478a85704ccb7p-58},  // 29/32
	{-0x1.08598b59e3a07p-4, 0x1.dd7009902bf32p-58},  // 30/32
	{-0x1.0415d89e74444p-5, -0x1.c05cf1d753622p-59}, // 31/32
	{0, 0}, // 32/32
	{0x1.f829b0e783300p-6, 0x1.33e3f04f1ef23p-60},  // 33/32
	{0x1.f0a30c01162a6p-5, 0x1.85f325c5bbacdp-59},  // 34/32
	{0x1.6f0d28ae56b4cp-4, -0x1.906d99184b992p-58}, // 35/32
	{0x1.e27076e2af2e6p-4, -0x1.61578001e0162p-60}, // 36/32
	{0x1.29552f81ff523p-3, 0x1.301771c407dbfp-57},  // 37/32
	{0x1.5ff3070a793d4p-3, -0x1.bc60efafc6f6ep-58}, // 38/32
	{0x1.9525a9cf456b4p-3, 0x1.d904c1d4e2e26p-57},  // 39/32
	{0x1.c8ff7c79a9a22p-3, -0x1.4f689f8434012p-57}, // 40/32
	{0x1.fb9186d5e3e2bp-3, -0x1.caaae64f21acbp-57}, // 41/32
	{0x1.1675cababa60ep-2, 0x1.ce63eab883717p-61},  // 42/32
	{0x1.2e8e2bae11d31p-2, -0x1.8f4cdb95ebdf9p-56}, // 43/32
	{0x1.4618bc21c5ec2p-2, 0x1.f42decdeccf1dp-56},  // 44/32
	{0x1.5d1bdbf5809cap-2, 0x1.4236383dc7fe1p-56},  // 45/32
}

// logDD returns ln(xh + xl), xh > 0 and xl small against it, with an absolute
// error of about 2^-69 plus 2^-104 of the result.
func logDD(xh, xl float64) (h, l float64) {
	m, e := math.Frexp(xh)
	if m < math.Sqrt2/2 {
		m, e = 2*m, e-1
	}
	j := math.Round(32 * m)
	c := j / 32
	// r = m/c - 1 = rh + rl with |r| <= 1/46; the difference m - c is exact.
	d := m - c
	rh := d / c
	p, pe := twoProd(rh, c)
	rl := ((d-p)-pe)/c + xl/xh*(m/c)
	s, se := twoProd(rh, rh)
	// ln(1 + r) = r - r^2/2 + r^3 (1/3 - r/4 + ...)
	t := rh * s * (1.0/3 - rh*(1.0/4-rh*(1.0/5-rh*(1.0/6-rh*(1.0/7-rh*(1.0/8-rh*(1.0/9-rh*(1.0/10-rh/11))))))))
	row := &logTable[int(j)-23]
	h, l = twoSum(float64(float64(e)*ln2H), row[0])
	l += float64(e)*ln2L + row[1]
	h, pe = twoSum(h, rh)
	l += pe
	h, pe = twoSum(h, -0.5*s)
	l += pe + (rl*(1-rh*(1-rh)) - 0.5*se + t)
	return fastTwoSum(h, l)
}

// logHalfDD returns ln(x/2), also where x/2 would underflow.
func logHalfDD(x float64) (h, l float64) {
	h, l = logDD(x, 0)
	return addDD(h, l, -ln2H, -ln2L)
}

// stirlingMin is the smallest argument of the Stirling series below, whose
// first term left out is then below 2^-64.
const stirlingMin = 16

// stirlingTail returns ln Gamma(z+1) - (z ln z - z + ln(2 pi z)/2) for
// z >= stirlingMin, DLMF 5.11.1.
func stirlingTail(z float64) float64 {
	r := 1 / z
	s := r * r
	return r * (1.0/12 - s*(1.0/360-s*(1.0/1260-s*(1.0/1680-s*(1.0/1188-s*(691.0/360360-s*(1.0/156)))))))
}

// prefix returns (x/2)^nu / Gamma(nu+1) = (h + l) 2^k for nu >= 0 and x > 0,
// to about 2^-60; h is 0 where the value is far below the range.
func prefix(nu, x float64) (h, l float64, k int) {
	var gh, gl float64
	if nu >= stirlingMin {
		// exp(nu (ln(x/(2 nu)) + 1) - tail) / sqrt(2 pi nu)
		th := x / (2 * nu)
		if th < 0x1p-900 { // its sixteenth power is far below the range
			return 0, 0, 0
		}
		p, pe := twoProd(th, 2*nu)
		tl := ((x - p) - pe) / (2 * nu)
		h, l = logDD(th, tl)
		h, l = addDD(h, l, 1, 0)
		h, l = mulDD(h, l, nu, 0)
		h, l = addDD(h, l, -stirlingTail(nu), 0)
		gh, gl = hankelFactor(4 * nu) // sqrt(2/(pi 4 nu))
		h, l, k = expDD(h, l)
		h, l = mulDD(h, l, gh, gl)
		return h, l, k
	}
	// Gamma(nu+1) = Gamma(nu+j+1) / ((nu+1) ... (nu+j))
	fh, fl := 1.0, 0.0
	zh, zl := nu, 0.0
	for j := 1.0; zh < stirlingMin; j++ {
		zh, zl = twoSum(nu, j)
		fh, fl = mulDD(fh, fl, zh, zl)
	}
	h, l = logHalfDD(x)
	h, l = mulDD(h, l, nu, 0)
	gh, gl = logDD(zh, zl)
	gh, gl = addDD(gh, gl, -1, 0)
	gh, gl = mulDD(gh, gl, zh, zl)
	h, l = addDD(h, l, -gh, -gl)
	h, l = addDD(h, l, -stirlingTail(zh), 0)
	gh, gl = hankelFactor(4 * zh)
	gh, gl = mulDD(gh, gl, fh, fl)
	h, l, k = expDD(h, l)
	h, l = mulDD(h, l, gh, gl)
	return h, l, k
}

// expDD returns exp(xh + xl) = (h + l) 2^k to about 2^-62, with h near 1.
func expDD(xh, xl float64) (h, l float64, k int) {
	// exp(x) = 2^k (j/32) exp(r): the table of logarithms serves backwards.
	n := math.Round(xh * (1 / math.Ln2))
	r, e := twoSum(xh-float64(n*ln2H), -float64(n*ln2L))
	e += xl
	j := math.Round(32 * math.Exp(r))
	row := &logTable[int(j)-23]
	r, l = twoSum(r, -row[0])
	l += e - row[1]
	// |r| <= 1/45
	s, se := twoProd(r, r)
	h, e = fastTwoSum(1, r)
	e += l*(1+r) + 0.5*se + r*s*(1.0/6+r*(1.0/24+r*(1.0/120+r*(1.0/720+r*(1.0/5040+r/40320)))))
	h, l = fastTwoSum(h, 0.5*s)
	l += e
	h, l = mulDD(h, l, j/32, 0)
	return h, l, int(n)
}

package modes

import (
	"math"

	"hoopsheet/core/bessel"
)

// cavityModes is the number of radial modes of a cavity that are summed; what
// lies beyond is added in the limit of short waves. Those below cavityAbove
// times the largest sound number follow the frequency exactly, the others by a
// power series, which errs by cavityAbove^(-2 cavityTerms).
const (
	cavityModes = 128
	cavityAbove = 4
	cavityTerms = 9
)

// cavityTable holds, for one order and number of shapes, the radial modes of a
// rigid cylinder of unit radius, J_m(k_q r) with J_m'(k_q) = 0, and the shapes
// of the sheet in them.
type cavityTable struct {
	n    int
	k    []float64 // k_q; for m = 0 the first is 0, the piston
	part []float64 // row q: integral u_j J_m(k_q r) r dr / norm, n to a row
	// slope is what part gains when the sheet moves on a disc of radius 1 - e in a
	// cavity of radius 1, over e.
	slope []float64
	// What lies beyond the last mode starts at the wave number last and is the
	// multiple beyond of that of a cavity.
	last, beyond float64
	weights      []float64 // of a quadrature rule
}

// radialModes returns the table, made when first asked for.
func (t *fluidTables) radialModes() *cavityTable {
	t.mu.Lock()
	defer t.mu.Unlock()
	if t.cavity != nil {
		return t.cavity
	}
	c := &cavityTable{n: t.n, beyond: 1, part: make([]float64, cavityModes*t.n), slope: make([]float64, cavityModes*t.n)}
	zeros := make([]float64, cavityModes)
	if t.m == 0 {
		zeros = zeros[1:]
	}
	bessel.ZerosJPrime(zeros, float64(t.m))
	if t.m == 0 {
		// J_2(k)/k^2 is 1/8 at k = 0, and the norm of 1 is 1/2.
		c.k = append(c.k, 0)
		c.part[0], c.slope[0] = math.Sqrt2/8, -2*math.Sqrt2/8
	}
	c.k = append(c.k, zeros...)
	values := make([]float64, t.m+2*t.n+2)
	for q, k := range c.k {
		if k == 0 {
			continue
		}
		// The integral is the Hankel transform J_b(k)/k^2, b = m+2j+2; the norm
		// of J_m(k r) is (1 - m^2/k^2) J_m(k)^2/2 where J_m'(k) = 0.
		bessel.JSeq(values, k)
		v := values[t.m]
		m := float64(t.m)
		f := 1 / (k * k * math.Sqrt((1-m/k)*(1+m/k)/2) * math.Abs(v))
		row := c.part[q*t.n : (q+1)*t.n]
		for j := range row {
			// (1-e)^2 U(k(1-e)) = U - e (2U + kU'), and 2U + kU' = J_b'(k)/k.
			b := t.m + 2*j + 2
			row[j] = f * values[b]
			c.slope[q*t.n+j] = -f * k * (values[b-1] - values[b+1]) / 2
		}
	}
	c.last = c.k[len(c.k)-1] + math.Pi/2
	t.cavity = c
	return c
}

// addMode adds factor times the square of radial mode q, for the first live
// shapes, to the lower triangle of x (n by n).
func (c *cavityTable) addMode(x []float64, q int, factor float64, live int) {
	row := c.part[q*c.n : q*c.n+live]
	for i, v := range row {
		v *= factor
		xi := x[i*c.n : i*c.n+i+1]
		for j := range xi {
			xi[j] += v * row[j]
		}
	}
}

// addBeyond adds the modes after the last one, for a cavity of depth l.
func (c *cavityTable) addBeyond(x []float64, l float64) {
	// There J_b(k) = (-1)^(j+1) J_m(k) but for terms in (b^2/k)^2, so each mode
	// adds 2 (-1)^(i+j) k^-4 coth(k l)/k; their distance is pi.
	k := c.last
	f := c.beyond * 2 / (4 * math.Pi * math.Pow(k, 4)) / math.Tanh(k*l)
	for i := range c.n {
		for j := range i + 1 {
			if (i+j)%2 == 0 {
				x[i*c.n+j] += f
			} else {
				x[i*c.n+j] -= f
			}
		}
	}
}

// cothSeries returns the first coefficients in z of g = coth(kappa l)/kappa,
// kappa^2 = k^2 - z.
func cothSeries(k, l float64) [cavityTerms]float64 {
	var g [cavityTerms]float64
	x := k * l
	g[0] = 1 / (k * math.Tanh(x))
	if x > 20 {
		// 1/kappa, the binomial series.
		for p := 1; p < cavityTerms; p++ {
			g[p] = g[p-1] * (float64(p) - 0.5) / (float64(p) * k * k)
		}
		return g
	}
	// (k^2 - z) g' = g/2 - (l/2)[1 - (k^2 - z) g^2]. Errors grow by x^p/p! at most:
	// 6e5 eps for x = 20.
	square := func(p int) float64 {
		sum := 0.0
		for i := 0; i <= p; i++ {
			sum += g[i] * g[p-i]
		}
		return sum
	}
	before := 0.0
	for p := range cavityTerms - 1 {
		now := square(p)
		v := (float64(p)+0.5)*g[p] + l/2*(k*k*now-before)
		if p == 0 {
			s := math.Sinh(x)
			v = g[0]/2 + l/(2*s*s) // k^2 g^2 - 1 = 1/sinh^2
		}
		g[p+1] = v / (k * k * float64(p+1))
		before = now
	}
	return g
}

// shrunk returns the table for a sheet that moves on a disc of radius 1 - e.
func (c *cavityTable) shrunk(e float64) *cavityTable {
	if e == 0 {
		return c
	}
	out := *c
	out.part = make([]float64, len(c.part))
	for i, v := range c.part {
		out.part[i] = v + e*c.slope[i]
	}
	return &out
}

package bessel

import (
	"math"
	"math/big"
	"testing"
)

// poly is a polynomial with rational coefficients, constant term first.
type poly []*big.Rat

func (p poly) at(k int) *big.Rat {
	if k < len(p) && p[k] != nil {
		return p[k]
	}
	return new(big.Rat)
}

func (p poly) add(q poly, f *big.Rat) poly {
	out := make(poly, max(len(p), len(q)))
	for k := range out {
		out[k] = new(big.Rat).Mul(q.at(k), f)
		out[k].Add(out[k], p.at(k))
	}
	return out
}

func (p poly) mul(q poly) poly {
	out := make(poly, len(p)+len(q)-1)
	for k := range out {
		out[k] = new(big.Rat)
	}
	for i := range p {
		for j := range q {
			out[i+j].Add(out[i+j], new(big.Rat).Mul(p.at(i), q.at(j)))
		}
	}
	return out
}

func (p poly) derivative() poly {
	out := make(poly, max(len(p)-1, 1))
	for k := range out {
		out[k] = new(big.Rat).Mul(p.at(k+1), big.NewRat(int64(k+1), 1))
	}
	return out
}

func (p poly) integral() poly {
	out := poly{new(big.Rat)}
	for k := range p {
		out = append(out, new(big.Rat).Mul(p.at(k), big.NewRat(1, int64(k+1))))
	}
	return out
}

func rats(v ...*big.Rat) poly { return v }

// debyePolynomials returns U_k and V_k for k <= top: DLMF 10.41.9 and 10.41.11.
func debyePolynomials(top int) (u, v []poly) {
	one, zero := big.NewRat(1, 1), new(big.Rat)
	half, minus := big.NewRat(1, 2), big.NewRat(-1, 1)
	u, v = []poly{rats(one)}, []poly{rats(one)}
	for k := range top {
		d := u[k].derivative()
		a := rats(zero, zero, half, zero, big.NewRat(-1, 2)).mul(d)
		b := rats(big.NewRat(1, 8), zero, big.NewRat(-5, 8)).mul(u[k]).integral()
		u = append(u, a.add(b, one))
		// V_{k+1} = U_{k+1} - p (1 - p^2) (U_k/2 + p U'_k)
		c := rats(zero, one).mul(d).add(u[k], half)
		v = append(v, u[k+1].add(rats(zero, one, zero, minus).mul(c), minus))
	}
	return u, v
}

// logarithm returns the coefficients of ln(1 + s_1 e + s_2 e^2 + ...) in e.
func logarithm(s []poly) []poly {
	d := []poly{nil}
	for k := 1; k < len(s); k++ {
		t := s[k]
		for j := 1; j < k; j++ {
			t = t.add(d[j].mul(s[k-j]), big.NewRat(-int64(j), int64(k)))
		}
		d = append(d, t)
	}
	return d
}

// TestPhaseCoefficients derives the tables of zerophase.go again, in rational
// arithmetic.
func TestPhaseCoefficients(t *testing.T) {
	u, v := debyePolynomials(11)
	for _, c := range []struct {
		name  string
		table [6][]float64
		logs  []poly
	}{
		{"J", phaseCoefficientsJ, logarithm(u)},
		{"J'", phaseCoefficientsJPrime, logarithm(v)},
	} {
		for i, row := range c.table {
			k := 2*i + 1
			if len(row) != k+1 {
				t.Errorf("%s: a_%d has %d coefficients", c.name, k, len(row))
				continue
			}
			for j, got := range row {
				// a_k(t) = -(-1)^((k-1)/2) sum over j of d_{k,k+2j} (-t)^j
				want, _ := c.logs[k].at(k + 2*j).Float64()
				if (i+j)&1 == 0 {
					want = -want
				}
				if got != want {
					t.Errorf("%s: coefficient %d of a_%d is %v, should be %v", c.name, j, k, got, want)
				}
			}
		}
	}
}

// 1/(Gamma(1+z) Gamma(1-z)) = sin(pi z)/(pi z), DLMF 5.5.3, and Gamma(3/2).
func TestReciprocalGamma(t *testing.T) {
	halves := func(z float64) (a, b float64) { // 1/Gamma(1+z), 1/Gamma(1-z)
		h1, h2 := temmeGamma(z)
		return 1 + h2 - z*(h1-eulerH), 1 + h2 + z*(h1-eulerH)
	}
	for z := 1.0 / 64; z <= 0.5; z += 1.0 / 64 {
		a, b := halves(z)
		want := math.Sin(math.Pi*z) / (math.Pi * z)
		within(t, "reflection", z, 0, a*b, want, 4*ulpUnit)
	}
	a, _ := halves(0.5)
	within(t, "1/Gamma(3/2)", 0.5, 0, a, 2/math.Sqrt(math.Pi), 2*ulpUnit)
	if reciprocalGamma[1] != eulerH {
		t.Errorf("derivative at 0 is %v", reciprocalGamma[1])
	}
}

func TestHyperbolicRest(t *testing.T) {
	for s := 1.0 / 64; s <= restMax; s += 1.0 / 64 {
		c, h := hyperbolicRest(s)
		q := math.Sinh(s / 2)
		within(t, "cosh - 1", 0, s, c, 2*q*q, 4*ulpUnit*c)
		within(t, "sinh/s - 1", 0, s, h, math.Sinh(s)/s-1, 4*ulpUnit)
	}
}

// The table of logarithms against math.Log, whose error is below an ulp, and
// the low parts against the sums ln a + ln b = ln ab, which cancel the high
// ones.
func TestLogarithms(t *testing.T) {
	for i, row := range logTable {
		within(t, "table", float64(i+23), 32, row[0], math.Log(float64(i+23)/32), ulpUnit*math.Abs(row[0]))
	}
	r := newRand()
	for range points(3000) {
		a, b := math.Exp(r.Float64()*80-40), math.Exp(r.Float64()*80-40)
		p, pe := twoProd(a, b)
		ah, al := logDD(a, 0)
		bh, bl := logDD(b, 0)
		ph, pl := logDD(p, pe)
		h, l := addDD(ah, al, bh, bl)
		h, l = addDD(h, l, -ph, -pl)
		// 2^-69 each, and 2^-104 of at most 80.
		within(t, "ln a + ln b - ln ab", a, b, h+l, 0, 3*0x1p-68)

		eh, el, k := expDD(ah, al)
		got := math.Ldexp(eh, k) - a + math.Ldexp(el, k)
		within(t, "exp(ln a)", a, 0, got, 0, 0x1p-58*a)
	}
}

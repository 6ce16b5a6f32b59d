package accuracy

import (
	"math"
	"math/big"

	"hoopsheet/core/bessel"
)

func column(i int) func(row) *big.Float {
	return func(r row) *big.Float { return r.v[i] }
}

func code(c string) func(row) bool {
	return func(r row) bool { return r.code == c }
}

func both(a, b func(row) bool) func(row) bool {
	return func(r row) bool { return a(r) && b(r) }
}

// envelope returns sqrt(J^2 + Y^2) where the functions oscillate.
func envelope(r row) float64 {
	if r.x < r.nu {
		return 0
	}
	j, _ := r.v[0].Float64()
	y, _ := r.v[1].Float64()
	return math.Hypot(j, y)
}

func j(name string, promise float64, in func(row) bool) probe {
	return probe{
		name: name, promise: promise, in: in, want: column(0), scale: envelope,
		got: func(r row) float64 { return bessel.J(r.nu, r.x) },
	}
}

func jseq(name string, promise float64, in func(row) bool) probe {
	var dst []float64
	return probe{
		name: name, promise: promise, in: both(in, row.whole), want: column(0), scale: envelope,
		got: func(r row) float64 {
			n := int(r.nu) + 1
			if len(dst) < n {
				dst = make([]float64, n)
			}
			bessel.JSeq(dst[:n], r.x)
			return dst[n-1]
		},
	}
}

func upTo200(r row) bool { return r.nu <= 201 && r.x <= 250 }

// cylinder holds the regions of J, J_n in sequence, and Y.
var cylinder = []probe{
	j("J, whole orders to 200, x to 200", 2, code("int")),
	j("J, real orders to 200, x to 200", 2, code("real")),
	j("J around the turning point", 2, code("turn")),
	j("J near its zeros", 2, code("zero")),
	j("J at the switches of method", 2, code("switch")),
	j("J, small x or small order", 2, code("small")),
	j("J, orders below 2, x to 60", 2, code("low")),
	j("J, orders to 1000, x 200 to 1100", 2, code("high")),
	j("J, orders to 1000, x 200 to 1e6", 2, code("far")),
	j("J, orders to 1000, x to 400", 2, code("deep")),
	j("J, all whole orders to 200", 2, both(row.whole, upTo200)),
	jseq("JSeq, whole orders to 200", 2, upTo200),
	jseq("JSeq, whole orders to 1000, x to 1e6", 2, func(r row) bool { return !upTo200(r) }),
	y("Y, whole orders to 200, x to 200", 4, both(row.whole, upTo200)),
	y("Y, real orders to 200, x to 200", 8, upTo200),
	y("Y, orders to 1000, x to 1e6", 8, func(r row) bool { return !upTo200(r) }),
}

func y(name string, promise float64, in func(row) bool) probe {
	return probe{
		name: name, promise: promise, in: in, want: column(1), scale: envelope,
		got: func(r row) float64 { return bessel.Y(r.nu, r.x) },
	}
}

// modified holds the regions of I, K and their logarithmic derivatives.
var modified = []probe{
	mod("exp(-x) I, orders to 1000, x to 1e8", 0, bessel.IScaled),
	mod("exp(x) K, orders to 1000, x to 1e8", 1, bessel.KScaled),
	mod("I'/I, orders to 1000, x to 1e8", 2, bessel.RatioI),
	mod("K'/K, orders to 1000, x to 1e8", 3, bessel.RatioK),
}

func mod(name string, i int, f func(nu, x float64) float64) probe {
	return probe{
		name: name, promise: 8, want: column(i),
		got: func(r row) float64 { return f(r.nu, r.x) },
	}
}

// pairOf returns the last of the first n zeros found in sequence and what
// comes with it.
func pairOf(fill func(zeros, other []float64, nu float64), r row) (zero, other float64) {
	z, o := make([]float64, r.n()), make([]float64, r.n())
	fill(z, o, r.nu)
	return z[r.n()-1], o[r.n()-1]
}

func shortSequence(r row) bool { return r.x <= 200 }

// zeros holds the regions of j_{nu,n} and j'_{nu,n}; x is n there.
var zeros = []probe{
	{
		name: "ZeroJ, orders to 1000, n to 1e6", promise: 2, want: column(0),
		got: func(r row) float64 { return bessel.ZeroJ(r.nu, r.n()) },
	},
	{
		name: "ZeroJPrime, orders to 1000, n to 1e6", promise: 2, want: column(1),
		got: func(r row) float64 { return bessel.ZeroJPrime(r.nu, r.n()) },
	},
	{
		name: "zeros of J in sequence, n to 200", promise: 2, want: column(0), in: shortSequence,
		got: func(r row) float64 {
			z, _ := pairOf(bessel.ZerosJAndDerivative, r)
			return z
		},
	},
	{
		name: "J' at the zeros of J, n to 200", promise: 4, want: column(2), in: shortSequence,
		got: func(r row) float64 {
			_, d := pairOf(bessel.ZerosJAndDerivative, r)
			return d
		},
	},
	{
		name: "zeros of J' in sequence, n to 200", promise: 2, want: column(1), in: shortSequence,
		got: func(r row) float64 {
			z, _ := pairOf(bessel.ZerosJPrimeAndValue, r)
			return z
		},
	},
	{
		name: "J at the zeros of J', n to 200", promise: 4, want: column(3), in: shortSequence,
		got: func(r row) float64 {
			_, v := pairOf(bessel.ZerosJPrimeAndValue, r)
			return v
		},
	},
}

// annulus holds the roots for the four pairs of edges; nu is m, x is n there.
var annulus = []probe{
	annular("ZeroAnnulus, clamped at both edges", 0, bessel.Dirichlet, bessel.Dirichlet),
	annular("ZeroAnnulusPrime, free at both edges", 1, bessel.Neumann, bessel.Neumann),
	annular("annulus, clamped outside, free inside", 2, bessel.Dirichlet, bessel.Neumann),
	annular("annulus, free outside, clamped inside", 3, bessel.Neumann, bessel.Dirichlet),
}

func annular(name string, i int, outer, inner bessel.Edge) probe {
	return probe{
		name: name, promise: 2, want: column(i),
		got: func(r row) float64 {
			return bessel.ZeroAnnulusEdges(int(r.nu), r.q, r.n(), outer, inner)
		},
		amplify: func(r row) float64 { return math.Max(1, r.q/(1-r.q)) },
	}
}

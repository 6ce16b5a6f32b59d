// Package bessel evaluates Bessel functions of real order, their ratios and
// their zeros, in float64.
//
// It is written for the eigenproblems of round membranes and annuli: orders up
// to 1000, arguments up to 1e6 (1e8 for the ratios of modified functions), and
// zeros up to the millionth. Orders to MaxOrder are accepted. Nothing
// allocates, nothing is cached, and all functions may be called concurrently.
//
// # Rule for special values
//
// NaN in gives NaN out, and so does an argument for which the function would
// be complex (x < 0 with a fractional order, or at all for Y and K), an order
// below 0 or above MaxOrder, and the n-th zero for n < 1. Limits at 0 and
// +-Inf are returned as such. Overflow gives an infinity of the right sign,
// underflow a subnormal number or zero. Nothing panics except slices of
// different length.
//
// # Accuracy
//
// In ulp of the value or, where a function oscillates (x >= nu), of the
// envelope sqrt(J^2 + Y^2), measured against mpmath at 40 digits on 33 000
// points in testdata/bessel; package accuracy holds the regions, and its test
// every region to its promise:
//
//	J, JInt, JSeq                  2 ulp (mean 0.2)
//	Y                              4 ulp whole orders, 8 ulp others (0.25)
//	I, K scaled, I'/I, K'/K        8 ulp (0.5)
//	zeros of J and J'              2 ulp (0.3), of annuli 2 max(1, q/(1-q))
//
// # Branch map of J
//
// jPair in j.go asks, in this order (mu is the fractional part of nu):
//
//	x^2 <= 2 (nu+1)      power series; its factor by logarithms  series.go, power.go
//	x >= 25, nu <= x     Hankel's expansion at mu and mu + 1,     hankel.go, trig.go
//	                     then the recurrence upwards              recurrence.go
//	nu > x, nu >= 40,    Debye's expansion, at nu or at an order  jdebye.go
//	x >= 60 or nu above  above where it holds; from there the     debye.go
//	decayOrder(x)        recurrence downwards
//	nu whole             recurrence down from above, normalised   backward.go
//	                     by J_0 + 2 J_2 + 2 J_4 + ... = 1
//	x >= 25              recurrence down to mu, normalised by     backward.go
//	                     Hankel's expansion there
//	otherwise            recurrence down, normalised by Neumann's backward.go
//	                     series at an order >= x, all terms of
//	                     one sign
//
// Recurrences, prefixes, phases and sums run in compensated arithmetic (dd.go),
// which leaves the last rounding as the main error.
//
// # Branch maps of the others
//
//	Y   x < 1: Temme's series; x < 25: from J and a continued fraction; above:
//	    Hankel's expansion; then upwards                  y.go, temme.go, steed.go
//	I   x^2 + nu^2 >= 1600: Debye's expansion in exponential form; below: power
//	    series                                            i.go, debye.go
//	K   the same; below: Temme's series or a continued fraction, then upwards
//	                                                      k.go
//	zeros of J, J'   n >= 11: Debye's phase; below: one local expansion from a
//	    start by Olver's, McMahon's or Rayleigh's formulas
//	                                 zerophase.go, zerorefine.go, zerostart.go
//	zeros of annuli  Newton's method on the difference of two phases
//	                                                      annulus.go
//
// References are given inside the functions; DLMF is the NIST Digital Library
// of Mathematical Functions, https://dlmf.nist.gov.
package bessel

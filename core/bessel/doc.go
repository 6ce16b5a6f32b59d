// Package bessel evaluates Bessel functions of real order and their zeros.
//
// It is written for the eigenproblems of round membranes: orders up to 1000,
// arguments up to 1e6, and the zeros that are their natural frequencies.
package bessel

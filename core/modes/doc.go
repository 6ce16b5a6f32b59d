// Package modes gives the natural modes of a diaphragm: frequencies, nodal
// lines, shapes, and the distance to the lines that the diaphragm has to keep
// clear of.
//
// A mode (m, n) has m nodal diameters and n nodal circles, the rim counted.
// Modes with m >= 1 come as a pair of equal frequency, turned against each
// other by a quarter of an angular period; the pair is listed once.
package modes

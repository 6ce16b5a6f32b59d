// Package sheet holds what belongs to the film, foil or fabric alone: a small
// catalogue of materials, the stress that a line tension makes, and how the
// tension changes with temperature.
//
// All quantities are in SI units; temperatures are in kelvin.
package sheet

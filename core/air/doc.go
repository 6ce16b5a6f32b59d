// Package air gives the density and the sound speed of moist air from its
// temperature, pressure and relative humidity.
//
// Temperatures are in kelvin, pressures in pascal, relative humidity runs from
// 0 to 1, mole fractions from 0 to 1.
package air

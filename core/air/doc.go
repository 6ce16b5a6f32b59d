// Package air gives density, sound speed and viscosity of the fluids that lie
// at the faces of a diaphragm: moist air from its temperature, pressure and
// relative humidity, a few other gases, and water.
//
// Temperatures are in kelvin, pressures in pascal, relative humidity runs from
// 0 to 1, mole fractions from 0 to 1.
package air

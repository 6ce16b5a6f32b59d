package air

// FluidName names a fluid that lies at a face of a diaphragm.
type FluidName string

// The fluids. FluidAir is the moist air of the surroundings.
const (
	FluidAir      FluidName = "air"
	FluidNitrogen FluidName = "nitrogen"
	FluidHelium   FluidName = "helium"
	FluidSF6      FluidName = "sulfur-hexafluoride"
	FluidWater    FluidName = "water"
)

// FluidNames lists every fluid in the order in which it is offered.
func FluidNames() []FluidName {
	return []FluidName{FluidAir, FluidNitrogen, FluidHelium, FluidSF6, FluidWater}
}

// OrAir is the name itself, or FluidAir where none is given.
func (n FluidName) OrAir() FluidName {
	if n == "" {
		return FluidAir
	}
	return n
}

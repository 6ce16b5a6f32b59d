package quantity

// Dimension is the kind of a quantity; it decides which units may be typed.
type Dimension string

// The dimensions. Pressure and Stress share their units and differ in those
// that are offered first.
const (
	Length       Dimension = "length"
	Area         Dimension = "area"
	ArealDensity Dimension = "areal-density"
	LineTension  Dimension = "line-tension"
	Pressure     Dimension = "pressure"
	Stress       Dimension = "stress"
	Density      Dimension = "density"
	Temperature  Dimension = "temperature"
	Frequency    Dimension = "frequency"
	Expansion    Dimension = "expansion"
	Ratio        Dimension = "ratio"
	Angle        Dimension = "angle"
	Time         Dimension = "time"
	Speed        Dimension = "speed"
	Mass         Dimension = "mass"
)

// Dimensions lists every dimension.
func Dimensions() []Dimension {
	return []Dimension{
		Length, Area, ArealDensity, LineTension, Pressure, Stress, Density, Temperature,
		Frequency, Expansion, Ratio, Angle, Time, Speed, Mass,
	}
}

// Words is the dimension as it stands in a sentence: "areal density". It is
// empty for what is no dimension.
func (d Dimension) Words() string {
	switch d {
	case ArealDensity:
		return "areal density"
	case LineTension:
		return "line tension"
	case Expansion:
		return "thermal expansion"
	case Length, Area, Pressure, Stress, Density, Temperature, Frequency, Ratio, Angle, Time, Speed, Mass:
		return string(d)
	}
	return ""
}

// System is a system of units in which quantities are first shown.
type System string

// The systems of units.
const (
	SI        System = "si"
	InchPound System = "inch-pound"
)

// Systems lists every system of units.
func Systems() []System { return []System{SI, InchPound} }

// Offered lists the symbols of the units of a dimension in the order in which
// they are offered: those of the system first. The first one is the unit in
// which the quantity is shown by default. It is empty for what is no
// dimension.
func Offered(d Dimension, system System) []string {
	si, inchPound := offered(d)
	if system == InchPound {
		si, inchPound = inchPound, si
	}
	return append(append([]string{}, si...), inchPound...)
}

// offered lists the symbols by system. A symbol stands in one list only; units
// of both systems stand under SI where inch-pound has its own.
func offered(d Dimension) (si, inchPound []string) {
	switch d {
	case Length:
		return []string{"mm", "m", "cm", "µm"}, []string{"in", "ft", "mil"}
	case Area:
		return []string{"cm²", "m²", "mm²"}, []string{"in²", "ft²"}
	case ArealDensity:
		return []string{"kg/m²", "g/m²"}, []string{"lb/ft²", "oz/yd²"}
	case LineTension:
		return []string{"N/m", "kN/m", "N/mm"}, []string{"lbf/in", "lbf/ft"}
	case Pressure:
		return []string{"kPa", "Pa", "hPa", "mbar", "bar"}, []string{"inHg", "psi", "lbf/ft²", "inH₂O"}
	case Stress:
		return []string{"MPa", "GPa", "kPa", "Pa"}, []string{"ksi", "psi"}
	case Density:
		return []string{"kg/m³", "g/cm³"}, []string{"lb/ft³", "lb/in³"}
	case Temperature:
		return []string{"°C", "K"}, []string{"°F"}
	case Frequency:
		return []string{"Hz", "kHz", "rpm"}, nil
	case Expansion:
		return []string{"ppm/K", "1/K"}, []string{"ppm/°F", "1/°F"}
	case Ratio:
		return []string{"%", "‰", ""}, nil
	case Angle:
		return []string{"°", "rad"}, nil
	case Time:
		return []string{"s", "ms"}, nil
	case Speed:
		return []string{"m/s", "mm/s"}, []string{"ft/s", "in/s"}
	case Mass:
		return []string{"kg", "g"}, []string{"lb", "oz"}
	}
	return nil, nil
}

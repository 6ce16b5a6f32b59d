package diaphragm

import (
	"strconv"

	"hoopsheet/core/quantity"
)

// Bounds of the state of the air: those of package air, which see.
const (
	coldestAir, hottestAir = 223.15, 373.15 // K
	thinnest, densest      = 10e3, 200e3    // Pa
	reasonAir              = "the air is computed within these limits"
)

// Bounds of the temperature in service, K: common practice.
const (
	coldestService, hottestService = 173.15, 573.15
	reasonService                  = "properties of films and foils hold no farther"
)

var (
	temperatureUnits = []string{"°C", "K", "°F"}
	pressureUnits    = []string{"kPa", "hPa", "mbar", "bar", "inHg", "psi"}
)

func surroundingsFields() []Field {
	return []Field{
		{
			Path: "surroundings.temperature", Group: GroupSurroundings, Symbol: "t", Name: "temperature", Kind: KindQuantity,
			Help:      "Temperature of air and sheet at which the specified tension holds.",
			Dimension: quantity.Temperature, SI: "°C", InchPound: "°F", Units: temperatureUnits,
			Low: coldestAir, High: hottestAir, Reason: reasonAir,
			number: func(d *Diaphragm) *float64 { return &d.Surroundings.Temperature },
		},
		{
			Path: "surroundings.pressure", Group: GroupSurroundings, Symbol: "p", Name: "air pressure", Kind: KindQuantity,
			Help:      "Pressure of the air at the place itself, not reduced to sea level.",
			Dimension: quantity.Pressure, SI: "kPa", InchPound: "inHg", Units: pressureUnits,
			Low: thinnest, High: densest, Reason: reasonAir,
			number: func(d *Diaphragm) *float64 { return &d.Surroundings.Pressure },
		},
		{
			Path: "surroundings.humidity", Group: GroupSurroundings, Symbol: "φ", Name: "relative humidity", Kind: KindQuantity,
			Help:      "It changes the density of the air a little; 50 % will do where it is not known.",
			Dimension: quantity.Ratio, SI: "%", InchPound: "%", Units: []string{"%"},
			Low: 0, High: 1, Reason: "air holds no more water than saturation",
			number: func(d *Diaphragm) *float64 { return &d.Surroundings.Humidity },
		},
		{
			Path: "surroundings.serviceMin", Group: GroupSurroundings, Name: "lowest temperature in service", Kind: KindQuantity,
			Help:      "The coldest the diaphragm will be in use.",
			Dimension: quantity.Temperature, SI: "°C", InchPound: "°F", Units: temperatureUnits,
			Low: coldestService, High: hottestService, Reason: reasonService,
			number: func(d *Diaphragm) *float64 { return &d.Surroundings.ServiceMin },
		},
		{
			Path: "surroundings.serviceMax", Group: GroupSurroundings, Name: "highest temperature in service", Kind: KindQuantity,
			Help:      "The hottest the diaphragm will be in use; sunlight can heat a sheet far above the air.",
			Dimension: quantity.Temperature, SI: "°C", InchPound: "°F", Units: temperatureUnits,
			Low: coldestService, High: hottestService, Reason: reasonService,
			number: func(d *Diaphragm) *float64 { return &d.Surroundings.ServiceMax },
		},
	}
}

// Bounds of frequencies to keep clear of, Hz: from sway to ultrasound.
const (
	lowestLine, highestLine = 0.01, 1e6
	reasonLine              = "slower is sway and faster is no vibration of a sheet"
)

var frequencyUnits = []string{"Hz", "kHz", "rpm"}

func avoidFields() []Field {
	return []Field{{
		Path: "avoid.lowest", Group: GroupAvoid, Symbol: "f", Name: "lowest frequency allowed", Kind: KindQuantity, Optional: true,
		Help:      "No mode may lie below it. Leave it empty where there is no such demand.",
		Dimension: quantity.Frequency, SI: "Hz", InchPound: "Hz", Units: frequencyUnits,
		Low: lowestLine, High: highestLine, Reason: reasonLine,
		number: func(d *Diaphragm) *float64 { return &d.Avoid.Lowest },
	}}
}

// lineFields are the fields of line i to keep clear of.
func lineFields(i int) []Field {
	which := " of line " + strconv.Itoa(i+1)
	at := func(member string) string { return entryPath("avoid.lines", i, member) }
	return []Field{
		{
			Path: at("name"), Group: GroupAvoid, Name: "name" + which, Kind: KindText, Most: 60,
			Help: "What makes this frequency: mains hum, a fan, a pump.",
			text: func(d *Diaphragm) *string { return &d.Avoid.Lines[i].Name },
		},
		{
			Path: at("frequency"), Group: GroupAvoid, Symbol: "f", Name: "frequency" + which, Kind: KindQuantity,
			Help:      "A frequency that excites the diaphragm. A speed may be typed in rpm.",
			Dimension: quantity.Frequency, SI: "Hz", InchPound: "Hz", Units: frequencyUnits,
			Low: lowestLine, High: highestLine, Reason: reasonLine,
			number: func(d *Diaphragm) *float64 { return &d.Avoid.Lines[i].Frequency },
		},
		{
			Path: at("halfWidth"), Group: GroupAvoid, Symbol: "±", Name: "half-width" + which, Kind: KindQuantity,
			Help:      "A mode within this distance to either side counts as a hit, within twice of it as near.",
			Dimension: quantity.Ratio, SI: "%", InchPound: "%", Units: []string{"%", "‰"},
			Low: 0, High: 0.5, Reason: "a wider band would forbid everything",
			number: func(d *Diaphragm) *float64 { return &d.Avoid.Lines[i].HalfWidth },
		},
	}
}

// newLine begins at 100 Hz.
func newLine(d *Diaphragm) Line {
	return Line{Name: "line " + strconv.Itoa(len(d.Avoid.Lines)+1), Frequency: 100, HalfWidth: 0.05}
}

package diaphragm

import (
	"strconv"

	"hoopsheet/core/quantity"
)

// faceChoices gives every kind of face in words.
func faceChoices() []Choice {
	names := map[FaceKind]string{
		FaceOpen:    "open: air passes around the rim",
		FaceBaffled: "baffled: set in a wall",
		FaceCavity:  "cavity: a closed space behind it",
		FaceVacuum:  "vacuum",
	}
	var list []Choice
	for _, kind := range FaceKinds() {
		list = append(list, Choice{Value: string(kind), Name: names[kind]})
	}
	return list
}

func faceFields() []Field {
	upper := func(d *Diaphragm) *Face { return &d.Faces.Upper }
	lower := func(d *Diaphragm) *Face { return &d.Faces.Lower }
	return append(oneFace("upper", upper), oneFace("lower", lower)...)
}

func oneFace(side string, face func(*Diaphragm) *Face) []Field {
	kind := "faces." + side + ".kind"
	return []Field{
		{
			Path: kind, Group: GroupFaces, Name: side + " face", Kind: KindChoice,
			Help:    "What the air on this side can do. Open is set for both faces together, because the air passes around the rim.",
			Choices: faceChoices(),
			text:    func(d *Diaphragm) *string { return (*string)(&face(d).Kind) },
		},
		{
			Path: "faces." + side + ".depth", Group: GroupFaces, Symbol: "L", Name: "depth of the " + side + " cavity",
			Kind: KindQuantity, Optional: true,
			Help:      "Distance from the sheet to the closed end of the space behind it.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: []string{"mm", "cm", "m", "in", "ft"},
			Low: 1e-4, High: 100, Reason: "closer walls touch the sheet and farther ones are a room",
			number: func(d *Diaphragm) *float64 { return &face(d).Depth },
			shown: func(d *Diaphragm, drafts map[string]string) bool {
				draft, drafted := drafts[kind]
				return face(d).Kind == FaceCavity || drafted && draft == string(FaceCavity)
			},
		},
	}
}

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

// lineFields are the fields of line i; their accessors hold for documents that
// have it.
func lineFields(i int) []Field {
	which := " of line " + strconv.Itoa(i+1)
	return []Field{
		{
			Path: linePath(i, "name"), Group: GroupAvoid, Name: "name" + which, Kind: KindText, Most: 60,
			Help: "What makes this frequency: mains hum, a fan, a pump.",
			text: func(d *Diaphragm) *string { return &d.Avoid.Lines[i].Name },
		},
		{
			Path: linePath(i, "frequency"), Group: GroupAvoid, Symbol: "f", Name: "frequency" + which, Kind: KindQuantity,
			Help:      "A frequency that excites the diaphragm. A speed may be typed in rpm.",
			Dimension: quantity.Frequency, SI: "Hz", InchPound: "Hz", Units: frequencyUnits,
			Low: lowestLine, High: highestLine, Reason: reasonLine,
			number: func(d *Diaphragm) *float64 { return &d.Avoid.Lines[i].Frequency },
		},
		{
			Path: linePath(i, "halfWidth"), Group: GroupAvoid, Symbol: "±", Name: "half-width" + which, Kind: KindQuantity,
			Help:      "A mode within this distance to either side counts as a hit, within twice of it as near.",
			Dimension: quantity.Ratio, SI: "%", InchPound: "%", Units: []string{"%", "‰"},
			Low: 0, High: 0.5, Reason: "a wider band would forbid everything",
			number: func(d *Diaphragm) *float64 { return &d.Avoid.Lines[i].HalfWidth },
		},
	}
}

package diaphragm

import (
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

func identityFields() []Field {
	return []Field{
		{
			Path: "name", Group: GroupIdentity, Name: "name", Kind: KindText, Most: 120,
			Help: "What the diaphragm is called on drawings and in the records.",
			text: func(d *Diaphragm) *string { return &d.Name },
		},
		{
			Path: "place", Group: GroupIdentity, Name: "place", Kind: KindText, Most: 200, Optional: true,
			Help: "Where it is or will be installed.",
			text: func(d *Diaphragm) *string { return &d.Place },
		},
		{
			Path: "notes", Group: GroupIdentity, Name: "notes", Kind: KindLongText, Most: 4000, Optional: true,
			Help: "Anything the next person should know. A hand-over link carries it, so long notes need the file instead.",
			text: func(d *Diaphragm) *string { return &d.Notes },
		},
	}
}

// Bounds of the expansion of ring and sheet: common practice. Fibres that
// shrink when heated reach about -6e-6/K, rubbers about 250e-6/K.
const (
	lowestCTE  = -20e-6
	highestCTE = 500e-6
	reasonCTE  = "metals lie near 10 to 25, films near 20 to 100 and rubbers near 250 ppm/K"
)

var expansionUnits = []string{"ppm/K", "1/K", "ppm/°F", "1/°F"}

func ringFields() []Field {
	return []Field{
		{
			Path: "ring.radius", Group: GroupRing, Symbol: "a", Name: "ring radius", Kind: KindQuantity,
			Help:      "Inner radius of the ring: from the centre to where the sheet is held, half the free diameter.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: []string{"mm", "cm", "m", "in", "ft"},
			Low: 1e-3, High: 50, Reason: "rings from a small foil window to a large cover are meant",
			number: func(d *Diaphragm) *float64 { return &d.Ring.Radius },
		},
		{
			Path: "ring.hubRadius", Group: GroupRing, Symbol: "b", Name: "hub radius", Kind: KindQuantity, Optional: true,
			Help:      "Radius of a fixed hub in the middle that holds the sheet too. Leave it empty where there is none.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: []string{"mm", "cm", "m", "in", "ft"},
			Low: 1e-4, High: 50, Reason: "a smaller hub would cut through the sheet",
			number: func(d *Diaphragm) *float64 { return &d.Ring.HubRadius },
		},
		{
			Path: "ring.outOfRound", Group: GroupRing, Name: "out of round", Kind: KindQuantity, Optional: true,
			Help:      "A quarter of the difference between the longest and the shortest diameter. Leave it empty for a true ring.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: []string{"mm", "µm", "cm", "in", "mil"},
			Low: 1e-6, High: 5, Reason: "less cannot be measured on a ring and more is an oval",
			number: func(d *Diaphragm) *float64 { return &d.Ring.OutOfRound },
		},
		angleField("ring.outOfRoundAngle", GroupRing, "direction of the longest diameter",
			"Anticlockwise from the right in the plan.",
			func(d *Diaphragm) *float64 { return &d.Ring.OutOfRoundAngle }).
			where(func(d *Diaphragm) bool { return d.Ring.OutOfRound != 0 }),
		{
			Path: "ring.clamps", Group: GroupRing, Symbol: "N", Name: "number of clamps", Kind: KindCount, Optional: true,
			Help: "Clamps or screws around the rim. Leave it empty where the rim is glued or welded.",
			Low:  3, High: 1000, Reason: "fewer than three do not hold a round sheet",
			count: func(d *Diaphragm) *int { return &d.Ring.Clamps },
		},
		{
			Path: "ring.cte", Group: GroupRing, Symbol: "αᵣ", Name: "expansion of the ring", Kind: KindQuantity,
			Help:      "Thermal expansion of the ring. Aluminium has about 23 ppm/K, steel about 12 ppm/K.",
			Dimension: quantity.Expansion, SI: "ppm/K", InchPound: "ppm/°F", Units: expansionUnits,
			Low: lowestCTE, High: highestCTE, Reason: reasonCTE,
			number: func(d *Diaphragm) *float64 { return &d.Ring.CTE },
		},
	}
}

func sheetFields() []Field {
	var catalogue []Choice
	for _, m := range sheet.Materials() {
		catalogue = append(catalogue, Choice{Value: m.ID, Name: m.Name})
	}
	return []Field{
		{
			Path: "sheet.material", Group: GroupSheet, Name: "material", Kind: KindMaterial, Most: 120, Optional: true,
			Help:    "Type a name, or take one from the list with its typical figures; those of the roll in hand are better.",
			Choices: catalogue,
			text:    func(d *Diaphragm) *string { return &d.Sheet.Material },
		},
		{
			Path: "sheet.thickness", Group: GroupSheet, Symbol: "h", Name: "sheet thickness", Kind: KindQuantity,
			Help:      "Thickness of the sheet as stretched.",
			Dimension: quantity.Length, SI: "µm", InchPound: "mil", Units: []string{"µm", "mm", "m", "mil", "in"},
			Low: 10e-9, High: 20e-3, Reason: "thinner sheets are no bulk material and thicker ones are plates",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.Thickness },
		},
		{
			Path: "sheet.density", Group: GroupSheet, Symbol: "ρₛ", Name: "density of the sheet", Kind: KindQuantity,
			Help:      "Mass per volume of the sheet material.",
			Dimension: quantity.Density, SI: "kg/m³", InchPound: "lb/ft³", Units: []string{"kg/m³", "g/cm³", "lb/ft³", "lb/in³"},
			Low: 10, High: 23000, Reason: "no sheet is lighter than foam or heavier than the heaviest metal",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.Density },
		},
		{
			Path: "sheet.measuredArealDensity", Group: GroupSheet, Symbol: "σ", Name: "measured areal density", Kind: KindQuantity, Optional: true,
			Help:      "Mass per area of a weighed sample. Where it is given, it replaces density times thickness.",
			Dimension: quantity.ArealDensity, SI: "g/m²", InchPound: "oz/yd²", Units: []string{"g/m²", "kg/m²", "oz/yd²", "lb/ft²"},
			Low: 1e-5, High: 200, Reason: "films weigh some grams and heavy covers some kilograms per square metre",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.MeasuredArealDensity },
		},
		{
			Path: "sheet.e", Group: GroupSheet, Symbol: "E", Name: "modulus of elasticity", Kind: KindQuantity,
			Help:      "Stiffness of the sheet in its plane. For fabric, take the mean of warp and weft.",
			Dimension: quantity.Stress, SI: "GPa", InchPound: "ksi", Units: []string{"GPa", "MPa", "Pa", "ksi", "psi"},
			Low: 1e4, High: 1.5e12, Reason: "soft gels and diamond lie within these limits",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.E },
		},
		{
			Path: "sheet.nu", Group: GroupSheet, Symbol: "ν", Name: "Poisson's ratio", Kind: KindQuantity,
			Help:      "How much the sheet narrows when it is stretched; near 0.3 for metals and 0.4 for films.",
			Dimension: quantity.Ratio, SI: "", InchPound: "", Units: []string{""},
			Low: 0, High: 0.5, Reason: "a sheet that is alike in all directions cannot have more than 0.5",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.Nu },
		},
		{
			Path: "sheet.cte", Group: GroupSheet, Symbol: "αₛ", Name: "expansion of the sheet", Kind: KindQuantity,
			Help:      "Thermal expansion of the sheet. Against that of the ring it decides how the tension changes with temperature.",
			Dimension: quantity.Expansion, SI: "ppm/K", InchPound: "ppm/°F", Units: expansionUnits,
			Low: lowestCTE, High: highestCTE, Reason: reasonCTE,
			number: func(d *Diaphragm) *float64 { return &d.Sheet.CTE },
		},
		{
			Path: "sheet.allowableStress", Group: GroupSheet, Name: "allowable stress", Kind: KindQuantity,
			Help:      "The largest stress the sheet may carry for years, with its safety margin. The supplier or the local code gives it.",
			Dimension: quantity.Stress, SI: "MPa", InchPound: "psi", Units: []string{"MPa", "GPa", "kPa", "psi", "ksi"},
			Low: 1e3, High: 1e10, Reason: "soft rubbers and the strongest fibres lie within these limits",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.AllowableStress },
		},
		{
			// The figures of the help are common practice, from memory.
			Path: "sheet.lossFactor", Group: GroupSheet, Symbol: "η", Name: "loss factor of the sheet", Kind: KindQuantity, Optional: true,
			Help:      "How much the material itself damps bending: films near 0.01 to 0.03, metals near 0.001. Empty for none.",
			Dimension: quantity.Ratio, SI: "", InchPound: "", Units: []string{"", "%"},
			Low: 0, High: 1, Reason: "a sheet that rings loses less than that",
			number: func(d *Diaphragm) *float64 { return &d.Sheet.LossFactor },
		},
	}
}

func dampingFields() []Field {
	return []Field{{
		Path: "damping.ratio", Group: GroupDamping, Symbol: "ζ", Name: "damping ratio", Kind: KindQuantity,
		Help:      "Share of critical damping, taken for every mode. Stretched film in air often has 0.1 to 1 %; a tap measures it.",
		Dimension: quantity.Ratio, SI: "%", InchPound: "%", Units: []string{"%", "‰"},
		Low: 0, High: 0.5, Reason: "a sheet that still rings is far from critical damping",
		number: func(d *Diaphragm) *float64 { return &d.Damping.Ratio },
	}}
}

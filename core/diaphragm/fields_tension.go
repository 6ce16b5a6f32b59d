package diaphragm

import (
	"math"
	"strconv"

	"hoopsheet/core/quantity"
)

func tensionFields() []Field {
	return []Field{
		{
			Path: "tension.nominal", Group: GroupTension, Symbol: "T", Name: "tension", Kind: KindQuantity,
			Help:      "Pull per length of rim that the sheet shall carry at the temperature below, the mean over all directions.",
			Dimension: quantity.LineTension, SI: "N/m", InchPound: "lbf/in", Units: []string{"N/m", "kN/m", "N/mm", "lbf/in", "lbf/ft"},
			Low: 0.01, High: 1e6, Reason: "less is slack and more is beyond any film, foil or fabric",
			number: func(d *Diaphragm) *float64 { return &d.Tension.Nominal },
		},
		{
			Path: "tension.tolerance", Group: GroupTension, Symbol: "±", Name: "tolerance of the tension", Kind: KindQuantity,
			Help:      "How far the built tension may be from the specified one, to either side.",
			Dimension: quantity.Ratio, SI: "%", InchPound: "%", Units: []string{"%", "‰"},
			Low: 0.001, High: 0.5, Reason: "no tap can prove less than 0.1 % and more than 50 % specifies nothing",
			number: func(d *Diaphragm) *float64 { return &d.Tension.Tolerance },
		},
		{
			Path: "tension.rim", Group: GroupTension, Name: "edge of the sheet", Kind: KindChoice, Default: string(RimClamped),
			Help: "How the rim holds the edge against bending. It counts for stiff sheets; thin film is hardly affected.",
			Choices: []Choice{
				{Value: string(RimClamped), Name: "clamped: held flat"},
				{Value: string(RimSupported), Name: "supported: free to turn, as over a sharp edge"},
			},
			text: func(d *Diaphragm) *string { return (*string)(&d.Tension.Rim) },
		},
	}
}

func evennessFields() []Field {
	return []Field{
		{
			Path: "tension.bonded", Group: GroupEvenness, Name: "sheet along the rim", Kind: KindChoice, Default: "sliding",
			Help: "Whether the sheet could slide along the rim while it was tensioned. It decides how uneven pull spreads inwards.",
			Choices: []Choice{
				{Value: "sliding", Name: "sliding: drawn over the rim by clamps"},
				{Value: "bonded", Name: "bonded: glued or welded to the rim"},
			},
			flag: func(d *Diaphragm) *bool { return &d.Tension.Bonded },
		},
		{
			Path: "tension.weftRatio", Group: GroupEvenness, Name: "weft tension over warp tension", Kind: KindQuantity, Optional: true,
			Help:      "For fabric that is pulled harder along one set of threads. Leave it empty where the pull is the same.",
			Dimension: quantity.Ratio, SI: "", InchPound: "", Units: []string{"", "%"},
			Low: 0.1, High: 10, Reason: "with more than ten to one the fabric is slack across",
			number: func(d *Diaphragm) *float64 { return &d.Tension.WeftRatio },
		},
		angleField("tension.warpAngle", GroupEvenness, "direction of the warp",
			"Direction of the warp threads, anticlockwise from the right in the plan.",
			func(d *Diaphragm) *float64 { return &d.Tension.WarpAngle }).
			where(func(d *Diaphragm) bool { return d.Tension.WeftRatio != 0 }),
		{
			Path: "tension.upright", Group: GroupEvenness, Name: "weight of the sheet", Kind: KindChoice, Default: "across",
			Help: "In an upright ring the sheet's weight adds to the tension above and takes from it below. It counts for heavy sheets.",
			Choices: []Choice{
				{Value: "across", Name: "across the sheet, or of no account"},
				{Value: "along", Name: "along the sheet: the plan stands upright"},
			},
			flag: func(d *Diaphragm) *bool { return &d.Tension.Upright },
		},
	}
}

// harmonicFields are the fields of harmonic i.
func harmonicFields(i int) []Field {
	const path = "tension.harmonics"
	which := " of harmonic " + strconv.Itoa(i+1)
	return []Field{
		{
			Path: entryPath(path, i, "order"), Group: GroupEvenness, Symbol: "k", Name: "order" + which, Kind: KindCount,
			Help: "How many tight places there are around the rim. One alone exists with a bonded rim only.",
			Low:  1, High: mostHarmonicOrder, Reason: "it counts tight places around the rim, and finer ones die out close to it",
			count: func(d *Diaphragm) *int { return &d.Tension.Harmonics[i].Order },
		},
		{
			Path: entryPath(path, i, "epsilon"), Group: GroupEvenness, Symbol: "ε", Name: "amplitude" + which, Kind: KindQuantity,
			Help:      "How far the pull at the tight places is above the mean; between them it is as far below.",
			Dimension: quantity.Ratio, SI: "%", InchPound: "%", Units: []string{"%", "‰"},
			Low: 0, High: 0.99, Reason: "the pull of the rim must not become a push",
			number: func(d *Diaphragm) *float64 { return &d.Tension.Harmonics[i].Epsilon },
		},
		angleField(entryPath(path, i, "angle"), GroupEvenness, "angle"+which,
			"Where one of the tight places is, anticlockwise from the right in the plan.",
			func(d *Diaphragm) *float64 { return &d.Tension.Harmonics[i].Angle }),
	}
}

const mostHarmonicOrder = 24

// newHarmonic begins with the lowest order that is free, and with an amplitude
// that leaves the rim under pull.
func newHarmonic(d *Diaphragm) Harmonic {
	taken := map[int]bool{}
	room := 1.0
	for _, h := range d.Tension.Harmonics {
		taken[h.Order] = true
		room -= h.Epsilon
	}
	order := 2
	for taken[order] {
		order++
	}
	return Harmonic{Order: order, Epsilon: min(0.02, max(room, 0)/2)}
}

// angleField is a direction in the plan.
func angleField(path string, group GroupName, name, help string, number func(*Diaphragm) *float64) Field {
	return Field{
		Path: path, Group: group, Symbol: "θ", Name: name, Kind: KindQuantity, Help: help,
		Dimension: quantity.Angle, SI: "°", InchPound: "°", Units: []string{"°", "rad"},
		Low: -2 * math.Pi, High: 2 * math.Pi, Reason: "one turn reaches every direction",
		number: number,
	}
}

// where is the field, shown only where the document is as told.
func (f Field) where(applies func(*Diaphragm) bool) Field {
	f.shown = func(d *Diaphragm, _ map[string]string) bool { return applies(d) }
	return f
}

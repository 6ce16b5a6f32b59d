package diaphragm

import (
	"strconv"

	"hoopsheet/core/quantity"
)

// Bounds of what is attached: common practice.
const (
	lightest, heaviest = 1e-9, 100.0 // kg
	reasonMass         = "lighter things do not count and heavier ones are not carried by a sheet"
	finest, widest     = 1e-5, 50.0 // m
	reasonSize         = "finer things do not count and wider ones are no diaphragm's"
)

var (
	massUnits  = []string{"g", "mg", "kg", "oz", "lb"}
	sizeUnits  = []string{"mm", "cm", "m", "in", "ft"}
	placeUnits = []string{"", "%"}
)

// patchFields are the fields of patch i.
func patchFields(i int) []Field {
	which := " of patch " + strconv.Itoa(i+1)
	at := func(member string) string { return entryPath("attached.patches", i, member) }
	patch := func(d *Diaphragm) *Patch { return &d.Attached.Patches[i] }
	return []Field{
		{
			Path: at("name"), Group: GroupAttached, Name: "name" + which, Kind: KindText, Most: 60,
			Help: "What it is: a sensor, a target, a repair.",
			text: func(d *Diaphragm) *string { return &patch(d).Name },
		},
		{
			Path: at("radius"), Group: GroupAttached, Symbol: "r/a", Name: "place" + which, Kind: KindQuantity,
			Help:      "Distance of its middle from the centre, in units of the ring radius: 0 at the centre, 1 at the rim.",
			Dimension: quantity.Ratio, SI: "", InchPound: "", Units: placeUnits,
			Low: 0, High: 1, Reason: "beyond 1 there is no sheet",
			number: func(d *Diaphragm) *float64 { return &patch(d).Radius },
		},
		angleField(at("angle"), GroupAttached, "angle"+which, "Its direction from the centre, anticlockwise from the right in the plan.",
			func(d *Diaphragm) *float64 { return &patch(d).Angle }),
		{
			Path: at("size"), Group: GroupAttached, Symbol: "b", Name: "radius" + which, Kind: KindQuantity,
			Help:      "Its own radius, half its diameter. For a square one, take 0.56 of its side.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: sizeUnits,
			Low: finest, High: widest, Reason: reasonSize,
			number: func(d *Diaphragm) *float64 { return &patch(d).Size },
		},
		{
			Path: at("mass"), Group: GroupAttached, Symbol: "M", Name: "mass" + which, Kind: KindQuantity,
			Help:      "What it adds, with its glue and the part of its cable that the sheet carries.",
			Dimension: quantity.Mass, SI: "g", InchPound: "oz", Units: massUnits,
			Low: lightest, High: heaviest, Reason: reasonMass,
			number: func(d *Diaphragm) *float64 { return &patch(d).Mass },
		},
		{
			Path: at("rigid"), Group: GroupAttached, Name: "stiffness" + which, Kind: KindChoice,
			Help: "Tape and thin foil follow the sheet; a sensor or a plate stays flat.",
			Choices: []Choice{
				{Value: "limp", Name: "limp: bends with the sheet"},
				{Value: "rigid", Name: "rigid: stays flat"},
			},
			flag: func(d *Diaphragm) *bool { return &patch(d).Rigid },
		},
	}
}

// newPatch begins as one gram at the centre.
func newPatch(d *Diaphragm) Patch {
	return Patch{Name: "patch " + strconv.Itoa(len(d.Attached.Patches)+1), Size: d.Ring.Radius / 20, Mass: 0.001}
}

// stripFields are the fields of strip i.
func stripFields(i int) []Field {
	which := " of strip " + strconv.Itoa(i+1)
	at := func(member string) string { return entryPath("attached.strips", i, member) }
	strip := func(d *Diaphragm) *Strip { return &d.Attached.Strips[i] }
	return []Field{
		{
			Path: at("name"), Group: GroupAttached, Name: "name" + which, Kind: KindText, Most: 60,
			Help: "What it is: a seam, a double overlap, a tape.",
			text: func(d *Diaphragm) *string { return &strip(d).Name },
		},
		{
			Path: at("offset"), Group: GroupAttached, Symbol: "r/a", Name: "offset" + which, Kind: KindQuantity,
			Help:      "Distance of its middle line from the centre, in units of the ring radius: 0 along a diameter.",
			Dimension: quantity.Ratio, SI: "", InchPound: "", Units: placeUnits,
			Low: 0, High: 1, Reason: "beyond 1 there is no sheet",
			number: func(d *Diaphragm) *float64 { return &strip(d).Offset },
		},
		angleField(at("angle"), GroupAttached, "angle"+which,
			"Direction square to the strip, in which it lies off the centre, anticlockwise from the right in the plan.",
			func(d *Diaphragm) *float64 { return &strip(d).Angle }),
		{
			Path: at("width"), Group: GroupAttached, Symbol: "b", Name: "width" + which, Kind: KindQuantity,
			Help:      "Width of the seam or tape.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: sizeUnits,
			Low: finest, High: widest, Reason: reasonSize,
			number: func(d *Diaphragm) *float64 { return &strip(d).Width },
		},
		{
			Path: at("mass"), Group: GroupAttached, Symbol: "M", Name: "mass" + which, Kind: KindQuantity,
			Help:      "What the whole strip adds within the ring; at a seam, only what is doubled.",
			Dimension: quantity.Mass, SI: "g", InchPound: "oz", Units: massUnits,
			Low: lightest, High: heaviest, Reason: reasonMass,
			number: func(d *Diaphragm) *float64 { return &strip(d).Mass },
		},
	}
}

// newStrip begins as five grams along a diameter.
func newStrip(d *Diaphragm) Strip {
	return Strip{Name: "strip " + strconv.Itoa(len(d.Attached.Strips)+1), Width: d.Ring.Radius / 20, Mass: 0.005}
}

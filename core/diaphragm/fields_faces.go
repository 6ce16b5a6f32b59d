package diaphragm

import (
	"hoopsheet/core/air"
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

// fluidChoices gives every fluid in words.
func fluidChoices() []Choice {
	names := map[air.FluidName]string{
		air.FluidAir:      "air, as below",
		air.FluidNitrogen: "nitrogen, dry",
		air.FluidHelium:   "helium",
		air.FluidSF6:      "sulfur hexafluoride",
		air.FluidWater:    "water",
	}
	var list []Choice
	for _, name := range air.FluidNames() {
		list = append(list, Choice{Value: string(name), Name: names[name]})
	}
	return list
}

func faceFields() []Field {
	upper := func(d *Diaphragm) *Face { return &d.Faces.Upper }
	lower := func(d *Diaphragm) *Face { return &d.Faces.Lower }
	return append(oneFace("upper", upper), oneFace("lower", lower)...)
}

func oneFace(side string, face func(*Diaphragm) *Face) []Field {
	path := "faces." + side
	// with is true where the face is, or is about to be, of one of the kinds.
	with := func(kinds ...FaceKind) func(*Diaphragm, map[string]string) bool {
		return func(d *Diaphragm, drafts map[string]string) bool {
			for _, kind := range kinds {
				if face(d).Kind == kind || drafts[path+".kind"] == string(kind) {
					return true
				}
			}
			return false
		}
	}
	return []Field{
		{
			Path: path + ".kind", Group: GroupFaces, Name: side + " face", Kind: KindChoice,
			Help:    "What the air on this side can do. Open is set for both faces together, because the air passes around the rim.",
			Choices: faceChoices(),
			text:    func(d *Diaphragm) *string { return (*string)(&face(d).Kind) },
		},
		{
			Path: path + ".fluid", Group: GroupFaces, Name: "fluid at the " + side + " face", Kind: KindChoice, Default: string(air.FluidAir),
			Help:    "What lies on this side, at the temperature and pressure below. Open faces have the same on both sides.",
			Choices: fluidChoices(),
			text:    func(d *Diaphragm) *string { return (*string)(&face(d).Fluid) },
			shown:   with(FaceOpen, FaceBaffled, FaceCavity),
		},
		{
			Path: path + ".wall", Group: GroupFaces, Symbol: "d", Name: "wall before the " + side + " face", Kind: KindQuantity, Optional: true,
			Help:      "Distance of a parallel wall or floor, as under a ring on trestles. Leave it empty where none is near.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: sizeUnits,
			Low: 1e-4, High: 100, Reason: "closer walls touch the sheet and farther ones do not count",
			number: func(d *Diaphragm) *float64 { return &face(d).Wall },
			shown:  with(FaceBaffled),
		},
		{
			Path: path + ".depth", Group: GroupFaces, Symbol: "L", Name: "depth of the " + side + " cavity",
			Kind: KindQuantity, Optional: true, neededWhereShown: true,
			Help:      "Distance from the sheet to the closed end of the space behind it.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: sizeUnits,
			Low: 1e-4, High: 100, Reason: "closer walls touch the sheet and farther ones are a room",
			number: func(d *Diaphragm) *float64 { return &face(d).Depth },
			shown:  with(FaceCavity),
		},
		{
			Path: path + ".ventArea", Group: GroupFaces, Name: "vent of the " + side + " cavity", Kind: KindQuantity, Optional: true,
			Help:      "Cross-section of a hole or leak to the open. Leave it empty where the cavity is tight.",
			Dimension: quantity.Area, SI: "cm²", InchPound: "in²", Units: []string{"cm²", "mm²", "m²", "in²", "ft²"},
			Low: 1e-10, High: 1000, Reason: "finer leaks count as tight and wider ones are no vent",
			number: func(d *Diaphragm) *float64 { return &face(d).VentArea },
			shown:  with(FaceCavity),
		},
		Field{
			Path: path + ".ventLength", Group: GroupFaces, Name: "length of the " + side + " vent", Kind: KindQuantity, Optional: true,
			Help:      "Length of the passage, such as the thickness of the wall. Leave it empty for a hole in a thin plate.",
			Dimension: quantity.Length, SI: "mm", InchPound: "in", Units: sizeUnits,
			Low: 1e-5, High: 100, Reason: "shorter ones count as none and longer ones are a pipe with sounds of its own",
			number: func(d *Diaphragm) *float64 { return &face(d).VentLength },
		}.where(func(d *Diaphragm) bool { return face(d).Kind == FaceCavity && face(d).VentArea != 0 }),
	}
}

package sheet

// Material is one entry of the catalogue. The figures are typical values for
// a first design; a certificate for the roll in hand replaces them.
type Material struct {
	// ID names the material for programs; it never changes.
	ID string `json:"id"`
	// Name is the generic name, as it stands in a list.
	Name string `json:"name"`
	// Density rho, kg/m^3.
	Density float64 `json:"density"`
	// E is the in-plane modulus of elasticity, Pa.
	E float64 `json:"e"`
	// Nu is Poisson's ratio.
	Nu float64 `json:"nu"`
	// CTE is the coefficient of thermal expansion near room temperature, 1/K.
	CTE float64 `json:"cte"`
	// AllowableStress is a long-term membrane stress, Pa. It is a common
	// practice, never a code value; Source says what it was derived from.
	AllowableStress float64 `json:"allowableStress"`
	// Source says where each figure comes from, in sentences.
	Source string `json:"source"`
}

// Materials lists the catalogue in the order in which it is offered.
//
// Figures without another remark were read in the source named. What could
// not be read in a source says "from memory".
func Materials() []Material {
	return []Material{
		{
			ID: "polyester-film", Name: "Polyester film (PET, biaxially oriented)",
			Density: 1390, E: 4.8e9, Nu: 0.38, CTE: 17e-6, AllowableStress: 33e6,
			Source: "Density, modulus (4.8 GPa along, 5.0 GPa across the web), Poisson's ratio below yield, expansion (30 to 50 °C) " +
				"and stress at 5 % strain (98 MPa): product bulletin of a film maker, table 1. " +
				"A space agency's materials list gives 30e-6 per kelvin for the expansion: it depends on the orientation, so measure it where it matters. " +
				"Allowable stress: common practice, one third of the stress at 5 % strain, because the film creeps.",
		},
		{
			ID: "polyimide-film", Name: "Polyimide film",
			Density: 1420, E: 2.5e9, Nu: 0.34, CTE: 20e-6, AllowableStress: 23e6,
			Source: "Density, modulus (23 °C; 2.0 GPa at 200 °C), Poisson's ratio, expansion (-14 to 38 °C) and yield at 3 % strain " +
				"(69 MPa at 23 °C, 41 MPa at 200 °C): data sheet of a film maker. " +
				"Allowable stress: common practice, one third of the yield stress at 23 °C.",
		},
		{
			ID: "etfe-foil", Name: "ETFE foil",
			Density: 1750, E: 0.8e9, Nu: 0.44, CTE: 100e-6, AllowableStress: 10e6,
			Source: "Density, modulus (0.8 to 1.1 GPa; the lower end is used) and yield (21 MPa): property table of a roofing foil maker; " +
				"strongly rate and temperature dependent (Polymers 14 (2022) 3156). " +
				"Poisson's ratio (0.43 to 0.45) and expansion (about 1e-4 per kelvin): from memory. " +
				"Allowable stress: about half of yield, where creep and relaxation begin to be marked (Kawabata et al., 2021).",
		},
		{
			ID: "aluminium-foil", Name: "Aluminium foil (commercially pure, soft)",
			Density: 2700, E: 70e9, Nu: 0.33, CTE: 23.5e-6, AllowableStress: 15e6,
			Source: "Density, modulus and yield (30 MPa soft to 110 MPa hard): generic specification of the alloys 1050A and 1100; " +
				"Poisson's ratio: specification of alloy 5052. Expansion (23.1e-6 to 23.6e-6 per kelvin): from memory. " +
				"Allowable stress: common practice, half of the lowest yield; foil yields lower than thick metal.",
		},
		{
			ID: "titanium-foil", Name: "Titanium foil (commercially pure)",
			Density: 4510, E: 105e9, Nu: 0.31, CTE: 8.6e-6, AllowableStress: 138e6,
			Source: "Modulus (105 to 120 GPa; the lower end is used), Poisson's ratio and expansion (8.6e-6 to 9.0e-6 per kelvin, 0 to 100 °C): suppliers' data sheets. " +
				"Proof stress 276 MPa: sheet specification AMS 4902. Density: from memory. " +
				"Allowable stress: common practice, half of the proof stress.",
		},
		{
			ID: "titanium-alloy-foil", Name: "Titanium alloy foil (6 % Al, 4 % V, annealed)",
			Density: 4420, E: 114e9, Nu: 0.31, CTE: 8.8e-6, AllowableStress: 414e6,
			Source: "Density, modulus (105 to 120 GPa, typically 114), Poisson's ratio, expansion (8.6e-6 to 9.0e-6 per kelvin, 0 to 100 °C) " +
				"and proof stress (828 MPa at least): suppliers' data sheets. " +
				"Allowable stress: common practice, half of the proof stress.",
		},
		{
			ID: "beryllium-foil", Name: "Beryllium foil",
			Density: 1850, E: 290e9, Nu: 0.08, CTE: 11.5e-6, AllowableStress: 103e6,
			Source: "Density, modulus (276 to 303 GPa), Poisson's ratio (0.02 to 0.08 in the literature), expansion and yield (207 MPa, lowest grade): " +
				"Coyle, Beryllium: Properties and Applications, University of Arizona. " +
				"Allowable stress: common practice, half of yield. Brittle, and its dust is poisonous.",
		},
		{
			ID: "stainless-steel-foil", Name: "Stainless steel foil (austenitic, annealed)",
			Density: 7900, E: 193e9, Nu: 0.29, CTE: 17.0e-6, AllowableStress: 100e6,
			Source: "All figures from memory, typical of 18 % chromium, 8 % nickel steel with a proof stress of 205 MPa. " +
				"Allowable stress: common practice, half of the proof stress.",
		},
	}
}

// MaterialByID finds a material of the catalogue by its id.
func MaterialByID(id string) (Material, bool) {
	for _, m := range Materials() {
		if m.ID == id {
			return m, true
		}
	}
	return Material{}, false
}

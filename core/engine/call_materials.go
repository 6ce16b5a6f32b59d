package engine

import (
	"context"

	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// CatalogueResult is the catalogue of sheet materials, for reading.
type CatalogueResult struct {
	Materials []CatalogueEntry `json:"materials"`
}

// CatalogueEntry is one material with its typical figures and their sources.
type CatalogueEntry struct {
	Name string `json:"name"`
	// Figures are typical values with their units.
	Figures string `json:"figures"`
	Source  string `json:"source"`
}

func runMaterials(context.Context, *NoRequest) (*CatalogueResult, error) {
	const digits = 4
	result := &CatalogueResult{Materials: []CatalogueEntry{}}
	for _, m := range sheet.Materials() {
		result.Materials = append(result.Materials, CatalogueEntry{Name: m.Name, Source: m.Source, Figures: "ρₛ " + quantity.FormatWithUnit(m.Density, "kg/m³", digits) +
			", E " + quantity.FormatWithUnit(m.E, "GPa", digits) + ", ν " + quantity.FormatNumber(m.Nu, digits) +
			", αₛ " + quantity.FormatWithUnit(m.CTE, "ppm/K", digits) + ", allowable stress " + quantity.FormatWithUnit(m.AllowableStress, "MPa", digits)})
	}
	return result, nil
}

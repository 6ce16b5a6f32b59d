package engine

import (
	"math"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// derivedDigits are the significant digits of derived quantities.
const derivedDigits = 4

// derive lists what follows from a document, group by group. Quantities that
// cannot be had (the air outside its formulas, a temperature that is never
// reached) are left out.
func derive(doc diaphragm.Diaphragm, system quantity.System) []DerivedRow {
	d := deriver{system: system}
	sigma := doc.Sheet.ArealDensity()
	d.add("sigma", diaphragm.GroupSheet, "σ", "areal density", sigma, quantity.ArealDensity)
	if tension := doc.Tension.Nominal; tension > 0 && sigma > 0 {
		d.deriveTension(doc, sigma)
	}
	d.deriveAir(doc, sigma)
	d.deriveThermal(doc)
	return d.rows
}

type deriver struct {
	system quantity.System
	rows   []DerivedRow
}

func (d *deriver) add(id string, group diaphragm.GroupName, symbol, name string, value float64, dimension quantity.Dimension) {
	unit := ""
	if dimension != "" {
		unit = quantity.Offered(dimension, d.system)[0]
	}
	if math.IsNaN(value) || math.IsInf(value, 0) {
		return
	}
	d.rows = append(d.rows, DerivedRow{
		ID: id, Group: group, Symbol: symbol, Name: name, Value: value,
		Text: quantity.Format(value, unit, derivedDigits), Unit: unit,
	})
}

func (d *deriver) deriveTension(doc diaphragm.Diaphragm, sigma float64) {
	tension := doc.Tension.Nominal
	d.add("tension-low", diaphragm.GroupTension, "", "lowest tension allowed", tension*(1-doc.Tension.Tolerance), quantity.LineTension)
	d.add("tension-high", diaphragm.GroupTension, "", "highest tension allowed", tension*(1+doc.Tension.Tolerance), quantity.LineTension)
	stress := sheet.Stress(tension, doc.Sheet.Thickness)
	d.add("stress", diaphragm.GroupTension, "T/h", "stress from tension", stress, quantity.Stress)
	if doc.Sheet.AllowableStress > 0 {
		d.add("stress-share", diaphragm.GroupTension, "", "its share of the allowable stress", stress/doc.Sheet.AllowableStress, quantity.Ratio)
	}
	if first := modes.Ideal(doc.Ring.Radius, tension, sigma, 1); len(first) == 1 {
		d.add("f01", diaphragm.GroupTension, "f₀₁", "lowest mode of the ideal sheet", first[0].Frequency, quantity.Frequency)
	}
}

func (d *deriver) deriveAir(doc diaphragm.Diaphragm, sigma float64) {
	around := doc.Surroundings
	state, err := air.Moist(around.Temperature, around.Pressure, around.Humidity)
	if err != nil {
		return
	}
	d.add("rho", diaphragm.GroupSurroundings, "ρ", "density of the air", state.Density, quantity.Density)
	d.add("sound", diaphragm.GroupSurroundings, "c₀", "sound speed of the air", state.SoundSpeed, quantity.Speed)
	if sigma > 0 {
		d.add("mass-ratio", diaphragm.GroupSurroundings, "ρa/σ", "air against sheet", state.Density*doc.Ring.Radius/sigma, "")
	}
}

// deriveThermal gives the tension at both ends of the service range on a stiff
// ring, and the temperature at which the sheet goes slack.
func (d *deriver) deriveThermal(doc diaphragm.Diaphragm) {
	change := thermal(doc)
	around := doc.Surroundings
	d.add("tension-cold", diaphragm.GroupSurroundings, "", "tension at the lowest temperature", change.TensionAt(around.ServiceMin), quantity.LineTension)
	d.add("tension-hot", diaphragm.GroupSurroundings, "", "tension at the highest temperature", change.TensionAt(around.ServiceMax), quantity.LineTension)
	if slack, reached := change.SlackTemperature(); reached {
		d.add("slack", diaphragm.GroupSurroundings, "", "the sheet goes slack at", slack, quantity.Temperature)
	}
}

func thermal(doc diaphragm.Diaphragm) sheet.Thermal {
	return sheet.Thermal{
		Tension:     doc.Tension.Nominal,
		Temperature: doc.Surroundings.Temperature,
		Thickness:   doc.Sheet.Thickness,
		E:           doc.Sheet.E,
		Nu:          doc.Sheet.Nu,
		SheetCTE:    doc.Sheet.CTE,
		RingCTE:     doc.Ring.CTE,
	}
}

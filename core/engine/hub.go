package engine

import (
	"math"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
)

// A sheet with a hub is taken as the ideal one: fluid, stiffness and what is
// uneven are worked out for the full disc only.

// hubLines lists the modes of the ideal sheet between hub and ring.
func hubLines(doc *diaphragm.Diaphragm, count int) []Mode {
	var list []Mode
	damping := modes.Damping{Remainder: doc.Damping.Ratio, Total: doc.Damping.Ratio}
	for _, mode := range modes.Hub(doc.Ring.Radius, doc.Ring.HubRadius/doc.Ring.Radius, doc.Tension.Nominal, doc.Sheet.ArealDensity(), count) {
		if d := damping.Total; d > 0 {
			damping.RingDown, damping.Q = math.Log(1000)/(2*math.Pi*mode.Frequency*d), 1/(2*d)
		}
		line := lineOf(doc, mode.M, mode.N, mode.Frequency, &damping)
		line.Ideal = idealFrequency(doc, mode.M, mode.N)
		line.Error = mode.Frequency * hubError
		list = append(list, line)
	}
	return list
}

// hubError is the relative error of bessel.ZeroAnnulus, rounded up.
const hubError = 1e-12

func hubAssumptions() []string {
	return []string{
		"The hub is round, rigid, fixed and in the middle, and holds the sheet at its edge; the sheet between hub and ring is ideal: limp, in vacuum, with the same tension everywhere.",
		"The ring is rigid, and the sheet moves little, so that its tension stays the same.",
		"The column ideal is that of the full sheet without the hub.",
	}
}

// hubCautions names what is left out because of a hub.
func hubCautions(doc *diaphragm.Diaphragm) []string {
	if doc.Ring.HubRadius == 0 {
		return nil
	}
	left := "bending stiffness"
	add := func(has bool, what string) {
		if has {
			left += ", " + what
		}
	}
	add(wet(doc.Faces), "the fluid on its faces and its sound")
	add(doc.Faces.Upper.Kind == diaphragm.FaceCavity || doc.Faces.Lower.Kind == diaphragm.FaceCavity, "the cavity")
	add(len(doc.Attached.Patches)+len(doc.Attached.Strips) > 0, "patches and strips")
	add(len(fieldOf(doc)) > 0, "uneven tension")
	add(doc.Ring.OutOfRound != 0, "the ring's being out of round")
	text := "With a hub only the ideal sheet between hub and ring is computed. Left out: " + left + "."
	if wet(doc.Faces) {
		text += " In air a light sheet rings lower than listed here."
	}
	if q := doc.Ring.HubRadius / doc.Ring.Radius; q < 0.05 {
		text += " Even this small hub of " + quantity.FormatNumber(100*q, 2) + " % of the radius raises the modes without nodal diameters a good deal."
	}
	return []string{text}
}

// hubIgnored says that a hub is not in a motion.
func hubIgnored(doc *diaphragm.Diaphragm) []string {
	if doc.Ring.HubRadius == 0 {
		return nil
	}
	return []string{"The hub in the middle is not in this motion: it is that of the whole sheet."}
}

package engine

import (
	"math"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
	"hoopsheet/core/sheet"
)

// idealAssumptions are those of every figure of the ideal sheet.
func idealAssumptions() []string {
	return []string{
		"The sheet is ideal: limp, evenly tensioned at the nominal tension, and fixed at a round, rigid rim.",
		"The air is not taken into account; neither are stiffness, a cavity or attached masses.",
		"The motion is small, so that the tension stays the same.",
	}
}

// cautions are the usual warnings about harm, with those that the figures of
// this document call for first. Each defers to local codes and licensed
// practice; all are common practice of the trade.
func cautions(doc diaphragm.Diaphragm) []string {
	list := []string{}
	if stress := sheet.Stress(doc.Tension.Nominal*(1+doc.Tension.Tolerance), doc.Sheet.Thickness); doc.Sheet.AllowableStress > 0 && stress > doc.Sheet.AllowableStress {
		list = append(list, "At the highest tension allowed the stress is "+quantity.FormatWithUnit(stress, "MPa", 3)+
			", above the allowable "+quantity.FormatWithUnit(doc.Sheet.AllowableStress, "MPa", 3)+". The sheet may creep or tear; do not stretch it so.")
	}
	change := thermal(doc)
	if change.TensionAt(doc.Surroundings.ServiceMin) <= 0 || change.TensionAt(doc.Surroundings.ServiceMax) <= 0 {
		list = append(list, "Within the service temperature range the sheet goes slack on a stiff ring. A slack sheet flutters, and wind or pressure can tear it.")
	}
	if limit := doc.Sheet.AllowableStress; limit > 0 {
		worst := max(change.TensionAt(doc.Surroundings.ServiceMin), change.TensionAt(doc.Surroundings.ServiceMax))
		if sheet.Stress(worst, doc.Sheet.Thickness) > limit {
			list = append(list, "Within the service temperature range the stress passes the allowable stress on a stiff ring.")
		}
	}
	if field := fieldOf(&doc); len(field) > 0 && doc.Tension.Nominal > 0 {
		if low, _ := field.Extremes(); low.Value <= 0 {
			list = append(list, "The uneven tension falls below zero inside the sheet, at "+quantity.FormatNumber(low.Radius, 2)+" of the radius and "+
				quantity.FormatNumber(low.Angle*180/math.Pi, 3)+"°: the sheet wrinkles there, and no modes are computed. Make harmonics or the difference of warp and weft smaller.")
		}
	}
	if doc.Faces.Upper.Kind == diaphragm.FaceVacuum != (doc.Faces.Lower.Kind == diaphragm.FaceVacuum) {
		list = append(list, "One face sees vacuum: the full pressure of the air bears on the sheet, and it fails without warning. Screen it, keep people and faces away, "+
			"and have it designed and approved under the pressure equipment rules that apply.")
	}
	return append(list,
		"A stretched sheet and its ring store energy. Keep faces and hands out of its plane while clamps are turned, wear eye protection, and release tension in small steps all round.",
		"Above people, a sheet or ring that falls can injure. Secure it against falling, and follow the local codes for overhead work and glazing.",
		"These figures do not replace the design checks that local codes ask of a licensed engineer.",
	)
}

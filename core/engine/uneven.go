package engine

import (
	"encoding/json"
	"math"
	"slices"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
)

// Bounds of the even modes that are coupled: they just fit the eigenproblem
// that package modes takes where nothing is symmetric.
const (
	coupledDiameters = 12
	coupledCircles   = 4
)

// unevenOf is what couples the orders of a diaphragm; ok is false where nothing
// does, or all of it is left out.
func unevenOf(doc *diaphragm.Diaphragm, without []Effect) (uneven modes.Uneven, ok bool) {
	if !slices.Contains(without, EffectUnevenness) {
		uneven.Field = fieldOf(doc)
		if h := doc.Ring.OutOfRound; h != 0 {
			uneven.Oval = modes.Oval{Half: h / doc.Ring.Radius, Angle: doc.Ring.OutOfRoundAngle}
			ok = true
		}
	}
	if !slices.Contains(without, EffectMasses) {
		for _, p := range doc.Attached.Patches {
			uneven.Patches = append(uneven.Patches, modes.Patch{
				Distance: p.Radius * doc.Ring.Radius, Angle: p.Angle, Radius: p.Size, Mass: p.Mass, Rigid: p.Rigid,
			})
		}
		for _, s := range doc.Attached.Strips {
			uneven.Strips = append(uneven.Strips, modes.Strip{
				Offset: s.Offset * doc.Ring.Radius, Angle: s.Angle, Width: s.Width, Mass: s.Mass,
			})
		}
	}
	return uneven, ok || len(uneven.Field)+len(uneven.Patches)+len(uneven.Strips) > 0
}

func fieldOf(doc *diaphragm.Diaphragm) modes.Field {
	var field modes.Field
	for _, h := range doc.Tension.Harmonics {
		switch {
		case h.Epsilon == 0:
		case doc.Tension.Bonded:
			field = append(field, modes.BondedHarmonic(h.Order, h.Epsilon, h.Angle, doc.Sheet.Nu)...)
		default:
			field = append(field, modes.SlidingHarmonic(h.Order, h.Epsilon, h.Angle)...)
		}
	}
	if q := doc.Tension.WeftRatio; q != 0 && q != 1 {
		field = append(field, modes.WarpWeft(modes.WarpWeftRatio(1/q), doc.Tension.WarpAngle)...)
	}
	return field
}

// coupledSolutions keeps the last few coupled diaphragms, for the table, the
// drawing and the costs.
var coupledSolutions = newCache[string, *modes.Coupled](4)

// solveCoupled gives the modes of an uneven diaphragm, and the frequency up to
// which none is missing.
func solveCoupled(real modes.Real, effects modes.Effects, uneven modes.Uneven) (coupled *modes.Coupled, complete float64, notes []modes.Note, err error) {
	even, err := solve(real, effects, coupledDiameters, coupledCircles)
	if err != nil {
		return nil, 0, nil, err
	}
	uneven.MaxFrequency = even.Complete
	key, err := json.Marshal(struct {
		Real   modes.Real
		Effect modes.Effects
		Uneven modes.Uneven
	}{Real: real, Effect: effects, Uneven: uneven})
	if err != nil {
		return nil, 0, nil, asError(err, "document")
	}
	coupled, ok := coupledSolutions.get(string(key))
	if !ok {
		if coupled, err = modes.SolveCoupled(even, uneven); err != nil {
			return nil, 0, nil, unevenRefusal(err)
		}
		coupledSolutions.put(string(key), coupled)
	}
	return coupled, even.Complete, even.Notes, nil
}

// unevenRefusal puts what package modes says of uneven tension and attached
// masses where the person can mend it.
func unevenRefusal(err error) error {
	text := err.Error()
	return Fail("tension.harmonics", CodeRange, string(text[0]-'a'+'A')+text[1:]+".")
}

// coupledLine is the table's line of a mode of an uneven diaphragm.
func coupledLine(doc *diaphragm.Diaphragm, mode *modes.CoupledMode) Mode {
	d := mode.Damping
	line := Mode{
		M: mode.M, N: mode.N, Upper: mode.Upper,
		Frequency:   mode.Frequency,
		Error:       mode.Error,
		Ideal:       idealFrequency(doc, mode.M, mode.N),
		Even:        mode.Even,
		Split:       mode.Split,
		NodalAngle:  mode.NodalAngle,
		Share:       mode.Share,
		Damping:     ModeDamping{Radiation: d.Radiation, Viscous: d.Viscous, Sheet: d.Sheet, Remainder: d.Remainder, Total: d.Total, RadiationKnown: true},
		NodalLines:  modes.Mode{M: mode.M, N: mode.N}.NodalLines(),
		Distances:   distances(mode.Frequency, doc.Avoid.Lines),
		BelowLowest: mode.Frequency < doc.Avoid.Lowest,
	}
	if d.Total > 0 {
		line.RingDown, line.Q = d.RingDown, d.Q
	}
	return line
}

func idealFrequency(doc *diaphragm.Diaphragm, m, n int) float64 {
	wave := math.Sqrt(doc.Tension.Nominal / doc.Sheet.ArealDensity())
	return modes.NewShape(m, n, 0).Zero * wave / (2 * math.Pi * doc.Ring.Radius)
}

// coupledShapeOf finds the mode that a drawing is asked of.
func coupledShapeOf(coupled *modes.Coupled, m, n int, upper bool) (*modes.CoupledMode, error) {
	for i := range coupled.Modes {
		if mode := &coupled.Modes[i]; mode.M == m && mode.N == n && (mode.Upper == upper || m == 0) {
			return mode, nil
		}
	}
	return nil, Fail("n", CodeRange, "This diaphragm has no such mode among those computed.")
}

// drawCoupled draws a mode of an uneven diaphragm, whose nodal lines are
// neither circles nor diameters: the picture shows them as the change of sign.
func drawCoupled(request *ShapeRequest, mode *modes.CoupledMode) *ShapeResult {
	result := &ShapeResult{Raster: make(Numbers, request.Size*request.Size), Section: make(Numbers, request.SectionPoints)}
	size := float64(request.Size)
	for i := range result.Raster {
		x := (2*float64(i%request.Size) - size + 1) / size
		y := (size - 1 - 2*float64(i/request.Size)) / size
		r := math.Hypot(x, y)
		if r > 1 {
			result.Raster[i] = float32(math.NaN())
			continue
		}
		result.Raster[i] = float32(mode.At(r, math.Atan2(y, x)))
	}
	last := float64(request.SectionPoints - 1)
	for i := range result.Section {
		place := (2*float64(i) - last) / last
		angle := request.SectionAngle
		if place < 0 {
			angle += math.Pi
		}
		result.Section[i] = float32(mode.At(math.Abs(place), angle))
	}
	return result
}

// unevenWords says what is assumed of unevenness and masses, and the smallest
// tension.
func unevenWords(doc *diaphragm.Diaphragm, uneven modes.Uneven, coupled *modes.Coupled) []string {
	var list []string
	if len(uneven.Field) > 0 {
		rim := "slides along the rim while it is tensioned"
		if doc.Tension.Bonded {
			rim = "is bonded to the rim"
		}
		list = append(list, "The uneven tension is the elastic field of a sheet that "+rim+"; the smallest principal tension is "+
			quantity.FormatNumber(100*coupled.Smallest.Value, 3)+" % of the mean.")
	}
	if uneven.Oval.Half != 0 {
		list = append(list, "The ring's being out of round changes sheet and fluid; a wall or a cavity is taken as round.")
	}
	if len(uneven.Patches)+len(uneven.Strips) > 0 {
		list = append(list, "Attached masses add to the sheet under them and do not stiffen it.")
	}
	return list
}

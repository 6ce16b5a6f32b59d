package engine

import (
	"encoding/json"
	"math"
	"slices"
	"strconv"
	"strings"

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
	if doc.Tension.Upright {
		pull := doc.Sheet.ArealDensity() * gravity * doc.Ring.Radius / doc.Tension.Nominal
		field = append(field, modes.OwnWeight(pull, -math.Pi/2, doc.Sheet.Nu)...)
	}
	return field
}

// gravity, m/s^2: the standard value.
const gravity = 9.80665

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
	key := unevenKey(real, effects, uneven)
	coupled, ok := coupledSolutions.get(key)
	if !ok {
		if coupled, err = modes.SolveCoupled(even, uneven); err != nil {
			return nil, 0, nil, unevenRefusal(err)
		}
		coupledSolutions.put(key, coupled)
	}
	return coupled, even.Complete, even.Notes, nil
}

// unevenKey names a coupled diaphragm.
func unevenKey(real modes.Real, effects modes.Effects, uneven modes.Uneven) string {
	key, err := json.Marshal(struct {
		Real   modes.Real
		Effect modes.Effects
		Uneven modes.Uneven
	}{Real: real, Effect: effects, Uneven: uneven})
	if err != nil {
		return "" // no number of a sound document is one that JSON cannot write
	}
	return string(key)
}

// unevenRefusal puts what package modes says of uneven tension and attached
// masses where the person can mend it.
func unevenRefusal(err error) error {
	text := err.Error()
	field := "tension.harmonics"
	for word, path := range map[string]string{"patch ": "attached.patches.", "strip ": "attached.strips."} {
		if rest, ok := strings.CutPrefix(text, word); ok {
			if i, err := strconv.Atoi(rest[:max(0, strings.Index(rest, ":"))]); err == nil {
				field = path + strconv.Itoa(i-1)
			}
		}
	}
	if strings.HasPrefix(text, "patches") {
		field = "attached.patches"
	}
	if strings.Contains(text, "semi-axes") {
		field = "ring.outOfRound"
	}
	return Fail(field, CodeRange, string(text[0]-'a'+'A')+text[1:]+".")
}

// pairSplits is the relative difference from which two modes of a pair are
// listed apart; below it the computation does not tell them apart.
const pairSplits = 1e-6

// coupledLines are the table's lines of an uneven diaphragm up to a frequency,
// Hz.
func coupledLines(doc *diaphragm.Diaphragm, coupled *modes.Coupled, complete float64, most int) []Mode {
	var list []Mode
	for i := range coupled.Modes {
		mode := &coupled.Modes[i]
		if mode.Frequency > complete || len(list) == most {
			break
		}
		if mode.Upper && mode.Split < pairSplits {
			continue
		}
		line := coupledLine(doc, mode)
		if mode.Split >= pairSplits {
			for k := range coupled.Modes {
				if other := &coupled.Modes[k]; other.M == mode.M && other.N == mode.N && other.Upper != mode.Upper {
					line.Partner = other.Frequency
					line.SplitHertz = math.Abs(other.Frequency - mode.Frequency)
				}
			}
			line.Split, line.NodalAngle = mode.Split, mode.NodalAngle
		}
		list = append(list, line)
	}
	return list
}

// coupledLine is the line of one mode by itself.
func coupledLine(doc *diaphragm.Diaphragm, mode *modes.CoupledMode) Mode {
	line := lineOf(doc, mode.M, mode.N, mode.Frequency, &mode.Damping)
	line.Upper, line.Error = mode.Upper, mode.Error
	line.Ideal = idealFrequency(doc, mode.M, mode.N)
	line.Even, line.Share = mode.Even, mode.Share
	line.Damping.RadiationKnown = !mode.BeyondSound
	line.NodalLines = coupledWords(mode)
	return line
}

// coupledWords says in words what a coupled mode is like. Its nodal lines are
// neither circles nor diameters, but close to those of the mode it goes on from.
func coupledWords(mode *modes.CoupledMode) string {
	text := modes.Mode{M: mode.M, N: mode.N}.NodalLines()
	if mode.M > 0 || mode.N > 1 {
		text = "near " + text
	}
	if mode.M > 0 && mode.Split >= pairSplits {
		// An antinode lies a quarter of the pattern from a nodal line.
		like := "sine"
		if math.Abs(math.Sin(float64(mode.M)*mode.NodalAngle)) >= math.Sqrt2/2 {
			like = "cosine"
		}
		text += ", one at " + quantity.FormatNumber(mode.NodalAngle*180/math.Pi, 3) + "° (" + like + "-like)"
	}
	if mode.Share < mixedShare {
		text += "; mixed, " + quantity.FormatNumber(100*mode.Share, 2) + " % of it is (" + strconv.Itoa(mode.M) + ", " + strconv.Itoa(mode.N) + ")"
	}
	return text
}

// mixedShare is the share of the even mode below which a mode is called mixed.
const mixedShare = 0.8

func idealFrequency(doc *diaphragm.Diaphragm, m, n int) float64 {
	wave := math.Sqrt(doc.Tension.Nominal / doc.Sheet.ArealDensity())
	return modes.NewShape(m, n, 0).Zero * wave / (2 * math.Pi * doc.Ring.Radius)
}

// coupledModeNamed finds a mode by its name.
func coupledModeNamed(coupled *modes.Coupled, m, n int, upper bool) (*modes.CoupledMode, error) {
	for i := range coupled.Modes {
		if mode := &coupled.Modes[i]; mode.M == m && mode.N == n && (mode.Upper == upper || m == 0) {
			return mode, nil
		}
	}
	return nil, errNoMode()
}

func errNoMode() error {
	return Fail("n", CodeRange, "This diaphragm has no such mode among those computed.")
}

// unevenWords says what is assumed of unevenness and masses.
func unevenWords(doc *diaphragm.Diaphragm, uneven modes.Uneven) []string {
	list := []string{"The ring is rigid, and the sheet moves little, so that its tension stays the same."}
	if len(uneven.Field) > 0 {
		rim := "slides along the rim while it is tensioned"
		if doc.Tension.Bonded {
			rim = "is bonded to the rim"
		}
		list = append(list, "The uneven tension is the elastic field of a sheet that "+rim+"; the mean is the nominal tension.")
		if doc.Tension.Upright {
			list = append(list, "The weight of the upright sheet is held all around the rim, down being the lower side of the plan.")
		}
	}
	if uneven.Oval.Half != 0 {
		list = append(list, "The ring's being out of round changes sheet and fluid; a wall or a cavity is taken as round.")
	}
	if len(uneven.Patches)+len(uneven.Strips) > 0 {
		list = append(list, "Attached masses add to the sheet under them and do not stiffen it; a rigid patch keeps flat.")
	}
	return append(list, "What couples the orders is put in with the fluid of each even mode: exact where the fluid is still, to first order with sound or a cavity.")
}

// unevenCautions warns where a limit of what is computed is near.
func unevenCautions(coupled *modes.Coupled, lines []Mode) []string {
	var list []string
	if low := coupled.Smallest.Value; low < nearWrinkling {
		list = append(list, "The sheet is close to wrinkling: its smallest tension is "+quantity.FormatNumber(100*low, 2)+" % of the mean.")
	}
	mixed := 0
	for i := range lines {
		if lines[i].Share < 0.5 {
			mixed++
		}
	}
	if mixed > 0 {
		list = append(list, "Modes mixed so much that (m, n) is a label only: "+strconv.Itoa(mixed)+" of "+strconv.Itoa(len(lines))+".")
	}
	return list
}

// nearWrinkling is the smallest tension over the mean below which wrinkling is
// near (common practice).
const nearWrinkling = 0.2

// tautness is where the tension is smallest or largest, in N/m.
func tautness(doc *diaphragm.Diaphragm, t modes.Tautness) Tautness {
	return Tautness{Tension: t.Value * doc.Tension.Nominal, Share: t.Value, Radius: t.Radius, Angle: t.Angle, Direction: t.Direction}
}

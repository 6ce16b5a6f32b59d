package engine

import (
	"context"
	"strconv"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
	"hoopsheet/core/tap"
)

// handedModes is the number of modes whose frequencies are handed over.
const handedModes = 12

// computeFigures gives the figures of a hand-over: areal density, wave speed,
// the lowest modes and, where peaks were chosen, the tension they give. The
// verdict is a sentence, empty without peaks.
func computeFigures(ctx context.Context, document diaphragm.Diaphragm, peaks []diaphragm.ChosenPeak) (figures []diaphragm.Figure, read []HandedPeak, verdict string, err error) {
	table, err := runModes(ctx, &ModesRequest{Document: document, Count: handedModes})
	if err != nil {
		return nil, nil, "", err
	}
	figures = append(figures,
		diaphragm.Figure{ID: "sigma", Value: table.ArealDensity},
		diaphragm.Figure{ID: "c", Value: table.WaveSpeed},
		diaphragm.Figure{ID: "mass-ratio", Value: table.MassRatio},
	)
	for _, mode := range table.Modes {
		id := "f." + strconv.Itoa(mode.M) + "." + strconv.Itoa(mode.N)
		if mode.Upper {
			id += ".upper"
		}
		figures = append(figures, diaphragm.Figure{ID: id, Value: mode.Frequency})
	}
	if len(peaks) == 0 {
		return figures, nil, "", nil
	}
	request := &TapRequest{Document: document}
	for _, p := range peaks {
		request.Peaks = append(request.Peaks, tap.Peak{Frequency: p.Frequency, Uncertainty: p.Uncertainty, Use: true, M: p.M, N: p.N})
	}
	reading, err := runTap(ctx, request)
	if err != nil {
		return nil, nil, "", err
	}
	for _, p := range peaks {
		read = append(read, HandedPeak{Frequency: p.Frequency, Uncertainty: p.Uncertainty, M: p.M, N: p.N})
	}
	if reading.Chosen {
		for _, match := range reading.Readings[0].Matches {
			read[match.Peak].M, read[match.Peak].N = match.M, match.N
		}
	}
	if len(reading.Readings) > 0 {
		best := reading.Readings[0]
		figures = append(figures,
			diaphragm.Figure{ID: "tension", Value: best.Tension},
			diaphragm.Figure{ID: "tension-low", Value: best.Low},
			diaphragm.Figure{ID: "tension-high", Value: best.High},
		)
	}
	return figures, read, string(reading.Verdict) + ": " + reading.Reason, nil
}

// figure says how a figure is shown, in SI units.
type figure struct{ name, unit string }

var namedFigures = map[string]figure{
	"sigma":        {"areal density", "kg/m²"},
	"c":            {"wave speed of the sheet", "m/s"},
	"mass-ratio":   {"air against sheet, ρa/σ", ""},
	"tension":      {"tension from the tap", "N/m"},
	"tension-low":  {"its interval of 95 % coverage, from", "N/m"},
	"tension-high": {"its interval of 95 % coverage, to", "N/m"},
}

func figureKind(id string) figure {
	if kind, ok := namedFigures[id]; ok {
		return kind
	}
	base, upper := strings.CutSuffix(id, ".upper")
	if parts := strings.Split(base, "."); len(parts) == 3 && parts[0] == "f" {
		name := "frequency of mode (" + parts[1] + ", " + parts[2] + ")"
		if upper {
			name += ", upper of its pair"
		}
		return figure{name, "Hz"}
	}
	return figure{"figure " + id, ""}
}

// figureDigits are the significant digits that a hand-over shows.
const figureDigits = 6

func (f figure) format(value float64) string {
	return quantity.FormatNumber(value, figureDigits)
}

package engine

import (
	"context"
	"math"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
)

// mostLinkCharacters is the longest link offered: mail programs and chat
// systems begin to break addresses beyond about two thousand characters
// (common practice).
const mostLinkCharacters = 2000

// figureTolerance is the relative difference beyond which a figure "differs":
// twice the rounding of the link, which keeps nine significant digits.
const figureTolerance = 1e-8

func runSend(ctx context.Context, request *SendRequest) (*SendResult, error) {
	if err := refuse(diaphragm.Validate(request.Document)); err != nil {
		return nil, err
	}
	figures, read, verdict, err := computeFigures(ctx, request.Document, request.Peaks)
	if err != nil {
		return nil, err
	}
	parcel := diaphragm.Parcel{
		Document: request.Document,
		Figures:  figures,
		Peaks:    request.Peaks,
		Tapped:   request.Tapped,
		Sent:     request.Sent,
		Engine:   Version,
	}
	fragment, err := diaphragm.EncodeLink(parcel)
	if err != nil {
		return nil, asError(err, "link")
	}
	file, err := diaphragm.EncodeParcel(parcel)
	if err != nil {
		return nil, asError(err, "file")
	}
	link := request.Address + "#" + fragment
	result := &SendResult{
		Length:      len(link),
		Most:        mostLinkCharacters,
		AddressNote: addressNote(request.Address),
		Parcel:      Blob{Bytes: file},
		FileName:    fileName(request.Document.Name),
		Page:        handOverPage(parcel, figures, read, verdict),
	}
	if len(link) <= mostLinkCharacters {
		result.Link = link
	}
	return result, nil
}

func runReceive(ctx context.Context, request *ReceiveRequest) (*ReceiveResult, error) {
	var parcel diaphragm.Parcel
	var err error
	if len(request.Parcel.Bytes) > 0 {
		parcel, err = diaphragm.DecodeParcel(request.Parcel.Bytes)
	} else {
		parcel, err = diaphragm.DecodeLink(request.Fragment)
	}
	if err != nil {
		return nil, asError(err, "link")
	}
	now, read, verdict, err := computeFigures(ctx, parcel.Document, parcel.Peaks)
	if err != nil {
		return nil, err
	}
	result := &ReceiveResult{Page: handOverPage(parcel, now, read, verdict)}
	for _, row := range result.Page.Figures {
		if row.Differs {
			result.Differences++
		}
	}
	return result, nil
}

// handOverPage sets the figures as sent beside those computed now.
func handOverPage(parcel diaphragm.Parcel, now []diaphragm.Figure, read []HandedPeak, verdict string) HandOverPage {
	return HandOverPage{
		Document:      parcel.Document,
		Specification: specificationRows(parcel.Document),
		Figures:       figureRows(parcel.Figures, now),
		Peaks:         read,
		Tapped:        parcel.Tapped,
		SentEngine:    parcel.Engine,
		NowEngine:     Version,
		Sent:          parcel.Sent,
		Verdict:       verdict,
		Assumptions:   assumptionsOf(parcel.Document),
		Cautions:      cautions(parcel.Document),
		Disclaimers: []string{
			"Anybody who has this link or file can read it.",
			"It is a record of figures, not a signature: nothing in it proves who made it or that it is unchanged since.",
			"Do not accept or refuse a built diaphragm on these figures alone.",
		},
	}
}

// specificationRows sets out the document for reading, in SI units.
func specificationRows(doc diaphragm.Diaphragm) []SpecificationRow {
	lines := diaphragm.SpecificationLines(doc, nil, quantity.SI)
	rows := make([]SpecificationRow, len(lines))
	for i, line := range lines {
		rows[i] = SpecificationRow{Group: line.Group, Symbol: line.Symbol, Name: line.Name, Text: line.Text, Unit: line.Unit}
	}
	return rows
}

func figureRows(sent, now []diaphragm.Figure) []FigureRow {
	current := make(map[string]float64, len(now))
	for _, f := range now {
		current[f.ID] = f.Value
	}
	rows := make([]FigureRow, 0, len(sent))
	for _, f := range sent {
		kind := figureKind(f.ID)
		row := FigureRow{ID: f.ID, Name: kind.name, Unit: kind.unit, Sent: kind.format(f.Value), Now: "not computed by this version", Differs: true}
		if value, known := current[f.ID]; known {
			row.Now = kind.format(value)
			row.Differs = math.Abs(value-f.Value) > figureTolerance*math.Abs(value)
		}
		rows = append(rows, row)
	}
	return rows
}

// fileName makes a harmless file name of a diaphragm's name.
func fileName(name string) string {
	var out strings.Builder
	gap := false
	for _, r := range strings.ToLower(name) {
		if r >= 'a' && r <= 'z' || r >= '0' && r <= '9' {
			if gap && out.Len() > 0 {
				out.WriteByte('-')
			}
			out.WriteRune(r)
			gap = false
		} else {
			gap = true
		}
		if out.Len() >= 48 {
			break
		}
	}
	if out.Len() == 0 {
		out.WriteString("diaphragm")
	}
	return out.String() + ".hand-over.json"
}

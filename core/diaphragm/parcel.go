package diaphragm

import (
	"bytes"
	"encoding/json"
	"math"
	"strconv"
)

// The hand-over file: JSON with these two members before those of Parcel.
const (
	parcelFormat  = "hoopsheet hand-over"
	parcelVersion = 1
)

// Limits of a parcel. An honest one holds some dozens of each.
const (
	mostParcelBytes = 1 << 20
	mostFigures     = 2000
	mostPeaks       = 2000
	mostOrder       = 10000
)

// parcelFile is the form of a parcel in a file and, without format and
// version, in a link. Document stands before that of the embedded Parcel, so
// that the document can be migrated before it is read.
type parcelFile struct {
	Format   string          `json:"format,omitempty"`
	Version  int             `json:"version,omitempty"`
	Document json.RawMessage `json:"document"`
	Parcel
}

// EncodeParcel writes the hand-over file: indented JSON in which every number
// is exact. The error is a *Refusal; it names a number that is not finite.
func EncodeParcel(p Parcel) ([]byte, error) {
	const what = "The hand-over file"
	body, err := encodeBody(p, parcelFile{Format: parcelFormat, Version: parcelVersion}, what)
	if err != nil {
		return nil, err
	}
	var out bytes.Buffer
	if err := json.Indent(&out, body, "", "  "); err != nil {
		return nil, refuseJSON(err, "parcel", what)
	}
	out.WriteByte('\n')
	if out.Len() > mostParcelBytes {
		return nil, refuse("parcel", CodeTooLarge, what+" would be larger than 1 MiB, which nobody could open. Shorten the notes.")
	}
	return out.Bytes(), nil
}

// DecodeParcel reads a hand-over file. The error is a *Refusal.
func DecodeParcel(data []byte) (Parcel, error) {
	const what = "The hand-over file"
	if len(data) > mostParcelBytes {
		return Parcel{}, refuse("parcel", CodeTooLarge, what+" is larger than 1 MiB; no hand-over is.")
	}
	data = bytes.TrimPrefix(data, []byte("\xef\xbb\xbf")) // some editors put a mark before UTF-8 text
	var head struct {
		Format  string `json:"format"`
		Version int    `json:"version"`
	}
	if err := json.Unmarshal(data, &head); err != nil {
		return Parcel{}, refuseJSON(err, "parcel", what)
	}
	switch {
	case head.Format != parcelFormat:
		return Parcel{}, refuse("parcel", CodeUnreadable, "This is not a hand-over file of Hoopsheet.")
	case head.Version > parcelVersion:
		return Parcel{}, refuse("parcel", CodeNewer, what+" was written by a newer version of Hoopsheet (file version "+
			strconv.Itoa(head.Version)+"; this one reads up to "+strconv.Itoa(parcelVersion)+"). Reload the page while online, or open it where it was made.")
	case head.Version < 1:
		return Parcel{}, refuse("parcel", CodeUnreadable, what+" does not say which version it is written in.")
	}
	return decodeBody(data, what)
}

// encodeBody writes a parcel as one line of JSON.
func encodeBody(p Parcel, file parcelFile, what string) ([]byte, error) {
	if err := checkParcel(p, what, " cannot be made: "); err != nil {
		return nil, err
	}
	p = withoutNil(p)
	document, err := encodeLine(p.Document)
	if err != nil {
		return nil, refuse("document", CodeUnreadable, what+" cannot be made: a value of the specification is not a finite number.")
	}
	file.Document, file.Parcel = document, p
	body, err := encodeLine(file)
	if err != nil {
		return nil, refuse("parcel", CodeUnreadable, what+" cannot be made.")
	}
	return body, nil
}

// decodeBody reads what encodeBody wrote, and checks it.
func decodeBody(data []byte, what string) (Parcel, error) {
	var file parcelFile
	if err := readStrictly(data, &file, "parcel", what); err != nil {
		return Parcel{}, err
	}
	if len(file.Document) == 0 {
		return Parcel{}, refuse("document", CodeUnreadable, what+" holds no specification.")
	}
	document, err := OpenDocument(file.Document)
	if err != nil {
		return Parcel{}, err
	}
	p := withoutNil(file.Parcel)
	p.Document = document
	if err := checkParcel(p, what, " cannot be read: "); err != nil {
		return Parcel{}, err
	}
	return p, nil
}

// checkParcel checks all but the document. What is wrong stands after what and
// verb.
func checkParcel(p Parcel, what, verb string) error {
	if len(p.Figures) > mostFigures || len(p.Peaks) > mostPeaks {
		return refuse("parcel", CodeTooLarge, what+verb+"it has more than "+strconv.Itoa(mostFigures)+" figures or peaks, and no hand-over does.")
	}
	for _, f := range p.Figures {
		if f.ID == "" || len(f.ID) > 64 {
			return refuse("figures", CodeUnreadable, what+verb+"a figure has no proper name.")
		}
		if math.IsNaN(f.Value) || math.IsInf(f.Value, 0) {
			return refuse("figures", CodeUnreadable, what+verb+"the figure "+shorten(f.ID, "without a name")+" is not a finite number.")
		}
	}
	for _, k := range p.Peaks {
		if !soundPeak(k) {
			return refuse("peaks", CodeUnreadable, what+verb+"a peak must have a frequency above 0 Hz, an uncertainty of 0 Hz or more, "+
				"and a mode with m from 0 and n from 1, or none (m and n both 0).")
		}
	}
	for _, when := range []string{p.Tapped, p.Sent} {
		if when != "" && !ValidTime(when) {
			return refuse("parcel", CodeUnreadable, what+verb+"it holds "+shorten(when, "nothing")+", which is not a time.")
		}
	}
	return nil
}

func soundPeak(k ChosenPeak) bool {
	return k.Frequency > 0 && k.Frequency <= math.MaxFloat64 && k.Uncertainty >= 0 && k.Uncertainty <= math.MaxFloat64 &&
		(k.M >= 0 && k.M <= mostOrder && k.N >= 1 && k.N <= mostOrder || k.M == 0 && k.N == 0)
}

func withoutNil(p Parcel) Parcel {
	if p.Figures == nil {
		p.Figures = []Figure{}
	}
	if p.Peaks == nil {
		p.Peaks = []ChosenPeak{}
	}
	p.Document = normal(p.Document)
	return p
}

// encodeLine is json.Marshal without the escapes for HTML.
func encodeLine(value any) ([]byte, error) {
	var out bytes.Buffer
	encoder := json.NewEncoder(&out)
	encoder.SetEscapeHTML(false)
	if err := encoder.Encode(value); err != nil {
		return nil, err
	}
	return bytes.TrimSuffix(out.Bytes(), []byte("\n")), nil
}

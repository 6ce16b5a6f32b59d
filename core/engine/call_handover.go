package engine

import "hoopsheet/core/diaphragm"

// SendRequest asks for the hand-over of a diaphragm: its figures and, where it
// fits, a link that carries them.
type SendRequest struct {
	Document diaphragm.Diaphragm `json:"document"`
	// Peaks chosen on the tap page; empty where there is no tap.
	Peaks []diaphragm.ChosenPeak `json:"peaks"`
	// Tapped is when the peaks were taken, RFC 3339; empty without peaks.
	Tapped string `json:"tapped"`
	// Address that the link starts with, up to and without "#".
	Address string `json:"address"`
	// Sent is the time of sending, RFC 3339.
	Sent string `json:"sent"`
}

// SendResult is what is handed over.
type SendResult struct {
	// Link is empty where it would be longer than Most.
	Link string `json:"link"`
	// Length of the link in characters, also where it is too long; Most
	// characters are allowed.
	Length int `json:"length"`
	Most   int `json:"most"`
	// AddressNote says why a client may not be able to open the link; empty
	// where nothing speaks against it.
	AddressNote string `json:"addressNote"`
	// Parcel is the same content as a file.
	Parcel   Blob         `json:"parcel"`
	FileName string       `json:"fileName"`
	Page     HandOverPage `json:"page"`
}

// ReceiveRequest opens what was handed over: the text after "#" of a link, or
// a file.
type ReceiveRequest struct {
	Fragment string `json:"fragment"`
	Parcel   Blob   `json:"parcel"`
}

// ReceiveResult is the read-only page of a hand-over.
type ReceiveResult struct {
	Page HandOverPage `json:"page"`
	// Differences counts the figures that differ from those computed now.
	Differences int `json:"differences"`
}

// HandOverPage is all that the hand-over page shows.
type HandOverPage struct {
	Document diaphragm.Diaphragm `json:"document"`
	// Specification rows as name and value in words.
	Specification []SpecificationRow `json:"specification"`
	Figures       []FigureRow        `json:"figures"`
	Peaks         []HandedPeak       `json:"peaks"`
	Tapped        string             `json:"tapped"`
	// SentEngine and NowEngine are the versions that computed the figures.
	SentEngine string `json:"sentEngine"`
	NowEngine  string `json:"nowEngine"`
	Sent       string `json:"sent"`
	// Verdict in words; empty without peaks.
	Verdict     string   `json:"verdict"`
	Assumptions []string `json:"assumptions"`
	Cautions    []string `json:"cautions"`
	Disclaimers []string `json:"disclaimers"`
}

// HandedPeak is a chosen peak with the mode it is read as; N is 0 where the
// reading is open.
type HandedPeak struct {
	// Frequency and its standard uncertainty, Hz.
	Frequency   float64 `json:"frequency"`
	Uncertainty float64 `json:"uncertainty"`
	M           int     `json:"m"`
	N           int     `json:"n"`
}

// SpecificationRow is one specified quantity, formatted for reading.
type SpecificationRow struct {
	Group  diaphragm.GroupName `json:"group"`
	Symbol string              `json:"symbol"`
	Name   string              `json:"name"`
	Text   string              `json:"text"`
	Unit   string              `json:"unit"`
}

// FigureRow is one computed figure: as it was sent and as computed now.
type FigureRow struct {
	ID   string `json:"id"`
	Name string `json:"name"`
	Unit string `json:"unit"`
	// Sent and Now in the unit, formatted; Differs marks a difference beyond
	// the rounding of the link.
	Sent    string `json:"sent"`
	Now     string `json:"now"`
	Differs bool   `json:"differs"`
}

package engine

import "hoopsheet/core/diaphragm"

// CompareRequest asks for two diaphragms side by side.
type CompareRequest struct {
	// Document as it is now, and Other what it is held against.
	Document diaphragm.Diaphragm `json:"document"`
	Other    diaphragm.Diaphragm `json:"other"`
	// Count of modes to compare, the lowest of Document first; 1 to 200.
	Count int `json:"count"`
}

// CompareResult is what differs.
type CompareResult struct {
	Modes []ComparedMode `json:"modes"`
	// Lines of the specification that differ, in page order.
	Lines []ComparedLine `json:"lines"`
	// Changed counts the modes whose verdict on the lines to keep clear of
	// differs.
	Changed int `json:"changed"`
}

// ComparedMode is one mode of both.
type ComparedMode struct {
	M int `json:"m"`
	N int `json:"n"`
	// Upper marks the higher of a split pair.
	Upper bool `json:"upper"`
	// Frequency now and Other's, Hz; Other is 0 where it has no such mode among
	// its lowest.
	Frequency float64 `json:"frequency"`
	Other     float64 `json:"other"`
	// Relative is (now - other)/other.
	Relative float64 `json:"relative"`
	// RingDown to -60 dB, s, of both.
	RingDown      float64 `json:"ringDown"`
	OtherRingDown float64 `json:"otherRingDown"`
	// Verdict on the lines to keep clear of, in words, of both; Differs is true
	// where it is another one.
	Verdict      string `json:"verdict"`
	OtherVerdict string `json:"otherVerdict"`
	Differs      bool   `json:"differs"`
}

// ComparedLine is a line of the specification that differs; a text is empty
// where one of the two does not state it.
type ComparedLine struct {
	Group diaphragm.GroupName `json:"group"`
	Name  string              `json:"name"`
	Now   string              `json:"now"`
	Other string              `json:"other"`
	Unit  string              `json:"unit"`
}

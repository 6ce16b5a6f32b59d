package engine

import (
	"context"
	"encoding/json"
	"reflect"
	"strings"
	"testing"

	"hoopsheet/core/diaphragm"
)

const handedAddress = "https://example.org/h/hand-over.html"

func demoHandOver() *SendRequest {
	return &SendRequest{
		Document: diaphragm.Demo("01JZZZZZZZZZZZZZZZZZZZZZZZ", "2026-05-04T09:00:00Z"),
		Peaks:    []diaphragm.ChosenPeak{{Frequency: 15.94, Uncertainty: 0.05, M: 0, N: 1}, {Frequency: 36.33, Uncertainty: 0.03}},
		Tapped:   "2026-05-04T10:00:00Z",
		Address:  handedAddress,
		Sent:     "2026-05-04T11:00:00Z",
	}
}

func send(t *testing.T, request *SendRequest) *SendResult {
	t.Helper()
	sent, err := runSend(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	return sent
}

func receive(t *testing.T, request *ReceiveRequest) *ReceiveResult {
	t.Helper()
	received, err := runReceive(context.Background(), request)
	if err != nil {
		t.Fatal(err)
	}
	return received
}

// TestHandOverArrives sends the demonstration by link and by file. Both must
// show the document to the last bit, and no figure that differs.
func TestHandOverArrives(t *testing.T) {
	request := demoHandOver()
	sent := send(t, request)
	if sent.Length != len(sent.Link) || sent.Length > sent.Most || !strings.HasPrefix(sent.Link, handedAddress+"#") {
		t.Fatalf("link of %d characters, said to have %d: %.60s", len(sent.Link), sent.Length, sent.Link)
	}
	if sent.AddressNote != "" || sent.FileName != "film-port-b-listening-room.hand-over.json" {
		t.Errorf("%q %q", sent.AddressNote, sent.FileName)
	}
	_, fragment, _ := cutLink(sent.Link)
	for what, received := range map[string]*ReceiveResult{
		"link": receive(t, &ReceiveRequest{Fragment: fragment}),
		"file": receive(t, &ReceiveRequest{Parcel: sent.Parcel}),
	} {
		page := received.Page
		if received.Differences != 0 {
			t.Errorf("%s: %d figures differ: %+v", what, received.Differences, page.Figures)
		}
		if !reflect.DeepEqual(page.Document, request.Document) {
			t.Errorf("%s: the document arrives as %+v", what, page.Document)
		}
		if len(page.Peaks) != 2 || page.Peaks[1].N != 1 || page.Peaks[1].M != 1 {
			t.Errorf("%s: peaks %+v; the second is (1, 1) by its frequency", what, page.Peaks)
		}
		if page.Sent != request.Sent || page.Tapped != request.Tapped || page.SentEngine != Version || page.NowEngine != Version || page.Verdict == "" {
			t.Errorf("%s: %+v", what, page)
		}
		if len(page.Figures) < handedModes+6 || len(page.Cautions) == 0 || len(page.Disclaimers) < 3 || len(page.Specification) < 20 {
			t.Errorf("%s: the page lacks something: %d figures, %d cautions", what, len(page.Figures), len(page.Cautions))
		}
	}
}

// TestAlteredFigureIsMarked changes one figure of a parcel by a little more
// than the rounding of a link, and by a little less.
func TestAlteredFigureIsMarked(t *testing.T) {
	request := demoHandOver()
	figures, _, _, err := computeFigures(context.Background(), request.Document, request.Peaks)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		factor  float64
		differs int
	}{{1 + 2*figureTolerance, 1}, {1 - 2*figureTolerance, 1}, {1 + figureTolerance/4, 0}, {1 - figureTolerance/4, 0}} {
		altered := append([]diaphragm.Figure{}, figures...)
		altered[3].Value *= c.factor
		file, err := diaphragm.EncodeParcel(diaphragm.Parcel{Document: request.Document, Figures: altered, Peaks: request.Peaks, Sent: request.Sent, Engine: "0.9"})
		if err != nil {
			t.Fatal(err)
		}
		received := receive(t, &ReceiveRequest{Parcel: Blob{Bytes: file}})
		if received.Differences != c.differs {
			t.Errorf("times %.10g: %d differ, want %d", c.factor, received.Differences, c.differs)
		}
		if row := received.Page.Figures[3]; row.ID != "f.0.1" || row.Differs != (c.differs == 1) {
			t.Errorf("times %.10g: %+v", c.factor, row)
		}
		if received.Page.SentEngine != "0.9" {
			t.Errorf("sent by engine %q", received.Page.SentEngine)
		}
	}
}

// TestUnknownFigureIsMarked: a figure of a later engine is shown as it came.
func TestUnknownFigureIsMarked(t *testing.T) {
	request := demoHandOver()
	file, err := diaphragm.EncodeParcel(diaphragm.Parcel{Document: request.Document, Figures: []diaphragm.Figure{{ID: "loss", Value: 0.25}}})
	if err != nil {
		t.Fatal(err)
	}
	received := receive(t, &ReceiveRequest{Parcel: Blob{Bytes: file}})
	row := received.Page.Figures[0]
	if received.Differences != 1 || row.Sent != "0.25" || !row.Differs || !strings.Contains(row.Now, "not computed") {
		t.Errorf("%+v", row)
	}
}

// TestLongHandOverHasNoLink: notes that make the link too long leave the file.
func TestLongHandOverHasNoLink(t *testing.T) {
	request := demoHandOver()
	// Letters without pattern: a linear congruential sequence. Each costs at
	// least half a byte, so 3500 of them do not fit.
	var letters strings.Builder
	for i := uint32(1); letters.Len() < 3500; i = i*1664525 + 1013904223 {
		letters.WriteByte('a' + byte(i>>24)%26)
	}
	request.Document.Notes = letters.String()
	sent := send(t, request)
	if sent.Link != "" || sent.Length <= sent.Most || len(sent.Parcel.Bytes) == 0 {
		t.Errorf("link %.40q, length %d, most %d", sent.Link, sent.Length, sent.Most)
	}
}

// TestSendRefusesAnUnsoundDocument names the field.
func TestSendRefusesAnUnsoundDocument(t *testing.T) {
	request := demoHandOver()
	request.Document.Ring.Radius = -1
	_, err := runSend(context.Background(), request)
	if p := firstProblem(t, err); p.Field != "ring.radius" {
		t.Errorf("%+v", p)
	}
}

func TestFileName(t *testing.T) {
	for name, want := range map[string]string{
		"Film port B, listening room": "film-port-b-listening-room.hand-over.json",
		"":                            "diaphragm.hand-over.json",
		"../../etc/passwd":            "etc-passwd.hand-over.json",
		"Öl & Gas":                    "l-gas.hand-over.json",
		"日本":                          "diaphragm.hand-over.json",
		strings.Repeat("long ", 40):   strings.Repeat("long-", 9) + "lon.hand-over.json",
	} {
		if got := fileName(name); got != want {
			t.Errorf("%q: %s, want %s", name, got, want)
		}
	}
}

// TestEditLosesNothing goes through the door with a text that cannot be taken
// over: it comes back as a draft and in its row, the document stays sound, and
// the next edit elsewhere does not take it away.
func TestEditLosesNothing(t *testing.T) {
	doc := diaphragm.Demo("", "")
	request := &EditRequest{Document: doc, System: "si", Edits: []diaphragm.Edit{{Field: "tension.nominal", Action: diaphragm.ActionSet, Text: "3oo N/m"}}}
	for range 2 {
		text, err := json.Marshal(request)
		if err != nil {
			t.Fatal(err)
		}
		response, err := Call(context.Background(), "edit", text)
		if err != nil {
			t.Fatal(err)
		}
		var result EditResult
		if err := json.Unmarshal(response, &result); err != nil {
			t.Fatal(err)
		}
		if result.Document.Tension.Nominal != doc.Tension.Nominal || result.Drafts["tension.nominal"] != "3oo N/m" {
			t.Fatalf("tension %g, drafts %v", result.Document.Tension.Nominal, result.Drafts)
		}
		for _, row := range result.Rows {
			if row.Field == "tension.nominal" && (row.Text != "3oo N/m" || row.Problem == "") {
				t.Errorf("row %q, problem %q", row.Text, row.Problem)
			}
		}
		request.Document, request.Drafts, request.Units = result.Document, result.Drafts, result.Units
		request.Edits = []diaphragm.Edit{{Field: "ring.radius", Action: diaphragm.ActionSet, Text: "0.5 m"}}
	}
	if request.Document.Ring.Radius != 0.5 {
		t.Errorf("radius %g", request.Document.Ring.Radius)
	}
}

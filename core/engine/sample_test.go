package engine

import (
	"context"
	"encoding/base64"
	"encoding/json"
	"os"
	"path/filepath"
	"testing"
)

// sampleRequests holds a request for every call, on the demonstration.
func sampleRequests(t *testing.T) map[string]string {
	t.Helper()
	demo, err := Call(context.Background(), "demo", []byte(`{}`))
	if err != nil {
		t.Fatal(err)
	}
	var holder struct {
		Document json.RawMessage `json:"document"`
	}
	if err := json.Unmarshal(demo, &holder); err != nil {
		t.Fatal(err)
	}
	doc := string(holder.Document)
	wav, err := os.ReadFile(filepath.Join("..", "..", "testdata", "signals", "tap-demo.wav"))
	if err != nil {
		t.Fatal(err)
	}
	recording := base64.StdEncoding.EncodeToString(wav)
	send := `{"document":` + doc + `,"peaks":[{"frequency":15.94,"uncertainty":0.05,"m":0,"n":1},{"frequency":36.33,"uncertainty":0.05,"m":1,"n":1}],
		"tapped":"2026-05-04T10:00:00Z","address":"https://example.org/h/hand-over.html","sent":"2026-05-04T11:00:00Z"}`
	fragment := func() string {
		response, err := Call(context.Background(), "send", []byte(send))
		if err != nil {
			t.Fatal(err)
		}
		var sent SendResult
		if err := json.Unmarshal(response, &sent); err != nil {
			t.Fatal(err)
		}
		_, fragment, _ := cutLink(sent.Link)
		return fragment
	}
	rest := `{"kind":"rest","peak":0,"radius":0,"angle":0,"width":0.1,"formula":""}`
	respond := `{"document":` + doc + `,"displacement":{"kind":"bulge","peak":0.002,"radius":0,"angle":0,"width":0.1,"formula":""},"velocity":` + rest +
		`,"orders":8,"circles":8,"duration":0,"frames":10,"radii":11,"angles":20,"points":[{"radius":0,"angle":0}]}`
	return map[string]string{
		"about":     `{}`,
		"demo":      `{}`,
		"read":      `{"items":[{"field":"x","name":"height","text":"0.9 mil","dimension":"length","unit":"mm","low":0,"high":0}]}`,
		"check":     `{"checks":[{"group":"g","name":"n","quantity":"zero-j","arguments":[0,1],"expected":"2.4048","source":"s"}]}`,
		"team":      `{"text":"{\"units\":\"si\"}"}`,
		"edit":      `{"document":` + doc + `,"drafts":{},"units":{},"edits":[{"field":"sheet.thickness","action":"set","text":"23 um"}],"system":"si"}`,
		"materials": `{}`,
		"compare":   `{"document":` + doc + `,"other":` + doc + `,"count":3}`,
		"costs":     `{"document":` + doc + `,"m":0,"n":1}`,
		"modes":     `{"document":` + doc + `,"count":24}`,
		"shape":     `{"m":2,"n":1,"orientation":0,"size":64,"sectionAngle":0,"sectionPoints":41}`,
		"respond":   respond,
		"frames":    `{"respond":` + respond + `,"from":0.01,"step":0.001,"count":3}`,
		"peaks":     `{"recording":"` + recording + `","lowest":0,"highest":0,"most":0,"tap":0,"displayPoints":0}`,
		"tap":       `{"document":` + doc + `,"peaks":[{"frequency":15.94,"uncertainty":0.05,"level":0,"use":true,"m":0,"n":0},{"frequency":36.33,"uncertainty":0.05,"level":-3,"use":true,"m":0,"n":0}]}`,
		"send":      send,
		"receive":   `{"fragment":"` + fragment() + `","parcel":""}`,
	}
}

func cutLink(link string) (address, fragment string, found bool) {
	for i := range len(link) {
		if link[i] == '#' {
			return link[:i], link[i+1:], true
		}
	}
	return link, "", false
}

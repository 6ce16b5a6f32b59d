package engine

import (
	"context"
	"errors"
	"strings"
	"testing"
)

func firstProblem(t *testing.T, err error) Problem {
	t.Helper()
	var refused *Error
	if !errors.As(err, &refused) || len(refused.Problems) == 0 {
		t.Fatalf("%T %v is no *Error with problems", err, err)
	}
	return refused.Problems[0]
}

// TestDoorRefuses holds what the door itself refuses, for every call alike.
func TestDoorRefuses(t *testing.T) {
	requests := sampleRequests(t)
	for _, c := range Calls() {
		sound, ok := requests[c.Name]
		if !ok {
			continue // TestEveryCallAnswersTheDemo says so
		}
		for _, bad := range []struct{ what, request string }{
			{"nothing", ``},
			{"white space", "  \n"},
			{"no JSON", `modes please`},
			{"a cut request", sound[:len(sound)-1]},
			{"trailing text", sound + ` x`},
			{"a second value", sound + sound},
			{"a list", `[1]`},
			{"a string", `"text"`},
			{"an unknown member", strings.TrimSuffix(sound, `}`) + comma(sound) + `"unheardOf":1}`},
		} {
			_, err := Call(context.Background(), c.Name, []byte(bad.request))
			if err == nil {
				t.Errorf("%s takes %s", c.Name, bad.what)
				continue
			}
			if p := firstProblem(t, err); p.Code != CodeRequest || !strings.HasSuffix(p.Message, ".") {
				t.Errorf("%s, %s: %+v", c.Name, bad.what, p)
			}
		}
	}
}

// comma stands between the members of a request and one more.
func comma(request string) string {
	if request == `{}` {
		return ""
	}
	return ","
}

func TestUnknownCall(t *testing.T) {
	for _, name := range []string{"", "Modes", "modes ", "records.list", strings.Repeat("é", 5000), "\xff"} {
		_, err := Call(context.Background(), name, []byte(`{}`))
		if p := firstProblem(t, err); p.Field != "call" || p.Code != CodeUnknownCall || len(p.Message) > 200 {
			t.Errorf("%.20q: %+v", name, p)
		}
	}
}

// TestMistypedMembers names the member whose type is wrong.
func TestMistypedMembers(t *testing.T) {
	for _, c := range []struct{ call, request, field string }{
		{"shape", `{"m":"two"}`, "m"},
		{"shape", `{"m":2.5}`, "m"},
		{"modes", `{"count":[]}`, "count"},
		{"modes", `{"document":{"ring":{"radius":"0.4"}}}`, "document.ring.radius"},
	} {
		_, err := Call(context.Background(), c.call, []byte(c.request))
		if p := firstProblem(t, err); p.Field != c.field || p.Code != CodeRequest {
			t.Errorf("%s %s: %+v", c.call, c.request, p)
		}
	}
}

// TestEmptyRequestsNeverPanic sends requests whose members are all missing or
// of hostile size. Whatever is not answered must be refused in a sentence.
func TestEmptyRequestsNeverPanic(t *testing.T) {
	huge := `{"m":1000000000,"n":1000000000,"size":1000000000,"sectionPoints":1000000000}`
	for _, c := range Calls() {
		for _, request := range []string{`{}`, huge, `{"document":{}}`, `{"document":{},"count":2000000000}`, `{"count":-5}`,
			`{"document":{},"orders":1000000000,"circles":1000000000,"frames":1000000000,"radii":1000000000,"angles":1000000000}`,
			`{"document":{},"orders":-1,"circles":-1,"frames":-1,"radii":-1,"angles":-1,"duration":-1}`,
			`{"document":{},"peaks":[{"frequency":-1,"uncertainty":-1,"use":true,"m":-1,"n":-1}]}`,
			`{"peaks":[{"frequency":1e308,"uncertainty":1e308,"use":true}]}`,
			`{"recording":"UklGRg==","most":-1,"tap":-7,"displayPoints":1000000000}`,
			`{"fragment":"h=1.","parcel":""}`, `{"fragment":"","parcel":"e30="}`,
		} {
			_, err := Call(context.Background(), c.Name, []byte(request))
			if err == nil {
				continue
			}
			if p := firstProblem(t, err); !strings.HasSuffix(p.Message, ".") {
				t.Errorf("%s %s: no sentence: %+v", c.Name, request, p)
			}
		}
	}
}

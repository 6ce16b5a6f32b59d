//go:build js && wasm

package main

import (
	"context"
	"encoding/json"
	"errors"
	"strings"
	"syscall/js"
	"testing"

	"hoopsheet/core/engine"
)

// page stands in for the page's side of the protocol.
type page struct {
	host     js.Value
	messages chan js.Value
	moved    int
}

func newPage(t *testing.T, role string, answer answerer) *page {
	t.Helper()
	p := &page{messages: make(chan js.Value, 16)}
	post := js.FuncOf(func(_ js.Value, args []js.Value) any {
		p.moved += args[1].Length()
		p.messages <- args[0]
		return nil
	})
	t.Cleanup(post.Release)
	p.host = js.ValueOf(map[string]any{"role": role})
	p.host.Set("post", post)
	serve(p.host, role, answer)
	return p
}

func (p *page) send(id int, name, request string, blobs ...[]byte) {
	list := make([]any, len(blobs))
	for i, b := range blobs {
		list[i] = arrayOf(b).Get("buffer")
	}
	p.host.Call("receive", map[string]any{"type": "call", "id": id, "name": name, "request": request, "blobs": list})
}

func (p *page) next(t *testing.T, kind string) js.Value {
	t.Helper()
	m := <-p.messages
	if got := m.Get("type").String(); got != kind {
		t.Fatalf("a message of type %s came, want %s", got, kind)
	}
	return m
}

type echo struct {
	Text   string         `json:"text"`
	Curve  engine.Numbers `json:"curve"`
	File   engine.Blob    `json:"file"`
	Empty  engine.Numbers `json:"empty"`
	Nested []nestedEcho   `json:"nested"`
}

type nestedEcho struct {
	Values engine.Numbers `json:"values"`
}

// echoing answers with what it was sent.
func echoing(ctx context.Context, name string, request []byte, blobs [][]byte) ([]byte, []engine.Array, error) {
	switch name {
	case "panic":
		panic("on purpose")
	case "error":
		return nil, nil, errors.New("plain")
	case "refuse":
		return nil, nil, engine.Fail("ring.radius", "range", "Too small.")
	}
	result := &echo{Text: string(request), Curve: engine.Numbers{1, -2, 0.5}, Nested: []nestedEcho{{}, {engine.Numbers{4}}}}
	if len(blobs) > 0 {
		result.File.Bytes = blobs[0]
	}
	arrays := engine.TakeArrays(result)
	response, err := engine.Encode(result)
	return response, arrays, err
}

func TestReadyComesFirst(t *testing.T) {
	buildID = "0123"
	p := newPage(t, "compute", echoing)
	ready := p.next(t, "ready")
	for member, want := range map[string]string{"build": "0123", "role": "compute", "version": engine.Version} {
		if got := ready.Get(member).String(); got != want {
			t.Errorf("ready.%s is %q, want %q", member, got, want)
		}
	}
}

func TestResultCarriesArrays(t *testing.T) {
	p := newPage(t, "compute", echoing)
	p.next(t, "ready")
	p.send(7, "echo", `"höop"`, []byte{1, 2, 255})
	m := p.next(t, "result")
	if m.Get("id").Int() != 7 {
		t.Errorf("the id is %d", m.Get("id").Int())
	}
	var result echo
	if err := json.Unmarshal([]byte(m.Get("response").String()), &result); err != nil || result.Text != `"höop"` {
		t.Errorf("the response is %s (%v)", m.Get("response"), err)
	}
	want := map[string]string{"curve": "f32 12", "file": "bytes 3", "empty": "f32 0", "nested.0.values": "f32 0", "nested.1.values": "f32 4"}
	arrays := m.Get("arrays")
	for i := range arrays.Length() {
		array := arrays.Index(i)
		path := array.Get("path").Call("join", ".").String()
		got := array.Get("kind").String() + " " + js.Global().Get("String").Invoke(array.Get("buffer").Get("byteLength")).String()
		if want[path] != got {
			t.Errorf("%s is %s, want %s", path, got, want[path])
		}
		delete(want, path)
		if path == "file" {
			if got := bytesOf(uint8Array.New(array.Get("buffer"))); string(got) != "\x01\x02\xff" {
				t.Errorf("the file came back as % x", got)
			}
		}
	}
	if len(want) > 0 || p.moved != arrays.Length() {
		t.Errorf("missing %v; %d of %d buffers were transferred", want, p.moved, arrays.Length())
	}
}

func TestRefusals(t *testing.T) {
	p := newPage(t, "compute", echoing)
	p.next(t, "ready")
	p.send(1, "refuse", "{}")
	problem := p.next(t, "refused").Get("problems").Index(0)
	if problem.Get("field").String() != "ring.radius" || problem.Get("code").String() != "range" || problem.Get("message").String() != "Too small." || problem.Get("offset").Int() != -1 {
		t.Errorf("the problem is %s", js.Global().Get("JSON").Call("stringify", problem))
	}
	p.send(2, "error", "{}")
	if got := p.next(t, "refused").Get("problems").Index(0).Get("code").String(); got != string(engine.CodeInternal) {
		t.Errorf("a plain error has code %s", got)
	}
}

// A panic answers its call, says so, and leaves the program running.
func TestPanicIsAnswered(t *testing.T) {
	p := newPage(t, "compute", echoing)
	p.next(t, "ready")
	p.send(1, "panic", "{}")
	refused := p.next(t, "refused")
	if message := refused.Get("problems").Index(0).Get("message").String(); refused.Get("id").Int() != 1 || !strings.Contains(message, "on purpose") {
		t.Errorf("the sentence is %q", message)
	}
	if message := p.next(t, "panic").Get("message").String(); message != "on purpose" {
		t.Errorf("the panic is %q", message)
	}
	p.send(2, "echo", "{}")
	p.next(t, "result")
}

// The engine itself answers through the door.
func TestEngineAnswers(t *testing.T) {
	p := newPage(t, "compute", engine.CallBulk)
	p.next(t, "ready")
	p.send(1, "about", "{}")
	if response := p.next(t, "result").Get("response").String(); !strings.Contains(response, `"version":"`+engine.Version+`"`) {
		t.Errorf("about says %s", response)
	}
	p.send(2, "no such call", "{}")
	if got := p.next(t, "refused").Get("problems").Index(0).Get("code").String(); got != string(engine.CodeUnknownCall) {
		t.Errorf("an unknown call is refused with %s", got)
	}
	p.send(3, "about", `{"verbose":true}`)
	p.next(t, "refused")
}

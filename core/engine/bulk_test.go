package engine

import (
	"context"
	"encoding/base64"
	"encoding/json"
	"reflect"
	"strconv"
	"testing"
)

// place puts an array of the side channel where it belongs in decoded JSON.
func place(t *testing.T, root any, array Array) {
	t.Helper()
	var value any
	if array.Bytes != nil {
		value = base64.StdEncoding.EncodeToString(array.Bytes)
	} else {
		text, err := Numbers(array.Values).MarshalJSON()
		if err != nil {
			t.Fatal(err)
		}
		if err := json.Unmarshal(text, &value); err != nil {
			t.Fatal(err)
		}
	}
	for i, step := range array.Path {
		last := i == len(array.Path)-1
		switch node := root.(type) {
		case map[string]any:
			if last {
				node[step] = value
				return
			}
			root = node[step]
		case []any:
			index, err := strconv.Atoi(step)
			if err != nil || index >= len(node) {
				t.Fatalf("%v leads nowhere", array.Path)
			}
			if last {
				node[index] = value
				return
			}
			root = node[index]
		default:
			t.Fatalf("%v leads nowhere", array.Path)
		}
	}
}

// TestBulkEqualsPlain holds the answer through the side channel, put together
// again, against the plain JSON of scripts.
func TestBulkEqualsPlain(t *testing.T) {
	for name, request := range sampleRequests(t) {
		if name == "demo" || name == "send" {
			continue // see TestBulkOfTimes
		}
		plain, err := Call(context.Background(), name, []byte(request))
		if err != nil {
			t.Fatal(err)
		}
		bulk, arrays, err := CallBulk(context.Background(), name, []byte(request), nil)
		if err != nil {
			t.Fatal(err)
		}
		var want, got any
		if err := json.Unmarshal(plain, &want); err != nil {
			t.Fatal(err)
		}
		if err := json.Unmarshal(bulk, &got); err != nil {
			t.Fatal(err)
		}
		for _, array := range arrays {
			place(t, got, array)
		}
		if !reflect.DeepEqual(got, want) {
			t.Errorf("%s: the side channel gives another answer", name)
		}
		if has := len(arrays) > 0; has != (name == "shape" || name == "respond" || name == "frames" || name == "peaks") {
			t.Errorf("%s: %d arrays beside the JSON", name, len(arrays))
		}
	}
}

// TestBlobBesideTheRequest sends a recording beside the JSON instead of in it.
func TestBlobBesideTheRequest(t *testing.T) {
	request := sampleRequests(t)["peaks"]
	var inside struct {
		Recording []byte `json:"recording"`
	}
	if err := json.Unmarshal([]byte(request), &inside); err != nil {
		t.Fatal(err)
	}
	beside := `{"recording":"blob:0","lowest":0,"highest":0,"most":0,"tap":0,"displayPoints":0}`
	want, _, err := CallBulk(context.Background(), "peaks", []byte(request), nil)
	if err != nil {
		t.Fatal(err)
	}
	got, _, err := CallBulk(context.Background(), "peaks", []byte(beside), [][]byte{inside.Recording})
	if err != nil {
		t.Fatal(err)
	}
	if string(got) != string(want) {
		t.Error("a recording beside the request is read otherwise than one in it")
	}
	for _, reference := range []string{"blob:1", "blob:-1", "blob:x", "blob:"} {
		bad := `{"recording":"` + reference + `"}`
		if _, _, err := CallBulk(context.Background(), "peaks", []byte(bad), [][]byte{inside.Recording}); err == nil {
			t.Errorf("%s was taken", reference)
		}
	}
}

// TestNumbersInJSON: a nil array is [], what is not finite is null.
func TestNumbersInJSON(t *testing.T) {
	nan := float32(0)
	nan /= nan
	for _, c := range []struct {
		numbers Numbers
		want    string
	}{{nil, `[]`}, {Numbers{}, `[]`}, {Numbers{1, -0.5, nan, 1e30}, `[1,-0.5,null,1e+30]`}} {
		if got, err := json.Marshal(c.numbers); err != nil || string(got) != c.want {
			t.Errorf("%s %v, want %s", got, err, c.want)
		}
	}
}

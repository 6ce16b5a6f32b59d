package engine

import (
	"context"
	"encoding/json"
	"testing"
)

// TestEveryCallAnswersTheDemo runs each call on the demonstration diaphragm
// through the door that scripts use.
func TestEveryCallAnswersTheDemo(t *testing.T) {
	for name, request := range sampleRequests(t) {
		response, err := Call(context.Background(), name, []byte(request))
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if !json.Valid(response) {
			t.Errorf("%s: the response is not JSON", name)
		}
	}
	for _, c := range Calls() {
		if _, ok := sampleRequests(t)[c.Name]; !ok {
			t.Errorf("no sample request for the call %q", c.Name)
		}
	}
}

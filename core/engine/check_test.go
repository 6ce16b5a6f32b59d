package engine

import (
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"testing"
)

// TestPublishedChecks computes every value of testdata/published/checks.json,
// each with its source, as the page "Numbers you can trust" does.
func TestPublishedChecks(t *testing.T) {
	text, err := os.ReadFile(filepath.Join("..", "..", "testdata", "published", "checks.json"))
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Checks []Check `json:"checks"`
	}
	if err := json.Unmarshal(text, &file); err != nil {
		t.Fatal(err)
	}
	if len(file.Checks) < 100 {
		t.Fatalf("only %d checks in the file", len(file.Checks))
	}
	result, err := runCheck(context.Background(), &CheckRequest{Checks: file.Checks})
	if err != nil {
		t.Fatal(err)
	}
	for i, outcome := range result.Outcomes {
		check := file.Checks[i]
		if check.Source == "" {
			t.Errorf("%s has no source", check.Name)
		}
		if !outcome.Agrees {
			t.Errorf("%s: printed %s, computed %s, difference %.3g, allowed %.3g %s (%s)",
				check.Name, check.Expected, outcome.Computed, outcome.Difference, outcome.Allowed, outcome.Problem, check.Source)
		}
	}
}

// TestCheckCanFail: a wrong value, a wrong quantity and a missing argument are
// told.
func TestCheckCanFail(t *testing.T) {
	result, err := runCheck(context.Background(), &CheckRequest{Checks: []Check{
		{Quantity: "zero-j", Arguments: []float64{0, 1}, Expected: "2.4049"},
		{Quantity: "no-such", Arguments: []float64{0, 1}, Expected: "2.4"},
		{Quantity: "zero-j", Arguments: []float64{0}, Expected: "2.4"},
		{Quantity: "zero-j", Arguments: []float64{0, 0}, Expected: "2.4"},
		{Quantity: "zero-j", Arguments: []float64{0, 1}, Expected: "2.4048"},
		{Quantity: "zero-j", Arguments: []float64{0, 1}, Expected: "2.40482555769577276862"},
	}})
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range []bool{false, false, false, false, true, true} {
		if got := result.Outcomes[i]; got.Agrees != want {
			t.Errorf("check %d: agrees is %v, want %v: %+v", i, got.Agrees, want, got)
		}
	}
}

package accuracy

import (
	"os"
	"runtime"
	"testing"
)

// stride thins the tables under js/wasm, where parsing and big arithmetic are
// several times slower; every region keeps at least a hundred points.
func stride() int {
	if runtime.GOARCH == "wasm" {
		return 4
	}
	return 1
}

// TestAccuracy holds every region to its promise and to the mean error that
// goes with it: an error bounded by P and dominated by the last rounding has a
// mean of a quarter of an ulp; half of the promise is a safe bound for any
// distribution that is not piled up at the limit.
func TestAccuracy(t *testing.T) {
	regions, err := Measure(os.DirFS("../../../testdata/bessel"), stride())
	if err != nil {
		t.Fatal(err)
	}
	for _, r := range regions {
		t.Logf("%-45s %6d points, mean %.3f, max %.3f ulp at nu=%v x=%v", r.Region, r.Points, r.MeanULP, r.MaxULP, r.WhereNu, r.WhereX)
		if r.Points < 100 {
			t.Errorf("%s: only %d points", r.Region, r.Points)
		}
		if !(r.MaxULP <= r.Promise) {
			t.Errorf("%s: %v ulp at nu=%v x=%v, promised %v", r.Region, r.MaxULP, r.WhereNu, r.WhereX, r.Promise)
		}
		if !(r.MeanULP <= r.Promise/2) {
			t.Errorf("%s: mean %v ulp, promised %v", r.Region, r.MeanULP, r.Promise/2)
		}
	}
}

// TestTableSizes keeps the tables from losing rows.
func TestTableSizes(t *testing.T) {
	for name, want := range map[string]int{"jy.tsv.gz": 23293, "ik.tsv.gz": 6900, "zeros.tsv.gz": 2610, "annulus.tsv.gz": 400} {
		rows, err := readTable(os.DirFS("../../../testdata/bessel"), name)
		if err != nil {
			t.Fatal(err)
		}
		if len(rows) != want {
			t.Errorf("%s has %d rows, want %d", name, len(rows), want)
		}
	}
}

package main

import (
	"slices"
	"strings"
	"testing"
)

func TestMedian(t *testing.T) {
	for _, c := range []struct {
		values []float64
		want   float64
	}{{[]float64{3}, 3}, {[]float64{9, 1, 2}, 2}, {[]float64{4, 1, 3, 2}, 2.5}} {
		given := slices.Clone(c.values)
		if got := median(c.values); got != c.want || !slices.Equal(given, c.values) {
			t.Errorf("median of %v: %g", c.values, got)
		}
	}
}

// TestBenchLine reads lines as `go test -bench` prints them.
func TestBenchLine(t *testing.T) {
	for line, want := range map[string][2]string{
		"BenchmarkJ/order=50-2         \t 3036470\t       364.1 ns/op":                       {"BenchmarkJ/order=50", "364.1"},
		"BenchmarkZeros10000           \t      72\t  15876543 ns/op\t       0 B/op":          {"BenchmarkZeros10000", "15876543"},
		"BenchmarkPatches-2   \t     100\t  10876543 ns/op\t        96.00 modes":             {"BenchmarkPatches", "10876543"},
		"BenchmarkWetModes/film_open_still-2         \t     100\t   1.05e+08 ns/op\t 0 B/op": {"BenchmarkWetModes/film_open_still", "1.05e+08"},
	} {
		match := benchLine.FindStringSubmatch(line)
		if match == nil || match[1] != want[0] || match[2] != want[1] {
			t.Errorf("%q: %v", line, match)
		}
	}
}

func TestWithout(t *testing.T) {
	got := without([]string{"A=1", "OPENBLAS_CORETYPE=x", "B=2"}, "OPENBLAS_CORETYPE", "C")
	if !slices.Equal(got, []string{"A=1", "B=2"}) {
		t.Error(got)
	}
}

func TestGrowthFactorsStandBetweenSizesOnly(t *testing.T) {
	var out strings.Builder
	printGrowth(&out, growing{name: "work"}, []step{
		{"one", 1e-3, 2e-3}, {"n=8", 1e-3, 2e-3}, {"n=16", 3e-3, 4e-3}, {"32", 1e-6, 1e-6}, {"64", 5e-6, 7e-6}, {"64/other", 1, 2},
	})
	lines := strings.Split(strings.TrimSpace(out.String()), "\n")
	for i, want := range []string{"work", "what", "1.00 ms 2.00 ms", "1.00 ms 2.00 ms", "3.00 ms 3.00 4.00 ms 2.00", "1.00 us 1.00 us", "5.00 us 5.00 7.00 us 7.00", "1.00 s 2.00 s"} {
		if got := strings.Join(strings.Fields(lines[i]), " "); !strings.Contains(got, want) {
			t.Errorf("line %d: %q, want %q in it", i, got, want)
		}
	}
}

// Command accuracy measures the Bessel functions against their reference values
// and writes the table that the verification page shows.
//
//	go run ./site/accuracy [-tables testdata/bessel] [-o site/data/accuracy.json]
package main

import (
	"encoding/json"
	"flag"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"

	"hoopsheet/core/bessel/accuracy"
)

func main() {
	tables := flag.String("tables", "testdata/bessel", "folder of the reference values")
	out := flag.String("o", "site/data/accuracy.json", "file to write")
	flag.Parse()
	if err := run(*tables, *out); err != nil {
		fmt.Fprintln(os.Stderr, "accuracy:", err)
		os.Exit(1)
	}
}

// run writes the table; it fails, after writing, if a promise is broken.
func run(tables, out string) error {
	regions, err := accuracy.Measure(os.DirFS(tables), 1)
	if err != nil {
		return err
	}
	shown := slices.Clone(regions)
	for i := range shown {
		// Three decimals: more only makes the file change without need.
		shown[i].MeanULP = math.Round(shown[i].MeanULP*1000) / 1000
		shown[i].MaxULP = math.Round(shown[i].MaxULP*1000) / 1000
	}
	text, err := json.MarshalIndent(shown, "", "  ")
	if err != nil {
		return err
	}
	if err := os.MkdirAll(filepath.Dir(out), 0o755); err != nil {
		return err
	}
	if err := os.WriteFile(out, append(text, '\n'), 0o644); err != nil {
		return err
	}
	for _, r := range regions {
		fmt.Printf("%-45s %6d points  mean %6.3f  max %6.3f  promise %g ulp\n",
			r.Region, r.Points, r.MeanULP, r.MaxULP, r.Promise)
		if !(r.MaxULP <= r.Promise) {
			err = fmt.Errorf("%s: %g ulp, promised %g", r.Region, r.MaxULP, r.Promise)
		}
	}
	return err
}

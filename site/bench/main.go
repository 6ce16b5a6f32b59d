// Command bench times the work that the pages do beside the same work in NumPy
// and SciPy, natively and as WebAssembly in Node, in one run, and prints the
// ratios.
//
//	go run ./site/bench [-rounds 3] [-time 300ms] [-only Disc] [-growth=false] [-chromium=false]
//
// The rounds take turns - Python, native, WebAssembly, Python again - so that
// whatever else the machine does falls on all three alike; each figure is the
// median of the rounds. Nothing here passes or fails by time.
package main

import (
	"flag"
	"fmt"
	"os"
	"regexp"
)

func main() {
	rounds := flag.Int("rounds", 3, "rounds; the median of them is printed")
	benchtime := flag.String("time", "300ms", "how long a benchmark runs in a round")
	only := flag.String("only", "", "benchmarks to run, as a regular expression")
	browser := flag.Bool("chromium", true, "measure the replay of a response in Chromium too, if the site is built")
	growth := flag.Bool("growth", true, "print how the time grows with the size")
	flag.Parse()
	if err := run(*rounds, *benchtime, *only, *growth, *browser); err != nil {
		fmt.Fprintln(os.Stderr, "bench:", err)
		os.Exit(1)
	}
}

func run(rounds int, benchtime, only string, growth, browser bool) error {
	if rounds < 1 {
		return fmt.Errorf("%d rounds; at least one is needed", rounds)
	}
	wanted, err := regexp.Compile(only)
	if err != nil {
		return err
	}
	b, err := newBench(benchtime)
	if err != nil {
		return err
	}
	defer b.close()
	describe(os.Stdout, b.goRoot)

	var rows []row
	for _, w := range works {
		if !wanted.MatchString(w.benchmark) {
			continue
		}
		r, err := b.compare(w, rounds)
		if err != nil {
			return err
		}
		rows = append(rows, r)
	}
	printRatios(os.Stdout, rows)
	if browser && wanted.MatchString("Chromium") {
		if err := b.printChromium(os.Stdout); err != nil {
			return err
		}
	}
	if !growth {
		return nil
	}
	for _, g := range growths {
		if !wanted.MatchString(g.benchmark) {
			continue
		}
		steps, err := b.grow(g, rounds)
		if err != nil {
			return err
		}
		printGrowth(os.Stdout, g, steps)
	}
	return nil
}

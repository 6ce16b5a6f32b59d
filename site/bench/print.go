package main

import (
	"fmt"
	"io"
	"os"
	"runtime"
	"strconv"
	"strings"
	"text/tabwriter"
)

// describe says what the figures were measured on.
func describe(w io.Writer, goRoot string) {
	fmt.Fprintf(w, "%s, %d logical processors, %s/%s\n", processor(), runtime.NumCPU(), runtime.GOOS, runtime.GOARCH)
	fmt.Fprintf(w, "%s", runtime.Version())
	for _, tool := range []struct {
		prefix, name string
		args         []string
	}{
		{"Node ", "node", []string{"--version"}},
		{"", python, []string{"-c", "import platform, numpy, scipy; print('Python', platform.python_version(), 'NumPy', numpy.__version__, 'SciPy', scipy.__version__)"}},
	} {
		version, err := output(tool.name, tool.args...)
		if err != nil {
			version = tool.name + " is missing"
		}
		fmt.Fprintf(w, "; %s%s", tool.prefix, version)
	}
	fmt.Fprintf(w, "\n\n")
}

// processor is the processor's own name, where the system tells it.
func processor() string {
	text, err := os.ReadFile("/proc/cpuinfo")
	if err == nil {
		for line := range strings.Lines(string(text)) {
			if name, value, ok := strings.Cut(line, ":"); ok && strings.TrimSpace(name) == "model name" {
				return strings.TrimSpace(value)
			}
		}
	}
	return "processor without a name"
}

func printRatios(w io.Writer, rows []row) {
	if len(rows) == 0 {
		return
	}
	table := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(table, "work\tagainst\tPython\tnative\tratio\tgoal\tWebAssembly\tratio\tgoal\t")
	for _, r := range rows {
		fmt.Fprintf(table, "%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t\n", r.name, r.against, duration(r.python),
			duration(r.goNative), digits(r.python/r.goNative), goal(r.native),
			duration(r.goWasm), digits(r.python/r.goWasm), goal(r.wasm))
	}
	table.Flush()
	fmt.Fprintln(w, "ratio: how many times faster than Python; below 1 is slower. WebAssembly runs in Node.")
}

// printGrowth prints each size with the factor over the one before, where the
// one before is another size of the same.
func printGrowth(w io.Writer, g growing, steps []step) {
	fmt.Fprintf(w, "\n%s\n", g.name)
	table := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(table, "what\tnative\tfactor\tWebAssembly\tfactor\t")
	for i, s := range steps {
		native, wasm := "", ""
		if i > 0 && isSize(s.name) && sized(s.name) == sized(steps[i-1].name) {
			native, wasm = digits(s.goNative/steps[i-1].goNative), digits(s.goWasm/steps[i-1].goWasm)
		}
		fmt.Fprintf(table, "%s\t%s\t%s\t%s\t%s\t\n", s.name, duration(s.goNative), native, duration(s.goWasm), wasm)
	}
	table.Flush()
}

// isSize reports names such as 64 and n=64.
func isSize(name string) bool {
	_, err := strconv.Atoi(name[strings.LastIndexByte(name, '=')+1:])
	return err == nil
}

// sized is what stands before the size.
func sized(name string) string { return name[:strings.LastIndexByte(name, '=')+1] }

func duration(seconds float64) string {
	for _, unit := range []struct {
		size float64
		name string
	}{{1, "s"}, {1e-3, "ms"}, {1e-6, "us"}} {
		if seconds >= unit.size {
			return digits(seconds/unit.size) + " " + unit.name
		}
	}
	return digits(seconds*1e9) + " ns"
}

// digits writes three significant digits.
func digits(x float64) string {
	switch {
	case x >= 100:
		return strconv.FormatFloat(x, 'f', 0, 64)
	case x >= 10:
		return strconv.FormatFloat(x, 'f', 1, 64)
	}
	return strconv.FormatFloat(x, 'f', 2, 64)
}

func goal(factor float64) string {
	if factor == 0 {
		return "-"
	}
	return digits(factor)
}

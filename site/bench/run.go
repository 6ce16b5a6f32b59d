package main

import (
	"bufio"
	"bytes"
	"encoding/json"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
)

const python = "/usr/bin/python3"

// bench holds what the runs share: the compiled test programs.
type bench struct {
	root, goRoot, dir, time string
	programs                map[string]string
	scripts                 map[string]map[string][]float64 // seconds by script and line
}

func newBench(time string) (*bench, error) {
	root, err := output("go", "list", "-m", "-f", "{{.Dir}}")
	if err != nil {
		return nil, err
	}
	goRoot, err := output("go", "env", "GOROOT")
	if err != nil {
		return nil, err
	}
	dir, err := os.MkdirTemp("", "hoopsheet-bench-")
	if err != nil {
		return nil, err
	}
	return &bench{root: root, goRoot: goRoot, dir: dir, time: time, programs: map[string]string{}, scripts: map[string]map[string][]float64{}}, nil
}

func (b *bench) close() { os.RemoveAll(b.dir) }

// row is one line of the table: seconds.
type row struct {
	work
	python, goNative, goWasm float64
}

func (b *bench) compare(w work, rounds int) (row, error) {
	var native, wasm []float64
	for i := range rounds {
		if err := b.runScript(w.script, i); err != nil {
			return row{}, err
		}
		for _, target := range []struct {
			wasm bool
			into *[]float64
		}{{false, &native}, {true, &wasm}} {
			found, err := b.runGo(w.pkg, w.benchmark, target.wasm)
			if err != nil {
				return row{}, err
			}
			if len(found) != 1 || found[0].name != "" {
				return row{}, fmt.Errorf("%s in core/%s gave %d figures, want one", w.benchmark, w.pkg, len(found))
			}
			*target.into = append(*target.into, found[0].seconds)
		}
	}
	seconds := b.scripts[w.script][w.line]
	if len(seconds) == 0 {
		return row{}, fmt.Errorf("%s prints no line named %s", w.script, w.line)
	}
	return row{w, median(seconds), median(native), median(wasm)}, nil
}

// runScript runs a script of testdata/bench once a round; several comparisons
// may stand in one script.
func (b *bench) runScript(script string, round int) error {
	lines := b.scripts[script]
	if lines == nil {
		lines = map[string][]float64{}
		b.scripts[script] = lines
	}
	for _, seconds := range lines {
		if len(seconds) > round {
			return nil
		}
	}
	cmd := exec.Command(python, filepath.Join(b.root, "testdata", "bench", script))
	// Settings of a BLAS for another machine would make NumPy slower than it is.
	cmd.Env = without(os.Environ(), "OPENBLAS_CORETYPE", "OPENBLAS_L2_SIZE")
	out, err := execute(cmd)
	if err != nil {
		return err
	}
	decoder := json.NewDecoder(bytes.NewReader(out))
	for decoder.More() {
		var line struct {
			Name    string  `json:"name"`
			Seconds float64 `json:"seconds"`
		}
		if err := decoder.Decode(&line); err != nil {
			return fmt.Errorf("%s: %w", script, err)
		}
		lines[line.Name] = append(lines[line.Name], line.Seconds)
	}
	return nil
}

// figure is one benchmark's result; name is that of the sub-benchmark.
type figure struct {
	name    string
	seconds float64
}

var benchLine = regexp.MustCompile(`^(Benchmark\S*?)(?:-\d+)?\s+\d+\s+([\d.e+]+) ns/op`)

// runGo runs a benchmark twice in one process and takes the second: a
// WebAssembly engine first runs code as it is and compiles it well meanwhile.
func (b *bench) runGo(pkg, benchmark string, wasm bool) ([]figure, error) {
	program, err := b.program(pkg, wasm)
	if err != nil {
		return nil, err
	}
	args := []string{"-test.run=^$", "-test.bench=^" + benchmark + "$", "-test.benchtime=" + b.time, "-test.count=2"}
	cmd := exec.Command(program, args...)
	if wasm {
		cmd = exec.Command(filepath.Join(b.goRoot, "lib", "wasm", "go_js_wasm_exec"), append([]string{program}, args...)...)
		// Node's Go loader breaks on a long environment.
		cmd.Env = []string{"PATH=" + os.Getenv("PATH"), "HOME=" + os.Getenv("HOME")}
	}
	cmd.Dir = filepath.Join(b.root, "core", pkg)
	out, err := execute(cmd)
	if err != nil {
		return nil, err
	}
	var found []figure
	lines := bufio.NewScanner(bytes.NewReader(out))
	for lines.Scan() {
		match := benchLine.FindStringSubmatch(lines.Text())
		if match == nil {
			continue
		}
		ns, err := strconv.ParseFloat(match[2], 64)
		if err != nil {
			return nil, err
		}
		name := strings.TrimPrefix(strings.TrimPrefix(match[1], benchmark), "/")
		if last := len(found) - 1; last >= 0 && found[last].name == name {
			found[last].seconds = ns * 1e-9
			continue
		}
		found = append(found, figure{name, ns * 1e-9})
	}
	if len(found) == 0 {
		return nil, fmt.Errorf("core/%s has no benchmark %s:\n%s", pkg, benchmark, out)
	}
	return found, nil
}

// program compiles the tests of a package, once.
func (b *bench) program(pkg string, wasm bool) (string, error) {
	name := pkg + ".test"
	if wasm {
		name = pkg + ".wasm"
	}
	if file := b.programs[name]; file != "" {
		return file, nil
	}
	file := filepath.Join(b.dir, name)
	cmd := exec.Command("go", "test", "-c", "-o", file, "./core/"+pkg)
	cmd.Dir = b.root
	if wasm {
		cmd.Env = append(os.Environ(), "GOOS=js", "GOARCH=wasm")
	}
	if _, err := execute(cmd); err != nil {
		return "", err
	}
	b.programs[name] = file
	return file, nil
}

// step is one size of a growing benchmark.
type step struct {
	name             string
	goNative, goWasm float64
}

func (b *bench) grow(g growing, rounds int) ([]step, error) {
	var steps []step
	native, wasm := map[string][]float64{}, map[string][]float64{}
	for i := range rounds {
		for _, target := range []struct {
			wasm bool
			into map[string][]float64
		}{{false, native}, {true, wasm}} {
			found, err := b.runGo(g.pkg, g.benchmark, target.wasm)
			if err != nil {
				return nil, err
			}
			for _, f := range found {
				if i == 0 && !target.wasm {
					steps = append(steps, step{name: f.name})
				}
				target.into[f.name] = append(target.into[f.name], f.seconds)
			}
		}
	}
	for i := range steps {
		steps[i].goNative, steps[i].goWasm = median(native[steps[i].name]), median(wasm[steps[i].name])
	}
	return steps, nil
}

func median(values []float64) float64 {
	sorted := slices.Sorted(slices.Values(values))
	n := len(sorted)
	if n%2 == 1 {
		return sorted[n/2]
	}
	return (sorted[n/2-1] + sorted[n/2]) / 2
}

// without drops variables from an environment.
func without(env []string, names ...string) []string {
	return slices.DeleteFunc(slices.Clone(env), func(entry string) bool {
		name, _, _ := strings.Cut(entry, "=")
		return slices.Contains(names, name)
	})
}

// execute runs a command and gives what it prints; an error carries its messages.
func execute(cmd *exec.Cmd) ([]byte, error) {
	var messages bytes.Buffer
	cmd.Stderr = &messages
	out, err := cmd.Output()
	if err != nil {
		return nil, fmt.Errorf("%s: %w\n%s%s", strings.Join(cmd.Args, " "), err, out, messages.Bytes())
	}
	return out, nil
}

func output(name string, args ...string) (string, error) {
	out, err := execute(exec.Command(name, args...))
	return strings.TrimSpace(string(out)), err
}

package main

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
)

// The program uses what the kept tables are for: it grows its stack, collects garbage while pointers lie on it, recovers
// from panics of three kinds, runs deferred functions, and asks for its own line.
const slimProgram = `package main

import (
	"fmt"
	"runtime"
	"strings"
)

type node struct{ next *node; pad [40]byte }

func deep(n int, held *node) int {
	var local [64]int
	for i := range local { local[i] = n + i }
	if n%1000 == 0 { runtime.GC() }
	if n == 0 { count := 0; for ; held != nil; held = held.next { count++ }; return count }
	return deep(n-1, &node{next: held}) + local[n%64] - n - n%64
}

func guarded(f func()) (said string) {
	defer func() { said = fmt.Sprint(recover()) }()
	defer fmt.Println("deferred")
	f()
	return "no panic"
}

func main() {
	fmt.Println(deep(5000, nil))
	var missing *node
	list := []int{1, 2, 3}
	for _, f := range []func(){
		func() { panic("own") },
		func() { fmt.Println(missing.next) },
		func() { fmt.Println(list[len(list)+len(guarded(func() {}))]) },
	} {
		fmt.Println(guarded(f))
	}
	pc, _, line, _ := runtime.Caller(0)
	fmt.Println("function", strings.HasPrefix(runtime.FuncForPC(pc).Name(), "main."))
	fmt.Println("line known:", line > 0)
}
`

// TestSlimProgramBehaves: the slimmed program does the same, but for lines in traces.
func TestSlimProgramBehaves(t *testing.T) {
	dir := t.TempDir()
	source := filepath.Join(dir, "main.go")
	if err := os.WriteFile(source, []byte(slimProgram), 0o644); err != nil {
		t.Fatal(err)
	}
	whole := filepath.Join(dir, "whole.wasm")
	if _, err := command(dir, wasmEnv(), nil, "go", "build", "-trimpath", "-ldflags=-s -w", "-o", whole, source); err != nil {
		t.Fatal(err)
	}
	raw, err := os.ReadFile(whole)
	if err != nil {
		t.Fatal(err)
	}
	small, err := slim(raw)
	if err != nil {
		t.Fatal(err)
	}
	slimmed := filepath.Join(dir, "slim.wasm")
	if err := os.WriteFile(slimmed, small, 0o644); err != nil {
		t.Fatal(err)
	}
	want := strings.Replace(runInNode(t, whole), "line known: true", "line known: false", 1)
	if got := runInNode(t, slimmed); got != want || !strings.Contains(got, "nil pointer") || !strings.Contains(got, "line known: false") {
		t.Errorf("slimmed:\n%s\nwhole, without lines:\n%s", got, want)
	}
}

func runInNode(t *testing.T, program string) string {
	t.Helper()
	goRoot, err := goEnv(".", "GOROOT")
	if err != nil {
		t.Fatal(err)
	}
	// Node's Go loader breaks on a long environment.
	cmd := exec.Command(filepath.Join(goRoot, "lib", "wasm", "go_js_wasm_exec"), program)
	cmd.Env = []string{"PATH=" + os.Getenv("PATH"), "HOME=" + os.Getenv("HOME")}
	out, err := cmd.CombinedOutput()
	if err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	return string(out)
}

// TestDataSegmentsKeepMemory: whatever the memory, its segments lay it out again.
func TestDataSegmentsKeepMemory(t *testing.T) {
	memory := make([]byte, 5000)
	for _, at := range []int{0, 1, 63, 64, 65, 200, 264, 265, 1000, 4999} {
		memory[at] = byte(at) | 1
	}
	got, err := initialMemory(dataSegments(memory))
	if err != nil || string(got) != string(memory) {
		t.Errorf("laid out %d bytes differently, error %v", len(got), err)
	}
}

// TestSlimRefuses: what it does not know is told, never shipped.
func TestSlimRefuses(t *testing.T) {
	for name, input := range map[string]string{
		"nothing":    "",
		"no wasm":    "#!/bin/sh",
		"cut short":  "\x00asm\x01\x00\x00\x00\x0b\x7f\x01",
		"no data":    "\x00asm\x01\x00\x00\x00",
		"other form": "\x00asm\x01\x00\x00\x00\x0b\x03\x01\x01\x00",
		"no table":   "\x00asm\x01\x00\x00\x00\x0b\x07\x01\x00\x41\x00\x0b\x01\x61",
	} {
		if _, err := slim([]byte(input)); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}

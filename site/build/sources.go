package main

import (
	"bytes"
	"compress/gzip"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
)

// siteDirs are the source directories of the site.
type siteDirs struct{ root, pages, src, styles, templates string }

func siteAt(moduleRoot string) siteDirs {
	site := filepath.Join(moduleRoot, "site")
	return siteDirs{
		root:      site,
		pages:     filepath.Join(site, "pages"),
		src:       filepath.Join(site, "src"),
		styles:    filepath.Join(site, "styles"),
		templates: filepath.Join(site, "templates"),
	}
}

// moduleRoot finds the directory of go.mod, upwards from the working directory.
func moduleRoot() (string, error) {
	dir, err := os.Getwd()
	if err != nil {
		return "", err
	}
	for {
		if _, err := os.Stat(filepath.Join(dir, "go.mod")); err == nil {
			return dir, nil
		}
		up := filepath.Dir(dir)
		if up == dir {
			return "", errors.New("no go.mod here or above: run this inside the repository")
		}
		dir = up
	}
}

// wasmEnv is the environment in which Go commands speak of the wasm.
func wasmEnv() []string { return append(os.Environ(), "GOOS=js", "GOARCH=wasm", wasmExperiments) }

func goEnv(root, name string) (string, error) {
	out, err := command(root, nil, nil, "go", "env", name)
	return strings.TrimSpace(string(out)), err
}

// command runs a program in dir and returns its standard output; what it says on standard error goes into the error.
func command(dir string, env []string, stdin io.Reader, name string, args ...string) ([]byte, error) {
	cmd := exec.Command(name, args...)
	cmd.Dir, cmd.Env, cmd.Stdin = dir, env, stdin
	var out, complaints bytes.Buffer
	cmd.Stdout, cmd.Stderr = &out, &complaints
	if err := cmd.Run(); err != nil {
		return nil, fmt.Errorf("%s %s: %w\n%s", name, strings.Join(args, " "), err, complaints.Bytes())
	}
	return out.Bytes(), nil
}

// uninlined switches inlining off where a call more does not matter and a copy of the callee costs: 50 kB of 1,160 kB
// after brotli. What computes most (math, the runtime, core/bessel, disc, spectrum) keeps it.
var uninlined = []string{
	"-gcflags=std=-l", "-gcflags=math/...=", "-gcflags=math=", "-gcflags=runtime=", "-gcflags=github.com/...=-l",
	"-gcflags=hoopsheet/wasm=-l", "-gcflags=hoopsheet/core/air=-l", "-gcflags=hoopsheet/core/diaphragm=-l",
	"-gcflags=hoopsheet/core/engine=-l", "-gcflags=hoopsheet/core/quantity=-l", "-gcflags=hoopsheet/core/sheet=-l",
	"-gcflags=hoopsheet/core/tap=-l",
}

// unchecked leaves the checks of indices out of the packages that only compute, from inputs that others have checked: 25 kB
// after brotli, and a tenth to a third of the time. Their tests run with the checks, natively and under js/wasm; what reads
// files, links and texts keeps them here too.
var unchecked = []string{
	"-gcflags=hoopsheet/core/bessel=-B", "-gcflags=hoopsheet/core/disc=-B",
	"-gcflags=hoopsheet/core/modes=-B -l", "-gcflags=hoopsheet/core/response=-B -l", // 9 kB by -l, no time lost
}

// wasmExperiments keeps the older garbage collector and allocator, which are smaller by 12 kB after brotli; a page's
// memory is far below where the newer ones help.
const wasmExperiments = "GOEXPERIMENT=nogreenteagc,nosizespecializedmalloc"

// buildWasm compiles ./wasm with the build id linked in, makes it small (slim.go), and gzips it.
func buildWasm(root, id string) ([]byte, error) {
	dir, err := os.MkdirTemp("", "hoopsheet-wasm-")
	if err != nil {
		return nil, err
	}
	defer os.RemoveAll(dir)
	file := filepath.Join(dir, "main.wasm")
	args := append([]string{"build", "-trimpath", "-ldflags=-s -w -X main.buildID=" + id}, slices.Concat(uninlined, unchecked)...)
	_, err = command(root, wasmEnv(), nil, "go", append(args, "-o", file, "./wasm")...)
	if err != nil {
		return nil, err
	}
	raw, err := os.ReadFile(file)
	if err != nil {
		return nil, err
	}
	if raw, err = slim(raw); err != nil {
		return nil, err
	}
	return gzipped(raw)
}

// gzipped compresses as far as gzip goes. The header holds no name and no time, so equal input gives equal output.
func gzipped(raw []byte) ([]byte, error) {
	var out bytes.Buffer
	w, err := gzip.NewWriterLevel(&out, gzip.BestCompression)
	if err != nil {
		return nil, err
	}
	if _, err := w.Write(raw); err != nil {
		return nil, err
	}
	if err := w.Close(); err != nil {
		return nil, err
	}
	return out.Bytes(), nil
}

// buildID hashes what the wasm and the scripts are made from: the toolchain and its wasm_exec.js, the Go files of
// this module that are linked, the locked versions of everything else, and the TypeScript. It hashes sources and not
// outputs because both outputs contain it.
func buildID(root, goRoot string) (string, error) {
	version, err := goEnv(root, "GOVERSION")
	if err != nil {
		return "", err
	}
	list := []string{
		filepath.Join(goRoot, "lib", "wasm", "wasm_exec.js"),
		filepath.Join(root, "go.mod"),
		filepath.Join(root, "go.sum"),
		filepath.Join(root, "site", "package-lock.json"),
	}
	linked, err := linkedPackages(root)
	if err != nil {
		return "", err
	}
	for _, pkg := range linked {
		if pkg.Module == nil || !pkg.Module.Main {
			continue
		}
		for _, file := range slices.Concat(pkg.GoFiles, pkg.EmbedFiles) {
			list = append(list, filepath.Join(pkg.Dir, file))
		}
	}
	err = filepath.WalkDir(filepath.Join(root, "site", "src"), func(file string, d fs.DirEntry, err error) error {
		if err == nil && d.Type().IsRegular() {
			list = append(list, file)
		}
		return err
	})
	if err != nil {
		return "", err
	}
	hash := sha256.New()
	fmt.Fprintln(hash, version)
	for _, file := range list {
		content, err := os.ReadFile(file)
		if err != nil {
			return "", err
		}
		fmt.Fprintln(hash, filepath.Base(file), len(content))
		hash.Write(content)
	}
	return hex.EncodeToString(hash.Sum(nil)[:6]), nil
}

// goPackage is the part of `go list -json` that is needed here.
type goPackage struct {
	Dir        string
	ImportPath string
	Standard   bool
	GoFiles    []string
	EmbedFiles []string
	Module     *goModule
}

type goModule struct {
	Path, Version, Dir string
	Main               bool
}

// linkedPackages lists every package in the wasm.
func linkedPackages(root string) ([]goPackage, error) {
	out, err := command(root, wasmEnv(), nil, "go", "list", "-deps",
		"-json=Dir,ImportPath,Standard,GoFiles,EmbedFiles,Module", "./wasm")
	if err != nil {
		return nil, err
	}
	var list []goPackage
	for dec := json.NewDecoder(bytes.NewReader(out)); ; {
		var pkg goPackage
		if err := dec.Decode(&pkg); err == io.EOF {
			return list, nil
		} else if err != nil {
			return nil, err
		}
		list = append(list, pkg)
	}
}

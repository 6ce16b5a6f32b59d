package main

import (
	"archive/zip"
	"bytes"
	"compress/gzip"
	"image/png"
	"io"
	"os"
	"path/filepath"
	"slices"
	"testing"
)

// sampleSite is one file of each kind.
func sampleSite() Output {
	return Output{
		"index.html":             []byte("<h1>Start</h1>"),
		"hoopsheet.js":           []byte("import './assets/hoopsheet-A.js'"),
		"sw.js":                  []byte("worker"),
		"defaults.json":          []byte("{}\n"),
		"icon.svg":               []byte("<svg/>"),
		"manifest.webmanifest":   []byte("{}"),
		"assets/hoopsheet-A.bin": []byte("wasm"),
		"assets/serif-A.woff2":   []byte("font"),
		"assets/hoopsheet-A.js":  []byte("code"),
		"hoopsheet-single.html":  []byte("single"),
		"assets/site-A.css":      []byte("sheet"),
		"assets/engine-A.js":     []byte("worker code"),
	}
}

func TestPrecacheList(t *testing.T) {
	var paths []string
	for _, file := range precacheList(sampleSite()) {
		paths = append(paths, file.Path)
		if asset := filepath.Dir(file.Path) == assetDir; asset != (file.Sum != "") {
			t.Errorf("%s: sum %q", file.Path, file.Sum)
		}
		// echo -n wasm | openssl dgst -sha256 -binary | base64
		if file.Path == "assets/hoopsheet-A.bin" && file.Sum != "M2FUv2f3Zfj3XRagrM7mG17l9qdbKikFcD35E71VDz4=" {
			t.Errorf("sum of the wasm: %s", file.Sum)
		}
	}
	want := []string{
		"assets/engine-A.js", "assets/hoopsheet-A.bin", "assets/hoopsheet-A.js", "assets/serif-A.woff2", "assets/site-A.css",
		"hoopsheet.js", "icon.svg", "index.html", "manifest.webmanifest",
	}
	if !slices.Equal(paths, want) {
		t.Errorf("got %q, want %q", paths, want)
	}
}

func TestPrecacheVersionFollowsEveryByte(t *testing.T) {
	files := sampleSite()
	before := precacheVersion(files, precacheList(files))
	for name := range files {
		changed := sampleSite()
		changed[name] = append([]byte("X"), changed[name]...)
		after := precacheVersion(changed, precacheList(changed))
		kept := slices.ContainsFunc(precacheList(files), func(f precacheFile) bool { return f.Path == name })
		if kept == (after == before) {
			t.Errorf("%s changed: version %s, before %s", name, after, before)
		}
	}
}

func TestZipHoldsEverythingButItself(t *testing.T) {
	files := sampleSite()
	for range 2 { // the second time there is a zip already
		if err := addZip(files); err != nil {
			t.Fatal(err)
		}
	}
	archive, err := zip.NewReader(bytes.NewReader(files[zipFile]), int64(len(files[zipFile])))
	if err != nil {
		t.Fatal(err)
	}
	for _, entry := range archive.File {
		r, err := entry.Open()
		if err != nil {
			t.Fatal(err)
		}
		content, err := io.ReadAll(r)
		if err != nil {
			t.Fatal(err)
		}
		name := entry.Name[len("hoopsheet/"):]
		if !bytes.Equal(content, files[name]) {
			t.Errorf("%s differs in the zip", entry.Name)
		}
	}
	if got, want := len(archive.File), len(sampleSite()); got != want {
		t.Errorf("%d files in the zip, want %d", got, want)
	}
	again := sampleSite()
	if err := addZip(again); err != nil || !bytes.Equal(again[zipFile], files[zipFile]) {
		t.Errorf("equal sites give unequal zips (%v)", err)
	}
}

func TestWriteReplacesTheWholeSite(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "site", "dist")
	for _, files := range []Output{{"old.html": nil, "assets/old.js": nil}, {"new.html": []byte("x"), "assets/new.js": nil}} {
		if err := files.write(dir); err != nil {
			t.Fatal(err)
		}
	}
	var found []string
	err := filepath.WalkDir(filepath.Dir(dir), func(file string, d os.DirEntry, err error) error {
		if err == nil && !d.IsDir() {
			name, _ := filepath.Rel(filepath.Dir(dir), file)
			found = append(found, filepath.ToSlash(name))
		}
		return err
	})
	if want := []string{"dist/assets/new.js", "dist/new.html"}; err != nil || !slices.Equal(found, want) {
		t.Errorf("got %q, %v, want %q", found, err, want)
	}
}

func TestGzipIsReproducible(t *testing.T) {
	raw := bytes.Repeat([]byte("\x00asm"), 1000)
	one, err := gzipped(raw)
	if err != nil {
		t.Fatal(err)
	}
	two, _ := gzipped(raw)
	if !bytes.Equal(one, two) || one[0] != 0x1f || one[1] != 0x8b {
		t.Errorf("%x and %x", one[:12], two[:12])
	}
	r, err := gzip.NewReader(bytes.NewReader(one))
	if err != nil {
		t.Fatal(err)
	}
	if back, err := io.ReadAll(r); err != nil || !bytes.Equal(back, raw) {
		t.Errorf("unpacked %d of %d bytes: %v", len(back), len(raw), err)
	}
}

func TestHashedName(t *testing.T) {
	a, b := hashedName("hoopsheet.bin", []byte("a")), hashedName("hoopsheet.bin", []byte("b"))
	if a == b || len(a) != len("hoopsheet-ABCDEFGH.bin") || filepath.Ext(a) != ".bin" {
		t.Errorf("got %s and %s", a, b)
	}
}

func TestIconShowsTheMark(t *testing.T) {
	files := Output{}
	if err := addIcons(files); err != nil {
		t.Fatal(err)
	}
	img, err := png.Decode(bytes.NewReader(files["icon-512.png"]))
	if err != nil {
		t.Fatal(err)
	}
	ink, paper := rgb(iconInk), rgb(iconPaper)
	for _, c := range []struct {
		name string
		x    float64 // on the horizontal axis of the mark, -16 to 16
		want [3]uint8
	}{{"hoop", markRadius, ink}, {"clamp", -clampCentre, ink}, {"inside the hoop, off the chord", -7, paper}, {"corner of the square", 20, paper}} {
		r, g, b, _ := img.At(int(256+c.x*iconMaskable*16), 256).RGBA()
		if got := [3]uint8{uint8(r >> 8), uint8(g >> 8), uint8(b >> 8)}; got != c.want {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
	}
}

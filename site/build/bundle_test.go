package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/evanw/esbuild/pkg/api"
)

// smallSite writes a site of a few files and returns a bundler over it.
func smallSite(t *testing.T, files map[string]string) *bundler {
	t.Helper()
	root := t.TempDir()
	for name, content := range files {
		file := filepath.Join(root, "site", filepath.FromSlash(name))
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(file, []byte(content), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	exec := filepath.Join(root, "go", "lib", "wasm", "wasm_exec.js")
	if err := os.MkdirAll(filepath.Dir(exec), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(exec, []byte("globalThis.Go = class {};"), 0o644); err != nil {
		t.Fatal(err)
	}
	return &bundler{
		site: siteAt(root), goRoot: filepath.Join(root, "go"), buildID: "cafe", wasmPath: "assets/hoopsheet-A.bin",
		pages: []*Page{{Name: "modes", Title: "Modes"}},
	}
}

var smallFiles = map[string]string{
	"styles/site.css":                  `@import "palette:page"; @import "./parts/a.css"; @font-face{font-family:F;src:url("font/f.woff2")}`,
	"styles/element.css":               `@import "palette:element"; @import "./parts/a.css";`,
	"styles/parts/a.css":               `.a { color: var(--ink) }`,
	"styles/palette.json":              `[{"name":"ink","light":"#111111","dark":"#eeeeee","sunlight":"#000000","print":"#000001"}]`,
	"node_modules/font/f.woff2":        "font bytes",
	"node_modules/font/package.json":   `{"name":"font","version":"1.2.3"}`,
	"node_modules/font/LICENSE":        "free <to> use",
	"node_modules/unused/package.json": `{"name":"unused","version":"1.0.0"}`,
	"src/hoopsheet.ts":                 `import text from '../styles/element.css'; export { buildId } from 'hoopsheet:build'; export const sheet = text;`,
	"src/shell/site.ts":                `import '../hoopsheet'; import { pages, scriptFiles, wasmFile } from 'hoopsheet:build'; console.log(pages[0].title, scriptFiles['engine'], wasmFile);`,
	"src/shell/early.ts":               `console.log('early');`,
	"src/shell/single-entry.ts":        `import 'hoopsheet:wasm_exec'; import { single } from 'hoopsheet:build'; console.log(single, '<!--');`,
	"src/engine/engine.worker.ts":      `import 'hoopsheet:wasm_exec'; import { buildId } from 'hoopsheet:build'; console.log('engine', buildId);`,
	"src/sw.ts":                        `import { files, version } from 'hoopsheet:precache'; console.log(version, files);`,
}

func TestStylesAndFonts(t *testing.T) {
	b, files := smallSite(t, smallFiles), Output{}
	sheet, err := b.styles(files, ".was-style-0{display:block math}\n")
	if err != nil {
		t.Fatal(err)
	}
	css := string(files[sheet])
	for _, want := range []string{"--hoop-ink:#111", ".a{color:var(--ink)}", ".was-style-0{display:block math}", "url(./f-"} {
		if !strings.Contains(strings.ReplaceAll(css, `"`, ""), want) {
			t.Errorf("the sheet lacks %s:\n%s", want, css)
		}
	}
	if err := checkLinks(files); err != nil || len(files) != 2 {
		t.Errorf("%d files, %v", len(files), err)
	}
	inline, err := b.sheet("site.css", "", api.LoaderDataURL)
	if err != nil {
		t.Fatal(err)
	}
	for _, content := range inline {
		if !strings.Contains(string(content), `url(data:font/woff2,font\ bytes)`) {
			t.Errorf("the font is not inside the sheet: %s", content)
		}
	}
}

func TestScriptsKnowEachOther(t *testing.T) {
	b, files := smallSite(t, smallFiles), Output{}
	scripts, err := b.scripts(files)
	if err != nil {
		t.Fatal(err)
	}
	worker := ""
	for _, name := range files.paths() {
		if strings.HasPrefix(name, "assets/engine-") {
			worker = name
		}
	}
	if code := string(files[worker]); !strings.Contains(code, "globalThis.Go") || !strings.Contains(code, "cafe") {
		t.Errorf("the worker %q lacks Go's loader or the build id: %s", worker, code)
	}
	var all string
	for _, name := range files.paths() {
		all += string(files[name])
	}
	if files[scripts.site] == nil {
		t.Errorf("no script %q for the pages", scripts.site)
	}
	for _, want := range []string{filepath.Base(worker), "hoopsheet-A.bin", "Modes"} {
		if !strings.Contains(all, want) {
			t.Errorf("the pages' scripts do not name %s: %s", want, all)
		}
	}
	stable := string(files["hoopsheet.js"])
	entry, _, _ := strings.Cut(strings.TrimPrefix(stable, "import './"), "'")
	if files[entry] == nil {
		t.Errorf("hoopsheet.js leads to %q, which is not there", entry)
	}
	if !strings.Contains(all, ":host{--ink:var(--hoop-ink,") {
		t.Error("the elements' sheet is not in the scripts as text")
	}
	if files[scripts.early] == nil {
		t.Error("no early script")
	}
}

func TestServiceWorkerListsTheSite(t *testing.T) {
	b, files := smallSite(t, smallFiles), sampleSite()
	delete(files, "sw.js")
	version := precacheVersion(files, precacheList(files))
	if err := b.serviceWorker(files); err != nil {
		t.Fatal(err)
	}
	code := string(files["sw.js"])
	for _, want := range []string{version, "assets/hoopsheet-A.bin", "index.html"} {
		if !strings.Contains(code, want) {
			t.Errorf("sw.js lacks %s", want)
		}
	}
	if strings.Contains(code, singleFile) {
		t.Error("sw.js lists the single file")
	}
}

func TestNoticesOfWhatIsShippedOnly(t *testing.T) {
	b, files := smallSite(t, smallFiles), Output{}
	if _, err := b.styles(files, ""); err != nil {
		t.Fatal(err)
	}
	packages := b.packages()
	if len(packages) != 1 || packages[0] != "font" {
		t.Fatalf("packages %q, want the font alone", packages)
	}
	text, err := licenceText(filepath.Join(b.site.root, "node_modules", "font"))
	if err != nil {
		t.Fatal(err)
	}
	html := noticesHTML([]notice{{"font", "1.2.3", "font", text}})
	if !strings.Contains(html, "<h2>font 1.2.3</h2>") || !strings.Contains(html, "free &lt;to&gt; use") {
		t.Errorf("got %s", html)
	}
	if _, err := licenceText(filepath.Join(b.site.root, "node_modules", "unused")); err == nil {
		t.Error("a package without a licence is let through")
	}
}

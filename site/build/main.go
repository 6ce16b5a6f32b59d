// Command build turns site/pages, site/src, site/styles and ./wasm into the static site in site/dist.
//
//	go run ./site/build [-out site/dist]
//
// It is run from anywhere inside the repository, after `npm ci` in site/. Everything is made in memory first and
// written at the end in one go, so a failed build leaves the last good site alone.
package main

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"time"
)

func main() {
	out := flag.String("out", "", "directory to write to (default: site/dist)")
	flag.Parse()
	started := time.Now()
	root, err := moduleRoot()
	if err == nil {
		if *out == "" {
			*out = filepath.Join(root, "site", "dist")
		}
		err = run(root, *out)
	}
	if err != nil {
		fmt.Fprintln(os.Stderr, "build:", err)
		os.Exit(1)
	}
	fmt.Printf("built %s in %.1f s\n", *out, time.Since(started).Seconds())
}

// run makes the whole site. The order is that of need: scripts name the wasm, pages name scripts and styles, the
// service worker lists all of these, the single file repeats them, the zip holds everything.
func run(root, out string) error {
	site := siteAt(root)
	files := Output{}

	goRoot, err := goEnv(root, "GOROOT")
	if err != nil {
		return err
	}
	id, err := buildID(root, goRoot)
	if err != nil {
		return err
	}
	wasm, err := buildWasm(root, id)
	if err != nil {
		return err
	}
	wasmPath := assetDir + "/" + hashedName("hoopsheet.bin", wasm)
	files[wasmPath] = wasm

	pages, err := loadPages(site)
	if err != nil {
		return err
	}
	classes := &styleClasses{}
	if err := renderPages(site, pages, classes); err != nil {
		return err
	}

	bundler := &bundler{site: site, goRoot: goRoot, buildID: id, wasmPath: wasmPath, pages: pages}
	css, err := bundler.styles(files, classes.css())
	if err != nil {
		return err
	}
	scripts, err := bundler.scripts(files)
	if err != nil {
		return err
	}
	if err := addIcons(files); err != nil {
		return err
	}
	files["defaults.json"] = []byte("{}\n")

	licences, err := licencePage(site, root, goRoot, bundler.packages())
	if err != nil {
		return err
	}
	pages = append(pages, licences)
	shell, err := newShell(site, pages, id)
	if err != nil {
		return err
	}
	for _, page := range pages {
		html, err := shell.hosted(page, css, scripts)
		if err != nil {
			return err
		}
		files[page.File()] = html
	}
	if err := bundler.serviceWorker(files); err != nil {
		return err
	}
	if err := addSingle(files, bundler, shell, classes.css()); err != nil {
		return err
	}
	if err := addZip(files); err != nil {
		return err
	}
	if err := checkLinks(files); err != nil {
		return err
	}
	if err := checkStrict(files); err != nil {
		return err
	}
	return files.write(out)
}

package main

import (
	"encoding/json"
	"fmt"
	"html"
	"os"
	"path/filepath"
	"slices"
	"strings"
)

// notice is the licence of one thing that is shipped.
type notice struct{ name, version, part, text string }

// licencePage gathers the licence files of everything in the site: the Go toolchain's library and wasm_exec.js, the
// Go modules linked into the wasm, the npm packages that esbuild took something from.
func licencePage(site siteDirs, root, goRoot string, packages []string) (*Page, error) {
	version, err := goEnv(root, "GOVERSION")
	if err != nil {
		return nil, err
	}
	text, err := licenceText(goRoot)
	if err != nil {
		return nil, err
	}
	list := []notice{{"Go", strings.TrimPrefix(version, "go"), "runtime and standard library of the calculating part", text}}

	linked, err := linkedPackages(root)
	if err != nil {
		return nil, err
	}
	seen := map[string]bool{}
	for _, pkg := range linked {
		if pkg.Module == nil || pkg.Module.Main || seen[pkg.Module.Path] {
			continue
		}
		seen[pkg.Module.Path] = true
		text, err := licenceText(pkg.Module.Dir)
		if err != nil {
			return nil, err
		}
		list = append(list, notice{pkg.Module.Path, pkg.Module.Version, "linked into the calculating part", text})
	}
	for _, name := range packages {
		dir := filepath.Join(site.root, "node_modules", filepath.FromSlash(name))
		raw, err := os.ReadFile(filepath.Join(dir, "package.json"))
		if err != nil {
			return nil, err
		}
		var about struct{ Version string }
		if err := json.Unmarshal(raw, &about); err != nil {
			return nil, fmt.Errorf("%s: %w", name, err)
		}
		text, err := licenceText(dir)
		if err != nil {
			return nil, err
		}
		part := "in the pages' script"
		if strings.HasPrefix(name, "@fontsource") {
			part = "font"
		}
		list = append(list, notice{name, about.Version, part, text})
	}
	return &Page{
		Name:  "licences",
		Title: "Licences",
		Lead:  "Hoopsheet is built on the work of others. These are the parts that are shipped in it, each with its notice in full.",
		Body:  noticesHTML(list),
	}, nil
}

// licenceText reads the licence file, and a NOTICE or PATENTS file beside it, of a package in dir.
func licenceText(dir string) (string, error) {
	entries, err := os.ReadDir(dir)
	if err != nil {
		return "", err
	}
	var parts []string
	licensed := false
	for _, entry := range entries {
		name, _, _ := strings.Cut(strings.ToUpper(entry.Name()), ".")
		isLicence := slices.Contains([]string{"LICENSE", "LICENCE", "COPYING"}, name)
		if entry.IsDir() || !isLicence && name != "NOTICE" && name != "PATENTS" {
			continue
		}
		raw, err := os.ReadFile(filepath.Join(dir, entry.Name()))
		if err != nil {
			return "", err
		}
		licensed = licensed || isLicence
		parts = append(parts, strings.TrimSpace(string(raw)))
	}
	if !licensed {
		return "", fmt.Errorf("%s holds no licence file, so it may not be shipped", filepath.Base(dir))
	}
	return strings.Join(parts, "\n\n"), nil
}

func noticesHTML(list []notice) string {
	var out strings.Builder
	for _, n := range list {
		fmt.Fprintf(&out, "<h2>%s %s</h2>\n<p>%s</p>\n<pre class=\"licence\" tabindex=\"0\">%s</pre>\n",
			html.EscapeString(n.name), html.EscapeString(n.version), html.EscapeString(n.part), html.EscapeString(n.text))
	}
	return out.String()
}

package main

import (
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"
	"strings"
)

// paletteColour is one colour of site/styles/palette.json in every theme.
type paletteColour struct {
	Name     string `json:"name"`
	Use      string `json:"use"`
	Light    string `json:"light"`
	Dark     string `json:"dark"`
	Sunlight string `json:"sunlight"`
	Print    string `json:"print"`
}

func loadPalette(site siteDirs) ([]paletteColour, error) {
	raw, err := os.ReadFile(filepath.Join(site.styles, "palette.json"))
	if err != nil {
		return nil, err
	}
	var list []paletteColour
	if err := json.Unmarshal(raw, &list); err != nil {
		return nil, fmt.Errorf("palette.json: %w", err)
	}
	return list, nil
}

// pagePalette is the palette of our own pages: --hoop-NAME by theme on the root, and --NAME from it. The theme is the
// root's data-theme (light, dark, sunlight); without it the device decides.
func pagePalette(list []paletteColour) string {
	set := func(scheme string, of func(paletteColour) string) string {
		var out strings.Builder
		fmt.Fprintf(&out, "color-scheme:%s;", scheme)
		for _, c := range list {
			fmt.Fprintf(&out, "--hoop-%s:%s;", c.Name, of(c))
		}
		return out.String()
	}
	light := set("light", func(c paletteColour) string { return c.Light })
	dark := set("dark", func(c paletteColour) string { return c.Dark })
	sunlight := set("light", func(c paletteColour) string { return c.Sunlight })
	print := set("light", func(c paletteColour) string { return c.Print })
	var out strings.Builder
	fmt.Fprintf(&out, ":root{%s", light)
	for _, c := range list {
		fmt.Fprintf(&out, "--%s:var(--hoop-%s);", c.Name, c.Name)
	}
	fmt.Fprintf(&out, "}\n@media (prefers-color-scheme:dark){:root:not([data-theme]){%s}}\n", dark)
	fmt.Fprintf(&out, "@media (prefers-color-scheme:light) and (prefers-contrast:more){:root:not([data-theme]){%s}}\n", sunlight)
	fmt.Fprintf(&out, ":root[data-theme=dark]{%s}\n:root[data-theme=sunlight]{%s}\n", dark, sunlight)
	fmt.Fprintf(&out, "@media print{:root,:root:not([data-theme]),:root[data-theme]{%s}}\n", print)
	return out.String()
}

// elementPalette is the palette inside an element: what the page says in --hoop-NAME (ours always does, a host page
// may), else the device's light or dark set.
func elementPalette(list []paletteColour) string {
	set := func(of func(paletteColour) string) string {
		var out strings.Builder
		for _, c := range list {
			fmt.Fprintf(&out, "--%s:var(--hoop-%s,%s);", c.Name, c.Name, of(c))
		}
		return out.String()
	}
	return fmt.Sprintf(":host{%s}\n@media (prefers-color-scheme:dark){:host{%s}}\n@media print{:host{%s}}\n",
		set(func(c paletteColour) string { return c.Light }),
		set(func(c paletteColour) string { return c.Dark }),
		set(func(c paletteColour) string { return c.Print }))
}

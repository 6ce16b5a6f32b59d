package main

import (
	"fmt"
	"io/fs"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

// luminance is the relative luminance of WCAG 2.2, "relative luminance".
func luminance(hex string) float64 {
	var sum float64
	for i, part := range rgb(hex) {
		c := float64(part) / 255
		if c <= 0.04045 {
			c /= 12.92
		} else {
			c = math.Pow((c+0.055)/1.055, 2.4)
		}
		sum += c * [3]float64{0.2126, 0.7152, 0.0722}[i]
	}
	return sum
}

// contrast is the contrast ratio of WCAG 2.2, from 1 to 21.
func contrast(a, b string) float64 {
	la, lb := luminance(a), luminance(b)
	return (math.Max(la, lb) + 0.05) / (math.Min(la, lb) + 0.05)
}

// WCAG 2.2 gives 21:1 for black on white; #777777 on white is the usual example of just too little, 4.48:1 (from
// memory: WebAIM's contrast page).
func TestContrastFormula(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want float64
	}{{"#000000", "#ffffff", 21}, {"#ffffff", "#ffffff", 1}, {"#777777", "#ffffff", 4.48}} {
		if got := contrast(c.a, c.b); math.Abs(got-c.want) > 0.005 {
			t.Errorf("%s on %s: %.3f, want %.2f", c.a, c.b, got, c.want)
		}
	}
}

func TestPaletteContrast(t *testing.T) {
	list := realPalette(t)
	themes := map[string]func(paletteColour) string{
		"light":    func(c paletteColour) string { return c.Light },
		"dark":     func(c paletteColour) string { return c.Dark },
		"sunlight": func(c paletteColour) string { return c.Sunlight },
		"print":    func(c paletteColour) string { return c.Print },
	}
	// WCAG 2.2, 1.4.3: text 4.5:1. 1.4.11: borders of fields and buttons, outlines 3:1. In direct sun text 7:1 (1.4.6).
	text := [][2]string{
		{"ink", "paper"}, {"ink", "panel"}, {"ink", "teal-wash"}, {"ink", "rust-wash"},
		{"soft", "paper"}, {"soft", "panel"}, {"soft", "teal-wash"}, {"soft", "rust-wash"},
		{"teal", "paper"}, {"teal", "panel"}, {"teal", "teal-wash"}, {"teal", "rust-wash"},
		{"rust", "paper"}, {"rust", "panel"}, {"rust", "rust-wash"}, {"rust", "teal-wash"},
		{"good", "paper"}, {"good", "panel"}, {"good", "teal-wash"},
		{"on-teal", "teal"}, {"panel", "rust"}, {"on-map", "up"},
	}
	lines := [][2]string{
		{"field", "paper"}, {"field", "panel"}, {"field", "teal-wash"}, {"focus", "paper"}, {"focus", "panel"},
		{"focus", "rust-wash"}, {"up", "panel"}, {"down", "panel"}, {"on-map", "down"},
	}
	for theme, of := range themes {
		colour := map[string]string{}
		for _, c := range list {
			colour[c.Name] = of(c)
		}
		check := func(pairs [][2]string, least float64) {
			for _, pair := range pairs {
				if got := contrast(colour[pair[0]], colour[pair[1]]); got < least {
					t.Errorf("%s: %s on %s is %.2f:1, want %.1f:1", theme, pair[0], pair[1], got, least)
				}
			}
		}
		if theme == "sunlight" {
			check(text[:4], 7)
			check(text[4:6], 7)
		}
		check(text, 4.5)
		if theme == "print" { // maps print as outlines: no area is filled
			check(lines[:6], 3)
		} else {
			check(lines, 3)
		}
	}
}

func realPalette(t *testing.T) []paletteColour {
	t.Helper()
	root, err := moduleRoot()
	if err != nil {
		t.Fatal(err)
	}
	list, err := loadPalette(siteAt(root))
	if err != nil {
		t.Fatal(err)
	}
	return list
}

func TestPaletteIsTheSameForPagesAndElements(t *testing.T) {
	list := realPalette(t)
	page, element := pagePalette(list), elementPalette(list)
	for _, c := range list {
		for _, want := range []string{
			fmt.Sprintf("--hoop-%s:%s;", c.Name, c.Light), fmt.Sprintf("--hoop-%s:%s;", c.Name, c.Dark),
			fmt.Sprintf("--%s:var(--hoop-%s);", c.Name, c.Name),
		} {
			if !strings.Contains(page, want) {
				t.Errorf("pages lack %s", want)
			}
		}
		for _, value := range []string{c.Light, c.Dark, c.Print} {
			if want := fmt.Sprintf("--%s:var(--hoop-%s,%s);", c.Name, c.Name, value); !strings.Contains(element, want) {
				t.Errorf("elements lack %s", want)
			}
		}
	}
}

var (
	variableUse  = regexp.MustCompile(`var\(\s*--([a-z0-9-]+)`)
	variableHere = regexp.MustCompile(`--([a-z0-9-]+)\s*:`)
)

// Every variable that a sheet or an element uses is one of the palette or declared somewhere.
func TestNoUnknownVariables(t *testing.T) {
	root, err := moduleRoot()
	if err != nil {
		t.Fatal(err)
	}
	known, used := map[string]bool{}, map[string]string{}
	for _, c := range realPalette(t) {
		known[c.Name] = true
	}
	for _, dir := range []string{siteAt(root).styles, siteAt(root).src} {
		err := filepath.WalkDir(dir, func(file string, d fs.DirEntry, err error) error {
			if err != nil || d.IsDir() {
				return err
			}
			raw, err := os.ReadFile(file)
			for _, match := range variableHere.FindAllSubmatch(raw, -1) {
				known[string(match[1])] = true
			}
			for _, match := range variableUse.FindAllSubmatch(raw, -1) {
				used[string(match[1])] = filepath.Base(file)
			}
			return err
		})
		if err != nil {
			t.Fatal(err)
		}
	}
	for name, file := range used {
		if !known[name] {
			t.Errorf("%s uses --%s, which nothing declares", file, name)
		}
	}
}

package main

import (
	"strings"
	"testing"
)

func TestBodyForTheSingleFile(t *testing.T) {
	pages := []*Page{{Name: "modes"}, {Name: "hand-over"}, {Name: "licences"}}
	for _, c := range []struct{ name, html, want string }{
		{"link to a page", `<a href="hand-over.html">x</a>`, `<a href="#hand-over">x</a>`},
		{"link to a place", `<a href="hand-over.html#what">x</a>`, `<a href="#hand-over--what">x</a>`},
		{"link on the page", `<a class="y" href="#what">x</a>`, `<a class="y" href="#modes--what">x</a>`},
		{"link to a source", `<a href="https://dlmf.nist.gov/10">x</a>`, `<a href="https://dlmf.nist.gov/10">x</a>`},
		{"download", `<a href="hoopsheet-site.zip" download>zip</a>`, `<a download>zip</a>`},
		{"ids", `<h2 id="a"><label for="b"><p aria-labelledby="c">`, `<h2 id="modes--a"><label for="modes--b"><p aria-labelledby="modes--c">`},
	} {
		got, err := singleBody(&Page{Name: "modes", Body: c.html}, pages)
		if err != nil || got != c.want {
			t.Errorf("%s: %s gives %s (%v), want %s", c.name, c.html, got, err, c.want)
		}
	}
	if _, err := singleBody(&Page{Name: "modes", Body: `<img src="x.png">`}, pages); err == nil {
		t.Error("a picture that the file would not carry is let through")
	}
}

func TestInlineScriptEndsWhereItShould(t *testing.T) {
	got := inlineScript("a = '<!--'; b = `<!--<script`;")
	if strings.Contains(got, "<!--") || !strings.Contains(got, `'<\x21--'`) {
		t.Errorf("got %s", got)
	}
}

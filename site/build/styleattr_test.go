package main

import (
	"strings"
	"testing"
)

func TestStyleAttributesBecomeClasses(t *testing.T) {
	for _, c := range []struct{ name, html, want string }{
		{"none", `<p class="a">x</p>`, `<p class="a">x</p>`},
		{"alone", `<mo style="math-depth:0;">x</mo>`, `<mo class="was-style-0">x</mo>`},
		{"after a class", `<math class="tml-display" style="display:block math;">`, `<math class="tml-display was-style-0">`},
		{"before a class", `<td style="a:b" id="i" class="c">`, `<td id="i" class="c was-style-0">`},
		{"single quotes", `<td style='a:b'>`, `<td class="was-style-0">`},
		{"no quotes", `<td style=a:b>`, `<td class="was-style-0">`},
		{"upper case", `<TD STYLE="a:b">`, `<TD class="was-style-0">`},
		{"a > in a value", `<td title="a > b" style="a:b">`, `<td title="a > b" class="was-style-0">`},
		{"empty", `<td style="">x`, `<td>x`},
		{"self-closing", `<mspace style="a:b"/>`, `<mspace class="was-style-0"/>`},
		{"across lines", "<td\n  style=\"a:b\"\n>", "<td class=\"was-style-0\"\n>"},
		{"the same twice", `<i style="a:b"></i><b style="a:b;"></b>`, `<i class="was-style-0"></i><b class="was-style-0"></b>`},
		{"in text", `a < b style="c" > d`, `a < b style="c" > d`},
		{"in a comment", `<!-- <i style="a:b"> -->`, `<!-- <i style="a:b"> -->`},
		{"in a script", `<script>"<i style='a:b'>"</script><i style="a:b">`, `<script>"<i style='a:b'>"</script><i class="was-style-0">`},
		{"another attribute's name", `<i data-style="a:b">`, `<i data-style="a:b">`},
	} {
		if got := (&styleClasses{}).strip(c.html); got != c.want {
			t.Errorf("%s: %s gives\n%s, want\n%s", c.name, c.html, got, c.want)
		}
	}
}

func TestClassesKeepTheDeclarations(t *testing.T) {
	classes := &styleClasses{}
	classes.strip(`<i style="display:block math;"><b style="padding-left:1em;padding-right:0em;">`)
	want := ".was-style-0{display:block math}\n.was-style-1{padding-left:1em;padding-right:0em}\n"
	if got := classes.css(); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
	if strings.Contains(classes.strip(`<i style="a:b">`), "was-style-1") {
		t.Error("a new declaration got an old class")
	}
}

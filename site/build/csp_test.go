package main

import (
	"os"
	"strings"
	"testing"
)

// The example of Content Security Policy Level 2, section 7.17.2 (and Level 3, section 6.7.3.3): the script
// alert('Hello, world.'); and its hash source.
func TestScriptHashAgainstTheStandard(t *testing.T) {
	const want = "'sha256-qznLcsROx4GACP2dm0UCKCzCG+HiZ1guq6ZZDob/Tng='"
	if got := scriptHash("alert('Hello, world.');"); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
}

func TestSinglePolicyAllowsItsScriptsOnly(t *testing.T) {
	policy := singlePolicy("first()", "second()")
	for _, script := range []string{"first()", "second()"} {
		if !strings.Contains(policy, scriptHash(script)) {
			t.Errorf("%s is not allowed by %s", script, policy)
		}
	}
	for _, directive := range strings.Split(policy, "; ") {
		name, sources, _ := strings.Cut(directive, " ")
		if name == "script-src" && (strings.Contains(sources, "unsafe-inline") || strings.Contains(sources, "'unsafe-eval'")) {
			t.Errorf("%s allows any script", directive)
		}
		if strings.Contains(sources, "http") || strings.Contains(sources, "*") {
			t.Errorf("%s reaches a network", directive)
		}
	}
}

func TestStrictness(t *testing.T) {
	for _, c := range []struct{ name, file, html, want string }{
		{"external script", "a.html", `<script src="x.js"></script>`, ""},
		{"inline script", "a.html", `<script>x()</script>`, "is inline"},
		{"inline sheet", "a.html", `<style>a{}</style>`, "is inline"},
		{"inline in the single file", singleFile, `<script>x()</script><style>a{}</style>`, ""},
		{"style attribute", "a.html", `<p style="a:b">`, "has the attribute style"},
		{"style attribute in the single file", singleFile, `<p style="a:b">`, "has the attribute style"},
		{"handler", "a.html", `<p onclick="x()">`, "has the attribute onclick"},
		{"code that shows a handler", "a.html", `<code>&lt;p onclick="x()"&gt;</code>`, ""},
	} {
		checkOne(t, c.name, checkStrict(Output{c.file: []byte(c.html)}), c.want)
	}
}

// The Hosting page repeats the policy for those who send it as a header.
func TestHostingPageStatesThePolicy(t *testing.T) {
	root, err := moduleRoot()
	if err != nil {
		t.Fatal(err)
	}
	page, err := os.ReadFile(siteAt(root).pages + "/hosting.md")
	if err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(string(page), "\nContent-Security-Policy: "+hostedPolicy+"\n") {
		t.Errorf("hosting.md does not state %s", hostedPolicy)
	}
}

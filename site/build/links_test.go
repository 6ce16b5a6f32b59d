package main

import (
	"strings"
	"testing"
)

func TestLinks(t *testing.T) {
	for _, c := range []struct{ name, html, want string }{
		{"a page", `<a href="modes.html">`, ""},
		{"a page with a dot", `<a href="./modes.html">`, ""},
		{"a place", `<a href="modes.html#table">`, ""},
		{"a place on this page", `<a href="#here"><h2 id="here">`, ""},
		{"an asset", `<script src="assets/site.js">`, ""},
		{"a source elsewhere, to be clicked", `<a href="https://dlmf.nist.gov/10">`, ""},
		{"data", `<link href="data:image/svg+xml;base64,AA">`, ""},
		{"no such page", `<a href="mode.html">`, "leads to no file"},
		{"no such place", `<a href="modes.html#tables">`, "leads to no place"},
		{"no such place here", `<a href="#there">`, "leads to no place"},
		{"root of the server", `<a href="/modes.html">`, "begins at the root"},
		{"another server's script", `<script src="https://example.org/x.js">`, "would leave the site"},
		{"another server by two slashes", `<img src="//example.org/x.png">`, "would leave the site"},
		{"plain http", `<a href="http://example.org/">`, "would leave the site"},
		{"out of the directory", `<a href="../index.html">`, "leads to no file"},
	} {
		files := Output{
			"index.html": []byte(c.html), "modes.html": []byte(`<h2 id="table">`), "assets/site.js": nil,
		}
		checkOne(t, c.name, checkLinks(files), c.want)
	}
}

func TestLinksInSheets(t *testing.T) {
	for _, c := range []struct{ name, css, want string }{
		{"beside it", `src:url("./serif.woff2")`, ""},
		{"without quotes", `src:url(serif.woff2)`, ""},
		{"missing", `src:url(sans.woff2)`, "leads to no file"},
		{"another server", `src:url(https://example.org/serif.woff2)`, "would leave the site"},
	} {
		files := Output{"assets/site.css": []byte(c.css), "assets/serif.woff2": nil}
		checkOne(t, c.name, checkLinks(files), c.want)
	}
}

func checkOne(t *testing.T, name string, err error, want string) {
	t.Helper()
	switch {
	case want == "" && err != nil:
		t.Errorf("%s: %v", name, err)
	case want != "" && (err == nil || !strings.Contains(err.Error(), want)):
		t.Errorf("%s: got %v, want %q", name, err, want)
	}
}

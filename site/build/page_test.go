package main

import (
	"bytes"
	"strings"
	"testing"
)

// rendered is a page's HTML without its math set.
func rendered(t *testing.T, source string, read func(string) ([]byte, error)) string {
	t.Helper()
	page, err := parsePage("test", []byte("---\ntitle: Title\nlead: Lead\n---\n"+source), read)
	if err != nil {
		t.Fatal(err)
	}
	var out bytes.Buffer
	if err := markdown.Renderer().Render(&out, page.source, page.doc); err != nil {
		t.Fatal(err)
	}
	return scrollable((&styleClasses{}).strip(out.String()))
}

func TestMarkdownOfThePages(t *testing.T) {
	for _, c := range []struct{ name, source, want string }{
		{"an element stands outside paragraphs", "<hoop-modes></hoop-modes>\n", "<hoop-modes></hoop-modes>\n"},
		{"an element beside words does not", "see <b>x</b>\n", "<p>see <b>x</b></p>\n"},
		{"a numbers' column by attribute", "| a |\n| --: |\n| 1 |\n", `<td align="right">1</td>`},
		{"a table scrolls by itself", "| a |\n| --- |\n| 1 |\n", `<div class="table-scroll" tabindex="0" role="region" aria-label="Table"><table>`},
		{"code scrolls by keyboard", "```\nx\n```\n", `<pre tabindex="0"><code>`},
		{"a caution has its word and title", "::: caution Stored energy\nMind *it*.\n:::\n\nAfter.\n",
			"Caution: Stored energy</p>\n<p>Mind <em>it</em>.</p>\n</div>\n<p>After.</p>"},
		{"a note without title", "::: note\nText.\n:::\n", "Note</p>\n<p>Text.</p>\n</div>"},
		{"a panel", "::: panel Two & three\nText.\n:::\n", "<section class=\"panel\">\n<h2>Two &amp; three</h2>\n<p>Text.</p>\n</section>"},
		{"an unknown kind stays text", "::: danger\nText.\n:::\n", "<p>::: danger"},
		{"dashes", "now -- then\n", "<p>now – then</p>"},
	} {
		if got := rendered(t, c.source, nothingToInclude); !strings.Contains(got, c.want) {
			t.Errorf("%s: %q gives\n%s\nwithout\n%s", c.name, c.source, got, c.want)
		}
	}
}

func TestIncludedFileIsMarkdown(t *testing.T) {
	read := func(file string) ([]byte, error) { return []byte("## From " + file + "\n"), nil }
	got := rendered(t, "Before.\n\n@include generated/calls.md\n", read)
	if !strings.Contains(got, `<h2 id="from-generatedcallsmd">From generated/calls.md</h2>`) {
		t.Errorf("got %s", got)
	}
	if _, err := parsePage("test", []byte("---\ntitle: T\nlead: L\n---\n@include gone.md\n"), nothingToInclude); err == nil {
		t.Error("a missing include is not reported")
	}
}

func TestHeadOfAPage(t *testing.T) {
	for _, c := range []struct{ source, want string }{
		{"# Title\n", "begins with a line ---"},
		{"---\ntitle: T\nlead: L\n", "that ends the head is missing"},
		{"---\ntitle: T\n---\n", "needs both title: and lead:"},
		{"---\ntitle: T\nlead: L\nauthor: A\n---\n", `unknown line "author"`},
	} {
		if _, err := parsePage("test", []byte(c.source), nothingToInclude); err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%q: got %v, want %q", c.source, err, c.want)
		}
	}
	page, err := parsePage("test", []byte("---\ntitle: A: b\nlead: The ring's -- all of it\n---\n"), nothingToInclude)
	if err != nil || page.Title != "A: b" || page.Lead != "The ring’s – all of it" {
		t.Errorf("got %+v, %v", page, err)
	}
}

// TestEveryPage holds what must be true of every page of the site, on the real pages and templates.
func TestEveryPage(t *testing.T) {
	root, err := moduleRoot()
	if err != nil {
		t.Fatal(err)
	}
	site := siteAt(root)
	pages, err := loadPages(site)
	if err != nil {
		t.Fatal(err)
	}
	shell, err := newShell(site, pages, "0123456789ab")
	if err != nil {
		t.Fatal(err)
	}
	for _, page := range pages {
		page.Body = rendered(t, string(page.source), nothingToInclude)
		raw, err := shell.hosted(page, "assets/site.css", hostedScripts{early: "assets/early.js", site: "assets/site.js"})
		if err != nil {
			t.Fatal(err)
		}
		html := string(raw)
		if err := checkStrict(Output{page.File(): raw}); err != nil {
			t.Error(err)
		}
		for what, want := range map[string]int{
			"<h1>": 1, "<h1 ": 0, `lang="en-GB"`: 1, `<a class="skip" href="#content">`: 1, `id="content"`: 1,
			`aria-current="page"`: 1, `<a href="` + page.File() + `" aria-current="page">`: 1,
			"<title>" + page.Title + " - Hoopsheet</title>": 1, `data-build="0123456789ab"`: 1,
			"<hoop-bar></hoop-bar>": 1, `http-equiv="Content-Security-Policy"`: 1,
		} {
			if got := strings.Count(html, what); got != want {
				t.Errorf("%s: %s stands there %d times, want %d", page.File(), what, got, want)
			}
		}
	}
}

package main

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strings"

	"github.com/yuin/goldmark"
	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/extension"
	"github.com/yuin/goldmark/parser"
	"github.com/yuin/goldmark/renderer"
	"github.com/yuin/goldmark/renderer/html"
	"github.com/yuin/goldmark/text"
	"github.com/yuin/goldmark/util"
)

// Page is one page of the site.
type Page struct {
	Name  string // file name without extension
	Title string // h1, and the name in the chapter list
	Lead  string // one or two sentences under the title, also the description
	Group string // heading in the chapter list it stands under; "" for the first entry
	Tool  bool   // a page with a calculator: full width

	source []byte   // Markdown
	doc    ast.Node // parsed source
	Body   string   // finished HTML
}

// File is the page's file name.
func (p *Page) File() string { return p.Name + ".html" }

// loadPages reads and parses every page of the chapter list, and complains of Markdown files that no chapter names.
func loadPages(site siteDirs) ([]*Page, error) {
	var pages []*Page
	known := map[string]bool{}
	for _, group := range chapters {
		for _, name := range group.pages {
			raw, err := os.ReadFile(filepath.Join(site.pages, name+".md"))
			if err != nil {
				return nil, err
			}
			page, err := parsePage(name, raw, func(file string) ([]byte, error) {
				return os.ReadFile(filepath.Join(site.pages, filepath.FromSlash(file)))
			})
			if err != nil {
				return nil, fmt.Errorf("%s.md: %w", name, err)
			}
			page.Group = group.title
			pages = append(pages, page)
			known[name+".md"] = true
		}
	}
	found, err := filepath.Glob(filepath.Join(site.pages, "*.md"))
	if err != nil {
		return nil, err
	}
	for _, file := range found {
		if !known[filepath.Base(file)] {
			return nil, fmt.Errorf("%s stands in no chapter: add it to chapters.go or move it to a sub-directory", filepath.Base(file))
		}
	}
	return pages, nil
}

var includeLine = regexp.MustCompile(`(?m)^@include (\S+)$`)

// parsePage splits the head off, resolves "@include FILE" lines (files that commands generate, relative to pages/)
// and parses the Markdown.
func parsePage(name string, raw []byte, read func(string) ([]byte, error)) (*Page, error) {
	page := &Page{Name: name}
	body, err := page.readHead(string(raw))
	if err != nil {
		return nil, err
	}
	var failed error
	body = includeLine.ReplaceAllStringFunc(body, func(line string) string {
		included, err := read(includeLine.FindStringSubmatch(line)[1])
		if err != nil {
			failed = err
		}
		return string(included)
	})
	if failed != nil {
		return nil, failed
	}
	page.source = []byte(body)
	page.doc = markdown.Parser().Parse(text.NewReader(page.source))
	page.Tool = strings.Contains(body, "<hoop-")
	return page, nil
}

// readHead reads the lines "key: value" between the two "---" lines, and returns the rest.
func (p *Page) readHead(raw string) (string, error) {
	rest, ok := strings.CutPrefix(raw, "---\n")
	if !ok {
		return "", fmt.Errorf("a page begins with a line ---, then title: and lead:, then ---")
	}
	head, body, ok := strings.Cut(rest, "\n---\n")
	if !ok {
		return "", fmt.Errorf("the line --- that ends the head is missing")
	}
	for line := range strings.Lines(head) {
		key, value, _ := strings.Cut(strings.TrimSpace(line), ":")
		value = strings.TrimSpace(value)
		switch key {
		case "title":
			p.Title = value
		case "lead":
			p.Lead = strings.NewReplacer("--", "–", "'", "’").Replace(value)
		default:
			return "", fmt.Errorf("unknown line %q in the head: title and lead are known", key)
		}
	}
	if p.Title == "" || p.Lead == "" {
		return "", fmt.Errorf("the head needs both title: and lead:")
	}
	return body, nil
}

// markdown is the dialect of the pages: GitHub tables, math in dollars, "::: caution" blocks, raw HTML.
var markdown = goldmark.New(
	goldmark.WithExtensions(
		extension.NewTable(extension.WithTableCellAlignMethod(extension.TableCellAlignAttribute)),
		extension.DefinitionList,
		extension.NewTypographer(extension.WithTypographicSubstitutions(extension.TypographicSubstitutions{
			extension.LeftDoubleQuote: []byte("“"), extension.RightDoubleQuote: []byte("”"),
			extension.LeftSingleQuote: []byte("‘"), extension.RightSingleQuote: []byte("’"),
			extension.Apostrophe: []byte("’"), extension.EnDash: []byte("–"), extension.EmDash: []byte("—"), extension.Ellipsis: []byte("…"),
		})),
		mathExtension{}, noteExtension{},
	),
	goldmark.WithParserOptions(parser.WithAutoHeadingID()),
	goldmark.WithRendererOptions(html.WithUnsafe(), renderer.WithNodeRenderers(util.Prioritized(tagParagraphs{}, 100))),
)

// renderPages sets every math expression of every page in one go, then renders all pages.
func renderPages(site siteDirs, pages []*Page, classes *styleClasses) error {
	if err := setMath(site, pages); err != nil {
		return err
	}
	for _, page := range pages {
		var out bytes.Buffer
		if err := markdown.Renderer().Render(&out, page.source, page.doc); err != nil {
			return fmt.Errorf("%s.md: %w", page.Name, err)
		}
		page.Body = scrollable(classes.strip(out.String()))
	}
	return nil
}

// tagParagraphs renders a paragraph that holds nothing but tags, such as <hoop-modes></hoop-modes> on a line of its
// own, without a <p> around them.
type tagParagraphs struct{}

func (tagParagraphs) RegisterFuncs(reg renderer.NodeRendererFuncRegisterer) {
	reg.Register(ast.KindParagraph, func(w util.BufWriter, _ []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
		open, close := "<p>", "</p>\n"
		if onlyTags(n) {
			open, close = "", "\n"
		}
		if entering {
			_, _ = w.WriteString(open)
		} else {
			_, _ = w.WriteString(close)
		}
		return ast.WalkContinue, nil
	})
}

func onlyTags(n ast.Node) bool {
	for c := n.FirstChild(); c != nil; c = c.NextSibling() {
		if c.Kind() != ast.KindRawHTML {
			return false
		}
	}
	return n.HasChildren()
}

var tableTag = regexp.MustCompile(`(?s)<table>.*?</table>`)

// scrollable lets what may be too wide - tables, code - scroll sideways by itself, by keyboard too.
func scrollable(html string) string {
	html = strings.ReplaceAll(html, "<pre>", `<pre tabindex="0">`)
	return tableTag.ReplaceAllStringFunc(html, func(table string) string {
		return `<div class="table-scroll" tabindex="0" role="region" aria-label="Table">` + table + `</div>`
	})
}

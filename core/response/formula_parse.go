package response

import (
	"strconv"
	"strings"
)

// Compile reads a formula:
//
//	sum     = product { ("+" | "-") product }
//	product = signed { ("*" | "/") signed }
//	signed  = { "-" | "+" } power
//	power   = value [ "^" signed ]
//	value   = number | name | function "(" sum { "," sum } ")" | "(" sum ")"
//
// so -x^2 is -(x^2) and 2^3^2 is 2^(3^2). The signs · × − θ π are read as well.
// A product needs its sign: 2*r, not 2r. The error, where there is one, is a
// *FormulaError.
func Compile(text string) (*Formula, error) {
	p := &parser{text: text}
	if len(text) > mostFormula {
		return nil, p.fail(0, "The formula has "+strconv.Itoa(len(text))+" characters; at most "+strconv.Itoa(mostFormula)+" are read.")
	}
	if strings.TrimSpace(text) == "" {
		return nil, p.fail(0, "The formula is empty. Write one in r, theta, x and y, such as (1 - r^2)*cos(2*theta).")
	}
	p.advance()
	p.sum()
	if p.err == nil && p.token.kind != tokenEnd {
		p.unexpected()
	}
	if p.err != nil {
		return nil, p.err
	}
	return &Formula{code: p.code, height: p.highest, length: 1}, nil
}

// parser holds the next token, the code so far and the first error; once there
// is an error every method returns at once.
type parser struct {
	text  string
	at    int // byte after token
	token token
	depth int
	code  []instruction
	err   error

	height, highest int // of the stack of the evaluation
}

//go:noinline
func (p *parser) fail(at int, message string) error {
	if p.err == nil {
		p.err = &FormulaError{Offset: utf16Offset(p.text, at), Message: message}
	}
	return p.err
}

func (p *parser) number(value float64) {
	p.push(instruction{op: opNumber, value: value})
}

// push emits an instruction that adds a value to the stack.
func (p *parser) push(step instruction) {
	p.code = append(p.code, step)
	p.height++
	p.highest = max(p.highest, p.height)
}

// emit appends an operation on one or two values.
func (p *parser) emit(op opcode) {
	p.code = append(p.code, instruction{op: op})
	if op.binary() {
		p.height--
	}
}

// enter counts the nesting; it is called by every rule that recurs.
func (p *parser) enter() bool {
	p.depth++
	if p.depth > mostDepth {
		p.fail(p.token.at, "The formula is nested too deeply; at most "+strconv.Itoa(mostDepth)+" brackets, signs and powers may stand inside one another.")
	}
	return p.err == nil
}

func (p *parser) sum() {
	p.product()
	for p.err == nil && (p.token.is("+") || p.token.is("-")) {
		op := opAdd
		if p.token.is("-") {
			op = opSubtract
		}
		p.advance()
		p.product()
		p.emit(op)
	}
}

func (p *parser) product() {
	p.signed()
	for p.err == nil && (p.token.is("*") || p.token.is("/")) {
		op := opMultiply
		if p.token.is("/") {
			op = opDivide
		}
		p.advance()
		p.signed()
		p.emit(op)
	}
	if p.err == nil && p.token.starts() {
		p.missingSign()
	}
}

func (p *parser) signed() {
	negate := false
	for p.err == nil && (p.token.is("-") || p.token.is("+")) {
		negate = negate != p.token.is("-")
		p.advance()
	}
	p.power()
	if negate {
		p.emit(opNegate)
	}
}

func (p *parser) power() {
	p.value()
	if p.err == nil && p.token.is("^") {
		p.advance()
		if p.enter() {
			p.signed()
		}
		p.depth--
		p.emit(opPower)
	}
}

func (p *parser) value() {
	if p.err != nil {
		return
	}
	switch t := p.token; {
	case t.kind == tokenNumber:
		p.number(t.value)
		p.advance()
	case t.kind == tokenName:
		p.advance()
		p.name(t)
	case t.is("("):
		p.advance()
		if p.enter() {
			p.sum()
		}
		p.depth--
		p.closing(t)
	default:
		p.unexpected()
	}
}

// name reads a variable, a constant or a call; the name itself has been taken.
func (p *parser) name(t token) {
	called := p.token.is("(")
	if v := valueNamed(t.text); v != nil {
		if v.op == opNumber {
			p.number(v.number)
		} else {
			p.push(instruction{op: v.op})
		}
		return
	}
	f := functionNamed(t.text)
	switch {
	case f == nil:
		p.fail(t.at, unknownName(t.text, called))
	case !called:
		p.fail(t.at, t.text+" is a function; write its value in brackets, as in "+t.text+"("+exampleValues(*f)+").")
	default:
		p.call(t, *f)
	}
}

func (p *parser) call(name token, f function) {
	opening := p.token
	p.advance()
	count := 0
	if p.err == nil && !p.token.is(")") {
		if p.enter() {
			p.sum()
			count++
			for p.err == nil && p.token.is(",") {
				p.advance()
				p.sum()
				count++
				if f.most < 0 && count >= 2 {
					p.emit(f.op)
				}
			}
		}
		p.depth--
	}
	p.closing(opening)
	if p.err != nil {
		return
	}
	if count < f.least || f.most >= 0 && count > f.most {
		message := name.text + " takes " + takes(f) + ", and here it has " + strconv.Itoa(count) + "."
		if count > f.least {
			message += " Decimals are written with a point, as in 1.5."
		}
		p.fail(name.at, message)
		return
	}
	if f.most >= 0 {
		p.emit(f.op)
	}
}

func takes(f function) string {
	switch {
	case f.most < 0:
		return "two values or more"
	case f.least == 1:
		return "one value"
	}
	return "two values"
}

func exampleValues(f function) string {
	if f.least == 1 {
		return "r"
	}
	return "x, y"
}

// closing takes the bracket that belongs to the opening one.
func (p *parser) closing(opening token) {
	switch {
	case p.err != nil:
	case p.token.is(")"):
		p.advance()
	case p.token.kind == tokenEnd:
		p.fail(opening.at, "This bracket is not closed.")
	default:
		p.unexpected()
	}
}

// missingSign refuses two values side by side.
func (p *parser) missingSign() {
	what := p.token.text
	if p.token.is("(") {
		what = "the bracket"
	}
	p.fail(p.token.at, "A sign is missing before "+what+". Write products with *, as in 2*r or r*(1 - r).")
}

// unexpected refuses the token at hand.
func (p *parser) unexpected() {
	t := p.token
	switch {
	case t.kind == tokenEnd:
		p.fail(t.at, "The formula ends where a value is expected.")
	case t.is(")") && p.depth > 0:
		p.fail(t.at, "A value is expected before this bracket.")
	case t.is(")"):
		p.fail(t.at, "This bracket closes nothing.")
	case t.is(","):
		p.fail(t.at, "A comma stands only between the values of a function. Decimals are written with a point, as in 1.5.")
	case t.is("*"):
		p.fail(t.at, "A value is expected before *. A power is written with ^, as in r^2.")
	default:
		p.fail(t.at, "A value is expected in place of "+t.text+".")
	}
}

package response

import (
	"math"
	"unicode/utf16"
)

// Formula is a compiled formula in r, theta, x and y, rho, X and Y. It may be used by
// several goroutines at once.
type Formula struct {
	code   []instruction
	height int // of the stack
	// length is the ring radius, m, for rho, X and Y.
	length float64
}

// FormulaError is why a formula was not read.
type FormulaError struct {
	// Offset of the first offending character, in UTF-16 units.
	Offset int
	// Message is a sentence.
	Message string
}

// Error returns the sentence.
func (e *FormulaError) Error() string { return e.Message }

const (
	// mostFormula is the longest formula read, in bytes.
	mostFormula = 1000
	// mostDepth bounds the nesting of a formula and with it the depth of the
	// parser's recursion and the stack of the evaluation.
	mostDepth = 50
	// stackSize holds the values of a formula of that depth: every level can
	// keep at most three waiting, one for each of +, * and ^, or one for the
	// first value of a function.
	stackSize = 4*mostDepth + 8
)

// shortStack holds the values of nearly every formula that people write, and
// is cleared faster.
type shortStack [16]float64

// instruction is one step of the stack machine.
type instruction struct {
	op    opcode
	value float64 // of opNumber
}

type opcode uint8

const (
	opNumber opcode = iota
	opR
	opTheta
	opX
	opY
	opRho
	opLongX
	opLongY
	opAdd
	opSubtract
	opMultiply
	opDivide
	opPower
	opAtan2
	opMin
	opMax
	opHypot
	opNegate
	opSin
	opCos
	opTan
	opAsin
	opAcos
	opAtan
	opSqrt
	opExp
	opLn
	opLog10
	opAbs
	opSign
	opStep
)

// binary reports whether the operation takes two values.
func (op opcode) binary() bool { return op >= opAdd && op <= opHypot }

// At evaluates the formula at radius r (in units of the ring radius) and angle
// theta (rad); x = r cos theta and y = r sin theta, and rho, X and Y are r, x and y
// times the radius of the ring, one metre unless it is that of a case. The result may be infinite
// or NaN, where the formula has no value. It does not allocate.
func (f *Formula) At(r, theta float64) float64 {
	sin, cos := math.Sincos(theta)
	return f.at(r, theta, r*cos, r*sin)
}

func (f *Formula) at(r, theta, x, y float64) float64 {
	if f.height <= len(shortStack{}) {
		var stack shortStack
		return f.run(stack[:], r, theta, x, y)
	}
	var stack [stackSize]float64
	return f.run(stack[:], r, theta, x, y)
}

func (f *Formula) run(stack []float64, r, theta, x, y float64) float64 {
	top := -1
	for i := range f.code {
		step := &f.code[i]
		switch step.op {
		case opNumber:
			top++
			stack[top] = step.value
		case opR:
			top++
			stack[top] = r
		case opTheta:
			top++
			stack[top] = theta
		case opX:
			top++
			stack[top] = x
		case opY:
			top++
			stack[top] = y
		case opRho:
			top++
			stack[top] = r * f.length
		case opLongX:
			top++
			stack[top] = x * f.length
		case opLongY:
			top++
			stack[top] = y * f.length
		default:
			if step.op.binary() {
				top--
				stack[top] = binary(step.op, stack[top], stack[top+1])
			} else {
				stack[top] = unary(step.op, stack[top])
			}
		}
	}
	return stack[0]
}

func binary(op opcode, a, b float64) float64 {
	switch op {
	case opAdd:
		return a + b
	case opSubtract:
		return a - b
	case opMultiply:
		return a * b
	case opDivide:
		return a / b
	case opPower:
		if b == 2 {
			return a * a
		}
		return math.Pow(a, b)
	case opAtan2:
		return math.Atan2(a, b)
	case opMin:
		return math.Min(a, b)
	case opMax:
		return math.Max(a, b)
	case opHypot:
		return math.Hypot(a, b)
	}
	panic("response: unknown binary operation")
}

func unary(op opcode, a float64) float64 {
	switch op {
	case opNegate:
		return -a
	case opSin:
		return math.Sin(a)
	case opCos:
		return math.Cos(a)
	case opTan:
		return math.Tan(a)
	case opAsin:
		return math.Asin(a)
	case opAcos:
		return math.Acos(a)
	case opAtan:
		return math.Atan(a)
	case opSqrt:
		return math.Sqrt(a)
	case opExp:
		return math.Exp(a)
	case opLn:
		return math.Log(a)
	case opLog10:
		return math.Log10(a)
	case opAbs:
		return math.Abs(a)
	case opSign:
		switch {
		case a > 0:
			return 1
		case a < 0:
			return -1
		}
		return a // 0 and NaN
	case opStep:
		switch {
		case a >= 0:
			return 1
		case a < 0:
			return 0
		}
		return a // NaN
	}
	panic("response: unknown function")
}

// utf16Offset converts a place in bytes to UTF-16 units; bytes that are no
// UTF-8 count as one unit each, as a browser shows them.
//
//go:noinline
func utf16Offset(text string, bytes int) int {
	units := 0
	for _, r := range text[:bytes] {
		units += max(1, utf16.RuneLen(r))
	}
	return units
}

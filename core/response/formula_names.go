package response

import "math"

// function is a function that a formula may call.
type function struct {
	name string
	op   opcode
	// values it takes; most < 0 for any number from least.
	least, most int
}

// The names are in tables without keys, which need no code to set up.
var functions = [...]function{
	{"sin", opSin, 1, 1},
	{"cos", opCos, 1, 1},
	{"tan", opTan, 1, 1},
	{"asin", opAsin, 1, 1},
	{"acos", opAcos, 1, 1},
	{"atan", opAtan, 1, 1},
	{"atan2", opAtan2, 2, 2},
	{"sqrt", opSqrt, 1, 1},
	{"exp", opExp, 1, 1},
	{"ln", opLn, 1, 1},
	{"log10", opLog10, 1, 1},
	{"abs", opAbs, 1, 1},
	{"min", opMin, 2, -1},
	{"max", opMax, 2, -1},
	{"sign", opSign, 1, 1},
	{"step", opStep, 1, 1},
	{"pow", opPower, 2, 2},
	{"hypot", opHypot, 2, 2},
}

// value is a variable, or a constant with its number.
type value struct {
	name   string
	op     opcode
	number float64
}

var values = [...]value{
	{"r", opR, 0},
	{"theta", opTheta, 0},
	{"θ", opTheta, 0},
	{"x", opX, 0},
	{"y", opY, 0},
	{"rho", opRho, 0},
	{"X", opLongX, 0},
	{"Y", opLongY, 0},
	{"pi", opNumber, math.Pi},
	{"π", opNumber, math.Pi},
	{"e", opNumber, math.E},
}

// otherNames are names that people may expect, with what to write instead.
var otherNames = [...][2]string{
	{"log", "There is no function named \"log\", which is read in two ways; use ln for the natural logarithm or log10."},
	{"lg", "There is no function named \"lg\"; use log10."},
	{"arcsin", "There is no function named \"arcsin\"; use asin."},
	{"arccos", "There is no function named \"arccos\"; use acos."},
	{"arctan", "There is no function named \"arctan\"; use atan or atan2."},
	{"phi", "There is no \"phi\" in a formula; the angle is named theta."},
	{"φ", "There is no \"φ\" in a formula; the angle is named theta."},
	{"t", "There is no \"t\" in a formula: it gives the shape at the start, which has no time in it."},
	{"a", "There is no \"a\" in a formula: r, x and y are in units of the ring radius already, and rho, X and Y in metres."},
}

// functionNamed and valueNamed return nil where there is none.
func functionNamed(name string) *function {
	for i := range functions {
		if functions[i].name == name {
			return &functions[i]
		}
	}
	return nil
}

func valueNamed(name string) *value {
	for i := range values {
		if values[i].name == name {
			return &values[i]
		}
	}
	return nil
}

// unknownName is the sentence for a name that is not known.
func unknownName(name string, called bool) string {
	for i := range otherNames {
		if otherNames[i][0] == name {
			return otherNames[i][1]
		}
	}
	kind := "There is nothing named "
	if called {
		kind = "There is no function named "
	}
	if near := nearestName(name, called); near != "" {
		return kind + quoted(name) + "; did you mean " + near + "?"
	}
	if called {
		return kind + quoted(name) + ". The functions are sin, cos, tan, asin, acos, atan, atan2, sqrt, exp, ln, log10, abs, min, max, sign, step, pow and hypot."
	}
	return kind + quoted(name) + ". A formula is written in r, theta, x and y, or rho, X and Y in metres, with pi and e."
}

// nearestName returns the known name that differs least from one that is not
// known: by one letter, or by two in a name of five or more. Of equal ones it
// takes the first by alphabet.
func nearestName(name string, called bool) string {
	limit := 1
	if len(name) >= 5 {
		limit = 2
	}
	best := ""
	consider := func(candidate string) {
		// A name of one letter is near to every other one.
		if len(candidate) < 2 || len(name) < 2 {
			return
		}
		d := editDistance(name, candidate)
		if d < limit || d == limit && (best == "" || candidate < best) {
			limit, best = d, candidate
		}
	}
	for i := range functions {
		consider(functions[i].name)
	}
	if !called {
		for i := range values {
			consider(values[i].name)
		}
	}
	return best
}

// editDistance counts the letters to add, drop, change or swap with their
// neighbour; names above 12 letters are far from everything.
func editDistance(a, b string) int {
	const most = 12
	if len(a) > most || len(b) > most {
		return most
	}
	var d [most + 1][most + 1]int
	for i := range len(a) + 1 {
		d[i][0] = i
	}
	for j := range len(b) + 1 {
		d[0][j] = j
	}
	for i := 1; i <= len(a); i++ {
		for j := 1; j <= len(b); j++ {
			change := d[i-1][j-1]
			if a[i-1] != b[j-1] {
				change++
			}
			d[i][j] = min(change, d[i-1][j]+1, d[i][j-1]+1)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				d[i][j] = min(d[i][j], d[i-2][j-2]+1)
			}
		}
	}
	return d[len(a)][len(b)]
}

//go:noinline
func quoted(name string) string {
	const most = 20
	if runes := []rune(name); len(runes) > most {
		name = string(runes[:most]) + "..."
	}
	return "\"" + name + "\""
}

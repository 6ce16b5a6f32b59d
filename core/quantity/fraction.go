package quantity

import (
	"strconv"
	"strings"
)

// scanFraction reads "3/4", "1 3/4", "1-3/4", "¾" or "1¾" (inch trade, common
// practice) at index at. ok is false where there is no fraction; trouble comes
// only where there is one that cannot be read.
func scanFraction(text []rune, at int) (n number, bad *trouble, ok bool) {
	first := scanDigits(text, at)
	whole := text[at:first]
	if first < len(text) {
		if value, is := vulgar[text[first]]; is {
			return mixed(whole, value, first+1), nil, true
		}
	}
	if first == at {
		return number{}, nil, false
	}
	top := at
	if first < len(text) && (isSpace(text[first]) || text[first] == '-') {
		top = first + 1
	} else {
		whole = nil
	}
	slash := scanDigits(text, top)
	if slash == top || slash >= len(text) || !isSlash(text[slash]) {
		return number{}, nil, false
	}
	end := scanDigits(text, slash+1)
	if end == slash+1 {
		return number{}, nil, false // "5 1/K"
	}
	const most = 6 // digits
	if slash-top > most || end-slash-1 > most || len(whole) > most {
		return number{}, &trouble{code: CodeRange, at: top}, false
	}
	over, _ := strconv.Atoi(string(text[top:slash]))
	under, _ := strconv.Atoi(string(text[slash+1 : end]))
	// "1 500/700" may be 1500/700; "2 5/4" is nobody's way to write 3.25.
	if under == 0 || whole != nil && (over >= under || slash-top == 3) {
		return number{}, &trouble{code: CodeNumber, at: top}, false
	}
	if end < len(text) && strings.ContainsRune(".,/eE", text[end]) {
		return number{}, &trouble{code: CodeNumber, at: end}, false
	}
	return mixed(whole, [2]int{over, under}, end), nil, true
}

func mixed(whole []rune, part [2]int, end int) number {
	count, _ := strconv.Atoi("0" + string(whole))
	value := float64(count*part[1]+part[0]) / float64(part[1])
	return number{value: value, plain: strconv.FormatFloat(value, 'f', -1, 64), end: end}
}

func isSlash(r rune) bool { return r == '/' || r == '\u2044' || r == '\u2215' }

// vulgar are the fractions that have a character of their own and are used on
// rules and drawings.
var vulgar = map[rune][2]int{
	'½': {1, 2}, '¼': {1, 4}, '¾': {3, 4}, '⅛': {1, 8}, '⅜': {3, 8}, '⅝': {5, 8}, '⅞': {7, 8}, '⅓': {1, 3}, '⅔': {2, 3},
}

package diaphragm

// Times of the document are RFC 3339 texts. Package time's own reading and
// writing of them would bring 20 kB of layouts into the program that a visitor
// fetches.

// ValidTime reports whether a text is a time as RFC 3339 writes it:
// 2006-01-02T15:04:05, a fraction of a second at will, then Z or an offset.
func ValidTime(text string) bool {
	const form = "0000-00-00T00:00:00"
	if len(text) < len(form)+1 {
		return false
	}
	for i := range len(form) {
		if form[i] == '0' && !isDigit(text[i]) || form[i] != '0' && text[i] != form[i] {
			return false
		}
	}
	year, month, day := number(text[:4]), number(text[5:7]), number(text[8:10])
	hour, minute, second := number(text[11:13]), number(text[14:16]), number(text[17:19])
	if month < 1 || month > 12 || day < 1 || day > daysIn(year, month) || hour > 23 || minute > 59 || second > 59 {
		return false
	}
	rest := text[len(form):]
	if rest[0] == '.' {
		end := 1
		for end < len(rest) && isDigit(rest[end]) {
			end++
		}
		if end == 1 {
			return false
		}
		rest = rest[end:]
	}
	if rest == "Z" {
		return true
	}
	return len(rest) == 6 && (rest[0] == '+' || rest[0] == '-') && isDigit(rest[1]) && isDigit(rest[2]) && rest[3] == ':' &&
		isDigit(rest[4]) && isDigit(rest[5]) && number(rest[1:3]) < 24 && number(rest[4:6]) < 60
}

// FormatTime writes seconds since 1970 in UTC as RFC 3339 does, for the years
// 1970 to 9999.
func FormatTime(unix int64) string {
	days, rest := unix/86400, int(unix%86400)
	year := 1970
	for days >= int64(daysInYear(year)) {
		days -= int64(daysInYear(year))
		year++
	}
	month := 1
	for days >= int64(daysIn(year, month)) {
		days -= int64(daysIn(year, month))
		month++
	}
	return padded(year, 4) + "-" + padded(month, 2) + "-" + padded(int(days)+1, 2) + "T" +
		padded(rest/3600, 2) + ":" + padded(rest/60%60, 2) + ":" + padded(rest%60, 2) + "Z"
}

func isDigit(b byte) bool { return b >= '0' && b <= '9' }

// number reads digits.
func number(digits string) int {
	n := 0
	for i := range len(digits) {
		n = 10*n + int(digits[i]-'0')
	}
	return n
}

func padded(n, width int) string {
	out := make([]byte, width)
	for i := width - 1; i >= 0; i-- {
		out[i] = byte('0' + n%10)
		n /= 10
	}
	return string(out)
}

func daysInYear(year int) int {
	if year%4 == 0 && (year%100 != 0 || year%400 == 0) {
		return 366
	}
	return 365
}

func daysIn(year, month int) int {
	switch month {
	case 2:
		return daysInYear(year) - 337
	case 4, 6, 9, 11:
		return 30
	}
	return 31
}

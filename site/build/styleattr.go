package main

import (
	"fmt"
	"slices"
	"strings"
)

// styleClasses turns style attributes, which a strict content security policy blocks, into classes.
type styleClasses struct{ declarations []string }

// strip replaces each style attribute in html by a class with the same declarations.
func (s *styleClasses) strip(html string) string {
	return eachTag(html, func(tag string) string {
		attrs := attributes(tag)
		style := slices.IndexFunc(attrs, func(a attribute) bool { return a.name == "style" })
		if style < 0 {
			return tag
		}
		class := s.class(attrs[style].value)
		if at := slices.IndexFunc(attrs, func(a attribute) bool { return a.name == "class" }); at >= 0 {
			a, b := attrs[style], attrs[at]
			joined := fmt.Sprintf(` class="%s"`, strings.TrimSpace(b.value+" "+class))
			if a.start < b.start {
				return tag[:a.start] + tag[a.end:b.start] + joined + tag[b.end:]
			}
			return tag[:b.start] + joined + tag[b.end:a.start] + tag[a.end:]
		}
		if class == "" {
			return tag[:attrs[style].start] + tag[attrs[style].end:]
		}
		return tag[:attrs[style].start] + fmt.Sprintf(` class="%s"`, class) + tag[attrs[style].end:]
	})
}

// class returns the class for declarations such as "display:block math;", a new one when they are new.
func (s *styleClasses) class(declarations string) string {
	declarations = strings.Trim(strings.TrimSpace(declarations), ";")
	if declarations == "" {
		return ""
	}
	at := slices.Index(s.declarations, declarations)
	if at < 0 {
		at = len(s.declarations)
		s.declarations = append(s.declarations, declarations)
	}
	return fmt.Sprintf("was-style-%d", at)
}

// css is the sheet that gives the classes their meaning.
func (s *styleClasses) css() string {
	var out strings.Builder
	for i, declarations := range s.declarations {
		fmt.Fprintf(&out, ".was-style-%d{%s}\n", i, declarations)
	}
	return out.String()
}

// attribute is one attribute of a tag. start includes the white space before it.
type attribute struct {
	name, value string
	start, end  int
}

// attributes reads the attributes of a start tag. Values keep their character references.
func attributes(tag string) []attribute {
	var list []attribute
	at := strings.IndexAny(tag, " \t\n/>")
	for at >= 0 && at < len(tag) {
		start := at
		for at < len(tag) && strings.IndexByte(" \t\n/", tag[at]) >= 0 {
			at++
		}
		if at >= len(tag) || tag[at] == '>' {
			break
		}
		nameStart := at
		for at < len(tag) && strings.IndexByte(" \t\n/>=", tag[at]) < 0 {
			at++
		}
		a := attribute{name: strings.ToLower(tag[nameStart:at]), start: start}
		if at < len(tag) && tag[at] == '=' {
			at++
			if at < len(tag) && (tag[at] == '"' || tag[at] == '\'') {
				quote := tag[at]
				end := strings.IndexByte(tag[at+1:], quote)
				if end < 0 {
					break
				}
				a.value = tag[at+1 : at+1+end]
				at += end + 2
			} else {
				valueStart := at
				for at < len(tag) && strings.IndexByte(" \t\n>", tag[at]) < 0 {
					at++
				}
				a.value = tag[valueStart:at]
			}
		}
		a.end = at
		list = append(list, a)
	}
	return list
}

// eachTag calls replace with every start tag of html, and leaves comments, end tags and the insides of script and
// style elements alone.
func eachTag(html string, replace func(tag string) string) string {
	var out strings.Builder
	for {
		open := strings.IndexByte(html, '<')
		if open < 0 || open+1 >= len(html) {
			out.WriteString(html)
			return out.String()
		}
		out.WriteString(html[:open])
		html = html[open:]
		if strings.HasPrefix(html, "<!--") {
			end := strings.Index(html, "-->")
			if end < 0 {
				end = len(html) - 3
			}
			out.WriteString(html[:end+3])
			html = html[end+3:]
			continue
		}
		if !isLetter(html[1]) {
			out.WriteByte('<')
			html = html[1:]
			continue
		}
		end := tagEnd(html)
		tag := html[:end]
		out.WriteString(replace(tag))
		html = html[end:]
		for _, raw := range []string{"script", "style"} {
			if strings.HasPrefix(tag, "<"+raw) && !isLetter((tag + " ")[len(raw)+1]) {
				if close := strings.Index(html, "</"+raw); close >= 0 {
					out.WriteString(html[:close])
					html = html[close:]
				}
			}
		}
	}
}

func isLetter(c byte) bool { return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' }

// tagEnd is the index after the ">" of the tag that html begins with, minding quotes.
func tagEnd(html string) int {
	var quote byte
	for i := 0; i < len(html); i++ {
		switch c := html[i]; {
		case quote != 0:
			if c == quote {
				quote = 0
			}
		case c == '"' || c == '\'':
			quote = c
		case c == '>':
			return i + 1
		}
	}
	return len(html)
}

package main

import (
	"fmt"
	"html"
	"net/url"
	"path"
	"regexp"
	"strings"
)

var (
	idAttribute = regexp.MustCompile(`\sid="([^"]*)"`)
	cssURL      = regexp.MustCompile(`url\(\s*["']?([^"')]+)`)
)

// checkLinks makes sure that the site works in any directory of any server: every address in a page or sheet is
// relative and leads to a file of the site, fragments lead to an id. Only the reader's click may leave the site, so
// absolute addresses stand in <a href> alone.
func checkLinks(files Output) error {
	for _, name := range files.paths() {
		var fault error
		switch path.Ext(name) {
		case ".html":
			eachTag(string(files[name]), func(tag string) string {
				for _, a := range attributes(tag) {
					if a.name != "href" && a.name != "src" {
						continue
					}
					anchor := strings.HasPrefix(tag, "<a ")
					if err := checkLink(files, name, html.UnescapeString(a.value), anchor); err != nil && fault == nil {
						fault = err
					}
				}
				return tag
			})
		case ".css":
			for _, match := range cssURL.FindAllStringSubmatch(string(files[name]), -1) {
				if err := checkLink(files, name, match[1], false); err != nil {
					fault = err
				}
			}
		}
		if fault != nil {
			return fault
		}
	}
	return nil
}

func checkLink(files Output, from, link string, anchor bool) error {
	target, err := url.Parse(link)
	if err != nil {
		return fmt.Errorf("%s: %w", from, err)
	}
	switch {
	case target.Scheme == "data" && !anchor:
		return nil
	case target.Scheme == "https" && anchor:
		return nil
	case target.Scheme != "" || target.Host != "":
		return fmt.Errorf("%s: %s would leave the site", from, link)
	case strings.HasPrefix(target.Path, "/"):
		return fmt.Errorf("%s: %s begins at the root of the server, so it breaks in a directory", from, link)
	}
	file := from
	if target.Path != "" {
		file = path.Join(path.Dir(from), target.Path)
	}
	content, ok := files[file]
	if !ok {
		return fmt.Errorf("%s: %s leads to no file of the site", from, link)
	}
	if target.Fragment == "" || !strings.HasSuffix(file, ".html") {
		return nil
	}
	for _, match := range idAttribute.FindAllSubmatch(content, -1) {
		if string(match[1]) == target.Fragment {
			return nil
		}
	}
	if file == singleFile && isPageAnchor(content, target.Fragment) {
		return nil
	}
	return fmt.Errorf("%s: %s leads to no place on that page", from, link)
}

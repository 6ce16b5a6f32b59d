package main

import (
	"encoding/base64"
	"fmt"
	"html/template"
	"maps"
	"path/filepath"
	"regexp"
	"slices"
	"strings"

	"github.com/evanw/esbuild/pkg/api"
)

// singleFile is the whole tool in one file that works from file://.
const singleFile = "hoopsheet-single.html"

// singlePage is one chapter in it, kept in a <template> until it is turned to.
type singlePage struct {
	*Page
	Content template.HTML
}

// singleView is what single.html sees.
type singleView struct {
	pageView
	Style   template.CSS
	First   template.JS
	Script  template.JS
	Wasm    template.HTML
	Scripts []dataBlock
	Icon    template.URL
	Pages   []singlePage
}

// dataBlock is a script element that browsers do not run.
type dataBlock struct{ Tag template.HTML }

// addSingle makes the single file from the same pages, styles and scripts as the hosted site.
func addSingle(files Output, b *bundler, s *shell, extraCSS string) error {
	sheets, err := b.sheet("site.css", extraCSS, api.LoaderDataURL)
	if err != nil {
		return err
	}
	var style string
	for _, sheet := range sheets {
		style += string(sheet)
	}
	early, err := b.classic(filepath.Join(b.site.src, "shell", "early.ts"), nil)
	if err != nil {
		return err
	}
	main, err := b.classic(filepath.Join(b.site.src, "shell", "single-entry.ts"), map[string]string{buildModule: b.buildInfo(true, nil)})
	if err != nil {
		return err
	}
	first, script := inlineScript(string(early)), inlineScript(string(main))
	view := singleView{
		pageView: pageView{
			Page: s.pages[0], Policy: singlePolicy(first, script), BuildID: s.buildID, Groups: s.groups, Single: true,
		},
		Style: template.CSS(style), First: template.JS(first), Script: template.JS(script),
		Wasm: template.HTML(dataBlockTag("hoopsheet-wasm", base64.StdEncoding.EncodeToString(files[b.wasmPath]))),
		Icon: template.URL("data:image/svg+xml;base64," + base64.StdEncoding.EncodeToString(files["icon.svg"])),
	}
	for _, name := range slices.Sorted(maps.Keys(b.workers)) {
		view.Scripts = append(view.Scripts, dataBlock{template.HTML(dataBlockTag("hoopsheet-script-"+name, inlineScript(string(b.workers[name]))))})
	}
	for _, page := range s.pages {
		body, err := singleBody(page, s.pages)
		if err != nil {
			return err
		}
		view.Pages = append(view.Pages, singlePage{page, template.HTML(body)})
	}
	html, err := s.render("single.html", view)
	if err != nil {
		return err
	}
	files[singleFile] = html
	return nil
}

// dataBlockTag is a script element of a type that is not run. It is built here because html/template would take its
// text for JavaScript to be escaped.
func dataBlockTag(id, text string) string {
	return fmt.Sprintf(`<script type="text/plain" id="%s">%s</script>`, id, text)
}

// inlineScript makes a script safe to stand inside a script element: esbuild already writes <\/script, and the other
// sequence that HTML gives a meaning there is the comment opening.
func inlineScript(code string) string { return strings.ReplaceAll(code, "<!--", `<\x21--`) }

// singleBody rewrites a page's ids and links for a place among all the others: id "x" of page "modes" becomes
// "modes--x", a link to modes.html#x becomes #modes--x. Links to downloads are taken away, their words stay.
func singleBody(page *Page, pages []*Page) (string, error) {
	var fault error
	body := eachTag(page.Body, func(tag string) string {
		attrs := attributes(tag)
		slices.Reverse(attrs)
		for _, a := range attrs {
			switch {
			case slices.Contains([]string{"id", "for", "aria-labelledby", "aria-describedby"}, a.name):
				tag = tag[:a.start] + fmt.Sprintf(` %s="%s--%s"`, a.name, page.Name, a.value) + tag[a.end:]
			case a.name == "href" && !strings.HasPrefix(a.value, "https:"):
				link, ok := singleLink(page.Name, a.value, pages)
				if !ok {
					tag = tag[:a.start] + tag[a.end:]
					continue
				}
				tag = tag[:a.start] + fmt.Sprintf(` href="%s"`, link) + tag[a.end:]
			case a.name == "src":
				fault = fmt.Errorf("%s.md: %s cannot be carried in the single file: draw it as inline SVG", page.Name, tag)
			}
		}
		return tag
	})
	return body, fault
}

// singleLink is the fragment for a link of the hosted site, or false when its target is not in the single file.
func singleLink(from, link string, pages []*Page) (string, bool) {
	file, fragment, _ := strings.Cut(link, "#")
	name := from
	if file != "" {
		var ok bool
		if name, ok = strings.CutSuffix(file, ".html"); !ok {
			return "", false
		}
	}
	if !slices.ContainsFunc(pages, func(p *Page) bool { return p.Name == name }) {
		return "", false
	}
	if fragment == "" {
		return "#" + name, true
	}
	return "#" + name + "--" + fragment, true
}

var pageTemplate = regexp.MustCompile(`<template data-page="([^"]+)"`)

// isPageAnchor says whether fragment names a page of the single file.
func isPageAnchor(content []byte, fragment string) bool {
	for _, match := range pageTemplate.FindAllSubmatch(content, -1) {
		if string(match[1]) == fragment {
			return true
		}
	}
	return false
}

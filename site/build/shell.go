package main

import (
	"bytes"
	"html/template"
	"path/filepath"
)

// shell puts pages into the templates.
type shell struct {
	templates *template.Template
	groups    []navGroup
	pages     []*Page
	buildID   string
}

// navGroup is one group of the chapter list.
type navGroup struct {
	Title string
	Pages []*Page
}

func newShell(site siteDirs, pages []*Page, buildID string) (*shell, error) {
	templates, err := template.New("").Funcs(template.FuncMap{"mark": barMark}).ParseGlob(filepath.Join(site.templates, "*.html"))
	if err != nil {
		return nil, err
	}
	return &shell{templates: templates, groups: navGroups(pages), pages: pages, buildID: buildID}, nil
}

// navGroups sorts pages into the groups of the chapter list. Pages of no chapter (licences) are left out.
func navGroups(pages []*Page) []navGroup {
	var groups []navGroup
	for _, chapter := range chapters {
		group := navGroup{Title: chapter.title}
		for _, name := range chapter.pages {
			for _, page := range pages {
				if page.Name == name {
					group.Pages = append(group.Pages, page)
				}
			}
		}
		groups = append(groups, group)
	}
	return groups
}

// pageView is what the templates see.
type pageView struct {
	*Page
	Policy         string
	CSS, Early, JS string
	BuildID        string
	Groups         []navGroup
	Single         bool
	Content        template.HTML
}

// hosted renders one page of the hosted site.
func (s *shell) hosted(page *Page, css string, scripts hostedScripts) ([]byte, error) {
	return s.render("page.html", pageView{
		Page: page, Policy: hostedPolicy, CSS: css, Early: scripts.early, JS: scripts.site,
		BuildID: s.buildID, Groups: s.groups, Content: template.HTML(page.Body),
	})
}

func (s *shell) render(name string, view any) ([]byte, error) {
	var out bytes.Buffer
	err := s.templates.ExecuteTemplate(&out, name, view)
	return out.Bytes(), err
}

package main

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"io/fs"
	"net/http"
	"path"
	"regexp"
	"strings"
	"time"
)

// contentTypes are fixed here because the tables of operating systems differ.
var contentTypes = map[string]string{
	".html":        "text/html; charset=utf-8",
	".js":          "text/javascript; charset=utf-8",
	".css":         "text/css; charset=utf-8",
	".json":        "application/json",
	".svg":         "image/svg+xml",
	".png":         "image/png",
	".woff2":       "font/woff2",
	".webmanifest": "application/manifest+json",
	".zip":         "application/zip",
	".wav":         "audio/wav",
	".wasm":        "application/wasm",
	".bin":         "application/octet-stream",
}

// siteHandler serves files under prefix and nothing else. Each answer carries an ETag of its bytes and no-cache, so a
// rebuilt site is seen at the next reload.
func siteHandler(files fs.FS, prefix string, csp bool) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		if r.Method != http.MethodGet && r.Method != http.MethodHead {
			http.Error(w, "only GET and HEAD are answered here", http.StatusMethodNotAllowed)
			return
		}
		if r.URL.Path+"/" == prefix {
			redirect(w, r, prefix)
			return
		}
		name, ok := strings.CutPrefix(r.URL.Path, prefix)
		if !ok {
			http.NotFound(w, r)
			return
		}
		if name == "" || strings.HasSuffix(name, "/") {
			name += "index.html"
		}
		if info, err := fs.Stat(files, name); err == nil && info.IsDir() {
			redirect(w, r, r.URL.Path+"/")
			return
		}
		content, err := fs.ReadFile(files, name)
		if errors.Is(err, fs.ErrNotExist) || errors.Is(err, fs.ErrInvalid) {
			http.NotFound(w, r)
			return
		} else if err != nil {
			http.Error(w, err.Error(), http.StatusInternalServerError)
			return
		}
		sum := sha256.Sum256(content)
		header := w.Header()
		header.Set("ETag", `"`+hex.EncodeToString(sum[:8])+`"`)
		header.Set("Cache-Control", "no-cache")
		header.Set("X-Content-Type-Options", "nosniff")
		kind := contentTypes[path.Ext(name)]
		if kind == "" {
			kind = "application/octet-stream"
		}
		header.Set("Content-Type", kind)
		if policy := policyFor(files, kind, content); csp && policy != "" {
			header.Set("Content-Security-Policy", policy)
		}
		http.ServeContent(w, r, "", time.Time{}, bytes.NewReader(content))
	})
}

func redirect(w http.ResponseWriter, r *http.Request, to string) {
	if r.URL.RawQuery != "" {
		to += "?" + r.URL.RawQuery
	}
	http.Redirect(w, r, to, http.StatusTemporaryRedirect)
}

var policyMeta = regexp.MustCompile(`<meta http-equiv="Content-Security-Policy" content="([^"]*)">`)

// policyFor is the policy to send with a file. A script gets that of the site's first page, since a worker obeys the
// header of its own file, not that of the page that started it.
func policyFor(files fs.FS, kind string, content []byte) string {
	if strings.HasPrefix(kind, "text/html") {
		return pagePolicy(content)
	}
	first, err := fs.ReadFile(files, "index.html")
	if err != nil {
		return ""
	}
	return pagePolicy(first)
}

// pagePolicy is the policy that a page states for itself: the header then says the same, for hosted pages and for the
// single file alike. A page without one, such as a host page in a test, gets none.
func pagePolicy(page []byte) string {
	match := policyMeta.FindSubmatch(page)
	if match == nil {
		return ""
	}
	return strings.NewReplacer("&#39;", "'", "&#34;", `"`, "&#43;", "+", "&amp;", "&").Replace(string(match[1]))
}

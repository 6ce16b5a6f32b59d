package main

import (
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
	"testing/fstest"
)

func sample(csp bool, prefix string) http.Handler {
	page := `<meta http-equiv="Content-Security-Policy" content="default-src &#39;none&#39;">`
	return siteHandler(fstest.MapFS{
		"index.html":             {Data: []byte(page)},
		"host.html":              {Data: []byte("<p>a page of somebody else</p>")},
		"assets/engine-A.js":     {Data: []byte("code")},
		"assets/hoopsheet-A.bin": {Data: []byte("\x1f\x8bwasm")},
	}, prefix, csp)
}

func get(h http.Handler, path string, headers ...string) *httptest.ResponseRecorder {
	r := httptest.NewRequest(http.MethodGet, path, nil)
	for i := 0; i < len(headers); i += 2 {
		r.Header.Set(headers[i], headers[i+1])
	}
	w := httptest.NewRecorder()
	h.ServeHTTP(w, r)
	return w
}

func TestAnswers(t *testing.T) {
	for _, c := range []struct {
		prefix, path string
		status       int
		kind         string
	}{
		{"/", "/", 200, "text/html; charset=utf-8"},
		{"/", "/index.html", 200, "text/html; charset=utf-8"},
		{"/", "/assets/engine-A.js", 200, "text/javascript; charset=utf-8"},
		{"/", "/assets/hoopsheet-A.bin", 200, "application/octet-stream"},
		{"/", "/assets", 307, ""},
		{"/", "/assets/", 404, ""},
		{"/", "/gone.html", 404, ""},
		{"/", "/../secret", 404, ""},
		{"/some/sub/path/", "/some/sub/path/", 200, "text/html; charset=utf-8"},
		{"/some/sub/path/", "/some/sub/path", 307, ""},
		{"/some/sub/path/", "/some/sub/path/assets/engine-A.js", 200, "text/javascript; charset=utf-8"},
		{"/some/sub/path/", "/", 404, ""},
		{"/some/sub/path/", "/assets/engine-A.js", 404, ""},
	} {
		got := get(sample(true, c.prefix), c.path)
		if got.Code != c.status || c.kind != "" && got.Header().Get("Content-Type") != c.kind {
			t.Errorf("%s under %s: %d %s, want %d %s", c.path, c.prefix, got.Code, got.Header().Get("Content-Type"), c.status, c.kind)
		}
	}
}

func TestRedirectKeepsTheQuery(t *testing.T) {
	got := get(sample(true, "/sub/"), "/sub?d=1")
	if to := got.Header().Get("Location"); to != "/sub/?d=1" {
		t.Errorf("led to %s", to)
	}
}

func TestPolicyHeader(t *testing.T) {
	for _, c := range []struct {
		path string
		csp  bool
		want string
	}{
		{"/index.html", true, "default-src 'none'"},
		{"/assets/engine-A.js", true, "default-src 'none'"},
		{"/host.html", true, ""},
		{"/index.html", false, ""},
	} {
		if got := get(sample(c.csp, "/"), c.path).Header().Get("Content-Security-Policy"); got != c.want {
			t.Errorf("%s, csp %v: %q, want %q", c.path, c.csp, got, c.want)
		}
	}
}

func TestCaching(t *testing.T) {
	h := sample(true, "/")
	first := get(h, "/assets/engine-A.js")
	tag := first.Header().Get("ETag")
	if first.Header().Get("Cache-Control") != "no-cache" || tag == "" {
		t.Errorf("headers: %v", first.Header())
	}
	if again := get(h, "/assets/engine-A.js", "If-None-Match", tag); again.Code != http.StatusNotModified {
		t.Errorf("asked again: %d", again.Code)
	}
	if part := get(h, "/assets/engine-A.js", "Range", "bytes=1-2"); part.Code != http.StatusPartialContent || part.Body.String() != "od" {
		t.Errorf("range: %d %q", part.Code, part.Body.String())
	}
}

func TestOnlyReading(t *testing.T) {
	w := httptest.NewRecorder()
	sample(true, "/").ServeHTTP(w, httptest.NewRequest(http.MethodPost, "/", strings.NewReader("x")))
	if w.Code != http.StatusMethodNotAllowed {
		t.Errorf("POST: %d", w.Code)
	}
}

package main

import (
	"crypto/sha256"
	"encoding/base64"
	"encoding/hex"
	"fmt"
	"path/filepath"
	"strings"
)

// precacheFile is one file that the service worker must hold. Sum is given for files whose name carries a hash:
// these are taken whole or not at all. Pages may be changed a little by the server (a banner, a rewritten tag); they
// are known by the build id in them instead.
type precacheFile struct {
	Path string `json:"path"`
	Sum  string `json:"sha256,omitempty"`
}

// precacheList picks what must be there offline: pages, scripts, styles, fonts, wasm, icons. The zip and the single
// file are downloads, and defaults.json belongs to whoever hosts the site; the service worker treats these apart.
func precacheList(files Output) []precacheFile {
	var list []precacheFile
	for _, name := range files.paths() {
		switch {
		case name == singleFile || name == zipFile || name == "defaults.json" || name == "sw.js":
		case strings.HasPrefix(name, assetDir+"/"):
			sum := sha256.Sum256(files[name])
			list = append(list, precacheFile{name, base64.StdEncoding.EncodeToString(sum[:])})
		default:
			list = append(list, precacheFile{Path: name})
		}
	}
	return list
}

// precacheVersion names the cache: a hash of every byte that is in it.
func precacheVersion(files Output, list []precacheFile) string {
	hash := sha256.New()
	for _, file := range list {
		fmt.Fprintln(hash, file.Path, len(files[file.Path]))
		hash.Write(files[file.Path])
	}
	return hex.EncodeToString(hash.Sum(nil)[:8])
}

// serviceWorker bundles sw.js with the list of what is in files now.
func (b *bundler) serviceWorker(files Output) error {
	list := precacheList(files)
	code, err := b.classic(filepath.Join(b.site.src, "sw.ts"), map[string]string{
		"hoopsheet:precache": module(map[string]any{
			"version": precacheVersion(files, list),
			"buildId": b.buildID,
			"files":   list,
		}),
	})
	files["sw.js"] = code
	return err
}

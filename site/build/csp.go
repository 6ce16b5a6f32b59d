package main

import (
	"crypto/sha256"
	"encoding/base64"
	"fmt"
	"regexp"
	"strings"
)

// hostedPolicy is the content security policy of the hosted pages. The same words stand on the Hosting page for
// servers that send it as a header; site/serve does.
const hostedPolicy = "default-src 'none'; script-src 'self' 'wasm-unsafe-eval'; worker-src 'self'; connect-src 'self'; " +
	"style-src 'self'; font-src 'self'; img-src 'self' data: blob:; media-src 'self' blob:; manifest-src 'self'; " +
	"base-uri 'none'; form-action 'none'"

// singlePolicy is the policy of the single file: only these inline scripts, and nothing from any network.
func singlePolicy(scripts ...string) string {
	sources := make([]string, len(scripts))
	for i, script := range scripts {
		sources[i] = scriptHash(script)
	}
	return "default-src 'none'; script-src " + strings.Join(sources, " ") + " 'wasm-unsafe-eval'; worker-src blob:; " +
		"style-src 'unsafe-inline'; font-src data:; img-src data: blob:; media-src blob:; base-uri 'none'; form-action 'none'"
}

// scriptHash is the source expression that allows one inline script: CSP Level 3, section 2.3.1, hash-source.
func scriptHash(script string) string {
	sum := sha256.Sum256([]byte(script))
	return "'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'"
}

var eventAttribute = regexp.MustCompile(`^on[a-z]+$`)

// checkStrict refuses pages that their own policy would break: style attributes, handlers in attributes, inline
// scripts and styles on the hosted site.
func checkStrict(files Output) error {
	for _, name := range files.paths() {
		if !strings.HasSuffix(name, ".html") {
			continue
		}
		var fault error
		eachTag(string(files[name]), func(tag string) string {
			attrs := attributes(tag)
			src := false
			for _, a := range attrs {
				src = src || a.name == "src"
				if a.name == "style" || eventAttribute.MatchString(a.name) {
					fault = fmt.Errorf("%s: %s has the attribute %s, which the content security policy blocks", name, tag, a.name)
				}
			}
			inline := strings.HasPrefix(tag, "<script") && !src || strings.HasPrefix(tag, "<style")
			if inline && name != singleFile {
				fault = fmt.Errorf("%s: %s is inline, which the content security policy blocks", name, tag)
			}
			return tag
		})
		if fault != nil {
			return fault
		}
	}
	return nil
}

package main

import (
	"crypto/sha256"
	"encoding/base32"
	"fmt"
	"maps"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strings"
)

// assetDir holds every file whose name carries a hash of its content.
const assetDir = "assets"

// Output is the site in memory: slash-separated path from its root, to content.
type Output map[string][]byte

// paths returns the paths in order.
func (o Output) paths() []string { return slices.Sorted(maps.Keys(o)) }

// write puts the files beside dir, then swaps: a reader sees the old site or the new one.
func (o Output) write(dir string) error {
	if err := os.MkdirAll(filepath.Dir(dir), 0o755); err != nil {
		return err
	}
	fresh, err := os.MkdirTemp(filepath.Dir(dir), ".dist-")
	if err != nil {
		return err
	}
	defer os.RemoveAll(fresh)
	for name, content := range o {
		file := filepath.Join(fresh, filepath.FromSlash(name))
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			return err
		}
		if err := os.WriteFile(file, content, 0o644); err != nil {
			return err
		}
	}
	if err := os.Chmod(fresh, 0o755); err != nil {
		return err
	}
	if err := os.RemoveAll(dir); err != nil {
		return err
	}
	return os.Rename(fresh, dir)
}

// contentHash is eight characters that name content in file names.
func contentHash(content []byte) string {
	sum := sha256.Sum256(content)
	return base32.StdEncoding.EncodeToString(sum[:5])
}

// hashedName turns "hoopsheet.bin" into "hoopsheet-ABCDEFGH.bin".
func hashedName(name string, content []byte) string {
	ext := path.Ext(name)
	return fmt.Sprintf("%s-%s%s", strings.TrimSuffix(name, ext), contentHash(content), ext)
}

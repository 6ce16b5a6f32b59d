package main

import (
	"archive/zip"
	"bytes"
	"compress/flate"
	"io"
	"time"
)

// zipFile is the whole site in one archive, for teams that put it on a server of theirs.
const zipFile = "hoopsheet-site.zip"

// addZip packs everything made so far, under one directory named hoopsheet. Equal sites give equal bytes: the times
// in it are all the earliest that the format knows.
func addZip(files Output) error {
	var out bytes.Buffer
	w := zip.NewWriter(&out)
	w.RegisterCompressor(zip.Deflate, func(w io.Writer) (io.WriteCloser, error) {
		return flate.NewWriter(w, flate.BestCompression)
	})
	for _, name := range files.paths() {
		if name == zipFile {
			continue
		}
		entry, err := w.CreateHeader(&zip.FileHeader{
			Name:     "hoopsheet/" + name,
			Method:   zip.Deflate,
			Modified: time.Date(1980, 1, 1, 0, 0, 0, 0, time.UTC),
		})
		if err != nil {
			return err
		}
		if _, err := entry.Write(files[name]); err != nil {
			return err
		}
	}
	if err := w.Close(); err != nil {
		return err
	}
	files[zipFile] = out.Bytes()
	return nil
}

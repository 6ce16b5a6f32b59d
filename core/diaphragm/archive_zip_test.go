package diaphragm

import (
	"archive/zip"
	"bytes"
	"io"
	"math/rand/v2"
	"testing"
)

// TestZipAgainstLibrary: what is written here is read by package archive/zip,
// and what that writes, with its data descriptors and comments, is read here.
func TestZipAgainstLibrary(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	files := map[string][]byte{"empty": {}, "text.json": bytes.Repeat([]byte("abc "), 10000)}
	for _, name := range []string{"recordings/a.wav", "b"} {
		data := make([]byte, 1+random.IntN(5000))
		for i := range data {
			data[i] = byte(random.Uint32())
		}
		files[name] = data
	}
	var ours zipWriter
	var theirs bytes.Buffer
	library := zip.NewWriter(&theirs)
	if err := library.SetComment("a comment"); err != nil {
		t.Fatal(err)
	}
	for name, data := range files {
		if err := ours.add(name, data, len(name)%2 == 0); err != nil {
			t.Fatal(err)
		}
		w, err := library.Create(name)
		if err != nil {
			t.Fatal(err)
		}
		if _, err := w.Write(data); err != nil {
			t.Fatal(err)
		}
	}
	if err := library.Close(); err != nil {
		t.Fatal(err)
	}
	written := ours.close()
	reader, err := zip.NewReader(bytes.NewReader(written), int64(len(written)))
	if err != nil || len(reader.File) != len(files) {
		t.Fatalf("the library reads %v", err)
	}
	for _, f := range reader.File {
		stream, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		if data, err := io.ReadAll(stream); err != nil || !bytes.Equal(data, files[f.Name]) {
			t.Errorf("%s: the library reads %d bytes (%v), written %d", f.Name, len(data), err, len(files[f.Name]))
		}
	}
	members, err := zipContents(theirs.Bytes())
	if err != nil || len(members) != len(files) {
		t.Fatalf("%d members (%v)", len(members), err)
	}
	for _, m := range members {
		if data, err := m.read(theirs.Bytes()); err != nil || !bytes.Equal(data, files[m.name]) {
			t.Errorf("%s: read %d bytes (%v), written %d", m.name, len(data), err, len(files[m.name]))
		}
	}
}

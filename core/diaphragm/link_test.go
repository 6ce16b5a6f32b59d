package diaphragm

import (
	"bytes"
	"compress/flate"
	"encoding/base64"
	"encoding/binary"
	"flag"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write the files that testdata/links and testdata/archives lack")

const linksDir = "../../testdata/links"

func TestLinkRoundTrip(t *testing.T) {
	sent := fullParcel()
	link, err := EncodeLink(sent)
	if err != nil {
		t.Fatal(err)
	}
	got, err := DecodeLink(link)
	if err != nil {
		t.Fatal(err)
	}
	if want := roundParcel(sent); !reflect.DeepEqual(got, want) {
		t.Errorf("got %+v\nwant %+v", got, want)
	}
	const address = 120 // characters for the address of the page
	t.Logf("the link of a full parcel has %d characters after #", len(link))
	if len(link)+address >= MostLink {
		t.Errorf("%d characters, and %d for the address, are not below %d", len(link), address, MostLink)
	}
	if strings.Trim(link[4:], "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789-_") != "" {
		t.Errorf("foreign characters in %s", link)
	}
}

// TestLinkOfARealDiaphragm: one with everything, at full length, still fits.
func TestLinkOfARealDiaphragm(t *testing.T) {
	sent := fullParcel()
	sent.Document = richDocument()
	link, err := EncodeLink(sent)
	if err != nil {
		t.Fatal(err)
	}
	got, err := DecodeLink(link)
	if want := roundParcel(sent); err != nil || !reflect.DeepEqual(got, want) {
		t.Errorf("got %+v (%v)\nwant %+v", got, err, want)
	}
	const address = 120 // characters for the address of the page
	t.Logf("the link of a real diaphragm has %d characters after #", len(link))
	if len(link)+address >= MostLink {
		t.Errorf("%d characters, and %d for the address, are not below %d", len(link), address, MostLink)
	}
	if problems := Validate(sent.Document); len(problems) > 0 {
		t.Errorf("it is not sound: %v", problems)
	}
	for len(sent.Document.Attached.Patches) < MostPatches {
		newest := len(sent.Document.Attached.Patches)
		sent.Document.Attached.Patches = append(sent.Document.Attached.Patches, Patch{Name: "tape", Radius: 0.1137 * float64(newest), Angle: 0.7123 * float64(newest), Size: 0.0125, Mass: 0.00041})
	}
	if link, err = EncodeLink(sent); err != nil || len(link)+address >= MostLink {
		t.Errorf("with %d patches the link has %d characters, %v", MostPatches, len(link), err)
	}
	t.Logf("with %d patches it has %d", MostPatches, len(link))
}

// TestLinkKeepsEveryBit sends documents whose numbers use all 53 bits.
func TestLinkKeepsEveryBit(t *testing.T) {
	random := rand.New(rand.NewPCG(11, 3))
	for range 200 {
		p := Parcel{Document: fullDocument(), Figures: []Figure{}, Peaks: []ChosenPeak{}}
		d := &p.Document
		for _, x := range []*float64{&d.Ring.Radius, &d.Ring.CTE, &d.Sheet.Thickness, &d.Sheet.Density, &d.Sheet.MeasuredArealDensity, &d.Sheet.E, &d.Sheet.Nu,
			&d.Sheet.CTE, &d.Sheet.AllowableStress, &d.Tension.Nominal, &d.Tension.Tolerance, &d.Faces.Lower.Depth, &d.Surroundings.Temperature,
			&d.Surroundings.Pressure, &d.Surroundings.Humidity, &d.Avoid.Lowest, &d.Avoid.Lines[1].Frequency, &d.Damping.Ratio} {
			*x *= 1 + 0.01*random.Float64()
		}
		link, err := EncodeLink(p)
		if err != nil {
			t.Fatal(err)
		}
		got, err := DecodeLink(link)
		if err != nil || !reflect.DeepEqual(got, p) {
			t.Fatalf("got %+v (%v)\nwant %+v", got, err, p)
		}
	}
}

// TestRoundForLink: nine digits leave half a unit of the ninth, at most 5e-9
// of the value, plus the rounding of the nearest double.
func TestRoundForLink(t *testing.T) {
	random := rand.New(rand.NewPCG(5, 5))
	for range 10000 {
		x := (random.Float64() - 0.5) * math.Pow(10, float64(random.IntN(40)-20))
		r := RoundForLink(x)
		if math.Abs(r-x) > 5.0000001e-9*math.Abs(x) || RoundForLink(r) != r {
			t.Errorf("%v became %v", x, r)
		}
	}
	if got := RoundForLink(0.12345678949); got != 0.123456789 {
		t.Errorf("got %v", got)
	}
	if got := RoundForLink(math.MaxFloat64); got != math.MaxFloat64 && math.IsInf(got, 0) {
		t.Errorf("the largest number became %v", got)
	}
}

// TestGoldenLink reads a link that was sent in the past: every version that
// was ever sent must stay readable.
func TestGoldenLink(t *testing.T) {
	if *update {
		writeLinkSeeds(t)
	}
	real := fullParcel()
	real.Document = richDocument()
	for name, sent := range map[string]Parcel{"whole-1.txt": fullParcel(), "real-1.txt": real} {
		text, err := os.ReadFile(filepath.Join(linksDir, name))
		if err != nil {
			t.Fatal(err)
		}
		got, err := DecodeLink(string(text))
		if err != nil {
			t.Fatal(err)
		}
		if want := roundParcel(sent); !reflect.DeepEqual(got, want) {
			t.Errorf("%s: got %+v\nwant %+v", name, got, want)
		}
	}
}

func TestLinkCutAnywhere(t *testing.T) {
	link, err := EncodeLink(fullParcel())
	if err != nil {
		t.Fatal(err)
	}
	for k := 2; k < len(link); k++ {
		_, err := DecodeLink(link[:k])
		if codeOf(err) != CodeCutShort {
			t.Fatalf("cut after %d of %d: %q %v", k, len(link), codeOf(err), err)
		}
	}
	if _, err := DecodeLink(link[:700]); !strings.Contains(err.Error(), "700 of the ") || !strings.Contains(err.Error(), "Ask for it again") {
		t.Errorf("cut after 700: %v", err)
	}
}

func TestLinkAlteredAnywhere(t *testing.T) {
	sent := fullParcel()
	link, err := EncodeLink(sent)
	if err != nil {
		t.Fatal(err)
	}
	want := roundParcel(sent)
	for k := range link {
		for _, c := range []byte("Aq7_") {
			if link[k] == c {
				continue
			}
			got, err := DecodeLink(link[:k] + string(c) + link[k+1:])
			// The last character may hold bits that carry nothing.
			if err == nil && !(k == len(link)-1 && reflect.DeepEqual(got, want)) {
				t.Errorf("character %d changed to %c, and the link was accepted", k, c)
			}
		}
	}
	for name, text := range map[string]string{
		"foreign character": link[:50] + "%" + link[51:], "more at the end": link + "AAAA", "two swapped": link[:80] + link[81:82] + link[80:81] + link[82:],
	} {
		if text == link {
			t.Fatalf("%s: nothing changed", name)
		}
		if _, err := DecodeLink(text); codeOf(err) != CodeAltered {
			t.Errorf("%s: %q %v", name, codeOf(err), err)
		}
	}
}

func TestLinkWithTrimmings(t *testing.T) {
	link, err := EncodeLink(fullParcel())
	if err != nil {
		t.Fatal(err)
	}
	for _, text := range []string{
		"#" + link, "https://example.org/manual/#" + link, link + ".", "<" + "https://example.org/#" + link + ">", " " + link + "\r\n",
		link[:76] + "\r\n" + link[76:152] + "\n" + link[152:], link + "&from=mail", "#h%3D" + link[2:],
	} {
		if _, err := DecodeLink(text); err != nil {
			t.Errorf("%.40q...: %v", text, err)
		}
	}
}

func TestDecodeLinkRefuses(t *testing.T) {
	for _, row := range []struct {
		name, text string
		code       Code
		words      string
	}{
		{"empty", "", CodeUnreadable, "not a hand-over link"},
		{"other fragment", "#section-3", CodeUnreadable, "not a hand-over link"},
		{"newer", "h=2.AAAA", CodeNewer, "newer version"},
		{"much newer", "h=99999999999999999999999.AAAA", CodeNewer, "newer version"},
		{"no version", "h=x.AAAA", CodeAltered, "which version"},
		{"version 0", "h=0.AAAA", CodeAltered, "which version"},
		{"only the key", "h=", CodeCutShort, "first few characters"},
		{"long", "h=1." + strings.Repeat("A", mostLinkCharacters), CodeTooLarge, "65540 characters"},
		{"bomb", linkOf(bytes.Repeat([]byte(" "), 40<<20)), CodeTooLarge, "unfolds to more than"},
		{"no JSON", linkOf([]byte("hello")), CodeUnreadable, "cannot be read"},
		{"nothing", linkOf(nil), CodeCutShort, "ends in the middle"},
		{"not deflated", wrapLink([]byte("\xff\xff\xff\xff")), CodeAltered, "cannot be unfolded"},
		{"empty object", linkOf([]byte("{}")), CodeUnreadable, "no specification"},
		{"newer document", linkOf([]byte(`{"document":{"schema":9}}`)), CodeNewer, "document version 9"},
		{"no schema", linkOf([]byte(`{"document":{}}`)), CodeUnreadable, "which version"},
		{"half a schema", linkOf([]byte(`{"document":{"schema":0.5}}`)), CodeUnreadable, "whole number"},
		{"null", linkOf([]byte(`null`)), CodeUnreadable, "no specification"},
	} {
		_, err := DecodeLink(row.text)
		if codeOf(err) != row.code || !strings.Contains(err.Error(), row.words) {
			t.Errorf("%s: %q %v; want %q with %q", row.name, codeOf(err), err, row.code, row.words)
		}
	}
}

// linkOf wraps any text as a link, as a hostile sender could.
func linkOf(body []byte) string {
	var packed bytes.Buffer
	packer, _ := flate.NewWriterDict(&packed, flate.BestCompression, []byte(linkDictionary1))
	packer.Write(body)
	packer.Close()
	return wrapLink(packed.Bytes())
}

func wrapLink(packed []byte) string {
	data := binary.BigEndian.AppendUint32(nil, checksum(packed))
	data = binary.AppendUvarint(data, uint64(len(packed)))
	return "h=1." + base64.RawURLEncoding.EncodeToString(append(data, packed...))
}

func writeLinkSeeds(t *testing.T) {
	link, err := EncodeLink(fullParcel())
	if err != nil {
		t.Fatal(err)
	}
	bare, err := EncodeLink(Parcel{Document: fullDocument()})
	if err != nil {
		t.Fatal(err)
	}
	parcel := fullParcel()
	parcel.Document = richDocument()
	real, err := EncodeLink(parcel)
	if err != nil {
		t.Fatal(err)
	}
	for name, text := range map[string]string{
		"whole-1.txt": link, "bare-1.txt": bare, "real-1.txt": real, "cut-short.txt": link[:600], "altered.txt": link[:300] + "x" + link[301:], "newer.txt": "h=2" + link[3:],
		"not-a-link.txt": "#section-3", "bomb.txt": linkOf(bytes.Repeat([]byte(" "), 1<<20)), "newer-document.txt": linkOf([]byte(`{"document":{"schema":9}}`)),
		"text-for-number.txt": linkOf([]byte(`{"document":{"schema":1,"ring":{"radius":"wide"}}}`)),
	} {
		writeSeed(t, filepath.Join(linksDir, name), []byte(text+"\n"))
	}
}

// writeSeed leaves a file that is there: what was written in the past must
// stay readable.
func writeSeed(t *testing.T, path string, data []byte) {
	if _, err := os.Stat(path); err == nil {
		return
	}
	if err := os.WriteFile(path, data, 0o644); err != nil {
		t.Fatal(err)
	}
}

// FuzzDecodeLink: whatever arrives, there is no panic, and either a sentence
// or a parcel that can be sent on and arrives the same.
func FuzzDecodeLink(f *testing.F) {
	addSeeds(f, linksDir)
	f.Fuzz(func(t *testing.T, text []byte) {
		p, err := DecodeLink(string(text))
		if err != nil {
			if codeOf(err) == "" || err.Error() == "" {
				t.Errorf("no sentence: %v", err)
			}
			return
		}
		link, err := EncodeLink(p)
		if err != nil {
			t.Fatalf("accepted, but cannot be sent on: %v", err)
		}
		again, err := DecodeLink(link)
		if err != nil || !reflect.DeepEqual(again, roundParcel(p)) {
			t.Errorf("sent on, it reads %+v (%v), not %+v", again, err, p)
		}
	})
}

func addSeeds(f *testing.F, dir string) {
	entries, err := os.ReadDir(dir)
	if err != nil {
		f.Fatal(err)
	}
	for _, entry := range entries {
		data, err := os.ReadFile(filepath.Join(dir, entry.Name()))
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
}

package spectrum

import (
	"encoding/json"
	"errors"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

const signals = "../../testdata/signals/"

// truth is an entry of signals.json, written by make_signals.py.
type truth struct {
	Rate     float64
	Channels int
	Frames   int
	Sum      []float64
	Squares  []float64
	Last     []float64
	Start    float64
	Starts   []float64
	Noise    float64
	Clipped  float64
	Parts    []part
	Steady   []part
}

type part struct{ Frequency, Amplitude, Decay float64 }

func readTruth(t testing.TB) map[string]truth {
	t.Helper()
	var all map[string]truth
	if err := json.Unmarshal(readFile(t, signals+"signals.json"), &all); err != nil {
		t.Fatal(err)
	}
	return all
}

func readFile(t testing.TB, name string) []byte {
	t.Helper()
	b, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

func readWAV(t testing.TB, name string) *Recording {
	t.Helper()
	rec, err := Read(readFile(t, signals+name))
	if err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	return rec
}

// TestFormats compares every sample format with the sums that numpy took over the same bytes. Each
// sample is exact in float64; a sum of n terms differs by at most n ulp of the sum of magnitudes,
// which is under sqrt(n squares).
func TestFormats(t *testing.T) {
	all := readTruth(t)
	if len(all) != 10 {
		t.Fatalf("signals.json lists %d recordings, want 10", len(all))
	}
	for name, want := range all {
		rec := readWAV(t, name)
		if rec.Rate != want.Rate || len(rec.Channels) != want.Channels || rec.Len() != want.Frames || len(rec.Notes) != 0 {
			t.Errorf("%s: rate %g, %d channels, %d frames, notes %v", name, rec.Rate, len(rec.Channels), rec.Len(), rec.Notes)
			continue
		}
		for c, x := range rec.Channels {
			n := float64(len(x))
			tol := n * 0x1p-52 * math.Sqrt(n*want.Squares[c])
			sum, squares := mean(x)*n, sumSquares(x)
			if math.Abs(sum-want.Sum[c]) > tol || math.Abs(squares-want.Squares[c]) > n*0x1p-52*want.Squares[c] {
				t.Errorf("%s channel %d: sum %.15g, squares %.15g, want %.15g, %.15g", name, c+1, sum, squares, want.Sum[c], want.Squares[c])
			}
			if x[len(x)-1] != want.Last[c] {
				t.Errorf("%s channel %d: last sample %g, want %g", name, c+1, x[len(x)-1], want.Last[c])
			}
		}
	}
}

// TestHeaders runs through the files of testdata/signals/fuzz: what each lies about is its name.
func TestHeaders(t *testing.T) {
	for _, c := range []struct {
		file    string
		err     Code
		note    Code
		samples int
		says    string // a part of the error or note
	}{
		{"good", "", "", 40, ""},
		{"empty", CodeNotWAV, "", 0, "empty file"},
		{"not-wav", CodeNotWAV, "", 0, `starts with "OggS"`},
		{"riff-but-avi", CodeNotWAV, "", 0, "not a WAV file"},
		{"only-header", CodeNoFormat, "", 0, "fmt chunk is missing"},
		{"no-fmt", CodeNoFormat, "", 0, "fmt chunk is missing"},
		{"short-fmt", CodeNoFormat, "", 0, "holds 4 bytes"},
		{"no-data", CodeNoData, "", 0, "no data chunk"},
		{"data-too-large", "", NoteCutShort, 40, "promises 62.5 s, the file holds 0.005 s; the 0.005 s are used"},
		{"data-ffffffff", "", NoteNoLength, 40, "gives no length"},
		{"data-zero", "", NoteNoLength, 40, "gives no length"},
		{"data-zero-then-list", CodeNoData, "", 0, "data chunk is empty"},
		{"data-odd", "", NotePartFrame, 39, "last 1 bytes"},
		{"list-too-large", CodeNoData, "", 0, "longer than the file"},
		{"zero-rate", CodeRate, "", 0, "sample rate of 0 Hz"},
		{"huge-rate", CodeRate, "", 0, "between 1000 Hz and 1000000 Hz"},
		{"zero-channels", CodeChannels, "", 0, "0 channels"},
		{"many-channels", CodeChannels, "", 0, "65535 channels"},
		{"align-wrong", CodeBlockAlign, "", 0, "make 2 bytes a frame, but it says 3"},
		{"align-zero", "", "", 40, ""},
		{"byte-rate-wrong", "", NoteByteRate, 40, "sample rate is used"},
		{"bits-12", CodeSampleSize, "", 0, "8, 16, 24 or 32 bits can be read"},
		{"bits-zero", CodeSampleSize, "", 0, "of 0 bits"},
		{"compressed", CodeEncoding, "", 0, "format 85"},
		{"float-16", CodeSampleSize, "", 0, "32 or 64 bits can be read"},
		{"nan", CodeNotFinite, "", 0, "3 of the 8 samples"},
		{"one-nan", "", NoteGaps, 2001, "1 samples"},
		{"float-big", "", NoteOverscale, 4, "3.28e+04"},
		{"float-64", "", "", 4, ""},
		{"extensible", "", "", 40, ""},
		{"extensible-cut", CodeEncoding, "", 0, "format 65534"},
		{"odd-chunk", "", "", 40, ""},
		{"rf64", "", NoteNoLength, 40, "gives no length"},
		{"cut-in-header", CodeNoFormat, "", 0, "holds 10 bytes"},
	} {
		rec, err := Read(readFile(t, signals+"fuzz/"+c.file+".wav"))
		if c.err != "" {
			var e *Error
			if !errors.As(err, &e) || e.Code != c.err || e.Field != "recording" || !strings.Contains(e.Message, c.says) {
				t.Errorf("%s: error %v, want code %s saying %q", c.file, err, c.err, c.says)
			}
			continue
		}
		if err != nil {
			t.Errorf("%s: %v", c.file, err)
			continue
		}
		if rec.Len() != c.samples {
			t.Errorf("%s: %d samples, want %d", c.file, rec.Len(), c.samples)
		}
		switch {
		case c.note == "" && len(rec.Notes) != 0, c.note != "" && len(rec.Notes) != 1:
			t.Errorf("%s: notes %v, want %q", c.file, rec.Notes, c.note)
		case c.note != "" && (rec.Notes[0].Code != c.note || !strings.Contains(rec.Notes[0].Message, c.says)):
			t.Errorf("%s: note %v, want %s saying %q", c.file, rec.Notes[0], c.note, c.says)
		}
	}
}

// TestExactSamples pins single values: the ramp of 16-bit counts, and floats.
func TestExactSamples(t *testing.T) {
	for _, file := range []string{"good", "extensible", "odd-chunk", "data-zero"} {
		rec := readWAV(t, "fuzz/"+file+".wav")
		for i, v := range rec.Channels[0] {
			if want := float64(-20000+1000*i) / 32768; v != want {
				t.Fatalf("%s: sample %d is %g, want %g", file, i, v, want)
			}
		}
	}
	for i, want := range []float64{0.5, -0.25, 0.125, 0} {
		if v := readWAV(t, "fuzz/float-64.wav").Channels[0][i]; v != want {
			t.Errorf("float-64: sample %d is %g, want %g", i, v, want)
		}
	}
	if r := readWAV(t, "fuzz/float-big.wav"); !math.IsInf(r.FullScale, 1) || r.Channels[0][1] != -32768 {
		t.Errorf("float-big: full scale %g, sample %g", r.FullScale, r.Channels[0][1])
	}
}

// FuzzReadWAV: whatever the bytes, Read and Analyse return finite numbers in memory bounded by
// the bytes, or an error in a sentence.
func FuzzReadWAV(f *testing.F) {
	seeds, err := filepath.Glob(signals + "fuzz/*.wav")
	if err != nil || len(seeds) < 30 {
		f.Fatalf("%d seeds, %v", len(seeds), err)
	}
	for _, s := range seeds {
		f.Add(readFile(f, s))
	}
	a := NewAnalyzer()
	f.Fuzz(func(t *testing.T, b []byte) {
		rec, err := Read(b)
		if err != nil {
			checkSentence(t, err)
			return
		}
		total := 0
		for _, c := range rec.Channels {
			total += len(c)
			if len(c) != rec.Len() {
				t.Fatalf("channels of %d and %d samples", len(c), rec.Len())
			}
		}
		if total == 0 || total > len(b) {
			t.Fatalf("%d samples from %d bytes", total, len(b))
		}
		res, err := a.Analyse(rec, Options{})
		if err != nil {
			checkSentence(t, err)
			return
		}
		checkFinite(t, res)
	})
}

func checkSentence(t testing.TB, err error) {
	t.Helper()
	var e *Error
	if !errors.As(err, &e) || e.Field == "" || e.Code == "" || !strings.HasSuffix(e.Message, ".") {
		t.Errorf("not a sentence with a field and a code: %#v", err)
	}
}

// checkFinite looks at every number of a result.
func checkFinite(t testing.TB, r Result) {
	t.Helper()
	all := []float64{r.From, r.Seconds, r.Peak, r.Clipped, r.Background, r.Spectrum.Start, r.Spectrum.Step, r.Spectrum.Seconds}
	all = append(append(append(all, r.Strikes...), r.Spectrum.Level...), r.Spectrum.Floor...)
	for _, p := range r.Peaks {
		all = append(all, p.Frequency, p.FrequencyU, p.Bound, p.Amplitude, p.Level, p.Height, p.SNR, p.Decay, p.DecayU, p.Residual, p.Seconds)
	}
	for _, v := range all {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("a number in the result is %g: %+v", v, r)
		}
	}
	if r.Strikes == nil || r.Peaks == nil || r.Notes == nil || len(r.Spectrum.Level) != len(r.Spectrum.Floor) {
		t.Fatalf("an absent list in the result: %+v", r)
	}
}

package spectrum

import (
	"encoding/binary"
	"math"
	"math/rand/v2"
	"testing"
)

// benchTap is the signal that testdata/bench/spectrum_numpy.py makes too: 3 s at 48 kHz, 16 bit,
// 0.1 s of noise and then twelve decaying tones.
func benchTap() []byte {
	const rate, seconds = 48000, 3
	r := rand.New(rand.NewPCG(1, 2))
	wav := append([]byte("RIFF\x00\x00\x00\x00WAVEfmt \x10\x00\x00\x00\x01\x00\x01\x00"), make([]byte, 12)...)
	binary.LittleEndian.PutUint32(wav[24:], rate)
	binary.LittleEndian.PutUint32(wav[28:], 2*rate)
	wav[32], wav[34] = 2, 16
	wav = append(wav, "data\x00\x00\x00\x00"...)
	binary.LittleEndian.PutUint32(wav[40:], 2*rate*seconds)
	for i := range rate * seconds {
		t := float64(i)/rate - 0.1
		v := 3e-4 * r.NormFloat64()
		for k := 0.0; k < 12 && t >= 0; k++ {
			v += 0.06 * math.Exp(-(3+k/2)*t) * math.Cos(2*math.Pi*(60+47.3*k)*t+k)
		}
		wav = binary.LittleEndian.AppendUint16(wav, uint16(int16(math.Round(v*32767))))
	}
	return wav
}

// BenchmarkWavToPeaks reads a WAV of 3 s at 48 kHz and finds its peaks.
func BenchmarkWavToPeaks(b *testing.B) {
	wav := benchTap()
	a := NewAnalyzer()
	for b.Loop() {
		rec, err := Read(wav)
		if err != nil {
			b.Fatal(err)
		}
		res, err := a.Analyse(rec, Options{})
		if err != nil {
			b.Fatal(err)
		}
		if len(res.Peaks) != 12 {
			b.Fatalf("%d peaks, want 12", len(res.Peaks))
		}
	}
}

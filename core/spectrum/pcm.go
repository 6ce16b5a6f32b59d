package spectrum

import (
	"encoding/binary"
	"fmt"
	"math"
)

// largestSample is the largest magnitude taken for a sample. Converters give 1; files of
// unscaled 32-bit counts written as floats reach 2^31.
const largestSample = 1 << 31

// gapShare is the largest share of samples that may be no number and still be read as zeros.
const gapShare = 1e-3

// decode turns whole frames into a Recording. Whole numbers of b bits are divided by 2^(b-1)
// (8-bit ones after taking off 128), so that the most negative one is -1.
func decode(b []byte, f *format, notes []Note) (*Recording, error) {
	frames := len(b) / f.frame()
	rec := &Recording{Rate: f.rate, Channels: make([][]float64, f.channels), FullScale: 1 - clipMargin}
	all := make([]float64, frames*f.channels)
	for c := range rec.Channels {
		rec.Channels[c] = all[c*frames : (c+1)*frames : (c+1)*frames]
	}
	width := f.bits / 8
	for c, out := range rec.Channels {
		decodeChannel(out, b[c*width:], f)
	}
	rec.Encoding = encodingName(f)
	if f.float {
		var err error
		if notes, err = mendFloats(rec, all, notes); err != nil {
			return nil, err
		}
	}
	rec.Notes = notes
	return rec, nil
}

func encodingName(f *format) string {
	if f.float {
		return fmt.Sprintf("%d-bit float", f.bits)
	}
	return fmt.Sprintf("%d-bit", f.bits)
}

// decodeChannel reads every frame's first sample of b into out.
func decodeChannel(out []float64, b []byte, f *format) {
	le := binary.LittleEndian
	step := f.frame()
	switch {
	case f.float && f.bits == 32:
		for i := range out {
			out[i] = float64(math.Float32frombits(le.Uint32(b[i*step:])))
		}
	case f.float:
		for i := range out {
			out[i] = math.Float64frombits(le.Uint64(b[i*step:]))
		}
	case f.bits == 8:
		for i := range out {
			out[i] = float64(int(b[i*step])-128) / (1 << 7)
		}
	case f.bits == 16:
		for i := range out {
			out[i] = float64(int16(le.Uint16(b[i*step:]))) / (1 << 15)
		}
	case f.bits == 24:
		for i := range out {
			p := b[i*step : i*step+3]
			out[i] = float64(int32(uint32(p[0])<<8|uint32(p[1])<<16|uint32(p[2])<<24)>>8) / (1 << 23)
		}
	case f.bits == 32:
		for i := range out {
			out[i] = float64(int32(le.Uint32(b[i*step:]))) / (1 << 31)
		}
	}
}

// mendFloats sets samples that are no numbers to zero if they are few, and takes away the clipping
// limit where samples pass it: such a file was not clipped at 1.
func mendFloats(rec *Recording, all []float64, notes []Note) ([]Note, error) {
	bad, largest := 0, 0.0
	for i, v := range all {
		a := math.Abs(v)
		if math.IsNaN(v) || a > largestSample {
			all[i] = 0
			bad++
		} else if a > largest {
			largest = a
		}
	}
	if float64(bad) > gapShare*float64(len(all)) {
		return nil, &Error{"recording", CodeNotFinite, fmt.Sprintf(
			"%d of the %d samples in the WAV file are no usable numbers (not a number, infinite or beyond 2^31); at most one in a thousand may be.",
			bad, len(all))}
	}
	if bad > 0 {
		notes = append(notes, Note{NoteGaps, fmt.Sprintf("%d samples are no numbers and are read as zero.", bad)})
	}
	if largest > 1+clipMargin {
		rec.FullScale = math.Inf(1)
		notes = append(notes, Note{NoteOverscale, fmt.Sprintf(
			"The largest sample is %.3g where full scale is 1; levels are taken as they are and clipping cannot be told.", largest)})
	}
	return notes, nil
}

package spectrum

import (
	"encoding/binary"
	"fmt"
)

// Read reads a WAV file from memory: RIFF/WAVE with PCM of 8 (unsigned), 16, 24 or 32 bits,
// IEEE floats of 32 or 64 bits, plain or WAVE_FORMAT_EXTENSIBLE, also RF64. Other chunks are
// passed over. At most maxSamples samples are read and memory stays within eight bytes for each
// byte of the file.
//
// A header that contradicts the file is repaired with a Note where only one reading makes
// sense; otherwise the error is an *Error with field "recording".
func Read(wav []byte) (*Recording, error) {
	// "Multimedia Programming Interface and Data Specifications 1.0" (IBM, Microsoft 1991), RIFF
	// and WAVE forms; "Multiple channel audio data and WAVE files" (Microsoft 2001) for the
	// extensible form; EBU Tech 3306 for RF64.
	if len(wav) < 12 || !isRIFF(wav[:4]) || string(wav[8:12]) != "WAVE" {
		return nil, notWAV(wav)
	}
	var f *format
	notes := []Note{}
	for at := 12; at+8 <= len(wav); {
		id := string(wav[at : at+4])
		size := uint64(binary.LittleEndian.Uint32(wav[at+4:]))
		body := wav[at+8:]
		switch id {
		case "fmt ":
			if size > uint64(len(body)) {
				size = uint64(len(body))
			}
			var err error
			if f, err = readFormat(body[:size], &notes); err != nil {
				return nil, err
			}
		case "data":
			if f == nil {
				return nil, noFormat()
			}
			body, err := dataBytes(body, size, f, &notes)
			if err != nil {
				return nil, err
			}
			return decode(body, f, notes)
		}
		next := uint64(at) + 8 + size + size&1
		if next > uint64(len(wav)) {
			break
		}
		at = int(next)
	}
	if f == nil {
		return nil, noFormat()
	}
	return nil, &Error{"recording", CodeNoData,
		"The WAV file ends before any sound: it has no data chunk, or the chunk before it claims to be longer than the file."}
}

func isRIFF(id []byte) bool {
	return string(id) == "RIFF" || string(id) == "RF64"
}

func notWAV(b []byte) *Error {
	if len(b) == 0 {
		return &Error{"recording", CodeNotWAV, "The recording is an empty file; a WAV file is needed."}
	}
	if len(b) > 4 {
		b = b[:4]
	}
	return &Error{"recording", CodeNotWAV, fmt.Sprintf(
		"The recording is not a WAV file: it starts with %q where a WAV file has \"RIFF\" and \"WAVE\".", b)}
}

func noFormat() *Error {
	return &Error{"recording", CodeNoFormat,
		"The WAV file does not say how its samples are stored: the fmt chunk is missing before the data."}
}

// format is what the fmt chunk says, once it has been found possible.
type format struct {
	float    bool
	bits     int
	channels int
	rate     float64
}

func (f *format) frame() int { return f.bits / 8 * f.channels }

func (f *format) seconds(bytes uint64) float64 { return float64(bytes) / float64(f.frame()) / f.rate }

const (
	tagPCM        = 1
	tagFloat      = 3
	tagExtensible = 0xFFFE
	maxChannels   = 64
)

// subFormatTail ends the GUID of every sub-format that stands for a plain format tag.
const subFormatTail = "\x00\x00\x00\x00\x10\x00\x80\x00\x00\xaa\x00\x38\x9b\x71"

func readFormat(b []byte, notes *[]Note) (*format, error) {
	if len(b) < 16 {
		return nil, &Error{"recording", CodeNoFormat, fmt.Sprintf(
			"The WAV file's fmt chunk holds %d bytes; at least 16 are needed.", len(b))}
	}
	le := binary.LittleEndian
	tag := le.Uint16(b)
	channels, rate := int(le.Uint16(b[2:])), le.Uint32(b[4:])
	byteRate, align, bits := le.Uint32(b[8:]), int(le.Uint16(b[12:])), int(le.Uint16(b[14:]))
	if tag == tagExtensible && len(b) >= 40 && string(b[26:40]) == subFormatTail {
		tag = le.Uint16(b[24:])
	}
	if tag != tagPCM && tag != tagFloat {
		return nil, &Error{"recording", CodeEncoding, fmt.Sprintf(
			"The WAV file holds samples of format %d, which is compressed or unknown; save it as PCM of 8, 16, 24 or 32 bits or as 32-bit float.", tag)}
	}
	f := &format{float: tag == tagFloat, bits: bits, channels: channels, rate: float64(rate)}
	if !f.sizeKnown() {
		kind, allowed := "whole numbers", "8, 16, 24 or 32"
		if f.float {
			kind, allowed = "floating numbers", "32 or 64"
		}
		return nil, &Error{"recording", CodeSampleSize, fmt.Sprintf(
			"The WAV file holds %s of %d bits; %s bits can be read.", kind, bits, allowed)}
	}
	if channels < 1 || channels > maxChannels {
		return nil, &Error{"recording", CodeChannels, fmt.Sprintf(
			"The WAV file says it has %d channels; 1 to %d can be read.", channels, maxChannels)}
	}
	if f.rate < minRate || f.rate > maxRate {
		return nil, badRate(f.rate)
	}
	if align != f.frame() && align != 0 {
		return nil, &Error{"recording", CodeBlockAlign, fmt.Sprintf(
			"The WAV file's header contradicts itself: %d channels of %d bits make %d bytes a frame, but it says %d.",
			channels, bits, f.frame(), align)}
	}
	if uint64(byteRate) != uint64(rate)*uint64(f.frame()) {
		*notes = append(*notes, Note{NoteByteRate, fmt.Sprintf(
			"The header's %d bytes a second do not fit its %d samples a second; the sample rate is used.", byteRate, rate)})
	}
	return f, nil
}

func (f *format) sizeKnown() bool {
	if f.float {
		return f.bits == 32 || f.bits == 64
	}
	return f.bits == 8 || f.bits == 16 || f.bits == 24 || f.bits == 32
}

// maxSamples bounds what is read, all channels together: 256 MiB of float64.
const maxSamples = 1 << 25

// dataBytes returns the whole frames of the data chunk, whatever length its header promises.
func dataBytes(body []byte, size uint64, f *format, notes *[]Note) ([]byte, error) {
	have := uint64(len(body))
	frame := uint64(f.frame())
	switch {
	case size == 0 && have >= 8 && looksLikeChunk(body):
		return nil, &Error{"recording", CodeNoData, "The WAV file's data chunk is empty: it holds no sound."}
	case size == 0 || size == 0xFFFFFFFF:
		size = have
		if have >= frame {
			*notes = append(*notes, Note{NoteNoLength, fmt.Sprintf(
				"The header gives no length; all of the %.3g s that follow are used.", f.seconds(have))})
		}
	case size > have:
		*notes = append(*notes, Note{NoteCutShort, fmt.Sprintf(
			"The header promises %.3g s, the file holds %.3g s; the %.3g s are used.",
			f.seconds(size), f.seconds(have), f.seconds(have))})
		size = have
	}
	if size < frame {
		return nil, &Error{"recording", CodeNoData, "The WAV file holds no whole sample after its header."}
	}
	if size%frame != 0 {
		*notes = append(*notes, Note{NotePartFrame, fmt.Sprintf(
			"The last %d bytes do not make a whole sample and are left out.", size%frame)})
		size -= size % frame
	}
	if most := uint64(maxSamples / f.channels * f.frame()); size > most {
		*notes = append(*notes, Note{NoteTooLong, fmt.Sprintf(
			"The recording lasts %.0f s; only its first %.0f s are read.", f.seconds(size), f.seconds(most))})
		size = most
	}
	return body[:size], nil
}

// looksLikeChunk tells an empty data chunk followed by another chunk from samples that follow a
// length never filled in: four printable letters and a length that stays within the file.
func looksLikeChunk(b []byte) bool {
	for _, c := range b[:4] {
		if c < ' ' || c > '~' {
			return false
		}
	}
	return uint64(binary.LittleEndian.Uint32(b[4:])) <= uint64(len(b)-8)
}

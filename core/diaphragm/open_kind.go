package diaphragm

import "bytes"

// FileKind tells the files apart that can be brought in.
type FileKind string

// The kinds of file.
const (
	FileArchive FileKind = "archive"
	FileParcel  FileKind = "hand-over"
	FileUnknown FileKind = "unknown"
)

// KindOfFile tells by the first bytes whether a file may be an archive (a zip)
// or a hand-over (JSON). Only reading it shows whether it is one.
func KindOfFile(data []byte) FileKind {
	text := bytes.TrimLeft(bytes.TrimPrefix(data[:min(len(data), 64)], []byte("\xef\xbb\xbf")), " \t\r\n")
	switch {
	case bytes.HasPrefix(data, []byte("PK\x03\x04")), bytes.HasPrefix(data, []byte("PK\x05\x06")):
		return FileArchive
	case bytes.HasPrefix(text, []byte("{")):
		return FileParcel
	}
	return FileUnknown
}

package diaphragm

import (
	"bytes"
	"compress/flate"
	"encoding/binary"
	"errors"
	"hash/crc32"
	"io"
)

// The part of the zip format that an archive needs (APPNOTE.TXT of the format,
// version 6.3): files stored or deflated, sizes below 4 GiB, no encryption. It
// is written here because package archive/zip brings its own file system into
// the WebAssembly file, 35 kB of it compressed; the tests hold both against
// each other.

const (
	zipLocal       = 0x04034b50
	zipCentral     = 0x02014b50
	zipEnd         = 0x06054b50
	zipLocalSize   = 30
	zipCentralSize = 46
	zipEndSize     = 22
	zipStored      = 0
	zipDeflated    = 8
)

// zipWriter builds a zip file in memory.
type zipWriter struct {
	out     bytes.Buffer
	central bytes.Buffer
	count   int
}

// add appends a file. The name must be ASCII.
func (z *zipWriter) add(name string, data []byte, deflate bool) error {
	packed, method := data, uint16(zipStored)
	if deflate {
		var shrunk bytes.Buffer
		packer, err := flate.NewWriter(&shrunk, flate.DefaultCompression)
		if err != nil {
			return err
		}
		if _, err := packer.Write(data); err != nil {
			return err
		}
		if err := packer.Close(); err != nil {
			return err
		}
		packed, method = shrunk.Bytes(), zipDeflated
	}
	offset := uint32(z.out.Len())
	// Both headers share this part: version needed to extract 2.0, no flags,
	// the method, 1 January 1980 at midnight, checksum, sizes, lengths of name
	// and of extra fields.
	shared := binary.LittleEndian.AppendUint16(nil, 20)
	shared = binary.LittleEndian.AppendUint16(shared, 0)
	shared = binary.LittleEndian.AppendUint16(shared, method)
	shared = binary.LittleEndian.AppendUint32(shared, 0x0021<<16) // date above, time below
	shared = binary.LittleEndian.AppendUint32(shared, crc32.ChecksumIEEE(data))
	shared = binary.LittleEndian.AppendUint32(shared, uint32(len(packed)))
	shared = binary.LittleEndian.AppendUint32(shared, uint32(len(data)))
	shared = binary.LittleEndian.AppendUint16(shared, uint16(len(name)))
	shared = binary.LittleEndian.AppendUint16(shared, 0)

	z.out.Write(binary.LittleEndian.AppendUint32(nil, zipLocal))
	z.out.Write(shared)
	z.out.WriteString(name)
	z.out.Write(packed)

	z.central.Write(binary.LittleEndian.AppendUint32(nil, zipCentral))
	z.central.Write([]byte{20, 0}) // version made by
	z.central.Write(shared)
	z.central.Write(make([]byte, 10)) // no comment, disk 0, no attributes
	z.central.Write(binary.LittleEndian.AppendUint32(nil, offset))
	z.central.WriteString(name)
	z.count++
	return nil
}

// close writes the table of contents and returns the file.
func (z *zipWriter) close() []byte {
	start := z.out.Len()
	z.out.Write(z.central.Bytes())
	end := binary.LittleEndian.AppendUint32(nil, zipEnd)
	end = binary.LittleEndian.AppendUint32(end, 0) // disks
	end = binary.LittleEndian.AppendUint16(end, uint16(z.count))
	end = binary.LittleEndian.AppendUint16(end, uint16(z.count))
	end = binary.LittleEndian.AppendUint32(end, uint32(z.central.Len()))
	end = binary.LittleEndian.AppendUint32(end, uint32(start))
	end = binary.LittleEndian.AppendUint16(end, 0) // no comment
	z.out.Write(end)
	return z.out.Bytes()
}

// zipMember is one file of the table of contents.
type zipMember struct {
	name          string
	method, flags uint16
	checksum      uint32
	packed, size  int
	offset        int
}

var errZip = errors.New("not a readable zip file")

// zipContents reads the table of contents, which stands at the end.
func zipContents(data []byte) ([]zipMember, error) {
	end := -1
	for i := len(data) - zipEndSize; i >= 0 && i >= len(data)-zipEndSize-0xffff; i-- {
		comment := i + 20
		if binary.LittleEndian.Uint32(data[i:]) == zipEnd && i+zipEndSize+int(binary.LittleEndian.Uint16(data[comment:])) == len(data) {
			end = i
			break
		}
	}
	if end < 0 {
		return nil, errZip
	}
	count := int(binary.LittleEndian.Uint16(data[end+10:]))
	size, start := int64(binary.LittleEndian.Uint32(data[end+12:])), int64(binary.LittleEndian.Uint32(data[end+16:]))
	if start+size > int64(end) {
		return nil, errZip
	}
	table := data[start : start+size]
	var members []zipMember
	for range count {
		if len(table) < zipCentralSize || binary.LittleEndian.Uint32(table) != zipCentral {
			return nil, errZip
		}
		nameEnd := zipCentralSize + int(binary.LittleEndian.Uint16(table[28:]))
		next := nameEnd + int(binary.LittleEndian.Uint16(table[30:])) + int(binary.LittleEndian.Uint16(table[32:]))
		if next > len(table) {
			return nil, errZip
		}
		members = append(members, zipMember{
			name:  string(table[zipCentralSize:nameEnd]),
			flags: binary.LittleEndian.Uint16(table[8:]), method: binary.LittleEndian.Uint16(table[10:]), checksum: binary.LittleEndian.Uint32(table[16:]),
			packed: int(binary.LittleEndian.Uint32(table[20:])), size: int(binary.LittleEndian.Uint32(table[24:])), offset: int(binary.LittleEndian.Uint32(table[42:])),
		})
		table = table[next:]
	}
	return members, nil
}

// read returns the content of a member of data, which has to be as long as it
// says and to fit its checksum.
func (m zipMember) read(data []byte) ([]byte, error) {
	const encrypted = 1
	if m.flags&encrypted != 0 || m.offset < 0 || m.packed < 0 || m.size < 0 || m.offset > len(data)-zipLocalSize ||
		binary.LittleEndian.Uint32(data[m.offset:]) != zipLocal {
		return nil, errZip
	}
	header := data[m.offset:]
	start := m.offset + zipLocalSize + int(binary.LittleEndian.Uint16(header[26:])) + int(binary.LittleEndian.Uint16(header[28:]))
	if start > len(data) || m.packed > len(data)-start {
		return nil, errZip
	}
	content := data[start : start+m.packed]
	switch m.method {
	case zipStored:
		content = bytes.Clone(content)
	case zipDeflated:
		var err error
		content, err = io.ReadAll(io.LimitReader(flate.NewReader(bytes.NewReader(content)), int64(m.size)+1))
		if err != nil {
			return nil, errZip
		}
	default:
		return nil, errZip
	}
	if len(content) != m.size || crc32.ChecksumIEEE(content) != m.checksum {
		return nil, errZip
	}
	return content, nil
}

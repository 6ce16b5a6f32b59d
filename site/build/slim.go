package main

import (
	"bytes"
	"encoding/binary"
	"errors"
)

// slim makes a Go program in WebAssembly smaller to ship, without changing what it does:
//
//   - The linker cuts the initial memory into a data segment at every 8 zeros: 72,000 segments here, each with a header
//     of 6 bytes that does not compress. Fewer segments with the zeros in them saved 82 kB of 1,366 kB after brotli.
//   - The tables from program counters to files, lines, inlined calls and live arguments serve stack traces only. Without
//     them a trace names functions and no lines (the runtime answers "?" where a function has no such table), and 114 kB
//     more were saved. Tables that the runtime needs to unwind, to collect garbage and to recover from a panic stay.
//   - So do the descriptions of inlined calls and of arguments that those tables point into, and where a function may not
//     be interrupted: nothing interrupts one in WebAssembly. 22 kB more were saved.
//   - A trace names our own functions only: another 28 kB.
//   - Code that cannot run in a page is emptied (slimunused.go): 21 kB.
//   - Tables that follow a rule are written by a function when the program starts (slimstart.go): 32 kB.
//
// It knows the tables of Go 1.20 and later and returns an error for anything else, so that a new toolchain is noticed.
func slim(wasm []byte) ([]byte, error) {
	sections, err := wasmSections(wasm)
	if err != nil {
		return nil, err
	}
	data, code := -1, -1
	for i, s := range sections {
		switch s.id {
		case dataSection:
			data = i
		case codeSection:
			code = i
		}
	}
	if data < 0 || code < 0 {
		return nil, errors.New("slim: the program has no code or no data section")
	}
	memory, err := initialMemory(sections[data].content)
	if err != nil {
		return nil, err
	}
	table, err := findLineTable(memory)
	if err != nil {
		return nil, err
	}
	if sections[code].content, err = dropUnused(sections[code].content, memory, table); err != nil {
		return nil, err
	}
	if err := dropLines(memory, table); err != nil {
		return nil, err
	}
	writer, err := generateTables(memory, table)
	if err != nil {
		return nil, err
	}
	sections[data].content = dataSegments(memory)
	if sections, err = addStart(sections, writer); err != nil {
		return nil, err
	}
	out := bytes.Clone(wasm[:wasmHeader])
	for _, s := range sections {
		out = append(out, s.id)
		out = binary.AppendUvarint(out, uint64(len(s.content)))
		out = append(out, s.content...)
	}
	return out, nil
}

const (
	wasmHeader  = 8 // magic and version
	codeSection = 10
	dataSection = 11
)

type wasmSection struct {
	id      byte
	content []byte
}

func wasmSections(wasm []byte) ([]wasmSection, error) {
	if !bytes.HasPrefix(wasm, []byte("\x00asm\x01\x00\x00\x00")) {
		return nil, errors.New("slim: not a WebAssembly program of version 1")
	}
	var list []wasmSection
	r := reader{wasm[wasmHeader:], nil}
	for len(r.rest) > 0 && r.err == nil {
		id := r.byte()
		list = append(list, wasmSection{id, r.take(r.unsigned())})
	}
	return list, r.err
}

// initialMemory lays the data segments out as the memory that they fill; it begins at address 0.
func initialMemory(section []byte) ([]byte, error) {
	var memory []byte
	r := reader{section, nil}
	for range r.unsigned() {
		// Active segment of memory 0 with a constant address: 0, i32.const, address, end.
		mode, opcode, address, end := r.byte(), r.byte(), r.signed(), r.byte()
		content := r.take(r.unsigned())
		if r.err != nil || mode != 0 || opcode != 0x41 || end != 0x0b || address < 0 {
			return nil, errors.New("slim: a data segment is of an unexpected form")
		}
		if need := int(address) + len(content); need > len(memory) {
			memory = append(memory, make([]byte, need-len(memory))...)
		}
		copy(memory[address:], content)
	}
	return memory, r.err
}

// longestZeros is the run of zeros that is still written out rather than split at. From 32 to 256 the shipped size
// hardly differs.
const longestZeros = 64

// dataSegments writes memory as data segments.
func dataSegments(memory []byte) []byte {
	var body []byte
	count := 0
	for at := 0; at < len(memory); {
		if memory[at] == 0 {
			at++
			continue
		}
		end := at
		for zeros := 0; end+zeros < len(memory) && zeros < longestZeros; {
			if memory[end+zeros] == 0 {
				zeros++
			} else {
				end += zeros + 1
				zeros = 0
			}
		}
		body = append(body, 0, 0x41)
		body = appendSigned(body, int64(at))
		body = append(body, 0x0b)
		body = binary.AppendUvarint(body, uint64(end-at))
		body = append(body, memory[at:end]...)
		count++
		at = end
	}
	return append(binary.AppendUvarint(nil, uint64(count)), body...)
}

// reader reads the numbers of the WebAssembly format; the first error stays.
type reader struct {
	rest []byte
	err  error
}

func (r *reader) byte() byte {
	b := r.take(1)
	if len(b) == 0 {
		return 0
	}
	return b[0]
}

func (r *reader) take(n uint64) []byte {
	if r.err != nil || n > uint64(len(r.rest)) {
		r.err = errors.Join(r.err, errors.New("slim: the program is cut short"))
		r.rest = nil
		return nil
	}
	b := r.rest[:n]
	r.rest = r.rest[n:]
	return b
}

func (r *reader) unsigned() uint64 {
	v, n := binary.Uvarint(r.rest)
	if n <= 0 {
		n = len(r.rest) + 1
	}
	r.take(uint64(n))
	return v
}

// signed reads a number in signed LEB128.
func (r *reader) signed() int64 {
	var v int64
	for shift := uint(0); shift < 64; {
		b := r.byte()
		v |= int64(b&0x7f) << shift
		shift += 7
		if b < 0x80 {
			if b&0x40 != 0 && shift < 64 {
				v |= -1 << shift
			}
			break
		}
	}
	return v
}

func appendSigned(dst []byte, v int64) []byte {
	for {
		b := byte(v & 0x7f)
		v >>= 7
		if v == 0 && b&0x40 == 0 || v == -1 && b&0x40 != 0 {
			return append(dst, b)
		}
		dst = append(dst, b|0x80)
	}
}

package main

import (
	"bytes"
	"encoding/binary"
	"errors"
	"fmt"
	"maps"
	"slices"
	"strings"
)

// lineTable is the header of the runtime's table of functions (runtime.pcHeader): where its parts begin.
type lineTable struct {
	functions                                   int // how many
	start, names, units, counters, functionData int // where in memory
}

// tableStart is the magic number of Go 1.20's tables, two zeros, the least instruction size and the pointer size.
var tableStart = []byte{0xf1, 0xff, 0xff, 0xff, 0, 0, 1, 8}

func findLineTable(memory []byte) (lineTable, error) {
	const words = 8
	for from := 0; ; {
		i := bytes.Index(memory[from:], tableStart)
		if i < 0 || from+i+8+8*words > len(memory) {
			return lineTable{}, errors.New("slim: the table of functions was not found; the toolchain may have changed its form")
		}
		at := from + i
		from = at + 1
		var w [words]uint64
		for k := range w {
			w[k] = binary.LittleEndian.Uint64(memory[at+8+8*k:])
		}
		// Functions, files, text start, then the offsets of names, units, files, counters and functions in rising order.
		rising := w[3] < w[4] && w[4] < w[5] && w[5] < w[6] && w[6] < w[7]
		if rising && w[7] < uint64(len(memory)-at) && w[0] > 0 && w[0] < w[7] {
			return lineTable{functions: int(w[0]), start: at, names: at + int(w[3]), units: at + int(w[4]), counters: at + int(w[6]), functionData: at + int(w[7])}, nil
		}
	}
}

// Places of the members of runtime._func.
const (
	funcName  = 4  // nameOff
	funcStack = 16 // pcsp
	funcFile  = 20 // pcfile
	funcLine  = 24 // pcln
	funcCount = 28 // npcdata
	funcUnit  = 32 // cuOffset
	funcStart = 36 // startLine
	funcBlobs = 43 // nfuncdata
	funcData  = 44 // the first pcdata
)

// noBlob is the offset of funcdata that a function does not have.
const noBlob = 1<<32 - 1

// traceTables are the pcdata that serve stack traces only: the inlined calls, and which arguments are alive; and where a
// signal may not interrupt the program, which is never asked here (internal/abi, symtab.go).
var traceTables = map[int]bool{0: true, 2: true, 3: true}

// traceBlobs are the funcdata that serve stack traces only: the tree of inlined calls, the arguments' layout and which of
// them are alive.
var traceBlobs = map[int]bool{3: true, 5: true, 6: true}

// dropLines takes the tables of files and lines out of every function, and zeroes what no function refers to then.
func dropLines(memory []byte, t lineTable) error {
	word := func(at int) int { return int(binary.LittleEndian.Uint32(memory[at:])) }
	clear(memory[t.units:t.counters]) // names of files, which only the dropped tables refer to
	kept := make([]bool, t.functionData-t.counters)
	for i := range t.functions {
		entry := t.functionData + 8*i
		if entry+8 > len(memory) {
			return errors.New("slim: the list of functions ends early")
		}
		f := t.functionData + word(entry+4)
		if f+funcData > len(memory) || f+funcData+4*word(f+funcCount) > len(memory) {
			return fmt.Errorf("slim: function %d lies outside the memory", i)
		}
		clear(memory[f+funcFile : f+funcLine+4])
		clear(memory[f+funcUnit : f+funcStart+4])
		if err := keepTable(memory, kept, t, word(f+funcStack)); err != nil {
			return err
		}
		for k := range word(f + funcCount) {
			if traceTables[k] {
				clear(memory[f+funcData+4*k : f+funcData+4*k+4])
				continue
			}
			if err := keepTable(memory, kept, t, word(f+funcData+4*k)); err != nil {
				return err
			}
		}
	}
	for i, k := range kept {
		if !k {
			memory[t.counters+i] = 0
		}
	}
	if err := nameFunctions(memory, t); err != nil {
		return err
	}
	return dropBlobs(memory, t)
}

// dropBlobs takes the funcdata that serve traces only out of every function, and zeroes what no function refers to then.
func dropBlobs(memory []byte, t lineTable) error {
	base, end, err := functionBlobs(memory, t)
	if err != nil {
		return err
	}
	kept := map[int]bool{} // blobs by their offset, and whether one is needed
	for i := range t.functions {
		f := t.functionData + int(binary.LittleEndian.Uint32(memory[t.functionData+8*i+4:]))
		list := f + funcData + 4*int(binary.LittleEndian.Uint32(memory[f+funcCount:]))
		for k := range int(memory[f+funcBlobs]) {
			entry := memory[list+4*k : list+4*k+4]
			offset := binary.LittleEndian.Uint32(entry)
			switch {
			case offset == noBlob:
			case base+int(offset) >= end:
				return fmt.Errorf("slim: function %d has data outside their region", i)
			case traceBlobs[k]:
				kept[int(offset)] = kept[int(offset)]
				binary.LittleEndian.PutUint32(entry, noBlob)
			default:
				kept[int(offset)] = true
			}
		}
	}
	offsets := slices.Sorted(maps.Keys(kept))
	for i, offset := range offsets {
		if !kept[offset] && i+1 < len(offsets) {
			clear(memory[base+offset : base+offsets[i+1]])
		}
	}
	return nil
}

// functionBlobs returns where in memory the blobs lie that functions refer to as funcdata: go:func.*, the address of
// which stands in the runtime's moduledata.
func functionBlobs(memory []byte, t lineTable) (from, to int, err error) {
	const (
		wordFind = 19 // findfunctab, which the linker puts behind the blobs
		wordFunc = 40 // gofunc
	)
	key := binary.LittleEndian.AppendUint64(nil, uint64(t.start))
	key = binary.LittleEndian.AppendUint64(key, uint64(t.names))
	at := bytes.Index(memory, key)
	if at < 0 || at+8*(wordFunc+1) > len(memory) {
		return 0, 0, errors.New("slim: the runtime's module data were not found; the toolchain may have changed their form")
	}
	word := func(k int) int { return int(binary.LittleEndian.Uint64(memory[at+8*k:])) }
	from, to = word(wordFunc), word(wordFind)
	if from < t.functionData || to <= from || to > len(memory) {
		return 0, 0, errors.New("slim: the functions' data do not lie behind their table; the toolchain may have changed its form")
	}
	return from, to, nil
}

// nameFunctions writes the table of function names anew: those of our own functions stay, cut before their type arguments,
// which spell out whole types; those of the libraries become "?", which leaves them out of traces (runtime.showframe).
func nameFunctions(memory []byte, t lineTable) error {
	old := bytes.Clone(memory[t.names:t.units])
	table := []byte("\x00?\x00")
	places := map[string]int{"?": 1}
	for i := range t.functions {
		f := t.functionData + int(binary.LittleEndian.Uint32(memory[t.functionData+8*i+4:]))
		from := int(binary.LittleEndian.Uint32(memory[f+funcName:]))
		if from >= len(old) {
			return fmt.Errorf("slim: the name of function %d lies outside the table", i)
		}
		name, _, _ := strings.Cut(string(old[from:]), "\x00")
		name, _, _ = strings.Cut(name, "[")
		if !strings.HasPrefix(name, "main.") && !strings.HasPrefix(name, "hoopsheet/") {
			name = "?"
		}
		place, known := places[name]
		if !known {
			place = len(table)
			places[name] = place
			table = append(append(table, name...), 0)
		}
		binary.LittleEndian.PutUint32(memory[f+funcName:], uint32(place))
	}
	if len(table) > len(old) {
		return errors.New("slim: the names kept do not fit into their table")
	}
	clear(memory[t.names:t.units])
	copy(memory[t.names:], table)
	return nil
}

// keepTable marks the bytes of one table: pairs of varints up to a value step of zero that is not the first. Offset 0
// stands for no table.
func keepTable(memory []byte, kept []bool, t lineTable, offset int) error {
	if offset == 0 || offset < len(kept) && kept[offset] {
		return nil // a table that is shared, marked already
	}
	for at, first := t.counters+offset, true; ; first = false {
		value, n := binary.Uvarint(memory[at:min(at+10, len(memory))])
		if n <= 0 || at+n > t.functionData {
			return errors.New("slim: a table of program counters has no end")
		}
		keepBytes(kept, at-t.counters, n)
		at += n
		if value == 0 && !first {
			return nil
		}
		_, n = binary.Uvarint(memory[at:min(at+10, len(memory))])
		if n <= 0 || at+n > t.functionData {
			return errors.New("slim: a table of program counters has no end")
		}
		keepBytes(kept, at-t.counters, n)
		at += n
	}
}

func keepBytes(kept []bool, from, n int) {
	for i := range n {
		kept[from+i] = true
	}
}

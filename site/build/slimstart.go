package main

import (
	"encoding/binary"
	"errors"
	"fmt"
)

// generateTables replaces tables of the runtime that follow a rule by a function that writes them when the program is
// instantiated: the list of functions (number and place of each), the number in each function's own entry, and the
// index from program counters to functions, of which every function takes sixteen entries. It returns the bytes of the
// function's body, and zeroes what it writes. A table that does not follow the rule is an error.
func generateTables(memory []byte, t lineTable) ([]byte, error) {
	index, err := functionIndex(memory, t)
	if err != nil {
		return nil, err
	}
	word := func(at int) int { return int(binary.LittleEndian.Uint32(memory[at:])) }
	first := word(t.functionData + 4)
	f := first
	for i := range t.functions {
		at := t.functionData + f
		if at+funcData > len(memory) || word(t.functionData+8*i) != firstFunction+i || word(t.functionData+8*i+4) != f || word(at) != firstFunction+i {
			return nil, fmt.Errorf("slim: function %d does not lie where the ones before it end; the toolchain may have changed its form", i)
		}
		f = (f + funcData + 4*(word(at+funcCount)+int(memory[at+funcBlobs])) + 7) &^ 7
	}
	for j := range buckets(t) {
		entry := index + bucketSize*j
		if entry+bucketSize > len(memory) || word(entry) != j/perFunction {
			return nil, fmt.Errorf("slim: bucket %d of the index of functions breaks the rule; the toolchain may have changed its form", j)
		}
	}
	f = first
	for i := range t.functions {
		clear(memory[t.functionData+8*i : t.functionData+8*i+8])
		at := t.functionData + f
		clear(memory[at : at+4])
		f = (f + funcData + 4*(word(at+funcCount)+int(memory[at+funcBlobs])) + 7) &^ 7
	}
	for j := range buckets(t) {
		clear(memory[index+bucketSize*j : index+bucketSize*j+4])
	}
	return tableWriter(t, first, index), nil
}

const (
	bucketSize  = 20 // runtime.findfuncbucket: a number and sixteen small steps, all zero here
	perFunction = 16 // buckets of 4096 for the 65536 program counters of a function
)

// buckets is how many entries the index has: all of every function's, but one of the last function's.
func buckets(t lineTable) int { return perFunction*(t.functions-1) + 1 }

// functionIndex returns the address of the runtime's findfunctab.
func functionIndex(memory []byte, t lineTable) (int, error) {
	_, to, err := functionBlobs(memory, t)
	return to, err
}

// tableWriter is the body of
//
//	i, f := 0, first
//	for {
//		memory32[functions+8*i], memory32[functions+8*i+4], memory32[functions+f] = firstFunction+i, f, firstFunction+i
//		f = (f + funcData + 4*(memory32[functions+f+funcCount] + memory8[functions+f+funcBlobs]) + 7) &^ 7
//		if i++; i >= count { break }
//	}
//	for i = 0; ; {
//		memory32[index+bucketSize*i] = i / perFunction
//		if i++; i >= buckets { break }
//	}
func tableWriter(t lineTable, first, index int) []byte {
	const (
		i32        = 0x7f
		loop       = 0x03
		brIf       = 0x0d
		end        = 0x0b
		empty      = 0x40
		localGet   = 0x20
		localSet   = 0x21
		localTee   = 0x22
		load       = 0x28
		loadByte   = 0x2d
		store      = 0x36
		constant   = 0x41
		less       = 0x49 // unsigned
		add        = 0x6a
		mul        = 0x6c
		and        = 0x71
		shiftRight = 0x76 // unsigned
		i, f       = 0, 1
	)
	body := []byte{1, 2, i32} // one group of locals: two i32
	op := func(code ...byte) { body = append(body, code...) }
	number := func(v int) { body = appendSigned(append(body, constant), int64(v)) }
	access := func(code byte, offset int) { // alignment of one byte promises nothing
		body = binary.AppendUvarint(append(body, code, 0), uint64(offset))
	}
	count := t.functions
	number(first)
	op(localSet, f, loop, empty)
	op(localGet, i)
	number(8)
	op(mul, localGet, i)
	number(firstFunction)
	op(add)
	access(store, t.functionData)
	op(localGet, i)
	number(8)
	op(mul, localGet, f)
	access(store, t.functionData+4)
	op(localGet, f, localGet, i)
	number(firstFunction)
	op(add)
	access(store, t.functionData)
	op(localGet, f, localGet, f)
	access(load, t.functionData+funcCount)
	op(localGet, f)
	access(loadByte, t.functionData+funcBlobs)
	op(add)
	number(4)
	op(mul, add)
	number(funcData + 7)
	op(add)
	number(-8)
	op(and, localSet, f)
	op(localGet, i)
	number(1)
	op(add, localTee, i)
	number(count)
	op(less, brIf, 0, end)
	number(0)
	op(localSet, i, loop, empty)
	op(localGet, i)
	number(bucketSize)
	op(mul, localGet, i)
	number(4) // log2 of perFunction
	op(shiftRight)
	access(store, index)
	op(localGet, i)
	number(1)
	op(add, localTee, i)
	number(buckets(t))
	op(less, brIf, 0, end)
	return append(body, end)
}

// addStart gives the program a function with the given body, without arguments and results, that runs when it is
// instantiated.
func addStart(sections []wasmSection, body []byte) ([]wasmSection, error) {
	const (
		typeSection, importSection, functionSection, startSection, elementSection = 1, 2, 3, 8, 9

		functionType = 0x60
	)
	imports, types, functions, placed := uint64(0), uint64(0), uint64(0), false
	var out []wasmSection
	grow := func(s wasmSection, further []byte) (wasmSection, uint64, error) {
		r := reader{s.content, nil}
		n := r.unsigned()
		content := binary.AppendUvarint(nil, n+1)
		return wasmSection{s.id, append(append(content, r.rest...), further...)}, n, r.err
	}
	for _, s := range sections {
		var err error
		switch s.id {
		case importSection:
			if imports, err = importedFunctions(s.content); err != nil {
				return nil, err
			}
		case typeSection:
			s, types, err = grow(s, []byte{functionType, 0, 0})
		case functionSection:
			s, functions, err = grow(s, binary.AppendUvarint(nil, types))
		case startSection:
			return nil, errors.New("slim: the program has a start function already")
		case elementSection:
			out = append(out, wasmSection{startSection, binary.AppendUvarint(nil, imports+functions)})
			placed = true
		case codeSection:
			s, _, err = grow(s, append(binary.AppendUvarint(nil, uint64(len(body))), body...))
		}
		if err != nil {
			return nil, err
		}
		out = append(out, s)
	}
	if !placed || functions == 0 {
		return nil, errors.New("slim: the program has no functions or no table of them")
	}
	return out, nil
}

// importedFunctions counts the imports, all of which must be functions.
func importedFunctions(section []byte) (uint64, error) {
	r := reader{section, nil}
	n := r.unsigned()
	for range n {
		r.take(r.unsigned()) // module
		r.take(r.unsigned()) // name
		if kind := r.byte(); kind != 0 {
			return 0, errors.New("slim: the program imports something that is no function")
		}
		r.unsigned()
	}
	return n, r.err
}

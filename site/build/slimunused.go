package main

import (
	"bytes"
	"encoding/binary"
	"errors"
	"fmt"
	"strings"
)

// unused names the functions of Go's runtime that cannot run in a page, by the beginning of their names. Nothing in the
// program can turn on what they serve, which the linker does not know:
//
//   - execution traces: every use is behind a traceLocker that is ok only once runtime/trace has started one;
//   - the reading of runtime metrics, and GODEBUG's scheduler trace and finalizer check: a page has no environment;
//   - buffers of CPU profiles: WebAssembly has no signals to fill them;
//   - layouts of times and rules of time zones: the program writes its times itself (core/diaphragm), and a page's zone
//     comes from the browser;
//   - calls of functions and methods through reflection, and GODEBUG's search for a culprit by bisection.
//
// Should one be called all the same, the program stops there with an error, and the page starts it anew.
var unused = []string{
	"runtime.traceLocker.", "runtime.traceWriter.", "runtime.traceEventWriter.", "runtime.traceExpWriter.",
	"runtime.(*traceStringTable).", "runtime.(*traceStackTable).", "runtime.(*traceTypeTable).", "runtime.(*traceMap).",
	"runtime.(*traceRegionAlloc).", "runtime.(*traceBuf).", "runtime.traceAdvance", "runtime.traceSyncBatch", "runtime.traceReadCPU",
	"runtime.traceStack", "runtime.makeTraceFrame", "runtime.traceRegisterLabelsAndReasons", "runtime.traceBufFlush",
	"runtime.initMetrics", "runtime.schedtrace", "runtime.checkFinalizersAndCleanups", "runtime.(*profBuf).",
	"time.parse", "time.nextStdChunk", "time.tzset", "time.tzrule", "time.getnum", "time.quote", "time.appendNano",
	"time.Time.GoString", "time.Time.appendFormat", "time.Time.appendStrictRFC3339", "time.Time.MarshalJSON",
	"reflect.callMethod", "reflect.callReflect", "reflect.Value.call", "reflect.makeMethodValue", "internal/bisect.",
}

// used are exceptions: asked whether or not there is a trace.
var used = map[string]bool{"runtime.traceLocker.ok": true}

// firstFunction is the number that the linker gives to the first function of the code section (cmd/link/internal/wasm).
const firstFunction = 0x1000

// dropUnused empties the bodies of unused functions, so that they trap, and takes their tables away.
func dropUnused(code, memory []byte, t lineTable) ([]byte, error) {
	drop := make([]bool, t.functions)
	found := 0
	for i := range t.functions {
		f := t.functionData + int(binary.LittleEndian.Uint32(memory[t.functionData+8*i+4:]))
		from := t.names + int(binary.LittleEndian.Uint32(memory[f+funcName:]))
		if from >= t.units {
			return nil, fmt.Errorf("slim: the name of function %d lies outside the table", i)
		}
		name, _, _ := bytes.Cut(memory[from:t.units], []byte{0})
		if entry := int(binary.LittleEndian.Uint32(memory[t.functionData+8*i:])); entry != firstFunction+i {
			return nil, fmt.Errorf("slim: function %d does not begin where it is expected; the toolchain may have changed its form", i)
		}
		if drop[i] = isUnused(string(name)); drop[i] {
			found++
			clear(memory[f+funcStack : f+funcStack+4])
			list := f + funcData
			clear(memory[list : list+4*int(binary.LittleEndian.Uint32(memory[f+funcCount:]))])
			list += 4 * int(binary.LittleEndian.Uint32(memory[f+funcCount:]))
			for k := range int(memory[f+funcBlobs]) {
				binary.LittleEndian.PutUint32(memory[list+4*k:], noBlob)
			}
		}
	}
	if found == 0 {
		return nil, errors.New("slim: none of the runtime's unused functions was found; the toolchain may have changed their names")
	}
	r := reader{code, nil}
	count := r.unsigned()
	if count < uint64(len(drop)) {
		return nil, errors.New("slim: there are fewer functions than names")
	}
	out := binary.AppendUvarint(nil, count)
	for i := range count {
		body := r.take(r.unsigned())
		if r.err != nil {
			return nil, r.err
		}
		if i < uint64(len(drop)) && drop[i] {
			body = []byte{0, 0x00, 0x0b} // no locals, unreachable, end
		}
		out = append(binary.AppendUvarint(out, uint64(len(body))), body...)
	}
	return out, nil
}

func isUnused(name string) bool {
	if used[name] {
		return false
	}
	for _, begin := range unused {
		if strings.HasPrefix(name, begin) {
			return true
		}
	}
	return false
}

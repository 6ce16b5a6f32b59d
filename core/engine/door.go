package engine

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"io"
	"reflect"
)

// call is one entry of the list that scripts, the worker and the generated
// contract share.
type call struct {
	name    string
	summary string
	request reflect.Type
	result  reflect.Type
	run     func(ctx context.Context, decode func(any) error) (any, error)
}

// define makes the list entry of a call from its typed function.
func define[Request, Result any](name, summary string, run func(context.Context, *Request) (*Result, error)) call {
	return call{
		name:    name,
		summary: summary,
		request: reflect.TypeFor[Request](),
		result:  reflect.TypeFor[Result](),
		run: func(ctx context.Context, decode func(any) error) (any, error) {
			request := new(Request)
			if err := decode(request); err != nil {
				return nil, err
			}
			result, err := run(ctx, request)
			if err != nil {
				return nil, err
			}
			return result, nil
		},
	}
}

// CallInfo describes one call for generators and for the page on scripting.
type CallInfo struct {
	Name    string
	Summary string
	Request reflect.Type
	Result  reflect.Type
}

// Calls lists every call in the order in which the pages use them.
func Calls() []CallInfo {
	list := calls()
	infos := make([]CallInfo, len(list))
	for i, c := range list {
		infos[i] = CallInfo{Name: c.name, Summary: c.summary, Request: c.request, Result: c.result}
	}
	return infos
}

// Call runs the named call on a JSON request and returns its result as JSON.
//
// Every quantity is in SI units. Arrays are written out in full; recordings
// are base64 strings. The error, where there is one, is an *Error whose
// problems name the field, the code and the sentence to show. A call never
// panics on account of its input.
func Call(ctx context.Context, name string, request []byte) (response []byte, err error) {
	result, err := dispatch(ctx, name, request, nil)
	if err != nil {
		return nil, err
	}
	return Encode(result)
}

// CallBulk is Call with a side channel: blobs are the bytes of the request's
// Blob fields, in the order of their "blob" indices, and the Numbers of the
// result come back beside the JSON, where each stands as an empty array.
func CallBulk(ctx context.Context, name string, request []byte, blobs [][]byte) (response []byte, arrays []Array, err error) {
	result, err := dispatch(ctx, name, request, blobs)
	if err != nil {
		return nil, nil, err
	}
	arrays = TakeArrays(result)
	response, err = Encode(result)
	return response, arrays, err
}

func dispatch(ctx context.Context, name string, request []byte, blobs [][]byte) (any, error) {
	for _, c := range calls() {
		if c.name != name {
			continue
		}
		return c.run(ctx, func(into any) error {
			return Decode(request, blobs, into)
		})
	}
	return nil, Fail("call", CodeUnknownCall, "There is no call named "+quote(name)+"; the page For scripts lists them.")
}

// Decode reads a request and puts the blobs where it refers to them. It refuses
// unknown members and trailing text, so that a misspelt member of a script's
// request is not ignored.
func Decode(data []byte, blobs [][]byte, into any) error {
	decoder := json.NewDecoder(bytes.NewReader(data))
	decoder.DisallowUnknownFields()
	if err := decoder.Decode(into); err != nil {
		var mistyped *json.UnmarshalTypeError
		if errors.As(err, &mistyped) && mistyped.Field != "" {
			return Fail(mistyped.Field, CodeRequest, "The member "+quote(mistyped.Field)+" of the request is a JSON "+mistyped.Value+", which it must not be.")
		}
		return Fail("request", CodeRequest, "The request is not the JSON that this call takes: "+err.Error()+".")
	}
	if _, err := decoder.Token(); !errors.Is(err, io.EOF) {
		return Fail("request", CodeRequest, "The request holds more than one JSON value.")
	}
	return GiveBlobs(into, blobs)
}

type progressKey struct{}

// WithProgress returns a context through which long calls report the share of
// the work done, 0 to 1.
func WithProgress(ctx context.Context, report func(share float64)) context.Context {
	return context.WithValue(ctx, progressKey{}, report)
}

// progress returns the reporter of ctx, which is never nil.
func progress(ctx context.Context) func(float64) {
	if report, ok := ctx.Value(progressKey{}).(func(float64)); ok {
		return report
	}
	return func(float64) {}
}

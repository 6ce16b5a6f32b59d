package engine

import (
	"encoding/base64"
	"encoding/json"
	"math"
	"reflect"
	"strconv"
)

// Numbers is a large array of a result. In JSON it is an array of numbers; in
// the worker it crosses as a transferred Float32Array and the JSON holds [].
type Numbers []float32

// MarshalJSON writes [] for a nil array, never null, and null in place of a
// value that is not finite (outside the disc, for one), which JSON cannot hold.
func (n Numbers) MarshalJSON() ([]byte, error) {
	text := make([]byte, 0, 2+12*len(n))
	text = append(text, '[')
	for i, v := range n {
		if i > 0 {
			text = append(text, ',')
		}
		if f := float64(v); math.IsNaN(f) || math.IsInf(f, 0) {
			text = append(text, "null"...)
		} else {
			text = strconv.AppendFloat(text, f, 'g', -1, 32)
		}
	}
	return append(text, ']'), nil
}

// Blob is a file within a request. In JSON it is a base64 string; in the
// worker the JSON holds the string "blob:0" and the bytes cross beside it.
type Blob struct{ Bytes []byte }

// MarshalJSON writes base64.
func (b Blob) MarshalJSON() ([]byte, error) {
	return json.Marshal(base64.StdEncoding.EncodeToString(b.Bytes))
}

// UnmarshalJSON reads base64, or leaves a reference for the side channel.
func (b *Blob) UnmarshalJSON(data []byte) error {
	var text string
	if err := json.Unmarshal(data, &text); err != nil {
		return err
	}
	if len(text) > 5 && text[:5] == "blob:" {
		b.Bytes = []byte(text)
		return nil
	}
	bytes, err := base64.StdEncoding.DecodeString(text)
	if err != nil {
		return Fail("recording", CodeRequest, "The file in the request is not base64 text.")
	}
	b.Bytes = bytes
	return nil
}

// Array is one large array or file of a result with its place: the member
// names that lead to it, an index of a list written as its number. Either
// Values or Bytes is set.
type Array struct {
	Path   []string
	Values []float32
	Bytes  []byte
}

// fillEmpty replaces every nil list and map below v by an empty one, so that
// JSON never says null for them.
func fillEmpty(v reflect.Value) {
	switch v.Kind() {
	case reflect.Pointer:
		if !v.IsNil() {
			fillEmpty(v.Elem())
		}
	case reflect.Struct:
		for i := range v.NumField() {
			if v.Type().Field(i).IsExported() {
				fillEmpty(v.Field(i))
			}
		}
	case reflect.Map:
		if v.IsNil() {
			v.Set(reflect.MakeMap(v.Type()))
		}
	case reflect.Slice:
		if v.Type() == numbersType || v.Type().Elem().Kind() == reflect.Uint8 {
			return
		}
		if v.IsNil() {
			v.Set(reflect.MakeSlice(v.Type(), 0, 0))
		}
		for i := range v.Len() {
			fillEmpty(v.Index(i))
		}
	}
}

// Encode writes a result, a pointer to a struct, as JSON in which no list or
// map is null.
func Encode(result any) ([]byte, error) {
	fillEmpty(reflect.ValueOf(result))
	return json.Marshal(result)
}

var (
	numbersType = reflect.TypeFor[Numbers]()
	blobType    = reflect.TypeFor[Blob]()
)

// TakeArrays removes every Numbers and Blob from the result, a pointer to a
// struct, and returns them with their places, empty ones too, so that the
// worker's side knows what kind of array stands there. The store uses it too.
func TakeArrays(result any) []Array {
	var arrays []Array
	walk(reflect.ValueOf(result), nil, func(v reflect.Value, path []string) {
		array := Array{Path: append([]string(nil), path...)}
		switch value := v.Interface().(type) {
		case Numbers:
			array.Values = value
			if value == nil {
				array.Values = []float32{}
			}
		case Blob:
			array.Bytes = value.Bytes
			if value.Bytes == nil {
				array.Bytes = []byte{}
			}
		}
		arrays = append(arrays, array)
		v.SetZero()
	})
	return arrays
}

// GiveBlobs puts the bytes of the side channel where the request refers to
// them.
func GiveBlobs(request any, blobs [][]byte) error {
	var fault error
	walk(reflect.ValueOf(request), nil, func(v reflect.Value, _ []string) {
		if v.Type() != blobType {
			return
		}
		text := string(v.Field(0).Bytes())
		if len(text) < 6 || len(text) > 12 || text[:5] != "blob:" {
			return
		}
		i, err := strconv.Atoi(text[5:])
		if err != nil || i < 0 || i >= len(blobs) {
			fault = Fail("recording", CodeRequest, "The request refers to a file that did not come with it.")
			return
		}
		v.Set(reflect.ValueOf(Blob{Bytes: blobs[i]}))
	})
	return fault
}

// walk visits every Numbers and Blob below v.
func walk(v reflect.Value, path []string, visit func(reflect.Value, []string)) {
	if v.Type() == numbersType || v.Type() == blobType {
		visit(v, path)
		return
	}
	switch v.Kind() {
	case reflect.Pointer:
		if !v.IsNil() {
			walk(v.Elem(), path, visit)
		}
	case reflect.Struct:
		for i := range v.NumField() {
			if v.Type().Field(i).IsExported() {
				walk(v.Field(i), append(path, memberName(v.Type().Field(i))), visit)
			}
		}
	case reflect.Slice:
		if k := v.Type().Elem().Kind(); k != reflect.Struct && k != reflect.Pointer {
			return
		}
		for i := range v.Len() {
			walk(v.Index(i), append(path, strconv.Itoa(i)), visit)
		}
	}
}

// memberName is the JSON name of a struct field.
func memberName(f reflect.StructField) string {
	tag := f.Tag.Get("json")
	for i := range len(tag) {
		if tag[i] == ',' {
			return tag[:i]
		}
	}
	if tag == "" {
		return f.Name
	}
	return tag
}

package diaphragm

import "encoding/json"

// MarshalJSON writes an empty list of lines as [], never as null.
func (a Avoid) MarshalJSON() ([]byte, error) {
	type plain Avoid
	if a.Lines == nil {
		a.Lines = []Line{}
	}
	return json.Marshal(plain(a))
}

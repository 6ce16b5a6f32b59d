package diaphragm

import (
	"encoding/json"
	"slices"
	"strconv"

	"hoopsheet/core/air"
)

// mostDocumentBytes is the largest document accepted, bytes of JSON.
const mostDocumentBytes = 1 << 20

// OpenDocument reads a document that came from outside, as JSON, written by
// this version or an older one, and refuses what Validate finds wrong with it.
// The error is a *Refusal.
func OpenDocument(data []byte) (Diaphragm, error) {
	doc, err := ReadDocument(data)
	if err != nil {
		return Diaphragm{}, err
	}
	if problems := Validate(doc); len(problems) > 0 {
		return Diaphragm{}, &Refusal{Problems: problems}
	}
	return doc, nil
}

// ReadDocument reads a document as OpenDocument does, but accepts values that
// Validate would refuse, so that unfinished work can be stored and read again.
// Only its form is checked: known members, numbers where numbers belong, known
// kinds of face. The error is a *Refusal.
func ReadDocument(data []byte) (Diaphragm, error) {
	const what = "The diaphragm's document"
	if len(data) > mostDocumentBytes {
		return Diaphragm{}, refuse("document", CodeTooLarge, what+" holds "+strconv.Itoa(len(data))+
			" bytes; at most "+strconv.Itoa(mostDocumentBytes)+" are read.")
	}
	data, err := migrate(data, what)
	if err != nil {
		return Diaphragm{}, err
	}
	var doc Diaphragm
	if err := readStrictly(data, &doc, "document", what); err != nil {
		return Diaphragm{}, err
	}
	switch {
	case doc.ID != "" && !soundID(doc.ID):
		return Diaphragm{}, refuse("document", CodeUnreadable, what+" has no proper id: 1 to 64 letters, digits, - or _ are expected.")
	case doc.Revision < 0:
		return Diaphragm{}, refuse("document", CodeUnreadable, what+" counts a negative number of revisions.")
	}
	if problems := tooLongLists(doc); len(problems) > 0 {
		return Diaphragm{}, &Refusal{Problems: problems}
	}
	if err := knownWords(doc, what); err != nil {
		return Diaphragm{}, err
	}
	return normal(doc), nil
}

// migration changes the members of a document from one schema to the next; it
// sets no "schema" itself.
type migration func(members map[string]json.RawMessage) error

// migrations[i] leads from schema i+1 to schema i+2, so that their number is
// always Schema - 1. None exists as long as there is one schema.
var migrations = []migration{}

// migrate brings the JSON of a document to the present schema.
func migrate(data []byte, what string) ([]byte, error) {
	var head struct {
		Schema *int `json:"schema"`
	}
	if err := json.Unmarshal(data, &head); err != nil {
		return nil, refuseJSON(err, "document", what)
	}
	switch {
	case head.Schema == nil || *head.Schema < 1:
		return nil, refuse("document", CodeUnreadable, what+" does not say which version it is written in.")
	case *head.Schema > Schema:
		return nil, refuse("document", CodeNewer, what+" was written by a newer version of Hoopsheet (document version "+
			strconv.Itoa(*head.Schema)+"; this one reads up to "+strconv.Itoa(Schema)+"). Reload the page while online, or open it where it was made.")
	case *head.Schema == Schema:
		return data, nil
	}
	var members map[string]json.RawMessage
	if err := json.Unmarshal(data, &members); err != nil {
		return nil, refuseJSON(err, "document", what)
	}
	for _, step := range migrations[*head.Schema-1:] {
		if err := step(members); err != nil {
			return nil, refuseJSON(err, "document", what)
		}
	}
	members["schema"] = json.RawMessage(strconv.Itoa(Schema))
	return json.Marshal(members)
}

// knownWords refuses words that are none of their list.
func knownWords(doc Diaphragm, what string) error {
	unknown := func(field, thing, word string) error {
		return refuse(field, CodeUnreadable, what+" names a "+thing+" that is not known: "+shorten(word, "none")+".")
	}
	if !slices.Contains(Rims(), doc.Tension.Rim.OrClamped()) {
		return unknown("tension.rim", "kind of rim", string(doc.Tension.Rim))
	}
	for _, side := range []struct {
		name string
		face Face
	}{{"upper", doc.Faces.Upper}, {"lower", doc.Faces.Lower}} {
		if !slices.Contains(FaceKinds(), side.face.Kind) {
			return unknown("faces."+side.name+".kind", "kind of "+side.name+" face", string(side.face.Kind))
		}
		if !slices.Contains(air.FluidNames(), side.face.Fluid.OrAir()) {
			return unknown("faces."+side.name+".fluid", "fluid at the "+side.name+" face", string(side.face.Fluid))
		}
	}
	return nil
}

// soundID reports whether an id is safe to use as a name: 1 to 64 letters,
// digits, hyphens or low lines.
func soundID(id string) bool {
	if len(id) < 1 || len(id) > 64 {
		return false
	}
	for _, c := range []byte(id) {
		switch {
		case c >= '0' && c <= '9', c >= 'A' && c <= 'Z', c >= 'a' && c <= 'z', c == '-', c == '_':
		default:
			return false
		}
	}
	return true
}

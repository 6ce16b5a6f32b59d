package diaphragm

import (
	"bytes"
	"compress/flate"
	"encoding/base64"
	"encoding/binary"
	"errors"
	"hash/crc32"
	"io"
	"strconv"
	"strings"
)

// A link fragment is
//
//	h=1.<base64url without padding>
//
// where 1 is the version of the link and the bytes are
//
//	CRC-32C of the deflated data    4 bytes, big-endian
//	length of the deflated data     unsigned varint
//	deflated data                   JSON of the parcel, RFC 1951
//
// The deflate window starts with the dictionary of that version, so that the
// names of the members cost next to nothing.
const (
	linkKey     = "h="
	linkVersion = 1
)

// MostLink is the largest number of characters that a whole link should have.
// Some mail and chat programs cut longer ones.
const MostLink = 2000

// Limits of what is read: no honest link comes near.
const (
	mostLinkCharacters = 64 << 10
	mostLinkBytes      = 256 << 10 // after inflation
)

const askAgain = " Ask for it again, or ask for the file instead."

// EncodeLink writes a parcel as the fragment of a link, the text after "#".
// The document is exact to the last bit; figures and peaks are rounded to 9
// significant digits. The error is a *Refusal.
func EncodeLink(p Parcel) (fragment string, err error) {
	const what = "The link"
	body, err := encodeBody(roundParcel(p), parcelFile{}, what)
	if err != nil {
		return "", err
	}
	var packed bytes.Buffer
	packer, err := flate.NewWriterDict(&packed, flate.BestCompression, []byte(linkDictionary1))
	if err != nil {
		return "", err
	}
	if _, err := packer.Write(body); err != nil {
		return "", err
	}
	if err := packer.Close(); err != nil {
		return "", err
	}
	data := binary.BigEndian.AppendUint32(nil, checksum(packed.Bytes()))
	data = binary.AppendUvarint(data, uint64(packed.Len()))
	data = append(data, packed.Bytes()...)
	fragment = linkKey + strconv.Itoa(linkVersion) + "." + base64.RawURLEncoding.EncodeToString(data)
	if len(body) > mostLinkBytes || len(fragment) > mostLinkCharacters {
		return "", refuse("link", CodeTooLarge, "The specification is far too long for a link. Hand over the file instead.")
	}
	return fragment, nil
}

// DecodeLink reads the fragment of a link. It accepts a whole link as well,
// and white space and closing punctuation that mail programs add. The error is
// a *Refusal that says whether the link is cut short, altered, or made by a
// newer version.
func DecodeLink(fragment string) (Parcel, error) {
	const what = "The link"
	data, err := unwrapLink(fragment)
	if err != nil {
		return Parcel{}, err
	}
	unpacker := flate.NewReaderDict(bytes.NewReader(data), []byte(linkDictionary1))
	body, err := io.ReadAll(io.LimitReader(unpacker, mostLinkBytes+1))
	if len(body) > mostLinkBytes {
		return Parcel{}, refuse("link", CodeTooLarge, "The link unfolds to more than "+strconv.Itoa(mostLinkBytes)+" bytes; no hand-over does.")
	}
	if err != nil {
		return Parcel{}, refuse("link", CodeAltered, "The link has been altered and cannot be unfolded."+askAgain)
	}
	return decodeBody(body, what)
}

// unwrapLink takes the deflated data out of a fragment and checks that all of
// it is there, unaltered.
func unwrapLink(fragment string) ([]byte, error) {
	if len(fragment) > mostLinkCharacters {
		return nil, refuse("link", CodeTooLarge, "The link has "+strconv.Itoa(len(fragment))+" characters; no hand-over link is longer than "+strconv.Itoa(mostLinkCharacters)+".")
	}
	text, err := linkText(fragment)
	if err != nil {
		return nil, err
	}
	data, bad := decodeBase64(text)
	if bad >= 0 {
		return nil, refuse("link", CodeAltered, "The link has been altered: it holds "+strconv.QuoteToGraphic(string(firstRune(text[bad:])))+", which no hand-over link contains."+askAgain)
	}
	length, width := uint64(0), 0
	if len(data) > 4 {
		length, width = binary.Uvarint(data[4:])
	}
	if width == 0 { // the bytes end before the length does
		return nil, refuse("link", CodeCutShort, "The link is cut short: only its first few characters arrived."+askAgain)
	}
	if width < 0 || length > mostLinkCharacters {
		return nil, refuse("link", CodeAltered, "The link has been altered."+askAgain)
	}
	packed := data[4+width:]
	if have := uint64(len(packed)); have < length {
		whole := len(linkKey) + 2 + base64.RawURLEncoding.EncodedLen(4+width+int(length))
		missing := base64.RawURLEncoding.EncodedLen(4+width+int(length)) - len(text)
		return nil, refuse("link", CodeCutShort, "The link is cut short: "+strconv.Itoa(whole-missing)+" of the "+strconv.Itoa(whole)+
			" characters after # arrived."+askAgain)
	}
	if uint64(len(packed)) > length || checksum(packed) != binary.BigEndian.Uint32(data) {
		return nil, refuse("link", CodeAltered, "The link has been altered on its way: its content does not fit its checksum."+askAgain)
	}
	return packed, nil
}

// linkText finds the base64 text of a fragment of version 1.
func linkText(fragment string) (string, error) {
	// A whole link may have been pasted, broken over lines, with the full stop
	// of its sentence; "%3D" is how some mail programs write "=".
	text := strings.Join(strings.Fields(fragment), "")
	if i := strings.LastIndexByte(text, '#'); i >= 0 {
		text = text[i+1:]
	}
	text, _, _ = strings.Cut(text, "&")
	text = strings.TrimRight(text, ".,;:!?)>]}'\"")
	rest, ok := strings.CutPrefix(text, linkKey)
	if !ok {
		rest, ok = strings.CutPrefix(text, "h%3D")
	}
	if !ok {
		return "", refuse("link", CodeUnreadable, "This is not a hand-over link: after # it should begin with \""+linkKey+"\".")
	}
	number, body, dot := strings.Cut(rest, ".")
	version, err := strconv.Atoi(number)
	switch {
	case errors.Is(err, strconv.ErrRange) || err == nil && version > linkVersion:
		return "", refuse("link", CodeNewer, "The link was made by a newer version of Hoopsheet (link version "+number[:min(len(number), 20)]+
			"; this one reads up to "+strconv.Itoa(linkVersion)+"). Reload the page while online, or ask for the file.")
	case number == "" || err == nil && !dot:
		return "", refuse("link", CodeCutShort, "The link is cut short: only its first few characters arrived."+askAgain)
	case err != nil || version < 1:
		return "", refuse("link", CodeAltered, "The link has been altered: it does not say which version it is."+askAgain)
	}
	return body, nil
}

// decodeBase64 decodes as much as there is of a text that may be cut off
// anywhere. bad is the index of the first foreign character, or -1.
func decodeBase64(text string) (data []byte, bad int) {
	whole := text
	if len(whole)%4 == 1 { // one character alone holds no byte
		whole = whole[:len(whole)-1]
	}
	data, err := base64.RawURLEncoding.DecodeString(whole)
	if err != nil {
		var at base64.CorruptInputError
		if errors.As(err, &at) && int(at) < len(text) {
			return nil, int(at)
		}
		return nil, 0
	}
	return data, -1
}

func firstRune(text string) rune {
	for _, r := range text {
		return r
	}
	return ' '
}

var castagnoli = crc32.MakeTable(crc32.Castagnoli)

// checksum is CRC-32C.
func checksum(data []byte) uint32 { return crc32.Checksum(data, castagnoli) }

// LinkDigits is the number of significant digits that figures and peaks keep
// in a link.
const LinkDigits = 9

func roundParcel(p Parcel) Parcel {
	figures := make([]Figure, len(p.Figures))
	for i, f := range p.Figures {
		figures[i] = Figure{ID: f.ID, Value: RoundForLink(f.Value)}
	}
	peaks := make([]ChosenPeak, len(p.Peaks))
	for i, k := range p.Peaks {
		k.Frequency, k.Uncertainty = RoundForLink(k.Frequency), RoundForLink(k.Uncertainty)
		peaks[i] = k
	}
	p.Figures, p.Peaks = figures, peaks
	return p
}

// RoundForLink rounds to LinkDigits significant digits, as figures and peaks
// are in a link: relative error at most 5e-9. Numbers that are not finite stay
// as they are.
func RoundForLink(x float64) float64 {
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(x, 'e', LinkDigits-1, 64), 64)
	if err != nil { // the largest number of all would round up beyond the range
		return x
	}
	return rounded
}

package diaphragm

import (
	"errors"
	"io"
	"strings"
	"time"
)

// crockford is Crockford's base 32: no I, L, O or U.
const crockford = "0123456789ABCDEFGHJKMNPQRSTVWXYZ"

// idLength is the length of an id: 10 characters of time, 16 of chance.
const idLength = 26

// NewID makes the id of a document or record: a ULID of the millisecond of t
// and ten bytes of entropy, 26 characters. Ids of later milliseconds sort
// later; those of the same one do not. It fails where entropy does, or where t
// lies before 1970 or after the year 10889.
func NewID(t time.Time, entropy io.Reader) (string, error) {
	// ULID specification (public, github.com/ulid/spec): 48 bits of Unix time
	// in milliseconds, 80 bits of chance, most significant first, 5 bits a
	// character behind two zero bits.
	ms := t.UnixMilli()
	if ms < 0 || ms >= 1<<48 {
		return "", errors.New("The time for a new id must lie between the years 1970 and 10889.")
	}
	var chance [10]byte
	if _, err := io.ReadFull(entropy, chance[:]); err != nil {
		return "", errors.New("No random bytes for a new id could be read: " + err.Error() + ".")
	}
	var id [idLength]byte
	for i := 9; i >= 0; i-- {
		id[i] = crockford[ms&31]
		ms >>= 5
	}
	// 80 bits are sixteen times five: take them from two halves of 40 bits.
	for half := range 2 {
		var bits uint64
		for _, b := range chance[5*half : 5*half+5] {
			bits = bits<<8 | uint64(b)
		}
		for i := 7; i >= 0; i-- {
			id[10+8*half+i] = crockford[bits&31]
			bits >>= 5
		}
	}
	return string(id[:]), nil
}

// ValidID is true for a text that NewID could have made.
func ValidID(id string) bool {
	if len(id) != idLength || id[0] > '7' {
		return false
	}
	for i := range len(id) {
		if strings.IndexByte(crockford, id[i]) < 0 {
			return false
		}
	}
	return true
}

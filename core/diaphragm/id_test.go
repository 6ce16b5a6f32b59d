package diaphragm

import (
	"bytes"
	"crypto/rand"
	"errors"
	"math/big"
	"strings"
	"testing"
	"testing/iotest"
	"time"
)

// The ULID specification's own example of a time part (from memory): the
// millisecond 1469918176385 is written 01ARYZ6S41. Its largest id is
// 7ZZZZZZZZZZZZZZZZZZZZZZZZZ.
func TestNewIDFollowsTheSpecification(t *testing.T) {
	id, err := NewID(time.UnixMilli(1469918176385), bytes.NewReader(make([]byte, 10)))
	if err != nil || id != "01ARYZ6S41"+strings.Repeat("0", 16) {
		t.Errorf("%s, %v", id, err)
	}
	id, err = NewID(time.UnixMilli(1<<48-1), bytes.NewReader(bytes.Repeat([]byte{0xff}, 10)))
	if err != nil || id != "7ZZZZZZZZZZZZZZZZZZZZZZZZZ" {
		t.Errorf("%s, %v", id, err)
	}
}

// Read back as one number of base 32, an id is the 48 bits of the time and the
// 80 bits of chance, one after the other.
func TestNewIDHoldsTimeAndChance(t *testing.T) {
	chance := []byte{0x01, 0x23, 0x45, 0x67, 0x89, 0xab, 0xcd, 0xef, 0xfe, 0xdc}
	id, err := NewID(time.UnixMilli(0x0123456789ab), bytes.NewReader(chance))
	if err != nil {
		t.Fatal(err)
	}
	value := new(big.Int)
	for _, c := range id {
		value.Mul(value, big.NewInt(32))
		value.Add(value, big.NewInt(int64(strings.IndexRune(crockford, c))))
	}
	want := new(big.Int).SetBytes(append([]byte{0x01, 0x23, 0x45, 0x67, 0x89, 0xab}, chance...))
	if value.Cmp(want) != 0 {
		t.Errorf("%s is %x, want %x", id, value, want)
	}
}

func TestNewIDSortsByTimeAndDiffers(t *testing.T) {
	seen := map[string]bool{}
	last := ""
	for i := range 200 {
		id, err := NewID(time.UnixMilli(int64(i)*1000), rand.Reader)
		if err != nil || !ValidID(id) || seen[id] || id <= last {
			t.Fatalf("id %d: %q after %q, %v", i, id, last, err)
		}
		seen[id], last = true, id
	}
}

func TestNewIDFailsInWords(t *testing.T) {
	for name, c := range map[string]struct {
		t       time.Time
		entropy *bytes.Reader
	}{
		"before 1970": {time.UnixMilli(-1), bytes.NewReader(make([]byte, 10))},
		"too late":    {time.UnixMilli(1 << 48), bytes.NewReader(make([]byte, 10))},
		"too few":     {time.UnixMilli(0), bytes.NewReader(make([]byte, 9))},
	} {
		if id, err := NewID(c.t, c.entropy); err == nil {
			t.Errorf("%s: %s", name, id)
		}
	}
	if _, err := NewID(time.UnixMilli(0), iotest.ErrReader(errors.New("no source"))); err == nil || !strings.Contains(err.Error(), "no source") {
		t.Errorf("%v", err)
	}
}

func TestValidID(t *testing.T) {
	for id, want := range map[string]bool{
		"01ARYZ6S41TSV4RRFFQ69G5FAV":  true,
		"7ZZZZZZZZZZZZZZZZZZZZZZZZZ":  true,
		"80000000000000000000000000":  false, // more than 128 bits
		"01ARYZ6S41TSV4RRFFQ69G5FA":   false,
		"01ARYZ6S41TSV4RRFFQ69G5FAVV": false,
		"01ARYZ6S41TSV4RRFFQ69G5FAI":  false,
		"01ARYZ6S41TSV4RRFFQ69G5FAU":  false,
		"01aryz6s41tsv4rrffq69g5fav":  false,
		"":                            false,
	} {
		if ValidID(id) != want {
			t.Errorf("%q: %v", id, !want)
		}
	}
}

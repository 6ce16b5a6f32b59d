package diaphragm

import (
	"math/rand"
	"testing"
	"time"
)

// Package time is the reference.
func TestFormatTimeAgreesWithPackageTime(t *testing.T) {
	source := rand.New(rand.NewSource(3))
	for range 5000 {
		unix := source.Int63n(253402300800) // to the end of 9999
		if got, want := FormatTime(unix), time.Unix(unix, 0).UTC().Format(time.RFC3339); got != want {
			t.Fatalf("%d is %s, want %s", unix, got, want)
		}
	}
}

func TestValidTimeAgreesWithPackageTime(t *testing.T) {
	texts := []string{
		"", "Z", "2026-05-04", "2026-05-04T10:00:00", "2026-05-04T10:00:00Z", "2026-05-04T10:00:00.123Z", "2026-05-04T10:00:00.Z",
		"2026-05-04T10:00:00+01:00", "2026-05-04T10:00:00-23:59", "2026-05-04T10:00:00+24:00", "2026-05-04T10:00:00+1:00",
		"2026-02-29T10:00:00Z", "2024-02-29T10:00:00Z", "1900-02-29T00:00:00Z", "2000-02-29T00:00:00Z", "2026-13-01T00:00:00Z",
		"2026-00-01T00:00:00Z", "2026-01-00T00:00:00Z", "2026-01-32T00:00:00Z", "2026-01-01T24:00:00Z", "2026-01-01T23:60:00Z",
		"2026-01-01T23:59:60Z", "2026-01-01t23:59:59Z", "2026-01-01T23:59:59z", "2026-01-01T23:59:59Z ", "+026-01-01T23:59:59Z",
		"2026-01-01T23:59:59.9999999999999Z", "2026-01-01 23:59:59Z", "2026-01-01T23:59:59,5Z",
	}
	for _, text := range texts {
		_, err := time.Parse(time.RFC3339, text)
		want := err == nil
		if text == "2026-01-01T23:59:59,5Z" || text == "2026-05-04T10:00:00+24:00" {
			want = false // package time takes a comma and an offset of 24 hours, RFC 3339 does not
		}
		if got := ValidTime(text); got != want {
			t.Errorf("%q: %v, want %v", text, got, want)
		}
	}
}

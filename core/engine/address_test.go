package engine

import (
	"strings"
	"testing"
)

// TestAddressNote: which addresses a client elsewhere cannot reach. Names and
// ranges as in RFC 1918, 4193, 6761, 6762 and 8375; both sides of 172.16/12.
func TestAddressNote(t *testing.T) {
	for _, c := range []struct {
		address, says string
	}{
		{"https://example.org/h/hand-over.html", ""},
		{"http://example.org/", ""},
		{"HTTPS://Example.ORG:8443/x", ""},
		{"https://198.51.100.7/x", ""},
		{"https://172.15.0.1/", ""},
		{"https://172.32.0.1/", ""},
		{"https://10.example.org/", ""},
		{"https://192.168.example.org/", ""},
		{"https://[2001:db8::1]/", ""},
		{"file:///C:/tools/hoopsheet-single.html", "a file on this device"},
		{"FILE:///x", "a file on this device"},
		{"http://tools/hand-over.html", `"tools" is known only on this network`},
		{"http://tools.intra:8080/", `"tools.intra"`},
		{"https://nas.local/x", `"nas.local"`},
		{"https://box.home.arpa/x", `"box.home.arpa"`},
		{"http://localhost:8137/hand-over.html", `"localhost"`},
		{"http://127.0.0.1:8137/hand-over.html", `"127.0.0.1"`},
		{"http://10.1.2.3", `"10.1.2.3"`},
		{"http://172.16.0.1/", `"172.16.0.1"`},
		{"http://172.31.255.1/", `"172.31.255.1"`},
		{"http://192.168.1.1/", `"192.168.1.1"`},
		{"http://169.254.1.1/", `"169.254.1.1"`},
		{"http://[::1]:8137/", `"[::1]"`},
		{"http://[fd12:3456::1]/", `"[fd12:3456::1]"`},
		{"", "must begin with https://"},
		{"example.org/h", "must begin with https://"},
		{"javascript://example.org/%0aalert(1)", "must begin with https://"},
		{"ftp://example.org/", "must begin with https://"},
	} {
		got := addressNote(c.address)
		if c.says == "" && got != "" || !strings.Contains(got, c.says) {
			t.Errorf("%q: %q, want %q in it", c.address, got, c.says)
		}
	}
}

package engine

import "strings"

// addressNote says why a client may not be able to open a link with this
// address; empty where nothing speaks against it.
func addressNote(address string) string {
	scheme, rest, found := strings.Cut(address, "://")
	if strings.EqualFold(scheme, "file") {
		return "This page is a file on this device, so a link to it opens only here. Send the file instead, or set the address of a hosted copy in Records."
	}
	if !found || !strings.EqualFold(scheme, "http") && !strings.EqualFold(scheme, "https") {
		return "The link's address must begin with https:// or http://. Send the file instead, or set the address of a hosted copy in Records."
	}
	host, _, _ := strings.Cut(rest, "/")
	host, _, _ = strings.Cut(host, "?")
	if colon := strings.LastIndexByte(host, ':'); colon >= 0 && !strings.HasSuffix(host, "]") {
		host = host[:colon]
	}
	if isPrivateHost(strings.ToLower(host)) {
		return "The address \"" + host + "\" is known only on this network, so a client elsewhere cannot open the link. Send the file instead, or set the address of a public copy in Records."
	}
	return ""
}

// isPrivateHost reports names without a dot, names reserved for local use
// (RFC 6761, RFC 6762, RFC 8375 and the "internal" reserved by ICANN in 2024)
// and addresses of private ranges (RFC 1918, RFC 4193).
func isPrivateHost(host string) bool {
	if strings.HasPrefix(host, "[") {
		return host == "[::1]" || strings.HasPrefix(host, "[fc") || strings.HasPrefix(host, "[fd") || strings.HasPrefix(host, "[fe80")
	}
	for _, ending := range []string{".local", ".localhost", ".internal", ".intranet", ".intra", ".lan", ".home.arpa"} {
		if strings.HasSuffix(host, ending) {
			return true
		}
	}
	if !strings.Contains(host, ".") {
		return true
	}
	for _, start := range []string{"127.", "10.", "192.168.", "169.254."} {
		if strings.HasPrefix(host, start) && strings.Trim(host, "0123456789.") == "" {
			return true
		}
	}
	second, ok := strings.CutPrefix(host, "172.")
	if !ok || strings.Trim(host, "0123456789.") != "" {
		return false
	}
	second, _, _ = strings.Cut(second, ".")
	return len(second) == 2 && second >= "16" && second <= "31"
}

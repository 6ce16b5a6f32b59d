package sorting

import (
	"math/rand"
	"slices"
	"testing"
)

// By gives what the standard library's stable sort gives.
func TestByAgreesWithSlices(t *testing.T) {
	type pair struct{ key, place int }
	source := rand.New(rand.NewSource(1))
	for n := range 200 {
		list := make([]pair, n)
		for i := range list {
			list[i] = pair{source.Intn(1 + n/3), i}
		}
		want := slices.Clone(list)
		compare := func(a, b pair) int { return a.key - b.key }
		slices.SortStableFunc(want, compare)
		By(list, compare)
		if !slices.Equal(list, want) {
			t.Fatalf("%d entries: %v, want %v", n, list, want)
		}
	}
}

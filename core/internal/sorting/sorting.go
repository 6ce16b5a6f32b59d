// Package sorting sorts small lists without an instance of the sorting code for
// every type: slices.SortFunc costs some 15 kB of program a type, which a
// visitor has to fetch.
package sorting

import "sort"

// By sorts a list by a comparison as slices.SortStableFunc does: stable,
// O(n log^2 n).
func By[T any](list []T, compare func(a, b T) int) {
	sort.Stable(&functions{
		len(list),
		func(i, j int) bool { return compare(list[i], list[j]) < 0 },
		func(i, j int) { list[i], list[j] = list[j], list[i] },
	})
}

type functions struct {
	count int
	less  func(i, j int) bool
	swap  func(i, j int)
}

func (f *functions) Len() int           { return f.count }
func (f *functions) Less(i, j int) bool { return f.less(i, j) }
func (f *functions) Swap(i, j int)      { f.swap(i, j) }

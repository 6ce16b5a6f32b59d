package modes

import "sort"

// What matrices by rows need, each in one place: what is inlined costs a visitor
// more to fetch than a call takes.

// part is row i of a matrix with n columns.
//
//go:noinline
func part(x []float64, i, n int) []float64 { return x[i*n : (i+1)*n] }

// addTo adds f x to dst.
//
//go:noinline
func addTo(dst []float64, f float64, x []float64) {
	dst = dst[:len(x)]
	for i, v := range x {
		dst[i] += f * v
	}
}

// mirrored copies the lower triangle of an n by n matrix to the upper.
func mirrored(a []float64, n int) {
	for i := range n {
		for j, v := range part(a, i, n)[:i] {
			a[j*n+i] = v
		}
	}
}

// inOrder returns the places 0 to n-1 sorted, those that tie as they stand.
func inOrder(n int, less func(i, j int) bool) []int {
	p := &places{make([]int, n), less}
	for i := range p.list {
		p.list[i] = i
	}
	sort.Stable(p)
	return p.list
}

type places struct {
	list []int
	less func(i, j int) bool
}

func (p *places) Len() int           { return len(p.list) }
func (p *places) Less(i, j int) bool { return p.less(p.list[i], p.list[j]) }
func (p *places) Swap(i, j int)      { p.list[i], p.list[j] = p.list[j], p.list[i] }

// zeros returns n zeros.
//
//go:noinline
func zeros(n int) []float64 { return make([]float64, n) }

// copied returns a copy.
func copied(x []float64) []float64 { return append(zeros(0), x...) }

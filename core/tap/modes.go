package tap

import (
	"math"
	"sort"
	"sync"

	"hoopsheet/core/bessel"
)

// mode is one mode of the ideal sheet; a pair of equal frequency (m >= 1)
// counts once.
type mode struct {
	m, n int
	zero float64 // j_mn
	log  float64 // ln j_mn
}

// highestZero bounds the modes that a peak can be read as: j_mn <= 80, some
// eight hundred modes, of which no tapped diaphragm shows the upper ones apart.
const highestZero = 80

// allModes lists the modes up to highestZero, lowest first.
var allModes = sync.OnceValue(func() []mode {
	var modes []mode
	for m := 0; ; m++ {
		zero := bessel.ZeroJ(float64(m), 1)
		if zero > highestZero {
			break
		}
		for n := 1; zero <= highestZero; n++ {
			modes = append(modes, mode{m, n, zero, math.Log(zero)})
			zero = bessel.ZeroJ(float64(m), n+1)
		}
	}
	sort.Slice(modes, func(a, b int) bool { return modes[a].zero < modes[b].zero })
	return modes
})

// countUpTo is the number of modes with ln j <= x.
func countUpTo(modes []mode, x float64) int {
	return sort.Search(len(modes), func(i int) bool { return modes[i].log > x })
}

// findMode is the index of mode (m, n), or -1 where it lies above the bound.
func findMode(modes []mode, m, n int) int {
	for i, k := range modes {
		if k.m == m && k.n == n {
			return i
		}
	}
	return -1
}

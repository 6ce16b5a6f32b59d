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

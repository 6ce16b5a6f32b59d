package response

import (
	"slices"
	"sync"

	"hoopsheet/core/disc"
)

// The tables of Bessel functions cost more than the rest of a response. They
// depend only on the modes and the grid, which stay while a person changes the
// shapes, so the last few are kept.
var (
	keptBases      = shelf[*disc.Basis]{most: 8}
	keptTransforms = shelf[*disc.Transform]{most: 2}
	keptTables     = shelf[*disc.Table]{most: 4}
)

// shelf keeps things that only one goroutine at a time may use: take removes
// what it gives.
type shelf[T any] struct {
	mu    sync.Mutex
	items []T // the one kept last at the end
	most  int
}

func (s *shelf[T]) take(fits func(T) bool) (item T, found bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	for i, item := range s.items {
		if fits(item) {
			s.items = slices.Delete(s.items, i, i+1)
			return item, true
		}
	}
	return item, false
}

func (s *shelf[T]) keep(item T) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if len(s.items) >= s.most {
		s.items = slices.Delete(s.items, 0, 1)
	}
	s.items = append(s.items, item)
}

// basisOf returns the basis of a band, which may be shared.
func basisOf(m, n int) *disc.Basis {
	b, found := keptBases.take(func(b *disc.Basis) bool { return b.M == m && b.N == n })
	if !found {
		b = disc.NewBasis(m, n)
	}
	keptBases.keep(b)
	return b
}

func takeTransform(b *disc.Basis, radii, angles int) *disc.Transform {
	t, found := keptTransforms.take(func(t *disc.Transform) bool {
		return t.Basis == b && len(t.Grid.R) == radii && t.Grid.NTheta == angles
	})
	if !found {
		t = disc.NewTransformOf(b, radii, angles)
	}
	return t
}

func keepTransform(t *disc.Transform) { keptTransforms.keep(t) }

func takeTable(b *disc.Basis, radii []float64, angles int) *disc.Table {
	t, found := keptTables.take(func(t *disc.Table) bool {
		return t.Basis == b && t.NTheta == angles && slices.Equal(t.R, radii)
	})
	if !found {
		t = disc.NewTable(b, radii, angles)
	}
	return t
}

func keepTable(t *disc.Table) { keptTables.keep(t) }

package engine

import "sync"

// cache keeps the last few values by key. It is safe for concurrent use, since
// scripts may call the engine from several goroutines.
type cache[K comparable, V any] struct {
	mutex   sync.Mutex
	most    int
	entries []cacheEntry[K, V] // the one used last stands last
}

type cacheEntry[K comparable, V any] struct {
	key   K
	value V
}

func newCache[K comparable, V any](most int) *cache[K, V] {
	return &cache[K, V]{most: most}
}

func (c *cache[K, V]) get(key K) (value V, ok bool) {
	c.mutex.Lock()
	defer c.mutex.Unlock()
	for i, e := range c.entries {
		if e.key == key {
			copy(c.entries[i:], c.entries[i+1:])
			c.entries[len(c.entries)-1] = e
			return e.value, true
		}
	}
	return value, false
}

func (c *cache[K, V]) put(key K, value V) {
	c.mutex.Lock()
	defer c.mutex.Unlock()
	if len(c.entries) == c.most {
		copy(c.entries, c.entries[1:])
		c.entries = c.entries[:c.most-1]
	}
	c.entries = append(c.entries, cacheEntry[K, V]{key, value})
}

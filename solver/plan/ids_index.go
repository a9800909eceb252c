package plan

import "sync/atomic"

// finder finds items by their ids, in all lists that have the same ids in the same order. The first lookups walk the list; when
// they go on, a table is made, for thousands of lookups in a list of thousands would take seconds. Any goroutine may use it.
type finder struct {
	asked atomic.Int32
	table atomic.Pointer[table]
	next  atomic.Int64 // the number of the next fresh id, 0 until it was asked for
}

// table says where ids are first in the lists' first n places.
type table struct {
	n  int
	at map[string]int32
}

// When a table is worth its making: for so many items without one, after so many lookups.
const (
	longList    = 64
	manyLookups = 32
)

// longer returns the finder of lists that begin as those of f and go on.
func (f *finder) longer() *finder {
	l := new(finder)
	if f != nil {
		l.table.Store(f.table.Load())
	}
	return l
}

// at returns the index of the first item with an id in a list, -1 when there is none. Cost: constant on the average over many
// lookups in lists with the same ids.
func at[T any, P identified[T]](l *list[T], id string) int {
	if l.n == 0 {
		return -1
	}
	t := l.ids.table.Load()
	if (t == nil && l.n >= longList || t != nil && l.n-t.n >= longList) && l.ids.asked.Add(1) >= manyLookups {
		l.ids.asked.Store(0)
		t = &table{l.n, make(map[string]int32, l.n)}
		for i := l.n - 1; i >= 0; i-- {
			t.at[*P(l.at(i)).id()] = int32(i)
		}
		l.ids.table.Store(t)
	}
	if t == nil {
		return indexFrom[T, P](l, 0, id)
	}
	if i, ok := t.at[id]; ok {
		return int(i)
	}
	return indexFrom[T, P](l, t.n, id)
}

// indexFrom returns the index of the first item with an id from a place of the list on, -1 when there is none.
func indexFrom[T any, P identified[T]](l *list[T], from int, id string) int {
	for c := from / chunkLen; c < len(l.chunks); c++ {
		chunk := l.chunks[c]
		for k := max(0, from-c*chunkLen); k < len(chunk); k++ {
			if *P(&chunk[k]).id() == id {
				return c*chunkLen + k
			}
		}
	}
	return -1
}

// pickAt returns the item that at finds.
func pickAt[T any, P identified[T]](l *list[T], id string) (T, bool) {
	if i := at[T, P](l, id); i >= 0 {
		return *l.at(i), true
	}
	var none T
	return none, false
}

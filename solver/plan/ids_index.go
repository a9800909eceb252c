package plan

import (
	"sync/atomic"
	"unsafe"
)

// finder finds the items of one list by their ids. The first lookups walk the list; when they go on, a table is made, for
// thousands of lookups in a list of thousands would take seconds. Any goroutine may use it.
type finder struct {
	asked atomic.Int32
	table atomic.Pointer[table]
}

// table is where the items of a list are. It is good for that very list only.
type table struct {
	first unsafe.Pointer
	n     int
	at    map[string]int32
}

// When a table is worth its making: for lists so long, after so many lookups.
const (
	longList    = 64
	manyLookups = 32
)

// at returns the index of the first item with an id in a list, -1 when there is none. f may be nil. Cost: constant on the
// average over many lookups in one list.
func at[T any, P identified[T]](f *finder, list []T, id string) int {
	if f == nil || len(list) < longList {
		return indexOf[T, P](list, id)
	}
	t := f.table.Load()
	if first := unsafe.Pointer(unsafe.SliceData(list)); t == nil || t.first != first || t.n != len(list) {
		if f.asked.Add(1) < manyLookups {
			return indexOf[T, P](list, id)
		}
		f.asked.Store(0)
		t = &table{first, len(list), make(map[string]int32, len(list))}
		for i := len(list) - 1; i >= 0; i-- {
			t.at[*P(&list[i]).id()] = int32(i)
		}
		f.table.Store(t)
	}
	if i, ok := t.at[id]; ok {
		return int(i)
	}
	return -1
}

// pickAt returns the item that at finds.
func pickAt[T any, P identified[T]](f *finder, list []T, id string) (T, bool) {
	if i := at[T, P](f, list, id); i >= 0 {
		return list[i], true
	}
	var none T
	return none, false
}

// obstacleIDs and markIDs are the finders of a plan's lists.
type (
	obstacleIDs struct{ walls, openings, blocks finder }
	markIDs     struct{ zones, observers, targets, starts, routes finder }
)

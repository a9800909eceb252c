package plan

import (
	"iter"
	"slices"
)

// list is a fixed row of items. It lies in chunks, and a list that was made from another one shares with it all chunks in which
// nothing differs: changing one item of many copies one chunk and the row of chunks. The zero list is empty.
type list[T any] struct {
	chunks [][]T // all of chunkLen items but the last, none empty
	n      int
	ids    *finder // of all lists with the same ids in the same order
}

// chunkLen is the length of a chunk: about where, for 20,000 items, a chunk and the row of chunks are of the same size.
const chunkLen = 64

// listOf returns the list of some items, which it copies.
func listOf[T any](items []T) list[T] { return list[T]{}.with(items...) }

// len returns the number of items.
func (l *list[T]) len() int { return l.n }

// at returns item i, which is not to be written to.
func (l *list[T]) at(i int) *T { return &l.chunks[i/chunkLen][i%chunkLen] }

// slice returns a copy as a slice; nil when there are no items.
func (l *list[T]) slice() []T { return slices.Concat(l.chunks...) }

// all yields copies of the items.
func (l *list[T]) all() iter.Seq2[int, T] {
	return func(yield func(int, T) bool) {
		i := 0
		for _, c := range l.chunks {
			for k := range c {
				if !yield(i, c[k]) {
					return
				}
				i++
			}
		}
	}
}

// refs yields the items where they lie; they are not to be written to.
func (l *list[T]) refs() iter.Seq2[int, *T] {
	return func(yield func(int, *T) bool) {
		i := 0
		for _, c := range l.chunks {
			for k := range c {
				if !yield(i, &c[k]) {
					return
				}
				i++
			}
		}
	}
}

// with returns the list with more items at its end.
func (l list[T]) with(items ...T) list[T] {
	if len(items) == 0 {
		return l
	}
	now := list[T]{n: l.n + len(items), ids: l.ids.longer()}
	now.chunks = make([][]T, 0, (now.n+chunkLen-1)/chunkLen)
	now.chunks = append(now.chunks, l.chunks...)
	if last := len(l.chunks) - 1; last >= 0 && len(l.chunks[last]) < chunkLen {
		k := min(len(items), chunkLen-len(l.chunks[last]))
		now.chunks[last] = slices.Concat(l.chunks[last], items[:k])
		items = items[k:]
	}
	for len(items) > 0 {
		k := min(len(items), chunkLen)
		now.chunks = append(now.chunks, slices.Clone(items[:k]))
		items = items[k:]
	}
	return now
}

// changed returns the list with some items changed, the list itself when there are none such.
func (l list[T]) changed(which func(*T) bool, change func(*T)) list[T] {
	e := l.edit()
	for i, it := range l.refs() {
		if which(it) {
			change(e.at(i))
		}
	}
	return e.list
}

// put returns the list with another item in place of item i. It has the same id.
func (l list[T]) put(i int, it T) list[T] {
	e := l.edit()
	*e.at(i) = it
	return e.list
}

// without returns the list without what goes, the list itself when nothing does.
func (l list[T]) without(goes func(int, *T) bool) (left list[T], some bool) {
	for i, it := range l.refs() {
		if !goes(i, it) {
			continue
		}
		first := i / chunkLen
		left = list[T]{chunks: slices.Clone(l.chunks[:first]), n: first * chunkLen, ids: new(finder)}
		var chunk []T
		for j := left.n; j < l.n; j++ {
			it := l.at(j)
			if goes(j, it) {
				continue
			}
			if chunk == nil {
				chunk = make([]T, 0, min(chunkLen, l.n-j))
			}
			chunk = append(chunk, *it)
			left.n++
			if len(chunk) == chunkLen {
				left.chunks, chunk = append(left.chunks, chunk), nil
			}
		}
		if chunk != nil {
			left.chunks = append(left.chunks, chunk)
		}
		return left, true
	}
	return l, false
}

// listEdit is a list in the making from another one: a chunk is copied when it is first written to.
type listEdit[T any] struct {
	list list[T]
	own  []bool // which chunks are the edit's own; nil until one is
}

// edit begins a change of items. Their ids stay.
func (l list[T]) edit() listEdit[T] { return listEdit[T]{list: l} }

// at returns item i to be written to.
func (e *listEdit[T]) at(i int) *T {
	if e.own == nil {
		e.list.chunks = slices.Clone(e.list.chunks)
		e.own = make([]bool, len(e.list.chunks))
	}
	c := i / chunkLen
	if !e.own[c] {
		e.list.chunks[c] = slices.Clone(e.list.chunks[c])
		e.own[c] = true
	}
	return &e.list.chunks[c][i%chunkLen]
}

// touched reports whether anything was to be written to.
func (e *listEdit[T]) touched() bool { return e.own != nil }

package walk

import (
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// bridge leads from triangles of the plain mesh to cells, and remembers those that lie in one cell.
type bridge struct {
	cell  []int32 // for each plain triangle its only cell, or one of the constants below
	seen  []int32 // for each lean triangle the last search that saw it
	round int32
	stack []int32
	found []int32      // the lean triangles that share floor with a plain one
	lines []exact.Line // to the left of which floor is shared
	stars []int32      // for each point of the plain mesh how many triangles meet there
}

const (
	notAsked int32 = -1
	several  int32 = -2
)

func newBridge(plain, lean *mesh.Mesh) bridge {
	b := bridge{cell: make([]int32, len(plain.Tris)), seen: make([]int32, len(lean.Tris))}
	fill(b.cell, notAsked)
	b.stars = make([]int32, len(plain.Pts))
	for t := range plain.Tris {
		for _, v := range plain.Tris[t].V {
			b.stars[v]++
		}
	}
	return b
}

// cellsAt appends the cells that hold p, on whatever side of a wall.
func (w *Widths) cellsAt(dst []int32, p exact.Pt) []int32 {
	holders(w.m, p, func(t int32) {
		if w.m.Tris[t].Flags&mesh.FlagNoWalk != 0 {
			return
		}
		w.visited = w.holding(w.visited[:0], t, p)
		for _, piece := range w.visited {
			dst = append(dst, w.cell[piece])
		}
	})
	return dst
}

// cellsWithin appends the cells that share floor with the part of plain triangle t to the left of all lines.
func (w *Widths) cellsWithin(dst []int32, t int32, lines ...exact.Line) []int32 {
	b := &w.bridge
	if b.cell[t] >= 0 {
		return append(dst, b.cell[t])
	}
	w.overlaps(t)
	if b.cell[t] == notAsked {
		if b.cell[t] = w.onlyCell(); b.cell[t] >= 0 {
			return append(dst, b.cell[t])
		}
	}
	for _, u := range b.found {
		b.lines = append(b.lines[:0], lines...)
		dst = w.sharing(dst, u, w.root[u], t)
	}
	return dst
}

// overlaps finds the lean triangles that share floor with plain triangle t: those around one of its corners, and from there
// on through edges, since a triangle hangs together. Of its corners the one at which the fewest triangles meet is taken: at
// the end of one long edge nearly all triangles of a plan may meet.
func (w *Widths) overlaps(t int32) {
	b := &w.bridge
	b.round++
	b.found, b.stack = b.found[:0], b.stack[:0]
	look := func(u int32) {
		if b.seen[u] == b.round {
			return
		}
		b.seen[u] = b.round
		if w.m.Tris[u].Flags&mesh.FlagNoWalk == 0 && w.shares(u, t) {
			b.found = append(b.found, u)
			b.stack = append(b.stack, u)
		}
	}
	tri := &w.plain.Tris[t]
	quiet := 0
	for i := range 3 {
		if b.stars[tri.V[i]] < b.stars[tri.V[quiet]] {
			quiet = i
		}
	}
	holders(w.m, tri.P[quiet], look)
	for len(b.stack) > 0 {
		u := b.stack[len(b.stack)-1]
		b.stack = b.stack[:len(b.stack)-1]
		for i := range 3 {
			if tri := &w.m.Tris[u]; !tri.StopsWalk(i) {
				look(tri.N[i].Tri())
			}
		}
	}
}

// shares reports whether lean triangle u and plain triangle t have more than a border in common.
func (w *Widths) shares(u, t int32) bool {
	w.clip.Start(&w.m.Tris[u])
	return w.clip.CutTriangle(&w.plain.Tris[t])
}

// onlyCell returns the one cell that all found triangles lie in, or several.
func (w *Widths) onlyCell() int32 {
	only := notAsked
	for _, u := range w.bridge.found {
		node := w.root[u]
		if node >= 0 || only >= 0 && w.cell[^node] != only {
			return several
		}
		only = w.cell[^node]
	}
	return only
}

// sharing appends the cells of those pieces of lean triangle u under a node that share floor with plain triangle t to the left of
// the bridge's lines.
func (w *Widths) sharing(dst []int32, u, node, t int32) []int32 {
	b := &w.bridge
	if node < 0 {
		if w.reached(u, t) {
			dst = append(dst, w.cell[^node])
		}
		return dst
	}
	if !w.reached(u, t) {
		return dst
	}
	c := &w.cuts[node]
	l := w.gaps[c.gap].line()
	n := len(b.lines)
	b.lines = append(b.lines, exact.Line{At: l.At, Dir: l.Dir.Neg()})
	dst = w.sharing(dst, u, c.right, t)
	b.lines = append(b.lines[:n], l)
	dst = w.sharing(dst, u, c.left, t)
	b.lines = b.lines[:n]
	return dst
}

// reached reports whether lean triangle u and plain triangle t share floor to the left of the bridge's lines.
func (w *Widths) reached(u, t int32) bool {
	if !w.shares(u, t) {
		return false
	}
	for _, l := range w.bridge.lines {
		if !w.clip.Cut(l) {
			return false
		}
	}
	return true
}

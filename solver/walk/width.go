package walk

import (
	"context"
	"math"
	"slices"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/pulse"
	"enfilade/solver/sight"
)

// Width is the clear width of a way: the widest body that can make some walk along it.
type Width struct {
	Found bool          // some walk leads there, for a point at least
	Clear float64       // the diameter of the widest body, grid units; +Inf when the way need not pass any gap
	Gap   [2][2]float64 // the two obstacle points of the tightest gap, grid units, in order; zero when Clear is +Inf
}

// Widths answers how wide a body can be and still make some walk. It is not for concurrent use.
//
// A gap is a pair of points of things that stop walking, one of them a corner, such that the closed disc on their connection
// as diameter touches nothing else that stops walking. A body narrower than the gap passes between the two; one exactly as
// wide, or wider, does not. The clear width of a way is the narrowest gap that the best walk passes from one side to the other.
//
// The ends of a way do not narrow it: only the gaps between them count. A start on the face of a wall has no room for any
// body, and a walk may begin or end within a gap, on the line between its two points. Where two places share the same open
// floor, with no gap between them, the way is as wide as that floor, and Clear is +Inf.
//
// Gaps are the saddles of the distance to the nearest obstacle, the only places at which the floor for a wider body falls
// apart (Grove, "Critical point theory for distance functions", 1993). They are found in the constrained Delaunay
// triangulation of the edges that stop walking alone, of which every point is then an obstacle, by searching from a
// triangle's corner across the edge opposite (Demyen and Buro, "Efficient triangulation-based pathfinding", AAAI 2006,
// whose width of a passage this is). Gaps never cross each other; they cut the floor into cells, and the widest way is the
// path between cells in their maximum spanning tree (Hu, "The maximum capacity route problem", Operations Research 9, 1961).
// Which points make a gap, and on which side of it a place lies, is decided exactly; only widths are measured.
type Widths struct {
	plain *mesh.Mesh // of all edges, on which cones of sight are given
	pieces
	cell  []int32 // for each piece its cell
	first []int32 // the links of cell c are links[first[c]:first[c+1]]
	links []link

	worst   []int32 // for each cell the tightest gap on the best way there; see the constants below
	stack   []int32
	bridge  bridge
	goal    []int32
	clip    clipper
	starts  []int32
	visited []int32
}

// link leads through a gap to another cell.
type link struct{ gap, cell int32 }

// What a way may have instead of a tightest gap. Gaps are numbered from the widest down, so the least is the best.
const (
	noGap int32 = -1      // the cell holds the start
	noWay int32 = 1 << 30 // no walk leads to the cell
)

// NewWidths finds the gaps among the edges of m that stop walking.
//
//   - Errors: the context's when it is cancelled; ErrCrowded.
//   - Cost: O(n log n) expected for n such edges, and the triangles that each gap's disc meets: few, since it is empty, unless
//     many long gaps lie side by side. The search ends when it has taken a few thousand steps for each edge.
func NewWidths(ctx context.Context, m *mesh.Mesh) (*Widths, error) {
	lean, err := leanMesh(pulse.Part(ctx, 0, 0.6), m)
	if err != nil {
		return nil, err
	}
	lean.Spare()
	w := &Widths{plain: m}
	w.pieces.begin(lean)
	b := gapFinder{pieces: &w.pieces}
	if err := b.find(pulse.Part(ctx, 0.6, 1)); err != nil {
		return nil, err
	}
	cells, err := b.join()
	if err != nil {
		return nil, err
	}
	w.connect(cells)
	w.worst = make([]int32, len(w.first)-1)
	w.bridge = newBridge(m, lean)
	return w, nil
}

// From makes start the place from which ToPoint and ToCones measure. O(cells).
//
// Errors: ErrInside.
func (w *Widths) From(start exact.Pt) error {
	w.starts = w.cellsAt(w.starts[:0], start)
	if len(w.starts) == 0 {
		return ErrInside
	}
	fill(w.worst, noWay)
	for _, c := range w.starts {
		w.spread(c)
	}
	return nil
}

// spread walks the spanning tree from a cell and notes the tightest gap on the way to each other cell, where it is better
// than from an earlier start.
func (w *Widths) spread(from int32) {
	w.worst[from] = noGap
	w.stack = append(w.stack[:0], from)
	for len(w.stack) > 0 {
		c := w.stack[len(w.stack)-1]
		w.stack = w.stack[:len(w.stack)-1]
		for _, l := range w.links[w.first[c]:w.first[c+1]] {
			if worst := max(w.worst[c], l.gap); worst < w.worst[l.cell] {
				w.worst[l.cell] = worst
				w.stack = append(w.stack, l.cell)
			}
		}
	}
}

// Places are where a way may lead. They are good for the Widths that made them, from whatever start.
type Places []int32 // cells, in order

// ToPoint returns the clear width of the way to p, from any side of it.
func (w *Widths) ToPoint(p exact.Pt) Width { return w.To(w.AtPoint(p)) }

// ToCones returns the clear width of the way to any place within cones of sight; see InCones.
func (w *Widths) ToCones(eye exact.Pt, cones []sight.Cone) Width { return w.To(w.InCones(eye, cones)) }

// ToPieces is ToCones for a region that is given as convex pieces.
func (w *Widths) ToPieces(pieces []sight.Piece) Width { return w.To(w.InPieces(pieces)) }

// AtPoint returns where one arrives at p, from any side of it.
func (w *Widths) AtPoint(p exact.Pt) Places { return w.placesOf(w.cellsAt(w.goal[:0], p)) }

// InCones returns where one arrives anywhere within the cones of sight from eye, given on the mesh that the widths are
// of. A place counts when the cone holds floor around it: whether cone and cell share more than a border is decided exactly.
// O(cones) once each triangle's cells are known.
func (w *Widths) InCones(eye exact.Pt, cones []sight.Cone) Places {
	w.goal = w.goal[:0]
	for _, c := range cones {
		if w.plain.Tris[c.Tri].Flags&mesh.FlagNoWalk == 0 {
			w.goal = w.cellsWithin(w.goal, c.Tri, exact.Line{At: eye, Dir: c.R}, exact.Line{At: eye, Dir: c.L.Neg()})
		}
	}
	return w.placesOf(w.goal)
}

// InPieces is InCones for a region that is given as convex pieces.
func (w *Widths) InPieces(pieces []sight.Piece) Places {
	w.goal = w.goal[:0]
	for i := range pieces {
		if p := &pieces[i]; w.plain.Tris[p.Tri].Flags&mesh.FlagNoWalk == 0 {
			w.goal = w.cellsWithin(w.goal, p.Tri, p.Lines[:p.N]...)
		}
	}
	return w.placesOf(w.goal)
}

// placesOf returns cells as places: each once.
func (w *Widths) placesOf(cells []int32) Places {
	w.goal = cells
	slices.Sort(w.goal)
	return slices.Clone(slices.Compact(w.goal))
}

// To returns the clear width of the way to a goal. O(cells of the goal).
func (w *Widths) To(goal Places) Width {
	least := noWay
	for _, c := range goal {
		least = min(least, w.worst[c])
	}
	switch least {
	case noWay:
		return Width{}
	case noGap:
		return Width{Found: true, Clear: math.Inf(1)}
	}
	g := &w.gaps[least]
	return Width{Found: true, Clear: g.width, Gap: g.ends()}
}

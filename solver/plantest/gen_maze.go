package plantest

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Comb returns a corridor with exactly the given number of walls (at least 20) hanging into it like the teeth of a comb,
// thin, slightly aslant and of slightly different length: from the corridor every tooth is a corner of the region.
func Comb(seed uint64, walls int) *plan.Plan {
	m := newMaker(seed, 3)
	width := int32(walls+1) * combPitch
	m.Floor = plan.ChainOf(pt(0, 0), pt(width, 0), pt(width, 8*metre), pt(0, 8*metre))
	for i := range walls {
		x := int32(i+1) * combPitch
		top := pt(x+m.between(-0.1, 0.1), 8*metre)
		m.wall(plan.Solid, 0, plan.Ceiling, top, pt(x+m.between(-0.1, 0.1), m.between(2, 3)))
	}
	m.putMarks(func() exact.Pt {
		if m.chance(0.5) {
			return pt(m.Int32N(width), m.between(0, 2))
		}
		return pt(m.Int32N(int32(walls))*combPitch+combPitch/2, m.between(3, 7.9))
	})
	return plan.From(m.Parts)
}

// combPitch keeps a comb of 100,000 teeth within the 50 km that a drawing may reach.
const combPitch = metre * 49 / 100

// Maze returns a maze of exactly the given number of walls (at least 20): walls along the lines of a square grid of
// 1.5 m, each meeting its neighbours end to end, one in three thick. Its passages form a tree but for a few loops, so
// walks have very many bends.
func Maze(seed uint64, walls int) *plan.Plan {
	m := newMaker(seed, 4)
	// A maze of c x c cells keeps (c-1)^2 inner walls of its tree; with four outer ones the count is at least walls.
	cells := int(math.Ceil(math.Sqrt(float64(walls-4)))) + 1
	inner := m.carve(cells)
	m.Shuffle(len(inner), func(i, j int) { inner[i], inner[j] = inner[j], inner[i] })
	side := int32(cells) * mazePitch
	m.Floor = plan.ChainOf(pt(0, 0), pt(side, 0), pt(side, side), pt(0, side))
	for _, w := range inner[:walls-4] {
		m.wall(plan.Solid, m.mazeThickness(), plan.Ceiling, w[0], w[1])
	}
	a, b, c, d := pt(0, 0), pt(side, 0), pt(side, side), pt(0, side)
	for _, w := range [][2]exact.Pt{{a, b}, {b, c}, {c, d}, {d, a}} {
		m.wall(plan.Solid, 0, plan.Ceiling, w[0], w[1])
	}
	m.putMarks(func() exact.Pt {
		x, y := m.Int32N(int32(cells)), m.Int32N(int32(cells))
		return pt(x*mazePitch+m.between(0.2, 1.3), y*mazePitch+m.between(0.2, 1.3))
	})
	return plan.From(m.Parts)
}

const mazePitch = 3 * metre / 2

func (m *maker) mazeThickness() int32 {
	if m.chance(1.0 / 3) {
		return metre / 10
	}
	return 0
}

// carve digs a random tree of passages through cells x cells squares, always on from the newest square that still has an
// undug neighbour, and returns the walls that remain between squares.
func (m *maker) carve(cells int) [][2]exact.Pt {
	dug := make([]bool, cells*cells)
	openRight, openUp := make([]bool, cells*cells), make([]bool, cells*cells)
	stack := []int{0}
	dug[0] = true
	for len(stack) > 0 {
		at := stack[len(stack)-1]
		next, ok := m.undug(dug, at, cells)
		if !ok {
			stack = stack[:len(stack)-1]
			continue
		}
		switch next - at {
		case 1:
			openRight[at] = true
		case -1:
			openRight[next] = true
		case cells:
			openUp[at] = true
		default:
			openUp[next] = true
		}
		dug[next] = true
		stack = append(stack, next)
	}
	var walls [][2]exact.Pt
	for at := range dug {
		x, y := int32(at%cells), int32(at/cells)
		corner := pt((x+1)*mazePitch, (y+1)*mazePitch)
		if int(x) < cells-1 && !openRight[at] {
			walls = append(walls, [2]exact.Pt{pt(corner.X, corner.Y-mazePitch), corner})
		}
		if int(y) < cells-1 && !openUp[at] {
			walls = append(walls, [2]exact.Pt{pt(corner.X-mazePitch, corner.Y), corner})
		}
	}
	return walls
}

// undug picks a random neighbour of a square that is not dug yet.
func (m *maker) undug(dug []bool, at, cells int) (int, bool) {
	var open [4]int
	n := 0
	x := at % cells
	for _, step := range [...]struct {
		to   int
		have bool
	}{{at + 1, x < cells-1}, {at - 1, x > 0}, {at + cells, at+cells < len(dug)}, {at - cells, at >= cells}} {
		if step.have && !dug[step.to] {
			open[n] = step.to
			n++
		}
	}
	if n == 0 {
		return 0, false
	}
	return open[m.IntN(n)], true
}

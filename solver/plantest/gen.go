package plantest

import (
	"math/rand/v2"
	"strconv"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// metre is a metre in grid units.
const metre = 1000 * exact.PerMM

// marks is how many observers, targets and starts each a seeded plan has.
const marks = 8

// maker collects the items of a seeded plan; the same seed draws the same plan on every machine.
type maker struct {
	*rand.Rand
	plan.Parts
}

func newMaker(seed uint64, kind uint64) *maker {
	return &maker{rand.New(rand.NewPCG(seed, kind)), plan.Parts{Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"}}}
}

// between returns a length from lo to hi metres, to the grid.
func (m *maker) between(lo, hi float64) int32 {
	return int32(lo*metre) + m.Int32N(int32((hi-lo)*metre)+1)
}

// chance reports true with probability p.
func (m *maker) chance(p float64) bool { return m.Float64() < p }

func (m *maker) wall(kind plan.WallKind, thickness, height int32, pts ...exact.Pt) string {
	id := "W" + strconv.Itoa(len(m.Walls)+1)
	m.Walls = append(m.Walls, plan.Wall{ID: id, Kind: kind, Line: plan.ChainOf(pts...), Thickness: thickness, Height: height})
	return id
}

func (m *maker) block(height int32, pts ...exact.Pt) {
	m.Blocks = append(m.Blocks, plan.Block{ID: "B" + strconv.Itoa(len(m.Blocks)+1), Ring: plan.ChainOf(pts...), Height: height})
}

func (m *maker) door(d plan.Opening) {
	d.ID = "D" + strconv.Itoa(len(m.Openings)+1)
	m.Openings = append(m.Openings, d)
}

// putMarks puts down the observers, targets and starts at places drawn from place.
func (m *maker) putMarks(place func() exact.Pt) {
	for i := 1; i <= marks; i++ {
		n := strconv.Itoa(i)
		m.Observers = append(m.Observers, plan.Observer{ID: "O" + n, At: place(), Eye: 1600 * exact.PerMM, View: 360, Colour: -1})
		m.Targets = append(m.Targets, plan.Target{ID: "T" + n, At: place(), Colour: -1})
		m.Starts = append(m.Starts, plan.Start{ID: "S" + n, At: place()})
	}
}

// lowHeight draws the height of a low thing: mostly under the walker's eye, sometimes above it.
func (m *maker) lowHeight() int32 {
	if m.chance(0.8) {
		return m.between(0.7, 1.3)
	}
	return m.between(1.7, 2.0)
}

func pt(x, y int32) exact.Pt { return exact.Pt{X: x, Y: y} }

package mesh

import (
	"sync"
	"sync/atomic"

	"enfilade/solver/exact"
)

// Sector is the floor around a point between two edges there that stop walking. Someone who walks past the point turns
// within one sector; a point where several walls meet has several, and they are different places.
type Sector struct {
	At     exact.Pt
	First  Edge      // half-edge that leaves the point along the sector's clockwise border, the sector to its left
	Lo, Hi exact.Vec // directions of the borders, the sector running counter-clockwise from Lo to Hi
	LoV    int32     // the points at the far ends of the borders
	HiV    int32
}

// turning holds the sectors in which a shortest walk may turn: those wider than half a turn.
type turning struct {
	made    atomic.Bool
	making  sync.Mutex
	sectors []Sector
	at      []int32 // for each half-edge, see slot, the sector that its starting corner belongs to, or -1
	places  []uint8 // for each point the number of its sectors, wide or not, capped
}

// slot numbers the half-edges without gaps: three for each triangle.
func slot(e Edge) int32 { return int32(e) - e.Tri() }

// SectorAt returns the turning sector that the starting corner of e belongs to, or -1 where no shortest walk turns.
func (m *Mesh) SectorAt(e Edge) int32 { return m.turning().at[slot(e)] }

// Sector returns turning sector s.
func (m *Mesh) Sector(s int32) *Sector { return &m.turning().sectors[s] }

// NumSectors returns the number of turning sectors.
func (m *Mesh) NumSectors() int { return len(m.turning().sectors) }

// OnePlace reports whether point v is a single place for someone who walks: no two sectors meet there.
func (m *Mesh) OnePlace(v int32) bool { return m.turning().places[v] < 2 }

// turning returns the sectors, which are found when they are first asked for: nobody may ever walk on the mesh. Several may ask
// at once.
func (m *Mesh) turning() *turning {
	if !m.turn.made.Load() {
		m.turn.make(m)
	}
	return &m.turn
}

// make finds the turning sectors by going around every point from each edge that stops walking. O(n).
func (turn *turning) make(m *Mesh) {
	turn.making.Lock()
	defer turn.making.Unlock()
	if turn.made.Load() {
		return
	}
	turn.at, turn.places = make([]int32, 3*len(m.Tris)), make([]uint8, len(m.Pts))
	for i := range turn.at {
		turn.at[i] = -1
	}
	borders := 0
	turn.eachBorder(m, func(Edge) { borders++ })
	turn.sectors = make([]Sector, 0, borders/2+16) // about half of all corners are inward ones
	turn.eachBorder(m, func(e Edge) {
		v := &turn.places[m.Tris[e.Tri()].V[e.Corner()]]
		*v = min(*v+1, 2)
		turn.add(m, e)
	})
	turn.made.Store(true)
}

// eachBorder calls do for every edge that stops walking with walkable floor to its left.
func (turn *turning) eachBorder(m *Mesh, do func(e Edge)) {
	for t := range m.Tris {
		tri := &m.Tris[t]
		if tri.Flags&FlagNoWalk != 0 || tri.Flags&flagBoundary == 0 {
			continue
		}
		for i := range 3 {
			if tri.StopsWalk(i) {
				do(EdgeOf(int32(t), i))
			}
		}
	}
}

// update finds the sectors again around every point of the triangles listed, if they have been found before.
func (turn *turning) update(m *Mesh, tris []int32) {
	if !turn.made.Load() {
		return
	}
	for len(turn.at) < 3*len(m.Tris) {
		turn.at = append(turn.at, -1)
	}
	for len(turn.places) < len(m.Pts) {
		turn.places = append(turn.places, 0)
	}
	done := map[int32]bool{}
	for _, t := range tris {
		for i, v := range m.Tris[t].V {
			if done[v] || v >= m.raw.box && v < m.raw.box+4 {
				continue
			}
			done[v] = true
			turn.places[v] = 0
			m.Around(EdgeOf(t, i), func(e Edge) { turn.at[slot(e)] = -1 })
			m.Around(EdgeOf(t, i), func(e Edge) {
				if tri := &m.Tris[e.Tri()]; tri.Flags&FlagNoWalk == 0 && tri.StopsWalk(e.Corner()) {
					turn.places[v] = min(turn.places[v]+1, 2)
					turn.add(m, e)
				}
			})
		}
	}
}

// add records the sector that begins at first, an edge that stops walking with walkable floor to its left, when it is
// wider than half a turn.
func (turn *turning) add(m *Mesh, first Edge) {
	a, b := m.Ends(first)
	s := Sector{At: a, First: first, Lo: b.Sub(a), LoV: m.Tris[first.Tri()].V[inc[first.Corner()]]}
	last := first
	for !m.Tris[last.Tri()].StopsWalk(last.Prev().Corner()) {
		last = m.Twin(last.Prev())
	}
	c := last.Prev().Corner()
	s.Hi, s.HiV = m.Tris[last.Tri()].P[c].Sub(a), m.Tris[last.Tri()].V[c]
	// Wider than half a turn: Hi lies strictly to the right of Lo, or both are one edge seen from its two sides. One corner
	// alone (first == last) is never that wide.
	cross := s.Lo.Cross(s.Hi)
	if first == last || cross > 0 || cross == 0 && s.LoV != s.HiV {
		return
	}
	id := int32(len(turn.sectors))
	turn.sectors = append(turn.sectors, s)
	for e := first; ; e = m.Twin(e.Prev()) {
		turn.at[slot(e)] = id
		if e == last {
			return
		}
	}
}

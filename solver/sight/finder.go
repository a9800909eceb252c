package sight

import (
	"errors"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// ErrOutside reports an eye that lies off the mesh or strictly inside something that reaches its height.
var ErrOutside = errors.New("sight: the eye is inside a body or off the floor")

// ErrBlind reports an eye that stands on a wall and looks into it.
var ErrBlind = errors.New("sight: the eye looks into the wall it stands on")

// Finder answers questions of sight on one mesh. It keeps its buffers from call to call, so a warm one does not allocate;
// it is not for concurrent use.
type Finder struct {
	m      *mesh.Mesh
	starts []start
	stack  []frame
	hits   []hit
	pieces []piece
	spans  []span
	region Region
	cones  []Cone
	keep   bool // keep the cones
	count  int
	faces  faceBuffers
}

// New returns a finder for m.
func New(m *mesh.Mesh) *Finder { return &Finder{m: m} }

// Clip narrows a region: to the counter-clockwise sweep from Right over Mid to Left, and to a convex polygon around the
// eye. The zero Clip is none.
type Clip struct {
	Sides            bool
	Right, Mid, Left exact.Vec  // no two neighbours more than half a turn apart
	Range            []exact.Pt // counter-clockwise, strictly around the eye; nil for no limit
}

// frame is a cone about to enter a triangle through in, one of the triangle's own half-edges. The cone runs
// counter-clockwise from r to l. A frame with a negative edge is a hit that waits for its turn.
type frame struct {
	in   mesh.Edge
	r, l exact.Vec
}

// hit is what a cone ended on: a half-edge that stops sight, seen from r to l; or, when in is negative, a note that
// half-edge ^in stops sight and is seen edge-on between the hits before and after; or a break.
type hit frame

// breakEdge marks the place in the list of hits where the region's border goes through the eye.
const breakEdge mesh.Edge = -1 << 31

// start is one edge of a triangle at the eye, seen from r to l, and what to note before and after it.
type start struct {
	tri     int32
	edge    mesh.Edge
	r, l    exact.Vec
	broken  bool      // nothing is seen between the start before and this one
	spoke   mesh.Edge // edge that stops sight along r, or mesh.None
	spokeTo mesh.Edge // the same along l
}

// Region returns the region seen from eye, whose height above the floor is height.
//
//   - Shape: one counter-clockwise ring; it may touch itself, and it runs through the eye where the eye stands on a wall.
//   - Units: grid units of 0.1 mm, exact until measured. The result is valid until the next call.
//   - Errors: ErrOutside.
//   - Cost: proportional to the number of triangles the cones pass, at most O(n·h) for n triangles and h bodies; no
//     allocation once the buffers have grown.
func (f *Finder) Region(eye exact.Pt, height int32) (*Region, error) {
	return f.Clipped(eye, height, Clip{})
}

// Clipped is Region within a clip.
func (f *Finder) Clipped(eye exact.Pt, height int32, c Clip) (*Region, error) {
	if err := f.sweep(eye, height, c); err != nil {
		return nil, err
	}
	f.assemble(eye, &c)
	f.region.Expanded = f.count
	return &f.region, nil
}

// Cone is the part of a triangle that is seen: between the directions R and L from the eye, counter-clockwise, less than
// half a turn apart.
type Cone struct {
	Tri  int32
	R, L exact.Vec
}

// Cones returns the region as cones, each triangle's disjoint but for their borders. The result is valid until the next
// call. Errors and cost as Region; the range of the clip is not applied.
func (f *Finder) Cones(eye exact.Pt, height int32, c Clip) ([]Cone, error) {
	f.keep = true
	f.cones = f.cones[:0]
	err := f.sweep(eye, height, c)
	f.keep = false
	return f.cones, err
}

// sweep fills f.hits with what is seen from eye, counter-clockwise.
func (f *Finder) sweep(eye exact.Pt, height int32, c Clip) error {
	f.hits, f.count = f.hits[:0], 0
	if !f.findStarts(eye, height) {
		return ErrOutside
	}
	if !c.Sides {
		f.sweepStarts(eye, height, nil)
		return nil
	}
	f.sweepSector(eye, height, c.Right, c.Mid)
	f.sweepSector(eye, height, c.Mid, c.Left)
	if len(f.hits) == 0 {
		return ErrBlind
	}
	f.hits = append(f.hits, hit{in: breakEdge})
	return nil
}

func (f *Finder) sweepSector(eye exact.Pt, height int32, right, left exact.Vec) {
	f.rotateStarts(right)
	f.sweepStarts(eye, height, &[2]exact.Vec{right, left})
}

// sweepStarts expands every start in turn, within a sector of at most half a turn if one is given.
func (f *Finder) sweepStarts(eye exact.Pt, height int32, sector *[2]exact.Vec) {
	for i := range f.starts {
		s := &f.starts[i]
		r, l := s.r, s.l
		if sector != nil {
			var ok bool
			if r, l, ok = clipCone(r, l, sector[0], sector[1]); !ok {
				continue
			}
		}
		if s.broken && (sector == nil || len(f.hits) > 0 && r == s.r) {
			f.hits = append(f.hits, hit{in: breakEdge})
		}
		if s.spoke != mesh.None && r == s.r {
			f.hits = append(f.hits, hit{in: ^s.spoke, r: r, l: r})
		}
		if f.keep {
			f.cones = append(f.cones, Cone{s.tri, r, l})
		}
		f.enter(s.edge, r, l, eye, height)
		if s.spokeTo != mesh.None && l == s.l {
			f.hits = append(f.hits, hit{in: ^s.spokeTo, r: l, l: l})
		}
	}
}

// enter lets the cone from r to l pass through half-edge e of a triangle at the eye, or ends it there.
func (f *Finder) enter(e mesh.Edge, r, l exact.Vec, eye exact.Pt, height int32) {
	t := &f.m.Tris[e.Tri()]
	if t.Top[e.Corner()] >= height {
		f.hits = append(f.hits, hit{e, r, l})
		return
	}
	f.expand(frame{t.N[e.Corner()], r, l}, eye, height)
}

// clipCone narrows the cone from r to l, less than half a turn, to the sector from s to t, at most half a turn.
func clipCone(r, l, s, t exact.Vec) (exact.Vec, exact.Vec, bool) {
	// Keep what lies to the left of s. A cone that crosses the line of s crosses it at s going in, at -s going out.
	a, b := s.Cross(r), s.Cross(l)
	switch {
	case a <= 0 && b <= 0:
		return r, l, false
	case a < 0:
		r = s
	case b < 0:
		l = s.Neg()
	}
	// Keep what lies to the right of t.
	a, b = r.Cross(t), l.Cross(t)
	switch {
	case a <= 0 && b <= 0:
		return r, l, false
	case a < 0:
		r = t.Neg()
	case b < 0:
		l = t
	}
	return r, l, r.Cross(l) > 0
}

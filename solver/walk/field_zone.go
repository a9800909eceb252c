package walk

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
)

// Zone is a part of the floor, ready to be measured by any field on the same mesh.
type Zone struct {
	zone  *mesh.Mesh
	pairs []overlap
}

// overlap says that a triangle of the floor and one of the zone share more than a border.
type overlap struct{ tri, zone int32 }

// NewZone takes the triangles of zone on which someone may stand as a part of the walkable floor of m. Which triangles share
// floor is decided exactly. O(n + b·z) for n triangles of the floor, b of them within the zone's bounding box, and z of the
// zone.
func NewZone(m, zone *mesh.Mesh) *Zone {
	z := &Zone{zone: zone}
	var all box
	boxes := make([]box, len(zone.Tris))
	for i := range zone.Tris {
		if t := &zone.Tris[i]; t.Flags&mesh.FlagNoWalk == 0 {
			boxes[i] = boxOf(t)
			all = all.with(boxes[i])
		}
	}
	var clip clipper
	for i := range m.Tris {
		t := &m.Tris[i]
		b := boxOf(t)
		if t.Flags&mesh.FlagNoWalk != 0 || !b.meets(all) {
			continue
		}
		for j := range zone.Tris {
			if boxes[j].meets(b) {
				clip.Start(t)
				if clip.CutTriangle(&zone.Tris[j]) {
					z.pairs = append(z.pairs, overlap{int32(i), int32(j)})
				}
			}
		}
	}
	return z
}

// Span tells how near and how far a zone is from a field's start.
type Span struct {
	Found         bool       // some floor of the zone can be reached; the rest is zero otherwise
	Near, Far     float64    // the least and the greatest distance of its floor that can be reached, grid units
	NearAt, FarAt [2]float64 // where they are, grid units
	Cut           bool       // some of its floor cannot be reached

	nearTri, farTri int32 // the floor's triangles that hold the two places
}

// Span measures a zone of the field's mesh.
//
// Every piece of triangle, zone and cone is convex, so its nearest point is the root, a foot on an edge, or a corner. The
// farthest point lies at one of three kinds of place. Where one root leads, the distance is convex, so it is greatest at the
// border of what that root leads to. Along an edge of a piece it is convex too, and greatest at an end. Along the line between
// what two roots lead to, which is a branch of a hyperbola around both, it grows away from the vertex, so it is greatest where
// that line meets an edge or the line of a third root. All three kinds are tried: corners of pieces, lines between two roots
// with edges and with sides of their cones, and lines between three roots.
//
// Cost: O(k) for each pair of triangles with k parts; O(k³) more for pairs that may hold the farthest point.
func (d *Field) Span(z *Zone) Span {
	s := spanner{field: d, zone: z}
	for _, p := range z.pairs {
		if parts := d.of(p.tri); len(parts) > 0 {
			s.begin(p)
			s.corners()
		} else {
			s.Cut = true
		}
	}
	for _, p := range z.pairs {
		if len(d.of(p.tri)) > 1 {
			s.begin(p)
			if s.bound() > s.Far {
				s.crossings()
			}
		}
	}
	if !s.Found {
		return Span{}
	}
	return s.Span
}

// spanner measures a zone. Coordinates are offsets from a corner of the triangle at hand.
type spanner struct {
	Span
	field *Field
	zone  *Zone
	clip  clipper
	parts []part
	id    int32
	tri   *mesh.Tri
	tile  *mesh.Tri // of the zone
	at    exact.Pt
	lines []wall // the edges of both triangles
	sides []wall // the sides of the cones, two a part
	sites []site // the roots, one a part
}

// wall is a line with its inside on the left: those points with nx·x + ny·y >= h.
type wall struct{ nx, ny, h, hair float64 }

// hair is how far off a line, in grid units, a measured point still counts as on it. Points are measured to 2^-21 units or
// better, and since distances grow no faster than the way, no figure is off by more than a hair for it.
const hair = 0x1p-18

// site is a root and its distance from the start.
type site struct{ x, y, g float64 }

// begin takes a pair of triangles in hand.
func (s *spanner) begin(p overlap) {
	s.parts, s.tri, s.tile = s.field.of(p.tri), &s.field.m.Tris[p.tri], &s.zone.zone.Tris[p.zone]
	s.id, s.at = p.tri, s.tri.P[0]
	s.lines, s.sides, s.sites = s.lines[:0], s.sides[:0], s.sites[:0]
	for _, t := range [2]*mesh.Tri{s.tri, s.tile} {
		for i := range 3 {
			s.lines = append(s.lines, s.wall(t.P[i], t.P[inc[i]].Sub(t.P[i])))
		}
	}
	for _, k := range s.parts {
		from := &s.field.roots[k.root]
		v := from.at.Sub(s.at)
		s.sites = append(s.sites, site{float64(v.X), float64(v.Y), from.g})
		s.sides = append(s.sides, s.wall(from.at, k.r), s.wall(from.at, k.l.Neg()))
	}
}

func (s *spanner) wall(at exact.Pt, dir exact.Vec) wall {
	v, n := at.Sub(s.at), dir.Left()
	return wall{float64(n.X), float64(n.Y), float64(v.Dot(n)), hair * math.Sqrt(float64(n.Len2()))}
}

func (w wall) holds(x, y float64) bool { return w.nx*x+w.ny*y-w.h >= -w.hair }

func (k *site) to(x, y float64) float64 { return k.g + math.Hypot(x-k.x, y-k.y) }

// corners measures every piece at its point nearest to the root and at its corners.
func (s *spanner) corners() {
	for i, k := range s.parts {
		from := &s.field.roots[k.root]
		s.clip.Start(s.tri)
		if !s.clip.CutTriangle(s.tile) || !s.clip.CutCone(from.at, k.r, k.l) {
			continue
		}
		end := s.clip.closest(from.at)
		x, y := end.Offset(s.at)
		s.offerNear(s.sites[i].to(x, y), x, y)
		for j := range s.clip.Len() {
			corner := meeting(s.clip.Line(j), s.clip.Line(j+1))
			x, y := corner.Offset(s.at)
			s.offerFar(s.least(x, y), x, y)
		}
	}
}

// least returns the distance of a point of the triangle.
func (s *spanner) least(x, y float64) float64 {
	least := math.Inf(1)
	for k := range s.sites {
		if s.sides[2*k].holds(x, y) && s.sides[2*k+1].holds(x, y) {
			least = min(least, s.sites[k].to(x, y))
		}
	}
	return least
}

func (s *spanner) offerNear(far, x, y float64) {
	if at := s.place(x, y); !s.Found || far < s.Near || far == s.Near && before(at, s.NearAt) {
		s.Near, s.NearAt, s.nearTri = far, at, s.id
	}
	s.Found = true
}

func (s *spanner) offerFar(far, x, y float64) {
	if at := s.place(x, y); far > s.Far || far == s.Far && before(at, s.FarAt) {
		s.Far, s.FarAt, s.farTri = far, at, s.id
	}
}

func (s *spanner) place(x, y float64) [2]float64 {
	return [2]float64{float64(s.at.X) + x, float64(s.at.Y) + y}
}

func before(p, q [2]float64) bool { return p[0] < q[0] || p[0] == q[0] && p[1] < q[1] }

package sight

import (
	"math"
	"slices"

	"enfilade/solver/exact"
)

// Kind says what a piece of a region's border is.
type Kind uint8

// The kinds of border.
const (
	Wall      Kind = iota // on something that stops sight
	Occluding             // the floor goes on behind it
	ClipSide              // a side of the view angle or the border of the range
	numKinds
)

// Vertex is a point of a region's border: At + Dir·Num/Den. On the grid Num is 0.
type Vertex struct {
	At       exact.Pt
	Dir      exact.Vec
	Num, Den int64 // Den > 0
}

// gridVertex returns the vertex at a grid point.
func gridVertex(p exact.Pt) Vertex { return Vertex{At: p, Den: 1} }

// OnGrid reports whether v is a grid point as written.
func (v Vertex) OnGrid() bool { return v.Num == 0 }

// Offset returns v minus origin in grid units; it only measures, to a few parts in 2^53 of the offset.
func (v Vertex) Offset(origin exact.Pt) (x, y float64) {
	t := float64(v.Num) / float64(v.Den)
	return float64(v.At.X-origin.X) + t*float64(v.Dir.X), float64(v.At.Y-origin.Y) + t*float64(v.Dir.Y)
}

// Region is what is seen from a point: one counter-clockwise ring around it.
type Region struct {
	Eye      exact.Pt
	Expanded int // triangles entered: the measure of the work done
	ring     []Vertex
	kinds    []Kind
	xy       [][2]float64 // offsets of the vertices from the eye
	first    int          // index of the vertex that comes first
}

// Len returns the number of vertices.
func (r *Region) Len() int { return len(r.ring) }

// Vertex returns vertex i.
func (r *Region) Vertex(i int) Vertex { return r.ring[r.index(i)] }

// Kind returns what the border from vertex i to the next one is.
func (r *Region) Kind(i int) Kind { return r.kinds[r.index(i)] }

// Point returns vertex i in grid units.
func (r *Region) Point(i int) (x, y float64) {
	p := r.xy[r.index(i)]
	return float64(r.Eye.X) + p[0], float64(r.Eye.Y) + p[1]
}

// index returns where vertex i is stored.
func (r *Region) index(i int) int {
	if i += r.first; i >= len(r.ring) {
		i -= len(r.ring)
	}
	return i
}

// Area returns the area in grid units squared. The ring is star-shaped around the eye, so no term is negative and nothing
// cancels.
func (r *Region) Area() float64 {
	sum := 0.0
	for i := range r.xy {
		a, b := r.side(i)
		sum += a[0]*b[1] - a[1]*b[0]
	}
	return sum / 2
}

// Lengths returns the length of the border by kind, in grid units, indexed by Kind.
func (r *Region) Lengths() [3]float64 {
	var sum [numKinds]float64
	for i := range r.xy {
		a, b := r.side(i)
		sum[r.Kind(i)] += math.Hypot(b[0]-a[0], b[1]-a[1])
	}
	return sum
}

// side returns the ends of the border from vertex i to the next one, as offsets from the eye.
func (r *Region) side(i int) (a, b [2]float64) {
	k := r.index(i)
	if a = r.xy[k]; k+1 == len(r.xy) {
		return a, r.xy[0]
	}
	return a, r.xy[k+1]
}

func (r *Region) reset(eye exact.Pt) {
	r.Eye, r.first = eye, 0
	r.ring, r.kinds, r.xy = r.ring[:0], r.kinds[:0], r.xy[:0]
}

func (r *Region) add(v Vertex, k Kind) {
	x, y := v.Offset(r.Eye)
	r.ring = append(r.ring, v)
	r.kinds = append(r.kinds, k)
	r.xy = append(r.xy, [2]float64{x, y})
}

// strip is the end of a region's ring, open for vertices to be written.
type strip struct {
	eye   exact.Pt
	n     int // written so far
	ring  []Vertex
	kinds []Kind
	xy    [][2]float64
}

// open makes room for n more vertices.
func (r *Region) open(n int) strip {
	k := len(r.ring)
	r.ring, r.kinds, r.xy = slices.Grow(r.ring, n), slices.Grow(r.kinds, n), slices.Grow(r.xy, n)
	return strip{r.Eye, 0, r.ring[k : k+n], r.kinds[k : k+n], r.xy[k : k+n]}
}

// close takes over what was written to s.
func (r *Region) close(s strip) {
	n := len(r.ring) + s.n
	r.ring, r.kinds, r.xy = r.ring[:n], r.kinds[:n], r.xy[:n]
}

// canonical lets the ring begin at its lowest left corner, or, where it passes that more than once, at the time that goes on
// to the lowest left one: the same region then has the same bits, however the mesh under it came about.
func (r *Region) canonical() {
	r.first = 0
	for i, p := range r.xy {
		q := r.xy[r.first]
		if p[0] < q[0] || p[0] == q[0] && (p[1] < q[1] || p[1] == q[1] && i > 0 && r.goesLower(i, r.first)) {
			r.first = i
		}
	}
}

// goesLower reports whether the corner that follows stored corner i comes before the one that follows corner k.
func (r *Region) goesLower(i, k int) bool {
	n := len(r.xy)
	p, q := r.xy[(i+1)%n], r.xy[(k+1)%n]
	return p[0] < q[0] || p[0] == q[0] && p[1] < q[1]
}

// turn rotates s so that element k comes first.
func turn[T any](s []T, k int) {
	flip(s[:k])
	flip(s[k:])
	flip(s)
}

func flip[T any](s []T) {
	for i, j := 0, len(s)-1; i < j; i, j = i+1, j-1 {
		s[i], s[j] = s[j], s[i]
	}
}

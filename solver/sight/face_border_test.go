package sight_test

import (
	"context"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// piecesOf turns cones into pieces.
func piecesOf(eye exact.Pt, cones []sight.Cone) []sight.Piece {
	var list []sight.Piece
	for _, k := range cones {
		p := sight.Piece{Tri: k.Tri, N: 2}
		p.Lines[0], p.Lines[1] = exact.Line{At: eye, Dir: k.R}, exact.Line{At: eye, Dir: k.L.Neg()}
		list = append(list, p)
	}
	return list
}

// TestOutlineOfCones joins the cones of a point's region together again: area and border must be those that the region itself
// has from its own ring.
func TestOutlineOfCones(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			f := sight.New(m)
			at := places(p, g)
			height := heights.Draw(t, "height")
			eye := at[rapid.IntRange(0, len(at)-1).Draw(t, "eye")]
			cones, err := f.Cones(eye, height, sight.Clip{})
			if err != nil {
				return
			}
			area, lengths := sight.Measure(f.Outline(piecesOf(eye, cones), eye, height))
			r, err := f.Region(eye, height)
			if err != nil {
				t.Fatal(err)
			}
			if want := r.Area(); math.Abs(area-want) > 1e-9*want {
				t.Errorf("eye %v height %v: area %v, want %v", eye, height, area, want)
			}
			want, whole := r.Lengths(), 0.0
			for _, l := range want {
				whole += l
			}
			for k, l := range want {
				if math.Abs(lengths[k]-l) > 1e-9*whole {
					t.Errorf("eye %v height %v: border %v, want %v", eye, height, lengths, want)
				}
			}
		}))
	}
}

// TestOutlineOfPieces holds the area within the border of all that sees any part of a face against a slow union of its pieces.
func TestOutlineOfPieces(t *testing.T) {
	several, holes := 0, 0
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			f := sight.New(m)
			height := heights.Draw(t, "height")
			c := faceOf(t, g, places(p, g))
			if c.A == c.B || !f.Free(c, height) {
				return
			}
			pieces, err := f.Partly(context.Background(), nil, c, height)
			if err != nil {
				t.Fatal(err)
			}
			rings := f.Outline(pieces, c.A, height)
			area, lengths := sight.Measure(rings)
			border := lengths[0] + lengths[1] + lengths[2]
			// Slivers of 40 km by a tenth of a millimetre cancel but for the last bits of the products they are measured by.
			if want := unionArea(m, pieces, c.A); math.Abs(area-want) > 1e-9*want+border*border*0x1p-52 {
				t.Errorf("face %v height %v: area %v, want %v", c, height, area, want)
			}
			if len(rings) > 1 {
				several++
			}
			for i := range rings {
				if rings[i].Area() < 0 {
					holes++
				}
			}
			whole, err := f.Whole(nil, c, height)
			if err != nil {
				t.Fatal(err)
			}
			if rings := f.Outline(whole, c.A, height); len(whole) > 0 && len(rings) != 1 {
				t.Errorf("face %v height %v: all of it is seen from %d separate parts", c, height, len(rings))
			}
		}))
	}
	if several < 5 || holes < 5 {
		t.Errorf("only %d outlines of several rings, %d holes: the test has lost its aim", several, holes)
	}
}

// unionArea adds up the area of the union of the pieces of each triangle, cut into upright strips at every corner and every
// crossing; within a strip the pieces are a few trapezoids of which none cross.
func unionArea(m *mesh.Mesh, pieces []sight.Piece, origin exact.Pt) float64 {
	by := map[int32][][][2]float64{}
	for i := range pieces {
		by[pieces[i].Tri] = append(by[pieces[i].Tri], cornersOf(m, &pieces[i], origin))
	}
	sum := 0.0
	for _, polys := range by {
		var xs []float64
		for i, a := range polys {
			for k := range a {
				xs = append(xs, a[k][0])
				for _, b := range polys[:i] {
					for j := range b {
						if x, ok := crossX(a[k], a[(k+1)%len(a)], b[j], b[(j+1)%len(b)]); ok {
							xs = append(xs, x)
						}
					}
				}
			}
		}
		slices.Sort(xs)
		for i := 1; i < len(xs); i++ {
			sum += stripArea(polys, xs[i-1], xs[i])
		}
	}
	return sum
}

func stripArea(polys [][][2]float64, x0, x1 float64) float64 {
	var spans [][2]float64
	for _, p := range polys {
		lo, hi := math.Inf(1), math.Inf(-1)
		for k, a := range p {
			b := p[(k+1)%len(p)]
			if x := (x0 + x1) / 2; a[0] != b[0] && (a[0]-x)*(b[0]-x) <= 0 {
				y := a[1] + (b[1]-a[1])*(x-a[0])/(b[0]-a[0])
				lo, hi = min(lo, y), max(hi, y)
			}
		}
		if lo < hi {
			spans = append(spans, [2]float64{lo, hi})
		}
	}
	slices.SortFunc(spans, func(a, b [2]float64) int { return int(math.Copysign(1, a[0]-b[0])) })
	sum, top := 0.0, math.Inf(-1)
	for _, s := range spans {
		if s[1] > top {
			sum += s[1] - max(s[0], top)
			top = s[1]
		}
	}
	return sum * (x1 - x0)
}

func crossX(a, b, c, d [2]float64) (float64, bool) {
	den := (b[0]-a[0])*(d[1]-c[1]) - (b[1]-a[1])*(d[0]-c[0])
	if den == 0 {
		return 0, false
	}
	t := ((c[0]-a[0])*(d[1]-c[1]) - (c[1]-a[1])*(d[0]-c[0])) / den
	return a[0] + t*(b[0]-a[0]), t >= 0 && t <= 1
}

func cornersOf(m *mesh.Mesh, p *sight.Piece, origin exact.Pt) [][2]float64 {
	var c sight.Convex
	c.Take(&m.Tris[p.Tri], p)
	var list [][2]float64
	for i := range c.Len() {
		num, den := c.Line(i).Meet(c.Line(i + 1))
		x, y := c.Line(i).Point(origin, float64(num)/float64(den))
		list = append(list, [2]float64{x, y})
	}
	return list
}

// TestOutlineSharedBorder joins two pieces that overlap and have a stretch of border in common, on the same side of one line.
func TestOutlineSharedBorder(t *testing.T) {
	m := build(t, "floor 0,0 10,0 0,10")
	place, ok := m.Locate(exact.Pt{X: 20000, Y: 20000})
	if !ok {
		t.Fatal("off the mesh")
	}
	above := exact.Line{At: exact.Pt{Y: 10000}, Dir: exact.Vec{X: 1000}}
	left := exact.Line{At: exact.Pt{X: 50000}, Dir: exact.Vec{Y: 1000}}
	right := exact.Line{At: exact.Pt{X: 30000}, Dir: exact.Vec{Y: -1000}}
	pieces := []sight.Piece{{Tri: place.Tri, N: 2}, {Tri: place.Tri, N: 2}}
	pieces[0].Lines[0], pieces[0].Lines[1] = above, left
	pieces[1].Lines[0], pieces[1].Lines[1] = above, right
	for range 2 {
		rings := sight.New(m).Outline(pieces, exact.Pt{}, 16000)
		area, lengths := sight.Measure(rings)
		// The floor above y = 1 m: a right triangle with legs of 9 m.
		if len(rings) != 1 || rings[0].Len() != 3 || area != 90000*90000/2 || lengths[sight.Occluding] != 90000 {
			t.Errorf("%d rings, area %v, border %v", len(rings), area, lengths)
		}
		slices.Reverse(pieces)
	}
}

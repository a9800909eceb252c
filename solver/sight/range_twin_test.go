package sight_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// TestRangeAgainstTwin cuts the twin's triangles by the range's polygon, each on its own and in floating point, and holds the
// fast region's area and the length of its walls against the sums.
func TestRangeAgainstTwin(t *testing.T) {
	for _, name := range []string{"tangles", "slivers", "specks"} {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plantest.Small()[name].Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			twin, fast := plantest.NewTwin(g), sight.New(m)
			at := places(p, g)
			eye := at[rapid.IntRange(0, len(at)-1).Draw(t, "eye")]
			radius := rapid.SampledFrom([]int32{16, 100, 1000, 3000, 4000, 5000, 20000, 1 << 20}).Draw(t, "radius")
			if !eye.Add(exact.Vec{X: radius, Y: radius}).Legal() || !eye.Add(exact.Vec{X: -radius, Y: -radius}).Legal() {
				t.Skip("beyond the legal range")
			}
			height := heights.Draw(t, "height")
			polygon := sight.RangePolygon(eye, radius)
			want := twin.Region(eye, height)
			got, err := fast.Clipped(eye, height, sight.Clip{Range: polygon})
			if (err != nil) != want.Empty() {
				t.Fatalf("fast says %v, the twin's region is empty: %v", err, want.Empty())
			}
			if err != nil {
				return
			}
			area, wall := cutTriangles(want, polygon)
			l := got.Lengths()
			border := l[0] + l[1] + l[2]
			if math.Abs(got.Area()-area) > math.Max(1e-6*border, 1e-9*area) || math.Abs(l[sight.Wall]-wall) > wallOnRays(want)+1e-6+1e-9*wall {
				t.Errorf("eye %v, height %v, range %v: area %v, border %v, want area %v, wall %v", eye, height, radius, got.Area(), l, area, wall)
			}
			for _, b := range at {
				want := want.Holds(b) && inside(polygon, b)
				if got := fast.SeesWithin(eye, b, height, sight.Clip{Range: polygon}); got != want {
					t.Errorf("eye %v, height %v, range %v sees %v: %v, want %v", eye, height, radius, b, got, want)
				}
			}
		}))
	}
}

func inside(polygon []exact.Pt, p exact.Pt) bool {
	for i, a := range polygon {
		if exact.Orient(a, polygon[(i+1)%len(polygon)], p) < 0 {
			return false
		}
	}
	return true
}

// wallOnRays is the length of walls seen edge-on, which cutting triangles does not tell from occluding edges.
func wallOnRays(r *plantest.Region) float64 {
	far := 0.0
	for _, g := range r.Gaps {
		if g.Edge >= 0 {
			ax, ay := g.P1.Float()
			bx, by := g.P2.Float()
			far += math.Hypot(bx-ax, by-ay)
		}
	}
	return r.Lengths()[plantest.OnWall] - far
}

// cutTriangles returns the area of the twin's triangles within a convex polygon, and the length of their far sides within it.
// Coordinates are taken from the eye.
func cutTriangles(r *plantest.Region, polygon []exact.Pt) (area, wall float64) {
	for _, g := range r.Gaps {
		if g.Edge < 0 {
			continue
		}
		far := [][2]float64{offset(g.P1, r.Eye), offset(g.P2, r.Eye)}
		piece := append([][2]float64{{0, 0}}, far...)
		for i, a := range polygon {
			b := polygon[(i+1)%len(polygon)]
			o := [2]float64{float64(a.X - r.Eye.X), float64(a.Y - r.Eye.Y)}
			d := [2]float64{float64(b.X - a.X), float64(b.Y - a.Y)}
			piece = cutBy(piece, o, d)
			far = cutBy(far, o, d)
		}
		for i, a := range piece {
			b := piece[(i+1)%len(piece)]
			area += (a[0]*b[1] - a[1]*b[0]) / 2
		}
		if len(far) > 1 {
			wall += math.Hypot(far[1][0]-far[0][0], far[1][1]-far[0][1])
		}
	}
	return area, wall
}

func offset(s plantest.Spot, eye exact.Pt) [2]float64 {
	x, y := s.Float()
	return [2]float64{x - float64(eye.X), y - float64(eye.Y)}
}

// cutBy keeps what of a convex polygon, or of a segment of two points, lies to the left of the line through o along d.
func cutBy(points [][2]float64, o, d [2]float64) [][2]float64 {
	side := func(p [2]float64) float64 { return d[0]*(p[1]-o[1]) - d[1]*(p[0]-o[0]) }
	var kept [][2]float64
	n := len(points)
	for i, p := range points {
		q := points[(i+1)%n]
		sp, sq := side(p), side(q)
		if sp >= 0 {
			kept = append(kept, p)
		}
		if sp*sq < 0 && (n > 2 || i == 0) {
			k := sp / (sp - sq)
			kept = append(kept, [2]float64{p[0] + k*(q[0]-p[0]), p[1] + k*(q[1]-p[1])})
		}
	}
	return kept
}

package study_test

import (
	"math"
	"strings"
	"testing"

	"github.com/paulmach/orb"
	"github.com/paulmach/orb/planar"

	"enfilade/solver/study"
)

// Rooms whose answers are worked out by hand: an L of 20 m², a square of 100 m² with and without a pillar, a U, two rooms
// with a door between them.
const (
	roomL    = "floor 0,0 6,0 6,2 2,2 2,6 0,6; "
	room10   = "floor 0,0 10,0 10,10 0,10; "
	pillar10 = room10 + "block 4,4 6,4 6,6 4,6; "
	roomU    = "floor 0,0 10,0 10,10 8,10 8,2 2,2 2,10 0,10; "
	twoRooms = "floor 0,0 12,0 12,4 0,4; wall 6,0 6,4; door W1 at=1.5 w=1 leaf=solid "
	hexagon  = "floor 3.464,-2 3.464,2 0,4 -3.464,2 -3.464,-2 0,-4; screen 1.732,-1 1.732,1; "
)

// agree reports whether two figures agree to 1e-9 of the larger.
func agree(got, want float64) bool {
	return math.Abs(got-want) <= 1e-9*math.Max(math.Abs(got), math.Abs(want))
}

// TestSightByHand holds regions against figures worked out by hand from similar triangles; areas in m², lengths in m.
//
// Area, length of wall and length of occluding edges are the isovist measures of Benedikt, "To take hold of space: isovists
// and isovist fields", Environment and Planning B 6 (1979); drift, the distance from the eye to the region's centroid, is
// that of Conroy Dalton and Dalton, "OmniVista", 3rd International Space Syntax Symposium (2001).
func TestSightByHand(t *testing.T) {
	const skip = -1
	for _, c := range []struct {
		name, plan                   string
		area, wall, occluding, drift float64
	}{
		{"unit square from its middle", "floor 0,0 1,0 1,1 0,1; observer 0.5,0.5", 1, 4, 0, 0},
		{"rectangle", "floor 0,0 8,0 8,5 0,5; observer 2,1", 40, 26, 0, 2.5},
		{"L from its bend", roomL + "observer 1,1", 20, 24, 0, skip},
		{"L from an arm", roomL + "observer 5,1", 38. / 3, 44. / 3, 2 * math.Sqrt(10) / 3, skip},
		{"a pillar", pillar10 + "observer 5,1", 76, 36, 4 * math.Sqrt(10), skip},
		{"a thin screen", "floor -4,-4 4,-4 4,4 -4,4; screen 2,-1 2,1; observer 0,0", 58, 30, 2 * math.Sqrt(5), skip},
		// Both rays past the screen's ends meet the far corners of the side exactly. The root of 3 is taken as 1.732.
		{"through two corners", hexagon + "observer 0,0", 21 * 1.732, skip, 2 * math.Hypot(1.732, 1), skip},
		{"a door open", twoRooms + "; observer 3,2", 36, 22, 2 * math.Sqrt(37), skip},
		{"a door shut", twoRooms + "shut; observer 3,2", 24, 20, 0, skip},
		{"on the threshold", twoRooms + "; observer 6,2", 48, 32, 0, skip},
	} {
		s := solve(t, c.plan).Sight[0]
		for _, f := range []struct {
			what      string
			got, want float64
		}{
			{"area", s.Area, c.area}, {"wall", s.Wall, c.wall}, {"occluding edges", s.Occluding, c.occluding},
			{"border", s.Perimeter, s.Wall + s.Occluding}, {"clip", s.Clip, 0},
		} {
			if f.want != skip && !agree(f.got, f.want) {
				t.Errorf("%s: %s %.12g, want %.12g", c.name, f.what, f.got, f.want)
			}
		}
		if drift := driftOf(s); c.drift != skip && math.Abs(drift-c.drift) > 1e-9 {
			t.Errorf("%s: drift %.12g, want %.12g", c.name, drift, c.drift)
		}
	}
}

// driftOf is the distance from the eye to the centroid of what it sees, in metres.
func driftOf(s study.Sight) float64 {
	centre, _ := planar.CentroidArea(closed(s.Boundary))
	return planar.Distance(centre, s.At) / 1000
}

// closed repeats a ring's first point, as the library's measures expect.
func closed(r orb.Ring) orb.Ring { return append(r.Clone(), r[0]) }

// TestApproachByHand holds approaches and full walks against figures worked out by hand; lengths in m. An approach ends
// square to a window of the target's region or at a window's end: Knauer, Rote and Schlipf, "Shortest inspection-path
// queries in simple polygons", EuroCG 2008.
func TestApproachByHand(t *testing.T) {
	ten := math.Sqrt(10)
	for _, c := range []struct {
		name, plan   string
		status       study.Status
		length, x, y float64
		full         float64
		ties         bool
	}{
		{"square to the window", roomL + "start 5,1; target 1,5", study.StatusApproach, 8 / ten, 2.6, 0.2, 2 * ten, false},
		{"to the window's end", roomL + "start 6,0.5; target 1,5", study.StatusApproach, math.Sqrt(409) / 6, 8. / 3, 0, math.Hypot(4, 1.5) + ten, false},
		{"round a corner", roomU + "start 9,8; target 1,8", study.StatusApproach, 73 / math.Sqrt(37), 80. / 37, 38. / 37, 2*math.Sqrt(37) + 6, false},
		{"two equal ways", pillar10 + "start 5,1; target 5,9", study.StatusApproach, 8 / ten, math.NaN(), 1.8, 2 + 2*ten, true},
		{"seen through glass", room10 + "glass 5,0 5,8; start 4,1; target 6,1", study.StatusSeen, 0, 4, 1, 10 * math.Sqrt2, false},
	} {
		a := solve(t, c.plan).Approaches[0]
		if a.Status != c.status || a.Ties != c.ties || a.Status != study.StatusSeen && !agree(a.Length/1000, c.length) {
			t.Errorf("%s: status %v, ties %v, %.12g m, want %v, %v, %.12g m", c.name, a.Status, a.Ties, a.Length/1000, c.status, c.ties, c.length)
		}
		if !a.HasFullWalk || !agree(a.FullWalk/1000, c.full) {
			t.Errorf("%s: full walk %.12g, want %.12g", c.name, a.FullWalk/1000, c.full)
		}
		x, y := a.FirstSight[0]/1000, a.FirstSight[1]/1000
		if math.IsNaN(c.x) { // either of the two ends, by the fixed rule always the same
			c.x = x
			if !agree(x, 2.6) && !agree(x, 7.4) {
				t.Errorf("%s: first sight at x = %v", c.name, x)
			}
		}
		if math.Abs(x-c.x) > 1e-9 || math.Abs(y-c.y) > 1e-9 {
			t.Errorf("%s: first sight at %.12g, %.12g, want %.12g, %.12g", c.name, x, y, c.x, c.y)
		}
	}
}

// TestEnfiladeByHand looks through three openings in a row: what is seen of the far wall follows from the steepest and the
// flattest line through all three. Staggered, they let no line through.
func TestEnfiladeByHand(t *testing.T) {
	const walls = "floor 0,-2 8,-2 8,6 0,6; wall 2,-2 2,6; wall 4,-2 4,6; wall 6,-2 6,6; observer 0,1; "
	farWall := func(doors string) (lo, hi float64) {
		lo, hi = math.Inf(1), math.Inf(-1)
		for _, p := range solve(t, walls+doors).Sight[0].Boundary {
			if p[0] == 8000 {
				lo, hi = min(lo, p[1]/1000), max(hi, p[1]/1000)
			}
		}
		return lo, hi
	}
	if lo, hi := farWall("door W1 at=3 w=1; door W2 at=3.5 w=1; door W3 at=4 w=1"); !agree(lo, 7./3) || !agree(hi, 11./3) {
		t.Errorf("seen from %.12g to %.12g, want 7/3 to 11/3", lo, hi)
	}
	if lo, hi := farWall("door W1 at=2 w=1; door W2 at=4 w=1; door W3 at=2 w=1"); lo <= hi {
		t.Errorf("staggered: seen from %v to %v", lo, hi)
	}
}

// TestViewByHand clips a square room to a view of 60 degrees, worked out by hand: the triangle up to the wall is 25/sqrt 3,
// the sector of radius 5 is 25 pi/6. The arc is a polygon that lies within 1 mm inside the circle.
func TestViewByHand(t *testing.T) {
	const square = "floor -5,-5 5,-5 5,5 -5,5; observer 0,0 view=60 "
	s := solve(t, square).Sight[0]
	// The sides are rounded once to vectors of 2^29 units: an angle off by 2^-30 moves the far end by as much of itself.
	if math.Abs(s.Area-25/math.Sqrt(3)) > 1e-8*s.Area || math.Abs(s.Clip-20/math.Sqrt(3)) > 1e-8*s.Clip {
		t.Errorf("area %.12g, sides %.12g, want %.12g, %.12g", s.Area, s.Clip, 25/math.Sqrt(3), 20/math.Sqrt(3))
	}
	s = solve(t, square+"range=5").Sight[0]
	if lo, hi := 4.999*4.999*math.Pi/6, 25*math.Pi/6; s.Area < lo*(1-1e-8) || s.Area > hi*(1+1e-8) {
		t.Errorf("area %.12g, want between %.12g and %.12g", s.Area, lo, hi)
	}
}

// TestRoundRoomByHand: a regular polygon of n corners seen from its middle has the area n/2 sin(2 pi/n) of its circumradius
// squared, and the circularity n/pi tan(pi/n). Its corners are on the grid, so the area is that of the rounded corners.
func TestRoundRoomByHand(t *testing.T) {
	const n, radius = 64, 10000
	var b strings.Builder
	b.WriteString("floor")
	var ring orb.Ring
	for i := range n {
		sin, cos := math.Sincos(2 * math.Pi * float64(i) / n)
		p := orb.Point{math.Round(radius * cos), math.Round(radius * sin)}
		ring = append(ring, p)
		b.WriteString(" " + metres(p[0]) + "," + metres(p[1]))
	}
	s := solve(t, b.String()+"; observer 0,0").Sight[0]
	if want := planar.Area(closed(ring)) / 1e8; !agree(s.Area, want) || !agree(s.Perimeter, planar.Length(closed(ring))/1e4) {
		t.Errorf("area %.12g, border %.12g of the rounded polygon, want %.12g, %.12g", s.Area, s.Perimeter, want, planar.Length(closed(ring))/1e4)
	}
	// Half a unit in 10,000 at each corner moves neither by more than one part in 10,000.
	if area, circularity := 3.136548, 1.000804; math.Abs(s.Area-area) > 1e-4*area ||
		math.Abs(s.Perimeter*s.Perimeter/(4*math.Pi*s.Area)-circularity) > 1e-4 {
		t.Errorf("area %.12g, circularity %.12g, want about %v, %v", s.Area, s.Perimeter*s.Perimeter/(4*math.Pi*s.Area), area, circularity)
	}
}

package paint

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// winding counts how often a path of closed rings runs around a place.
func winding(l *List, x, y float64) int {
	n := 0
	for _, s := range l.Subs {
		pts := l.Points[s.First:s.Last]
		for i, b := range pts {
			a := pts[(i+len(pts)-1)%len(pts)]
			ax, ay, bx, by := float64(a.X), float64(a.Y), float64(b.X), float64(b.Y)
			if (ay <= y) != (by <= y) && ax+(bx-ax)*(y-ay)/(by-ay) > x {
				if by > ay {
					n++
				} else {
					n--
				}
			}
		}
	}
	return n
}

func drawPlaces(t *rapid.T, least int) []place {
	n := rapid.IntRange(least, 9).Draw(t, "corners")
	ring := make([]place, n)
	for i := range ring {
		ring[i] = place{rapid.Float64Range(-400, 500).Draw(t, "x"), rapid.Float64Range(-400, 500).Draw(t, "y")}
	}
	return ring
}

// TestCutRingLaws: cutting a ring to the frame keeps every winding number inside of it, and leaves nothing outside.
func TestCutRingLaws(t *testing.T) {
	f := frame{-10, -10, 110, 110}
	cut := 0
	rapid.Check(t, func(t *rapid.T) {
		ring := drawPlaces(t, 3)
		var whole, got List
		whole.addRing(frame{-1e9, -1e9, 1e9, 1e9}, ring)
		got.addRing(f, ring)
		if len(got.Points) != len(whole.Points) {
			cut++
		}
		for _, q := range got.Points {
			if q.X < -10.01 || q.X > 110.01 || q.Y < -10.01 || q.Y > 110.01 {
				t.Fatalf("%v lies outside the frame", q)
			}
		}
		x, y := rapid.Float64Range(-9.5, 109.5).Draw(t, "px"), rapid.Float64Range(-9.5, 109.5).Draw(t, "py")
		if a, b := winding(&whole, x, y), winding(&got, x, y); a != b && !nearRing(ring, x, y) {
			t.Fatalf("winding about %g, %g is %d, was %d: %v", x, y, b, a, ring)
		}
	})
	if cut == 0 {
		t.Error("no ring was cut: the test shows nothing")
	}
}

// nearRing reports whether a place is so near to a ring that float32 may put it on the other side.
func nearRing(ring []place, x, y float64) bool {
	for i, b := range ring {
		a := ring[(i+len(ring)-1)%len(ring)]
		u, length := vec(a).towards(vec(b))
		along, off := (x-a.x)*u.x+(y-a.y)*u.y, (y-a.y)*u.x-(x-a.x)*u.y
		if along > -0.01 && along < length+0.01 && math.Abs(off) < 0.01 {
			return true
		}
	}
	return false
}

// TestCutLineLaws: the kept pieces lie on the line, and their phase is their distance along it.
func TestCutLineLaws(t *testing.T) {
	f := frame{-10, -10, 110, 110}
	rapid.Check(t, func(t *rapid.T) {
		line := drawPlaces(t, 2)
		var l List
		const period = 1e9 // longer than any line: the phase is the distance itself
		l.addLine(f, line, period)
		for _, s := range l.Subs {
			q := l.Points[s.First]
			at, _ := onLine(line, float64(s.Phase))
			if math.Hypot(at.x-float64(q.X), at.y-float64(q.Y)) > 0.01 {
				t.Fatalf("a piece begins at %v, but %g along the line is %v", q, s.Phase, at)
			}
		}
		// Length inside the frame, by walking in small steps.
		want, got, total := 0.0, 0.0, 0.0
		for i := 1; i < len(line); i++ {
			d := math.Hypot(line[i].x-line[i-1].x, line[i].y-line[i-1].y)
			total += d
			for j := range 400 {
				s := (float64(j) + 0.5) / 400
				if f.holds(line[i-1].x+s*(line[i].x-line[i-1].x), line[i-1].y+s*(line[i].y-line[i-1].y)) {
					want += d / 400
				}
			}
		}
		for _, s := range l.Subs {
			for i := s.First + 1; i < s.Last; i++ {
				a, b := l.Points[i-1], l.Points[i]
				got += math.Hypot(float64(b.X-a.X), float64(b.Y-a.Y))
			}
		}
		if math.Abs(got-want) > total/200+0.1 {
			t.Fatalf("kept %g of the line, want %g", got, want)
		}
	})
}

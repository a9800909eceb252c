package paint

import "math"

// frame is the part of the pixel plane that paths are cut to: the picture and a rim around it, wide enough for the widest
// stroke. Cutting keeps coordinates small enough for the rasteriser at every zoom.
type frame struct{ x0, y0, x1, y1 float64 }

// rim is the width around the picture that is kept, in device pixels at K = 1.
const rim = 64

func frameOf(w, h int, k float64) frame {
	r := rim * k
	return frame{-r, -r, float64(w) + r, float64(h) + r}
}

func (f frame) holds(x, y float64) bool { return x >= f.x0 && x <= f.x1 && y >= f.y0 && y <= f.y1 }

// segment cuts the segment from a to b to the frame (Liang and Barsky 1984) and returns the shares of it that are kept;
// ok is false when nothing is.
func (f frame) segment(ax, ay, bx, by float64) (t0, t1 float64, ok bool) {
	t0, t1 = 0, 1
	dx, dy := bx-ax, by-ay
	for _, e := range [...][2]float64{{-dx, ax - f.x0}, {dx, f.x1 - ax}, {-dy, ay - f.y0}, {dy, f.y1 - ay}} {
		p, q := e[0], e[1]
		switch {
		case p == 0:
			if q < 0 {
				return 0, 0, false
			}
		case p < 0:
			t0 = max(t0, q/p)
		default:
			t1 = min(t1, q/p)
		}
	}
	return t0, t1, t0 < t1 || t0 == t1 && ax == bx && ay == by
}

// place is a point of a path in the making, in device pixels.
type place struct{ x, y float64 }

// addRing adds a closed ring, cut to the frame (Sutherland and Hodgman 1974): inside the frame every winding number stays
// as it is, and the edges that cutting adds run along the frame's border, outside the picture.
func (l *List) addRing(f frame, ring []place) {
	if len(ring) < 2 {
		return
	}
	in := true
	for _, p := range ring {
		if !f.holds(p.x, p.y) {
			in = false
			break
		}
	}
	if !in {
		ring = l.cutRing(f, ring)
	}
	if len(ring) < 2 {
		return
	}
	for i, p := range ring {
		if i == 0 {
			l.move(p.x, p.y)
		} else {
			l.line(p.x, p.y)
		}
	}
	l.close()
}

func (l *List) cutRing(f frame, ring []place) []place {
	from, to := l.work.cut[0][:0], l.work.cut[1][:0]
	from = append(from, ring...)
	for side := range 4 {
		to = to[:0]
		for i, b := range from {
			a := from[(i+len(from)-1)%len(from)]
			da, db := f.inside(side, a), f.inside(side, b)
			if (da < 0) != (db < 0) {
				t := da / (da - db)
				to = append(to, place{a.x + t*(b.x-a.x), a.y + t*(b.y-a.y)})
			}
			if db >= 0 {
				to = append(to, b)
			}
		}
		from, to = to, from
	}
	l.work.cut[0], l.work.cut[1] = from, to
	return from
}

// inside returns how far p lies inside of one side of the frame.
func (f frame) inside(side int, p place) float64 {
	switch side {
	case 0:
		return p.x - f.x0
	case 1:
		return f.x1 - p.x
	case 2:
		return p.y - f.y0
	}
	return f.y1 - p.y
}

// addLine adds an open line, cut to the frame. Where it comes back into the frame its dashes, which repeat after so many
// pixels, go on as if it had never left; the period is 0 for a line without dashes.
func (l *List) addLine(f frame, line []place, period float64) {
	run, open := 0.0, false
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		length := math.Hypot(b.x-a.x, b.y-a.y)
		t0, t1, ok := f.segment(a.x, a.y, b.x, b.y)
		if !ok {
			open = false
			run += length
			continue
		}
		if !open || t0 > 0 {
			l.move(a.x+t0*(b.x-a.x), a.y+t0*(b.y-a.y))
			if period > 0 {
				l.Subs[len(l.Subs)-1].Phase = float32(math.Mod(run+t0*length, period))
			}
		}
		l.line(a.x+t1*(b.x-a.x), a.y+t1*(b.y-a.y))
		open = t1 == 1
		run += length
	}
}

package arrange

import "slices"

// drawBody outlines a thick wall: one body for each run of legs between two openings.
func (d *drawer) drawBody(s *strand) {
	spans := s.spans(d.spans[:0])
	d.spans = spans
	m := len(spans)
	first := 0
	if s.closed { // begin where the wall is cut, so that no run is parted at the closing point
		for first < m && s.goesOn(spans[(first+m-1)%m], spans[first]) {
			first++
		}
		if m > 0 && first == m {
			d.drawLoop(s)
			return
		}
	}
	if first > 0 {
		d.turned = append(append(d.turned[:0], spans[first:]...), spans[:first]...)
		spans = d.turned
	}
	for i := 0; i < m; {
		j := i + 1
		for j < m && s.goesOn(spans[j-1], spans[j]) {
			j++
		}
		d.drawRun(s, spans[i:j])
		i = j
	}
}

// goesOn reports whether b follows a round a corner with no opening between.
func (s *strand) goesOn(a, b span) bool {
	next := a.leg + 1
	if s.closed && int(next) == s.legCount() {
		next = 0
	}
	return a.till == noGap && b.after == noGap && b.leg == next
}

// drawLoop outlines a closed wall without openings: its right side forwards and its left side backwards, so that the wall
// lies to the left of both.
func (d *drawer) drawLoop(s *strand) {
	right, left := d.ring.right[:0], d.ring.left[:0]
	for leg := range s.legCount() {
		c := s.cornerAfter(leg)
		right, left = append(right, c.right.through()...), append(left, c.left.through()...)
	}
	slices.Reverse(left)
	body := d.addBody(s.stops(), s.item)
	d.addRing(body, right)
	d.addRing(body, left)
	d.ring.right, d.ring.left = right, left
}

// drawRun outlines one run: its right side forwards, its far end, its left side backwards, its near end.
func (d *drawer) drawRun(s *strand, run []span) {
	right, left := d.ring.right[:0], d.ring.left[:0]
	outline := d.ring.outline[:0]

	head := run[0]
	start := s.mateAt(head.leg, head.after, 0)
	if start.s != nil {
		c := turn(s.pts[0], start.backward(), s.roomAt(0, false), s.right2, s.left2)
		right, left = append(right, c.right.leaving()...), append(left, c.left.leaving()...)
	} else {
		right = append(right, s.station(head.leg, head.after, true, -s.right2))
		left = append(left, s.station(head.leg, head.after, true, s.left2))
	}
	for _, sp := range run[:len(run)-1] {
		c := s.cornerAfter(int(sp.leg))
		right, left = append(right, c.right.through()...), append(left, c.left.through()...)
	}
	tail := run[len(run)-1]
	end := s.mateAt(tail.leg, tail.till, 1)
	if end.s != nil {
		c := turn(s.pts[len(s.pts)-1], s.roomAt(s.legCount()-1, true), end.onward(), s.right2, s.left2)
		right, left = append(right, c.right.arriving()...), append(left, c.left.arriving()...)
	} else {
		right = append(right, s.station(tail.leg, tail.till, false, -s.right2))
		left = append(left, s.station(tail.leg, tail.till, false, s.left2))
	}

	outline = append(outline, right...)
	if end.s != nil { // both walls meet along the mitre through the shared point
		outline = append(outline, s.pts[len(s.pts)-1])
	}
	slices.Reverse(left)
	outline = append(outline, left...)
	if start.s != nil {
		outline = append(outline, s.pts[0])
	}
	d.addRing(d.addBody(s.stops(), s.item), outline)
	d.ring = ringBuffers{right, left, outline}
}

// cornerAfter returns the corner between a leg and the next one.
func (s *strand) cornerAfter(leg int) corner {
	next := leg + 1
	if next == s.legCount() {
		next = 0
	}
	return turn(s.pts[leg+1], s.roomAt(leg, true), s.roomAt(next, false), s.right2, s.left2)
}

// mateAt returns what the strand is mitred to at its start (which 0) or its end (which 1), if the leg is there and no gap
// lies between.
func (s *strand) mateAt(leg int32, g, which int) mate {
	atEnd := which == 1 && int(leg) == s.legCount()-1
	atStart := which == 0 && leg == 0
	if g != noGap || !atStart && !atEnd {
		return mate{}
	}
	return s.mates[which]
}

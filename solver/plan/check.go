package plan

import (
	"fmt"
	"math"
)

const outOfRange = "lies outside the legal range of 50 km about the origin"

// chainFault checks a chain of at least so many points.
func chainFault(c Chain, least int) string {
	if len(c.pts) < least {
		return fmt.Sprintf("needs %d points or more, has %d", least, len(c.pts))
	}
	for _, p := range c.pts {
		if !InRange(p) {
			return outOfRange
		}
	}
	return ""
}

// firstOf returns the first text that says something.
func firstOf(texts ...string) string {
	for _, t := range texts {
		if t != "" {
			return t
		}
	}
	return ""
}

// unless returns the text when ok is false.
func unless(ok bool, text string) string {
	if ok {
		return ""
	}
	return text
}

func heightFault(h int32) string {
	return unless(h > 0 && (h <= MaxCoord || h == Ceiling), "needs a height above 0 and up to 50 km, or none for up to the ceiling")
}

func degreesFault(name string, v *float64) string {
	return unless(v == nil || math.Abs(*v) <= 360, "needs a "+name+" from -360 to 360 degrees") // NaN is not <= 360
}

func lengthFault(name string, v *int32, most int32) string {
	return unless(v == nil || *v >= 0 && *v <= most, "needs a "+name+" of 0 or more and up to 50 km")
}

func colourFault(c int) string {
	return unless(c >= -1 && c <= MaxColour, fmt.Sprintf("needs a colour from 0 to %d, or -1 for none", MaxColour))
}

func (w *Wall) fault() string {
	return firstOf(chainFault(w.Line, 2), heightFault(w.Height),
		unless(w.Thickness >= 0 && w.Thickness <= MaxThickness, "needs a thickness from 0 to 100 m"))
}

func (o *Opening) fault() string { return unless(o.Wall != "", "needs the id of the wall it lies in") }

func (b *Block) fault() string {
	round := b.Circle == nil || InRange(b.Circle.At) && b.Circle.Radius > 0 && b.Circle.Radius <= MaxRound
	return firstOf(chainFault(b.Ring, 3), heightFault(b.Height), unless(round, "needs a circle with a radius up to 100 m, within 50 km about the origin"))
}

func (z *Zone) fault() string { return chainFault(z.Ring, 3) }

func (o *Observer) fault() string {
	return firstOf(unless(InRange(o.At), outOfRange),
		unless(o.Eye > 0 && o.Eye <= MaxCoord, "needs an eye height above 0 and up to 50 km"),
		degreesFault("heading", &o.Heading),
		unless(o.View > 0 && o.View <= 360, "needs a view angle above 0 and up to 360 degrees"),
		unless(o.Range >= 0, "needs a range above 0, or 0 for no limit"),
		colourFault(o.Colour))
}

func (t *Target) fault() string {
	face := t.Face == nil || InRange(t.Face[0]) && InRange(t.Face[1])
	return firstOf(unless(InRange(t.At) && face, outOfRange),
		unless(t.Face == nil || t.Face[0] != t.Face[1], "needs a face whose ends differ"),
		degreesFault("normal", t.Normal), lengthFault("bottom", t.Bottom, MaxCoord), lengthFault("top", t.Top, MaxCoord),
		unless(t.MaxAngle == nil || *t.MaxAngle >= 0 && *t.MaxAngle <= 90, "needs a greatest angle from 0 to 90 degrees"),
		lengthFault("near limit", t.Near, math.MaxInt32), lengthFault("far limit", t.Far, math.MaxInt32), colourFault(t.Colour))
}

func (s *Start) fault() string {
	return firstOf(unless(InRange(s.At), outOfRange), degreesFault("facing", s.Facing))
}

func (r *Route) fault() string { return chainFault(r.Via, 0) }

func (w *Walker) fault() string {
	share := w.Seen != SeenShare || w.Share > 0 && w.Share <= 1
	return firstOf(unless(w.Radius >= 0 && w.Radius <= MaxBodyRadius, "needs a body radius from 0 to 2 m"),
		unless(w.Pace > 0 && w.Pace <= MaxPace, "needs a pace above 0 and up to 100 metres per second"),
		unless(w.Eye > 0 && w.Eye <= MaxCoord, "needs an eye height above 0 and up to 50 km"),
		unless(share, "needs a share of the face above 0 and up to 1"))
}

// fitted returns the openings with those of wall w made to fit: one that the shortened wall pushes slides back along it.
// Errors name the opening that fits nowhere, or lies over another.
func fitted(openings list[Opening], w *Wall) (list[Opening], error) {
	var own []int
	for i, o := range openings.refs() {
		if o.Wall == w.ID {
			own = append(own, i)
		}
	}
	e := openings.edit()
	err := fitOwn(&e, own, w)
	return e.list, err
}

// fitOwn makes the openings of wall w fit, whose places in the list are given in order.
func fitOwn(e *listEdit[Opening], own []int, w *Wall) error {
	for k, i := range own {
		o := *e.list.at(i)
		if _, text := w.Fit(o); text != "" {
			if o.At = w.lastPlace(o); o.At < 0 {
				return fault(KindOpening, o.ID, text)
			}
			e.at(i).At = o.At
		}
		for _, j := range own[:k] {
			if q := e.list.at(j); o.Over(*q) {
				return fault(KindOpening, o.ID, fmt.Sprintf("would lie over opening %s", q.ID))
			}
		}
	}
	return nil
}

// lastPlace returns the farthest place along its straight piece at which an opening fits, negative when none.
func (w *Wall) lastPlace(o Opening) int32 {
	if o.Segment < 0 || o.Segment+1 >= w.Line.Len() || o.Width <= 0 {
		return -1
	}
	len2 := w.Line.At(o.Segment + 1).Sub(w.Line.At(o.Segment)).Len2()
	long := int64(math.Sqrt(float64(len2))) // then made exact
	for long*long > len2 {
		long--
	}
	for (long+1)*(long+1) <= len2 {
		long++
	}
	return int32(max(-1, long-int64(o.Width)))
}

package planfile

import (
	"strconv"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// The members that nearly every item of a kind has are always written; the rest only where they say something.

// word writes a member that is a word of the format; a value out of its words is written so that reading it back tells.
func word[T ~uint8](out []byte, name string, words []string, v T) []byte {
	if int(v) >= len(words) {
		return number(out, name, int(v))
	}
	return text(out, name, words[v])
}

func name(out []byte, name string) []byte {
	out = append(append(out, `,"`...), name...)
	return append(out, `":`...)
}

func text(out []byte, member, s string) []byte { return appendText(name(out, member), s) }

func textIf(out []byte, member, s string) []byte {
	if s == "" {
		return out
	}
	return text(out, member, s)
}

func number(out []byte, member string, v int) []byte {
	return strconv.AppendInt(name(out, member), int64(v), 10)
}

func length(out []byte, member string, v int32) []byte { return appendMM(name(out, member), v) }

func lengthAt(out []byte, member string, v *int32) []byte {
	if v == nil {
		return out
	}
	return length(out, member, *v)
}

func float(out []byte, member string, v float64) []byte { return appendFloat(name(out, member), v) }

func floatAt(out []byte, member string, v *float64) []byte {
	if v == nil {
		return out
	}
	return float(out, member, *v)
}

func point(out []byte, member string, p exact.Pt) []byte { return appendPoint(name(out, member), p) }

func points(out []byte, member string, c plan.Chain) []byte {
	return appendPoints(name(out, member), c)
}

func height(out []byte, h int32) []byte {
	if h == plan.Ceiling {
		return out
	}
	return length(out, "height", h)
}

func colour(out []byte, c int) []byte {
	if c == -1 {
		return out
	}
	return number(out, "colour", c)
}

func appendWall(out []byte, w *plan.Wall) []byte {
	out = word(out, "kind", wallKinds, w.Kind)
	out = points(out, "line", w.Line)
	out = length(out, "thickness", w.Thickness)
	out = height(out, w.Height)
	if w.Justify != plan.Centre {
		out = word(out, "justify", justifies, w.Justify)
	}
	return out
}

func appendOpening(out []byte, o *plan.Opening) []byte {
	out = text(out, "wall", o.Wall)
	out = number(out, "segment", o.Segment)
	out = length(out, "at", o.At)
	out = length(out, "width", o.Width)
	out = word(out, "leaf", leaves, o.Leaf)
	out = word(out, "state", openShut, bit(o.Shut))
	if o.HingeEnd {
		out = word(out, "hinge", hinges, bit(o.HingeEnd))
	}
	if o.SideRight {
		out = word(out, "side", hingeSides, bit(o.SideRight))
	}
	return out
}

func bit(b bool) uint8 {
	if b {
		return 1
	}
	return 0
}

func appendBlock(out []byte, b *plan.Block) []byte {
	out = points(out, "ring", b.Ring)
	if c := b.Circle; c != nil {
		out = appendPoint(append(name(out, "circle"), `{"at":`...), c.At)
		out = length(out, "radius", c.Radius)
		out = append(appendExtra(out, c.Extra, ",", ":"), '}')
	}
	return height(out, b.Height)
}

func appendZone(out []byte, z *plan.Zone) []byte {
	out = textIf(out, "name", z.Name)
	out = points(out, "ring", z.Ring)
	if z.Room {
		out = word(out, "kind", zoneKinds, bit(z.Room))
	}
	return out
}

func appendObserver(out []byte, o *plan.Observer) []byte {
	out = textIf(out, "name", o.Name)
	out = point(out, "at", o.At)
	out = length(out, "eye", o.Eye)
	out = float(out, "heading", o.Heading)
	out = float(out, "view", o.View)
	if o.Range != 0 {
		out = length(out, "range", o.Range)
	}
	return colour(out, o.Colour)
}

func appendTarget(out []byte, t *plan.Target) []byte {
	out = textIf(out, "name", t.Name)
	out = point(out, "at", t.At)
	if t.Face != nil {
		out = points(out, "face", plan.ChainOf(t.Face[:]...))
	}
	out = floatAt(out, "normal", t.Normal)
	out = lengthAt(out, "bottom", t.Bottom)
	out = lengthAt(out, "top", t.Top)
	out = floatAt(out, "max_angle", t.MaxAngle)
	out = lengthAt(out, "near", t.Near)
	out = lengthAt(out, "far", t.Far)
	return colour(out, t.Colour)
}

func appendStart(out []byte, s *plan.Start) []byte {
	out = textIf(out, "name", s.Name)
	out = point(out, "at", s.At)
	return floatAt(out, "facing", s.Facing)
}

func appendRoute(out []byte, r *plan.Route) []byte {
	out = textIf(out, "from", r.From)
	if r.Via.Len() > 0 {
		out = points(out, "via", r.Via)
	}
	return textIf(out, "to", r.To)
}

func appendWalker(out []byte, w *plan.Walker) []byte {
	out = appendMM(append(out, `{"radius":`...), w.Radius)
	out = float(out, "pace", w.Pace)
	out = length(out, "eye", w.Eye)
	if w.Seen == plan.SeenShare {
		out = float(out, "seen", w.Share)
	} else {
		out = word(out, "seen", seenChoices, w.Seen)
	}
	return append(appendMeta(out, &w.Meta), '}')
}

func appendUnderlay(out []byte, u *plan.Underlay) []byte {
	out = appendText(append(out, `{"image":`...), u.Image)
	out = point(out, "at", u.At)
	out = float(out, "mm_per_pixel", u.MMPerPixel)
	out = float(out, "opacity", u.Opacity)
	if u.Turn != 0 {
		out = float(out, "turn", u.Turn)
	}
	return append(appendMeta(out, &u.Meta), '}')
}

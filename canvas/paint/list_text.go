package paint

import (
	"fmt"
	"image/color"
	"strings"
)

// String writes the list as text, one line a step, for people and for comparing: kind, colour, style, path. Places have one
// decimal; long paths are cut.
func (l *List) String() string {
	var b strings.Builder
	fmt.Fprintf(&b, "picture %d %d k %g\n", l.W, l.H, l.K)
	for i := range l.Ops {
		l.writeOp(&b, &l.Ops[i])
	}
	return b.String()
}

func (l *List) writeOp(b *strings.Builder, op *Op) {
	fmt.Fprintf(b, "%s %s", [...]string{"fill", "stroke", "hatch", "wash", "text", "image"}[op.Kind], hex(op.Colour))
	if op.Ink != NoInk {
		b.WriteString([...]string{"", " low", " hard"}[op.Ink])
	}
	if op.EvenOdd {
		b.WriteString(" evenodd")
	}
	if op.Free {
		b.WriteString(" free")
	}
	switch op.Kind {
	case Stroke:
		s := l.Strokes[op.Style]
		fmt.Fprintf(b, " width %.4g", s.Width)
		if s.On > 0 {
			fmt.Fprintf(b, " dash %.4g-%.4g", s.On, s.Off)
		}
		b.WriteString([...]string{"", " round", " square"}[s.Cap] + [...]string{"", " roundjoin"}[s.Join])
	case Hatch:
		h := l.Hatches[op.Style]
		fmt.Fprintf(b, " gap %.4g width %.4g %s offset %.1f",
			h.Gap, h.Width, map[bool]string{true: "rising", false: "falling"}[h.Rising], h.Offset)
	case Wash:
		w := l.Washes[op.Style]
		fmt.Fprintf(b, " eye %.1f,%.1f radius %.1f %.3g-%.3g-%.3g rims %.4g %.4g at %.3g",
			w.Eye.X, w.Eye.Y, w.Radius, w.Near, w.Mid, w.Far, w.Rims[0], w.Rims[1], w.RimStrength)
	case Image:
		m := l.Images[op.Style]
		fmt.Fprintf(b, " %d by %d at %.4g strength %.3g turned %v\n", m.Photo.W, m.Photo.H, m.Place, m.Strength, m.Inverse)
		return
	case Text:
		t := l.Texts[op.Style]
		fmt.Fprintf(b, " %v %.4g", t.Weight, t.Size)
		if t.Spacing > 0 {
			fmt.Fprintf(b, " spaced %.4g", t.Spacing)
		}
		if t.Halo > 0 {
			fmt.Fprintf(b, " halo %.4g %s", t.Halo, hex(t.HaloColour))
		}
		if t.Up {
			b.WriteString(" up")
		}
		fmt.Fprintf(b, " at %.1f,%.1f %q\n", t.At.X, t.At.Y, l.Chars[t.Chars[0]:t.Chars[1]])
		return
	}
	l.writePath(b, op)
	b.WriteByte('\n')
}

// pathCut is how many points of a path are written.
const pathCut = 24

func (l *List) writePath(b *strings.Builder, op *Op) {
	written, all := 0, 0
	for _, s := range l.Path(op) {
		all += int(s.Last - s.First)
		if written >= pathCut {
			continue
		}
		b.WriteString(" |")
		for _, p := range l.Points[s.First:s.Last] {
			if written++; written <= pathCut {
				fmt.Fprintf(b, " %.1f,%.1f", p.X, p.Y)
			}
		}
		if s.Closed {
			b.WriteString(" z")
		}
	}
	if all > pathCut {
		fmt.Fprintf(b, " and %d more", all-pathCut)
	}
}

func hex(c color.NRGBA) string {
	s := fmt.Sprintf("#%02X%02X%02X", c.R, c.G, c.B)
	if c.A != 255 {
		s += fmt.Sprintf("/%d%%", (int(c.A)*100+127)/255)
	}
	return s
}

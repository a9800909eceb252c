package plantest

import (
	"fmt"
	"strconv"
	"strings"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Text writes the plan in the notation of [Parse], one item a line: what a failing property test prints, ready to be
// pasted into a table test. Fields that the notation does not know (names, colours, extra members) are left out.
func Text(p *plan.Plan) string {
	var b strings.Builder
	parts := p.Parts()
	if parts.Floor.Len() > 0 {
		fmt.Fprintf(&b, "floor%s\n", places(parts.Floor))
	}
	for _, w := range parts.Walls {
		writeWall(&b, w)
	}
	for _, d := range parts.Openings {
		writeDoor(&b, d)
	}
	for _, k := range parts.Blocks {
		fmt.Fprintf(&b, "block%s id=%s%s\n", places(k.Ring), k.ID, setting("h", k.Height, plan.Ceiling))
	}
	for _, o := range parts.Observers {
		fmt.Fprintf(&b, "observer %s id=%s eye=%s heading=%v view=%v%s\n", written(o.At), o.ID, metres(o.Eye), o.Heading, o.View,
			setting("range", o.Range, 0))
	}
	for _, t := range parts.Targets {
		if t.Face != nil {
			fmt.Fprintf(&b, "target %s %s id=%s\n", written(t.Face[0]), written(t.Face[1]), t.ID)
		} else {
			fmt.Fprintf(&b, "target %s id=%s\n", written(t.At), t.ID)
		}
	}
	for _, s := range parts.Starts {
		fmt.Fprintf(&b, "start %s id=%s\n", written(s.At), s.ID)
	}
	for _, r := range parts.Routes {
		fmt.Fprintf(&b, "route%s id=%s from=%s", places(r.Via), r.ID, r.From)
		if r.To != "" {
			b.WriteString(" to=" + r.To)
		}
		b.WriteByte('\n')
	}
	w := parts.Walker
	fmt.Fprintf(&b, "walker radius=%s pace=%v eye=%s\n", metres(w.Radius), w.Pace, metres(w.Eye))
	return b.String()
}

func writeWall(b *strings.Builder, w plan.Wall) {
	head := [...]string{plan.Solid: "wall", plan.Glazing: "glass", plan.Screen: "screen", plan.Low: "low"}[w.Kind]
	fmt.Fprintf(b, "%s%s id=%s%s%s", head, places(w.Line), w.ID, setting("th", w.Thickness, 0), setting("h", w.Height, plan.Ceiling))
	if w.Justify != plan.Centre {
		fmt.Fprintf(b, " just=%s", [...]string{"centre", "left", "right"}[w.Justify])
	}
	b.WriteByte('\n')
}

func writeDoor(b *strings.Builder, d plan.Opening) {
	fmt.Fprintf(b, "door %s id=%s seg=%d at=%s w=%s leaf=%s", d.Wall, d.ID, d.Segment, metres(d.At), metres(d.Width),
		[...]string{"none", "solid", "glazed"}[d.Leaf])
	if d.Shut {
		b.WriteString(" shut")
	}
	if d.HingeEnd {
		b.WriteString(" hinge=end")
	}
	if d.SideRight {
		b.WriteString(" side=right")
	}
	b.WriteByte('\n')
}

func setting(key string, v, silent int32) string {
	if v == silent {
		return ""
	}
	return " " + key + "=" + metres(v)
}

func places(c plan.Chain) string {
	var b strings.Builder
	for _, p := range c.All() {
		b.WriteString(" " + written(p))
	}
	return b.String()
}

func written(p exact.Pt) string { return metres(p.X) + "," + metres(p.Y) }

// metres writes grid units as metres without losing one.
func metres(v int32) string {
	sign := ""
	if v < 0 {
		sign, v = "-", -v
	}
	return sign + strings.TrimSuffix(strings.TrimRight(fmt.Sprintf("%s.%04d", strconv.Itoa(int(v/10000)), v%10000), "0"), ".")
}

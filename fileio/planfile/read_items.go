package planfile

import (
	"math"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// The longest length and the tallest height a file may give, in grid units: 50 km.
const longest = plan.MaxCoord

// What the words of the format stand for, in the order of the constants they are read into.
var (
	wallKinds   = []string{"wall", "glazing", "screen", "low"}
	justifies   = []string{"centre", "left", "right"}
	leaves      = []string{"none", "solid", "glazed"}
	openShut    = []string{"open", "shut"}
	hinges      = []string{"start", "end"}
	hingeSides  = []string{"left", "right"}
	zoneKinds   = []string{"area", "room"}
	seenChoices = []string{"any", "all"}
)

func readWall(o *object) plan.Wall {
	w := plan.Wall{Kind: choice[plan.WallKind](o, "kind", wallKinds...), Line: o.points("line", 2)}
	w.Thickness, _ = o.length("thickness", 0, plan.MaxThickness)
	w.Height = o.height()
	w.Justify = choice[plan.Justify](o, "justify", justifies...)
	return w
}

// height reads a height; a missing one reaches to the ceiling.
func (o *object) height() int32 {
	if h, ok := o.length("height", 1, longest); ok {
		return h
	}
	return plan.Ceiling
}

func readOpening(o *object) plan.Opening {
	d := plan.Opening{Wall: o.text("wall", "")}
	if d.Wall == "" {
		o.fail("wall", "is missing; give the id of the wall it lies in")
	}
	d.Segment = o.whole("segment", 0, math.MaxInt32, 0)
	d.At, _ = o.length("at", 0, math.MaxInt32)
	width, ok := o.length("width", 1, math.MaxInt32)
	if !ok {
		o.fail("width", "is missing; give the width in mm")
	}
	d.Width = width
	d.Leaf = choice[plan.Leaf](o, "leaf", leaves...)
	d.Shut = choice[uint8](o, "state", openShut...) == 1
	d.HingeEnd = choice[uint8](o, "hinge", hinges...) == 1
	d.SideRight = choice[uint8](o, "side", hingeSides...) == 1
	return d
}

func readBlock(o *object) plan.Block {
	b := plan.Block{}
	if value, ok := o.typed("circle", "{", "an object with at and radius"); ok {
		c := o.within("circle", value)
		b.Circle = &plan.Circle{At: c.place("at")}
		if b.Circle.Radius, ok = c.length("radius", 1, plan.MaxRound); !ok {
			c.fail("radius", "is missing; give the radius in mm")
		}
		b.Circle.Extra = c.rest()
	}
	b.Ring = o.ring("ring", b.Circle == nil)
	if b.Ring.Len() == 0 && b.Circle != nil {
		b.Ring = plan.RoundRing(b.Circle.At, b.Circle.Radius)
		for _, p := range b.Ring.All() {
			if !plan.InRange(p) {
				o.fail("circle", "reaches outside the legal range of 50 km about the origin")
			}
		}
	}
	b.Height = o.height()
	return b
}

func readZone(o *object) plan.Zone {
	return plan.Zone{Name: o.text("name", ""), Ring: o.ring("ring", true), Room: choice[uint8](o, "kind", zoneKinds...) == 1}
}

func readObserver(o *object) plan.Observer {
	v := plan.Observer{Name: o.text("name", ""), At: o.place("at"), Eye: plan.DefaultWalker().Eye, View: 360}
	if eye, ok := o.length("eye", 1, longest); ok {
		v.Eye = eye
	}
	v.Heading, _ = o.degrees("heading")
	if view, ok := o.real("view", math.SmallestNonzeroFloat64, 360, "an angle above 0 and up to 360 degrees"); ok {
		v.View = view
	}
	v.Range, _ = o.length("range", 1, math.MaxInt32)
	v.Colour = o.whole("colour", 0, plan.MaxColour, -1)
	return v
}

func (o *object) degrees(name string) (float64, bool) {
	return o.real(name, -360, 360, "an angle from -360 to 360 degrees")
}

func readTarget(o *object) plan.Target {
	t := plan.Target{Name: o.text("name", ""), At: o.place("at")}
	if face := o.points("face", 0); face.Len() == 2 {
		t.Face = &[2]exact.Pt{face.At(0), face.At(1)}
		if t.Face[0] == t.Face[1] {
			o.fail("face", "has two ends at one point; give two that differ")
		}
	} else if face.Len() != 0 {
		o.fail("face", "needs two points, has %d", face.Len())
	}
	t.Normal = pointer(o.degrees("normal"))
	t.Bottom = pointer(o.length("bottom", 0, longest))
	t.Top = pointer(o.length("top", 0, longest))
	t.MaxAngle = pointer(o.real("max_angle", 0, 90, "an angle from 0 to 90 degrees"))
	t.Near = pointer(o.length("near", 0, math.MaxInt32))
	t.Far = pointer(o.length("far", 0, math.MaxInt32))
	t.Colour = o.whole("colour", 0, plan.MaxColour, -1)
	return t
}

// pointer returns where v is kept, or nil when there is none.
func pointer[T any](v T, ok bool) *T {
	if !ok {
		return nil
	}
	return &v
}

func readStart(o *object) plan.Start {
	return plan.Start{Name: o.text("name", ""), At: o.place("at"), Facing: pointer(o.degrees("facing"))}
}

func readRoute(o *object) plan.Route {
	return plan.Route{From: o.text("from", ""), Via: o.points("via", 0), To: o.text("to", "")}
}

func readWalker(o *object) plan.Walker {
	w := plan.DefaultWalker()
	w.Radius, _ = o.length("radius", 0, plan.MaxBodyRadius)
	if pace, ok := o.real("pace", math.SmallestNonzeroFloat64, plan.MaxPace, "a pace above 0 and up to 100 metres per second"); ok {
		w.Pace = pace
	}
	if eye, ok := o.length("eye", 1, longest); ok {
		w.Eye = eye
	}
	if value, ok := o.take("seen"); ok && value[0] != '"' {
		const want = "any, all, or a share above 0 and up to 1"
		w.Seen = plan.SeenShare
		if w.Share, ok = o.real("seen", math.SmallestNonzeroFloat64, 1, want); !ok {
			o.fail("seen", "is %s, must be %s", kindOf(value), want)
		}
	} else {
		w.Seen = choice[plan.SeenKind](o, "seen", seenChoices...)
	}
	w.Meta = o.meta()
	return w
}

func readUnderlay(o *object) *plan.Underlay {
	u := &plan.Underlay{Image: o.text("image", ""), At: o.place("at"), MMPerPixel: 1, Opacity: 1}
	if v, ok := o.real("mm_per_pixel", math.SmallestNonzeroFloat64, 1e6, "above 0 and up to 1000000"); ok {
		u.MMPerPixel = v
	}
	if v, ok := o.real("opacity", 0, 1, "from 0 to 1"); ok {
		u.Opacity = v
	}
	u.Turn, _ = o.degrees("turn")
	u.Meta = o.meta()
	return u
}

package gui

import (
	"fmt"

	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// wallKinds are the kinds of wall in words, in the order of plan.WallKind.
var wallKinds = []string{"wall", "glazing", "screen", "low wall"}

// describeWall is the form of a wall of any kind.
func (w *window) describeWall(c *card, x plan.Wall) {
	c.title = [...]string{"Wall", "Glazing", "Screen", "Low wall"}[x.Kind]
	c.icon = [...]string{"wall", "glazing", "screen", "low"}[x.Kind]
	c.where = fmt.Sprintf("%s, %s long", counted(max(x.Line.Len()-1, 0), "piece"), w.host.FormatLength(lengthOf(x.Line)))
	put := func(label string, change func(*plan.Wall)) error {
		change(&x)
		return w.doEdit(tool.Named(label, set(x)))
	}
	c.fields = []field{{label: "Kind", choices: wallKinds, chosen: int(x.Kind), pick: func(i int) error {
		return put("change kind of wall", func(x *plan.Wall) { w.setKind(x, plan.WallKind(i)) })
	}}}
	c.fields = append(c.fields, w.straightFields(x)...)
	if x.Kind == plan.Solid || x.Kind == plan.Low {
		c.fields = append(c.fields, w.lengthField("Thickness", x.Thickness, func(v int32) error {
			return w.within(v, 0, plan.MaxThickness, func() error { return put("change thickness", func(x *plan.Wall) { x.Thickness = v }) })
		}))
	}
	switch x.Kind {
	case plan.Solid:
		c.fields = append(c.fields, w.heightField(x.Height, func(v int32) error {
			return put("change height", func(x *plan.Wall) { x.Height = v })
		}))
	case plan.Low:
		c.fields = append(c.fields, w.lengthField("Height", x.Height, func(v int32) error {
			return w.within(v, 1, plan.Ceiling-1, func() error { return put("change height", func(x *plan.Wall) { x.Height = v }) })
		}))
	}
	c.fields = append(c.fields, field{label: "Body", choices: []string{"centred on its line", "left of its line", "right of its line"},
		chosen: int(x.Justify), pick: func(i int) error {
			return put("move body of wall", func(x *plan.Wall) { x.Justify = plan.Justify(i) })
		}})
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindWall, ID: x.ID})
}

// setKind makes a wall another kind, with the measures that kind needs.
func (w *window) setKind(x *plan.Wall, k plan.WallKind) {
	x.Kind = k
	switch {
	case k == plan.Low && x.Height == plan.Ceiling:
		x.Height = w.measures.LowHeight
	case k != plan.Low:
		x.Height = plan.Ceiling
	}
}

// describeOpening is the form of a door or a gap.
func (w *window) describeOpening(c *card, x plan.Opening) {
	c.title, c.icon = "Opening", "door"
	put := func(label string, change func(*plan.Opening)) error {
		y := x
		change(&y)
		return w.doEdit(tool.Named(label, set(y)))
	}
	c.where = "in wall " + x.Wall
	state := 0
	if x.Shut {
		state = 1
	}
	c.fields = []field{
		w.lengthField("Width", x.Width, func(v int32) error {
			if v <= 0 {
				return errPositive
			}
			return put("change width", func(x *plan.Opening) { x.Width = v })
		}),
		w.lengthField("From the end", x.At, func(v int32) error { return put("move opening", func(x *plan.Opening) { x.At = v }) }),
		{label: "Leaf", choices: []string{"none, a plain gap", "solid leaf", "glazed leaf"}, chosen: int(x.Leaf),
			pick: func(i int) error { return put("change leaf", func(x *plan.Opening) { x.Leaf = plan.Leaf(i) }) }},
	}
	if x.Leaf != plan.NoLeaf {
		c.fields = append(c.fields,
			field{label: "State", choices: []string{"open", "shut"}, chosen: state,
				pick: func(i int) error {
					return put([]string{"open door", "shut door"}[i], func(x *plan.Opening) { x.Shut = i == 1 })
				}},
			field{label: "Hinges", choices: []string{"near end, opens left", "near end, opens right", "far end, opens left", "far end, opens right"},
				chosen: hinge(x), pick: func(i int) error {
					return put("hang door", func(x *plan.Opening) { x.HingeEnd, x.SideRight = i >= 2, i%2 == 1 })
				}})
	}
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindOpening, ID: x.ID})
}

func hinge(x plan.Opening) (i int) {
	if x.HingeEnd {
		i += 2
	}
	if x.SideRight {
		i++
	}
	return i
}

// describeBlock is the form of a column, a plinth or another body.
func (w *window) describeBlock(c *card, x plan.Block) {
	c.title, c.icon = "Block", "box"
	c.where = areaWords(w.unit(), ringArea(x.Ring), 2) + " of floor"
	if x.Circle != nil {
		c.title, c.icon = "Column", "block"
		c.fields = append(c.fields, w.lengthField("Radius", x.Circle.Radius, func(v int32) error {
			return w.within(v, 1, plan.MaxRound, func() error {
				x.Circle = &plan.Circle{At: x.Circle.At, Radius: v}
				x.Ring = plan.RoundRing(x.Circle.At, v)
				return w.doEdit(tool.Named("change radius", set(x)))
			})
		}))
	}
	c.fields = append(c.fields, w.sideFields(x.Ring, func(ring plan.Chain) error {
		x.Ring = ring
		return w.doEdit(tool.Named("change size of block", set(x)))
	})...)
	c.fields = append(c.fields, w.heightField(x.Height, func(v int32) error {
		x.Height = v
		return w.doEdit(tool.Named("change height", set(x)))
	}))
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindBlock, ID: x.ID})
}

// describeZone is the form of a named area.
func (w *window) describeZone(c *card, x plan.Zone) {
	c.title, c.icon, c.where = "Zone", "zone", areaWords(w.unit(), ringArea(x.Ring), 1)
	room := 1
	if x.Room {
		room = 0
	}
	c.fields = []field{
		textField("Name", x.Name, func(t string) error { x.Name = t; return w.doEdit(tool.Named("rename zone", set(x))) }),
		{label: "Kind", choices: []string{"room", "area"}, chosen: room, pick: func(i int) error {
			x.Room = i == 0
			return w.doEdit(tool.Named("change kind of zone", set(x)))
		}},
	}
	c.fields = append(c.fields, w.sideFields(x.Ring, func(ring plan.Chain) error {
		x.Ring = ring
		return w.doEdit(tool.Named("change size of zone", set(x)))
	})...)
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindZone, ID: x.ID})
	c.reach = w.reachRows(x.ID)
}

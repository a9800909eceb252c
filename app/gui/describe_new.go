package gui

import (
	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// describeNothing is the form with nothing selected: the plan and who walks in it, and the measures of new items, which come
// first while a tool that draws them is in hand.
func (w *window) describeNothing(p *plan.Plan) card {
	c := card{key: "nothing " + w.unit(), title: "nothing selected", hint: []string{"Click an item to see and change its measures."}}
	if w.drawsBodies() {
		c.key += " drawing"
		c.fields = append(w.describeNew(), w.describePlan(p)...)
		return c
	}
	c.fields = append(w.describePlan(p), w.describeNew()...)
	return c
}

// drawsBodies reports whether the tool in hand draws what the form has measures of: walls, blocks or doors.
func (w *window) drawsBodies() bool {
	switch t := w.tool.(type) {
	case *tool.Chain:
		return t.Ring != plan.KindFloor && t.Ring != plan.KindZone
	case *tool.Rect:
		return t.Kind != plan.KindFloor && t.Kind != plan.KindZone
	case *tool.Door, *tool.Round:
		return true
	}
	return false
}

// describeNew is what the form offers of the measures of new items.
func (w *window) describeNew() []field {
	d := &w.measures
	height := ""
	if d.Height != plan.Ceiling {
		height = formatLength(d.Height, w.unit())
	}
	return []field{
		headed("New walls", w.lengthField("Thickness", d.Thickness, func(v int32) error {
			return w.within(v, 0, plan.MaxThickness, func() error { d.Thickness = v; return nil })
		})),
		{label: "Height", unit: unitMark(w.unit()), text: height, empty: "ceiling", set: func(text string) error {
			v, err := w.height(text)
			if err == nil {
				d.Height = v
			}
			return err
		}},
		w.newBody(),
		w.lengthField("Low walls", d.LowHeight, func(v int32) error {
			return w.within(v, 1, plan.Ceiling-1, func() error { d.LowHeight = v; return nil })
		}),
		w.lengthField("Door width", d.DoorWidth, func(v int32) error {
			return w.within(v, 1, plan.MaxThickness, func() error { d.DoorWidth = v; return nil })
		}),
	}
}

// units are the display units and what the form calls them.
var units = []struct{ unit, name string }{{"m", "metres"}, {"cm", "centimetres"}, {"mm", "millimetres"}, {"ft", "feet and inches"}}

// describePlan is what the form offers of the plan itself: its title, place and unit, and the person who walks.
func (w *window) describePlan(p *plan.Plan) []field {
	sheet := p.Sheet()
	putSheet := func(label string, change func(*plan.Sheet)) error {
		change(&sheet)
		return w.doEdit(tool.Named(label, plan.SetSheet{Sheet: sheet}))
	}
	unit := field{label: "Unit", pick: func(i int) error {
		return putSheet("change unit", func(s *plan.Sheet) { s.Unit = units[i].unit })
	}}
	for i, u := range units {
		unit.choices = append(unit.choices, u.name)
		if u.unit == unitOf(sheet.Unit) {
			unit.chosen = i
		}
	}
	return append([]field{
		headed("Plan", textField("Title", sheet.Title, func(t string) error {
			return putSheet("change title", func(s *plan.Sheet) { s.Title = t })
		})),
		textField("Place", sheet.Place, func(t string) error { return putSheet("change place", func(s *plan.Sheet) { s.Place = t }) }),
		unit,
	}, w.describeWalker(p)...)
}

// newBody chooses where the body of new walls lies, or that they have none; J and H do the same while a wall is drawn.
func (w *window) newBody() field {
	d := &w.measures
	f := field{label: "Body", choices: []string{"centred on the line", "left of the line", "right of the line", "none, a thin line"},
		chosen: int(d.Justify), pick: func(i int) error {
			d.Thin = i == 3
			if !d.Thin {
				d.Justify = plan.Justify(i)
			}
			w.acted()
			return nil
		}}
	if d.Thin {
		f.chosen = 3
	}
	return f
}

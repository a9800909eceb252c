package gui

import (
	"errors"
	"fmt"
	"path/filepath"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// describeUnderlay is the form of the picture to trace over.
func (w *window) describeUnderlay(c *card, u plan.Underlay) {
	c.title, c.icon, c.where = "Underlay", "open", filepath.Base(u.Image)
	c.key += fmt.Sprint(u.Locked, u.Hidden)
	c.fault = w.under.fault
	c.delete = !u.Locked
	put := func(label string, change func(*plan.Underlay)) error {
		now := u
		change(&now)
		return w.doEdit(tool.Named(label, plan.SetUnderlay{Underlay: now}))
	}
	c.fields = []field{{label: "Opacity", unit: "%", text: trimDecimals(100*u.Opacity, 0, 1), set: func(text string) error {
		v, err := parseNumber(text)
		if err == nil && (v < 0 || v > 100) {
			err = errors.New("from 0 to 100 %, please")
		}
		if err != nil {
			return err
		}
		return put("change underlay's opacity", func(u *plan.Underlay) { u.Opacity = v / 100 })
	}}}
	if !u.Locked {
		c.fields = append(c.fields, w.underlayWidth(u, put)...)
		c.fields = append(c.fields, angleField("Turn", u.Turn, -360, 360, func(v float64) error {
			return put("turn underlay", func(u *plan.Underlay) { u.Turn = v })
		}))
	}
	c.actions = w.underlayActions(u)
}

// underlayWidth is the field for how wide the picture is, when it is there to be measured.
func (w *window) underlayWidth(u plan.Underlay, put func(string, func(*plan.Underlay)) error) []field {
	px, _ := w.photoSize()
	if px == 0 {
		return nil
	}
	width := u.MMPerPixel * float64(px) * exact.PerMM
	if width >= exact.Limit {
		return nil
	}
	f := w.lengthField("Width", int32(width+0.5), func(v int32) error {
		return w.within(v, 1, exact.Limit-1, func() error {
			return put("set underlay's scale", func(u *plan.Underlay) { u.MMPerPixel = float64(v) / exact.PerMM / float64(px) })
		})
	})
	f.under = fmt.Sprintf("a pixel is %s mm wide", trimDecimals(u.MMPerPixel, 0, 3))
	return []field{f}
}

// underlayActions are the form's buttons.
func (w *window) underlayActions(u plan.Underlay) []choice {
	mark := func(m plan.Mark) func() {
		m.Items = []plan.Ref{theUnderlay}
		return func() { _ = w.doEdit(m) } // it is there
	}
	yes, no := true, false
	lock, show := choice{"Lock", mark(plan.Mark{Locked: &yes})}, choice{"Hide", mark(plan.Mark{Hidden: &yes})}
	if u.Hidden {
		show = choice{"Show", mark(plan.Mark{Hidden: &no})}
	}
	if u.Locked {
		return []choice{{"Unlock", mark(plan.Mark{Locked: &no})}, show}
	}
	return []choice{
		{"Set the scale…", func() { w.takeUnderlay(tool.ScaleUnderlay) }},
		{"Straighten…", func() { w.takeUnderlay(tool.StraightenUnderlay) }},
		lock, show, {"Another picture…", w.askUnderlay},
	}
}

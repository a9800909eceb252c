package gui

import (
	"slices"
	"strconv"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/solver/plan"
)

// form shows what is selected and lets its measures be changed.
type form struct {
	w      *window
	box    *fyne.Container
	page   *fyne.Container
	scroll *container.Scroll
	title  *inkText
	key    string
	where  *inkText
	letter *inkText
	icon   *icon
	rows   []*formRow
	facts  []*factText
	reach  *reachTable
	legs   *legTable
	fault  *inkText

	offered []choice // the buttons
}

// formRow is one field of the form on the window.
type formRow struct {
	field field
	entry *entry
	pick  *picker
	dots  *swatches
	note  *inkText
	under *inkText // nil where the field has none
	wrong *inkText // why what was typed was not taken; not there while all is well
}

// factText is one figure under the form.
type factText struct{ value, label *inkText }

// Measures of the form, in px at 100 %.
const (
	formSide   = 18
	labelWidth = 104
	entryWidth = 92
	rowHeight  = 34 // from one line to the next
)

func newForm(w *window) *form {
	f := &form{w: w, title: caption("").right(), page: pile()}
	head := around(nil, nil, heading("Selection"), nil, f.title)
	f.scroll = container.NewVScroll(inset(formSide, 0, formSide, 12, f.page))
	page := container.NewStack(container.NewThemeOverride(f.scroll, tightLook{w}), newWheel(f.scroll))
	f.box = around(inset(formSide, 14, formSide, 8, head), nil, nil, nil, page)
	return f
}

// update shows the selection: a new form for another item, new texts in the same form for the same one.
func (f *form) update(p *plan.Plan, sel []plan.Ref) {
	c := f.w.describe(p, sel)
	if c.key != f.key || len(c.facts) != len(f.facts) || !f.reach.fits(c.reach) || !f.legs.fits(c.legs) || !f.fits(c.fields) || !f.offers(c.actions) {
		f.build(c)
	}
	f.put(c)
}

// fits reports whether the form has the rows for some fields.
func (f *form) fits(fields []field) bool {
	if len(fields) != len(f.rows) {
		return false
	}
	for i, d := range fields {
		if (d.under != "") != (f.rows[i].under != nil) || d.label != f.rows[i].field.label {
			return false
		}
	}
	return true
}

// offers reports whether the form has the buttons for some actions.
func (f *form) offers(actions []choice) bool {
	return slices.EqualFunc(f.offered, actions, func(a, b choice) bool { return a.text == b.text })
}

// build makes the form's widgets.
func (f *form) build(c card) {
	other := c.key != f.key
	f.key, f.rows, f.facts = c.key, nil, nil
	f.page.Objects = nil
	f.title.set(c.title)
	f.head(c)
	f.figures(c.facts)
	f.fault = newText("", assets.Regular, 12, roleRed).shrinking()
	if f.legs = newLegTable(c.legs, f.w.tips, f.reveal); f.legs != nil { // what is wrong belongs to a leg
		f.page.Add(f.legs.box)
		f.page.Add(f.fault)
	}
	for i, h := range c.hint {
		line := caption(h)
		if i == 0 || strings.HasSuffix(c.hint[i-1], ",") { // a list that goes on
			line = body(h)
		}
		f.page.Add(line)
	}
	for _, d := range c.fields {
		if d.group != "" {
			f.page.Add(inset(0, 12, 0, 2, newText(d.group, assets.Semibold, 12.5, roleInk)))
		}
		f.page.Add(f.row(d))
		if d.under != "" {
			r := f.rows[len(f.rows)-1]
			r.under = newText(d.under, assets.Regular, 11, roleInk3).shrinking()
			f.page.Add(inset(labelWidth, 0, 0, 4, r.under))
		}
	}
	if f.legs == nil {
		f.page.Add(f.fault)
	}
	if f.reach = newReachTable(c.reach); f.reach != nil {
		f.page.Add(f.reach.box)
	}
	f.actions(c.actions)
	if c.delete {
		f.page.Add(inset(0, 10, 0, 0, container.NewHBox(f.button("Delete", func() { f.w.typedKey(fyne.KeyDelete) }))))
	}
	f.page.Refresh()
	if other {
		f.scroll.ScrollToTop()
	}
}

// actions adds buttons, two in a row.
func (f *form) actions(list []choice) {
	f.offered = list
	for i := 0; i < len(list); i += 2 {
		row := container.NewHBox()
		for _, a := range list[i:min(i+2, len(list))] {
			row.Add(inset(0, 0, 4, 0, f.button(a.text, a.do)))
		}
		f.page.Add(inset(0, 8, 0, 0, row))
	}
}

// button makes a button of the form.
func (f *form) button(text string, do func()) *pushButton {
	b := newPushButton(text, do)
	b.gained = func() { f.reveal(b) }
	return b
}

// head is the item's sign, letter and place.
func (f *form) head(c card) {
	f.icon, f.letter, f.where = nil, nil, nil
	if c.icon == "" {
		return
	}
	f.icon = newIcon(c.icon, 20, colourRole(c.colour))
	f.letter = newText(c.letter, assets.Bold, 14, colourRole(c.colour))
	f.where = caption(c.where).shrinking()
	row := around(nil, nil, container.NewHBox(f.icon, f.letter), nil, inset(4, 0, 0, 0, f.where))
	f.page.Add(inset(0, 0, 0, 6, row))
}

// colourRole is an observer's colour, or ink for -1.
func colourRole(i int) role {
	if i < 0 {
		return roleInk
	}
	return func(t *paint.Theme) colour { return t.ObserverColour(i) }
}

// row makes one field.
func (f *form) row(d field) fyne.CanvasObject {
	r := &formRow{field: d, note: newText(d.note, assets.Regular, 11, roleInk3).shrinking()}
	f.rows = append(f.rows, r)
	var value fyne.CanvasObject
	width := float32(entryWidth)
	switch {
	case d.colour:
		r.dots = newSwatches(func(i int) { f.tell(r, r.field.pick(i)) })
		r.dots.gained = func() { f.reveal(r.dots) }
		value, width = r.dots, 0
	case d.choices != nil:
		r.pick = newPicker(d.choices, func(i int) { f.tell(r, r.field.pick(i)) })
		r.pick.gained = func() { f.reveal(r.pick) }
		value, width = r.pick, 0
	default:
		r.entry = newEntry(func(text string) error { return r.field.set(text) })
		r.entry.fault = func(err error) { f.tell(r, err) }
		r.entry.beyond = f.w.shortcut
		r.entry.gained = func() { f.reveal(r.entry) }
		r.entry.leave = func() { f.w.win.Canvas().Focus(f.w.view) }
		r.entry.SetPlaceHolder(d.empty)
		value = r.entry
		if d.wide {
			width = 0
		}
	}
	unit := newText(d.unit, assets.Regular, 12.5, roleInk2)
	r.wrong = newText("", assets.Regular, 11.5, roleRed).shrinking()
	r.wrong.Hide()
	return pile(container.New(fieldLayout{width}, body(d.label), value, unit, r.note), container.New(wrongLayout{}, r.wrong))
}

// tell shows why a field's text was not taken, below it.
func (f *form) tell(r *formRow, err error) {
	text := ""
	if err != nil {
		text = err.Error()
	}
	if r.wrong.text == text {
		return
	}
	r.wrong.set(text)
	r.wrong.Hidden = text == ""
	f.page.Refresh()
	f.scroll.Refresh()
}

// figures are the facts in a row of up to three, set large.
func (f *form) figures(facts []fact) {
	if len(facts) == 0 {
		return
	}
	var cells []fyne.CanvasObject
	for range facts {
		t := &factText{newText("", assets.Semibold, 17, roleInk), newText("", assets.Regular, 12, roleInk2)}
		f.facts = append(f.facts, t)
		cells = append(cells, pile(t.value, t.label))
	}
	f.page.Add(container.NewGridWithColumns(len(cells), cells...))
	f.page.Add(inset(0, 8, 0, 8, hairline()))
}

// put shows the card's texts in the form.
func (f *form) put(c card) {
	f.title.set(c.title)
	if f.where != nil {
		f.where.set(c.where)
		f.letter.role = colourRole(c.colour)
		f.letter.set(c.letter)
		f.icon.set(c.icon, colourRole(c.colour))
	}
	for i, r := range f.rows {
		r.field = c.fields[i]
		if r.under != nil {
			r.under.set(r.field.under)
		}
		switch {
		case r.entry != nil:
			if r.entry.PlaceHolder != r.field.empty {
				r.entry.SetPlaceHolder(r.field.empty)
			}
			r.entry.put(r.field.text)
		case r.pick != nil:
			r.pick.put(r.field.chosen)
		case r.dots != nil:
			r.dots.put(r.field.chosen)
		}
	}
	for i, t := range f.facts {
		t.value.set(c.facts[i].value)
		t.label.set(c.facts[i].label)
	}
	f.reach.put(c.reach)
	f.legs.put(c.legs)
	f.fault.set(sentence(c.fault))
	f.fault.Hidden = c.fault == ""
}

// fieldLayout is a form's line: label, value, unit and note.
type fieldLayout struct{ width float32 }

// MinSize is for the toolkit.
func (fieldLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(240, rowHeight) }

// Layout is for the toolkit.
func (l fieldLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	label, value, unit, note := o[0], o[1], o[2], o[3]
	label.Move(fyne.NewPos(0, 3))
	label.Resize(fyne.NewSize(labelWidth, 27))
	width := l.width
	if width == 0 {
		width = s.Width - labelWidth
	}
	value.Move(fyne.NewPos(labelWidth, 3))
	value.Resize(fyne.NewSize(width, 27))
	x := labelWidth + width + 8
	u := unit.MinSize()
	unit.Move(fyne.NewPos(x, 3))
	unit.Resize(fyne.NewSize(u.Width, 27))
	if u.Width > 0 {
		x += u.Width + 8
	}
	note.Move(fyne.NewPos(x, 3))
	note.Resize(fyne.NewSize(max(0, s.Width-x), 27))
}

// wrongLayout sets what is wrong with a field below it, from where the field begins if there is room for it.
type wrongLayout struct{}

// MinSize is for the toolkit.
func (wrongLayout) MinSize(o []fyne.CanvasObject) fyne.Size {
	if !o[0].Visible() {
		return fyne.Size{}
	}
	return o[0].MinSize().AddWidthHeight(0, 5)
}

// Layout is for the toolkit.
func (wrongLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	t := o[0].(*inkText)
	width := textSize(t.text, t.weight, t.size).Width + 1
	x := max(0, min(labelWidth, s.Width-width))
	t.Move(fyne.NewPos(x, 0))
	t.Resize(fyne.NewSize(s.Width-x, t.MinSize().Height))
}

// number writes a count or a figure for a fact.
func number(v float64, decimals int) string { return strconv.FormatFloat(v, 'f', decimals, 64) }

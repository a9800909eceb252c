package gui

import (
	"errors"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/layout"

	"enfilade/assets"
	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// editPanel is a small form in a corner of the picture for an edit with measures. While it is open the edit is previewed, and a
// click in the picture may set one of its measures; Enter does it, Escape and every other tool leave it.
type editPanel struct {
	w     *window
	title string
	rows  []*panelRow
	fault *inkText
	box   *fyne.Container
	edit  func() (plan.Edit, error)              // what the measures come to
	added func(plan.Edit, *plan.Plan) []plan.Ref // what the edit adds, to be selected; nil for nothing
	held  func(plan.Edit) []plan.Ref             // what the preview changes
	click func(h tool.Host, e tool.Pointer)      // nil when clicks mean nothing
	hint  string
	marks func() []exact.Pt // the points or the line that the edit goes by
	snap  *pick.Snap
	live  plan.Edit // as previewed
	done  bool
}

// panelRow is one measure of a panel: a text to type or a choice.
type panelRow struct {
	label, unit string
	text        string
	choices     []string
	chosen      int
	entry       *panelEntry
	pick        *picker
}

// open shows the panel and takes its tool in hand.
func (w *window) openPanel(p *editPanel) {
	w.choose(0)
	p.w = w
	p.build()
	w.panelLayer.Objects = []fyne.CanvasObject{p.box}
	w.panelLayer.Show()
	w.panelLayer.Refresh()
	w.panel = p
	w.takeUp(p)
	p.show()
	p.focus()
}

// build makes the panel's widgets.
func (p *editPanel) build() {
	page := pile(inset(0, 0, 0, 8, newText(p.title, assets.Bold, 14, roleInk)))
	for _, r := range p.rows {
		width := float32(entryWidth)
		var value fyne.CanvasObject
		if r.choices != nil {
			r.pick = newPicker(r.choices, func(i int) {
				r.chosen = i
				r.pick.put(i)
				p.show()
			})
			r.pick.put(r.chosen)
			value, width = r.pick, 0
		} else {
			r.entry = newPanelEntry(p.key)
			r.entry.SetText(r.text)
			r.entry.OnChanged = func(string) { p.show() }
			value = r.entry
		}
		page.Add(container.New(fieldLayout{width}, body(r.label), value, newText(r.unit, assets.Regular, 12.5, roleInk2), caption("")))
	}
	p.fault = newText("", assets.Regular, 12, roleRed).shrinking()
	page.Add(inset(0, 2, 0, 0, p.fault))
	buttons := container.NewHBox(layout.NewSpacer(), newPushButton("Cancel", func() { p.w.choose(0) }), inset(8, 0, 0, 0, newPushButton(p.title, p.apply).first()))
	page.Add(inset(0, 8, 0, 0, buttons))
	frame := container.NewStack(newPaper(roleRule), inset(1, 1, 1, 1, on(rolePanel, inset(16, 14, 16, 14, page))))
	p.box = container.New(cornered{p.w.panelAtLeft(frame.MinSize().Height)}, frame)
}

// focus puts the cursor into the first entry.
func (p *editPanel) focus() {
	for _, r := range p.rows {
		if r.entry != nil {
			p.w.win.Canvas().Focus(r.entry)
			r.entry.TypedShortcut(&fyne.ShortcutSelectAll{})
			return
		}
	}
}

// key takes Enter and Escape while an entry has the focus.
func (p *editPanel) key(name fyne.KeyName) bool {
	switch name {
	case fyne.KeyReturn, fyne.KeyEnter:
		p.apply()
	case fyne.KeyEscape:
		p.w.choose(0)
	default:
		return false
	}
	return true
}

// show previews the edit, and says why it cannot be done.
func (p *editPanel) show() {
	if p.w.panel != p {
		return
	}
	e, err := p.edit()
	if err == nil {
		err = p.w.session.Preview(e)
	}
	p.live = e
	text := ""
	if err != nil {
		p.live = nil
		p.w.session.Cancel()
		text = sentence(cause(err))
	}
	p.fault.set(text)
	p.w.acted()
}

// apply does the edit and closes the panel.
func (p *editPanel) apply() {
	e, err := p.edit()
	if err != nil {
		p.fault.set(sentence(cause(err)))
		return
	}
	var added []plan.Ref
	if p.added != nil {
		added = p.added(e, p.w.session.Committed())
	}
	if err := p.w.session.Do(e); err != nil {
		p.fault.set(sentence(cause(err)))
		return
	}
	if added != nil {
		p.w.session.Select(added...)
	}
	p.done = true
	p.w.acted()
}

// Done reports whether the edit has been done.
func (p *editPanel) Done() bool { return p.done }

// Down lets a click set a measure.
func (p *editPanel) Down(h tool.Host, e tool.Pointer) {
	if p.click != nil {
		p.click(h, e)
		p.show()
		p.focus()
	}
}

// Move shows where a click would be.
func (p *editPanel) Move(h tool.Host, e tool.Pointer) {
	if p.click != nil {
		s := h.Snapper().At(h.Plan(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
		p.snap = &s
	}
}

// Up does nothing.
func (p *editPanel) Up(tool.Host, tool.Pointer) {}

// Key does the edit on Enter.
func (p *editPanel) Key(_ tool.Host, k tool.Key) bool {
	if k.Name == tool.KeyEnter {
		p.apply()
		return true
	}
	return false
}

// Stop closes the panel.
func (p *editPanel) Stop(h tool.Host) {
	h.Cancel()
	if p.w.panel == p {
		p.w.panel = nil
		p.w.panelLayer.Objects = nil
		p.w.panelLayer.Hide()
	}
}

// Leave hides the mark of the pointer.
func (p *editPanel) Leave(tool.Host) { p.snap = nil }

// Sketch shows what the edit goes by.
func (p *editPanel) Sketch(tool.Host) tool.Sketch {
	s := tool.Sketch{Snap: p.snap}
	if p.click != nil {
		s.Grip = tool.GripCross
	}
	if p.live != nil {
		s.Dragged = p.held(p.live)
	}
	if p.marks != nil {
		pts := p.marks()
		s.Handles = pts
		if len(pts) > 1 {
			s.Band = pts
			s.Handles = nil
		}
	}
	return s
}

// Hint says what the next click does.
func (p *editPanel) Hint(tool.Host) string { return p.hint }

// length reads a row's length.
func (p *editPanel) length(i int) (int32, error) {
	return parseLength(p.rows[i].entry.Text, p.w.unit())
}

// count reads a row's count, from 1 to most.
func (p *editPanel) count(i, most int) (int, error) {
	v, err := parseNumber(p.rows[i].entry.Text)
	if err != nil || v != float64(int(v)) || v < 1 {
		return 0, errors.New("a whole number from 1, please")
	}
	if v > float64(most) {
		return 0, errors.New("that is more than one edit can make")
	}
	return int(v), nil
}

// panelEntry is an entry of a panel: what is typed is previewed at once, Enter and Escape are the panel's.
type panelEntry struct {
	textEntry
	key func(fyne.KeyName) bool
}

func newPanelEntry(key func(fyne.KeyName) bool) *panelEntry {
	e := &panelEntry{key: key}
	e.oneLine()
	e.ExtendBaseWidget(e)
	return e
}

// TypedKey is for the toolkit.
func (e *panelEntry) TypedKey(k *fyne.KeyEvent) {
	if !e.key(k.Name) {
		e.Entry.TypedKey(k)
	}
}

var _ undoable = (*panelEntry)(nil)

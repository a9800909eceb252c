package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/layout"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// modal is a question or a page over the window. Escape is its last button, Enter its first.
type modal struct {
	pop     *widget.PopUp
	buttons []choice
	closed  func()
}

// choice is one way out of a modal.
type choice struct {
	text string
	do   func() // may be nil
}

// ask shows a modal over the window, with the first choice as the one Enter means, at the right.
func (w *window) ask(title string, content fyne.CanvasObject, width float32, choices ...choice) *modal {
	w.bar.drop.FocusLost()
	m := &modal{buttons: choices}
	row := container.NewHBox(layout.NewSpacer())
	for i := len(choices) - 1; i >= 0; i-- {
		b := newPushButton(choices[i].text, func() { m.choose(i) })
		if i == 0 {
			b.first()
		}
		row.Add(inset(8, 0, 0, 0, b))
	}
	head := newText(title, assets.Bold, 15, roleInk)
	page := around(inset(0, 0, 0, 12, head), inset(0, 16, 0, 0, row), nil, nil, content)
	m.pop = widget.NewModalPopUp(on(rolePanel, inset(22, 20, 22, 18, page)), w.win.Canvas())
	m.closed = func() {
		w.modal = nil
		w.view.grab()
	}
	w.modal = m
	m.pop.Resize(fyne.NewSize(width, m.pop.MinSize().Height))
	m.pop.Show()
	return m
}

// choose closes the modal and does the choice.
func (m *modal) choose(i int) {
	if !m.leave() {
		return
	}
	if do := m.buttons[i].do; do != nil {
		do()
	}
}

// leave closes the modal without a choice. It reports false when it was closed already.
func (m *modal) leave() bool {
	if m.closed == nil {
		return false
	}
	closed := m.closed
	m.closed = nil
	m.pop.Hide()
	closed()
	return true
}

// key takes Enter and Escape.
func (m *modal) key(k fyne.KeyName) {
	switch k {
	case fyne.KeyEscape:
		m.choose(len(m.buttons) - 1)
	case fyne.KeyReturn, fyne.KeyEnter:
		m.choose(0)
	}
}

// lines is a paragraph of text lines.
func lines(text ...string) fyne.CanvasObject {
	box := pile()
	for _, t := range text {
		box.Add(body(t))
	}
	return box
}

package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/layout"
)

// notice is the strip under the menu bar that says what went wrong, in one sentence, with ways on. It never hides the
// drawing.
type notice struct {
	box  *fyne.Container
	mark *icon
	text *inkText
	way  *fyne.Container
	page *fyne.Container // laid out anew when the strip comes and goes; the toolkit does not see to that
}

func newNotice() *notice {
	n := &notice{mark: newIcon("fail", 16, roleRed), text: body("").shrinking(), way: container.NewHBox()}
	row := container.New(layout.NewBorderLayout(nil, nil, n.mark, n.way), n.mark, n.way, inset(8, 0, 8, 0, n.text))
	n.box = container.NewStack(newPaper(roleField), around(nil, hairline(), nil, nil, inset(18, 5, 18, 5, row)))
	n.box.Hide()
	return n
}

// show says the sentence; act is the first way on, and Close the second one.
func (n *notice) show(sentence, action string, act func()) {
	n.offer(sentence, choice{action, act}, choice{"Close", nil})
}

// offer says the sentence and gives ways on, the first of them in ink. Each puts the strip away.
func (n *notice) offer(sentence string, ways ...choice) {
	n.text.set(sentence)
	n.way.Objects = nil
	for i, c := range ways {
		b := newPushButton(c.text, func() {
			n.hide()
			if c.do != nil {
				c.do()
			}
		})
		if i == 0 {
			b.first()
		}
		n.way.Objects = append(n.way.Objects, b)
	}
	n.way.Refresh()
	n.box.Refresh()
	n.put(true)
}

func (n *notice) hide() { n.put(false) }

// put shows the strip, or puts it away.
func (n *notice) put(show bool) {
	if n.box.Visible() == show {
		return
	}
	n.box.Hidden = !show
	if n.page != nil {
		n.page.Refresh()
	}
}

package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
)

// frame lays out rail, rule, picture, foot and right column.
type frame struct {
	asked sideAsked
}

// sideAsked says what was asked of the right column.
type sideAsked uint8

const (
	sideFolds  sideAsked = iota // nothing: it folds away in a narrow window
	sideShown                   // it is there in any window
	sideHidden                  // it is gone in any window
)

const (
	sideWidth  = 320
	footHeight = 32
	narrow     = 1100 // below this width the right column folds away until it is asked for
)

// MinSize is for the toolkit.
func (*frame) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(480, 320) }

// Layout is for the toolkit. A column that is not shown is hidden, so that Tab does not lead to it.
func (f *frame) Layout(o []fyne.CanvasObject, s fyne.Size) {
	rail, rule, picture, foot, side := o[0], o[1], o[2], o[3], o[4]
	right := s.Width
	if f.asked == sideShown || f.asked == sideFolds && s.Width >= narrow {
		right -= sideWidth
		side.Move(fyne.NewPos(right, 0))
		side.Resize(fyne.NewSize(sideWidth, s.Height))
		side.Show()
	} else {
		side.Hide()
	}
	rail.Resize(fyne.NewSize(railWidth, s.Height))
	rule.Move(fyne.NewPos(railWidth, 0))
	rule.Resize(fyne.NewSize(1, s.Height))
	left := float32(railWidth + 1)
	picture.Move(fyne.NewPos(left, 0))
	picture.Resize(fyne.NewSize(right-left, s.Height-footHeight))
	foot.Move(fyne.NewPos(left, s.Height-footHeight))
	foot.Resize(fyne.NewSize(right-left, footHeight))
}

// toggleSide shows or hides the right column.
func (w *window) toggleSide() {
	w.frame.asked = sideShown
	if w.side.Visible() {
		w.frame.asked = sideHidden
	}
	w.middle.Layout.Layout(w.middle.Objects, w.middle.Size())
	w.win.Content().Refresh()
	w.acted()
}

// sideColumn is the right column: the selection above, the approaches below, their share draggable, and the problems.
func (w *window) sideColumn() *fyne.Container {
	w.columnSplit = container.NewVSplit(w.form.box, w.table.box)
	w.problems = newProblems(w)
	return container.NewStack(newPaper(rolePanel), around(nil, w.problems.box, hairline(), nil, container.New(&columnShare{}, w.columnSplit)))
}

// columnShare divides the right column between the form and the table until someone drags the rule between them: the form gets
// what the facts of the plan and its walker need, within bounds.
type columnShare struct {
	put float64 // the share it gave the form last
}

const (
	formHeight          = 392 // the form of a plan down to how it is seen, in px at 100 %
	leastShare, atShare = 0.47, 0.64
)

// MinSize is for the toolkit.
func (*columnShare) MinSize(o []fyne.CanvasObject) fyne.Size { return o[0].MinSize() }

// Layout is for the toolkit.
func (l *columnShare) Layout(o []fyne.CanvasObject, s fyne.Size) {
	split := o[0].(*container.Split)
	if l.put == 0 || split.Offset == l.put {
		l.put = min(max(leastShare, formHeight/float64(max(1, s.Height))), atShare)
		split.Offset = l.put
	}
	split.Resize(s)
	split.Refresh()
}

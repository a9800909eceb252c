package gui

import (
	"bytes"
	"math"
	"slices"
	"strings"

	"fyne.io/fyne/v2"

	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// clip remembers what this window put on the clipboard, and how often it was pasted: each time a step farther.
type clip struct {
	text   string
	pastes int32
}

// beside is how far a copy lies from what it is a copy of, to the right and down.
const beside = 500 * exact.PerMM

// copy puts the selection on the clipboard, as the text of a plan.
func (w *window) copy() {
	if f, ok := w.win.Canvas().Focused().(undoable); ok {
		f.TypedShortcut(&fyne.ShortcutCopy{Clipboard: w.app.Clipboard()})
		return
	}
	w.toClipboard(w.session.Selection(), 1)
}

// cut is copy and delete; what is locked is neither.
func (w *window) cut() {
	if f, ok := w.win.Canvas().Focused().(undoable); ok {
		f.TypedShortcut(&fyne.ShortcutCut{Clipboard: w.app.Clipboard()})
		return
	}
	refs := w.free()
	if len(refs) > 0 && w.toClipboard(refs, 0) {
		label := "cut items"
		if len(refs) == 1 {
			label = "cut " + refs[0].Kind.String()
		}
		w.try(plan.Steps{Text: label, Edits: []plan.Edit{plan.Delete{Items: refs}}})
	}
}

// toClipboard puts items on the clipboard, once their text is written beside the window, and reports whether there was anything to
// put.
func (w *window) toClipboard(refs []plan.Ref, pastes int32) bool {
	if !slices.ContainsFunc(refs, func(r plan.Ref) bool { return r.Kind != plan.KindOpening && r.Kind != plan.KindUnderlay }) {
		w.say("A door is copied with its wall; Ctrl+D makes another one beside it.")
		return false
	}
	p, refs := w.session.Committed(), slices.Clone(refs)
	w.errands.run(func() func() {
		var b bytes.Buffer
		err := planfile.Write(&b, plan.Extract(p, refs))
		return func() {
			if w.closing {
				return
			}
			if err != nil {
				w.say(sentence(err.Error()))
				return
			}
			w.clip = clip{b.String(), pastes}
			w.app.Clipboard().SetContent(w.clip.text)
			w.acted()
		}
	})
	return true
}

// paste adds what is on the clipboard and selects it: beside what it was copied from, or in the middle of the picture when
// that is out of sight. It waits its turn after what is being copied, and reads beside the window.
func (w *window) paste() {
	if f, ok := w.win.Canvas().Focused().(undoable); ok {
		f.TypedShortcut(&fyne.ShortcutPaste{Clipboard: w.app.Clipboard()})
		return
	}
	w.errands.run(func() func() { return w.pasteNow })
}

func (w *window) pasteNow() {
	if w.closing {
		return
	}
	text := w.app.Clipboard().Content()
	if !strings.HasPrefix(strings.TrimSpace(text), "{") {
		w.say("There is nothing of a plan on the clipboard; copy some items first.")
		return
	}
	w.errands.run(func() func() {
		p, err := planfile.Read(strings.NewReader(text), "clipboard")
		return func() {
			switch {
			case w.closing:
			case err != nil:
				w.say(sentence(err.Error()))
			default:
				w.pasted(text, p)
			}
		}
	})
}

// pasted adds what was read from the clipboard.
func (w *window) pasted(text string, p *plan.Plan) {
	if text != w.clip.text {
		w.clip = clip{text: text}
	}
	e := plan.Paste{Clip: p, By: exact.Vec{X: w.clip.pastes * beside, Y: -w.clip.pastes * beside}}
	if lo, hi, ok := plan.Bounds(p); ok && !w.inSight(lo.Add(e.By), hi.Add(e.By)) {
		e.By = w.toMiddle(lo, hi)
		w.clip.pastes = 0
	}
	into := w.session.Committed()
	w.errands.run(func() func() {
		ready := plan.Prepare(e, into)
		return func() {
			if w.closing {
				return
			}
			if len(ready.Added(w.session.Committed())) == 0 {
				w.say("There is nothing on the clipboard that could be pasted here.")
				return
			}
			w.choose(0)
			if w.tryAdd(ready) {
				w.clip.pastes++
			}
		}
	})
}

// inSight reports whether the middle of a box lies in the picture.
func (w *window) inSight(lo, hi exact.Pt) bool {
	c := w.view.cam
	m := middleOf(lo, hi)
	a, b := c.Grid(0, float64(c.H)), c.Grid(float64(c.W), 0)
	return exact.InBox(a, b, m)
}

// toMiddle returns the way from a box to the middle of the picture, in steps of the grid.
func (w *window) toMiddle(lo, hi exact.Pt) exact.Vec {
	c := w.view.cam
	by := c.Grid(float64(c.W)/2, float64(c.H)/2).Sub(middleOf(lo, hi))
	step := max(1, w.host.Snapper().Step(c))
	by.X, by.Y = by.X/step*step, by.Y/step*step
	return by
}

// middleOf returns the grid point in the middle of a box.
func middleOf(lo, hi exact.Pt) exact.Pt {
	return exact.Pt{X: lo.X + int32((int64(hi.X)-int64(lo.X))/2), Y: lo.Y + int32((int64(hi.Y)-int64(lo.Y))/2)}
}

// duplicate copies the selection half a metre beside itself; a door alone gets another one beside it in its wall.
func (w *window) duplicate() {
	refs := w.session.Selection()
	if len(refs) == 1 && refs[0].Kind == plan.KindOpening {
		e := plan.DuplicateOpening{Opening: refs[0].ID}
		added := e.Added(w.session.Committed())
		if w.try(e) {
			w.session.Select(added)
			w.acted()
		}
		return
	}
	if refs = copyable(refs); len(refs) == 0 {
		w.say("There is only one floor; it cannot be duplicated.")
		return
	}
	label := plan.Duplicate{Items: refs}.Label()
	w.tryAdd(plan.Paste{Clip: plan.Extract(w.session.Committed(), refs), By: exact.Vec{X: beside, Y: -beside}, Text: label})
}

// copyable returns the items that can be duplicated: openings go with their walls, and there is one floor and one underlay.
func copyable(refs []plan.Ref) []plan.Ref {
	return slices.DeleteFunc(slices.Clone(refs), func(r plan.Ref) bool {
		return r.Kind == plan.KindOpening || r.Kind == plan.KindFloor || r.Kind == plan.KindUnderlay
	})
}

// boxOf returns the box around items, without the thickness of walls.
func boxOf(p *plan.Plan, refs []plan.Ref) (lo, hi exact.Pt, ok bool) {
	parts := plan.Extract(p, refs).Parts()
	for i := range parts.Walls {
		parts.Walls[i].Thickness = 0
	}
	return plan.Bounds(plan.From(parts))
}

// roundUp returns v rounded up to whole steps.
func roundUp(v, step int32) int32 {
	return int32(math.Ceil(float64(v)/float64(step))) * step
}

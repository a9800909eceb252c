package gui

import (
	"strings"

	"fyne.io/fyne/v2"

	"enfilade/solver/study"
)

// widthWords tells how wide a body can be and still make some walk, empty when nothing narrows it or nothing is known.
func widthWords(a study.Approach, unit string) string {
	first, full := wideText(unit, a.ClearWidth), wideText(unit, a.FullClearWidth)
	switch {
	case a.Problem != "":
		return ""
	case a.WidthsUnknown:
		return "clear width not known: too many walls stand side by side"
	case a.HasClearWidth && a.HasFullClearWidth && first != full:
		return "clear width " + full + ", to first sight " + first
	case a.HasFullClearWidth:
		return "clear width " + full
	case a.HasClearWidth:
		return "clear width to first sight " + first
	}
	return ""
}

// tipWords tells what a row has no column for: how much of a face must be in view, and the clear width.
func tipWords(a study.Approach, unit string) string {
	what, wide := askedWords(a.Asked), widthWords(a, unit)
	switch {
	case a.Problem != "":
		return a.Problem
	case what == "":
		return wide
	case wide == "":
		return "sight of " + what
	}
	return "sight of " + what + "; " + wide
}

// showTip tells what the row has no column for, below it, when the pointer rests there.
func (r *tableRow) showTip() {
	w := r.t.w
	tip := r.row.tip
	if s := r.walk.Size(); fitted(r.walk.text, r.walk.weight, r.walk.size, s.Width) != r.walk.text { // the name is cut
		tip = strings.TrimSuffix(r.row.to+": "+tip, ": ")
	}
	if tip == "" {
		w.tips.hide()
		return
	}
	w.tips.after(tipDelay, tip, func() fyne.Position {
		return w.app.Driver().AbsolutePositionForObject(r).AddXY(30, r.Size().Height+2)
	})
}

package gui

import (
	"strings"

	"fyne.io/fyne/v2"

	"enfilade/solver/study"
)

// widthWords tells how wide a body can be and still make some walk, empty when nothing narrows it or nothing is known.
func widthWords(a study.Approach) string {
	first, full := metres(a.ClearWidth, 2), metres(a.FullClearWidth, 2)
	switch {
	case a.Problem != "":
		return ""
	case a.WidthsUnknown:
		return "clear width not known: too many walls stand side by side"
	case a.HasClearWidth && a.HasFullClearWidth && first != full:
		return "clear width " + full + " m, to first sight " + first + " m"
	case a.HasFullClearWidth:
		return "clear width " + full + " m"
	case a.HasClearWidth:
		return "clear width to first sight " + first + " m"
	}
	return ""
}

// tipWords tells what a row has no column for: how much of a face must be in view, and the clear width.
func tipWords(a study.Approach) string {
	what, wide := askedWords(a.Asked), widthWords(a)
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

package gui

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"

	"enfilade/assets"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// foot is the folded walk strip: the chosen walk in one line.
type foot struct {
	box  *fyne.Container
	head *inkText
	line *inkText
}

func newFoot() *foot {
	f := &foot{head: heading("Walk"), line: newText("", assets.Regular, 12.5, roleInk2).shrinking()}
	f.box = on(rolePanel, inset(18, 0, 18, 0, around(nil, nil, f.head, nil, inset(16, 0, 0, 0, f.line))))
	return f
}

func (f *foot) update(w *window) { f.line.set(walkLine(w.session.Plan(), &w.results)) }

// walkLine tells the chosen walk in one line.
func walkLine(p *plan.Plan, r *results) string {
	pr := r.shownPair()
	if pr.start == "" || pr.target == "" {
		return "appears when the plan has a start and a target"
	}
	head := fmt.Sprintf("from %s to %s", startName(p, pr.start), targetName(p, pr.target))
	a, ok := r.approach(pr)
	if !ok {
		return head
	}
	return head + "  ·  " + strings.Join(walkParts(a, p.Walker().Pace, p.Sheet().Unit), "  ·  ")
}

// walkParts are the facts about an approach, its lengths in the plan's unit.
func walkParts(a study.Approach, pace float64, unit string) []string {
	if a.Problem != "" {
		return []string{a.Problem}
	}
	var parts []string
	what := askedWords(a.Asked)
	switch a.Status {
	case study.StatusSeen:
		parts = append(parts, strings.TrimSpace(what+" in sight from the start, ")+" "+farText(unit, a.SightLine)+" away")
	case study.StatusApproach:
		if what != "" {
			what = "of " + what + " "
		}
		parts = append(parts, fmt.Sprintf("first sight %safter %s (%.1f s)", what, farText(unit, a.Length), a.Seconds),
			"sight line "+farText(unit, a.SightLine))
	default:
		parts = append(parts, "never in sight: "+because(a.Reason))
	}
	switch {
	case a.HasFullWalk && pace > 0:
		parts = append(parts, fmt.Sprintf("full walk %s (%.1f s)", farText(unit, a.FullWalk), a.FullWalk/1000/pace))
	case a.HasFullWalk:
		parts = append(parts, "full walk "+farText(unit, a.FullWalk))
	case a.Status != study.StatusNone:
		parts = append(parts, "no full walk: "+because(a.Reason))
	}
	if w := widthWords(a, unit); w != "" {
		parts = append(parts, w)
	}
	if a.Ties {
		parts = append(parts, "another way is equally short")
	}
	return parts
}

func because(reason string) string {
	if reason == "" {
		return "no way leads there"
	}
	return reason
}

// startName, targetName and observerName are what people call an item: its name, else its id.
func startName(p *plan.Plan, id string) string {
	if s, ok := p.Start(id); ok && s.Name != "" {
		return s.Name
	}
	return id
}

func targetName(p *plan.Plan, id string) string {
	if t, ok := p.Target(id); ok && t.Name != "" {
		return t.Name
	}
	return id
}

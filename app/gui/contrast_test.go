package gui

import (
	"math"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"enfilade/canvas/paint"
	"enfilade/solver/plan"
)

// contrast is the contrast ratio of WCAG 2.1, section 3.
func contrast(a, b colour) float64 {
	lin := func(v uint8) float64 {
		if s := float64(v) / 255; s > 0.04045 {
			return math.Pow((s+0.055)/1.055, 2.4)
		}
		return float64(v) / 255 / 12.92
	}
	light := func(c colour) float64 { return 0.2126*lin(c.R) + 0.7152*lin(c.G) + 0.0722*lin(c.B) }
	x, y := light(a), light(b)
	return (max(x, y) + 0.05) / (min(x, y) + 0.05)
}

// TestTextOfTheWindowCanBeRead: every text that the window shows, with each kind of item chosen, the strip and a dialog open,
// stands out from the ground it lies on by 4.5 to 1 at least, in both themes.
func TestTextOfTheWindowCanBeRead(t *testing.T) {
	r := newGallery(t)
	texts := 0
	for _, p := range []*paint.Theme{light, dark} {
		var walk func(o fyne.CanvasObject, ground role)
		walk = func(o fyne.CanvasObject, ground role) {
			if !o.Visible() {
				return
			}
			switch x := o.(type) {
			case *inkText:
				texts++
				if c := contrast(x.role(p), ground(p)); c < 4.5 && x.text != "" {
					t.Errorf("%s: %q has a contrast of %.2f", p.Name, x.text, c)
				}
			case *pushButton:
				if x.primary {
					walk(x.text, func(p *paint.Theme) colour { return p.ToolFill })
				} else {
					walk(x.text, roleField)
				}
			case *toolButton:
				if x.chosen {
					ground = func(p *paint.Theme) colour { return p.ToolFill }
				}
				walk(x.letter, ground)
			case *picker:
				walk(x.text, roleField)
			case *fyne.Container:
				for _, c := range x.Objects {
					if s, ok := c.(*paper); ok && s.min.Width == 0 {
						ground = s.role
					}
				}
				for _, c := range x.Objects {
					walk(c, ground)
				}
			case fyne.Widget:
				for _, c := range test.WidgetRenderer(x).Objects() {
					walk(c, ground)
				}
			}
		}
		r.notice.show("Something is wrong.", "Mend it", func() {})
		for _, ref := range []plan.Ref{{}, {Kind: plan.KindObserver, ID: "O1"}, {Kind: plan.KindTarget, ID: "T1"}, {Kind: plan.KindStart, ID: "S1"}, {Kind: plan.KindBlock, ID: "B1"}} {
			r.session.Select()
			if ref.ID != "" {
				r.session.Select(ref)
			}
			r.acted()
			walk(r.win.Content(), roleChrome)
		}
		r.askShown()
		walk(r.modal.pop.Content, rolePanel)
		r.typedKey(fyne.KeyEscape)
	}
	if texts < 500 {
		t.Errorf("only %d texts were looked at", texts)
	}
}

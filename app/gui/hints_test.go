package gui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"enfilade/assets"
	"enfilade/solver/plan"
)

// TestEveryStepOfEveryToolSaysWhatTheNextClickDoes goes through the tools step by step: at each the status line says something
// of its own, all of which has room at 1440 px and the first part of which at 1024 px.
func TestEveryStepOfEveryToolSaysWhatTheNextClickDoes(t *testing.T) {
	long(t)
	for _, c := range []struct {
		name, keys string
		steps      func(r *rig, says func(part string))
	}{
		{"select", "", func(r *rig, says func(string)) {
			r.move(12, 13.2)
			says("click an item, or drag a box")
			r.move(11.35, 8.75)
			says("click to select, drag to move")
			r.click(11.35, 8.75)
			r.move(10.5, 8.45) // the end of its heading
			says("drag to turn")
			r.move(12, 13.2)
			says("arrows nudge by 0.1 m")
			r.press(11.35, 8.75)
			r.dragTo(12, 8)
			says("release to put it down")
			r.keys(fyne.KeyEscape)
			r.release(12, 8)
			r.press(12, 13.2)
			r.dragTo(13, 14.5)
			says("release to select what lies inside the box")
			r.release(13, 14.5)
		}},
		{"measure", "m", func(r *rig, says func(string)) {
			r.move(2, 2)
			says("click where to measure from")
			r.click(2, 2)
			r.move(4, 2)
			says("click where to measure to")
			r.click(4, 2)
			r.move(4, 4)
			says("click on for the length of all")
			r.click(4, 4)
			r.move(2, 4)
			says("click on, or the first place for the area")
		}},
		{"wall", "w", func(r *rig, says func(string)) {
			r.move(16, 13)
			says("click where the wall begins")
			r.click(16, 13)
			r.move(18, 13)
			says("click the next corner, or type its length; Backspace")
			r.runes("2")
			says("Tab goes between length and angle")
			r.keys(fyne.KeyEscape)
			r.click(18, 13)
			r.move(18, 15)
			says("click the next corner, or type its length; Enter or Esc ends the wall")
			r.click(18, 15)
			r.move(16.5, 15)
			says("click the next corner, or the first one to close")
			r.move(16, 13)
			says("click to close the wall")
		}},
		{"room", "r", func(r *rig, says func(string)) {
			r.move(16, 13)
			says("click or drag from one corner of the room")
			r.click(16, 13)
			r.move(18, 15)
			says("click the opposite corner, or type its width")
			r.runes("3")
			says("Tab goes between width and height")
		}},
		{"door", "d", func(r *rig, says func(string)) {
			r.move(16, 13)
			says("point at a wall to cut a door or a gap into")
			r.move(1, 4)
			says("click, drag, or type a width")
			r.runes("1")
			says("Tab goes between width and distance")
		}},
		{"column", "c", func(r *rig, says func(string)) {
			r.move(16, 13)
			says("click for a column, drag from its centre or type a number for another radius · C again: block")
			r.press(16, 13)
			r.dragTo(16.8, 13)
			says("release when the column is wide enough")
			r.release(16.8, 13)
		}},
		{"floor", "f", func(r *rig, says func(string)) {
			r.move(16, 13)
			says("click where the floor begins")
			r.click(16, 13)
			r.move(18, 13)
			says("click the next corner, or type its length; Backspace")
			r.click(18, 13)
			r.click(18, 15)
			r.move(16.5, 15)
			says("Enter or Esc closes the floor")
		}},
		{"observer", "o", func(r *rig, says func(string)) {
			r.move(12, 13.2)
			says("click to put an observer here")
			r.press(12, 13.2)
			r.dragTo(13.2, 13.2)
			says("release when it looks the right way")
			r.release(13.2, 13.2)
		}},
		{"target", "t", func(r *rig, says func(string)) {
			r.move(12, 13.2)
			says("click to put a target here")
			r.press(12, 13.2)
			r.dragTo(13.2, 13.2)
			says("release at the face's other end; J turns its front round")
			r.release(13.2, 13.2)
		}},
		{"start", "b", func(r *rig, says func(string)) {
			r.move(12, 13.2)
			says("click where a walk begins")
		}},
		{"route", "p", func(r *rig, says func(string)) {
			r.move(12, 13.2)
			says("click the start where the route begins")
			s, _ := r.session.Plan().Start("S1")
			x, y := float64(s.At.X)/10000, float64(s.At.Y)/10000
			r.move(x, y)
			says("click to begin the route at this start")
			r.click(x, y)
			r.move(12, 13.2)
			says("click waypoints, then the target; Esc leaves the route")
			r.click(12, 13.2)
			r.move(13, 13.2)
			says("click waypoints, then the target; Enter or Esc ends the route here")
		}},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := newGallery(t)
			if err := r.doEdit(plan.AddWall{Wall: plan.Wall{Line: plan.ChainOf(m(1, 2), m(1, 6)), Thickness: 2000, Height: plan.Ceiling}}); err != nil {
				t.Fatal(err)
			}
			r.session.Select()
			last := ""
			r.runes(c.keys)
			c.steps(r, func(part string) {
				t.Helper()
				r.wantHint(part)
				hint := r.status.hint.text
				if hint == last {
					t.Errorf("two steps say %q", hint)
				}
				last = hint
				if got, room := textSize(hint, assets.Regular, 12).Width, r.status.hint.Size().Width; got > room {
					t.Errorf("%q takes %v px of %v", hint, got, room)
				}
				first := r.status.hint.brief
				if first == "" || !strings.HasPrefix(hint, first) {
					t.Errorf("%q has the first part %q", hint, first)
				}
				const narrowRoom = 1024 - 32 - 140 - 122 - 15 - 15 - 16 - 16
				if got := textSize(first, assets.Regular, 12).Width; got > narrowRoom {
					t.Errorf("%q takes %v px of %v at 1024", first, got, narrowRoom)
				}
			})
			r.keys(fyne.KeyEscape, fyne.KeyEscape, fyne.KeyEscape)
		})
	}
}

// TestToolsSayWhatAPlanIsLacking: a tool that needs something says so before anyone clicks in vain.
func TestToolsSayWhatAPlanIsLacking(t *testing.T) {
	r := newRig(t, realSolver)
	r.runes("d")
	r.move(5, 5)
	r.wantHint("draw one first (W)")
	r.runes("p")
	r.move(6, 5)
	r.wantHint("put one down first (B)")
}

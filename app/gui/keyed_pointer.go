package gui

import (
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
)

// keyedPointer is the pointer's place while arrow keys move it: a cross in the picture, until the mouse moves again.
type keyedPointer struct {
	on    bool
	cross [2]*canvas.Line
}

// crossReach is how far the cross reaches from its middle, in px at 100 %.
const crossReach = 9

func newKeyedPointer() keyedPointer {
	k := keyedPointer{cross: [2]*canvas.Line{canvas.NewLine(nil), canvas.NewLine(nil)}}
	k.cross[0].Hidden, k.cross[1].Hidden = true, true
	return k
}

// place shows the cross at a place of the picture, or not at all.
func (k *keyedPointer) place(at fyne.Position) {
	if !k.on && k.cross[0].Hidden {
		return
	}
	for i, l := range k.cross {
		by := fyne.NewPos(crossReach, 0)
		if i == 1 {
			by = fyne.NewPos(0, crossReach)
		}
		l.StrokeColor, l.StrokeWidth, l.Hidden = themed().Ink, 2, !k.on
		l.Position1, l.Position2 = at.Subtract(by), at.Add(by)
		l.Refresh()
	}
}

// arrow moves the pointer by a step of the arrow keys, in a picture that shows little of it by as many as can be seen, and reports
// whether the key is an arrow. Beyond the picture's edge the plan is moved.
func (v *planView) arrow(name fyne.KeyName, k tool.Key) bool {
	way, ok := map[fyne.KeyName]exact.Vec{fyne.KeyLeft: {X: -1}, fyne.KeyRight: {X: 1}, fyne.KeyUp: {Y: 1}, fyne.KeyDown: {Y: -1}}[name]
	if !ok || v.panning {
		return false
	}
	if !v.inside {
		v.last = fyne.NewPos(v.Size().Width/2, v.Size().Height/2)
	}
	const least = 3 // px at 100 % that a step is long
	step := float64(tool.NudgeStep(v.w.host, k))
	step *= math.Max(1, math.Ceil(least*v.cam.K*exact.PerMM/v.cam.Scale/step))
	at := v.cam.Grid(v.place())
	to := exact.Pt{X: onStep(at.X, step) + way.X*int32(step), Y: onStep(at.Y, step) + way.Y*int32(step)}
	v.goTo(to)
	return true
}

// onStep is the multiple of a step that is nearest to v.
func onStep(v int32, step float64) int32 { return int32(math.Round(float64(v)/step) * step) }

// goTo puts the pointer on a place of the plan, and the place into the picture.
func (v *planView) goTo(q exact.Pt) {
	const rim = 40 // px at 100 % between the pointer and the picture's edge
	x, y := v.cam.Pixel(q)
	edge := rim * v.cam.K
	dx := max(0, edge-x) - max(0, x-(float64(v.cam.W)-edge))
	dy := max(0, edge-y) - max(0, y-(float64(v.cam.H)-edge))
	if dx != 0 || dy != 0 {
		v.glide.stop()
		v.fitted, v.cam = false, v.cam.Pan(dx, dy)
		x, y = v.cam.Pixel(q)
	}
	at := fyne.NewPos(float32(x)/v.pix, float32(y)/v.pix)
	v.moved(at)
	v.keyed.on = true
	v.keyed.place(at)
}

// press clicks where the arrow keys have put the pointer; while the mouse has it, Space is for panning.
func (v *planView) press() {
	if !v.keyed.on || v.pressed != 0 {
		return
	}
	e := &desktop.MouseEvent{Button: desktop.MouseButtonPrimary, PointEvent: fyne.PointEvent{Position: v.last}}
	v.MouseDown(e)
	v.MouseUp(e)
}

// unkey takes the cross away: the mouse has the pointer.
func (v *planView) unkey() {
	if v.keyed.on {
		v.keyed.on = false
		v.keyed.place(v.last)
	}
}

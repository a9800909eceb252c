package gui

import (
	"math"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
	"github.com/paulmach/orb"

	"enfilade/canvas/tool"
	"enfilade/canvas/view"
)

// planView is the picture one draws on. It turns the toolkit's events into those of the tool in hand, keeps the camera, and
// shows one raster with a few native objects on top.
type planView struct {
	widget.BaseWidget
	w      *window
	raster *canvas.Raster
	over   *overlay
	ring   *canvas.Rectangle // keyboard focus, on the inner edge

	cam    view.Camera
	glide  glide
	fitted bool      // the camera follows the window's size until someone moves it
	around orb.Bound // what it is fitted to then, in mm: what was drawn when it was, so that drawing never moves it
	pix    float32   // device pixels per unit of the toolkit, from the last drawing
	ringed bool      // the focus came by Tab, so its ring is shown

	last    fyne.Position // of the pointer
	inside  bool
	pressed desktop.MouseButton // the button that is down over the picture, 0 for none
	panning bool
	space   bool
	keyed   keyedPointer
	alt     bool      // Alt is down and nothing else has happened since
	clicked time.Time // for double clicks
	at      fyne.Position
}

// A second press so soon and so near is a double click.
const (
	doubleTime = 400 * time.Millisecond
	doubleDist = 4
)

func newPlanView(w *window) *planView {
	v := &planView{w: w, fitted: true, around: w.bounds(), pix: 1, over: newOverlay(), keyed: newKeyedPointer(), ring: canvas.NewRectangle(nil)}
	v.raster = canvas.NewRaster(w.picture.draw)
	v.raster.ScaleMode = canvas.ImageScalePixels // a pixel of the picture is one of the screen: nothing to blend
	v.ExtendBaseWidget(v)
	return v
}

// pointer returns a place of the toolkit as the tools want it.
func (v *planView) pointer(p fyne.Position, clicks int) tool.Pointer {
	mods := v.w.modifiers()
	return tool.Pointer{
		X: float64(p.X * v.pix), Y: float64(p.Y * v.pix), Clicks: clicks,
		Shift: mods&fyne.KeyModifierShift != 0, Ctrl: mods&fyne.KeyModifierControl != 0,
		Pressed: v.pressed == desktop.MouseButtonPrimary && !v.panning,
	}
}

// MouseDown gives the picture the focus, and the tool a press; the middle button, and the first one with Space, pan.
func (v *planView) MouseDown(e *desktop.MouseEvent) {
	v.grab()
	v.alt = false
	if v.pressed != 0 {
		return
	}
	v.pressed, v.last = e.Button, e.Position
	switch {
	case e.Button == desktop.MouseButtonTertiary, e.Button == desktop.MouseButtonPrimary && v.space:
		v.panning = true
	case e.Button == desktop.MouseButtonPrimary:
		v.w.tool.Down(v.w.host, v.pointer(e.Position, v.count(e.Position)))
		v.w.acted()
	}
}

// grab takes the focus without showing its ring.
func (v *planView) grab() {
	if c := v.w.win.Canvas(); c.Focused() != fyne.Focusable(v) {
		c.Focus(v)
	}
	if v.ringed {
		v.ringed = false
		v.Refresh()
	}
}

// count returns 2 for the second press of a double click.
func (v *planView) count(p fyne.Position) int {
	now := v.w.now()
	near := math.Hypot(float64(p.X-v.at.X), float64(p.Y-v.at.Y)) <= doubleDist
	if near && now.Sub(v.clicked) < doubleTime {
		v.clicked = time.Time{}
		return 2
	}
	v.clicked, v.at = now, p
	return 1
}

// MouseUp ends what MouseDown began.
func (v *planView) MouseUp(e *desktop.MouseEvent) {
	if e.Button == v.pressed {
		v.release(e.Position)
	}
}

func (v *planView) release(p fyne.Position) {
	was, panned := v.pressed, v.panning
	v.pressed, v.panning = 0, false
	if was == desktop.MouseButtonPrimary && !panned {
		v.w.tool.Up(v.w.host, v.pointer(p, 0))
		v.w.acted()
	}
}

// Dragged is a move with a button down.
func (v *planView) Dragged(e *fyne.DragEvent) {
	if v.pressed == 0 { // the toolkit's test driver drags without a press
		v.MouseDown(&desktop.MouseEvent{Button: desktop.MouseButtonPrimary,
			PointEvent: fyne.PointEvent{Position: e.Position.Subtract(e.Dragged)}})
	}
	v.moved(e.Position)
}

// DragEnd ends a drag that was released outside the picture, where no MouseUp comes.
func (v *planView) DragEnd() {
	if v.pressed != 0 {
		v.release(v.last)
	}
	if !v.inside {
		v.MouseOut()
	}
}

// MouseIn is for the toolkit.
func (v *planView) MouseIn(e *desktop.MouseEvent) { v.MouseMoved(e) }

// MouseMoved is a move, with or without a button.
func (v *planView) MouseMoved(e *desktop.MouseEvent) {
	v.unkey()
	v.moved(e.Position)
}

func (v *planView) moved(p fyne.Position) {
	v.inside = p.X >= 0 && p.Y >= 0 && p.X < v.Size().Width && p.Y < v.Size().Height
	from := v.last
	v.last = p
	if v.panning {
		d := p.Subtract(from)
		v.look(v.cam.Pan(float64(d.X*v.pix), float64(d.Y*v.pix)))
		return
	}
	v.w.tool.Move(v.w.host, v.pointer(p, 0))
	v.w.acted()
}

// MouseOut tells the tool that the pointer is gone.
func (v *planView) MouseOut() {
	v.unkey()
	v.inside = false
	if v.pressed == 0 {
		v.w.tool.Leave(v.w.host)
		v.w.acted()
	}
}

// Scrolled zooms at the pointer: a notch is 25 units, and the toolkit may send many at once.
func (v *planView) Scrolled(e *fyne.ScrollEvent) {
	v.alt = false
	notches := math.Max(-2, math.Min(2, float64(e.Scrolled.DY)/25))
	v.zoom(e.Position, math.Pow(1.2, notches))
}

// zoom magnifies about a place of the toolkit.
func (v *planView) zoom(p fyne.Position, factor float64) {
	v.fitted = false
	v.glide.to(v.cam, v.glide.from(v.cam).ZoomAt(float64(p.X*v.pix), float64(p.Y*v.pix), factor), v.see)
}

// see shows what a camera sees.
func (v *planView) see(c view.Camera) {
	v.cam = c
	v.w.acted()
}

// look moves the camera for good: from now on it does not follow the window's size.
func (v *planView) look(c view.Camera) {
	v.glide.stop()
	v.fitted = false
	v.see(c)
}

// fit shows the whole plan, and does so again when the window's size changes.
func (v *planView) fit() {
	v.fitted, v.around = true, v.w.bounds()
	v.glide.to(v.cam, view.Fit(v.around, v.cam.W, v.cam.H, v.cam.K), v.see)
}

// fitNow is fit at once, for another plan.
func (v *planView) fitNow() {
	v.glide.stop()
	v.fitted, v.around = true, v.w.bounds()
	v.resized(v.cam.W, v.cam.H, v.pix)
	v.w.acted()
}

// resized takes over the size of the picture in device pixels.
func (v *planView) resized(w, h int, pix float32) {
	v.pix = pix
	v.glide.stop()
	if v.fitted {
		v.cam = view.Fit(v.around, w, h, float64(pix))
		return
	}
	v.cam = v.cam.Resize(w, h, float64(pix))
}

// Cursor is the pointer's shape.
func (v *planView) Cursor() desktop.Cursor {
	switch {
	case v.panning, v.space:
		return desktop.PointerCursor
	case v.w.sketch.Grip == tool.GripHand:
		return desktop.PointerCursor
	case v.w.sketch.Grip == tool.GripCross:
		return desktop.CrosshairCursor
	}
	return desktop.DefaultCursor
}

// FocusGained is for the toolkit. It also comes when the window is chosen, so only KeyUp tells that Tab led here.
func (v *planView) FocusGained() {}

// FocusLost takes the ring away.
func (v *planView) FocusLost() {
	v.space, v.alt = false, false
	if v.ringed {
		v.ringed = false
		v.Refresh()
	}
}

// isAlt reports whether a key is either Alt.
func isAlt(name fyne.KeyName) bool { return name == desktop.KeyAltLeft || name == desktop.KeyAltRight }

// TypedKey is for the toolkit.
func (v *planView) TypedKey(e *fyne.KeyEvent) { v.w.typedKey(e.Name) }

// TypedRune is for the toolkit.
func (v *planView) TypedRune(r rune) { v.w.typedRune(r) }

// AcceptsTab reports whether Tab is for the tool: it goes between the fields at the pointer.
func (v *planView) AcceptsTab() bool { return v.w.sketch.Types }

// KeyDown notes that Space is held, for panning, and that Alt is pressed with nothing else.
func (v *planView) KeyDown(e *fyne.KeyEvent) {
	v.alt = isAlt(e.Name)
	if e.Name == fyne.KeySpace {
		v.space = true
	}
}

// KeyUp notes that Space is let go, and draws the focus ring on the picture's inner edge when Tab led here.
func (v *planView) KeyUp(e *fyne.KeyEvent) {
	if v.alt && isAlt(e.Name) && v.w.modal == nil && v.pressed == 0 {
		v.alt = false
		v.w.bar.drop.open(0)
		return
	}
	v.alt = false
	switch e.Name {
	case fyne.KeySpace:
		v.space = false
		v.press()
	case fyne.KeyTab:
		if v.w.win.Canvas().Focused() == fyne.Focusable(v) && !v.AcceptsTab() {
			v.ringed = true
			v.Refresh()
		}
	}
}

// CreateRenderer is for the toolkit.
func (v *planView) CreateRenderer() fyne.WidgetRenderer { return &viewRenderer{v} }

type viewRenderer struct{ v *planView }

func (r *viewRenderer) Layout(s fyne.Size) {
	r.v.raster.Resize(s)
	r.v.over.root.Resize(s)
	r.v.ring.Move(fyne.NewPos(1, 1))
	r.v.ring.Resize(s.SubtractWidthHeight(2, 2))
}

func (r *viewRenderer) MinSize() fyne.Size { return fyne.NewSize(240, 160) }

func (r *viewRenderer) Refresh() {
	r.v.ring.FillColor, r.v.ring.StrokeColor, r.v.ring.StrokeWidth = nil, themed().Ink, 2
	r.v.ring.Hidden = !r.v.ringed
	r.v.ring.Refresh()
	r.v.keyed.place(r.v.last)
	r.v.raster.Refresh()
}

func (r *viewRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.v.raster, r.v.over.root, r.v.keyed.cross[0], r.v.keyed.cross[1], r.v.ring}
}
func (r *viewRenderer) Destroy() {}

package gui

import (
	"fmt"
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// firstSteps is the page over an empty plan: three vignettes with the keys that begin each. It takes no events, and
// vanishes at the first drawn point.
type firstSteps struct {
	widget.BaseWidget
	box    *fyne.Container
	ground *canvas.Rectangle
	art    *canvas.Image
	caps   []*canvas.Rectangle
	texts  []stepText
}

// stepText is a text of the page with its place on it.
type stepText struct {
	*inkText
	x, y   float32
	middle bool // x is the text's middle
}

// The page, in px at 100 %.
const (
	stepsWidth  = 820
	stepsHeight = 372
	stepsPitch  = 284
)

func newFirstSteps() *firstSteps {
	f := &firstSteps{ground: canvas.NewRectangle(nil), art: &canvas.Image{FillMode: canvas.ImageFillStretch}}
	middle := func(t *inkText, y float32) { f.texts = append(f.texts, stepText{t, stepsWidth / 2, y, true}) }
	middle(newText("A new plan", assets.Light, 28, roleInk), 18)
	middle(newText("Three marks are enough for a first sight line.", assets.Regular, 14, roleInk2), 54)
	middle(newText("or open a sample plan from the Help menu, or drop a plan here, or a scan to trace", assets.Regular, 12.5, roleInk2), 350)
	for i, s := range []struct{ key, head, one, two string }{
		{"W", "Draw the walls", "Click corner to corner; type a length", "any time. Esc ends the run."},
		{"O", "Place an observer", "A person, a seat, a counter: what they", "can see fills in as you move them."},
		{"T", "Mark a target", "Then set a start (B). The walk to first", "sight is drawn as you edit."},
	} {
		x := float32(i * stepsPitch)
		put := func(t *inkText, dx, y float32, middle bool) {
			f.texts = append(f.texts, stepText{t, x + dx, y, middle})
		}
		c := canvas.NewRectangle(nil)
		c.CornerRadius = 5
		f.caps = append(f.caps, c)
		put(newText(s.key, assets.Bold, 13, roleInk), 12, 249, true)
		put(newText(s.head, assets.Semibold, 15, roleInk), 34, 247, false)
		put(newText(s.one, assets.Regular, 12.5, roleInk2), 0, 280, false)
		put(newText(s.two, assets.Regular, 12.5, roleInk2), 0, 298, false)
	}
	f.texts = append(f.texts, stepText{newText("2.40 m", assets.Semibold, 11.5, roleInk), 206, 151, false})
	f.ExtendBaseWidget(f)
	f.box = container.New(stepsLayout{}, f)
	f.box.Hide()
	return f
}

// showIf shows the page, or hides it.
func (f *firstSteps) showIf(show bool) {
	if f.box.Visible() == show {
		return
	}
	f.box.Hidden = !show
	f.box.Refresh()
}

// stepsLayout puts the page into the middle of the picture, right of and below its rulers.
type stepsLayout struct{}

// MinSize is for the toolkit.
func (stepsLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.Size{} }

// Layout is for the toolkit.
func (stepsLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	o[0].Resize(fyne.NewSize(stepsWidth, stepsHeight))
	o[0].Move(fyne.NewPos(22+max(0, (s.Width-22-stepsWidth)/2), 22+max(0, (s.Height-22-stepsHeight)/2)))
}

// CreateRenderer is for the toolkit.
func (f *firstSteps) CreateRenderer() fyne.WidgetRenderer {
	r := &stepsRenderer{f}
	r.Refresh()
	return r
}

type stepsRenderer struct{ f *firstSteps }

func (r *stepsRenderer) Layout(fyne.Size) {
	f := r.f
	f.ground.Resize(fyne.NewSize(stepsWidth+40, stepsHeight+20))
	f.ground.Move(fyne.NewPos(-20, -10))
	f.art.Move(fyne.NewPos(0, 84))
	f.art.Resize(fyne.NewSize(stepsWidth, 150))
	for i, c := range f.caps {
		c.Move(fyne.NewPos(float32(i*stepsPitch), 245))
		c.Resize(fyne.NewSize(24, 24))
	}
	for _, t := range f.texts {
		s := t.MinSize()
		x := t.x
		if t.middle {
			x -= s.Width / 2
		}
		t.Move(fyne.NewPos(x, t.y))
		t.Resize(s)
	}
}

func (r *stepsRenderer) MinSize() fyne.Size { return fyne.NewSize(stepsWidth, stepsHeight) }

func (r *stepsRenderer) Refresh() {
	p := themed()
	f := r.f
	if f.box != nil && f.box.Hidden { // drawn when it is shown
		return
	}
	f.ground.FillColor = faded(p.Ground, 92)
	f.ground.Shadow = canvas.Shadow{Color: faded(p.Ground, 92), BlurRadius: 26, Spread: 4, Variant: canvas.DropShadow}
	f.art.Resource = fyne.NewStaticResource("steps"+p.Name+".svg", []byte(stepsArt(p.Poche, p.Red, p.Ink2, p.Floor, p.FirstWash, p.Observers[0])))
	for _, c := range f.caps {
		c.FillColor, c.StrokeColor, c.StrokeWidth = p.Field, p.Ink, 1.4
		canvas.Refresh(c)
	}
	for _, t := range f.texts {
		t.Refresh()
	}
	canvas.Refresh(f.ground)
	f.art.Refresh()
}

func (r *stepsRenderer) Objects() []fyne.CanvasObject {
	o := []fyne.CanvasObject{r.f.ground, r.f.art}
	for _, c := range r.f.caps {
		o = append(o, c)
	}
	for _, t := range r.f.texts {
		o = append(o, t.inkText)
	}
	return o
}
func (r *stepsRenderer) Destroy() {}

// stepsArt draws the three vignettes: a corner with the next wall on its way, a room with its region through the door, and
// a walk that ends where the target comes into sight.
func stepsArt(wall, red, dim, floor, wash, eye color.NRGBA) string {
	s := fmt.Sprintf(`<svg xmlns="http://www.w3.org/2000/svg" width="%d" height="150" viewBox="0 0 %d 150">`, stepsWidth, stepsWidth)
	add := func(format string, args ...any) { s += fmt.Sprintf(format, args...) }
	w, r, d, f, b, e := svgColour(wall), svgColour(red), svgColour(dim), svgColour(floor), svgColour(wash), svgColour(eye)
	// The corner.
	add(`<path fill="%s" d="M10 34H178V44H19V138H10Z"/>`, w)
	add(`<path fill="none" stroke="%s" stroke-width="1.2" stroke-dasharray="4 3" d="M173 44V104M182 34V104"/>`, d)
	add(`<circle cx="177.500" cy="104" r="4" fill="%s" stroke="%s" stroke-width="1.600"/>`, f, w)
	add(`<path fill="none" stroke="%s" stroke-width="1" d="M196 44V104M192 44H200M192 104H200"/>`, d)
	// The room and its region.
	add(`<path fill="%s" fill-opacity="0.2" d="M303 43H412L418 6H464L449 43H486V131H303Z"/>`, b)
	add(`<path fill="none" stroke="%s" stroke-width="1.2" stroke-dasharray="6 4" d="M412 43L418 6M449 34L464 6"/>`, e)
	add(`<path fill="%s" d="M294 34H412V43H303V131H486V43H449V34H496V141H294Z"/>`, w)
	add(`<circle cx="403" cy="102" r="14" fill="%s" stroke="%s" stroke-width="1.300"/>`, f, e)
	add(`<circle cx="403" cy="102" r="8.500" fill="%s"/>`, e)
	add(`<path fill="none" stroke="%s" stroke-width="2.600" d="M404 100L409 94"/>`, f)
	// The walk to first sight.
	add(`<path fill="%s" d="M577 32H805V42H577ZM704 71H714V139H704Z"/>`, w)
	add(`<path fill="none" stroke="%s" stroke-width="1.300" stroke-dasharray="2 3" d="M767 44L650 94"/>`, r)
	add(`<path fill="none" stroke="%s" stroke-width="2.800" d="M650 94L665 127"/>`, r)
	add(`<circle cx="768" cy="42" r="5.200" fill="%s" stroke="%s" stroke-width="1.800"/>`, f, w)
	add(`<path fill="none" stroke="%s" stroke-width="1.600" d="M768 47V58"/>`, w)
	add(`<circle cx="650" cy="94" r="7.500" fill="%s" stroke="%s" stroke-width="1.800"/>`, f, r)
	add(`<path fill="%s" d="M647 87A7.500 7.500 0 0 1 653 101Z"/>`, r)
	add(`<path fill="%s" stroke="%s" stroke-width="1.300" d="M655.500 136L679.500 126L685.500 140L661.500 150Z"/>`, f, w)
	add(`<path fill="none" stroke="%s" stroke-width="2" d="M666 141L669 135L675 138"/>`, r)
	return s + `</svg>`
}

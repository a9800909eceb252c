package gui

import (
	"image/color"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
	"enfilade/canvas/tool"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
)

// overlay holds the native objects over the picture: handles, rubber band, snap mark, box and the measure beside the
// pointer. Objects are kept and used again, for the toolkit keeps textures by object.
type overlay struct {
	root   *fyne.Container
	lines  []*canvas.Line
	rects  []*canvas.Rectangle
	label  *inkText
	plate  *canvas.Rectangle
	fields [2]*typeField
	used   struct{ lines, rects int }
	cam    view.Camera
	pix    float32
	ink    color.NRGBA
	floor  color.NRGBA
}

func newOverlay() *overlay {
	o := &overlay{label: newText("", assets.Semibold, 12, roleInk), plate: canvas.NewRectangle(nil)}
	o.plate.CornerRadius = 3
	o.label.Hide()
	o.plate.Hide()
	o.root = newFree(o.plate, o.label)
	for i := range o.fields {
		o.fields[i] = newTypeField()
		for _, x := range o.fields[i].objects() {
			o.root.Add(x)
		}
	}
	return o
}

// newFree is a container whose objects stay where they are put.
func newFree(objects ...fyne.CanvasObject) *fyne.Container {
	return container.NewWithoutLayout(objects...)
}

// show draws a sketch.
func (o *overlay) show(s tool.Sketch, cam view.Camera, pix float32) {
	p := themed()
	o.cam, o.pix, o.ink, o.floor = cam, pix, p.Ink, p.Field
	o.used.lines, o.used.rects = 0, 0
	if s.Box != nil {
		o.box(s.Box[0], s.Box[1])
	}
	for i := 1; i < len(s.Band); i++ {
		a, b := o.place(s.Band[i-1]), o.place(s.Band[i])
		o.line(a, b, 1.4, o.ink)
	}
	for _, h := range s.Handles {
		o.square(o.place(h), 8)
	}
	for _, k := range s.Knobs {
		o.knob(fyne.NewPos(float32(k[0])/pix, float32(k[1])/pix))
	}
	if s.Snap != nil {
		o.guides(s.Snap.Guides[:])
		o.snap(*s.Snap)
	}
	o.measure(s)
	for _, l := range o.lines[o.used.lines:] {
		l.Hide()
	}
	for _, r := range o.rects[o.used.rects:] {
		r.Hide()
	}
}

// place returns the toolkit's place of a point of the plan.
func (o *overlay) place(p exact.Pt) fyne.Position {
	x, y := o.cam.Pixel(p)
	return fyne.NewPos(float32(x)/o.pix, float32(y)/o.pix)
}

func (o *overlay) line(a, b fyne.Position, width float32, c color.Color) {
	if o.used.lines == len(o.lines) {
		l := canvas.NewLine(c)
		o.lines = append(o.lines, l)
		o.root.Objects = append([]fyne.CanvasObject{l}, o.root.Objects...) // below the label
	}
	l := o.lines[o.used.lines]
	o.used.lines++
	l.Position1, l.Position2, l.StrokeWidth, l.StrokeColor = a, b, width, c
	l.Show()
	l.Refresh()
}

func (o *overlay) rect(at fyne.Position, size fyne.Size, stroke float32, fill, line color.Color) {
	if o.used.rects == len(o.rects) {
		r := canvas.NewRectangle(fill)
		o.rects = append(o.rects, r)
		o.root.Objects = append([]fyne.CanvasObject{r}, o.root.Objects...)
	}
	r := o.rects[o.used.rects]
	o.used.rects++
	r.FillColor, r.StrokeColor, r.StrokeWidth, r.CornerRadius = fill, line, stroke, 0
	r.Move(at)
	r.Resize(size)
	r.Show()
	r.Refresh()
}

// dot is a round spot.
func (o *overlay) dot(c fyne.Position, radius float32, fill color.Color) {
	o.rect(c.SubtractXY(radius, radius), fyne.NewSquareSize(2*radius), 0, fill, color.Transparent)
	o.rects[o.used.rects-1].CornerRadius = radius
}

// knob is a round handle of a selected mark.
func (o *overlay) knob(c fyne.Position) {
	const radius = 4
	o.rect(c.SubtractXY(radius, radius), fyne.NewSquareSize(2*radius), 1.3, o.floor, o.ink)
	o.rects[o.used.rects-1].CornerRadius = radius
}

// square is an open handle of a selected item's corner.
func (o *overlay) square(at fyne.Position, side float32) {
	o.rect(at.SubtractXY(side/2, side/2), fyne.NewSquareSize(side), 1.5, o.floor, o.ink)
}

// box is the frame of a pick by box.
func (o *overlay) box(a, b exact.Pt) {
	p, q := o.place(a), o.place(b)
	at := fyne.NewPos(min(p.X, q.X), min(p.Y, q.Y))
	size := fyne.NewSize(float32(math.Abs(float64(p.X-q.X))), float32(math.Abs(float64(p.Y-q.Y))))
	o.rect(at, size, 1, faded(o.ink, 7), faded(o.ink, 55))
}

// measure writes the measure or the fault beside the pointer, away from the picture's edges; while a measure is typed the
// fields for it stand there, and a fault below them.
func (o *overlay) measure(s tool.Sketch) {
	place := s.LabelAt
	if s.Fault != "" && s.Snap != nil {
		place = s.Snap.At
	}
	at := o.place(place).AddXY(14, 10)
	limit := o.root.Size()
	if n := len(s.Fields); n > 0 {
		size := typingSize(n)
		at.X, at.Y = max(26, min(at.X, limit.Width-size.Width-12)), max(26, min(at.Y, limit.Height-size.Height-34))
		o.typing(s.Fields, at)
		at = at.AddXY(1, size.Height+6)
	} else {
		o.typing(nil, at)
	}
	text, r := s.Label, roleInk
	if len(s.Fields) > 0 {
		text = ""
	}
	if s.Fault != "" {
		text, r = s.Fault, roleRed
	}
	if text == "" || s.Fault == "" && s.LabelAt == (exact.Pt{}) && len(s.Band) == 0 && s.Dragged == nil {
		o.label.Hide()
		o.plate.Hide()
		return
	}
	o.write(text, r, at, limit)
}

// write puts a line of text on a plate.
func (o *overlay) write(text string, r role, at fyne.Position, limit fyne.Size) {
	size := textSize(text, assets.Semibold, 12)
	at.X, at.Y = min(at.X, limit.Width-size.Width-12), min(at.Y, limit.Height-size.Height-8)
	o.label.text, o.label.role = text, r
	o.plate.FillColor = faded(o.floor, 85)
	o.plate.Move(at.SubtractXY(5, 2))
	o.plate.Resize(size.AddWidthHeight(10, 4))
	o.label.Move(at)
	o.label.Resize(size)
	o.plate.Show()
	o.label.Show()
	o.plate.Refresh()
	o.label.Refresh()
}

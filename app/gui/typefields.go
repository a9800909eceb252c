package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"enfilade/assets"
	"enfilade/canvas/tool"
)

// typeField is one of the small fields at the pointer in which a measure is typed: its name above, the text or the measure as
// it stands below, and a bar where the next character goes. It only shows; the keys go to the tool.
type typeField struct {
	box   *canvas.Rectangle
	bar   *canvas.Rectangle
	label *inkText
	text  *inkText
}

// Measures of the fields, in px at 100 %.
const (
	typeWidth  = 86
	typeHeight = 26
	typeGap    = 6
)

func newTypeField() *typeField {
	f := &typeField{canvas.NewRectangle(nil), canvas.NewRectangle(nil),
		newText("", assets.Regular, 10.5, roleInk2), newText("", assets.Semibold, 12.5, roleInk)}
	f.box.CornerRadius = 4
	for _, o := range f.objects() {
		o.Hide()
	}
	return f
}

func (f *typeField) objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{f.box, f.label, f.text, f.bar}
}

// show puts the field at a place.
func (f *typeField) show(d tool.Field, at fyne.Position, field, ink, border color.NRGBA) {
	f.box.FillColor, f.box.StrokeColor, f.box.StrokeWidth = field, border, 1
	if d.Here {
		f.box.StrokeColor, f.box.StrokeWidth = ink, 2
	}
	f.box.Move(at.AddXY(0, 15))
	f.box.Resize(fyne.NewSize(typeWidth, typeHeight))
	f.label.set(d.Label)
	f.label.Move(at.AddXY(1, -1))
	f.label.Resize(fyne.NewSize(typeWidth, 14))
	text, r := d.Text, roleInk
	if text == "" {
		text, r = d.Live, roleInk3
	}
	f.text.role = r
	f.text.set(text)
	f.text.Move(at.AddXY(8, 20))
	f.text.Resize(fyne.NewSize(typeWidth-12, 16))
	width := float32(0)
	if d.Text != "" {
		width = textSize(d.Text, assets.Semibold, 12.5).Width + 1
	}
	f.bar.FillColor = ink
	f.bar.Move(at.AddXY(7.5+min(width, typeWidth-14), 20))
	f.bar.Resize(fyne.NewSize(1.4, 16))
	for _, o := range f.objects() {
		o.Show()
		o.Refresh()
	}
	if !d.Here {
		f.bar.Hide()
	}
}

func (f *typeField) hide() {
	for _, o := range f.objects() {
		o.Hide()
	}
}

// typing shows the fields beside a place of the picture, on a plate, and returns their size.
func (o *overlay) typing(fields []tool.Field, at fyne.Position) fyne.Size {
	p := themed()
	for i, f := range o.fields {
		if i < len(fields) {
			f.show(fields[i], at.AddXY(float32(i)*(typeWidth+typeGap), 0), p.Field, p.Ink, p.FieldBorder)
		} else {
			f.hide()
		}
	}
	return typingSize(len(fields))
}

// typingSize is the size of so many fields side by side.
func typingSize(n int) fyne.Size {
	return fyne.NewSize(float32(n)*(typeWidth+typeGap)-typeGap, typeHeight+15)
}

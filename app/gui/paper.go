package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/widget"

	"enfilade/assets"
)

// paper is a plain rectangle in a role's colour, for grounds and hairlines.
type paper struct {
	widget.BaseWidget
	role role
	min  fyne.Size
}

func newPaper(r role) *paper {
	p := &paper{role: r}
	p.ExtendBaseWidget(p)
	return p
}

// hairline is a rule one px thick, level when its width is free.
func hairline() *paper {
	p := newPaper(roleRule)
	p.min = fyne.NewSize(1, 1)
	return p
}

// CreateRenderer is for the toolkit.
func (p *paper) CreateRenderer() fyne.WidgetRenderer {
	return &paperRenderer{p, canvas.NewRectangle(p.role(themed()))}
}

type paperRenderer struct {
	p *paper
	r *canvas.Rectangle
}

func (r *paperRenderer) Layout(s fyne.Size) { r.r.Resize(s) }
func (r *paperRenderer) MinSize() fyne.Size { return r.p.min }
func (r *paperRenderer) Refresh() {
	r.r.FillColor = r.p.role(themed())
	canvas.Refresh(r.r)
}
func (r *paperRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.r} }
func (r *paperRenderer) Destroy()                     {}

// on lays content on a ground of a role's colour.
func on(r role, content fyne.CanvasObject) *fyne.Container {
	return container.NewStack(newPaper(r), content)
}

// inset leaves room around content.
func inset(left, top, right, bottom float32, content fyne.CanvasObject) *fyne.Container {
	return container.New(insets{left, top, right, bottom}, content)
}

type insets struct{ left, top, right, bottom float32 }

func (i insets) MinSize(objects []fyne.CanvasObject) fyne.Size {
	var m fyne.Size
	for _, o := range objects {
		if o.Visible() {
			m = m.Max(o.MinSize())
		}
	}
	return m.AddWidthHeight(i.left+i.right, i.top+i.bottom)
}

func (i insets) Layout(objects []fyne.CanvasObject, s fyne.Size) {
	for _, o := range objects {
		o.Move(fyne.NewPos(i.left, i.top))
		o.Resize(fyne.NewSize(s.Width-i.left-i.right, s.Height-i.top-i.bottom))
	}
}

// icon is one of our icons in a role's colour.
type icon struct {
	widget.BaseWidget
	name string
	role role
	side float32
}

func newIcon(name string, side float32, r role) *icon {
	i := &icon{name: name, role: r, side: side}
	i.ExtendBaseWidget(i)
	return i
}

// set changes the icon.
func (i *icon) set(name string, r role) {
	if i.name != name || !sameRole(i.role, r) {
		i.name, i.role = name, r
		i.Refresh()
	}
}

func sameRole(a, b role) bool { p := themed(); return a(p) == b(p) }

// CreateRenderer is for the toolkit.
func (i *icon) CreateRenderer() fyne.WidgetRenderer {
	r := &iconRenderer{i: i, img: &canvas.Image{FillMode: canvas.ImageFillContain}}
	r.Refresh()
	return r
}

type iconRenderer struct {
	i   *icon
	img *canvas.Image
}

func (r *iconRenderer) Layout(s fyne.Size) {
	r.img.Move(fyne.NewPos((s.Width-r.i.side)/2, (s.Height-r.i.side)/2))
	r.img.Resize(fyne.NewSquareSize(r.i.side))
}
func (r *iconRenderer) MinSize() fyne.Size { return fyne.NewSquareSize(r.i.side) }
func (r *iconRenderer) Refresh() {
	r.img.Resource = nil
	if r.i.name != "" {
		r.img.Resource = iconResource(r.i.name, svgColour(r.i.role(themed())))
	}
	r.img.Refresh()
}
func (r *iconRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.img} }
func (r *iconRenderer) Destroy()                     {}

// iconResource names the resource by icon and colour, for the toolkit caches pictures by name.
func iconResource(name, colour string) fyne.Resource {
	return fyne.NewStaticResource(name+colour+".svg", assets.IconIn(name, colour))
}

// around lays a middle out between four edges, any of which may be nil, without gaps.
func around(top, bottom, left, right, middle fyne.CanvasObject) *fyne.Container {
	objects := []fyne.CanvasObject{middle}
	for _, o := range []fyne.CanvasObject{top, bottom, left, right} {
		if o != nil {
			objects = append(objects, o)
		}
	}
	return container.New(edges{top, bottom, left, right}, objects...)
}

type edges struct{ top, bottom, left, right fyne.CanvasObject }

func sizeOf(o fyne.CanvasObject) fyne.Size {
	if o == nil || !o.Visible() {
		return fyne.Size{}
	}
	return o.MinSize()
}

// MinSize is for the toolkit.
func (e edges) MinSize(o []fyne.CanvasObject) fyne.Size {
	t, b, l, r, m := sizeOf(e.top), sizeOf(e.bottom), sizeOf(e.left), sizeOf(e.right), sizeOf(o[0])
	return fyne.NewSize(max(t.Width, b.Width, l.Width+m.Width+r.Width), t.Height+b.Height+max(l.Height, m.Height, r.Height))
}

// Layout is for the toolkit.
func (e edges) Layout(o []fyne.CanvasObject, s fyne.Size) {
	place := func(o fyne.CanvasObject, x, y, w, h float32) {
		if o != nil {
			o.Move(fyne.NewPos(x, y))
			o.Resize(fyne.NewSize(w, h))
		}
	}
	t, b, l, r := sizeOf(e.top).Height, sizeOf(e.bottom).Height, sizeOf(e.left).Width, sizeOf(e.right).Width
	place(e.top, 0, 0, s.Width, t)
	place(e.bottom, 0, s.Height-b, s.Width, b)
	place(e.left, 0, t, l, s.Height-t-b)
	place(e.right, s.Width-r, t, r, s.Height-t-b)
	place(o[0], l, t, s.Width-l-r, s.Height-t-b)
}

// pile stacks objects from the top without gaps.
func pile(objects ...fyne.CanvasObject) *fyne.Container { return container.New(piled{}, objects...) }

type piled struct{}

// MinSize is for the toolkit.
func (piled) MinSize(o []fyne.CanvasObject) (m fyne.Size) {
	for _, x := range o {
		s := sizeOf(x)
		m.Width, m.Height = max(m.Width, s.Width), m.Height+s.Height
	}
	return m
}

// Layout is for the toolkit.
func (piled) Layout(o []fyne.CanvasObject, s fyne.Size) {
	y := float32(0)
	for _, x := range o {
		if x.Visible() {
			h := x.MinSize().Height
			x.Move(fyne.NewPos(0, y))
			x.Resize(fyne.NewSize(s.Width, h))
			y += h
		}
	}
}
